//! What a person does and sees, driven over WebDriver.
//!
//! [`visit`] opens a fresh browser on the built page and hands a [`Site`] to the test. Where things are is in
//! `find.rs`, what a person does in `act.rs`, what they see in `see.rs`, and what the tests of all
//! tools share in `tool.rs`. Nothing sleeps for a fixed time: it waits
//! for what should come, and says what it waited for when it does not.
//!
//! `LINEHUT_BROWSER` chooses `chromium` (the default), `firefox` or `webkit`; `LINEHUT_DRIVER` and
//! `LINEHUT_BROWSER_PROGRAM` name the programs where they are not on the PATH.

mod act;
mod driver;
mod find;
mod runner;
mod see;
mod tool;

pub use anyhow::{Result, bail, ensure};
pub use driver::{Kind, Screen};
pub use runner::{Site, visit, visit_and_kill};
