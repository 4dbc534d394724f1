//! What a layout costs: what counts, and how much.
//!
//! Four things, each only decides where those above it are equal:
//!
//! 1. links that pass over another post, or cross: none, wherever that can be had;
//! 2. take-off posts that stand elsewhere than wanted;
//! 3. strings whose own two take-off posts stand under one wrench;
//! 4. copper: the sum of the links from hole to hole, and for every further length to cut as much again as the
//!    shelf's shorter pitch (*chosen*: one drilling template more is worth about one short link).

/// Two posts nearer than this can be bridged by one tool. *Chosen*: a common 24 mm spanner is 0.25 to 0.3 m long.
pub(super) const WRENCH_MM: f64 = 250.0;

/// A link is taken as this far on either side of its middle line. *Chosen*: half of a 20 mm bar.
pub(super) const HALF_LINK_MM: f64 = 10.0;

/// What a layout costs, most weighty first.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord)]
pub struct Cost {
    /// Places where a link passes over a post that it does not join, or over another link.
    pub over_posts: u32,
    /// Take-off posts that stand elsewhere than wanted.
    pub take_off_missed: u32,
    /// Strings whose first and last cell are neighbours, or whose take-off posts are within one wrench.
    pub under_one_wrench: u32,
    /// Links from hole to hole, and the charge for further lengths, in millionths of a metre.
    pub copper: u64,
}

/// A set of lengths to cut, as bits.
pub(super) type Lengths = u128;

/// What may still be open while a layout is being built.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub(super) struct Partial {
    pub over_posts: u32,
    pub under_one_wrench: u32,
    pub micrometres: u64,
    pub lengths: Lengths,
}

impl Partial {
    /// Whether this is no worse than `other`, whatever follows: even if each length that only this one has stayed
    /// a length more in the end.
    pub(super) fn at_least_as_good(&self, other: &Self, charge: u64) -> bool {
        let grave = |p: &Self| (p.over_posts, p.under_one_wrench);
        let own = u64::from((self.lengths & !other.lengths).count_ones());
        grave(self) < grave(other)
            || grave(self) == grave(other) && self.micrometres + own * charge <= other.micrometres
    }

    /// The cost, where `more_lengths` lengths and `more` micrometres still come at least.
    pub(super) fn cost(&self, take_off_missed: u32, more: u64, more_lengths: u32, charge: u64) -> Cost {
        let further = (self.lengths.count_ones() + more_lengths).saturating_sub(1);
        Cost {
            over_posts: self.over_posts,
            take_off_missed,
            under_one_wrench: self.under_one_wrench,
            copper: self.micrometres + more + u64::from(further) * charge,
        }
    }
}
