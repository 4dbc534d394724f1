//! The requirements of a bank, each by its id, judged and worked.

use super::protection::{self, Packs};
use super::{Ask, air, cold, devices, parallel, rates, settled, touch};
use crate::check::{Basis, Check, Cost, Limit, Outcome, Step, Steps, judge, worst_first};
use crate::quantity::{Amount, Percent};
use crate::show;
use crate::unit::Unit;

/// A requirement of a bank.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Requirement {
    /// Highest voltage on charge against the inverter.
    WindowHigh,
    /// The same without equalising.
    WindowHighAbsorb,
    /// Highest voltage on charge against loads on the bus.
    WindowHighLoads,
    /// Highest voltage of one cell against what it may never pass.
    WindowHighCells,
    /// What the chargers' cap leaves for absorbing, against what fills the cells.
    ChargeCap,
    /// Lowest voltage in use against the cut-offs.
    WindowLow,
    /// The bus with the bank gone.
    Orphan,
    /// Greatest steady draw against packs that guard themselves.
    Hold,
    /// The same with one pack out.
    HoldOneOut,
    /// Greatest start against packs that guard themselves.
    HoldStart,
    /// The same with one pack out.
    HoldStartOneOut,
    /// Charge current against packs that guard themselves.
    HoldCharge,
    /// The same with one pack out.
    HoldChargeOneOut,
    /// Charge current against the greatest that the chemistry takes.
    ChargeRate,
    /// Charge current against the least that does it good.
    ChargeRateLeast,
    /// Greatest steady draw against what the chemistry gives.
    DischargeRate,
    /// How strings side by side share.
    Sharing,
    /// The rush when strings are joined.
    Join,
    /// Highest voltage against what may be touched.
    Touch,
    /// Openings for air.
    Air,
    /// Nobody sleeps beside a bank.
    AirSleeping,
    /// Freezing.
    Cold,
    /// Lithium charged in the cold.
    ColdCharge,
    /// Packs that refuse charge in the cold.
    ColdLock,
}

impl Requirement {
    /// Every requirement, in the order of the page where nothing is worse than another.
    pub const ALL: [Self; 24] = [
        Self::WindowHigh,
        Self::WindowHighAbsorb,
        Self::WindowHighLoads,
        Self::WindowHighCells,
        Self::ChargeCap,
        Self::WindowLow,
        Self::Orphan,
        Self::Join,
        Self::Touch,
        Self::Cold,
        Self::ColdCharge,
        Self::ColdLock,
        Self::Air,
        Self::AirSleeping,
        Self::ChargeRate,
        Self::ChargeRateLeast,
        Self::DischargeRate,
        Self::Sharing,
        Self::Hold,
        Self::HoldOneOut,
        Self::HoldStart,
        Self::HoldStartOneOut,
        Self::HoldCharge,
        Self::HoldChargeOneOut,
    ];

