//! The requirements of a run, each by its id, judged and worked.

use super::known::Known;
use super::voltage_drop::{Way, by_length};
use super::{Ask, Candidate, bank_fault, poles, precharge, voltage_drop};
use crate::check::{Basis, Check, Cost, FieldSet, Outcome, Step, Steps, judge, worst_first};
use crate::field::Field;
use crate::quantity::{Metres, Ohms, Percent};
use crate::show;

/// A requirement of a run.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Requirement {
    /// The conductor carries the run's current.
    Ampacity,
    /// The breaker or fuse lets the load run and protects the conductor.
    Protection,
    /// The voltage lost.
    Drop,
    /// Whether the breaker opens what can flow through it, in each direction.
    Poles,
    /// What the bank can drive into a short circuit, against breaker and conductor.
    BankFault,
    /// The rush of current into an inverter's empty capacitors.
    Precharge,
}

/// The conductor that a run is judged with: the one entered, else the smallest that holds, else the thickest there is.
/// Where neither can be told, the inputs that are missing.
pub(super) fn conductor(ask: &Ask) -> Result<Candidate, FieldSet> {
    let mut basis = Basis::default();
    match ask.entered(&mut basis) {
        None => return Err(basis.missing()),
        Some(Some(entered)) => return Ok(entered),
        Some(None) => {}
    }
    let known = Known::read(ask, &mut basis, &mut Steps::silent()).map_err(|_| basis.missing())?;
    let way = Way::read(ask, known.kind, &mut Basis::default());
    let ladder = known.ladder();
    // No ladder is empty.
    let thickest = Candidate { size: ladder[ladder.len() - 1], parallel: 1 };
    Ok(known.smallest(way).unwrap_or(thickest))
}

impl Requirement {
    /// Every requirement, in the order of the page where nothing is worse than another.
    pub const ALL: [Self; 6] =
        [Self::Ampacity, Self::Protection, Self::BankFault, Self::Drop, Self::Poles, Self::Precharge];

