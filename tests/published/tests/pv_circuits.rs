//! Cold voltages, currents and fuses of PV circuits, against the figures of both code families.

use engine::entry::Entry;
use engine::family::{CodeFamily, Stands, cold_factor};
use engine::module::VoltageCoefficient;
use engine::quantity::{Amps, Celsius, Count, Percent, PercentPerKelvin, Volts};
use engine::string::{Ask, cold_voltage, string_fuses};
use published::table;
use serde::Deserialize;

const DATA: &str = include_str!("../data/pv_circuits.toml");

#[derive(Deserialize)]
struct Factor {
    from_degc: f64,
    to_degc: f64,
    factor: f64,
}

/// Every whole degree from the warm end to the cold end of each row of NFPA 70, Table 690.7(A), has its factor.
#[test]
fn every_degree_of_the_cold_table_has_its_factor() {
    let rows = table::<Factor>(DATA, "voc_factor");
    assert_eq!(rows.len(), 13);
    let mut degrees = 0;
    for row in &rows {
        let mut degree = row.says.from_degc;
        while degree >= row.says.to_degc {
            assert_eq!(cold_factor(Celsius::new(degree)).0, row.says.factor, "{degree} °C, {}", row.source);
            degree -= 1.0;
            degrees += 1;
        }
    }
    // From 24 down to −40 °C with no gap and no overlap.
    assert_eq!(degrees, 65);
}

/// The rule behind the table: 0.40 %/K from 25 °C down to each row's cold end, to the hundredth that the table prints;
/// and so never under the steepest crystalline modules, −0.35 %/K (textbook range, from memory).
#[test]
fn the_cold_table_follows_its_rule() {
    for row in table::<Factor>(DATA, "voc_factor") {
        let colder = 25.0 - row.says.to_degc;
        let rule = 1.0 + 0.0040 * colder;
        assert!((row.says.factor - rule).abs() < 0.0101, "{} for {rule} at {} °C", row.says.factor, row.says.to_degc);
        assert!(row.says.factor > 1.0 + 0.0035 * colder);
    }
}

#[derive(Deserialize)]
struct VoltageCase {
    voc_stc_volt: f64,
    series: u32,
    lowest_degc: f64,
    table_volt: f64,
    beta_percent_per_k: f64,
    coefficient_volt: f64,
}

#[test]
fn cold_strings_by_table_and_by_coefficient() {
    for row in table::<VoltageCase>(DATA, "pv_voltage_case") {
        let case = row.says;
        let mut ask = Ask { record_low: Entry::Typed(Celsius::new(case.lowest_degc)), ..Ask::default() };
        ask.module.voc = Entry::Typed(Volts::new(case.voc_stc_volt));
        ask.module.voc_tolerance = Entry::Typed(Percent::new(0.0));
        ask.series = Entry::Typed(Count::new(f64::from(case.series)));
        let by_table = cold_voltage(&ask).expect("a voltage").get();
        assert!((by_table - case.table_volt).abs() < 1e-9, "{by_table} for {}", case.table_volt);
        ask.module.voc_coefficient =
            Entry::Typed(VoltageCoefficient::Relative(PercentPerKelvin::new(case.beta_percent_per_k)));
        let by_coefficient = cold_voltage(&ask).expect("a voltage").get();
        assert!(
            (by_coefficient - case.coefficient_volt).abs() < 1e-9,
            "{by_coefficient} for {}",
            case.coefficient_volt
        );
    }
}

#[derive(Deserialize)]
struct Limit {
    place: String,
    max_dc_volt: f64,
}

#[test]
fn the_highest_pv_voltages_of_north_america() {
    let rows = table::<Limit>(DATA, "nec_pv_voltage_limit");
    for (stands, words) in [
        (Stands::Dwelling, "one- and two-family dwellings"),
        (Stands::Building, "other buildings"),
        (Stands::Ground, "not on or in buildings"),
    ] {
        let row = rows.iter().find(|row| row.says.place == words).expect("the place has a row");
        assert_eq!(CodeFamily::NorthAmerica.highest_pv_voltage(stands).0.get(), row.says.max_dc_volt, "{}", row.source);
    }
}

