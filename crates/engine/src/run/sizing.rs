//! The answer: conductor, breaker, drop, and why thinner ones do not do.

use super::known::Known;
use super::landing::{Landing, landing};
use super::precharge::{Precharge, advice};
use super::voltage_drop::{Drop, Way, by_length, drop};
use super::{Ampacity, Ask, BreakerType, Candidate, Fault, Kind, Load, Requirement, bank_fault, carry, poles, protect};
use crate::ampacity::{Insulation, tabled};
use crate::check::{Basis, Check, FieldSet, Steps, Verdict, worst_first};
use crate::family::CodeFamily;
use crate::quantity::{Amps, Celsius, Metres, Volts};

/// The breaker or fuse to ask for.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Protection {
    /// Its rating.
    pub rating: Amps,
    /// What it is.
    pub protects: BreakerType,
    /// Its class, in the words of the trade.
    pub class: &'static str,
    /// The voltage that it has to be rated for, at least; none where the run's voltage was not entered.
    pub voltage_asked: Option<Volts>,
    /// The next usual voltage rating.
    pub voltage_rating: Option<Volts>,
    /// The current that it has to interrupt; none where the bank drives no fault into it, or its voltage was not entered.
    pub interrupting_asked: Option<Amps>,
    /// The next interrupting rating that such devices are sold with.
    pub interrupting_rating: Option<Amps>,
    /// Poles in series that break the voltage. Twice as many where neither pole is earthed.
    pub poles: Option<u32>,
    /// Whether one that opens current of one direction only would do.
    pub may_be_polarised: bool,
}

/// A thinner conductor, and what it breaks.
#[derive(Clone, Debug, PartialEq)]
pub struct Thinner {
    /// The conductor.
    pub candidate: Candidate,
    /// What it breaks, worst first.
    pub breaks: Vec<Check<Requirement>>,
}

/// One column of the family's table, for the size in question.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Column {
    /// The temperature that heads it.
    pub bears: Celsius,
    /// What the conductor carries by it, uncorrected.
    pub carries: Amps,
}

/// The answer to a run.
#[derive(Clone, Debug, PartialEq)]
pub struct Sizing {
    /// What the run joins.
    pub kind: Kind,
    /// Its currents by the rule of its kind.
    pub load: Load,
    /// The smallest conductor that holds, or the one entered. None where not even the most side by side hold.
    pub conductor: Option<Candidate>,
    /// Whether the conductor was entered.
    pub entered: bool,
    /// What the conductor carries.
    pub ampacity: Option<Ampacity>,
    /// The columns of its row in the family's table.
    pub columns: Vec<Column>,
    /// The breaker or fuse.
    pub protection: Protection,
    /// What it takes of the voltage; none where length or voltage was not entered.
    pub drop: Option<Drop>,
    /// How it lands at its breaker.
    pub landing: Option<Landing>,
    /// The two next thinner, and why not.
    pub thinner: Vec<Thinner>,
    /// What the bank can drive into it; none where it does not, or voltage or length was not entered.
    pub fault: Option<Fault>,
    /// How to charge an inverter's capacitors; inverter feeds only.
    pub precharge: Option<Precharge>,
}

/// The smallest conductor and breaker that hold, with what belongs to them.
///
/// Where a size was entered, the same for that size.
///
/// # Errors
///
/// The inputs that are missing; none are named where the load is beyond every standard rating.
pub fn size(ask: &Ask) -> Result<Sizing, FieldSet> {
    let mut basis = Basis::default();
    let entered = ask.entered(&mut basis);
    let known = Known::read(ask, &mut basis, &mut Steps::silent()).map_err(|_| basis.missing())?;
    let Some(entered) = entered else { return Err(basis.missing()) };
    let way = Way::read(ask, known.kind, &mut Basis::default());
    let conductor = entered.or_else(|| known.smallest(way));
    let ampacity = conductor.and_then(|one| carry::ampacity(one, &known.laid, known.terminals, &mut Steps::silent()));
    let thinner = conductor.map_or_else(Vec::new, |one| two_thinner(ask, &known, one));
    Ok(Sizing {
        kind: known.kind,
        load: known.load,
        conductor,
        entered: entered.is_some(),
        ampacity,
        columns: conductor.map_or_else(Vec::new, |one| columns(&known, one)),
        protection: protection(ask, &known),
        drop: conductor
            .zip(way)
            .map(|(one, way)| drop(known.load.working, one, &known.laid, known.kind, way, &mut Steps::silent())),
        landing: conductor.map(|one| landing(one, known.laid.conductor.make(), known.rating, known.family)),
        thinner,
        fault: conductor.and_then(|one| bank_fault::of_run(ask, &known, one)),
        precharge: conductor.and_then(|one| how_to_precharge(ask, &known, one)),
    })
}

fn two_thinner(ask: &Ask, known: &Known, conductor: Candidate) -> Vec<Thinner> {
    let first = known.thinner(conductor);
    let second = first.and_then(|one| known.thinner(one));
    [first, second]
        .into_iter()
        .flatten()
        .map(|candidate| {
            let mut breaks: Vec<_> = [Requirement::Ampacity, Requirement::Protection, Requirement::Drop]
                .iter()
                .filter_map(|requirement| requirement.check_on(ask, candidate))
                .filter(|check| check.verdict == Verdict::Breaks)
                .collect();
            worst_first(&mut breaks);
            Thinner { candidate, breaks }
        })
        .collect()
}

fn columns(known: &Known, conductor: Candidate) -> Vec<Column> {
    let heads: &[Insulation] = match known.family {
        CodeFamily::NorthAmerica => &[Insulation::Bears60, Insulation::Bears75, Insulation::Bears90],
        CodeFamily::Iec => &[Insulation::Pvc70, Insulation::Bears90],
    };
    heads
        .iter()
        .filter_map(|head| {
            let carries = tabled(&known.laid, *head, conductor.size)? * f64::from(conductor.parallel);
            Some(Column { bears: head.bears(known.family), carries })
        })
        .collect()
}

fn protection(ask: &Ask, known: &Known) -> Protection {
    let voltage = ask.voltage.typed();
    let kind = known.kind;
    let interrupting_asked = bank_fault::asked(ask, kind);
    Protection {
        rating: known.rating,
        protects: known.protects,
        class: protect::class(known.protects, kind.is_pv(), kind.alternates(), known.family),
        voltage_asked: voltage.map(|voltage| poles::voltage_asked(kind, voltage)),
        voltage_rating: voltage.and_then(|voltage| poles::voltage_rating(kind, voltage)),
        interrupting_asked,
        interrupting_rating: interrupting_asked
            .and_then(|current| bank_fault::next_interrupting(current, known.protects, known.family, known.rating)),
        poles: voltage.map(|voltage| poles::poles(kind, voltage)),
        may_be_polarised: kind.directions() < 2,
    }
}

fn how_to_precharge(ask: &Ask, known: &Known, conductor: Candidate) -> Option<Precharge> {
    if known.kind != Kind::InverterFeed {
        return None;
    }
    let voltage = ask.voltage.typed()?;
    let power = ask.power.typed().unwrap_or(voltage * known.load.working);
    let length = ask.length.typed().unwrap_or(Metres::new(0.0));
    let cold = by_length(Amps::new(0.0), conductor, &known.laid, known.kind, &mut Steps::silent()).0;
    advice(ask, power, cold * (length * 2.0))
}
