//! Everything that the checks of a run read.

use super::Kind;
use crate::ampacity::{Insulation, Laid, Method, Terminals};
use crate::check::Basis;
use crate::choice::Choice;
use crate::conductor::{Conductor, Size};
use crate::entry::Entry;
use crate::family::CodeFamily;
use crate::field::Field;
use crate::pad::Pad;
use crate::quantity::{Amps, Celsius, Count, Metres, Ohms, Percent, SquareMillimetres, Volts, Watts};
use crate::ratings::{Device, Series};

/// What protects a run.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum BreakerType {
    /// A breaker that opens current of either direction.
    #[default]
    Breaker,
    /// A breaker that opens current of one direction only.
    Polarised,
    /// A fuse.
    Fuse,
}

/// A conductor that there is, or that is tried: its size, and how many lie side by side for each pole.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Candidate {
    /// Size of each.
    pub size: Size,
    /// How many for each pole.
    pub parallel: u32,
}

impl core::fmt::Display for Candidate {
    fn fmt(&self, f: &mut core::fmt::Formatter<'_>) -> core::fmt::Result {
        match self.parallel {
            1 => write!(f, "{}", self.size),
            several => write!(f, "{several} × {}", self.size),
        }
    }
}

/// A run, or a question about one.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Ask {
    /// What it joins.
    pub kind: Entry<Kind>,
    /// Its current, without any factor. Goes before its power where both were entered.
    pub current: Entry<Amps>,
    /// Its power; of an inverter feed, what the inverter gives.
    pub power: Entry<Watts>,
    /// Its voltage, nominal; of a PV run, at greatest power.
    pub voltage: Entry<Volts>,
    /// Its length from end to end.
    pub length: Entry<Metres>,
    /// What its conductor is made of.
    pub conductor: Entry<Conductor>,
    /// The conductor that there is. Where blank, the smallest that holds is looked for.
    pub size: Entry<SquareMillimetres>,
    /// Equal conductors side by side for each pole, where a size was entered. One where blank.
    pub parallel: Entry<Count>,
    /// What it is insulated with.
    pub insulation: Entry<Insulation>,
    /// The air round it.
    pub ambient: Entry<Celsius>,
    /// Conductors that carry current together.
    pub together: Entry<Count>,
    /// How it is laid.
    pub method: Entry<Method>,
    /// What its terminals bear.
    pub terminals: Entry<Terminals>,
    /// Part of the voltage that may be lost.
    pub allowed_drop: Entry<Percent>,
    /// The breaker or fuse that there is. Where blank, the smallest standard rating that holds is looked for.
    pub breaker: Entry<Amps>,
    /// What protects it.
    pub breaker_type: Entry<BreakerType>,
    /// What the breaker or fuse can interrupt at its voltage.
    pub interrupting: Entry<Amps>,
    /// Resistance of the bank, new, warm and full.
    pub bank_resistance: Entry<Ohms>,
    /// Whether an inverter's capacitors are charged through a resistor before its breaker is closed.
    pub precharged: Entry<crate::bank::YesNo>,
    /// Which family of codes the site is built to.
    pub family: Entry<CodeFamily>,
}

impl Choice for Kind {
    fn of_key(key: &str) -> Option<Self> {
        Self::of_key(key)
    }
}

impl Choice for Conductor {
    fn of_key(key: &str) -> Option<Self> {
        Self::of_key(key)
    }
}

impl Choice for Insulation {
    fn of_key(key: &str) -> Option<Self> {
        Self::of_key(key)
    }
}

impl Choice for Method {
    fn of_key(key: &str) -> Option<Self> {
        Self::of_key(key)
    }
}

impl Choice for Terminals {
    fn of_key(key: &str) -> Option<Self> {
        Self::of_key(key)
    }
}

impl BreakerType {
    /// All of them.
    pub const ALL: [Self; 3] = [Self::Breaker, Self::Polarised, Self::Fuse];

    /// What it is kept and chosen under.
    #[must_use]
    pub const fn key(self) -> &'static str {
        match self {
            Self::Breaker => "breaker",
            Self::Polarised => "polarised",
            Self::Fuse => "fuse",
        }
    }

    /// What it is called in a sentence.
    #[must_use]
    pub const fn word(self) -> &'static str {
        match self {
            Self::Breaker | Self::Polarised => "breaker",
            Self::Fuse => "fuse",
        }
    }
}

impl Choice for BreakerType {
    fn of_key(key: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|one| one.key() == key)
    }
}

