//! Capacity against the rate of discharge.

use crate::quantity::{AmpHours, Amps, Hours, Percent};

/// How long a cell of `capacity`, rated over `rated`, lasts at `current`.
///
/// t = H · (C / (I · H))^k
///
/// An empirical law: good within a few times the rated current; it knows nothing of rests between draws.
///
/// # Source
///
/// [`crate::source::PEUKERT`].
///
/// # Example
///
/// ```
/// use engine::chemistry::hours_at;
/// use engine::quantity::{AmpHours, Amps, Hours};
///
/// let lasts = hours_at(AmpHours::new(100.0), Hours::new(20.0), 1.25, Amps::new(20.0));
/// assert!((lasts.get() - 3.5355).abs() < 1e-4);
/// ```
#[must_use]
pub fn hours_at(capacity: AmpHours, rated: Hours, exponent: f64, current: Amps) -> Hours {
    Hours::new(rated.get() * (capacity.get() / (current.get() * rated.get())).powf(exponent))
}

/// Part of the rated capacity that can be had at `current`.
///
/// I · t / C = (C / (I · H))^(k−1), never above 100 %: what a slow draw gains is not counted on.
#[must_use]
pub fn share_at(capacity: AmpHours, rated: Hours, exponent: f64, current: Amps) -> Percent {
    let share = (capacity.get() / (current.get() * rated.get())).powf(exponent - 1.0);
    if share.is_finite() { Percent::from_share(share.min(1.0)) } else { Percent::new(100.0) }
}
