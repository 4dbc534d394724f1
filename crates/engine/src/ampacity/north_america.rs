//! Ampacity tables of the North American code.

use super::{Insulation, Method};
use crate::conductor::{Metal, Size};

const NONE: f64 = f64::NAN;

/// Columns of one row: copper at 60, 75 and 90 °C, aluminium at 60, 75 and 90 °C.
pub type Row = [f64; 6];

/// Not more than three current-carrying conductors in raceway, cable or earth, air at 30 °C, in amperes.
/// Rows are [`crate::conductor::AMERICAN`] from 14 AWG on.
///
/// # Source
///
/// [`crate::source::NEC`], Table 310.16; the same since 2011. The older table differs in its small sizes.
pub const TABLE_310_16: [Row; 18] = [
    [15.0, 20.0, 25.0, NONE, NONE, NONE],
    [20.0, 25.0, 30.0, 15.0, 20.0, 25.0],
    [30.0, 35.0, 40.0, 25.0, 30.0, 35.0],
    [40.0, 50.0, 55.0, 35.0, 40.0, 45.0],
    [55.0, 65.0, 75.0, 40.0, 50.0, 55.0],
    [70.0, 85.0, 95.0, 55.0, 65.0, 75.0],
    [85.0, 100.0, 115.0, 65.0, 75.0, 85.0],
    [95.0, 115.0, 130.0, 75.0, 90.0, 100.0],
    [110.0, 130.0, 145.0, 85.0, 100.0, 115.0],
    [125.0, 150.0, 170.0, 100.0, 120.0, 135.0],
    [145.0, 175.0, 195.0, 115.0, 135.0, 150.0],
    [165.0, 200.0, 225.0, 130.0, 155.0, 175.0],
    [195.0, 230.0, 260.0, 150.0, 180.0, 205.0],
    [215.0, 255.0, 290.0, 170.0, 205.0, 230.0],
    [240.0, 285.0, 320.0, 195.0, 230.0, 260.0],
    [260.0, 310.0, 350.0, 210.0, 250.0, 280.0],
    [280.0, 335.0, 380.0, 225.0, 270.0, 305.0],
    [320.0, 380.0, 430.0, 260.0, 310.0, 350.0],
];

/// Single conductors in free air at 30 °C, in amperes. Rows as [`TABLE_310_16`].
///
/// # Source
///
/// [`crate::source::NEC`], Table 310.17; the same since 2011.
pub const TABLE_310_17: [Row; 18] = [
    [25.0, 30.0, 35.0, NONE, NONE, NONE],
    [30.0, 35.0, 40.0, 25.0, 30.0, 35.0],
    [40.0, 50.0, 55.0, 35.0, 40.0, 45.0],
    [60.0, 70.0, 80.0, 45.0, 55.0, 60.0],
    [80.0, 95.0, 105.0, 60.0, 75.0, 85.0],
    [105.0, 125.0, 140.0, 80.0, 100.0, 115.0],
    [120.0, 145.0, 165.0, 95.0, 115.0, 130.0],
    [140.0, 170.0, 190.0, 110.0, 135.0, 150.0],
    [165.0, 195.0, 220.0, 130.0, 155.0, 175.0],
    [195.0, 230.0, 260.0, 150.0, 180.0, 205.0],
    [225.0, 265.0, 300.0, 175.0, 210.0, 235.0],
    [260.0, 310.0, 350.0, 200.0, 240.0, 270.0],
    [300.0, 360.0, 405.0, 235.0, 280.0, 315.0],
    [340.0, 405.0, 455.0, 265.0, 315.0, 355.0],
    [375.0, 445.0, 500.0, 290.0, 350.0, 395.0],
    [420.0, 505.0, 570.0, 330.0, 395.0, 445.0],
    [455.0, 545.0, 615.0, 355.0, 425.0, 480.0],
    [515.0, 620.0, 700.0, 405.0, 485.0, 545.0],
];

/// Greatest protective device of small conductors: size, copper, aluminium, in amperes.
///
/// # Source
///
/// [`crate::source::NEC`], 240.4(D). 18 and 16 AWG from memory, and with conditions of their own.
pub const SMALL_CONDUCTORS: [(Size, f64, f64); 5] = [
    (Size::Gauge(18), 7.0, NONE),
    (Size::Gauge(16), 10.0, NONE),
    (Size::Gauge(14), 15.0, NONE),
    (Size::Gauge(12), 20.0, 15.0),
    (Size::Gauge(10), 30.0, 25.0),
];

/// Rows of the ladder of sizes that stand before the first row of the ampacity tables.
const THINNER: usize = 2;

/// The cell for a size, or for the next thinner row.
pub(super) fn tabled(method: Method, metal: Metal, insulation: Insulation, size: Size) -> Option<f64> {
    let table = match method {
        Method::SinglesInAir => &TABLE_310_17,
        Method::Conduit | Method::Surface | Method::CableInAir => &TABLE_310_16,
    };
    let row = table.get(size.american_step()?.checked_sub(THINNER)?)?;
    let column = match insulation {
        Insulation::Bears60 | Insulation::Pvc70 => 0,
        Insulation::Bears75 => 1,
        Insulation::Bears90 | Insulation::PvCable => 2,
    };
    let cell = match metal {
        Metal::Copper => row[column],
        Metal::Aluminium => row[3 + column],
    };
    cell.is_finite().then_some(cell)
}

/// The greatest device that may protect a small conductor, in amperes; none where the size is not small.
#[must_use]
pub fn small_conductor(metal: Metal, size: Size) -> Option<f64> {
    let (_, copper, aluminium) = SMALL_CONDUCTORS.get(size.american_step()?)?;
    match metal {
        Metal::Copper => Some(*copper),
        // What is not listed may not be protected at all.
        Metal::Aluminium => Some(if aluminium.is_finite() { *aluminium } else { 0.0 }),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::conductor::AMERICAN;

    #[test]
    fn ampacity_rises_with_size_temperature_and_air_and_copper_carries_more() {
        for table in [TABLE_310_16, TABLE_310_17] {
            for column in 0..6 {
                let known: Vec<f64> = table.iter().map(|row| row[column]).filter(|cell| cell.is_finite()).collect();
                assert!(known.is_sorted_by(|a, b| a < b), "column {column}");
            }
            for row in table {
                assert!(row[0] < row[1] && row[1] < row[2]);
                assert!(row[3].is_nan() || (row[3] < row[0] && row[4] < row[1] && row[5] < row[2]));
            }
        }
        for (raceway, air) in TABLE_310_16.iter().zip(TABLE_310_17) {
            assert!(raceway.iter().zip(air).all(|(a, b)| a.is_nan() || *a < b));
        }
    }

    #[test]
    fn columns_follow_the_root_of_the_rise() {
        // I ~ √(T − 30): the 90 °C column over the 60 °C column is near √2, within the tables' rounding.
        for row in TABLE_310_16.iter().chain(&TABLE_310_17) {
            assert!((1.2..1.7).contains(&(row[2] / row[0])));
        }
    }

    #[test]
    fn small_conductors_stand_on_their_own_rows() {
        for (at, (size, ..)) in SMALL_CONDUCTORS.iter().enumerate() {
            assert_eq!(AMERICAN[at], *size);
        }
        assert_eq!(small_conductor(Metal::Copper, Size::Gauge(10)), Some(30.0));
        assert_eq!(small_conductor(Metal::Copper, Size::Gauge(8)), None);
        // 2.5 mm² lies between 14 and 12 AWG.
        assert_eq!(small_conductor(Metal::Copper, Size::Metric(250)), Some(15.0));
    }
}
