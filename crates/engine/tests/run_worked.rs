//! Runs worked by hand, and facts of the trade.

use engine::ampacity::{Insulation, Method, Terminals};
use engine::check::{Check, Verdict};
use engine::conductor::{Conductor, Size};
use engine::entry::Entry;
use engine::family::CodeFamily;
use engine::field::Field;
use engine::quantity::{Amps, Count, SquareMillimetres};
use engine::run::{Ask, BreakerType, Candidate, Kind, Requirement, assess, reach, size, working};
use engine::unit::Unit;

fn alone(size: Size) -> Candidate {
    Candidate { size, parallel: 1 }
}

fn check(ask: &Ask, requirement: Requirement) -> Check<Requirement> {
    requirement.check(ask).expect("it arises")
}

fn near(value: f64, wanted: f64, within: f64) {
    assert!((value - wanted).abs() <= within, "{value}, wanted {wanted} within {within}");
}

/// 24 V, 40 A continuous, 18 m one way, 45 °C ambient, 3 %: a case of our own, worked by hand.
fn hut_feeder(family: CodeFamily) -> Ask {
    Ask {
        kind: Entry::Typed(Kind::DcFeeder),
        current: Entry::of(40.0),
        voltage: Entry::of(24.0),
        length: Entry::of(18.0),
        ambient: Entry::of(45.0),
        allowed_drop: Entry::of(3.0),
        family: Entry::Typed(family),
        ..Ask::default()
    }
}

fn by_ampacity_alone(mut ask: Ask) -> Ask {
    ask.length = Entry::Blank;
    ask
}

#[test]
fn north_america_breaker_and_conductor_by_terminals() {
    let ask = by_ampacity_alone(hut_feeder(CodeFamily::NorthAmerica));
    let on_75 = size(&Ask { terminals: Entry::Typed(Terminals::At75), ..ask }).unwrap();
    assert_eq!(on_75.protection.rating, Amps::new(50.0));
    assert_eq!(on_75.conductor, Some(alone(Size::Gauge(8))));
    near(on_75.ampacity.unwrap().corrected.get(), 55.0 * 0.87, 1e-9);
    assert_eq!(on_75.ampacity.unwrap().at_terminals, Amps::new(50.0));
    let on_60 = size(&Ask { terminals: Entry::Typed(Terminals::At60), ..ask }).unwrap();
    assert_eq!(on_60.conductor, Some(alone(Size::Gauge(6))));
    // Unmarked terminals to 100 A are taken as 60 °C.
    assert_eq!(size(&ask).unwrap().conductor, on_60.conductor);
}

/// Solid copper by ρ and area. The case was worked with the 75 °C column at the 90 °C column's factor, which puts the
/// conductor 0.7 K cooler than the 90 °C column does: volts agree within a third of a percent.
#[test]
fn north_america_drop_at_the_conductors_own_temperature() {
    let ask = Ask { conductor: Entry::Typed(Conductor::CopperSolid), ..hut_feeder(CodeFamily::NorthAmerica) };
    let answer = size(&ask).unwrap();
    assert_eq!(answer.conductor, Some(alone(Size::Gauge(1))));
    let drop = answer.drop.unwrap();
    near(drop.temperature.get(), 48.8, 1.0);
    near(drop.volts.get(), 0.652, 0.003);
    near(drop.part.get(), 2.7, 0.05);
    near(drop.lost.get(), 26.0, 0.5);
    let two = &answer.thinner[0];
    assert_eq!(two.candidate, alone(Size::Gauge(2)));
    assert_eq!(two.breaks.iter().map(|check| check.id).collect::<Vec<_>>(), [Requirement::Drop]);
    near(two.breaks[0].value.unwrap().number, 3.4, 0.05);
    assert_eq!(answer.thinner[1].candidate, alone(Size::Gauge(3)));
    // Neither enters a 50 A breaker's terminal.
    assert!(!answer.landing.unwrap().enters);
}

#[test]
fn stranded_copper_drops_two_percent_more_with_the_same_verdicts() {
    let answer = size(&hut_feeder(CodeFamily::NorthAmerica)).unwrap();
    assert_eq!(answer.conductor, Some(alone(Size::Gauge(1))));
    near(answer.drop.unwrap().volts.get(), 0.652 * 1.022, 0.003);
    assert_eq!(answer.thinner[0].breaks[0].id, Requirement::Drop);
}

