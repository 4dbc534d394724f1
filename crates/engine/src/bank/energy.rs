//! What a bank gives: its energy in all, and what of it can be used in this room, at this rate, by these devices.

use super::Ask;
use super::ask::{finite, origin, positive};
use super::devices::cut_off;
use super::rates::{bank_capacity, usual_draw};
use super::window::cells;
use crate::check::{Basis, FieldSet, Origin, Step, Steps};
use crate::chemistry::{Figures, RATED_AT, capacity_share, share_at};
use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::{AmpHours, Amps, Percent, Quantity, Volts, WattHours};
use crate::show;
use crate::source;

/// The energy of a bank.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Energy {
    /// All strings' capacity.
    pub capacity: AmpHours,
    /// In all: nominal voltage times capacity.
    pub in_all: WattHours,
    /// Part that the coldest room leaves.
    pub in_the_cold: Percent,
    /// Part that the rate of the greatest load leaves.
    pub at_the_rate: Percent,
    /// Part that is drawn: the depth used, or what the cut-off allows where that is less.
    pub depth: Percent,
    /// Whether the cut-off, not the depth used, ends the draw.
    pub cut_off_ends_it: bool,
    /// Energy that can be used.
    pub usable: WattHours,
    /// The inputs that were assumed.
    pub assumed: FieldSet,
}

/// Energy of the bank. `None` where chemistry, capacity or counts are missing.
///
/// E = n · V · p · C · cold · rate · depth
///
/// In proportion to the count of cells, as long as neither the cut-off nor the rate stands in the way. The greatest load
/// is taken as if it ran all the time: the cautious end.
///
/// # Source
///
/// Cold: see [`crate::chemistry::size_factor`]; rate: [`source::PEUKERT`]; depth: common practice.
#[must_use]
pub fn energy(ask: &Ask) -> Option<Energy> {
    figured(ask, &mut Steps::silent())
}

/// The steps of [`energy`].
#[must_use]
pub fn energy_working(ask: &Ask) -> Vec<Step> {
    let mut steps = Steps::written();
    figured(ask, &mut steps);
    steps.into_steps()
}

/// Part of the capacity that is wanted, and the part that the cut-off allows of a string of `cells`.
fn drawn(ask: &Ask, figures: &Figures, cells: f64, basis: &mut Basis) -> Option<(Percent, Percent)> {
    let wanted = ask.depth(figures, basis)?;
    let allowed = match cut_off(ask, basis) {
        Some(stops) => Percent::new(100.0) - figures.charge_when_loaded_to(stops / cells),
        None => Percent::new(100.0),
    };
    Some((wanted, allowed))
}

/// Part of the capacity that is drawn: the depth used, or what the cut-off allows where that is less. Needs no capacity.
pub(super) fn depth(ask: &Ask) -> Option<Percent> {
    let basis = &mut Basis::default();
    let (_, figures) = ask.chemistry(basis)?;
    let cells = cells(ask, basis, &mut Steps::silent())?;
    drawn(ask, figures, cells, basis).map(|(wanted, allowed)| wanted.min(allowed))
}

fn figured(ask: &Ask, steps: &mut Steps) -> Option<Energy> {
    let basis = &mut Basis::default();
    let (chemistry, figures) = ask.chemistry(basis)?;
    let cells = cells(ask, basis, steps)?;
    let capacity = bank_capacity(ask, basis, steps)?;
    let nominal: Volts = figures.nominal * cells;
    let in_all = steps.step("Energy in all", nominal * capacity, || {
        (
            "n · V · C",
            format!(
                "{} × {} × {}",
                show::number(cells, 0),
                show::given(figures.nominal.amount()),
                show::step(capacity.amount())
            ),
            Origin::Before,
        )
    });
    let coldest = basis.assume(Field::ColdestInTheRoom, finite(ask.coldest), RATED_AT)?;
    let in_the_cold = steps.step("Left by the cold", capacity_share(chemistry, coldest), || {
        ("1 / size factor", show::given(coldest.amount()), Origin::Published(figures.size_factor_source))
    });
    let draw = match positive(ask.greatest_load) {
        Entry::Typed(load) => usual_draw(Field::GreatestLoad, Some(load), ask, basis, steps)?,
        // No load said: no faster than rated.
        Entry::Blank => basis.assume(Field::GreatestLoad, Entry::Blank, Amps::new(0.0))?,
        Entry::Unread => return None,
    };
    let at_the_rate = if draw.get() > 0.0 {
        let share = share_at(capacity, figures.rated_over, figures.peukert.chosen, draw);
        steps.step("Left by the rate", share, || {
            (
                "(C / (I · H))^(k − 1), at most 1",
                format!(
                    "({} / ({} × {}))^({} − 1)",
                    show::step(capacity.amount()),
                    show::step(draw.amount()),
                    show::given(figures.rated_over.amount()),
                    show::number(figures.peukert.chosen, 2)
                ),
                Origin::Published(source::PEUKERT.at("t = H · (C / (I · H))^k")),
            )
        })
    } else {
        Percent::new(100.0)
    };
    let (wanted, allowed) = drawn(ask, figures, cells, basis)?;
    let cut_off_ends_it = allowed < wanted;
    let depth = if cut_off_ends_it {
        steps.step("Drawn before the cut-off", allowed, || {
            (
                "100 % − charge left at cut-off / n",
                String::new(),
                Origin::Published(source::CHOSEN.at("a typical discharge")),
            )
        })
    } else {
        steps.step("Depth used", wanted, || ("", String::new(), origin(Field::DepthUsed, ask.depth_used)))
    };
    let usable = in_all * (in_the_cold.share() * at_the_rate.share() * depth.share());
    let usable = steps.step("Energy that can be used", usable, || {
        (
            "E · cold · rate · depth",
            format!(
                "{} × {} × {} × {}",
                show::step(in_all.amount()),
                show::step(in_the_cold.amount()),
                show::step(at_the_rate.amount()),
                show::step(depth.amount())
            ),
            Origin::Before,
        )
    });
    Some(Energy {
        capacity,
        in_all,
        in_the_cold,
        at_the_rate,
        depth,
        cut_off_ends_it,
        usable,
        assumed: basis.assumed(),
    })
}
