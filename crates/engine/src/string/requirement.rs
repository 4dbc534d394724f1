//! The requirements of a string, each by its id, judged and worked.

use super::{Ask, clip, cold, current, fuse, hot};
use crate::check::{Basis, Check, Cost, Outcome, Step, Steps, judge, worst_first};
use crate::quantity::Percent;
use crate::show;

/// A requirement of strings on a controller.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Requirement {
    /// The open string at record cold against the controller's input limit.
    ColdController,
    /// The same against the module's system voltage and what the code allows.
    ColdCircuit,
    /// The hottest string against what the controller needs to go on charging.
    HotCharge,
    /// The hottest string against what the controller needs to begin charging.
    HotStart,
    /// The string's working voltage over the year against the tracking window.
    Window,
    /// All strings' current against the controller's PV current limit.
    ShortCircuit,
    /// Energy over the controller's output current.
    Clip,
    /// Fuses of parallel strings.
    Fuse,
    /// All strings' current against a PWM controller's rating.
    PwmMatch,
    /// What a PWM controller leaves of the array's power.
    PwmHarvest,
}

impl Requirement {
    /// Every requirement, in the order of the page where nothing is worse than another.
    pub const ALL: [Self; 10] = [
        Self::ColdController,
        Self::ColdCircuit,
        Self::ShortCircuit,
        Self::PwmMatch,
        Self::Fuse,
        Self::HotCharge,
        Self::HotStart,
        Self::Window,
        Self::Clip,
        Self::PwmHarvest,
    ];

    /// The id, as in the documents of the engine.
    #[must_use]
    pub const fn id(self) -> &'static str {
        match self {
            Self::ColdController => "string-cold-controller",
            Self::ColdCircuit => "string-cold-circuit",
            Self::HotCharge => "string-hot-charge",
            Self::HotStart => "string-hot-start",
            Self::Window => "string-window",
            Self::ShortCircuit => "array-short-circuit",
            Self::Clip => "array-clip",
            Self::Fuse => "string-fuse",
            Self::PwmMatch => "pwm-match",
            Self::PwmHarvest => "pwm-harvest",
        }
    }

    /// The name on screen.
    #[must_use]
    pub const fn name(self) -> &'static str {
        match self {
            Self::ColdController => "Cold string against the controller",
            Self::ColdCircuit => "Cold string against the circuit",
            Self::HotCharge => "Hot string still charges",
            Self::HotStart => "Hot string begins to charge",
            Self::Window => "Tracking window over the year",
            Self::ShortCircuit => "Input current in bright sun",
            Self::Clip => "Energy clipped in a year",
            Self::Fuse => "Fuses of parallel strings",
            Self::PwmMatch => "Current against the PWM rating",
            Self::PwmHarvest => "Power kept by PWM",
        }
    }

    /// What it costs where it breaks.
    #[must_use]
    pub const fn cost(self) -> Cost {
        match self {
            Self::ColdController | Self::ColdCircuit | Self::ShortCircuit | Self::Fuse | Self::PwmMatch => Cost::Hazard,
            Self::HotCharge | Self::HotStart | Self::Window | Self::Clip | Self::PwmHarvest => Cost::Loss,
        }
    }

    /// The margin that a careful hand keeps on it.
    fn reserve(self, ask: &Ask) -> Percent {
        match self {
            Self::ColdController | Self::ColdCircuit => ask.cold_reserve(),
            // As much as on the cold volts: the same nameplates, the same thermometers. *Chosen*.
            Self::HotCharge | Self::Window => crate::assumed::COLD_RESERVE,
            // Current ratings may be used whole; the allowed shares are themselves chosen with care.
            Self::HotStart | Self::ShortCircuit | Self::Clip | Self::Fuse | Self::PwmMatch | Self::PwmHarvest => {
                Percent::new(0.0)
            }
        }
    }

    fn outcome(self, ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
        match self {
            Self::ColdController => cold::controller(ask, basis, steps),
            Self::ColdCircuit => cold::circuit(ask, basis, steps),
            Self::HotCharge => hot::charge(ask, false, basis, steps),
            Self::HotStart => hot::charge(ask, true, basis, steps),
            Self::Window => hot::window(ask, basis, steps),
            Self::ShortCircuit => current::short_circuit(ask, basis, steps),
            Self::Clip => clip::clip(ask, basis, steps),
            Self::Fuse => fuse::fuse(ask, basis, steps),
            Self::PwmMatch => current::pwm(ask, basis, steps),
            Self::PwmHarvest => clip::pwm_harvest(ask, basis, steps),
        }
    }

    /// Judges this requirement. `None` where it does not arise.
    #[must_use]
    pub fn check(self, ask: &Ask) -> Option<Check<Self>> {
        let mut basis = Basis::default();
        let outcome = self.outcome(ask, &mut basis, &mut Steps::silent());
        judge(self, self.cost(), self.reserve(ask), outcome, &basis)
    }
}

/// Every requirement that arises, worst first.
#[must_use]
pub fn assess(ask: &Ask) -> Vec<Check<Requirement>> {
    let mut checks: Vec<_> = Requirement::ALL.iter().filter_map(|requirement| requirement.check(ask)).collect();
    worst_first(&mut checks);
    checks
}

/// The steps of one requirement, made by the same code as its value. The last is the margin to its limit.
#[must_use]
pub fn working(ask: &Ask, requirement: Requirement) -> Vec<Step> {
    let mut basis = Basis::default();
    let mut steps = Steps::written();
    let outcome = requirement.outcome(ask, &mut basis, &mut steps);
    let Some(check) = judge(requirement, requirement.cost(), requirement.reserve(ask), outcome, &basis) else {
        return steps.into_steps();
    };
    steps.margin(&check, show::given);
    steps.into_steps()
}
