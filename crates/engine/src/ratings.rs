//! Standard ratings of breakers and fuses, and what they are tested to do.

use crate::family::CodeFamily;
use crate::quantity::{Amps, Hours};
use crate::source::{self, Clause};

/// Standard ratings of fuses and inverse-time breakers, in amperes.
///
/// # Source
///
/// [`source::NEC`], Table 240.6(A), 2023. 10 A came with that edition.
pub const NORTH_AMERICAN: [f64; 38] = [
    10.0, 15.0, 20.0, 25.0, 30.0, 35.0, 40.0, 45.0, 50.0, 60.0, 70.0, 80.0, 90.0, 100.0, 110.0, 125.0, 150.0, 175.0,
    200.0, 225.0, 250.0, 300.0, 350.0, 400.0, 450.0, 500.0, 600.0, 700.0, 800.0, 1000.0, 1200.0, 1600.0, 2000.0,
    2500.0, 3000.0, 4000.0, 5000.0, 6000.0,
];

/// Further standard ratings of fuses alone, before 2023.
///
/// # Source
///
/// [`source::NEC`], 240.6(A), editions to 2020.
pub const NORTH_AMERICAN_FUSES_BEFORE_2023: [f64; 5] = [1.0, 3.0, 6.0, 10.0, 601.0];

/// Small ratings that d.c. branch breakers are sold in below the standard list, which 240.6(A) allows besides.
///
/// # Source
///
/// [`source::COMMON_PRACTICE`]: 12 V branch circuits stand on 5 to 15 A breakers.
pub const SMALL_DIRECT: [f64; 1] = [5.0];

/// Preferred ratings of circuit-breakers, in amperes; 8 A is also listed (from memory).
///
/// # Source
///
/// [`source::IEC_60898`], 5.3.2.
pub const IEC_BREAKERS: [f64; 13] = [6.0, 10.0, 13.0, 16.0, 20.0, 25.0, 32.0, 40.0, 50.0, 63.0, 80.0, 100.0, 125.0];

/// Also listed for circuit-breakers, from memory; not offered.
pub const IEC_BREAKERS_ALSO_LISTED: [f64; 1] = [8.0];

/// Preferred ratings of fuse-links, in amperes. Moulded-case breakers above 125 A follow the same series.
///
/// # Source
///
/// [`source::IEC_60269`], 5.3.1 (from memory).
pub const IEC_FUSES: [f64; 26] = [
    2.0, 4.0, 6.0, 8.0, 10.0, 12.0, 16.0, 20.0, 25.0, 32.0, 40.0, 50.0, 63.0, 80.0, 100.0, 125.0, 160.0, 200.0, 250.0,
    315.0, 400.0, 500.0, 630.0, 800.0, 1000.0, 1250.0,
];

/// Breakers as the IEC trade sells them: small ones by IEC 60898, moulded-case ones above.
const IEC_BREAKERS_AND_ABOVE: [f64; 23] = [
    6.0, 10.0, 13.0, 16.0, 20.0, 25.0, 32.0, 40.0, 50.0, 63.0, 80.0, 100.0, 125.0, 160.0, 200.0, 250.0, 315.0, 400.0,
    500.0, 630.0, 800.0, 1000.0, 1250.0,
];

/// Ratings offered for d.c. branch circuits in North America.
const NORTH_AMERICAN_DIRECT_BRANCH: [f64; 39] = {
    let mut all = [SMALL_DIRECT[0]; 39];
    let mut i = 0;
    while i < NORTH_AMERICAN.len() {
        all[i + 1] = NORTH_AMERICAN[i];
        i += 1;
    }
    all
};

/// What a device is.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Device {
    /// A breaker.
    #[default]
    Breaker,
    /// A fuse-link; in PV circuits of class gPV.
    Fuse,
}

/// The ratings that a device is sold in.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Series {
    /// Rising, in amperes.
    ratings: &'static [f64],
    /// Where they are from.
    pub clause: Clause,
}

impl Series {
    /// The series of a family. Branch circuits on direct current begin lower in North America.
    #[must_use]
    pub const fn of(family: CodeFamily, device: Device, direct_branch: DirectBranch) -> Self {
        match (family, device, direct_branch) {
            (CodeFamily::NorthAmerica, _, DirectBranch::Yes) => Self {
                ratings: &NORTH_AMERICAN_DIRECT_BRANCH,
                clause: source::NEC.at("Table 240.6(A); 5 A by common practice"),
            },
            (CodeFamily::NorthAmerica, _, DirectBranch::No) => {
                Self { ratings: &NORTH_AMERICAN, clause: source::NEC.at("Table 240.6(A)") }
            }
            (CodeFamily::Iec, Device::Breaker, _) => Self {
                ratings: &IEC_BREAKERS_AND_ABOVE,
                clause: source::IEC_60898.at("5.3.2; above 125 A the series of IEC 60269-1"),
            },
            (CodeFamily::Iec, Device::Fuse, _) => {
                Self { ratings: &IEC_FUSES, clause: source::IEC_60269.at("5.3.1, preferred ratings") }
            }
        }
    }

    /// The smallest that is not below `current`. `None` past the end.
    #[must_use]
    pub fn at_least(self, current: Amps) -> Option<Amps> {
        // 1.25 · 40 A must find 50 A, whatever the last bit says.
        let least = current.get() * (1.0 - 1e-9);
        let at = self.ratings.partition_point(|rating| *rating < least);
        self.ratings.get(at).copied().map(Amps::new)
    }

