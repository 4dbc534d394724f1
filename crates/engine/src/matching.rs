//! Matching: measured capacities dealt to parallel groups of equal count, so that the groups differ least.
//!
//! Groups in series carry the same charge, so the least group bounds the bank. What is made small is the spread:
//! greatest group less least group.
//!
//! Up to [`EXACT_UP_TO`] cells every deal is looked at. Above, the largest differencing method of Karmarkar and Karp
//! in its form for equal counts is followed by exchanging cells in pairs.
//!
//! # Source
//!
//! [`crate::source::KARMARKAR_KARP`]; the form for equal counts from memory.

use crate::order::sort_short;
use crate::quantity::{AmpHours, Percent};

/// Up to so many cells the deal is the best there is. The most deals to look at are then 15 400, for four groups of three.
pub const EXACT_UP_TO: usize = 12;

/// Why no deal was made.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub enum MatchingError {
    /// No group.
    NoGroups,
    /// Fewer cells than groups.
    TooFewCells {
        /// Cells measured.
        cells: usize,
        /// Groups wanted.
        groups: usize,
    },
    /// A capacity is not above zero.
    NotACapacity {
        /// Which in the list, from 1.
        number: usize,
        /// What was given.
        given: AmpHours,
    },
}

impl core::fmt::Display for MatchingError {
    fn fmt(&self, f: &mut core::fmt::Formatter<'_>) -> core::fmt::Result {
        match self {
            Self::NoGroups => write!(f, "a bank needs a group"),
            Self::TooFewCells { cells, groups } => write!(f, "{cells} cells do not fill {groups} groups"),
            Self::NotACapacity { number, given } => write!(f, "cell {number}: {} Ah is not a capacity", given.get()),
        }
    }
}

impl core::error::Error for MatchingError {}

/// One parallel group.
#[derive(Clone, Debug, PartialEq)]
pub struct Group {
    /// Its cells, by their place in the list, from 0, rising.
    pub cells: Vec<usize>,
    /// What they hold together.
    pub capacity: AmpHours,
}

/// Cells dealt to groups.
#[derive(Clone, Debug, PartialEq)]
pub struct Deal {
    /// The groups; each has the same number of cells.
    pub groups: Vec<Group>,
    /// Cells left over because the count does not divide: the least ones, by their place in the list.
    pub spare: Vec<usize>,
    /// Greatest group less least group.
    pub spread: AmpHours,
    /// The same cells dealt in the order listed, one to each group in turn.
    pub naive_spread: AmpHours,
    /// Whether no deal is better.
    pub exact: bool,
}

impl Deal {
    /// What the bank holds: its least group.
    #[must_use]
    pub fn least(&self) -> AmpHours {
        self.groups.iter().map(|g| g.capacity).reduce(AmpHours::min).unwrap_or_default()
    }

    /// The spread as a part of the mean group.
    #[must_use]
    pub fn spread_of_mean(&self) -> Percent {
        let all: AmpHours = self.groups.iter().map(|g| g.capacity).sum();
        Percent::from_share(self.spread * (self.groups.len() as f64) / all)
    }
}

