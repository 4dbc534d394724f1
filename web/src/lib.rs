//! The Linehut page: what is typed is kept and shown; what is computed is the engine's.
//!
//! - [`tools`] lists the tools there are; each has a module of its own and a page.
//! - [`draft`] is the one store; [`pads`] is what it holds, pure; [`keep`] writes it to this phone.
//! - [`shell`] stands around every view; [`route`] says which is open.
//! - The other modules are components, one noun each. Views hold no formulas.

pub mod air;
pub mod answer;
pub mod caution;
pub mod cells;
pub mod check_row;
pub mod checks_view;
mod clock;
mod code;
pub mod derived;
pub mod draft;
mod dropped;
pub mod field;
pub mod file;
pub mod first_visit;
pub mod fold;
pub mod form;
pub mod icon;
pub mod keep;
pub mod line;
pub mod notice;
pub mod offline;
pub mod pads;
pub mod piece;
pub mod route;
pub mod run;
pub mod settings;
pub mod settled;
pub mod sheet;
pub mod shelf;
pub mod shell;
pub mod span_bar;
pub mod start;
pub mod string;
#[cfg(test)]
mod testing;
pub mod theme;
pub mod tool_page;
pub mod tools;
pub mod verdict;
pub mod working;

use std::cell::Cell;
use std::rc::Rc;

use leptos::prelude::*;
use wasm_bindgen_futures::spawn_local;

use draft::Draft;
use keep::Keeper;
use shell::shell;

/// Reads what was kept, then puts the page up. Storage that does not answer is not waited for.
pub fn begin() {
    // The store outlives the page's views: it is made before them.
    let owner = Owner::new();
    let draft = owner.with(|| Draft::new(Keeper::new()));
    std::mem::forget(owner);

    let up = Rc::new(Cell::new(false));
    let put_up = move || {
        if !up.replace(true) {
            std::mem::forget(piece::mount(&document().body().expect("the page has a body"), move || shell(draft)));
        }
    };
    let waited = put_up.clone();
    set_timeout(
        move || {
            draft.keeper().give_up_waiting();
            waited();
        },
        keep::PATIENCE,
    );
    spawn_local(async move {
        if let Some(kept) = draft.keeper().open().await {
            draft.adopt(&kept);
            if let Some(key) = kept.open_site {
                draft.reopen(key).await;
            }
        }
        put_up();
    });
}
