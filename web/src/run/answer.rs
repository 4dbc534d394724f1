//! The answer of the Run tool, worded and drawn. Pure.

use engine::check::{Check, Cost, FieldSet, Sense, Verdict};
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Amount, Quantity};
use engine::run::{Ask, Fault, Kind, Requirement, Sizing, size};
use engine::show;

use crate::answer::Answer;
use crate::check_row::bar;
use crate::form::{as_entered, names};
use crate::span_bar::Bar;
use crate::span_bar::geometry::{From, Mark, Post, Ruler};

/// The requirements that choose a conductor and its breaker.
const CHOOSING: [Requirement; 3] = [Requirement::Ampacity, Requirement::Protection, Requirement::Drop];

/// What the answer waits for.
pub fn missing(ask: &Ask) -> FieldSet {
    size(ask).err().unwrap_or_default()
}

/// The worst of what chooses conductor and breaker.
pub fn on_top(ask: &Ask) -> Option<Check<Requirement>> {
    let checks = CHOOSING.iter().filter_map(|one| one.check(ask));
    checks.min_by(|a, b| {
        let ((group_a, margin_a), (group_b, margin_b)) = (a.rank(), b.rank());
        group_a.cmp(&group_b).then(margin_a.total_cmp(&margin_b))
    })
}