/// Deals `capacities` to `groups` groups of equal count.
///
/// Never worse than dealing in the order listed.
///
/// # Errors
///
/// [`MatchingError`].
///
/// # Example
///
/// ```
/// use engine::matching::deal;
/// use engine::quantity::AmpHours;
///
/// let measured = [100.0, 90.0, 80.0, 70.0].map(AmpHours::new);
/// let deal = deal(&measured, 2)?;
/// assert_eq!(deal.spread, AmpHours::new(0.0));          // 100 + 70 and 90 + 80
/// assert_eq!(deal.naive_spread, AmpHours::new(20.0));   // 100 + 80 and 90 + 70
/// # Ok::<(), engine::matching::MatchingError>(())
/// ```
pub fn deal(capacities: &[AmpHours], groups: usize) -> Result<Deal, MatchingError> {
    if groups == 0 {
        return Err(MatchingError::NoGroups);
    }
    if capacities.len() < groups {
        return Err(MatchingError::TooFewCells { cells: capacities.len(), groups });
    }
    for (number, &given) in (1..).zip(capacities) {
        if !(given.get() > 0.0 && given.get().is_finite()) {
            return Err(MatchingError::NotACapacity { number, given });
        }
    }
    let mut falling: Vec<usize> = (0..capacities.len()).collect();
    sort_short(&mut falling, |&a, &b| capacities[b].get().total_cmp(&capacities[a].get()));
    let used = capacities.len() / groups * groups;
    let mut spare = falling.split_off(used);
    sort_short(&mut spare, Ord::cmp);

    let size = |cell: usize| capacities[cell].get();
    let naive = in_turn((0..capacities.len()).filter(|cell| !spare.contains(cell)), groups);
    let naive_spread = spread(&naive, size);
    let exact = used <= EXACT_UP_TO;
    let dealt = if exact {
        best_of_all(&falling, groups, size)
    } else {
        let differenced = exchanged(differenced(&falling, groups, size), size);
        let from_naive = exchanged(naive, size);
        if spread(&from_naive, size) < spread(&differenced, size) { from_naive } else { differenced }
    };
    let groups = dealt
        .iter()
        .map(|cells| {
            let mut cells = cells.clone();
            sort_short(&mut cells, Ord::cmp);
            let capacity = cells.iter().map(|&cell| capacities[cell]).sum();
            Group { cells, capacity }
        })
        .collect();
    let spread = AmpHours::new(spread(&dealt, size));
    Ok(Deal { groups, spare, spread, naive_spread: AmpHours::new(naive_spread), exact })
}

type Groups = Vec<Vec<usize>>;

fn in_turn(cells: impl Iterator<Item = usize>, groups: usize) -> Groups {
    let mut dealt = vec![Vec::new(); groups];
    for (turn, cell) in cells.enumerate() {
        dealt[turn % groups].push(cell);
    }
    dealt
}

fn sums(dealt: &[Vec<usize>], size: impl Fn(usize) -> f64) -> Vec<f64> {
    // Summed in the order of the list, so that equal groups have equal sums to the last bit.
    let sum = |cells: &Vec<usize>| {
        let mut cells = cells.clone();
        sort_short(&mut cells, Ord::cmp);
        cells.into_iter().map(&size).sum()
    };
    dealt.iter().map(sum).collect()
}

fn range(sums: &[f64]) -> f64 {
    let most = sums.iter().copied().fold(f64::NEG_INFINITY, f64::max);
    let least = sums.iter().copied().fold(f64::INFINITY, f64::min);
    most - least
}

fn spread(dealt: &[Vec<usize>], size: impl Fn(usize) -> f64) -> f64 {
    range(&sums(dealt, size))
}

/// A part of a deal: as many sets as there are groups, greatest sum first.
struct Part {
    sets: Vec<(f64, Vec<usize>)>,
}

impl Part {
    fn sorted(mut sets: Vec<(f64, Vec<usize>)>) -> Self {
        sort_short(&mut sets, |a, b| b.0.total_cmp(&a.0));
        Self { sets }
    }

    fn difference(&self) -> f64 {
        match (self.sets.first(), self.sets.last()) {
            (Some(most), Some(least)) => most.0 - least.0,
            _ => 0.0,
        }
    }
}

/// Balanced largest differencing: cells fall into tuples, one for each group; the two parts that differ most are
/// joined, greatest to least, until one part is left.
fn differenced(falling: &[usize], groups: usize, size: impl Fn(usize) -> f64) -> Groups {
    let mut parts: Vec<Part> =
        falling.chunks(groups).map(|tuple| Part::sorted(tuple.iter().map(|&c| (size(c), vec![c])).collect())).collect();
    while parts.len() > 1 {
        sort_short(&mut parts, |a, b| a.difference().total_cmp(&b.difference()));
        let (Some(one), Some(other)) = (parts.pop(), parts.pop()) else { break };
        let joined = one.sets.into_iter().zip(other.sets.into_iter().rev()).map(|((a, mut cells), (b, more))| {
            cells.extend(more);
            (a + b, cells)
        });
        parts.push(Part::sorted(joined.collect()));
    }
    parts.pop().map_or_else(|| vec![Vec::new(); groups], |part| part.sets.into_iter().map(|(_, cells)| cells).collect())
}

