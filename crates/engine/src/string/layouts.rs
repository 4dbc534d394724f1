//! Every way to put so many modules on the controllers at hand, ranked.
//!
//! A controller carries one group: so many strings, each of so many modules, all strings of a group alike, as unequal
//! strings in parallel spoil one another. Groups on different controllers may differ, and a controller may stay empty.
//!
//! Each group is judged by the same requirements as a string that was typed in. What breaks a hazard is rejected, with
//! the check that refuses it. The rest are ranked: no loss first, then energy kept in a year, then fewest modules left
//! over, then the margin in the cold. Where it cannot be told yet whether a string is long enough to charge, fewer and
//! longer strings go before the margin.
//!
//! Method: every (series, strings) of every kind of controller is judged once; groups are then joined controller by
//! controller, keeping for each number of modules used the best few. As energy adds up over controllers and the least
//! margin decides, the best of the whole is made of best parts.

use core::cmp::Ordering;

use super::{Ask, Requirement, longest};
use crate::check::{Check, Cost, Verdict};
use crate::controller::Controller;
use crate::entry::Entry;
use crate::order::first_of;
use crate::quantity::{Amps, Percent, Watts};

/// How many layouts of one number of modules are carried along while controllers are joined.
const BREADTH: usize = 6;
/// How many ranked layouts are given.
const RANKED: usize = 12;
/// How many rejected groups are given.
const REJECTED: usize = 12;

/// One controller's strings.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub struct Group {
    /// Which of the controllers, counted from 0.
    pub controller: usize,
    /// Modules in one string.
    pub series: u32,
    /// Strings in parallel.
    pub strings: u32,
}

impl Group {
    /// Modules of the group.
    #[must_use]
    pub const fn modules(self) -> u32 {
        self.series * self.strings
    }
}

/// A way to put modules on controllers that no hazard refuses.
#[derive(Clone, Debug, PartialEq)]
pub struct Layout {
    /// The groups, one for each controller in use.
    pub groups: Vec<Group>,
    /// Modules in use.
    pub used: u32,
    /// Modules left over.
    pub left_over: u32,
    /// The worst check among the groups that is not a missing input.
    pub worst: Option<Check<Requirement>>,
    /// Rated power less what is clipped in a year; `None` where the module's power is not known.
    pub kept: Option<Watts>,
    /// Least margin in the cold.
    pub margin: Percent,
    /// The fuse that each string needs, where one does.
    pub fuse: Option<Amps>,
}

impl Layout {
    /// The verdict of its worst check.
    #[must_use]
    pub fn verdict(&self) -> Verdict {
        self.worst.map_or(Verdict::Asks, |check| check.verdict)
    }

    /// Whether it breaks no check, as far as the inputs tell.
    #[must_use]
    pub fn holds(&self) -> bool {
        self.verdict() != Verdict::Breaks
    }
}

/// A group that a hazard refuses.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Rejected {
    /// Which group.
    pub group: Group,
    /// The check that refuses it.
    pub check: Check<Requirement>,
}

/// What the modules at hand can become.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Layouts {
    /// Best first.
    pub ranked: Vec<Layout>,
    /// What was refused, from the shortest string and the fewest strings on.
    pub rejected: Vec<Rejected>,
}

/// A group with its judgement, before it is given to one controller of its kind.
#[derive(Clone, Copy)]
struct Judged {
    series: u32,
    strings: u32,
    loss: bool,
    kept: f64,
    /// Strings in parallel, where it cannot be told yet whether they are long enough to charge; else 0.
    doubtful: u32,
    margin: f64,
    fuse: Option<Amps>,
    worst: Option<Check<Requirement>>,
}

#[derive(Clone, Default)]
struct Partial {
    /// For each controller so far: which judged group of its kind, or none.
    picks: Vec<Option<usize>>,
    loss: bool,
    kept: f64,
    doubtful: u32,
    margin: f64,
}

impl Partial {
    fn better(&self, other: &Self) -> Ordering {
        self.loss
            .cmp(&other.loss)
            .then(other.kept.total_cmp(&self.kept))
            .then(self.doubtful.cmp(&other.doubtful))
            .then(other.margin.total_cmp(&self.margin))
    }
}

