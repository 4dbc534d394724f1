//! The shelf as the search sees it: tables of what each link between neighbouring places costs. Numbers in millimetres.
//!
//! Links join neighbours in a row or a column only. Such a link lies in the rectangle around its two places, so two
//! links can only meet where they share a cell; that makes crossing a matter of two following links.

use super::board::Shelf;
use super::cell::{Pole, Turn};
use super::cost::{HALF_LINK_MM, Lengths, Partial, WRENCH_MM};
use super::wiring::{TakeOff, Wiring};

type Point = (f64, f64);

/// How two cells that follow one another are joined.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Joint {
    /// Plus of the one to minus of the next.
    Series = 0,
    /// Plus to plus and minus to minus.
    Parallel = 1,
    /// Not at all: a new string begins.
    Apart = 2,
}

impl Joint {
    /// The links, each from a pole of the one cell to a pole of the next.
    pub(super) const fn links(self) -> &'static [(Pole, Pole)] {
        match self {
            Self::Series => &[(Pole::Plus, Pole::Minus)],
            Self::Parallel => &[(Pole::Minus, Pole::Minus), (Pole::Plus, Pole::Plus)],
            Self::Apart => &[],
        }
    }
}

/// Neighbour to the right, in front, to the left, behind.
pub(super) const WAYS: [(i32, i32); 4] = [(0, 1), (1, 0), (0, -1), (-1, 0)];

#[derive(Clone, Copy, Debug, Default)]
pub(super) struct Edge {
    pub micrometres: u64,
    pub lengths: Lengths,
    pub over_posts: u32,
}

/// Everything the search asks, worked out beforehand.
pub(super) struct Ground {
    pub columns: usize,
    pub rows: usize,
    pub places: usize,
    pub turns: &'static [Turn],
    /// How cell `i` is joined to the one before it.
    pub joints: Vec<Joint>,
    pub chain_length: usize,
    pub take_off: TakeOff,
    /// What one further length to cut counts as, in micrometres.
    pub charge: u64,
    /// By place and way.
    pub neighbours: Vec<[Option<u16>; 4]>,
    /// `post[turn][pole]`, from the middle of the cell.
    post: [[Point; 2]; 4],
    pitch: Point,
    edges: Vec<Edge>,
    corners: Vec<u8>,
    /// The least that the joints from a cell on must take, were each free to run either way.
    to_come: Vec<u64>,
    /// What a joint takes more, at the least, where it must run in the row (0) or from row to row (1).
    dearer: [u64; 2],
    /// Lengths that occur by row (0) or column (1).
    occurring: [Lengths; 2],
}

const fn edge_at(joint: Joint, way: usize, from: Turn, to: Turn) -> usize {
    ((joint as usize * 4 + way) * 4 + from as usize) * 4 + to as usize
}

impl Ground {
    pub(super) fn new(shelf: &Shelf, wiring: &Wiring, cells: u32, take_off: TakeOff) -> Self {
        let (columns, rows) = (shelf.columns() as usize, shelf.rows() as usize);
        let pitch = (shelf.pitch_in_row().get() * 1e3, shelf.pitch_of_rows().get() * 1e3);
        let chain_length = wiring.chain_length() as usize;
        let in_group = wiring.in_group() as usize;
        let joints = (0..cells as usize)
            .map(|i| match i {
                _ if i % chain_length == 0 => Joint::Apart,
                _ if i % in_group == 0 => Joint::Series,
                _ => Joint::Parallel,
            })
            .collect();
        let post = Turn::ALL.map(|turn| {
            [Pole::Plus, Pole::Minus].map(|pole| {
                let spot = shelf.cell().post(pole, turn);
                (spot.across.get() * 1e3, spot.forward.get() * 1e3)
            })
        });
        let neighbours = (0..rows * columns)
            .map(|place| {
                WAYS.map(|(down, right)| {
                    let row = (place / columns).checked_add_signed(down as isize).filter(|&r| r < rows)?;
                    let column = (place % columns).checked_add_signed(right as isize).filter(|&c| c < columns)?;
                    u16::try_from(row * columns + column).ok()
                })
            })
            .collect();
        let mut ground = Self {
            columns,
            rows,
            places: rows * columns,
            turns: shelf.stand().turns(),
            joints,
            chain_length,
            take_off,
            charge: (pitch.0.min(pitch.1) * 1e3).round() as u64,
            neighbours,
            post,
            pitch,
            edges: vec![Edge::default(); 2 * 4 * 4 * 4],
            corners: vec![0; 8 * 8 * 4 * 4 * 4],
            to_come: Vec::new(),
            dearer: [0; 2],
            occurring: [0; 2],
        };
        ground.measure_edges();
        ground.measure_corners();
        ground
    }

