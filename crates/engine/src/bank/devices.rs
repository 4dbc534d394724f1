//! The bank's window against every device on the bus.

use super::Ask;
use super::ask::{finite, origin, positive};
use super::window::{Stage, coldest, held, highest, lowest};
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::chemistry::RATED_AT;
use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::{Quantity, Volts};
use crate::show;

/// Voltages that an inverter of a 12 V class usually runs between. *Chosen*, common practice: read the nameplate.
const USUAL_FOR_12_V: (f64, f64) = (10.5, 16.0);

/// Highest voltage that the inverter tolerates: entered, or usual for the class of the bus.
fn inverter_high(ask: &Ask, basis: &mut Basis) -> Option<Volts> {
    usual(ask, Field::InverterHigh, ask.inverter_high, basis)
}

/// Lowest voltage at which the inverter runs: entered, or usual for the class of the bus.
fn inverter_low(ask: &Ask, basis: &mut Basis) -> Option<Volts> {
    usual(ask, Field::InverterLow, ask.inverter_low, basis)
}

/// What an inverter of the bus's class usually runs between, at the end that `field` asks for.
pub(super) fn usual_for(ask: &Ask, field: Field) -> Option<Volts> {
    let for_12 = match field {
        Field::InverterLow => USUAL_FOR_12_V.0,
        Field::InverterHigh => USUAL_FOR_12_V.1,
        _ => return None,
    };
    Some(positive(ask.bus_voltage).typed()? * (for_12 / 12.0))
}

fn usual(ask: &Ask, field: Field, entry: Entry<Volts>, basis: &mut Basis) -> Option<Volts> {
    match (positive(entry), usual_for(ask, field)) {
        (Entry::Blank, Some(usual)) => basis.assume(field, Entry::Blank, usual),
        (entry, _) => basis.need(field, entry),
    }
}

/// The cut-off that stops first: of the inverter, or of loads on the bus.
pub(super) fn cut_off(ask: &Ask, basis: &mut Basis) -> Option<Volts> {
    if ask.without_inverter {
        return basis.need(Field::LoadsLow, positive(ask.loads_low));
    }
    let inverter = inverter_low(ask, basis);
    match positive(ask.loads_low) {
        Entry::Blank => inverter,
        loads => {
            let loads = basis.need(Field::LoadsLow, loads);
            Some(inverter?.max(loads?))
        }
    }
}

/// bank-window-high: highest voltage on charge ≤ the inverter's top.
pub(super) fn high(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.without_inverter {
        return Outcome::DoesNotArise;
    }
    let value = highest(ask, basis, steps).map(|(volts, _)| volts);
    let limit = inverter_high(ask, basis);
    at_most(value, limit, Field::InverterHigh, ask.inverter_high, "What the inverter tolerates", steps)
}

/// bank-window-high-absorb: the same without equalising, where the bank is equalised.
pub(super) fn high_absorb(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.without_inverter
        || matches!(highest(ask, &mut Basis::default(), &mut Steps::silent()), Some((_, Stage::Absorb)))
    {
        return Outcome::DoesNotArise;
    }
    let at = coldest(ask, basis);
    let value = held(ask, Stage::Absorb, at, basis, steps).flatten();
    let limit = inverter_high(ask, basis);
    at_most(value, limit, Field::InverterHigh, ask.inverter_high, "What the inverter tolerates", steps)
}

/// bank-window-high-loads: highest voltage on charge ≤ what loads on the bus tolerate.
pub(super) fn high_loads(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.loads_high == Entry::Blank {
        return Outcome::DoesNotArise;
    }
    let value = highest(ask, basis, steps).map(|(volts, _)| volts);
    let limit = basis.need(Field::LoadsHigh, positive(ask.loads_high));
    at_most(value, limit, Field::LoadsHigh, ask.loads_high, "What the loads tolerate", steps)
}

/// bank-window-high-cells: no cell above what it may never pass.
pub(super) fn high_cells(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let Some((_, figures)) = ask.chemistry(basis) else { return Outcome::DoesNotArise };
    let Some(limit) = figures.never_above else { return Outcome::DoesNotArise };
    let Some((value, _)) = highest(ask, basis, steps) else { return Outcome::Asks };
    let Some(cells) = super::window::cells(ask, basis, &mut Steps::silent()) else { return Outcome::Asks };
    let each = steps.step("Highest, a cell", value / cells, || {
        ("V / n", format!("{} / {}", show::step(value.amount()), show::number(cells, 0)), Origin::Before)
    });
    Outcome::Held { value: each.amount(), limit: Limit::at_most(limit) }
}

