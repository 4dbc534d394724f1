//! Currents against what the chemistry takes and gives.

use super::Ask;
use super::ask::positive;
use super::window::cells;
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::chemistry::Figure;
use crate::field::Field;
use crate::quantity::{AmpHours, Amps, Hours, Quantity, Volts};
use crate::show;

/// Capacity of all strings together. C = p · C₁
pub(super) fn bank_capacity(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<AmpHours> {
    let each = ask.capacity(basis);
    let strings = ask.strings(basis);
    let (each, strings) = (each?, strings?);
    Some(steps.step("Capacity of the bank", each * strings.get(), || {
        (
            "p · C",
            format!("{} × {}", show::number(strings.get(), 0), show::given(each.amount())),
            Origin::Entered(Field::CellCapacity),
        )
    }))
}

fn over(capacity: AmpHours, time: Figure<Hours>, what: &'static str, steps: &mut Steps) -> Amps {
    steps.step(what, capacity / time.chosen, || {
        (
            "C / t",
            format!("{} / {}", show::step(capacity.amount()), show::given(time.chosen.amount())),
            Origin::Published(time.source),
        )
    })
}

/// bank-charge-rate: charge current ≤ the greatest that the chemistry takes, lest it gas, foam or overheat.
pub(super) fn charge(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let figures = ask.chemistry(basis).map(|(_, figures)| figures);
    let capacity = bank_capacity(ask, basis, steps);
    let current = basis.need(Field::ChargeCurrent, positive(ask.charge_current));
    let (Some(figures), Some(capacity), Some(current)) = (figures, capacity, current) else { return Outcome::Asks };
    let limit = over(capacity, figures.greatest_charge, "Greatest charge current", steps);
    Outcome::Held { value: current.amount(), limit: Limit::at_most(limit) }
}

/// bank-charge-rate-least: charge current ≥ the least that does the cells good.
pub(super) fn charge_least(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let figures = ask.chemistry(basis).map(|(_, figures)| figures);
    if figures.is_some_and(|figures| figures.least_charge.is_none()) {
        return Outcome::DoesNotArise;
    }
    let capacity = bank_capacity(ask, basis, steps);
    let current = basis.need(Field::ChargeCurrent, positive(ask.charge_current));
    let (Some(least), Some(capacity), Some(current)) =
        (figures.and_then(|figures| figures.least_charge), capacity, current)
    else {
        return Outcome::Asks;
    };
    let limit = over(capacity, least, "Least useful charge current", steps);
    Outcome::Held { value: current.amount(), limit: Limit::at_least(limit) }
}

/// Current that `power` draws from the bank at its nominal voltage. I = P / (n · V)
pub(super) fn usual_draw(
    power: Field,
    watts: Option<crate::quantity::Watts>,
    ask: &Ask,
    basis: &mut Basis,
    steps: &mut Steps,
) -> Option<Amps> {
    let nominal = ask.chemistry(basis).map(|(_, figures)| figures.nominal);
    let cells = cells(ask, basis, steps);
    let (watts, nominal, cells) = (watts?, nominal?, cells?);
    let volts: Volts = nominal * cells;
    Some(steps.step("Current drawn", watts / volts, || {
        ("P / V", format!("{} / {}", show::given(watts.amount()), show::step(volts.amount())), Origin::Entered(power))
    }))
}

/// bank-discharge-rate: the greatest steady draw ≤ what the chemistry gives for long.
pub(super) fn discharge(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let figures = ask.chemistry(basis).map(|(_, figures)| figures);
    let load = basis.need(Field::GreatestLoad, positive(ask.greatest_load));
    let draw = usual_draw(Field::GreatestLoad, load, ask, basis, steps);
    let capacity = bank_capacity(ask, basis, steps);
    let (Some(figures), Some(draw), Some(capacity)) = (figures, draw, capacity) else { return Outcome::Asks };
    let limit = over(capacity, figures.greatest_discharge, "Greatest steady draw", steps);
    Outcome::Held { value: draw.amount(), limit: Limit::at_most(limit) }
}
