//! What if this opens? One breaker, fuse, pack protection or bond set open, and the direct-current side solved again.

use super::Site;
use super::derive::{bank_ask, least_resistance, run_ask, string_ask};
use super::part::{Part, PartId, PartKind};
use super::view::{Subject, View};
use crate::bank;
use crate::check::Cost;
use crate::entry::Entry;
use crate::field::Field;
use crate::network::{Behind, Element, Network, NetworkError, Node};
use crate::pad::Pad;
use crate::quantity::{Amps, Ohms, Volts};
use crate::run;
use crate::string;

/// What is set open.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Opens {
    /// The breaker or fuse of the run that leads from a part.
    Run(PartId),
    /// The protection of the bank's packs, all of them.
    Packs(PartId),
    /// The only bond of neutral and earth.
    Bond,
}

/// Whether the sun shines.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Sun {
    /// Every controller delivers all it can.
    Full,
    /// No controller delivers anything.
    None,
}

/// What one part then sees.
#[derive(Clone, Debug, PartialEq)]
pub struct Effect {
    /// The part.
    pub part: PartId,
    /// The volts at its terminals on the side of the bus; none where nothing ties it to a source.
    pub volts: Option<Volts>,
    /// What that means.
    pub meaning: Meaning,
}

/// What volts mean for a part.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Meaning {
    /// It goes on as before.
    AsBefore,
    /// It is dead.
    Dead,
    /// It stands above the most it survives.
    Over {
        /// What it survives.
        limit: Volts,
    },
    /// How much it survives is not entered: it may be destroyed.
    OverUnknown {
        /// The field that is missing.
        missing: Field,
    },
    /// It stands below what it runs at.
    Under {
        /// What it needs.
        limit: Volts,
    },
    /// An array that stands open: its full cold voltage is on what was opened.
    StandsOpen,
    /// A fault to a case opens no breaker: the case may stay live.
    CaseLive,
}

impl Meaning {
    /// What it costs; none where nothing is lost.
    #[must_use]
    pub const fn cost(self) -> Option<Cost> {
        match self {
            Self::AsBefore => None,
            Self::Dead | Self::Under { .. } => Some(Cost::Loss),
            Self::Over { .. } | Self::OverUnknown { .. } | Self::StandsOpen | Self::CaseLive => Some(Cost::Hazard),
        }
    }
}

/// What happens.
#[derive(Clone, Debug, PartialEq)]
pub struct WhatIf {
    /// What was opened.
    pub opens: Opens,
    /// Whether the sun shone.
    pub sun: Sun,
    /// What each part sees.
    pub effects: Vec<Effect>,
}

/// Why nothing can be told.
#[derive(Clone, Debug, PartialEq)]
#[non_exhaustive]
pub enum NotTold {
    /// Figures are missing.
    Missing(Vec<Field>),
    /// The circuit has no solution.
    Circuit(NetworkError),
    /// There is no such breaker.
    NoSuch,
}

/// Resistance of a way whose cable is not known yet. *Chosen*: 1 mΩ, a metre or so of thick cable.
const SHORT_WAY: Ohms = Ohms::new(0.001);

/// The direct-current side, with the handles to open.
struct Circuit {
    network: Network,
    minus: Node,
    /// Terminal of each part on the bus.
    terminals: Vec<(PartId, Node)>,
    /// What opens with each run.
    runs: Vec<(PartId, Element)>,
}

/// What happens when `opens` opens.
///
/// The bank is its resting voltage behind its least resistance; a controller in full sun drives its rated output, and
/// where nothing holds the bus any more it rises to the controller's output limit; inverters and panels draw nothing,
/// which is when volts are highest. Steady state: what happens in the first milliseconds is not told.
///
/// # Errors
///
/// [`NotTold`].
pub fn what_if(site: &Site, opens: Opens, sun: Sun) -> Result<WhatIf, NotTold> {
    let effects = match opens {
        Opens::Bond => bond(site),
        Opens::Run(id) => {
            let part = site.part(id).filter(|part| part.run.is_some()).ok_or(NotTold::NoSuch)?;
            opened(site, part, sun)?
        }
        Opens::Packs(id) => {
            let part = site.part(id).filter(|part| part.kind == PartKind::Bank).ok_or(NotTold::NoSuch)?;
            opened(site, part, sun)?
        }
    };
    Ok(WhatIf { opens, sun, effects })
}

fn bond(site: &Site) -> Vec<Effect> {
    site.parts
        .iter()
        .filter(|part| matches!(part.kind, PartKind::Inverter | PartKind::AcPanel | PartKind::Generator))
        .map(|part| Effect { part: part.id, volts: None, meaning: Meaning::CaseLive })
        .collect()
}

fn way(site: &Site, part: &Part) -> Ohms {
    run_ask(site, part).and_then(|ask| run::size(&ask).ok()?.drop).map_or(SHORT_WAY, |drop| drop.way)
}

fn circuit(site: &Site) -> Result<Circuit, NotTold> {
    let mut network = Network::new();
    let (bus, minus) = (network.node("bus"), network.node("minus"));
    network.refer_to(minus);
    let mut circuit = Circuit { network, minus, terminals: Vec::new(), runs: Vec::new() };
    for part in &site.parts {
        let on_bus = matches!(
            part.kind,
            PartKind::Controller | PartKind::OtherSource | PartKind::Bank | PartKind::Inverter | PartKind::DcPanel
        );
        if !on_bus {
            continue;
        }
        let node = circuit.network.node(part.title().to_owned());
        let tie = circuit.network.resistor(bus, node, way(site, part));
        circuit.terminals.push((part.id, node));
        circuit.runs.push((part.id, tie));
        if part.kind == PartKind::Bank {
            let source = behind(site, part)?;
            circuit.network.source(node, minus, source);
        }
    }
    Ok(circuit)
}

