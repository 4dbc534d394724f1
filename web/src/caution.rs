//! Cautions: what can hurt, said before the act it concerns. Never closable.

use crate::piece::{IntoPiece, Piece, view};

/// A caution: what to know and what to do.
pub fn caution(says: impl IntoPiece) -> Piece {
    view! { <div class="caution" role="note"><b>"Caution"</b>{says}</div> }
}
