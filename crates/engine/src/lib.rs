//! What Linehut computes: quantities, tables, methods and checks for a stand-alone solar power room.
//!
//! Pure: no I/O, no clock, no DOM, no randomness, no stored layout. The same code runs natively and in wasm.
//! A missing input is a value ([`check::Verdict::Asks`]), a broken limit is a verdict; neither is an error.

#![warn(missing_docs)]

pub mod ampacity;
pub mod assumed;
pub mod bank;
pub mod cell_temperature;
pub mod check;
pub mod chemistry;
pub mod choice;
pub mod conductor;
pub mod controller;
pub mod diode;
pub mod entry;
pub mod family;
pub mod fault;
pub mod field;
pub mod joining;
pub mod matching;
pub mod module;
pub mod network;
pub mod order;
pub mod pad;
pub mod quantity;
pub mod ratings;
pub mod run;
pub mod sharing;
pub mod shelf;
pub mod show;
pub mod site;
pub mod source;
pub mod start;
pub mod string;
pub mod typed;
pub mod unit;
