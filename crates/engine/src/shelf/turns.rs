//! For a row of places taken one after the other: how each cell is best turned.
//!
//! Exact: walks the places once and keeps, for each pair of last turns, every part that no other beats
//! whatever follows.

use super::cell::{Pole, Turn};
use super::cost::{Cost, Partial};
use super::ground::{Ground, Joint};

#[derive(Clone, Copy, Debug)]
struct Part {
    /// Turn of the string's first cell.
    first: Turn,
    /// Turn of the cell before, where this one is joined to it.
    before: Option<Turn>,
    turn: Turn,
    partial: Partial,
    /// Which part of the layer before it comes from.
    from: u32,
}

/// Places taken so far, with the parts that may still win.
pub(super) struct Walk<'a> {
    ground: &'a Ground,
    places: Vec<usize>,
    layers: Vec<Vec<Part>>,
    missed: Vec<[u32; 2]>,
    spare: Vec<Vec<Part>>,
    work: u64,
    most_parts: usize,
}

/// A finished walk: what it costs and how the cells are turned.
#[derive(Clone, Debug)]
pub(super) struct Walked {
    pub cost: Cost,
    pub places: Vec<usize>,
    pub turns: Vec<Turn>,
}

impl<'a> Walk<'a> {
    pub(super) fn new(ground: &'a Ground) -> Self {
        Self {
            ground,
            places: Vec::new(),
            layers: Vec::new(),
            missed: Vec::new(),
            spare: Vec::new(),
            work: 0,
            most_parts: usize::MAX,
        }
    }

    /// Keeps no more than so many parts. Quicker; what it finds is no longer sure to be the best.
    pub(super) const fn at_most(mut self, parts: usize) -> Self {
        self.most_parts = parts;
        self
    }

    /// How many parts were looked at so far: a measure of time that is the same on every machine.
    pub(super) const fn work(&self) -> u64 {
        self.work
    }

    pub(super) fn places(&self) -> &[usize] {
        &self.places
    }

    pub(super) fn pop(&mut self) {
        self.places.pop();
        self.missed.pop();
        self.spare.extend(self.layers.pop());
    }

    fn clear(&mut self) {
        while !self.places.is_empty() {
            self.pop();
        }
    }

    /// Take-offs that miss the wish so far, at the least.
    fn missed_so_far(&self) -> u32 {
        self.missed.last().map_or(0, |&[one, other]| one.min(other))
    }

    /// Takes one place more and drops the parts that `hopeless` says cannot win. `false`, and nothing taken, where no
    /// part is left or where the place is no neighbour of the last one and the joint asks for one.
    pub(super) fn push(&mut self, place: usize, hopeless: impl Fn(&Partial, u32) -> bool) -> bool {
        let ground = self.ground;
        let i = self.places.len();
        let joint = ground.joints[i];
        if joint != Joint::Apart && self.places.last().is_none_or(|&last| ground.way(last, place).is_none()) {
            return false;
        }
        let mut layer = self.spare.pop().unwrap_or_default();
        layer.clear();

        let [mut one, mut other] = self.missed.last().copied().unwrap_or_default();
        let ends = [(joint == Joint::Apart, Pole::Minus), ((i + 1).is_multiple_of(ground.chain_length), Pole::Plus)];
        for (_, pole) in ends.into_iter().filter(|(is_end, _)| *is_end) {
            let [a, b] = ground.missed(place, pole);
            one += a;
            other += b;
        }
        self.missed.push([one, other]);
        self.places.push(place);
        let missed = one.min(other);

        match self.layers.last() {
            None => layer.extend(ground.turns.iter().map(|&turn| Part {
                first: turn,
                before: None,
                turn,
                partial: Partial::default(),
                from: 0,
            })),
            Some(last) => {
                let before = self.places[i - 1];
                let way = if joint == Joint::Apart { None } else { ground.way(before, place) };
                let came = (i >= 2 && ground.joints[i - 1] != Joint::Apart)
                    .then(|| ground.way(self.places[i - 2], before).map(|way| (ground.joints[i - 1], way)))
                    .flatten();
                self.work += (last.len() * ground.turns.len()) as u64;
                for (from, part) in (0..).zip(last) {
                    for &turn in ground.turns {
                        let mut partial = part.partial;
                        let mut next = Part { first: part.first, before: Some(part.turn), turn, partial, from };
                        if let Some(way) = way {
                            let edge = ground.edge(joint, way, part.turn, turn);
                            partial.micrometres += edge.micrometres;
                            partial.lengths |= edge.lengths;
                            partial.over_posts += edge.over_posts;
                            if let (Some(came), Some(turn_before)) = (came, part.before) {
                                partial.over_posts += ground.corner(came, (joint, way), [turn_before, part.turn, turn]);
                            }
                        } else {
                            next.first = turn;
                            next.before = None;
                        }
                        next.partial = partial;
                        if !hopeless(&partial, missed) {
                            self.work += layer.len() as u64 / 16;
                            keep(&mut layer, next, ground.charge);
                        }
                    }
                }
            }
        }
        if (i + 1).is_multiple_of(ground.chain_length) {
            let first = self.places[i + 1 - ground.chain_length];
            for part in &mut layer {
                ground.close(&mut part.partial, (first, part.first), (place, part.turn));
            }
        }
        layer.retain(|part| !hopeless(&part.partial, missed));
        if layer.len() > self.most_parts {
            layer.sort_by_key(|part| part.partial.cost(missed, 0, 0, ground.charge));
            layer.truncate(self.most_parts);
        }
        let alive = !layer.is_empty();
        self.layers.push(layer);
        if !alive {
            self.pop();
        }
        alive
    }

    /// The best way to turn the cells, once all places are taken.
    pub(super) fn finish(&self) -> Option<Walked> {
        if self.places.len() != self.ground.joints.len() {
            return None;
        }
        let missed = self.missed_so_far();
        let cost = |part: &Part| part.partial.cost(missed, 0, 0, self.ground.charge);
        let (mut at, best) = self.layers.last()?.iter().enumerate().min_by_key(|(_, part)| cost(part))?;
        let cost = cost(best);
        let mut turns: Vec<Turn> = Vec::with_capacity(self.places.len());
        for layer in self.layers.iter().rev() {
            turns.push(layer[at].turn);
            at = layer[at].from as usize;
        }
        turns.reverse();
        Some(Walked { cost, places: self.places.clone(), turns })
    }

    /// The best turns for a whole row of places.
    pub(super) fn through(&mut self, places: &[usize]) -> Option<Walked> {
        self.clear();
        for &place in places {
            if !self.push(place, |_, _| false) {
                return None;
            }
        }
        self.finish()
    }
}

/// Puts `part` into the layer unless another beats it, and drops those that it beats.
fn keep(layer: &mut Vec<Part>, part: Part, charge: u64) {
    let alike = |p: &Part| p.first == part.first && p.turn == part.turn && p.before == part.before;
    if layer.iter().any(|p| alike(p) && p.partial.at_least_as_good(&part.partial, charge)) {
        return;
    }
    layer.retain(|p| !(alike(p) && part.partial.at_least_as_good(&p.partial, charge)));
    layer.push(part);
}
