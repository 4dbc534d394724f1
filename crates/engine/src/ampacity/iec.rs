//! Ampacity tables of IEC 60364-5-52: two loaded conductors, air at 30 °C.

use super::{Insulation, Method};
use crate::conductor::{Metal, Size};

const NONE: f64 = f64::NAN;

/// Columns of one row: methods B1, C, E and F.
pub type Row = [f64; 4];

/// Copper, PVC at 70 °C, in amperes. Rows are [`crate::conductor::METRIC`] from 1.5 mm² on.
///
/// # Source
///
/// [`crate::source::IEC_60364_5_52`], Tables B.52.2 and B.52.10. Columns C and E, and all above 120 mm², from memory.
pub const COPPER_PVC: [Row; 16] = [
    [17.5, 19.5, 22.0, NONE],
    [24.0, 27.0, 30.0, NONE],
    [32.0, 36.0, 40.0, NONE],
    [41.0, 46.0, 51.0, NONE],
    [57.0, 63.0, 70.0, NONE],
    [76.0, 85.0, 94.0, NONE],
    [101.0, 112.0, 119.0, 131.0],
    [125.0, 138.0, 148.0, 162.0],
    [151.0, 168.0, 180.0, 196.0],
    [192.0, 213.0, 232.0, 251.0],
    [232.0, 258.0, 282.0, 304.0],
    [269.0, 299.0, 328.0, 352.0],
    [300.0, 344.0, 379.0, 406.0],
    [341.0, 392.0, 434.0, 463.0],
    [400.0, 461.0, 514.0, 546.0],
    [458.0, 530.0, 593.0, 629.0],
];

/// Copper, XLPE or EPR at 90 °C, in amperes. Rows as [`COPPER_PVC`].
///
/// # Source
///
/// [`crate::source::IEC_60364_5_52`], Tables B.52.3 and B.52.12. Columns C and E, and all above 120 mm², from memory.
pub const COPPER_XLPE: [Row; 16] = [
    [23.0, 24.0, 26.0, NONE],
    [31.0, 33.0, 36.0, NONE],
    [42.0, 45.0, 49.0, NONE],
    [54.0, 58.0, 63.0, NONE],
    [75.0, 80.0, 86.0, NONE],
    [100.0, 107.0, 115.0, NONE],
    [133.0, 138.0, 149.0, 161.0],
    [164.0, 171.0, 185.0, 200.0],
    [198.0, 209.0, 225.0, 242.0],
    [253.0, 269.0, 289.0, 310.0],
    [306.0, 328.0, 352.0, 377.0],
    [354.0, 382.0, 410.0, 437.0],
    [393.0, 441.0, 473.0, 504.0],
    [449.0, 506.0, 542.0, 575.0],
    [528.0, 599.0, 641.0, 679.0],
    [603.0, 693.0, 741.0, 783.0],
];

/// Aluminium, PVC at 70 °C, in amperes. Rows as [`COPPER_PVC`]; thinner than 10 mm² is not used in buildings.
///
/// # Source
///
/// [`crate::source::IEC_60364_5_52`], Tables B.52.2 and B.52.11, all from memory.
pub const ALUMINIUM_PVC: [Row; 16] = [
    [NONE, NONE, NONE, NONE],
    [NONE, NONE, NONE, NONE],
    [NONE, NONE, NONE, NONE],
    [NONE, NONE, NONE, NONE],
    [44.0, 49.0, 54.0, NONE],
    [60.0, 66.0, 73.0, NONE],
    [79.0, 83.0, 89.0, 98.0],
    [97.0, 103.0, 111.0, 122.0],
    [118.0, 125.0, 135.0, 149.0],
    [150.0, 160.0, 173.0, 192.0],
    [181.0, 195.0, 210.0, 235.0],
    [210.0, 226.0, 244.0, 273.0],
    [234.0, 261.0, 282.0, 316.0],
    [266.0, 298.0, 322.0, 363.0],
    [312.0, 352.0, 380.0, 430.0],
    [358.0, 406.0, 439.0, 497.0],
];

/// Aluminium, XLPE or EPR at 90 °C, in amperes. Rows as [`ALUMINIUM_PVC`].
///
/// # Source
///
/// [`crate::source::IEC_60364_5_52`], Tables B.52.3 and B.52.13, all from memory.
pub const ALUMINIUM_XLPE: [Row; 16] = [
    [NONE, NONE, NONE, NONE],
    [NONE, NONE, NONE, NONE],
    [NONE, NONE, NONE, NONE],
    [NONE, NONE, NONE, NONE],
    [59.0, 62.0, 67.0, NONE],
    [79.0, 84.0, 91.0, NONE],
    [105.0, 101.0, 108.0, 121.0],
    [130.0, 126.0, 135.0, 150.0],
    [157.0, 154.0, 164.0, 184.0],
    [200.0, 198.0, 211.0, 237.0],
    [242.0, 241.0, 257.0, 289.0],
    [281.0, 280.0, 300.0, 337.0],
    [307.0, 324.0, 346.0, 389.0],
    [351.0, 371.0, 397.0, 447.0],
    [412.0, 439.0, 470.0, 530.0],
    [471.0, 508.0, 543.0, 613.0],
];

