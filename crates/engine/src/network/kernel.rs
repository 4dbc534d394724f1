//! The numbers of the nodal analysis: plain volts, amperes, ohms and siemens inside, quantities at the door.
//!
//! Unknowns: the volts of every live node but the reference, then the current of every branch of next to no resistance.
//! Rows and columns are scaled so that every node's own conductance is 1: what is left on the diagonal after
//! elimination then says how much of a node's hold on the reference survived the rounding.

use nalgebra::{DMatrix, Dyn, LU};

use super::LEAST_CONDUCTING_OHMS;
use super::build::{Element, Kind, Part};
use super::error::NetworkError;
use super::ports;
use super::solution::Operating;

/// The least share of a row's own size that a pivot may keep. *Chosen*: at 1e-10 the answer is still good to about
/// six digits, which is more than any meter in the room.
const LEAST_PIVOT: f64 = 1e-10;

/// A closed source or resistance: i = (v from − v to + emf) / ohms.
#[derive(Clone, Copy)]
struct Branch {
    part: usize,
    from: Option<usize>,
    to: Option<usize>,
    emf_volts: f64,
    ohms: f64,
}

/// The linear part of a network, factorised.
struct Linear {
    /// Which row a node has; none for the reference and for what is cut off.
    rows: Vec<Option<usize>>,
    branches: Vec<Branch>,
    /// How many rows belong to nodes; branches with a current of their own follow.
    nodes: usize,
    /// By how much each row and column was scaled.
    scale: Vec<f64>,
    lu: LU<f64, Dyn, Dyn>,
}

impl Linear {
    fn of(parts: &[Part], reference: usize, tied: &[bool]) -> Result<Self, NetworkError> {
        let mut nodes = 0;
        let rows: Vec<Option<usize>> = (0..tied.len())
            .map(|node| {
                (tied[node] && node != reference).then(|| {
                    nodes += 1;
                    nodes - 1
                })
            })
            .collect();
        let branches: Vec<Branch> = parts
            .iter()
            .enumerate()
            .filter(|(_, part)| part.ties() && tied[part.from])
            .filter_map(|(index, part)| {
                let (emf_volts, ohms) = match part.kind {
                    Kind::Source { emf_volts, ohms } => (emf_volts, ohms),
                    Kind::Resistor { ohms } => (0.0, ohms),
                    Kind::Current { .. } | Kind::Power { .. } => return None,
                };
                Some(Branch { part: index, from: rows[part.from], to: rows[part.to], emf_volts, ohms })
            })
            .collect();
        let size = nodes + branches.iter().filter(|branch| !branch.conducts()).count();

        let mut own = vec![0.0; nodes];
        for branch in branches.iter().filter(|branch| branch.conducts()) {
            for row in [branch.from, branch.to].into_iter().flatten() {
                own[row] += 1.0 / branch.ohms;
            }
        }
        let mut scale: Vec<f64> = own.iter().map(|own| if *own > 0.0 { own.sqrt().recip() } else { 1.0 }).collect();
        scale.resize(size, 1.0);

        let mut matrix = DMatrix::<f64>::zeros(size, size);
        let mut add = |row: usize, column: usize, amount: f64, scale: &[f64]| {
            matrix[(row, column)] += amount * scale[row] * scale[column];
        };
        let mut bare = nodes;
        for branch in &branches {
            if branch.conducts() {
                let siemens = 1.0 / branch.ohms;
                for row in [branch.from, branch.to].into_iter().flatten() {
                    add(row, row, siemens, &scale);
                }
                if let (Some(from), Some(to)) = (branch.from, branch.to) {
                    add(from, to, -siemens, &scale);
                    add(to, from, -siemens, &scale);
                }
            } else {
                let ends = [(branch.from, 1.0), (branch.to, -1.0)];
                let widest = ends.iter().filter_map(|(row, _)| row.map(|row| scale[row])).fold(0.0, f64::max);
                if widest > 0.0 {
                    scale[bare] = 1.0 / widest;
                }
                for (row, sign) in ends {
                    if let Some(row) = row {
                        add(row, bare, sign, &scale);
                        add(bare, row, sign, &scale);
                    }
                }
                add(bare, bare, -branch.ohms, &scale);
                bare += 1;
            }
        }

        let lu = matrix.lu();
        let held = (0..size).all(|row| lu.lu_internal()[(row, row)].abs() >= LEAST_PIVOT);
        if held { Ok(Self { rows, branches, nodes, scale, lu }) } else { Err(NetworkError::Singular) }
    }

