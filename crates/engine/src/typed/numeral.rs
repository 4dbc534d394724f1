//! Numbers as people write them: signs, decimal marks, groups of digits, powers of ten, fractions.

use super::decimal::nearest;
use super::refusal::Refusal;

/// A number at the head of a text.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Numeral {
    /// Its value, sign included.
    pub number: f64,
    /// Whether a minus stood before it.
    pub negative: bool,
    /// Whether it was written as a fraction.
    pub fraction: bool,
}

/// Hyphens and dashes that are typed, or put in by a keypad, for a minus.
const MINUS: [char; 8] = ['-', '\u{2212}', '\u{2013}', '\u{2010}', '\u{2011}', '\u{2012}', '\u{FE63}', '\u{FF0D}'];

/// What may stand between groups of three digits: spaces of all widths that are used for it, apostrophes.
const GROUP: [char; 7] = [' ', '\u{00A0}', '\u{2009}', '\u{202F}', '\u{2007}', '\'', '\u{2019}'];

const HALVES: [(char, f64); 3] = [('½', 0.5), ('¼', 0.25), ('¾', 0.75)];

/// The number at the head of `text`, and what follows it.
pub(super) fn read(text: &str) -> Result<(Numeral, &str), Refusal> {
    let unsigned = text.strip_prefix(is_sign).map_or(text, str::trim_start);
    let negative = text.starts_with(MINUS);
    let (size, fraction, rest) = magnitude(unsigned, text).map_err(|refusal| match refusal {
        Refusal::TwoMeanings { decimal, whole } if negative => {
            Refusal::TwoMeanings { decimal: format!("−{decimal}"), whole: format!("−{whole}") }
        }
        other => other,
    })?;
    let number = if negative { -size } else { size };
    Ok((Numeral { number, negative, fraction }, rest))
}

pub(super) fn is_sign(mark: char) -> bool {
    mark == '+' || MINUS.contains(&mark)
}

/// Size, whether it is a fraction, and the rest.
fn magnitude<'a>(unsigned: &'a str, text: &str) -> Result<(f64, bool, &'a str), Refusal> {
    let (digits, grouped, rest) = run_of_digits(unsigned);
    if digits.is_empty() {
        return match vulgar(rest) {
            Some((part, rest)) => Ok((part, true, rest)),
            // Nothing yet, or a sign alone.
            None if rest.is_empty() => Err(Refusal::Unfinished),
            None => Err(Refusal::NotANumber { text: text.to_owned() }),
        };
    }
    let plain = digits.bytes().all(|byte| byte.is_ascii_digit());
    if plain && !grouped {
        if let Some((part, rest)) = fraction(&digits, rest, text)? {
            return Ok((part, true, rest));
        }
        let after = rest.trim_start();
        let part = match vulgar(after) {
            Some(found) => Some(found),
            None if after.len() < rest.len() => {
                let (above, _, below) = run_of_digits(after);
                if below.starts_with('/') { fraction(&above, below, text)? } else { None }
            }
            None => None,
        };
        if let Some((part, rest)) = part {
            return Ok((parse(&digits)? + part, true, rest));
        }
    }
    let decimal = decimal(&digits, grouped, rest, text)?;
    let (power, rest) = power_of_ten(rest)?;
    Ok((parse(&(decimal + &power))?, false, rest))
}

/// Digits and marks at the head, without what groups them; whether spaces or apostrophes group them; the rest.
fn run_of_digits(text: &str) -> (String, bool, &str) {
    let mut digits = String::new();
    let mut group = None;
    let mut rest = text;
    while let Some(next) = rest.chars().next() {
        if next.is_ascii_digit() || next == '.' || next == ',' {
            // A group that has begun takes three digits and no more; what follows it is a mark or the end.
            digits.push(next);
            rest = &rest[next.len_utf8()..];
        } else if GROUP.contains(&next)
            && (group == Some(next) || group.is_none() && (1..=3).contains(&digits.len()) && !digits.starts_with('0'))
            && digits.bytes().all(|byte| byte.is_ascii_digit())
            && let Some(three) = three_digits(&rest[next.len_utf8()..])
        {
            group = Some(next);
            digits.push_str(three);
            rest = &rest[next.len_utf8() + three.len()..];
        } else {
            break;
        }
    }
    (digits, group.is_some(), rest)
}

/// Exactly three digits at the head that are not the upper part of a fraction, nor inches.
fn three_digits(text: &str) -> Option<&str> {
    let three = text.get(..3).filter(|head| head.bytes().all(|byte| byte.is_ascii_digit()))?;
    let after = text[3..].chars().next();
    let ends = after.is_none_or(|next| !next.is_ascii_digit() && !['/', '"', '\u{201D}', '\u{2033}'].contains(&next));
    ends.then_some(three)
}

