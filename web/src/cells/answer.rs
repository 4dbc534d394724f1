//! The answer of the Cells tool, worded and drawn. Pure.

use engine::bank::{Advice, Ask, Layout, Requirement, advice, layouts};
use engine::check::{Check, Cost, FieldSet, Verdict};
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Amount, Quantity};
use engine::show;
use engine::unit::Unit;

use crate::answer::Answer;
use crate::form::{as_entered, names};
use crate::span_bar::Bar;
use crate::span_bar::geometry::{From, Mark, Post, Ruler};

/// What the layouts wait for.
pub fn missing(ask: &Ask) -> FieldSet {
    let mut missing = FieldSet::default();
    let wants = [
        (Field::Chemistry, ask.chemistry.typed().is_none()),
        (Field::CellVoltage, ask.cell_voltage.typed().is_none()),
        (Field::NumberOfCells, ask.count.typed().is_none() && ask.series.typed().is_none()),
        (Field::BusVoltage, ask.bus_voltage.typed().is_none() && ask.inverter_high.typed().is_none()),
    ];
    for (field, _) in wants.into_iter().filter(|(_, is)| *is) {
        missing.insert(field);
    }
    missing
}

/// The layout that was entered, else the best of the cells at hand; and whether it was entered.
pub fn chosen(ask: &Ask) -> Option<(Layout, bool)> {
    if ask.series.typed().is_some() {
        return Layout::of(ask).map(|layout| (layout, true));
    }
    let found = layouts(ask);
    found.best().or_else(|| found.rejected.first()).map(|layout| (layout.clone(), false))
}

/// The answer to what was typed into `pad`.
pub fn answer(pad: &impl Pad, ask: &Ask) -> Option<Answer> {
    let missing = missing(ask);
    let chosen = chosen(ask);
    let layout = chosen.as_ref().map(|(layout, _)| layout);
    let worst = layout.and_then(Layout::worst);
    Some(Answer {
        of: of(pad, ask),
        number: layout.map_or_else(|| show::NONE.to_owned(), |one| format!("{} × {}", one.series, one.strings)),
        unit: "",
        verdict: worst.map_or(Verdict::Asks, |check| check.verdict),
        cost: worst.map_or(Cost::Hazard, |check| check.cost),
        says: says(ask, missing, chosen.as_ref()),
        most: layout.and_then(energy),
        rests: worst
            .filter(|check| check.verdict == Verdict::Close && !check.assumed.is_empty())
            .map(|check| format!("Close until that is confirmed: {}.", names(check.assumed))),
        besides: layout.and_then(|layout| besides(layout, worst)),
        bar: Some(layout.map_or_else(empty_bar, window_bar)),
        second: None,
        offer: None,
    })
}

fn of(pad: &impl Pad, ask: &Ask) -> String {
    let count = as_entered(pad, Field::NumberOfCells).map_or_else(String::new, |count| format!("{count} "));
    let what = match ask.chemistry.typed() {
        Some(chemistry) => format!("{count}{} cells", chemistry.word()),
        None => format!("{count}cells"),
    };
    let bus = as_entered(pad, Field::BusVoltage).map_or_else(String::new, |bus| format!(" for a {bus} bus"));
    let bus = format!("{bus}: in series × strings");
    let mut letters = format!("{what}{bus}");
    if let Some(first) = letters.get(..1).map(str::to_uppercase) {
        letters.replace_range(..1, &first);
    }
    letters
}

fn says(ask: &Ask, missing: FieldSet, chosen: Option<&(Layout, bool)>) -> String {
    let Some((layout, entered)) = chosen else {
        return if missing.is_empty() {
            "No layout of these cells can be told yet.".to_owned()
        } else {
            format!("Waits for {}.", names(missing))
        };
    };
    let mut parts: Vec<String> = Vec::new();
    for piece in advice(ask) {
        match piece {
            Advice::Take { .. } if *entered => {}
            Advice::Take { left_over: 0, .. } => parts.push("Uses every cell.".to_owned()),
            Advice::Take { left_over, .. } => parts.push(format!("{left_over} left over.")),
            piece => parts.push(piece.to_string()),
        }
    }
    if let Some(refused) = layout.refused_by() {
        parts.push(format!("{}: {}.", refused.id.name(), against(refused)));
    }
    parts.join(" ")
}

/// "18.5 V, at most 16 V".
pub fn against(check: &Check<Requirement>) -> String {
    check.value.zip(check.limit).map_or_else(String::new, |(value, limit)| {
        let (value, bound) = show::apart(value, limit.amount);
        let side = if limit.sense == engine::check::Sense::AtMost { "at most" } else { "needs" };
        format!("{value}, {side} {bound}")
    })
}

/// "6.3 kWh usable of 8.4 kWh".
pub fn energy(layout: &Layout) -> Option<String> {
    let energy = layout.energy?;
    let kilo = |watt_hours: f64| show::computed(Amount { number: watt_hours / 1000.0, unit: Unit::KilowattHour });
    Some(format!("{} usable of {}", kilo(energy.usable.get()), kilo(energy.in_all.get())))
}

fn besides(layout: &Layout, worst: Option<&Check<Requirement>>) -> Option<String> {
    let broken: Vec<&str> = layout
        .checks
        .iter()
        .filter(|check| check.verdict == Verdict::Breaks && worst.is_none_or(|worst| worst.id != check.id))
        .map(|check| check.id.name())
        .collect();
    (!broken.is_empty()).then(|| format!("Breaks as well: {}.", broken.join("; ")))
}

