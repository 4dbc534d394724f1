//! Air and water: what the room needs, how far sparks stay away, what is topped up, what freezes.

use super::Ask;
use super::ask::{YesNo, finite, positive};
use super::rates::bank_capacity;
use super::window::cells;
use super::{energy, settled};
use crate::check::{Basis, Check, FieldSet, Limit, Origin, Outcome, Steps};
use crate::chemistry::{
    Family, Freezing, Gas, Span, air_flow, freezing_point, gas_current, keep_clear, natural_opening, water_split,
};
use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::{
    AmpHours, Amps, Celsius, Count, CubicMetresPerHour, Litres, Metres, Percent, Quantity, SquareCentimetres,
};
use crate::show;
use crate::source::{self, Clause};

/// Days that a month is counted as.
const DAYS: f64 = 30.0;

/// What a bank asks of its room and of whoever tends it.
#[derive(Clone, Debug, PartialEq)]
pub struct AirAndWater {
    /// Current that makes gas; none where no hydrogen is made in use.
    pub gassing: Option<Amps>,
    /// Fresh air.
    pub flow: Option<CubicMetresPerHour>,
    /// Free area of an inlet, and the same of an outlet, that does it without a fan.
    pub opening: Option<SquareCentimetres>,
    /// Distance from the vents inside which nothing may spark or glow.
    pub keep_clear: Option<Metres>,
    /// Where the gassing is from, and whether the standard covers it.
    pub gassing_source: Option<Clause>,
    /// Whether [`source::IEC_62485_2`] covers this chemistry.
    pub within_the_standard: bool,
    /// Water to top up in a month; none for sealed cells.
    pub water_a_month: Option<Span<Litres>>,
    /// Temperature at which the bank freezes at its lowest charge; none where nothing does.
    pub freezes_at: Option<Celsius>,
    /// The same, empty.
    pub freezes_empty_at: Option<Celsius>,
    /// What freezing costs, against the room's coldest; none where it does not arise.
    pub freezing: Option<Check<super::Requirement>>,
    /// What to mind.
    pub cautions: &'static [&'static str],
    /// The inputs that were assumed.
    pub assumed: FieldSet,
}

const LEAD: &[&str] = &[
    "Hydrogen rises: inlet low, outlet high, no spark or flame inside the distance, no switchgear over the cells.",
    "Acid burns: eye shield, gloves, apron, and water and bicarbonate at hand.",
    "Top up with distilled water after charging, never before, and never with acid.",
    "Insulate tools and take off rings: any bank welds a wrench.",
];
const NICKEL: &[&str] = &[
    "Hydrogen rises: inlet low, outlet high, no spark or flame inside the distance, no switchgear over the cells.",
    "Lye burns worse than acid: eye shield, gloves, apron, and much water at hand.",
    "Top up with distilled water only. Never a tool or a funnel that has touched acid.",
    "Insulate tools and take off rings: any bank welds a wrench.",
];
const LITHIUM: &[&str] = &[
    "No hydrogen in use; a damaged cell gives off smoke that burns and poisons: never in a sleeping room or on the way out of one.",
    "No charging below the cell's lowest charging temperature.",
    "Insulate tools and take off rings: any bank welds a wrench.",
];

/// The gassing current that the room is aired for, with its source.
struct Gassing {
    current: Amps,
    /// Of one cell or block: what one vent gives off.
    each: Amps,
    source: Clause,
    within_the_standard: bool,
}

