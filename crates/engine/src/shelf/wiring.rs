//! How the cells are to be joined: how many in series, how many in parallel, and in which of the two ways.

use super::board::Shelf;
use super::refused::ShelfError;
use crate::chemistry;
use crate::source::{self, Clause};

/// The two ways of having cells in parallel.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Parallel {
    /// Whole strings side by side, each with its own fuse, joined only at the two busbars.
    SeparateStrings,
    /// Cells first joined in parallel to groups, the groups then in series.
    Groups,
}

impl Parallel {
    /// What it means, for the page.
    #[must_use]
    pub const fn meaning(self) -> &'static str {
        match self {
            Self::SeparateStrings => {
                "Each string is a bank of its own with its own fuse. A weak cell spoils one string only, and one string \
                 can be taken out while the rest carries on. Every cell needs its own reading or watching."
            }
            Self::Groups => {
                "Cells joined plus to plus and minus to minus act as one large cell. One protection watches the group \
                 voltages. A weak cell hides in its group, and a shorted cell is fed by its neighbours with no fuse between."
            }
        }
    }
}

/// Families of cells that ask for the same way of paralleling.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Family {
    /// Vented lead, AGM, gel.
    Lead,
    /// Nickel-iron and nickel-cadmium.
    Nickel,
    /// Bare lithium or sodium-ion cells under one protection.
    BareLithium,
    /// Packs that hold their own protection.
    ProtectedPack,
}

impl Family {
    /// The family of a chemistry; `packs` where the blocks hold their own protection.
    #[must_use]
    pub const fn of(made_of: chemistry::Chemistry, packs: bool) -> Self {
        match (made_of.family(), packs) {
            (_, true) => Self::ProtectedPack,
            (chemistry::Family::Lead, _) => Self::Lead,
            (chemistry::Family::Nickel, _) => Self::Nickel,
            (chemistry::Family::Lithium, _) => Self::BareLithium,
        }
    }
}

/// Which way is wise for a family, and why.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Advice {
    /// For whom.
    pub family: Family,
    /// The way to prefer.
    pub wise: Parallel,
    /// Why.
    pub why: &'static str,
    /// The most in parallel that is commonly held wise, where there is such a number.
    pub most: Option<u32>,
    /// Where it is from.
    pub source: Clause,
}

/// When each way is wise. From memory of the trade, not from one publication.
pub static ADVICE: &[Advice] = &[
    Advice {
        family: Family::Lead,
        wise: Parallel::SeparateStrings,
        why: "Lead cells age unequally, and a failing cell draws on whatever stands beside it. Keep each string whole \
              behind its own fuse; fewer strings of larger cells are better than many of small ones.",
        most: Some(3),
        source: source::COMMON_PRACTICE.at("lead banks"),
    },
    Advice {
        family: Family::Nickel,
        wise: Parallel::SeparateStrings,
        why: "Cells fill and gas at their own pace, and are topped up one by one. Separate strings keep a low cell \
              visible; each has its own fuse.",
        most: Some(3),
        source: source::COMMON_PRACTICE.at("nickel banks"),
    },
    Advice {
        family: Family::BareLithium,
        wise: Parallel::Groups,
        why: "The protection must see every voltage. Groups of matched cells give it one voltage a step, so one \
              protection guards the whole bank; separate strings would need one protection each.",
        most: None,
        source: source::COMMON_PRACTICE.at("lithium cells under one protection"),
    },
    Advice {
        family: Family::ProtectedPack,
        wise: Parallel::SeparateStrings,
        why: "Each pack opens on its own. Join packs only at the busbars, each through its own fuse, and never in \
              groups inside a series string: one pack opening would put its whole string's volts across itself.",
        most: None,
        source: source::COMMON_PRACTICE.at("packs with their own protection"),
    },
];

/// The advice for a family.
#[must_use]
pub fn advice(family: Family) -> &'static Advice {
    // Every family has its line; the first stands in so that no lookup can fail.
    ADVICE.iter().find(|line| line.family == family).unwrap_or(&ADVICE[0])
}

/// Where the take-off posts are wanted. Ends are the left and right ends of the rows.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum TakeOff {
    /// Anywhere.
    Anywhere,
    /// Plus and minus at the same end of the rows.
    SameSide,
    /// Minus at one end of the rows and plus at the other.
    OppositeEnds,
    /// Both in the front row.
    Front,
}

/// Cells in series and in parallel.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Wiring {
    series: u32,
    strings: u32,
    parallel: Parallel,
}

impl Wiring {
    /// `series` cells in series, `in_parallel` of them side by side.
    ///
    /// # Errors
    ///
    /// [`ShelfError::NoCells`].
    pub const fn new(series: u32, in_parallel: u32, parallel: Parallel) -> Result<Self, ShelfError> {
        if series == 0 || in_parallel == 0 {
            return Err(ShelfError::NoCells);
        }
        Ok(Self { series, strings: in_parallel, parallel })
    }

    /// Cells, or groups, in series.
    #[must_use]
    pub const fn series(&self) -> u32 {
        self.series
    }

    /// Strings in parallel, or cells in a group.
    #[must_use]
    pub const fn in_parallel(&self) -> u32 {
        self.strings
    }

    /// In which way they are in parallel.
    #[must_use]
    pub const fn parallel(&self) -> Parallel {
        self.parallel
    }

    /// How many cells stand on `shelf`.
    ///
    /// # Errors
    ///
    /// [`ShelfError::TooFewPlaces`].
    pub fn cells_on(&self, shelf: &Shelf) -> Result<u32, ShelfError> {
        let cells = u64::from(self.series) * u64::from(self.strings);
        match u32::try_from(cells) {
            Ok(few) if few <= shelf.places() => Ok(few),
            _ => Err(ShelfError::TooFewPlaces { cells, places: shelf.places() }),
        }
    }

    /// Cells that follow one another in a chain.
    pub(super) const fn chain_length(&self) -> u32 {
        match self.parallel {
            Parallel::SeparateStrings => self.series,
            Parallel::Groups => self.series * self.strings,
        }
    }

    /// Cells of a group: one for separate strings.
    pub(super) const fn in_group(&self) -> u32 {
        match self.parallel {
            Parallel::SeparateStrings => 1,
            Parallel::Groups => self.strings,
        }
    }
}
