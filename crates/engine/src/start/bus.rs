//! The bus as a start sees it: a force behind a resistance.

use super::ask::{Age, positive};
use super::{AGED, Ask, CHARGE};
use crate::bank;
use crate::check::{Basis, Origin, Steps};
use crate::chemistry::rested;
use crate::entry::Entry;
use crate::field::Field;
use crate::network::Behind;
use crate::quantity::{Celsius, Count, Percent, Quantity};
use crate::show;

/// The bus at the inverter: the bank's force behind its own resistance, links, cables and lugs.
///
/// Where the bank's volts were entered, they hold. Else E and R follow from its cells: the rested voltage at the charge
/// asked for, and the highest resistance of its chemistry, old, cold and low.
pub fn seen(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<Behind> {
    let cable = basis.assume(Field::CableResistance, ask.cable, ask.usual_cable());
    let by_cells = ask.bank_voltage == Entry::Blank && ask.bank.chemistry != Entry::Blank;
    let bank = if by_cells { by_its_cells(ask, None, basis) } else { as_entered(ask, basis) };
    let (cable, bank) = (cable?, bank?);
    let all = steps.step("All resistance in the way", bank.resistance + cable, || {
        let (bank, cable) = (show::step(bank.resistance.amount()), show::step(cable.amount()));
        ("R bank + R cable", format!("{bank} + {cable}"), Origin::Before)
    });
    Some(Behind { emf: bank.emf, resistance: all })
}

fn as_entered(ask: &Ask, basis: &mut Basis) -> Option<Behind> {
    let emf = basis.need(Field::BankEmf, positive(ask.bank_voltage));
    let usual = crate::run::assumed::bank_resistance(emf.unwrap_or_default()) * AGED;
    let resistance = basis.assume(Field::BankResistance, ask.bank_resistance, usual);
    Some(Behind { emf: emf?, resistance: resistance? })
}

/// The bank by its cells at `charge`, or at the charge asked for.
fn by_its_cells(ask: &Ask, charge: Option<Percent>, basis: &mut Basis) -> Option<Behind> {
    let settled = bank::settled(&ask.bank);
    let made_of = basis.need(Field::Chemistry, settled.chemistry);
    let capacity = basis.need(Field::CellCapacity, positive(settled.cell_capacity));
    let window = bank::window(&settled);
    if window.is_none() {
        basis.ask(Field::CellsInSeries);
    }
    let charge = match charge {
        Some(charge) => Some(charge),
        None => basis.assume(Field::Charge, ask.charge, CHARGE),
    };
    let (made_of, capacity, window, charge) = (made_of?, capacity?, window?, charge?);
    let figures = made_of.figures();
    let cells = window.nominal / figures.nominal;
    let strings = settled.strings.typed().map_or(1.0, Count::get);
    let resistance = match ask.bank_resistance {
        Entry::Blank => {
            let cold = cold(ask.bank_temperature.typed());
            let span = figures.resistance(capacity);
            let one = match basis.assume(Field::BankAge, ask.age, Age::Old)? {
                Age::New => span.least,
                Age::Used => (span.least + span.greatest) / 2.0,
                Age::Old => span.greatest,
            };
            one * (cells / strings * cold)
        }
        entry => basis.need(Field::BankResistance, entry)?,
    };
    Some(Behind { emf: rested(made_of, charge) * cells, resistance })
}

/// How much more a cell resists in the cold than at the 25 °C of its figure.
///
/// *Chosen*: 1 % for each kelvin below. The figure that it multiplies is already that of an old cell. Warmer cells count as
/// at 25 °C.
fn cold(temperature: Option<Celsius>) -> f64 {
    temperature.map_or(1.0, |temperature| 1.0 + 0.01 * (25.0 - temperature.get()).max(0.0))
}

/// The lowest charge at which the bus still holds the cut-off under `watts` on its direct-current side. `None` where the
/// bank is not known by its cells, or it holds at no charge.
#[must_use]
pub fn lowest_charge(ask: &Ask, watts: crate::quantity::Watts) -> Option<Percent> {
    let cut_off = ask.cut_off.typed()?;
    let cable = ask.cable.typed().unwrap_or(ask.usual_cable());
    let ask = &ask.sound();
    let asked = Ask { bank_voltage: Entry::Blank, ..*ask };
    let holds = |charge: f64| {
        let bank = by_its_cells(&asked, Some(Percent::new(charge)), &mut Basis::default())?;
        let found = bank.and(cable).under(watts, &mut Steps::silent()).ok();
        Some(found.is_some_and(|found| found.volts >= cut_off))
    };
    if !holds(100.0)? {
        return None;
    }
    // Rested volts never fall with charge: the first whole per cent that holds is the lowest.
    (0..=100).map(f64::from).find(|charge| holds(*charge) == Some(true)).map(Percent::new)
}

/// For words beside the answer.
#[must_use]
pub fn told(seen: Behind) -> String {
    format!("{} behind {}", show::computed(seen.emf.amount()), show::computed(seen.resistance.amount()))
}
