//! Strings side by side: how they share, and the rush when they are joined.
//!
//! Both take the least resistance of the cells, new, warm and full: ties then weigh most, and the rush is greatest.

use super::ask::{origin, positive};
use super::window::cells;
use super::{Ask, settled};
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::chemistry::rested;
use crate::choice::Choice;
use crate::entry::Entry;
use crate::field::Field;
use crate::joining;
use crate::network::Behind;
use crate::quantity::{Amps, Ohms, Percent, Quantity, Volts};
use crate::sharing::{self, Arrangement, MOST_STRINGS, Paralleled, Sharing};
use crate::show;

/// One tie: half a metre of 1/0 AWG, 0.329 mΩ/m, and two lugs of 0.05 mΩ. *Chosen*, as usual between shelves.
pub(super) const TIE: Ohms = Ohms::new(0.000_265);

/// How far above the even share the hardest string may work. *Chosen*: a fifth; beyond it that string ages first and
/// takes the others along.
const MOST_OVER_EVEN: Percent = Percent::new(120.0);

/// Any current does: with equal strings the shares do not depend on it.
const TRIAL: Amps = Amps::new(100.0);

impl Choice for Arrangement {
    fn of_key(key: &str) -> Option<Self> {
        match key {
            "same-end" => Some(Self::SameEnd),
            "opposite-ends" => Some(Self::OppositeEnds),
            "middle" => Some(Self::Middle),
            _ => None,
        }
    }
}

/// One string, full and rested, with the least resistance of its cells. R = n · R₁₀₀ · 100 Ah / C
fn string(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<Behind> {
    let chemistry = ask.chemistry(basis);
    let cells = cells(ask, basis, steps);
    let capacity = ask.capacity(basis);
    let ((chemistry, figures), cells, capacity) = (chemistry?, cells?, capacity?);
    let each = figures.resistance(capacity).least;
    let resistance = steps.step("One string, at least", each * cells, || {
        (
            "n · R",
            format!("{} × {}", show::number(cells, 0), show::step(each.amount())),
            Origin::Published(figures.absorb.source),
        )
    });
    Some(Behind { emf: rested(chemistry, Percent::new(100.0)) * cells, resistance })
}

/// Strings side by side; none inside where there is one alone.
fn beside(ask: &Ask, basis: &mut Basis) -> Option<Option<usize>> {
    let strings = ask.strings(basis)?.get().floor();
    #[expect(
        clippy::cast_possible_truncation,
        clippy::cast_sign_loss,
        reason = "above one, and a cast stops at the top"
    )]
    Some((strings >= 2.0).then_some(strings as usize))
}

/// One tie as entered; a bar may have no resistance.
fn tie(ask: &Ask) -> Entry<Ohms> {
    match ask.tie {
        Entry::Typed(tie) if tie.get() == 0.0 => ask.tie,
        entry => positive(entry),
    }
}

/// bank-sharing: the hardest string's share over the even one ≤ 120 %.
///
/// For equal strings in a row, tied on both bars by equal ties. Above 96 strings it is not solved, and asks.
pub(super) fn sharing(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let count = match beside(ask, basis) {
        Some(None) => return Outcome::DoesNotArise,
        count => count.flatten(),
    };
    let string = string(ask, basis, steps);
    let arrangement = basis.assume(Field::TakeOff, ask.take_off, Arrangement::SameEnd);
    let tie = basis.assume(Field::TieResistance, tie(ask), TIE);
    let (Some(count), Some(string), Some(arrangement), Some(tie)) = (count, string, arrangement, tie) else {
        return Outcome::Asks;
    };
    if count > MOST_STRINGS {
        basis.ask(Field::StringsOfCells);
        return Outcome::Asks;
    }
    let tie = steps.step("One tie", tie, || ("", String::new(), origin(Field::TieResistance, ask.tie)));
    let over = shared(string, count, tie, arrangement).and_then(|found| found.greatest_over_even);
    let Some(over) = over else {
        basis.ask(Field::TieResistance);
        return Outcome::Asks;
    };
    let over = steps.step("Hardest string over the even share", Percent::from_share(over), || {
        let put_in = format!(
            "{count} strings of {}, ties of {}",
            show::step(string.resistance.amount()),
            show::step(tie.amount())
        );
        ("Iₖ / (I / p), by nodal analysis", put_in, origin(Field::TakeOff, ask.take_off))
    });
    Outcome::Held { value: over.amount(), limit: Limit::at_most(MOST_OVER_EVEN) }
}

