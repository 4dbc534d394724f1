//! What holds for every bank, whatever was entered, left blank, or could not be read.

use arbtest::arbitrary::{Result, Unstructured};
use arbtest::arbtest;
use engine::bank::{
    self, Ask, Requirement, YesNo, advice, air_and_water, assess, energy, energy_working, layouts, settings, window,
    working,
};
use engine::check::Verdict;
use engine::chemistry::{Chemistry, charge_at_rest, odd_cells};
use engine::entry::Entry;
use engine::quantity::{Celsius, Quantity, Volts};
use engine::sharing::Arrangement;

/// A field in any state, with a number of the field's own size, or now and then one that cannot be meant.
fn any<Q: Quantity>(u: &mut Unstructured<'_>, least: f64, most: f64) -> Result<Entry<Q>> {
    Ok(match u.int_in_range(0..=9)? {
        0 | 1 => Entry::Blank,
        2 => Entry::Unread,
        3 => Entry::of(*u.choose(&[0.0, -1.0, 1e300, 1e-300, f64::NAN, f64::INFINITY, f64::NEG_INFINITY])?),
        _ => Entry::of(least + (most - least) * f64::from(u.int_in_range(0..=1000)?) / 1000.0),
    })
}

fn whole<Q: Quantity>(u: &mut Unstructured<'_>, most: u32) -> Result<Entry<Q>> {
    Ok(match u.int_in_range(0..=9)? {
        0 | 1 => Entry::Blank,
        2 => Entry::Unread,
        3 => Entry::of(*u.choose(&[0.0, -3.0, 2.5, 1e9, f64::NAN])?),
        _ => Entry::of(f64::from(u.int_in_range(1..=most)?)),
    })
}

fn said(u: &mut Unstructured<'_>) -> Result<Entry<YesNo>> {
    Ok(*u.choose(&[Entry::Blank, Entry::Unread, Entry::Typed(YesNo::No), Entry::Typed(YesNo::Yes)])?)
}

fn chemistry(u: &mut Unstructured<'_>) -> Result<Chemistry> {
    Ok(*u.choose(Chemistry::ALL)?)
}

fn ask(u: &mut Unstructured<'_>) -> Result<Ask> {
    let made_of = chemistry(u)?;
    let nominal = made_of.figures().nominal;
    Ok(Ask {
        chemistry: match u.int_in_range(0..=7)? {
            0 => Entry::Blank,
            1 => Entry::Unread,
            _ => Entry::Typed(made_of),
        },
        cell_voltage: match u.int_in_range(0..=3)? {
            0 => any(u, 0.5, 60.0)?,
            _ => Entry::Typed(nominal * f64::from(u.int_in_range(1..=16)?)),
        },
        cells_in_block: if u.ratio(3, 4)? { Entry::Blank } else { whole(u, 20)? },
        cell_capacity: any(u, 1.0, 1000.0)?,
        count: whole(u, 60)?,
        bus_voltage: any(u, 12.0, 48.0)?,
        series: whole(u, 30)?,
        strings: whole(u, 6)?,
        coldest: any(u, -50.0, 30.0)?,
        warmest: any(u, -10.0, 60.0)?,
        end: any(u, 0.8, 3.2)?,
        absorb: any(u, 1.4, 4.2)?,
        float: any(u, 1.3, 4.0)?,
        equalise: any(u, 1.5, 4.2)?,
        compensation: any(u, -0.006, 0.006)?,
        charge_cap: any(u, 10.0, 70.0)?,
        depth_used: any(u, 1.0, 100.0)?,
        inverter_low: any(u, 9.0, 50.0)?,
        inverter_high: any(u, 14.0, 70.0)?,
        loads_low: any(u, 9.0, 50.0)?,
        loads_high: any(u, 14.0, 70.0)?,
        controller_output_limit: any(u, 14.0, 150.0)?,
        charge_current: any(u, 1.0, 300.0)?,
        greatest_load: any(u, 10.0, 12_000.0)?,
        starting_load: any(u, 10.0, 12_000.0)?,
        starting_time: any(u, 0.0, 30.0)?,
        own_protection: said(u)?,
        pack_charge_limit: any(u, 1.0, 200.0)?,
        pack_discharge_limit: any(u, 1.0, 200.0)?,
        pack_peak: any(u, 1.0, 400.0)?,
        pack_peak_time: any(u, 0.0, 30.0)?,
        pack_cold_lock: any(u, -30.0, 10.0)?,
        posts_covered: said(u)?,
        wet_room: said(u)?,
        air_opening: any(u, 0.0, 1000.0)?,
        sleeping_room: said(u)?,
        lowest_charge: any(u, 0.0, 100.0)?,
        take_off: *u.choose(&[
            Entry::Blank,
            Entry::Unread,
            Entry::Typed(Arrangement::SameEnd),
            Entry::Typed(Arrangement::OppositeEnds),
            Entry::Typed(Arrangement::Middle),
        ])?,
        tie: any(u, 0.0, 0.002)?,
        volts_apart: any(u, 0.0, 3.0)?,
        used_a_day: any(u, 0.0, 50_000.0)?,
        without_inverter: u.ratio(1, 8)?,
    })
}

