//! bank-fault: what the bank can drive into a short circuit of the run, against its breaker and its conductor.

use super::known::Known;
use super::{Ask, BreakerType, Candidate, Kind, assumed, worse};
use crate::ampacity::Insulation;
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::conductor::{Metal, resistance};
use crate::family::CodeFamily;
use crate::fault::{Bounds, Core, Prospective, longest, prospective};
use crate::field::Field;
use crate::quantity::{Amps, Metres, Ohms, Quantity, Seconds, Volts};
use crate::ratings::{OPENING, interrupting};
use crate::show;
use crate::source;

/// Voltage of a full bank, new and warm, behind its resistance, as a share of the nominal.
///
/// *Chosen*: 1.15, sixteen lithium iron cells of 3.45 V on 48 V; lead stands lower.
const FULL: f64 = 1.15;

/// The same of an old, cold and low bank. *Chosen*: 0.95, 11.4 V of 12 V.
const LOW: f64 = 0.95;

/// How many times its resistance an old, cold and low bank has. *Chosen*: 3; cold alone makes two of it.
const AGED: f64 = 3.0;

/// From how many times its rating on a device opens at once.
///
/// A breaker of curve C at 10 times, on direct current at up to 1.4 times that (from memory). *Chosen* for all.
const QUICK: f64 = 14.0;

/// How long it takes then. *Chosen*: 20 ms, long for a magnetic trip or a fuse; the maker's let-through changes it.
const QUICK_TIME: Seconds = Seconds::new(0.02);

/// What the bank can drive into the run.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Fault {
    /// At the breaker, which stands at the bank's end: what it has to interrupt, and the least from a low bank.
    pub at_breaker: Prospective,
    /// At the far end of the run, through its conductor cold and hot.
    pub at_far_end: Prospective,
}

/// Metal and insulation as the adiabatic rule knows them.
fn core(known: &Known) -> Core {
    let withstands_more = matches!(known.laid.insulation, Insulation::Bears90 | Insulation::PvCable);
    match (known.laid.conductor.metal(), withstands_more) {
        (Metal::Copper, false) => Core::CopperPvc,
        (Metal::Copper, true) => Core::CopperXlpe,
        (Metal::Aluminium, false) => Core::AluminiumPvc,
        (Metal::Aluminium, true) => Core::AluminiumXlpe,
    }
}

/// Resistance of the way there and back: at 20 °C, and at what the insulation bears.
fn way(known: &Known, candidate: Candidate, length: Metres) -> Bounds<Ohms> {
    let at = |temperature| {
        let one = resistance(known.laid.conductor, candidate.size, temperature) / f64::from(candidate.parallel);
        one * (length * 2.0)
    };
    let bears = known.laid.insulation.bears(known.family);
    Bounds { least: at(crate::quantity::Celsius::new(20.0)), greatest: at(bears) }
}

fn fault(
    known: &Known,
    candidate: Candidate,
    voltage: Volts,
    bank: Ohms,
    length: Metres,
    steps: &mut Steps,
) -> Option<Fault> {
    let emf = Bounds {
        least: steps.step("Bank old, cold and low", voltage * LOW, || {
            ("0.95 · V", format!("0.95 × {}", show::given(voltage.amount())), Origin::Published(source::CHOSEN.at("")))
        }),
        greatest: steps.step("Bank new, warm and full", voltage * FULL, || {
            ("1.15 · V", format!("1.15 × {}", show::given(voltage.amount())), Origin::Published(source::CHOSEN.at("")))
        }),
    };
    let bank = Bounds { least: bank, greatest: bank * AGED };
    let at_breaker = prospective(emf, bank, Bounds::known(Ohms::new(0.0)), steps).ok()?;
    let at_far_end = prospective(emf, bank, way(known, candidate, length), steps).ok()?;
    Some(Fault { at_breaker, at_far_end })
}

