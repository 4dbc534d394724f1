//! What the shelf of a bank is asked with: its places, its cells, and how they are to be joined.

use super::{
    Cell, CellVolts, Family, Parallel, PlusOn, Posts, Shelf, ShelfError, Stand, TakeOff, Wiring, Wish, advice,
};
use crate::bank::{self, cells_in_block};
use crate::check::{Assumption, FieldSet};
use crate::chemistry::{Chemistry, rested};
use crate::choice::Choice;
use crate::entry::Entry;
use crate::field::Field;
use crate::pad::Pad;
use crate::quantity::{Count, Metres, Percent, Quantity, Volts};
use crate::sharing::Arrangement;
use crate::source;

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
            "same-side-right" => Self::LongEdge(PlusOn::Right),
            "short-side" => Self::ShortEdge(PlusOn::Left),
            "short-side-right" => Self::ShortEdge(PlusOn::Right),
            "corners" => Self::Diagonal(PlusOn::Left),
            "corners-right" => Self::Diagonal(PlusOn::Right),
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

impl Choice for Stand {
    fn of_key(key: &str) -> Option<Self> {
        Some(match key {
            "side-by-side" => Self::SideBySide,
            "end-to-end" => Self::EndToEnd,
            "either-way" => Self::EitherWay,
            _ => return None,
        })
    }
}

