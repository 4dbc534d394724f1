//! Local search for shelves that are too large to be searched through.
//!
//! A way through the shelf is changed at one of its ends: the end is joined to a neighbour that it touches, which
//! makes a loop, and the loop is opened beside it. Where places are spare, an end may also move into one of them.
//! Worse ways are taken with a chance that fades (simulated annealing). The chance comes from the seed alone.

use super::cost::Cost;
use super::ground::Ground;
use super::turns::{Walk, Walked};

/// A small generator of pseudo-random numbers: a Weyl sequence, mixed. Good enough to shuffle with; no more.
struct Dice(u64);

impl Dice {
    const fn next(&mut self) -> u64 {
        self.0 = self.0.wrapping_add(0x9E37_79B9_7F4A_7C15);
        let mut z = self.0;
        z = (z ^ (z >> 30)).wrapping_mul(0xBF58_476D_1CE4_E5B9);
        z = (z ^ (z >> 27)).wrapping_mul(0x94D0_49BB_1331_11EB);
        z ^ (z >> 31)
    }

    const fn below(&mut self, many: usize) -> usize {
        (self.next() % many as u64) as usize
    }

    fn share(&mut self) -> f64 {
        (self.next() >> 11) as f64 / (1u64 << 53) as f64
    }
}

/// One number that falls with the cost. What stands above copper weighs as much as several links.
fn height(cost: &Cost, charge: u64) -> f64 {
    let graver = f64::from(cost.over_posts) * 8.0
        + f64::from(cost.take_off_missed) * 6.0
        + f64::from(cost.under_one_wrench) * 4.0;
    cost.copper as f64 / charge.max(1) as f64 + graver
}

/// Parts that a walk keeps here. *Chosen*: all of them with two turns; with four the search would be slowed tenfold.
const PARTS: usize = 24;

/// Betters `best` as far as `work` reaches.
pub(super) fn better(ground: &Ground, best: Walked, seed: u64, work: u64) -> Walked {
    let mut dice = Dice(seed);
    let mut walk = Walk::new(ground).at_most(PARTS);
    let mut now = best.clone();
    let mut best = best;
    let mut used = vec![false; ground.places];
    let mut places = now.places.clone();
    let mut throws = 0u64;
    // Throws that lead nowhere cost next to nothing, but they must end too.
    while walk.work() < work && throws < work {
        throws += 1;
        let done = walk.work() as f64 / work as f64;
        let heat = 2.0 * (1.0 - done).powi(2);
        places.clone_from(&now.places);
        if !change(ground, &mut places, &mut used, &mut dice) {
            continue;
        }
        let Some(tried) = walk.through(&places) else { continue };
        let rise = height(&tried.cost, ground.charge) - height(&now.cost, ground.charge);
        if rise <= 0.0 || dice.share() < (-rise / heat.max(1e-9)).exp() {
            now = tried;
            if now.cost < best.cost {
                best = now.clone();
            }
        }
    }
    best
}

/// Changes the way at one end. `false` where this throw of the dice leads nowhere.
fn change(ground: &Ground, places: &mut [usize], used: &mut [bool], dice: &mut Dice) -> bool {
    if places.len() < 2 {
        return false;
    }
    if dice.below(2) == 0 {
        places.reverse();
    }
    if places.len() < ground.places && dice.below(2) == 0 {
        return slide(ground, places, used, dice);
    }
    let end = places[places.len() - 1];
    let Some(to) = ground.neighbours[end][dice.below(4)].map(usize::from) else { return false };
    let Some(at) = places.iter().position(|&p| p == to) else { return false };
    if at + 2 >= places.len() {
        return false;
    }
    places[at + 1..].reverse();
    true
}

/// The whole way moves on by one place, into a free one.
fn slide(ground: &Ground, places: &mut [usize], used: &mut [bool], dice: &mut Dice) -> bool {
    used.fill(false);
    for &place in places.iter() {
        used[place] = true;
    }
    let end = places[places.len() - 1];
    let Some(to) = ground.neighbours[end][dice.below(4)].map(usize::from) else { return false };
    if used[to] {
        return false;
    }
    places.rotate_left(1);
    let last = places.len() - 1;
    places[last] = to;
    true
}