#[test]
fn iec_breaker_and_conductor() {
    let answer = size(&by_ampacity_alone(hut_feeder(CodeFamily::Iec))).unwrap();
    assert_eq!(answer.protection.rating, Amps::new(50.0));
    assert_eq!(answer.conductor, Some(alone(Size::Metric(1600))));
    near(answer.ampacity.unwrap().permitted().get(), 60.0, 0.05);
    let ten = &answer.thinner[0];
    assert_eq!(ten.candidate, alone(Size::Metric(1000)));
    assert_eq!(ten.breaks[0].id, Requirement::Protection);
    near(ten.breaks[0].limit.unwrap().amount.number, 45.0, 0.05);
}

#[test]
fn iec_drop_of_fine_strand() {
    let ask = Ask { conductor: Entry::Typed(Conductor::CopperFine), ..hut_feeder(CodeFamily::Iec) };
    let answer = size(&ask).unwrap();
    assert_eq!(answer.conductor, Some(alone(Size::Metric(5000))));
    let drop = answer.drop.unwrap();
    near(drop.volts.get(), 0.62, 0.005);
    near(drop.part.get(), 2.6, 0.05);
    let thirty_five = &answer.thinner[0];
    assert_eq!(thirty_five.breaks[0].id, Requirement::Drop);
    near(thirty_five.breaks[0].value.unwrap().number, 3.7, 0.05);
    assert!(!answer.landing.unwrap().enters, "50 mm² does not enter a 50 A breaker's terminal");
    assert!(answer.landing.unwrap().ferrule);
}

/// Common practice: four 30 A controllers meet on one plate and go to the bank on one 2 AWG conductor.
#[test]
fn four_controllers_on_one_2_awg() {
    let mut ask = Ask {
        kind: Entry::Typed(Kind::BankMain),
        current: Entry::of(4.0 * 30.0),
        size: Entry::Typed(Size::Gauge(2).area()),
        family: Entry::Typed(CodeFamily::NorthAmerica),
        ..Ask::default()
    };
    let answer = size(&ask).unwrap();
    assert_eq!(answer.load.working, Amps::new(120.0));
    assert_eq!(answer.load.continuous, Amps::new(150.0));
    assert_eq!(answer.protection.rating, Amps::new(150.0));
    let columns: Vec<(f64, f64)> =
        answer.columns.iter().map(|column| (column.bears.get(), column.carries.get())).collect();
    assert_eq!(columns, [(60.0, 95.0), (75.0, 115.0), (90.0, 130.0)]);
    // 115 A on the 75 °C terminals that a 150 A breaker has, against 150 A.
    let ampacity = check(&ask, Requirement::Ampacity);
    assert_eq!(ampacity.verdict, Verdict::Breaks);
    assert_eq!((ampacity.value.unwrap().number, ampacity.limit.unwrap().amount.number), (115.0, 150.0));
    // In free air the conductor itself carries 170 A; its terminals still do not.
    ask.method = Entry::Typed(Method::SinglesInAir);
    ask.insulation = Entry::Typed(Insulation::Bears75);
    let columns: Vec<f64> = size(&ask).unwrap().columns.iter().map(|column| column.carries.get()).collect();
    assert_eq!(columns, [140.0, 170.0, 190.0]);
    assert_eq!(check(&ask, Requirement::Ampacity).verdict, Verdict::Breaks);
    // What would do: 1/0.
    ask = Ask { size: Entry::Blank, method: Entry::Blank, insulation: Entry::Blank, ..ask };
    assert_eq!(size(&ask).unwrap().conductor, Some(alone(Size::Gauge(0))));
}

/// Common practice: 10 AWG carries a 15 to 20 A a.c. output.
#[test]
fn ten_awg_carries_an_ac_output() {
    for amps in [15.0, 20.0] {
        let ask = Ask {
            kind: Entry::Typed(Kind::AcOutput),
            current: Entry::of(amps),
            voltage: Entry::of(120.0),
            length: Entry::of(8.0),
            size: Entry::Typed(Size::Gauge(10).area()),
            family: Entry::Typed(CodeFamily::NorthAmerica),
            ..Ask::default()
        };
        for requirement in [Requirement::Ampacity, Requirement::Protection, Requirement::Drop] {
            assert!(check(&ask, requirement).verdict > Verdict::Asks, "{amps} A: {requirement:?}");
        }
    }
    let twenty = Ask {
        kind: Entry::Typed(Kind::AcOutput),
        current: Entry::of(20.0),
        family: Entry::Typed(CodeFamily::NorthAmerica),
        ..Ask::default()
    };
    assert_eq!(size(&twenty).unwrap().conductor, Some(alone(Size::Gauge(10))));
}