    /// The id, as in the documents of the engine; a further line of one requirement has its own ending.
    #[must_use]
    pub const fn id(self) -> &'static str {
        match self {
            Self::WindowHigh => "bank-window-high",
            Self::WindowHighAbsorb => "bank-window-high-absorb",
            Self::WindowHighLoads => "bank-window-high-loads",
            Self::WindowHighCells => "bank-window-high-cells",
            Self::ChargeCap => "bank-charge-cap",
            Self::WindowLow => "bank-window-low",
            Self::Orphan => "bank-orphan",
            Self::Hold => "bms-hold",
            Self::HoldOneOut => "bms-hold-one-out",
            Self::HoldStart => "bms-hold-start",
            Self::HoldStartOneOut => "bms-hold-start-one-out",
            Self::HoldCharge => "bms-hold-charge",
            Self::HoldChargeOneOut => "bms-hold-charge-one-out",
            Self::ChargeRate => "bank-charge-rate",
            Self::ChargeRateLeast => "bank-charge-rate-least",
            Self::DischargeRate => "bank-discharge-rate",
            Self::Sharing => "bank-sharing",
            Self::Join => "bank-join",
            Self::Touch => "bank-touch",
            Self::Air => "bank-air",
            Self::AirSleeping => "bank-air-sleeping",
            Self::Cold => "bank-cold",
            Self::ColdCharge => "bank-cold-charge",
            Self::ColdLock => "bank-cold-lock",
        }
    }

    /// The requirement with this id.
    #[must_use]
    pub fn of_id(id: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|one| one.id() == id)
    }

    /// The name on screen.
    #[must_use]
    pub const fn name(self) -> &'static str {
        match self {
            Self::WindowHigh => "Highest bank voltage against the inverter",
            Self::WindowHighAbsorb => "Absorb voltage against the inverter",
            Self::WindowHighLoads => "Highest bank voltage against the loads",
            Self::WindowHighCells => "Highest voltage of a cell",
            Self::ChargeCap => "Charge voltage the cap leaves",
            Self::WindowLow => "Lowest bank voltage against the cut-off",
            Self::Orphan => "Bus with the bank gone",
            Self::Hold => "Packs hold the steady load",
            Self::HoldOneOut => "Packs hold the load with one out",
            Self::HoldStart => "Packs hold the greatest start",
            Self::HoldStartOneOut => "Packs hold the start with one out",
            Self::HoldCharge => "Packs hold the charge current",
            Self::HoldChargeOneOut => "Packs hold the charge with one out",
            Self::ChargeRate => "Charge current the cells take",
            Self::ChargeRateLeast => "Charge current the cells need",
            Self::DischargeRate => "Steady draw the cells give",
            Self::Sharing => "Strings share alike",
            Self::Join => "Joining the strings",
            Self::Touch => "Touching the posts",
            Self::Air => "Air for the room",
            Self::AirSleeping => "Nobody sleeps beside it",
            Self::Cold => "Freezing",
            Self::ColdCharge => "Charging in the cold",
            Self::ColdLock => "Packs that refuse charge in the cold",
        }
    }

    /// What it costs where it breaks.
    ///
    /// Packs that open under a load cost the load; packs that open on charge leave the bus to the controller.
    #[must_use]
    pub const fn cost(self) -> Cost {
        match self {
            Self::WindowHigh
            | Self::WindowHighAbsorb
            | Self::WindowHighLoads
            | Self::WindowHighCells
            | Self::Orphan
            | Self::HoldCharge
            | Self::HoldChargeOneOut
            | Self::ChargeRate
            | Self::Join
            | Self::Touch
            | Self::Air
            | Self::AirSleeping
            | Self::Cold
            | Self::ColdCharge => Cost::Hazard,
            Self::ChargeCap
            | Self::WindowLow
            | Self::Hold
            | Self::HoldOneOut
            | Self::HoldStart
            | Self::HoldStartOneOut
            | Self::ChargeRateLeast
            | Self::DischargeRate
            | Self::Sharing
            | Self::ColdLock => Cost::Loss,
        }
    }

    /// The margin that a careful hand keeps. *Chosen*: 2 % on the window's top, for meters and set points that are a
    /// little off, and 2 % of the absolute temperature, about 5 K; ratings may be used whole.
    const fn reserve(self) -> Percent {
        match self {
            Self::WindowHigh | Self::WindowHighAbsorb | Self::WindowHighLoads | Self::Cold => Percent::new(2.0),
            _ => Percent::new(0.0),
        }
    }

    fn outcome(self, ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
        match self {
            Self::WindowHigh => devices::high(ask, basis, steps),
            Self::WindowHighAbsorb => devices::high_absorb(ask, basis, steps),
            Self::WindowHighLoads => devices::high_loads(ask, basis, steps),
            Self::WindowHighCells => devices::high_cells(ask, basis, steps),
            Self::ChargeCap => devices::cap(ask, basis, steps),
            Self::WindowLow => devices::low(ask, basis, steps),
            Self::Orphan => devices::orphan(ask, basis, steps),
            Self::Hold => protection::steady(ask, Packs::All, basis, steps),
            Self::HoldOneOut => protection::steady(ask, Packs::OneOut, basis, steps),
            Self::HoldStart => protection::start(ask, Packs::All, basis, steps),
            Self::HoldStartOneOut => protection::start(ask, Packs::OneOut, basis, steps),
            Self::HoldCharge => protection::charge(ask, Packs::All, basis, steps),
            Self::HoldChargeOneOut => protection::charge(ask, Packs::OneOut, basis, steps),
            Self::ChargeRate => rates::charge(ask, basis, steps),
            Self::ChargeRateLeast => rates::charge_least(ask, basis, steps),
            Self::DischargeRate => rates::discharge(ask, basis, steps),
            Self::Sharing => parallel::sharing(ask, basis, steps),
            Self::Join => parallel::join(ask, basis, steps),
            Self::Touch => touch::touch(ask, basis, steps),
            Self::Air => air::openings(ask, basis, steps),
            Self::AirSleeping => air::sleeping(ask, basis, steps),
            Self::Cold => cold::freezing(ask, basis, steps),
            Self::ColdCharge => cold::charge(ask, basis, steps),
            Self::ColdLock => cold::lock(ask, basis, steps),
        }
    }

    /// Judges this requirement for the counts that `ask` has. `None` where it does not arise.
    #[must_use]
    pub fn check(self, ask: &Ask) -> Option<Check<Self>> {
        self.judged(ask, &mut Steps::silent())
    }

    fn judged(self, ask: &Ask, steps: &mut Steps) -> Option<Check<Self>> {
        let mut basis = Basis::default();
        let outcome = self.outcome(ask, &mut basis, steps);
        let check = judge(self, self.cost(), self.reserve(), outcome, &basis)?;
        Some(match self {
            Self::Cold | Self::ColdCharge | Self::ColdLock => in_degrees(check),
            _ => check,
        })
    }
}

/// Temperatures are judged from absolute zero and shown in degrees.
fn in_degrees(check: Check<Requirement>) -> Check<Requirement> {
    // 248.15 K − 273.15 is −25 only to the last bits.
    let degrees =
        |amount: Amount| Amount { number: ((amount.number - 273.15) * 1e9).round() / 1e9, unit: Unit::DegreeCelsius };
    Check {
        value: check.value.map(degrees),
        limit: check.limit.map(|limit| Limit { amount: degrees(limit.amount), ..limit }),
        ..check
    }
}

/// Every requirement that arises, worst first. Where no counts are entered, for the best layout of the cells at hand.
#[must_use]
pub fn assess(ask: &Ask) -> Vec<Check<Requirement>> {
    let ask = settled(ask);
    let mut checks: Vec<_> = Requirement::ALL.iter().filter_map(|requirement| requirement.check(&ask)).collect();
    worst_first(&mut checks);
    checks
}

/// The steps of one requirement, made by the same code as its value. The last is the margin to its limit.
#[must_use]
pub fn working(ask: &Ask, requirement: Requirement) -> Vec<Step> {
    let ask = settled(ask);
    let mut steps = Steps::written();
    let Some(check) = requirement.judged(&ask, &mut steps) else { return steps.into_steps() };
    steps.margin(&check, show::given);
    steps.into_steps()
}
