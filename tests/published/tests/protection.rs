//! Standard ratings and the rules of protection, figure by figure.

use engine::family::CodeFamily;
use engine::quantity::{Amps, Hours};
use engine::ratings::{self, Device, DirectBranch, Series, interrupting};
use engine::run::Kind;
use published::table;
use serde::Deserialize;

const DATA: &str = include_str!("../data/protection.toml");

fn series(family: CodeFamily, device: Device) -> Vec<f64> {
    Series::of(family, device, DirectBranch::No).ratings().map(Amps::get).collect()
}

#[derive(Deserialize)]
struct NorthAmerican {
    amp: Vec<f64>,
    added_2023_amp: Vec<f64>,
    extra_fuse_amp_before_2023: Vec<f64>,
}

#[test]
fn every_standard_rating_of_north_america() {
    let row = &table::<NorthAmerican>(DATA, "nec_standard_rating")[0];
    assert_eq!(series(CodeFamily::NorthAmerica, Device::Breaker), row.says.amp, "{}", row.source);
    assert_eq!(series(CodeFamily::NorthAmerica, Device::Fuse), row.says.amp);
    assert_eq!(ratings::NORTH_AMERICAN_FUSES_BEFORE_2023.to_vec(), row.says.extra_fuse_amp_before_2023);
    assert!(row.says.added_2023_amp.iter().all(|amp| ratings::NORTH_AMERICAN.contains(amp)));
}

#[derive(Deserialize)]
struct Breaker {
    amp: Vec<f64>,
    also_listed_amp: Vec<f64>,
    short_circuit_ka: Vec<f64>,
    non_trip_multiple: f64,
    trip_multiple: f64,
    conventional_time_h_to_63a: f64,
    conventional_time_h_above_63a: f64,
}

#[test]
fn every_rating_of_iec_breakers() {
    let row = &table::<Breaker>(DATA, "iec_breaker_rating")[0];
    let says = &row.says;
    assert_eq!(ratings::IEC_BREAKERS.to_vec(), says.amp, "{}", row.source);
    assert_eq!(series(CodeFamily::Iec, Device::Breaker)[..says.amp.len()], says.amp);
    assert_eq!(ratings::IEC_BREAKERS_ALSO_LISTED.to_vec(), says.also_listed_amp);
    assert_eq!(interrupting::SMALL.to_vec(), says.short_circuit_ka);
    assert_eq!((ratings::NOT_OPENING, ratings::OPENING), (says.non_trip_multiple, says.trip_multiple));
    let time = |amps| ratings::breaker_conventional_time(Amps::new(amps));
    assert_eq!(time(63.0), Hours::new(says.conventional_time_h_to_63a));
    assert_eq!(time(80.0), Hours::new(says.conventional_time_h_above_63a));
}

#[derive(Deserialize)]
struct Band {
    letter: String,
    above_multiple: f64,
    to_multiple: f64,
}

#[test]
fn every_band_of_iec_breakers() {
    let rows = table::<Band>(DATA, "iec_breaker_band");
    assert_eq!(rows.len(), ratings::BANDS.len());
    for (row, band) in rows.iter().zip(ratings::BANDS) {
        assert_eq!((row.says.letter.as_str(), row.says.above_multiple, row.says.to_multiple), band, "{}", row.source);
    }
}

#[derive(Deserialize)]
struct Fuse {
    amp: Vec<f64>,
    gpv_non_fusing_multiple: f64,
    gpv_fusing_multiple: f64,
    gpv_min_breaking_ka_dc: f64,
}

#[derive(Deserialize)]
struct FuseTime {
    above_amp: f64,
    to_amp: Option<f64>,
    hours: f64,
}

#[test]
fn every_rating_and_time_of_iec_fuses() {
    let row = &table::<Fuse>(DATA, "iec_fuse_rating")[0];
    assert_eq!(series(CodeFamily::Iec, Device::Fuse), row.says.amp, "{}", row.source);
    assert_eq!(ratings::NOT_OPENING, row.says.gpv_non_fusing_multiple);
    assert_eq!(ratings::OPENING, row.says.gpv_fusing_multiple);
    assert_eq!(ratings::GPV_LEAST_BREAKING.get(), row.says.gpv_min_breaking_ka_dc * 1000.0);
    for row in table::<FuseTime>(DATA, "iec_fuse_conventional_time") {
        for amps in [row.says.above_amp + 0.5, row.says.to_amp.unwrap_or(1250.0)] {
            assert_eq!(ratings::fuse_conventional_time(Amps::new(amps)).get(), row.says.hours, "{amps} A");
        }
    }
}

