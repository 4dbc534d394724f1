//! Runs: the conductor and the breaker for every cable of a room, with its drop, by both families of codes.

mod ask;
pub mod assumed;
mod bank_fault;
pub mod branched;
mod carry;
mod kind;
mod known;
mod landing;
mod load;
mod poles;
mod precharge;
mod protect;
mod reach;
mod requirement;
mod sizing;
mod voltage_drop;

pub use ask::{Ask, BreakerType, Candidate};
pub use bank_fault::Fault;
pub use carry::Ampacity;
pub use kind::{FromPower, Kind, Rule};
pub use landing::{Landing, landing};
pub use load::{Load, working_current};
pub use poles::{poles, voltage_asked, voltage_rating};
pub use precharge::Precharge;
pub use reach::{Reach, reach};
pub use requirement::{Requirement, assess, working};
pub use sizing::{Column, Protection, Sizing, Thinner, size};
pub use voltage_drop::Drop;

use crate::check::{Basis, Cost, Outcome, Verdict, judge};
use crate::quantity::Percent;

/// Whether a value keeps to its limit.
fn holds(outcome: Outcome) -> bool {
    judge((), Cost::Loss, Percent::new(0.0), outcome, &Basis::default())
        .is_none_or(|check| matches!(check.verdict, Verdict::Clears | Verdict::Close))
}

/// Of two values against their limits, the one nearer to its limit or farther past it.
fn worse(one: Outcome, other: Outcome) -> Outcome {
    let margin = |outcome| {
        judge((), Cost::Loss, Percent::new(0.0), outcome, &Basis::default())
            .and_then(|check| check.margin)
            .map_or(f64::INFINITY, Percent::get)
    };
    if margin(other) < margin(one) { other } else { one }
}