    fn size(&self) -> usize {
        self.scale.len()
    }

    /// What the sources alone put on the right-hand side.
    fn sources(&self) -> DMatrix<f64> {
        let mut right = DMatrix::zeros(self.size(), 1);
        let mut bare = self.nodes;
        for branch in &self.branches {
            if branch.conducts() {
                let amps = branch.emf_volts / branch.ohms;
                inject(&mut right, 0, branch.from, -amps);
                inject(&mut right, 0, branch.to, amps);
            } else {
                right[(bare, 0)] = -branch.emf_volts;
                bare += 1;
            }
        }
        right
    }

    /// Solves for every column of `right`.
    fn solve(&self, mut right: DMatrix<f64>) -> Result<DMatrix<f64>, NetworkError> {
        // A lone reference has nothing to solve, and the library would count below 0.
        if self.size() == 0 {
            return Ok(right);
        }
        for mut column in right.column_iter_mut() {
            column.iter_mut().zip(&self.scale).for_each(|(value, scale)| *value *= scale);
        }
        if !self.lu.solve_mut(&mut right) {
            return Err(NetworkError::Singular);
        }
        for mut column in right.column_iter_mut() {
            column.iter_mut().zip(&self.scale).for_each(|(value, scale)| *value *= scale);
        }
        if right.iter().all(|value| value.is_finite()) { Ok(right) } else { Err(NetworkError::Singular) }
    }

    /// The highest of all sources' forces and nodes' volts in the first column of an answer.
    fn highest(&self, found: &DMatrix<f64>) -> f64 {
        let forces = self.branches.iter().map(|branch| branch.emf_volts);
        let volts = (0..self.nodes).map(|row| found[(row, 0)]);
        forces.chain(volts).fold(0.0, |highest, volts| highest.max(volts.abs()))
    }

    /// Volts of `from` over `to` in a column of an answer. The reference stands at 0.
    fn across(&self, found: &DMatrix<f64>, column: usize, from: usize, to: usize) -> f64 {
        let at = |node: usize| self.rows[node].map_or(0.0, |row| found[(row, column)]);
        at(from) - at(to)
    }
}

/// Adds to what flows into a node; nothing is kept of what flows into the reference.
fn inject(right: &mut DMatrix<f64>, column: usize, row: Option<usize>, amps: f64) {
    if let Some(row) = row {
        right[(row, column)] += amps;
    }
}

impl Branch {
    fn conducts(&self) -> bool {
        self.ohms >= LEAST_CONDUCTING_OHMS
    }
}