fn at_most(
    value: Option<Volts>,
    limit: Option<Volts>,
    field: Field,
    entry: Entry<Volts>,
    what: &'static str,
    steps: &mut Steps,
) -> Outcome {
    let (Some(value), Some(limit)) = (value, limit) else { return Outcome::Asks };
    let limit = steps.step(what, limit, || ("", String::new(), origin(field, entry)));
    Outcome::Held { value: value.amount(), limit: Limit::at_most(limit) }
}

/// bank-charge-cap: where the chargers' voltage is capped, what is left for absorbing ≥ the least that fills the cells.
pub(super) fn cap(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.charge_cap == Entry::Blank {
        return Outcome::DoesNotArise;
    }
    let value = held(ask, Stage::Absorb, Some(RATED_AT), basis, steps).flatten();
    let figures = ask.chemistry(basis).map(|(_, figures)| figures);
    let cells = super::window::cells(ask, basis, &mut Steps::silent());
    let (Some(value), Some(figures), Some(cells)) = (value, figures, cells) else { return Outcome::Asks };
    let range = figures.absorb.range.least;
    // A maker who asks for less than the usual range is believed.
    let least = positive(ask.absorb).typed().map_or(range, |absorb| absorb.min(range));
    let limit = steps.step("The least that fills the cells", least * cells, || {
        let put_in = format!("{} × {}", show::number(cells, 0), show::given(least.amount()));
        ("n · V", put_in, Origin::Published(figures.absorb.source))
    });
    Outcome::Held { value: value.amount(), limit: Limit::at_least(limit) }
}

/// bank-window-low: lowest voltage in use ≥ every cut-off; above it, a cut-off leaves capacity unused.
pub(super) fn low(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.without_inverter && ask.loads_low == Entry::Blank {
        return Outcome::DoesNotArise;
    }
    let value = lowest(ask, basis, steps);
    let limit = cut_off(ask, basis);
    let (Some(value), Some(limit)) = (value, limit) else { return Outcome::Asks };
    if let Some(cells) = super::window::cells(ask, basis, &mut Steps::silent()) {
        steps.step("The cut-off, a cell", limit / cells, || {
            let put_in = format!("{} / {}", show::given(limit.amount()), show::number(cells, 0));
            ("cut-off / n", put_in, origin(Field::InverterLow, ask.inverter_low))
        });
    }
    Outcome::Held { value: value.amount(), limit: Limit::at_least(limit) }
}

/// bank-orphan: with the bank gone, the controller's output ≤ what every device on the bus tolerates.
///
/// A PWM controller passes the array's own open voltage on: that is then its output limit.
pub(super) fn orphan(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.without_inverter && ask.loads_high == Entry::Blank {
        return Outcome::DoesNotArise;
    }
    let value = basis.need(Field::ControllerOutputLimit, positive(ask.controller_output_limit));
    let loads = match finite(ask.loads_high) {
        Entry::Blank => Some(None),
        loads => basis.need(Field::LoadsHigh, positive(loads)).map(Some),
    };
    if ask.without_inverter {
        let (Some(value), Some(Some(limit))) = (value, loads) else { return Outcome::Asks };
        let limit =
            steps.step("What the loads tolerate", limit, || ("", String::new(), Origin::Entered(Field::LoadsHigh)));
        return Outcome::Held { value: value.amount(), limit: Limit::at_most(limit) };
    }
    let inverter = inverter_high(ask, basis);
    let (Some(value), Some(inverter), Some(loads)) = (value, inverter, loads) else { return Outcome::Asks };
    let value = steps.step("With no bank the bus may rise to", value, || {
        ("", String::new(), Origin::Entered(Field::ControllerOutputLimit))
    });
    let limit = loads.map_or(inverter, |loads| inverter.min(loads));
    let limit = steps.step("The first device to give way", limit, || {
        let put_in = loads.map_or_else(String::new, |loads| {
            format!("min({}, {})", show::given(inverter.amount()), show::given(loads.amount()))
        });
        ("least top input", put_in, origin(Field::InverterHigh, ask.inverter_high))
    });
    Outcome::Held { value: value.amount(), limit: Limit::at_most(limit) }
}
