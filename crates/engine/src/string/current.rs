//! The current of parallel strings, against what the controller's input survives.

use super::Ask;
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::choice::{ControllerKind, LimitHoldsFactor};
use crate::field::Field;
use crate::module::origin;
use crate::quantity::{Amps, Quantity};
use crate::show;

/// array-short-circuit: strings · Isc · sunlight factor · (1 + rear gain) ≤ the controller's PV current limit.
///
/// Where that limit already holds the factor, the factor is left out.
pub(super) fn short_circuit(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.kind(basis) == Some(ControllerKind::Pwm) {
        return Outcome::DoesNotArise;
    }
    let limit = basis.need(Field::PvCurrentLimit, ask.controller.pv_current_limit);
    let holds = basis.assume(Field::LimitHoldsFactor, ask.controller.limit_holds_factor, LimitHoldsFactor::No);
    let total = match holds {
        Some(holds) => total_current(ask, holds, basis, steps),
        None => None,
    };
    match (total, limit) {
        (Some(total), Some(limit)) => Outcome::Held { value: total.amount(), limit: Limit::at_most(limit) },
        _ => Outcome::Asks,
    }
}

/// pwm-match: a PWM controller carries the whole array current: strings · Isc · sunlight factor ≤ its rating.
///
/// Its rating is the lesser of its PV current limit and its output current, of those that were entered: they are one path.
pub(super) fn pwm(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    match ask.kind(basis) {
        Some(ControllerKind::Pwm) => {}
        Some(ControllerKind::Mppt) => return Outcome::DoesNotArise,
        None => return Outcome::Asks,
    }
    let limit = match (ask.controller.pv_current_limit.typed(), ask.controller.output_current.typed()) {
        (Some(input), Some(output)) => Some(input.min(output)),
        (Some(limit), None) | (None, Some(limit)) => Some(limit),
        (None, None) => basis.need(Field::OutputCurrent, ask.controller.output_current),
    };
    let total = total_current(ask, LimitHoldsFactor::No, basis, steps);
    match (total, limit) {
        (Some(total), Some(limit)) => Outcome::Held { value: total.amount(), limit: Limit::at_most(limit) },
        _ => Outcome::Asks,
    }
}

fn total_current(ask: &Ask, holds: LimitHoldsFactor, basis: &mut Basis, steps: &mut Steps) -> Option<Amps> {
    let strings = ask.strings(basis);
    // Both families print the same factor, so which one is chosen needs no asking.
    let rules = ask.family.typed().unwrap_or_default().pv_circuit();
    let factor = match holds {
        LimitHoldsFactor::No => rules.sunlight_factor,
        LimitHoldsFactor::Yes => 1.0,
    };
    let one = ask.module.bright_current(factor, basis, steps);
    let (strings, one) = (strings?, one?);
    Some(steps.step("All strings", one * strings.get(), || {
        let from = match holds {
            LimitHoldsFactor::No => Origin::Published(rules.sunlight_clause),
            LimitHoldsFactor::Yes => origin(Field::LimitHoldsFactor, ask.controller.limit_holds_factor),
        };
        ("strings · I", format!("{} × {}", show::number(strings.get(), 0), show::step(one.amount())), from)
    }))
}
