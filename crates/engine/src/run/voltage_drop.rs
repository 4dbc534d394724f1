//! run-drop: what the conductor takes of the voltage, at its own temperature.

use super::{Ask, Candidate, Kind};
use crate::ampacity::{Laid, warms};
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::conductor::{REACTANCE, own_temperature, resistance};
use crate::field::Field;
use crate::quantity::{Amps, Celsius, Metres, Ohms, OhmsPerMetre, Percent, Quantity, Volts, Watts};
use crate::show;
use crate::source;

/// What a run takes of the voltage.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Drop {
    /// Temperature of the conductor.
    pub temperature: Celsius,
    /// Resistance of the way there and back; alternating, its impedance.
    pub way: Ohms,
    /// Volts lost.
    pub volts: Volts,
    /// The same as a part of the run's voltage.
    pub part: Percent,
    /// Volts lost by each cell of 2 V, where the run charges a bank: what the controller does not see of it.
    pub per_cell: Option<Volts>,
    /// Watts lost as heat.
    pub lost: Watts,
}

/// Length, voltage, allowed drop: what the drop is judged by besides the conductor.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Way {
    pub length: Metres,
    pub voltage: Volts,
    pub allowed: Percent,
}

impl Way {
    pub(super) fn read(ask: &Ask, kind: Kind, basis: &mut Basis) -> Option<Self> {
        let length = basis.need(Field::RunLength, ask.length);
        let voltage = basis.need(Field::RunVoltage, ask.voltage);
        let allowed = ask.allowed_drop(basis, kind);
        Some(Self { length: length?, voltage: voltage?, allowed: allowed? })
    }
}

/// Impedance of one conductor by its length, and its resistance and temperature, at `current`.
///
/// Alternating: √(R² + X²), the most that any power factor makes of it. *Chosen*: the power factor is not asked for.
pub(super) fn by_length(
    current: Amps,
    candidate: Candidate,
    laid: &Laid,
    kind: Kind,
    steps: &mut Steps,
) -> (OhmsPerMetre, OhmsPerMetre, Celsius) {
    let several = f64::from(candidate.parallel);
    let greatest = laid.insulation.bears(laid.family);
    let ampacity = warms(laid, candidate.size) * several;
    let temperature = own_temperature(laid.ambient, greatest, current, ampacity);
    let temperature = steps.step("The conductor's own temperature", temperature, || {
        let (air, most) = (show::given(laid.ambient.amount()), show::given(greatest.amount()));
        let (current, ampacity) = (show::step(current.amount()), show::step(ampacity.amount()));
        let put_in = format!("{air} + ({most} − {air}) × ({current} / {ampacity})²");
        ("Ta + (Tmax − Ta) · (I / Iz)²", put_in, Origin::Published(source::IEC_60287.at("loss and rise")))
    });
    let one = resistance(laid.conductor, candidate.size, temperature) / several;
    let one = steps.step("Resistance of each pole by its length", one, || {
        let clause = match candidate.size {
            crate::conductor::Size::Metric(_) => source::IEC_60228.at("tables 2 and 3"),
            _ => source::NEC.at("chapter 9, table 8; ASTM B258 and ρ of copper above its solid rows"),
        };
        ("", format!("{candidate} at {}", show::step(temperature.amount())), Origin::Published(clause))
    });
    if !kind.alternates() {
        return (one, one, temperature);
    }
    let reactance = REACTANCE / several;
    let impedance = OhmsPerMetre::new(one.get().hypot(reactance.get()));
    let impedance = steps.step("With reactance, at the worst power factor", impedance, || {
        let put_in = format!("√({:.6}² + {:.6}²)", one.get(), reactance.get());
        ("√(R² + X²)", put_in, Origin::Published(source::IEC_60364_5_52.at("annex G, 0.08 mΩ/m")))
    });
    (impedance, one, temperature)
}

/// What the run takes of its voltage at `current`.
///
/// V = 2 · L · Z · I; W = 2 · L · R · I²
///
/// # Source
///
/// Ohm's law; [`source::IEC_60364_5_52`], annex G.
pub(super) fn drop(current: Amps, candidate: Candidate, laid: &Laid, kind: Kind, way: Way, steps: &mut Steps) -> Drop {
    let (impedance, one, temperature) = by_length(current, candidate, laid, kind, steps);
    let both_ways = way.length * 2.0;
    let loop_ohms = impedance * both_ways;
    let volts = steps.step("Volts lost", loop_ohms * current, || {
        let (length, current) = (show::given(way.length.amount()), show::step(current.amount()));
        ("2 · L · R · I", format!("2 × {length} × {:.6} Ω/m × {current}", impedance.get()), Origin::Before)
    });
    let part = steps.step("As a part of the voltage", Percent::from_share(volts / way.voltage), || {
        let put_in = format!("{} / {}", show::step(volts.amount()), show::given(way.voltage.amount()));
        ("V lost / V", put_in, Origin::Before)
    });
    let per_cell = matches!(kind, Kind::ControllerOutput | Kind::BankMain).then(|| {
        steps.step("For each cell of 2 V", volts / (way.voltage.get() / 2.0), || {
            let cells = show::number(way.voltage.get() / 2.0, 1);
            ("V lost / cells", format!("{} / {cells}", show::step(volts.amount())), Origin::Before)
        })
    });
    let lost = steps.step("Watts lost", one * both_ways * current * current, || {
        let (length, current) = (show::given(way.length.amount()), show::step(current.amount()));
        ("2 · L · R · I²", format!("2 × {length} × {:.6} Ω/m × ({current})²", one.get()), Origin::Before)
    });
    Drop { temperature, way: loop_ohms, volts, part, per_cell, lost }
}

/// Sets the drop against what is allowed.
pub(super) fn judge(drop: &Drop, way: Way) -> Outcome {
    Outcome::Held { value: drop.part.amount(), limit: Limit::at_most(way.allowed) }
}
