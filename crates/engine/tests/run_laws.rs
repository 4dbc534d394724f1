//! What must hold of every run, whatever the numbers.

use arbtest::arbitrary::{Result, Unstructured};
use arbtest::arbtest;
use engine::ampacity::{Insulation, Method, Terminals};
use engine::check::{Cost, Verdict};
use engine::choice::Choice;
use engine::conductor::{AMERICAN, Conductor, METRIC, Size};
use engine::entry::Entry;
use engine::family::CodeFamily;
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Amps, Metres, Quantity, SquareMillimetres};
use engine::run::assumed;
use engine::run::{Ask, BreakerType, Candidate, Kind, Requirement, Sizing, assess, reach, size, working};
use engine::unit::Unit;

fn between(u: &mut Unstructured<'_>, least: f64, most: f64) -> Result<f64> {
    Ok(least + (most - least) * f64::from(u.int_in_range(0..=100_000u32)?) / 100_000.0)
}

/// Blank, unread, or a value: as `often` in ten a value.
fn entry<T: Copy>(u: &mut Unstructured<'_>, often: u8, value: T) -> Result<Entry<T>> {
    Ok(match u.int_in_range(0..=9u8)? {
        roll if roll < often => Entry::Typed(value),
        roll if roll % 2 == 0 => Entry::Blank,
        _ => Entry::Unread,
    })
}

fn quantity<Q: Quantity>(u: &mut Unstructured<'_>, often: u8, least: f64, most: f64) -> Result<Entry<Q>> {
    let number = between(u, least, most)?;
    entry(u, often, Q::of(number))
}

fn pick<T: Copy>(u: &mut Unstructured<'_>, often: u8, list: &[T]) -> Result<Entry<T>> {
    let one = *u.choose(list)?;
    entry(u, often, one)
}

fn any_ask(u: &mut Unstructured<'_>, often: u8) -> Result<Ask> {
    Ok(Ask {
        kind: pick(u, often, Kind::ALL)?,
        current: quantity(u, often, 0.01, 900.0)?,
        power: quantity(u, often, 0.1, 30_000.0)?,
        voltage: quantity(u, often, 1.0, 600.0)?,
        length: quantity(u, often, 0.01, 300.0)?,
        conductor: pick(u, often, Conductor::ALL)?,
        size: quantity(u, often, 0.05, 1000.0)?,
        parallel: quantity(u, often, 1.0, 8.0)?
            .map(|count: engine::quantity::Count| engine::quantity::Count::new(count.get().round())),
        insulation: pick(u, often, Insulation::ALL)?,
        ambient: quantity(u, often, -60.0, 90.0)?,
        together: quantity(u, often, 1.0, 100.0)?,
        method: pick(u, often, Method::ALL)?,
        terminals: pick(u, often, Terminals::ALL)?,
        allowed_drop: quantity(u, often, 0.01, 50.0)?,
        breaker: quantity(u, often, 0.5, 6000.0)?,
        breaker_type: pick(u, often, &BreakerType::ALL)?,
        interrupting: quantity(u, often, 100.0, 100_000.0)?,
        bank_resistance: quantity(u, often, 1e-8, 10.0)?,
        precharged: pick(u, often, &[engine::bank::YesNo::No, engine::bank::YesNo::Yes])?,
        family: pick(u, often, &CodeFamily::ALL)?,
    })
}

/// As [`any_ask`], with all that sizing needs, and nothing fitted yet.
fn open_ask(u: &mut Unstructured<'_>) -> Result<Ask> {
    let mut ask = any_ask(u, 10)?;
    ask.size = Entry::Blank;
    ask.parallel = Entry::Blank;
    ask.breaker = Entry::Blank;
    ask.ambient = quantity(u, 10, -10.0, 50.0)?;
    ask.together = quantity(u, 10, 1.0, 9.0)?;
    Ok(ask)
}

fn numbers(answer: &Sizing) -> Vec<f64> {
    let mut all = vec![answer.load.working.get(), answer.load.device_least.get(), answer.protection.rating.get()];
    if let Some(drop) = answer.drop {
        all.extend([drop.volts.get(), drop.part.get(), drop.lost.get(), drop.temperature.get(), drop.way.get()]);
    }
    if let Some(ampacity) = answer.ampacity {
        all.extend([ampacity.corrected.get(), ampacity.at_terminals.get()]);
    }
    if let Some(precharge) = answer.precharge {
        all.extend([precharge.peak.get(), precharge.wait.get(), precharge.resistor_peak.get()]);
    }
    all
}

