//! What each family of codes asks of PV circuits: currents, and fuses of strings.

use crate::quantity::Amps;
use crate::source::{self, Clause};

/// The rules of one family for PV circuits.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct PvCircuitRules {
    /// How much brighter than the rating conditions the sun can be, as a factor on Isc.
    pub sunlight_factor: f64,
    /// Where that is from.
    pub sunlight_clause: Clause,
    /// Factor on the other strings' Isc when they feed back into one.
    pub backfeed_factor: f64,
    /// Where the need for string fuses is from.
    pub backfeed_clause: Clause,
    /// Least string fuse, as a factor on Isc.
    pub fuse_least: f64,
    /// Greatest string fuse, as a factor on Isc; none where only the module's rating bounds it.
    /// A fuse must lie *below* this.
    pub fuse_below: Option<f64>,
    /// Where the bounds of the fuse are from.
    pub fuse_clause: Clause,
    /// The ratings that such fuses are made in.
    pub fuse_ratings: &'static [Amps],
    /// Where the list of ratings is from.
    pub ratings_clause: Clause,
}

const fn amps<const N: usize>(numbers: [u32; N]) -> [Amps; N] {
    let mut all = [Amps::new(0.0); N];
    let mut i = 0;
    while i < N {
        all[i] = Amps::new(numbers[i] as f64);
        i += 1;
    }
    all
}

/// Preferred ratings of gPV fuse-links, IEC 60269-1 (from memory). 15 A and 30 A links are also widely made.
pub const IEC_FUSES: &[Amps] = &amps([
    2, 4, 6, 8, 10, 12, 16, 20, 25, 32, 40, 50, 63, 80, 100, 125, 160, 200, 250, 315, 400, 500, 630, 800, 1000, 1250,
]);

/// Standard ratings of fuses to 800 A, NFPA 70 (2023), Table 240.6(A).
pub const NORTH_AMERICAN_FUSES: &[Amps] = &amps([
    10, 15, 20, 25, 30, 35, 40, 45, 50, 60, 70, 80, 90, 100, 110, 125, 150, 175, 200, 225, 250, 300, 350, 400, 450,
    500, 600, 700, 800,
]);

/// IEC 62548: (n − 1) · Isc against the module; 1.5 · Isc ≤ In < 2.4 · Isc.
pub static IEC: PvCircuitRules = PvCircuitRules {
    sunlight_factor: 1.25,
    sunlight_clause: source::IEC_62548.at("greatest current of a PV circuit, 1.25 · Isc"),
    backfeed_factor: 1.0,
    backfeed_clause: source::IEC_62548.at("string overcurrent protection: (n − 1) · Isc > I_MOD_MAX_OCPR"),
    fuse_least: 1.5,
    fuse_below: Some(2.4),
    fuse_clause: source::IEC_62548.at("string overcurrent protection: 1.5 · Isc ≤ In < 2.4 · Isc, In ≤ I_MOD_MAX_OCPR"),
    fuse_ratings: IEC_FUSES,
    ratings_clause: source::IEC_60269_6.at("gPV fuse-links; preferred ratings of IEC 60269-1"),
};

/// NFPA 70: 1.25 · (n − 1) · Isc against the module; In ≥ 1.25 · 1.25 · Isc.
pub static NORTH_AMERICA: PvCircuitRules = PvCircuitRules {
    sunlight_factor: 1.25,
    sunlight_clause: source::NEC.at("690.8(A), 1.25 · Isc"),
    backfeed_factor: 1.25,
    backfeed_clause: source::NEC.at("690.9(A), all other sources against the module's rating"),
    fuse_least: 1.5625,
    fuse_below: None,
    fuse_clause: source::NEC.at("690.9(B), 1.25 · 1.25 · Isc, and the module's maximum series fuse"),
    fuse_ratings: NORTH_AMERICAN_FUSES,
    ratings_clause: source::NEC.at("Table 240.6(A)"),
};

impl PvCircuitRules {
    /// Whether a fuse of `rating` fits a string of `isc` on modules that allow at most `module_most`.
    #[must_use]
    pub fn fuse_fits(&self, rating: Amps, isc: Amps, module_most: Amps) -> bool {
        // Products of decimal fractions end in the last bit: 1.5 · 10.6 must admit a 15.9 A fuse.
        let slack = 1e-9;
        let least = isc.get() * self.fuse_least;
        let under = self.fuse_below.is_none_or(|factor| rating.get() < isc.get() * factor);
        rating.get() >= least * (1.0 - slack) && under && rating <= module_most
    }

    /// The ratings that fit, smallest first.
    pub fn fitting(&self, isc: Amps, module_most: Amps) -> impl Iterator<Item = Amps> + '_ {
        self.fuse_ratings.iter().copied().filter(move |rating| self.fuse_fits(*rating, isc, module_most))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ratings_rise() {
        for list in [IEC_FUSES, NORTH_AMERICAN_FUSES] {
            assert!(list.windows(2).all(|pair| pair[0] < pair[1]));
        }
    }

    #[test]
    fn the_upper_bound_of_the_iec_rule_is_not_itself_allowed() {
        let (isc, most) = (Amps::new(10.0), Amps::new(30.0));
        assert!(IEC.fuse_fits(Amps::new(15.0), isc, most));
        assert!(!IEC.fuse_fits(Amps::new(24.0), isc, most));
        assert!(!IEC.fuse_fits(Amps::new(14.9), isc, most));
    }
}
