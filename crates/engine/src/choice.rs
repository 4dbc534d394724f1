//! Choices: one of a short list, kept by its key.

use crate::entry::Entry;
use crate::family::{CodeFamily, Stands};
use crate::field::{Field, Takes};

/// Something that is one of a short list.
pub trait Choice: Copy + Sized {
    /// The one that is kept under `key` in the list of its field.
    fn of_key(key: &str) -> Option<Self>;

    /// What stands in `key`: blank, one of the list, or something else.
    fn entry(key: &str) -> Entry<Self> {
        if key.is_empty() {
            return Entry::Blank;
        }
        Self::of_key(key).map_or(Entry::Unread, Entry::Typed)
    }
}

/// The words on screen for what is kept under `key` in `field`.
#[must_use]
pub fn words(field: Field, key: &str) -> Option<&'static str> {
    match field.takes() {
        Takes::Choice(list) => list.iter().find(|(one, _)| *one == key).map(|(_, words)| *words),
        Takes::Number { .. } | Takes::Whole { .. } | Takes::List { .. } => None,
    }
}

/// How modules are fixed, which decides how hot they run.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Mounting {
    /// On a rack with air on all sides.
    #[default]
    OpenRack,
    /// On a roof, with a gap behind.
    StandOff,
    /// On a roof, with no gap.
    Flush,
}

/// How a controller takes power from the array.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum ControllerKind {
    /// Tracks the point of greatest power and converts down to the bank.
    #[default]
    Mppt,
    /// Switches the array straight onto the bank, for a part of the time.
    Pwm,
}

/// Whether a controller's PV current limit is already lessened by the sunlight factor.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum LimitHoldsFactor {
    /// The limit is the full rating: Isc times the sunlight factor must keep to it.
    #[default]
    No,
    /// The limit is for Isc as printed: the factor is already in it.
    Yes,
}

macro_rules! keys {
    ($kind:ty: $($key:literal => $one:expr),*) => {
        impl Choice for $kind {
            fn of_key(key: &str) -> Option<Self> {
                match key { $($key => Some($one),)* _ => None }
            }
        }
    };
}

keys!(Mounting: "open" => Self::OpenRack, "stand-off" => Self::StandOff, "flush" => Self::Flush);
keys!(ControllerKind: "mppt" => Self::Mppt, "pwm" => Self::Pwm);
keys!(LimitHoldsFactor: "no" => Self::No, "yes" => Self::Yes);
keys!(CodeFamily: "iec" => Self::Iec, "north-america" => Self::NorthAmerica);
keys!(Stands: "dwelling" => Self::Dwelling, "building" => Self::Building, "ground" => Self::Ground);

#[cfg(test)]
mod tests {
    use super::*;
    use crate::bank::YesNo;
    use crate::chemistry::Chemistry;
    use crate::sharing::Arrangement;

    fn all_known<C: Choice>(field: Field) {
        let Takes::Choice(list) = field.takes() else { panic!("{field:?} is no choice") };
        for (key, _) in list {
            assert!(C::of_key(key).is_some(), "{field:?} {key}");
        }
    }

    #[test]
    fn every_key_on_screen_is_known() {
        all_known::<Mounting>(Field::Mounting);
        all_known::<ControllerKind>(Field::ControllerKind);
        all_known::<LimitHoldsFactor>(Field::LimitHoldsFactor);
        all_known::<CodeFamily>(Field::CodeFamily);
        all_known::<Stands>(Field::StandsOn);
        all_known::<Chemistry>(Field::Chemistry);
        all_known::<Arrangement>(Field::TakeOff);
        for field in [Field::OwnProtection, Field::PostsCovered, Field::WetRoom, Field::SleepingRoom] {
            all_known::<YesNo>(field);
        }
    }
}