    /// The ratings, rising.
    pub fn ratings(self) -> impl Iterator<Item = Amps> {
        self.ratings.iter().copied().map(Amps::new)
    }
}

/// Whether a circuit is a branch on direct current.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum DirectBranch {
    /// It is.
    Yes,
    /// It is not.
    No,
}

/// Multiple of its rating at which a device does not open within the conventional time.
///
/// # Source
///
/// [`source::IEC_60898`], 8.6; [`source::IEC_60269_6`] for gPV fuse-links.
pub const NOT_OPENING: f64 = 1.13;

/// Multiple of its rating at which a device opens within the conventional time: I₂ / In.
///
/// # Source
///
/// As [`NOT_OPENING`].
pub const OPENING: f64 = 1.45;

/// Least d.c. breaking capacity of a gPV fuse-link.
///
/// # Source
///
/// [`source::IEC_60269_6`] (from memory).
pub const GPV_LEAST_BREAKING: Amps = Amps::new(10_000.0);

/// Conventional time of a breaker: in it the device opens at [`OPENING`] times its rating.
///
/// # Source
///
/// [`source::IEC_60898`], table 7 (from memory).
#[must_use]
pub fn breaker_conventional_time(rating: Amps) -> Hours {
    Hours::new(if rating.get() <= 63.0 { 1.0 } else { 2.0 })
}

/// Conventional time of a fuse-link.
///
/// # Source
///
/// [`source::IEC_60269`] (from memory).
#[must_use]
pub fn fuse_conventional_time(rating: Amps) -> Hours {
    Hours::new(match rating.get() {
        to_63 if to_63 <= 63.0 => 1.0,
        to_160 if to_160 <= 160.0 => 2.0,
        to_400 if to_400 <= 400.0 => 3.0,
        _ => 4.0,
    })
}

/// Instantaneous tripping of an IEC breaker: letter, does not trip at, trips at, in multiples of its rating.
///
/// For alternating current; on direct current a breaker not made for it may trip at up to 1.4 times these (from memory).
///
/// # Source
///
/// [`source::IEC_60898`], table 7.
pub const BANDS: [(&str, f64, f64); 3] = [("B", 3.0, 5.0), ("C", 5.0, 10.0), ("D", 10.0, 20.0)];

/// Interrupting ratings that devices for direct current are sold in.
///
/// # Source
///
/// All from memory; the rating marked on the device at its d.c. volts is what counts.
pub mod interrupting {
    /// Moulded-case breakers of the North American trade, in kA.
    pub const MOULDED_CASE: [f64; 14] =
        [5.0, 7.5, 10.0, 14.0, 18.0, 22.0, 25.0, 30.0, 35.0, 42.0, 50.0, 65.0, 85.0, 100.0];
    /// Small breakers for direct current, IEC 60898-3, in kA.
    pub const SMALL_DIRECT: [f64; 5] = [1.5, 3.0, 4.5, 6.0, 10.0];
    /// Small breakers, IEC 60898-1, in kA.
    pub const SMALL: [f64; 8] = [1.5, 3.0, 4.5, 6.0, 10.0, 15.0, 20.0, 25.0];
    /// gPV fuse-links, in kA.
    pub const GPV: [f64; 1] = [10.0];
    /// Current-limiting fuses listed for direct current, in kA.
    pub const FUSES: [f64; 6] = [10.0, 20.0, 50.0, 100.0, 150.0, 200.0];
    /// Service capacity of an industrial breaker as percent of its ultimate one, IEC 60947-2.
    pub const SERVICE_PERCENT: [f64; 4] = [25.0, 50.0, 75.0, 100.0];
}

/// The rule that lets a conductor stand on the next standard device above its ampacity holds to this rating.
///
/// # Source
///
/// [`source::NEC`], 240.4(B).
pub const NEXT_SIZE_UP_TO: Amps = Amps::new(800.0);

/// Factor on loads that run three hours or more.
///
/// # Source
///
/// [`source::NEC`], 210.20(A), 215.3.
pub const CONTINUOUS: f64 = 1.25;

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_series_rises() {
        for series in [
            &NORTH_AMERICAN[..],
            &NORTH_AMERICAN_DIRECT_BRANCH,
            &NORTH_AMERICAN_FUSES_BEFORE_2023,
            &IEC_BREAKERS,
            &IEC_FUSES,
            &IEC_BREAKERS_AND_ABOVE,
            &interrupting::MOULDED_CASE,
            &interrupting::SMALL,
            &interrupting::SMALL_DIRECT,
            &interrupting::FUSES,
        ] {
            assert!(series.is_sorted_by(|a, b| a < b));
        }
        assert_eq!(IEC_BREAKERS_AND_ABOVE[..13], IEC_BREAKERS);
        assert!(IEC_BREAKERS_AND_ABOVE[13..].iter().all(|rating| IEC_FUSES.contains(rating)));
    }

    #[test]
    fn the_next_standard_rating() {
        let american = Series::of(CodeFamily::NorthAmerica, Device::Breaker, DirectBranch::No);
        assert_eq!(american.at_least(Amps::new(1.25 * 40.0)), Some(Amps::new(50.0)));
        assert_eq!(american.at_least(Amps::new(50.1)), Some(Amps::new(60.0)));
        assert_eq!(american.at_least(Amps::new(7000.0)), None);
        let iec = Series::of(CodeFamily::Iec, Device::Fuse, DirectBranch::No);
        assert_eq!(iec.at_least(Amps::new(15.9)), Some(Amps::new(16.0)));
    }
}