/// Sets the fault against what the breaker interrupts, what opens it, and what the conductor lives through.
///
/// The greatest at the breaker ≤ its interrupting rating; the least at the far end ≥ 1.45 · In, at which it opens at
/// all; and where it opens at once, k² · S² ≥ I² · t at the far end. Between the two, a device that protects against
/// overload protects here too ([`source::IEC_60364_4_43`], 435.1, from memory). A pack's electronics count for nothing.
pub(super) fn bank_fault(
    ask: &Ask,
    known: &Known,
    candidate: Candidate,
    basis: &mut Basis,
    steps: &mut Steps,
) -> Outcome {
    let interrupts = basis.need(Field::InterruptingRating, ask.interrupting);
    let voltage = basis.need(Field::RunVoltage, ask.voltage);
    let length = basis.need(Field::RunLength, ask.length);
    let usual = assumed::bank_resistance(voltage.unwrap_or_default());
    let bank = basis.assume(Field::BankResistance, ask.bank_resistance, usual);
    let (Some(interrupts), Some(voltage), Some(length), Some(bank)) = (interrupts, voltage, length, bank) else {
        return Outcome::Asks;
    };
    let Some(fault) = fault(known, candidate, voltage, bank, length, steps) else {
        basis.ask(Field::BankResistance);
        return Outcome::Asks;
    };
    let breaks = Outcome::Held { value: fault.at_breaker.greatest.amount(), limit: Limit::at_most(interrupts) };
    let opening = steps.step("It opens from", known.rating * OPENING, || {
        let clause = source::IEC_60898.at("8.6, conventional tripping current");
        ("1.45 · In", format!("1.45 × {}", show::given(known.rating.amount())), Origin::Published(clause))
    });
    let opens = Outcome::Held { value: fault.at_far_end.least.amount(), limit: Limit::at_least(opening) };
    let both = worse(breaks, opens);
    if fault.at_far_end.greatest < known.rating * QUICK {
        return both;
    }
    let area = candidate.size.area() * f64::from(candidate.parallel);
    match longest(core(known), area, fault.at_far_end.greatest, steps) {
        Ok(longest) => {
            let lives = Outcome::Held { value: QUICK_TIME.amount(), limit: Limit::at_most(longest) };
            worse(both, lives)
        }
        Err(_) => both,
    }
}

/// What the bank can drive into this run, for the answer. `None` where it does not, or voltage or length is missing.
pub(super) fn of_run(ask: &Ask, known: &Known, candidate: Candidate) -> Option<Fault> {
    if !known.kind.on_bank() {
        return None;
    }
    let voltage = ask.voltage.typed()?;
    let usual = assumed::bank_resistance(voltage);
    let bank = Basis::default().assume(Field::BankResistance, ask.bank_resistance, usual)?;
    fault(known, candidate, voltage, bank, ask.length.typed()?, &mut Steps::silent())
}

/// What has to be interrupted at the breaker of a run on the bank. `None` elsewhere, or where the voltage is missing.
pub(super) fn asked(ask: &Ask, kind: Kind) -> Option<Amps> {
    if !kind.on_bank() {
        return None;
    }
    let voltage = ask.voltage.typed()?;
    let usual = assumed::bank_resistance(voltage);
    let bank = Basis::default().assume(Field::BankResistance, ask.bank_resistance, usual)?;
    let current = voltage * FULL / bank;
    current.get().is_finite().then_some(current)
}

/// The next rating that such devices are sold with. `None` past the end: a fuse ahead of the breaker is then the way.
pub(super) fn next_interrupting(
    current: Amps,
    protects: BreakerType,
    family: CodeFamily,
    rating: Amps,
) -> Option<Amps> {
    let ladder: &[f64] = match (protects, family) {
        (BreakerType::Fuse, _) => &interrupting::FUSES,
        (_, CodeFamily::Iec) if rating.get() <= 125.0 => &interrupting::SMALL_DIRECT,
        _ => &interrupting::MOULDED_CASE,
    };
    ladder.iter().map(|thousands| Amps::new(thousands * 1000.0)).find(|step| *step >= current)
}
