//! The other way round: the cable that is on the truck, how many amperes it takes and how far it goes. Pure.

use engine::check::{Cost, Verdict};
use engine::entry::Entry;
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::Quantity;
use engine::run::{Ask, Reach, assess, reach, size};
use engine::show;

use super::answer::{CHOOSING, worst_of};
use super::bars;
use crate::answer::{Answer, without_unit};
use crate::form::{as_entered, names};

/// Whether a cable is asked about: a size is entered, and neither amperes nor watts.
pub fn asked(ask: &Ask) -> bool {
    ask.size != Entry::Blank && ask.current == Entry::Blank && ask.power == Entry::Blank
}

/// The run as the page shows it: where a cable is asked about, with the most that it takes.
pub fn settled(ask: &Ask) -> Ask {
    asked(ask).then(|| reach(ask).ok()).flatten().and_then(|reach| filled(ask, &reach)).unwrap_or(*ask)
}

fn filled(ask: &Ask, reach: &Reach) -> Option<Ask> {
    Some(Ask { current: Entry::Typed(reach.amps?), breaker: Entry::Typed(reach.rating?), ..*ask })
}

/// The answer about the cable on the truck.
pub fn answer(pad: &impl Pad, ask: &Ask) -> Answer {
    let found = reach(ask);
    let full = found.as_ref().ok().and_then(|reach| filled(ask, reach));
    let checks = full.as_ref().map_or_else(Vec::new, assess);
    let sizing = full.as_ref().and_then(|full| size(full).ok());
    // Without volts and length the drop is not asked about.
    let dropped = ask.voltage.typed().is_some() && ask.length.typed().is_some();
    let judged = if dropped { &CHOOSING[..] } else { &CHOOSING[..2] };
    let top = full.as_ref().and_then(|full| worst_of(judged, full));
    let amps = found.as_ref().ok().and_then(|reach| reach.amps);
    let (verdict, cost) = match (&top, &found) {
        (Some(check), _) => (check.verdict, check.cost),
        (None, Ok(_)) => (Verdict::Breaks, Cost::Hazard),
        (None, Err(_)) => (Verdict::Asks, Cost::Hazard),
    };
    let shown = amps.map(|amps| show::computed(amps.amount()));
    Answer {
        of: of(pad, ask, found.as_ref().ok()),
        number: shown.as_deref().map_or(show::NONE, without_unit).to_owned(),
        unit: "A".into(),
        verdict,
        cost,
        says: match &found {
            Ok(reach) => says(pad, ask, reach),
            Err(missing) => format!("Waits for {}.", names(*missing)),
        },
        most: found.as_ref().ok().and_then(how_far),
        rests: top.as_ref().and_then(super::answer::rests),
        besides: None,
        bar: Some(bars::amps(sizing.as_ref(), &checks)),
        second: bars::drop(sizing.as_ref(), &checks),
        offer: None,
    }
}

fn of(pad: &impl Pad, ask: &Ask, found: Option<&Reach>) -> String {
    let cable = found.map_or_else(|| "This cable".to_owned(), |reach| reach.cable.to_string());
    let ends = ask.kind.typed().map_or_else(String::new, |kind| {
        let (from, to) = kind.ends();
        format!(", {from} to {to}")
    });
    let along = [Field::RunVoltage, Field::RunLength].into_iter().filter_map(|field| as_entered(pad, field));
    let along: String = along.map(|entered| format!(", {entered}")).collect();
    format!("{cable} carries at most{ends}{along}")
}

fn says(pad: &impl Pad, ask: &Ask, reach: &Reach) -> String {
    let (Some(most), Some(rating)) = (reach.most, reach.rating) else {
        return match ask.breaker.typed() {
            Some(breaker) => format!("{} does not protect it, as it lies.", show::given(breaker.amount())),
            None => "No standard breaker or fuse protects it, as it lies.".to_owned(),
        };
    };
    let watts = reach.watts.map_or_else(String::new, |watts| format!(", {}", show::computed(watts.amount())));
    let breaker = format!("On {}{watts}.", show::given(rating.amount()));
    let allowed = ask.allowed().map_or_else(String::new, |part| format!(" of {}", show::given(part.amount())));
    let length = as_entered(pad, Field::RunLength).unwrap_or_default();
    match reach.most_for_drop {
        Some(drop) if drop < most => format!(
            "{breaker} The conductor would carry {}; over {length} the drop{allowed} is the limit.",
            show::computed(most.amount())
        ),
        Some(drop) => format!(
            "{breaker} The conductor is the limit; over {length} the drop{allowed} would allow {}.",
            show::computed(drop.amount())
        ),
        None if ask.voltage == Entry::Blank => format!("{breaker} Enter Voltage to know how far."),
        None => breaker,
    }
}

fn how_far(reach: &Reach) -> Option<String> {
    Some(format!("With {} it goes {}", show::computed(reach.most?.amount()), show::computed(reach.length?.amount())))
}