fn empty_bar() -> Bar {
    let ruler = Ruler { low: None, high: None, covered: None, marks: Vec::new() };
    Bar { ruler, verdict: Verdict::Asks, room: None, says: "The bank’s window is not known yet.".to_owned() }
}

/// The bank's whole window, from the lowest in use to the highest on charge, against what the devices bear.
pub fn window_bar(layout: &Layout) -> Bar {
    let tops = [Requirement::WindowHigh, Requirement::WindowHighLoads];
    let top = tops
        .iter()
        .filter_map(|one| layout.check(*one))
        .filter(|check| check.limit.is_some())
        .min_by(|a, b| bound(a).total_cmp(&bound(b)));
    let bottom = layout.check(Requirement::WindowLow).filter(|check| check.limit.is_some());
    let post = |check: &Check<Requirement>, name: &str| Post {
        at: bound(check),
        reserve: bound(check).abs() * check.reserve.share(),
        name: name.to_owned(),
        shown: check.limit.map_or_else(String::new, |limit| show::given(limit.amount)),
    };
    let window = &layout.window;
    let (lowest, highest) = (window.lowest, window.highest);
    let mut marks = vec![Mark { at: lowest.get(), name: "lowest".to_owned(), shown: show::computed(lowest.amount()) }];
    if window.rested > lowest && window.rested < highest {
        let shown = show::computed(window.rested.amount());
        marks.push(Mark { at: window.rested.get(), name: "rest, full".to_owned(), shown });
    }
    marks.push(Mark { at: highest.get(), name: "highest".to_owned(), shown: show::computed(highest.amount()) });
    // Of the two ends, the one that holds less well is what the picture shows.
    let worst = [top, bottom].into_iter().flatten().min_by(|a, b| {
        let ((group_a, margin_a), (group_b, margin_b)) = (a.rank(), b.rank());
        group_a.cmp(&group_b).then(margin_a.total_cmp(&margin_b))
    });
    let room = worst.and_then(Check::room).map(|room| show::room(Amount { number: room.number.abs(), ..room }));
    let says = format!(
        "Bank volts. {} cover {} to {}. {}",
        layout.series,
        show::computed(lowest.amount()),
        show::computed(highest.amount()),
        worst.map_or_else(String::new, |check| format!(
            "{}: {}, {}.",
            check.id.name(),
            against(check),
            check.verdict.word()
        ))
    );
    Bar {
        ruler: Ruler {
            low: bottom.map(|check| post(check, "cut-off")),
            high: top.map(|check| post(check, "devices bear")),
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

    struct Rows<'a>(&'a [(Field, &'a str)]);

    impl Pad for Rows<'_> {
        fn typed(&self, field: Field) -> (&str, Option<Unit>) {
            (self.0.iter().rev().find(|(one, _)| *one == field).map_or("", |(_, text)| text), None)
        }
    }

    fn plain(text: &str) -> String {
        text.replace([show::NARROW, '\u{a0}'], " ")
    }

    fn of_rows(rows: &[(Field, &str)]) -> Answer {
        answer(&Rows(rows), &Ask::read(&Rows(rows))).expect("there is always an answer")
    }

    const TWELVE: &[(Field, &str)] = &[
        (Field::Chemistry, "nickel-iron"),
        (Field::CellVoltage, "1.2"),
        (Field::CellCapacity, "700"),
        (Field::NumberOfCells, "12"),
        (Field::BusVoltage, "12"),
    ];

    /// Common practice, no source: counting twelve cells as twelve volts is the trap.
    #[test]
    fn twelve_cells_are_not_twelve_volts() {
        let answer = of_rows(TWELVE);
        assert!(plain(&answer.says).contains("12 cells are not 12 V"), "{}", answer.says);
        assert_ne!(answer.number, "12 × 1");
        assert!(plain(&answer.says).contains("left over"), "{}", answer.says);
    }

    /// Common practice: 700 Ah at 12 V is 8.4 kWh in all. Ten cells in series are the 12 V of it.
    #[test]
    fn seven_hundred_ampere_hours_at_twelve_volts() {
        let answer = of_rows(&[TWELVE, &[(Field::CellsInSeries, "10")]].concat());
        let most = plain(&answer.most.expect("an energy"));
        assert!(most.ends_with("of 8.40 kWh"), "{most}");
    }

    #[test]
    fn what_is_missing_is_named() {
        let answer = of_rows(&[]);
        assert_eq!(answer.number, show::NONE);
        assert_eq!(answer.says, "Waits for Chemistry, Cell voltage, Number of cells and Bus voltage.");
    }

    #[test]
    fn the_bar_is_the_banks_window_between_cut_off_and_what_devices_bear() {
        let rows = [
            (Field::Chemistry, "lfp"),
            (Field::CellVoltage, "3.2"),
            (Field::CellCapacity, "280"),
            (Field::NumberOfCells, "16"),
            (Field::BusVoltage, "48"),
            (Field::InverterLow, "42"),
            (Field::InverterHigh, "60"),
        ];
        let bar = of_rows(&rows).bar.expect("a bar");
        assert_eq!(bar.ruler.low.map(|post| post.at), Some(42.0));
        assert_eq!(bar.ruler.high.map(|post| post.at), Some(60.0));
        assert!(bar.ruler.covered.is_some());
    }
}
