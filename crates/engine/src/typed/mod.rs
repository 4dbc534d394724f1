//! What people type: numbers with either decimal mark, signs, units, wire sizes.
//!
//! | typed | read as |
//! | --- | --- |
//! | `3,5` `3.5` `,5` | point and comma are both decimal marks |
//! | `12 000` `12'000` `1,234.5` `1.234,5` `1.234.567` | digits in groups of three |
//! | `1,234` | refused: 1.234 or 1234? One comma before three digits is the only form that is asked about |
//! | `1.234` | one and a bit: this program writes a point, so one point is always the decimal mark |
//! | `-31` `−31` `–31` `+31` | hyphen, true minus and dashes are signs |
//! | `1e3` `1.2E-3` | powers of ten |
//! | `1/2 in` `3 1/2"` `½ hp` | fractions of lengths, of powers and of times |
//! | `5' 6"` `5 ft 6 in` | feet and inches, kept as feet |
//! | `14 AWG` `AWG 14` `#14` `2/0` `00 AWG` | wire gauges; 1/0 is 0, 2/0 is −1, 3/0 is −2, 4/0 is −3 |
//! | `450mV` `-24 F` `35 mm2` `2 Mohm` | a unit with or without a space; mega is never taken for milli: refused |
//!
//! Nothing is guessed: what has two meanings is asked about, and what is not understood is kept as typed.

mod decimal;
mod gauge;
pub mod list;
mod numeral;
mod refusal;
mod suffix;
mod trade;

pub use decimal::nearest;
pub use refusal::Refusal;
pub use trade::trade_size;

use crate::quantity::{Amount, Quantity};
use crate::show;
use crate::unit::{Dimension, Unit};
use core::fmt;

/// The most characters that are read as one number. Chosen: three times what a careful hand writes.
pub const LONGEST: usize = 40;

/// A number as it was typed, in the unit it was typed in.
///
/// It is finite, in its own unit and in the base; a temperature is not below absolute zero; a gauge is a whole one.
///
/// [`Display`](fmt::Display) writes it as a person would type it, to the last bit: reading that gives the same again.
///
/// ```
/// use engine::{typed, unit::Unit};
/// let reading = typed::read("-24,5F", Unit::DegreeCelsius).unwrap();
/// assert_eq!((reading.number(), reading.unit()), (-24.5, Unit::DegreeFahrenheit));
/// assert_eq!(reading.to_string(), "-24.5 °F");
/// ```
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Reading {
    number: f64,
    unit: Unit,
}

impl Reading {
    /// A number of `unit`, as if it had been typed.
    ///
    /// # Errors
    ///
    /// [`Refusal::TooLarge`], [`Refusal::BelowAbsoluteZero`], [`Refusal::NotAGauge`].
    pub fn new(number: f64, unit: Unit) -> Result<Self, Refusal> {
        if unit == Unit::Awg && !gauge::is_one(number) {
            return Err(Refusal::NotAGauge);
        }
        if !number.is_finite() || !unit.to_base(number).is_finite() {
            return Err(Refusal::TooLarge);
        }
        let reading = Self { number, unit };
        // In the unit typed, so that −459.67 °F, absolute zero itself, is not lost to the last bit.
        if unit.dimension() == Dimension::Temperature {
            let zero = unit.from_base(-273.15);
            let least = if is_beside(number, zero) { show::tidy(zero) } else { zero };
            if number < least {
                return Err(Refusal::BelowAbsoluteZero { typed: reading });
            }
        }
        Ok(reading)
    }

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

    /// The number in the [base](Unit::base) of its unit.
    #[must_use]
    pub fn base(self) -> f64 {
        self.unit.to_base(self.number)
    }

    /// The number with its unit, for showing.
    #[must_use]
    pub const fn amount(self) -> Amount {
        Amount { number: self.number, unit: self.unit }
    }

    /// The same as a quantity; `None` where its unit does not turn into the quantity's.
    #[must_use]
    pub fn quantity<Q: Quantity>(self) -> Option<Q> {
        self.unit.convert(self.number, Q::UNIT).map(Q::of)
    }