/// Common practice: 12 V branch circuits stand on 5 to 15 A breakers.
#[test]
fn twelve_volt_branches_stand_on_small_breakers() {
    for (watts, rating) in [(40.0, 5.0), (60.0, 10.0), (96.0, 10.0), (144.0, 15.0)] {
        let ask = Ask {
            kind: Entry::Typed(Kind::DcBranch),
            power: Entry::of(watts),
            voltage: Entry::of(12.0),
            family: Entry::Typed(CodeFamily::NorthAmerica),
            ..Ask::default()
        };
        assert_eq!(size(&ask).unwrap().protection.rating, Amps::new(rating), "{watts} W");
    }
}

/// 3 kW on a 24 V bank: 3000 / (0.90 · 21) = 158.73 A, by 1.25 198.4 A: a 200 A breaker.
#[test]
fn an_inverter_draws_most_at_its_lowest_voltage() {
    let ask = Ask {
        kind: Entry::Typed(Kind::InverterFeed),
        power: Entry::of(3000.0),
        voltage: Entry::of(24.0),
        length: Entry::of(1.5),
        family: Entry::Typed(CodeFamily::NorthAmerica),
        ..Ask::default()
    };
    let answer = size(&ask).unwrap();
    near(answer.load.working.get(), 158.7302, 1e-4);
    assert_eq!(answer.protection.rating, Amps::new(200.0));
    // 3/0: 200 A at 75 °C against 198.4 A.
    assert_eq!(answer.conductor, Some(alone(Size::Gauge(-2))));
    // 24 V asks for a 32 V device at least; nothing of 32 V is left above, so the bus's 32 V fits exactly.
    assert_eq!(answer.protection.voltage_asked.unwrap().get(), 32.0);
    let precharge = answer.precharge.unwrap();
    // 24 V / 10 A = 2.4 Ω: the next resistor is 3.3 Ω; 30 mF: 99 ms, five of them half a second.
    assert_eq!(precharge.resistor.get(), 3.3);
    near(precharge.time_constant.get(), 0.099, 1e-9);
    near(precharge.wait.get(), 0.495, 1e-9);
    // 24 V over 3.6 mΩ of bank and the cables: several thousand amperes, more than a 200 A breaker makes onto.
    assert_eq!(check(&ask, Requirement::Precharge).verdict, Verdict::Breaks);
}

/// 12 kW on 24 V: 635 A, by 1.25 794 A: no single conductor to 500 kcmil.
#[test]
fn several_side_by_side_where_one_is_not_enough() {
    let ask = Ask {
        kind: Entry::Typed(Kind::InverterFeed),
        power: Entry::of(12_000.0),
        voltage: Entry::of(24.0),
        family: Entry::Typed(CodeFamily::NorthAmerica),
        ..Ask::default()
    };
    let answer = size(&ask).unwrap();
    let several = answer.conductor.unwrap();
    // 3 × 300 kcmil: 3 × 285 = 855 A ≥ 794 A; 2 × 500: 760 A is not.
    assert_eq!(several, Candidate { size: Size::Kcmil(300), parallel: 3 });
    assert_eq!(answer.protection.rating, Amps::new(800.0));
    assert_eq!(several.to_string(), "3 × 300 kcmil");
}

/// North America, PV array: 2 · 11 A Isc: 1.5625 · 22 = 34.4 A, a 35 A device.
#[test]
fn a_pv_array_by_both_families() {
    let ask = |family| Ask {
        kind: Entry::Typed(Kind::PvArray),
        current: Entry::of(22.0),
        ambient: Entry::of(30.0),
        family: Entry::Typed(family),
        ..Ask::default()
    };
    let north_america = size(&ask(CodeFamily::NorthAmerica)).unwrap();
    near(north_america.load.carried.get(), 27.5, 1e-9);
    near(north_america.load.continuous.get(), 34.375, 1e-9);
    assert_eq!(north_america.protection.rating, Amps::new(35.0));
    // 8 AWG: 40 A on 60 °C terminals; 10 AWG stands on 30 A at most.
    assert_eq!(north_america.conductor, Some(alone(Size::Gauge(8))));
    let iec = size(&ask(CodeFamily::Iec)).unwrap();
    assert_eq!(iec.protection.rating, Amps::new(32.0));
    near(iec.load.device_below.unwrap().get(), 52.8, 1e-9);
}

