//! Draws of constant power on a network as they see it: u = u₀ − Z · (P/u), element by element.
//!
//! u: volts across each draw; u₀: the same with none of them drawing; Z: by how many volts one ampere of one draw drags
//! down each. Where no entry of Z and no P is negative, F(u) = u − u₀ + Z · (P/u) is convex and Newton's iteration from
//! u₀ falls steadily, never below the highest solution. A step that rises, or passes zero, therefore proves that
//! there is no solution. Elsewhere the draws are turned up together from nothing, so that the answer is the
//! operating point that is reached from rest.

use nalgebra::{DMatrix, DVector};

use super::build::Element;
use super::error::NetworkError;
use crate::quantity::Volts;

/// Rounds of Newton's iteration. Far from collapse it takes 4 to 6; at its very edge the distance only halves each
/// round, and 30 reach the rounding.
const MOST_ROUNDS: u32 = 100;

/// What counts as settled, as a part of the volts at hand. *Chosen*: a few times the rounding of a double.
const SETTLED: f64 = 1e-14;

/// Below this part of the highest volts anywhere in the network at rest, a draw counts as having none: it may be rounding.
const UNFED: f64 = 1e-9;

/// The smallest part of the draws by which they are turned up. Closer to collapse than this counts as collapse.
const LEAST_TURN: f64 = 1e-9;

/// The determinant of the tangent, 1 with nothing drawn, below which it is all but flat. *Chosen*: one draw that stands
/// [`LEAST_TURN`] short of its collapse has 0.000 06, and each feed beside it doubles that at most.
const ALL_BUT_FLAT: f64 = 0.02;

/// Why the draws did not settle; draws by their place in the list.
pub(super) enum Stall {
    Unfed { draw: usize },
    Collapse { draw: usize },
    NotConverged { rounds: u32, miss_volts: f64 },
}

impl Stall {
    /// The same as an error of the network, draws named by `element`.
    pub fn of(self, element: impl Fn(usize) -> Element) -> NetworkError {
        match self {
            Self::Unfed { draw } => NetworkError::Unfed { element: element(draw) },
            Self::Collapse { draw } => NetworkError::NoOperatingPoint { element: element(draw) },
            Self::NotConverged { rounds, miss_volts } => {
                NetworkError::NotConverged { rounds, miss: Volts::new(miss_volts) }
            }
        }
    }
}

/// The volts across each draw at the operating point reached from rest. `highest`: of all volts in the network at rest.
pub(super) fn settle(at_rest: &[f64], highest: f64, drag: &DMatrix<f64>, watts: &[f64]) -> Result<Vec<f64>, Stall> {
    if let Some(draw) = at_rest.iter().position(|volts| *volts <= UNFED * highest || *volts <= 0.0) {
        return Err(Stall::Unfed { draw });
    }
    let problem = Draws { at_rest, drag, watts };
    // An entry that ought to be nothing is left a hair to either side by rounding.
    let hair = 1e-12 * drag.amax();
    if drag.iter().all(|ohms| *ohms >= -hair) && watts.iter().all(|watts| *watts >= 0.0) {
        problem.fall()
    } else {
        problem.turn_up()
    }
}

struct Draws<'a> {
    at_rest: &'a [f64],
    drag: &'a DMatrix<f64>,
    watts: &'a [f64],
}

/// One round of Newton's iteration.
struct Round {
    /// By how much the equation is off, worst draw, as a part of its volts.
    miss: f64,
    /// The same in volts.
    miss_volts: f64,
    /// The change of volts that the tangent asks for; none where the tangent is flat.
    change: Option<DVector<f64>>,
    /// The determinant of the tangent: above nothing on the side of rest, nothing at collapse, and the same in
    /// whatever order the draws are listed.
    determinant: f64,
}