/// `digits` with the decimal mark as a point and nothing else between the digits.
fn decimal(digits: &str, grouped: bool, rest: &str, text: &str) -> Result<String, Refusal> {
    let marks: Vec<char> = digits.chars().filter(|next| !next.is_ascii_digit()).collect();
    let Some(last) = marks.last().copied() else {
        return Ok(digits.to_owned());
    };
    let not_understood = || Refusal::Marks { perhaps: doubled_mark(digits), text: text.to_owned() };
    if digits.ends_with(last) {
        let doubled = marks.len() > 1 && digits[..digits.len() - 1].ends_with(['.', ',']);
        return Err(if rest.is_empty() && !doubled { Refusal::Unfinished } else { not_understood() });
    }
    let (whole, part) = digits.rsplit_once(last).unwrap_or((digits, ""));
    if marks.len() == 1 {
        // One comma before three digits: a decimal in one country and a thousand in another.
        let thousand = last == ',' && !grouped && part.len() == 3 && is_first_group(whole);
        if thousand {
            return Err(Refusal::TwoMeanings { decimal: format!("{whole}.{part}"), whole: format!("{whole}{part}") });
        }
        return Ok(format!("{whole}.{part}"));
    }
    let other = if last == ',' { '.' } else { ',' };
    match (grouped, marks.iter().all(|mark| *mark == last)) {
        (false, true) if in_groups(digits, last) => Ok(digits.replace(last, "")),
        (false, false) if in_groups(whole, other) => Ok(format!("{}.{part}", whole.replace(other, ""))),
        _ => Err(not_understood()),
    }
}

fn is_first_group(group: &str) -> bool {
    (1..=3).contains(&group.len()) && !group.starts_with('0') && group.bytes().all(|byte| byte.is_ascii_digit())
}

/// Whether `digits` are one to three digits, then threes, each after a `mark`.
fn in_groups(digits: &str, mark: char) -> bool {
    let mut groups = digits.split(mark);
    groups.next().is_some_and(is_first_group)
        && groups.all(|group| group.len() == 3 && group.bytes().all(|byte| byte.is_ascii_digit()))
}

/// What may have been meant where the decimal mark stands twice side by side, as in `12,,4`.
fn doubled_mark(digits: &str) -> Option<String> {
    let (whole, _) = digits.split_once(['.', ','])?;
    let (_, part) = digits.rsplit_once(['.', ','])?;
    let between = digits.get(whole.len()..digits.len() - part.len())?;
    let doubled = between.len() > 1 && between.bytes().all(|byte| !byte.is_ascii_digit());
    (doubled && !whole.is_empty() && !part.is_empty()).then(|| format!("{whole}.{part}"))
}

/// `e`, sign and digits at the head; empty where an `e` is not followed by digits but by letters.
fn power_of_ten(rest: &str) -> Result<(String, &str), Refusal> {
    let Some(after) = rest.strip_prefix(['e', 'E']) else {
        return Ok((String::new(), rest));
    };
    let unsigned = after.strip_prefix(is_sign).unwrap_or(after);
    if unsigned.is_empty() {
        return Err(Refusal::Unfinished);
    }
    let end = unsigned.find(|next: char| !next.is_ascii_digit()).unwrap_or(unsigned.len());
    if end == 0 {
        return Ok((String::new(), rest));
    }
    let sign = if after.starts_with(MINUS) { "-" } else { "" };
    Ok((format!("e{sign}{}", &unsigned[..end]), &unsigned[end..]))
}

/// The fraction of `above` and what follows a stroke at the head of `rest`.
fn fraction<'a>(above: &str, rest: &'a str, text: &str) -> Result<Option<(f64, &'a str)>, Refusal> {
    let Some(after) = rest.strip_prefix('/') else {
        return Ok(None);
    };
    if after.is_empty() {
        return Err(Refusal::Unfinished);
    }
    let end = after.find(|next: char| !next.is_ascii_digit()).unwrap_or(after.len());
    let (below, rest) = after.split_at(end);
    let not_a_number = || Refusal::NotANumber { text: text.to_owned() };
    let (above, below) = (above.parse::<u32>(), below.parse::<u32>());
    match (above, below) {
        (Ok(above), Ok(below)) if below > 0 => Ok(Some((f64::from(above) / f64::from(below), rest))),
        _ => Err(not_a_number()),
    }
}

fn vulgar(text: &str) -> Option<(f64, &str)> {
    HALVES.iter().find_map(|(mark, part)| text.strip_prefix(*mark).map(|rest| (*part, rest)))
}

fn parse(decimal: &str) -> Result<f64, Refusal> {
    match nearest(decimal) {
        Some(number) if number.is_finite() => Ok(number),
        // Its digits were looked at before; what is left to go wrong is a power of ten that nobody means.
        Some(_) => Err(Refusal::TooLarge),
        None if decimal.contains('e') => Err(Refusal::TooLarge),
        None => Err(Refusal::NotANumber { text: decimal.to_owned() }),
    }
}
