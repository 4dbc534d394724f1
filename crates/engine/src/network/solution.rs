//! What a solved network says.

use super::build::{Element, Node};
use crate::quantity::{Amps, Volts, Watts};

/// The operating point of a network.
///
/// Asking for a node or an element of another network, or for one that is cut off from the reference, gives nothing.
#[derive(Clone, Debug, PartialEq)]
pub struct Operating {
    volts: Vec<Option<f64>>,
    amps: Vec<Option<f64>>,
    watts: Vec<Option<f64>>,
    imbalance: f64,
}

impl Operating {
    pub(super) const fn new(
        volts: Vec<Option<f64>>,
        amps: Vec<Option<f64>>,
        watts: Vec<Option<f64>>,
        imbalance: f64,
    ) -> Self {
        Self { volts, amps, watts, imbalance }
    }

    /// Volts of a node over the reference.
    #[must_use]
    pub fn volts(&self, node: Node) -> Option<Volts> {
        self.volts.get(node.0).copied().flatten().map(Volts::new)
    }

    /// Volts of `plus` over `minus`.
    #[must_use]
    pub fn across(&self, plus: Node, minus: Node) -> Option<Volts> {
        Some(self.volts(plus)? - self.volts(minus)?)
    }

    /// Current through an element, counted out of a source's plus, else from its first node to its second. None flows
    /// through an open one.
    #[must_use]
    pub fn current(&self, element: Element) -> Option<Amps> {
        self.amps.get(element.0).copied().flatten().map(Amps::new)
    }

    /// Power that an element takes out of the network at its ends; negative where it delivers, as a source does.
    #[must_use]
    pub fn power(&self, element: Element) -> Option<Watts> {
        self.watts.get(element.0).copied().flatten().map(Watts::new)
    }

    /// Σ E·I of all sources − Σ I²·R of all resistances, the sources' own too − what all draws take. Nothing but
    /// rounding where the answer is right.
    #[must_use]
    pub const fn imbalance(&self) -> Watts {
        Watts::new(self.imbalance)
    }
}
