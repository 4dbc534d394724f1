//! Where the conductor lands: whether it enters the breaker's terminal, and what lug it takes.

use super::Candidate;
use crate::conductor::{Make, Size};
use crate::family::CodeFamily;
use crate::quantity::{Amps, SquareMillimetres};

/// One row: breakers to this rating take conductors to this cross-section in their own terminal, and the stud that a
/// lug for them goes on.
///
/// Typical of the class, from memory: read the breaker's own sheet.
struct Terminal {
    to: f64,
    largest: Size,
    stud: &'static str,
}

const fn terminal(to: f64, largest: Size, stud: &'static str) -> Terminal {
    Terminal { to, largest, stud }
}

/// Typical terminals of the IEC trade.
const IEC: [Terminal; 6] = [
    terminal(32.0, Size::Metric(1600), "M5"),
    terminal(63.0, Size::Metric(2500), "M6"),
    terminal(125.0, Size::Metric(5000), "M8"),
    terminal(250.0, Size::Metric(12000), "M8"),
    terminal(400.0, Size::Metric(24000), "M10"),
    terminal(f64::INFINITY, Size::Metric(30000), "M10 or M12"),
];

/// Typical terminals of the North American trade.
const NORTH_AMERICA: [Terminal; 6] = [
    terminal(30.0, Size::Gauge(8), "#10"),
    terminal(60.0, Size::Gauge(4), "1/4 in"),
    terminal(125.0, Size::Gauge(0), "5/16 in"),
    terminal(250.0, Size::Kcmil(250), "3/8 in"),
    terminal(400.0, Size::Kcmil(500), "3/8 in"),
    terminal(f64::INFINITY, Size::Kcmil(500), "1/2 in"),
];

/// How a conductor lands at its breaker. Typical of the class: read the breaker's own sheet.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Landing {
    /// The largest conductor that usual breakers of this rating take in their terminal.
    pub largest: Size,
    /// Whether this one enters. Where it does not, step down to a shorter piece of that size at a bus or a stud.
    pub enters: bool,
    /// Whether its fine strands need a ferrule or a compression pin.
    pub ferrule: bool,
    /// The stud of a lug at a bus.
    pub stud: &'static str,
    /// The size of the lug.
    pub lug: Size,
}

/// How `candidate` lands at a breaker of `rating`.
#[must_use]
pub fn landing(candidate: Candidate, make: Make, rating: Amps, family: CodeFamily) -> Landing {
    let rows = match family {
        CodeFamily::Iec => &IEC,
        CodeFamily::NorthAmerica => &NORTH_AMERICA,
    };
    // The last row has no end.
    let row = rows.iter().find(|row| rating.get() <= row.to).unwrap_or(&rows[rows.len() - 1]);
    let area: SquareMillimetres = candidate.size.area();
    Landing {
        largest: row.largest,
        enters: candidate.parallel == 1 && area.get() <= row.largest.area().get() * 1.005,
        ferrule: make == Make::FineStrand,
        stud: row.stud,
        lug: candidate.size,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn terminals_grow_with_the_rating() {
        for rows in [&IEC, &NORTH_AMERICA] {
            assert!(rows.is_sorted_by(|a, b| a.to < b.to && a.largest.area() <= b.largest.area()));
        }
    }
}
