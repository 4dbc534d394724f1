//! The answer of the Run tool, worded and drawn. Pure.

use engine::check::{Check, Cost, FieldSet, Verdict};
use engine::entry::Entry;
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Amount, Quantity};
use engine::run::{Ask, BreakerType, Candidate, Drop, Kind, Precharge, Requirement, Sizing, reach, size};
use engine::show;
use engine::unit::Unit;

use super::{TOOL, bars, truck};
use crate::answer::{Answer, Offer, besides};
use crate::check_row::against;
use crate::form::{as_entered, names};
use crate::pads::Typed;

/// The requirements that choose a conductor and its breaker, the drop last.
pub const CHOOSING: [Requirement; 3] = [Requirement::Ampacity, Requirement::Protection, Requirement::Drop];

/// What the answer waits for.
pub fn missing(ask: &Ask) -> FieldSet {
    if truck::asked(ask) {
        return reach(ask).err().unwrap_or_default();
    }
    size(ask).err().unwrap_or_default()
}

/// The worst of what chooses conductor and breaker.
pub fn on_top(ask: &Ask) -> Option<Check<Requirement>> {
    worst_of(&CHOOSING, ask)
}

/// The worst of some requirements.
pub fn worst_of(requirements: &[Requirement], ask: &Ask) -> Option<Check<Requirement>> {
    let checks = requirements.iter().filter_map(|one| one.check(ask));
    checks.min_by(Check::order)
}

/// The answer to what was typed into `pad`.
pub fn answer(pad: &impl Pad, ask: &Ask) -> Option<Answer> {
    if truck::asked(ask) {
        return Some(truck::answer(pad, ask));
    }
    let found = size(ask);
    let checks: Vec<Check<Requirement>> = Requirement::ALL.iter().filter_map(|one| one.check(ask)).collect();
    let top = on_top(ask);
    let (verdict, cost) = top.map_or((Verdict::Asks, Cost::Hazard), |check| (check.verdict, check.cost));
    let sizing = found.as_ref().ok();
    let conductor = sizing.and_then(|sizing| sizing.conductor);
    let (number, unit) = conductor.map_or_else(|| (show::NONE.to_owned(), ""), in_two);
    Some(Answer {
        of: of(pad, ask, sizing),
        number,
        unit: unit.into(),
        verdict,
        cost,
        says: match &found {
            Ok(sizing) => says(sizing, ask, top.as_ref()),
            Err(missing) if missing.is_empty() => {
                "No standard breaker is large enough: divide the load over several runs.".to_owned()
            }
            Err(missing) => format!("Waits for {}.", waits_for(*missing)),
        },
        most: sizing.map(breaker),
        rests: top.as_ref().and_then(rests),
        besides: besides(&checks, top.map(|check| check.id), Requirement::name),
        bar: Some(bars::amps(sizing, &checks)),
        second: bars::drop(sizing, &checks),
        offer: offer(ask, &checks),
    })
}

/// "2 × 500" and "kcmil": the unit is set smaller.
fn in_two(conductor: Candidate) -> (String, &'static str) {
    let text = conductor.to_string();
    let units = ["AWG", "kcmil", "mm²"].into_iter();
    let parts = units.filter_map(|unit| Some((text.strip_suffix(unit)?.trim_end().to_owned(), unit))).next();
    parts.unwrap_or((text, ""))
}

/// Amperes or watts: either will do.
fn waits_for(missing: FieldSet) -> String {
    names(missing).replace(Field::RunCurrent.name(), "Current or Power")
}

/// Where an inverter would be closed straight onto the bank, one tap says that a resistor goes first.
fn offer(ask: &Ask, checks: &[Check<Requirement>]) -> Option<Offer> {
    let broken = checks.iter().any(|check| check.id == Requirement::Precharge && check.verdict == Verdict::Breaks);
    (broken && ask.precharged == Entry::Blank).then(|| Offer {
        words: "Charge it through a resistor first".to_owned(),
        fill: vec![((TOOL, Field::Precharged), Typed { text: "yes".to_owned(), unit: None })],
    })
}

fn of(pad: &impl Pad, ask: &Ask, sizing: Option<&Sizing>) -> String {
    let Some(kind) = ask.kind.typed() else { return "Conductor and breaker of a run".to_owned() };
    let (from, to) = kind.ends();
    let mut text = format!("{from} to {to}");
    if let Some(length) = as_entered(pad, Field::RunLength) {
        text = format!("{text}, {length} one way");
    }
    if let Some(sizing) = sizing {
        text = format!("{text}, {} flows", show::computed(sizing.load.working.amount()));
    }
    let mut letters = text.chars();
    letters
        .next()
        .map_or_else(String::new, |first| std::iter::once(first.to_ascii_uppercase()).chain(letters).collect())
}

