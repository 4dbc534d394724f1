//! A figure of a chemistry: the range that is published, the value chosen inside it, and why.

use crate::source::Clause;

/// From the least to the greatest.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Span<Q> {
    /// The least.
    pub least: Q,
    /// The greatest.
    pub greatest: Q,
}

impl<Q: Copy + PartialOrd> Span<Q> {
    /// From `least` to `greatest`.
    #[must_use]
    pub const fn new(least: Q, greatest: Q) -> Self {
        Self { least, greatest }
    }

    /// Whether `value` lies in it, ends included.
    pub fn holds(self, value: Q) -> bool {
        self.least <= value && value <= self.greatest
    }
}

/// A figure with its range and the value that stands where nobody entered the maker's.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Figure<Q> {
    /// The value that is used where none is entered.
    pub chosen: Q,
    /// The range met with.
    pub range: Span<Q>,
    /// Why this value of the range.
    pub why: &'static str,
    /// Where the range is from.
    pub source: Clause,
}
