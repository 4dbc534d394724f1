//! Everything that the checks of a start read.

use super::class::{Class, Kind, Usual, usual, usual_of};
use crate::bank;
use crate::choice::Choice;
use crate::entry::Entry;
use crate::field::Field;
use crate::pad::Pad;
use crate::quantity::{Amps, Celsius, Count, Metres, Ohms, Percent, Quantity, Seconds, VoltAmps, Volts, Watts};

/// A code letter.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Letter(pub char);

impl Choice for Letter {
    fn of_key(key: &str) -> Option<Self> {
        let letter = key.chars().next().filter(|_| key.len() == 1)?;
        super::code_letter(letter).map(|_| Self(letter.to_ascii_uppercase()))
    }
}

/// Trip curve of a small breaker.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Curve {
    /// Magnetic from 3 times.
    B,
    /// Magnetic from 5 times.
    C,
    /// Magnetic from 10 times.
    D,
}

impl Choice for Curve {
    fn of_key(key: &str) -> Option<Self> {
        Some(match key {
            "b" => Self::B,
            "c" => Self::C,
            "d" => Self::D,
            _ => return None,
        })
    }
}

/// What feeds a load.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum FedBy {
    /// The inverter.
    Inverter,
    /// The bus itself.
    Bus,
}

impl Choice for FedBy {
    fn of_key(key: &str) -> Option<Self> {
        Some(match key {
            "ac" => Self::Inverter,
            "dc" => Self::Bus,
            _ => return None,
        })
    }
}

/// How old a bank is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Age {
    /// New: the least resistance of its chemistry.
    New,
    /// Some years: half-way.
    Used,
    /// Old: the greatest.
    Old,
}

impl Choice for Age {
    fn of_key(key: &str) -> Option<Self> {
        Some(match key {
            "new" => Self::New,
            "used" => Self::Used,
            "old" => Self::Old,
            _ => return None,
        })
    }
}

/// One start, on one inverter, on one bus.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Ask {
    /// What starts.
    pub load: Entry<Class>,
    /// What it draws while it runs.
    pub running: Entry<Watts>,
    /// How many of it start at once.
    pub how_many: Entry<Count>,
    /// How it starts.
    pub starts_as: Entry<Kind>,
    /// Starting over running apparent power.
    pub multiple: Entry<Count>,
    /// Code letter of the motor.
    pub letter: Entry<Letter>,
    /// Current with the rotor standing still.
    pub locked_rotor: Entry<Amps>,
    /// Voltage of the alternating side.
    pub ac_volts: Entry<Volts>,
    /// Rated output of the motor.
    pub motor: Entry<Watts>,
    /// Power factor while it starts.
    pub starting_factor: Entry<Count>,
    /// Power factor while it runs.
    pub running_factor: Entry<Count>,
    /// How long the start lasts.
    pub seconds: Entry<Seconds>,
    /// What runs already.
    pub already: Entry<Watts>,
    /// What the inverter gives for as long as it likes.
    pub inverter_continuous: Entry<Watts>,
    /// What it gives for the surge time.
    pub inverter_surge: Entry<VoltAmps>,
    /// The surge time.
    pub surge_seconds: Entry<Seconds>,
    /// What it gives for a shorter time.
    pub short_surge: Entry<VoltAmps>,
    /// That shorter time.
    pub short_seconds: Entry<Seconds>,
    /// What feeds the load.
    pub fed_by: Entry<FedBy>,
    /// How old the bank is.
    pub age: Entry<Age>,
    /// Its efficiency meanwhile.
    pub efficiency: Entry<Percent>,
    /// The volts at which it lets go.
    pub cut_off: Entry<Volts>,
    /// Air round it.
    pub inverter_air: Entry<Celsius>,
    /// Height of the site.
    pub height: Entry<Metres>,
    /// The bank at rest, as it starts.
    pub bank_voltage: Entry<Volts>,
    /// Its resistance, old, cold and low.
    pub bank_resistance: Entry<Ohms>,
    /// Cables, links and lugs there and back.
    pub cable: Entry<Ohms>,
    /// Charge at which it must still start.
    pub charge: Entry<Percent>,
    /// Temperature of the bank.
    pub bank_temperature: Entry<Celsius>,
    /// Packs side by side that guard themselves.
    pub packs: Entry<Count>,
    /// What one pack lets pass for long.
    pub pack_limit: Entry<Amps>,
    /// What one pack lets pass for a moment.
    pub pack_peak: Entry<Amps>,
    /// How long that moment is.
    pub pack_peak_time: Entry<Seconds>,
    /// The breaker between bank and inverter.
    pub breaker: Entry<Amps>,
    /// Its trip curve.
    pub curve: Entry<Curve>,
    /// Times its rating that it surely lets pass for as long, by its maker.
    pub trip_multiple: Entry<Count>,
    /// Rating of the generator.
    pub generator: Entry<VoltAmps>,
    /// What the charger takes from it.
    pub charger: Entry<VoltAmps>,
    /// The bank by its cells, where its volts were not entered.
    pub bank: bank::Ask,
}

