//! Keeping, in a real browser's storage.
#![cfg(target_arch = "wasm32")]
#![allow(clippy::future_not_send, reason = "a browser has one thread")]

use engine::field::Field;
use leptos::prelude::*;
use wasm_bindgen_futures::JsFuture;
use wasm_bindgen_test::{wasm_bindgen_test, wasm_bindgen_test_configure};
use web::draft::Draft;
use web::keep::{Keeper, Keeping};
use web::pads::{Edit, Place};
use web::theme::Theme;
use web::tools::Tool;

wasm_bindgen_test_configure!(run_in_browser);

const VOC: Place = (Tool::String, Field::Voc);
const LOW: Place = (Tool::String, Field::RecordLow);

/// A page as it comes up: its store, with what was kept before.
async fn come_up() -> Draft {
    let owner = Owner::new();
    let draft = owner.with(|| Draft::new(Keeper::new()));
    std::mem::forget(owner);
    let kept = draft.keeper().open().await.expect("this browser has storage");
    draft.adopt(&kept);
    draft
}

fn text(draft: Draft, place: Place) -> String {
    draft.with_now(|pads| pads.typed(place).text)
}

async fn written(draft: Draft) {
    for _ in 0..100 {
        let promise = js_sys::Promise::new(&mut |done, _| {
            window().set_timeout_with_callback_and_timeout_and_arguments_0(&done, 20).unwrap();
        });
        JsFuture::from(promise).await.unwrap();
        if draft.keeper().is_done() {
            return;
        }
    }
    panic!("not written after two seconds");
}

/// One test, as all of it stands on one database.
#[wasm_bindgen_test]
async fn what_was_typed_is_there_again_and_two_tabs_do_not_undo_each_other() {
    rexie::Rexie::delete("linehut").await.unwrap();

    let first = come_up().await;
    for text in ["4", "49", "49,", "49,3"] {
        first.edit(Edit::Type(VOC, text.to_owned()));
    }
    first.set_theme(Theme::Night);
    written(first).await;
    assert_eq!(first.keeper().state(), Keeping::Kept);

    let second = come_up().await;
    assert_eq!(text(second, VOC), "49,3");
    assert_eq!(second.theme(), Theme::Night);

    // Both are open; each changes a field the other does not know of.
    second.edit(Edit::Type(LOW, "-31".to_owned()));
    written(second).await;
    first.edit(Edit::Type(VOC, "50".to_owned()));
    written(first).await;
    assert!(first.keeper().elsewhere().get_untracked(), "a tab hears of the other's change");

    let third = come_up().await;
    assert_eq!((text(third, VOC), text(third, LOW)), ("50".to_owned(), "-31".to_owned()));
    Theme::Paper.show();
}
