//! The Sheet view: what is kept on this phone, saved to a file, opened from one, or forgotten.

use crate::derived::memo;
use leptos::prelude::*;
use wasm_bindgen_futures::spawn_local;
use web_sys::HtmlInputElement;

use crate::draft::use_draft;
use crate::file;
use crate::keep::Keeping;
use crate::offline::{self, Copy};
use crate::pads::{Edit, Pads};
use crate::tools::Tool;

/// What is kept on this phone.
#[component]
pub fn Sheet() -> impl IntoView {
    let draft = use_draft();
    let said = RwSignal::new(String::new());
    let save = move |_| {
        said.set(match file::save(&draft.kept()) {
            Ok(name) => format!("Saved as {name}."),
            Err(_) => "Not saved: the browser makes no files here.".to_owned(),
        });
    };
    let count = memo(move || draft.with(Pads::len));
    view! {
        <div class="one-column">
            <div class="page-head"><h1 tabindex="-1">"Sheet"</h1><span class="aside">"on this phone"</span></div>
            <h2 class="sub">"Kept" <span>{move || entries(count.get())}</span></h2>
            <p class="say">{move || keeping(draft.keeper().state(), draft.keeper().lasting())}</p>
            <div class="btns">
                <button class="btn solid" type="button" on:click=save>"Save to a file"</button>
                <OpenFile said=said/>
            </div>
            <p class="said" aria-live="polite">{said}</p>
            <h2 class="sub">"With no signal"</h2>
            <ul class="signal">
                {Tool::ALL
                    .iter()
                    .map(|tool| view! { <li><span>{tool.name()}</span><b>{move || works(offline::copy())}</b></li> })
                    .collect_view()}
            </ul>
            <h2 class="sub">"Forget"</h2>
            <Forget said=said count=count/>
        </div>
    }
}

/// Opens a file in place of what is here; undo brings back what was.
#[component]
fn OpenFile(said: RwSignal<String>) -> impl IntoView {
    let draft = use_draft();
    let chosen = move |event: leptos::ev::Event| {
        let input: HtmlInputElement = event_target(&event);
        let Some(file) = input.files().and_then(|files| files.get(0)) else { return };
        // So that choosing the same file again is a change again.
        input.set_value("");
        spawn_local(async move {
            said.set(match file::open(&file).await {
                Ok(kept) => {
                    let words =
                        format!("Opened {}: {}. Undo brings back what was here.", file.name(), entries(kept.len()));
                    draft.edit(Edit::Open(kept));
                    words
                }
                Err(why) => format!("Not opened, nothing changed: {why}."),
            });
        });
    };
    view! {
        <label class="btn">
            <input class="vh" type="file" accept=".json,application/json" on:change=chosen/>
            "Open a file"
        </label>
    }
}

/// Forgets everything, asked twice in the same place.
#[component]
fn Forget(said: RwSignal<String>, count: Memo<usize>) -> impl IntoView {
    let draft = use_draft();
    let asked = RwSignal::new(false);
    let forget = move |_| {
        draft.edit(Edit::Forget);
        asked.set(false);
        said.set("Forgotten. Undo brings it back until the page is closed.".to_owned());
    };
    view! {
        {move || {
            if asked.get() {
                view! { <p class="say">
                {move || format!("Forget {} on this phone? A file that was saved stays.", entries(count.get()))}
            </p>
            <div class="btns">
                <button class="btn solid" type="button" on:click=forget>"Forget all"</button>
                <button class="btn plain" type="button" on:click=move |_| asked.set(false)>"Keep it"</button>
            </div> }.into_any()
            } else {
                view! {
                    <div class="btns">
                        <button class="btn plain" type="button" on:click=move |_| asked.set(true)>
                            "Forget all that was typed"
                        </button>
                    </div>
                }.into_any()
            }
        }}
    }
}

fn entries(count: usize) -> String {
    match count {
        0 => "nothing typed yet".to_owned(),
        1 => "1 entry".to_owned(),
        count => format!("{count} entries"),
    }
}

fn keeping(state: Keeping, lasting: Option<bool>) -> String {
    match (state, lasting) {
        (Keeping::Waiting, _) => "Waiting for the browser’s storage.".to_owned(),
        (Keeping::Busy, _) => "Keeping what you typed; this takes longer than it should.".to_owned(),
        (Keeping::Not(why), _) => {
            format!("Not kept on this phone: {}. Save it to a file before you close the page.", why.words())
        }
        (Keeping::Kept, Some(false)) => {
            "Everything you typed is kept in this browser as you type. The browser has not promised to keep it for good: \
             when space runs short it may clear it. Save a file as well."
                .to_owned()
        }
        (Keeping::Kept, _) => "Everything you typed is kept in this browser as you type.".to_owned(),
    }
}

const fn works(copy: Copy) -> &'static str {
    match copy {
        Copy::Kept | Copy::OneFile => "works",
        Copy::Keeping { .. } => "being copied",
        Copy::NotYet => "not yet",
        Copy::NotPossible => "only in the one file",
    }
}
