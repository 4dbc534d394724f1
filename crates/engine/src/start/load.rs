//! What a load draws: while it runs, and while it starts.

use super::Ask;
use super::ask::positive;
use super::motor::code_letter;
use crate::check::{Basis, Origin, Steps};
use crate::entry::Entry;
use crate::field::Field;
use crate::quantity::{Count, Quantity, Seconds, VoltAmps, Watts};
use crate::show;
use crate::source;

/// Active and reactive draw. Reactive parts add up as long as all of them lag, as motors do.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Draws {
    /// Active.
    pub watts: f64,
    /// Reactive, lagging, in var.
    pub vars: f64,
}

impl Draws {
    /// Of `watts` at a power factor.
    #[must_use]
    pub fn of(watts: Watts, factor: f64) -> Self {
        let factor = factor.clamp(0.01, 1.0);
        Self { watts: watts.get(), vars: watts.get() / factor * (1.0 - factor * factor).max(0.0).sqrt() }
    }

    /// Of an apparent power at a power factor.
    #[must_use]
    pub fn of_apparent(apparent: VoltAmps, factor: f64) -> Self {
        let factor = factor.clamp(0.0, 1.0);
        Self { watts: apparent.get() * factor, vars: apparent.get() * (1.0 - factor * factor).max(0.0).sqrt() }
    }

    /// Both together.
    #[must_use]
    pub fn and(self, other: Self) -> Self {
        Self { watts: self.watts + other.watts, vars: self.vars + other.vars }
    }

    /// Apparent: √(P² + Q²).
    #[must_use]
    pub fn apparent(self) -> VoltAmps {
        VoltAmps::new(self.watts.hypot(self.vars))
    }

    /// Active.
    #[must_use]
    pub fn active(self) -> Watts {
        Watts::new(self.watts)
    }
}

/// The two phases of a load, and what runs already.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Phases {
    /// What runs already, with no load of this start.
    pub before: Draws,
    /// While it starts, on top of what runs.
    pub starting: Draws,
    /// Once it runs, on top of what ran.
    pub running: Draws,
    /// How long the start lasts.
    pub seconds: Seconds,
}

/// What this load draws in each phase. `None` where an input is missing, which the basis then names.
///
/// Starting apparent power: by code letter, kVA for each horsepower at its upper end; else by the locked-rotor current;
/// else the multiple of the running apparent power.
///
/// # Source
///
/// [`source::NEC`], Table 430.7(B); multiples: [`source::MOTOR_GUIDES`].
pub fn phases(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<Phases> {
    let before = Draws::of(basis.assume(Field::AlreadyRunning, ask.already, Watts::new(0.0))?, 1.0);
    let many = basis.assume(Field::HowMany, positive(ask.how_many), Count::new(1.0))?.get();
    let start = starting(ask, basis, steps);
    let run = running(ask, basis);
    let seconds = match ask.usual_seconds() {
        Some(usual) => basis.assume(Field::StartingSeconds, ask.seconds, usual),
        None => basis.need(Field::StartingSeconds, ask.seconds),
    };
    let (start, run, seconds) = (start?, run?, seconds?);
    let times = |draws: Draws| Draws { watts: draws.watts * many, vars: draws.vars * many };
    let starting = before.and(times(start));
    steps.step("Apparent power of the start on top of what runs", starting.apparent(), || {
        let (watts, vars) = (show::step(starting.active().amount()), show::number(starting.vars, 1));
        ("√(P² + Q²)", format!("√(({watts})² + ({vars} var)²)"), Origin::Before)
    });
    Some(Phases { before, starting, running: before.and(times(run)), seconds })
}

fn running(ask: &Ask, basis: &mut Basis) -> Option<Draws> {
    let power = match (ask.running, ask.motor) {
        // A motor's rated output over its usual efficiency, where its input was not entered. *Chosen*: 70 %.
        (Entry::Blank, Entry::Typed(motor)) => {
            basis.assume(Field::RunningPower, Entry::Blank, Watts::new(motor.get() / 0.7))
        }
        (entry, _) => basis.need(Field::RunningPower, positive(entry)),
    };
    let factor = match ask.usual_running_factor() {
        Some(usual) => basis.assume(Field::RunningPowerFactor, ask.running_factor, usual),
        None => basis.assume(Field::RunningPowerFactor, ask.running_factor, Count::new(0.8)),
    };
    Some(Draws::of(power?, factor?.get()))
}

fn starting(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<Draws> {
    let factor = match ask.usual_starting_factor() {
        Some(usual) => basis.assume(Field::StartingPowerFactor, ask.starting_factor, usual),
        None => basis.need(Field::StartingPowerFactor, ask.starting_factor),
    };
    let apparent = match ask.letter {
        Entry::Unread => {
            basis.ask(Field::CodeLetter);
            None
        }
        Entry::Typed(letter) => {
            let motor = basis.need(Field::MotorSize, positive(ask.motor))?;
            let horsepower = motor.get() / HORSEPOWER;
            let (_, most) = code_letter(letter.0)?;
            if !most.is_finite() {
                basis.ask(Field::CodeLetter);
                return None;
            }
            Some(steps.step(
                "Apparent power with the rotor standing still",
                VoltAmps::new(most * horsepower * 1000.0),
                || {
                    let put_in = format!("{most} kVA/hp × {} hp", show::number(horsepower, 3));
                    ("kVA/hp · hp", put_in, Origin::Published(source::NEC.at("Table 430.7(B), the letter’s upper end")))
                },
            ))
        }
        // Amperes from the nameplate go before a multiple.
        Entry::Blank if ask.locked_rotor != Entry::Blank => {
            let amps = basis.need(Field::LockedRotor, ask.locked_rotor);
            let volts = basis.need(Field::AcVolts, ask.ac_volts);
            let (amps, volts) = (amps?, volts?);
            Some(steps.step("Apparent power with the rotor standing still", volts.times_alternating(amps), || {
                let put_in = format!("{} × {}", show::given(volts.amount()), show::given(amps.amount()));
                ("V · I", put_in, Origin::Entered(Field::LockedRotor))
            }))
        }
        Entry::Blank => {
            let run = running(ask, basis);
            let multiple = match ask.usual_multiple() {
                Some(usual) => basis.assume(Field::StartingMultiple, positive(ask.multiple), usual),
                None => basis.need(Field::StartingMultiple, positive(ask.multiple)),
            };
            let (run, multiple) = (run?, multiple?);
            Some(steps.step(
                "Apparent power of the start",
                VoltAmps::new(run.apparent().get() * multiple.get()),
                || {
                    let put_in =
                        format!("{} × {}", show::number(multiple.get(), 2), show::step(run.apparent().amount()));
                    ("multiple · S", put_in, Origin::Published(source::MOTOR_GUIDES.at("starting multiples")))
                },
            ))
        }
    };
    Some(Draws::of_apparent(apparent?, factor?.get()))
}

/// Watts of one mechanical horsepower.
const HORSEPOWER: f64 = 745.699_871_582_270_2;
