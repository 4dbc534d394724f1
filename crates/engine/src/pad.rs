//! A pad: what was typed into the fields of one tool or one part, as text.

use crate::choice::Choice;
use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::Quantity;
use crate::typed::Reading;
use crate::unit::Unit;

/// Gives the text of a field, as typed, and the unit chosen for it.
///
/// A field in which nothing was ever typed is an empty text.
pub trait Pad {
    /// What stands in `field`.
    fn typed(&self, field: Field) -> (&str, Option<Unit>);

    /// What stands in `field`, as a number in the unit it was typed in.
    fn reading(&self, field: Field) -> Entry<Reading> {
        let (text, unit) = self.typed(field);
        field.reading(text, unit)
    }

    /// What stands in `field`, as a quantity.
    fn entry<Q: Quantity>(&self, field: Field) -> Entry<Q> {
        self.reading(field).quantity()
    }

    /// What stands in `field`, as one of its list.
    fn choice<C: Choice>(&self, field: Field) -> Entry<C> {
        C::entry(self.typed(field).0)
    }
}
