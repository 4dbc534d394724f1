//! The Cells tool: which counts in series and in parallel suit the bus, and what the bank then gives.

mod answer;
mod layouts;
mod reading;
mod sharing;

pub use answer::{assumed, empty_bar, in_series, window_bar};

use std::sync::Arc;

use crate::derived::{Memo, dynamic, memo, when};
use crate::piece::{Piece, view};
use engine::bank::{Ask, Requirement, assess, assumption, lacks, settled as with_counts, working};
use engine::check::{Check, FieldSet, Step};
use engine::field::Field;
use leptos::prelude::*;

use crate::check_row::check_row;
use crate::draft::use_draft;
use crate::field::StandIn;
use crate::fold::{Folds, fold};
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
        Field::SleepingRoom => "Sleeping",
        Field::TieResistance => "Resistance",
        Field::BankTemperature => "Temperature",
        other => other.name(),
    }
}

/// The bank that was typed in, told wherever it changes.
pub fn bank() -> Memo<Ask> {
    let draft = use_draft();
    memo(move || draft.with(crate::pads::Pads::bank_ask))
}

/// What stands in for the fields of a bank, told of the bank with its counts: those entered, or the best.
pub fn stands_in(ask: Memo<Ask>) -> Arc<dyn Fn(Field) -> Option<StandIn> + Send + Sync> {
    let counted = memo(move || ask.with(with_counts));
    Arc::new(move |field| {
        let of = match field {
            Field::CellsInSeries | Field::StringsOfCells => ask,
            _ => counted,
        };
        of.with(|ask| assumption(ask, field)).map(|assumption| StandIn::of(&assumption))
    })
}

/// What is said beside the fields of a bank, where `lacks` holds up the answer and `checks` hold up more.
pub fn hints(ask: Memo<Ask>, lacks: fn(&Ask) -> FieldSet, checks: Memo<Vec<Check<Requirement>>>) -> Hints {
    Hints {
        stands_in: stands_in(ask),
        waits: Arc::new(move |field| {
            checks.with(|checks| waits(field, ask.with(lacks), checks.iter().map(|check| check.asks)))
        }),
        note: Arc::new(|_| None),
    }
}

/// The rows of a bank's checks on the page of `form`.
pub fn check_rows(form: &'static Form, ask: Memo<Ask>, checks: Memo<Vec<Check<Requirement>>>) -> Piece {
    let folds = expect_context::<Folds>();
    let go = Callback::new(move |field: Field| form.go_to(folds, field));
    check_list(move || {
        ask.with(|ask| {
            checks.with(|checks| {
                let row = |check: &Check<Requirement>| {
                    let id = format!("{}/{}", form.tool.key(), check.id.id());
                    check_row(id, check.id.name(), check, None, || working(ask, check.id), go)
                };
                checks.iter().map(row).collect()
            })
        })
    })
}

/// The Cells tool.
pub fn cells_tool() -> Piece {
    let draft = use_draft();
    let ask = bank();
    let answer = memo(move || draft.with(|pads| ask.with(|ask| answer::answer(&pads.of(TOOL), ask))));
    let rested = settled(ask);
    let checks = memo(move || rested.with(assess));
    tool_page(ToolPage {
        form: &FORM,
        answer,
        working: Box::new(move || ask.with(steps)),
        hints: hints(ask, lacks, checks),
        before: Vec::new(),
        after: vec![
            layouts::layout_list(rested),
            energy(ask),
            crate::shelf::shelf_section(),
            check_rows(&FORM, rested, checks),
            sharing::sharing(rested),
            reading::reading(rested),
        ],
        cautions: CAUTIONS,
    })
}

/// The steps to the end of the window that holds least well.
fn steps(ask: &Ask) -> Vec<Step> {
    let layout = answer::chosen(ask, &engine::bank::layouts(ask));
    let Some(layout) = layout else { return Vec::new() };
    let on_top = answer::of_window(&layout).map_or(Requirement::WindowHigh, |check| check.id);
    working(&ask.with_counts(layout.series, layout.strings), on_top)
}

/// How much of the bank can be used, step by step.
fn energy(ask: Memo<Ask>) -> Piece {
    let counted = memo(move || ask.with(with_counts));
    when(
        move || counted.with(|ask| engine::bank::energy(ask).is_some()),
        move || {
            view! {
                {fold("cells/energy", "Energy", memo(|| "in this room, at this load".to_owned()), move || view! {                     {dynamic(move || {
                        let steps = counted.with(engine::bank::energy_working);
                        crate::working::list(steps)
                    })}
                 })}
            }
        },
    )
}
