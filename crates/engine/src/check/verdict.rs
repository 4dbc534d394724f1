//! Verdicts: what a value says when it is set against its limit.

use core::cmp::Ordering;

use super::basis::{Basis, FieldSet};
use crate::order::sort_short;
use crate::quantity::{Amount, Percent, Quantity};
use crate::unit::Unit;

/// Whether a requirement holds.
///
/// In the order of reading: worst first.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Verdict {
    /// Does not hold.
    Breaks,
    /// An input is missing; the check names it.
    Asks,
    /// Holds, inside the reserve; or holds as long as an assumption does.
    Close,
    /// Holds with margin.
    Clears,
}

impl Verdict {
    /// The word, in code and on screen.
    #[must_use]
    pub const fn word(self) -> &'static str {
        match self {
            Self::Breaks => "breaks",
            Self::Asks => "asks",
            Self::Close => "close",
            Self::Clears => "clears",
        }
    }
}

/// What a broken check costs.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Cost {
    /// It can hurt someone or destroy a part.
    Hazard,
    /// It costs harvest, life or comfort.
    Loss,
}

impl Cost {
    /// The word, in code and on screen.
    #[must_use]
    pub const fn word(self) -> &'static str {
        match self {
            Self::Hazard => "hazard",
            Self::Loss => "loss",
        }
    }
}

/// On which side of the limit the value must stay.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Sense {
    /// The value must not pass above the limit. Equal is allowed.
    AtMost,
    /// The value must not fall below the limit. Equal is allowed.
    AtLeast,
}

/// A limit and the side of it that is allowed.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Limit {
    /// Where the limit stands.
    pub amount: Amount,
    /// Which side of it is allowed.
    pub sense: Sense,
}

impl Limit {
    /// The value must not pass above `limit`.
    pub fn at_most(limit: impl Quantity) -> Self {
        Self { amount: limit.amount(), sense: Sense::AtMost }
    }

    /// The value must not fall below `limit`.
    pub fn at_least(limit: impl Quantity) -> Self {
        Self { amount: limit.amount(), sense: Sense::AtLeast }
    }
}

/// What a method found, before it is judged.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Outcome {
    /// The requirement does not arise, such as a window of a controller that has none.
    DoesNotArise,
    /// An input is missing; the basis names it.
    Asks,
    /// A value against a limit.
    Held {
        /// What was found.
        value: Amount,
        /// What it must keep to.
        limit: Limit,
    },
    /// No value satisfies the requirement: an equation without a solution, a rating that does not exist.
    Impossible {
        /// What was found.
        value: Amount,
        /// What it must keep to.
        limit: Limit,
    },
}

/// A judged requirement.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Check<Id> {
    /// Which requirement.
    pub id: Id,
    /// What it costs where it breaks.
    pub cost: Cost,
    /// Whether it holds.
    pub verdict: Verdict,
    /// What was found; none where the check asks.
    pub value: Option<Amount>,
    /// What it must keep to; none where the check asks.
    pub limit: Option<Limit>,
    /// Distance to the limit as a part of the limit; negative where it breaks.
    pub margin: Option<Percent>,
    /// The margin that a careful hand keeps.
    pub reserve: Percent,
    /// The inputs that are missing.
    pub asks: FieldSet,
    /// The inputs whose value was assumed.
    pub assumed: FieldSet,
}

/// Sets a value against its limit. `None` where the requirement does not arise.
///
/// margin = (limit − value) / |limit| for a limit from above, (value − limit) / |limit| for one from below.
///
/// **breaks** below 0; **close** below `reserve`, and also where the check is a hazard and an input was assumed.
pub fn judge<Id>(id: Id, cost: Cost, reserve: Percent, outcome: Outcome, basis: &Basis) -> Option<Check<Id>> {
    let asks = Check {
        id,
        cost,
        verdict: Verdict::Asks,
        value: None,
        limit: None,
        margin: None,
        reserve,
        asks: basis.missing(),
        assumed: basis.assumed(),
    };
    match outcome {
        Outcome::DoesNotArise => None,
        Outcome::Asks => Some(asks),
        Outcome::Held { value, limit } | Outcome::Impossible { value, limit } => {
            let room = match limit.sense {
                Sense::AtMost => limit.amount.number - value.number,
                Sense::AtLeast => value.number - limit.amount.number,
            };
            // A limit of zero has no share; the sign of the distance alone decides.
            let margin = if limit.amount.number == 0.0 {
                room.signum() * 100.0
            } else {
                100.0 * room / limit.amount.number.abs()
            };
            // Sums of decimal fractions end in the last bit: 150.000 000 000 01 is 150.
            let margin = if margin.abs() < 1e-9 { 0.0 } else { margin };
            let impossible = matches!(outcome, Outcome::Impossible { .. });
            let rests_on_assumption = cost == Cost::Hazard && !basis.assumed().is_empty();
            let verdict = if impossible || margin.is_nan() || margin < 0.0 {
                Verdict::Breaks
            } else if margin < reserve.get() || rests_on_assumption {
                Verdict::Close
            } else {
                Verdict::Clears
            };
            Some(Check {
                verdict,
                value: Some(value),
                limit: Some(limit),
                margin: Some(Percent::new(margin)),
                asks: FieldSet::default(),
                ..asks
            })
        }
    }
}

