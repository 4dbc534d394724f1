//! Where each field of a site lives: every figure stands in one place, whichever part asks for it.

use super::part::PartKind;
use crate::field::Field as F;

/// The place of a field.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Home {
    /// The site as a whole: where it stands, and by which code.
    Place,
    /// The part of that kind that the part asking is joined to, or that serves it.
    Of(PartKind),
    /// The cable that leads from the part.
    Run,
}

/// Where `field` lives. `None` for what belongs to each part itself, such as an isolator.
#[must_use]
pub const fn home(field: F) -> Option<Home> {
    Some(match field {
        F::RecordLow
        | F::RecordHigh
        | F::CodeFamily
        | F::StandsOn
        | F::ColdestInTheRoom
        | F::WarmestInTheRoom
        | F::WetRoom
        | F::SleepingRoom
        | F::AirOpening
        | F::UsedADay
        | F::Earthing
        | F::FramesBonded
        | F::GroundFault
        | F::Arresters => Home::Place,
        F::Voc
        | F::Vmp
        | F::Isc
        | F::Imp
        | F::VocCoefficient
        | F::PmaxCoefficient
        | F::IscCoefficient
        | F::VocTolerance
        | F::SeriesFuseRating
        | F::SystemVoltage
        | F::RearGain
        | F::Mounting
        | F::ArrayDrop
        | F::ColdReserve
        | F::StringFuse
        | F::Series
        | F::Strings
        | F::ModulesAtHand => Home::Of(PartKind::Array),
        F::InputLimit
        | F::WindowLow
        | F::WindowHigh
        | F::PvCurrentLimit
        | F::LimitHoldsFactor
        | F::OutputCurrent
        | F::HighestCharge
        | F::ControllerKind
        | F::RunningHeadroom
        | F::StartingHeadroom
        | F::ControllersAtHand
        | F::ControllerOutputLimit => Home::Of(PartKind::Controller),
        F::InverterLow | F::InverterHigh | F::InverterBond | F::AcVolts | F::InverterContinuous => {
            Home::Of(PartKind::Inverter)
        }
        F::LoadsLow | F::LoadsHigh => Home::Of(PartKind::DcPanel),
        F::PanelBond | F::PanelLegs | F::Multiwire | F::GridFeeds | F::TransferSwitch => Home::Of(PartKind::AcPanel),
        F::GeneratorBond | F::NeutralSwitched => Home::Of(PartKind::Generator),
        F::SourcePower | F::OverspeedVolts | F::DumpLoad => Home::Of(PartKind::OtherSource),
        F::InverterSurge
        | F::SurgeSeconds
        | F::ShortSurge
        | F::ShortSurgeSeconds
        | F::InverterEfficiency
        | F::CutOff
        | F::InverterAir => Home::Of(PartKind::Inverter),
        F::GeneratorRating | F::ChargerDraw => Home::Of(PartKind::Generator),
        F::Height => Home::Place,
        F::Isolator
        | F::StartLoad
        | F::RunningPower
        | F::StartsAs
        | F::StartingMultiple
        | F::CodeLetter
        | F::FedBy
        | F::BankAge
        | F::LockedRotor
        | F::MotorSize
        | F::StartingPowerFactor
        | F::RunningPowerFactor
        | F::StartingSeconds
        | F::HowMany
        | F::AlreadyRunning
        | F::BankEmf
        | F::CableResistance
        | F::TripCurve
        | F::TripMultiple => return None,
        F::RunKind
        | F::RunCurrent
        | F::RunPower
        | F::RunVoltage
        | F::RunLength
        | F::Conductor
        | F::ConductorSize
        | F::Insulation
        | F::Ambient
        | F::ConductorsTogether
        | F::Method
        | F::Terminals
        | F::AllowedDrop
        | F::Breaker
        | F::InterruptingRating
        | F::BankResistance
        | F::BreakerType
        | F::ConductorsInParallel
        | F::Precharged
        | F::LoadsAlong => Home::Run,
        _ => Home::Of(PartKind::Bank),
    })
}
