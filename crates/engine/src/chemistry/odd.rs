//! Which cells of a list stand apart from the rest.

use crate::quantity::Volts;
use crate::source::{self, Clause};

/// Where the rule is from.
const RULE: Clause = source::NIST_HANDBOOK.at("1.3.5.17, modified z-score above 3.5");

/// Least spread that counts: two of a hand meter's last digit. *Chosen*, so that among cells that agree to the
/// millivolt one that reads a digit off is not blamed.
const LEAST_SPREAD: f64 = 0.002;

/// Fewest cells that can say which of them is odd. *Chosen*: among three, two may be.
const FEWEST: usize = 4;

/// A cell that stands apart.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct OddCell {
    /// Its place in the list, from 1.
    pub number: usize,
    /// What it reads.
    pub reading: Volts,
    /// How far it stands from the middle reading.
    pub off: Volts,
}

/// What a list of cell voltages says.
#[derive(Clone, Debug, PartialEq)]
pub struct OddCells {
    /// The middle reading.
    pub median: Volts,
    /// Lowest to highest reading.
    pub spread: Volts,
    /// The cells that stand apart, farthest first.
    pub odd: Vec<OddCell>,
    /// The rule and where it is from.
    pub source: Clause,
}

/// Finds the readings that stand apart. `None` for fewer than four, or where one is not a number.
///
/// m = 0.6745 · |x − median| / MAD above 3.5, with MAD the middle distance from the median.
///
/// Robust: up to half of the cells may be off and it still names them, where a mean and its deviation would be dragged
/// along. A string of two kinds of cells, half and half, has no odd one by this rule.
///
/// # Source
///
/// [`source::NIST_HANDBOOK`], 1.3.5.17.
///
/// # Example
///
/// ```
/// use engine::chemistry::odd_cells;
/// use engine::quantity::Volts;
///
/// let readings = [3.31, 3.312, 3.309, 3.18, 3.311, 3.31].map(Volts::new);
/// assert_eq!(odd_cells(&readings).unwrap().odd[0].number, 4);
/// ```
#[must_use]
pub fn odd_cells(readings: &[Volts]) -> Option<OddCells> {
    if readings.len() < FEWEST || readings.iter().any(|reading| !reading.get().is_finite()) {
        return None;
    }
    let numbers: Vec<f64> = readings.iter().map(|reading| reading.get()).collect();
    let median = middle(numbers.clone());
    let distance = middle(numbers.iter().map(|number| (number - median).abs()).collect()).max(LEAST_SPREAD);
    let mut odd: Vec<OddCell> = numbers
        .iter()
        .enumerate()
        .filter(|(_, number)| 0.6745 * (**number - median).abs() / distance > 3.5)
        .map(|(place, number)| OddCell {
            number: place + 1,
            reading: Volts::new(*number),
            off: Volts::new(number - median),
        })
        .collect();
    crate::order::sort_short(&mut odd, |a, b| b.off.abs().get().total_cmp(&a.off.abs().get()));
    let highest = numbers.iter().copied().fold(f64::NEG_INFINITY, f64::max);
    let lowest = numbers.iter().copied().fold(f64::INFINITY, f64::min);
    Some(OddCells { median: Volts::new(median), spread: Volts::new(highest - lowest), odd, source: RULE })
}

/// The middle of a list that is not empty.
fn middle(mut numbers: Vec<f64>) -> f64 {
    crate::order::sort_short(&mut numbers, f64::total_cmp);
    let half = numbers.len() / 2;
    if numbers.len() % 2 == 1 { numbers[half] } else { f64::midpoint(numbers[half - 1], numbers[half]) }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn odd(readings: &[f64]) -> Vec<usize> {
        let readings: Vec<Volts> = readings.iter().copied().map(Volts::new).collect();
        odd_cells(&readings).unwrap().odd.iter().map(|cell| cell.number).collect()
    }

    #[test]
    fn cells_that_agree_to_the_last_digit_blame_nobody() {
        assert_eq!(odd(&[2.11, 2.11, 2.11, 2.111, 2.11]), [] as [usize; 0]);
    }

    #[test]
    fn two_weak_cells_do_not_hide_each_other() {
        assert_eq!(odd(&[2.11, 2.12, 1.95, 2.115, 2.11, 1.80, 2.108, 2.112]), [6, 3]);
    }

    #[test]
    fn too_few_or_unreadable_cells_say_nothing() {
        assert_eq!(odd_cells(&[Volts::new(2.1); 3]), None);
        assert_eq!(odd_cells(&[Volts::new(f64::NAN); 6]), None);
    }
}
