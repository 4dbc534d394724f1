//! Why something typed was not understood, in words for the person who typed it.

use super::{LONGEST, Reading};
use crate::quantity::Amount;
use crate::show;
use crate::unit::{Dimension, Unit};
use core::fmt;

/// Why an entry was refused.
#[derive(Clone, Debug, PartialEq)]
#[non_exhaustive]
pub enum Refusal {
    /// Half typed, as a sign alone or `3,`. The page may wait before it says so.
    Unfinished,
    /// More characters than a number has.
    TooLong,
    /// No number was found.
    NotANumber {
        /// What was typed.
        text: String,
    },
    /// Decimal marks and groups that fit no way of writing numbers.
    Marks {
        /// What was typed.
        text: String,
        /// What may have been meant, with a point.
        perhaps: Option<String>,
    },
    /// One comma before three digits.
    TwoMeanings {
        /// The number if the comma is a decimal mark.
        decimal: String,
        /// The number if it parts thousands.
        whole: String,
    },
    /// Two numbers where one is wanted.
    TwoNumbers,
    /// A unit that is not known, or not told apart from another.
    UnknownUnit {
        /// What stood in the unit's place.
        typed: String,
        /// The usual unit.
        usual: Unit,
    },
    /// A unit of another dimension.
    OtherDimension {
        /// What was typed.
        typed: Reading,
        /// The usual unit.
        usual: Unit,
    },
    /// A fraction of what is not counted in fractions.
    Fraction {
        /// What was typed.
        typed: Reading,
    },
    /// Feet and inches that do not go together.
    FeetAndInches,
    /// A number that has no end.
    TooLarge,
    /// A temperature that cannot be.
    BelowAbsoluteZero {
        /// What was typed.
        typed: Reading,
    },
    /// No wire gauge has that number.
    NotAGauge,
    /// A size that conductors are not sold in.
    NotSold {
        /// What was typed.
        typed: Reading,
        /// A size near it.
        one: Option<Reading>,
        /// Another size, where it is as near.
        other: Option<Reading>,
    },
    /// A whole number was wanted.
    NotWhole {
        /// What was typed.
        number: f64,
    },
    /// The number cannot be meant.
    OutOfRange {
        /// What was typed.
        typed: Reading,
        /// The least that can be, in `unit`.
        least: f64,
        /// The most that can be, in `unit`.
        most: f64,
        /// The unit typed, or one that can word both ends.
        unit: Unit,
    },
}

impl Refusal {
    /// Whether it may only be half typed, so that there is nothing to say before a pause.
    #[must_use]
    pub const fn is_unfinished(&self) -> bool {
        matches!(self, Self::Unfinished)
    }
}

impl fmt::Display for Refusal {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Unfinished => write!(f, "not finished: a digit is missing, as in 3.5"),
            Self::TooLong => write!(f, "too long: {LONGEST} characters at most, as in 12.4"),
            Self::NotANumber { text } => write!(f, "“{text}” is not a number, as 12.4 is"),
            Self::Marks { perhaps: Some(decimal), .. } => {
                write!(f, "not understood: {decimal} or {}", decimal.replace('.', ","))
            }
            Self::Marks { perhaps: None, text } => write!(f, "“{text}” is not understood: as in 1234.5 or 1234,5"),
            Self::TwoMeanings { decimal, whole } => write!(f, "{decimal} or {whole}?"),
            Self::TwoNumbers => write!(f, "two numbers: which one?"),
            Self::UnknownUnit { typed, usual } => match unit_list(*usual) {
                Some(list) => write!(f, "unit “{typed}” is not known here: {list}"),
                None => write!(f, "“{typed}” is too much: a number alone, as in 3"),
            },
            Self::OtherDimension { typed, usual } => {
                let (is, wants) = (kind(typed.unit().dimension()), wanted(usual.dimension()));
                write!(f, "{} is {is}; this wants {wants}", given(typed.amount()))
            }
            Self::Fraction { typed } => write!(f, "no fractions here: {}", given(typed.amount())),
            Self::FeetAndInches => write!(f, "not understood: whole feet and less than 12 inches, as in 5' 6\""),
            Self::TooLarge => write!(f, "too large a number"),
            Self::BelowAbsoluteZero { typed } => write!(f, "{} is below absolute zero", given(typed.amount())),
            Self::NotAGauge => write!(f, "no such gauge: 40 to 1, then 1/0 to 4/0 AWG, then kcmil"),
            Self::NotSold { typed, one, other } => {
                write!(f, "{}: did you mean ", given(typed.amount()))?;
                match (one, other) {
                    (Some(one), Some(other)) if one.unit() == Unit::Awg => {
                        let one = super::gauge_written(one.number());
                        write!(f, "{one} or {}?", given(other.amount()))
                    }
                    (Some(one), Some(other)) => write!(f, "{} or {}?", given(one.amount()), given(other.amount())),
                    (Some(one), None) | (None, Some(one)) => write!(f, "{}?", given(one.amount())),
                    (None, None) => write!(f, "another size?"),
                }
            }
            Self::NotWhole { number } => {
                write!(f, "{} is not a whole number", given(Amount { number: *number, unit: Unit::One }))
            }
            Self::OutOfRange { typed, least, most, unit } => {
                let [least, most] = inner(*least, *most);
                let least = given(Amount { number: least, unit: Unit::One });
                let most = given(Amount { number: most, unit: *unit });
                write!(f, "{} is out of range: {least} to {most}", given(typed.amount()))
            }
        }
    }
}

