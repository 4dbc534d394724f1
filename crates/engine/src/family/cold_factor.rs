//! How much a crystalline module's open-circuit voltage gains in the cold, where its coefficient is not known.

use crate::quantity::Celsius;
use crate::source::{self, Clause};

/// Rows of the table: down to this temperature, the rated voltage is multiplied by this.
///
/// Source: NFPA 70, Table 690.7(A), crystalline and multicrystalline silicon; IEC 62548 prints the same table.
/// From memory; only the upper end, 1.25, was met elsewhere (a module maker's installation manual).
pub const DOWN_TO: &[(Celsius, f64)] = &[
    (Celsius::new(25.0), 1.00),
    (Celsius::new(20.0), 1.02),
    (Celsius::new(15.0), 1.04),
    (Celsius::new(10.0), 1.06),
    (Celsius::new(5.0), 1.08),
    (Celsius::new(0.0), 1.10),
    (Celsius::new(-5.0), 1.12),
    (Celsius::new(-10.0), 1.14),
    (Celsius::new(-15.0), 1.16),
    (Celsius::new(-20.0), 1.18),
    (Celsius::new(-25.0), 1.20),
    (Celsius::new(-30.0), 1.21),
    (Celsius::new(-35.0), 1.23),
    (Celsius::new(-40.0), 1.25),
];

/// Gain for each kelvin below the end of the table.
///
/// *Chosen*: 0.40 %/K of the rated voltage, the steepest that this program accepts as a coefficient of one module.
/// It would change if a code printed rows below −40 °C.
pub const PAST_THE_TABLE: f64 = 0.0040;

/// The factor on rated open-circuit voltage at air temperature `low`, and where it is from.
///
/// Between two rows the colder one counts. Below the table's last row, at −40 °C, [`PAST_THE_TABLE`] goes on.
///
/// Crystalline silicon only: thin-film modules need their own coefficient.
///
/// # Source
///
/// [`source::NEC`], Table 690.7(A).
///
/// # Example
///
/// ```
/// use engine::{family::cold_factor, quantity::Celsius};
/// assert_eq!(cold_factor(Celsius::new(-38.0)).0, 1.25);
/// ```
#[must_use]
pub fn cold_factor(low: Celsius) -> (f64, Clause) {
    for (down_to, factor) in DOWN_TO {
        if low >= *down_to {
            return (*factor, source::NEC.at("Table 690.7(A); IEC 62548 prints the same"));
        }
    }
    let (end, factor) = DOWN_TO[DOWN_TO.len() - 1];
    (
        factor + PAST_THE_TABLE * (end - low).get(),
        source::CHOSEN.at("0.40 %/K below the code's table, which ends at −40 °C"),
    )
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn colder_is_never_less_and_rows_are_in_order() {
        for pair in DOWN_TO.windows(2) {
            assert!(pair[1].0 < pair[0].0 && pair[1].1 > pair[0].1);
        }
        let mut last = 0.0;
        for tenth in (-900..400).rev() {
            let (factor, _) = cold_factor(Celsius::new(f64::from(tenth) / 10.0));
            assert!(factor >= last, "at {tenth} tenths");
            last = factor;
        }
    }

    #[test]
    fn between_two_rows_the_colder_one_counts() {
        assert_eq!(cold_factor(Celsius::new(-15.5)).0, 1.18);
        assert_eq!(cold_factor(Celsius::new(-16.0)).0, 1.18);
        assert_eq!(cold_factor(Celsius::new(-15.0)).0, 1.16);
    }
}