/// Rows of the ladder of sizes that stand before the first row of these tables.
const THINNER: usize = 3;

/// What a conductor that bears 60 °C carries, as a share of the PVC column: √((60 − 30) / (70 − 30)).
///
/// *Chosen*: these tables have no 60 °C column; the law by which their ambient factors are made gives one.
const SIXTY_OF_PVC: f64 = 0.866_025_403_784_438_6;

/// The cell for a size, or for the next thinner row.
///
/// Method F begins at 25 mm²; below, singles take column E, which is lower. *Chosen*.
pub(super) fn tabled(method: Method, metal: Metal, insulation: Insulation, size: Size) -> Option<f64> {
    let (table, share) = match (metal, insulation) {
        (Metal::Copper, Insulation::Pvc70 | Insulation::Bears75) => (&COPPER_PVC, 1.0),
        (Metal::Aluminium, Insulation::Pvc70 | Insulation::Bears75) => (&ALUMINIUM_PVC, 1.0),
        (Metal::Copper, Insulation::Bears60) => (&COPPER_PVC, SIXTY_OF_PVC),
        (Metal::Aluminium, Insulation::Bears60) => (&ALUMINIUM_PVC, SIXTY_OF_PVC),
        (Metal::Copper, Insulation::Bears90 | Insulation::PvCable) => (&COPPER_XLPE, 1.0),
        (Metal::Aluminium, Insulation::Bears90 | Insulation::PvCable) => (&ALUMINIUM_XLPE, 1.0),
    };
    let row = table.get(size.metric_step()?.checked_sub(THINNER)?)?;
    let cell = match method {
        Method::Conduit => row[0],
        Method::Surface => row[1],
        Method::CableInAir => row[2],
        Method::SinglesInAir if row[3].is_finite() => row[3],
        Method::SinglesInAir => row[2],
    };
    cell.is_finite().then_some(cell * share)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ampacity_rises_with_size_and_freedom() {
        for table in [COPPER_PVC, COPPER_XLPE, ALUMINIUM_PVC, ALUMINIUM_XLPE] {
            for column in 0..4 {
                let known: Vec<f64> = table.iter().map(|row| row[column]).filter(|cell| cell.is_finite()).collect();
                assert!(known.is_sorted_by(|a, b| a < b), "column {column}: {known:?}");
            }
            for row in table {
                // Clipped aluminium of 25 to 120 mm² in XLPE really stands a little below that in conduit.
                assert!(row[0].is_nan() || (row[0] * 0.95 < row[1] && row[1] < row[2]));
                assert!(row[3].is_nan() || row[2] < row[3]);
            }
        }
    }

    #[test]
    fn cells_follow_the_law_of_size() {
        // I = A · S^m with m near 0.6: from row to row the exponent stays in a band that a slipped digit leaves.
        const AREAS: [f64; 16] =
            [1.5, 2.5, 4.0, 6.0, 10.0, 16.0, 25.0, 35.0, 50.0, 70.0, 95.0, 120.0, 150.0, 185.0, 240.0, 300.0];
        for table in [COPPER_PVC, COPPER_XLPE, ALUMINIUM_PVC, ALUMINIUM_XLPE] {
            for column in 0..4 {
                for (at, pair) in table.windows(2).enumerate() {
                    let (a, b) = (pair[0][column], pair[1][column]);
                    if a.is_finite() && b.is_finite() {
                        let exponent = (b / a).ln() / (AREAS[at + 1] / AREAS[at]).ln();
                        assert!((0.35..0.80).contains(&exponent), "row {at}, column {column}: {exponent}");
                    }
                }
            }
        }
    }

    #[test]
    fn xlpe_stands_over_pvc_and_aluminium_under_copper() {
        let within = |low: &[Row; 16], high: &[Row; 16], band: core::ops::Range<f64>| {
            for (a, b) in low.iter().flatten().zip(high.iter().flatten()) {
                assert!(a.is_nan() || b.is_nan() || band.contains(&(b / a)), "{a}, {b}");
            }
        };
        within(&COPPER_PVC, &COPPER_XLPE, 1.15..1.40);
        within(&COPPER_PVC, &ALUMINIUM_PVC, 0.70..0.82);
        within(&COPPER_XLPE, &ALUMINIUM_XLPE, 0.70..0.82);
    }
}