impl Ask {
    /// Reads the fields of the Run tool.
    #[must_use]
    pub fn read(pad: &impl Pad) -> Self {
        Self {
            kind: pad.choice(Field::RunKind),
            current: pad.entry(Field::RunCurrent),
            power: pad.entry(Field::RunPower),
            voltage: pad.entry(Field::RunVoltage),
            length: pad.entry(Field::RunLength),
            conductor: pad.choice(Field::Conductor),
            size: pad.entry(Field::ConductorSize),
            parallel: pad.entry(Field::ConductorsInParallel),
            insulation: pad.choice(Field::Insulation),
            ambient: pad.entry(Field::Ambient),
            together: pad.entry(Field::ConductorsTogether),
            method: pad.choice(Field::Method),
            terminals: pad.choice(Field::Terminals),
            allowed_drop: pad.entry(Field::AllowedDrop),
            breaker: pad.entry(Field::Breaker),
            breaker_type: pad.choice(Field::BreakerType),
            interrupting: pad.entry(Field::InterruptingRating),
            bank_resistance: pad.entry(Field::BankResistance),
            precharged: pad.choice(Field::Precharged),
            family: pad.choice(Field::CodeFamily),
        }
    }

    pub(super) fn kind(&self, basis: &mut Basis) -> Option<Kind> {
        basis.need(Field::RunKind, self.kind)
    }

    pub(super) fn family(&self, basis: &mut Basis) -> Option<CodeFamily> {
        basis.assume(Field::CodeFamily, self.family, CodeFamily::Iec)
    }

    pub(super) fn breaker_type(&self, basis: &mut Basis, kind: Kind) -> Option<BreakerType> {
        basis.assume(Field::BreakerType, self.breaker_type, super::assumed::breaker_type(kind))
    }

    /// Where and how the conductor lies.
    pub(super) fn laid(&self, basis: &mut Basis, kind: Kind, family: CodeFamily) -> Option<Laid> {
        use super::assumed;
        let conductor = basis.assume(Field::Conductor, self.conductor, assumed::conductor(kind, family));
        let insulation = basis.assume(Field::Insulation, self.insulation, assumed::insulation(kind, family));
        let ambient = basis.assume(Field::Ambient, self.ambient, assumed::ambient(kind));
        let together = basis.assume(Field::ConductorsTogether, self.together, assumed::TOGETHER);
        let method = basis.assume(Field::Method, self.method, assumed::method(kind));
        Some(Laid {
            family,
            conductor: conductor?,
            insulation: insulation?,
            method: method?,
            ambient: ambient?,
            together: together?.get(),
        })
    }

    pub(super) fn terminals(&self, basis: &mut Basis, family: CodeFamily, rating: Amps) -> Option<Terminals> {
        basis.assume(Field::Terminals, self.terminals, Terminals::unmarked(family, rating))
    }

    /// The drop that is allowed: the one entered, else what stands in for the kind. `None` where neither is known.
    #[must_use]
    pub fn allowed(&self) -> Option<Percent> {
        self.allowed_drop(&mut Basis::default(), self.kind.typed()?)
    }

    pub(super) fn allowed_drop(&self, basis: &mut Basis, kind: Kind) -> Option<Percent> {
        basis.assume(Field::AllowedDrop, self.allowed_drop, kind.allowed_drop())
    }

    /// The conductor that was entered: none where none was, nothing where it could not be read.
    pub(super) fn entered(&self, basis: &mut Basis) -> Option<Option<Candidate>> {
        let parallel = match self.parallel {
            Entry::Blank => 1,
            // At least one, at most the field's own end.
            entry => basis.need(Field::ConductorsInParallel, entry)?.get().clamp(1.0, 8.0) as u32,
        };
        match self.size {
            Entry::Blank => Some(None),
            entry => {
                let area = basis.need(Field::ConductorSize, entry)?;
                Some(Some(Candidate { size: Size::of_area(area), parallel }))
            }
        }
    }

    /// The standard ratings of what protects it.
    pub(super) fn series(kind: Kind, family: CodeFamily, protects: BreakerType) -> Series {
        let device = if protects == BreakerType::Fuse { Device::Fuse } else { Device::Breaker };
        Series::of(family, device, kind.direct_branch())
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::field::Takes;

    fn all_known<C: Choice>(field: Field, many: usize) {
        let Takes::Choice(list) = field.takes() else { panic!("{field:?} is no choice") };
        assert_eq!(list.len(), many, "{field:?}");
        for (key, _) in list {
            assert!(C::of_key(key).is_some(), "{field:?} {key}");
        }
    }

    #[test]
    fn every_key_on_screen_is_known_and_every_one_is_on_screen() {
        all_known::<Kind>(Field::RunKind, Kind::ALL.len());
        all_known::<Conductor>(Field::Conductor, Conductor::ALL.len());
        all_known::<Insulation>(Field::Insulation, Insulation::ALL.len());
        all_known::<Method>(Field::Method, Method::ALL.len());
        all_known::<Terminals>(Field::Terminals, Terminals::ALL.len());
        all_known::<BreakerType>(Field::BreakerType, BreakerType::ALL.len());
    }
}
