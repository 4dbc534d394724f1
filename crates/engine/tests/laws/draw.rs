//! Drawing numbers from the random bytes of a case.

use arbtest::arbitrary::{Result, Unstructured};

/// A number between `low` and `high`, both possible.
pub fn between(u: &mut Unstructured<'_>, low: f64, high: f64) -> Result<f64> {
    let share = f64::from(u.arbitrary::<u32>()?) / f64::from(u32::MAX);
    Ok(low + share * (high - low))
}

/// A number between `low` and `high`, every size of it alike.
pub fn scaled(u: &mut Unstructured<'_>, low: f64, high: f64) -> Result<f64> {
    Ok(between(u, low.ln(), high.ln())?.exp())
}
