//! The Cells tool: which counts in series and in parallel suit the bus, and what the bank then gives.

mod answer;
mod layouts;
mod reading;

pub use answer::missing;

use std::sync::Arc;

use engine::bank::{Ask, assess, assumption, settled as with_counts, working};
use engine::field::Field;
use leptos::prelude::*;

use crate::check_row::check_row;
use crate::derived::memo;
use crate::draft::use_draft;
use crate::field::StandIn;
use crate::fold::Folds;
use crate::form::{Form, Hints, waits};
use crate::settled::settled;
use crate::tool_page::{ToolPage, check_list, tool_page};
use crate::tools::Tool;

/// The tool whose pad holds the bank; Settings and Air and water read it too.
pub const TOOL: Tool = Tool::Cells;

static FORM: Form = Form {
    tool: TOOL,
    title: ("Cells and bus", "two taps and four numbers"),
    first: &[
        Field::Chemistry,
        Field::CellVoltage,
        Field::CellCapacity,
        Field::NumberOfCells,
        Field::BusVoltage,
        Field::ColdestInTheRoom,
        Field::CellsInSeries,
        Field::StringsOfCells,
    ],
    groups: &[
        (
            "What stands on the bus",
            &[
                Field::InverterLow,
                Field::InverterHigh,
                Field::LoadsLow,
                Field::LoadsHigh,
                Field::ChargeCurrent,
                Field::GreatestLoad,
                Field::StartingLoad,
                Field::StartingTime,
                Field::ControllerOutputLimit,
                Field::ChargeCap,
            ],
        ),
        (
            "Room",
            &[Field::WarmestInTheRoom, Field::WetRoom, Field::PostsCovered, Field::SleepingRoom, Field::AirOpening],
        ),
        (
            "Cells, by their maker",
            &[
                Field::CellsInABlock,
                Field::CellEnd,
                Field::CellAbsorb,
                Field::CellFloat,
                Field::CellEqualise,
                Field::CellCompensation,
                Field::DepthUsed,
                Field::LowestCharge,
                Field::UsedADay,
            ],
        ),
        (
            "Packs that guard themselves",
            &[
                Field::OwnProtection,
                Field::PackChargeLimit,
                Field::PackDischargeLimit,
                Field::PackPeak,
                Field::PackPeakTime,
                Field::PackColdLock,
            ],
        ),
        ("Strings side by side", &[Field::TakeOff, Field::TieResistance, Field::VoltsApart]),
    ],
    short,
};

const CAUTIONS: &[&str] = &[
    "Any bank welds a wrench and burns, at every voltage, and cannot be switched off: insulate tools, take off rings, \
     cover the posts you are not at. Above 60 V d.c. (30 V wet) it shocks as well.",
    "Acid and lye burn: eye shield, gloves, apron, water at hand. Lead and nickel banks make hydrogen: air, and no spark. \
     Never charge lithium cells below freezing.",
];

/// The word above a field of the bank, on every page that shows it.
pub fn short(field: Field) -> &'static str {
    match field {
        Field::CellVoltage => "Voltage",
        Field::CellCapacity => "Capacity",
        Field::NumberOfCells => "Number",
        Field::ColdestInTheRoom => "Coldest",
        Field::WarmestInTheRoom => "Warmest",
        Field::CellsInSeries => "In series",
        Field::StringsOfCells => "Strings",
        Field::CellsInABlock => "In a block",
        Field::CellEnd => "End",
        Field::CellAbsorb => "Absorb",
        Field::CellFloat => "Float",
        Field::CellEqualise => "Equalise",
        Field::CellCompensation => "Compensation",
        Field::ControllerOutputLimit => "Output limit",
        Field::ChargeCap => "Cap",
        Field::GreatestLoad => "Greatest load",
        Field::PackChargeLimit => "Charge limit",
        Field::PackDischargeLimit => "Discharge limit",
        Field::PackPeakTime => "Peak time",
        Field::PackColdLock => "Cold lock",
        Field::OwnProtection => "Protection",
        Field::TieResistance => "Resistance",
        other => other.name(),
    }
}

/// The bank that was typed in, told wherever it changes.
pub fn bank() -> Memo<Ask> {
    let draft = use_draft();
    memo(move || draft.with(crate::pads::Pads::bank_ask))
}

/// What stands in for the fields of a bank.
pub fn stands_in(ask: Memo<Ask>) -> Arc<dyn Fn(Field) -> Option<StandIn> + Send + Sync> {
    Arc::new(move |field| ask.with(|ask| assumption(ask, field)).map(|assumption| StandIn::of(&assumption)))
}

/// The Cells tool.
pub fn cells_tool() -> AnyView {
    let draft = use_draft();
    let ask = bank();
    let answer = memo(move || draft.with(|pads| ask.with(|ask| answer::answer(&pads.of(TOOL), ask))));
    let rested = settled(ask);
    let checks = memo(move || rested.with(assess));
    let hints = Hints {
        stands_in: stands_in(ask),
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
                let row = |check: &engine::check::Check<engine::bank::Requirement>| {
                    let id = format!("cells/{}", check.id.id());
                    check_row(id, check.id.name(), check, None, || working(ask, check.id), go)
                };
                checks.iter().map(row).collect()
            })
        })
    };
    tool_page(ToolPage {
        form: &FORM,
        answer,
        working: Box::new(move || ask.with(|ask| engine::bank::energy_working(&with_counts(ask)))),
        hints,
        before: Vec::new(),
        after: vec![
            layouts::layout_list(rested),
            crate::shelf::shelf_section(),
            check_list(rows),
            reading::reading(rested),
        ],
        cautions: CAUTIONS,
    })
}
