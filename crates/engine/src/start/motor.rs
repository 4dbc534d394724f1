//! Motors by their nameplates: code letters, full-load and locked-rotor currents.

/// Locked-rotor code letters: letter, and kVA for each horsepower, least and greatest. V has no upper end.
///
/// # Source
///
/// [`crate::source::NEC`], Table 430.7(B), from memory and met in handbook pages.
#[allow(clippy::approx_constant, reason = "a figure of the table, no circle")]
pub const CODE_LETTERS: [(char, f64, f64); 19] = [
    ('A', 0.0, 3.14),
    ('B', 3.15, 3.54),
    ('C', 3.55, 3.99),
    ('D', 4.0, 4.49),
    ('E', 4.5, 4.99),
    ('F', 5.0, 5.59),
    ('G', 5.6, 6.29),
    ('H', 6.3, 7.09),
    ('J', 7.1, 7.99),
    ('K', 8.0, 8.99),
    ('L', 9.0, 9.99),
    ('M', 10.0, 11.19),
    ('N', 11.2, 12.49),
    ('P', 12.5, 13.99),
    ('R', 14.0, 15.99),
    ('S', 16.0, 17.99),
    ('T', 18.0, 19.99),
    ('U', 20.0, 22.39),
    ('V', 22.4, f64::INFINITY),
];

/// Full-load currents of single-phase motors: horsepower, then amperes at 115, 200, 208 and 230 V.
///
/// # Source
///
/// [`crate::source::NEC`], Table 430.248.
pub const FULL_LOAD: [(f64, [f64; 4]); 12] = [
    (1.0 / 6.0, [4.4, 2.5, 2.4, 2.2]),
    (0.25, [5.8, 3.3, 3.2, 2.9]),
    (1.0 / 3.0, [7.2, 4.1, 4.0, 3.6]),
    (0.5, [9.8, 5.6, 5.4, 4.9]),
    (0.75, [13.8, 7.9, 7.6, 6.9]),
    (1.0, [16.0, 9.2, 8.8, 8.0]),
    (1.5, [20.0, 11.5, 11.0, 10.0]),
    (2.0, [24.0, 13.8, 13.2, 12.0]),
    (3.0, [34.0, 19.6, 18.7, 17.0]),
    (5.0, [56.0, 32.2, 30.8, 28.0]),
    (7.5, [80.0, 46.0, 44.0, 40.0]),
    (10.0, [100.0, 57.5, 55.0, 50.0]),
];

/// Locked-rotor currents of single-phase motors: horsepower, then amperes at 115, 208 and 230 V.
///
/// # Source
///
/// [`crate::source::NEC`], Table 430.251(A). 10 hp at 115 V is printed as 1000 A where six times the full load is 600 A;
/// kept as printed, the greater.
pub const LOCKED_ROTOR: [(f64, [f64; 3]); 9] = [
    (0.5, [58.8, 32.5, 29.4]),
    (0.75, [82.8, 45.8, 41.4]),
    (1.0, [96.0, 53.0, 48.0]),
    (1.5, [120.0, 66.0, 60.0]),
    (2.0, [144.0, 80.0, 72.0]),
    (3.0, [204.0, 113.0, 102.0]),
    (5.0, [336.0, 186.0, 168.0]),
    (7.5, [480.0, 265.0, 240.0]),
    (10.0, [1000.0, 332.0, 300.0]),
];

/// kVA for each horsepower of a code letter, least and greatest.
#[must_use]
pub fn code_letter(letter: char) -> Option<(f64, f64)> {
    let letter = letter.to_ascii_uppercase();
    CODE_LETTERS.iter().find(|row| row.0 == letter).map(|row| (row.1, row.2))
}

/// Column of the tables for a voltage, by its nearest class.
const fn column(volts: f64, columns: usize) -> Option<usize> {
    Some(match (volts, columns) {
        (100.0..=130.0, _) => 0,
        (195.0..=203.0, 4) => 1,
        (203.0..=215.0, 4) => 2,
        (195.0..=215.0, 3) => 1,
        (215.0..=250.0, 4) => 3,
        (215.0..=250.0, 3) => 2,
        _ => return None,
    })
}

/// Full-load amperes of a motor of `horsepower` at `volts`, by the next row up. `None` outside the table.
#[must_use]
pub fn full_load(horsepower: f64, volts: f64) -> Option<f64> {
    let at = column(volts, 4)?;
    FULL_LOAD.iter().find(|row| row.0 >= horsepower - 1e-5).map(|row| row.1[at])
}

/// Locked-rotor amperes of the same.
#[must_use]
pub fn locked_rotor(horsepower: f64, volts: f64) -> Option<f64> {
    let at = column(volts, 3)?;
    LOCKED_ROTOR.iter().find(|row| row.0 >= horsepower - 1e-5).map(|row| row.1[at])
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn letters_follow_one_another_without_a_gap() {
        for pair in CODE_LETTERS.windows(2) {
            assert!((pair[1].1 - pair[0].2 - 0.01).abs() < 1e-9, "{pair:?}");
        }
        assert_eq!(code_letter('j'), Some((7.1, 7.99)));
        assert_eq!(code_letter('I'), None);
    }

    #[test]
    fn a_locked_rotor_takes_about_six_times_the_full_load() {
        for (horsepower, row) in LOCKED_ROTOR {
            for (volts, amps) in [115.0, 208.0, 230.0].into_iter().zip(row) {
                let ratio = amps / full_load(horsepower, volts).unwrap();
                // The one cell that breaks the rule is kept as printed: see its table.
                assert!((5.9..6.1).contains(&ratio) || (horsepower, volts) == (10.0, 115.0), "{horsepower} {volts}");
            }
        }
    }
}
