//! Cells: charge and voltage, frost, cold, rate, gas and water, and the ranges of eight chemistries.

use engine::bank::{Advice, Ask, Requirement, advice, air_and_water, energy, layouts};
use engine::chemistry::{
    Chemistry, Family, Figure, Freezing, Gas, HYDROGEN_PER_AMP_HOUR, Span, WATER_GRAMS_PER_AMP_HOUR, acid_freezing,
    acid_gravity, air_flow, charge_at_rest, freezing_point, gas_current, hours_at, keep_clear, natural_opening, rested,
    rested_at_reference, size_factor, water_split,
};
use engine::entry::Entry;
use engine::quantity::{AmpHours, Amps, Celsius, Hours, MilliampsPerAmpHour, Percent, Volts};
use published::{Source, table};
use serde::Deserialize;

const DATA: &str = include_str!("../data/batteries.toml");

#[track_caller]
fn near(found: f64, wanted: f64, within: f64, source: &Source) {
    assert!((found - wanted).abs() <= within, "found {found}, published {wanted}: {source}");
}

#[derive(Deserialize)]
struct Charge {
    soc_percent: f64,
    volt_12v: f64,
    volt_cell: f64,
    specific_gravity: f64,
}

#[test]
fn rested_lead_tells_its_charge() {
    for row in table::<Charge>(DATA, "lead_acid_soc") {
        let charge = Percent::new(row.says.soc_percent);
        // The volts of a cell are printed to four digits, a sixth of the battery's to two.
        near(rested(Chemistry::VentedLead, charge).get(), row.says.volt_cell, 1e-9, &row.source);
        near(rested(Chemistry::VentedLead, charge).get() * 6.0, row.says.volt_12v, 0.0006, &row.source);
        near(acid_gravity(charge), row.says.specific_gravity, 1e-9, &row.source);
        let (reading, warm) = (Volts::new(row.says.volt_cell), Celsius::new(26.7));
        let read = charge_at_rest(Chemistry::VentedLead, reading, warm, Volts::new(0.0));
        near(read.likely.get(), row.says.soc_percent, 1e-6, &row.source);
    }
}

#[derive(Deserialize)]
struct Correction {
    reference_degc: f64,
    step_k: f64,
    volt_12v_per_step_above: f64,
}

#[test]
fn a_reading_is_corrected_for_temperature() {
    for row in table::<Correction>(DATA, "lead_acid_reading_correction") {
        let warmer = Celsius::new(row.says.reference_degc + row.says.step_k);
        let corrected = rested_at_reference(Chemistry::VentedLead, Volts::new(2.0), warmer);
        near((corrected.get() - 2.0) * 6.0, row.says.volt_12v_per_step_above, 1e-9, &row.source);
    }
}

#[derive(Deserialize)]
struct Freezes {
    specific_gravity: f64,
    freezing_degc: [f64; 2],
}

#[test]
fn acid_freezes_by_its_strength() {
    for row in table::<Freezes>(DATA, "electrolyte_freezing") {
        let found = acid_freezing(row.says.specific_gravity).get();
        let [coldest, warmest] = row.says.freezing_degc;
        assert!((coldest..=warmest).contains(&found), "{found}, {}: {}", row.says.specific_gravity, row.source);
    }
}

#[derive(Deserialize)]
struct Disputed {
    specific_gravity: f64,
    freezing_degc: f64,
}

/// On purpose: the column printed beside tables of charge is colder, the unsafe side. Ours is never colder than it.
#[test]
fn the_disputed_freezing_column_is_never_trusted() {
    for row in table::<Disputed>(DATA, "electrolyte_freezing_disputed") {
        let found = acid_freezing(row.says.specific_gravity).get();
        if row.says.specific_gravity < 1.26 {
            assert!(found > row.says.freezing_degc + 8.0, "{found}: {}", row.source);
        }
    }
    let empty = freezing_point(Chemistry::VentedLead, Percent::new(0.0)).unwrap();
    assert!(empty.get() > -12.0, "an empty bank freezes in an ordinary winter");
}