    fn post_at(&self, way: Option<usize>, turn: Turn, pole: Pole) -> Point {
        let (down, right) = way.map_or((0, 0), |way| WAYS[way]);
        let (x, y) = self.post[turn as usize][pole as usize];
        (f64::from(right) * self.pitch.0 + x, f64::from(down) * self.pitch.1 + y)
    }

    fn measure_edges(&mut self) {
        // Lengths that are cut alike share a bit: to the millimetre.
        let mut known: Vec<u64> = Vec::new();
        let mut least = [[u64::MAX; 2]; 2];
        for joint in [Joint::Series, Joint::Parallel] {
            for way in 0..4 {
                for &from in self.turns {
                    for &to in self.turns {
                        let edge = self.measure_edge(joint, way, from, to, &mut known);
                        let least = &mut least[joint as usize][way % 2];
                        *least = (*least).min(edge.micrometres);
                        if self.joints.contains(&joint) {
                            self.occurring[way % 2] |= edge.lengths;
                        }
                        self.edges[edge_at(joint, way, from, to)] = edge;
                    }
                }
            }
        }
        let joined = |joint: &Joint| (*joint != Joint::Apart).then(|| least[*joint as usize]);
        let dearer = |this: usize, that: usize| {
            self.joints.iter().filter_map(joined).map(|l| l[this].saturating_sub(l[that])).min().unwrap_or(0)
        };
        self.dearer = [dearer(0, 1), dearer(1, 0)];
        let mut to_come = vec![0];
        let mut sum = 0;
        for joint in self.joints.iter().rev() {
            sum += joined(joint).map_or(0, |[row, column]| row.min(column));
            to_come.push(sum);
        }
        to_come.reverse();
        self.to_come = to_come;
    }

    fn measure_edge(&self, joint: Joint, way: usize, from: Turn, to: Turn, known: &mut Vec<u64>) -> Edge {
        let mut edge = Edge::default();
        let segments: Vec<(Point, Point)> =
            joint.links().iter().map(|&(a, b)| (self.post_at(None, from, a), self.post_at(Some(way), to, b))).collect();
        for &(a, b) in &segments {
            let length = (b.0 - a.0).hypot(b.1 - a.1);
            edge.micrometres += (length * 1e3).round() as u64;
            let cut = length.round() as u64;
            let bit = known.iter().position(|&l| l == cut).unwrap_or_else(|| {
                known.push(cut);
                known.len() - 1
            });
            // At most 96 lengths occur: two joints, three links, two ways, sixteen pairs of turns.
            edge.lengths |= 1 << bit.min(127);
            for pole in [Pole::Plus, Pole::Minus] {
                for post in [self.post_at(None, from, pole), self.post_at(Some(way), to, pole)] {
                    if post != a && post != b && distance_to(post, a, b) < HALF_LINK_MM {
                        edge.over_posts += 1;
                    }
                }
            }
        }
        if let [one, other] = segments[..] {
            edge.over_posts += u32::from(cross(one, other));
        }
        edge
    }

