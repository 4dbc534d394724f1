//! Pieces of the page: what `view!` makes and what the browser shows of it.
//!
//! A piece is made anew whenever what it reads changes, and is then set against what stands there ([`State::take`]): only
//! what differs is touched, so that a field that is typed into keeps its cursor and a button its focus.
//!
//! One type for all of them, and no code that is made once for each view: a tenth of the page was that code.

mod filled;
mod hole;
mod shape;
mod state;
mod value;

use std::borrow::Cow;

use leptos::prelude::{Get, RwSignal};

use crate::derived::Memo;

pub use filled::Filled;
pub use markup::view;
pub use shape::Shape;
pub use state::{Mounted, mount};
pub use value::{IntoValue, Value};

/// A piece of the page, not yet in it.
pub enum Piece {
    /// Nothing.
    Nothing,
    /// Text.
    Text(Cow<'static, str>),
    /// Markup with its values.
    Filled(Filled),
    /// Several, one after the other.
    Many(Vec<Piece>),
    /// Made again whenever what it reads changes.
    Live(Box<dyn Make>),
}

/// What makes a piece, as often as it is asked. A trait of its own, as what stands behind a `dyn Fn` holds two functions more.
pub trait Make {
    /// Makes it.
    fn make(&self) -> Piece;
}

impl<F: Fn() -> T, T: IntoPiece> Make for F {
    fn make(&self) -> Piece {
        self().piece()
    }
}

/// What can stand among the children of an element.
pub trait IntoPiece {
    /// It as a piece.
    fn piece(self) -> Piece;
}

impl IntoPiece for Piece {
    fn piece(self) -> Piece {
        self
    }
}

impl IntoPiece for () {
    fn piece(self) -> Piece {
        Piece::Nothing
    }
}

impl IntoPiece for &'static str {
    fn piece(self) -> Piece {
        Piece::Text(Cow::Borrowed(self))
    }
}

impl IntoPiece for String {
    fn piece(self) -> Piece {
        Piece::Text(Cow::Owned(self))
    }
}

impl<T: IntoPiece> IntoPiece for Option<T> {
    fn piece(self) -> Piece {
        self.map_or(Piece::Nothing, T::piece)
    }
}

impl<T: IntoPiece> IntoPiece for Vec<T> {
    fn piece(self) -> Piece {
        Piece::Many(self.into_iter().map(T::piece).collect())
    }
}

impl<F: Fn() -> T + 'static, T: IntoPiece> IntoPiece for F {
    fn piece(self) -> Piece {
        Piece::Live(Box::new(self))
    }
}

impl<T: IntoPiece + Clone + Send + Sync + 'static> IntoPiece for RwSignal<T> {
    fn piece(self) -> Piece {
        Piece::Live(Box::new(move || self.get()))
    }
}

impl<T: IntoPiece + Clone + 'static> IntoPiece for Memo<T> {
    fn piece(self) -> Piece {
        Piece::Live(Box::new(move || self.get()))
    }
}
