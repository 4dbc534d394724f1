//! The answer of the Start tool, worded and drawn. Pure.

use engine::check::{Check, FieldSet, Verdict};
use engine::entry::Entry;
use engine::field::Field;
use engine::quantity::Quantity;
use engine::show;
use engine::start::{Ask, Requirement, current, volts};

use crate::answer::{Answer, besides, rests_on};
use crate::check_row::bar;
use crate::form::names;
use crate::span_bar::Bar;
use crate::span_bar::geometry::{From, Mark, Post, Ruler};

/// What the answer is judged by: the inverter and the bus.
const JUDGING: [Requirement; 2] = [Requirement::Surge, Requirement::Sag];

/// What naming the load tells.
const OF_LOAD: [Field; 3] = [Field::StartingMultiple, Field::StartingPowerFactor, Field::StartingSeconds];

/// What the answer waits for: the load itself, while nothing is known of how it starts.
pub fn missing(ask: &Ask) -> FieldSet {
    let all = JUDGING.iter().filter_map(|one| one.check(ask)).fold(FieldSet::default(), |all, one| all.union(one.asks));
    let unnamed = ask.load == Entry::Blank && ask.starts_as == Entry::Blank;
    if !unnamed || !OF_LOAD.iter().all(|field| all.contains(*field)) {
        return all;
    }
    let mut missing = FieldSet::default();
    missing.insert(Field::StartLoad);
    all.iter().filter(|field| !OF_LOAD.contains(field)).for_each(|field| missing.insert(field));
    missing
}

/// The worse of the two.
pub fn on_top(ask: &Ask) -> Option<Check<Requirement>> {
    JUDGING.iter().filter_map(|one| one.check(ask)).min_by(Check::order)
}

/// The answer.
pub fn answer(ask: &Ask) -> Answer {
    let all: Vec<Check<Requirement>> = Requirement::ALL.iter().filter_map(|one| one.check(ask)).collect();
    let top = on_top(ask);
    let sag = all.iter().find(|check| check.id == Requirement::Sag);
    let surge = all.iter().find(|check| check.id == Requirement::Surge);
    let verdict = top.map_or(Verdict::Asks, |check| check.verdict);
    let missing = missing(ask);
    Answer {
        of: "Volts at the inverter while it starts".to_owned(),
        number: sag.and_then(|check| check.value).map_or_else(
            || show::NONE.to_owned(),
            |value| {
                // A collapse has no volts to show.
                if value.number > 0.0 {
                    crate::answer::without_unit(&show::computed(value)).to_owned()
                } else {
                    "collapse".to_owned()
                }
            },
        ),
        unit: if sag.and_then(|check| check.value).is_some_and(|value| value.number > 0.0) { "V" } else { "" }.into(),
        verdict,
        cost: engine::check::Cost::Loss,
        says: if missing.is_empty() { says(ask, top.as_ref()) } else { format!("Waits for {}.", names(missing)) },
        most: surge.and_then(|check| check.value.zip(check.limit)).map(|(value, limit)| {
            let (value, bound) = show::apart(value, limit.amount);
            format!("Start {value} of {bound} surge")
        }),
        rests: top.filter(|check| check.value.is_some()).and_then(|check| rests_on(check.assumed)),
        besides: besides(&all, top.map(|check| check.id), Requirement::name),
        bar: Some(sag_bar(ask, sag)),
        second: surge.and_then(surge_bar),
        offer: None,
    }
}

fn says(ask: &Ask, top: Option<&Check<Requirement>>) -> String {
    let Some(check) = top else { return String::new() };
    let amps = current(ask)
        .map_or_else(String::new, |amps| format!(" {} flows from the bank.", show::computed(amps.amount())));
    let room = check.distance().map(show::room).unwrap_or_default();
    match (check.id, check.verdict) {
        (Requirement::Sag, Verdict::Breaks) if volts(ask).is_some_and(|volts| volts[1].is_none()) => {
            "The bus collapses: the start asks for more than the bank can give at any volts.".to_owned()
        }
        (Requirement::Sag, Verdict::Breaks) => {
            format!("It takes the bus {room} under the cut-off: the inverter lets go.{amps}")
        }
        (Requirement::Surge, Verdict::Breaks) => {
            format!("{room} over the inverter’s surge: it lets go, or the motor hums.{amps}")
        }
        (Requirement::Sag, _) => format!("It starts, with {room} to the cut-off.{amps}"),
        _ => format!("It starts, with {room} of surge in hand.{amps}"),
    }
}

