//! Requirements that no one part has by itself: bonds of the neutral, earthing, isolation, back-feed, other sources.
//!
//! Their values are counts of things that are there, set against the count that must be.

use super::Site;
use super::part::{Part, PartKind};
use super::view::{Subject, View};
use crate::bank::YesNo;
use crate::check::{Basis, Check, Cost, Limit, Origin, Outcome, Step, Steps, judge};
use crate::choice::Choice;
use crate::entry::Entry;
use crate::family::CodeFamily;
use crate::field::Field;
use crate::pad::Pad;
use crate::quantity::{Count, Metres, Percent, Quantity, Volts, Watts};
use crate::show;
use crate::source::{self, Clause};

/// A requirement of the site.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Requirement {
    /// Bonds of neutral to earth while the inverter feeds.
    BondInverting,
    /// The same while a generator passes through.
    BondPassing,
    /// The same while the inverter is bypassed.
    BondBypass,
    /// Circuits that share a neutral, on a panel whose legs come from one source.
    Multiwire,
    /// Frames joined to earth.
    Frames,
    /// A fault of the array to earth is found.
    GroundFault,
    /// Surge arresters of the array.
    Arresters,
    /// A source can be cut off under load, within reach.
    Isolation,
    /// The inverter never feeds what the grid can feed.
    Backfeed,
    /// Another source running free, against what it charges through.
    Overspeed,
    /// The load that takes what another source gives when the bank is full.
    Dump,
}

impl Requirement {
    /// Every requirement, in the order of the page where nothing is worse than another.
    pub const ALL: [Self; 11] = [
        Self::Backfeed,
        Self::BondInverting,
        Self::BondPassing,
        Self::BondBypass,
        Self::Multiwire,
        Self::Frames,
        Self::GroundFault,
        Self::Isolation,
        Self::Overspeed,
        Self::Dump,
        Self::Arresters,
    ];

