//! Direct-current networks: what stands at every joint, and flows through every part, of a circuit.
//!
//! A [`Network`] is nodes and what lies between them: sources with a resistance of their own (or none), resistances,
//! draws of constant current and draws of constant power. Any of them can be set open. It is solved by modified
//! nodal analysis; draws of constant power by Newton's iteration, in which a collapse is found and said, never hidden
//! behind the last guess.
//!
//! [`draw`] holds the case that needs no network: one draw behind one source.

mod build;
pub mod draw;
mod error;
mod kernel;
mod ports;
mod solution;
mod ties;

pub use build::{Element, MOST_ELEMENTS, MOST_NODES, Network, Node};
pub use draw::{Behind, DrawError, Loaded};
pub use error::NetworkError;
pub use solution::Operating;

/// Below this a branch keeps its current as an unknown of its own in place of a conductance, so that a tie of next to
/// no resistance does not drown what its ends hang on. *Chosen*: conductances then span 12 decades at most for
/// resistances up to a megohm, of the 16 that a double holds.
pub(crate) const LEAST_CONDUCTING_OHMS: f64 = 1e-6;