impl Draws<'_> {
    fn round(&self, volts: &[f64], part: f64) -> Round {
        let count = volts.len();
        let amps = DVector::from_fn(count, |draw, _| part * self.watts[draw] / volts[draw]);
        let dragged = self.drag * amps;
        let off = DVector::from_fn(count, |draw, _| volts[draw] - self.at_rest[draw] + dragged[draw]);
        // `max` would pass over what is no number.
        let worst = |worst: f64, off: f64| if off.is_nan() { f64::INFINITY } else { worst.max(off.abs()) };
        let miss = (0..count).map(|draw| off[draw] / self.size(volts, draw)).fold(0.0, worst);
        let miss_volts = off.iter().copied().fold(0.0, worst);
        let tangent = DMatrix::from_fn(count, count, |row, column| {
            let one = if row == column { 1.0 } else { 0.0 };
            one - self.drag[(row, column)] * part * self.watts[column] / (volts[column] * volts[column])
        });
        let lu = tangent.lu();
        let determinant = lu.determinant();
        Round { miss, miss_volts, change: lu.solve(&-off), determinant }
    }

    /// The greatest of the volts that a draw's equation adds up: what its rounding is a part of.
    fn size(&self, volts: &[f64], draw: usize) -> f64 {
        self.at_rest[draw].max(volts[draw])
    }

    fn is_still(&self, volts: &[f64], change: &DVector<f64>) -> bool {
        (0..volts.len()).all(|draw| change[draw].abs() <= SETTLED * self.size(volts, draw))
    }

    /// The draw that lost the greatest part of its volts.
    fn lowest(&self, volts: &[f64]) -> usize {
        let kept = |draw: usize| volts[draw] / self.at_rest[draw];
        (0..volts.len()).min_by(|a, b| kept(*a).total_cmp(&kept(*b))).unwrap_or(0)
    }

    /// Newton's iteration from rest, where it can only fall.
    fn fall(&self) -> Result<Vec<f64>, Stall> {
        let mut volts = self.at_rest.to_vec();
        let mut miss_volts = f64::INFINITY;
        for _ in 0..MOST_ROUNDS {
            let round = self.round(&volts, 1.0);
            if round.miss <= SETTLED {
                return Ok(volts);
            }
            miss_volts = round.miss_volts;
            let Some(change) = round.change else { return Err(Stall::Collapse { draw: self.lowest(&volts) }) };
            let next: Vec<f64> = volts.iter().zip(change.iter()).map(|(volts, change)| volts + change).collect();
            // A rise by no more than the rounding only says that the iteration has arrived.
            let rises = |draw: usize| change[draw] > 4.0 * SETTLED * self.at_rest[draw];
            if (0..next.len()).any(|draw| rises(draw) || next[draw].is_nan() || next[draw] <= 0.0) {
                return Err(Stall::Collapse { draw: self.lowest(&volts) });
            }
            volts = next;
            if self.is_still(&volts, &change) {
                return Ok(volts);
            }
        }
        Err(Stall::NotConverged { rounds: MOST_ROUNDS, miss_volts })
    }

    /// All draws turned up together from nothing, each time from the operating point before.
    fn turn_up(&self) -> Result<Vec<f64>, Stall> {
        let mut volts = self.at_rest.to_vec();
        let (mut part, mut turn) = (0.0, 0.25);
        while part < 1.0 {
            let next = f64::min(part + turn, 1.0);
            match self.near(&volts, next) {
                Some(found) => {
                    (volts, part) = (found, next);
                    turn = f64::min(2.0 * turn, 0.25);
                }
                None => turn /= 2.0,
            }
            if turn < LEAST_TURN {
                // Where the tangent is not all but flat, the iteration failed and not the network.
                let here = self.round(&volts, part);
                return Err(if here.determinant < ALL_BUT_FLAT {
                    Stall::Collapse { draw: self.lowest(&volts) }
                } else {
                    Stall::NotConverged { rounds: MOST_ROUNDS, miss_volts: self.round(&volts, 1.0).miss_volts }
                });
            }
        }
        Ok(volts)
    }

    /// The operating point nearest `from` when `part` of each draw is on, if it is still on the side of rest.
    fn near(&self, from: &[f64], part: f64) -> Option<Vec<f64>> {
        let mut volts = from.to_vec();
        for _ in 0..60 {
            let round = self.round(&volts, part);
            if round.miss <= SETTLED {
                return (round.determinant > 0.0).then_some(volts);
            }
            let change = round.change?;
            volts.iter_mut().zip(change.iter()).for_each(|(volts, change)| *volts += change);
            if volts.iter().any(|volts| volts.is_nan() || *volts <= 0.0) {
                return None;
            }
            if self.is_still(&volts, &change) {
                return (round.determinant > 0.0).then_some(volts);
            }
        }
        None
    }
}
