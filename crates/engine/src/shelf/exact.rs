//! Branch and bound over the ways through the shelf.
//!
//! Takes places one after the other, each a neighbour of the last one, and turns back as soon as the least that must
//! still come makes the best layout known unbeatable, or places would be left that no string can reach.
//! Its end is a proof that no layout with links between neighbours costs less. It counts what it does instead of
//! looking at a clock, so that the same shelf gives the same answer on every machine.

use super::cost::{Cost, Partial};
use super::ground::{Ground, Joint};
use super::turns::{Walk, Walked};

/// The most places it is tried on: one bit each.
pub(super) const MOST_PLACES: usize = 64;

/// Whether the search came to its end.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Ended {
    /// It did: nothing costs less.
    Proven,
    /// Its share of work was used up.
    OutOfWork,
}

struct Search<'a> {
    ground: &'a Ground,
    walk: Walk<'a>,
    best: Walked,
    /// When to give up, in parts looked at.
    work: u64,
    /// Bit sets by row and by column.
    lines: [Vec<u64>; 2],
    near: Vec<u64>,
    free: u64,
    all_are_used: bool,
}

/// Betters `best` as far as `work` reaches.
pub(super) fn better(ground: &Ground, best: Walked, work: u64) -> (Walked, Ended) {
    if ground.places > MOST_PLACES {
        return (best, Ended::OutOfWork);
    }
    let mut lines = [vec![0; ground.rows], vec![0; ground.columns]];
    for place in 0..ground.places {
        lines[0][place / ground.columns] |= 1 << place;
        lines[1][place % ground.columns] |= 1 << place;
    }
    let near = ground.neighbours.iter().map(|n| n.iter().flatten().fold(0, |set, &p| set | 1 << p)).collect();
    let mut search = Search {
        ground,
        walk: Walk::new(ground),
        best,
        work,
        lines,
        near,
        free: if ground.places == 64 { u64::MAX } else { (1 << ground.places) - 1 },
        all_are_used: ground.joints.len() == ground.places,
    };
    let ended = search.go_on();
    (search.best, ended)
}

impl Search<'_> {
    fn go_on(&mut self) -> Ended {
        let done = self.walk.places().len();
        if done == self.ground.joints.len() {
            if let Some(found) = self.walk.finish().filter(|found| found.cost < self.best.cost) {
                self.best = found;
            }
            return Ended::Proven;
        }
        let head = self.walk.places().last().copied();
        let apart = self.ground.joints[done] == Joint::Apart;
        let mut candidates = match head {
            Some(head) if !apart => self.near[head] & self.free,
            // Strings are alike: they are numbered in the order of their first places.
            Some(_) => self.free & !self.up_to(self.walk.places()[done - self.ground.chain_length]),
            None => self.free,
        };
        let mut order: Vec<(u64, u32, usize)> = Vec::with_capacity(4);
        while candidates != 0 {
            let place = candidates.trailing_zeros() as usize;
            candidates &= candidates - 1;
            let link = match head {
                Some(head) if !apart => self.cheapest(head, place),
                _ => 0,
            };
            order.push((link, (self.near[place] & self.free).count_ones(), place));
        }
        crate::order::sort_short(&mut order, Ord::cmp);
        for (_, _, place) in order {
            if self.walk.work() > self.work {
                return Ended::OutOfWork;
            }
            if self.take(place) {
                let ended = self.go_on();
                self.walk.pop();
                self.free |= 1 << place;
                if ended == Ended::OutOfWork {
                    return ended;
                }
            }
        }
        Ended::Proven
    }

    const fn up_to(&self, place: usize) -> u64 {
        u64::MAX >> (63 - place)
    }

    fn cheapest(&self, from: usize, to: usize) -> u64 {
        let joint = self.ground.joints[self.walk.places().len()];
        let Some(way) = self.ground.way(from, to) else { return u64::MAX };
        let turns = self.ground.turns;
        turns
            .iter()
            .flat_map(|&a| turns.iter().map(move |&b| (a, b)))
            .map(|(a, b)| self.ground.edge(joint, way, a, b).micrometres)
            .min()
            .unwrap_or(u64::MAX)
    }

    /// Takes a place, unless that is hopeless; then nothing is changed.
    fn take(&mut self, place: usize) -> bool {
        let free = self.free & !(1 << place);
        let done = self.walk.places().len() + 1;
        if self.all_are_used && done < self.ground.joints.len() && !self.can_be_filled(free, place, done) {
            return false;
        }
        let [rowwise, columnwise] = self.forced(free, place, done);
        let more = self.ground.least_to_come(done, rowwise, columnwise);
        let (ground, best): (&Ground, Cost) = (self.ground, self.best.cost);
        let hopeless = |partial: &Partial, missed: u32| {
            let lengths = ground.lengths_to_come(rowwise, columnwise, partial.lengths);
            partial.cost(missed, more, lengths, ground.charge) >= best
        };
        let taken = self.walk.push(place, hopeless);
        if taken {
            self.free = free;
        }
        taken
    }

    /// How many links must still run within a row, and how many from row to row: every column and every row that
    /// has free places and is not the last place's has to be entered, by a link or by a new string.
    fn forced(&self, free: u64, head: usize, done: usize) -> [u64; 2] {
        if !self.all_are_used || done >= self.ground.joints.len() {
            return [0, 0];
        }
        let new_strings = self.ground.joints[done..].iter().filter(|&&j| j == Joint::Apart).count() as u64;
        let head = if self.ground.joints[done] == Joint::Apart { 0 } else { 1 << head };
        let entered = |lines: &[u64]| {
            let waiting = lines.iter().filter(|&&line| line & free != 0 && line & head == 0).count() as u64;
            waiting.saturating_sub(new_strings)
        };
        [entered(&self.lines[1]), entered(&self.lines[0])]
    }

    /// Whether the free places can still be filled by the rest of this string and whole further strings.
    fn can_be_filled(&self, free: u64, head: usize, done: usize) -> bool {
        let chain = self.ground.chain_length;
        let rest = (chain - done % chain) % chain;
        let mut loose = free;
        let mut head_goes_on = rest == 0;
        while loose != 0 {
            let part = self.flood(loose);
            loose &= !part;
            let size = part.count_ones() as usize;
            if size.is_multiple_of(chain) {
                continue;
            }
            if head_goes_on || self.near[head] & part == 0 || size % chain != rest {
                return false;
            }
            head_goes_on = true;
        }
        // A string that spans everything has one end: more than one dead end cannot be served.
        if self.ground.joints.len() == chain {
            let reach = free | 1 << head;
            let mut dead_ends = 0;
            let mut each = free;
            while each != 0 {
                let place = each.trailing_zeros() as usize;
                each &= each - 1;
                dead_ends += u32::from((self.near[place] & reach).count_ones() <= 1);
                if dead_ends > 1 {
                    return false;
                }
            }
        }
        true
    }

    fn flood(&self, within: u64) -> u64 {
        let mut part = within & within.wrapping_neg();
        let mut edge = part;
        while edge != 0 {
            let mut grown = 0;
            while edge != 0 {
                grown |= self.near[edge.trailing_zeros() as usize];
                edge &= edge - 1;
            }
            edge = grown & within & !part;
            part |= edge;
        }
        part
    }
}
