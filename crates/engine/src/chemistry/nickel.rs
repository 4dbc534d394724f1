//! Nickel in lye: nickel-iron and vented nickel-cadmium.

use super::gas::Gas;
use super::table::{
    Figures, Freezing, HANDBOOK, at, capacity_over, charging, degrees, exponent, milliohms, millivolts_per_kelvin,
    percent, share, volts,
};
use crate::quantity::{Celsius, Hours, MilliampsPerAmpHour, Percent, Volts};
use crate::source;

/// Potassium hydroxide of the usual strength in these cells, about 1.19 to 1.20: chosen, from memory, at the warm end.
const LYE: Freezing = Freezing::Lye(Celsius::new(-25.0), source::CHOSEN.at("lye of 1.19, from memory, cautious"));

/// Nickel-iron.
pub(super) const IRON: Figures = Figures {
    nominal: Volts::new(1.2),
    rest: &[at(0.0, 1.15), at(25.0, 1.25), at(50.0, 1.29), at(75.0, 1.32), at(100.0, 1.36)],
    rest_band: Volts::new(0.040),
    rest_source: source::COMMON_PRACTICE.at("rested nickel-iron cells, from memory; the voltage tells little"),
    on_load: &[at(0.0, 1.00), at(10.0, 1.10), at(20.0, 1.15), at(50.0, 1.22), at(90.0, 1.30), at(100.0, 1.35)],
    end: volts(1.00, 1.10, 1.00, "the cell takes no harm from it, so all of it counts"),
    absorb: volts(1.60, 1.70, 1.65, "middle of the range"),
    float: Some(volts(1.40, 1.55, 1.45, "lower half: above it boils water away")),
    equalise: Some(volts(1.65, 1.80, 1.75, "upper half: the iron plate wakes only when driven")),
    equalise_is_usual: true,
    never_above: None,
    compensation: Some(millivolts_per_kelvin(-5.0, -2.0, -3.0, "middle of the range")),
    depth_used: percent(50.0, 80.0, 70.0, "below about 75 %, common practice, by what poor retention leaves"),
    greatest_depth: Percent::new(100.0),
    coulomb_efficiency: percent(60.0, 85.0, 80.0, "fresh lye, charged at a fifth of the capacity"),
    energy_efficiency: share(45.0, 70.0),
    rated_over: Hours::new(5.0),
    least_charge: Some(capacity_over(6.0, 12.0, 10.0, "a tenth of the capacity: less never fills the iron plate")),
    greatest_charge: capacity_over(3.0, 5.0, 4.0, "a quarter of the capacity; more foams the lye out"),
    greatest_discharge: capacity_over(2.0, 5.0, 3.0, "a third of the capacity: resistance is high"),
    resistance_at_100_ah: milliohms(1.0, 5.0),
    charging: charging(0.0, 10.0, 0.0, 45.0, "below it the iron plate takes hardly any charge", HANDBOOK),
    discharging: None,
    peukert: exponent(1.05, 1.25, 1.15, "middle of the range"),
    size_factor: &[degrees(-20.0, 2.0), degrees(0.0, 1.35), degrees(25.0, 1.0), degrees(40.0, 1.05)],
    size_factor_source: source::CHOSEN.at("no table is published; worse in the cold than nickel-cadmium, from memory"),
    gas: Gas::WholeCurrent {
        source: source::CHOSEN.at("outside IEC 62485-2: all of the charge current is taken to gas"),
    },
    takes_water: true,
    freezing: LYE,
    self_discharge: percent(15.0, 40.0, 25.0, "middle of the range; warm rooms lie higher"),
};

/// Vented nickel-cadmium, pocket plates.
pub(super) const CADMIUM: Figures = Figures {
    rest: &[at(0.0, 1.20), at(25.0, 1.27), at(50.0, 1.29), at(75.0, 1.31), at(100.0, 1.36)],
    rest_band: Volts::new(0.030),
    rest_source: source::COMMON_PRACTICE.at("rested nickel-cadmium cells, from memory; the voltage tells little"),
    on_load: &[at(0.0, 1.00), at(10.0, 1.12), at(20.0, 1.16), at(50.0, 1.22), at(90.0, 1.28), at(100.0, 1.33)],
    end: volts(1.00, 1.14, 1.00, "the cell takes no harm from it, so all of it counts"),
    absorb: volts(1.45, 1.70, 1.55, "solar days are short: well above the gassing point"),
    float: Some(volts(1.38, 1.47, 1.42, "middle of the range")),
    equalise: Some(volts(1.55, 1.70, 1.65, "upper half, a few times a year")),
    compensation: Some(millivolts_per_kelvin(-4.0, -2.0, -3.0, "middle of the range")),
    depth_used: percent(50.0, 80.0, 70.0, "deep cycles cost it little; something is kept for a dull week"),
    coulomb_efficiency: percent(70.0, 90.0, 80.0, "middle of the range"),
    energy_efficiency: share(60.0, 80.0),
    least_charge: Some(capacity_over(8.0, 20.0, 15.0, "less leaves pocket plates short of full")),
    greatest_charge: capacity_over(2.0, 5.0, 4.0, "a quarter of the capacity"),
    greatest_discharge: capacity_over(0.5, 5.0, 2.0, "half the capacity: medium-rate plates"),
    resistance_at_100_ah: milliohms(0.3, 2.0),
    charging: charging(-20.0, 0.0, -20.0, 50.0, "lower end of the range", HANDBOOK),
    peukert: exponent(1.05, 1.15, 1.10, "middle of the range"),
    size_factor: &[
        degrees(-40.0, 2.2),
        degrees(-20.0, 1.6),
        degrees(0.0, 1.25),
        degrees(25.0, 1.0),
        degrees(40.0, 1.05),
    ],
    size_factor_source: source::IEEE_1115.at("upper end of typical makers' curves, from memory"),
    gas: Gas::Standard {
        float: MilliampsPerAmpHour::new(5.0),
        boost: MilliampsPerAmpHour::new(50.0),
        source: source::IEC_62485_2.at("table 1, vented nickel-cadmium"),
    },
    self_discharge: percent(5.0, 20.0, 12.0, "middle of the range"),
    ..IRON
};
