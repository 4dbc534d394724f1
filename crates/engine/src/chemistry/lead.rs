//! Lead: vented, AGM, gel.

use super::figure::Figure;
use super::gas::Gas;
use super::table::{
    Figures, Freezing, HANDBOOK, at, capacity_over, charging, degrees, exponent, milliohms, millivolts_per_kelvin,
    percent, share, volts,
};
use crate::quantity::{Celsius, Hours, MilliampsPerAmpHour, Percent, Volts};
use crate::source;

/// Size factors for lead, 25 °C base, in the table's steps of 5 °F.
///
/// Source: [`source::IEEE_485`], table 1, from memory; only the table's range was met elsewhere.
const IEEE_485_FACTORS: &[(Celsius, f64)] = &[
    degrees(-3.9, 1.52),
    degrees(-1.1, 1.43),
    degrees(1.7, 1.35),
    degrees(4.4, 1.30),
    degrees(7.2, 1.25),
    degrees(10.0, 1.19),
    degrees(12.8, 1.15),
    degrees(15.6, 1.11),
    degrees(18.3, 1.08),
    degrees(21.1, 1.04),
    degrees(23.9, 1.011),
    degrees(25.0, 1.00),
    degrees(26.7, 0.98),
    degrees(29.4, 0.96),
    degrees(32.2, 0.94),
    degrees(35.0, 0.93),
    degrees(37.8, 0.91),
    degrees(40.6, 0.89),
    degrees(43.3, 0.88),
    degrees(46.1, 0.87),
    degrees(48.9, 0.86),
    degrees(51.7, 0.85),
];

/// A typical discharge of lead at the rated rate: chosen, from the general shape of makers' curves.
const ON_LOAD: &[(Percent, Volts)] =
    &[at(0.0, 1.80), at(10.0, 1.88), at(20.0, 1.93), at(50.0, 2.00), at(90.0, 2.07), at(100.0, 2.10)];

const END: Figure<Volts> =
    volts(1.75, 1.90, 1.80, "10.8 V of a 12 V battery: below it there is little charge and much sulphate");

const SEALED_REST: source::Clause = source::COMMON_PRACTICE.at("makers' tables for valve-regulated cells, from memory");

/// Vented lead.
pub(super) const VENTED: Figures = Figures {
    nominal: Volts::new(2.0),
    rest: &[at(0.0, 1.9817), at(25.0, 2.01), at(50.0, 2.04), at(75.0, 2.075), at(100.0, 2.1083)],
    rest_band: Volts::new(0.012),
    rest_source: source::BCI.at("rested 12 V battery at 26.7 °C, specific gravity 1.265 when full"),
    on_load: ON_LOAD,
    end: END,
    absorb: volts(2.37, 2.50, 2.45, "14.7 V of a 12 V battery: solar days are short, so the upper half"),
    float: Some(volts(2.15, 2.27, 2.25, "13.5 V of a 12 V battery")),
    equalise: Some(volts(2.50, 2.67, 2.58, "15.5 V of a 12 V battery")),
    equalise_is_usual: true,
    never_above: None,
    compensation: Some(millivolts_per_kelvin(-6.0, -3.0, -4.0, "what most makers of deep-cycle cells state")),
    depth_used: percent(20.0, 50.0, 50.0, "about half, common practice; less lives longer"),
    greatest_depth: Percent::new(80.0),
    coulomb_efficiency: percent(80.0, 95.0, 87.0, "middle of the range, for cells that are filled up and gassed"),
    energy_efficiency: share(70.0, 85.0),
    rated_over: Hours::new(20.0),
    least_charge: Some(capacity_over(10.0, 30.0, 20.0, "5 % of the capacity stirs the acid; less lets it layer")),
    greatest_charge: capacity_over(4.0, 10.0, 5.0, "20 % of the capacity before it gasses"),
    greatest_discharge: capacity_over(2.0, 10.0, 5.0, "a fifth of the capacity, steadily"),
    resistance_at_100_ah: milliohms(0.7, 2.0),
    charging: charging(
        -20.0,
        0.0,
        -20.0,
        50.0,
        "a charged cell is far from freezing; watch the acid instead",
        HANDBOOK,
    ),
    discharging: None,
    peukert: exponent(1.1, 1.6, 1.25, "deep-cycle plates; thick traction plates lie higher"),
    size_factor: IEEE_485_FACTORS,
    size_factor_source: source::IEEE_485.at("table 1"),
    gas: Gas::Standard {
        float: MilliampsPerAmpHour::new(5.0),
        boost: MilliampsPerAmpHour::new(20.0),
        source: source::IEC_62485_2.at("table 1, vented lead, antimony below 3 %"),
    },
    takes_water: true,
    freezing: Freezing::AcidByCharge,
    self_discharge: percent(3.0, 15.0, 5.0, "a healthy cell; old antimony plates reach the upper end"),
};