#[derive(Deserialize)]
struct General {
    continuous_load_factor: f64,
    next_size_up_allowed_to_amp: f64,
    suggested_drop_percent_branch: f64,
}

#[derive(Deserialize)]
struct PvCurrent {
    max_circuit_current_factor: f64,
    product: f64,
}

#[test]
fn the_factors_of_north_america() {
    let general = &table::<General>(DATA, "nec_general")[0];
    assert_eq!(ratings::CONTINUOUS, general.says.continuous_load_factor, "{}", general.source);
    assert_eq!(ratings::NEXT_SIZE_UP_TO.get(), general.says.next_size_up_allowed_to_amp);
    let branch = Kind::DcBranch.rule(CodeFamily::NorthAmerica);
    assert_eq!((branch.continuous, branch.device_least), (ratings::CONTINUOUS, ratings::CONTINUOUS));
    assert_eq!(Kind::DcBranch.allowed_drop().get(), general.says.suggested_drop_percent_branch);
    let pv = &table::<PvCurrent>(DATA, "nec_pv_current")[0];
    for kind in [Kind::PvString, Kind::PvArray] {
        let rule = kind.rule(CodeFamily::NorthAmerica);
        assert_eq!(rule.carried, pv.says.max_circuit_current_factor, "{}", pv.source);
        assert_eq!((rule.continuous, rule.device_least), (pv.says.product, pv.says.product));
    }
}

#[derive(Deserialize)]
struct Span {
    in_min_multiple_of_isc: f64,
    in_max_multiple_of_isc: f64,
}

#[test]
fn the_span_of_an_iec_array_device() {
    for name in ["iec_array", "iec_subarray"] {
        let row = &table::<Span>(DATA, name)[0];
        let rule = Kind::PvArray.rule(CodeFamily::Iec);
        assert_eq!(rule.device_least, row.says.in_min_multiple_of_isc, "{}", row.source);
        assert_eq!(rule.device_below, Some(row.says.in_max_multiple_of_isc));
    }
}

#[derive(Deserialize)]
struct Drop {
    supply: String,
    lighting_percent: f64,
}

/// What is allowed where nobody says otherwise is never more than the strictest published figure for supplied loads.
#[test]
fn the_allowed_drop_is_within_what_is_published() {
    let rows = table::<Drop>(DATA, "iec_drop");
    let public = rows.iter().find(|row| row.says.supply == "public network").expect("a row");
    assert!(Kind::ALL.iter().all(|kind| kind.allowed_drop().get() <= public.says.lighting_percent));
}

#[derive(Deserialize)]
struct Class {
    device: String,
    #[serde(default)]
    ka: Vec<f64>,
    #[serde(default)]
    percent: Vec<f64>,
}

#[test]
fn every_ladder_of_interrupting_ratings() {
    let rows = table::<Class>(DATA, "dc_interrupting_class");
    let ladder = |words: &str| {
        let row = rows.iter().find(|row| row.says.device.starts_with(words));
        let row = row.unwrap_or_else(|| panic!("no row for {words}"));
        if row.says.ka.is_empty() { row.says.percent.clone() } else { row.says.ka.clone() }
    };
    assert_eq!(interrupting::MOULDED_CASE.to_vec(), ladder("moulded-case"));
    assert_eq!(interrupting::SMALL_DIRECT.to_vec(), ladder("d.c. miniature"));
    assert_eq!(interrupting::SERVICE_PERCENT.to_vec(), ladder("industrial"));
    assert_eq!(interrupting::GPV.to_vec(), ladder("gPV"));
    assert_eq!(interrupting::FUSES.to_vec(), ladder("current-limiting"));
    assert_eq!(rows.len(), 5);
}