impl Choice for TakeOff {
    fn of_key(key: &str) -> Option<Self> {
        Some(match key {
            "anywhere" => Self::Anywhere,
            "same-side" => Self::SameSide,
            "opposite-ends" => Self::OppositeEnds,
            "front" => Self::Front,
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
/// How far sound cells of one batch may read from the one that was measured. *Chosen*: the band of 24 of them is then
/// narrower than one cell, so that a missing cell shows.
const ALIKE: f64 = 0.02;
/// No cell reads outside these shares of its nominal voltage, flat to freshly charged. *Chosen*, wide: it is to catch a
/// slipped decimal mark.
const READS: [f64; 2] = [0.5, 1.5];
/// Most cells in a row where nobody said how many. *Chosen*: as many as can be read on a phone.
const IN_A_ROW: u32 = 10;

/// The way that is wise in a chemistry; `packs` where the blocks hold their own protection.
#[must_use]
pub fn usual(chemistry: Chemistry, packs: bool) -> Parallel {
    advice(Family::of(chemistry, packs)).wise
}

/// Reads the shelf beside `bank`, whose counts are those to lay out.
///
/// # Errors
///
/// [`Lacks`].
pub fn asked(pad: &impl Pad, bank: &bank::Ask) -> Result<Asked, Lacks> {
    let bank = bank::settled(bank);
    let mut missing = FieldSet::default();
    let [rows, columns] = [Field::Rows, Field::Columns].map(|field| pad.entry::<Count>(field));
    let sides = [Field::CellLength, Field::CellWidth].map(|field| pad.entry::<Metres>(field));
    let gaps = [Field::PostInset, Field::CellGap, Field::RowGap].map(|field| pad.entry::<Metres>(field));
    let posts = pad.choice::<Posts>(Field::Posts);
    let take_off = pad.choice::<TakeOff>(Field::TakeOffPosts);
    let parallel = pad.choice::<Parallel>(Field::ParallelAs);
    let stand = pad.choice::<Stand>(Field::CellsStand);
    let now = pad.entry::<Volts>(Field::CellNow);
    for (field, lacks) in [
        // What has nothing to stand in for it.
        (Field::CellLength, sides[0].typed().is_none()),
        (Field::CellWidth, sides[1].typed().is_none()),
        (Field::Chemistry, bank.chemistry.typed().is_none()),
        (Field::CellVoltage, bank.cell_voltage.typed().is_none()),
        (Field::CellsInSeries, bank.series.typed().is_none()),
        // What was typed and not understood.
        (Field::Rows, rows == Entry::Unread),
        (Field::Columns, columns == Entry::Unread),
        (Field::PostInset, gaps[0] == Entry::Unread),
        (Field::CellGap, gaps[1] == Entry::Unread),
        (Field::RowGap, gaps[2] == Entry::Unread),
        (Field::Posts, posts == Entry::Unread),
        (Field::TakeOffPosts, take_off == Entry::Unread),
        (Field::ParallelAs, parallel == Entry::Unread),
        (Field::CellsStand, stand == Entry::Unread),
        (Field::CellNow, now == Entry::Unread),
    ] {
        if lacks {
            missing.insert(field);
        }
    }
    let (true, [Entry::Typed(length), Entry::Typed(width)], Some(made_of), Some(voltage), Some(series)) =
        (missing.is_empty(), sides, bank.chemistry.typed(), bank.cell_voltage.typed(), bank.series.typed())
    else {
        return Err(Lacks::Fields(missing));
    };
    let made = || {
        let (series, strings) = (whole(series), bank.strings.typed().map_or(1, whole));
        let [inset, beside, between] = gaps.map(Entry::typed);
        let posts = posts.typed().unwrap_or(Posts::Ends);
        let cell = Cell::new(length, width, posts, inset.unwrap_or_else(|| usual_inset(posts, length, width)))?;
        let stand = stand.typed().unwrap_or(Stand::SideBySide);
        let (beside, between) = (beside.unwrap_or(BESIDE), between.unwrap_or(BETWEEN_ROWS));
        let (rows, columns) = places(rows.typed(), columns.typed(), series * strings);
        let shelf = Shelf::new(rows, columns, cell, stand, beside, between)?;
        let parallel = parallel.typed().unwrap_or(usual(made_of, bank.guards_itself() == Some(true)));
        let wiring = Wiring::new(series, strings, parallel)?;
        let volts = reads(made_of, voltage, now.typed())?;
        let take_off = take_off.typed().unwrap_or_else(|| fed_from(pad));
        Ok(Asked { shelf, wiring, volts, wish: Wish { take_off, ..Wish::default() } })
    };
    made().map_err(Lacks::Refused)
}

/// What stands in for `field` of the shelf while it is blank. `None` where nothing can.
#[must_use]
pub fn assumption(pad: &impl Pad, bank: &bank::Ask, field: Field) -> Option<Assumption> {
    let bank = bank::settled(bank);
    let metres = |field: Field| pad.entry::<Metres>(field).typed();
    let (amount, choice, why) = match field {
        Field::Rows | Field::Columns => {
            let cells = whole(bank.series.typed()?) * bank.strings.typed().map_or(1, whole);
            let [rows, columns] = [Field::Rows, Field::Columns].map(|field| pad.entry::<Count>(field).typed());
            let (rows, columns) = places(rows, columns, cells);
            let count = if field == Field::Rows { rows } else { columns };
            (Some(Count::new(f64::from(count)).amount()), None, "as many as the cells need")
        }
        Field::Posts => (None, Some("ends"), "as most large cells have them"),
        Field::PostInset => {
            let posts = pad.choice(Field::Posts).typed().unwrap_or(Posts::Ends);
            let inset = usual_inset(posts, metres(Field::CellLength)?, metres(Field::CellWidth)?);
            (Some(inset.amount()), None, "links are cut by it: measure one cell")
        }
        Field::CellGap => (Some(BESIDE.amount()), None, "a sheet of insulation: links are cut by it"),
        Field::RowGap => (Some(BETWEEN_ROWS.amount()), None, "room for a barrier: links are cut by it"),
        Field::CellsStand => (None, Some("side-by-side"), "the narrow side along the row"),
        Field::TakeOffPosts => match fed_from(pad) {
            TakeOff::SameSide => (None, Some("same-side"), "as the strings are fed"),
            TakeOff::OppositeEnds => (None, Some("opposite-ends"), "as the strings are fed"),
            TakeOff::Anywhere | TakeOff::Front => (None, Some("anywhere"), "wherever links are shortest"),
        },
        Field::ParallelAs => {
            let groups = usual(bank.chemistry.typed()?, bank.guards_itself() == Some(true)) == Parallel::Groups;
            (None, Some(if groups { "groups" } else { "strings" }), "as is wise for these cells")
        }
        Field::CellNow => {
            let volts = reads(bank.chemistry.typed()?, bank.cell_voltage.typed()?, None).ok()?;
            (Some(volts.expected().amount()), None, "rested, half full: measure one, for narrower bands")
        }
        _ => return None,
    };
    Some(Assumption { amount, choice, why, source: source::CHOSEN.at("") })
}

/// Rows and columns: those that were typed, else as many as `cells` need, two rows or more where there are four cells.
fn places(rows: Option<Count>, columns: Option<Count>, cells: u32) -> (u32, u32) {
    match (rows.map(whole), columns.map(whole)) {
        (Some(rows), Some(columns)) => (rows, columns),
        (Some(rows), None) => (rows, cells.div_ceil(rows.max(1))),
        (None, Some(columns)) => (cells.div_ceil(columns.max(1)), columns),
        (None, None) => {
            let rows = cells.div_ceil(IN_A_ROW).max(if cells < 4 { 1 } else { 2 });
            (rows, cells.div_ceil(rows))
        }
    }
}

fn usual_inset(posts: Posts, length: Metres, width: Metres) -> Metres {
    let side = if posts == Posts::Ends { length } else { length.min(width) };
    // To the millimetre, which is as near as it is shown.
    Metres::new((side.get() * INSET * 1e3).round().max(1.0) / 1e3)
}

/// Where the posts should stand by the way the strings are fed, where that was chosen.
fn fed_from(pad: &impl Pad) -> TakeOff {
    match pad.choice::<Arrangement>(Field::TakeOff) {
        Entry::Typed(Arrangement::SameEnd) => TakeOff::SameSide,
        Entry::Typed(Arrangement::OppositeEnds) => TakeOff::OppositeEnds,
        _ => TakeOff::Anywhere,
    }
}

/// What a cell or block reads: near what one was measured at, else anything that a sound one may.
fn reads(made_of: Chemistry, voltage: Volts, now: Option<Volts>) -> Result<CellVolts, ShelfError> {
    if let Some(now) = now {
        let [least, most] = READS.map(|share| voltage * share);
        if !(least..=most).contains(&now) {
            return Err(ShelfError::NotThisCell { read: now, nominal: voltage });
        }
        return CellVolts::new(now * (1.0 - ALIKE), now, now * (1.0 + ALIKE));
    }
    let inside = cells_in_block(made_of, voltage).map_or(1.0, |(cells, _)| f64::from(cells));
    let [low, likely, full] = CHARGES.map(|charge| rested(made_of, Percent::new(charge)) * inside);
    CellVolts::new(low, likely, full)
}

/// A count that its field took: at most a few hundred.
fn whole(count: Count) -> u32 {
    #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "held between 0 and 1000")]
    let whole = count.number().clamp(0.0, 1000.0) as u32;
    whole
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::unit::Unit;

    struct Rows<'a>(&'a [(Field, &'a str)]);

    impl Pad for Rows<'_> {
        fn typed(&self, field: Field) -> (&str, Option<Unit>) {
            (self.0.iter().rev().find(|(one, _)| *one == field).map_or("", |(_, text)| text), None)
        }
    }

    const BANK: &[(Field, &str)] = &[
        (Field::Chemistry, "lfp"),
        (Field::CellVoltage, "3.2"),
        (Field::CellsInSeries, "16"),
        (Field::StringsOfCells, "1"),
        (Field::CellLength, "174"),
        (Field::CellWidth, "72"),
    ];

    fn with(more: &[(Field, &str)]) -> Result<Asked, Lacks> {
        let rows = [BANK, more].concat();
        asked(&Rows(&rows), &bank::Ask::read(&Rows(&rows)))
    }

    #[test]
    fn whatever_stands_in_is_shown_as_what_stands_in() {
        let pad = Rows(BANK);
        let bank = bank::Ask::read(&pad);
        let shelf = with(&[]).unwrap().shelf;
        let shown = |field| assumption(&pad, &bank, field).unwrap().amount.unwrap().number;
        assert_eq!((shown(Field::Rows), shown(Field::Columns)), (2.0, 8.0));
        assert_eq!((shelf.rows(), shelf.columns()), (2, 8));
        let pitch = |metres: Metres| metres.get() * 1e3;
        assert!((pitch(shelf.pitch_in_row()) - 72.0 - shown(Field::CellGap) * 1e3).abs() < 1e-9);
        assert!((pitch(shelf.pitch_of_rows()) - 174.0 - shown(Field::RowGap) * 1e3).abs() < 1e-9);
        // To type what stands in changes nothing.
        let typed = [
            (Field::Rows, "2"),
            (Field::Columns, "8"),
            (Field::PostInset, "26"),
            (Field::CellGap, "2"),
            (Field::RowGap, "60"),
            (Field::Posts, "ends"),
            (Field::CellsStand, "side-by-side"),
            (Field::TakeOffPosts, "anywhere"),
            (Field::ParallelAs, "groups"),
        ];
        assert!((shown(Field::PostInset) * 1e3 - 26.0).abs() < 1e-9);
        assert_eq!(with(&typed).unwrap(), with(&[]).unwrap());
    }

    #[test]
    fn rows_follow_from_columns_and_columns_from_rows() {
        let of = |more: &[(Field, &str)]| with(more).map(|asked| (asked.shelf.rows(), asked.shelf.columns()));
        assert_eq!(of(&[(Field::Columns, "5")]), Ok((4, 5)));
        assert_eq!(of(&[(Field::Rows, "3")]), Ok((3, 6)));
        assert_eq!(of(&[(Field::StringsOfCells, "3")]), Ok((5, 10)));
        let unread = with(&[(Field::Rows, "two")]).unwrap_err();
        assert!(matches!(unread, Lacks::Fields(fields) if fields.contains(Field::Rows)));
    }

    #[test]
    fn a_measured_cell_narrows_the_band_and_a_slipped_point_is_refused() {
        let volts = with(&[(Field::CellNow, "3.31")]).unwrap().volts;
        assert_eq!(volts.expected(), Volts::new(3.31));
        assert!(volts.highest() - volts.lowest() < Volts::new(0.14));
        // Twenty-three sound cells, the highest, read less than twenty-four, the lowest.
        assert!(volts.highest() * 23.0 < volts.lowest() * 24.0);
        assert!(matches!(with(&[(Field::CellNow, "33.1")]), Err(Lacks::Refused(ShelfError::NotThisCell { .. }))));
    }

    #[test]
    fn posts_that_would_meet_are_told() {
        let told = with(&[(Field::PostInset, "90")]).unwrap_err();
        assert!(matches!(told, Lacks::Refused(ShelfError::PostsMeet { .. })));
    }
}