impl Ask {
    /// Reads the fields of the Start tool.
    #[must_use]
    pub fn read(pad: &impl Pad) -> Self {
        Self::read_beside(pad, bank::Ask::read(pad))
    }

    /// The same, of a bank that was read before.
    pub(crate) fn read_beside(pad: &impl Pad, bank: bank::Ask) -> Self {
        Self {
            load: pad.choice(Field::StartLoad),
            running: pad.entry(Field::RunningPower),
            how_many: pad.entry(Field::HowMany),
            starts_as: pad.choice(Field::StartsAs),
            multiple: pad.entry(Field::StartingMultiple),
            letter: pad.choice(Field::CodeLetter),
            locked_rotor: pad.entry(Field::LockedRotor),
            ac_volts: pad.entry(Field::AcVolts),
            motor: pad.entry(Field::MotorSize),
            starting_factor: pad.entry(Field::StartingPowerFactor),
            running_factor: pad.entry(Field::RunningPowerFactor),
            seconds: pad.entry(Field::StartingSeconds),
            already: pad.entry(Field::AlreadyRunning),
            inverter_continuous: pad.entry(Field::InverterContinuous),
            inverter_surge: pad.entry(Field::InverterSurge),
            surge_seconds: pad.entry(Field::SurgeSeconds),
            short_surge: pad.entry(Field::ShortSurge),
            short_seconds: pad.entry(Field::ShortSurgeSeconds),
            fed_by: pad.choice(Field::FedBy),
            age: pad.choice(Field::BankAge),
            efficiency: pad.entry(Field::InverterEfficiency),
            cut_off: pad.entry(Field::CutOff),
            inverter_air: pad.entry(Field::InverterAir),
            height: pad.entry(Field::Height),
            bank_voltage: pad.entry(Field::BankEmf),
            bank_resistance: pad.entry(Field::BankResistance),
            cable: pad.entry(Field::CableResistance),
            charge: pad.entry(Field::Charge),
            bank_temperature: pad.entry(Field::BankTemperature),
            packs: pad.entry(Field::Packs),
            pack_limit: pad.entry(Field::PackDischargeLimit),
            pack_peak: pad.entry(Field::PackPeak),
            pack_peak_time: pad.entry(Field::PackPeakTime),
            breaker: pad.entry(Field::Breaker),
            curve: pad.choice(Field::TripCurve),
            trip_multiple: pad.entry(Field::TripMultiple),
            generator: pad.entry(Field::GeneratorRating),
            charger: pad.entry(Field::ChargerDraw),
            bank,
        }
    }

