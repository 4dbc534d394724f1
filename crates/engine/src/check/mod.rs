//! Checks: one requirement each, with a limit, a value and a margin.
//!
//! A check is plain data, cheap to make by the ten thousand. Its [working](working::Step) is made only when asked for,
//! by running the same method again with a recorder in place of [`Steps::silent`].

pub mod basis;
pub mod verdict;
pub mod working;

pub use basis::{Assumption, Basis, FieldSet};
pub use verdict::{Check, Cost, Limit, Outcome, Sense, Verdict, judge, worst_first};
pub use working::{Origin, Step, Steps};
