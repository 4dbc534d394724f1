//! What was typed into the fields of one part.

use crate::entry::Entry;
use crate::field::Field;
use crate::pad::Pad;
use crate::typed::Reading;
use crate::unit::Unit;

/// What stands in one field.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Typed {
    /// The text, to the letter.
    pub text: String,
    /// The unit that was chosen for the field, where one was.
    pub unit: Option<Unit>,
}

impl Typed {
    /// A text in the field's usual unit, or in the one it names itself.
    #[must_use]
    pub fn plain(text: &str) -> Self {
        Self { text: text.to_owned(), unit: None }
    }
}

/// What was typed, by field. A list in the order of the fields, as there are some dozens at most. A blank text is not
/// kept.
///
/// Each is read once, when it is put in: the checks ask for it many times over.
#[derive(Clone, Debug, Default)]
pub struct Entries(Vec<Held>);

#[derive(Clone, Debug)]
struct Held {
    field: Field,
    typed: Typed,
    reading: Entry<Reading>,
}

impl PartialEq for Entries {
    fn eq(&self, other: &Self) -> bool {
        self.iter().eq(other.iter())
    }
}

impl Eq for Entries {}

impl Entries {
    /// Of texts in the fields' usual units.
    #[must_use]
    pub fn of(rows: &[(Field, &str)]) -> Self {
        let mut entries = Self::default();
        for (field, text) in rows {
            entries.set(*field, Typed::plain(text));
        }
        entries
    }

    /// What stands in `field`.
    #[must_use]
    pub fn get(&self, field: Field) -> Option<&Typed> {
        self.held(field).map(|held| &held.typed)
    }

    fn held(&self, field: Field) -> Option<&Held> {
        let at = self.0.binary_search_by_key(&field, |held| held.field).ok()?;
        Some(&self.0[at])
    }

    /// Puts `typed` into `field`; a blank text with no unit takes the entry away.
    pub fn set(&mut self, field: Field, typed: Typed) {
        let blank = typed.text.is_empty() && typed.unit.is_none();
        let held = |typed: Typed| Held { field, reading: field.reading(&typed.text, typed.unit), typed };
        match self.0.binary_search_by_key(&field, |held| held.field) {
            Ok(at) if blank => drop(self.0.remove(at)),
            Ok(at) => self.0[at] = held(typed),
            Err(_) if blank => {}
            Err(at) => self.0.insert(at, held(typed)),
        }
    }

    /// Every entry, in the order of the fields.
    pub fn iter(&self) -> impl Iterator<Item = (Field, &Typed)> {
        self.0.iter().map(|held| (held.field, &held.typed))
    }

    /// Whether nothing was entered.
    #[must_use]
    pub const fn is_empty(&self) -> bool {
        self.0.is_empty()
    }

    /// How many fields hold something.
    #[must_use]
    pub const fn len(&self) -> usize {
        self.0.len()
    }
}

impl Pad for Entries {
    fn reading(&self, field: Field) -> Entry<Reading> {
        self.held(field).map_or(Entry::Blank, |held| held.reading)
    }

    fn typed(&self, field: Field) -> (&str, Option<Unit>) {
        self.get(field).map_or(("", None), |typed| (&typed.text, typed.unit))
    }
}