#[test]
fn no_combination_of_entries_panics_or_gives_what_is_no_number() {
    arbtest(|u| {
        let often = u.int_in_range(0..=10u8)?;
        let ask = any_ask(u, often)?;
        for check in assess(&ask) {
            let finite = |number: f64| assert!(number.is_finite(), "{:?} of {ask:?}", check.id);
            if let Some(value) = check.value {
                finite(value.number);
            }
            if let Some(limit) = check.limit {
                finite(limit.amount.number);
            }
            match check.verdict {
                Verdict::Asks => assert!(!check.asks.is_empty(), "{:?} asks for nothing: {ask:?}", check.id),
                Verdict::Clears => assert!(check.cost == Cost::Loss || check.assumed.is_empty()),
                Verdict::Breaks | Verdict::Close => {}
            }
        }
        for requirement in Requirement::ALL {
            for step in working(&ask, requirement) {
                assert!(step.result.number.is_finite(), "{step:?} of {ask:?}");
            }
        }
        if let Ok(answer) = size(&ask) {
            assert!(numbers(&answer).iter().all(|number| number.is_finite()), "{answer:?} of {ask:?}");
        }
        if let Ok(far) = reach(&ask) {
            let all = [far.amps.map(Amps::get), far.most_for_drop.map(Amps::get), far.length.map(Metres::get)];
            assert!(all.iter().flatten().all(|number| number.is_finite() && *number >= 0.0), "{far:?} of {ask:?}");
        }
        Ok(())
    });
}

/// The two trades' ladders are taken each by itself: a nominal square millimetre may hold a tenth less metal than its
/// name says, and so resist more than the gauge just below it.
#[test]
fn a_thicker_conductor_never_drops_more() {
    arbtest(|u| {
        let mut ask = open_ask(u)?;
        let ladder: &[Size] = if u.arbitrary()? { &AMERICAN } else { &METRIC };
        let at = u.int_in_range(0..=ladder.len() - 2)?;
        ask.parallel = Entry::of(f64::from(u.int_in_range(1..=8u32)?));
        // Within its ampacity and past it alike, as long as the current does not melt it.
        ask.current = quantity(u, 10, 0.1, 60.0)?;
        let drop = |size: Size| {
            let ask = Ask { size: Entry::Typed(size.area()), ..ask };
            Requirement::Drop.check(&ask).and_then(|check| check.value).map(|value| value.number)
        };
        let (thin, thick) = (drop(ladder[at]), drop(ladder[at + 1]));
        assert!(thick <= thin, "{}: {thin:?}, {}: {thick:?} of {ask:?}", ladder[at], ladder[at + 1]);
        Ok(())
    });
}

fn metal(conductor: Candidate) -> f64 {
    conductor.size.area().get() * f64::from(conductor.parallel)
}

#[test]
fn a_longer_run_never_gets_thinner() {
    arbtest(|u| {
        let ask = open_ask(u)?;
        let (Entry::Typed(length), times) = (ask.length, between(u, 1.0, 5.0)?) else { return Ok(()) };
        let longer = Ask { length: Entry::Typed(length * times), ..ask };
        let (Ok(short), Ok(long)) = (size(&ask), size(&longer)) else { return Ok(()) };
        match (short.conductor, long.conductor) {
            (Some(short), Some(long)) => {
                assert!(
                    long.parallel > short.parallel || metal(long) >= metal(short),
                    "{short} became {long} of {ask:?}"
                );
            }
            (None, Some(long)) => panic!("nothing held, but over {times} times the length {long} does: {ask:?}"),
            (_, None) => {}
        }
        Ok(())
    });
}

