//! A charge controller, as its nameplate tells it.

use crate::choice::{ControllerKind, LimitHoldsFactor};
use crate::entry::Entry;
use crate::field::Field;
use crate::pad::Pad;
use crate::quantity::{Amps, Volts};

/// A controller's nameplate, and the highest voltage that it is set to charge at.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Controller {
    /// How it takes power from the array.
    pub kind: Entry<ControllerKind>,
    /// Greatest voltage that its input survives.
    pub input_limit: Entry<Volts>,
    /// Lowest voltage at which it tracks.
    pub window_low: Entry<Volts>,
    /// Highest voltage at which it tracks.
    pub window_high: Entry<Volts>,
    /// Greatest short-circuit current that its input survives.
    pub pv_current_limit: Entry<Amps>,
    /// Whether that figure already holds the sunlight factor.
    pub limit_holds_factor: Entry<LimitHoldsFactor>,
    /// Greatest current that it delivers.
    pub output_current: Entry<Amps>,
    /// Highest voltage that the bank is charged at, warm.
    pub highest_charge: Entry<Volts>,
    /// How far above the bank the array must stand for it to go on charging.
    pub running_headroom: Entry<Volts>,
    /// How far above the bank the array must stand for it to begin charging.
    pub starting_headroom: Entry<Volts>,
}

impl Controller {
    /// Reads a controller from its fields.
    #[must_use]
    pub fn read(pad: &impl Pad) -> Self {
        Self {
            kind: pad.choice(Field::ControllerKind),
            input_limit: pad.entry(Field::InputLimit),
            window_low: pad.entry(Field::WindowLow),
            window_high: pad.entry(Field::WindowHigh),
            pv_current_limit: pad.entry(Field::PvCurrentLimit),
            limit_holds_factor: pad.choice(Field::LimitHoldsFactor),
            output_current: pad.entry(Field::OutputCurrent),
            highest_charge: pad.entry(Field::HighestCharge),
            running_headroom: pad.entry(Field::RunningHeadroom),
            starting_headroom: pad.entry(Field::StartingHeadroom),
        }
    }
}
