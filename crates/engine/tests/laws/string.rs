//! What must hold of every string, whatever the numbers.

use arbtest::arbitrary::{Result, Unstructured};
use arbtest::arbtest;
use engine::check::{Cost, Verdict};
use engine::choice::{ControllerKind, LimitHoldsFactor, Mounting};
use engine::controller::Controller;
use engine::entry::Entry;
use engine::family::{CodeFamily, Stands};
use engine::module::{CurrentCoefficient, Module, VoltageCoefficient};
use engine::quantity::{AmpsPerKelvin, Count, Kelvins, PercentPerKelvin, Quantity, VoltsPerKelvin};
use engine::string::{Ask, Requirement, assess, cold_voltage, layouts, longest, shortest, working};

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

fn whole(count: Count) -> Count {
    Count::new(count.get().round())
}

fn any_ask(u: &mut Unstructured<'_>, often: u8) -> Result<Ask> {
    let relative = between(u, -0.45, 0.45)?;
    let coefficient = if u.arbitrary()? {
        VoltageCoefficient::Relative(PercentPerKelvin::new(relative))
    } else {
        VoltageCoefficient::Absolute(VoltsPerKelvin::new(relative / 2.0))
    };
    let current = between(u, -0.1, 0.1)?;
    let current = if u.arbitrary()? {
        CurrentCoefficient::Relative(PercentPerKelvin::new(current))
    } else {
        CurrentCoefficient::Absolute(AmpsPerKelvin::new(current))
    };
    Ok(Ask {
        module: Module {
            voc: quantity(u, often, 1.0, 80.0)?,
            vmp: quantity(u, often, 1.0, 70.0)?,
            isc: quantity(u, often, 0.1, 20.0)?,
            imp: quantity(u, often, 0.1, 19.0)?,
            voc_coefficient: entry(u, often, coefficient)?,
            pmax_coefficient: quantity(u, often, -0.6, 0.0)?,
            isc_coefficient: entry(u, often, current)?,
            voc_tolerance: quantity(u, often, 0.0, 10.0)?,
            series_fuse: quantity(u, often, 5.0, 40.0)?,
            system_voltage: quantity(u, often, 50.0, 1500.0)?,
            rear_gain: quantity(u, often, 0.0, 30.0)?,
        },
        controller: any_controller(u, often)?,
        series: quantity::<Count>(u, often, 1.0, 20.0)?.map(whole),
        strings: quantity::<Count>(u, often, 1.0, 10.0)?.map(whole),
        record_low: quantity(u, often, -60.0, 30.0)?,
        record_high: quantity(u, often, 0.0, 55.0)?,
        mounting: pick(u, often, &[Mounting::OpenRack, Mounting::StandOff, Mounting::Flush])?,
        stands: pick(u, often, &[Stands::Dwelling, Stands::Building, Stands::Ground])?,
        array_drop: quantity(u, often, 0.0, 10.0)?,
        string_fuse: quantity(u, often, 1.0, 40.0)?,
        family: pick(u, often, &CodeFamily::ALL)?,
        cold_reserve: quantity(u, often, 0.0, 10.0)?,
    })
}

fn any_controller(u: &mut Unstructured<'_>, often: u8) -> Result<Controller> {
    Ok(Controller {
        kind: pick(u, often, &[ControllerKind::Mppt, ControllerKind::Mppt, ControllerKind::Pwm])?,
        input_limit: quantity(u, often, 20.0, 600.0)?,
        window_low: quantity(u, often, 15.0, 150.0)?,
        window_high: quantity(u, often, 50.0, 550.0)?,
        pv_current_limit: quantity(u, often, 5.0, 100.0)?,
        limit_holds_factor: pick(u, often, &[LimitHoldsFactor::No, LimitHoldsFactor::Yes])?,
        output_current: quantity(u, often, 5.0, 120.0)?,
        highest_charge: quantity(u, often, 12.0, 64.0)?,
        running_headroom: quantity(u, often, 0.0, 5.0)?,
        starting_headroom: quantity(u, often, 0.0, 10.0)?,
    })
}

#[test]
fn no_mix_of_entries_panics_or_gives_a_number_that_is_none() {
    arbtest(|u| {
        let often = u.int_in_range(0..=10)?;
        let ask = any_ask(u, often)?;
        for check in assess(&ask) {
            assert_eq!(check.verdict == Verdict::Asks, check.value.is_none());
            assert_eq!(check.verdict == Verdict::Asks, !check.asks.is_empty(), "asks names what is missing: {check:?}");
            for number in [check.value.map(|value| value.number), check.limit.map(|limit| limit.amount.number)] {
                assert!(number.is_none_or(f64::is_finite), "{check:?}");
            }
            let steps = working(&ask, check.id);
            assert!(steps.iter().all(|step| step.result.number.is_finite()));
        }
        Ok(())
    });
}

#[test]
fn a_hazard_that_rests_on_an_assumption_never_clears() {
    arbtest(|u| {
        let ask = any_ask(u, 8)?;
        for check in assess(&ask) {
            assert!(check.cost != Cost::Hazard || check.verdict != Verdict::Clears || check.assumed.is_empty());
        }
        Ok(())
    });
}

