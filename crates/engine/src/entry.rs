//! What stands in a field: nothing, a value, or something that could not be read.

use crate::quantity::Quantity;
use crate::typed::Reading;

/// What a person put into a field, as far as the engine understands it.
///
/// An unread entry is never treated as blank: what depends on it **asks**, even where a blank would be assumed.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub enum Entry<T> {
    /// Nothing was entered. An assumption may stand in.
    #[default]
    Blank,
    /// Entered, and understood.
    Typed(T),
    /// Entered, and not understood. Nothing may stand in.
    Unread,
}

impl<T: Copy> Entry<T> {
    /// The value, where one was entered and understood.
    pub const fn typed(self) -> Option<T> {
        match self {
            Self::Typed(value) => Some(value),
            Self::Blank | Self::Unread => None,
        }
    }

    /// The same entry with its value turned into another.
    pub fn map<U>(self, turn: impl FnOnce(T) -> U) -> Entry<U> {
        match self {
            Self::Blank => Entry::Blank,
            Self::Typed(value) => Entry::Typed(turn(value)),
            Self::Unread => Entry::Unread,
        }
    }
}

impl Entry<Reading> {
    /// The same as a quantity; unread where its unit does not turn into the quantity's.
    pub fn quantity<Q: Quantity>(self) -> Entry<Q> {
        match self {
            Self::Blank => Entry::Blank,
            Self::Typed(reading) => reading.quantity().map_or(Entry::Unread, Entry::Typed),
            Self::Unread => Entry::Unread,
        }
    }
}

impl<Q: Quantity> Entry<Q> {
    /// A value as if it had been typed, for tests and demonstrations.
    pub fn of(number: f64) -> Self {
        Self::Typed(Q::of(number))
    }
}
