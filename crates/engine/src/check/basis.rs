//! What a check rests on: which inputs were assumed, and which are missing.

use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::Amount;
use crate::source::Clause;

/// A set of fields.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct FieldSet([u64; 3]);

impl FieldSet {
    /// Whether no field is in it.
    #[must_use]
    pub const fn is_empty(self) -> bool {
        self.len() == 0
    }

    /// How many fields are in it.
    #[must_use]
    pub const fn len(self) -> u32 {
        let [a, b, c] = self.0;
        a.count_ones() + b.count_ones() + c.count_ones()
    }

    /// Whether `field` is in it.
    #[must_use]
    pub const fn contains(self, field: Field) -> bool {
        let place = field as u8;
        self.0[(place / 64) as usize] & (1 << (place % 64)) != 0
    }

    /// Puts `field` in.
    pub const fn insert(&mut self, field: Field) {
        let place = field as u8;
        self.0[(place / 64) as usize] |= 1 << (place % 64);
    }

    /// The fields of both.
    #[must_use]
    pub const fn union(self, other: Self) -> Self {
        let ([a, b, c], [d, e, f]) = (self.0, other.0);
        Self([a | d, b | e, c | f])
    }

    /// The fields, in the order of the page.
    pub fn iter(self) -> impl Iterator<Item = Field> {
        Field::ALL.iter().copied().filter(move |field| self.contains(*field))
    }
}

/// A value that stands in for one that was not entered. Always shown, with its reason, one tap from being replaced.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Assumption {
    /// The value, or none where it depends on other inputs.
    pub amount: Option<Amount>,
    /// The key of the choice, where it is one of a list.
    pub choice: Option<&'static str>,
    /// Why this value, in a few words.
    pub why: &'static str,
    /// Where it is from.
    pub source: Clause,
}

/// Collects, while a method reads its inputs, which of them are missing and which are assumed.
#[derive(Clone, Copy, Debug, Default)]
pub struct Basis {
    missing: FieldSet,
    assumed: FieldSet,
}

impl Basis {
    /// An input that cannot be assumed. `None`, and noted as missing, where it was not entered or not understood.
    pub fn need<T: Copy>(&mut self, field: Field, entry: Entry<T>) -> Option<T> {
        if let Entry::Typed(value) = entry {
            return Some(value);
        }
        self.missing.insert(field);
        None
    }

    /// An input for which `otherwise` stands in where nothing was entered.
    /// `None`, and noted as missing, where it was entered and not understood.
    pub fn assume<T: Copy>(&mut self, field: Field, entry: Entry<T>, otherwise: T) -> Option<T> {
        match entry {
            Entry::Typed(value) => Some(value),
            Entry::Blank => {
                self.assumed.insert(field);
                Some(otherwise)
            }
            Entry::Unread => {
                self.missing.insert(field);
                None
            }
        }
    }

    /// Notes that `field` has to be entered, or entered better.
    pub const fn ask(&mut self, field: Field) {
        self.missing.insert(field);
    }

    /// The inputs found missing so far.
    #[must_use]
    pub const fn missing(&self) -> FieldSet {
        self.missing
    }

    /// The inputs assumed so far.
    #[must_use]
    pub const fn assumed(&self) -> FieldSet {
        self.assumed
    }
}
