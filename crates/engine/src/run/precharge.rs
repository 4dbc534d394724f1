//! precharge: closing an inverter's empty capacitors onto the bank.

use super::{Ask, Kind, assumed};
use crate::bank::YesNo;
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::{Amps, Ohms, Quantity, Seconds, Volts, Watts};
use crate::show;
use crate::source;

/// Input capacitance of an inverter for each watt of its power, in farads.
///
/// *Chosen*: 10 µF, the upper end of inverters for 12 to 48 V. The maker's figure changes it.
const FARADS_A_WATT: f64 = 10e-6;

/// Peak that a resistor may let through. *Chosen*: 10 A, which a clip or a small switch makes and breaks unharmed.
const GENTLE: Amps = Amps::new(10.0);

/// Time constants to wait: after five, less than 1 % of the voltage is left across the switch.
const TIME_CONSTANTS: f64 = 5.0;

/// How often its rating a breaker makes onto without harm to its contacts.
///
/// *Chosen*: 10, where the usual magnetic trip ends and opens it while its contacts still bounce.
const MAKES: f64 = 10.0;

/// Resistors that are sold for it, in ohms. *Chosen*: every other step of the E12 series.
const RESISTORS: [f64; 18] =
    [1.0, 1.5, 2.2, 3.3, 4.7, 6.8, 10.0, 15.0, 22.0, 33.0, 47.0, 68.0, 100.0, 150.0, 220.0, 330.0, 470.0, 680.0];

/// How to charge an inverter's capacitors before its breaker is closed.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Precharge {
    /// Peak current without a resistor.
    pub peak: Amps,
    /// Resistor to hold across the open breaker.
    pub resistor: Ohms,
    /// Time constant with it.
    pub time_constant: Seconds,
    /// How long to hold it.
    pub wait: Seconds,
    /// The most power that it sees, for a moment.
    pub resistor_peak: Watts,
}

/// Peak current onto empty capacitors: V / (R_bank + R_way). `None` where the resistance is not known.
///
/// The capacitors are taken as a short circuit and the cables as without inductance: the most it can be.
fn peak(ask: &Ask, way: Ohms, basis: &mut Basis, steps: &mut Steps) -> Option<(Volts, Amps)> {
    let voltage = basis.need(Field::RunVoltage, ask.voltage)?;
    let bank = basis.assume(Field::BankResistance, ask.bank_resistance, assumed::bank_resistance(voltage))?;
    let current = steps.step("Peak onto empty capacitors", voltage / (bank + way), || {
        let put_in = format!("{} / ({:.6} Ω + {:.6} Ω)", show::given(voltage.amount()), bank.get(), way.get());
        ("V / (R bank + R way)", put_in, Origin::Before)
    });
    Some((voltage, current))
}

/// Sets the peak against what the breaker's contacts make onto.
pub(super) fn precharge(
    ask: &Ask,
    kind: Kind,
    rating: Amps,
    way: Ohms,
    basis: &mut Basis,
    steps: &mut Steps,
) -> Outcome {
    if kind != Kind::InverterFeed {
        return Outcome::DoesNotArise;
    }
    let Some((voltage, peak)) = peak(ask, way, basis, steps) else { return Outcome::Asks };
    let peak = match ask.precharged {
        Entry::Unread => {
            basis.ask(Field::Precharged);
            return Outcome::Asks;
        }
        Entry::Typed(YesNo::Yes) => {
            let resistor = resistor(voltage);
            steps.step("Through a resistor first", voltage / resistor, || {
                let put_in = format!("{} / {:.1} Ω", show::given(voltage.amount()), resistor.get());
                ("V / R", put_in, Origin::Entered(Field::Precharged))
            })
        }
        Entry::Typed(YesNo::No) | Entry::Blank => peak,
    };
    let makes = steps.step("What the breaker makes onto", rating * MAKES, || {
        let clause = source::CHOSEN.at("end of the usual magnetic trip");
        ("10 · In", format!("10 × {}", show::given(rating.amount())), Origin::Published(clause))
    });
    Outcome::Held { value: peak.amount(), limit: Limit::at_most(makes) }
}

/// The smallest resistor sold that lets no more than [`GENTLE`] through.
fn resistor(voltage: Volts) -> Ohms {
    let least = voltage / GENTLE;
    RESISTORS.iter().copied().find(|ohms| *ohms >= least.get()).map_or(least, Ohms::new)
}

/// How to charge the capacitors of an inverter of `power` on this run. `None` where voltage or bank is not known.
pub(super) fn advice(ask: &Ask, power: Watts, way: Ohms) -> Option<Precharge> {
    let (voltage, peak) = peak(ask, way, &mut Basis::default(), &mut crate::check::Steps::silent())?;
    let resistor = resistor(voltage);
    let time_constant = Seconds::new(resistor.get() * power.get() * FARADS_A_WATT);
    let resistor_peak = voltage * (voltage / resistor);
    Some(Precharge { peak, resistor, time_constant, wait: time_constant * TIME_CONSTANTS, resistor_peak })
}
