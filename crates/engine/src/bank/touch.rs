//! Touching the bank's posts.

use super::Ask;
use super::ask::YesNo;
use super::window::highest;
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::field::Field;
use crate::quantity::{Quantity, Volts};
use crate::source::{self, Clause};

/// Bare posts in a dry room.
pub(super) const DRY: Volts = Volts::new(60.0);
/// Bare posts where hands or room may be wet.
const WET: Volts = Volts::new(30.0);
/// The end of extra-low voltage, whatever covers the posts.
const CEILING: Volts = Volts::new(120.0);
/// Where they are from.
const TOUCH: Clause = source::IEC_60364_4_41.at("414, smooth d.c.: 60 V dry, 30 V otherwise, 120 V in all");

/// bank-touch: highest charge voltage ≤ what may be touched: 60 V d.c. dry, 30 V wet; 120 V where posts are covered.
///
/// Below these the burn caution stays: any bank can weld a wrench.
pub(super) fn touch(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let value = highest(ask, basis, steps).map(|(volts, _)| volts);
    let covered = basis.assume(Field::PostsCovered, ask.posts_covered, YesNo::No);
    let wet = match covered {
        Some(YesNo::Yes) => Some(YesNo::No),
        _ => basis.assume(Field::WetRoom, ask.wet_room, YesNo::No),
    };
    let (Some(value), Some(covered), Some(wet)) = (value, covered, wet) else { return Outcome::Asks };
    let limit = match (covered, wet) {
        (YesNo::Yes, _) => CEILING,
        (YesNo::No, YesNo::No) => DRY,
        (YesNo::No, YesNo::Yes) => WET,
    };
    let limit = steps.step("What may be touched", limit, || ("", String::new(), Origin::Published(TOUCH)));
    Outcome::Held { value: value.amount(), limit: Limit::at_most(limit) }
}
