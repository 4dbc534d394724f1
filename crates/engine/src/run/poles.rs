//! breaker-poles: a polarised breaker only where current flows one way; and how many poles share the voltage.

use super::{BreakerType, Kind};
use crate::check::{Limit, Origin, Outcome, Steps};
use crate::quantity::{Count, Quantity, Volts};
use crate::source;

/// Volts of direct current that one pole of a usual breaker breaks.
///
/// *Chosen*: 80 V, between the 60 V of small IEC breakers and the 125 V of larger North American ones. The rating marked
/// on the breaker, with its poles wired as its maker shows, is what counts.
pub const VOLTS_A_POLE: Volts = Volts::new(80.0);

/// The highest voltage that a bus of nominal voltage reaches, as a share of it: 16 V of 12 V.
///
/// Source: [`source::COMMON_PRACTICE`], the top of the usual inverter's window.
pub const HIGHEST_SHARE: f64 = 16.0 / 12.0;

/// Open-circuit voltage of a string at record cold, as a share of its voltage at greatest power.
///
/// *Chosen*: 1.25 from Vmp to Voc and 1.25 for cold, rounded up. The String tool gives the string's own.
pub const COLD_OPEN_SHARE: f64 = 1.6;

/// Voltages of direct current that breakers and fuses are rated for. Typical.
const DIRECT_RATINGS: [f64; 11] = [32.0, 65.0, 80.0, 125.0, 150.0, 250.0, 300.0, 500.0, 600.0, 1000.0, 1500.0];

/// Voltages of alternating current that they are rated for. Typical.
const ALTERNATING_RATINGS: [f64; 5] = [120.0, 240.0, 415.0, 480.0, 690.0];

/// The voltage that the breaker or fuse must be rated for, at least.
#[must_use]
pub fn voltage_asked(kind: Kind, voltage: Volts) -> Volts {
    if kind.alternates() {
        voltage
    } else if kind.is_pv() {
        voltage * COLD_OPEN_SHARE
    } else {
        voltage * HIGHEST_SHARE
    }
}

/// The next usual voltage rating. `None` past the end.
#[must_use]
pub fn voltage_rating(kind: Kind, voltage: Volts) -> Option<Volts> {
    let ratings: &[f64] = if kind.alternates() { &ALTERNATING_RATINGS } else { &DIRECT_RATINGS };
    let asked = voltage_asked(kind, voltage).get() * (1.0 - 1e-9);
    ratings.iter().copied().find(|rating| *rating >= asked).map(Volts::new)
}

/// Poles in series that break the voltage. Alternating: one for 120 V, two for 240 V between two lines.
///
/// Where neither pole is earthed, both are opened: twice as many.
#[must_use]
pub fn poles(kind: Kind, voltage: Volts) -> u32 {
    if kind.alternates() {
        return if voltage.get() > 150.0 { 2 } else { 1 };
    }
    // At most what 1500 V asks, so the number stays small.
    (voltage_asked(kind, voltage) / VOLTS_A_POLE).ceil().clamp(1.0, 40.0) as u32
}

/// Sets the directions in which current can flow against those that the breaker opens. A fuse has no direction.
pub(super) fn directions(kind: Kind, protects: BreakerType, steps: &mut Steps) -> Outcome {
    if kind.alternates() || protects == BreakerType::Fuse {
        return Outcome::DoesNotArise;
    }
    let flows =
        steps.step("Directions in which current or a fault flows", Count::new(f64::from(kind.directions())), || {
            let (from, to) = kind.ends();
            (
                "",
                format!("{from} to {to}"),
                Origin::Published(source::COMMON_PRACTICE.at("bank circuits flow both ways")),
            )
        });
    let opens = if protects == BreakerType::Polarised { 1.0 } else { 2.0 };
    Outcome::Held { value: flows.amount(), limit: Limit::at_most(Count::new(opens)) }
}
