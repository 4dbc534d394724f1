//! Why something typed was not understood, in words for the person who typed it.

use crate::unit::Unit;

/// Why an entry was refused.
#[derive(Clone, Debug, PartialEq)]
#[non_exhaustive]
pub enum Refusal {
    /// No number was found.
    NotANumber {
        /// What was typed.
        text: String,
    },
    /// A whole number was wanted.
    NotWhole {
        /// What was typed.
        number: f64,
    },
    /// The number cannot be meant.
    OutOfRange {
        /// The least that can be, in the base unit.
        least: f64,
        /// The most that can be, in the base unit.
        most: f64,
        /// The unit to say them in.
        unit: Unit,
    },
}

impl core::fmt::Display for Refusal {
    fn fmt(&self, f: &mut core::fmt::Formatter<'_>) -> core::fmt::Result {
        match self {
            Self::NotANumber { text } => write!(f, "not understood, kept as typed: {text}"),
            Self::NotWhole { number } => write!(f, "{number} is not a whole number"),
            Self::OutOfRange { least, most, unit } => {
                write!(f, "{} to {} {}", unit.from_base(*least), unit.from_base(*most), unit.symbol())
            }
        }
    }
}

impl core::error::Error for Refusal {}
