//! Numbers as they stand on screen and on the sheet.
//!
//! A true minus, groups of three from five digits on and a narrow no-break space before the unit.
//!
//! Rounding must never hide a break: a value of 150.04 V beside a limit of 150 V would read 150.0 V. So wherever a value
//! stands beside its limit, both are written by [`apart`], and the distance between them by [`room`].

use crate::quantity::Amount;
use crate::typed;
use crate::unit::Unit;

/// Narrow no-break space: between groups of digits, and before the unit.
pub const NARROW: char = '\u{202F}';

/// True minus.
pub const MINUS: char = '\u{2212}';

/// What stands for a value that is not a number; it is a fault of ours where it shows.
pub const NONE: &str = "—";

/// Digits that are kept of any number: as many as survive a few sums of decimal fractions. Also where [`apart`] ends,
/// as a verdict takes a value so near its limit for the limit itself.
const KEPT: usize = 12;

/// A computed value, with the digits that its unit deserves: 170.3 V, 61.0 V, 13.62 V, 350 W.
///
/// Chosen: about what a good meter shows, and one digit more than the inputs are known to.
///
/// ```
/// use engine::{quantity::Amount, show, unit::Unit};
/// let shown = show::computed(Amount { number: -0.266, unit: Unit::PercentPerKelvin });
/// assert_eq!(shown, "\u{2212}0.266\u{202F}%/K");
/// ```
#[must_use]
pub fn computed(amount: Amount) -> String {
    with_unit(&fixed(amount, places(amount)), amount.unit)
}

/// A number that somebody gave, as short as it can be: 150 V, 49.3 V, −0.27 %/K, 2/0 AWG.
///
/// Rounded to twelve digits only, which takes away what changing its unit left in the last bits.
#[must_use]
pub fn given(amount: Amount) -> String {
    with_unit(&shortest(amount), amount.unit)
}

/// A value inside a working: two places more than [`computed`], so that the next step can be followed by hand, and no
/// noughts at the end.
///
/// ```
/// use engine::{quantity::{Quantity, Volts}, show};
/// assert_eq!(show::step(Volts::new(56.75376).amount()), "56.754\u{202F}V");
/// ```
#[must_use]
pub fn step(amount: Amount) -> String {
    if amount.unit == Unit::Awg {
        return computed(amount);
    }
    with_unit(&number(amount.number, places(amount) + 2), amount.unit)
}

/// A plain number with at most so many places, and no noughts at the end: 1.03, 1.1512, 3.
#[must_use]
pub fn number(number: f64, most_places: usize) -> String {
    let plain = decimal(number, most_places);
    let plain = if plain.contains('.') { plain.trim_end_matches('0').trim_end_matches('.') } else { &plain };
    dressed(plain)
}

/// A computed value and the limit it is set against, in one unit, with so many digits that they differ where the
/// values differ, and in the right order.
///
/// The limit is written as [`given`] where it is short, else with as many digits as the value. Values that differ by
/// less than 1e-11 of the limit are one, as they are to [`crate::check::judge`].
///
/// ```
/// use engine::{quantity::{Quantity, Volts}, show};
/// let (value, limit) = show::apart(Volts::new(150.04).amount(), Volts::new(150.0).amount());
/// assert_eq!((&*value, &*limit), ("150.04\u{202F}V", "150\u{202F}V"));
/// ```
#[must_use]
pub fn apart(value: Amount, limit: Amount) -> (String, String) {
    let mut places = places(value);
    let most = places + KEPT + 3;
    let same = value.unit != limit.unit
        || value.unit == Unit::Awg
        || (value.number - limit.number).abs() <= 1e-11 * limit.number.abs();
    let order = value.number.partial_cmp(&limit.number);
    while !same && order.is_some() && places < most {
        let (value, limit) = (rounded(value.number, places), beside(limit, places));
        if value.partial_cmp(&limit) == order {
            break;
        }
        places += 1;
    }
    let limit_digits = if beside(limit, places) == tidy(limit.number) { shortest(limit) } else { fixed(limit, places) };
    (with_unit(&fixed(value, places), value.unit), with_unit(&limit_digits, limit.unit))
}

