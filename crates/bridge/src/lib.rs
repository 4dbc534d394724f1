//! The only crate that knows how Linehut stores and sends what a person typed.
//!
//! Stored are entries *as typed*: text and chosen unit, by tool and field. No computed number is ever stored.
//!
//! - [`Kept`] is the layout of today, the same in the browser's storage and in a file.
//! - [`file`] opens and writes files: size, shape and version are checked, and nothing in a file can make it panic.
//! - [`site`] does the same for one site.
//! - [`pieces`] parts a site among several links, each short enough for a code that a camera reads.
//! - [`demo`] holds sites to look at; [`report`] writes a site's checks out.
//! - `browser` (wasm only) turns it into a structured value for the browser's storage and back.
//!
//! Each version that was ever released has a kept example under `tests/kept/`, which must open for ever.

#![warn(missing_docs)]

#[cfg(target_arch = "wasm32")]
pub mod browser;
pub mod demo;
pub mod file;
mod kept;
pub mod link;
pub mod pieces;
mod refused;
pub mod report;
pub mod site;

pub use kept::{Kept, KeptEntry, VERSION};
pub use refused::Refused;
