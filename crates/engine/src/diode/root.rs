//! Roots of functions of one number, inside a bracket that never stops holding the root.

use core::fmt;

/// A root was asked for and not found; what the search had when it stopped.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct NotConverged {
    /// What was sought, in a few words.
    pub what: &'static str,
    /// The least the root could still be, in the unit of what was sought.
    pub low: f64,
    /// The greatest the root could still be.
    pub high: f64,
}

impl fmt::Display for NotConverged {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        write!(f, "the search for the {} did not settle between {} and {}", self.what, self.low, self.high)
    }
}

impl core::error::Error for NotConverged {}

/// Rounds after which a search gives up. Halving alone needs about sixty to use up the digits of a number.
const ROUNDS: usize = 200;

/// Two neighbours in a search count as one below this share of their size: some ulps, far inside the 1e-6 promised.
const SAME: f64 = 8.0 * f64::EPSILON;

/// Lets a finite number through: figures far out of any module's range may overflow on the way.
pub(super) fn finite(what: &'static str, number: f64) -> Result<f64, NotConverged> {
    if number.is_finite() {
        Ok(number)
    } else {
        Err(NotConverged { what, low: f64::NEG_INFINITY, high: f64::INFINITY })
    }
}

/// The root of a rising function between `low` and `high`, by Newton's step where it stays inside the bracket and
/// shortens it, by halving where not.
///
/// `f` gives value and slope; it must not be positive at `low` nor negative at `high`, which is proved or refused here.
pub(super) fn rising(
    what: &'static str,
    low: f64,
    high: f64,
    start: f64,
    f: impl Fn(f64) -> (f64, f64),
) -> Result<f64, NotConverged> {
    let refused = NotConverged { what, low, high };
    let (mut low, mut high) = (low, high);
    let (at_low, at_high) = (f(low).0, f(high).0);
    // Written so that a NaN refuses.
    if !(low.is_finite() && high.is_finite() && low <= high && at_low <= 0.0 && at_high >= 0.0) {
        return Err(refused);
    }
    if at_low == 0.0 {
        return Ok(low);
    }
    if at_high == 0.0 {
        return Ok(high);
    }
    let mut x = start.clamp(low, high);
    let mut step_before = high - low;
    for _ in 0..ROUNDS {
        let (value, slope) = f(x);
        if value == 0.0 {
            return Ok(x);
        }
        if value < 0.0 {
            low = x;
        } else if value > 0.0 {
            high = x;
        } else {
            return Err(NotConverged { what, low, high });
        }
        let newton = x - value / slope;
        // Newton must halve the step before last time's; far up an exponential it would creep.
        let trusted = newton >= low && newton <= high && (newton - x).abs() < 0.5 * step_before.abs();
        let next = if trusted { newton } else { 0.5 * (low + high) };
        step_before = next - x;
        let same = SAME * next.abs().max(x.abs());
        x = next;
        if step_before.abs() <= same || high - low <= same {
            return Ok(x);
        }
    }
    Err(NotConverged { what, low, high })
}

/// The root of `f` between `low` and `high`, where it has the opposite sign at the two ends.
///
/// Inverse quadratic interpolation where three points allow it, halving where not (Chandrupatla 1997).
pub(super) fn between(
    what: &'static str,
    low: f64,
    high: f64,
    mut f: impl FnMut(f64) -> Result<f64, NotConverged>,
) -> Result<f64, NotConverged> {
    // b is the newest point, a the other end of the bracket, c the one before.
    let (mut a, mut b) = (low, high);
    let (mut fa, mut fb) = (f(a)?, f(b)?);
    for (x, fx) in [(a, fa), (b, fb)] {
        if fx == 0.0 {
            return Ok(x);
        }
    }
    if fa.is_nan() || fb.is_nan() || (fa < 0.0) == (fb < 0.0) {
        return Err(NotConverged { what, low, high });
    }
    let mut part = 0.5;
    for _ in 0..ROUNDS {
        let x = a + part * (b - a);
        let fx = f(x)?;
        if fx.is_nan() {
            return Err(NotConverged { what, low: a.min(b), high: a.max(b) });
        }
        let (c, fc);
        if (fx < 0.0) == (fa < 0.0) {
            (c, fc) = (a, fa);
        } else {
            (c, fc) = (b, fb);
            (b, fb) = (a, fa);
        }
        (a, fa) = (x, fx);
        let (best, at_best) = if fa.abs() < fb.abs() { (a, fa) } else { (b, fb) };
        let width = (b - a).abs();
        let same = SAME * best.abs();
        if at_best == 0.0 || width <= 2.0 * same {
            return Ok(best);
        }
        let xi = (a - b) / (c - b);
        let phi = (fa - fb) / (fc - fb);
        part = if phi * phi < xi && (1.0 - phi) * (1.0 - phi) < 1.0 - xi {
            fa / (fb - fa) * fc / (fb - fc) + (c - a) / (b - a) * fa / (fc - fa) * fb / (fc - fb)
        } else {
            0.5
        };
        let least = same / width;
        part = part.clamp(least.min(0.5), 1.0 - least.min(0.5));
    }
    Err(NotConverged { what, low: a.min(b), high: a.max(b) })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn an_exponential_from_far_up_is_found_to_the_last_digits() {
        let root = rising("x", 0.0, 1e4, 700.0, |x| (x.exp_m1() - 1e3, x.exp())).unwrap();
        assert!((root - 1001f64.ln()).abs() < 1e-13, "{root}");
    }

    #[test]
    fn a_root_at_an_end_is_found() {
        assert_eq!(rising("x", 2.0, 5.0, 4.0, |x| (x - 2.0, 1.0)).unwrap(), 2.0);
        assert_eq!(between("x", 2.0, 5.0, |x| Ok(x - 5.0)).unwrap(), 5.0);
    }

    #[test]
    fn a_cubic_with_a_flat_place_is_found() {
        let root = between("x", -1.0, 4.0, |x| Ok((x - 1.0).powi(3) + 1e-9)).unwrap();
        assert!((root - 0.999).abs() < 1e-9, "{root}");
    }

    #[test]
    fn without_a_change_of_sign_nothing_is_returned() {
        assert!(between("x", 0.0, 1.0, |x| Ok(x * x + 1.0)).is_err());
        assert!(rising("x", 0.0, 1.0, 0.5, |x| (x + 1.0, 1.0)).is_err());
    }

    #[test]
    fn not_a_number_is_never_a_root() {
        assert!(between("x", 0.0, 1.0, |x| Ok(if x == 0.0 { -1.0 } else { f64::NAN })).is_err());
        assert!(
            between("x", 0.0, 1.0, |x| Ok(if x == 1.0 {
                1.0
            } else if x == 0.0 {
                -1.0
            } else {
                f64::NAN
            }))
            .is_err()
        );
        assert!(rising("x", 0.0, 1.0, 0.5, |x| (if x == 0.5 { f64::NAN } else { x - 0.3 }, 1.0)).is_err());
    }
}