    /// Two following joints at one cell: how many of their links cross.
    fn measure_corners(&mut self) {
        let joints = [Joint::Series, Joint::Parallel];
        for first in joints {
            for second in joints {
                for (way_in, way_out) in (0..16).map(|w| (w / 4, w % 4)) {
                    // Out by the way one came would be the same cell.
                    if (way_in + 2) % 4 == way_out {
                        continue;
                    }
                    for &before in self.turns {
                        for &here in self.turns {
                            for &after in self.turns {
                                let back = Some((way_in + 2) % 4);
                                let mut crossings = 0;
                                for &(a, b) in first.links() {
                                    let one = (self.post_at(back, before, a), self.post_at(None, here, b));
                                    for &(c, d) in second.links() {
                                        let other =
                                            (self.post_at(None, here, c), self.post_at(Some(way_out), after, d));
                                        crossings += u8::from(cross(one, other));
                                    }
                                }
                                let at = self.corner_at((first, way_in), (second, way_out), [before, here, after]);
                                self.corners[at] = crossings;
                            }
                        }
                    }
                }
            }
        }
    }

    const fn corner_at(&self, came: (Joint, usize), goes: (Joint, usize), turns: [Turn; 3]) -> usize {
        let came = came.0 as usize * 4 + came.1;
        let goes = goes.0 as usize * 4 + goes.1;
        (((came * 8 + goes) * 4 + turns[0] as usize) * 4 + turns[1] as usize) * 4 + turns[2] as usize
    }

    pub(super) fn edge(&self, joint: Joint, way: usize, from: Turn, to: Turn) -> &Edge {
        &self.edges[edge_at(joint, way, from, to)]
    }

    pub(super) fn corner(&self, came: (Joint, usize), goes: (Joint, usize), turns: [Turn; 3]) -> u32 {
        u32::from(self.corners[self.corner_at(came, goes, turns)])
    }

    /// Which way `to` lies from `from`, where they are neighbours.
    pub(super) fn way(&self, from: usize, to: usize) -> Option<usize> {
        self.neighbours[from].iter().position(|n| n.is_some_and(|n| usize::from(n) == to))
    }

    /// Whether one tool bridges the minus post of the string's first cell and the plus post of its last.
    pub(super) fn under_one_wrench(&self, first: (usize, Turn), last: (usize, Turn)) -> bool {
        if first.0 == last.0 {
            return false;
        }
        let at = |place: usize| ((place / self.columns) as f64, (place % self.columns) as f64);
        let ((r1, c1), (r2, c2)) = (at(first.0), at(last.0));
        if (r1 - r2).abs() <= 1.0 && (c1 - c2).abs() <= 1.0 {
            return true;
        }
        let minus = self.post[first.1 as usize][Pole::Minus as usize];
        let plus = self.post[last.1 as usize][Pole::Plus as usize];
        let across = (c2 - c1) * self.pitch.0 + plus.0 - minus.0;
        let forward = (r2 - r1) * self.pitch.1 + plus.1 - minus.1;
        across.hypot(forward) < WRENCH_MM
    }

    /// How many take-offs miss the wish, told for each of the two ways to meet it.
    pub(super) fn missed(&self, place: usize, pole: Pole) -> [u32; 2] {
        let column = place % self.columns;
        let left = u32::from(column != 0);
        let right = u32::from(column + 1 != self.columns);
        match (self.take_off, pole) {
            (TakeOff::Anywhere, _) => [0, 0],
            (TakeOff::SameSide, _) | (TakeOff::OppositeEnds, Pole::Minus) => [left, right],
            (TakeOff::OppositeEnds, Pole::Plus) => [right, left],
            (TakeOff::Front, _) => [u32::from(place / self.columns + 1 != self.rows); 2],
        }
    }