#[test]
fn more_current_never_takes_a_thinner_conductor_or_a_smaller_breaker() {
    arbtest(|u| {
        let ask = open_ask(u)?;
        let (Entry::Typed(current), times) = (ask.current, between(u, 1.0, 3.0)?) else { return Ok(()) };
        let more = Ask { current: Entry::Typed(current * times), ..ask };
        let (Ok(less), Ok(more)) = (size(&ask), size(&more)) else { return Ok(()) };
        assert!(more.protection.rating >= less.protection.rating);
        // North America: past 100 A unmarked terminals are better, so a thinner conductor may do; marked ones are not.
        if let (Some(less), Some(more)) = (less.conductor, more.conductor)
            && ask.terminals.typed().is_some()
        {
            assert!(more.parallel > less.parallel || metal(more) >= metal(less), "{less}, {more} of {ask:?}");
        }
        Ok(())
    });
}

#[test]
fn what_is_found_holds_and_the_next_thinner_does_not() {
    arbtest(|u| {
        let ask = open_ask(u)?;
        let Ok(answer) = size(&ask) else { return Ok(()) };
        let Some(conductor) = answer.conductor else { return Ok(()) };
        for requirement in [Requirement::Ampacity, Requirement::Protection, Requirement::Drop] {
            let check = requirement.check_on(&ask, conductor).expect("it arises");
            assert!(check.verdict > Verdict::Asks, "{conductor}: {check:?} of {ask:?}");
        }
        for thinner in answer.thinner {
            assert!(!thinner.breaks.is_empty(), "{} holds too, of {ask:?}", thinner.candidate);
        }
        Ok(())
    });
}

/// At the reach so found the run holds; a little past it, it does not.
#[test]
fn reach_and_size_agree() {
    arbtest(|u| {
        let mut ask = open_ask(u)?;
        let cable = *u.choose(&METRIC[3..])?;
        ask.size = Entry::Typed(cable.area());
        ask.current = Entry::Blank;
        ask.power = Entry::Blank;
        let Ok(far) = reach(&ask) else { return Ok(()) };
        let (Some(amps), Some(rating)) = (far.amps, far.rating) else { return Ok(()) };
        if amps.get() < 0.01 {
            return Ok(());
        }
        let there = |times: f64| {
            let ask = Ask { current: Entry::Typed(amps * times), breaker: Entry::Typed(rating), ..ask };
            [Requirement::Ampacity, Requirement::Protection, Requirement::Drop]
                .into_iter()
                .all(|requirement| requirement.check(&ask).is_some_and(|check| check.verdict > Verdict::Asks))
        };
        // A PV device has an upper end too, so that less current may not hold with it where the drop is what bounds.
        let pv = ask.kind.typed().is_some_and(|kind| matches!(kind, Kind::PvString | Kind::PvArray));
        assert!(pv || there(1.0 - 1e-9), "{far:?} of {ask:?}");
        assert!(!there(1.001), "{far:?} of {ask:?}");
        Ok(())
    });
}

