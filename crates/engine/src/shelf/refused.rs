//! Why a shelf, a cell or a wiring was refused.

use crate::quantity::{Amount, Metres, Quantity, Volts};
use crate::show;
use crate::unit::Unit;

/// Input for which no layout exists.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub enum ShelfError {
    /// A length is zero, negative or not a number.
    NotALength {
        /// Which one.
        what: &'static str,
        /// What was given.
        given: Metres,
    },
    /// A gap is negative or not a number.
    NotAGap {
        /// Which one.
        what: &'static str,
        /// What was given.
        given: Metres,
    },
    /// The two posts would stand on one another or past one another.
    PostsMeet {
        /// Distance of a post from the edge.
        inset: Metres,
        /// What it must stay below: half of the side.
        below: Metres,
    },
    /// No row or no column.
    NoPlaces,
    /// No cell in series or none in parallel.
    NoCells,
    /// More places than the search is made for.
    TooManyPlaces {
        /// Rows times columns.
        places: u64,
        /// The most.
        most: u32,
    },
    /// The shelf is too small.
    TooFewPlaces {
        /// How many cells there are.
        cells: u64,
        /// How many places there are.
        places: u32,
    },
    /// A cell's voltages are not in order, or not above zero.
    VoltsOutOfOrder,
    /// What was measured is no reading of such a cell.
    NotThisCell {
        /// What was measured.
        read: Volts,
        /// Its nominal voltage.
        nominal: Volts,
    },
}

impl core::fmt::Display for ShelfError {
    fn fmt(&self, f: &mut core::fmt::Formatter<'_>) -> core::fmt::Result {
        match self {
            Self::NotALength { what, given } => write!(f, "{what}: {} m is not a length", given.get()),
            Self::NotAGap { what, given } => write!(f, "{what}: {} m is not a gap", given.get()),
            Self::PostsMeet { inset, below } => write!(
                f,
                "posts {} from the edge would meet; less than {}, half of that side",
                millimetres(*inset),
                millimetres(*below)
            ),
            Self::NoPlaces => write!(f, "a shelf needs a row and a column"),
            Self::NoCells => write!(f, "a bank needs a cell"),
            Self::TooManyPlaces { places, most } => write!(f, "{places} places; at most {most}"),
            Self::TooFewPlaces { cells, places } => write!(f, "{cells} cells do not fit on {places} places"),
            Self::NotThisCell { read, nominal } => {
                let [read, nominal] = [read, nominal].map(|volts| show::given(volts.amount()));
                write!(f, "each cell now: {read} is no reading of a {nominal} cell")
            }
            Self::VoltsOutOfOrder => {
                write!(f, "lowest, expected and highest volts of a cell must rise from above zero")
            }
        }
    }
}

impl core::error::Error for ShelfError {}

fn millimetres(length: Metres) -> String {
    show::computed(Amount { number: length.get() * 1e3, unit: Unit::Millimetre })
}

/// `given`, where it is a length.
pub(super) fn length(what: &'static str, given: Metres) -> Result<Metres, ShelfError> {
    if given.get() > 0.0 && given.get().is_finite() { Ok(given) } else { Err(ShelfError::NotALength { what, given }) }
}

/// `given`, where it is a gap.
pub(super) fn gap(what: &'static str, given: Metres) -> Result<Metres, ShelfError> {
    if given.get() >= 0.0 && given.get().is_finite() { Ok(given) } else { Err(ShelfError::NotAGap { what, given }) }
}