#[derive(Deserialize)]
struct LeadFactor {
    t_degc: f64,
    factor: f64,
}

#[test]
fn lead_needs_more_in_the_cold() {
    let rows = table::<LeadFactor>(DATA, "ieee485_factor");
    assert_eq!(rows.len(), 41);
    for row in rows {
        for chemistry in [Chemistry::VentedLead, Chemistry::Agm, Chemistry::Gel] {
            let found = size_factor(chemistry, Celsius::new(row.says.t_degc));
            // Between the steps of 5 °F a straight line stands for the table's single degrees, which are rounded.
            near(found, row.says.factor, 0.002, &row.source);
        }
    }
}

#[derive(Deserialize)]
struct NickelFactor {
    t_degc: f64,
    factor: [f64; 2],
}

#[test]
fn nickel_cadmium_needs_no_less_than_the_upper_end() {
    for row in table::<NickelFactor>(DATA, "nicd_size_factor") {
        let found = size_factor(Chemistry::NickelCadmium, Celsius::new(row.says.t_degc));
        near(found, row.says.factor[1], 1e-9, &row.source);
    }
}

#[derive(Deserialize)]
struct Ranges {
    name: String,
    nominal_volt: f64,
    float_volt: Option<[f64; 2]>,
    absorb_volt: [f64; 2],
    equalise_volt: Option<[f64; 2]>,
    greatest_volt: Option<f64>,
    end_discharge_volt: [f64; 2],
    charge_coeff_mv_per_k: Option<[f64; 2]>,
    self_discharge_percent_month: [f64; 2],
    coulombic_efficiency: [f64; 2],
    energy_efficiency: [f64; 2],
    peukert: [f64; 2],
    daily_depth_percent: [f64; 2],
    greatest_depth_percent: f64,
    charge_degc: [f64; 2],
    discharge_degc: Option<[f64; 2]>,
    milliohm_at_100ah: [f64; 2],
}

fn named(name: &str) -> Chemistry {
    match name {
        "vented lead-acid" => Chemistry::VentedLead,
        "AGM lead-acid" => Chemistry::Agm,
        "gel lead-acid" => Chemistry::Gel,
        "nickel-iron" => Chemistry::NickelIron,
        "nickel-cadmium vented" => Chemistry::NickelCadmium,
        "LiFePO4" => Chemistry::Lfp,
        "NMC lithium-ion" => Chemistry::Nmc,
        "sodium-ion" => Chemistry::SodiumIon,
        other => panic!("{other} is not known"),
    }
}

/// The engine's range is the published one, and the chosen value lies in it.
#[track_caller]
fn lies_in<Q: Copy + PartialOrd>(figure: Figure<Q>, number: impl Fn(Q) -> f64, wanted: [f64; 2], source: &Source) {
    span(figure.range, &number, wanted, source);
    assert!(figure.range.holds(figure.chosen), "chosen {}: {source}", number(figure.chosen));
    assert!(!figure.why.is_empty());
}

#[track_caller]
fn span<Q: Copy>(range: Span<Q>, number: impl Fn(Q) -> f64, wanted: [f64; 2], source: &Source) {
    near(number(range.least), wanted[0], 1e-9, source);
    near(number(range.greatest), wanted[1], 1e-9, source);
}