/// Names and figures of what the cable does, beside a run whose current was entered.
pub fn rows(reach: &Reach, ask: &Ask) -> Vec<(String, String)> {
    let none = || "no standard breaker or fuse protects it".to_owned();
    let on = reach.rating.map_or_else(String::new, |rating| format!(" on {}", show::given(rating.amount())));
    let most = reach.most.map_or_else(none, |amps| format!("{}{on}", show::computed(amps.amount())));
    let mut rows = vec![("Carries at most".to_owned(), most)];
    if let Some(amps) = reach.most_for_drop {
        rows.push(("Within the drop, over this length".to_owned(), show::computed(amps.amount())));
    }
    if let (Some(amps), Some(watts)) = (reach.amps, reach.watts) {
        let both = format!("{}, {}", show::computed(amps.amount()), show::computed(watts.amount()));
        rows.push((if ask.length.typed().is_some() { "Both together" } else { "In watts" }.to_owned(), both));
    }
    if let Some(length) = reach.length {
        let current = engine::run::working_current(ask).or(reach.most);
        let with = current.map_or_else(String::new, |amps| format!(" with {}", show::computed(amps.amount())));
        rows.push((format!("Goes{with}"), show::computed(length.amount())));
    }
    rows
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::run::answer::tests::of_rows;
    use crate::testing::{Rows, plain};

    const TRUCK: &[(Field, &str)] = &[(Field::RunKind, "dc-branch"), (Field::ConductorSize, "2.5")];

    /// IEC, two loaded conductors in conduit, PVC 70 °C: 2.5 mm² carries 24 A (B.52.4, method B1), on a breaker of 20 A.
    #[test]
    fn a_size_alone_tells_how_many_amperes() {
        let answer = of_rows(TRUCK);
        assert_eq!(plain(&answer.of), "2.5 mm² carries at most, DC panel to loads");
        assert_eq!((plain(&answer.number).as_str(), answer.unit.as_ref()), ("20.0", "A"));
        assert_eq!(plain(&answer.says), "On 20 A. Enter Voltage to know how far.");
        assert_eq!((answer.verdict, answer.most), (Verdict::Close, None));
        assert_eq!(of_rows(&TRUCK[1..]).says, "Waits for Kind of run.");
    }

    #[test]
    fn with_volts_it_tells_how_far_and_with_a_length_which_limit_counts() {
        let far = of_rows(&[TRUCK, &[(Field::RunVoltage, "12")]].concat());
        // By hand: 3 % of 12 V over 2 · 20 A · 7.41 mΩ/m at 57.8 °C (8.51 mΩ/m) is 1.06 m.
        assert_eq!(far.most.as_deref().map(plain).as_deref(), Some("With 20.0 A it goes 1.06 m"));
        let over = of_rows(&[TRUCK, &[(Field::RunVoltage, "12"), (Field::RunLength, "5")]].concat());
        let says = plain(&over.says);
        assert!(says.contains("would carry 20.0 A; over 5 m the drop of 3 % is the limit."), "{says}");
        assert!(over.second.is_some() && over.verdict != Verdict::Breaks);
        let short = of_rows(&[TRUCK, &[(Field::RunVoltage, "240"), (Field::RunLength, "5")]].concat());
        assert!(short.says.contains("The conductor is the limit"), "{}", short.says);
    }

    #[test]
    fn a_breaker_that_does_not_protect_it_breaks() {
        let answer = of_rows(&[TRUCK, &[(Field::Breaker, "100")]].concat());
        assert_eq!((answer.verdict, answer.number.as_str()), (Verdict::Breaks, show::NONE));
        assert_eq!(plain(&answer.says), "100 A does not protect it, as it lies.");
    }

    /// Whatever the cable, what it is said to take holds when it is entered.
    #[test]
    fn what_it_is_said_to_take_holds() {
        for size in ["18 AWG", "10 AWG", "2/0", "1.5", "35 mm2", "500 kcmil", "40"] {
            for family in ["iec", "north-america"] {
                for kind in ["pv-array", "controller", "bank", "inverter", "dc-feeder", "ac-output", "generator"] {
                    let rows = [
                        (Field::RunKind, kind),
                        (Field::CodeFamily, family),
                        (Field::ConductorSize, size),
                        (Field::RunVoltage, "48"),
                        (Field::RunLength, "12 ft"),
                    ];
                    let answer = of_rows(&rows);
                    assert_eq!(answer.verdict == Verdict::Breaks, answer.number == show::NONE, "{rows:?}");
                    let ask = Ask::read(&Rows(&rows));
                    let page = settled(&ask);
                    assert_eq!(page == ask, answer.number == show::NONE, "{rows:?}");
                }
            }
        }
    }

    #[test]
    fn beside_a_run_its_figures_name_the_current() {
        let rows = [TRUCK, &[(Field::RunCurrent, "8"), (Field::RunVoltage, "12"), (Field::RunLength, "3")]].concat();
        let ask = Ask::read(&Rows(&rows));
        let reach = reach(&ask).expect("it reaches");
        let told: Vec<String> =
            super::rows(&reach, &ask).iter().map(|(name, value)| plain(&format!("{name}: {value}"))).collect();
        assert_eq!(told[0], "Carries at most: 20.0 A on 20 A");
        assert!(told.last().is_some_and(|last| last.starts_with("Goes with 8.00 A: ")), "{told:?}");
    }
}
