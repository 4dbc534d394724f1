//! The current that a run is designed for.

use super::{Ask, FromPower, Kind, Rule, assumed};
use crate::check::{Basis, Origin, Steps};
use crate::entry::Entry;
use crate::family::CodeFamily;
use crate::field::Field;
use crate::quantity::{Amps, Percent, Quantity, Volts};
use crate::show;
use crate::source;

/// The currents of a run by the rule of its kind.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Load {
    /// What flows, without any factor: what makes the drop.
    pub working: Amps,
    /// What the conductor must carry where it lies.
    pub carried: Amps,
    /// What it must carry by the table alone, at its terminals.
    pub continuous: Amps,
    /// The least rating of its breaker or fuse.
    pub device_least: Amps,
    /// Below this the rating must lie, where the rule has such an end.
    pub device_below: Option<Amps>,
    /// The rule.
    pub rule: Rule,
}

impl Load {
    /// By `rule`, from what flows.
    #[must_use]
    pub fn of(working: Amps, rule: Rule) -> Self {
        Self {
            working,
            carried: working * rule.carried,
            continuous: working * rule.continuous,
            device_least: working * rule.device_least,
            device_below: rule.device_below.map(|factor| working * factor),
            rule,
        }
    }
}

/// Reads the run's current, or finds it from its power.
///
/// Plain: I = P / V. PV: Isc = 1.08 · P / V. Inverter: I = P / (η · V_lowest), V_lowest = 0.875 · V.
pub(super) fn working(ask: &Ask, kind: Kind, basis: &mut Basis, steps: &mut Steps) -> Option<Amps> {
    match (ask.current, ask.power) {
        (Entry::Blank, Entry::Typed(power)) => {
            let voltage = basis.need(Field::RunVoltage, ask.voltage)?;
            let power = steps.step("Power", power, || ("", String::new(), Origin::Entered(Field::RunPower)));
            match kind.from_power() {
                FromPower::Plain => Some(steps.step("Current", power / voltage, || {
                    (
                        "P / V",
                        format!("{} / {}", show::given(power.amount()), show::given(voltage.amount())),
                        Origin::Before,
                    )
                })),
                FromPower::Pv => {
                    Some(steps.step("Short-circuit current", power / voltage * assumed::ISC_OVER_IMP, || {
                        let (power, voltage) = (show::given(power.amount()), show::given(voltage.amount()));
                        (
                            "1.08 · P / V",
                            format!("1.08 × {power} / {voltage}"),
                            Origin::Published(source::CHOSEN.at("")),
                        )
                    }))
                }
                FromPower::Inverter => {
                    let lowest: Volts = steps.step("Lowest voltage", voltage * assumed::LOWEST_SHARE, || {
                        let clause = source::COMMON_PRACTICE.at("10.5 V of 12 V");
                        (
                            "V · 10.5 / 12",
                            format!("{} × 0.875", show::given(voltage.amount())),
                            Origin::Published(clause),
                        )
                    });
                    let efficiency: Percent =
                        steps.step("Efficiency of the inverter", assumed::INVERTER_EFFICIENCY, || {
                            ("", String::new(), Origin::Published(source::CHOSEN.at("low side of the class")))
                        });
                    Some(steps.step("Current at the lowest voltage", power / lowest / efficiency.share(), || {
                        let (power, lowest) = (show::given(power.amount()), show::step(lowest.amount()));
                        ("P / (η · V)", format!("{power} / (0.90 × {lowest})"), Origin::Before)
                    }))
                }
            }
        }
        // Watts were entered and not read: they are what is asked for.
        (Entry::Blank, Entry::Unread) => {
            basis.ask(Field::RunPower);
            None
        }
        (current, _) => {
            let current = basis.need(Field::RunCurrent, current)?;
            Some(steps.step("Current", current, || ("", String::new(), Origin::Entered(Field::RunCurrent))))
        }
    }
}

/// What flows in the run, without any factor. `None` where an input is missing.
#[must_use]
pub fn working_current(ask: &Ask) -> Option<Amps> {
    let mut basis = Basis::default();
    working(ask, ask.kind(&mut basis)?, &mut basis, &mut crate::check::Steps::silent())
}

/// The currents of the run by the rule of its kind.
pub(super) fn load(ask: &Ask, kind: Kind, family: CodeFamily, basis: &mut Basis, steps: &mut Steps) -> Option<Load> {
    Some(Load::of(working(ask, kind, basis, steps)?, kind.rule(family)))
}
