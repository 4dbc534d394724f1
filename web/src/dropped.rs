//! What is dropped on the page: a file, or text that holds a site. It is read as a chosen or a pasted one is.

use crate::derived::when;
use crate::piece::{Piece, view};
use leptos::ev::{self, DragEvent};
use leptos::prelude::*;
use wasm_bindgen::JsCast;
use wasm_bindgen_futures::spawn_local;

use crate::draft::Draft;
use crate::file;
use crate::sheet::took;

/// Listens for what is dropped, and shows where it would land while it is held over the page.
pub fn watch(draft: Draft) -> Piece {
    let over = RwSignal::new(false);
    let held = window_event_listener(ev::dragover, move |event| {
        if is_ours(&event) {
            // Says that it may be dropped here.
            event.prevent_default();
            over.set(true);
        }
    });
    let gone = window_event_listener(ev::dragleave, move |event| {
        // From one element to the next it is still over the page.
        if event.related_target().is_none() {
            over.set(false);
        }
    });
    let dropped = window_event_listener(ev::drop, move |event| {
        over.set(false);
        if is_ours(&event) {
            // A browser would leave the page for the file.
            event.prevent_default();
            take(draft, &event);
        }
    });
    on_cleanup(move || {
        held.remove();
        gone.remove();
        dropped.remove();
    });
    when(
        move || over.get(),
        || view! { <div class="landing" aria-hidden="true"><p>"Drop it here to open it"</p></div> },
    )
}

/// Text that is dragged into a field belongs to the field.
fn is_ours(event: &DragEvent) -> bool {
    let has_file = event.data_transfer().is_some_and(|data| data.types().includes(&"Files".into(), 0));
    let into_field = event.target().and_then(|target| target.dyn_into::<web_sys::HtmlInputElement>().ok());
    has_file || into_field.is_none()
}

fn take(draft: Draft, event: &DragEvent) {
    let Some(data) = event.data_transfer() else { return };
    match data.files().and_then(|files| files.get(0)) {
        Some(file) => spawn_local(async move {
            let found = file::open(&file).await;
            draft.tell(took(draft, &file.name(), found));
        }),
        None => {
            let text = data.get_data("text/plain").unwrap_or_default();
            draft.tell(took(draft, "what was dropped", file::read(&text)));
        }
    }
}
