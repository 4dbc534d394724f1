//! What the shelf of a bank is asked with: its places, its cells, and how they are to be joined.

use super::{Cell, CellVolts, Parallel, PlusOn, Posts, Shelf, ShelfError, Stand, TakeOff, Wiring, Wish};
use crate::bank::{self, cells_in_block};
use crate::check::FieldSet;
use crate::chemistry::{Chemistry, Family, rested};
use crate::choice::Choice;
use crate::entry::Entry;
use crate::field::Field;
use crate::pad::Pad;
use crate::quantity::{Count, Metres, Percent, Quantity};
use crate::sharing::Arrangement;

/// Everything that a layout is made from.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Asked {
    /// The places.
    pub shelf: Shelf,
    /// How many in series and side by side.
    pub wiring: Wiring,
    /// What a cell reads.
    pub volts: CellVolts,
    /// What else is wanted.
    pub wish: Wish,
}

/// Why there is no layout to make.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Lacks {
    /// Inputs that are missing.
    Fields(FieldSet),
    /// What was entered allows none.
    Refused(ShelfError),
}

impl Choice for Posts {
    fn of_key(key: &str) -> Option<Self> {
        Some(match key {
            "ends" => Self::Ends,
            "same-side" => Self::LongEdge(PlusOn::Left),
            "corners" => Self::Diagonal(PlusOn::Left),
            _ => return None,
        })
    }
}

impl Choice for Parallel {
    fn of_key(key: &str) -> Option<Self> {
        Some(match key {
            "strings" => Self::SeparateStrings,
            "groups" => Self::Groups,
            _ => return None,
        })
    }
}

/// Middle of a post from the edge it stands at, as a share of that side. *Chosen*: what most cells have.
const INSET: f64 = 0.15;
/// Between two cells of a row. *Chosen*: room for a sheet of insulation.
const BESIDE: Metres = Metres::new(0.002);
/// Between two rows. *Chosen*: room for a hand's width of barrier and a meter's tip.
const BETWEEN_ROWS: Metres = Metres::new(0.06);
/// Charges between which cells that are being put together stand, and the likely one. *Chosen*: as they are shipped
/// and stored, to full.
const CHARGES: [f64; 3] = [20.0, 50.0, 100.0];

/// How parallel cells are usually joined in a chemistry, and whether the blocks are packs.
#[must_use]
pub const fn usual(chemistry: Chemistry, packs: bool) -> Parallel {
    match (chemistry.family(), packs) {
        (Family::Lithium, false) => Parallel::Groups,
        _ => Parallel::SeparateStrings,
    }
}

/// Reads the shelf beside `bank`, whose counts are those to lay out.
///
/// # Errors
///
/// [`Lacks`].
pub fn asked(pad: &impl Pad, bank: &bank::Ask) -> Result<Asked, Lacks> {
    let bank = bank::settled(bank);
    let mut missing = FieldSet::default();
    let mut need = |field: Field, there: bool| {
        if !there {
            missing.insert(field);
        }
    };
    let (rows, columns) = (pad.entry::<Count>(Field::Rows), pad.entry::<Count>(Field::Columns));
    let (length, width) = (pad.entry::<Metres>(Field::CellLength), pad.entry::<Metres>(Field::CellWidth));
    need(Field::Rows, rows.typed().is_some());
    need(Field::Columns, columns.typed().is_some());
    need(Field::CellLength, length.typed().is_some());
    need(Field::CellWidth, width.typed().is_some());
    need(Field::Chemistry, bank.chemistry.typed().is_some());
    need(Field::CellVoltage, bank.cell_voltage.typed().is_some());
    need(Field::CellsInSeries, bank.series.typed().is_some());
    let posts = pad.choice::<Posts>(Field::Posts);
    let take_off = pad.choice::<Arrangement>(Field::TakeOff);
    let parallel = pad.choice::<Parallel>(Field::ParallelAs);
    need(Field::Posts, posts != Entry::Unread);
    need(Field::TakeOff, take_off != Entry::Unread);
    need(Field::ParallelAs, parallel != Entry::Unread);
    let (Some(rows), Some(columns), Some(length), Some(width), Some(made_of), Some(voltage), Some(series)) = (
        rows.typed(),
        columns.typed(),
        length.typed(),
        width.typed(),
        bank.chemistry.typed(),
        bank.cell_voltage.typed(),
        bank.series.typed(),
    ) else {
        return Err(Lacks::Fields(missing));
    };
    if !missing.is_empty() {
        return Err(Lacks::Fields(missing));
    }
    let posts = posts.typed().unwrap_or(Posts::Ends);
    let side = if posts == Posts::Ends { length } else { length.min(width) };
    let made = || {
        let cell = Cell::new(length, width, posts, side * INSET)?;
        let shelf = Shelf::new(whole(rows), whole(columns), cell, Stand::SideBySide, BESIDE, BETWEEN_ROWS)?;
        let strings = bank.strings.typed().map_or(1, whole);
        let packs = bank.guards_itself() == Some(true);
        let parallel = parallel.typed().unwrap_or(usual(made_of, packs));
        let wiring = Wiring::new(whole(series), strings, parallel)?;
        let inside = cells_in_block(made_of, voltage).map_or(1.0, |(cells, _)| f64::from(cells));
        let [low, likely, full] = CHARGES.map(|charge| rested(made_of, Percent::new(charge)) * inside);
        let volts = CellVolts::new(low, likely, full)?;
        let take_off = match take_off.typed() {
            None => TakeOff::Anywhere,
            Some(Arrangement::SameEnd) => TakeOff::SameSide,
            Some(Arrangement::OppositeEnds) => TakeOff::OppositeEnds,
            Some(Arrangement::Middle) => TakeOff::Front,
        };
        Ok(Asked { shelf, wiring, volts, wish: Wish { take_off, ..Wish::default() } })
    };
    made().map_err(Lacks::Refused)
}

/// A count that its field took: at most a few hundred.
fn whole(count: Count) -> u32 {
    #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "held between 0 and 1000")]
    let whole = count.number().clamp(0.0, 1000.0) as u32;
    whole
}
