//! What hangs together: which nodes are tied to the reference, and whether a loop has no resistance at all.

use super::build::{Element, Kind, Part};
use super::error::NetworkError;

/// Sets of nodes that hang together, each named by one of its members.
struct Groups(Vec<usize>);

impl Groups {
    fn apart(nodes: usize) -> Self {
        Self((0..nodes).collect())
    }

    fn of(&mut self, mut node: usize) -> usize {
        while self.0[node] != node {
            self.0[node] = self.0[self.0[node]];
            node = self.0[node];
        }
        node
    }

    /// Joins the groups of `a` and `b`; false where they are one already.
    fn join(&mut self, a: usize, b: usize) -> bool {
        let (a, b) = (self.of(a), self.of(b));
        self.0[a] = b;
        a != b
    }
}

/// For every node, whether closed sources and resistances tie it to the reference.
pub(super) fn tied(nodes: usize, parts: &[Part], reference: usize) -> Vec<bool> {
    let mut groups = Groups::apart(nodes);
    for part in parts.iter().filter(|part| part.ties()) {
        groups.join(part.from, part.to);
    }
    let home = groups.of(reference);
    (0..nodes).map(|node| groups.of(node) == home).collect()
}

/// Refuses a loop of elements that all lack resistance.
pub(super) fn no_bare_loop(nodes: usize, parts: &[Part]) -> Result<(), NetworkError> {
    let bare = |part: &Part| match part.kind {
        Kind::Source { ohms, .. } | Kind::Resistor { ohms } => !part.open && ohms == 0.0,
        Kind::Current { .. } | Kind::Power { .. } => false,
    };
    if !parts.iter().any(bare) {
        return Ok(());
    }
    let mut groups = Groups::apart(nodes);
    for (index, part) in parts.iter().enumerate().filter(|(_, part)| bare(part)) {
        if !groups.join(part.from, part.to) {
            return Err(NetworkError::BareLoop { element: Element(index) });
        }
    }
    Ok(())
}
