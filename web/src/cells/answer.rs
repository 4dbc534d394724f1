//! The answer of the Cells tool, worded and drawn. Pure.

use engine::bank::{Advice, Ask, Layout, Layouts, Requirement, Stage, advice_on, assess, lacks, layouts};
use engine::check::{Check, Cost, FieldSet, Verdict};
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Amount, Quantity, Volts};
use engine::show;
use engine::unit::Unit;

use crate::answer::{Answer, besides};
use crate::check_row::against;
use crate::form::{as_entered, names};
use crate::span_bar::Bar;
use crate::span_bar::geometry::{From, Mark, Post, Ruler};

/// The layout that was entered, else the best of the cells at hand, else the refused one that comes nearest.
pub fn chosen(ask: &Ask, found: &Layouts) -> Option<Layout> {
    if !lacks(ask).is_empty() {
        return None;
    }
    if ask.series.typed().is_some() {
        return Layout::of(ask);
    }
    found.best().or_else(|| found.nearest(1).first().copied()).cloned()
}

/// The answer to what was typed into `pad`.
pub fn answer(pad: &impl Pad, ask: &Ask) -> Option<Answer> {
    let found = layouts(ask);
    let layout = chosen(ask, &found);
    let layout = layout.as_ref();
    let worst = layout.and_then(Layout::worst);
    let advice = advice_on(ask, &found);
    Some(Answer {
        of: of(pad, ask, layout),
        number: layout.map_or_else(|| show::NONE.to_owned(), |one| one.series.to_string()),
        unit: layout.map_or("".into(), |one| match one.strings {
            1 => "in series".into(),
            strings => format!("in series × {strings}").into(),
        }),
        verdict: worst.map_or(Verdict::Asks, |check| check.verdict),
        cost: worst.map_or(Cost::Hazard, |check| check.cost),
        says: layout.map_or_else(|| format!("Waits for {}.", names(lacks(ask))), |one| says(ask, one, worst, &advice)),
        most: layout.and_then(energy),
        rests: layout.and_then(|_| rests(worst, &advice)),
        besides: layout.and_then(|_| besides(&assess(ask), worst.map(|check| check.id), Requirement::name)),
        bar: Some(layout.map_or_else(empty_bar, window_bar)),
        second: None,
        offer: None,
    })
}

/// Cells, or blocks of several; one or more of them.
fn things(layout: Option<&Layout>, count: u32) -> &'static str {
    match (layout.is_some_and(|layout| layout.cells > layout.series), count) {
        (false, 1) => "cell",
        (false, _) => "cells",
        (true, 1) => "block",
        (true, _) => "blocks",
    }
}

fn of(pad: &impl Pad, ask: &Ask, layout: Option<&Layout>) -> String {
    let count = as_entered(pad, Field::NumberOfCells).map_or_else(String::new, |count| format!("{count} "));
    let what = match ask.chemistry.typed() {
        Some(chemistry) => format!("{count}{} {}", chemistry.word(), things(layout, 2)),
        None => format!("{count}cells"),
    };
    let bus = as_entered(pad, Field::BusVoltage).map_or_else(String::new, |bus| format!(" for a {bus} bus"));
    let mut letters = format!("{what}{bus}");
    if let Some(first) = letters.get(..1).map(str::to_ascii_uppercase) {
        letters.replace_range(..1, &first);
    }
    letters
}

/// The trap first, then what the layout covers, what is left over, and what stands against it.
fn says(ask: &Ask, layout: &Layout, worst: Option<&Check<Requirement>>, advice: &[Advice]) -> String {
    let mut parts: Vec<String> = Vec::new();
    let refused = |piece: &&Advice| {
        matches!(piece, Advice::CellsAreNotVolts { .. })
            || matches!(piece, Advice::NothingFits) && ask.series.typed().is_none()
    };
    parts.extend(advice.iter().filter(refused).map(ToString::to_string));
    parts.push(covers(layout));
    parts.push(left(layout));
    if let Some(check) = worst.filter(|check| check.verdict == Verdict::Breaks) {
        let so = match check.id {
            Requirement::WindowLow if layout.depth.get() <= 0.0 => ": nothing could be drawn",
            Requirement::WindowLow => ": charge stays unused",
            _ => "",
        };
        parts.push(format!("{}: {}{so}.", check.id.name(), against(check)));
    }
    parts.join(" ")
}

