//! A bank: which counts in series and in parallel every device on the bus survives, and what the bank then gives.
//!
//! Cells are counted as cells, never as volts. What fits is decided by the window from the lowest voltage in use to the
//! highest charge voltage, not by the name of a voltage class.

mod advice;
mod air;
mod ask;
mod assumption;
mod block;
mod cold;
mod devices;
mod energy;
mod lacks;
mod layouts;
mod parallel;
mod protection;
mod rates;
mod requirement;
mod rest;
mod settings;
mod touch;
mod window;
#[cfg(test)]
mod worked;

pub use advice::{Advice, advice, advice_on};
pub use air::{AirAndWater, air_and_water};
pub use ask::{Ask, YesNo};
pub use assumption::assumption;
pub use block::cells_in_block;
pub use energy::{Energy, energy, energy_working};
pub use lacks::{counts_lack, lacks};
pub use layouts::{Layout, Layouts, layouts, settled};
pub use parallel::{Shared, shares};
pub use requirement::{Requirement, assess, working};
pub use rest::{AtRest, RESTED_AT, at_rest};
pub use settings::{Setting, Settings, settings, settings_working};
pub use window::{Stage, Window, window};
