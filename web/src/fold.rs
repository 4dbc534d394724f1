//! Folds: unfold in place, and stay as they were left.

use crate::derived::{Memo, memo, when};
use crate::piece::{Make, Piece, view};
use std::rc::Rc;

use leptos::prelude::*;

use crate::icon::icon;

/// Which folds are open, while the page is.
#[derive(Clone, Copy)]
pub struct Folds(RwSignal<Vec<String>>);

impl Folds {
    /// All closed.
    pub fn new() -> Self {
        Self(RwSignal::new(Vec::new()))
    }

    /// Whether the fold `id` is open.
    pub fn is_open(self, id: &str) -> bool {
        self.0.with(|open| open.iter().any(|one| one == id))
    }

    /// Opens or closes it.
    pub fn turn(self, id: &str) {
        self.0.update(|open| {
            let before = open.len();
            open.retain(|one| one != id);
            if open.len() == before {
                open.push(id.to_owned());
            }
        });
    }

    /// Opens it.
    pub fn open(self, id: &str) {
        self.0.update(|open| {
            if !open.iter().any(|one| one == id) {
                open.push(id.to_owned());
            }
        });
    }
}

impl Default for Folds {
    fn default() -> Self {
        Self::new()
    }
}

/// A fold: what it is remembered by, one of its own on the page; its head; what lies in it, in a few words; and that.
///
/// What is in it is made when it is opened, not before.
pub fn fold(
    id: impl Into<String>,
    title: &'static str,
    says: Memo<String>,
    inside: impl Fn() -> Piece + 'static,
) -> Piece {
    marked_fold(None, id.into(), title, says, Rc::new(inside))
}

/// The same with a symbol before its head.
pub fn marked_fold(
    symbol: Option<&'static str>,
    id: String,
    title: &'static str,
    says: Memo<String>,
    inside: Rc<dyn Make>,
) -> Piece {
    let folds = expect_context::<Folds>();
    let id = StoredValue::new(id);
    let open = memo(move || id.with_value(|id| folds.is_open(id)));
    let body = move || format!("fold-{}", id.get_value().replace('/', "-"));
    view! {
        <div class="fold" data-open=move || open.get().then_some("")>
            <button
                class="fold-head"
                type="button"
                aria-expanded=move || open.get().to_string()
                aria-controls=move || open.get().then(body)
                on:click=move |_| id.with_value(|id| folds.turn(id))
            >
                {symbol.map(|name| icon(name, ""))}
                {title}
                <span>{says}</span>
            </button>
            {when(move || open.get(), move || view! { <div class="fold-body" id=body()>{inside.make()}</div> })}
        </div>
    }
}
