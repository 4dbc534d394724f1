//! Worked cases: banks done by hand, with the numbers that a hand gets; and what holds for every bank.

use super::*;
use crate::check::{Check, Origin, Verdict};
use crate::chemistry::Chemistry;
use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::{Quantity, Volts};
use crate::unit::Unit;

#[track_caller]
fn near(found: impl Quantity, wanted: f64, within: f64) {
    assert!((found.number() - wanted).abs() <= within, "found {}, wanted {wanted}", found.number());
}

#[track_caller]
fn check(ask: &Ask, requirement: Requirement) -> Check<Requirement> {
    requirement.check(ask).expect("the requirement arises")
}

#[track_caller]
fn margin(ask: &Ask, requirement: Requirement, wanted: f64) {
    near(check(ask, requirement).margin.expect("a margin"), wanted, 0.0501);
}

/// Words with plain spaces.
fn plain(words: &str) -> String {
    words.replace(crate::show::NARROW, " ")
}

/// Twelve nickel-iron cells of 700 Ah on a bus called 12 V; inverter window 10.5 to 16.0 V.
fn iron() -> Ask {
    Ask {
        chemistry: Entry::Typed(Chemistry::NickelIron),
        cell_voltage: Entry::of(1.2),
        cell_capacity: Entry::of(700.0),
        count: Entry::of(12.0),
        bus_voltage: Entry::of(12.0),
        inverter_low: Entry::of(10.5),
        inverter_high: Entry::of(16.0),
        ..Ask::default()
    }
}

/// Two packs of sixteen LiFePO4 cells, side by side on a 48 V bus.
fn packs() -> Ask {
    Ask {
        chemistry: Entry::Typed(Chemistry::Lfp),
        cell_voltage: Entry::of(51.2),
        cell_capacity: Entry::of(100.0),
        count: Entry::of(2.0),
        series: Entry::of(1.0),
        strings: Entry::of(2.0),
        bus_voltage: Entry::of(48.0),
        inverter_low: Entry::of(44.0),
        inverter_high: Entry::of(64.0),
        pack_charge_limit: Entry::of(50.0),
        pack_discharge_limit: Entry::of(100.0),
        ..Ask::default()
    }
}

/// Eight vented lead blocks of 6 V, 225 Ah, in one string on a 48 V bus.
fn lead() -> Ask {
    Ask {
        chemistry: Entry::Typed(Chemistry::VentedLead),
        cell_voltage: Entry::of(6.0),
        cell_capacity: Entry::of(225.0),
        count: Entry::of(8.0),
        series: Entry::of(8.0),
        strings: Entry::of(1.0),
        bus_voltage: Entry::of(48.0),
        inverter_low: Entry::of(42.0),
        inverter_high: Entry::of(66.0),
        ..Ask::default()
    }
}

#[test]
fn case_c_twelve_cells_break_on_absorb_and_on_equalise() {
    let twelve = iron().with_counts(12, 1);
    let window = window(&twelve).unwrap();
    near(window.lowest, 12.0, 1e-9);
    near(window.absorb, 19.8, 1e-9);
    near(window.equalise.unwrap(), 21.0, 1e-9);
    margin(&twelve, Requirement::WindowHighAbsorb, -23.8);
    margin(&twelve, Requirement::WindowHigh, -31.3);
    assert_eq!(check(&twelve, Requirement::WindowHigh).verdict, Verdict::Breaks);
    assert_eq!(check(&twelve, Requirement::WindowLow).verdict, Verdict::Clears);
}

#[test]
fn case_c_ten_cells_break_at_both_ends() {
    let ten = iron().with_counts(10, 1);
    let window = window(&ten).unwrap();
    near(window.lowest, 10.0, 1e-9);
    near(window.absorb, 16.5, 1e-9);
    near(window.equalise.unwrap(), 17.5, 1e-9);
    margin(&ten, Requirement::WindowHighAbsorb, -3.1);
    margin(&ten, Requirement::WindowHigh, -9.4);
    assert_eq!(check(&ten, Requirement::WindowLow).verdict, Verdict::Breaks);
    let steps = working(&ten, Requirement::WindowLow);
    let cut_off = steps.iter().find(|step| step.what == "The cut-off, a cell").unwrap();
    assert!((cut_off.result.number - 1.05).abs() < 1e-9);
}

