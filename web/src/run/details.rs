//! What else a run asks for: the breaker, lugs and terminals, what the table says, and why thinner conductors do not do.

use crate::derived::{Memo, dynamic, memo};
use crate::piece::{Piece, view};
use engine::check::Verdict;
use engine::quantity::Quantity;
use engine::run::{Ask, BreakerType, Landing, Protection, Sizing, Thinner, reach, size};
use engine::show;

use super::answer::precharge;
use super::{fault, truck};
use crate::check_row::against;
use crate::fold::fold;
use crate::form::names;
use crate::tool_page::{figures, section};
use crate::verdict::verdict_mark;

type Row = (String, String);

/// Beside a run whose current was entered: what its cable would take at most. There while a size is entered.
pub fn on_the_truck(ask: Memo<Ask>) -> Piece {
    section(
        "On the truck",
        "what this cable takes",
        move || ask.with(|ask| ask.size != engine::entry::Entry::Blank && !truck::asked(ask)),
        move || match ask.with(|ask| reach(ask).map(|reach| truck::rows(&reach, ask))) {
            Ok(rows) => figures(rows),
            Err(missing) => view! { <p class="ranked-say">{format!("Waits for {}.", names(missing))}</p> },
        },
    )
}

/// What a short circuit would draw out of the bank, in a line with its verdict.
pub fn short_circuit(ask: Memo<Ask>) -> Piece {
    dynamic(move || {
        let settled = ask.with(truck::settled);
        let found = size(&settled).ok().and_then(|found| fault::fault(&settled, &found));
        let Some((check, words, rests)) = found else { return Piece::Nothing };
        view! {
            <p class="fault">
                <b>"Short circuit"</b>
                {verdict_mark(check.verdict, false)}
                <span>{words}</span>
                <small>{rests}</small>
            </p>
        }
    })
}

/// Breaker, lug and terminal, and why thinner conductors do not do.
pub fn fitting(ask: Memo<Ask>) -> Piece {
    let found = move || ask.with(|ask| size(&truck::settled(ask)).ok());
    section(
        "Fitting",
        "breaker, lugs, why not thinner",
        move || found().is_some(),
        move || {
            let Some(found) = found() else { return Piece::Nothing };
            let amperes = amperes(&found);
            view! {
                {figures(fitting_rows(&found))}
                {thinner(&found)}
                {fold("run/amperes", "Amperes", memo(|| "flow, rule, table, corrections".to_owned()), move || view! {                     {figures(amperes.clone())}
                 })}
            }
        },
    )
}

fn row(name: &str, figure: String) -> Row {
    (name.to_owned(), figure)
}

fn fitting_rows(found: &Sizing) -> Vec<Row> {
    let mut rows = breaker_rows(found);
    rows.extend(found.landing.iter().flat_map(landing_rows));
    if let Some(several) = found.conductor.map(|one| one.parallel).filter(|several| *several > 1) {
        let words =
            format!("{several} equal ones a pole, of one length and with equal lugs, each set in its own conduit");
        rows.push(row("Side by side", words));
    }
    rows.extend(found.precharge.as_ref().map(|how| row("Before closing", precharge(how))));
    rows
}

fn breaker_rows(found: &Sizing) -> Vec<Row> {
    let Protection { rating, protects, class, .. } = found.protection;
    let alternates = found.kind.alternates();
    let what = if protects == BreakerType::Fuse { "Fuse" } else { "Breaker" };
    let mut rows = vec![row(what, format!("{}, {class}", show::given(rating.amount())))];
    let kind = if alternates { "a.c." } else { "d.c." };
    if let Some(asked) = found.protection.voltage_asked {
        let volts = found.protection.voltage_rating.map_or_else(
            || format!("{} {kind} at least", show::computed(asked.amount())),
            |rating| format!("{} {kind} or more", show::given(rating.amount())),
        );
        rows.push(row("Rated for", volts));
    }
    if let Some(poles) = found.protection.poles.filter(|_| protects != BreakerType::Fuse) {
        let unearthed = if alternates { "" } else { "; twice as many where neither pole is earthed" };
        rows.push(row("Poles", format!("{poles}{unearthed}")));
    }
    if let Some(asked) = found.protection.interrupting_asked {
        let current = found.protection.interrupting_rating.map_or_else(
            || format!("{}: beyond its class, put a fuse ahead of it", fault::about(asked)),
            |rating| show::given(rating.amount()),
        );
        rows.push(row("Interrupts at least", current));
    }
    if !alternates && protects != BreakerType::Fuse {
        let way = if found.protection.may_be_polarised {
            "a polarised one will do, connected the right way round"
        } else {
            "must open both ways: not polarised"
        };
        rows.push(row("Direction", way.to_owned()));
    }
    rows
}

fn landing_rows(landing: &Landing) -> Vec<Row> {
    let enters = if landing.enters {
        "enters the terminal".to_owned()
    } else {
        format!("too thick for the terminal, which usually takes {}: land it on a stud or bus", landing.largest)
    };
    let ferrule = if landing.ferrule { "; fine strands: ferrule or pin" } else { "" };
    vec![
        row("Terminal", format!("{enters}{ferrule}")),
        row("Lug", format!("{}, hole for {}; typical, read the breaker’s sheet", landing.lug, landing.stud)),
    ]
}