    /// The same with every number that cannot be meant taken for one that could not be read.
    pub(super) fn sound(&self) -> Self {
        Self {
            running: positive(self.running),
            how_many: positive(self.how_many),
            multiple: positive(self.multiple),
            locked_rotor: positive(self.locked_rotor),
            ac_volts: positive(self.ac_volts),
            motor: positive(self.motor),
            starting_factor: positive(self.starting_factor),
            running_factor: positive(self.running_factor),
            seconds: not_negative(self.seconds),
            already: not_negative(self.already),
            inverter_continuous: positive(self.inverter_continuous),
            inverter_surge: positive(self.inverter_surge),
            surge_seconds: not_negative(self.surge_seconds),
            short_surge: positive(self.short_surge),
            short_seconds: not_negative(self.short_seconds),
            efficiency: positive(self.efficiency),
            cut_off: positive(self.cut_off),
            inverter_air: finite(self.inverter_air),
            height: finite(self.height),
            bank_voltage: positive(self.bank_voltage),
            bank_resistance: not_negative(self.bank_resistance),
            cable: not_negative(self.cable),
            charge: not_negative(self.charge),
            bank_temperature: finite(self.bank_temperature),
            packs: positive(self.packs),
            pack_limit: positive(self.pack_limit),
            pack_peak: positive(self.pack_peak),
            pack_peak_time: not_negative(self.pack_peak_time),
            breaker: positive(self.breaker),
            trip_multiple: positive(self.trip_multiple),
            generator: positive(self.generator),
            charger: not_negative(self.charger),
            ..*self
        }
    }

    /// The class of the load, where it was named.
    #[must_use]
    pub fn class(&self) -> Option<Class> {
        self.load.typed()
    }

    /// The figures typical of this load: by its kind, else by its class.
    #[must_use]
    pub fn usual(&self) -> Option<Usual> {
        match (self.starts_as, self.load) {
            (Entry::Typed(kind), Entry::Typed(class)) if usual(class).kind == kind => Some(usual(class)),
            (Entry::Typed(kind), _) => Some(usual_of(kind)),
            (Entry::Blank, Entry::Typed(class)) => Some(usual(class)),
            _ => None,
        }
    }

    /// Whether the motor's nameplate told what it takes with its rotor standing still.
    fn told_standing_still(&self) -> Option<()> {
        (self.letter.typed().is_some() || self.locked_rotor.typed().is_some()).then_some(())
    }

    /// Whether the bus feeds it, with no inverter between. Nobody asks for it where nothing was said.
    pub(super) fn on_the_bus(&self) -> bool {
        self.fed_by == Entry::Typed(FedBy::Bus)
    }

    /// Three quarters up the range: sources differ, and the high end is rare.
    pub(super) fn usual_multiple(&self) -> Option<Count> {
        let (least, most) = self.usual()?.multiple;
        Some(Count::new(least + 0.75 * (most - least)))
    }

    pub(super) fn usual_starting_factor(&self) -> Option<Count> {
        // A rotor that stands still, where a motor's nameplate was entered and nothing else is known.
        self.usual().map_or_else(
            || self.told_standing_still().map(|()| Count::new(0.5)),
            |usual| Some(Count::new(usual.starting_factor)),
        )
    }

    pub(super) fn usual_running_factor(&self) -> Option<Count> {
        self.usual().map(|usual| Count::new(usual.running_factor))
    }

    pub(super) fn usual_seconds(&self) -> Option<Seconds> {
        self.usual().map_or_else(|| self.told_standing_still().map(|()| Seconds::new(1.0)), |usual| Some(usual.seconds))
    }

    /// *Chosen*: 2 mΩ, some two metres of 50 mm² and four lugs, there and back.
    pub(super) fn usual_cable(&self) -> Ohms {
        Ohms::new(0.002)
    }
}

/// A number within reason that is not below zero, or nothing that was read.
fn not_negative<Q: Quantity>(entry: Entry<Q>) -> Entry<Q> {
    match entry {
        Entry::Typed(value) if !(0.0..=1e12).contains(&value.number()) => Entry::Unread,
        other => other,
    }
}

/// A number within reason, or nothing that was read.
fn finite<Q: Quantity>(entry: Entry<Q>) -> Entry<Q> {
    match entry {
        Entry::Typed(value) if !(-1e12..=1e12).contains(&value.number()) => Entry::Unread,
        other => other,
    }
}

/// A positive number within reason, or nothing that was read.
pub(super) fn positive<Q: Quantity>(entry: Entry<Q>) -> Entry<Q> {
    match entry {
        Entry::Typed(value) if !(1e-12..=1e12).contains(&value.number()) => Entry::Unread,
        other => other,
    }
}
