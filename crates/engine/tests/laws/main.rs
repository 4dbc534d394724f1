//! What must hold whatever the figures: one module for each subject, cases drawn at random.

mod bank;
mod diode;
mod draw;
mod network;
mod start;
mod string;
