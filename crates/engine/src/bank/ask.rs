//! Everything that the checks of a bank read.

use super::block;
use crate::check::{Basis, Origin};
use crate::chemistry::{Chemistry, Figures};
use crate::choice::Choice;
use crate::entry::Entry;
use crate::field::Field;
use crate::pad::Pad;
use crate::quantity::{
    AmpHours, Amps, Celsius, Count, Ohms, Percent, Quantity, Seconds, SquareCentimetres, Volts, VoltsPerKelvin,
    WattHours, Watts,
};
use crate::sharing::Arrangement;

/// An answer to a plain question.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum YesNo {
    /// No.
    No,
    /// Yes.
    Yes,
}

impl Choice for YesNo {
    fn of_key(key: &str) -> Option<Self> {
        match key {
            "no" => Some(Self::No),
            "yes" => Some(Self::Yes),
            _ => None,
        }
    }
}

/// A bank of equal cells, blocks or packs, with what stands on its bus.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Ask {
    /// What the cells are made of.
    pub chemistry: Entry<Chemistry>,
    /// Nominal voltage of one cell, or of a block of several.
    pub cell_voltage: Entry<Volts>,
    /// Cells in series inside one block. By its voltage where nothing was entered.
    pub cells_in_block: Entry<Count>,
    /// Rated capacity of one cell or block.
    pub cell_capacity: Entry<AmpHours>,
    /// Cells or blocks that there are.
    pub count: Entry<Count>,
    /// Nominal voltage of the bus.
    pub bus_voltage: Entry<Volts>,
    /// Cells or blocks in series.
    pub series: Entry<Count>,
    /// Strings in parallel.
    pub strings: Entry<Count>,
    /// Lowest temperature of the room.
    pub coldest: Entry<Celsius>,
    /// Highest temperature of the room.
    pub warmest: Entry<Celsius>,
    /// Voltage of one cell at which discharge ends.
    pub end: Entry<Volts>,
    /// Absorb voltage of one cell at 25 °C.
    pub absorb: Entry<Volts>,
    /// Float voltage of one cell at 25 °C.
    pub float: Entry<Volts>,
    /// Equalise voltage of one cell at 25 °C.
    pub equalise: Entry<Volts>,
    /// Change of one cell's charge voltage with temperature; its sign plays no part.
    pub compensation: Entry<VoltsPerKelvin>,
    /// Highest voltage to which the chargers let compensation raise the bank. No cap where nothing was entered.
    pub charge_cap: Entry<Volts>,
    /// Part of the capacity that is drawn before the next charge.
    pub depth_used: Entry<Percent>,
    /// Lowest voltage at which the inverter runs.
    pub inverter_low: Entry<Volts>,
    /// Highest voltage that the inverter tolerates.
    pub inverter_high: Entry<Volts>,
    /// Lowest voltage at which loads on the bus run. No such loads where nothing was entered.
    pub loads_low: Entry<Volts>,
    /// Highest voltage that loads on the bus tolerate. No such loads where nothing was entered.
    pub loads_high: Entry<Volts>,
    /// Highest voltage that a controller's output can reach with no bank.
    pub controller_output_limit: Entry<Volts>,
    /// Greatest current that all chargers together put in.
    pub charge_current: Entry<Amps>,
    /// Greatest steady power drawn.
    pub greatest_load: Entry<Watts>,
    /// Greatest power drawn while something starts. Nothing starts where nothing was entered.
    pub starting_load: Entry<Watts>,
    /// How long that start lasts.
    pub starting_time: Entry<Seconds>,
    /// Whether each block is a pack that guards itself.
    pub own_protection: Entry<YesNo>,
    /// Greatest charge current that one pack lets pass.
    pub pack_charge_limit: Entry<Amps>,
    /// Greatest steady current that one pack lets pass.
    pub pack_discharge_limit: Entry<Amps>,
    /// Greatest short current that one pack lets pass.
    pub pack_peak: Entry<Amps>,
    /// How long one pack lets it pass.
    pub pack_peak_time: Entry<Seconds>,
    /// Cell temperature below which a pack refuses charge. It does not where nothing was entered.
    pub pack_cold_lock: Entry<Celsius>,
    /// Whether live posts are covered.
    pub posts_covered: Entry<YesNo>,
    /// Whether the room may be wet.
    pub wet_room: Entry<YesNo>,
    /// Free area of the air inlet; the outlet is as large.
    pub air_opening: Entry<SquareCentimetres>,
    /// Whether people sleep in the room.
    pub sleeping_room: Entry<YesNo>,
    /// Lowest charge that the bank reaches.
    pub lowest_charge: Entry<Percent>,
    /// Where the bank's two leads leave a bank of several strings.
    pub take_off: Entry<Arrangement>,
    /// Resistance of one tie between neighbouring strings.
    pub tie: Entry<Ohms>,
    /// Greatest difference of rest voltage between strings that are to be joined.
    pub volts_apart: Entry<Volts>,
    /// Energy drawn on a usual day.
    pub used_a_day: Entry<WattHours>,
    /// Whether it is known that no inverter stands on the bus: a room of direct current only.
    pub without_inverter: bool,
}