    /// The id, as in the documents of the engine.
    #[must_use]
    pub const fn id(self) -> &'static str {
        match self {
            Self::Ampacity => "run-ampacity",
            Self::Protection => "run-protection",
            Self::Drop => "run-drop",
            Self::Poles => "breaker-poles",
            Self::BankFault => "bank-fault",
            Self::Precharge => "precharge",
        }
    }

    /// The name on screen.
    #[must_use]
    pub const fn name(self) -> &'static str {
        match self {
            Self::Ampacity => "Conductor carries the current",
            Self::Protection => "Breaker fits load and conductor",
            Self::Drop => "Voltage lost in the run",
            Self::Poles => "Breaker opens both directions",
            Self::BankFault => "Breaker opens a short circuit",
            Self::Precharge => "Closing onto empty capacitors",
        }
    }

    /// What it costs where it breaks.
    #[must_use]
    pub const fn cost(self) -> Cost {
        match self {
            Self::Drop => Cost::Loss,
            Self::Ampacity | Self::Protection | Self::Poles | Self::BankFault | Self::Precharge => Cost::Hazard,
        }
    }

    /// The margin that a careful hand keeps on it: none, ratings of current may be used whole, and the allowed drop is
    /// itself chosen with care.
    const fn reserve() -> Percent {
        Percent::new(0.0)
    }

    fn outcome(
        self,
        ask: &Ask,
        conductor: Result<Candidate, FieldSet>,
        basis: &mut Basis,
        steps: &mut Steps,
    ) -> Outcome {
        match self {
            Self::Ampacity | Self::Protection => {
                let known = Known::read(ask, basis, steps);
                let candidate = candidate(conductor, basis);
                match (known, candidate, self) {
                    (Err(outcome @ Outcome::Impossible { .. }), _, Self::Protection) => outcome,
                    (Err(_), ..) | (_, None, _) => Outcome::Asks,
                    (Ok(known), Some(candidate), Self::Ampacity) => known.carries(candidate, steps),
                    (Ok(known), Some(candidate), _) => known.protected(candidate, steps),
                }
            }
            Self::Drop => {
                let kind = ask.kind(basis);
                let family = ask.family(basis);
                let candidate = candidate(conductor, basis);
                let Some(kind) = kind else {
                    basis.ask(Field::RunLength);
                    return Outcome::Asks;
                };
                let working = super::load::working(ask, kind, basis, steps);
                let way = Way::read(ask, kind, basis);
                let laid = family.and_then(|family| ask.laid(basis, kind, family));
                let (Some(working), Some(way), Some(laid), Some(candidate)) = (working, way, laid, candidate) else {
                    return Outcome::Asks;
                };
                voltage_drop::judge(&voltage_drop::drop(working, candidate, &laid, kind, way, steps), way)
            }
            Self::Poles => {
                let Some(kind) = ask.kind(basis) else { return Outcome::DoesNotArise };
                let Some(protects) = ask.breaker_type(basis, kind) else { return Outcome::Asks };
                poles::directions(kind, protects, steps)
            }
            Self::BankFault => {
                if !ask.kind.typed().is_some_and(super::Kind::on_bank) {
                    return Outcome::DoesNotArise;
                }
                let known = Known::read(ask, basis, &mut Steps::silent());
                let (Ok(known), Some(candidate)) = (known, candidate(conductor, basis)) else { return Outcome::Asks };
                bank_fault::bank_fault(ask, &known, candidate, basis, steps)
            }
            Self::Precharge => {
                let Some(kind) = ask.kind.typed() else { return Outcome::DoesNotArise };
                if kind != super::Kind::InverterFeed {
                    return Outcome::DoesNotArise;
                }
                let known = Known::read(ask, basis, &mut Steps::silent());
                let (Ok(known), Some(candidate)) = (known, candidate(conductor, basis)) else { return Outcome::Asks };
                // A way of unknown length is taken as none: the peak is then the greatest.
                let length = ask.length.typed().unwrap_or(Metres::new(0.0));
                let cold =
                    by_length(crate::quantity::Amps::new(0.0), candidate, &known.laid, kind, &mut Steps::silent()).0;
                let way: Ohms = cold * (length * 2.0);
                precharge::precharge(ask, kind, known.rating, way, basis, steps)
            }
        }
    }

    /// Judges this requirement. `None` where it does not arise.
    #[must_use]
    pub fn check(self, ask: &Ask) -> Option<Check<Self>> {
        self.check_with(ask, conductor(ask))
    }

    fn check_with(self, ask: &Ask, conductor: Result<Candidate, FieldSet>) -> Option<Check<Self>> {
        let mut basis = Basis::default();
        let outcome = self.outcome(ask, conductor, &mut basis, &mut Steps::silent());
        judge(self, self.cost(), Self::reserve(), outcome, &basis)
    }

    /// Judges this requirement with one conductor on the run.
    #[must_use]
    pub fn check_on(self, ask: &Ask, candidate: Candidate) -> Option<Check<Self>> {
        self.check_with(ask, Ok(candidate))
    }
}

fn candidate(conductor: Result<Candidate, FieldSet>, basis: &mut Basis) -> Option<Candidate> {
    match conductor {
        Ok(candidate) => Some(candidate),
        Err(missing) => {
            missing.iter().for_each(|field| basis.ask(field));
            None
        }
    }
}

/// Every requirement that arises, worst first. Where no size was entered, the smallest conductor that holds is judged.
#[must_use]
pub fn assess(ask: &Ask) -> Vec<Check<Requirement>> {
    let conductor = conductor(ask);
    let mut checks: Vec<_> =
        Requirement::ALL.iter().filter_map(|requirement| requirement.check_with(ask, conductor)).collect();
    worst_first(&mut checks);
    checks
}

/// The steps of one requirement, made by the same code as its value. The last is the margin to its limit.
#[must_use]
pub fn working(ask: &Ask, requirement: Requirement) -> Vec<Step> {
    let mut basis = Basis::default();
    let mut steps = Steps::written();
    let outcome = requirement.outcome(ask, conductor(ask), &mut basis, &mut steps);
    let Some(check) = judge(requirement, requirement.cost(), Requirement::reserve(), outcome, &basis) else {
        return steps.into_steps();
    };
    steps.margin(&check, show::step);
    steps.into_steps()
}
