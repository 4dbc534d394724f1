//! Building a network: nodes, elements, and which of them are open.

use std::borrow::Cow;

use super::draw::Behind;
use super::error::NetworkError;
use super::kernel;
use super::solution::Operating;
use super::ties;
use crate::quantity::{Amps, Ohms, Volts, Watts};

/// The most nodes that a network may have. *Chosen*: a dense solve of so many takes a few milliseconds on a phone, and
/// a room's whole bank, cell by cell, stays within it.
pub const MOST_NODES: usize = 200;

/// The most elements that a network may have. *Chosen*: five for each node, well above any room's circuit.
pub const MOST_ELEMENTS: usize = 1000;

/// A joint of a [`Network`]. Good only in the network that gave it.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub struct Node(pub(super) usize);

/// Something between two nodes of a [`Network`]. Good only in the network that gave it.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, PartialOrd, Ord)]
pub struct Element(pub(super) usize);

/// What an element does, in its own numbers: volts, ohms, amperes and watts.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) enum Kind {
    /// From the minus node to the plus node: the current flows out of plus.
    Source {
        emf_volts: f64,
        ohms: f64,
    },
    Resistor {
        ohms: f64,
    },
    Current {
        amps: f64,
    },
    Power {
        watts: f64,
    },
}

/// One element: `from` and `to` follow the direction in which its current is counted.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Part {
    pub from: usize,
    pub to: usize,
    pub kind: Kind,
    pub open: bool,
}

impl Part {
    /// Whether it ties its two ends together: it is closed and conducts at any voltage.
    pub const fn ties(&self) -> bool {
        !self.open && matches!(self.kind, Kind::Source { .. } | Kind::Resistor { .. })
    }

    /// Whether its numbers can be meant.
    pub const fn possible(&self) -> bool {
        match self.kind {
            Kind::Source { emf_volts, ohms } => emf_volts.is_finite() && ohms.is_finite() && ohms >= 0.0,
            Kind::Resistor { ohms } => ohms.is_finite() && ohms >= 0.0,
            Kind::Current { amps } => amps.is_finite(),
            Kind::Power { watts } => watts.is_finite(),
        }
    }
}

/// A direct-current circuit.
///
/// Nodes and elements are added in any order; nothing is judged until it is solved, and then every fault of the
/// circuit is an error that names it.
///
/// # Example
///
/// 24 V behind 20 mΩ, 30 mΩ of cable, a lamp of 4.75 Ω: 4.8 Ω in all, so 5 A.
///
/// ```
/// use engine::network::{Behind, Network};
/// use engine::quantity::{Ohms, Volts};
///
/// let mut circuit = Network::new();
/// let (post, lamp, back) = (circuit.node("post"), circuit.node("lamp"), circuit.node("back"));
/// circuit.refer_to(back);
/// circuit.source(post, back, Behind { emf: Volts::new(24.0), resistance: Ohms::new(0.02) });
/// let cable = circuit.resistor(post, lamp, Ohms::new(0.03));
/// circuit.resistor(lamp, back, Ohms::new(4.75));
///
/// let found = circuit.solve()?;
/// assert!((found.current(cable).unwrap().get() - 5.0).abs() < 1e-9);
/// assert!((found.volts(lamp).unwrap().get() - 23.75).abs() < 1e-9);
/// # Ok::<(), engine::network::NetworkError>(())
/// ```
#[derive(Clone, Debug, Default)]
pub struct Network {
    names: Vec<Cow<'static, str>>,
    parts: Vec<Part>,
    reference: Option<usize>,
}

impl Network {
    /// A network with nothing in it.
    #[must_use]
    pub const fn new() -> Self {
        Self { names: Vec::new(), parts: Vec::new(), reference: None }
    }

    /// A new joint, by the name that an error would call it.
    pub fn node(&mut self, name: impl Into<Cow<'static, str>>) -> Node {
        self.names.push(name.into());
        Node(self.names.len() - 1)
    }

    /// The node whose volts are counted as 0.
    pub const fn refer_to(&mut self, node: Node) {
        self.reference = Some(node.0);
    }

    /// A source: electromotive force behind a resistance, which may be none. Its current counts out of `plus`.
    pub fn source(&mut self, plus: Node, minus: Node, source: Behind) -> Element {
        let kind = Kind::Source { emf_volts: source.emf.get(), ohms: source.resistance.get() };
        self.add(minus, plus, kind)
    }

    /// A resistance, which may be none. Its current counts from `a` to `b`.
    pub fn resistor(&mut self, a: Node, b: Node, resistance: Ohms) -> Element {
        self.add(a, b, Kind::Resistor { ohms: resistance.get() })
    }

    /// A draw of constant current from `a` to `b`, whatever the volts. Negative: it feeds.
    pub fn draw_current(&mut self, a: Node, b: Node, current: Amps) -> Element {
        self.add(a, b, Kind::Current { amps: current.get() })
    }

    /// A draw of constant power, as an inverter under load is: the lower the volts, the more current.
    /// `a` is its plus. Negative: it feeds.
    pub fn draw_power(&mut self, a: Node, b: Node, power: Watts) -> Element {
        self.add(a, b, Kind::Power { watts: power.get() })
    }

    fn add(&mut self, from: Node, to: Node, kind: Kind) -> Element {
        self.parts.push(Part { from: from.0, to: to.0, kind, open: false });
        Element(self.parts.len() - 1)
    }

    /// Sets an element open: nothing flows through it. An element that is not of this network is passed over.
    pub fn open(&mut self, element: Element) {
        self.set_open(element, true);
    }

