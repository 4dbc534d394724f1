//! A symbol from the sheet of symbols in the page.

use crate::piece::{Piece, view};

/// The symbol `name` of `symbols.svg`, with the class that sizes it where its surroundings do not.
///
/// It says nothing to a screen reader: the word beside it does.
pub fn icon(name: &'static str, class: &'static str) -> Piece {
    view! { <svg class=class aria-hidden="true"><use href=format!("#{name}")></use></svg> }
}
