//! Ampacity of cable made for PV: copper, its conductor at 120 °C, air at 60 °C.

use super::{Insulation, Laid, Method, iec};
use crate::conductor::{Metal, Size};
use crate::quantity::Celsius;

/// Single in air, single on a surface, two touching on a surface, in amperes.
/// Rows are [`crate::conductor::METRIC`] from 1.5 mm² on.
///
/// # Source
///
/// [`crate::source::EN_50618`], annex A, all from memory and not confirmed: read the cable's own sheet.
pub const EN_50618: [[f64; 3]; 12] = [
    [30.0, 29.0, 24.0],
    [41.0, 39.0, 33.0],
    [55.0, 52.0, 44.0],
    [70.0, 67.0, 57.0],
    [98.0, 93.0, 79.0],
    [132.0, 125.0, 107.0],
    [176.0, 167.0, 142.0],
    [218.0, 207.0, 176.0],
    [276.0, 262.0, 221.0],
    [347.0, 330.0, 278.0],
    [416.0, 395.0, 333.0],
    [488.0, 464.0, 390.0],
];

/// Rows of the ladder of sizes that stand before the first row of the table.
const THINNER: usize = 3;
const LIMIT: f64 = 120.0;
const BASE: f64 = 60.0;

/// Whether the table speaks of a conductor laid so: not in conduit, where the XLPE column stands in, and no aluminium.
pub(super) fn tables(laid: &Laid) -> bool {
    laid.method != Method::Conduit && laid.conductor.metal() == Metal::Copper
}

/// The cell for a size, or for the next thinner row. Past 120 mm² the last row.
///
/// The two cables of a string lie side by side, so the column of two touching holds. *Chosen*: in conduit, which the
/// table leaves out, the XLPE column of method B1 stands in.
pub(super) fn tabled(method: Method, size: Size) -> Option<f64> {
    if method == Method::Conduit {
        return iec::tabled(method, Metal::Copper, Insulation::Bears90, size);
    }
    let row = size.metric_step()?.checked_sub(THINNER)?.min(EN_50618.len() - 1);
    Some(EN_50618[row][2])
}

/// Factor for the air round it: √((120 − Tₐ) / 60), never above 1. `None` from 120 °C on.
///
/// The factors printed with the table (0.92, 0.84, 0.75 at 70, 80, 90 °C, from memory) lie above this curve; the lower
/// is taken.
#[must_use]
pub fn ambient(air: Celsius) -> Option<f64> {
    let room = LIMIT - air.get();
    (room > 0.0).then(|| (room / (LIMIT - BASE)).sqrt().min(1.0))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ampacity_rises_with_size_and_freedom() {
        assert!(EN_50618.is_sorted_by(|a, b| a[0] < b[0] && a[1] < b[1] && a[2] < b[2]));
        assert!(EN_50618.iter().all(|row| row[0] > row[1] && row[1] > row[2]));
    }

    #[test]
    fn no_room_is_left_at_the_limit() {
        assert_eq!(ambient(Celsius::new(120.0)), None);
        assert_eq!(ambient(Celsius::new(20.0)), Some(1.0));
    }
}