#[test]
fn a_polarised_breaker_stands_only_where_current_flows_one_way() {
    let ask =
        |kind| Ask { kind: Entry::Typed(kind), breaker_type: Entry::Typed(BreakerType::Polarised), ..Ask::default() };
    assert_eq!(check(&ask(Kind::BankMain), Requirement::Poles).verdict, Verdict::Breaks);
    assert_eq!(check(&ask(Kind::DcBranch), Requirement::Poles).verdict, Verdict::Clears);
    assert_eq!(Requirement::Poles.check(&ask(Kind::AcOutput)), None);
    let fused = Ask { breaker_type: Entry::Typed(BreakerType::Fuse), ..ask(Kind::BankMain) };
    assert_eq!(Requirement::Poles.check(&fused), None);
}

/// 10 AWG of 90 °C insulation on 60 °C terminals: 30 A, 24 A of them for long; at 12 V and 3 % 7.4 m.
#[test]
fn how_far_the_cable_on_the_truck_goes() {
    let ask = Ask {
        kind: Entry::Typed(Kind::DcFeeder),
        voltage: Entry::of(12.0),
        size: Entry::Typed(Size::Gauge(10).area()),
        family: Entry::Typed(CodeFamily::NorthAmerica),
        ..Ask::default()
    };
    let far = reach(&ask).unwrap();
    assert_eq!((far.most, far.rating), (Some(Amps::new(24.0)), Some(Amps::new(30.0))));
    // The length so found drops just what is allowed.
    let there = Ask { current: Entry::of(24.0), length: Entry::Typed(far.length.unwrap()), ..ask };
    near(check(&there, Requirement::Drop).value.unwrap().number, 3.0, 1e-9);
    // And over twice the length less current goes, a little more than half of it, as the conductor is cooler.
    let twice = reach(&Ask { length: Entry::Typed(far.length.unwrap() * 2.0), ..ask }).unwrap();
    let half = twice.amps.unwrap().get();
    assert!((12.0..13.0).contains(&half), "{half}");
    near(twice.watts.unwrap().get(), 12.0 * half, 1e-9);
}

#[test]
fn a_controllers_drop_is_told_for_each_cell() {
    let ask = Ask {
        kind: Entry::Typed(Kind::ControllerOutput),
        current: Entry::of(60.0),
        voltage: Entry::of(48.0),
        length: Entry::of(4.0),
        ..Ask::default()
    };
    let drop = size(&ask).unwrap().drop.unwrap();
    near(drop.per_cell.unwrap().get(), drop.volts.get() / 24.0, 1e-12);
}

#[test]
fn a_blank_run_asks_for_kind_and_current_and_an_unread_entry_is_named() {
    let missing = size(&Ask::default()).unwrap_err();
    assert!(missing.contains(Field::RunKind) && missing.contains(Field::RunCurrent));
    let ask = Ask {
        kind: Entry::Typed(Kind::DcBranch),
        current: Entry::of(8.0),
        voltage: Entry::of(12.0),
        length: Entry::of(3.0),
        breaker: Entry::Unread,
        ..Ask::default()
    };
    assert!(size(&ask).unwrap_err().contains(Field::Breaker));
    // The drop depends on the conductor, and the conductor on the breaker that could not be read.
    assert!(check(&ask, Requirement::Drop).asks.contains(Field::Breaker));
    // With the conductor entered the drop no longer does.
    let sized = Ask { size: Entry::Typed(SquareMillimetres::new(4.0)), ..ask };
    assert!(check(&sized, Requirement::Drop).verdict > Verdict::Asks);
}