    /// The id, as in the documents of the engine.
    #[must_use]
    pub const fn id(self) -> &'static str {
        match self {
            Self::BondInverting => "neutral-bond",
            Self::BondPassing => "neutral-bond-passing",
            Self::BondBypass => "neutral-bond-bypass",
            Self::Multiwire => "neutral-multiwire",
            Self::Frames => "earthing-frames",
            Self::GroundFault => "earthing-fault",
            Self::Arresters => "earthing-arresters",
            Self::Isolation => "isolation",
            Self::Backfeed => "backfeed",
            Self::Overspeed => "source-overspeed",
            Self::Dump => "source-dump",
        }
    }

    /// The name on screen.
    #[must_use]
    pub const fn name(self) -> &'static str {
        match self {
            Self::BondInverting => "One bond of the neutral, inverting",
            Self::BondPassing => "One bond of the neutral, generator passing through",
            Self::BondBypass => "One bond of the neutral, inverter bypassed",
            Self::Multiwire => "Circuits that share a neutral",
            Self::Frames => "Frames joined to earth",
            Self::GroundFault => "A fault to earth is found",
            Self::Arresters => "Surge arresters of the array",
            Self::Isolation => "Isolator within reach",
            Self::Backfeed => "Never feeds the grid’s panel",
            Self::Overspeed => "Source running free against its controller",
            Self::Dump => "Dump load takes the whole source",
        }
    }

    /// What it costs where it breaks.
    #[must_use]
    pub const fn cost(self) -> Cost {
        match self {
            Self::Arresters => Cost::Loss,
            _ => Cost::Hazard,
        }
    }

    fn outcome(self, site: &Site, part: Option<&Part>, basis: &mut Basis, steps: &mut Steps) -> Outcome {
        let subject = part.map_or(Subject::Place, |part| Subject::Part(part.id));
        let view = View::new(site, subject);
        match self {
            Self::BondInverting => bonds(site, &view, Mode::Inverting, basis, steps),
            Self::BondPassing => bonds(site, &view, Mode::Passing, basis, steps),
            Self::BondBypass => bonds(site, &view, Mode::Bypass, basis, steps),
            Self::Multiwire => multiwire(&view, basis, steps),
            Self::Frames => said(&view, Field::FramesBonded, FRAMES, basis, steps),
            Self::GroundFault => said(&view, Field::GroundFault, fault(&view), basis, steps),
            Self::Arresters => arresters(part, &view, basis, steps),
            Self::Isolation => said(&view, Field::Isolator, ISOLATOR, basis, steps),
            Self::Backfeed => backfeed(&view, basis, steps),
            Self::Overspeed => overspeed(&view, basis, steps),
            Self::Dump => dump(&view, basis, steps),
        }
    }

    fn arises(self, site: &Site, part: Option<&Part>) -> bool {
        let kind = part.map(|part| part.kind);
        let has = |kind| site.first(kind).is_some();
        match self {
            Self::BondInverting => kind == Some(PartKind::Inverter),
            Self::BondPassing | Self::BondBypass => kind == Some(PartKind::Generator) && has(PartKind::Inverter),
            Self::Multiwire | Self::Backfeed => kind == Some(PartKind::AcPanel),
            Self::Frames => kind.is_none(),
            Self::GroundFault => kind.is_none() && has(PartKind::Array),
            Self::Arresters => kind == Some(PartKind::Array),
            Self::Isolation => {
                matches!(kind, Some(PartKind::Array | PartKind::Bank | PartKind::Generator | PartKind::OtherSource))
            }
            Self::Overspeed | Self::Dump => kind == Some(PartKind::OtherSource),
        }
    }

    fn judged(self, site: &Site, part: Option<&Part>, steps: &mut Steps) -> Option<Check<Self>> {
        if !self.arises(site, part) {
            return None;
        }
        let mut basis = Basis::default();
        let outcome = self.outcome(site, part, &mut basis, steps);
        judge(self, self.cost(), Percent::new(0.0), outcome, &basis)
    }

    /// Judges this requirement for `part`, or for the site as a whole. `None` where it does not arise there.
    #[must_use]
    pub fn check(self, site: &Site, part: Option<&Part>) -> Option<Check<Self>> {
        self.judged(site, part, &mut Steps::silent())
    }

    /// The steps of the same.
    #[must_use]
    pub fn working(self, site: &Site, part: Option<&Part>) -> Vec<Step> {
        let mut steps = Steps::written();
        // What is wanted are the steps; the judgement is the caller's.
        let _ = self.judged(site, part, &mut steps);
        steps.into_steps()
    }
}

/// When the neutral's bonds are counted.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Mode {
    Inverting,
    Passing,
    Bypass,
}

/// How an inverter joins neutral and earth.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum InverterBond {
    None,
    Fixed,
    Switched,
}

impl Choice for InverterBond {
    fn of_key(key: &str) -> Option<Self> {
        Some(match key {
            "none" => Self::None,
            "fixed" => Self::Fixed,
            "switched" => Self::Switched,
            _ => return None,
        })
    }
}

/// How a panel's legs are fed.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Legs {
    Single,
    Joined,
    Split,
}

impl Choice for Legs {
    fn of_key(key: &str) -> Option<Self> {
        Some(match key {
            "single" => Self::Single,
            "joined" => Self::Joined,
            "split" => Self::Split,
            _ => return None,
        })
    }
}

/// Surge arresters that are fitted.
#[derive(Clone, Copy, Debug, PartialEq)]
struct Arresters(f64);

impl Choice for Arresters {
    fn of_key(key: &str) -> Option<Self> {
        Some(Self(match key {
            "none" => 0.0,
            "one" => 1.0,
            "both" => 2.0,
            _ => return None,
        }))
    }
}

const BONDS: Clause = source::NEC.at("250.30(A)(1), one system bonding jumper; IEC 60364-5-55, 551.4");
const FRAMES: Clause = source::NEC.at("690.43; IEC 62548, 7.4");
const ISOLATOR: Clause = source::NEC.at("690.13, 690.15, 706.15; IEC 60364-7-712, 712.537");

