//! Kinds of run, and what each family of codes asks of each: rules that are never mixed.

use crate::family::CodeFamily;
use crate::quantity::Percent;
use crate::ratings::{CONTINUOUS, DirectBranch};
use crate::source::{self, Clause};

/// What a run joins.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Kind {
    /// One string of modules. Its current is the string's Isc.
    PvString,
    /// Strings in parallel. Its current is the Isc of all strings together.
    PvArray,
    /// A controller's output. Its current is the rated output.
    ControllerOutput,
    /// The bank to its bus. Its current is the greatest that flows for long, either way.
    BankMain,
    /// The bank's bus to an inverter. Watts are those on the inverter's output.
    InverterFeed,
    /// A branch to loads on direct current.
    DcBranch,
    /// A feeder to a panel on direct current.
    DcFeeder,
    /// An inverter's output, alternating.
    AcOutput,
    /// A generator's output, alternating.
    Generator,
}

/// What a family of codes asks of one kind of run, as factors on its current.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Rule {
    /// What the conductor must carry where it lies, corrections taken off.
    pub carried: f64,
    /// What it must carry by the table alone, at its terminals; as much as `carried` where the family has no such rule.
    pub continuous: f64,
    /// The least rating of its breaker or fuse.
    pub device_least: f64,
    /// Below this the rating must lie, where the rule has such an end.
    pub device_below: Option<f64>,
    /// Where the factors are from.
    pub clause: Clause,
}

/// How the watts of a run turn into its current.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum FromPower {
    /// Power over voltage.
    Plain,
    /// Power over voltage, and from the current at greatest power to the short-circuit current.
    Pv,
    /// Power over efficiency and lowest voltage.
    Inverter,
}