#[test]
fn case_c_nine_cells_hold_close_and_leave_capacity_unused() {
    let nine = iron().with_counts(9, 1);
    let window = window(&nine).unwrap();
    near(window.lowest, 9.0, 1e-9);
    near(window.absorb, 14.85, 1e-9);
    near(window.equalise.unwrap(), 15.75, 1e-9);
    margin(&nine, Requirement::WindowHigh, 1.6);
    let high = check(&nine, Requirement::WindowHigh);
    assert_eq!(high.verdict, Verdict::Close);
    assert!(high.assumed.contains(Field::ColdestInTheRoom), "says that no compensation was counted");
    let steps = working(&nine, Requirement::WindowLow);
    let cut_off = steps.iter().find(|step| step.what == "The cut-off, a cell").unwrap();
    assert!((cut_off.result.number - 1.1667).abs() < 1e-4);
    assert_eq!(check(&nine, Requirement::WindowLow).verdict, Verdict::Breaks);
    // With the room said to be at 25 °C it is close by its own margin.
    let warm = Ask {
        coldest: Entry::of(25.0),
        absorb: Entry::of(1.65),
        equalise: Entry::of(1.75),
        compensation: Entry::of(-0.003),
        ..nine
    };
    let high = check(&warm, Requirement::WindowHigh);
    assert!(high.assumed.is_empty());
    assert_eq!(high.verdict, Verdict::Close);
}

#[test]
fn case_c_answers_nine_or_a_wider_window_and_catches_the_trap_in_words() {
    let found = layouts(&iron());
    let best = found.best().unwrap();
    assert_eq!((best.series, best.strings, best.left_over), (9, 1, 3));
    let refused: Vec<u32> = found.rejected.iter().filter(|layout| layout.series > 9).map(|one| one.series).collect();
    assert_eq!(refused, [10, 11, 12]);
    assert_eq!(
        plain(&found.with_series(12).unwrap().reason()),
        "Highest bank voltage against the inverter: 21.0 V, at most 16 V, 31.3 % past it"
    );
    let said = advice(&iron());
    let Advice::CellsAreNotVolts { nominal, absorb, highest, .. } = said[0] else { panic!("{said:?}") };
    near(nominal, 14.4, 1e-9);
    near(absorb, 19.8, 1e-9);
    near(highest, 21.0, 1e-9);
    assert_eq!(
        plain(&said[0].to_string()),
        "12 cells are not 12 V: 12 nickel-iron cells in series are 14.40 V nominal, 19.80 V on absorb and up to 21.0 V."
    );
    assert_eq!(said[1].to_string(), "9 in series, 3 left over.");
    let wider: Vec<u32> = said
        .iter()
        .filter_map(|one| if let Advice::OrWiderWindow { series, .. } = one { Some(*series) } else { None })
        .collect();
    assert_eq!(wider, [10, 12]);
    assert_eq!(
        plain(&said[2].to_string()),
        "Or 10 in series, with devices that run from 10.00 V and tolerate 17.50 V."
    );
}

#[test]
fn a_cold_room_raises_the_charge_voltage_until_the_cap() {
    // 9 · (1.75 V + 3 mV/K · 25 K) = 16.425 V
    let cold = Ask { coldest: Entry::of(0.0), ..iron() }.with_counts(9, 1);
    near(window(&cold).unwrap().highest, 16.425, 1e-9);
    assert_eq!(check(&cold, Requirement::WindowHigh).verdict, Verdict::Breaks);
    let capped = Ask { charge_cap: Entry::of(15.6), ..cold };
    near(window(&capped).unwrap().highest, 15.6, 1e-9);
    assert_eq!(layouts(&capped).best().unwrap().series, 9);
}

#[test]
fn a_cap_that_starves_the_cells_refuses_the_layout() {
    // Twelve cells held to 15.6 V get 1.30 V each, and 1.60 V is the least that fills them.
    let capped = Ask { charge_cap: Entry::of(15.6), ..iron() };
    let found = layouts(&capped);
    assert_eq!(found.with_series(12).unwrap().refused_by().unwrap().id, Requirement::ChargeCap);
    margin(&capped.with_counts(12, 1), Requirement::ChargeCap, -18.75);
    assert_eq!(Requirement::ChargeCap.check(&iron().with_counts(12, 1)), None);
}