#[test]
fn a_hazard_that_rests_on_assumptions_is_close() {
    let mut ask = hut_feeder(CodeFamily::Iec);
    let close = check(&ask, Requirement::Ampacity);
    assert_eq!(close.verdict, Verdict::Close);
    assert!(close.assumed.contains(Field::Terminals) && close.assumed.contains(Field::Method));
    ask = Ask {
        conductor: Entry::Typed(Conductor::CopperStranded),
        insulation: Entry::Typed(Insulation::Pvc70),
        together: Entry::Typed(Count::new(2.0)),
        method: Entry::Typed(Method::Conduit),
        terminals: Entry::Typed(Terminals::At70),
        breaker_type: Entry::Typed(BreakerType::Breaker),
        ..ask
    };
    assert_eq!(check(&ask, Requirement::Ampacity).verdict, Verdict::Clears);
}

#[test]
fn the_working_ends_at_the_value_of_the_check() {
    let ask = hut_feeder(CodeFamily::NorthAmerica);
    for found in assess(&ask) {
        let steps = working(&ask, found.id);
        let Some(value) = found.value else { continue };
        assert!(
            steps.iter().any(|step| step.result == value),
            "{:?}: {value:?} in {:?}",
            found.id,
            steps.iter().map(|step| step.result).collect::<Vec<_>>()
        );
        assert_eq!(steps.last().unwrap().result.unit, Unit::Percent);
    }
}

/// 24 V behind 3.6 mΩ: 1.15 · 24 / 0.0036 = 7,667 A at the breaker.
#[test]
fn what_the_bank_can_drive_against_what_the_breaker_opens() {
    let mut ask = Ask {
        kind: Entry::Typed(Kind::DcFeeder),
        current: Entry::of(40.0),
        voltage: Entry::of(24.0),
        length: Entry::of(2.0),
        bank_resistance: Entry::of(0.0036),
        family: Entry::Typed(CodeFamily::NorthAmerica),
        ..Ask::default()
    };
    assert!(check(&ask, Requirement::BankFault).asks.contains(Field::InterruptingRating));
    ask.interrupting = Entry::of(6000.0);
    let fault = check(&ask, Requirement::BankFault);
    assert_eq!(fault.verdict, Verdict::Breaks);
    near(fault.value.unwrap().number, 7666.667, 0.001);
    ask.interrupting = Entry::of(10_000.0);
    assert!(check(&ask, Requirement::BankFault).verdict > Verdict::Asks);
    let answer = size(&ask).unwrap();
    near(answer.protection.interrupting_asked.unwrap().get(), 7666.667, 0.001);
    assert_eq!(answer.protection.interrupting_rating, Some(Amps::new(10_000.0)));
    assert_eq!(answer.protection.rating, Amps::new(50.0));
    // At the far end of 400 m of it a low bank no longer drives what opens a 50 A breaker: 22.8 V over 72.5 A is 0.31 Ω.
    ask.length = Entry::of(400.0);
    ask.size = Entry::Typed(Size::Gauge(6).area());
    let far = check(&ask, Requirement::BankFault);
    assert_eq!(far.verdict, Verdict::Breaks);
    near(far.limit.unwrap().amount.number, 72.5, 1e-9);
    assert!(far.value.unwrap().number < 72.5);
}

/// A thin wire on a great bank is spoilt before the breaker is open: 1 mm² of copper under PVC, k = 115.
#[test]
fn a_thin_wire_does_not_live_through_the_fault() {
    let ask = Ask {
        kind: Entry::Typed(Kind::DcBranch),
        current: Entry::of(4.0),
        voltage: Entry::of(48.0),
        length: Entry::of(0.5),
        size: Entry::of(1.0),
        breaker: Entry::of(6.0),
        interrupting: Entry::of(20_000.0),
        bank_resistance: Entry::of(0.005),
        ..Ask::default()
    };
    let found = check(&ask, Requirement::BankFault);
    assert_eq!((found.verdict, found.value.unwrap().number), (Verdict::Breaks, 0.02));
    // 55.2 V over 5 mΩ and 2 · 0.5 m of 18.1 mΩ/m: 2,389.6 A; (115 / 2,389.6)² = 2.3 ms.
    near(found.limit.unwrap().amount.number, 0.002_316, 2e-6);
}

#[test]
fn a_fault_arises_only_where_the_bank_drives_it() {
    for kind in Kind::ALL {
        let ask = Ask { kind: Entry::Typed(*kind), ..Ask::default() };
        assert_eq!(Requirement::BankFault.check(&ask).is_some(), kind.on_bank(), "{kind:?}");
    }
}
