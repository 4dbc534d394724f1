//! Resistance of one conductor by its length, at its own temperature.

use super::{Conductor, Make, Metal, Size};
use crate::quantity::{Amps, Celsius, Kelvins, OhmsPerMetre};

const NONE: f64 = f64::NAN;

/// Resistance at 75 °C in Ω per 1000 ft of stranded conductors, row by row of [`super::AMERICAN`]:
/// plain copper, tinned copper, aluminium.
///
/// # Source
///
/// [`crate::source::NEC`], chapter 9, table 8. The same in the editions of 2008 to 2023.
// 14 AWG has 3.14 Ω, which is no π.
#[allow(clippy::approx_constant)]
pub const TABLE_8: [[f64; 3]; 20] = [
    [7.95, 8.45, 13.1],
    [4.99, 5.29, 8.21],
    [3.14, 3.26, 5.17],
    [1.98, 2.05, 3.25],
    [1.24, 1.29, 2.04],
    [0.778, 0.809, 1.28],
    [0.491, 0.51, 0.808],
    [0.308, 0.321, 0.508],
    [0.245, 0.254, 0.403],
    [0.194, 0.201, 0.319],
    [0.154, 0.16, 0.253],
    [0.122, 0.127, 0.201],
    [0.0967, 0.101, 0.159],
    [0.0766, 0.0797, 0.126],
    [0.0608, 0.0626, 0.1],
    [0.0515, 0.0535, 0.0847],
    [0.0429, 0.0446, 0.0707],
    [0.0367, 0.0382, 0.0605],
    [0.0321, 0.0331, 0.0529],
    [0.0258, 0.0265, 0.0424],
];

/// As [`TABLE_8`], for solid conductors, 18 to 8 AWG.
///
/// # Source
///
/// [`crate::source::NEC`], chapter 9, table 8.
pub const TABLE_8_SOLID: [[f64; 3]; 6] = [
    [7.77, 8.08, 12.8],
    [4.89, 5.08, 8.05],
    [3.07, 3.19, 5.06],
    [1.93, 2.01, 3.18],
    [1.21, 1.26, 2.0],
    [0.764, 0.786, 1.26],
];

/// Greatest resistance at 20 °C in Ω per km, row by row of [`super::METRIC`]:
/// class 2 plain copper, class 5 plain copper, class 5 tinned copper, class 2 aluminium (from 10 mm²).
///
/// # Source
///
/// [`crate::source::IEC_60228`], tables 2 and 3. 50 mm² of class 5 really is below class 2.
pub const IEC_60228: [[f64; 4]; 19] = [
    [36.0, 39.0, 40.1, NONE],
    [24.5, 26.0, 26.7, NONE],
    [18.1, 19.5, 20.0, NONE],
    [12.1, 13.3, 13.7, NONE],
    [7.41, 7.98, 8.21, NONE],
    [4.61, 4.95, 5.09, NONE],
    [3.08, 3.3, 3.39, NONE],
    [1.83, 1.91, 1.95, 3.08],
    [1.15, 1.21, 1.24, 1.91],
    [0.727, 0.78, 0.795, 1.2],
    [0.524, 0.554, 0.565, 0.868],
    [0.387, 0.386, 0.393, 0.641],
    [0.268, 0.272, 0.277, 0.443],
    [0.193, 0.206, 0.21, 0.32],
    [0.153, 0.161, 0.164, 0.253],
    [0.124, 0.129, 0.132, 0.206],
    [0.0991, 0.106, 0.108, 0.164],
    [0.0754, 0.0801, 0.0817, 0.125],
    [0.0601, 0.0641, 0.0654, 0.1],
];

/// How much longer the strands of a fine-stranded conductor are than the conductor.
///
/// *Chosen*: rope lay of bunched strands is allowed 4 to 6 % by its standards (from memory); the upper end is taken.
/// A datasheet's own resistance would change it.
const FINE_STRAND_LAY: f64 = 1.06;