#[test]
fn seven_hundred_amp_hours_at_twelve_volts_are_8_4_kwh_and_6_3_at_three_quarters() {
    let ask = Ask { depth_used: Entry::of(75.0), inverter_low: Entry::of(9.0), ..iron() }.with_counts(10, 1);
    let energy = energy(&ask).unwrap();
    near(energy.in_all, 8400.0, 1e-6);
    near(energy.usable, 6300.0, 1e-6);
}

#[test]
fn blocks_are_counted_by_the_cells_inside() {
    let lead = lead();
    let window = window(&lead).unwrap();
    near(window.nominal, 48.0, 1e-9);
    near(window.equalise.unwrap(), 61.92, 1e-9); // 24 · 2.58
    assert_eq!(check(&lead, Requirement::Touch).verdict, Verdict::Breaks);
    let covered = Ask { posts_covered: Entry::Typed(YesNo::Yes), ..lead };
    assert!(check(&covered, Requirement::Touch).verdict > Verdict::Breaks);
    assert_eq!(cells_in_block(Chemistry::Gel, Volts::new(2.0)), Some((1, true)));
    assert_eq!(cells_in_block(Chemistry::Lfp, Volts::new(48.0)), Some((16, false)));
    assert_eq!(cells_in_block(Chemistry::Lfp, Volts::new(3.65)), None);
    assert_eq!(cells_in_block(Chemistry::NickelIron, Volts::new(12.0)), Some((10, true)));
}

#[test]
fn cold_and_rate_lessen_what_can_be_used() {
    // 24 cells · 2 V · 225 Ah = 10.8 kWh; 10 °C: 1/1.19; 2,400 W is 50 A: (225 / (50 · 20))^0.25 = 0.6887; half of it.
    let ask = Ask { coldest: Entry::of(10.0), greatest_load: Entry::of(2400.0), ..lead() };
    let found = energy(&ask).unwrap();
    near(found.in_all, 10_800.0, 1e-6);
    near(found.in_the_cold, 84.03, 0.01);
    near(found.at_the_rate, 68.87, 0.01);
    near(found.usable, 10_800.0 * 0.8403 * 0.6887 * 0.5, 1.0);
    assert_eq!(energy_working(&ask).last().unwrap().result.number, found.usable.get());
    // 225 Ah in 5 h is 45 A.
    let draw = check(&ask, Requirement::DischargeRate);
    near(draw.margin.unwrap(), -11.1, 0.05);
}

#[test]
fn charge_current_lies_between_the_least_and_the_greatest() {
    // 225 Ah: 11.25 A at the least, 45 A at most.
    let at = |amps: f64| Ask { charge_current: Entry::of(amps), ..lead() };
    assert_eq!(check(&at(8.0), Requirement::ChargeRateLeast).verdict, Verdict::Breaks);
    assert_eq!(check(&at(30.0), Requirement::ChargeRateLeast).verdict, Verdict::Clears);
    assert_eq!(check(&at(45.0), Requirement::ChargeRate).verdict, Verdict::Clears);
    assert_eq!(check(&at(46.0), Requirement::ChargeRate).verdict, Verdict::Breaks);
    assert_eq!(Requirement::ChargeRateLeast.check(&packs()), None);
}

#[test]
fn packs_hold_and_hold_with_one_out() {
    // Lowest in use 16 · 2.8 = 44.8 V, above the cut-off: 8,064 W are 180 A of 200 A; of 100 A with one pack out.
    let ask = Ask { greatest_load: Entry::of(8064.0), charge_current: Entry::of(80.0), ..packs() };
    margin(&ask, Requirement::Hold, 10.0);
    margin(&ask, Requirement::HoldOneOut, -80.0);
    margin(&ask, Requirement::HoldCharge, 20.0);
    assert_eq!(check(&ask, Requirement::HoldChargeOneOut).verdict, Verdict::Breaks);
    // A start of 13.44 kW is 300 A: the peak of 2 · 200 A takes it for 10 s and no longer.
    let start = |seconds: f64| Ask {
        starting_load: Entry::of(13_440.0),
        starting_time: Entry::of(seconds),
        pack_peak: Entry::of(200.0),
        pack_peak_time: Entry::of(10.0),
        ..ask
    };
    margin(&start(5.0), Requirement::HoldStart, 25.0);
    margin(&start(12.0), Requirement::HoldStart, -50.0);
    assert_eq!(Requirement::Hold.check(&iron().with_counts(9, 1)), None, "bare cells have nothing that opens");
}

