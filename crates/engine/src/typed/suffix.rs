//! Units as people write them after a number.

use super::numeral::{self, Numeral};
use super::refusal::Refusal;
use crate::unit::{Dimension, Unit};

/// The unit that `rest`, all that follows a number, names. `usual` where it names none.
///
/// A unit of the usual one's dimension goes before the same letters for another: °C is a difference where a
/// difference is wanted.
pub(super) fn read(rest: &str, usual: Unit) -> Result<Unit, Refusal> {
    let typed = plain(rest);
    if typed.is_empty() {
        return Ok(usual);
    }
    // A degree sign alone leaves the scale to the field, unless that is the one scale without degrees.
    if typed == "°" && usual.symbol().starts_with('°') {
        return Ok(usual);
    }
    let all = Unit::ALL.iter().copied();
    let near = all.clone().filter(|unit| unit.dimension() == usual.dimension());
    if let Some(found) = named(near, &typed).or_else(|| named(all, &typed)) {
        return Ok(found);
    }
    if holds_a_number(rest) {
        return Err(Refusal::TwoNumbers);
    }
    Err(Refusal::UnknownUnit { typed: rest.trim().to_owned(), usual })
}

/// One spelling for the many: no spaces, hyphens, points or raised dots; one sign for ohm, degree, square and cube.
fn plain(text: &str) -> String {
    let joined = text.trim().replace(" per ", "/").replace("''", "\"");
    let mut plain = String::new();
    for mark in joined.chars() {
        match mark {
            '\u{2126}' => plain.push('Ω'),
            '\u{212A}' => plain.push('K'),
            '℃' => plain.push_str("°C"),
            '℉' => plain.push_str("°F"),
            'º' | '˚' => plain.push('°'),
            '²' => plain.push('2'),
            '³' => plain.push('3'),
            '\u{2019}' | '\u{2032}' => plain.push('\''),
            '\u{201C}' | '\u{201D}' | '\u{2033}' => plain.push('"'),
            '-' | '.' | '·' | '⋅' | '^' => {}
            space if space.is_whitespace() => {}
            other => plain.push(other),
        }
    }
    // "deg C" is "°C"; the rest of the word, as in "degrees", too.
    for word in ["degrees", "degree", "deg"] {
        if let Some(at) = plain.to_ascii_lowercase().find(word) {
            plain.replace_range(at..at + word.len(), "°");
        }
    }
    plain
}

/// The one of `units` that `typed` names: by its symbol to the letter, else in any case that means the same.
fn named(units: impl Iterator<Item = Unit> + Clone, typed: &str) -> Option<Unit> {
    let exactly = units.clone().find(|unit| letters(unit.symbol()).eq(typed.chars()));
    exactly.or_else(|| units.clone().find(|unit| tolerates(*unit, typed)))
}

/// A spelling of ours letter by letter, as [`plain`] would write it.
fn letters(spelling: &str) -> impl Iterator<Item = char> + '_ {
    spelling.chars().map(|letter| match letter {
        '²' => '2',
        '³' => '3',
        other => other,
    })
}

/// Whether `typed` is this unit in some other case, where case does not matter.
///
/// Two capitals mean something else than the small letter: M before a unit is a million, not a thousandth, and k alone
/// is a thousand, not a kelvin.
fn tolerates(unit: Unit, typed: &str) -> bool {
    let thousandth = matches!(
        unit,
        Unit::Millivolt | Unit::Milliamp | Unit::Milliohm | Unit::MillivoltPerKelvin | Unit::MilliampPerKelvin
    );
    let spelled_out = typed.get(..5).is_some_and(|head| head.eq_ignore_ascii_case("milli"));
    if thousandth && typed.starts_with('M') && !spelled_out || typed == "k" {
        return false;
    }
    let alike = |spelling: &str| letters(spelling).map(small).eq(typed.chars().map(small));
    alike(unit.symbol()) || unit.also_typed().iter().any(|also| alike(also))
}

/// Whether another number begins somewhere in `rest`, rather than a digit that belongs to a unit.
fn holds_a_number(rest: &str) -> bool {
    let mut before = ' ';
    for mark in rest.chars() {
        let begins = before.is_whitespace() || numeral::is_sign(before) || ",.;:~…".contains(before);
        if mark.is_ascii_digit() && begins {
            return true;
        }
        before = mark;
    }
    false
}

/// Feet, where `rest` names feet and goes on with inches: `' 6"` or `ft 6 in` after 5. The last mark may be left out
/// after a sign for feet.
pub(super) fn feet_then_inches(feet: Numeral, rest: &str) -> Result<Option<f64>, Refusal> {
    let rest = rest.trim_start();
    let marked = ["'", "\u{2019}", "\u{2032}"].into_iter().find_map(|mark| rest.strip_prefix(mark));
    let spelled = || {
        ["feet", "foot", "ft.", "ft"].into_iter().find_map(|word| {
            rest.split_at_checked(word.len()).filter(|(head, _)| head.eq_ignore_ascii_case(word)).map(|(_, tail)| tail)
        })
    };
    let Some(tail) = marked.or_else(spelled) else {
        return Ok(None);
    };
    let after = tail.trim_start();
    if !after.starts_with(|next: char| next.is_ascii_digit() || "½¼¾".contains(next)) {
        return Ok(None);
    }
    let (inches, end) = numeral::read(after)?;
    if marked.is_none() && tail == after && end.trim().is_empty() {
        // "ft2" is a square foot before it is two inches.
        return Ok(None);
    }
    let unit = read(end, Unit::Inch)?;
    if unit.dimension() != Dimension::Length {
        return Err(Refusal::TwoNumbers);
    }
    if unit != Unit::Inch || feet.fraction || feet.number.fract() != 0.0 || inches.number >= 12.0 {
        return Err(Refusal::FeetAndInches);
    }
    let size = feet.number.abs() + inches.number / 12.0;
    Ok(Some(if feet.negative { -size } else { size }))
}

/// The small letter of a Latin capital. Of other letters only ohm and kelvin have a sign of their own that units use.
fn small(letter: char) -> char {
    match letter {
        '\u{212A}' => 'k',
        '\u{2126}' | 'ω' => 'Ω',
        other => other.to_ascii_lowercase(),
    }
}