/// The distance from a value to its limit, never shown as nought where it is not: 0.04 V rather than 0.0 V.
#[must_use]
pub fn room(amount: Amount) -> String {
    let mut places = places(amount);
    let most = places + KEPT + 3;
    while amount.number != 0.0 && rounded(amount.number, places) == 0.0 && places < most {
        places += 1;
    }
    with_unit(&fixed(amount, places), amount.unit)
}

/// `number` to the twelve digits that are kept.
pub(crate) fn tidy(number: f64) -> f64 {
    if number.is_finite() { typed::nearest(&format!("{number:.*e}", KEPT - 1)).unwrap_or(number) } else { number }
}

/// How many digits a unit deserves.
enum Digits {
    /// Places behind the point, from a size on; and below all of those.
    From(&'static [(f64, usize)], usize),
    /// So many figures, whatever the size.
    Figures(i32),
}

const fn digits(unit: Unit) -> Digits {
    use Digits::{Figures, From};
    match unit {
        Unit::Volt => From(&[(20.0, 1)], 2),
        Unit::Millivolt | Unit::Milliamp | Unit::Kelvin | Unit::FahrenheitDifference => From(&[(100.0, 0)], 1),
        Unit::Amp | Unit::Kiloamp | Unit::Hour | Unit::Second | Unit::Inch => From(&[(10.0, 1)], 2),
        Unit::MillivoltPerKelvin | Unit::MilliampPerKelvin => From(&[(10.0, 1)], 2),
        Unit::Watt | Unit::VoltAmp | Unit::AmpHour | Unit::WattHour => From(&[(100.0, 0), (10.0, 1)], 2),
        Unit::Metre | Unit::Foot | Unit::SquareMillimetre => From(&[(100.0, 0), (10.0, 1)], 2),
        Unit::Kilowatt | Unit::KilovoltAmp | Unit::KilowattHour | Unit::Horsepower => {
            From(&[(1000.0, 0), (10.0, 1)], 2)
        }
        Unit::Minute | Unit::Centimetre | Unit::Millimetre | Unit::Kcmil => From(&[(10.0, 0)], 1),
        Unit::Ohm | Unit::Milliohm | Unit::OhmPerMetre | Unit::OhmPerKilometre | Unit::OhmPerThousandFeet => Figures(3),
        Unit::VoltPerKelvin | Unit::AmpPerKelvin => Figures(3),
        Unit::DegreeCelsius | Unit::DegreeFahrenheit | Unit::KelvinAbsolute | Unit::Percent => From(&[], 1),
        Unit::PercentPerKelvin | Unit::CurrentPercentPerKelvin | Unit::RelativePercentPerKelvin => From(&[(1.0, 2)], 3),
        Unit::Awg | Unit::WattPerSquareMetre => From(&[], 0),
        Unit::Litre | Unit::CubicMetrePerHour => From(&[(100.0, 0), (10.0, 1)], 2),
        Unit::SquareCentimetre | Unit::SquareInch => From(&[(10.0, 0)], 1),
        Unit::MilliampPerAmpHour => From(&[], 1),
        Unit::One => From(&[], 2),
    }
}

/// Places behind the point for a computed value.
fn places(amount: Amount) -> usize {
    let number = amount.number;
    // Whole counts stay whole.
    if !number.is_finite() || amount.unit == Unit::One && tidy(number).fract() == 0.0 {
        return 0;
    }
    let wanted = |size: f64| match digits(amount.unit) {
        Digits::From(steps, small) => steps.iter().find(|(from, _)| size >= *from).map_or(small, |(_, places)| *places),
        // Nought has no first figure; 15 places keep a value that is nearly nought short.
        Digits::Figures(_) if size == 0.0 => 0,
        Digits::Figures(figures) => (figures - 1 - size.log10().floor() as i32).clamp(0, 15) as usize,
    };
    // What rounds up to a step is written as that step is: 20.0, not 20.00.
    let first = wanted(number.abs());
    let near = rounded(number.abs(), first);
    if near == 0.0 { first } else { first.min(wanted(near)) }
}

fn rounded(number: f64, places: usize) -> f64 {
    typed::nearest(&decimal(number, places)).unwrap_or(number)
}

/// Rounded as on paper: halves go away from nought, also 13.85 whose last bit lies below.
fn decimal(number: f64, places: usize) -> String {
    let number = if number.fract() == 0.0 { number } else { number * (1.0 + 1e-13) };
    format!("{number:.places$}")
}

/// A limit as it is written beside a value of so many places.
fn beside(limit: Amount, places: usize) -> f64 {
    let short = shortest(limit);
    let behind = short.split_once('.').map_or(0, |(_, part)| part.len());
    let figures = short.trim_start_matches([MINUS, '0', '.']).chars().filter(char::is_ascii_digit).count();
    if behind <= places || figures <= 4 { tidy(limit.number) } else { rounded(limit.number, places) }
}

fn shortest(amount: Amount) -> String {
    if amount.unit == Unit::Awg { fixed(amount, 0) } else { dressed(&tidy(amount.number).to_string()) }
}

fn fixed(amount: Amount, places: usize) -> String {
    if amount.unit == Unit::Awg && amount.number.is_finite() {
        typed::gauge_written(amount.number)
    } else {
        dressed(&decimal(amount.number, places))
    }
}

/// Plain digits with a true minus and groups. The minus of a nought is dropped.
fn dressed(plain: &str) -> String {
    if !plain.ends_with(|last: char| last.is_ascii_digit()) {
        return NONE.to_owned();
    }
    let (negative, size) = plain.strip_prefix('-').map_or((false, plain), |size| (true, size));
    let (whole, part) = size.find('.').map_or((size, ""), |point| size.split_at(point));
    let mut dressed = String::new();
    if negative && size.contains(|digit: char| ('1'..='9').contains(&digit)) {
        dressed.push(MINUS);
    }
    for (at, digit) in whole.chars().enumerate() {
        if at > 0 && whole.len() > 4 && (whole.len() - at) % 3 == 0 {
            dressed.push(NARROW);
        }
        dressed.push(digit);
    }
    dressed + part
}

fn with_unit(digits: &str, unit: Unit) -> String {
    if digits == NONE || unit == Unit::One { digits.to_owned() } else { format!("{digits}{NARROW}{}", unit.symbol()) }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn plain(shown: String) -> String {
        shown.replace(NARROW, " ").replace(MINUS, "-")
    }

    #[test]
    fn a_step_shows_what_the_next_one_is_made_of() {
        let amount = |number, unit| Amount { number, unit };
        assert_eq!(plain(step(amount(170.26128, Unit::Volt))), "170.261 V");
        assert_eq!(plain(step(amount(56.0, Unit::Kelvin))), "56 K");
        assert_eq!(plain(step(amount(15.12, Unit::Percent))), "15.12 %");
        assert_eq!(number(1.03, 4), "1.03");
        assert_eq!(number(-31.0, 4), "\u{2212}31");
        assert_eq!(number(100.0, 0), "100");
    }

    #[test]
    fn computed_values_have_the_digits_of_their_unit() {
        let rows = [
            (170.264, Unit::Volt, "170.3 V"),
            (61.0, Unit::Volt, "61.0 V"),
            (13.619, Unit::Volt, "13.62 V"),
            (19.996, Unit::Volt, "20.0 V"),
            (-0.004, Unit::Volt, "0.00 V"),
            (13.85, Unit::Amp, "13.9 A"),
            (-13.25, Unit::Amp, "-13.3 A"),
            (9.999, Unit::Amp, "10.0 A"),
            (3.4567, Unit::Amp, "3.46 A"),
            (350.4, Unit::Watt, "350 W"),
            (99.96, Unit::Watt, "100 W"),
            (12_345.6, Unit::Watt, "12 346 W"),
            (1_234.5, Unit::Watt, "1235 W"),
            (1_234_567.0, Unit::WattHour, "1 234 567 Wh"),
            (3.04, Unit::Percent, "3.0 %"),
            (-0.27, Unit::PercentPerKelvin, "-0.270 %/K"),
            (56.04, Unit::Kelvin, "56.0 K"),
            (-31.0, Unit::DegreeCelsius, "-31.0 °C"),
            (0.000_512_3, Unit::Ohm, "0.000512 Ω"),
            (4.751, Unit::Milliohm, "4.75 mΩ"),
            (0.0, Unit::Ohm, "0 Ω"),
            (-1.0, Unit::Awg, "2/0 AWG"),
            (9.7, Unit::Awg, "10 AWG"),
            (3.0, Unit::One, "3"),
            (2.5, Unit::One, "2.50"),
            (999.6, Unit::WattPerSquareMetre, "1000 W/m²"),
        ];
        for (number, unit, shown) in rows {
            assert_eq!(plain(computed(Amount { number, unit })), shown);
        }
    }

    #[test]
    fn given_numbers_are_as_short_as_they_can_be() {
        let rows = [
            (150.0, Unit::Volt, "150 V"),
            (0.1 + 0.2, Unit::Volt, "0.3 V"),
            (-0.27, Unit::PercentPerKelvin, "-0.27 %/K"),
            (-3.0, Unit::Awg, "4/0 AWG"),
            (10_000.0, Unit::Watt, "10 000 W"),
            (-0.0, Unit::Volt, "0 V"),
        ];
        for (number, unit, shown) in rows {
            assert_eq!(plain(given(Amount { number, unit })), shown);
        }
    }

    #[test]
    fn what_is_not_a_number_shows_as_none() {
        for number in [f64::NAN, f64::INFINITY, f64::NEG_INFINITY] {
            for unit in Unit::ALL {
                assert_eq!(computed(Amount { number, unit: *unit }), NONE);
                assert_eq!(given(Amount { number, unit: *unit }), NONE);
            }
        }
    }

    #[test]
    fn a_value_beside_its_limit_is_never_shown_as_the_limit() {
        let rows = [
            (170.264, 150.0, "170.3 V", "150 V"),
            (150.0, 150.0, "150.0 V", "150 V"),
            (150.04, 150.0, "150.04 V", "150 V"),
            (149.96, 150.0, "149.96 V", "150 V"),
            (150.000_04, 150.0, "150.00004 V", "150 V"),
            (150.000_000_000_000_03, 150.0, "150.0 V", "150 V"),
            (49.34, 49.32, "49.34 V", "49.32 V"),
            (123.456_2, 123.456_7, "123.456 V", "123.457 V"),
            (123.456_71, 123.456_7, "123.45671 V", "123.4567 V"),
            (0.000_1, 0.0, "0.0001 V", "0 V"),
        ];
        for (value, limit, shown, beside) in rows {
            let [value, limit] = [value, limit].map(|number| Amount { number, unit: Unit::Volt });
            let (value, limit) = apart(value, limit);
            assert_eq!((&*plain(value), &*plain(limit)), (shown, beside));
        }
    }

    #[test]
    fn a_distance_is_not_shown_as_nought() {
        let shown = |number| plain(room(Amount { number, unit: Unit::Volt }));
        assert_eq!(shown(-20.264), "-20.3 V");
        assert_eq!(shown(-0.0004), "-0.0004 V");
        assert_eq!(shown(0.0), "0.00 V");
    }
}