    /// The least that the joints of the cells from `done` on must still take, where `rowwise` of them at least run
    /// within a row and `columnwise` from row to row.
    pub(super) fn least_to_come(&self, done: usize, rowwise: u64, columnwise: u64) -> u64 {
        self.to_come[done] + rowwise * self.dearer[0] + columnwise * self.dearer[1]
    }

    /// How many lengths to cut must still be added at least.
    pub(super) fn lengths_to_come(&self, rowwise: u64, columnwise: u64, lengths: Lengths) -> u32 {
        if self.occurring[0] & self.occurring[1] != 0 {
            return 0;
        }
        u32::from(rowwise > 0 && lengths & self.occurring[0] == 0)
            + u32::from(columnwise > 0 && lengths & self.occurring[1] == 0)
    }

    /// Closes a string: notes whether its two ends are under one wrench.
    pub(super) fn close(&self, partial: &mut Partial, first: (usize, Turn), last: (usize, Turn)) {
        partial.under_one_wrench += u32::from(self.under_one_wrench(first, last));
    }
}

/// Distance of a point from a segment.
pub(super) fn distance_to(p: Point, a: Point, b: Point) -> f64 {
    let (dx, dy) = (b.0 - a.0, b.1 - a.1);
    let square = dx * dx + dy * dy;
    let along = if square == 0.0 { 0.0 } else { ((p.0 - a.0) * dx + (p.1 - a.1) * dy) / square };
    let along = along.clamp(0.0, 1.0);
    (p.0 - a.0 - along * dx).hypot(p.1 - a.1 - along * dy)
}

/// Whether two segments meet elsewhere than at a common end.
pub(super) fn cross(one: (Point, Point), other: (Point, Point)) -> bool {
    let same = |p: Point, q: Point| (p.0 - q.0).hypot(p.1 - q.1) < 1e-6;
    let ((a, b), (c, d)) = (one, other);
    // Two lugs on one post; they can only meet again if they lie on one another.
    for (shared, far, another) in [(a, b, (c, d)), (a, b, (d, c)), (b, a, (c, d)), (b, a, (d, c))] {
        if same(shared, another.0) {
            return distance_to(far, c, d) < 1e-6 || distance_to(another.1, a, b) < 1e-6;
        }
    }
    let side = |p: Point, q: Point, r: Point| (q.0 - p.0) * (r.1 - p.1) - (q.1 - p.1) * (r.0 - p.0);
    let (s1, s2, s3, s4) = (side(a, b, c), side(a, b, d), side(c, d, a), side(c, d, b));
    if (s1 > 0.0) != (s2 > 0.0) && (s3 > 0.0) != (s4 > 0.0) {
        return true;
    }
    [distance_to(c, a, b), distance_to(d, a, b), distance_to(a, c, d), distance_to(b, c, d)].iter().any(|&d| d < 1e-6)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn segments_cross_touch_or_stay_apart() {
        let s = |a: Point, b: Point| (a, b);
        assert!(cross(s((0.0, 0.0), (2.0, 2.0)), s((0.0, 2.0), (2.0, 0.0))));
        assert!(!cross(s((0.0, 0.0), (2.0, 0.0)), s((0.0, 1.0), (2.0, 1.0))));
        // A common end is two lugs on one post.
        assert!(!cross(s((0.0, 0.0), (2.0, 0.0)), s((2.0, 0.0), (4.0, 0.0))));
        assert!(!cross(s((0.0, 0.0), (2.0, 0.0)), s((0.0, 0.0), (0.0, 4.0))));
        // One on the other.
        assert!(cross(s((0.0, 0.0), (4.0, 0.0)), s((0.0, 0.0), (2.0, 0.0))));
        assert!(cross(s((0.0, 0.0), (4.0, 0.0)), s((1.0, 0.0), (2.0, 0.0))));
        // An end in the middle of the other.
        assert!(cross(s((0.0, 0.0), (4.0, 0.0)), s((2.0, 0.0), (2.0, 3.0))));
    }
}
