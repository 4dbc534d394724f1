//! Charge from the voltage of a rested cell.

use super::table::plain;
use super::{Chemistry, Family, curve};
use crate::quantity::{Celsius, Percent, Volts};
use crate::source::{self, Clause};

/// What a rested cell's voltage says of its charge.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ChargeReading {
    /// The likeliest charge.
    pub likely: Percent,
    /// The least that the reading allows.
    pub least: Percent,
    /// The most that the reading allows.
    pub most: Percent,
    /// Where the curve is from.
    pub source: Clause,
}

impl ChargeReading {
    /// How much of the scale the reading leaves open. Where it is more than half, the voltage tells next to nothing.
    #[must_use]
    pub fn open(self) -> Percent {
        self.most - self.least
    }
}

/// Voltage of a rested cell of `charge`, at the temperature of the chemistry's curve.
#[must_use]
pub fn rested(chemistry: Chemistry, charge: Percent) -> Volts {
    Volts::new(curve::held_at_ends(&plain(chemistry.figures().rest), charge.get()))
}

/// A cell's reading at `temperature` turned into what it would be at 26.7 °C.
///
/// Lead: V + 0.024 V / 6 / 5.56 K · (T − 26.7 °C). Others: unchanged, as the change is smaller than their band.
///
/// # Source
///
/// [`source::BCI`].
#[must_use]
pub fn rested_at_reference(chemistry: Chemistry, reading: Volts, temperature: Celsius) -> Volts {
    match chemistry.family() {
        Family::Lead => reading + Volts::new(0.024 / 6.0 / 5.56) * (temperature - Celsius::new(26.7)).get(),
        Family::Nickel | Family::Lithium => reading,
    }
}

/// Charge of a cell that has rested for hours and reads `reading`, on a meter good to `meter` either way.
///
/// The curve is read at the reading and at the ends of its band: the chemistry's own spread plus the meter's.
/// On the flat stretch of LiFePO4 and of nickel the band is wide, and honestly so. A reading far off the curve
/// gives an end of the scale.
#[must_use]
pub fn charge_at_rest(chemistry: Chemistry, reading: Volts, temperature: Celsius, meter: Volts) -> ChargeReading {
    let figures = chemistry.figures();
    let points = plain(figures.rest);
    let reading = rested_at_reference(chemistry, reading, temperature);
    let band = figures.rest_band + meter.abs();
    let at = |voltage: Volts| Percent::new(curve::inverse(&points, voltage.get()));
    ChargeReading {
        likely: at(reading),
        least: at(reading - band),
        most: at(reading + band),
        source: match chemistry.family() {
            Family::Lead if chemistry == Chemistry::VentedLead => source::BCI.at("rested voltage by state of charge"),
            _ => figures.rest_source,
        },
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn read(chemistry: Chemistry, volts: f64) -> ChargeReading {
        charge_at_rest(chemistry, Volts::new(volts), Celsius::new(26.7), Volts::new(0.0))
    }

    #[test]
    fn lead_tells_its_charge_and_lithium_iron_hides_it() {
        let lead = read(Chemistry::VentedLead, 2.04);
        assert!((lead.likely.get() - 50.0).abs() < 1e-9);
        assert!(lead.open().get() < 25.0, "{lead:?}");
        let flat = read(Chemistry::Lfp, 3.30);
        assert!(flat.open().get() > 20.0, "{flat:?}");
        assert!(read(Chemistry::NickelIron, 1.29).open().get() > 40.0);
    }

    #[test]
    fn the_band_holds_the_likely_charge() {
        for chemistry in Chemistry::ALL {
            for step in 0..=300 {
                let reading = read(*chemistry, 1.0 + f64::from(step) * 0.012);
                assert!(reading.least <= reading.likely && reading.likely <= reading.most, "{chemistry:?} {reading:?}");
            }
        }
    }

    #[test]
    fn a_cold_lead_cell_reads_high_for_its_charge() {
        let at = |celsius| {
            let zero = Volts::new(0.0);
            charge_at_rest(Chemistry::VentedLead, Volts::new(2.04), Celsius::new(celsius), zero).likely
        };
        assert!(at(0.0) < at(26.7));
    }
}
