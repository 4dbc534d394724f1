//! The Air and water tool: fresh air, openings, distance from sparks, water a month, freezing.

use crate::derived::memo;
use crate::piece::{Piece, view};
use engine::bank::{
    AirAndWater, Ask, Layout, Requirement, air_and_water, assess, counts_lack, settled as with_counts, working,
};
use engine::check::{Check, Cost, FieldSet, Verdict};
use engine::field::Field;
use engine::quantity::{Quantity, SquareCentimetres};
use engine::show;

use crate::answer::{Answer, besides, rests_on};
use crate::cells::{bank, check_rows, hints, in_series, short};
use crate::check_row::against;
use crate::form::{Form, names};
use crate::settled::settled;
use crate::span_bar::Bar;
use crate::span_bar::geometry::{Post, Ruler};
use crate::tool_page::{ToolPage, figures, section, tool_page};
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
        Field::BusVoltage,
        Field::ChargeCurrent,
        Field::AirOpening,
        Field::ColdestInTheRoom,
    ],
    groups: &[(
        "More of the bank",
        &[
            Field::SleepingRoom,
            Field::CellsInSeries,
            Field::StringsOfCells,
            Field::CellsInABlock,
            Field::LowestCharge,
            Field::DepthUsed,
            Field::UsedADay,
            Field::PackColdLock,
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
pub fn air_tool() -> Piece {
    let ask = bank();
    let answer = memo(move || ask.with(|ask| Some(answer(ask))));
    let rested = settled(ask);
    let judged = memo(move || rested.with(checks));
    let found = section(
        "What the room needs",
        "",
        move || rested.with(|ask| air_and_water(ask).is_some()),
        move || rested.with(|ask| air_and_water(ask).map(|found| told(&found))).unwrap_or_else(|| Piece::Nothing),
    );
    tool_page(ToolPage {
        form: &FORM,
        answer,
        working: Box::new(move || ask.with(|ask| working(ask, Requirement::Air))),
        hints: hints(ask, missing, judged),
        before: Vec::new(),
        after: vec![found, check_rows(&FORM, rested, judged)],
        cautions: CAUTIONS,
    })
}

/// What the answer waits for.
fn missing(ask: &Ask) -> FieldSet {
    let mut missing = counts_lack(ask);
    if missing.is_empty() && air_and_water(ask).is_none() {
        let asks = Requirement::Air.check(&with_counts(ask)).map(|check| check.asks).unwrap_or_default();
        asks.iter().filter(|field| *field != Field::AirOpening).for_each(|field| missing.insert(field));
        if missing.is_empty() {
            missing.insert(Field::CellCapacity);
        }
    }
    missing
}

/// What this tool judges, worst first.
fn checks(ask: &Ask) -> Vec<Check<Requirement>> {
    let mut checks = assess(ask);
    checks.retain(|check| CHECKS.contains(&check.id));
    checks
}

fn answer(ask: &Ask) -> Answer {
    let found = air_and_water(ask);
    let checks = if found.is_some() { checks(ask) } else { Vec::new() };
    let top = checks.first();
    let area = found.as_ref().and_then(|found| found.opening);
    let opening = area.map(|opening| show::computed(opening.amount()));
    let no_gas = found.as_ref().is_some_and(|found| found.gassing.is_none());
    Answer {
        of: of(ask, no_gas),
        number: match &opening {
            Some(shown) => crate::answer::without_unit(shown).to_owned(),
            None if no_gas => "none".to_owned(),
            None => show::NONE.to_owned(),
        },
        unit: if opening.is_some() { "cm²" } else { "" }.into(),
        verdict: top.map_or(Verdict::Asks, |check| check.verdict),
        cost: top.map_or(Cost::Hazard, |check| check.cost),
        says: found
            .as_ref()
            .map_or_else(|| format!("Waits for {}.", names(missing(ask))), |found| says(found, &checks)),
        most: found.as_ref().and_then(water),
        rests: found.and_then(|found| rests_on(found.assumed)),
        besides: besides(&checks, top.map(|check| check.id), Requirement::name),
        bar: Some(bar(top, area)),
        second: None,
        offer: None,
    }
}

/// For what the number is, and for how many cells, as the count may be the best one's and not entered.
fn of(ask: &Ask, no_gas: bool) -> String {
    let what = if no_gas { "Opening for hydrogen" } else { "Each opening, inlet low and outlet high" };
    Layout::of(&with_counts(ask)).map_or_else(|| what.to_owned(), |layout| format!("{what}: {}", in_series(&layout)))
}

/// The worst check; where that asks, the ruler with what the opening must be.
fn bar(top: Option<&Check<Requirement>>, opening: Option<SquareCentimetres>) -> Bar {
    top.and_then(|check| crate::check_row::bar(check.id.name(), check)).unwrap_or_else(|| {
        let low = opening.map(|opening| Post {
            at: opening.get(),
            reserve: 0.0,
            name: "opening needed".to_owned(),
            shown: show::computed(opening.amount()),
        });
        let says = low.as_ref().map_or_else(
            || "What the room needs is not known yet.".to_owned(),
            |low| format!("Needs {} of opening; what there is has not been entered.", low.shown),
        );
        let ruler = Ruler { low, high: None, covered: None, marks: Vec::new() };
        Bar { ruler, verdict: Verdict::Asks, room: None, says }
    })
}

fn says(found: &AirAndWater, checks: &[Check<Requirement>]) -> String {
    let mut parts = Vec::new();
    match (found.flow, found.keep_clear) {
        (Some(flow), Some(clear)) => parts.push(format!(
            "{} of fresh air; nothing that sparks within {}.",
            show::computed(flow.amount()),
            show::computed(clear.amount())
        )),
        _ => parts.push("Makes no hydrogen in use. It still burns: never where people sleep.".to_owned()),
    }
    let asks = checks.iter().fold(FieldSet::default(), |all, check| all.union(check.asks));
    if !asks.is_empty() {
        parts.push(format!("Enter {} to judge it.", names(asks)));
    }
    if let Some(check) = checks.first() {
        let name = check.id.name();
        match check.verdict {
            Verdict::Breaks => parts.push(format!("{name}: {}.", against(check))),
            Verdict::Close if !check.assumed.is_empty() => {
                parts.push(format!("{name} rests on {}: confirm.", names(check.assumed)));
            }
            Verdict::Asks | Verdict::Close | Verdict::Clears => {}
        }
    }
    parts.join(" ")
}

fn water(found: &AirAndWater) -> Option<String> {
    let water = found.water_a_month?;
    let (least, most) = (show::computed(water.least.amount()), show::computed(water.greatest.amount()));
    Some(format!("Water: {least} to {most} a month"))
}

fn told(found: &AirAndWater) -> Piece {
    let mut rows: Vec<(String, String)> = Vec::new();
    let mut put = |name: &str, figure: Option<String>| rows.extend(figure.map(|figure| (name.to_owned(), figure)));
    put("Current that makes gas", found.gassing.map(|amps| show::computed(amps.amount())));
    put("Fresh air", found.flow.map(|flow| show::computed(flow.amount())));
    put("Each opening", found.opening.map(|area| show::computed(area.amount())));
    put("Keep clear of sparks", found.keep_clear.map(|metres| show::computed(metres.amount())));
    put("Freezes at its lowest charge at", found.freezes_at.map(|cold| show::computed(cold.amount())));
    put("Freezes empty at", found.freezes_empty_at.map(|cold| show::computed(cold.amount())));
    let source =
        found.gassing_source.map(|clause| view! { <p class="field-note">{format!("Source: {}.", cited(clause))}</p> });
    let cautions: Vec<Piece> = found.cautions.iter().map(|line| view! { <li>{*line}</li> }).collect();
    view! {
        {figures(rows)}
        {source}
        <ul class="notes">{cautions}</ul>
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::plain;
    use engine::chemistry::Chemistry;
    use engine::entry::Entry;

    /// 24 vented lead cells of 500 Ah: IEC 62485-2, 7.2 and 7.3: 20 mA/Ah · 500 Ah = 10 A; 0.05 · 24 · 10 = 12 m³/h;
    /// 28 · 12 = 336 cm².
    fn lead() -> Ask {
        Ask {
            chemistry: Entry::Typed(Chemistry::VentedLead),
            cell_voltage: Entry::of(2.0),
            cell_capacity: Entry::of(500.0),
            series: Entry::of(24.0),
            ..Ask::default()
        }
    }

    #[test]
    fn the_opening_is_the_standards_and_one_that_is_too_small_breaks() {
        let asked = answer(&lead());
        assert_eq!((asked.number.as_str(), asked.unit.as_ref()), ("336", "cm²"));
        assert_eq!(asked.verdict, Verdict::Asks);
        assert!(plain(&asked.says).starts_with("12.0 m³/h of fresh air; nothing that sparks within 0.62 m."));
        let post = asked.bar.expect("a bar").ruler.low.expect("a post");
        assert!((post.at - 336.0).abs() < 1e-9);
        let small = answer(&Ask { air_opening: Entry::of(300.0), coldest: Entry::of(-40.0), ..lead() });
        assert_eq!(small.verdict, Verdict::Breaks);
        let both = format!("{} {}", plain(&small.says), small.besides.unwrap_or_default());
        assert!(both.contains("Air for the room") && both.contains("Freezing"), "{both}");
    }

    #[test]
    fn lithium_needs_no_opening_and_nobody_sleeps_beside_it() {
        let ask = Ask { chemistry: Entry::Typed(Chemistry::Lfp), cell_voltage: Entry::of(3.2), ..lead() };
        let sleeps = Ask { sleeping_room: Entry::Typed(engine::bank::YesNo::Yes), ..ask };
        assert_eq!(answer(&ask).number, "none");
        assert_eq!(answer(&ask).most, None, "no water");
        assert_eq!(answer(&sleeps).verdict, Verdict::Breaks);
    }

    #[test]
    fn what_it_waits_for_is_named() {
        let says = |ask: &Ask| answer(ask).says;
        assert_eq!(says(&Ask::default()), "Waits for Chemistry, Cell voltage, Number of cells and Bus voltage.");
        assert_eq!(says(&Ask { cell_capacity: Entry::Blank, ..lead() }), "Waits for Cell capacity.");
    }
}
