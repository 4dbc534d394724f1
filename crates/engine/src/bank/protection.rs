//! Packs that guard themselves: whether their own protection stays closed.
//!
//! A pack that opens takes the site dark, or leaves the chargers alone with the bus: see bank-orphan. Shares among packs
//! are taken as even here; unequal links make one pack open before the sum of the limits is reached.

use super::Ask;
use super::ask::positive;
use super::devices::cut_off;
use super::window::lowest;
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::{Amps, Quantity, Volts, Watts};
use crate::show;

/// How many packs carry the current.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Packs {
    /// All of them.
    All,
    /// One has opened.
    OneOut,
}

/// Packs side by side. `None` inside where the requirement does not arise.
fn packs(ask: &Ask, which: Packs, basis: &mut Basis) -> Option<Option<f64>> {
    match ask.guards_itself() {
        Some(false) => return Some(None),
        Some(true) => {}
        None => {
            basis.ask(Field::OwnProtection);
            return None;
        }
    }
    let strings = ask.strings(basis)?.get();
    match which {
        Packs::All => Some(Some(strings)),
        Packs::OneOut => Some((strings >= 2.0).then_some(strings - 1.0)),
    }
}

/// Limit of all packs that are in. I = p · I₁
fn together(limit: Amps, packs: f64, field: Field, steps: &mut Steps) -> Amps {
    steps.step("What the packs let pass", limit * packs, || {
        (
            "packs · limit",
            format!("{} × {}", show::number(packs, 0), show::given(limit.amount())),
            Origin::Entered(field),
        )
    })
}

/// Greatest current of `watts`: at the lowest voltage in use. I = P / V
fn draw(ask: &Ask, field: Field, watts: Option<Watts>, basis: &mut Basis, steps: &mut Steps) -> Option<Amps> {
    let lowest = lowest(ask, basis, steps);
    let (watts, lowest) = (watts?, lowest?);
    // An inverter that stops earlier never draws at the end of discharge. Where its cut-off is not known, the end counts.
    let stops: Volts = cut_off(ask, &mut Basis::default()).map_or(lowest, |stops| stops.max(lowest));
    Some(steps.step("Current at the lowest voltage in use", watts / stops, || {
        ("P / V", format!("{} / {}", show::given(watts.amount()), show::step(stops.amount())), Origin::Entered(field))
    }))
}

fn held(value: Option<Amps>, limit: Option<Amps>) -> Outcome {
    match (value, limit) {
        (Some(value), Some(limit)) => Outcome::Held { value: value.amount(), limit: Limit::at_most(limit) },
        _ => Outcome::Asks,
    }
}

/// bms-hold: greatest steady draw ≤ packs × limit.
pub(super) fn steady(ask: &Ask, which: Packs, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let packs = match packs(ask, which, basis) {
        Some(None) => return Outcome::DoesNotArise,
        packs => packs.flatten(),
    };
    let load = basis.need(Field::GreatestLoad, positive(ask.greatest_load));
    let limit = basis.need(Field::PackDischargeLimit, positive(ask.pack_discharge_limit));
    let value = draw(ask, Field::GreatestLoad, load, basis, steps);
    let limit = match (limit, packs) {
        (Some(limit), Some(packs)) => Some(together(limit, packs, Field::PackDischargeLimit, steps)),
        _ => None,
    };
    held(value, limit)
}

/// bms-hold-start: the greatest start ≤ packs × the limit for as long as it lasts.
///
/// The peak counts where it is entered and lasts long enough; else the steady limit does.
pub(super) fn start(ask: &Ask, which: Packs, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.starting_load == Entry::Blank {
        return Outcome::DoesNotArise;
    }
    let packs = match packs(ask, which, basis) {
        Some(None) => return Outcome::DoesNotArise,
        packs => packs.flatten(),
    };
    let load = basis.need(Field::StartingLoad, positive(ask.starting_load));
    let steady = basis.need(Field::PackDischargeLimit, positive(ask.pack_discharge_limit));
    let value = draw(ask, Field::StartingLoad, load, basis, steps);
    let limit = match positive(ask.pack_peak) {
        Entry::Blank => steady.map(|steady| (steady, Field::PackDischargeLimit)),
        peak => {
            let peak = basis.need(Field::PackPeak, peak);
            let lasts = basis.need(Field::StartingTime, positive(ask.starting_time));
            let allowed = basis.need(Field::PackPeakTime, positive(ask.pack_peak_time));
            match (peak, lasts, allowed, steady) {
                (Some(peak), Some(lasts), Some(allowed), Some(_)) if lasts <= allowed => Some((peak, Field::PackPeak)),
                (Some(_), Some(_), Some(_), Some(steady)) => Some((steady, Field::PackDischargeLimit)),
                _ => None,
            }
        }
    };
    let limit = match (limit, packs) {
        (Some((limit, field)), Some(packs)) => Some(together(limit, packs, field, steps)),
        _ => None,
    };
    held(value, limit)
}

/// bms-hold-charge: charge current ≤ packs × limit. Past it a pack opens while it is charged.
pub(super) fn charge(ask: &Ask, which: Packs, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let packs = match packs(ask, which, basis) {
        Some(None) => return Outcome::DoesNotArise,
        packs => packs.flatten(),
    };
    let current = basis.need(Field::ChargeCurrent, positive(ask.charge_current));
    let limit = basis.need(Field::PackChargeLimit, positive(ask.pack_charge_limit));
    let limit = match (limit, packs) {
        (Some(limit), Some(packs)) => Some(together(limit, packs, Field::PackChargeLimit, steps)),
        _ => None,
    };
    held(current, limit)
}
