//! What is known of each chemistry: one shape for all of them.

use super::figure::{Figure, Span};
use super::gas::Gas;
use crate::quantity::{Celsius, Hours, Ohms, Percent, Volts, VoltsPerKelvin};
use crate::source::{self, Clause};

/// The figures of a chemistry, for one cell at 25 °C unless said otherwise.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Figures {
    /// Voltage that the trade counts a cell as.
    pub nominal: Volts,
    /// Voltage of a rested cell by its charge, charge rising.
    pub rest: &'static [(Percent, Volts)],
    /// How far a healthy rested cell may stand from that curve.
    pub rest_band: Volts,
    /// Where the curve is from.
    pub rest_source: Clause,
    /// Voltage under the rated load by the charge that is left, charge rising. A typical shape, chosen.
    pub on_load: &'static [(Percent, Volts)],
    /// Voltage at which discharge ends.
    pub end: Figure<Volts>,
    /// Voltage that charging is held at until the cell takes no more.
    pub absorb: Figure<Volts>,
    /// Voltage that a full cell is kept at; none where it is better left alone.
    pub float: Option<Figure<Volts>>,
    /// Voltage that evens the cells out; none where it harms.
    pub equalise: Option<Figure<Volts>>,
    /// Whether equalising is usual, rather than only where the maker asks for it.
    pub equalise_is_usual: bool,
    /// Voltage that no cell may ever pass; none where the equalise voltage is that.
    pub never_above: Option<Volts>,
    /// Change of the charge voltages with temperature; none where there is none.
    pub compensation: Option<Figure<VoltsPerKelvin>>,
    /// Part of the capacity that is drawn before the next charge.
    pub depth_used: Figure<Percent>,
    /// Part that may be drawn once in a while.
    pub greatest_depth: Percent,
    /// Charge that comes out as a part of what was put in.
    pub coulomb_efficiency: Figure<Percent>,
    /// Energy that comes out as a part of what was put in.
    pub energy_efficiency: Span<Percent>,
    /// Length of discharge that the capacity is rated for.
    pub rated_over: Hours,
    /// Least charge current that does the cell good: the capacity over this time. Longest time first in the range.
    pub least_charge: Option<Figure<Hours>>,
    /// Greatest charge current: the capacity over this time.
    pub greatest_charge: Figure<Hours>,
    /// Greatest steady discharge current: the capacity over this time.
    pub greatest_discharge: Figure<Hours>,
    /// Resistance of a cell of 100 Ah: least when new, warm and full, greatest when old, cold and low (5 s value).
    /// In proportion to 1/Ah for other sizes.
    pub resistance_at_100_ah: Span<Ohms>,
    /// Lowest and highest cell temperature for charging.
    pub charging: Temperatures,
    /// Lowest and highest cell temperature for discharging, where a limit other than freezing is known.
    pub discharging: Option<Span<Celsius>>,
    /// Exponent of Peukert's law, a plain number: 1 where capacity does not depend on the rate.
    pub peukert: Figure<f64>,
    /// Capacity needed at a temperature over that needed at 25 °C, by temperature.
    pub size_factor: &'static [(Celsius, f64)],
    /// Where the factors are from.
    pub size_factor_source: Clause,
    /// How a charging cell gasses.
    pub gas: Gas,
    /// Whether water can and must be topped up.
    pub takes_water: bool,
    /// What freezes, if anything.
    pub freezing: Freezing,
    /// Charge lost in a month of standing at 25 °C.
    pub self_discharge: Figure<Percent>,
}

/// Limits of the cell's temperature while it is charged.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Temperatures {
    /// Lowest.
    pub lowest: Figure<Celsius>,
    /// Highest.
    pub highest: Celsius,
}

/// What freezes in a cell.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Freezing {
    /// Acid that thins as the cell is emptied.
    AcidByCharge,
    /// Lye that keeps its strength.
    Lye(Celsius, Clause),
    /// Nothing that matters.
    Nothing,
}