/// Every way to put up to `modules` modules on `controllers`, ranked, and what was rejected.
///
/// The counts and the controller in `ask` play no part. Empty where the cold voltage cannot be told yet.
///
/// # Example
///
/// ```
/// use engine::{entry::Entry, quantity::{Celsius, Percent, Volts}, string};
///
/// let mut ask = string::Ask::default();
/// ask.module.voc = Entry::Typed(Volts::new(40.0));
/// ask.module.voc_coefficient = Entry::Typed(engine::module::VoltageCoefficient::Relative(
///     engine::quantity::PercentPerKelvin::new(-0.25),
/// ));
/// ask.module.voc_tolerance = Entry::Typed(Percent::new(0.0));
/// ask.record_low = Entry::Typed(Celsius::new(-15.0));          // each 44 V
/// ask.controller.input_limit = Entry::Typed(Volts::new(100.0)); // two hold, three do not
/// let found = string::layouts(&ask, 6, &[ask.controller]);
/// assert_eq!((found.ranked[0].groups[0].series, found.ranked[0].groups[0].strings), (2, 3));
/// ```
#[must_use]
pub fn layouts(ask: &Ask, modules: u32, controllers: &[Controller]) -> Layouts {
    let kinds = kinds(controllers);
    let mut rejected = Vec::new();
    let judged: Vec<Vec<Judged>> =
        kinds.iter().map(|first| judge_groups(&ask.on(controllers[*first]), modules, *first, &mut rejected)).collect();
    let kind_of: Vec<usize> =
        controllers.iter().map(|one| kinds.iter().position(|kind| controllers[*kind] == *one).unwrap_or(0)).collect();
    let joined = join(&judged, &kind_of, modules as usize);
    let all = joined
        .into_iter()
        .enumerate()
        .skip(1)
        .flat_map(|(used, partials)| partials.into_iter().map(move |partial| (used, partial)));
    let ranked = first_of(all, RANKED, |(used_a, a), (used_b, b)| {
        a.loss
            .cmp(&b.loss)
            .then(b.kept.total_cmp(&a.kept))
            .then(used_b.cmp(used_a))
            .then(a.doubtful.cmp(&b.doubtful))
            .then(b.margin.total_cmp(&a.margin))
            // Fewer controllers in use, where all else is equal.
            .then(in_use(a).cmp(&in_use(b)))
    });
    let place = |one: &Rejected| (one.group.controller, one.group.series, one.group.strings);
    let rejected = first_of(rejected.into_iter(), REJECTED, |a, b| place(a).cmp(&place(b)));
    Layouts {
        ranked: ranked
            .into_iter()
            .map(|(used, partial)| laid_out(ask, &partial, used, modules, &judged, &kind_of))
            .collect(),
        rejected,
    }
}

fn in_use(partial: &Partial) -> usize {
    partial.picks.iter().flatten().count()
}

/// The first controller of each kind.
fn kinds(controllers: &[Controller]) -> Vec<usize> {
    let mut kinds: Vec<usize> = Vec::new();
    for (index, controller) in controllers.iter().enumerate() {
        if !kinds.iter().any(|kind| controllers[*kind] == *controller) {
            kinds.push(index);
        }
    }
    kinds
}

/// Judges every group of up to `modules` modules on the controller of `ask`, which is number `controller`.
fn judge_groups(ask: &Ask, modules: u32, controller: usize, rejected: &mut Vec<Rejected>) -> Vec<Judged> {
    let Some(longest) = longest(ask) else { return Vec::new() };
    let mut judged = Vec::new();
    for series in 1..=longest.min(modules) {
        for strings in 1..=modules / series {
            match judge_group(ask, series, strings) {
                Ok(group) => judged.push(group),
                Err(check) => {
                    rejected.push(Rejected { group: Group { controller, series, strings }, check });
                    // More strings only carry more current; but a fuse that fits none may be of no need with fewer.
                    if check.id != Requirement::Fuse {
                        break;
                    }
                }
            }
        }
    }
    // The next longer strings, to say why not.
    for series in longest + 1..=(longest + 3).min(modules) {
        if let Err(check) = judge_group(ask, series, (modules / series).max(1)) {
            rejected.push(Rejected { group: Group { controller, series, strings: (modules / series).max(1) }, check });
        }
    }
    judged
}

