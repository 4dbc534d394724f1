//! What was read after a link, against what must be read.

use super::{CellVolts, Meter};
use crate::quantity::Volts;

/// What a reading says.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Says {
    /// As it must be.
    AsItMust,
    /// The meter's leads stand the other way round.
    LeadsSwapped,
    /// Two cells' volts are missing: a cell stands turned round.
    TurnedRound,
    /// One cell's volts are missing: the link sits on the wrong post, or a cell is left out.
    OneMissing,
    /// One cell's volts too many.
    OneTooMany,
    /// Nothing: no contact, or an open cell.
    NoContact,
    /// Outside, and like none of these.
    Odd,
}

impl Says {
    /// In words.
    #[must_use]
    pub const fn words(self) -> &'static str {
        match self {
            Self::AsItMust => "As it must be. Go on.",
            Self::LeadsSwapped => {
                "Below zero: the meter’s leads are swapped, or the whole part stands the other way round."
            }
            Self::TurnedRound => {
                "Two cells’ volts are missing: a cell of this part is turned round. Stop, and turn it."
            }
            Self::OneMissing => {
                "One cell’s volts are missing: a link sits on the wrong post, or passes a cell by. Stop."
            }
            Self::OneTooMany => "One cell’s volts too many: the link sits one cell further. Stop.",
            Self::NoContact => "Nothing: no contact under a lug, a cell that is open, or the leads on the wrong posts.",
            Self::Odd => "Outside the band: read each cell of this part by itself before you go on.",
        }
    }
}

/// What `read` says where `meter` must be read, of cells that read `cell`.
///
/// Each fault's own reading is the expected one less two cells, less one, one more, none, or with its sign changed; the
/// nearest within half a cell is named.
#[must_use]
pub fn says(meter: &Meter, cell: CellVolts, read: Volts) -> Says {
    if (meter.lowest..=meter.highest).contains(&read) {
        return Says::AsItMust;
    }
    let (one, expected) = (cell.expected(), meter.expected);
    let near = |volts: Volts| (read - volts).abs() < one / 2.0;
    if near(Volts::new(0.0)) {
        return Says::NoContact;
    }
    if near(expected - one * 2.0) {
        return Says::TurnedRound;
    }
    if near(expected - one) {
        return Says::OneMissing;
    }
    if near(expected + one) {
        return Says::OneTooMany;
    }
    if (-meter.highest..=-meter.lowest).contains(&read) {
        return Says::LeadsSwapped;
    }
    Says::Odd
}

#[cfg(test)]
mod tests {
    use super::super::{Lug, Pole};
    use super::*;

    #[test]
    fn each_fault_is_told_by_its_volts() {
        let lug = |pole| Lug { cell: 1, pole };
        let cell = CellVolts::new(Volts::new(3.2), Volts::new(3.3), Volts::new(3.4)).unwrap();
        let meter = Meter {
            black: lug(Pole::Minus),
            red: lug(Pole::Plus),
            lowest: cell.lowest() * 5.0,
            expected: cell.expected() * 5.0,
            highest: cell.highest() * 5.0,
        };
        let told = |volts: f64| says(&meter, cell, Volts::new(volts));
        // Five cells of 3.3 V are 16.5 V; one turned round takes two cells away: 9.9 V.
        assert_eq!(told(16.5), Says::AsItMust);
        assert_eq!(told(9.9), Says::TurnedRound);
        assert_eq!(told(13.2), Says::OneMissing);
        assert_eq!(told(19.8), Says::OneTooMany);
        assert_eq!(told(0.0), Says::NoContact);
        assert_eq!(told(-16.5), Says::LeadsSwapped);
        assert_eq!(told(6.0), Says::Odd);
    }
}
