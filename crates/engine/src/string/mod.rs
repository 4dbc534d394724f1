//! Module strings against their controller: how many in series, how many in parallel, and what holds.

mod ask;
mod clip;
mod cold;
mod current;
mod fuse;
mod hot;
mod requirement;
#[cfg(test)]
mod worked;

pub mod change;
pub mod layouts;

pub use ask::Ask;
pub use clip::{ALLOWED_CLIPPED, PWM_LEAST_KEPT, bulk_voltage, clipped_share, pwm_share_kept};
pub use cold::{cold_voltage, longest, without_tolerance};
pub use fuse::{StringFuses, string_fuses};
pub use hot::{charging_voltage, coldest_working, hottest_working, shortest};
pub use layouts::{Layout, Layouts, Rejected, layouts};
pub use requirement::{Requirement, assess, working};