#[test]
fn every_chosen_figure_lies_in_its_published_range() {
    let rows = table::<Ranges>(DATA, "chemistry");
    assert_eq!(rows.len(), Chemistry::ALL.len());
    for row in rows {
        let (says, source) = (row.says, &row.source);
        let figures = named(&says.name).figures();
        near(figures.nominal.get(), says.nominal_volt, 1e-9, source);
        lies_in(figures.end, Volts::get, says.end_discharge_volt, source);
        lies_in(figures.absorb, Volts::get, says.absorb_volt, source);
        assert_eq!(figures.float.is_some(), says.float_volt.is_some(), "{}", says.name);
        if let (Some(figure), Some(range)) = (figures.float, says.float_volt) {
            lies_in(figure, Volts::get, range, source);
        }
        assert_eq!(figures.equalise.is_some(), says.equalise_volt.is_some(), "{}", says.name);
        if let (Some(figure), Some(range)) = (figures.equalise, says.equalise_volt) {
            lies_in(figure, Volts::get, range, source);
        }
        assert_eq!(figures.never_above.map(Volts::get), says.greatest_volt, "{}", says.name);
        assert_eq!(figures.compensation.is_some(), says.charge_coeff_mv_per_k.is_some(), "{}", says.name);
        if let (Some(figure), Some(range)) = (figures.compensation, says.charge_coeff_mv_per_k) {
            lies_in(figure, |per_kelvin| per_kelvin.get() * 1000.0, range, source);
        }
        lies_in(figures.self_discharge, Percent::get, says.self_discharge_percent_month, source);
        lies_in(figures.coulomb_efficiency, Percent::share, says.coulombic_efficiency, source);
        span(figures.energy_efficiency, Percent::share, says.energy_efficiency, source);
        lies_in(figures.peukert, |exponent| exponent, says.peukert, source);
        lies_in(figures.depth_used, Percent::get, says.daily_depth_percent, source);
        near(figures.greatest_depth.get(), says.greatest_depth_percent, 1e-9, source);
        let lowest = figures.charging.lowest.chosen.get();
        assert!((says.charge_degc[0]..says.charge_degc[1]).contains(&lowest), "{}: {source}", says.name);
        near(figures.charging.lowest.range.least.get(), says.charge_degc[0], 1e-9, source);
        near(figures.charging.highest.get(), says.charge_degc[1], 1e-9, source);
        if let (Some(range), Some(wanted)) = (figures.discharging, says.discharge_degc) {
            span(range, Celsius::get, wanted, source);
        }
        span(figures.resistance_at_100_ah, |ohms| ohms.get() * 1000.0, says.milliohm_at_100ah, source);
    }
}

/// Whatever the digits: the order that a cell's voltages stand in. It catches a slipped digit.
#[test]
fn the_voltages_of_every_chemistry_stand_in_their_order() {
    for chemistry in Chemistry::ALL {
        let figures = chemistry.figures();
        for curve in [figures.rest, figures.on_load] {
            assert!(curve.windows(2).all(|pair| pair[0].0 < pair[1].0 && pair[0].1 < pair[1].1), "{chemistry:?}");
            assert_eq!(curve.first().map(|point| point.0.get()), Some(0.0));
            assert_eq!(curve.last().map(|point| point.0.get()), Some(100.0));
        }
        assert_eq!(figures.on_load[0].1, figures.end.chosen, "{chemistry:?}: an empty cell stands at its end");
        for charge in 0..=100 {
            let charge = Percent::new(f64::from(charge));
            assert!(figures.loaded(charge) <= rested(*chemistry, charge), "{chemistry:?} {charge:?}: a load lowers it");
        }
        assert!(figures.end.chosen < figures.nominal && figures.nominal < figures.absorb.chosen, "{chemistry:?}");
        assert!(figures.float.is_none_or(|float| float.chosen < figures.absorb.chosen), "{chemistry:?}");
        assert!(figures.equalise.is_none_or(|equalise| equalise.chosen > figures.absorb.chosen), "{chemistry:?}");
        assert!(figures.never_above.is_none_or(|never| never >= figures.absorb.range.greatest), "{chemistry:?}");
        assert!(
            figures.least_charge.is_none_or(|least| least.chosen > figures.greatest_charge.chosen),
            "{chemistry:?}"
        );
        assert!(figures.size_factor.windows(2).all(|pair| pair[0].0 < pair[1].0), "{chemistry:?}");
        for rate in [Some(figures.greatest_charge), Some(figures.greatest_discharge), figures.least_charge] {
            assert!(rate.is_none_or(|rate| rate.range.holds(rate.chosen)), "{chemistry:?} {rate:?}");
        }
        let lithium = chemistry.family() == Family::Lithium;
        assert_eq!(figures.gas == Gas::Nothing, lithium, "{chemistry:?}");
        assert_eq!(figures.freezing == Freezing::Nothing, lithium, "{chemistry:?}");
        // Common practice: lithium is charged to the same voltage warm and cold, never equalised, from +5 °C.
        assert_eq!(figures.compensation.is_none(), lithium, "{chemistry:?}");
    }
    for chemistry in [Chemistry::Lfp, Chemistry::Nmc] {
        assert_eq!(chemistry.figures().charging.lowest.chosen, Celsius::new(5.0));
        assert_eq!(chemistry.figures().equalise, None);
    }
}

