//! How warm a module's cells are: the air, and what the sun adds.
//!
//! Both ways hold for a module under load in light wind, as a mean over minutes; wind cools further, and a gust of
//! sun takes minutes to warm the glass. At dawn the cells are as cold as the air, or colder under a clear sky.

use crate::quantity::{Celsius, Kelvins, WattsPerSquareMetre};

/// Irradiance at which NOCT is measured. Source: [`IEC_61215`](crate::source::IEC_61215), nominal operating cell temperature.
pub const NOCT_IRRADIANCE: WattsPerSquareMetre = WattsPerSquareMetre::new(800.0);

/// Air temperature at which NOCT is measured. Source: as [`NOCT_IRRADIANCE`].
pub const NOCT_AIR: Celsius = Celsius::new(20.0);

/// Irradiance that a rise over the air is told for: full sun, as in [`module::rise`](crate::module::rise).
pub const FULL_SUN: WattsPerSquareMetre = WattsPerSquareMetre::new(1000.0);

/// Cell temperature from the nameplate's nominal operating cell temperature: Tc = Ta + (NOCT − 20 °C) / 800 W/m² · G.
///
/// Holds for an open rack and a wind near 1 m/s, the conditions NOCT is measured in.
///
/// # Source
///
/// [`source::DUFFIE_BECKMAN`](crate::source::DUFFIE_BECKMAN), chapter 23; conditions from [`source::IEC_61215`](crate::source::IEC_61215).
///
/// ```
/// use engine::cell_temperature::by_noct;
/// use engine::quantity::{Celsius, WattsPerSquareMetre};
///
/// let cell = by_noct(Celsius::new(35.0), Celsius::new(45.0), WattsPerSquareMetre::new(1000.0));
/// assert_eq!(cell, Celsius::new(66.25));
/// ```
#[must_use]
pub fn by_noct(air: Celsius, noct: Celsius, irradiance: WattsPerSquareMetre) -> Celsius {
    air + (noct - NOCT_AIR) * (irradiance / NOCT_IRRADIANCE)
}

/// Cell temperature from the rise over the air at full sun: Tc = Ta + ΔT · G / 1000 W/m².
///
/// The rise is that of a mounting, [`module::rise`](crate::module::rise), or one measured.
///
/// # Source
///
/// [`source::COMMON_PRACTICE`](crate::source::COMMON_PRACTICE); the same line as [`by_noct`], named by another point of it.
#[must_use]
pub fn by_rise(air: Celsius, at_full_sun: Kelvins, irradiance: WattsPerSquareMetre) -> Celsius {
    air + at_full_sun * (irradiance / FULL_SUN)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::choice::Mounting;
    use crate::module::rise;

    #[test]
    fn without_sun_the_cells_are_as_cold_as_the_air() {
        let (air, dark) = (Celsius::new(-31.0), WattsPerSquareMetre::new(0.0));
        assert_eq!(by_noct(air, Celsius::new(45.0), dark), air);
        assert_eq!(by_rise(air, rise(Mounting::Flush), dark), air);
    }

    #[test]
    fn at_its_own_conditions_noct_is_the_cell_temperature() {
        assert_eq!(by_noct(NOCT_AIR, Celsius::new(46.5), NOCT_IRRADIANCE), Celsius::new(46.5));
    }

    #[test]
    fn the_rise_follows_the_sun() {
        let rise = rise(Mounting::OpenRack);
        assert_eq!(by_rise(Celsius::new(30.0), rise, FULL_SUN), Celsius::new(60.0));
        assert_eq!(by_rise(Celsius::new(30.0), rise, WattsPerSquareMetre::new(500.0)), Celsius::new(45.0));
    }

    #[test]
    fn an_open_rack_agrees_with_a_usual_noct_to_two_kelvins() {
        let by_plate = by_noct(Celsius::new(0.0), Celsius::new(45.0), FULL_SUN);
        let by_mounting = by_rise(Celsius::new(0.0), rise(Mounting::OpenRack), FULL_SUN);
        assert!((by_plate - by_mounting).get().abs() <= 2.0);
    }

    #[test]
    fn less_air_behind_is_warmer() {
        assert!(rise(Mounting::OpenRack) < rise(Mounting::StandOff));
        assert!(rise(Mounting::StandOff) < rise(Mounting::Flush));
    }
}