#[test]
fn with_the_bank_gone_the_weakest_device_decides() {
    let asks = check(&packs(), Requirement::Orphan);
    assert!(asks.verdict == Verdict::Asks && asks.asks.contains(Field::ControllerOutputLimit));
    let ask = Ask { controller_output_limit: Entry::of(62.0), ..packs() };
    assert_eq!(check(&ask, Requirement::Orphan).verdict, Verdict::Clears);
    let with_loads = Ask { loads_high: Entry::of(60.0), ..ask };
    margin(&with_loads, Requirement::Orphan, -3.3);
}

#[test]
fn an_empty_lead_bank_freezes_where_a_full_one_does_not() {
    let at = |charge: f64| Ask { coldest: Entry::of(-20.0), lowest_charge: Entry::of(charge), ..lead() };
    let empty = check(&at(0.0), Requirement::Cold);
    assert_eq!(empty.verdict, Verdict::Breaks);
    assert_eq!(empty.value.unwrap().unit, Unit::DegreeCelsius);
    near(crate::quantity::Celsius::new(empty.limit.unwrap().amount.number), -10.3, 0.1);
    assert_eq!(check(&at(90.0), Requirement::Cold).verdict, Verdict::Clears);
}

#[test]
fn lithium_below_five_degrees_is_a_hazard_and_with_a_lock_a_loss() {
    let cold = Ask { coldest: Entry::of(0.0), ..packs() };
    assert_eq!(check(&cold, Requirement::ColdCharge).verdict, Verdict::Breaks);
    assert_eq!(Requirement::ColdLock.check(&cold), None);
    let locked = Ask { pack_cold_lock: Entry::of(5.0), ..cold };
    assert_eq!(Requirement::ColdCharge.check(&locked), None);
    let lock = check(&locked, Requirement::ColdLock);
    assert_eq!((lock.verdict, lock.cost), (Verdict::Breaks, crate::check::Cost::Loss));
    let useless = Ask { pack_cold_lock: Entry::of(-20.0), ..cold };
    assert_eq!(check(&useless, Requirement::ColdCharge).verdict, Verdict::Breaks);
}

#[test]
fn air_and_water_of_lead_of_nickel_iron_and_of_lithium() {
    // Lead: 20 mA/Ah · 225 Ah = 4.5 A; 0.05 · 24 · 4.5 = 5.4 m³/h; 151.2 cm²; 28.8 mm · ∛3 · ∛4500.
    let found = air_and_water(&lead()).unwrap();
    near(found.flow.unwrap(), 5.4, 1e-9);
    near(found.opening.unwrap(), 151.2, 1e-9);
    near(found.keep_clear.unwrap(), 0.0288 * 3f64.cbrt() * 4500f64.cbrt(), 1e-12);
    assert!(found.within_the_standard);
    let there = |area: f64| Ask { air_opening: Entry::of(area), ..lead() };
    assert_eq!(check(&there(150.0), Requirement::Air).verdict, Verdict::Breaks);
    assert_eq!(check(&there(152.0), Requirement::Air).verdict, Verdict::Clears);

    // Nickel-iron: all of 100 A, nine cells: 45 m³/h.
    let ask = Ask { charge_current: Entry::of(100.0), used_a_day: Entry::of(3780.0), ..iron() };
    let found = air_and_water(&ask).unwrap();
    near(found.flow.unwrap(), 45.0, 1e-9);
    assert!(!found.within_the_standard);
    // 3,780 Wh / 10.8 V = 350 Ah a day; at 60 %: 233.3 Ah over; 0.336087 g · 9 · 233.3 · 30 = 21.2 L.
    near(found.water_a_month.unwrap().greatest, 21.17, 0.01);
    // At 85 %: 61.76 Ah over: 5.6 L.
    near(found.water_a_month.unwrap().least, 5.605, 0.01);

    let found = air_and_water(&packs()).unwrap();
    assert_eq!((found.flow, found.water_a_month, found.freezes_at), (None, None, None));
    let sleeps = Ask { sleeping_room: Entry::Typed(YesNo::Yes), ..packs() };
    assert_eq!(check(&sleeps, Requirement::AirSleeping).verdict, Verdict::Breaks);
    assert_eq!(check(&packs(), Requirement::AirSleeping).verdict, Verdict::Close);
}

