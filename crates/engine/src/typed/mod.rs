//! What people type: numbers with either decimal mark, signs, units, wire sizes.

mod refusal;

pub use refusal::Refusal;

use crate::unit::Unit;

/// A number as it was typed, in the unit it was typed in.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Reading {
    number: f64,
    unit: Unit,
}

impl Reading {
    /// The number in the unit it was typed in.
    #[must_use]
    pub const fn number(self) -> f64 {
        self.number
    }

    /// The unit it was typed in.
    #[must_use]
    pub const fn unit(self) -> Unit {
        self.unit
    }

    /// The number in the base unit of its dimension.
    #[must_use]
    pub fn base(self) -> f64 {
        self.unit.to_base(self.number)
    }

    /// The same reading, where it lies from `least` to `most` of the base unit. `shown` is the unit to say them in.
    ///
    /// # Errors
    ///
    /// [`Refusal::OutOfRange`].
    pub fn within(self, least: f64, most: f64, shown: Unit) -> Result<Self, Refusal> {
        let base = self.base();
        if base < least || base > most { Err(Refusal::OutOfRange { least, most, unit: shown }) } else { Ok(self) }
    }

    /// The same reading, where it is a whole number from `least` to `most`.
    ///
    /// # Errors
    ///
    /// [`Refusal::NotWhole`] or [`Refusal::OutOfRange`].
    pub fn whole_within(self, least: u32, most: u32) -> Result<Self, Refusal> {
        if self.number.fract() != 0.0 {
            return Err(Refusal::NotWhole { number: self.number });
        }
        self.within(f64::from(least), f64::from(most), Unit::One)
    }
}

/// Reads `text`. Where it holds no unit, `usual` stands.
///
/// # Errors
///
/// A [`Refusal`] that says why.
pub fn read(text: &str, usual: Unit) -> Result<Reading, Refusal> {
    let number: f64 = text
        .trim()
        .replace('−', "-")
        .replace(',', ".")
        .parse()
        .map_err(|_| Refusal::NotANumber { text: text.to_owned() })?;
    Ok(Reading { number, unit: usual })
}