fn count(number: f64) -> Count {
    Count::new(number)
}

/// Exactly one: more is set against at most one, none against at least one.
fn exactly_one(value: Count) -> Outcome {
    let limit = if value.get() > 1.0 { Limit::at_most(count(1.0)) } else { Limit::at_least(count(1.0)) };
    Outcome::Held { value: value.amount(), limit }
}

/// neutral-bond: exactly one join of neutral and earth, whichever source feeds.
///
/// None leaves a fault to a case with no way back, so that no breaker opens; two let the neutral's current flow in
/// cases and earth wires.
fn bonds(site: &Site, view: &View<'_>, mode: Mode, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let inverter = basis.need(Field::InverterBond, view.choice::<InverterBond>(Field::InverterBond));
    let panel = match site.first(PartKind::AcPanel) {
        Some(_) => basis.need(Field::PanelBond, view.choice::<YesNo>(Field::PanelBond)),
        None => Some(YesNo::No),
    };
    let (generator, switched) = match site.first(PartKind::Generator) {
        Some(_) => (
            basis.need(Field::GeneratorBond, view.choice::<YesNo>(Field::GeneratorBond)),
            basis.need(Field::NeutralSwitched, view.choice::<YesNo>(Field::NeutralSwitched)),
        ),
        None => (Some(YesNo::No), Some(YesNo::Yes)),
    };
    let (Some(inverter), Some(panel), Some(generator), Some(switched)) = (inverter, panel, generator, switched) else {
        return Outcome::Asks;
    };
    let (yes, stays) = (|said| f64::from(u8::from(said == YesNo::Yes)), switched == YesNo::No);
    let of_inverter = match (inverter, mode) {
        (InverterBond::None, _) | (InverterBond::Switched, Mode::Passing | Mode::Bypass) => 0.0,
        (InverterBond::Fixed, Mode::Bypass) if !stays => 0.0,
        (InverterBond::Fixed | InverterBond::Switched, _) => 1.0,
    };
    let of_generator = match mode {
        // A generator whose neutral is not switched stays joined to the panel's while it stands still.
        Mode::Inverting if !stays => 0.0,
        _ => yes(generator),
    };
    let of_panel = yes(panel);
    let value = steps.step("Bonds of neutral to earth", count(of_inverter + of_panel + of_generator), || {
        let put_in =
            format!("{of_inverter} in the inverter + {of_panel} in the panel + {of_generator} in the generator");
        ("inverter + panel + generator", put_in, Origin::Published(BONDS))
    });
    exactly_one(value)
}

/// neutral-multiwire: two legs of one 120 V source add up in a shared neutral, which has no breaker of its own.
fn multiwire(view: &View<'_>, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    match view.choice::<Legs>(Field::PanelLegs) {
        Entry::Typed(Legs::Joined) => {}
        // One leg has no second to share with; two true legs may share.
        Entry::Typed(Legs::Single | Legs::Split) | Entry::Blank => return Outcome::DoesNotArise,
        Entry::Unread => {
            basis.ask(Field::PanelLegs);
            return Outcome::Asks;
        }
    }
    let Some(shares) = basis.need(Field::Multiwire, view.choice::<YesNo>(Field::Multiwire)) else {
        return Outcome::Asks;
    };
    let legs = if shares == YesNo::Yes { 2.0 } else { 1.0 };
    let value = steps.step("Legs of one phase on one neutral", count(legs), || {
        ("", String::new(), Origin::Published(source::NEC.at("710.15(C)")))
    });
    Outcome::Held { value: value.amount(), limit: Limit::at_most(count(1.0)) }
}

/// Something that must be there.
fn said(view: &View<'_>, field: Field, clause: Clause, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let Some(said) = basis.need(field, view.choice::<YesNo>(field)) else { return Outcome::Asks };
    let there = count(f64::from(u8::from(said == YesNo::Yes)));
    let value = steps.step("There", there, || ("", String::new(), Origin::Published(clause)));
    Outcome::Held { value: value.amount(), limit: Limit::at_least(count(1.0)) }
}

