//! Why a network has no answer.

use core::fmt;
use std::borrow::Cow;

use super::build::{Element, Node};
use crate::quantity::Volts;

/// Why a network has no answer.
#[derive(Clone, Debug, PartialEq)]
#[non_exhaustive]
pub enum NetworkError {
    /// No node was named whose volts count as 0.
    NoReference,
    /// More nodes or elements than [`MOST_NODES`](super::MOST_NODES) and [`MOST_ELEMENTS`](super::MOST_ELEMENTS).
    TooLarge {
        /// How many nodes there are.
        nodes: usize,
        /// How many elements there are.
        elements: usize,
    },
    /// A node that this network did not give: an element's end, or where no element is named, the one asked for.
    UnknownNode {
        /// The element that ends there.
        element: Option<Element>,
    },
    /// A resistance below nothing, or a value that is not a finite number.
    NotPossible {
        /// The element that has it.
        element: Element,
    },
    /// A node that no closed source or resistance ties to the reference: its volts could be anything.
    Floating {
        /// The node.
        node: Node,
        /// What it is called.
        name: Cow<'static, str>,
    },
    /// A loop of nothing but sources and ties without resistance: its current could be anything.
    BareLoop {
        /// The element that closes the loop.
        element: Element,
    },
    /// Resistances so far apart that the answer would be lost in the rounding of numbers.
    Singular,
    /// At rest no volts of the right direction stand across a draw of constant power.
    Unfed {
        /// The draw.
        element: Element,
    },
    /// Collapse: the draws of constant power ask for more than the network can deliver, and no voltage satisfies them.
    ///
    /// Where every draw only loads the others (no draw feeds, and each drags the others' volts down), this is proven:
    /// Newton's iteration from rest falls steadily toward the highest operating point if there is one, so a step that
    /// rises shows that there is none. Otherwise the draws are turned up together from nothing, and collapse is
    /// said where the operating point ends before they stand in full.
    NoOperatingPoint {
        /// The draw whose volts fell furthest.
        element: Element,
    },
    /// The iteration neither settled nor showed a collapse.
    NotConverged {
        /// How many rounds were made.
        rounds: u32,
        /// By how much the equation was still off.
        miss: Volts,
    },
}

impl fmt::Display for NetworkError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::NoReference => f.write_str("no node was named whose volts count as 0"),
            Self::TooLarge { nodes, elements } => write!(
                f,
                "{nodes} nodes and {elements} elements; at most {} and {} can be solved",
                super::MOST_NODES,
                super::MOST_ELEMENTS
            ),
            Self::UnknownNode { element: Some(element) } => {
                write!(f, "element {} ends at a node of another network", element.0 + 1)
            }
            Self::UnknownNode { element: None } => f.write_str("a node of another network was asked for"),
            Self::NotPossible { element } => {
                write!(f, "element {} has a negative resistance or a value that is no number", element.0 + 1)
            }
            Self::Floating { name, .. } => write!(f, "nothing ties \"{name}\" to the reference"),
            Self::BareLoop { element } => {
                write!(f, "element {} closes a loop that has no resistance at all", element.0 + 1)
            }
            Self::Singular => f.write_str("the resistances are too far apart for an answer that can be trusted"),
            Self::Unfed { element } => {
                write!(f, "the draw of constant power {} has no volts across it at rest", element.0 + 1)
            }
            Self::NoOperatingPoint { element } => {
                write!(f, "collapse: the network cannot deliver what draw {} asks for", element.0 + 1)
            }
            Self::NotConverged { rounds, miss } => {
                write!(f, "no answer after {rounds} rounds; still off by {} V", miss.get())
            }
        }
    }
}

impl core::error::Error for NetworkError {}