#[derive(Deserialize)]
struct CurrentRule {
    max_circuit_current_factor: f64,
    product: f64,
}

#[derive(Deserialize)]
struct StringRule {
    in_min_multiple_of_isc: f64,
    in_max_multiple_of_isc: f64,
}

#[test]
fn the_factors_of_both_families() {
    let current = &table::<CurrentRule>(DATA, "nec_pv_current")[0];
    let north_america = CodeFamily::NorthAmerica.pv_circuit();
    assert_eq!(north_america.sunlight_factor, current.says.max_circuit_current_factor, "{}", current.source);
    assert_eq!(north_america.fuse_least, current.says.product, "{}", current.source);
    let string = &table::<StringRule>(DATA, "iec_string")[0];
    let iec = CodeFamily::Iec.pv_circuit();
    assert_eq!(iec.fuse_least, string.says.in_min_multiple_of_isc, "{}", string.source);
    assert_eq!(iec.fuse_below, Some(string.says.in_max_multiple_of_isc), "{}", string.source);
}

#[derive(Deserialize)]
struct Ratings {
    amp: Vec<f64>,
}

#[test]
fn the_standard_ratings_of_both_families() {
    let numbers = |list: &[Amps]| list.iter().map(|amps| amps.get()).collect::<Vec<f64>>();
    let iec = &table::<Ratings>(DATA, "iec_fuse_rating")[0];
    assert_eq!(numbers(CodeFamily::Iec.pv_circuit().fuse_ratings), iec.says.amp, "{}", iec.source);
    // The list of North America goes on above 800 A, where no fuse of a string is made.
    let north_america = &table::<Ratings>(DATA, "nec_standard_rating")[0];
    let to_800: Vec<f64> = north_america.says.amp.iter().copied().filter(|amp| *amp <= 800.0).collect();
    assert_eq!(numbers(CodeFamily::NorthAmerica.pv_circuit().fuse_ratings), to_800, "{}", north_america.source);
}

#[derive(Deserialize)]
struct StringCase {
    strings: u32,
    isc_amp: f64,
    module_max_series_fuse_amp: f64,
    nec_min_device_amp: f64,
    nec_next_standard_amp: f64,
    nec_fuse_needed: bool,
    iec_fuse_needed: bool,
    iec_in_min_amp: f64,
    iec_preferred_ratings_that_fit_amp: Vec<f64>,
}

#[test]
fn string_fuses_by_both_families() {
    for row in table::<StringCase>(DATA, "pv_string_case") {
        let case = row.says;
        let mut ask = Ask { strings: Entry::Typed(Count::new(f64::from(case.strings))), ..Ask::default() };
        ask.module.isc = Entry::Typed(Amps::new(case.isc_amp));
        ask.module.series_fuse = Entry::Typed(Amps::new(case.module_max_series_fuse_amp));
        let by = |family| string_fuses(&Ask { family: Entry::Typed(family), ..ask });
        let (Some(iec), Some(north_america)) = (by(CodeFamily::Iec), by(CodeFamily::NorthAmerica)) else {
            assert_eq!(case.strings, 1, "only one string has nothing to feed back");
            assert!(!case.iec_fuse_needed && !case.nec_fuse_needed);
            continue;
        };
        let of = |what: &str| format!("{what}: {} strings of {} A", case.strings, case.isc_amp);
        assert_eq!(iec.needed, case.iec_fuse_needed, "{}", of("IEC need"));
        assert!((iec.least.get() - case.iec_in_min_amp).abs() < 1e-9, "{}", of("IEC least"));
        let fitting: Vec<f64> = iec.fitting.iter().map(|amps| amps.get()).collect();
        assert_eq!(fitting, case.iec_preferred_ratings_that_fit_amp, "{}", of("IEC ratings"));
        assert_eq!(north_america.needed, case.nec_fuse_needed, "{}", of("North American need"));
        assert!((north_america.least.get() - case.nec_min_device_amp).abs() < 1e-9, "{}", of("North American least"));
        assert_eq!(north_america.fitting.first().map(|amps| amps.get()), Some(case.nec_next_standard_amp));
    }
}
