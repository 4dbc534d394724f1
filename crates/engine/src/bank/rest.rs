//! Cells at rest: what a meter reads on each, what charge that is, and which stand apart.

use super::Ask;
use crate::check::Basis;
use crate::chemistry::{ChargeReading, OddCell, RATED_AT, charge_at_rest, odd_cells};
use crate::quantity::{Celsius, Volts};

/// A good hand meter on a cell. *Chosen*: 2 mV either way.
const METER: Volts = Volts::new(0.002);

/// The temperature that stands in where none was entered.
pub const RESTED_AT: Celsius = RATED_AT;

/// What rested cells or blocks tell.
#[derive(Clone, Debug, PartialEq)]
pub struct AtRest {
    /// The middle reading, and the mean of fewer than four; of blocks, for one of the cells inside.
    pub each: Volts,
    /// The charge that goes with it, and its band.
    pub charge: ChargeReading,
    /// Those that stand apart from the rest, farthest first. None is named among fewer than four.
    pub odd: Vec<OddCell>,
}

/// Reads the voltages of cells or blocks that have rested, taken at `temperature`. `None` where there are none, or where
/// the chemistry or what a block holds is missing.
///
/// The charge is that of the middle reading: an odd one neither drags it along nor is told by it.
///
/// # Example
///
/// Four blocks of 12 V, AGM lead, six cells in each: 12.24 V is 2.04 V a cell.
///
/// ```
/// use engine::bank::{Ask, RESTED_AT, at_rest};
/// use engine::chemistry::Chemistry;
/// use engine::entry::Entry;
/// use engine::quantity::Volts;
///
/// let ask = Ask { chemistry: Entry::Typed(Chemistry::Agm), cell_voltage: Entry::of(12.0), ..Ask::default() };
/// let found = at_rest(&ask, &[Volts::new(12.24); 4], RESTED_AT).unwrap();
/// assert!((found.each.get() - 2.04).abs() < 1e-12);
/// ```
#[must_use]
pub fn at_rest(ask: &Ask, readings: &[Volts], temperature: Celsius) -> Option<AtRest> {
    let basis = &mut Basis::default();
    let (chemistry, _) = ask.chemistry(basis)?;
    let in_block = ask.block_cells(basis)?.get();
    let found = odd_cells(readings);
    let sum: Volts = readings.iter().copied().sum();
    let middle = found.as_ref().map_or(sum / readings.len() as f64, |found| found.median);
    let each = middle / in_block;
    if !each.get().is_finite() {
        return None;
    }
    let charge = charge_at_rest(chemistry, each, temperature, METER / in_block);
    Some(AtRest { each, charge, odd: found.map(|found| found.odd).unwrap_or_default() })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::chemistry::Chemistry;
    use crate::entry::Entry;

    fn ask(chemistry: Chemistry, volts: f64) -> Ask {
        Ask { chemistry: Entry::Typed(chemistry), cell_voltage: Entry::of(volts), ..Ask::default() }
    }

    #[test]
    fn blocks_are_read_by_the_cells_inside() {
        // 12.24 V of six cells is the 2.04 V that half a charge rests at, at 26.7 °C.
        let found = at_rest(&ask(Chemistry::VentedLead, 12.0), &[Volts::new(12.24); 4], Celsius::new(26.7)).unwrap();
        assert!((found.charge.likely.get() - 50.0).abs() < 1e-6, "{found:?}");
        assert!(found.charge.least < found.charge.likely && found.charge.likely < found.charge.most);
        assert_eq!(found.odd, []);
    }

    #[test]
    fn lithium_iron_leaves_most_of_the_scale_open_and_the_weak_cell_is_named() {
        let readings = [3.31, 3.312, 3.309, 3.18, 3.311, 3.31].map(Volts::new);
        let found = at_rest(&ask(Chemistry::Lfp, 3.2), &readings, RESTED_AT).unwrap();
        assert!(found.charge.open().get() > 20.0, "{found:?}");
        assert_eq!(found.odd.iter().map(|one| one.number).collect::<Vec<_>>(), [4]);
    }

    #[test]
    fn no_reading_and_no_chemistry_tell_nothing() {
        assert_eq!(at_rest(&ask(Chemistry::Lfp, 3.2), &[], RESTED_AT), None);
        assert_eq!(at_rest(&Ask::default(), &[Volts::new(3.3); 4], RESTED_AT), None);
        assert_eq!(at_rest(&ask(Chemistry::Lfp, 3.2), &[Volts::new(f64::NAN); 4], RESTED_AT), None);
    }
}
