//! Every way to make a bank of so many cells, ranked, and why the others are refused.
//!
//! For each count in series, as many strings as the cells make; what is left over is said. A layout is judged by the
//! same requirements as a bank that was typed in. Refused is what breaks a hazard, what the chargers' cap never fills,
//! and what the cut-off lets nothing be drawn from. The rest are ranked: no loss first, then posts that may be touched,
//! then usable energy, then fewest left over, then margin. Touch does not refuse: covers mend it, another count need
//! not. Nothing is ranked where its window cannot be judged.

use core::cmp::Ordering;

use super::ask::positive;
use super::energy::depth;
use super::{Ask, Energy, Requirement, Window, energy, lacks, window};
use crate::check::{Basis, Check, Cost, Sense, Verdict, worst_first};
use crate::entry::Entry;
use crate::quantity::{Amps, Hours, Percent, Quantity};
use crate::show;

/// A way to make a bank.
#[derive(Clone, Debug, PartialEq)]
pub struct Layout {
    /// Cells or blocks in series.
    pub series: u32,
    /// Strings in parallel.
    pub strings: u32,
    /// Cells in series, those inside blocks counted.
    pub cells: u32,
    /// Cells or blocks left over.
    pub left_over: u32,
    /// Cells or blocks that it needs beyond those at hand.
    pub short: u32,
    /// The span of its voltages.
    pub window: Window,
    /// Part of its capacity that can be drawn: the depth used, or what the cut-off allows where that is less.
    pub depth: Percent,
    /// What it gives; none where the capacity is not known.
    pub energy: Option<Energy>,
    /// Its capacity over the charge current; none where either is not known.
    pub charged_over: Option<Hours>,
    /// Its capacity over the greatest steady draw; none where either is not known.
    pub drawn_over: Option<Hours>,
    /// What it was judged by, worst first.
    pub checks: Vec<Check<Requirement>>,
}

/// The requirements that tell one layout from another.
const TELL_APART: [Requirement; 15] = [
    Requirement::WindowHigh,
    Requirement::WindowHighAbsorb,
    Requirement::WindowHighLoads,
    Requirement::ChargeCap,
    Requirement::WindowLow,
    Requirement::Touch,
    Requirement::ChargeRate,
    Requirement::ChargeRateLeast,
    Requirement::DischargeRate,
    Requirement::Hold,
    Requirement::HoldOneOut,
    Requirement::HoldStart,
    Requirement::HoldStartOneOut,
    Requirement::HoldCharge,
    Requirement::HoldChargeOneOut,
];

impl Layout {
    /// The layout that `ask` holds the counts of. `None` where an input is missing.
    #[must_use]
    pub fn of(ask: &Ask) -> Option<Self> {
        let series = positive(ask.series).typed()?.get();
        let strings = ask.strings(&mut Basis::default())?.get();
        let count = positive(ask.count).typed().map(|count| whole(count.get()));
        let (series, strings) = (whole(series).max(1), whole(strings).max(1));
        laid_out(ask, series, strings, count.unwrap_or(series * strings))
    }

    /// The check of it with this id.
    #[must_use]
    pub fn check(&self, requirement: Requirement) -> Option<&Check<Requirement>> {
        self.checks.iter().find(|check| check.id == requirement)
    }

    /// The worst of its checks that is not a missing input.
    #[must_use]
    pub fn worst(&self) -> Option<&Check<Requirement>> {
        self.checks.iter().find(|check| check.verdict != Verdict::Asks)
    }

    /// The verdict of that check.
    #[must_use]
    pub fn verdict(&self) -> Verdict {
        self.worst().map_or(Verdict::Asks, |check| check.verdict)
    }

    /// The check that refuses it; none where it stands in the ranking.
    #[must_use]
    pub fn refused_by(&self) -> Option<&Check<Requirement>> {
        let hazard = self.broken().find(|check| check.cost == Cost::Hazard && check.id != Requirement::Touch);
        let empty = self.depth.get() <= 0.0;
        let starved = self.broken().find(|check| check.id == Requirement::ChargeCap);
        hazard.or(starved).or_else(|| self.check(Requirement::WindowLow).filter(|_| empty))
    }

    fn broken(&self) -> impl Iterator<Item = &Check<Requirement>> {
        self.checks.iter().filter(|check| check.verdict == Verdict::Breaks)
    }

    /// What stands against it, in words: the check, the value, the limit and by how much.
    ///
    /// ```text
    /// Highest bank voltage against the inverter: 21.0 V, at most 16 V, 31.3 % past it
    /// ```
    #[must_use]
    pub fn reason(&self) -> String {
        let Some(check) = self.refused_by().or_else(|| self.worst()) else { return "Inputs are missing.".to_owned() };
        said(check)
    }

    fn better(&self, other: &Self) -> Ordering {
        let loss = |one: &Self| one.broken().any(|check| check.cost == Cost::Loss);
        let bare = |one: &Self| one.check(Requirement::Touch).is_some_and(|check| check.verdict == Verdict::Breaks);
        let gives = |one: &Self| {
            // Without a capacity, as if each cell had one ampere-hour: rate and cold apart, the order is the same.
            let of_one = one.window.nominal.get() * f64::from(one.strings) * one.depth.share();
            one.energy.map_or(of_one, |energy| energy.usable.get())
        };
        let margin = |one: &Self| {
            one.check(Requirement::WindowHigh).and_then(|check| check.margin).map_or(0.0, |margin| margin.get())
        };
        loss(self)
            .cmp(&loss(other))
            .then(bare(self).cmp(&bare(other)))
            // Less than a watt-hour apart is equal.
            .then(gives(other).round().total_cmp(&gives(self).round()))
            .then(self.left_over.cmp(&other.left_over))
            .then(margin(other).total_cmp(&margin(self)))
            .then(self.series.cmp(&other.series))
    }
}