    /// Sets an element closed again, as it was when added.
    pub fn close(&mut self, element: Element) {
        self.set_open(element, false);
    }

    fn set_open(&mut self, element: Element, open: bool) {
        if let Some(part) = self.parts.get_mut(element.0) {
            part.open = open;
        }
    }

    /// What a node is called; nothing where it is not of this network.
    #[must_use]
    pub fn name(&self, node: Node) -> Option<&str> {
        self.names.get(node.0).map(AsRef::as_ref)
    }

    /// The nodes that no source or resistance ties to the reference, as the elements stand now.
    ///
    /// # Errors
    ///
    /// [`NetworkError::NoReference`], and what is wrong with an element before anything is computed.
    pub fn cut_off(&self) -> Result<Vec<Node>, NetworkError> {
        let reference = self.sound()?;
        let tied = ties::tied(self.names.len(), &self.parts, reference);
        Ok((0..self.names.len()).filter(|node| !tied[*node]).map(Node).collect())
    }

    /// Solves the network: volts at every node, current through every element.
    ///
    /// Modified nodal analysis: Kirchhoff's current law at every node but the reference, with an unknown current for
    /// each branch of next to no resistance. Draws of constant power are solved on the network as they see it,
    /// u = u₀ − Z · P/u; see [`NetworkError::NoOperatingPoint`] for what a collapse means.
    ///
    /// Steady direct current only: no inductance, no capacitance, and resistances that do not change with current.
    ///
    /// # Errors
    ///
    /// A [`NetworkError`]: a node that nothing ties to the reference is named, and so on. There is no answer then.
    ///
    /// # Source
    ///
    /// [`crate::source::MODIFIED_NODAL`]; [`crate::source::MONOTONE_NEWTON`] for the iteration.
    pub fn solve(&self) -> Result<Operating, NetworkError> {
        let reference = self.sound()?;
        let tied = ties::tied(self.names.len(), &self.parts, reference);
        if let Some(node) = tied.iter().position(|tied| !tied) {
            return Err(NetworkError::Floating { node: Node(node), name: self.names[node].clone() });
        }
        self.solve_among(reference, &tied)
    }

    /// Solves what is tied to the reference and leaves out what open elements have cut off from it: for asking what
    /// happens when something opens. Volts and currents of what is cut off are none.
    ///
    /// # Errors
    ///
    /// As [`Network::solve`], but for [`NetworkError::Floating`].
    pub fn solve_tied(&self) -> Result<Operating, NetworkError> {
        let reference = self.sound()?;
        let tied = ties::tied(self.names.len(), &self.parts, reference);
        self.solve_among(reference, &tied)
    }

    fn solve_among(&self, reference: usize, tied: &[bool]) -> Result<Operating, NetworkError> {
        ties::no_bare_loop(self.names.len(), &self.parts)?;
        kernel::solve(&self.parts, reference, tied)
    }

    /// What the network is between `plus` and `minus` when all draws of constant power are off: one source behind one
    /// resistance (Thévenin's equivalent). Draws of constant current stay on.
    ///
    /// # Errors
    ///
    /// As [`Network::solve`]; [`NetworkError::UnknownNode`] where either node is not of this network.
    ///
    /// # Example
    ///
    /// Two equal strings side by side: the same volts, half the resistance.
    ///
    /// ```
    /// use engine::network::{Behind, Network};
    /// use engine::quantity::{Ohms, Volts};
    ///
    /// let mut bank = Network::new();
    /// let (plus, minus) = (bank.node("plus"), bank.node("minus"));
    /// bank.refer_to(minus);
    /// let string = Behind { emf: Volts::new(26.0), resistance: Ohms::new(0.02) };
    /// bank.source(plus, minus, string);
    /// bank.source(plus, minus, string);
    /// let seen = bank.seen_from(plus, minus)?;
    /// assert!((seen.emf.get() - 26.0).abs() < 1e-9 && (seen.resistance.get() - 0.01).abs() < 1e-12);
    /// # Ok::<(), engine::network::NetworkError>(())
    /// ```
    pub fn seen_from(&self, plus: Node, minus: Node) -> Result<Behind, NetworkError> {
        let reference = self.sound()?;
        if plus.0 >= self.names.len() || minus.0 >= self.names.len() {
            return Err(NetworkError::UnknownNode { element: None });
        }
        let tied = ties::tied(self.names.len(), &self.parts, reference);
        if let Some(node) = [plus, minus].into_iter().find(|node| !tied[node.0]) {
            return Err(NetworkError::Floating { node, name: self.names[node.0].clone() });
        }
        ties::no_bare_loop(self.names.len(), &self.parts)?;
        let (emf_volts, ohms) = kernel::seen_from(&self.parts, reference, &tied, plus.0, minus.0)?;
        Ok(Behind { emf: Volts::new(emf_volts), resistance: Ohms::new(ohms) })
    }

    /// Judges what can be judged before solving, and gives the reference.
    fn sound(&self) -> Result<usize, NetworkError> {
        let nodes = self.names.len();
        if nodes > MOST_NODES || self.parts.len() > MOST_ELEMENTS {
            return Err(NetworkError::TooLarge { nodes, elements: self.parts.len() });
        }
        for (index, part) in self.parts.iter().enumerate() {
            if part.from >= nodes || part.to >= nodes {
                return Err(NetworkError::UnknownNode { element: Some(Element(index)) });
            }
            if !part.possible() {
                return Err(NetworkError::NotPossible { element: Element(index) });
            }
        }
        self.reference.filter(|reference| *reference < nodes).ok_or(NetworkError::NoReference)
    }
}
