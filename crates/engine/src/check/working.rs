//! Workings: the steps from inputs to a value, made by the code that computes the value.
//!
//! A method is generic over [`Steps`]. With [`Silent`] it leaves nothing but the number, and the closures that would
//! word the steps are never called. With [`Written`] the same run records each step.

use crate::field::Field;
use crate::quantity::{Amount, Quantity};
use crate::source::Clause;

/// Where a number of a step comes from.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Origin {
    /// It follows from the steps before.
    Before,
    /// Somebody entered it.
    Entered(Field),
    /// It was assumed, as nothing was entered.
    Assumed(Field),
    /// A publication says so.
    Published(Clause),
}

/// One step of a working.
#[derive(Clone, Debug, PartialEq)]
pub struct Step {
    /// What is found, in a few words.
    pub what: &'static str,
    /// The formula in the trade's symbols; empty where the step only reads an input.
    pub formula: &'static str,
    /// The formula with the numbers put in.
    pub put_in: String,
    /// The result.
    pub result: Amount,
    /// Where it comes from.
    pub origin: Origin,
}

/// Takes the steps of a method, or lets them pass.
pub trait Steps {
    /// Passes `result` on. Where steps are kept, `word` says what was done: formula, numbers put in, and origin.
    fn step<Q: Quantity>(
        &mut self,
        what: &'static str,
        result: Q,
        word: impl FnOnce() -> (&'static str, String, Origin),
    ) -> Q;
}

/// Keeps nothing: only the number is wanted.
#[derive(Clone, Copy, Debug, Default)]
pub struct Silent;

impl Steps for Silent {
    fn step<Q: Quantity>(
        &mut self,
        _what: &'static str,
        result: Q,
        _word: impl FnOnce() -> (&'static str, String, Origin),
    ) -> Q {
        result
    }
}

/// Keeps every step.
#[derive(Clone, Debug, Default)]
pub struct Written(pub Vec<Step>);

impl Steps for Written {
    fn step<Q: Quantity>(
        &mut self,
        what: &'static str,
        result: Q,
        word: impl FnOnce() -> (&'static str, String, Origin),
    ) -> Q {
        let (formula, put_in, origin) = word();
        self.0.push(Step { what, formula, put_in, result: result.amount(), origin });
        result
    }
}
