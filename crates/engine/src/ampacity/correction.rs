//! Corrections of ampacity: for the air round a conductor, and for others that heat it.

use super::Insulation;
use crate::quantity::Celsius;

const NONE: f64 = f64::NAN;

/// Ambient correction, base 30 °C: upper end of the band in °C, then the 60, 75 and 90 °C columns.
/// The first band is open below.
///
/// # Source
///
/// [`crate::source::NEC`], Table 310.15(B)(1)(1).
pub const NORTH_AMERICAN_AMBIENT: [(f64, [f64; 3]); 16] = [
    (10.0, [1.29, 1.2, 1.15]),
    (15.0, [1.22, 1.15, 1.12]),
    (20.0, [1.15, 1.11, 1.08]),
    (25.0, [1.08, 1.05, 1.04]),
    (30.0, [1.0, 1.0, 1.0]),
    (35.0, [0.91, 0.94, 0.96]),
    (40.0, [0.82, 0.88, 0.91]),
    (45.0, [0.71, 0.82, 0.87]),
    (50.0, [0.58, 0.75, 0.82]),
    (55.0, [0.41, 0.67, 0.76]),
    (60.0, [NONE, 0.58, 0.71]),
    (65.0, [NONE, 0.47, 0.65]),
    (70.0, [NONE, 0.33, 0.58]),
    (75.0, [NONE, NONE, 0.5]),
    (80.0, [NONE, NONE, 0.41]),
    (85.0, [NONE, NONE, 0.29]),
];

/// Ambient correction, base 30 °C: air in °C, then PVC at 70 °C and XLPE at 90 °C.
///
/// # Source
///
/// [`crate::source::IEC_60364_5_52`], Table B.52.14.
pub const IEC_AMBIENT: [(f64, [f64; 2]); 15] = [
    (10.0, [1.22, 1.15]),
    (15.0, [1.17, 1.12]),
    (20.0, [1.12, 1.08]),
    (25.0, [1.06, 1.04]),
    (30.0, [1.0, 1.0]),
    (35.0, [0.94, 0.96]),
    (40.0, [0.87, 0.91]),
    (45.0, [0.79, 0.87]),
    (50.0, [0.71, 0.82]),
    (55.0, [0.61, 0.76]),
    (60.0, [0.5, 0.71]),
    (65.0, [NONE, 0.65]),
    (70.0, [NONE, 0.58]),
    (75.0, [NONE, 0.5]),
    (80.0, [NONE, 0.41]),
];

/// More than three current-carrying conductors together: from how many on, factor.
///
/// Where they run together for more than 600 mm.
///
/// # Source
///
/// [`crate::source::NEC`], Table 310.15(C)(1).
pub const NORTH_AMERICAN_TOGETHER: [(f64, f64); 6] =
    [(4.0, 0.8), (7.0, 0.7), (10.0, 0.5), (21.0, 0.45), (31.0, 0.4), (41.0, 0.35)];

/// How circuits lie together, in the words of IEC 60364-5-52.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Arrangement {
    /// Bunched in air, on a surface, embedded or enclosed.
    Bunched,
    /// Single layer on a wall, a floor or an unperforated tray.
    OnWall,
    /// Single layer under a wooden ceiling.
    UnderCeiling,
    /// Single layer on a perforated tray.
    PerforatedTray,
    /// Single layer on ladder or cleats.
    Ladder,
}

/// Circuits together, one to nine, row by row of [`Arrangement`].
///
/// # Source
///
/// [`crate::source::IEC_60364_5_52`], Table B.52.17, items 1 to 5; items 3 to 5 from memory.
pub const IEC_GROUPING: [[f64; 9]; 5] = [
    [1.0, 0.8, 0.7, 0.65, 0.6, 0.57, 0.54, 0.52, 0.5],
    [1.0, 0.85, 0.79, 0.75, 0.73, 0.72, 0.72, 0.71, 0.7],
    [0.95, 0.81, 0.72, 0.68, 0.66, 0.64, 0.63, 0.62, 0.61],
    [1.0, 0.88, 0.82, 0.77, 0.75, 0.73, 0.73, 0.72, 0.72],
    [1.0, 0.87, 0.82, 0.8, 0.8, 0.79, 0.79, 0.78, 0.78],
];

/// More than nine circuits bunched: up to how many, factor.
///
/// # Source
///
/// [`crate::source::IEC_60364_5_52`], Table B.52.17, item 1, from memory.
pub const IEC_GROUPING_MORE: [(f64, f64); 3] = [(12.0, 0.45), (16.0, 0.41), (20.0, 0.38)];

/// Factor for air at `air` by [`NORTH_AMERICAN_AMBIENT`]. `None` past the end of the column.
#[must_use]
pub fn north_american_ambient(insulation: Insulation, air: Celsius) -> Option<f64> {
    let column = match insulation {
        Insulation::Bears60 | Insulation::Pvc70 => 0,
        Insulation::Bears75 => 1,
        Insulation::Bears90 | Insulation::PvCable => 2,
    };
    row_for(&NORTH_AMERICAN_AMBIENT, column, air)
}