/// Equal strings in a row on equal ties. `None` where no network solves it.
fn shared(string: Behind, count: usize, tie: Ohms, arrangement: Arrangement) -> Option<Sharing> {
    let (strings, ties) = (vec![string; count], vec![tie; count.saturating_sub(1)]);
    let (positive, negative) = arrangement.take_offs(count);
    let bank = Paralleled { strings: &strings, positive_ties: &ties, negative_ties: &ties, positive, negative };
    sharing::share(bank, TRIAL, &mut Steps::silent()).ok()
}

/// What each string carries, by where the bank's leads are taken off.
#[derive(Clone, Debug, PartialEq)]
pub struct Shared {
    /// Where they are.
    pub take_off: Arrangement,
    /// Each string's current over the even share, in order along the bars.
    pub over_even: Vec<Percent>,
    /// The greatest of them.
    pub hardest: Percent,
}

/// How the strings of the bank share, for every take-off: see [`super::Requirement::Sharing`]. `None` where there is one
/// string alone, more than can be solved, or an input is missing.
#[must_use]
pub fn shares(ask: &Ask) -> Option<Vec<Shared>> {
    let ask = &settled(ask);
    let basis = &mut Basis::default();
    let count = beside(ask, basis)??;
    let string = string(ask, basis, &mut Steps::silent())?;
    let tie = basis.assume(Field::TieResistance, tie(ask), TIE)?;
    let each = |take_off: Arrangement| {
        let found = shared(string, count, tie, take_off)?;
        let even = TRIAL / count as f64;
        let over = |current: &Amps| Percent::from_share(*current / even);
        let hardest = Percent::from_share(found.greatest_over_even?);
        Some(Shared { take_off, over_even: found.currents.iter().map(over).collect(), hardest })
    };
    Arrangement::ALL.into_iter().map(each).collect()
}

/// bank-join: the rush between two strings as far apart as entered ≤ what one of them may be charged with.
///
/// The link between them is counted as nothing but one tie each way, the hard end.
pub(super) fn join(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if beside(ask, &mut Basis::default()) == Some(None) {
        return Outcome::DoesNotArise;
    }
    let string = string(ask, basis, steps);
    let apart = match ask.volts_apart {
        Entry::Typed(apart) if apart.get() == 0.0 => Some(apart),
        entry => basis.need(Field::VoltsApart, positive(entry)),
    };
    let tie = basis.assume(Field::TieResistance, tie(ask), TIE);
    let chemistry = ask.chemistry(basis);
    let capacity = ask.capacity(basis);
    let pack = match positive(ask.pack_charge_limit) {
        Entry::Unread => {
            basis.ask(Field::PackChargeLimit);
            None
        }
        Entry::Typed(limit) => Some(Some(limit)),
        Entry::Blank => Some(None),
    };
    let (Some(low), Some(apart), Some(tie), Some((_, figures)), Some(capacity), Some(pack)) =
        (string, apart, tie, chemistry, capacity, pack)
    else {
        return Outcome::Asks;
    };
    let high = Behind { emf: low.emf + apart, ..low };
    let Ok(rush) = joining::join(high, low, tie * 2.0, steps) else {
        basis.ask(Field::CellCapacity);
        return Outcome::Asks;
    };
    let limit: Amps = match pack {
        Some(pack) => {
            steps.step("What one pack lets in", pack, || ("", String::new(), Origin::Entered(Field::PackChargeLimit)))
        }
        None => {
            let time = figures.greatest_charge;
            steps.step("Greatest charge current of one string", capacity / time.chosen, || {
                let put_in = format!("{} / {}", show::given(capacity.amount()), show::given(time.chosen.amount()));
                ("C / t", put_in, Origin::Published(time.source))
            })
        }
    };
    let most: Volts = joining::greatest_difference(limit, low.resistance * 2.0 + tie * 2.0);
    steps.step("So they may be apart by", most, || ("I · R", String::new(), Origin::Before));
    Outcome::Held { value: rush.amount(), limit: Limit::at_most(limit) }
}