#[test]
fn the_card_counts_cells_and_says_what_to_switch_off() {
    let card = settings(&Ask { coldest: Entry::of(5.0), warmest: Entry::of(35.0), ..lead() }).unwrap();
    let number = |name: &str| card.line(name).unwrap().amount.unwrap().number;
    assert!((number("Absorb") - 58.8).abs() < 1e-9); // 24 · 2.45
    assert!((number("Compensation") - -96.0).abs() < 1e-9); // 24 · 4 mV/K
    assert!((number("Absorb at the coldest") - 60.72).abs() < 1e-9); // + 20 K · 96 mV/K
    assert!((number("Absorb at the warmest") - 57.84).abs() < 1e-9);
    assert!((number("Cut-off") - 48.0).abs() < 1e-9); // half charge, 2.00 V a cell under load
    assert!(number("Back on") > number("Cut-off") && number("Last cut-off") < number("Cut-off"));
    assert!((number("Charge current, all chargers") - 45.0).abs() < 1e-9);
    let card = settings(&packs()).unwrap();
    assert_eq!(card.line("Equalise").unwrap().amount, None);
    assert_eq!(card.line("Compensation").unwrap().amount, None);
    assert!((card.line("Charge current, all chargers").unwrap().amount.unwrap().number - 100.0).abs() < 1e-9);
}

#[test]
fn the_working_ends_in_the_margin_and_names_every_entry() {
    let steps = working(&iron().with_counts(9, 1), Requirement::WindowHigh);
    let last = steps.last().unwrap();
    assert_eq!(last.what, "Margin to the limit");
    assert!((last.result.number - 1.5625).abs() < 1e-9);
    assert!(steps.iter().any(|step| step.origin == Origin::Assumed(Field::CellEqualise)));
    assert!(steps.iter().any(|step| step.origin == Origin::Entered(Field::InverterHigh)));
}

#[test]
fn nothing_entered_asks_and_unread_is_never_taken_as_blank() {
    assert!(assess(&Ask::default()).iter().all(|check| check.verdict == Verdict::Asks));
    assert_eq!(layouts(&Ask::default()), Layouts::default());
    let unread = Ask { equalise: Entry::Unread, ..iron() }.with_counts(9, 1);
    let high = check(&unread, Requirement::WindowHigh);
    assert!(high.verdict == Verdict::Asks && high.asks.contains(Field::CellEqualise));
}

#[test]
fn forty_lithium_cells_on_a_48_volt_bus_make_strings_that_fit() {
    let ask = Ask {
        chemistry: Entry::Typed(Chemistry::Lfp),
        cell_voltage: Entry::of(3.2),
        cell_capacity: Entry::of(280.0),
        count: Entry::of(40.0),
        bus_voltage: Entry::of(48.0),
        inverter_low: Entry::of(44.0),
        inverter_high: Entry::of(57.6),
        ..Ask::default()
    };
    let found = layouts(&ask);
    let best = found.best().unwrap();
    assert_eq!((best.series, best.strings, best.left_over), (16, 2, 8));
    assert_eq!(found.with_series(20).unwrap().refused_by().unwrap().id, Requirement::WindowHigh);
    assert_eq!(found.with_series(4).unwrap().refused_by().unwrap().id, Requirement::WindowLow);
    assert_eq!(found.ranked.len() + found.rejected.len(), 40);
}

/// Three strings of sixteen LiFePO4 cells of 100 Ah, 0.2 mΩ each at the least: 3.2 mΩ a string; ties of 0.265 mΩ.
/// Same end, by hand: with b = 2 · 0.265 = 0.53 mΩ a step, R = 3.2: strings 2 and 3 from the far end carry
/// 1 and 1 + b/R = 1.165625; the first 1.165625 + (2.165625) · b/R = 1.524306; even share 1.229977.
#[test]
fn strings_taken_off_at_one_end_do_not_share_alike() {
    let ask = Ask { strings: Entry::of(3.0), count: Entry::of(3.0), ..packs() };
    let worst = check(&ask, Requirement::Sharing);
    assert!((worst.value.unwrap().number - 100.0 * 1.524_306 / 1.229_977).abs() < 0.001, "{worst:?}");
    assert_eq!(worst.verdict, Verdict::Breaks);
    let across = Ask { take_off: Entry::Typed(crate::sharing::Arrangement::OppositeEnds), ..ask };
    assert_eq!(check(&across, Requirement::Sharing).verdict, Verdict::Clears);
    assert_eq!(Requirement::Sharing.check(&lead()), None);
}