/// Valve-regulated lead with glass mat.
pub(super) const AGM: Figures = Figures {
    rest: &[at(0.0, 1.967), at(25.0, 2.00), at(50.0, 2.05), at(75.0, 2.105), at(100.0, 2.14)],
    rest_band: Volts::new(0.020),
    rest_source: SEALED_REST,
    absorb: volts(2.37, 2.45, 2.40, "14.4 V of a 12 V battery"),
    float: Some(volts(2.23, 2.30, 2.27, "13.6 V of a 12 V battery")),
    equalise: Some(volts(2.40, 2.50, 2.45, "only where the maker allows it")),
    equalise_is_usual: false,
    compensation: Some(millivolts_per_kelvin(-5.0, -2.5, -4.0, "towards the steeper end, for cold rooms")),
    depth_used: percent(20.0, 50.0, 40.0, "sealed cells cannot be topped up after a hard season"),
    coulomb_efficiency: percent(90.0, 98.0, 92.0, "lower end: cells that see few full charges"),
    energy_efficiency: share(75.0, 90.0),
    least_charge: Some(capacity_over(8.0, 20.0, 10.0, "a tenth of the capacity, as makers of cycling cells ask")),
    greatest_charge: capacity_over(2.0, 5.0, 4.0, "a quarter of the capacity"),
    greatest_discharge: capacity_over(1.0, 5.0, 3.0, "a third of the capacity, steadily"),
    resistance_at_100_ah: milliohms(0.4, 1.0),
    peukert: exponent(1.05, 1.15, 1.10, "middle of the range"),
    gas: VALVE_REGULATED,
    takes_water: false,
    self_discharge: percent(1.0, 4.0, 3.0, "upper half, for a room that warms in summer"),
    ..VENTED
};

/// Valve-regulated lead with gel.
pub(super) const GEL: Figures = Figures {
    rest: &[at(0.0, 1.967), at(25.0, 2.00), at(50.0, 2.058), at(75.0, 2.108), at(100.0, 2.142)],
    absorb: volts(2.30, 2.42, 2.36, "14.2 V of a 12 V battery: gel dries out above"),
    float: Some(volts(2.20, 2.30, 2.25, "13.5 V of a 12 V battery")),
    equalise: None,
    energy_efficiency: share(75.0, 88.0),
    least_charge: Some(capacity_over(8.0, 30.0, 15.0, "about 7 % of the capacity")),
    greatest_charge: capacity_over(4.0, 10.0, 5.0, "a fifth of the capacity"),
    greatest_discharge: capacity_over(2.0, 5.0, 4.0, "a quarter of the capacity, steadily"),
    resistance_at_100_ah: milliohms(0.6, 1.5),
    peukert: exponent(1.1, 1.25, 1.15, "middle of the range"),
    ..AGM
};

const VALVE_REGULATED: Gas = Gas::Standard {
    float: MilliampsPerAmpHour::new(1.0),
    boost: MilliampsPerAmpHour::new(8.0),
    source: source::IEC_62485_2.at("table 1, valve-regulated lead"),
};
