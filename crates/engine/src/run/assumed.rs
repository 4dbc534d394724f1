//! What stands in for the inputs of a run that were not entered.

use super::known::Known;
use super::{Ask, BreakerType, Kind};
use crate::ampacity::{Insulation, Method};
use crate::check::{Assumption, Basis, Steps};
use crate::conductor::Conductor;
use crate::entry::Entry;
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

/// What protects a run: fuses in strings, else a breaker that opens both directions. *Chosen*.
#[must_use]
pub const fn breaker_type(kind: Kind) -> BreakerType {
    match kind {
        Kind::PvString => BreakerType::Fuse,
        _ => BreakerType::Breaker,
    }
}

/// Resistance of the bank.
#[must_use]
pub fn bank_resistance(voltage: Volts) -> Ohms {
    Ohms::new(BANK_OHMS_PER_VOLT * voltage.get())
}

/// What stands in for `field` in this question, with its reason. `None` where nothing does, or it cannot be told yet.
#[must_use]
pub fn of(ask: &Ask, field: Field) -> Option<Assumption> {
    let family = ask.family.typed().unwrap_or_default();
    let chosen = source::CHOSEN.at("");
    let choice = |key, why| Assumption { amount: None, choice: Some(key), why, source: chosen };
    let amount = |amount, why| Assumption { amount: Some(amount), choice: None, why, source: chosen };
    Some(match field {
        Field::CodeFamily => crate::assumed::of(field)?,
        Field::Conductor => match conductor(ask.kind.typed()?, family) {
            Conductor::TinnedFine => choice(Conductor::TinnedFine.key(), "what PV cable is"),
            usual => choice(usual.key(), "the usual building wire"),
        },
        Field::Insulation => match insulation(ask.kind.typed()?, family) {
            Insulation::PvCable => choice(Insulation::PvCable.key(), "made for the sun"),
            usual => choice(usual.key(), "the usual building wire"),
        },
        Field::Ambient if ask.kind.typed()?.is_pv() => {
            amount(ambient(ask.kind.typed()?).amount(), "in the sun, by the modules")
        }
        Field::Ambient => amount(ambient(ask.kind.typed()?).amount(), "a room, as the tables"),
        Field::ConductorsTogether => amount(TOGETHER.amount(), "the two of this run, by themselves"),
        Field::Method => match method(ask.kind.typed()?) {
            Method::Surface => choice(Method::Surface.key(), "behind the modules"),
            usual => choice(usual.key(), "where a conductor carries least"),
        },
        Field::Terminals => {
            let blank = Ask { terminals: Entry::Blank, ..*ask };
            let known = Known::read(&blank, &mut Basis::default(), &mut Steps::silent()).ok()?;
            let (why, source) = match family {
                CodeFamily::Iec => ("as IEC devices are tested", source::IEC_60364_5_52.at("523.1")),
                CodeFamily::NorthAmerica => ("60 °C to 100 A, 75 °C above", source::NEC.at("110.14(C)(1)")),
            };
            Assumption { amount: None, choice: Some(known.terminals.key()), why, source }
        }
        Field::AllowedDrop => amount(ask.kind.typed()?.allowed_drop().amount(), "what careful hands keep"),
        Field::BreakerType => match breaker_type(ask.kind.typed()?) {
            BreakerType::Fuse => choice(BreakerType::Fuse.key(), "of class gPV, as strings have"),
            usual => choice(usual.key(), "opens current of both directions"),
        },
        Field::BankResistance => {
            amount(bank_resistance(ask.voltage.typed()?).amount(), "a bank of some 400 Ah; a larger one drives more")
        }
        _ => return None,
    })
}
