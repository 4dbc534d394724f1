//! The Start tool: will it start, without taking the bus down.

mod answer;
mod others;

use std::sync::Arc;

use crate::derived::memo;
use crate::piece::Piece;
use engine::field::Field;
use engine::start::{Requirement, assess, assumption, working};
use leptos::prelude::*;

use crate::check_row::check_row;
use crate::draft::use_draft;
use crate::field::StandIn;
use crate::fold::Folds;
use crate::form::{Form, Hints, waits};
use crate::settled::settled;
use crate::tool_page::{ToolPage, check_list, tool_page};
use crate::tools::Tool;

const TOOL: Tool = Tool::Start;

static FORM: Form = Form {
    tool: TOOL,
    title: ("The load and what feeds it", "five entries give a verdict"),
    first: &[
        Field::StartLoad,
        Field::RunningPower,
        Field::InverterContinuous,
        Field::InverterSurge,
        Field::BankEmf,
        Field::CutOff,
        Field::AlreadyRunning,
        Field::BankResistance,
    ],
    groups: &[
        (
            "How it starts",
            &[
                Field::FedBy,
                Field::StartsAs,
                Field::StartingMultiple,
                Field::CodeLetter,
                Field::LockedRotor,
                Field::AcVolts,
                Field::MotorSize,
                Field::StartingPowerFactor,
                Field::StartingSeconds,
                Field::RunningPowerFactor,
                Field::HowMany,
            ],
        ),
        (
            "Inverter and breaker",
            &[
                Field::SurgeSeconds,
                Field::ShortSurge,
                Field::ShortSurgeSeconds,
                Field::InverterEfficiency,
                Field::InverterAir,
                Field::Height,
                Field::Breaker,
                Field::TripCurve,
                Field::TripMultiple,
            ],
        ),
        (
            "Bus",
            &[
                Field::CableResistance,
                Field::Charge,
                Field::BankTemperature,
                Field::BankAge,
                Field::Chemistry,
                Field::CellVoltage,
                Field::CellCapacity,
                Field::CellsInSeries,
                Field::StringsOfCells,
            ],
        ),
        (
            "Packs that guard themselves",
            &[Field::Packs, Field::PackDischargeLimit, Field::PackPeak, Field::PackPeakTime],
        ),
        ("Generator", &[Field::GeneratorRating, Field::ChargerDraw]),
    ],
    short,
};

const CAUTIONS: &[&str] = &[
    "The figures of a class are typical: read the nameplate. A motor that hums and does not turn draws its starting current \
     until something burns or trips: switch it off at once.",
    "Never feed a panel that the grid or a generator may feed too, but through a transfer switch, and with the utility’s consent.",
];

fn short(field: Field) -> &'static str {
    match field {
        Field::InverterContinuous => "Continuous",
        Field::InverterSurge => "Surge",
        Field::BankResistance => "Resistance",
        Field::RunningPower => "Running",
        Field::AlreadyRunning => "Already",
        Field::StartingMultiple => "Multiple",
        Field::StartingPowerFactor | Field::RunningPowerFactor => "Power factor",
        Field::StartingSeconds => "Seconds",
        Field::LockedRotor => "Locked-rotor",
        Field::ShortSurgeSeconds => "Seconds",
        Field::InverterEfficiency => "Efficiency",
        Field::InverterAir => "Air",
        Field::CableResistance => "Cable",
        Field::BankTemperature => "Temperature",
        Field::CellVoltage => "Cell voltage",
        Field::CellCapacity => "Capacity",
        Field::CellsInSeries => "In series",
        Field::StringsOfCells => "Strings",
        Field::PackDischargeLimit => "Discharge",
        Field::PackPeakTime => "Peak time",
        Field::GeneratorRating => "Rating",
        Field::ChargerDraw => "Charger",
        other => other.name(),
    }
}

/// The Start tool.
pub fn start_tool() -> Piece {
    let draft = use_draft();
    let ask = memo(move || draft.with(crate::pads::Pads::start_ask));
    let answer = memo(move || ask.with(|ask| Some(answer::answer(ask))));
    let rested = settled(ask);
    let checks = memo(move || rested.with(assess));
    let hints = Hints {
        stands_in: Arc::new(move |field| {
            ask.with(|ask| assumption(ask, field)).map(|assumption| StandIn::of(&assumption))
        }),
        waits: Arc::new(move |field| {
            let missing = ask.with(answer::missing);
            checks.with(|checks| waits(field, missing, checks.iter().map(|check| check.asks)))
        }),
        note: Arc::new(|_| None),
    };
    let folds = expect_context::<Folds>();
    let go = Callback::new(move |field: Field| FORM.go_to(folds, field));
    let rows = move || {
        rested.with(|ask| {
            checks.with(|checks| {
                let row = |check: &engine::check::Check<Requirement>| {
                    let id = format!("start/{}", check.id.id());
                    check_row(id, check.id.name(), check, None, || working(ask, check.id), go)
                };
                checks.iter().map(row).collect()
            })
        })
    };
    tool_page(ToolPage {
        form: &FORM,
        answer,
        working: Box::new(move || {
            ask.with(|ask| {
                let top = answer::on_top(ask).map_or(Requirement::Sag, |check| check.id);
                working(ask, top)
            })
        }),
        hints,
        before: Vec::new(),
        after: vec![check_list(rows), others::helps(rested), others::together_with(rested)],
        cautions: CAUTIONS,
    })
}