/// "Breaker 100 A".
fn breaker(sizing: &Sizing) -> String {
    let protection = &sizing.protection;
    let what = if protection.protects == BreakerType::Fuse { "Fuse" } else { "Breaker" };
    format!("{what} {}", show::given(protection.rating.amount()))
}

fn says(sizing: &Sizing, ask: &Ask, top: Option<&Check<Requirement>>) -> String {
    let Some(conductor) = sizing.conductor else {
        return "Not even six of the thickest side by side hold. Shorten it, raise the voltage, or divide the load over \
                several runs."
            .to_owned();
    };
    let mut parts = Vec::new();
    if let Some(check) = top.filter(|check| check.verdict == Verdict::Breaks) {
        parts.push(format!("{}: {}.", check.id.name(), against(check)));
    }
    parts.push(sizing.drop.as_ref().map_or_else(|| asks_for_drop(ask), loses));
    if conductor.parallel > 1 && !sizing.entered {
        parts.push("One alone is not enough: equal ones side by side for each pole.".to_owned());
    }
    parts.join(" ")
}

/// "Loses 0.26 V (0.5 %), 11 mV a cell of 2 V, 20.8 W as heat."
fn loses(drop: &Drop) -> String {
    let per_cell = drop.per_cell.map_or_else(String::new, |volts| {
        let milli = Amount { number: volts.get() * 1000.0, unit: Unit::Millivolt };
        format!(", {} a cell of 2 V", show::computed(milli))
    });
    format!(
        "Loses {} ({}){per_cell}, {} as heat.",
        show::computed(drop.volts.amount()),
        show::computed(drop.part.amount()),
        show::computed(drop.lost.amount())
    )
}

fn asks_for_drop(ask: &Ask) -> String {
    let mut missing = FieldSet::default();
    for (field, is) in
        [(Field::RunVoltage, ask.voltage.typed().is_none()), (Field::RunLength, ask.length.typed().is_none())]
    {
        if is {
            missing.insert(field);
        }
    }
    format!("Enter {} for the drop.", names(missing))
}

/// What it rests on, where something was assumed.
pub fn rests(check: &Check<Requirement>) -> Option<String> {
    let close = check.verdict == Verdict::Close && !check.assumed.is_empty();
    close.then(|| format!("Close until that is confirmed: {}.", names(check.assumed)))
}

/// What else there is to say of a check, under its name.
pub fn note(ask: &Ask, requirement: Requirement) -> Option<String> {
    match requirement {
        Requirement::Poles => Some(
            match ask.kind.typed()? {
                Kind::DcBranch | Kind::DcFeeder => "Current flows one way here, from the bank to the loads.",
                _ => "Current, or a fault’s current, flows both ways here: a polarised breaker opens only one of them.",
            }
            .to_owned(),
        ),
        Requirement::Precharge => size(ask).ok()?.precharge.as_ref().map(precharge),
        _ => None,
    }
}

/// How to charge an inverter's capacitors before its breaker is closed.
pub fn precharge(how: &Precharge) -> String {
    format!(
        "Hold {} across the open breaker for {}, then close it. The resistor sees {} for a moment.",
        show::given(how.resistor.amount()),
        show::computed(how.wait.amount()),
        show::computed(how.resistor_peak.amount())
    )
}

#[cfg(test)]
pub mod tests {
    use super::*;
    use crate::span_bar::geometry::Stand;
    use crate::testing::{Rows, plain};

    /// The answer to some rows.
    #[track_caller]
    pub fn of_rows(rows: &[(Field, &str)]) -> Answer {
        answer(&Rows(rows), &Ask::read(&Rows(rows))).expect("there is always an answer")
    }

    /// Four 30 A controllers on one plate, one 2 AWG to the bank (common practice, no source): 120 A, 150 A with the
    /// continuous rule, against 115 A of its 75 °C column.
    const PLATE: &[(Field, &str)] = &[
        (Field::RunKind, "controller"),
        (Field::CodeFamily, "north-america"),
        (Field::RunCurrent, "120"),
        (Field::RunVoltage, "12"),
        (Field::RunLength, "3 ft"),
    ];

    #[test]
    fn four_entries_name_conductor_breaker_and_drop() {
        let answer = of_rows(PLATE);
        assert_eq!(plain(&answer.of), "Controller to bus, 3 ft one way, 120.0 A flows");
        assert_eq!((answer.number.as_str(), answer.unit.as_ref()), ("1/0", "AWG"));
        assert_eq!(answer.most.as_deref().map(plain).as_deref(), Some("Breaker 150 A"));
        // By hand: 6 ft of 0.122 Ω a thousand feet at 75 °C, at 60 °C 0.116: 120 A lose 0.084 V, 10 W; of six cells each
        // 14 mV.
        let says = plain(&answer.says);
        assert_eq!(says, "Loses 0.08 V (0.7 %), 13.9 mV a cell of 2 V, 10.0 W as heat.");
        assert!(answer.second.is_some_and(|bar| bar.ruler.high.is_some_and(|post| plain(&post.shown) == "1 %")));
    }

