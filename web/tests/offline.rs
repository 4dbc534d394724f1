//! Keeping a copy, in a browser: the page here is the test runner's, which has no worker to offer.

use leptos::prelude::*;
use wasm_bindgen_test::{wasm_bindgen_test, wasm_bindgen_test_configure};
use web::offline::{self, Copy};

wasm_bindgen_test_configure!(run_in_browser);

#[wasm_bindgen_test]
fn a_page_that_was_served_is_not_the_one_file() {
    assert!(!offline::one_file());
}

#[wasm_bindgen_test]
fn the_one_file_is_its_own_copy() {
    let root = document().document_element().expect("a page has a root");
    root.set_attribute("data-form", "one-file").expect("the root takes attributes");
    // Signals live as long as their owner.
    let owner = Owner::new();
    let offline = owner.with(offline::watch);
    root.remove_attribute("data-form").expect("the root gives attributes up");
    assert_eq!(offline.copy.get_untracked(), Copy::OneFile);
    assert!(!offline.update_ready.get_untracked());
}

#[wasm_bindgen_test]
fn nothing_is_said_to_be_kept_before_it_is() {
    // Signals live as long as their owner.
    let owner = Owner::new();
    let offline = owner.with(offline::watch);
    assert_eq!(offline.copy.get_untracked(), Copy::NotYet);
    assert!(!offline.update_ready.get_untracked());
}
