//! The open site as codes that another phone's camera reads, with no network between the two; and the pieces that come in so.

mod arriving;
mod drawn;
#[cfg(target_arch = "wasm32")]
mod press;
#[cfg(not(target_arch = "wasm32"))]
#[path = "no_press.rs"]
mod press;

use std::time::Duration;

use crate::derived::{dynamic, memo};
use crate::fold::fold;
use crate::piece::{Piece, view};
use leptos::prelude::*;
use wasm_bindgen_futures::spawn_local;

use crate::draft::use_draft;

pub use arriving::{Arriving, arriving};
use drawn::Frame;

/// How long a code stands before the next, where they step by themselves. Chosen: a camera takes about a second.
const STANDS: Duration = Duration::from_millis(2500);

/// The codes, folded until they are wanted.
pub fn codes() -> Piece {
    fold("sheet/codes", "As a code to scan", memo(|| "no network".to_owned()), inside)
}

fn inside() -> Piece {
    let draft = use_draft();
    let here = crate::route::here();
    if here.starts_with("file:") {
        return view! {
            <p class="say">
                "A code holds a link, and this page was opened from a file: no other phone can follow a link to it. Save the site and \
                 hand the file over instead."
            </p>
        };
    }
    let text = memo(move || draft.with(|pads| pads.site().map(|open| bridge::site::write_short(&open.site))));
    let frames = RwSignal::new(Vec::<Frame>::new());
    let at = RwSignal::new(0_usize);
    let by_itself = RwSignal::new(false);
    Effect::new(move |_| {
        if by_itself.get() {
            step_on(at, frames, by_itself);
        }
    });
    Effect::new(move |_| {
        let Some(wanted) = text.get() else { return };
        let here = here.clone();
        spawn_local(async move {
            let pressed = press::pressed(wanted.as_bytes()).await;
            // The site may have changed meanwhile: then another of these is under way.
            if text.with_untracked(|now| now.as_ref() == Some(&wanted)) {
                let (bytes, compressed) = pressed.map_or_else(|| (wanted.into_bytes(), false), |bytes| (bytes, true));
                at.set(0);
                frames.set(drawn::frames(&here, &bytes, compressed));
            }
        });
    });
    view! {
        {dynamic(move || shown(frames, at, by_itself))}
        <p class="say">
            "The other phone’s own camera reads it and offers a link: follow it. The site stands in the link itself and is sent to no \
             server. The page must be on the other phone already, or have signal to fetch it once."
        </p>
    }
}

fn shown(frames: RwSignal<Vec<Frame>>, at: RwSignal<usize>, by_itself: RwSignal<bool>) -> Piece {
    let of = frames.with(Vec::len);
    if of == 0 {
        return view! { <p class="say">"Drawing the code."</p> };
    }
    let place = at.get().min(of - 1);
    let (size, path) = frames.with(|frames| (frames[place].size, frames[place].path.clone()));
    let name = format!("Code {} of {of}", place + 1);
    let link = frames.with(|frames| frames[place].link.clone());
    view! {
        <svg class="code" viewBox=format!("0 0 {size} {size}") role="img" aria-label=name data-link=link>
            <rect width="100%" height="100%"></rect>
            <path d=path></path>
        </svg>
        {(of > 1).then(|| steps(at, by_itself, place, of))}
    }
}

/// One code after the other, by hand or by itself.
fn steps(at: RwSignal<usize>, by_itself: RwSignal<bool>, place: usize, of: usize) -> Piece {
    let to = move |place: usize| {
        move |_| {
            by_itself.set(false);
            at.set(place);
        }
    };
    let turn = move |_| by_itself.update(|now| *now = !*now);
    view! {
        <p class="code-place">{format!("{} of {of}: scan each of them, in any order", place + 1)}</p>
        <div class="btns">
            <button class="btn" type="button" on:click=to((place + of - 1) % of)>"Back"</button>
            <button class="btn solid" type="button" on:click=to((place + 1) % of)>"Next"</button>
            <button class="btn plain" type="button" on:click=turn>
                {move || if by_itself.get() { "Stop" } else { "Step by itself" }}
            </button>
        </div>
    }
}

fn step_on(at: RwSignal<usize>, frames: RwSignal<Vec<Frame>>, by_itself: RwSignal<bool>) {
    set_timeout(
        move || {
            // It may be gone with the codes.
            if by_itself.try_get_untracked() == Some(true) {
                let of = frames.with_untracked(Vec::len).max(1);
                at.update(|at| *at = (*at + 1) % of);
                step_on(at, frames, by_itself);
            }
        },
        STANDS,
    );
}
