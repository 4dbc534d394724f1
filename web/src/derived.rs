//! Values computed from others.
//!
//! The computing closure is boxed: the graph's code is then made once for each kind of value, not once for each closure.
//! That is a tenth of the page.

use crate::piece::Piece;
use leptos::prelude::*;

/// A value that is computed again at each change, and tells only where it differs.
pub fn memo<T: PartialEq + Send + Sync + 'static>(compute: impl Fn() -> T + Send + Sync + 'static) -> Memo<T> {
    boxed_memo(Box::new(compute))
}

fn boxed_memo<T: PartialEq + Send + Sync + 'static>(compute: Box<dyn Fn() -> T + Send + Sync>) -> Memo<T> {
    Memo::new(move |_| compute())
}

/// A value that is computed each time it is read.
pub fn derived<T: Send + Sync + 'static>(compute: impl Fn() -> T + Send + Sync + 'static) -> Signal<T> {
    boxed_signal(Box::new(compute))
}

fn boxed_signal<T: Send + Sync + 'static>(compute: Box<dyn Fn() -> T + Send + Sync>) -> Signal<T> {
    Signal::derive(compute)
}

/// What `view` gives, while `holds` does. Made when it begins to hold, and taken away when it ends.
pub fn when(holds: impl Fn() -> bool + Send + Sync + 'static, view: impl Fn() -> Piece + 'static) -> Piece {
    let holds = memo(holds);
    dynamic(move || if holds.get() { view() } else { Piece::Nothing })
}

/// What `view` gives, made again at each change of what it reads.
pub fn dynamic(view: impl Fn() -> Piece + 'static) -> Piece {
    Piece::Live(Box::new(view))
}