/// "9.00 V empty to 15.75 V equalising."
fn covers(layout: &Layout) -> String {
    let stage = match layout.window.highest_in {
        Stage::Equalise => "equalising",
        Stage::Absorb | Stage::Float => "on absorb",
    };
    let volts = |volts: Volts| show::computed(volts.amount());
    format!("{} empty to {} {stage}.", volts(layout.window.lowest), volts(layout.window.highest))
}

/// What is left over or short, where the cells at hand were counted.
fn left(layout: &Layout) -> String {
    let counted = |count: u32, so: &str| format!("{count} {} {so}.", things(Some(layout), count));
    match (layout.left_over, layout.short) {
        (0, 0) => format!("Every {} is used.", things(Some(layout), 1)),
        (left_over, 0) => counted(left_over, "left over"),
        (_, short) => counted(short, "short"),
    }
}

/// What a close verdict hangs on, and which other devices would take more of the cells.
fn rests(worst: Option<&Check<Requirement>>, advice: &[Advice]) -> Option<String> {
    let mut parts: Vec<String> = Vec::new();
    if let Some(check) = worst.filter(|check| check.verdict == Verdict::Close) {
        let room = check.room().map(show::room).unwrap_or_default();
        parts.push(format!("{}: {}, {room} left.", check.id.name(), against(check)));
        if !check.assumed.is_empty() {
            parts.push(format!("Close until that is confirmed: {}.", assumed(check.assumed)));
        }
    }
    // Other devices are worth a word where these leave something to wish for.
    let wider = |piece: &&Advice| {
        matches!(piece, Advice::OrWiderWindow { .. }) && worst.is_some_and(|check| check.verdict == Verdict::Breaks)
    };
    parts.extend(advice.iter().filter(wider).map(ToString::to_string));
    (!parts.is_empty()).then(|| parts.join(" "))
}

/// "16 in series × 2".
pub fn in_series(layout: &Layout) -> String {
    match layout.strings {
        1 => format!("{} in series", layout.series),
        strings => format!("{} in series × {strings}", layout.series),
    }
}

/// Names of what was assumed, as in "Absorb, Float and Depth used": all are of a cell, which need not be said each time.
pub fn assumed(fields: FieldSet) -> String {
    names(fields).replace(", a cell", "")
}

/// "6.30 kWh usable of 8.40 kWh".
pub fn energy(layout: &Layout) -> Option<String> {
    let energy = layout.energy?;
    let kilo = |watt_hours: f64| show::computed(Amount { number: watt_hours / 1000.0, unit: Unit::KilowattHour });
    Some(format!("{} usable of {}", kilo(energy.usable.get()), kilo(energy.in_all.get())))
}

/// The ruler before anything is known.
pub fn empty_bar() -> Bar {
    Bar::unknown("The bank’s window is not known yet.")
}

/// The check of the bank's window that holds least well: at its top, or at its bottom.
pub fn of_window(layout: &Layout) -> Option<&Check<Requirement>> {
    // They stand worst first.
    let window = [Requirement::WindowHigh, Requirement::WindowHighLoads, Requirement::WindowLow];
    layout.checks.iter().find(|check| check.limit.is_some() && window.contains(&check.id))
}