/// A check in words.
pub(super) fn said(check: &Check<Requirement>) -> String {
    let (Some(value), Some(limit), Some(margin)) = (check.value, check.limit, check.margin) else {
        return format!("{}: an input is missing", check.id.name());
    };
    let side = match limit.sense {
        Sense::AtMost => "at most",
        Sense::AtLeast => "at least",
    };
    let by = show::room(margin.abs().amount());
    let by = if margin.get() < 0.0 { format!("{by} past it") } else { format!("{by} in hand") };
    let (value, limit) = show::apart(value, limit.amount);
    format!("{}: {value}, {side} {limit}, {by}", check.id.name())
}

/// What the cells at hand can become.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Layouts {
    /// Best first.
    pub ranked: Vec<Layout>,
    /// Refused, from the fewest in series on.
    pub rejected: Vec<Layout>,
}

impl Layouts {
    /// The best that stands.
    #[must_use]
    pub fn best(&self) -> Option<&Layout> {
        self.ranked.first()
    }

    /// The `most` of the refused that come nearest to being taken, nearest first: by how far past its limit each is.
    #[must_use]
    pub fn nearest(&self, most: usize) -> Vec<&Layout> {
        let past = |layout: &Layout| layout.refused_by().and_then(|check| check.margin).map_or(f64::MIN, Percent::get);
        let with_margin = self.rejected.iter().map(|layout| (past(layout), layout));
        let nearest = crate::order::first_of(with_margin, most, |a, b| b.0.total_cmp(&a.0));
        nearest.into_iter().map(|(_, layout)| layout).collect()
    }

    /// Whichever has `series` in series.
    #[must_use]
    pub fn with_series(&self, series: u32) -> Option<&Layout> {
        self.ranked.iter().chain(&self.rejected).find(|layout| layout.series == series)
    }
}

/// The most cells that are laid out: what the field takes.
const MOST: f64 = 400.0;

/// Every layout of the cells or blocks at hand. Counts that `ask` holds play no part, but for strings alone: with those
/// entered, and nothing in series, only layouts of so many strings are made. Empty where [`super::lacks`] names an input
/// that is missing.
///
/// # Example
///
/// Twelve nickel-iron cells on a bus whose inverter takes 10.5 to 16 V: nine fit, ten and more do not.
///
/// ```
/// use engine::bank::{Ask, layouts};
/// use engine::chemistry::Chemistry;
/// use engine::entry::Entry;
///
/// let ask = Ask {
///     chemistry: Entry::Typed(Chemistry::NickelIron),
///     cell_voltage: Entry::of(1.2),
///     cell_capacity: Entry::of(700.0),
///     count: Entry::of(12.0),
///     inverter_low: Entry::of(10.5),
///     inverter_high: Entry::of(16.0),
///     ..Ask::default()
/// };
/// assert_eq!(layouts(&ask).best().unwrap().series, 9);
/// ```
#[must_use]
pub fn layouts(ask: &Ask) -> Layouts {
    let open = match ask.series {
        Entry::Blank => *ask,
        _ => Ask { series: Entry::Blank, strings: Entry::Blank, ..*ask },
    };
    let count = match positive(ask.count) {
        Entry::Typed(count) if lacks(&open).is_empty() => whole(count.get()),
        _ => return Layouts::default(),
    };
    let held = positive(open.strings).typed().map(|strings| whole(strings.get()).max(1));
    let mut found = Layouts::default();
    for series in 1..=count / held.unwrap_or(1) {
        let Some(layout) = laid_out(ask, series, held.unwrap_or(count / series), count) else {
            return Layouts::default();
        };
        if layout.refused_by().is_some() { found.rejected.push(layout) } else { found.ranked.push(layout) }
    }
    crate::order::sort_short(&mut found.ranked, Layout::better);
    found
}

#[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "held between 0 and 400")]
fn whole(number: f64) -> u32 {
    number.floor().clamp(0.0, MOST) as u32
}

/// `series` times `strings` out of `count`.
fn laid_out(ask: &Ask, series: u32, strings: u32, count: u32) -> Option<Layout> {
    let ask = &ask.with_counts(series, strings);
    let window = window(ask)?;
    let basis = &mut Basis::default();
    #[expect(
        clippy::cast_possible_truncation,
        clippy::cast_sign_loss,
        reason = "cells of a block are at most a thousand"
    )]
    let in_block = ask.block_cells(basis)?.get().min(1000.0) as u32;
    let energy = energy(ask);
    let over = |current: Option<Amps>| Some(energy?.capacity / current?);
    let (_, figures) = ask.chemistry(basis)?;
    let draw = positive(ask.greatest_load).typed().map(|load| load / (figures.nominal * f64::from(series * in_block)));
    let mut checks: Vec<_> = TELL_APART.iter().filter_map(|requirement| requirement.check(ask)).collect();
    worst_first(&mut checks);
    Some(Layout {
        series,
        strings,
        cells: series * in_block,
        left_over: count.saturating_sub(series * strings),
        short: (series * strings).saturating_sub(count),
        window,
        depth: depth(ask)?,
        energy,
        charged_over: over(positive(ask.charge_current).typed()),
        drawn_over: over(draw),
        checks,
    })
}

/// The bank with its counts: those entered, or those of the best layout of the cells at hand. Where no layout stands,
/// the counts stay as they were.
#[must_use]
pub fn settled(ask: &Ask) -> Ask {
    if ask.series != Entry::Blank {
        return *ask;
    }
    match layouts(ask).best() {
        Some(best) => ask.with_counts(best.series, best.strings),
        None => *ask,
    }
}