/// The answer to what was typed into `pad`.
pub fn answer(pad: &impl Pad, ask: &Ask) -> Option<Answer> {
    let found = size(ask);
    let checks: Vec<Check<Requirement>> = Requirement::ALL.iter().filter_map(|one| one.check(ask)).collect();
    let top = on_top(ask);
    let (verdict, cost) = top.map_or((Verdict::Asks, Cost::Hazard), |check| (check.verdict, check.cost));
    let sizing = found.as_ref().ok();
    let conductor = sizing.and_then(|sizing| sizing.conductor);
    Some(Answer {
        of: of(pad, ask, sizing),
        number: conductor.map_or_else(|| show::NONE.to_owned(), |one| one.to_string()),
        unit: "".into(),
        verdict,
        cost,
        says: match &found {
            Ok(sizing) => says(sizing, ask, top.as_ref()),
            Err(missing) if missing.is_empty() => {
                "No standard breaker is large enough: divide the load over several runs.".to_owned()
            }
            Err(missing) => format!("Waits for {}.", names(*missing)),
        },
        most: sizing.map(breaker),
        rests: top.and_then(|check| rests(&check)),
        besides: besides(&checks, top.map(|check| check.id)),
        bar: Some(main_bar(sizing, &checks, verdict)),
        second: checks.iter().find(|check| check.id == Requirement::Drop).and_then(|check| drop_bar(check, sizing)),
        offer: None,
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
    letters.next().map_or_else(String::new, |first| first.to_uppercase().chain(letters).collect())
}

/// "Breaker 100 A", and what it must be.
fn breaker(sizing: &Sizing) -> String {
    let protection = &sizing.protection;
    let what = if protection.protects == engine::run::BreakerType::Fuse { "Fuse" } else { "Breaker" };
    format!("{what} {}", show::given(protection.rating.amount()))
}

fn says(sizing: &Sizing, ask: &Ask, top: Option<&Check<Requirement>>) -> String {
    let drop = sizing.drop.map(|drop| {
        let per_cell = drop
            .per_cell
            .map(|volts| {
                format!(
                    ", {} a cell of 2 V",
                    show::computed(Amount { number: volts.get() * 1000.0, unit: engine::unit::Unit::Millivolt })
                )
            })
            .unwrap_or_default();
        format!(
            "Loses {} ({}){per_cell}, {} as heat.",
            show::computed(drop.volts.amount()),
            show::computed(drop.part.amount()),
            show::computed(drop.lost.amount())
        )
    });
    let waits = || {
        let missing: Vec<&str> =
            [(Field::RunVoltage, ask.voltage.typed().is_none()), (Field::RunLength, ask.length.typed().is_none())]
                .into_iter()
                .filter(|(_, is)| *is)
                .map(|(field, _)| field.name())
                .collect();
        format!("Enter {} for the drop.", missing.join(" and "))
    };
    let drop = drop.unwrap_or_else(waits);
    match top.filter(|check| check.verdict == Verdict::Breaks) {
        Some(check) => format!("{}: {}. {drop}", check.id.name(), against(check)),
        None => drop,
    }
}

/// "120 A, needs 150 A".
pub fn against(check: &Check<Requirement>) -> String {
    check.value.zip(check.limit).map_or_else(String::new, |(value, limit)| {
        let (value, bound) = show::apart(value, limit.amount);
        let side = if limit.sense == Sense::AtMost { "at most" } else { "needs" };
        format!("{value}, {side} {bound}")
    })
}

fn rests(check: &Check<Requirement>) -> Option<String> {
    let close = check.verdict == Verdict::Close && !check.assumed.is_empty();
    close.then(|| format!("Close until that is confirmed: {}.", names(check.assumed)))
}

fn besides(checks: &[Check<Requirement>], top: Option<Requirement>) -> Option<String> {
    let broken: Vec<&str> = checks
        .iter()
        .filter(|check| check.verdict == Verdict::Breaks && Some(check.id) != top)
        .map(|check| check.id.name())
        .collect();
    (!broken.is_empty()).then(|| format!("Breaks as well: {}.", broken.join("; ")))
}

/// Amperes: what flows and what the breaker lets pass, against what the conductor carries where it lies.
fn main_bar(sizing: Option<&Sizing>, checks: &[Check<Requirement>], verdict: Verdict) -> Bar {
    let Some((sizing, ampacity)) = sizing.and_then(|sizing| Some((sizing, sizing.ampacity?))) else {
        let ruler = Ruler { low: None, high: None, covered: None, marks: Vec::new() };
        return Bar { ruler, verdict, room: None, says: "What flows is not known yet.".to_owned() };
    };
    let carries = ampacity.corrected.min(ampacity.at_terminals);
    let (flows, rating) = (sizing.load.working, sizing.protection.rating);
    let shown = |amps: engine::quantity::Amps| show::apart(amps.amount(), carries.amount()).0;
    let mut marks = vec![Mark { at: flows.get(), name: "flows".to_owned(), shown: shown(flows) }];
    if rating > flows {
        marks.push(Mark { at: rating.get(), name: "breaker".to_owned(), shown: show::given(rating.amount()) });
    }
    let breaks = |one| checks.iter().any(|check| check.id == one && check.verdict == Verdict::Breaks);
    let broken = breaks(Requirement::Ampacity) || breaks(Requirement::Protection);
    let left = carries.get() - flows.get();
    let room = show::room(Amount { number: left.abs(), ..carries.amount() });
    let says = format!(
        "Amperes. The conductor carries {}; {} flows, the breaker is {}.",
        show::computed(carries.amount()),
        shown(flows),
        show::given(rating.amount())
    );
    Bar {
        ruler: Ruler {
            low: None,
            high: Some(Post {
                at: carries.get(),
                reserve: 0.0,
                name: "conductor carries".to_owned(),
                shown: show::computed(carries.amount()),
            }),
            covered: Some((From::Start, flows.get())),
            marks,
        },
        verdict: if broken { Verdict::Breaks } else { verdict },
        room: Some(room),
        says,
    }
}

/// The drop against what is allowed.
fn drop_bar(check: &Check<Requirement>, sizing: Option<&Sizing>) -> Option<Bar> {
    let mut drawn = bar(check.id.name(), check)?;
    let volts = sizing?.drop?.volts;
    let value = check.value?;
    if let Some(post) = &mut drawn.ruler.high {
        "drop allowed".clone_into(&mut post.name);
    }
    drawn.ruler.marks =
        vec![Mark { at: value.number, name: show::computed(volts.amount()), shown: show::computed(value) }];
    Some(drawn)
}

/// "The bank can drive 9,400 A here; this breaker opens 6,000 A: breaks."
pub fn fault_line(ask: &Ask, fault: &Fault) -> String {
    let drives = show::computed(fault.at_breaker.greatest.amount());
    let opens = ask.interrupting.typed().map_or_else(
        || "ask for a breaker or fuse that opens that".to_owned(),
        |rating| {
            let word = if rating < fault.at_breaker.greatest { "breaks" } else { "holds" };
            format!("this one opens {}: {word}", show::given(rating.amount()))
        },
    );
    let resistance = match ask.bank_resistance.typed() {
        Some(ohms) => format!("by its resistance of {}", show::given(ohms.amount())),
        None => "assumed: a bank of some 400 Ah, new, warm and full".to_owned(),
    };
    format!(
        "The bank can drive {drives} here ({resistance}); {opens}. From an old, cold, low bank at least {} flows at the far \
         end.",
        show::computed(fault.at_far_end.least.amount())
    )
}

/// What else there is to say of a check, under its name.
pub fn note(ask: &Ask, requirement: Requirement) -> Option<String> {
    match requirement {
        Requirement::BankFault => size(ask).ok()?.fault.map(|fault| fault_line(ask, &fault)),
        Requirement::Poles => Some(
            match ask.kind.typed()? {
                Kind::DcBranch | Kind::DcFeeder => "Current flows one way here, from the bank to the loads.",
                _ => "Current, or a fault’s current, flows both ways here: a polarised breaker opens only one of them.",
            }
            .to_owned(),
        ),
        Requirement::Precharge => {
            let how = size(ask).ok()?.precharge?;
            Some(format!(
                "Hold {} across the open breaker for {}, then close it. The resistor sees {} for a moment.",
                show::given(how.resistor.amount()),
                show::computed(how.wait.amount()),
                show::computed(how.resistor_peak.amount())
            ))
        }
        _ => None,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use engine::unit::Unit;

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
        assert_eq!(plain(&answer.number), "1/0 AWG");
        assert_eq!(answer.most.as_deref().map(plain).as_deref(), Some("Breaker 150 A"));
        assert!(plain(&answer.says).starts_with("Loses "), "{}", answer.says);
        assert!(answer.second.is_some());
    }

    #[test]
    fn four_controllers_on_one_2_awg_break_and_it_is_said_by_how_much() {
        let answer = of_rows(&[PLATE, &[(Field::ConductorSize, "2 AWG")]].concat());
        assert_eq!(answer.verdict, Verdict::Breaks);
        assert!(plain(&answer.says).contains("115.0 A, needs 150 A"), "{}", plain(&answer.says));
    }

    #[test]
    fn what_is_missing_is_named() {
        let answer = of_rows(&[(Field::RunKind, "inverter")]);
        assert_eq!(answer.number, show::NONE);
        assert_eq!(answer.says, "Waits for Current.");
        let answer = of_rows(&[(Field::RunKind, "dc-branch"), (Field::RunCurrent, "5")]);
        assert_eq!(answer.says, "Enter Voltage and Length one way for the drop.");
    }

    #[test]
    fn the_fault_line_says_what_the_bank_drives_and_what_opens() {
        let rows = [
            (Field::RunKind, "bank"),
            (Field::CodeFamily, "iec"),
            (Field::RunCurrent, "100"),
            (Field::RunVoltage, "48"),
            (Field::RunLength, "1.5"),
            (Field::BankResistance, "5"),
            (Field::InterruptingRating, "6000"),
        ];
        let note = note(&Ask::read(&Rows(&rows)), Requirement::BankFault).map(|note| plain(&note)).unwrap();
        // 1.15 · 48 V over 5 mΩ = 11 040 A.
        assert!(note.starts_with("The bank can drive 11 040"), "{note}");
        assert!(note.contains("opens 6000 A: breaks"), "{note}");
    }
}