/// A bank whose counts and cells are all there.
fn told(u: &mut Unstructured<'_>) -> Result<Ask> {
    let made_of = chemistry(u)?;
    Ok(Ask {
        chemistry: Entry::Typed(made_of),
        cell_voltage: Entry::Typed(made_of.figures().nominal),
        cell_capacity: Entry::of(f64::from(u.int_in_range(10..=1000)?)),
        coldest: Entry::of(f64::from(u.int_in_range(-40..=40)?)),
        ..Ask::default()
    })
}

#[test]
fn no_entry_makes_it_panic_or_give_what_is_not_a_number() {
    arbtest(|u| {
        let ask = ask(u)?;
        for check in assess(&ask) {
            let told = check.verdict != Verdict::Asks;
            assert_eq!(told, check.asks.is_empty(), "{check:?}");
            assert_eq!(told, check.value.is_some());
            for amount in check.value.into_iter().chain(check.limit.map(|limit| limit.amount)) {
                assert!(!amount.number.is_nan(), "{check:?} {ask:?}");
            }
        }
        for requirement in Requirement::ALL {
            for step in working(&ask, requirement) {
                assert!(!step.result.number.is_nan(), "{step:?}");
            }
        }
        for layout in layouts(&ask).ranked {
            assert!(layout.energy.is_none_or(|energy| energy.usable.get() >= 0.0), "{layout:?}");
            assert!(!layout.reason().is_empty());
        }
        assert!(energy_working(&ask).iter().all(|step| !step.result.number.is_nan()));
        for piece in advice(&ask) {
            assert!(!piece.to_string().contains("NaN"), "{piece:?}");
        }
        if let Some(card) = settings(&ask) {
            assert!(card.lines.iter().all(|line| line.amount.is_none_or(|amount| !amount.number.is_nan())), "{card:?}");
        }
        if let Some(air) = air_and_water(&ask) {
            assert!(air.flow.is_none_or(|flow| flow.get() >= 0.0), "{air:?}");
            assert!(air.water_a_month.is_none_or(|water| water.least.get() >= 0.0), "{air:?} {ask:?}");
        }
        Ok(())
    })
    .budget_ms(4000);
}

#[test]
fn the_working_ends_where_the_check_does() {
    arbtest(|u| {
        let ask = bank::settled(&ask(u)?);
        for requirement in Requirement::ALL {
            let Some(check) = requirement.check(&ask) else { continue };
            if let Some(margin) = check.margin {
                let last = working(&ask, requirement).pop().expect("a told check has steps");
                assert!(last.result.number == margin.get(), "{check:?} {last:?}");
            }
        }
        Ok(())
    });
}