impl<Id> Check<Id> {
    /// Where the check belongs in a list that runs from worst to best:
    /// breaks (hazard, then loss), asks, close, clears; within each the smallest margin first.
    pub fn rank(&self) -> (u8, f64) {
        let group = match (self.verdict, self.cost) {
            (Verdict::Breaks, Cost::Hazard) => 0,
            (Verdict::Breaks, Cost::Loss) => 1,
            (Verdict::Asks, Cost::Hazard) => 2,
            (Verdict::Asks, Cost::Loss) => 3,
            (Verdict::Close, Cost::Hazard) => 4,
            (Verdict::Close, Cost::Loss) => 5,
            (Verdict::Clears, _) => 6,
        };
        (group, self.margin.map_or(0.0, Percent::get))
    }

    /// How two checks stand in a list that runs from worst to best, by [`rank`](Self::rank).
    pub fn order(&self, other: &Self) -> Ordering {
        let ((group, margin), (other_group, other_margin)) = (self.rank(), other.rank());
        group.cmp(&other_group).then(margin.total_cmp(&other_margin))
    }

    /// The same check under another name.
    pub fn named<Other>(self, id: Other) -> Check<Other> {
        let Self { id: _, cost, verdict, value, limit, margin, reserve, asks, assumed } = self;
        Check { id, cost, verdict, value, limit, margin, reserve, asks, assumed }
    }

    /// How far the value stands from the limit, in the unit of both; negative past it. `None` where the check asks.
    pub fn room(&self) -> Option<Amount> {
        let (value, limit) = (self.value?, self.limit?);
        let number = match limit.sense {
            Sense::AtMost => limit.amount.number - value.number,
            Sense::AtLeast => value.number - limit.amount.number,
        };
        Some(Amount { number, unit: value.unit })
    }

    /// Whether it sets a count of things against the count that must be, as of bonds or directions: its figures say less
    /// than its verdict.
    pub fn is_count(&self) -> bool {
        self.limit.is_some_and(|limit| limit.amount.unit == Unit::One)
    }

    /// [`room`](Self::room) without its sign: how far inside the limit, or how far past it.
    pub fn distance(&self) -> Option<Amount> {
        self.room().map(|room| Amount { number: room.number.abs(), ..room })
    }
}

/// Puts checks in the order of reading: worst first, equals as they stand.
pub fn worst_first<Id>(checks: &mut [Check<Id>]) {
    sort_short(checks, Check::order);
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::entry::Entry;
    use crate::field::Field;
    use crate::quantity::Volts;

    fn verdict(value: f64, limit: Limit, cost: Cost, reserve: f64, basis: &Basis) -> Verdict {
        let outcome = Outcome::Held { value: Volts::new(value).amount(), limit };
        judge((), cost, Percent::new(reserve), outcome, basis).unwrap().verdict
    }

    #[test]
    fn the_reserve_divides_close_from_clears_and_the_limit_itself_is_allowed() {
        let basis = Basis::default();
        let limit = Limit::at_most(Volts::new(150.0));
        let at = |value| verdict(value, limit, Cost::Hazard, 2.0, &basis);
        assert_eq!(at(150.1), Verdict::Breaks);
        assert_eq!(at(150.0), Verdict::Close);
        assert_eq!(at(147.1), Verdict::Close);
        assert_eq!(at(147.0), Verdict::Clears);
    }

    #[test]
    fn a_lower_limit_is_judged_from_above() {
        let basis = Basis::default();
        let limit = Limit::at_least(Volts::new(44.0));
        assert_eq!(verdict(43.9, limit, Cost::Loss, 5.0, &basis), Verdict::Breaks);
        assert_eq!(verdict(44.0, limit, Cost::Loss, 0.0, &basis), Verdict::Clears);
        assert_eq!(verdict(45.0, limit, Cost::Loss, 5.0, &basis), Verdict::Close);
    }

    #[test]
    fn a_hazard_that_rests_on_an_assumption_never_clears_but_a_loss_may() {
        let mut basis = Basis::default();
        basis.assume(Field::VocTolerance, Entry::Blank, Percent::new(3.0));
        let limit = Limit::at_most(Volts::new(150.0));
        assert_eq!(verdict(50.0, limit, Cost::Hazard, 2.0, &basis), Verdict::Close);
        assert_eq!(verdict(50.0, limit, Cost::Loss, 2.0, &basis), Verdict::Clears);
    }

    #[test]
    fn not_a_number_breaks() {
        let basis = Basis::default();
        let limit = Limit::at_most(Volts::new(150.0));
        assert_eq!(verdict(f64::NAN, limit, Cost::Loss, 0.0, &basis), Verdict::Breaks);
    }
}