fn fault(view: &View<'_>) -> Clause {
    match view.choice::<CodeFamily>(Field::CodeFamily) {
        Entry::Typed(CodeFamily::NorthAmerica) => source::NEC.at("690.41(B)"),
        _ => source::IEC_62548.at("6.4, insulation watched or a fault told (from memory)"),
    }
}

/// From this length on the array's circuit takes arresters at both ends.
///
/// Source: [`source::IEC_60364_7_712`], 712.534: one arrester protects 10 m of circuit (from memory).
const ONE_PROTECTS: Metres = Metres::new(10.0);

/// earthing-arresters: one at the controller, one more at the array where the run is long.
fn arresters(part: Option<&Part>, view: &View<'_>, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let length =
        part.and_then(|part| part.run.as_ref()).map_or(Entry::Blank, |run| run.entry::<Metres>(Field::RunLength));
    let length = basis.need(Field::RunLength, length);
    let fitted = basis.need(Field::Arresters, view.choice::<Arresters>(Field::Arresters));
    let (Some(length), Some(Arresters(fitted))) = (length, fitted) else { return Outcome::Asks };
    let wanted = steps.step("Arresters wanted", count(if length > ONE_PROTECTS { 2.0 } else { 1.0 }), || {
        let put_in =
            format!("{} of run, one protects {}", show::given(length.amount()), show::given(ONE_PROTECTS.amount()));
        ("", put_in, Origin::Published(source::IEC_60364_7_712.at("712.534 (from memory)")))
    });
    Outcome::Held { value: count(fitted).amount(), limit: Limit::at_least(wanted) }
}

/// backfeed: an inverter's output never stands on a panel that the grid can feed, but through a transfer switch.
fn backfeed(view: &View<'_>, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let grid = basis.assume(Field::GridFeeds, view.choice::<YesNo>(Field::GridFeeds), YesNo::No);
    let Some(grid) = grid else { return Outcome::Asks };
    let sources = if grid == YesNo::No {
        1.0
    } else {
        let Some(switch) = basis.need(Field::TransferSwitch, view.choice::<YesNo>(Field::TransferSwitch)) else {
            return Outcome::Asks;
        };
        if switch == YesNo::Yes { 1.0 } else { 2.0 }
    };
    let value = steps.step("Sources that can feed the panel at once", count(sources), || {
        ("", String::new(), Origin::Published(source::NEC.at("702.5; IEC 60364-5-55, 551.6")))
    });
    Outcome::Held { value: value.amount(), limit: Limit::at_most(count(1.0)) }
}

/// source-overspeed: what a source reaches with nothing on it ≤ what the controller's input survives.
fn overspeed(view: &View<'_>, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let volts = basis.need(Field::OverspeedVolts, view.entry::<Volts>(Field::OverspeedVolts));
    let limit = basis.need(Field::InputLimit, view.entry::<Volts>(Field::InputLimit));
    let (Some(volts), Some(limit)) = (volts, limit) else { return Outcome::Asks };
    let value = steps.step("Running free", volts, || ("", String::new(), Origin::Entered(Field::OverspeedVolts)));
    Outcome::Held { value: value.amount(), limit: Limit::at_most(limit) }
}

/// source-dump: the dump load ≥ the source's greatest power, or it runs away when the bank is full.
fn dump(view: &View<'_>, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let power = basis.need(Field::SourcePower, view.entry::<Watts>(Field::SourcePower));
    let dump = basis.need(Field::DumpLoad, view.entry::<Watts>(Field::DumpLoad));
    let (Some(power), Some(dump)) = (power, dump) else { return Outcome::Asks };
    let value = steps.step("Dump load", dump, || {
        ("", String::new(), Origin::Published(source::COMMON_PRACTICE.at("the load takes the whole source")))
    });
    Outcome::Held { value: value.amount(), limit: Limit::at_least(power) }
}