#[test]
fn more_cells_in_series_never_lower_the_window() {
    arbtest(|u| {
        let ask = told(u)?;
        let series = u.int_in_range(1..=200)?;
        let (fewer, more) =
            (window(&ask.with_counts(series, 1)).unwrap(), window(&ask.with_counts(series + 1, 1)).unwrap());
        assert!(fewer.lowest < more.lowest && fewer.absorb < more.absorb && fewer.highest < more.highest);
        assert!(
            fewer.lowest < fewer.nominal
                && fewer.nominal < fewer.absorb
                && fewer.absorb <= fewer.highest.max(fewer.absorb)
        );
        Ok(())
    });
}

#[test]
fn colder_never_lowers_the_highest_voltage_and_never_adds_energy() {
    arbtest(|u| {
        let warm = told(u)?.with_counts(12, 2);
        let at = warm.coldest.typed().unwrap().get();
        let cold = Ask { coldest: Entry::of(at - f64::from(u.int_in_range(0..=20)?)), ..warm };
        assert!(window(&cold).unwrap().highest >= window(&warm).unwrap().highest);
        // Above 25 °C warmth takes capacity from nickel; below, cold does from all.
        if at <= 25.0 {
            assert!(energy(&cold).unwrap().usable <= energy(&warm).unwrap().usable);
        }
        Ok(())
    });
}

#[test]
fn energy_scales_with_the_count() {
    arbtest(|u| {
        let ask = told(u)?;
        let (series, strings) = (u.int_in_range(1..=100)?, u.int_in_range(1..=20)?);
        let one = energy(&ask.with_counts(1, 1)).unwrap();
        let all = energy(&ask.with_counts(series, strings)).unwrap();
        let count = f64::from(series * strings);
        assert!((all.in_all.get() / (one.in_all.get() * count) - 1.0).abs() < 1e-9);
        assert!((all.usable.get() / (one.usable.get() * count) - 1.0).abs() < 1e-9);
        Ok(())
    });
}

#[test]
fn every_count_in_series_is_laid_out_once_and_no_cell_is_lost() {
    arbtest(|u| {
        let count = u.int_in_range(1..=80)?;
        let ask = Ask { count: Entry::of(f64::from(count)), bus_voltage: Entry::of(24.0), ..told(u)? };
        let found = layouts(&ask);
        let mut series: Vec<u32> = found.ranked.iter().chain(&found.rejected).map(|layout| layout.series).collect();
        series.sort_unstable();
        assert_eq!(series, (1..=count).collect::<Vec<_>>());
        for layout in found.ranked.iter().chain(&found.rejected) {
            assert_eq!(layout.series * layout.strings + layout.left_over, count);
            assert_eq!(layout.refused_by().is_some(), found.rejected.contains(layout));
        }
        Ok(())
    })
    .budget_ms(2000);
}

#[test]
fn a_higher_reading_never_means_less_charge() {
    arbtest(|u| {
        let made_of = chemistry(u)?;
        let volts = f64::from(u.int_in_range(0..=5000)?) / 1000.0;
        let read = |volts: f64| charge_at_rest(made_of, Volts::new(volts), Celsius::new(20.0), Volts::new(0.005));
        let (low, high) = (read(volts), read(volts + 0.01));
        assert!(low.likely <= high.likely && low.least <= high.least && low.most <= high.most);
        Ok(())
    });
}

#[test]
fn odd_cells_are_the_same_in_whatever_order() {
    arbtest(|u| {
        let count = u.int_in_range(4..=40)?;
        let mut readings = Vec::new();
        for _ in 0..count {
            readings.push(Volts::new(f64::from(u.int_in_range(3000..=3400)?) / 1000.0));
        }
        let mut named: Vec<usize> =
            odd_cells(&readings).unwrap().odd.iter().map(|cell| count - cell.number + 1).collect();
        readings.reverse();
        let mut reversed: Vec<usize> = odd_cells(&readings).unwrap().odd.iter().map(|cell| cell.number).collect();
        named.sort_unstable();
        reversed.sort_unstable();
        assert_eq!(named, reversed);
        assert!(named.len() * 2 <= count, "no more than half stand apart");
        Ok(())
    });
}
