//! American wire gauge as it is typed and written: 14 AWG, #14, 2/0.

use super::numeral;
use super::{Reading, Refusal};
use crate::unit::Unit;

/// The thickest gauge: 4/0, counted as −3.
const THICKEST: f64 = -3.0;

/// The thinnest gauge. Chosen: nothing thinner carries current in a power room.
const THINNEST: f64 = 40.0;

/// Whether there is a gauge of that number, where 1/0 is 0 and 4/0 is −3.
pub(super) fn is_one(number: f64) -> bool {
    number.fract() == 0.0 && (THICKEST..=THINNEST).contains(&number)
}

/// How it is written: 14, or 2/0 for −1. A number between two gauges is written as the nearer.
pub(super) fn written(number: f64) -> String {
    let number = number.round();
    if number <= 0.0 { format!("{}/0", 1.0 - number) } else { format!("{number}") }
}

/// Reads `text` if it is a gauge: marked as one, or written 1/0 to 4/0. `None` where it is something else.
pub(super) fn read(text: &str, usual: Unit) -> Result<Option<Reading>, Refusal> {
    let marked = without_mark(text);
    let body = marked.unwrap_or(text).trim();
    if marked.is_some() && body.is_empty() {
        return Err(Refusal::Unfinished);
    }
    if let Some(noughts) = body.strip_suffix("/0").filter(|count| all_digits(count)) {
        return match noughts.parse::<u8>() {
            Ok(count @ 1..=4) => Reading::new(1.0 - f64::from(count), Unit::Awg).map(Some),
            _ => Err(Refusal::NotAGauge),
        };
    }
    let noughts = all_digits(body) && body.bytes().all(|byte| byte == b'0');
    if noughts && (marked.is_some() || usual == Unit::Awg) {
        return match body.len() {
            count @ 1..=4 => Reading::new(1.0 - count as f64, Unit::Awg).map(Some),
            _ => Err(Refusal::NotAGauge),
        };
    }
    if marked.is_none() {
        return Ok(None);
    }
    match numeral::read(body)? {
        (numeral, "") if !numeral.negative && !numeral.fraction => Reading::new(numeral.number, Unit::Awg).map(Some),
        _ => Err(Refusal::NotAGauge),
    }
}

fn all_digits(text: &str) -> bool {
    !text.is_empty() && text.bytes().all(|byte| byte.is_ascii_digit())
}

/// What is left of `text` without "AWG" before or after it, or a "#" before it; `None` where it has neither.
fn without_mark(text: &str) -> Option<&str> {
    if let Some(body) = text.strip_prefix('#') {
        return Some(without_word(body.trim_start(), "awg", false).unwrap_or(body));
    }
    without_word(text, "awg", true)
        .or_else(|| ["awg", "gauge", "ga"].into_iter().find_map(|word| without_word(text, word, false)))
}

fn without_word<'a>(text: &'a str, word: &str, before: bool) -> Option<&'a str> {
    let at = if before { word.len() } else { text.len().checked_sub(word.len())? };
    let (head, tail) = text.split_at_checked(at)?;
    let (mark, body) = if before { (head, tail) } else { (tail, head) };
    mark.eq_ignore_ascii_case(word).then_some(body)
}
