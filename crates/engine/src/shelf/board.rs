//! The shelf: rows and columns of places, and how far apart they stand.

use super::cell::{Cell, Spot, Turn};
use super::refused::{self, ShelfError};
use crate::quantity::Metres;

/// The most places a shelf may have. *Chosen*: past it no picture is readable and a bank is built on several shelves.
pub const MOST_PLACES: u32 = 400;

/// Which way the cells stand.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Stand {
    /// Length from back to front: side by side in the row. Turns of 0 and 180°.
    SideBySide,
    /// Length along the row: end to end. Turns of 90 and 270°.
    EndToEnd,
    /// Either way; the places are square, as long as the cell's longer side. All four turns.
    EitherWay,
}

impl Stand {
    /// The turns allowed.
    #[must_use]
    pub const fn turns(self) -> &'static [Turn] {
        match self {
            Self::SideBySide => &[Turn::None, Turn::Half],
            Self::EndToEnd => &[Turn::Quarter, Turn::ThreeQuarters],
            Self::EitherWay => &Turn::ALL,
        }
    }
}

/// A shelf seen from above. Rows run from left to right; row 0 is at the back, column 0 at the left.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Shelf {
    rows: u32,
    columns: u32,
    cell: Cell,
    stand: Stand,
    beside: Metres,
    between_rows: Metres,
}

impl Shelf {
    /// `rows` × `columns` places for `cell`, with a gap `beside` each cell in its row and a gap `between_rows`.
    ///
    /// # Errors
    ///
    /// [`ShelfError::NoPlaces`], [`ShelfError::TooManyPlaces`], [`ShelfError::NotAGap`].
    pub fn new(
        rows: u32,
        columns: u32,
        cell: Cell,
        stand: Stand,
        beside: Metres,
        between_rows: Metres,
    ) -> Result<Self, ShelfError> {
        if rows == 0 || columns == 0 {
            return Err(ShelfError::NoPlaces);
        }
        let places = u64::from(rows) * u64::from(columns);
        if places > u64::from(MOST_PLACES) {
            return Err(ShelfError::TooManyPlaces { places, most: MOST_PLACES });
        }
        let beside = refused::gap("gap beside a cell", beside)?;
        let between_rows = refused::gap("gap between rows", between_rows)?;
        Ok(Self { rows, columns, cell, stand, beside, between_rows })
    }

    /// How many rows.
    #[must_use]
    pub const fn rows(&self) -> u32 {
        self.rows
    }

    /// How many columns: places in a row.
    #[must_use]
    pub const fn columns(&self) -> u32 {
        self.columns
    }

    /// How many places.
    #[must_use]
    pub const fn places(&self) -> u32 {
        self.rows * self.columns
    }

    /// The cell it is for.
    #[must_use]
    pub const fn cell(&self) -> &Cell {
        &self.cell
    }

    /// Which way the cells stand.
    #[must_use]
    pub const fn stand(&self) -> Stand {
        self.stand
    }

    /// From the middle of one place to the next in the row.
    #[must_use]
    pub fn pitch_in_row(&self) -> Metres {
        self.beside
            + match self.stand {
                Stand::SideBySide => self.cell.width(),
                Stand::EndToEnd => self.cell.length(),
                Stand::EitherWay => self.cell.width().max(self.cell.length()),
            }
    }

    /// From the middle of one row to the next.
    #[must_use]
    pub fn pitch_of_rows(&self) -> Metres {
        self.between_rows
            + match self.stand {
                Stand::SideBySide => self.cell.length(),
                Stand::EndToEnd => self.cell.width(),
                Stand::EitherWay => self.cell.width().max(self.cell.length()),
            }
    }

    /// The outer size: along the rows, and from back to front; half a gap stands at each edge.
    #[must_use]
    pub fn size(&self) -> Spot {
        Spot {
            across: self.pitch_in_row() * f64::from(self.columns),
            forward: self.pitch_of_rows() * f64::from(self.rows),
        }
    }

    /// The middle of a place, from the back left corner.
    #[must_use]
    pub fn middle(&self, row: u32, column: u32) -> Spot {
        Spot {
            across: self.pitch_in_row() * (f64::from(column) + 0.5),
            forward: self.pitch_of_rows() * (f64::from(row) + 0.5),
        }
    }
}