impl Figures {
    /// Resistance of one cell of `capacity`, least and greatest.
    ///
    /// R = R₁₀₀ · 100 Ah / C
    ///
    /// Holds within one build of cell; thick plates lie at the upper end.
    #[must_use]
    pub fn resistance(&self, capacity: crate::quantity::AmpHours) -> Span<Ohms> {
        let times = 100.0 / capacity.get();
        Span::new(self.resistance_at_100_ah.least * times, self.resistance_at_100_ah.greatest * times)
    }

    /// Voltage of a cell under its rated load with `charge` left.
    #[must_use]
    pub fn loaded(&self, charge: Percent) -> Volts {
        Volts::new(super::curve::held_at_ends(&plain(self.on_load), charge.get()))
    }

    /// Charge left where a cell under its rated load stands at `voltage`.
    #[must_use]
    pub fn charge_when_loaded_to(&self, voltage: Volts) -> Percent {
        Percent::new(super::curve::inverse(&plain(self.on_load), voltage.get()))
    }
}

/// A curve of quantities as plain pairs, for the private arithmetic on curves.
pub(super) fn plain(curve: &[(Percent, Volts)]) -> Vec<(f64, f64)> {
    curve.iter().map(|(charge, volts)| (charge.get(), volts.get())).collect()
}

/// The ranges of the handbooks, for one cell at 20 to 25 °C.
pub(super) const HANDBOOK: Clause = source::BATTERY_HANDBOOK.at("typical ranges for one cell at 20 to 25 °C");
/// Rates, on which makers differ; from memory.
pub(super) const PRACTICE: Clause = source::COMMON_PRACTICE.at("rates that makers commonly state");

pub(super) const fn volts(least: f64, greatest: f64, chosen: f64, why: &'static str) -> Figure<Volts> {
    let range = Span { least: Volts::new(least), greatest: Volts::new(greatest) };
    Figure { chosen: Volts::new(chosen), range, why, source: HANDBOOK }
}

pub(super) const fn percent(least: f64, greatest: f64, chosen: f64, why: &'static str) -> Figure<Percent> {
    let range = Span { least: Percent::new(least), greatest: Percent::new(greatest) };
    Figure { chosen: Percent::new(chosen), range, why, source: HANDBOOK }
}

pub(super) const fn millivolts_per_kelvin(
    least: f64,
    greatest: f64,
    chosen: f64,
    why: &'static str,
) -> Figure<VoltsPerKelvin> {
    const fn of(millivolts: f64) -> VoltsPerKelvin {
        VoltsPerKelvin::new(millivolts / 1000.0)
    }
    Figure { chosen: of(chosen), range: Span { least: of(least), greatest: of(greatest) }, why, source: HANDBOOK }
}

pub(super) const fn capacity_over(least: f64, greatest: f64, chosen: f64, why: &'static str) -> Figure<Hours> {
    let range = Span { least: Hours::new(least), greatest: Hours::new(greatest) };
    Figure { chosen: Hours::new(chosen), range, why, source: PRACTICE }
}

pub(super) const fn exponent(least: f64, greatest: f64, chosen: f64, why: &'static str) -> Figure<f64> {
    Figure { chosen, range: Span { least, greatest }, why, source: HANDBOOK }
}

pub(super) const fn charging(
    least: f64,
    warmest_floor: f64,
    lowest: f64,
    highest: f64,
    why: &'static str,
    source: Clause,
) -> Temperatures {
    let range = Span { least: Celsius::new(least), greatest: Celsius::new(warmest_floor) };
    Temperatures { lowest: Figure { chosen: Celsius::new(lowest), range, why, source }, highest: Celsius::new(highest) }
}

pub(super) const fn share(least: f64, greatest: f64) -> Span<Percent> {
    Span { least: Percent::new(least), greatest: Percent::new(greatest) }
}

pub(super) const fn milliohms(least: f64, greatest: f64) -> Span<Ohms> {
    Span { least: Ohms::new(least / 1000.0), greatest: Ohms::new(greatest / 1000.0) }
}

/// A point of a curve of voltage by charge.
pub(super) const fn at(charge: f64, volts: f64) -> (Percent, Volts) {
    (Percent::new(charge), Volts::new(volts))
}

/// A point of a curve of size factors.
pub(super) const fn degrees(celsius: f64, factor: f64) -> (Celsius, f64) {
    (Celsius::new(celsius), factor)
}