/// Boost counts, as every absorb of a solar charger is one. `None` inside where nothing gasses.
fn gassing(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<Option<Gassing>> {
    let (_, figures) = ask.chemistry(basis)?;
    match figures.gas {
        Gas::Nothing => Some(None),
        Gas::Standard { boost, source, .. } => {
            let capacity = bank_capacity(ask, basis, steps);
            let strings = ask.strings(basis);
            let (capacity, strings) = (capacity?, strings?);
            let current = steps.step("Current that makes gas", gas_current(boost, capacity), || {
                (
                    "I_gas · C / 1000",
                    format!("{} × {} / 1000", show::given(boost.amount()), show::step(capacity.amount())),
                    Origin::Published(source),
                )
            });
            Some(Some(Gassing { current, each: current / strings.get(), source, within_the_standard: true }))
        }
        Gas::WholeCurrent { source } => {
            let strings = ask.strings(basis)?;
            let current = match positive(ask.charge_current) {
                Entry::Blank => {
                    // The greatest that the cells take.
                    let capacity = bank_capacity(ask, basis, steps)?;
                    basis.assume(Field::ChargeCurrent, Entry::Blank, capacity / figures.greatest_charge.chosen)?
                }
                entry => basis.need(Field::ChargeCurrent, entry)?,
            };
            let current = steps
                .step("Current that makes gas: all of it", current, || ("", String::new(), Origin::Published(source)));
            Some(Some(Gassing { current, each: current / strings.get(), source, within_the_standard: false }))
        }
    }
}

/// Fresh air and the opening for it.
fn aired(gassing: &Gassing, cells: u32, steps: &mut Steps) -> (CubicMetresPerHour, SquareCentimetres) {
    let flow = steps.step("Fresh air", air_flow(cells, gassing.current), || {
        (
            "0.05 · n · I",
            format!("0.05 × {cells} × {}", show::step(gassing.current.amount())),
            Origin::Published(source::IEC_62485_2.at("7.2")),
        )
    });
    let opening = steps.step("Opening, inlet and outlet each", natural_opening(flow), || {
        ("28 · Q", format!("28 × {}", show::step(flow.amount())), Origin::Published(source::IEC_62485_2.at("7.3")))
    });
    (flow, opening)
}

#[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "cells counted, clamped to what u32 holds")]
fn counted(cells: f64) -> u32 {
    cells.clamp(0.0, 1e6) as u32
}

/// bank-air: the inlet's free area ≥ what carries the hydrogen off without a fan.
///
/// A fan that moves as much air does as well; then enter the opening as wanted and wire the fan to the charger.
pub(super) fn openings(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let gassing = match gassing(ask, basis, steps) {
        Some(None) => return Outcome::DoesNotArise,
        gassing => gassing.flatten(),
    };
    let cells = cells(ask, basis, steps);
    let there = match finite(ask.air_opening) {
        // Not an opening is an opening of nothing.
        Entry::Typed(area) if area.get() < 0.0 => basis.need(Field::AirOpening, Entry::Unread),
        entry => basis.need(Field::AirOpening, entry),
    };
    let (Some(gassing), Some(cells)) = (gassing, cells) else { return Outcome::Asks };
    let (_, opening) = aired(&gassing, counted(cells), steps);
    let Some(there) = there else { return Outcome::Asks };
    Outcome::Held { value: there.amount(), limit: Limit::at_least(opening) }
}

/// bank-air-sleeping: nobody sleeps in the room, whatever the chemistry.
pub(super) fn sleeping(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.chemistry(&mut Basis::default()).is_none() {
        return Outcome::DoesNotArise;
    }
    let Some(sleeps) = basis.assume(Field::SleepingRoom, ask.sleeping_room, YesNo::No) else { return Outcome::Asks };
    let rooms = Count::new(if sleeps == YesNo::Yes { 1.0 } else { 0.0 });
    let rooms = steps.step("Sleeping rooms with the bank in them", rooms, || {
        ("", String::new(), super::ask::origin(Field::SleepingRoom, ask.sleeping_room))
    });
    Outcome::Held { value: rooms.amount(), limit: Limit::at_most(Count::new(0.0)) }
}

/// Water split in a month, at the best and at the worst coulomb efficiency of the chemistry's range.
///
/// w = 0.336 g/Ah · n · p · out · (1/η − 1) · 30
fn water(ask: &Ask, basis: &mut Basis) -> Option<Span<Litres>> {
    let (_, figures) = ask.chemistry(basis)?;
    if !figures.takes_water {
        return None;
    }
    let cells = cells(ask, basis, &mut Steps::silent())?;
    let out: AmpHours = match finite(ask.used_a_day) {
        Entry::Typed(energy) if energy.get() >= 0.0 => energy / (figures.nominal * cells),
        Entry::Blank => {
            let full = energy(ask)?;
            basis.assume(Field::UsedADay, Entry::Blank, full.capacity * full.depth.share())?
        }
        Entry::Typed(_) | Entry::Unread => {
            basis.ask(Field::UsedADay);
            return None;
        }
    };
    let split = |efficiency: Percent| water_split(out * (DAYS * (1.0 / efficiency.share() - 1.0)), counted(cells));
    let range = figures.coulomb_efficiency.range;
    Some(Span::new(split(range.greatest), split(range.least)))
}

/// Air, distance, water and frost for a bank. `None` where chemistry, capacity or counts are missing.
///
/// Water: what cycling overcharges; long float adds to it. A day's use that was not entered is taken as the whole depth
/// used, the thirsty end.
///
/// # Source
///
/// [`source::IEC_62485_2`], Faraday's law by [`source::CODATA`]; nickel-iron lies outside the standard and all of its
/// charge current is taken to gas.
#[must_use]
pub fn air_and_water(ask: &Ask) -> Option<AirAndWater> {
    let ask = &settled(ask);
    let basis = &mut Basis::default();
    let (chemistry, figures) = ask.chemistry(basis)?;
    let in_series = counted(cells(ask, basis, &mut Steps::silent())?);
    let in_block = counted(ask.block_cells(basis)?.get());
    let gassing = gassing(ask, basis, &mut Steps::silent())?;
    let aired = gassing.as_ref().map(|gassing| aired(gassing, in_series, &mut Steps::silent()));
    // Lye and lithium freeze, or not, whatever the charge.
    let lowest = match figures.freezing {
        Freezing::AcidByCharge => ask.lowest_charge(figures, basis)?,
        Freezing::Lye(..) | Freezing::Nothing => Percent::new(0.0),
    };
    Some(AirAndWater {
        gassing: gassing.as_ref().map(|gassing| gassing.current),
        flow: aired.map(|(flow, _)| flow),
        opening: aired.map(|(_, opening)| opening),
        keep_clear: gassing.as_ref().map(|gassing| keep_clear(in_block, gassing.each)),
        gassing_source: gassing.as_ref().map(|gassing| gassing.source),
        within_the_standard: gassing.as_ref().is_some_and(|gassing| gassing.within_the_standard),
        water_a_month: water(ask, basis),
        freezes_at: freezing_point(chemistry, lowest),
        freezes_empty_at: freezing_point(chemistry, Percent::new(0.0)),
        freezing: super::Requirement::Cold.check(ask),
        cautions: match chemistry.family() {
            Family::Lead => LEAD,
            Family::Nickel => NICKEL,
            Family::Lithium => LITHIUM,
        },
        assumed: basis.assumed(),
    })
}
