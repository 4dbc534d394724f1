//! The inputs of the String tool: what the first verdict needs, and more in groups.

use std::sync::Arc;

use crate::derived::{Memo, memo};
use crate::piece::{IntoPiece, Piece};
use engine::assumed;
use engine::check::{Check, Verdict};
use engine::field::Field;
use engine::string::Requirement;

use super::TOOL;
use super::question::OTHERS;
use crate::draft::{Draft, use_draft};
use crate::field::StandIn;
use crate::fold::fold;
use crate::form::{Form, Hints, of_another};

const OTHER_CONTROLLERS: &str = "string/other-controllers";

/// The fields that always stand open, in the order of the ten-second path.
const FIRST: [Field; 8] = [
    Field::Voc,
    Field::VocCoefficient,
    Field::RecordLow,
    Field::InputLimit,
    Field::Series,
    Field::Strings,
    Field::ModulesAtHand,
    Field::CodeFamily,
];

/// The rest, by group.
const GROUPS: [(&str, &[Field]); 3] = [
    (
        "Module",
        &[
            Field::Vmp,
            Field::Imp,
            Field::Isc,
            Field::VocTolerance,
            Field::PmaxCoefficient,
            Field::IscCoefficient,
            Field::SeriesFuseRating,
            Field::SystemVoltage,
            Field::RearGain,
            Field::StringFuse,
        ],
    ),
    (
        "Controller",
        &[
            Field::ControllerKind,
            Field::HighestCharge,
            Field::WindowLow,
            Field::WindowHigh,
            Field::PvCurrentLimit,
            Field::LimitHoldsFactor,
            Field::OutputCurrent,
            Field::ControllersAtHand,
            Field::RunningHeadroom,
            Field::StartingHeadroom,
        ],
    ),
    (
        "Place and mounting",
        &[Field::RecordHigh, Field::Mounting, Field::StandsOn, Field::ArrayDrop, Field::ColdReserve],
    ),
];

/// What differs between one kind of controller and another on the same bank.
const OF_A_CONTROLLER: [Field; 7] = [
    Field::InputLimit,
    Field::ControllersAtHand,
    Field::WindowLow,
    Field::WindowHigh,
    Field::PvCurrentLimit,
    Field::OutputCurrent,
    Field::LimitHoldsFactor,
];

/// Which inputs there are.
pub static FORM: Form =
    Form { tool: TOOL, title: ("Module and controller", "from the nameplates"), first: &FIRST, groups: &GROUPS, short };

/// What is said beside them.
pub fn hints(checks: Memo<Vec<Check<Requirement>>>) -> Hints {
    let draft = use_draft();
    Hints {
        stands_in: Arc::new(|field| assumed::of(field).map(|assumption| StandIn::of(&assumption))),
        waits: Arc::new(move |field| checks.with(|checks| asks(field, checks))),
        note: Arc::new(move |field| note(draft, field)),
    }
}

/// Other kinds of controllers at hand, each in a pad of its own.
pub fn other_controllers() -> Piece {
    let says = memo(|| "for layouts over unequal ones".to_owned());
    fold(OTHER_CONTROLLERS, "Other controllers", says, || {
        OTHERS.map(|other| of_another(other, &OF_A_CONTROLLER, short)).into_iter().collect::<Vec<Piece>>().piece()
    })
}

/// The word above a field: at most twelve letters or so, contained in the field's name.
const fn short(field: Field) -> &'static str {
    match field {
        Field::Series => "In series",
        Field::SeriesFuseRating => "Series fuse",
        Field::PvCurrentLimit => "PV current",
        Field::HighestCharge => "Highest charge",
        Field::ControllerKind => "Controller",
        Field::ControllersAtHand => "Controllers",
        other => other.name(),
    }
}

/// What waits for a field of the ten-second path, or of a check that waits for nothing else.
fn asks(field: Field, checks: &[Check<Requirement>]) -> Option<String> {
    let cold = checks.iter().find(|check| check.id == Requirement::ColdController)?;
    if cold.verdict == Verdict::Asks {
        return cold.asks.contains(field).then(|| "the answer waits for this".to_owned());
    }
    let alone = checks.iter().find(|check| check.asks.len() == 1 && check.asks.contains(field))?;
    Some(match alone.id {
        Requirement::Fuse => "string fuses wait for this".to_owned(),
        Requirement::ColdCircuit => "the circuit’s volts wait for this".to_owned(),
        _ => "a check waits for this".to_owned(),
    })
}

/// What is said under a field that holds a value.
fn note(draft: Draft, field: Field) -> Option<String> {
    let reading = draft.with(|pads| {
        let typed = pads.typed((TOOL, field));
        field.read(&typed.text, typed.unit).ok().flatten()
    })?;
    let taken_as_falling = matches!(field, Field::VocCoefficient | Field::PmaxCoefficient) && reading.number() > 0.0;
    taken_as_falling.then(|| "taken as falling: minus".to_owned())
}