/// How much longer the strands of a conductor of a few strands are.
///
/// The rows of [`TABLE_8`] differ from solid wire by this (ASTM B8 allows 2 %, from memory).
const STRAND_LAY: f64 = 1.02;

/// How much tin adds where no table says it: what [`IEC_60228`] shows for 4 mm² and above, at most.
const TIN: f64 = 1.03;

/// Metres in a thousand feet.
const THOUSAND_FEET: f64 = 304.8;

/// How many times its resistance at 20 °C a conductor has at `at`.
///
/// k = 1 + α₂₀ · (T − 20 °C)
///
/// A straight line, good from −100 to 200 °C.
///
/// # Source
///
/// [`crate::source::IEC_60028`], [`crate::source::IEC_60889`].
#[must_use]
pub fn temperature_factor(metal: Metal, at: Celsius) -> f64 {
    1.0 + metal.coefficient() * (at - Celsius::new(20.0)).get()
}

/// Resistance of one conductor by its length, at its own temperature `at`.
///
/// From the tables for the sizes they hold; else from the metal: R = k_lay · ρ / A.
/// Where a table gives 75 °C: R = R₇₅ · (1 + α₇₅ · (T − 75 °C)).
///
/// # Source
///
/// [`TABLE_8`], [`TABLE_8_SOLID`], [`IEC_60228`]; a solid wire thicker than 8 AWG by [`Metal::resistivity`].
/// A metric solid wire stands in the class 2 column, which is the same up to 16 mm² (from memory).
#[must_use]
pub fn resistance(conductor: Conductor, size: Size, at: Celsius) -> OhmsPerMetre {
    let metal = conductor.metal();
    let tabled = match size {
        Size::Metric(_) => metric(conductor, size).map(|at_20_c| at_20_c * temperature_factor(metal, at)),
        Size::Gauge(_) | Size::Kcmil(_) => american(conductor, size)
            .map(|at_75_c| at_75_c * (1.0 + metal.coefficient_at_75_c() * (at - Celsius::new(75.0)).get())),
        Size::Other(_) => None,
    };
    OhmsPerMetre::new(tabled.unwrap_or_else(|| {
        let tin = if conductor.tinned() { TIN } else { 1.0 };
        let lay = match conductor.make() {
            Make::Solid => 1.0,
            Make::Stranded => STRAND_LAY,
            Make::FineStrand => FINE_STRAND_LAY,
        };
        lay * tin * metal.resistivity() / size.area().get() * temperature_factor(metal, at)
    }))
}

/// Ω/m at 75 °C, where the table of the North American code holds it.
fn american(conductor: Conductor, size: Size) -> Option<f64> {
    let row = size.american_row()?;
    let cells = match conductor.make() {
        Make::Solid => TABLE_8_SOLID.get(row)?,
        Make::Stranded => &TABLE_8[row],
        Make::FineStrand => return None,
    };
    let column = match (conductor.metal(), conductor.tinned()) {
        (Metal::Copper, false) => 0,
        (Metal::Copper, true) => 1,
        (Metal::Aluminium, _) => 2,
    };
    Some(cells[column] / THOUSAND_FEET)
}

/// Ω/m at 20 °C, where the table of IEC 60228 holds it.
fn metric(conductor: Conductor, size: Size) -> Option<f64> {
    let row = size.metric_row()?;
    let (column, tin) = match (conductor.metal(), conductor.make(), conductor.tinned()) {
        (Metal::Aluminium, _, _) => (3, 1.0),
        (Metal::Copper, Make::FineStrand, false) => (1, 1.0),
        (Metal::Copper, Make::FineStrand, true) => (2, 1.0),
        (Metal::Copper, _, tinned) => (0, if tinned { TIN } else { 1.0 }),
    };
    let cell = IEC_60228[row][column];
    cell.is_finite().then_some(cell * tin / 1000.0)
}

