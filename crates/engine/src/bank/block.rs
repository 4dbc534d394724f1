//! Cells, blocks of cells, packs: what one of the things on the pallet holds.

use super::Ask;
use super::ask::positive;
use crate::check::Basis;
use crate::chemistry::{Chemistry, Family};
use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::{Count, Volts};

/// How far a block's stated voltage may stand from so many cells before it has to be asked for: a part of one cell.
/// *Chosen*: makers round nominal voltages to within a tenth; a third of a cell is no rounding.
const ROUNDING: f64 = 0.12;

/// Cells in series in a block that is sold as `voltage`. `None` where no count comes near. The flag is false where the
/// voltage is the name of a class rather than a count of cells, so that the count has to be confirmed.
///
/// Lead blocks of 2, 6 and 12 V hold 1, 3 and 6 cells. Lithium sold as 12, 24, 36 or 48 V is named for the lead it
/// replaces: 4 cells of LiFePO4 for each 12 V.
///
/// # Example
///
/// ```
/// use engine::bank::cells_in_block;
/// use engine::chemistry::Chemistry;
/// use engine::quantity::Volts;
///
/// assert_eq!(cells_in_block(Chemistry::Agm, Volts::new(12.0)), Some((6, true)));
/// assert_eq!(cells_in_block(Chemistry::Lfp, Volts::new(51.2)), Some((16, true)));
/// assert_eq!(cells_in_block(Chemistry::Lfp, Volts::new(12.0)), Some((4, false)));
/// assert_eq!(cells_in_block(Chemistry::NickelIron, Volts::new(2.0)), None);
/// ```
#[must_use]
pub fn cells_in_block(chemistry: Chemistry, voltage: Volts) -> Option<(u32, bool)> {
    let nominal = chemistry.figures().nominal;
    let cells = voltage / nominal;
    if !cells.is_finite() || !(0.5..1000.0).contains(&cells) {
        return None;
    }
    let classes = voltage.get() / 12.0;
    if chemistry.family() == Family::Lithium && classes >= 1.0 && classes.fract() == 0.0 {
        let named = if chemistry == Chemistry::Lfp { 4.0 * classes } else { cells.round() };
        return Some((whole(named), false));
    }
    let nearest = cells.round().max(1.0);
    let off = (cells - nearest).abs();
    if off > ROUNDING * nearest || off > 0.34 {
        return None;
    }
    Some((whole(nearest), true))
}

#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "between 1 and 1000, checked by the caller"
)]
fn whole(number: f64) -> u32 {
    number as u32
}

/// Cells in one block of the bank: entered, or by its voltage.
pub(super) fn of(ask: &Ask, basis: &mut Basis) -> Option<Count> {
    match positive(ask.cells_in_block) {
        Entry::Typed(cells) => return Some(cells),
        Entry::Unread => {
            basis.ask(Field::CellsInABlock);
            return None;
        }
        Entry::Blank => {}
    }
    let voltage = basis.need(Field::CellVoltage, positive(ask.cell_voltage));
    let chemistry = basis.need(Field::Chemistry, ask.chemistry);
    let Some((cells, sure)) = cells_in_block(chemistry?, voltage?) else {
        basis.ask(Field::CellsInABlock);
        return None;
    };
    let cells = Count::new(f64::from(cells));
    if sure { Some(cells) } else { basis.assume(Field::CellsInABlock, Entry::Blank, cells) }
}
