//! What stands in for the inputs of a run that were not entered.

use super::{Ask, Kind};
use crate::ampacity::{Insulation, Method};
use crate::check::Assumption;
use crate::conductor::Conductor;
use crate::family::CodeFamily;
use crate::field::Field;
use crate::quantity::{Celsius, Count, Ohms, Percent, Quantity, Volts};
use crate::source;

/// Conductors together: the two of the run. *Chosen*: a run by itself.
pub const TOGETHER: Count = Count::new(2.0);

/// Share of the nominal voltage at which an inverter lets go: 10.5 V of 12 V.
///
/// Source: [`source::COMMON_PRACTICE`].
pub const LOWEST_SHARE: f64 = 10.5 / 12.0;

/// Efficiency of an inverter at its full power. *Chosen*: 0.90, on the low side of the class.
pub const INVERTER_EFFICIENCY: Percent = Percent::new(90.0);

/// Short-circuit current of a module over its current at greatest power.
///
/// *Chosen*: 1.08, the upper end of crystalline modules.
pub const ISC_OVER_IMP: f64 = 1.08;

/// Resistance of a bank for each volt of its nominal voltage, new, warm and full.
///
/// *Chosen*: 0.15 mΩ, a bank of some 400 Ah; a larger one has less. The maker's figure, or a measured one, changes it.
pub const BANK_OHMS_PER_VOLT: f64 = 0.15e-3;

/// What a conductor is made of where nothing was entered: PV cable is tinned and fine, IEC cables in conduit are
/// stranded, and so is building wire in North America. *Chosen*.
#[must_use]
pub const fn conductor(kind: Kind, family: CodeFamily) -> Conductor {
    match (kind.is_pv(), family) {
        (true, CodeFamily::Iec) => Conductor::TinnedFine,
        _ => Conductor::CopperStranded,
    }
}

/// What it is insulated with. *Chosen*: PV cable for PV; else the usual building wire, 90 °C in North America, PVC at
/// 70 °C in the IEC trade.
#[must_use]
pub const fn insulation(kind: Kind, family: CodeFamily) -> Insulation {
    match (kind.is_pv(), family) {
        (true, _) => Insulation::PvCable,
        (false, CodeFamily::NorthAmerica) => Insulation::Bears90,
        (false, CodeFamily::Iec) => Insulation::Pvc70,
    }
}

/// The air round it. *Chosen*: 30 °C in a room, which the tables are made for; 60 °C by modules in the sun.
#[must_use]
pub const fn ambient(kind: Kind) -> Celsius {
    Celsius::new(if kind.is_pv() { 60.0 } else { 30.0 })
}

/// How it is laid. *Chosen*: in conduit, where a conductor carries least; the cables of one string on a surface.
#[must_use]
pub const fn method(kind: Kind) -> Method {
    match kind {
        Kind::PvString => Method::Surface,
        _ => Method::Conduit,
    }
}

/// Resistance of the bank.
#[must_use]
pub fn bank_resistance(voltage: Volts) -> Ohms {
    Ohms::new(BANK_OHMS_PER_VOLT * voltage.get())
}

/// What stands in for `field` in this question, with its reason.
#[must_use]
pub fn of(ask: &Ask, field: Field) -> Option<Assumption> {
    let chosen = source::CHOSEN.at("");
    let kind = ask.kind.typed();
    let (amount, why, source) = match field {
        Field::CodeFamily => (None, "IEC", chosen),
        Field::Conductor => match kind.map(|kind| conductor(kind, ask.family.typed().unwrap_or_default())) {
            Some(Conductor::TinnedFine) => (None, "tinned copper, fine-strand: what PV cable is", chosen),
            _ => (None, "copper, stranded", chosen),
        },
        Field::Insulation => match kind.map(|kind| insulation(kind, ask.family.typed().unwrap_or_default())) {
            Some(Insulation::PvCable) => (None, "PV cable", chosen),
            Some(Insulation::Bears90) => (None, "90 °C, the usual building wire", chosen),
            _ => (None, "PVC 70 °C, the usual building wire", chosen),
        },
        Field::Ambient => {
            let why =
                if kind.is_some_and(Kind::is_pv) { "in the sun, by the modules" } else { "a room, as the tables" };
            (Some(ambient(kind?).amount()), why, chosen)
        }
        Field::ConductorsTogether => (Some(TOGETHER.amount()), "the two of this run, by themselves", chosen),
        Field::Method => match kind.map(method) {
            Some(Method::Surface) => (None, "on a surface, behind the modules", chosen),
            _ => (None, "in conduit, where a conductor carries least", chosen),
        },
        Field::Terminals => match ask.family.typed().unwrap_or_default() {
            CodeFamily::Iec => (None, "70 °C, as IEC devices are tested", source::IEC_60364_5_52.at("523.1")),
            CodeFamily::NorthAmerica => (None, "60 °C to 100 A, 75 °C above", source::NEC.at("110.14(C)(1)")),
        },
        Field::AllowedDrop => (Some(kind?.allowed_drop().amount()), "what careful hands keep", chosen),
        Field::BreakerType => match kind {
            Some(Kind::PvString) => (None, "fuse of class gPV", chosen),
            _ => (None, "breaker, not polarised", chosen),
        },
        Field::BankResistance => {
            let amount = ask.voltage.typed().map(|voltage| bank_resistance(voltage).amount());
            (amount, "a bank of some 400 Ah; a larger one drives more", chosen)
        }
        _ => return None,
    };
    Some(Assumption { amount, why, source })
}