/// Factor for air at `air` by [`IEC_AMBIENT`]; between two rows the hotter. `None` past the end of the column.
///
/// A conductor that bears 60 °C has no column; √((60 − Tₐ) / 30), by which the others are made, stands in. *Chosen*.
#[must_use]
pub fn iec_ambient(insulation: Insulation, air: Celsius) -> Option<f64> {
    match insulation {
        Insulation::Bears60 => {
            let room = 60.0 - air.get().max(10.0);
            (room > 0.0).then(|| (room / 30.0).sqrt())
        }
        Insulation::Pvc70 | Insulation::Bears75 => row_for(&IEC_AMBIENT, 0, air),
        Insulation::Bears90 | Insulation::PvCable => row_for(&IEC_AMBIENT, 1, air),
    }
}

fn row_for<const N: usize>(table: &[(f64, [f64; N])], column: usize, air: Celsius) -> Option<f64> {
    // A temperature that was converted from another scale may stand above a row by the last bit.
    let row = table.partition_point(|(upper, _)| *upper + 1e-6 < air.get());
    table.get(row).map(|(_, cells)| cells[column]).filter(|cell| cell.is_finite())
}

/// Factor for `conductors` that carry current together, by [`NORTH_AMERICAN_TOGETHER`].
#[must_use]
pub fn north_american_together(conductors: f64) -> f64 {
    let row = NORTH_AMERICAN_TOGETHER.partition_point(|(from, _)| *from <= conductors);
    row.checked_sub(1).map_or(1.0, |row| NORTH_AMERICAN_TOGETHER[row].1)
}

/// Factor for `circuits` together, by [`IEC_GROUPING`] and [`IEC_GROUPING_MORE`].
///
/// A single layer loses nothing more past nine circuits, as the table notes. Past twenty bunched circuits the heat is
/// taken as shared: 0.38 · √(20 / n), *chosen*.
#[must_use]
pub fn iec_grouping(arrangement: Arrangement, circuits: f64) -> f64 {
    let row = &IEC_GROUPING[arrangement as usize];
    let circuits = circuits.max(1.0);
    if circuits <= 9.0 {
        return row[circuits.ceil() as usize - 1];
    }
    if arrangement != Arrangement::Bunched {
        return row[8];
    }
    let more = IEC_GROUPING_MORE.partition_point(|(to, _)| *to < circuits);
    IEC_GROUPING_MORE.get(more).map_or_else(|| 0.38 * (20.0 / circuits).sqrt(), |(_, factor)| *factor)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ambient_factors_follow_the_root_of_what_is_left() {
        let near = |limit: f64, air: f64, cell: f64| {
            let law = ((limit - air) / (limit - 30.0)).sqrt();
            assert!(cell.is_nan() || (law - cell).abs() < 0.0051, "{air} °C, {limit} °C column: {cell} against {law}");
        };
        for (upper, [sixty, seventy_five, ninety]) in NORTH_AMERICAN_AMBIENT {
            near(60.0, upper, sixty);
            near(75.0, upper, seventy_five);
            near(90.0, upper, ninety);
        }
        for (air, [pvc, xlpe]) in IEC_AMBIENT {
            near(70.0, air, pvc);
            near(90.0, air, xlpe);
        }
    }

    #[test]
    fn more_together_never_carries_more() {
        let all = |number: u32| {
            let of = |arrangement| iec_grouping(arrangement, f64::from(number));
            [
                north_american_together(f64::from(number)),
                of(Arrangement::Bunched),
                of(Arrangement::OnWall),
                of(Arrangement::UnderCeiling),
                of(Arrangement::PerforatedTray),
                of(Arrangement::Ladder),
            ]
        };
        for number in 1..60 {
            let (fewer, more) = (all(number), all(number + 1));
            assert!(fewer.iter().zip(more).all(|(fewer, more)| *fewer >= more), "{number}");
        }
    }

    #[test]
    fn between_two_rows_the_hotter_holds_and_past_the_end_nothing_is_left() {
        let at = |air| iec_ambient(Insulation::Pvc70, Celsius::new(air));
        assert_eq!(at(45.0), Some(0.79));
        assert_eq!(at(45.1), Some(0.71));
        assert_eq!(at(-40.0), Some(1.22));
        assert_eq!(at(60.1), None);
        assert_eq!(north_american_ambient(Insulation::Bears60, Celsius::new(56.0)), None);
        // 113 °F is 45 °C, to the last bit or not.
        let hot = crate::unit::Unit::DegreeFahrenheit.to_base(113.0);
        assert_eq!(north_american_ambient(Insulation::Bears90, Celsius::new(hot)), Some(0.87));
    }
}