/// Volts over the start, from before it down to its lowest, against the cut-off.
fn sag_bar(ask: &Ask, sag: Option<&Check<Requirement>>) -> Bar {
    let told = sag.and_then(|check| check.limit.zip(volts(ask))).map(|(limit, volts)| (limit.amount, volts));
    let Some((cut_off, [before, start, running])) = told else {
        return Bar::unknown("The volts are not known yet.");
    };
    let rest = before.map_or(cut_off.number, |volts| volts.get());
    let lowest = start.map_or(cut_off.number * 0.8, |volts| volts.get());
    let mut marks = Vec::new();
    let mut mark = |name: &str, volts: Option<engine::quantity::Volts>| {
        if let Some(volts) = volts {
            marks.push(Mark { at: volts.get(), name: name.to_owned(), shown: show::computed(volts.amount()) });
        }
    };
    mark("starting", start);
    // The volts once it runs stand in the sentence: three figures would stand on one another.
    mark("before", before);
    let check = sag.copied();
    let room = check.as_ref().and_then(Check::distance).map(show::room);
    let reserve = check.map_or(0.0, |check| cut_off.number * check.reserve.share());
    Bar {
        ruler: Ruler {
            low: Some(Post { at: cut_off.number, reserve, name: "cut-off".to_owned(), shown: show::given(cut_off) }),
            high: None,
            covered: Some((From::Value(lowest), rest)),
            marks,
        },
        verdict: check.map_or(Verdict::Asks, |check| check.verdict),
        room,
        says: format!(
            "Volts at the inverter. Cut-off {}. {} before, {} while it starts, {} once it runs.",
            show::given(cut_off),
            said(before),
            said(start),
            said(running)
        ),
    }
}

fn said(volts: Option<engine::quantity::Volts>) -> String {
    volts.map_or_else(|| "collapse".to_owned(), |volts| show::computed(volts.amount()))
}

fn surge_bar(check: &Check<Requirement>) -> Option<Bar> {
    let mut drawn = bar(check.id.name(), check)?;
    if let Some(post) = &mut drawn.ruler.high {
        "surge".clone_into(&mut post.name);
    }
    let value = check.value?;
    drawn.ruler.marks = vec![Mark { at: value.number, name: "the start".to_owned(), shown: show::computed(value) }];
    Some(drawn)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::{Rows, plain};
    use engine::field::Field;

    fn of_rows(rows: &[(Field, &str)]) -> Answer {
        answer(&Ask::read(&Rows(rows)))
    }

    const PUMP: &[(Field, &str)] = &[
        (Field::StartLoad, "well-pump"),
        (Field::RunningPower, "900"),
        (Field::InverterSurge, "6000"),
        (Field::BankEmf, "52"),
        (Field::CutOff, "44"),
    ];

    #[test]
    fn five_entries_give_a_verdict() {
        let answer = of_rows(PUMP);
        assert_ne!(answer.verdict, Verdict::Asks);
        assert!(answer.rests.is_some(), "what stands in is named");
        assert!(answer.bar.is_some_and(|bar| bar.ruler.covered.is_some()));
    }

    /// Case by hand in the engine's tests: 12 296 VA against 12 000.
    #[test]
    fn the_worked_pump_breaks_at_the_inverter_and_not_at_the_bus() {
        let rows = [
            (Field::CodeLetter, "j"),
            (Field::MotorSize, "1.5"),
            (Field::StartingPowerFactor, "0.5"),
            (Field::StartingSeconds, "1"),
            (Field::RunningPower, "1400"),
            (Field::AlreadyRunning, "600"),
            (Field::InverterSurge, "12000"),
            (Field::BankEmf, "52"),
            (Field::BankResistance, "17.6"),
            (Field::CableResistance, "2.36"),
            (Field::CutOff, "44"),
        ];
        let answer = of_rows(&rows);
        assert_eq!(answer.verdict, Verdict::Breaks);
        assert_eq!(answer.number, "48.9");
        assert!(plain(&answer.says).contains("over the inverter’s surge"), "{}", answer.says);
    }

    #[test]
    fn a_collapse_is_said() {
        let answer = of_rows(&[PUMP, &[(Field::BankResistance, "500")]].concat());
        assert_eq!(answer.number, "collapse");
        assert!(answer.says.contains("collapses"), "{}", answer.says);
    }

    #[test]
    fn what_is_missing_is_named() {
        let answer = of_rows(&[]);
        assert_eq!(answer.verdict, Verdict::Asks);
        assert!(answer.says.contains("Bank voltage") && answer.says.contains("Running power"), "{}", answer.says);
        assert!(
            answer.says.contains("Load") && !answer.says.contains("Starting"),
            "one choice tells them: {}",
            answer.says
        );
        let by_letter = of_rows(&[(Field::CodeLetter, "j"), (Field::MotorSize, "1.5")]);
        assert!(by_letter.says.contains("Cut-off") && !by_letter.says.contains("Load"), "{}", by_letter.says);
    }
}