impl Ask {
    /// Reads the fields of the Cells tool, and of Settings and of Air and water.
    #[must_use]
    pub fn read(pad: &impl Pad) -> Self {
        Self {
            chemistry: pad.choice(Field::Chemistry),
            cell_voltage: pad.entry(Field::CellVoltage),
            cells_in_block: pad.entry(Field::CellsInABlock),
            cell_capacity: pad.entry(Field::CellCapacity),
            count: pad.entry(Field::NumberOfCells),
            bus_voltage: pad.entry(Field::BusVoltage),
            series: pad.entry(Field::CellsInSeries),
            strings: pad.entry(Field::StringsOfCells),
            coldest: pad.entry(Field::ColdestInTheRoom),
            warmest: pad.entry(Field::WarmestInTheRoom),
            end: pad.entry(Field::CellEnd),
            absorb: pad.entry(Field::CellAbsorb),
            float: pad.entry(Field::CellFloat),
            equalise: pad.entry(Field::CellEqualise),
            compensation: pad.entry(Field::CellCompensation),
            charge_cap: pad.entry(Field::ChargeCap),
            depth_used: pad.entry(Field::DepthUsed),
            inverter_low: pad.entry(Field::InverterLow),
            inverter_high: pad.entry(Field::InverterHigh),
            loads_low: pad.entry(Field::LoadsLow),
            loads_high: pad.entry(Field::LoadsHigh),
            controller_output_limit: pad.entry(Field::ControllerOutputLimit),
            charge_current: pad.entry(Field::ChargeCurrent),
            greatest_load: pad.entry(Field::GreatestLoad),
            starting_load: pad.entry(Field::StartingLoad),
            starting_time: pad.entry(Field::StartingTime),
            own_protection: pad.choice(Field::OwnProtection),
            pack_charge_limit: pad.entry(Field::PackChargeLimit),
            pack_discharge_limit: pad.entry(Field::PackDischargeLimit),
            pack_peak: pad.entry(Field::PackPeak),
            pack_peak_time: pad.entry(Field::PackPeakTime),
            pack_cold_lock: pad.entry(Field::PackColdLock),
            posts_covered: pad.choice(Field::PostsCovered),
            wet_room: pad.choice(Field::WetRoom),
            air_opening: pad.entry(Field::AirOpening),
            sleeping_room: pad.choice(Field::SleepingRoom),
            lowest_charge: pad.entry(Field::LowestCharge),
            take_off: pad.choice(Field::TakeOff),
            tie: pad.entry(Field::TieResistance),
            volts_apart: pad.entry(Field::VoltsApart),
            used_a_day: pad.entry(Field::UsedADay),
            without_inverter: false,
        }
    }