/// The judgement of one group, or the worst hazard that refuses it.
fn judge_group(ask: &Ask, series: u32, strings: u32) -> Result<Judged, Check<Requirement>> {
    let mut ask = ask.with_counts(series, strings);
    // The fuse that is fitted now is not the fuse of another layout.
    ask.string_fuse = Entry::Blank;
    let mut worst: Option<Check<Requirement>> = None;
    let mut margin = f64::INFINITY;
    let mut loss = false;
    let mut clipped = 0.0;
    let mut doubtful = 0;
    for requirement in Requirement::ALL {
        let Some(check) = requirement.check(&ask) else { continue };
        if check.verdict == Verdict::Asks {
            if requirement == Requirement::HotCharge {
                doubtful = strings;
            }
            continue;
        }
        if matches!(requirement, Requirement::ColdController | Requirement::ColdCircuit) {
            margin = margin.min(check.margin.map_or(0.0, Percent::get));
        }
        if requirement == Requirement::Clip {
            clipped = check.value.map_or(0.0, |value| value.number);
        }
        loss |= check.verdict == Verdict::Breaks && check.cost == Cost::Loss;
        if worst.is_none_or(|so_far| check.rank() < so_far.rank()) {
            worst = Some(check);
        }
    }
    if let Some(check) = worst
        && check.verdict == Verdict::Breaks
        && check.cost == Cost::Hazard
    {
        return Err(check);
    }
    let power = match (ask.module.vmp.typed(), ask.module.imp.typed()) {
        (Some(vmp), Some(imp)) => (vmp * imp).get(),
        // Without its power each module counts as one.
        _ => 1.0,
    };
    let fuse = super::string_fuses(&ask).filter(|fuses| fuses.needed).and_then(|fuses| fuses.advised);
    let kept = power * f64::from(series * strings) * (1.0 - clipped / 100.0);
    Ok(Judged { series, strings, loss, kept, doubtful, margin, fuse, worst })
}

/// Joins groups controller by controller: for each number of modules used, the best few ways.
fn join(judged: &[Vec<Judged>], kind_of: &[usize], modules: usize) -> Vec<Vec<Partial>> {
    let mut ways: Vec<Vec<Partial>> = vec![Vec::new(); modules + 1];
    ways[0].push(Partial { margin: f64::INFINITY, ..Partial::default() });
    for (controller, kind) in kind_of.iter().enumerate() {
        // Equal controllers that follow one another take their groups in falling order, so that no way comes twice.
        let same_as_last = controller > 0 && kind_of[controller - 1] == *kind;
        let mut next: Vec<Vec<Partial>> = vec![Vec::new(); modules + 1];
        for (used, partials) in ways.iter().enumerate() {
            for partial in partials {
                let most = match (same_as_last, partial.picks.last()) {
                    (true, Some(None)) => 0,
                    (true, Some(Some(last))) => last + 1,
                    _ => judged[*kind].len(),
                };
                keep(&mut next[used], partial, None, None);
                for (index, group) in judged[*kind].iter().enumerate().take(most) {
                    let total = used + (group.series * group.strings) as usize;
                    if total <= modules {
                        keep(&mut next[total], partial, Some(index), Some(group));
                    }
                }
            }
        }
        ways = next;
    }
    ways
}

/// Puts `partial` with one more pick among the best few of `list`, those with and those without a loss apart.
fn keep(list: &mut Vec<Partial>, partial: &Partial, pick: Option<usize>, group: Option<&Judged>) {
    let made = Partial {
        picks: Vec::new(),
        loss: partial.loss || group.is_some_and(|group| group.loss),
        kept: partial.kept + group.map_or(0.0, |group| group.kept),
        doubtful: partial.doubtful + group.map_or(0, |group| group.doubtful),
        margin: partial.margin.min(group.map_or(f64::INFINITY, |group| group.margin)),
    };
    let rivals = list.iter().filter(|one| one.loss == made.loss).count();
    let place = list.partition_point(|one| one.better(&made) != Ordering::Greater);
    if rivals >= BREADTH {
        // The last of its own side makes room, if it is worse.
        let Some(last) = list.iter().rposition(|one| one.loss == made.loss) else { return };
        if place > last {
            return;
        }
        list.remove(last);
    }
    let mut picks = Vec::with_capacity(partial.picks.len() + 1);
    picks.extend_from_slice(&partial.picks);
    picks.push(pick);
    list.insert(place, Partial { picks, ..made });
}

fn laid_out(
    ask: &Ask,
    partial: &Partial,
    used: usize,
    modules: u32,
    judged: &[Vec<Judged>],
    kind_of: &[usize],
) -> Layout {
    let picked = || {
        partial
            .picks
            .iter()
            .enumerate()
            .filter_map(|(controller, pick)| Some((controller, judged[kind_of[controller]][(*pick)?])))
    };
    let power_known = ask.module.vmp.typed().is_some() && ask.module.imp.typed().is_some();
    #[expect(clippy::cast_possible_truncation, reason = "no more than `modules`, which is a u32")]
    let used = used as u32;
    Layout {
        groups: picked()
            .map(|(controller, group)| Group { controller, series: group.series, strings: group.strings })
            .collect(),
        used,
        left_over: modules - used,
        worst: picked().filter_map(|(_, group)| group.worst).min_by(Check::order),
        kept: power_known.then(|| Watts::new(partial.kept)),
        margin: Percent::new(partial.margin),
        fuse: picked().filter_map(|(_, group)| group.fuse).reduce(Amps::max),
    }
}