/// What flows, what the rule asks for, and what the table gives.
fn amperes(found: &Sizing) -> Vec<Row> {
    let (load, amps) = (&found.load, |amps: engine::quantity::Amps| show::computed(amps.amount()));
    let mut rows = vec![
        row(if found.kind.is_pv() { "Short-circuit current" } else { "Flows" }, amps(load.working)),
        row("Must carry where it lies", amps(load.carried)),
    ];
    if load.continuous > load.carried {
        rows.push(row("Must carry at its terminals", amps(load.continuous)));
    }
    rows.push(row("Breaker or fuse at least", amps(load.device_least)));
    rows.extend(load.device_below.map(|below| row("Breaker or fuse below", amps(below))));
    for column in &found.columns {
        rows.push((format!("Table, {} column", show::given(column.bears.amount())), amps(column.carries)));
    }
    if let Some(ampacity) = found.ampacity {
        rows.push(row("Carries where it lies", amps(ampacity.corrected)));
        rows.push(row("Carries at its terminals", amps(ampacity.at_terminals)));
    }
    rows
}

/// The two next thinner, and what each breaks.
fn thinner(found: &Sizing) -> Option<Piece> {
    (!found.thinner.is_empty()).then(|| {
        let rows: Vec<Piece> = found
            .thinner
            .iter()
            .map(|one| {
                let (verdict, why) = why(one);
                view! {
                    <li data-v=verdict.word()>
                        <span class="name">{one.candidate.to_string()}</span>
                        {verdict_mark(verdict, false)}
                        <p class="why">{why}</p>
                    </li>
                }
            })
            .collect();
        view! { <ol class="ranked plain">{rows}</ol> }
    })
}

fn why(one: &Thinner) -> (Verdict, String) {
    if one.breaks.is_empty() {
        return (Verdict::Clears, "It would hold as well.".to_owned());
    }
    // What the table does not have carries nothing.
    if one.breaks.iter().any(|check| check.value.is_some_and(|value| value.number == 0.0)) {
        return (Verdict::Breaks, "The code’s table has none so thin.".to_owned());
    }
    let each = one.breaks.iter().map(|check| format!("{}: {}.", check.id.name(), against(check)));
    (Verdict::Breaks, each.collect::<Vec<_>>().join(" "))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::{Rows, plain};
    use engine::field::Field;

    #[track_caller]
    fn of_rows(rows: &[(Field, &str)]) -> Sizing {
        size(&Ask::read(&Rows(rows))).expect("it is sized")
    }

    fn figure(rows: &[Row], name: &str) -> Option<String> {
        rows.iter().find(|(one, _)| plain(one) == name).map(|(_, figure)| plain(figure))
    }

    #[test]
    fn a_feed_tells_volts_poles_interrupting_direction_terminal_lug_and_precharge() {
        let found = of_rows(&[
            (Field::RunKind, "inverter"),
            (Field::RunPower, "3000"),
            (Field::RunVoltage, "48"),
            (Field::RunLength, "2"),
        ]);
        let rows = fitting_rows(&found);
        let is = |name, words| assert_eq!(figure(&rows, name).as_deref(), Some(words), "{rows:?}");
        is("Breaker", "80 A, d.c. breaker, IEC 60898-3 or IEC 60947-2");
        is("Rated for", "65 V d.c. or more");
        is("Poles", "1; twice as many where neither pole is earthed");
        is("Interrupts at least", "10 000 A");
        is("Direction", "must open both ways: not polarised");
        is("Terminal", "enters the terminal");
        assert!(figure(&rows, "Before closing").is_some_and(|how| how.starts_with("Hold ")));
        let all = amperes(&found);
        assert_eq!(figure(&all, "Table, 70 °C column").as_deref(), Some("101.0 A"));
        assert_eq!(found.thinner.len(), 2);
        assert!(found.thinner.iter().all(|one| why(one).0 == Verdict::Breaks && why(one).1.contains(": ")));
    }

    #[test]
    fn a_conductor_that_the_table_does_not_have_is_said_to_be_none_of_it() {
        let rows = [(Field::RunKind, "dc-branch"), (Field::RunCurrent, "2"), (Field::ConductorSize, "2.5")];
        let found = of_rows(&rows);
        let told: Vec<String> = found.thinner.iter().map(|one| why(one).1).collect();
        assert_eq!(told, ["It would hold as well.", "The code’s table has none so thin."]);
    }

    #[test]
    fn an_alternating_output_is_told_no_direction_and_a_fuse_no_poles() {
        let output = of_rows(&[(Field::RunKind, "ac-output"), (Field::RunCurrent, "16"), (Field::RunVoltage, "230")]);
        let rows = fitting_rows(&output);
        assert_eq!(figure(&rows, "Direction"), None);
        assert_eq!(figure(&rows, "Rated for").as_deref(), Some("240 V a.c. or more"));
        assert_eq!(figure(&rows, "Poles").as_deref(), Some("2"));
        let string = of_rows(&[(Field::RunKind, "pv-string"), (Field::RunCurrent, "11"), (Field::RunVoltage, "123")]);
        let rows = fitting_rows(&string);
        assert_eq!((figure(&rows, "Poles"), figure(&rows, "Direction")), (None, None));
        assert!(figure(&rows, "Fuse").is_some_and(|fuse| fuse.ends_with("gPV fuse-link")));
    }
}