/// Exchanges one cell for another, always the pair of cells that brings the greatest or the least group nearest to
/// the other group of the pair, as long as that makes the spread less, or leaves it and makes the groups more alike.
fn exchanged(mut dealt: Groups, size: impl Fn(usize) -> f64) -> Groups {
    let mut sums = sums(&dealt, &size);
    let unevenness = |sums: &[f64]| {
        let mean = sums.iter().sum::<f64>() / sums.len() as f64;
        sums.iter().map(|s| (s - mean).powi(2)).sum::<f64>()
    };
    // Each exchange lowers the unevenness; the bound only guards against rounding.
    for _ in 0..64 * dealt.len() {
        let extreme = |sign: f64| (0..sums.len()).max_by(|&a, &b| (sign * sums[a]).total_cmp(&(sign * sums[b])));
        let (Some(most), Some(least)) = (extreme(1.0), extreme(-1.0)) else { break };
        let was = (range(&sums), unevenness(&sums));
        let mut best: Option<((f64, f64), [usize; 4])> = None;
        for (one, other) in (0..sums.len()).flat_map(|g| [(most, g), (least, g)]) {
            if one == other {
                continue;
            }
            for (i, &a) in dealt[one].iter().enumerate() {
                for (j, &b) in dealt[other].iter().enumerate() {
                    let moved = size(a) - size(b);
                    // An exchange helps only if it moves charge downhill, and less than the whole difference.
                    let gap = sums[one] - sums[other];
                    if moved * gap <= 0.0 || moved.abs() >= gap.abs() {
                        continue;
                    }
                    let mut tried = sums.clone();
                    tried[one] -= moved;
                    tried[other] += moved;
                    let now = (range(&tried), unevenness(&tried));
                    let beats = |than: (f64, f64)| now.0 < than.0 || now.0 == than.0 && now.1 < than.1;
                    if beats(was) && best.is_none_or(|(than, _)| beats(than)) {
                        best = Some((now, [one, i, other, j]));
                    }
                }
            }
        }
        let Some((_, [one, i, other, j])) = best else { break };
        let (a, b) = (dealt[one][i], dealt[other][j]);
        dealt[one][i] = b;
        dealt[other][j] = a;
        sums[one] += size(b) - size(a);
        sums[other] += size(a) - size(b);
    }
    dealt
}

/// Looks at every deal. Groups are alike, so a cell opens no second empty group.
fn best_of_all(cells: &[usize], groups: usize, size: impl Fn(usize) -> f64) -> Groups {
    struct Search<'a, F> {
        cells: &'a [usize],
        each: usize,
        size: F,
        now: Groups,
        best: Groups,
        least: f64,
    }
    impl<F: Fn(usize) -> f64> Search<'_, F> {
        fn place(&mut self, i: usize) {
            let Some(&cell) = self.cells.get(i) else {
                let spread = spread(&self.now, &self.size);
                if spread < self.least {
                    self.least = spread;
                    self.best.clone_from(&self.now);
                }
                return;
            };
            for group in 0..self.now.len() {
                let held = self.now[group].len();
                if held < self.each {
                    self.now[group].push(cell);
                    self.place(i + 1);
                    self.now[group].pop();
                }
                if held == 0 {
                    break;
                }
            }
        }
    }
    let start = in_turn(cells.iter().copied(), groups);
    let each = cells.len() / groups;
    let least = spread(&start, &size);
    let mut search = Search { cells, each, size, now: vec![Vec::new(); groups], best: start, least };
    search.place(0);
    search.best
}
