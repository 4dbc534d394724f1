//! Values computed from others, and pieces made from them.
//!
//! The value of a [`Memo`] is held behind one type: the graph's code is then made once, not once for each kind of value. That is
//! a twentieth of the page.

use std::any::Any;
use std::marker::PhantomData;
use std::sync::Arc;

use leptos::prelude::*;

use crate::piece::{Make, Piece};

/// A value that is computed again at each change, and tells only where it differs. A handle: copying it copies nothing.
pub struct Memo<T>(Signal<Held>, PhantomData<fn() -> T>);

/// A value of any kind that can be compared.
#[derive(Clone)]
struct Held(Arc<dyn Hold>);

trait Hold: Send + Sync {
    fn any(&self) -> &dyn Any;
    fn same(&self, other: &dyn Any) -> bool;
}

impl<T: PartialEq + Send + Sync + 'static> Hold for T {
    fn any(&self) -> &dyn Any {
        self
    }

    fn same(&self, other: &dyn Any) -> bool {
        other.downcast_ref::<T>() == Some(self)
    }
}

impl PartialEq for Held {
    fn eq(&self, other: &Self) -> bool {
        self.0.same(other.0.any())
    }
}

impl<T> Clone for Memo<T> {
    fn clone(&self) -> Self {
        *self
    }
}

impl<T> Copy for Memo<T> {}

impl<T: 'static> Memo<T> {
    /// Reads it, and is told when it changes.
    pub fn with<U>(self, read: impl FnOnce(&T) -> U) -> U {
        read(of(&self.0.get()))
    }

    /// Reads it once.
    pub fn with_untracked<U>(self, read: impl FnOnce(&T) -> U) -> U {
        read(of(&self.0.get_untracked()))
    }

    /// It as it is, told when it changes.
    pub fn get(self) -> T
    where
        T: Clone,
    {
        self.with(T::clone)
    }

    /// It as it is now.
    pub fn get_untracked(self) -> T
    where
        T: Clone,
    {
        self.with_untracked(T::clone)
    }

    /// Is told when it changes.
    pub fn track(self) {
        self.0.track();
    }
}

fn of<T: 'static>(held: &Held) -> &T {
    held.0.any().downcast_ref().expect("a memo holds what it was made for")
}

/// A value that is computed again at each change, and tells only where it differs.
pub fn memo<T: PartialEq + Send + Sync + 'static>(compute: impl Fn() -> T + Send + Sync + 'static) -> Memo<T> {
    Memo(boxed_memo(Box::new(compute)), PhantomData)
}

fn boxed_memo(compute: Box<dyn Compute>) -> Signal<Held> {
    leptos::prelude::Memo::new(move |_| compute.compute()).into()
}

/// What computes a value of any kind.
trait Compute: Send + Sync {
    fn compute(&self) -> Held;
}

impl<F: Fn() -> T + Send + Sync, T: Hold + 'static> Compute for F {
    fn compute(&self) -> Held {
        Held(Arc::new(self()))
    }
}

/// A value that is told only when it is put in again, with what puts in what another is now.
pub fn follower<T: Clone + PartialEq + Send + Sync + 'static>(
    of: Memo<T>,
) -> (Memo<T>, impl Fn() + Clone + Send + Sync + 'static) {
    let (held, hold) = signal(of.0.get_untracked());
    (Memo(held.into(), PhantomData), move || hold.set(of.0.get_untracked()))
}

/// What `view` gives, while `holds` does. Made when it begins to hold, and taken away when it ends.
pub fn when(holds: impl Fn() -> bool + Send + Sync + 'static, view: impl Fn() -> Piece + 'static) -> Piece {
    when_it(memo(holds), Box::new(view))
}

fn when_it(holds: Memo<bool>, view: Box<dyn Make>) -> Piece {
    dynamic(move || if holds.get() { view.make() } else { Piece::Nothing })
}

/// What `view` gives, made again at each change of what it reads.
pub fn dynamic(view: impl Fn() -> Piece + 'static) -> Piece {
    Piece::Live(Box::new(view))
}
