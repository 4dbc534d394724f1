//! What the cold does: acid and lye that freeze, lithium that must not be charged.
//!
//! Outcomes are in kelvins above absolute zero, so that a margin as a part of the limit means something: 2 % is about
//! 5 K. They are turned back into degrees once judged.

use super::Ask;
use super::ask::{finite, origin};
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::chemistry::{Family, freezing_point, freezing_source};
use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::{Celsius, Quantity};
use crate::show;

fn at_least(coldest: Celsius, limit: Celsius) -> Outcome {
    Outcome::Held { value: coldest.above_absolute_zero().amount(), limit: Limit::at_least(limit.above_absolute_zero()) }
}

/// bank-cold: the room's coldest ≥ the freezing point at the lowest charge reached.
pub(super) fn freezing(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let chemistry = ask.chemistry(basis);
    if chemistry.is_some_and(|(_, figures)| figures.freezing == crate::chemistry::Freezing::Nothing) {
        return Outcome::DoesNotArise;
    }
    let coldest = basis.need(Field::ColdestInTheRoom, finite(ask.coldest));
    let Some((chemistry, figures)) = chemistry else { return Outcome::Asks };
    let charge = match chemistry.family() {
        Family::Lead => ask.lowest_charge(figures, basis),
        Family::Nickel | Family::Lithium => Some(crate::quantity::Percent::new(0.0)),
    };
    let (Some(coldest), Some(charge)) = (coldest, charge) else { return Outcome::Asks };
    if chemistry.family() == Family::Lead {
        steps.step("Lowest charge reached", charge, || {
            ("", String::new(), origin(Field::LowestCharge, ask.lowest_charge))
        });
    }
    let Some(point) = freezing_point(chemistry, charge) else { return Outcome::DoesNotArise };
    let point = steps.step("It freezes at", point, || {
        let put_in = match chemistry.family() {
            Family::Lead => {
                format!("specific gravity {}", show::number(crate::chemistry::acid_gravity(charge), 3))
            }
            Family::Nickel | Family::Lithium => String::new(),
        };
        ("", put_in, Origin::Published(freezing_source(chemistry)))
    });
    steps.step("Coldest in the room", coldest, || ("", String::new(), Origin::Entered(Field::ColdestInTheRoom)));
    at_least(coldest, point)
}

/// bank-cold-charge: bare lithium cells, or packs with no lock against cold: the room's coldest ≥ the lowest
/// temperature for charging. A pack that locks is judged by bank-cold-lock.
pub(super) fn charge(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    lithium(ask, false, basis, steps)
}

/// bank-cold-lock: packs that refuse charge in the cold: the room's coldest ≥ where they lock.
pub(super) fn lock(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    lithium(ask, true, basis, steps)
}

fn lithium(ask: &Ask, locks: bool, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let Some((chemistry, figures)) = ask.chemistry(basis) else { return Outcome::DoesNotArise };
    if chemistry.family() != Family::Lithium {
        return Outcome::DoesNotArise;
    }
    let lowest = figures.charging.lowest;
    let lock = match finite(ask.pack_cold_lock) {
        Entry::Unread => {
            basis.ask(Field::PackColdLock);
            return Outcome::Asks;
        }
        // A lock set below what even the hardiest cell bears guards nothing.
        Entry::Typed(lock) if lock >= lowest.range.least => Some(lock),
        Entry::Typed(_) | Entry::Blank => None,
    };
    if lock.is_some() != locks {
        return Outcome::DoesNotArise;
    }
    let Some(coldest) = basis.need(Field::ColdestInTheRoom, finite(ask.coldest)) else { return Outcome::Asks };
    let limit = match lock {
        Some(lock) => steps
            .step("The pack takes no charge below", lock, || ("", String::new(), Origin::Entered(Field::PackColdLock))),
        None => {
            steps.step("Charge no cell below", lowest.chosen, || ("", String::new(), Origin::Published(lowest.source)))
        }
    };
    at_least(coldest, limit)
}
