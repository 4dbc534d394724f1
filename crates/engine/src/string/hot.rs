//! The voltage of a working string over the year, against what charging and tracking need.

use super::Ask;
use crate::assumed;
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::choice::{ControllerKind, Mounting};
use crate::field::Field;
use crate::module::{origin, rise};
use crate::quantity::{Celsius, Quantity, Volts};
use crate::show;

/// Hottest temperature of the cells. T = record high + rise by mounting
pub(super) fn hottest_cell(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<Celsius> {
    let high = basis.need(Field::RecordHigh, ask.record_high);
    let mounting = basis.assume(Field::Mounting, ask.mounting, Mounting::OpenRack);
    let (high, rise) = (high?, rise(mounting?));
    let from = origin(Field::Mounting, ask.mounting);
    Some(steps.step("Hottest cell", high + rise, || {
        (
            "record high + rise by mounting",
            format!("{} + {}", show::step(high.amount()), show::step(rise.amount())),
            from,
        )
    }))
}

/// Voltage of the whole string at greatest power, cells at `at`. V = n · Vmp(T)
fn working_string(ask: &Ask, at: Option<Celsius>, basis: &mut Basis, steps: &mut Steps) -> Option<Volts> {
    let series = ask.series(basis);
    let each = match at {
        Some(at) => ask.module.greatest_power_voltage(at, basis, steps),
        None => {
            basis.need(Field::Vmp, ask.module.vmp);
            None
        }
    };
    let (series, each) = (series?, each?);
    Some(steps.step("The string at greatest power", each * series.get(), || {
        (
            "n · Vmp(T)",
            format!("{} × {}", show::number(series.get(), 0), show::step(each.amount())),
            Origin::Entered(Field::Series),
        )
    }))
}

/// Voltage of the hottest string, at greatest power, at the array.
pub(super) fn hot_string(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<Volts> {
    let hottest = hottest_cell(ask, basis, steps);
    working_string(ask, hottest, basis, steps)
}

/// string-hot-charge and string-hot-start: n · Vmp(hottest cell) − drop ≥ highest charge voltage + headroom.
pub(super) fn charge(ask: &Ask, starting: bool, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let kind = ask.kind(basis);
    if starting && kind == Some(ControllerKind::Pwm) {
        return Outcome::DoesNotArise;
    }
    let string = hot_string(ask, basis, steps);
    let drop = ask.drop(basis);
    let arrives = match (string, drop) {
        (Some(string), Some(drop)) => {
            Some(steps.step("Arrives at the controller", string * (1.0 - drop.share()), || {
                (
                    "V · (1 − drop)",
                    format!("{} × (1 − {})", show::step(string.amount()), show::given(drop.amount())),
                    origin(Field::ArrayDrop, ask.array_drop),
                )
            }))
        }
        _ => None,
    };
    let needs = charging_needs(ask, kind, starting, basis, steps);
    match (arrives, needs) {
        (Some(arrives), Some(needs)) => Outcome::Held { value: arrives.amount(), limit: Limit::at_least(needs) },
        _ => Outcome::Asks,
    }
}

/// What the controller needs at its input to charge at the highest charge voltage.
fn charging_needs(
    ask: &Ask,
    kind: Option<ControllerKind>,
    starting: bool,
    basis: &mut Basis,
    steps: &mut Steps,
) -> Option<Volts> {
    let (field, entry, usual) = match (kind, starting) {
        (Some(ControllerKind::Pwm), _) => {
            (Field::RunningHeadroom, ask.controller.running_headroom, assumed::PWM_HEADROOM)
        }
        (_, false) => (Field::RunningHeadroom, ask.controller.running_headroom, assumed::RUNNING_HEADROOM),
        (_, true) => (Field::StartingHeadroom, ask.controller.starting_headroom, assumed::STARTING_HEADROOM),
    };
    let charge = basis.need(Field::HighestCharge, ask.controller.highest_charge);
    let headroom = basis.assume(field, entry, usual);
    let (charge, headroom, _) = (charge?, headroom?, kind?);
    Some(steps.step("Charging needs", charge + headroom, || {
        (
            "highest charge voltage + headroom",
            format!("{} + {}", show::given(charge.amount()), show::given(headroom.amount())),
            origin(field, entry),
        )
    }))
}

/// The voltage that the hottest string must bring to go on charging, where it can be told.
#[must_use]
pub fn charging_voltage(ask: &Ask) -> Option<Volts> {
    let mut basis = Basis::default();
    let kind = ask.kind(&mut basis);
    charging_needs(ask, kind, false, &mut basis, &mut Steps::silent())
}

/// The string's voltage at greatest power with the hottest cells, where it can be told.
#[must_use]
pub fn hottest_working(ask: &Ask) -> Option<Volts> {
    hot_string(ask, &mut Basis::default(), &mut Steps::silent())
}

/// The string's voltage at greatest power in full sun with the cells still at the record low, where it can be told.
#[must_use]
pub fn coldest_working(ask: &Ask) -> Option<Volts> {
    let mut basis = Basis::default();
    let low = basis.need(Field::RecordLow, ask.record_low)?;
    working_string(ask, Some(low), &mut basis, &mut Steps::silent())
}

/// string-window: n · Vmp over the year inside the controller's tracking window.
///
/// The low end is the hottest afternoon; the high end is a bright morning with the cells still at the record low.
/// The end that is nearer to its limit is the value.
pub(super) fn window(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.kind(basis) == Some(ControllerKind::Pwm) {
        return Outcome::DoesNotArise;
    }
    let (low, high) = (ask.controller.window_low, ask.controller.window_high);
    // Compared in silence; only the end that counts is worded.
    let hot = hot_string(ask, basis, &mut Steps::silent());
    let record_low = basis.need(Field::RecordLow, ask.record_low);
    let cold = working_string(ask, record_low, basis, &mut Steps::silent());
    let (window_low, window_high) = (basis.need(Field::WindowLow, low), basis.need(Field::WindowHigh, high));
    let (Some(hot), Some(cold), Some(window_low), Some(window_high)) = (hot, cold, window_low, window_high) else {
        return one_end_breaks(hot, cold, window_low, window_high).unwrap_or(Outcome::Asks);
    };
    let room_low = (hot - window_low) / window_low;
    let room_high = (window_high - cold) / window_high;
    if room_low <= room_high {
        hot_string(ask, basis, steps);
        Outcome::Held { value: hot.amount(), limit: Limit::at_least(window_low) }
    } else {
        working_string(ask, record_low, basis, steps);
        Outcome::Held { value: cold.amount(), limit: Limit::at_most(window_high) }
    }
}

/// An end that is already past its limit breaks, whatever else is missing.
fn one_end_breaks(
    hot: Option<Volts>,
    cold: Option<Volts>,
    window_low: Option<Volts>,
    window_high: Option<Volts>,
) -> Option<Outcome> {
    if let (Some(hot), Some(limit)) = (hot, window_low)
        && hot < limit
    {
        return Some(Outcome::Held { value: hot.amount(), limit: Limit::at_least(limit) });
    }
    if let (Some(cold), Some(limit)) = (cold, window_high)
        && cold > limit
    {
        return Some(Outcome::Held { value: cold.amount(), limit: Limit::at_most(limit) });
    }
    None
}

/// The fewest modules in series that still charge on the hottest afternoon. `None` where an input is missing.
#[must_use]
pub fn shortest(ask: &Ask) -> Option<u32> {
    let mut basis = Basis::default();
    let one = ask.with_counts(1, 1);
    let each = hot_string(&one, &mut basis, &mut Steps::silent())?;
    let drop = ask.drop(&mut basis)?;
    let needs = charging_voltage(ask)?;
    let count = (needs / (each * (1.0 - drop.share())) * (1.0 - 1e-11)).ceil();
    #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "between 1 and the clamp's end")]
    let count = count.clamp(1.0, 10_000.0) as u32;
    Some(count)
}
