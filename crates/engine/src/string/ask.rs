//! Everything that the checks of a string read.

use crate::assumed;
use crate::check::Basis;
use crate::choice::{ControllerKind, Mounting};
use crate::controller::Controller;
use crate::entry::Entry;
use crate::family::{CodeFamily, Stands};
use crate::field::Field;
use crate::module::Module;
use crate::pad::Pad;
use crate::quantity::{Amps, Celsius, Count, Percent};

/// A string, or several alike in parallel, on one controller.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Ask {
    /// The module, every one of them alike.
    pub module: Module,
    /// The controller.
    pub controller: Controller,
    /// Modules in one string.
    pub series: Entry<Count>,
    /// Strings in parallel. One where nothing was entered.
    pub strings: Entry<Count>,
    /// Lowest air temperature on record.
    pub record_low: Entry<Celsius>,
    /// Highest air temperature on record.
    pub record_high: Entry<Celsius>,
    /// How the modules are fixed.
    pub mounting: Entry<Mounting>,
    /// Where the array stands.
    pub stands: Entry<Stands>,
    /// Voltage lost between array and controller at full sun.
    pub array_drop: Entry<Percent>,
    /// Fuse fitted in each string.
    pub string_fuse: Entry<Amps>,
    /// Which family of codes the site is built to.
    pub family: Entry<CodeFamily>,
    /// Margin kept on the cold voltage.
    pub cold_reserve: Entry<Percent>,
}

impl Ask {
    /// Reads the fields of the String tool.
    #[must_use]
    pub fn read(pad: &impl Pad) -> Self {
        Self {
            module: Module::read(pad),
            controller: Controller::read(pad),
            series: pad.entry(Field::Series),
            strings: pad.entry(Field::Strings),
            record_low: pad.entry(Field::RecordLow),
            record_high: pad.entry(Field::RecordHigh),
            mounting: pad.choice(Field::Mounting),
            stands: pad.choice(Field::StandsOn),
            array_drop: pad.entry(Field::ArrayDrop),
            string_fuse: pad.entry(Field::StringFuse),
            family: pad.choice(Field::CodeFamily),
            cold_reserve: pad.entry(Field::ColdReserve),
        }
    }

    /// The same with other counts.
    #[must_use]
    pub fn with_counts(mut self, series: u32, strings: u32) -> Self {
        self.series = Entry::of(f64::from(series));
        self.strings = Entry::of(f64::from(strings));
        self
    }

    /// The same on another controller.
    #[must_use]
    pub const fn on(mut self, controller: Controller) -> Self {
        self.controller = controller;
        self
    }

    pub(super) fn series(&self, basis: &mut Basis) -> Option<Count> {
        basis.need(Field::Series, self.series)
    }

    /// One string where nothing was entered: not an assumption about a part, but what the question is then about.
    pub(super) fn strings(&self, basis: &mut Basis) -> Option<Count> {
        match self.strings {
            Entry::Blank => Some(Count::new(1.0)),
            entry => basis.need(Field::Strings, entry),
        }
    }

    pub(super) fn kind(&self, basis: &mut Basis) -> Option<ControllerKind> {
        basis.assume(Field::ControllerKind, self.controller.kind, ControllerKind::Mppt)
    }

    pub(super) fn family(&self, basis: &mut Basis) -> Option<CodeFamily> {
        basis.assume(Field::CodeFamily, self.family, CodeFamily::Iec)
    }

    pub(super) fn drop(&self, basis: &mut Basis) -> Option<Percent> {
        basis.assume(Field::ArrayDrop, self.array_drop, assumed::ARRAY_DROP)
    }

    /// The margin that is kept on the cold voltage; an unread entry falls back on the default, as it decides between
    /// clears and close and never hides a break.
    pub(super) fn cold_reserve(&self) -> Percent {
        self.cold_reserve.typed().unwrap_or(assumed::COLD_RESERVE)
    }
}
