//! Lists of numbers, typed or pasted: one measured cell after the other.

use super::{Reading, Refusal, read};
use crate::unit::Unit;

/// One entry of a list.
#[derive(Clone, Debug, PartialEq)]
pub struct Item {
    /// The line it stands on, from 1.
    pub line: usize,
    /// As it was typed.
    pub text: String,
    /// What was understood.
    pub reading: Result<Reading, Refusal>,
}

/// Reads a list. Where an item holds no unit, `usual` stands.
///
/// Items are parted by a new line, a semicolon, a tab or a space. A comma between two digits is a decimal mark; at
/// the end of an item it only parts. A unit may stand a space after its number. Two commas in one item are refused,
/// since `280,279,281` may be three cells or one number.
///
/// # Example
///
/// ```
/// use engine::typed::list::read_list;
/// use engine::unit::Unit;
///
/// let items = read_list("281,5; 279 Ah\n280", Unit::AmpHour);
/// let numbers: Vec<f64> = items.iter().filter_map(|item| item.reading.as_ref().ok()).map(|r| r.number()).collect();
/// assert_eq!(numbers, [281.5, 279.0, 280.0]);
/// ```
#[must_use]
pub fn read_list(text: &str, usual: Unit) -> Vec<Item> {
    let mut items: Vec<(usize, String)> = Vec::new();
    for (line, part) in (1..).zip(text.lines()).flat_map(|(line, all)| all.split(';').map(move |part| (line, part))) {
        let before = items.len();
        for token in part.split_whitespace() {
            let token = token.trim_end_matches(',');
            if token.is_empty() {
                continue;
            }
            // A word without a digit is the unit of the number before it, or a sign alone.
            let is_unit = !token.chars().any(|c| c.is_ascii_digit());
            match items[before..].last_mut() {
                Some((_, item)) if is_unit => {
                    item.push(' ');
                    item.push_str(token);
                }
                _ => items.push((line, token.to_owned())),
            }
        }
    }
    items
        .into_iter()
        .map(|(line, text)| {
            let many = text.matches(',').count() > 1;
            let reading = if many { Err(Refusal::NotANumber { text: text.clone() }) } else { read(&text, usual) };
            Item { line, text, reading }
        })
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    fn numbers(text: &str) -> Vec<f64> {
        read_list(text, Unit::AmpHour).into_iter().map(|i| i.reading.map_or(f64::NAN, Reading::number)).collect()
    }

    #[test]
    fn every_separator_parts() {
        assert_eq!(numbers("280\n279;281\t278 277"), [280.0, 279.0, 281.0, 278.0, 277.0]);
        assert_eq!(numbers("280\r\n279\r\n"), [280.0, 279.0]);
        assert_eq!(numbers(" ;; \n\t"), []);
    }

    #[test]
    fn a_comma_is_a_decimal_mark_inside_and_a_separator_at_the_end() {
        assert_eq!(numbers("280,5 279,25"), [280.5, 279.25]);
        assert_eq!(numbers("280, 279, 281"), [280.0, 279.0, 281.0]);
    }

    #[test]
    fn two_commas_in_one_item_are_refused_rather_than_guessed() {
        let items = read_list("280,279,281 278", Unit::AmpHour);
        assert_eq!(items.len(), 2);
        assert!(items[0].reading.is_err());
        assert_eq!(items[1].reading.as_ref().map(|r| r.number()), Ok(278.0));
    }

    #[test]
    fn what_is_not_understood_keeps_its_text_and_line_and_spoils_no_other() {
        let items = read_list("280\nbad7\n281", Unit::AmpHour);
        assert_eq!(items[1].text, "bad7");
        assert_eq!(items[1].line, 2);
        assert!(items[0].reading.is_ok() && items[1].reading.is_err() && items[2].reading.is_ok());
    }

    #[test]
    fn a_unit_a_space_later_belongs_to_its_number() {
        let items = read_list("280 Ah 279 Ah; 281", Unit::AmpHour);
        let texts: Vec<&str> = items.iter().map(|i| i.text.as_str()).collect();
        assert_eq!(texts, ["280 Ah", "279 Ah", "281"]);
    }
}