#[derive(Deserialize)]
struct Formula {
    dilution_v: f64,
    h2_m3_per_ah: f64,
    safety_s: f64,
    product_printed: f64,
}

/// IEC 62485-2, 7.2: the printed 0.05 is 24 · 0.42e-3 · 5 rounded down from 0.0504.
#[test]
fn the_ventilation_product_is_the_printed_one() {
    for row in table::<Formula>(DATA, "ventilation_formula") {
        let says = row.says;
        near(air_flow(1, Amps::new(1.0)).get(), says.product_printed, 1e-12, &row.source);
        near(says.product_printed, says.dilution_v * says.h2_m3_per_ah * says.safety_s, 0.0005, &row.source);
        near(HYDROGEN_PER_AMP_HOUR.get() / 1000.0, says.h2_m3_per_ah, 2e-6, &row.source);
    }
}

#[derive(Deserialize)]
struct GasRow {
    name: String,
    igas_float_ma_per_ah: f64,
    igas_boost_ma_per_ah: f64,
}

#[test]
fn gassing_currents_are_those_of_the_standard() {
    for row in table::<GasRow>(DATA, "ventilation_igas") {
        let chemistries: &[Chemistry] = match row.says.name.as_str() {
            "valve-regulated lead-acid" => &[Chemistry::Agm, Chemistry::Gel],
            "vented nickel-cadmium" => &[Chemistry::NickelCadmium],
            _ => &[Chemistry::VentedLead],
        };
        for chemistry in chemistries {
            let Gas::Standard { float, boost, .. } = chemistry.figures().gas else { panic!("{chemistry:?}") };
            near(float.get(), row.says.igas_float_ma_per_ah, 1e-12, &row.source);
            near(boost.get(), row.says.igas_boost_ma_per_ah, 1e-12, &row.source);
        }
    }
    // Outside the standard: all of the charge current is taken to gas.
    assert!(matches!(Chemistry::NickelIron.figures().gas, Gas::WholeCurrent { .. }));
}

#[derive(Deserialize)]
struct Room {
    cells: u32,
    igas_ma_per_ah: f64,
    crt_ah: f64,
    cells_per_block: u32,
    q_m3_per_h: f64,
    opening_cm2: f64,
    distance_mm: f64,
    distance_block_mm: f64,
}

#[test]
fn rooms_are_aired_by_the_standard() {
    for row in table::<Room>(DATA, "ventilation_case") {
        let says = row.says;
        let gassing = gas_current(MilliampsPerAmpHour::new(says.igas_ma_per_ah), AmpHours::new(says.crt_ah));
        let flow = air_flow(says.cells, gassing);
        near(flow.get(), says.q_m3_per_h, 1e-9, &row.source);
        near(natural_opening(flow).get(), says.opening_cm2, 1e-9, &row.source);
        // Distances are kept to the micrometre.
        near(keep_clear(1, gassing).get() * 1000.0, says.distance_mm, 0.0006, &row.source);
        near(keep_clear(says.cells_per_block, gassing).get() * 1000.0, says.distance_block_mm, 0.0006, &row.source);
    }
}

/// The first case again, through the tool: 24 vented cells of 500 Ah, boosted.
#[test]
fn the_tool_airs_a_room_as_the_formula_does() {
    let case = &table::<Room>(DATA, "ventilation_case")[0];
    let ask = Ask {
        chemistry: Entry::Typed(Chemistry::VentedLead),
        cell_voltage: Entry::of(2.0),
        cell_capacity: Entry::of(500.0),
        ..Ask::default()
    };
    let found = air_and_water(&ask.with_counts(24, 1)).unwrap();
    near(found.flow.unwrap().get(), case.says.q_m3_per_h, 1e-9, &case.source);
    near(found.opening.unwrap().get(), case.says.opening_cm2, 1e-9, &case.source);
    near(found.keep_clear.unwrap().get() * 1000.0, case.says.distance_mm, 0.0006, &case.source);
}