    /// The same reading, where it lies from `least` to `most` of the base unit, both allowed.
    ///
    /// The ends are worded in the unit typed; in `shown` where a wire gauge was typed, as ends between two gauges
    /// say nothing.
    ///
    /// # Errors
    ///
    /// [`Refusal::OutOfRange`].
    pub fn within(self, least: f64, most: f64, shown: Unit) -> Result<Self, Refusal> {
        // Compared in the unit that is worded, so that what the refusal allows is allowed.
        let unit = match (self.unit, shown) {
            (Unit::Awg, Unit::Awg) => Unit::SquareMillimetre,
            (Unit::Awg, shown) => shown,
            (typed, _) => typed,
        };
        let ends = [least, most].map(|end| unit.from_base(end));
        let number = self.unit.convert(self.number, unit).unwrap_or(self.number);
        // Only beside an end does it matter how the end is worded.
        if number >= ends[0] && number <= ends[1] && !ends.iter().any(|end| is_beside(number, *end)) {
            return Ok(self);
        }
        let ends = ends.map(show::tidy);
        if number < ends[0] || number > ends[1] {
            return Err(Refusal::OutOfRange { typed: self, least: ends[0], most: ends[1], unit });
        }
        Ok(self)
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

/// Whether `number` may lie on the other side of `end` once that is written with the digits that are kept: twelve, so that writing
/// moves it by less than a part in 10¹¹.
fn is_beside(number: f64, end: f64) -> bool {
    (number - end).abs() <= end.abs() * 1e-9
}

/// Writes a reading as a person would type it. Reading that gives the same again, to the last bit.
#[must_use]
pub fn print(reading: Reading) -> String {
    reading.to_string()
}

impl fmt::Display for Reading {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        let (number, unit) = (self.number, self.unit);
        let size = number.abs();
        if unit == Unit::Awg {
            write!(f, "{}", gauge::written(number))?;
        } else if size != 0.0 && !(1e-6..1e15).contains(&size) {
            write!(f, "{number:e}")?;
        } else {
            write!(f, "{number}")?;
        }
        if unit == Unit::One { Ok(()) } else { write!(f, " {}", unit.symbol()) }
    }
}

/// How a wire gauge is written: 2/0 for −1.
pub(crate) fn gauge_written(number: f64) -> String {
    gauge::written(number)
}

/// Reads `text`. Where it holds no unit, `usual` stands; where it holds one, that is kept.
///
/// # Errors
///
/// A [`Refusal`] that says why.
///
/// # Example
///
/// ```
/// use engine::{typed, unit::Unit};
/// assert_eq!(typed::read("49,3", Unit::Volt).unwrap().number(), 49.3);
/// assert_eq!(typed::read("2/0", Unit::SquareMillimetre).unwrap().to_string(), "2/0 AWG");
/// let refusal = typed::read("12 A", Unit::Volt).unwrap_err();
/// assert_eq!(refusal.to_string().replace('\u{202F}', " "), "12 A is a current; this wants volts");
/// ```
pub fn read(text: &str, usual: Unit) -> Result<Reading, Refusal> {
    let text = text.trim_matches(|mark: char| mark.is_whitespace() || INVISIBLE.contains(&mark));
    if text.chars().nth(LONGEST).is_some() {
        return Err(Refusal::TooLong);
    }
    if usual != Unit::Awg
        && is_plain(text)
        && let Some(number) = nearest(text)
    {
        return Reading::new(number, usual);
    }
    let reading = match gauge::read(text, usual)? {
        Some(gauge) => gauge,
        None => number_and_unit(text, usual)?,
    };
    if reading.unit.dimension() == usual.dimension() {
        Ok(reading)
    } else {
        Err(Refusal::OtherDimension { typed: reading, usual })
    }
}

/// Whether it is nothing but digits with at most a hyphen before and a point between: as most numbers are typed, and the same
/// whichever way it is read.
fn is_plain(text: &str) -> bool {
    let size = text.strip_prefix('-').unwrap_or(text);
    let (whole, part) = size.split_once('.').unwrap_or((size, "0"));
    let digits = |text: &str| !text.is_empty() && text.bytes().all(|letter| letter.is_ascii_digit());
    digits(whole) && digits(part)
}

/// Marks without width that come along when text is pasted.
const INVISIBLE: [char; 5] = ['\u{200B}', '\u{200E}', '\u{200F}', '\u{2060}', '\u{FEFF}'];

fn number_and_unit(text: &str, usual: Unit) -> Result<Reading, Refusal> {
    let (numeral, rest) = numeral::read(text)?;
    let (number, unit) = match suffix::feet_then_inches(numeral, rest)? {
        Some(feet) => (feet, Unit::Foot),
        None => (numeral.number, suffix::read(rest, usual)?),
    };
    // "-1" is no way to write 2/0, though the one is counted as the other.
    if unit == Unit::Awg && numeral.negative {
        return Err(Refusal::NotAGauge);
    }
    let reading = Reading::new(number, unit)?;
    let divided = matches!(unit.dimension(), Dimension::Length | Dimension::Power | Dimension::Time);
    if numeral.fraction && !divided {
        return Err(Refusal::Fraction { typed: reading });
    }
    Ok(reading)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Every text that is read the short way is read the same the long way.
    #[test]
    fn plain_numbers_are_read_the_same_both_ways() {
        let letters = ['0', '1', '5', '9', '.', '-', ','];
        let mut texts = vec![String::new()];
        let mut plain = 0;
        for _ in 0..5 {
            texts = texts.iter().flat_map(|text| letters.map(|letter| format!("{text}{letter}"))).collect();
            for text in &texts {
                for usual in [Unit::Volt, Unit::One, Unit::DegreeCelsius, Unit::Metre] {
                    if is_plain(text) {
                        let long = number_and_unit(text, usual).map(|reading| (reading.number.to_bits(), reading.unit));
                        let short = read(text, usual).map(|reading| (reading.number.to_bits(), reading.unit));
                        assert_eq!(short, long, "{text}");
                        plain += 1;
                    }
                }
            }
        }
        assert!(plain > 10_000, "{plain}");
    }
}