#[test]
fn checks_come_worst_first() {
    arbtest(|u| {
        let checks = assess(&any_ask(u, 8)?);
        assert!(checks.windows(2).all(|pair| pair[0].rank().0 <= pair[1].rank().0));
        Ok(())
    });
}

#[test]
fn colder_is_never_fewer_volts_and_longer_is_always_more() {
    arbtest(|u| {
        let mut ask = any_ask(u, 10)?;
        let Some(warm) = cold_voltage(&ask) else { return Ok(()) };
        let colder = between(u, 0.0, 40.0)?;
        let series = ask.series.typed().map_or(1.0, Count::get);
        ask.series = Entry::of(series + 1.0);
        assert!(cold_voltage(&ask).is_some_and(|longer| longer > warm));
        ask.series = Entry::of(series);
        ask.record_low = ask.record_low.map(|low| low + Kelvins::new(-colder));
        assert!(cold_voltage(&ask).is_some_and(|cold| cold >= warm));
        Ok(())
    });
}

#[test]
fn the_longest_string_holds_and_one_more_does_not() {
    arbtest(|u| {
        let ask = any_ask(u, 10)?;
        let Some(longest) = longest(&ask) else { return Ok(()) };
        let breaks = |series: u32| {
            [Requirement::ColdController, Requirement::ColdCircuit]
                .iter()
                .filter_map(|one| one.check(&ask.with_counts(series, 1)))
                .any(|check| check.verdict == Verdict::Breaks)
        };
        assert!(longest == 0 || !breaks(longest));
        assert!(longest == 1000 || breaks(longest + 1));
        Ok(())
    });
}

#[test]
fn the_shortest_string_charges_and_one_fewer_does_not() {
    arbtest(|u| {
        let ask = any_ask(u, 10)?;
        let Some(shortest) = shortest(&ask) else { return Ok(()) };
        let charges = |series: u32| {
            let check = Requirement::HotCharge.check(&ask.with_counts(series, 1));
            check.is_some_and(|check| check.verdict != Verdict::Breaks)
        };
        assert!(charges(shortest));
        assert!(shortest == 1 || !charges(shortest - 1));
        Ok(())
    });
}

#[test]
fn every_layout_holds_in_the_cold_and_uses_no_module_twice() {
    arbtest(|u| {
        let ask = any_ask(u, 9)?;
        let modules = u.int_in_range(0..=14)?;
        let mut controllers = vec![ask.controller];
        for _ in 0..u.int_in_range(0..=2)? {
            let other = if u.arbitrary()? { ask.controller } else { any_controller(u, 9)? };
            controllers.push(other);
        }
        let found = layouts(&ask, modules, &controllers);
        for layout in &found.ranked {
            let used: u32 = layout.groups.iter().map(|group| group.modules()).sum();
            assert_eq!((used, used + layout.left_over), (layout.used, modules));
            for group in &layout.groups {
                let judged = ask.on(controllers[group.controller]).with_counts(group.series, group.strings);
                let broken = assess(&judged)
                    .into_iter()
                    .find(|check| check.cost == Cost::Hazard && check.verdict == Verdict::Breaks);
                // The fuse that is fitted now is not the fuse of another layout.
                assert!(broken.is_none_or(|check| check.id == Requirement::Fuse), "{broken:?}");
            }
            let mut seen: Vec<usize> = layout.groups.iter().map(|group| group.controller).collect();
            seen.dedup();
            assert_eq!(seen.len(), layout.groups.len());
        }
        for rejected in &found.rejected {
            assert_eq!((rejected.check.cost, rejected.check.verdict), (Cost::Hazard, Verdict::Breaks));
        }
        Ok(())
    });
}

/// The ranking's first is the best that trying every combination finds.
#[test]
fn no_combination_is_better_than_the_first() {
    arbtest(|u| {
        let ask = any_ask(u, 10)?;
        let modules = u.int_in_range(1..=8)?;
        let controllers =
            if u.arbitrary()? { vec![ask.controller; 2] } else { vec![ask.controller, any_controller(u, 10)?] };
        let found = layouts(&ask, modules, &controllers);
        // Every group of one controller alone, each as (loss, kept, used).
        let alone = |one: &Controller| -> Vec<(bool, f64, u32)> {
            (1..=modules)
                .flat_map(|count| layouts(&ask, count, &[*one]).ranked)
                .map(|layout| {
                    let kept = layout.kept.map_or(f64::from(layout.used), |kept| kept.get());
                    (!layout.holds(), kept, layout.used)
                })
                .chain([(false, 0.0, 0)])
                .collect()
        };
        let mut best: Option<(bool, f64)> = None;
        for first in alone(&controllers[0]) {
            for second in alone(&controllers[1]) {
                let used = first.2 + second.2;
                let both = (first.0 || second.0, first.1 + second.1);
                let better = best.is_none_or(|best| (both.0, -both.1) < (best.0, -best.1));
                if used > 0 && used <= modules && better {
                    best = Some(both);
                }
            }
        }
        let Some(best) = best else {
            assert!(found.ranked.is_empty());
            return Ok(());
        };
        let first = &found.ranked[0];
        let kept = first.kept.map_or(f64::from(first.used), |kept| kept.get());
        assert_eq!(!first.holds(), best.0);
        assert!((kept - best.1).abs() <= 1e-9 * best.1.max(1.0), "{kept} for {}", best.1);
        Ok(())
    });
}