/// A pad that holds one text, and the unit chosen for it, for each of a few fields.
struct Typed<'a>(&'a [(Field, &'a str, Option<Unit>)]);

impl Pad for Typed<'_> {
    fn typed(&self, field: Field) -> (&str, Option<Unit>) {
        self.0.iter().find(|(one, ..)| *one == field).map_or(("", None), |(_, text, unit)| (text, *unit))
    }
}

#[test]
fn units_in_any_mix_give_the_same_answer() {
    let metric = [("60", Unit::Foot), ("18.288", Unit::Metre), ("1828.8", Unit::Centimetre)];
    let current = [("40", Unit::Amp), ("40000", Unit::Milliamp), ("0.04", Unit::Kiloamp)];
    let ambient = [("45", Unit::DegreeCelsius), ("113", Unit::DegreeFahrenheit), ("318.15", Unit::KelvinAbsolute)];
    let volts = [("24", Unit::Volt), ("24000", Unit::Millivolt)];
    let sizes = [("2", Unit::Awg), ("33.630834", Unit::SquareMillimetre), ("66.3713", Unit::Kcmil)];
    for family in ["iec", "north-america"] {
        let mut first: Option<(Option<Candidate>, Vec<f64>)> = None;
        let mut on_truck: Option<f64> = None;
        for (length, metre) in metric {
            for (amps, amp) in current {
                for (air, degree) in ambient {
                    for (bus, volt) in volts {
                        let mut typed = vec![
                            (Field::CodeFamily, family, None),
                            (Field::RunKind, "dc-feeder", None),
                            (Field::RunLength, length, Some(metre)),
                            (Field::RunCurrent, amps, Some(amp)),
                            (Field::Ambient, air, Some(degree)),
                            (Field::RunVoltage, bus, Some(volt)),
                        ];
                        let answer = size(&Ask::read(&Typed(&typed))).expect("nothing is missing");
                        let now = (answer.conductor, numbers(&answer));
                        let (conductor, before) = first.get_or_insert_with(|| now.clone());
                        assert_eq!(*conductor, now.0);
                        for (a, b) in before.iter().zip(&now.1) {
                            assert!((a - b).abs() <= 1e-9 * a.abs(), "{a}, {b}");
                        }
                        for (area, unit) in sizes {
                            typed.push((Field::ConductorSize, area, Some(unit)));
                            let ask = Ask::read(&Typed(&typed));
                            let drop = Requirement::Drop.check(&ask).and_then(|check| check.value);
                            let drop = drop.expect("nothing is missing").number;
                            let before = *on_truck.get_or_insert(drop);
                            assert!((drop - before).abs() < 1e-9 * before, "{area} {unit:?}: {drop}, {before}");
                            typed.pop();
                        }
                    }
                }
            }
        }
    }
}

#[test]
fn an_odd_cross_section_is_judged_by_the_step_below_it() {
    arbtest(|u| {
        let mut ask = open_ask(u)?;
        let area = between(u, 1.6, 290.0)?;
        let (Entry::Typed(family), size) = (ask.family, Size::of_area(SquareMillimetres::new(area))) else {
            return Ok(());
        };
        let ladder: &[Size] = if family == CodeFamily::Iec { &METRIC } else { &AMERICAN };
        let step = if family == CodeFamily::Iec { size.metric_step() } else { size.american_step() };
        let below = ladder[step.expect("1.6 mm² is thicker than the thinnest")];
        let carries = |ask: &Ask| {
            let check = Requirement::Ampacity.check(ask)?;
            Some((check.verdict == Verdict::Breaks, check.value?.number))
        };
        ask.size = Entry::Typed(SquareMillimetres::new(area));
        let odd = carries(&ask);
        ask.size = Entry::Typed(below.area());
        assert_eq!(odd, carries(&ask), "{area} mm² and {below} of {ask:?}");
        Ok(())
    });
}

/// What is shown as assumed is what the checks assume: typing it in changes no value, only the doubt.
#[test]
fn typing_in_what_is_assumed_changes_no_value() {
    arbtest(|u| {
        let often = u.int_in_range(3..=9u8)?;
        let ask = any_ask(u, often)?;
        let amount =
            |field| assumed::of(&ask, field).and_then(|assumption| assumption.amount).map(|amount| amount.number);
        let key = |field| assumed::of(&ask, field).and_then(|assumption| assumption.choice);
        fn quantity<Q: Quantity + PartialEq>(entry: Entry<Q>, number: Option<f64>) -> Entry<Q> {
            if entry == Entry::Blank { number.map_or(Entry::Blank, Entry::of) } else { entry }
        }
        fn choice<C: Choice + PartialEq>(entry: Entry<C>, key: Option<&str>) -> Entry<C> {
            if entry == Entry::Blank { key.map_or(Entry::Blank, C::entry) } else { entry }
        }
        let typed = Ask {
            conductor: choice(ask.conductor, key(Field::Conductor)),
            insulation: choice(ask.insulation, key(Field::Insulation)),
            ambient: quantity(ask.ambient, amount(Field::Ambient)),
            together: quantity(ask.together, amount(Field::ConductorsTogether)),
            method: choice(ask.method, key(Field::Method)),
            terminals: choice(ask.terminals, key(Field::Terminals)),
            allowed_drop: quantity(ask.allowed_drop, amount(Field::AllowedDrop)),
            breaker_type: choice(ask.breaker_type, key(Field::BreakerType)),
            bank_resistance: quantity(ask.bank_resistance, amount(Field::BankResistance)),
            family: choice(ask.family, key(Field::CodeFamily)),
            ..ask
        };
        for requirement in Requirement::ALL {
            let (left, entered) = (requirement.check(&ask), requirement.check(&typed));
            let of = |check: &engine::check::Check<Requirement>| (check.value, check.limit, check.asks);
            assert_eq!(left.as_ref().map(of), entered.as_ref().map(of), "{requirement:?} of {ask:?}");
        }
        Ok(())
    });
}
