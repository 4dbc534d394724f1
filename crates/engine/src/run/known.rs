//! What is known of a run before a conductor is tried on it.

use super::voltage_drop::Way;
use super::{Ask, BreakerType, Candidate, Kind, Load, carry, load, protect, voltage_drop};
use crate::ampacity::{Laid, Terminals};
use crate::check::{Basis, Outcome, Steps};
use crate::conductor::{AMERICAN, METRIC, Size};
use crate::family::CodeFamily;
use crate::field::Field;
use crate::quantity::{Amps, Quantity};
use crate::ratings::Series;

/// Everything that ampacity and protection are judged by, but the conductor.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Known {
    pub kind: Kind,
    pub family: CodeFamily,
    pub load: Load,
    pub laid: Laid,
    pub protects: BreakerType,
    pub series: Series,
    /// Rating of the device: the one entered, else the smallest that lets the load run.
    pub rating: Amps,
    pub terminals: Terminals,
}

/// The most conductors side by side that are offered.
const MOST_PARALLEL: u32 = 6;

impl Known {
    /// Reads the run. `Err` where an input is missing, which the basis then names, or where no rating is great enough.
    pub(super) fn read(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Result<Self, Outcome> {
        let kind = ask.kind(basis);
        let family = ask.family(basis);
        let (Some(kind), Some(family)) = (kind, family) else {
            // Name the current too, so that a blank page asks for all it needs at once.
            if ask.current.typed().is_none() && ask.power.typed().is_none() {
                basis.ask(Field::RunCurrent);
            }
            return Err(Outcome::Asks);
        };
        let load = load::load(ask, kind, family, basis, steps);
        let laid = ask.laid(basis, kind, family);
        let protects = ask.breaker_type(basis, kind);
        let (Some(load), Some(laid), Some(protects)) = (load, laid, protects) else { return Err(Outcome::Asks) };
        let series = Ask::series(kind, family, protects);
        let rating = match ask.breaker {
            crate::entry::Entry::Blank => protect::smallest(&load, &laid, series).ok_or(Outcome::Impossible {
                value: load.device_least.amount(),
                limit: crate::check::Limit::at_most(series.ratings().last().unwrap_or_default()),
            })?,
            entry => basis.need(Field::Breaker, entry).ok_or(Outcome::Asks)?,
        };
        let terminals = ask.terminals(basis, family, rating).ok_or(Outcome::Asks)?;
        Ok(Self { kind, family, load, laid, protects, series, rating, terminals })
    }

    pub(super) fn carries(&self, candidate: Candidate, steps: &mut Steps) -> Outcome {
        let ampacity = carry::ampacity(candidate, &self.laid, self.terminals, steps);
        carry::carry(&self.load, self.family, ampacity, steps)
    }

    pub(super) fn protected(&self, candidate: Candidate, steps: &mut Steps) -> Outcome {
        let ampacity = carry::ampacity(candidate, &self.laid, self.terminals, steps);
        protect::protect(self.rating, &self.load, candidate, &self.laid, ampacity, self.series, steps)
    }

    pub(super) fn drops(&self, candidate: Candidate, way: Way, steps: &mut Steps) -> Outcome {
        let drop = voltage_drop::drop(self.load.working, candidate, &self.laid, self.kind, way, steps);
        voltage_drop::judge(&drop, way)
    }

    /// Whether `candidate` meets ampacity and protection, and drop where it is known what that asks.
    pub(super) fn holds(&self, candidate: Candidate, way: Option<Way>) -> bool {
        let ampacity = carry::ampacity(candidate, &self.laid, self.terminals, &mut Steps::silent());
        let protects = || {
            let (load, laid, series) = (&self.load, &self.laid, self.series);
            protect::protect(self.rating, load, candidate, laid, ampacity, series, &mut Steps::silent())
        };
        super::holds(carry::carry(&self.load, self.family, ampacity, &mut Steps::silent()))
            && super::holds(protects())
            && way.is_none_or(|way| super::holds(self.drops(candidate, way, &mut Steps::silent())))
    }

    /// The sizes that are sold in the family's trade, thin to thick.
    pub(super) const fn ladder(&self) -> &'static [Size] {
        match self.family {
            CodeFamily::NorthAmerica => &AMERICAN,
            CodeFamily::Iec => &METRIC,
        }
    }

    /// The thinnest that may lie side by side with others of its kind.
    ///
    /// Source: [`crate::source::NEC`], 310.10(G): 1/0 and thicker. IEC, *chosen*: 50 mm², the nearest.
    pub(super) const fn thinnest_in_parallel(&self) -> Size {
        match self.family {
            CodeFamily::NorthAmerica => Size::Gauge(0),
            CodeFamily::Iec => Size::Metric(5000),
        }
    }

    /// The smallest that holds: alone, else the fewest side by side.
    ///
    /// Each set of those side by side lies in a conduit of its own, so that they do not heat one another.
    pub(super) fn smallest(&self, way: Option<Way>) -> Option<Candidate> {
        let ladder = self.ladder();
        let first = ladder.iter().position(|size| *size == self.thinnest_in_parallel()).unwrap_or(0);
        (1..=MOST_PARALLEL).find_map(|parallel| {
            let sizes = if parallel == 1 { ladder } else { &ladder[first..] };
            sizes.iter().map(|size| Candidate { size: *size, parallel }).find(|one| self.holds(*one, way))
        })
    }

    /// The next thinner than `candidate`, of as many side by side.
    pub(super) fn thinner(&self, candidate: Candidate) -> Option<Candidate> {
        let ladder = self.ladder();
        let at = ladder.iter().position(|size| *size == candidate.size)?;
        Some(Candidate { size: *ladder.get(at.checked_sub(1)?)?, ..candidate })
    }
}