/// The bank's whole window, from the lowest in use to the highest on charge, against what the devices bear.
pub fn window_bar(layout: &Layout) -> Bar {
    let check = |id: Requirement| layout.check(id).filter(|check| check.limit.is_some());
    let (inverter, loads) = (check(Requirement::WindowHigh), check(Requirement::WindowHighLoads));
    let top = match (inverter, loads) {
        (Some(inverter), Some(loads)) if bound(loads) < bound(inverter) => Some((loads, "loads, high")),
        (None, Some(loads)) => Some((loads, "loads, high")),
        (inverter, _) => inverter.map(|inverter| (inverter, "inverter, high")),
    };
    let bottom = check(Requirement::WindowLow);
    let post = |check: &Check<Requirement>, name: &str| Post {
        at: bound(check),
        reserve: bound(check).abs() * check.reserve.share(),
        name: name.to_owned(),
        shown: check.limit.map_or_else(String::new, |limit| show::given(limit.amount)),
    };
    let window = &layout.window;
    let (lowest, highest) = (window.lowest, window.highest);
    let mark = |volts: Volts, name: &str| Mark {
        at: volts.get(),
        name: name.to_owned(),
        shown: show::computed(volts.amount()),
    };
    let mut marks = vec![mark(lowest, "empty")];
    // So far from the top that their labels stand clear of each other.
    if window.rested > lowest && highest - window.rested > (highest - lowest) * 0.25 {
        marks.push(mark(window.rested, "full, at rest"));
    }
    marks.push(mark(highest, "highest"));
    let worst = of_window(layout);
    let room = worst.and_then(Check::distance).map(show::room);
    let judged = worst.map_or_else(String::new, |check| {
        format!(" {}: {}, {}.", check.id.name(), against(check), check.verdict.word())
    });
    let says = format!(
        "Bank volts. {} in series cover {} to {}.{judged}",
        layout.series,
        show::computed(lowest.amount()),
        show::computed(highest.amount()),
    );
    Bar {
        ruler: Ruler {
            low: bottom.map(|check| post(check, "cut-off")),
            high: top.map(|(check, name)| post(check, name)),
            covered: Some((From::Value(lowest.get()), highest.get())),
            marks,
        },
        verdict: worst.map_or(Verdict::Asks, |check| check.verdict),
        room,
        says,
    }
}

