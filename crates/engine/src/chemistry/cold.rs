//! Capacity against temperature.

use super::{Chemistry, curve};
use crate::quantity::{Celsius, Percent};

/// Capacity needed at `temperature` over the capacity needed at 25 °C.
///
/// Straight lines between the points of the chemistry's table. Below its coldest point the first stretch goes on
/// (*chosen*: the tables end where the standards do, rooms do not); above its warmest the last value holds.
///
/// # Source
///
/// [`crate::source::IEEE_485`] for lead; see [`super::Figures::size_factor_source`] for the others.
///
/// # Example
///
/// ```
/// use engine::chemistry::{Chemistry, size_factor};
/// use engine::quantity::Celsius;
///
/// assert_eq!(size_factor(Chemistry::VentedLead, Celsius::new(10.0)), 1.19);
/// ```
#[must_use]
pub fn size_factor(chemistry: Chemistry, temperature: Celsius) -> f64 {
    let points: Vec<_> = chemistry.figures().size_factor.iter().map(|(at, factor)| (at.get(), *factor)).collect();
    curve::straight_on_below(&points, temperature.get())
}

/// Part of the rated capacity that can be had at `temperature`.
///
/// share = 1 / size factor, never above 100 %: a warm room's gain is not counted on.
#[must_use]
pub fn capacity_share(chemistry: Chemistry, temperature: Celsius) -> Percent {
    Percent::from_share((1.0 / size_factor(chemistry, temperature)).min(1.0))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn cold_never_gives_and_warmth_never_gives_more_than_rated() {
        for chemistry in Chemistry::ALL {
            let share = |at| capacity_share(*chemistry, Celsius::new(at)).get();
            assert!(share(-60.0) > 0.0 && share(-60.0) < share(-20.0), "{chemistry:?}");
            assert!(share(-20.0) < share(0.0) && share(0.0) < share(25.0), "{chemistry:?}");
            assert!((share(25.0) - 100.0).abs() < 1e-9, "{chemistry:?}");
            assert!(share(60.0) <= 100.0, "{chemistry:?}");
        }
    }
}