/// Temperature of a conductor that carries `current`, where `ampacity` in surroundings at `ambient` would bring it to
/// `greatest`.
///
/// T = Tₐ + (T_max − Tₐ) · (I / I_z)²
///
/// The heat goes as the square of the current, the loss of heat as the rise. Steady state only.
/// Where the surroundings leave no ampacity, the conductor is at the hotter of the two.
///
/// # Source
///
/// [`crate::source::IEC_60287`], the loss of heat taken in proportion to the rise.
#[must_use]
pub fn own_temperature(ambient: Celsius, greatest: Celsius, current: Amps, ampacity: Amps) -> Celsius {
    let room = (greatest - ambient).get();
    if !(ampacity.get() > 0.0 && room > 0.0) {
        return ambient.max(greatest);
    }
    let share = current / ampacity;
    ambient + Kelvins::new(room * share * share)
}

#[cfg(test)]
mod tests {
    use super::super::{AMERICAN, METRIC};
    use super::*;

    /// Every table: resistance falls as the area rises, and lies near ρ/A of its metal.
    fn check(resistances: &[f64], sizes: &[Size], metal: Metal, most_above: f64) {
        let known: Vec<(f64, Size)> =
            resistances.iter().copied().zip(sizes.iter().copied()).filter(|(r, _)| r.is_finite()).collect();
        assert!(known.is_sorted_by(|a, b| a.0 > b.0));
        for (ohms_per_metre, size) in known {
            let pure = metal.resistivity() / size.area().get();
            let ratio = ohms_per_metre / pure;
            assert!((0.985..most_above).contains(&ratio), "{size}: {ratio}");
        }
    }

    #[test]
    fn resistances_fall_and_lie_near_the_metal() {
        let at_20_c = |table: &[[f64; 3]], column: usize, metal: Metal| -> Vec<f64> {
            table.iter().map(|row| row[column] / 304.8 / temperature_factor(metal, Celsius::new(75.0))).collect()
        };
        check(&at_20_c(&TABLE_8, 0, Metal::Copper), &AMERICAN, Metal::Copper, 1.03);
        check(&at_20_c(&TABLE_8, 1, Metal::Copper), &AMERICAN, Metal::Copper, 1.09);
        check(&at_20_c(&TABLE_8, 2, Metal::Aluminium), &AMERICAN, Metal::Aluminium, 1.03);
        check(&at_20_c(&TABLE_8_SOLID, 0, Metal::Copper), &AMERICAN, Metal::Copper, 1.01);
        check(&at_20_c(&TABLE_8_SOLID, 1, Metal::Copper), &AMERICAN, Metal::Copper, 1.05);
        check(&at_20_c(&TABLE_8_SOLID, 2, Metal::Aluminium), &AMERICAN, Metal::Aluminium, 1.01);
        let column = |at: usize| -> Vec<f64> { IEC_60228.iter().map(|row| row[at] / 1000.0).collect() };
        // Nominal square millimetres are names: the metal may be up to a tenth less.
        check(&column(0), &METRIC, Metal::Copper, 1.14);
        check(&column(1), &METRIC, Metal::Copper, 1.17);
        check(&column(2), &METRIC, Metal::Copper, 1.21);
        check(&column(3), &METRIC, Metal::Aluminium, 1.14);
    }

    #[test]
    fn the_two_coefficients_are_one_law() {
        for metal in [Metal::Copper, Metal::Aluminium] {
            let from_20 = metal.coefficient() / temperature_factor(metal, Celsius::new(75.0));
            assert!((from_20 - metal.coefficient_at_75_c()).abs() < 1e-5);
        }
    }

    #[test]
    fn a_conductor_at_its_ampacity_is_at_its_limit() {
        let at = |current| own_temperature(Celsius::new(30.0), Celsius::new(90.0), Amps::new(current), Amps::new(40.0));
        assert_eq!(at(40.0), Celsius::new(90.0));
        assert_eq!(at(20.0), Celsius::new(45.0));
        assert_eq!(at(0.0), Celsius::new(30.0));
        let none = own_temperature(Celsius::new(95.0), Celsius::new(90.0), Amps::new(1.0), Amps::new(0.0));
        assert_eq!(none, Celsius::new(95.0));
    }
}
