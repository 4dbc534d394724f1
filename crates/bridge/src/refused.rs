//! Why something stored was not opened, in words for the person who opened it.

use core::fmt;

/// Why a file, or what the browser had stored, was not opened. What was there before stays as it was.
#[derive(Clone, Debug, PartialEq, Eq)]
#[non_exhaustive]
pub enum Refused {
    /// Larger than anything that Linehut writes.
    TooLarge {
        /// Its size in bytes.
        bytes: usize,
        /// The greatest size in bytes.
        most: usize,
    },
    /// Not written by Linehut, or cut short on the way.
    Damaged {
        /// What the reader stumbled over.
        at: String,
    },
    /// Written by a later version, whose meaning this one cannot know.
    Newer {
        /// The version of its layout.
        version: u64,
        /// The latest version known here.
        known: u32,
    },
}

impl fmt::Display for Refused {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::TooLarge { bytes, most } => {
                write!(f, "too large for a Linehut file: {} kB, at most {} kB", bytes.div_ceil(1000), most / 1000)
            }
            Self::Damaged { at } => write!(f, "damaged, or not a Linehut file: {at}"),
            Self::Newer { version, known } => {
                write!(f, "written by a newer Linehut: layout {version}, this one knows up to {known}")
            }
        }
    }
}

impl core::error::Error for Refused {}