fn bound(check: &Check<Requirement>) -> f64 {
    check.limit.map_or(0.0, |limit| limit.amount.number)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::{Rows, plain};

    fn of_rows(rows: &[(Field, &str)]) -> Answer {
        answer(&Rows(rows), &Ask::read(&Rows(rows))).expect("there is always an answer")
    }

    fn counts(answer: &Answer) -> String {
        format!("{} {}", answer.number, answer.unit)
    }

    /// Worked case C: twelve nickel-iron cells for a 12 V bus, the inverter's window 10.5 to 16 V.
    const CASE_C: &[(Field, &str)] = &[
        (Field::Chemistry, "nickel-iron"),
        (Field::CellVoltage, "1.2"),
        (Field::CellCapacity, "700"),
        (Field::NumberOfCells, "12"),
        (Field::BusVoltage, "12"),
        (Field::InverterLow, "10.5"),
        (Field::InverterHigh, "16"),
    ];

    /// Nine, or an inverter with a wider window; and counting twelve cells as twelve volts is caught. Common practice.
    #[test]
    fn case_c_answers_nine_catches_the_trap_and_names_the_wider_windows() {
        let answer = of_rows(CASE_C);
        assert_eq!(plain(&answer.of), "12 nickel-iron cells for a 12 V bus");
        assert_eq!(counts(&answer), "9 in series");
        assert_eq!((answer.verdict, answer.cost), (Verdict::Breaks, Cost::Loss));
        assert_eq!(
            plain(&answer.says),
            "12 cells are not 12 V: 12 nickel-iron cells in series are 14.40 V nominal, 19.80 V on absorb and up to \
             21.0 V. 9.00 V empty to 15.75 V equalising. 3 cells left over. Lowest bank voltage against the cut-off: \
             9.00 V, needs 10.5 V: charge stays unused."
        );
        let rests = plain(&answer.rests.expect("what else would do"));
        assert!(rests.contains("Or 10 in series, with devices that run from 10.00 V and tolerate 17.50 V."), "{rests}");
        assert!(rests.contains("Or 12 in series"), "{rests}");
        assert_eq!(answer.besides, None);
    }

    #[test]
    fn case_c_twelve_in_series_break_by_31_percent_and_ten_at_both_ends() {
        let twelve = of_rows(&[CASE_C, &[(Field::CellsInSeries, "12")]].concat());
        assert_eq!((twelve.verdict, twelve.cost), (Verdict::Breaks, Cost::Hazard));
        let says = plain(&twelve.says);
        assert!(says.contains("12.00 V empty to 21.0 V equalising. Every cell is used."), "{says}");
        assert!(says.ends_with("Highest bank voltage against the inverter: 21.0 V, at most 16 V."), "{says}");
        assert_eq!(twelve.besides.as_deref(), Some("Breaks as well: Absorb voltage against the inverter."));
        let bar = twelve.bar.expect("a bar");
        assert_eq!(bar.room.as_deref().map(plain).as_deref(), Some("5.00 V"));
        let ten = of_rows(&[CASE_C, &[(Field::CellsInSeries, "10")]].concat());
        let besides = ten.besides.expect("more breaks");
        assert!(besides.contains("Lowest bank voltage against the cut-off"), "{besides}");
    }

    /// Common practice: 700 Ah at 12 V is 8.4 kWh in all, 6.3 kWh at 75 %. Ten cells in series are the 12 V of it.
    #[test]
    fn seven_hundred_ampere_hours_at_twelve_volts() {
        let more = [(Field::CellsInSeries, "10"), (Field::DepthUsed, "75"), (Field::InverterLow, "9")];
        let answer = of_rows(&[CASE_C, &more].concat());
        assert_eq!(answer.most.as_deref().map(plain).as_deref(), Some("6.30 kWh usable of 8.40 kWh"));
    }

    #[test]
    fn what_is_missing_is_named_and_no_count_is_guessed_before() {
        let answer = of_rows(&[]);
        assert_eq!(answer.number, show::NONE);
        assert_eq!(answer.says, "Waits for Chemistry, Cell voltage, Number of cells and Bus voltage.");
        let no_bus = of_rows(&CASE_C[..4]);
        assert_eq!((no_bus.number.as_str(), no_bus.verdict), (show::NONE, Verdict::Asks));
        assert_eq!(no_bus.says, "Waits for Bus voltage.");
        let unread = of_rows(&[CASE_C, &[(Field::InverterHigh, "16 A")]].concat());
        assert_eq!(unread.says, "Waits for Inverter high.");
        assert_eq!(unread.besides, None);
    }

    #[test]
    fn the_bar_is_the_banks_window_between_cut_off_and_what_the_first_device_bears() {
        let rows = [
            (Field::Chemistry, "lfp"),
            (Field::CellVoltage, "3.2"),
            (Field::NumberOfCells, "40"),
            (Field::BusVoltage, "48"),
            (Field::InverterLow, "42"),
            (Field::InverterHigh, "58"),
        ];
        let answer = of_rows(&rows);
        assert_eq!(counts(&answer), "16 in series × 2");
        assert!(answer.says.contains("8 cells left over."), "{}", answer.says);
        assert_eq!(answer.most, None, "no capacity, no energy");
        let ruler = answer.bar.expect("a bar").ruler;
        let high = |ruler: &Ruler| ruler.high.clone().map(|post| (post.at, post.name));
        assert_eq!(ruler.low.as_ref().map(|post| post.at), Some(42.0));
        assert_eq!(high(&ruler), Some((58.0, "inverter, high".to_owned())));
        assert_eq!(ruler.covered, Some((From::Value(16.0 * 2.8), 56.0)));
        let loads = of_rows(&[&rows[..], &[(Field::LoadsHigh, "57")]].concat()).bar.expect("a bar").ruler;
        assert_eq!(high(&loads), Some((57.0, "loads, high".to_owned())));
    }

    #[test]
    fn more_than_there_are_is_said_to_be_short_and_a_hazard_below_is_said_on_top() {
        let rows = [
            (Field::Chemistry, "lfp"),
            (Field::CellVoltage, "3.2"),
            (Field::NumberOfCells, "12"),
            (Field::BusVoltage, "48"),
            (Field::CellsInSeries, "16"),
            (Field::ColdestInTheRoom, "-10"),
        ];
        let answer = of_rows(&rows);
        assert!(answer.says.contains("4 cells short."), "{}", answer.says);
        assert_eq!(answer.besides.as_deref(), Some("Breaks as well: Charging in the cold."));
    }

    #[test]
    fn where_nothing_fits_the_nearest_is_shown_as_refused() {
        let rows = [
            (Field::Chemistry, "nmc"),
            (Field::CellVoltage, "3.65"),
            (Field::NumberOfCells, "4"),
            (Field::BusVoltage, "48"),
        ];
        let answer = of_rows(&rows);
        assert!(answer.says.starts_with("No count of these cells fits these devices."), "{}", answer.says);
        assert_eq!((counts(&answer).as_str(), answer.verdict), ("4 in series", Verdict::Breaks));
    }
}
