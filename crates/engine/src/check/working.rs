//! Workings: the steps from inputs to a value, made by the code that computes the value.
//!
//! A method is handed [`Steps`]. Silent, they leave nothing but the number, and the closures that would word the steps
//! are never called. Written, the same run records each step.

use super::verdict::{Check, Sense};
use crate::field::Field;
use crate::quantity::{Amount, Quantity};
use crate::show;
use crate::source::Clause;
use crate::unit::Unit;

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
///
/// One type for both, so that each method is compiled once: on a phone its size is the time to load it.
#[derive(Clone, Debug, Default)]
pub struct Steps(Option<Vec<Step>>);

impl Steps {
    /// Keeps nothing: only the number is wanted.
    #[must_use]
    pub const fn silent() -> Self {
        Self(None)
    }

    /// Keeps every step.
    #[must_use]
    pub const fn written() -> Self {
        Self(Some(Vec::new()))
    }

    /// What was kept.
    #[must_use]
    pub fn steps(&self) -> &[Step] {
        self.0.as_deref().unwrap_or_default()
    }

    /// What was kept.
    #[must_use]
    pub fn into_steps(self) -> Vec<Step> {
        self.0.unwrap_or_default()
    }

    /// Passes `result` on. Where steps are kept, `word` says what was done: formula, numbers put in, and origin.
    pub fn step<Q: Quantity>(
        &mut self,
        what: &'static str,
        result: Q,
        word: impl FnOnce() -> (&'static str, String, Origin),
    ) -> Q {
        if let Some(kept) = &mut self.0 {
            let (formula, put_in, origin) = word();
            kept.push(Step { what, formula, put_in, result: result.amount(), origin });
        }
        result
    }

    /// The last step of a check that was judged: its margin to the limit, which is written by `bound`.
    pub fn margin<Id>(&mut self, check: &Check<Id>, bound: fn(Amount) -> String) {
        let (Some(value), Some(limit), Some(margin)) = (check.value, check.limit, check.margin) else { return };
        self.step("Margin to the limit", margin, || {
            let (value, bound) = (show::step(value), bound(limit.amount));
            let (formula, mut put_in) = match (limit.sense, limit.amount.unit) {
                // Judged from absolute zero, shown in degrees.
                (_, Unit::DegreeCelsius) => {
                    ("(T − limit) / limit, from absolute zero", format!("{value} against {bound}"))
                }
                (Sense::AtMost, _) => ("(limit − value) / limit", format!("({bound} − {value}) / {bound}")),
                (Sense::AtLeast, _) => ("(value − limit) / limit", format!("({value} − {bound}) / {bound}")),
            };
            if check.reserve.get() > 0.0 {
                put_in += &format!("; reserve wanted {}", show::given(check.reserve.amount()));
            }
            (formula, put_in, Origin::Before)
        });
    }
}