    /// The same bank with other counts.
    #[must_use]
    pub fn with_counts(mut self, series: u32, strings: u32) -> Self {
        self.series = Entry::of(f64::from(series));
        self.strings = Entry::of(f64::from(strings));
        self
    }

    pub(super) fn chemistry(&self, basis: &mut Basis) -> Option<(Chemistry, &'static Figures)> {
        let chemistry = basis.need(Field::Chemistry, self.chemistry)?;
        Some((chemistry, chemistry.figures()))
    }

    /// Cells or blocks in series.
    pub(super) fn series(&self, basis: &mut Basis) -> Option<Count> {
        basis.need(Field::CellsInSeries, positive(self.series))
    }

    /// Strings in parallel: what the cells at hand make, or one.
    pub(super) fn strings(&self, basis: &mut Basis) -> Option<Count> {
        match (positive(self.strings), positive(self.count), positive(self.series)) {
            (Entry::Blank, Entry::Typed(count), Entry::Typed(series)) => {
                Some(Count::new((count / series).floor().max(1.0)))
            }
            (Entry::Blank, _, _) => Some(Count::new(1.0)),
            (entry, _, _) => basis.need(Field::StringsOfCells, entry),
        }
    }

    pub(super) fn block_cells(&self, basis: &mut Basis) -> Option<Count> {
        block::of(self, basis)
    }

    pub(super) fn capacity(&self, basis: &mut Basis) -> Option<AmpHours> {
        basis.need(Field::CellCapacity, positive(self.cell_capacity))
    }

    pub(super) fn depth(&self, figures: &Figures, basis: &mut Basis) -> Option<Percent> {
        let entry = positive(self.depth_used);
        Some(basis.assume(Field::DepthUsed, entry, figures.depth_used.chosen)?.min(Percent::new(100.0)))
    }

    /// Lowest charge: entered, or what the depth used leaves.
    pub(super) fn lowest_charge(&self, figures: &Figures, basis: &mut Basis) -> Option<Percent> {
        let left =
            Percent::new(100.0) - self.depth(figures, &mut Basis::default()).unwrap_or(figures.depth_used.chosen);
        basis.assume(Field::LowestCharge, finite(self.lowest_charge), left)
    }

    /// Whether each block guards itself: as said, or as the pack's limits that were entered say.
    #[must_use]
    pub fn guards_itself(&self) -> Option<bool> {
        match self.own_protection {
            Entry::Typed(said) => Some(said == YesNo::Yes),
            Entry::Unread => None,
            Entry::Blank => Some(
                self.pack_charge_limit != Entry::Blank
                    || self.pack_discharge_limit != Entry::Blank
                    || self.pack_peak != Entry::Blank,
            ),
        }
    }
}

/// The greatest number of any unit that can be meant; its inverse is the least. *Chosen*: past every part of the trade, and
/// no product of a few such numbers overflows.
const FAR: f64 = 1e12;

/// A typed number that is not above zero, or out of all measure, cannot be meant.
pub(super) fn positive<Q: Quantity>(entry: Entry<Q>) -> Entry<Q> {
    match entry {
        Entry::Typed(value) if !(1.0 / FAR..=FAR).contains(&value.number()) => Entry::Unread,
        other => other,
    }
}

/// A typed number that is none, or out of all measure, cannot be meant.
pub(super) fn finite<Q: Quantity>(entry: Entry<Q>) -> Entry<Q> {
    match entry {
        Entry::Typed(value) if !(-FAR..=FAR).contains(&value.number()) => Entry::Unread,
        other => other,
    }
}

/// Where the value of a field that can be assumed comes from.
pub(super) fn origin<T>(field: Field, entry: Entry<T>) -> Origin {
    match entry {
        Entry::Typed(_) => Origin::Entered(field),
        Entry::Blank | Entry::Unread => Origin::Assumed(field),
    }
}