/// Volts at every node that is tied to the reference, current through every element.
pub(super) fn solve(parts: &[Part], reference: usize, tied: &[bool]) -> Result<Operating, NetworkError> {
    let linear = Linear::of(parts, reference, tied)?;
    let live = |part: &Part| !part.open && tied[part.from] && tied[part.to];

    // What stands at rest, and in further columns what one ampere of each draw of constant power does to it.
    let mut rest = linear.sources();
    let mut powered = Vec::new();
    for (index, part) in parts.iter().enumerate().filter(|(_, part)| live(part)) {
        match part.kind {
            Kind::Current { amps } => {
                inject(&mut rest, 0, linear.rows[part.from], -amps);
                inject(&mut rest, 0, linear.rows[part.to], amps);
            }
            Kind::Power { watts } if watts != 0.0 => powered.push((index, watts)),
            Kind::Power { .. } | Kind::Source { .. } | Kind::Resistor { .. } => {}
        }
    }
    let columns = 1 + powered.len();
    let mut right = rest.resize_horizontally(columns, 0.0);
    for (column, (index, _)) in (1..).zip(&powered) {
        let part = &parts[*index];
        inject(&mut right, column, linear.rows[part.from], -1.0);
        inject(&mut right, column, linear.rows[part.to], 1.0);
    }
    let found = linear.solve(right)?;

    let drawn = if powered.is_empty() {
        Vec::new()
    } else {
        let port = |column: usize, draw: usize| {
            let part = &parts[powered[draw].0];
            linear.across(&found, column, part.from, part.to)
        };
        let at_rest: Vec<f64> = (0..powered.len()).map(|draw| port(0, draw)).collect();
        let drag = DMatrix::from_fn(powered.len(), powered.len(), |row, column| -port(column + 1, row));
        let watts: Vec<f64> = powered.iter().map(|(_, watts)| *watts).collect();
        let volts = ports::settle(&at_rest, linear.highest(&found), &drag, &watts)
            .map_err(|stall| stall.of(|draw| Element(powered[draw].0)))?;
        watts.iter().zip(&volts).map(|(watts, volts)| watts / volts).collect()
    };
    let unknown = |row: usize| {
        found[(row, 0)] + drawn.iter().enumerate().map(|(draw, amps)| amps * found[(row, draw + 1)]).sum::<f64>()
    };

    let volts: Vec<Option<f64>> =
        tied.iter().enumerate().map(|(node, tied)| tied.then(|| linear.rows[node].map_or(0.0, unknown))).collect();
    let between = |part: &Part| Some(volts[part.from]? - volts[part.to]?);
    let mut amps: Vec<Option<f64>> = parts
        .iter()
        .map(|part| match part.kind {
            _ if part.open => Some(0.0),
            Kind::Current { amps } => live(part).then_some(amps),
            Kind::Power { watts: 0.0 } => live(part).then_some(0.0),
            // Branches and draws of constant power follow below.
            Kind::Power { .. } | Kind::Source { .. } | Kind::Resistor { .. } => None,
        })
        .collect();
    for ((index, _), drawn) in powered.iter().zip(&drawn) {
        amps[*index] = Some(*drawn);
    }

    // What the sources' forces put in, less what resistances and draws take out by their own figures.
    let mut imbalance = 0.0;
    let mut bare = linear.nodes;
    for branch in &linear.branches {
        let through = if branch.conducts() {
            between(&parts[branch.part]).map(|volts| (volts + branch.emf_volts) / branch.ohms)
        } else {
            bare += 1;
            Some(unknown(bare - 1))
        };
        amps[branch.part] = through;
        imbalance += through.map_or(0.0, |amps| branch.emf_volts * amps - amps * amps * branch.ohms);
    }
    for part in parts.iter().filter(|part| live(part)) {
        imbalance -= match part.kind {
            Kind::Current { amps } => amps * between(part).unwrap_or(0.0),
            Kind::Power { watts } => watts,
            Kind::Source { .. } | Kind::Resistor { .. } => 0.0,
        };
    }
    if !imbalance.is_finite() || amps.iter().flatten().any(|amps| !amps.is_finite()) {
        return Err(NetworkError::Singular);
    }
    let watts =
        parts.iter().zip(&amps).map(|(part, amps)| if part.open { Some(0.0) } else { Some(between(part)? * (*amps)?) });
    let watts = watts.collect();
    Ok(Operating::new(volts, amps, watts, imbalance))
}

/// Volts of `plus` over `minus` with nothing more drawn, and ohms between them, with draws of constant power off.
pub(super) fn seen_from(
    parts: &[Part],
    reference: usize,
    tied: &[bool],
    plus: usize,
    minus: usize,
) -> Result<(f64, f64), NetworkError> {
    let linear = Linear::of(parts, reference, tied)?;
    let mut right = linear.sources().resize_horizontally(2, 0.0);
    for part in parts.iter().filter(|part| !part.open && tied[part.from] && tied[part.to]) {
        if let Kind::Current { amps } = part.kind {
            inject(&mut right, 0, linear.rows[part.from], -amps);
            inject(&mut right, 0, linear.rows[part.to], amps);
        }
    }
    inject(&mut right, 1, linear.rows[plus], -1.0);
    inject(&mut right, 1, linear.rows[minus], 1.0);
    let found = linear.solve(right)?;
    // Rounding may leave a resistance of nothing a hair below nothing.
    Ok((linear.across(&found, 0, plus, minus), (-linear.across(&found, 1, plus, minus)).max(0.0)))
}
