//! What tests of the page's words share.

use engine::field::Field;
use engine::pad::Pad;
use engine::show;
use engine::unit::Unit;

/// What stands in the fields, the last of each counting.
pub struct Rows<'a>(pub &'a [(Field, &'a str)]);

impl Pad for Rows<'_> {
    fn typed(&self, field: Field) -> (&str, Option<Unit>) {
        (self.0.iter().rev().find(|(one, _)| *one == field).map_or("", |(_, text)| text), None)
    }
}

/// The text with plain spaces.
pub fn plain(text: &str) -> String {
    text.replace([show::NARROW, '\u{a0}'], " ")
}
