//! The Air and water tool: fresh air, openings, distance from sparks, water a month, freezing.

use std::sync::Arc;

use engine::bank::{AirAndWater, Ask, Requirement, air_and_water, settled as with_counts, working};
use engine::check::{Cost, Verdict};
use engine::field::Field;
use engine::quantity::Quantity;
use engine::show;
use leptos::prelude::*;

use crate::answer::Answer;
use crate::cells::{bank, short, stands_in};
use crate::check_row::check_row;
use crate::derived::memo;
use crate::fold::Folds;
use crate::form::{Form, Hints, names, waits};
use crate::settled::settled;
use crate::tool_page::{ToolPage, check_list, figures, section, tool_page};
use crate::tools::Tool;
use crate::working::cited;

static FORM: Form = Form {
    tool: Tool::AirAndWater,
    title: ("The bank", "the same as in Cells"),
    first: &[
        Field::Chemistry,
        Field::CellVoltage,
        Field::CellCapacity,
        Field::NumberOfCells,
        Field::ChargeCurrent,
        Field::AirOpening,
        Field::ColdestInTheRoom,
        Field::SleepingRoom,
    ],
    groups: &[(
        "More of the bank",
        &[
            Field::CellsInSeries,
            Field::StringsOfCells,
            Field::CellsInABlock,
            Field::BusVoltage,
            Field::LowestCharge,
            Field::DepthUsed,
            Field::UsedADay,
            Field::WarmestInTheRoom,
        ],
    )],
    short,
};

const CAUTIONS: &[&str] = &[
    "Hydrogen burns in air from 4 % up, and gathers under the ceiling: inlet low, outlet high and across, no switch or lamp \
     over the cells, no flame, nothing that sparks inside the distance.",
    "Acid and lye burn: eye shield, gloves, apron, water at hand; bicarbonate for acid. Water goes in after charging.",
];

/// What this tool judges.
const CHECKS: [Requirement; 5] =
    [Requirement::Air, Requirement::AirSleeping, Requirement::Cold, Requirement::ColdCharge, Requirement::ColdLock];

/// The Air and water tool.
pub fn air_tool() -> AnyView {
    let ask = bank();
    let answer = memo(move || ask.with(|ask| Some(answer(ask))));
    let rested = settled(ask);
    let hints = Hints {
        stands_in: stands_in(ask),
        waits: Arc::new(move |field| {
            let missing = ask.with(crate::cells::missing);
            waits(field, missing, ask.with(checks).iter().map(|check| check.asks))
        }),
        note: Arc::new(|_| None),
    };
    let found = section(
        "What the room needs",
        "",
        move || rested.with(|ask| air_and_water(ask).is_some()),
        move || rested.with(|ask| air_and_water(ask).map(|found| told(&found))).unwrap_or_else(|| ().into_any()),
    );
    let folds = expect_context::<Folds>();
    let go = Callback::new(move |field: Field| FORM.go_to(folds, field));
    let rows = move || {
        rested.with(|ask| {
            let row = |check: &engine::check::Check<Requirement>| {
                let id = format!("air-and-water/{}", check.id.id());
                check_row(id, check.id.name(), check, None, || working(ask, check.id), go)
            };
            checks(ask).iter().map(row).collect()
        })
    };
    tool_page(ToolPage {
        form: &FORM,
        answer,
        working: Box::new(move || ask.with(|ask| working(ask, Requirement::Air))),
        hints,
        before: vec![found],
        after: vec![check_list(rows)],
        cautions: CAUTIONS,
    })
}

fn checks(ask: &Ask) -> Vec<engine::check::Check<Requirement>> {
    let ask = with_counts(ask);
    let mut checks: Vec<_> = CHECKS.iter().filter_map(|one| one.check(&ask)).collect();
    engine::order::sort_short(&mut checks, |a, b| {
        let ((group_a, margin_a), (group_b, margin_b)) = (a.rank(), b.rank());
        group_a.cmp(&group_b).then(margin_a.total_cmp(&margin_b))
    });
    checks
}

fn answer(ask: &Ask) -> Answer {
    let found = air_and_water(ask);
    let checks = checks(ask);
    let top = checks.first();
    let opening = found.as_ref().and_then(|found| found.opening).map(|opening| show::computed(opening.amount()));
    let no_gas = found.as_ref().is_some_and(|found| found.gassing.is_none());
    Answer {
        of: "Free area of an inlet low, and as much of an outlet high".to_owned(),
        number: match &opening {
            Some(shown) => crate::answer::without_unit(shown).to_owned(),
            None if no_gas => "none".to_owned(),
            None => show::NONE.to_owned(),
        },
        unit: if opening.is_some() { "cm²" } else { "" },
        verdict: top.map_or(Verdict::Asks, |check| check.verdict),
        cost: top.map_or(Cost::Hazard, |check| check.cost),
        says: match &found {
            None => format!("Waits for {}.", names(crate::cells::missing(ask))),
            Some(found) if found.gassing.is_none() => {
                "Makes no hydrogen in use. It still burns: never where people sleep.".to_owned()
            }
            Some(found) => match (found.flow, found.keep_clear) {
                (Some(flow), Some(clear)) => format!(
                    "{} of fresh air; nothing that sparks within {}.",
                    show::computed(flow.amount()),
                    show::computed(clear.amount())
                ),
                _ => String::new(),
            },
        },
        most: found.as_ref().and_then(water),
        rests: found
            .filter(|found| !found.assumed.is_empty())
            .map(|found| format!("Rests on what is assumed: {}.", names(found.assumed))),
        besides: None,
        bar: top.and_then(|check| crate::check_row::bar(check.id.name(), check)),
        second: None,
        offer: None,
    }
}

fn water(found: &AirAndWater) -> Option<String> {
    let water = found.water_a_month?;
    let (least, most) = (show::computed(water.least.amount()), show::computed(water.greatest.amount()));
    Some(format!("Water: {least} to {most} a month"))
}

fn told(found: &AirAndWater) -> AnyView {
    let mut rows: Vec<(String, String)> = Vec::new();
    let mut put = |name: &str, figure: Option<String>| rows.extend(figure.map(|figure| (name.to_owned(), figure)));
    put("Current that makes gas", found.gassing.map(|amps| show::computed(amps.amount())));
    put("Fresh air", found.flow.map(|flow| show::computed(flow.amount())));
    put("Each opening", found.opening.map(|area| show::computed(area.amount())));
    put("Keep clear of sparks", found.keep_clear.map(|metres| show::computed(metres.amount())));
    put("Freezes at its lowest charge at", found.freezes_at.map(|cold| show::computed(cold.amount())));
    put("Freezes empty at", found.freezes_empty_at.map(|cold| show::computed(cold.amount())));
    let source = found.gassing_source.map(|clause| {
        let covered = if found.within_the_standard {
            ""
        } else {
            " The standard does not cover this chemistry; the whole charge current is taken to gas."
        };
        view! { <p class="ranked-say">{format!("By {}.{covered}", cited(clause))}</p> }.into_any()
    });
    let cautions: Vec<AnyView> = found.cautions.iter().map(|line| view! { <li>{*line}</li> }.into_any()).collect();
    view! {
        {figures(rows)}
        {source}
        <ul class="notes">{cautions}</ul>
    }
    .into_any()
}
