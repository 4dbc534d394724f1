//! The voltage of an open string at record cold, against what it may destroy.

use super::Ask;
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::family::Stands;
use crate::field::Field;
use crate::quantity::{Quantity, Volts};
use crate::show;

/// Voltage of the whole string, open, at record cold. V = n · Voc(T)
pub(super) fn cold_string(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<Volts> {
    let series = ask.series(basis);
    let low = basis.need(Field::RecordLow, ask.record_low);
    // Reads the module even where the record low is missing, so that everything missing is named at once.
    let each = match low {
        Some(low) => ask.module.cold_open_circuit(low, basis, steps),
        None => {
            basis.need(Field::Voc, ask.module.voc);
            None
        }
    };
    let (series, each) = (series?, each?);
    Some(steps.step("The string, open", each * series.get(), || {
        (
            "n · Voc(T)",
            format!("{} × {}", show::number(series.get(), 0), show::step(each.amount())),
            Origin::Entered(Field::Series),
        )
    }))
}

/// string-cold-controller: n · Voc(record low) ≤ the controller's input limit.
pub(super) fn controller(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let value = cold_string(ask, basis, steps);
    let limit = basis.need(Field::InputLimit, ask.controller.input_limit);
    match (value, limit) {
        (Some(value), Some(limit)) => Outcome::Held { value: value.amount(), limit: Limit::at_most(limit) },
        _ => Outcome::Asks,
    }
}

/// string-cold-circuit: the same ≤ the module's system voltage and what the code allows where the array stands.
///
/// Breakers, fuses, cables and arresters of the circuit must be rated for the same voltage: the value is what to read
/// on them.
pub(super) fn circuit(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let value = cold_string(ask, basis, steps);
    // Where and to which code it is built only counts where the code's limit is the lower one.
    let mut place = *basis;
    let code = code_limit(ask, &mut place);
    let Some(value) = value else {
        basis.need(Field::SystemVoltage, ask.module.system_voltage);
        return Outcome::Asks;
    };
    match (ask.module.system_voltage.typed(), code) {
        (Some(system), Some((code, _))) if system <= code => {
            Outcome::Held { value: value.amount(), limit: Limit::at_most(system) }
        }
        (system, Some((code, clause))) => {
            if system.is_none() && value <= code {
                basis.need(Field::SystemVoltage, ask.module.system_voltage);
                return Outcome::Asks;
            }
            *basis = place;
            steps.step("What the code allows there", code, || ("", String::new(), Origin::Published(clause)));
            Outcome::Held { value: value.amount(), limit: Limit::at_most(code) }
        }
        (_, None) => {
            *basis = place;
            Outcome::Asks
        }
    }
}

fn code_limit(ask: &Ask, basis: &mut Basis) -> Option<(Volts, crate::source::Clause)> {
    let family = ask.family(basis);
    let stands = basis.assume(Field::StandsOn, ask.stands, Stands::Dwelling);
    Some(family?.highest_pv_voltage(stands?))
}

/// The most modules in series that no cold limit refuses: the controller's input, the module's system voltage where it
/// was entered, and the code's. 0 where even one is too many; `None` where an input is missing.
///
/// Whatever number of modules is entered plays no part.
#[must_use]
pub fn longest(ask: &Ask) -> Option<u32> {
    let mut basis = Basis::default();
    let one = ask.with_counts(1, 1);
    let each = cold_string(&one, &mut basis, &mut Steps::silent())?;
    let mut limit = basis.need(Field::InputLimit, ask.controller.input_limit)?;
    if let Some(system) = ask.module.system_voltage.typed() {
        limit = limit.min(system);
    }
    if let Some((code, _)) = code_limit(ask, &mut basis) {
        limit = limit.min(code);
    }
    // The same slack as the judge of a margin: exactly at the limit is allowed.
    let count = (limit / each * (1.0 + 1e-11)).floor();
    #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "between 0 and the clamp's end")]
    let count = count.clamp(0.0, 1000.0) as u32;
    Some(count)
}

/// The voltage of the open string at record cold, where it can be told.
#[must_use]
pub fn cold_voltage(ask: &Ask) -> Option<Volts> {
    cold_string(ask, &mut Basis::default(), &mut Steps::silent())
}

/// The cold voltage of the string without its tolerance, for the sentence that says what the tolerance adds.
/// `None` where an input is missing.
#[must_use]
pub fn without_tolerance(ask: &Ask) -> Option<Volts> {
    let mut exact = *ask;
    exact.module.voc_tolerance = crate::entry::Entry::of(0.0);
    cold_voltage(&exact)
}
