//! What a soft starter, a second pack or thicker cable would change: computed, not said.

use super::requirement::Requirement;
use super::{Ask, assess};
use crate::check::{Check, Verdict};
use crate::entry::Entry;
use crate::quantity::{Count, Ohms};

/// A change that was tried.
#[derive(Clone, Debug, PartialEq)]
pub struct Help {
    /// What was changed.
    pub what: &'static str,
    /// The checks that broke before, as they are then.
    pub then: Vec<Check<Requirement>>,
    /// Whether nothing breaks any more.
    pub enough: bool,
}

/// Starting multiple behind a soft starter. *Chosen*: 3, what they are usually set to.
const SOFT: f64 = 3.0;

/// Each change by itself, where something breaks. Empty where nothing does.
#[must_use]
pub fn what_helps(ask: &Ask) -> Vec<Help> {
    let broken: Vec<Requirement> =
        assess(ask).iter().filter(|check| check.verdict == Verdict::Breaks).map(|check| check.id).collect();
    if broken.is_empty() {
        return Vec::new();
    }
    let mut tried = Vec::new();
    if ask.usual_multiple().is_some_and(|usual| ask.multiple.typed().unwrap_or(usual).get() > SOFT)
        || ask.letter != Entry::Blank
        || ask.locked_rotor != Entry::Blank
    {
        let soft =
            Ask { multiple: Entry::Typed(Count::new(SOFT)), letter: Entry::Blank, locked_rotor: Entry::Blank, ..*ask };
        tried.push(("A soft starter that holds the start to 3 times its running current", soft));
    }
    let packs = ask.packs.typed().or(ask.bank.strings.typed()).map_or(1.0, Count::get);
    let mut more = Ask { packs: Entry::of(packs + 1.0), ..*ask };
    more.bank.strings = Entry::of(packs + 1.0);
    if let Entry::Typed(ohms) = ask.bank_resistance {
        more.bank_resistance = Entry::Typed(ohms * (packs / (packs + 1.0)));
    } else if let Some(volts) = ask.bank_voltage.typed() {
        let alone = crate::run::assumed::bank_resistance(volts) * super::AGED;
        more.bank_resistance = Entry::Typed(alone * (packs / (packs + 1.0)));
    }
    tried.push(("One more pack or string beside the others", more));
    let cable: Ohms = ask.cable.typed().unwrap_or(ask.usual_cable());
    tried.push(("Cable to the inverter of half the resistance", Ask { cable: Entry::Typed(cable / 2.0), ..*ask }));
    tried.push(("Nothing else running", Ask { already: Entry::of(0.0), ..*ask }));
    tried
        .into_iter()
        .map(|(what, ask)| {
            let now = assess(&ask);
            let enough = now.iter().all(|check| check.verdict != Verdict::Breaks);
            Help { what, then: now.into_iter().filter(|check| broken.contains(&check.id)).collect(), enough }
        })
        .collect()
}
