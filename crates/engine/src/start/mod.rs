//! Starts: whether the inverter starts what must start, and whether the bus holds while it does.
//!
//! Apparent power counts against the inverter, active power against the bus. The bus is a force behind a resistance, and
//! a start a draw of constant power: V = (E + √(E² − 4RP)) / 2, or a collapse. Steady values only, each phase of a start
//! by itself.

mod ask;
mod bus;
mod class;
mod load;
mod motor;
mod requirement;
mod together;
mod what_helps;
#[cfg(test)]
mod worked;

pub use ask::Ask;
pub use ask::{Age, Curve, FedBy, Letter};
pub use bus::{lowest_charge, seen, told};
pub use class::{Class, Kind, usual};
pub use load::{Draws, Phases, phases};
pub use motor::{CODE_LETTERS, FULL_LOAD, LOCKED_ROTOR, code_letter, full_load, locked_rotor};
pub use requirement::{Requirement, assess, current, drawn, volts, working};
pub use together::{Judged, Limits, MOST_LOADS, Switched, Together, switched, together};
pub use what_helps::{Help, what_helps};

use crate::check::Assumption;
use crate::field::Field;
use crate::quantity::{Percent, Quantity, Seconds};
use crate::source;

/// Efficiency of an inverter while it starts something. *Chosen*: lower than at its full power.
pub const SURGE_EFFICIENCY: Percent = Percent::new(88.0);
/// How long a surge rating holds where the nameplate does not say. *Chosen*: 3 s, the short end of low-frequency
/// inverters; many others hold theirs for a fraction of a second.
pub const SURGE_SECONDS: Seconds = Seconds::new(3.0);
/// Charge that a start must still be possible at. *Chosen*: half.
pub const CHARGE: Percent = Percent::new(50.0);
/// Old, cold and low against new, warm and full. *Chosen*, as for faults: 3.
pub const AGED: f64 = 3.0;

/// What stands in for `field` in this question, with its reason. `None` where nothing does.
#[must_use]
pub fn assumption(ask: &Ask, field: Field) -> Option<Assumption> {
    let chosen = source::CHOSEN.at("");
    let amount = |amount, why| Assumption { amount: Some(amount), choice: None, why, source: chosen };
    let class = ask.class();
    Some(match field {
        Field::StartsAs => Assumption {
            amount: None,
            choice: Some(class.map(usual)?.kind.key()),
            why: "as such loads usually start",
            source: chosen,
        },
        Field::StartingMultiple => Assumption {
            source: source::MOTOR_GUIDES.at("upper middle of the range"),
            ..amount(ask.usual_multiple()?.amount(), "upper middle of what such loads take")
        },
        Field::StartingPowerFactor => amount(ask.usual_starting_factor()?.amount(), "of a rotor that stands still"),
        Field::RunningPowerFactor => amount(ask.usual_running_factor()?.amount(), "as such loads usually run"),
        Field::StartingSeconds => amount(ask.usual_seconds()?.amount(), "the long end of what such loads take"),
        Field::InverterEfficiency => amount(SURGE_EFFICIENCY.amount(), "lower in a surge than at full power"),
        Field::SurgeSeconds => amount(SURGE_SECONDS.amount(), "the nameplate or the manual says"),
        Field::InverterSurge => {
            amount(ask.inverter_continuous.typed()?.amount(), "no surge but what it gives for long")
        }
        Field::BankResistance => amount(
            (crate::run::assumed::bank_resistance(ask.bank_voltage.typed()?) * AGED).amount(),
            "a bank of some 400 Ah, old, cold and low",
        ),
        Field::CableResistance => amount(ask.usual_cable().amount(), "two metres of thick cable and its lugs"),
        Field::Charge => amount(CHARGE.amount(), "half full"),
        Field::BankAge => Assumption {
            amount: None,
            choice: Some("old"),
            why: "the greatest resistance of its chemistry",
            source: chosen,
        },
        Field::AlreadyRunning => amount(crate::quantity::Watts::new(0.0).amount(), "nothing else runs"),
        Field::HowMany => amount(crate::quantity::Count::new(1.0).amount(), "one"),
        Field::Packs => amount(crate::quantity::Count::new(1.0).amount(), "one"),
        Field::TripCurve => Assumption {
            amount: None,
            choice: Some("c"),
            why: "the usual curve; on direct current it trips no sooner",
            source: source::IEC_60898.at("5.3.2"),
        },
        Field::InverterAir => amount(crate::quantity::Celsius::new(25.0).amount(), "as rated"),
        Field::Height => amount(crate::quantity::Metres::new(0.0).amount(), "no height counted"),
        _ => return None,
    })
}