/// The same three strings in full: 1 : 1.165625 : 1.524306 from the far end, and every take-off's own worst.
#[test]
fn every_take_off_says_what_each_string_carries() {
    let ask = Ask { strings: Entry::of(3.0), count: Entry::of(3.0), ..packs() };
    let found = shares(&ask).unwrap();
    let sum = 1.0 + 1.165_625 + 1.524_306;
    for (percent, wanted) in found[0].over_even.iter().zip([1.524_306, 1.165_625, 1.0]) {
        near(*percent, 300.0 * wanted / sum, 0.001);
    }
    for one in &found {
        let arranged = Ask { take_off: Entry::Typed(one.take_off), ..ask };
        assert_eq!(Some(one.hardest.amount()), check(&arranged, Requirement::Sharing).value, "{one:?}");
        near(one.over_even.iter().copied().sum::<crate::quantity::Percent>(), 300.0, 1e-6);
    }
    assert!(found[1].hardest < found[0].hardest && found[2].hardest < found[0].hardest);
    assert_eq!(shares(&lead()), None);
}

/// Twelve cells in four strings: three in series each, and three again where only the strings are entered.
#[test]
fn counts_that_were_entered_are_kept_and_what_is_left_over_or_short_is_said() {
    let entered = |series, strings| Layout::of(&Ask { series, strings, ..iron() }).unwrap();
    let blank = Entry::Blank;
    let layout = entered(Entry::of(5.0), blank);
    assert_eq!((layout.strings, layout.left_over, layout.short), (2, 2, 0));
    let layout = entered(Entry::of(9.0), Entry::of(2.0));
    assert_eq!((layout.left_over, layout.short), (0, 6));
    let found = layouts(&Ask { strings: Entry::of(2.0), count: Entry::of(21.0), ..iron() });
    assert_eq!(found.ranked.len() + found.rejected.len(), 10);
    let best = found.best().unwrap();
    assert_eq!((best.series, best.strings, best.left_over), (9, 2, 3));
}

/// The order does not hang on the capacity, and a count that the cut-off lets nothing be drawn from never stands.
#[test]
fn without_a_capacity_the_same_layouts_stand() {
    for ask in [iron(), packs(), lead(), Ask { count: Entry::of(40.0), ..lead() }] {
        let without = layouts(&Ask { cell_capacity: Entry::Blank, ..ask });
        let of = |found: &[Layout]| found.iter().map(|one| (one.series, one.strings)).collect::<Vec<_>>();
        let with = layouts(&ask);
        assert_eq!(of(&without.rejected), of(&with.rejected));
        assert_eq!(without.best().map(|one| one.series), with.best().map(|one| one.series));
    }
}

#[test]
fn the_refused_that_come_nearest_stand_first() {
    let found = layouts(&iron());
    let nearest: Vec<u32> = found.nearest(3).iter().map(|layout| layout.series).collect();
    assert_eq!(nearest, [10, 11, 12]);
    assert_eq!(found.nearest(99).len(), found.rejected.len());
}

#[test]
fn the_working_of_the_card_ends_in_its_first_line() {
    let steps = settings_working(&lead());
    let card = settings(&lead()).unwrap();
    assert_eq!(steps.last().map(|step| step.result), card.line("Absorb").unwrap().amount);
}

#[test]
fn packs_half_a_volt_apart_rush_into_each_other() {
    // 0.5 V over 3.2 + 3.2 + 2 · 0.265 = 6.93 mΩ is 72.2 A, into a pack that takes 50 A.
    let ask = Ask { volts_apart: Entry::of(0.5), ..packs() };
    let rush = check(&ask, Requirement::Join);
    assert!((rush.value.unwrap().number - 72.15).abs() < 0.01, "{rush:?}");
    assert_eq!(rush.verdict, Verdict::Breaks);
    let asks = check(&packs(), Requirement::Join);
    assert!(asks.verdict == Verdict::Asks && asks.asks.contains(Field::VoltsApart));
    let alike = Ask { volts_apart: Entry::of(0.0), ..packs() };
    assert_eq!(check(&alike, Requirement::Join).verdict, Verdict::Close, "rests on the assumed tie");
}
