//! When the liquid in a cell freezes.

use super::table::Freezing;
use super::{Chemistry, curve};
use crate::quantity::{Celsius, Percent};
use crate::source::{self, Clause};

/// Freezing of battery acid by its specific gravity; of each pair of figures met, the warmer.
///
/// Source: [`source::ACID_FREEZING`]. The column that is often printed beside tables of charge is 10 to 13 K colder
/// between full and empty, which is the unsafe side; it is not used.
const ACID: &[(f64, f64)] = &[
    (1.000, 0.0),
    (1.050, -2.8),
    (1.100, -7.2),
    (1.150, -15.0),
    (1.200, -26.7),
    (1.225, -36.1),
    (1.250, -52.0),
    (1.280, -66.0),
    (1.300, -70.0),
];

/// Specific gravity of the acid by charge, for cells filled to 1.265.
///
/// Source: [`source::BCI`].
const GRAVITY: &[(f64, f64)] = &[(0.0, 1.120), (25.0, 1.155), (50.0, 1.190), (75.0, 1.225), (100.0, 1.265)];

/// Where the freezing figures are from.
const SOURCE: Clause = source::ACID_FREEZING.at("freezing point by specific gravity");

/// Specific gravity of a vented lead cell's acid at 26.7 °C, by its charge: a plain number, 1 for water.
#[must_use]
pub fn acid_gravity(charge: Percent) -> f64 {
    curve::held_at_ends(GRAVITY, charge.get())
}

/// Temperature at which battery acid of specific gravity `gravity` begins to freeze.
#[must_use]
pub fn acid_freezing(gravity: f64) -> Celsius {
    Celsius::new(curve::held_at_ends(ACID, gravity))
}

/// Temperature at which a cell of `charge` begins to freeze. `None` where nothing in it does that matters.
///
/// Lead: by the acid's strength, which falls with the charge. Sealed cells hold somewhat stronger acid than the
/// vented cells that the figures are for, so for them this errs to the safe side. Nickel: lye keeps its strength.
///
/// # Example
///
/// ```
/// use engine::chemistry::{Chemistry, freezing_point};
/// use engine::quantity::Percent;
///
/// let empty = freezing_point(Chemistry::VentedLead, Percent::new(0.0)).unwrap();
/// assert!((empty.get() - -10.3).abs() < 0.1);
/// ```
#[must_use]
pub fn freezing_point(chemistry: Chemistry, charge: Percent) -> Option<Celsius> {
    match chemistry.figures().freezing {
        Freezing::AcidByCharge => Some(acid_freezing(acid_gravity(charge))),
        Freezing::Lye(point, _) => Some(point),
        Freezing::Nothing => None,
    }
}

/// Where the freezing point of `chemistry` is from.
pub(crate) const fn freezing_source(chemistry: Chemistry) -> Clause {
    match chemistry.figures().freezing {
        Freezing::Lye(_, source) => source,
        Freezing::AcidByCharge | Freezing::Nothing => SOURCE,
    }
}