#[derive(Deserialize)]
struct Faraday {
    water_gram_per_ah: f64,
    h2_litre_per_ah_0c: f64,
}

#[test]
fn water_and_hydrogen_follow_faraday() {
    for row in table::<Faraday>(DATA, "faraday") {
        near(WATER_GRAMS_PER_AMP_HOUR, row.says.water_gram_per_ah, 5e-7, &row.source);
        near(HYDROGEN_PER_AMP_HOUR.get(), row.says.h2_litre_per_ah_0c, 5e-7, &row.source);
        let litres = water_split(AmpHours::new(1000.0), 12).get();
        near(litres, 12.0 * row.says.water_gram_per_ah, 1e-5, &row.source);
    }
}

#[derive(Deserialize)]
struct Rate {
    rated_hours: f64,
    rated_ah: f64,
    exponent: f64,
    amp: f64,
    hours: f64,
    delivered_ah: f64,
}

#[test]
fn a_faster_draw_gives_less() {
    for row in table::<Rate>(DATA, "peukert_case") {
        let says = row.says;
        let current = Amps::new(says.amp);
        let lasts = hours_at(AmpHours::new(says.rated_ah), Hours::new(says.rated_hours), says.exponent, current);
        near(lasts.get(), says.hours, 5e-7, &row.source);
        near((current * lasts).get(), says.delivered_ah, 5e-6, &row.source);
    }
}

/// Facts of the trade; common practice, no one publication behind them.
mod common_practice {
    use super::*;

    #[test]
    fn usable_depths_are_about_half_three_quarters_and_nine_tenths() {
        let depth = |chemistry: Chemistry| chemistry.figures().depth_used;
        assert_eq!(depth(Chemistry::VentedLead).chosen, Percent::new(50.0));
        assert!(depth(Chemistry::NickelIron).range.holds(Percent::new(75.0)));
        assert!((depth(Chemistry::NickelIron).chosen.get() - 75.0).abs() <= 5.0);
        assert_eq!(depth(Chemistry::Lfp).range.greatest, Percent::new(90.0));
        assert!(depth(Chemistry::Lfp).chosen <= Percent::new(90.0));
    }

    /// Cells of 700 Ah whose nominal voltages add up to 12 V.
    #[test]
    fn seven_hundred_amp_hours_at_12_v_are_8_4_kwh_in_all_and_6_3_at_three_quarters() {
        let ask = Ask {
            chemistry: Entry::Typed(Chemistry::NickelIron),
            cell_voltage: Entry::of(1.2),
            cell_capacity: Entry::of(700.0),
            depth_used: Entry::of(75.0),
            ..Ask::default()
        };
        let found = energy(&ask.with_counts(10, 1)).unwrap();
        assert!((found.in_all.get() - 8400.0).abs() < 1e-6);
        assert!((found.usable.get() - 6300.0).abs() < 1e-6);
    }

    /// Twelve cells are not twelve volts: all twelve in series are refused, and the worst of it is said.
    #[test]
    fn twelve_nickel_iron_cells_do_not_go_on_a_12_v_bus() {
        let ask = Ask {
            chemistry: Entry::Typed(Chemistry::NickelIron),
            cell_voltage: Entry::of(1.2),
            cell_capacity: Entry::of(700.0),
            count: Entry::of(12.0),
            bus_voltage: Entry::of(12.0),
            ..Ask::default()
        };
        let found = layouts(&ask);
        let twelve = found.with_series(12).unwrap();
        assert_eq!(twelve.refused_by().unwrap().id, Requirement::WindowHigh);
        assert_eq!(found.best().unwrap().series, 9);
        assert!(matches!(advice(&ask)[0], Advice::CellsAreNotVolts { .. }));
    }
}