fn behind(site: &Site, part: &Part) -> Result<Behind, NotTold> {
    let ask = bank::settled(&bank_ask(site, part));
    match (bank::window(&ask), least_resistance(&ask)) {
        (Some(window), Some(resistance)) => Ok(Behind { emf: window.rested, resistance }),
        _ => {
            let missing = [
                (Field::Chemistry, ask.chemistry == Entry::Blank),
                (Field::CellVoltage, ask.cell_voltage == Entry::Blank),
                (Field::CellCapacity, ask.cell_capacity == Entry::Blank),
                (Field::NumberOfCells, ask.count == Entry::Blank && ask.series == Entry::Blank),
            ];
            Err(NotTold::Missing(missing.into_iter().filter(|(_, is)| *is).map(|(field, _)| field).collect()))
        }
    }
}

fn opened(site: &Site, opened: &Part, sun: Sun) -> Result<Vec<Effect>, NotTold> {
    let mut circuit = circuit(site)?;
    let is = |id: PartId| opened.id == id;
    // Packs that open are, for the bus, the same as the breaker of the bank.
    if let Some((_, tie)) = circuit.runs.iter().find(|(id, _)| *id == opened.id) {
        circuit.network.open(*tie);
    }
    let bank_holds = site.of_kind(PartKind::Bank).any(|bank| !is(bank.id));
    feed(site, &mut circuit, opened, sun, bank_holds)?;
    let solved = circuit.network.solve_tied().map_err(NotTold::Circuit)?;
    let mut effects = Vec::new();
    for (id, node) in &circuit.terminals {
        let Some(part) = site.part(*id) else { continue };
        let volts = solved.volts(*node).filter(|volts| volts.get() > 0.1);
        effects.push(Effect { part: *id, volts, meaning: meaning(site, part, volts, opened, sun, bank_holds) });
    }
    for part in site.of_kind(PartKind::Array) {
        let controller = part.to.filter(|to| is(*to));
        if (is(part.id) || controller.is_some()) && sun == Sun::Full {
            let volts = string::cold_voltage(&string_ask(site, part));
            effects.push(Effect { part: part.id, volts, meaning: Meaning::StandsOpen });
        }
    }
    for part in site.parts.iter().filter(|part| matches!(part.kind, PartKind::AcPanel | PartKind::DcCircuit)) {
        let feeds = part.to;
        let dead = is(part.id)
            || feeds.is_some_and(|to| {
                effects.iter().any(|one| one.part == to && matches!(one.meaning, Meaning::Dead | Meaning::Under { .. }))
            });
        effects.push(Effect {
            part: part.id,
            volts: None,
            meaning: if dead { Meaning::Dead } else { Meaning::AsBefore },
        });
    }
    Ok(effects)
}

/// Puts in what the controllers drive.
fn feed(site: &Site, circuit: &mut Circuit, opened: &Part, sun: Sun, bank_holds: bool) -> Result<(), NotTold> {
    if sun == Sun::None {
        return Ok(());
    }
    let minus = circuit.minus;
    for part in site.of_kind(PartKind::Controller) {
        let Some((_, node)) = circuit.terminals.iter().copied().find(|(id, _)| *id == part.id) else { continue };
        // Its array, or itself, is cut off: it drives nothing onto the bus.
        if opened.kind == PartKind::Array && opened.to == Some(part.id) {
            continue;
        }
        let alone = !bank_holds || opened.id == part.id;
        if alone {
            let limit = part.entries.entry::<Volts>(Field::ControllerOutputLimit).typed();
            let Some(limit) = limit else { return Err(NotTold::Missing(vec![Field::ControllerOutputLimit])) };
            circuit.network.source(node, minus, Behind { emf: limit, resistance: Ohms::new(0.01) });
        } else if let Some(current) = part.entries.entry::<Amps>(Field::OutputCurrent).typed() {
            circuit.network.draw_current(node, minus, current * -1.0);
        }
    }
    Ok(())
}

fn meaning(site: &Site, part: &Part, volts: Option<Volts>, opened: &Part, sun: Sun, bank_holds: bool) -> Meaning {
    let Some(volts) = volts else { return Meaning::Dead };
    let view = View::new(site, Subject::Part(part.id));
    let (low, high) = match part.kind {
        PartKind::Inverter => (Field::InverterLow, Field::InverterHigh),
        PartKind::DcPanel => (Field::LoadsLow, Field::LoadsHigh),
        _ => return if opened.id == part.id { Meaning::Dead } else { Meaning::AsBefore },
    };
    let limit = |field| view.entry::<Volts>(field).typed();
    if let Some(high) = limit(high)
        && volts > high
    {
        return Meaning::Over { limit: high };
    }
    if limit(high).is_none() && !bank_holds && sun == Sun::Full {
        return Meaning::OverUnknown { missing: high };
    }
    if let Some(low) = limit(low)
        && volts < low
    {
        return Meaning::Under { limit: low };
    }
    Meaning::AsBefore
}

/// Everything on the site that can be set open.
#[must_use]
pub fn openable(site: &Site) -> Vec<Opens> {
    let mut all: Vec<Opens> =
        site.parts.iter().filter(|part| part.run.is_some()).map(|part| Opens::Run(part.id)).collect();
    all.extend(
        site.of_kind(PartKind::Bank)
            .filter(|part| bank_ask(site, part).guards_itself() == Some(true))
            .map(|part| Opens::Packs(part.id)),
    );
    if site.first(PartKind::Inverter).is_some() {
        all.push(Opens::Bond);
    }
    all
}
