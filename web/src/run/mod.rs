//! The Run tool: which conductor and which breaker, what is lost on the way, and what a fault would do.

mod answer;
mod bars;
mod branch;
mod details;
mod fault;
mod picture;
mod truck;

use std::sync::Arc;

use crate::derived::memo;
use crate::piece::Piece;
use engine::check::Check;
use engine::field::Field;
use engine::run::{Requirement, assess, working};
use leptos::prelude::*;

use crate::check_row::check_row;
use crate::draft::use_draft;
use crate::field::StandIn;
use crate::fold::Folds;
use crate::form::{Form, Hints, waits};
use crate::settled::settled;
use crate::tool_page::{ToolPage, check_list, tool_page};
use crate::tools::Tool;

const TOOL: Tool = Tool::Run;

static FORM: Form = Form {
    tool: TOOL,
    title: ("The run", "four entries give an answer"),
    first: &[
        Field::RunKind,
        Field::CodeFamily,
        Field::RunCurrent,
        Field::RunPower,
        Field::RunVoltage,
        Field::RunLength,
        Field::ConductorSize,
        Field::Breaker,
    ],
    groups: &[
        (
            "Cable",
            &[
                Field::Conductor,
                Field::Insulation,
                Field::Method,
                Field::Ambient,
                Field::ConductorsTogether,
                Field::ConductorsInParallel,
                Field::Terminals,
                Field::AllowedDrop,
            ],
        ),
        (
            "Breaker and bank",
            &[Field::BreakerType, Field::InterruptingRating, Field::BankResistance, Field::Precharged],
        ),
    ],
    short,
};

const CAUTIONS: &[&str] = &[
    "A bank cannot be switched off: it welds a wrench and burns at any voltage. Open and lock its breaker, prove dead \
     with a meter, insulate tools, and cover what stays live.",
    "A direct-current arc does not go out. Use breakers and fuses rated for these volts d.c., wired as their maker shows; \
     a polarised one connected the wrong way round burns instead of opening.",
    "A string is live in any light: cover or darken the array before its terminals are touched. Above 60 V d.c. (30 V wet) \
     it shocks.",
];

fn short(field: Field) -> &'static str {
    match field {
        Field::RunLength => "Length",
        Field::ConductorsTogether => "Together",
        Field::ConductorsInParallel => "In parallel",
        Field::InterruptingRating => "Interrupting",
        Field::BankResistance => "Resistance",
        Field::ConductorSize => "Size",
        other => other.name(),
    }
}

/// The Run tool.
pub fn run_tool() -> Piece {
    let draft = use_draft();
    let ask = memo(move || draft.with(crate::pads::Pads::run_ask));
    let answer = memo(move || draft.with(|pads| ask.with(|ask| answer::answer(&pads.of(TOOL), ask))));
    let rested = settled(ask);
    // Where a cable is asked about, the checks are of the most that it takes.
    let checks = memo(move || assess(&rested.with(truck::settled)));
    let hints = Hints {
        stands_in: Arc::new(move |field| {
            ask.with(|ask| engine::run::assumed::of(ask, field)).map(|assumption| StandIn::of(&assumption))
        }),
        waits: Arc::new(move |field| {
            let missing = ask.with(answer::missing);
            let told = checks.with(|checks| waits(field, missing, checks.iter().map(|check| check.asks)));
            told.map(|told| if field == Field::RunCurrent { format!("{told}, or for Power") } else { told })
        }),
        note: Arc::new(|_| None),
    };
    let folds = expect_context::<Folds>();
    let go = Callback::new(move |field: Field| FORM.go_to(folds, field));
    let rows = move || {
        let ask = rested.with(truck::settled);
        let row = |check: &Check<Requirement>| {
            let id = format!("run/{}", check.id.id());
            check_row(id, check.id.name(), check, answer::note(&ask, check.id), || working(&ask, check.id), go)
        };
        checks.with(|checks| checks.iter().map(row).collect())
    };
    tool_page(ToolPage {
        form: &FORM,
        answer,
        working: Box::new(move || {
            let ask = ask.with(truck::settled);
            let worst = answer::on_top(&ask).map_or(Requirement::Drop, |check| check.id);
            working(&ask, worst)
        }),
        hints,
        before: vec![picture::picture(ask), details::short_circuit(rested)],
        after: vec![details::on_the_truck(rested), check_list(rows), details::fitting(rested), branch::branch(rested)],
        cautions: CAUTIONS,
    })
}