impl core::error::Error for Refusal {}

fn given(amount: Amount) -> String {
    show::given(amount)
}

/// Ends of a range short enough to say, and never outside the true ones: 328.083 99 becomes 328 at the upper end.
fn inner(least: f64, most: f64) -> [f64; 2] {
    let short = |end: f64, inwards: fn(f64) -> f64| {
        let step = 10f64.powf((end.abs().log10().floor() - 2.0).max(-300.0));
        let four = show::tidy((end / (step / 10.0)).round() * (step / 10.0));
        if end == 0.0 || four == show::tidy(end) { end } else { show::tidy(inwards(end / step) * step) }
    };
    let (low, high) = (short(least, f64::ceil), short(most, f64::floor));
    // A range so narrow that its ends pass each other is said in full.
    if low <= high { [low, high] } else { [least, most] }
}

/// The units that a field of the usual one knows, as "V or mV"; `None` where it takes numbers alone.
fn unit_list(usual: Unit) -> Option<String> {
    let near = Unit::ALL.iter().filter(|unit| unit.dimension() == usual.dimension());
    let symbols: Vec<&str> = near.map(|unit| unit.symbol()).filter(|symbol| !symbol.is_empty()).collect();
    let (last, before) = symbols.split_last()?;
    Some(if before.is_empty() { (*last).to_owned() } else { format!("{} or {last}", before.join(", ")) })
}

const fn kind(dimension: Dimension) -> &'static str {
    match dimension {
        Dimension::Potential => "a voltage",
        Dimension::Current => "a current",
        Dimension::Power => "a power",
        Dimension::ApparentPower => "an apparent power",
        Dimension::Charge => "a charge",
        Dimension::Energy => "an energy",
        Dimension::Time => "a time",
        Dimension::Resistance => "a resistance",
        Dimension::ResistancePerLength => "a resistance by length",
        Dimension::Length => "a length",
        Dimension::ConductorSize => "a wire size",
        Dimension::Temperature => "a temperature",
        Dimension::TemperatureDifference => "a difference of temperatures",
        Dimension::VoltageCoefficient | Dimension::CurrentCoefficient | Dimension::RelativeCoefficient => {
            "a change with temperature"
        }
        Dimension::Part => "a percentage",
        Dimension::Irradiance => "an irradiance",
        Dimension::Volume => "a volume",
        Dimension::AirFlow => "a flow of air",
        Dimension::Opening => "an area",
        Dimension::GasCurrent => "a current by capacity",
        Dimension::Number => "a number of things",
    }
}

const fn wanted(dimension: Dimension) -> &'static str {
    match dimension {
        Dimension::Potential => "volts",
        Dimension::Current => "amps",
        Dimension::Power => "watts",
        Dimension::ApparentPower => "volt-amps (VA)",
        Dimension::Charge => "amp-hours",
        Dimension::Energy => "watt-hours",
        Dimension::Time => "a time, as 2 h or 30 s",
        Dimension::Resistance => "ohms",
        Dimension::ResistancePerLength => "ohms by length, as 0.5 Ω/km",
        Dimension::Length => "a length, as 12 m or 40 ft",
        Dimension::ConductorSize => "a wire size, as 35 mm² or 2/0 AWG",
        Dimension::Temperature => "a temperature, as −31 °C",
        Dimension::TemperatureDifference => "kelvins",
        Dimension::VoltageCoefficient => "%/K, mV/K or V/K",
        Dimension::CurrentCoefficient => "%/K, mA/K or A/K",
        Dimension::RelativeCoefficient => "%/K",
        Dimension::Part => "percent",
        Dimension::Irradiance => "W/m²",
        Dimension::Volume => "litres",
        Dimension::AirFlow => "m³/h",
        Dimension::Opening => "an area, as 150 cm²",
        Dimension::GasCurrent => "mA/Ah",
        Dimension::Number => "a number alone",
    }
}