impl Kind {
    /// All of them, in the order of the line from sun to socket.
    pub const ALL: &'static [Self] = &[
        Self::PvString,
        Self::PvArray,
        Self::ControllerOutput,
        Self::BankMain,
        Self::InverterFeed,
        Self::DcBranch,
        Self::DcFeeder,
        Self::AcOutput,
        Self::Generator,
    ];

    /// What it is kept and chosen under.
    #[must_use]
    pub const fn key(self) -> &'static str {
        match self {
            Self::PvString => "pv-string",
            Self::PvArray => "pv-array",
            Self::ControllerOutput => "controller",
            Self::BankMain => "bank",
            Self::InverterFeed => "inverter",
            Self::DcBranch => "dc-branch",
            Self::DcFeeder => "dc-feeder",
            Self::AcOutput => "ac-output",
            Self::Generator => "generator",
        }
    }

    /// The one kept under `key`.
    #[must_use]
    pub fn of_key(key: &str) -> Option<Self> {
        Self::ALL.iter().copied().find(|kind| kind.key() == key)
    }

    /// What its two ends are called.
    #[must_use]
    pub const fn ends(self) -> (&'static str, &'static str) {
        match self {
            Self::PvString => ("string", "combiner"),
            Self::PvArray => ("array", "controller"),
            Self::ControllerOutput => ("controller", "bus"),
            Self::BankMain => ("bank", "bus"),
            Self::InverterFeed => ("bus", "inverter"),
            Self::DcBranch => ("DC panel", "loads"),
            Self::DcFeeder => ("bus", "DC panel"),
            Self::AcOutput => ("inverter", "AC panel"),
            Self::Generator => ("generator", "inverter"),
        }
    }

    /// Whether it carries what modules drive.
    #[must_use]
    pub const fn is_pv(self) -> bool {
        matches!(self, Self::PvString | Self::PvArray)
    }

    /// Whether it alternates.
    #[must_use]
    pub const fn alternates(self) -> bool {
        matches!(self, Self::AcOutput | Self::Generator)
    }

    /// Whether the bank can drive a fault into it.
    #[must_use]
    pub const fn on_bank(self) -> bool {
        !self.is_pv() && !self.alternates()
    }

    /// In how many directions current, or fault current, flows through its breaker.
    ///
    /// The bank's own circuits flow both ways. A controller charges one way, but a fault in it is fed by the bank the
    /// other way; several strings feed back into a faulted one. Loads only draw.
    #[must_use]
    pub const fn directions(self) -> u32 {
        match self {
            Self::DcBranch | Self::DcFeeder => 1,
            Self::PvString | Self::PvArray | Self::ControllerOutput | Self::BankMain | Self::InverterFeed => 2,
            Self::AcOutput | Self::Generator => 0,
        }
    }

    /// How its watts turn into amperes.
    #[must_use]
    pub const fn from_power(self) -> FromPower {
        match self {
            Self::PvString | Self::PvArray => FromPower::Pv,
            Self::InverterFeed => FromPower::Inverter,
            _ => FromPower::Plain,
        }
    }

    /// Whether small ratings of d.c. branches are sold for it.
    #[must_use]
    pub const fn direct_branch(self) -> DirectBranch {
        match self {
            Self::DcBranch => DirectBranch::Yes,
            _ => DirectBranch::No,
        }
    }

    /// Drop that is allowed where nobody says otherwise.
    ///
    /// *Chosen*: array 2 %, between controller, bank and inverter 1 %, everything else 3 %; what careful hands keep.
    #[must_use]
    pub const fn allowed_drop(self) -> Percent {
        Percent::new(match self {
            Self::PvString | Self::PvArray => 2.0,
            Self::ControllerOutput | Self::BankMain | Self::InverterFeed => 1.0,
            Self::DcBranch | Self::DcFeeder | Self::AcOutput | Self::Generator => 3.0,
        })
    }

    /// What `family` asks of it.
    ///
    /// # Source
    ///
    /// The rule's own clause. The clause for generators and those for bank circuits are from memory.
    #[must_use]
    pub const fn rule(self, family: CodeFamily) -> Rule {
        match family {
            CodeFamily::NorthAmerica => self.north_american(),
            CodeFamily::Iec => self.iec(),
        }
    }

    const fn north_american(self) -> Rule {
        macro_rules! loaded {
            ($at:literal) => {
                Rule {
                    carried: 1.0,
                    continuous: CONTINUOUS,
                    device_least: CONTINUOUS,
                    device_below: None,
                    clause: source::NEC.at($at),
                }
            };
        }
        match self {
            Self::PvString | Self::PvArray => Rule {
                carried: 1.25,
                continuous: 1.25 * CONTINUOUS,
                device_least: 1.25 * CONTINUOUS,
                device_below: None,
                clause: source::NEC.at("690.8(A) and (B), 690.9(B)"),
            },
            Self::ControllerOutput => loaded!("690.8(A), rated output; 690.8(B), 690.9(B)"),
            Self::BankMain => loaded!("706.30, 706.31; 215.2(A), 215.3"),
            Self::InverterFeed => loaded!("690.8(A), stand-alone inverter at its lowest volts; 690.8(B), 690.9(B)"),
            Self::DcBranch => loaded!("210.19(A), 210.20(A)"),
            Self::DcFeeder => loaded!("215.2(A), 215.3"),
            Self::AcOutput => loaded!("710.15; 215.2(A), 215.3"),
            Self::Generator => Rule {
                carried: 1.15,
                continuous: 1.15,
                device_least: 1.15,
                device_below: None,
                clause: source::NEC.at("445.13(A), 115 % of the nameplate"),
            },
        }
    }

    const fn iec(self) -> Rule {
        let plain = Rule {
            carried: 1.0,
            continuous: 1.0,
            device_least: 1.0,
            device_below: None,
            clause: source::IEC_60364_4_43.at("433.1, Ib ≤ In ≤ Iz"),
        };
        match self {
            Self::PvString => Rule {
                carried: 1.25,
                continuous: 1.25,
                device_least: 1.5,
                device_below: Some(2.4),
                clause: source::IEC_62548.at("string: 1.5 · Isc ≤ In < 2.4 · Isc; cable 1.25 · Isc"),
            },
            Self::PvArray => Rule {
                carried: 1.25,
                continuous: 1.25,
                device_least: 1.25,
                device_below: Some(2.4),
                clause: source::IEC_62548.at("array: 1.25 · Isc ≤ In ≤ 2.4 · Isc; cable 1.25 · Isc"),
            },
            _ => plain,
        }
    }
}
