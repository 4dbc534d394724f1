//! Values that stand in for inputs that were not entered.
//!
//! Each is shown with its reason, one tap from a value. A hazard that rests on one never clears.

use crate::check::Assumption;
use crate::field::Field;
use crate::quantity::{Amount, Kelvins, Percent, PercentPerKelvin, Quantity, Volts};
use crate::source;
use crate::unit::Unit;

/// Voc tolerance: +3 %. *Chosen*: the band that most nameplates print, at its upper end.
pub const VOC_TOLERANCE: Percent = Percent::new(3.0);
/// Pmax coefficient: −0.35 %/K. *Chosen*: the steep end of modules made since about 2018.
pub const PMAX_COEFFICIENT: PercentPerKelvin = PercentPerKelvin::new(-0.35);
/// Isc coefficient: +0.05 %/K. *Chosen*: the middle of crystalline modules.
pub const ISC_COEFFICIENT: PercentPerKelvin = PercentPerKelvin::new(0.05);
/// Rear gain: none. *Chosen*: most modules are one-sided; a two-sided one says so on its nameplate.
pub const REAR_GAIN: Percent = Percent::new(0.0);
/// Cell over air at full sun, open rack. *Chosen*, near (NOCT − 20)/800 · 1000 for a NOCT of 44 °C.
pub const RISE_OPEN_RACK: Kelvins = Kelvins::new(30.0);
/// Cell over air at full sun, stand-off on a roof. *Chosen*: air passes behind, but less of it.
pub const RISE_STAND_OFF: Kelvins = Kelvins::new(35.0);
/// Cell over air at full sun, flush on a roof. *Chosen*: hardly any air passes behind.
pub const RISE_FLUSH: Kelvins = Kelvins::new(45.0);
/// Running headroom of a tracking controller. *Chosen*: common practice.
pub const RUNNING_HEADROOM: Volts = Volts::new(1.0);
/// Starting headroom of a tracking controller. *Chosen*: common practice.
pub const STARTING_HEADROOM: Volts = Volts::new(5.0);
/// Headroom of a PWM controller: what its switches and its blocking part drop. *Chosen*.
pub const PWM_HEADROOM: Volts = Volts::new(0.5);
/// Array drop: 2 %. *Chosen*: the drop that the cables of an array are sized to.
pub const ARRAY_DROP: Percent = Percent::new(2.0);
/// Reserve on the cold voltage. *Chosen*: what is left for a reading of the record that was a little high.
pub const COLD_RESERVE: Percent = Percent::new(2.0);

/// What stands in for `field`, where one value does for every site.
#[must_use]
pub fn of(field: Field) -> Option<Assumption> {
    let choice = match field {
        Field::Mounting => Some("open"),
        Field::StandsOn => Some("dwelling"),
        Field::LimitHoldsFactor => Some("no"),
        Field::ControllerKind => Some("mppt"),
        Field::CodeFamily => Some("iec"),
        _ => None,
    };
    let (amount, why) = match field {
        Field::VocTolerance => (Some(VOC_TOLERANCE.amount()), "upper end of the usual nameplate band"),
        Field::VocCoefficient => (None, "the code family's cold table stands in, crystalline only"),
        Field::PmaxCoefficient => (
            Some(Amount { number: PMAX_COEFFICIENT.get(), unit: Unit::RelativePercentPerKelvin }),
            "steep end of recent crystalline modules",
        ),
        Field::IscCoefficient => (
            Some(Amount { number: ISC_COEFFICIENT.get(), unit: Unit::CurrentPercentPerKelvin }),
            "middle of crystalline modules",
        ),
        Field::RearGain => (Some(REAR_GAIN.amount()), "one-sided module"),
        Field::Mounting => (None, "cells 30 K over air"),
        Field::StandsOn => (None, "the lowest limit"),
        Field::LimitHoldsFactor => (None, "set against 1.25 × Isc"),
        Field::ControllerKind => (None, "most are"),
        Field::CodeFamily => (None, "decides fuses and limits"),
        Field::RunningHeadroom => (Some(RUNNING_HEADROOM.amount()), "usual for MPPT controllers"),
        Field::StartingHeadroom => (Some(STARTING_HEADROOM.amount()), "usual for MPPT controllers"),
        Field::ArrayDrop => (Some(ARRAY_DROP.amount()), "what array cables are sized to"),
        Field::ColdReserve => (Some(COLD_RESERVE.amount()), "kept by a careful hand"),
        _ => return None,
    };
    Some(Assumption { amount, choice, why, source: source::CHOSEN.at("") })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::choice::{Choice, ControllerKind, LimitHoldsFactor, Mounting};
    use crate::family::{CodeFamily, Stands};

    /// A stand-in can be shown in its field: it measures what the field does.
    #[test]
    fn every_assumed_amount_fits_its_field() {
        for field in Field::ALL {
            if let (Some(amount), Some(dimension)) =
                (of(*field).and_then(|assumption| assumption.amount), field.dimension())
            {
                assert_eq!(amount.unit.dimension(), dimension, "{field:?}");
            }
        }
    }

    /// What is shown as assumed is what the checks assume: the first of each kind.
    #[test]
    fn the_assumed_choices_are_the_defaults() {
        let key = |field| of(field).and_then(|assumption| assumption.choice).expect("a choice");
        assert_eq!(Mounting::of_key(key(Field::Mounting)), Some(Mounting::default()));
        assert_eq!(Stands::of_key(key(Field::StandsOn)), Some(Stands::default()));
        assert_eq!(LimitHoldsFactor::of_key(key(Field::LimitHoldsFactor)), Some(LimitHoldsFactor::default()));
        assert_eq!(ControllerKind::of_key(key(Field::ControllerKind)), Some(ControllerKind::default()));
        assert_eq!(CodeFamily::of_key(key(Field::CodeFamily)), Some(CodeFamily::default()));
    }
}
