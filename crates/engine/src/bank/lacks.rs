//! What has to be entered before counts can be chosen, or before those entered can be judged.

use super::ask::positive;
use super::window::cells;
use super::{Ask, Requirement};
use crate::check::{Basis, FieldSet, Steps};
use crate::entry::Entry;
use crate::field::Field;

/// The requirements that a layout's window is judged by.
const WINDOW: [Requirement; 5] = [
    Requirement::WindowHigh,
    Requirement::WindowHighAbsorb,
    Requirement::WindowHighLoads,
    Requirement::ChargeCap,
    Requirement::WindowLow,
];

/// The inputs without which no window can be judged: of the counts entered, or of any count of the cells at hand.
///
/// Where neither the bus nor the inverter is known the bus is asked for, as one figure tells both ends.
#[must_use]
pub fn lacks(ask: &Ask) -> FieldSet {
    let mut lacks = FieldSet::default();
    let mut judged = *ask;
    if ask.series == Entry::Blank {
        if positive(ask.count).typed().is_none() {
            lacks.insert(Field::NumberOfCells);
        }
        if positive(ask.strings) == Entry::Unread {
            lacks.insert(Field::StringsOfCells);
        }
        judged = ask.with_counts(1, 1);
    }
    let bus = positive(ask.bus_voltage).typed().is_some();
    for check in WINDOW.iter().filter_map(|requirement| requirement.check(&judged)) {
        for field in check.asks.iter() {
            let blank = match field {
                Field::InverterLow => ask.inverter_low == Entry::Blank && ask.inverter_high == Entry::Blank,
                Field::InverterHigh => ask.inverter_high == Entry::Blank,
                _ => false,
            };
            lacks.insert(if blank && !bus { Field::BusVoltage } else { field });
        }
    }
    lacks
}

/// The inputs without which the bank has no count of cells in series.
#[must_use]
pub fn counts_lack(ask: &Ask) -> FieldSet {
    if ask.series == Entry::Blank {
        return lacks(ask);
    }
    let mut basis = Basis::default();
    cells(ask, &mut basis, &mut Steps::silent());
    basis.missing()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::chemistry::Chemistry;

    fn lacking(ask: &Ask) -> Vec<Field> {
        lacks(ask).iter().collect()
    }

    #[test]
    fn one_tap_and_three_numbers_are_enough() {
        let first = [Field::Chemistry, Field::CellVoltage, Field::NumberOfCells, Field::BusVoltage];
        assert_eq!(lacking(&Ask::default()), first);
        let ask = Ask {
            chemistry: Entry::Typed(Chemistry::Lfp),
            cell_voltage: Entry::of(3.2),
            count: Entry::of(16.0),
            bus_voltage: Entry::of(48.0),
            ..Ask::default()
        };
        assert_eq!(lacking(&ask), []);
        // A block that is no count of cells has to be told.
        assert_eq!(lacking(&Ask { cell_voltage: Entry::of(5.0), ..ask }), [Field::CellsInABlock]);
        // The inverter's own window does in place of the bus.
        let window =
            Ask { bus_voltage: Entry::Blank, inverter_low: Entry::of(42.0), inverter_high: Entry::of(60.0), ..ask };
        assert_eq!(lacking(&window), []);
    }

    #[test]
    fn what_was_not_understood_is_asked_for_again_and_nothing_is_ranked() {
        let ask = Ask {
            chemistry: Entry::Typed(Chemistry::Lfp),
            cell_voltage: Entry::of(3.2),
            count: Entry::of(16.0),
            bus_voltage: Entry::of(48.0),
            ..Ask::default()
        };
        let high = Ask { inverter_high: Entry::Unread, ..ask };
        assert_eq!(lacking(&high), [Field::InverterHigh]);
        assert_eq!(super::super::layouts(&high), super::super::Layouts::default());
        assert_eq!(lacking(&Ask { bus_voltage: Entry::Unread, ..ask }), [Field::BusVoltage]);
        assert_eq!(lacking(&Ask { series: Entry::Unread, ..ask }), [Field::CellsInSeries]);
        assert_eq!(lacking(&Ask { strings: Entry::Unread, ..ask }), [Field::StringsOfCells]);
    }
}
