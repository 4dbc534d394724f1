//! Which loads may run or start together.

use super::{Ask, Draws, SURGE_EFFICIENCY, bus, phases};
use crate::check::{Basis, Steps};
use crate::network::Behind;
use crate::quantity::{Percent, Volts, Watts};

/// The most loads that are judged in every set.
pub const MOST_LOADS: usize = 14;

/// A load that can be switched.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Switched {
    /// While it runs.
    pub running: Draws,
    /// While it starts.
    pub starting: Draws,
}

/// What sets them bounds.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Limits {
    /// What the inverter gives for long, in VA.
    pub continuous: f64,
    /// What it gives for the length of the starts, in VA.
    pub surge: f64,
    /// Its efficiency meanwhile, as a share.
    pub efficiency: f64,
    /// The bus.
    pub bus: Behind,
    /// The cut-off.
    pub cut_off: Volts,
    /// What runs in any case.
    pub base: Draws,
}

/// One load by itself and on top of all the others that run.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Judged {
    /// Whether it starts with nothing but the base running.
    pub alone: bool,
    /// Whether it starts while every other runs.
    pub on_top: bool,
    /// Margin of the start alone: the lesser of surge and cut-off.
    pub margin: Percent,
}

/// What may go together.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Together {
    /// Each load, in the order given.
    pub loads: Vec<Judged>,
    /// The greatest sets that may run together, as bits by place in the list. None is part of another.
    pub run: Vec<u32>,
    /// The greatest sets that may start at one moment.
    pub start: Vec<u32>,
    /// Pairs that may not start at one moment though each starts alone.
    pub never: Vec<(usize, usize)>,
}

/// The load of `ask`, by itself. `None` where an input is missing.
#[must_use]
pub fn switched(ask: &Ask) -> Option<Switched> {
    let alone = Ask { already: crate::entry::Entry::Typed(Watts::new(0.0)), ..ask.sound() };
    let found = phases(&alone, &mut Basis::default(), &mut Steps::silent())?;
    Some(Switched { running: found.running, starting: found.starting })
}

impl Limits {
    /// Those of the inverter and the bus of `ask`, with what runs already. `None` where an input is missing.
    #[must_use]
    pub fn of(ask: &Ask) -> Option<Self> {
        let ask = &ask.sound();
        let continuous = ask.inverter_continuous.typed().map(Watts::get);
        let surge = ask.inverter_surge.typed().map(crate::quantity::VoltAmps::get);
        let surge = surge.or(continuous)?;
        Some(Self {
            continuous: continuous.unwrap_or(surge),
            surge,
            efficiency: ask.efficiency.typed().unwrap_or(SURGE_EFFICIENCY).share(),
            bus: bus::seen(ask, &mut Basis::default(), &mut Steps::silent())?,
            cut_off: ask.cut_off.typed().or(ask.bank.inverter_low.typed())?,
            base: Draws::of(ask.already.typed().unwrap_or(Watts::new(0.0)), 1.0),
        })
    }

    /// Whether the inverter and the bus hold `draws`, with `rating` in VA.
    ///
    /// V ≥ V_c holds where P ≤ V_c · (E − V_c) / R, as long as V_c lies on the upper branch, at E/2 or more.
    fn hold(&self, draws: Draws, rating: f64) -> bool {
        self.margin(draws, rating) >= 0.0
    }

    /// The lesser margin, as a share of its limit.
    fn margin(&self, draws: Draws, rating: f64) -> f64 {
        let all = self.base.and(draws);
        let by_rating = if rating > 0.0 { (rating - all.apparent().get()) / rating } else { -1.0 };
        let (emf, ohms) = (self.bus.emf.get(), self.bus.resistance.get());
        let cut_off = self.cut_off.get().max(emf / 2.0);
        let watts = all.watts / self.efficiency;
        let by_bus = if ohms > 0.0 {
            let most = cut_off * (emf - cut_off) / ohms;
            if most > 0.0 { (most - watts) / most } else { -1.0 }
        } else {
            f64::from(u8::from(emf >= cut_off)) - 0.5
        };
        by_rating.min(by_bus)
    }
}

/// Judges every set of up to [`MOST_LOADS`] loads; further ones are left out.
///
/// Draws that lag only add up: a set that breaks is part of no set that holds. Where a load's power factor leads, that is
/// not so, and none such is taken here.
#[must_use]
pub fn together(loads: &[Switched], limits: &Limits) -> Together {
    let loads = &loads[..loads.len().min(MOST_LOADS)];
    let all = loads.iter().fold(Draws::default(), |sum, load| sum.and(load.running));
    let less = |all: Draws, one: Draws| Draws { watts: all.watts - one.watts, vars: all.vars - one.vars };
    let judged: Vec<Judged> = loads
        .iter()
        .map(|load| Judged {
            alone: limits.hold(load.starting, limits.surge),
            on_top: limits.hold(less(all, load.running).and(load.starting), limits.surge),
            margin: Percent::from_share(limits.margin(load.starting, limits.surge)),
        })
        .collect();
    let mut never = Vec::new();
    for one in 0..loads.len() {
        for other in one + 1..loads.len() {
            let both = loads[one].starting.and(loads[other].starting);
            if judged[one].alone && judged[other].alone && !limits.hold(both, limits.surge) {
                never.push((one, other));
            }
        }
    }
    Together {
        run: greatest(loads, |load| load.running, |draws| limits.hold(draws, limits.continuous)),
        start: greatest(loads, |load| load.starting, |draws| limits.hold(draws, limits.surge)),
        loads: judged,
        never,
    }
}

/// The sets that hold and are part of no other that does.
fn greatest(loads: &[Switched], of: impl Fn(&Switched) -> Draws, holds: impl Fn(Draws) -> bool) -> Vec<u32> {
    let count = 1_usize << loads.len();
    let mut sums = vec![Draws::default(); count];
    let mut held = vec![false; count];
    for set in 0..count {
        if set > 0 {
            let low = set.trailing_zeros() as usize;
            sums[set] = sums[set & (set - 1)].and(of(&loads[low]));
        }
        held[set] = holds(sums[set]);
    }
    (1..count)
        .filter(|set| held[*set] && (0..loads.len()).all(|load| set & (1 << load) != 0 || !held[set | (1 << load)]))
        .map(|set| u32::try_from(set).unwrap_or(u32::MAX))
        .collect()
}