    #[test]
    fn four_controllers_on_one_2_awg_break_and_picture_and_sentence_say_by_how_much() {
        let answer = of_rows(&[PLATE, &[(Field::ConductorSize, "2 AWG")]].concat());
        assert_eq!(answer.verdict, Verdict::Breaks);
        let says = plain(&answer.says);
        assert!(says.starts_with("Conductor carries the current: 115.0 A, needs 150 A."), "{says}");
        let bar = answer.bar.expect("a picture");
        assert_eq!(bar.ruler.geometry().high_post, Some(Stand::Snapped));
        assert_eq!(bar.room.as_deref().map(plain).as_deref(), Some("35.0 A"));
        let shown: Vec<String> =
            bar.ruler.marks.iter().map(|mark| format!("{} {}", plain(&mark.shown), mark.name)).collect();
        assert_eq!(shown, ["120.0 A flows", "150.0 A by rule"]);
    }

    /// 100 A flow in 2 AWG, which carries 115 A at its terminals: by the continuous rule it must carry 125 A.
    #[test]
    fn what_breaks_by_the_rule_alone_is_torn_in_the_picture_too() {
        let rows = [PLATE, &[(Field::ConductorSize, "2 AWG"), (Field::RunCurrent, "100")]].concat();
        let bar = of_rows(&rows).bar.expect("a picture");
        assert_eq!((bar.verdict, bar.ruler.geometry().high_post), (Verdict::Breaks, Some(Stand::Snapped)));
    }

    #[test]
    fn a_breaker_that_does_not_protect_is_the_picture() {
        let rows = [
            (Field::RunKind, "dc-branch"),
            (Field::RunCurrent, "5"),
            (Field::RunVoltage, "12"),
            (Field::ConductorSize, "1.5"),
            (Field::Breaker, "32"),
            (Field::RunLength, "2"),
        ];
        let bar = of_rows(&rows).bar.expect("a picture");
        assert_eq!(bar.ruler.high.as_ref().map(|post| post.name.as_str()), Some("protected up to"));
        assert_eq!(bar.ruler.geometry().high_post, Some(Stand::Snapped));
    }

    #[test]
    fn what_is_missing_is_named() {
        let answer = of_rows(&[(Field::RunKind, "inverter")]);
        assert_eq!(answer.number, show::NONE);
        assert_eq!(answer.says, "Waits for Current or Power.");
        assert_eq!(of_rows(&[]).says, "Waits for Kind of run and Current or Power.");
        let answer = of_rows(&[(Field::RunKind, "dc-branch"), (Field::RunCurrent, "5")]);
        assert_eq!(answer.says, "Enter Voltage and Length one way for the drop.");
        let answer = of_rows(&[(Field::RunKind, "dc-branch"), (Field::RunCurrent, "5..2")]);
        assert_eq!((answer.verdict, answer.number.as_str()), (Verdict::Asks, show::NONE));
    }

    #[test]
    fn where_nothing_holds_it_says_what_else_to_do() {
        let rows = [
            (Field::RunKind, "dc-feeder"),
            (Field::RunCurrent, "400"),
            (Field::RunVoltage, "12"),
            (Field::RunLength, "500"),
        ];
        let answer = of_rows(&rows);
        assert_eq!((answer.verdict, answer.number.as_str()), (Verdict::Breaks, show::NONE));
        assert!(answer.says.starts_with("Not even six"), "{}", answer.says);
    }

    #[test]
    fn where_one_is_not_enough_equal_ones_lie_side_by_side() {
        let rows = [PLATE, &[(Field::RunCurrent, "600")]].concat();
        let answer = of_rows(&rows);
        assert_eq!((answer.number.as_str(), answer.unit.as_ref()), ("2 × 500", "kcmil"));
        assert!(answer.says.ends_with("equal ones side by side for each pole."), "{}", answer.says);
    }

    #[test]
    fn one_tap_puts_a_resistor_before_an_inverter() {
        let rows = [
            (Field::RunKind, "inverter"),
            (Field::RunPower, "3000"),
            (Field::RunVoltage, "48"),
            (Field::RunLength, "2"),
        ];
        let answer = of_rows(&rows);
        assert_eq!(answer.besides.as_deref(), Some("Breaks as well: Closing onto empty capacitors."));
        let fill = answer.offer.expect("an offer").fill;
        assert_eq!(fill[0].0, (TOOL, Field::Precharged));
        let taken = of_rows(&[&rows[..], &[(Field::Precharged, &fill[0].1.text)]].concat());
        assert_eq!((taken.besides, taken.offer), (None, None));
    }
}
