//! What holds for every start.

use arbtest::arbitrary::{Result, Unstructured};
use arbtest::arbtest;
use engine::check::Verdict;
use engine::entry::Entry;
use engine::network::Behind;
use engine::quantity::{Ohms, Quantity, Volts, Watts};
use engine::start::{Ask, Class, Draws, Limits, Requirement, Switched, assess, together, what_helps, working};

fn any<Q: Quantity>(u: &mut Unstructured<'_>, least: f64, most: f64) -> Result<Entry<Q>> {
    Ok(match u.int_in_range(0..=9)? {
        0 | 1 => Entry::Blank,
        2 => Entry::Unread,
        3 => Entry::of(*u.choose(&[0.0, -1.0, 1e300, 1e-300, f64::NAN, f64::INFINITY])?),
        _ => Entry::of(least + (most - least) * f64::from(u.int_in_range(0..=1000)?) / 1000.0),
    })
}

fn ask(u: &mut Unstructured<'_>) -> Result<Ask> {
    Ok(Ask {
        load: if u.ratio(4, 5)? { Entry::Typed(*u.choose(&Class::ALL)?) } else { Entry::Blank },
        running: any(u, 10.0, 5000.0)?,
        how_many: any(u, 1.0, 4.0)?,
        multiple: any(u, 1.0, 12.0)?,
        starting_factor: any(u, 0.1, 1.0)?,
        running_factor: any(u, 0.3, 1.0)?,
        seconds: any(u, 0.0, 10.0)?,
        already: any(u, 0.0, 3000.0)?,
        inverter_continuous: any(u, 500.0, 10_000.0)?,
        inverter_surge: any(u, 500.0, 20_000.0)?,
        surge_seconds: any(u, 0.1, 20.0)?,
        efficiency: any(u, 50.0, 100.0)?,
        cut_off: any(u, 10.0, 48.0)?,
        bank_voltage: any(u, 11.0, 56.0)?,
        bank_resistance: any(u, 0.0, 0.2)?,
        cable: any(u, 0.0, 0.05)?,
        packs: any(u, 1.0, 6.0)?,
        pack_limit: any(u, 20.0, 300.0)?,
        pack_peak: any(u, 20.0, 600.0)?,
        pack_peak_time: any(u, 0.0, 10.0)?,
        breaker: any(u, 10.0, 300.0)?,
        generator: any(u, 500.0, 20_000.0)?,
        charger: any(u, 0.0, 5000.0)?,
        ..Ask::default()
    })
}

#[test]
fn no_entry_makes_it_panic_or_give_what_is_not_a_number() {
    arbtest(|u| {
        let ask = ask(u)?;
        for check in assess(&ask) {
            assert_eq!(check.verdict == Verdict::Asks, !check.asks.is_empty(), "{check:?} {ask:?}");
            for amount in check.value.into_iter().chain(check.limit.map(|limit| limit.amount)) {
                assert!(!amount.number.is_nan(), "{check:?} {ask:?}");
            }
            for step in working(&ask, check.id) {
                assert!(!step.result.number.is_nan(), "{step:?} {ask:?}");
            }
        }
        let _ = what_helps(&ask);
        Ok(())
    });
}

#[test]
fn more_resistance_never_raises_the_volts() {
    arbtest(|u| {
        let ask = ask(u)?;
        let Entry::Typed(ohms) = ask.bank_resistance else { return Ok(()) };
        if !(0.0..1.0).contains(&ohms.get()) {
            return Ok(());
        }
        let more = Ask { bank_resistance: Entry::of(ohms.get() * 1.5 + 0.001), ..ask };
        let volts = |ask: &Ask| Requirement::Sag.check(ask).and_then(|check| check.value).map(|value| value.number);
        if let (Some(less), Some(more)) = (volts(&ask), volts(&more)) {
            assert!(more <= less + 1e-9, "{less} {more} {ask:?}");
        }
        Ok(())
    });
}

/// Draws that lag only add up, so that a set which breaks is part of none that holds. It would not be so with a leading
/// power factor, which no load here has.
#[test]
fn a_set_that_breaks_is_part_of_none_that_holds() {
    arbtest(|u| {
        let count = u.int_in_range(1..=8)?;
        let loads: Vec<Switched> = (0..count)
            .map(|_| {
                let run = f64::from(u.int_in_range(10..=2000)?);
                let factor = f64::from(u.int_in_range(3..=10)?) / 10.0;
                let times = f64::from(u.int_in_range(1..=8)?);
                Ok(Switched {
                    running: Draws::of(Watts::new(run), factor),
                    starting: Draws::of(Watts::new(run * times), factor),
                })
            })
            .collect::<Result<_>>()?;
        let limits = Limits {
            continuous: f64::from(u.int_in_range(500..=8000)?),
            surge: f64::from(u.int_in_range(500..=16_000)?),
            efficiency: 0.88,
            bus: Behind { emf: Volts::new(52.0), resistance: Ohms::new(f64::from(u.int_in_range(0..=50)?) / 1000.0) },
            cut_off: Volts::new(44.0),
            base: Draws::default(),
        };
        let found = together(&loads, &limits);
        for sets in [&found.run, &found.start] {
            for one in sets {
                assert!(sets.iter().all(|other| one == other || one & other != *one), "{sets:?}");
            }
        }
        for (place, load) in found.loads.iter().enumerate() {
            assert!(load.alone || !load.on_top, "on top, but not alone: {place}");
            let starts = found.start.iter().any(|set| set & (1 << place) != 0);
            assert_eq!(load.alone, starts, "{place}");
        }
        Ok(())
    });
}
