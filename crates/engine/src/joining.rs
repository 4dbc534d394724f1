//! What flows when packs or strings at unequal volts are joined in parallel.

use core::fmt;

use crate::check::{Origin, Steps};
use crate::network::Behind;
use crate::quantity::{Amps, Ohms, Quantity, Volts};
use crate::show;

/// Why there is no joining current to speak of.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub enum JoiningError {
    /// A negative resistance, or a value that is not a finite number.
    NotPossible,
    /// Nothing to join to.
    NoPacks,
    /// Unequal volts and no resistance anywhere between them: no current is great enough.
    NoResistance {
        /// By how much the volts differ.
        difference: Volts,
    },
}

impl fmt::Display for JoiningError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::NotPossible => f.write_str("a resistance is negative, or a value is no number"),
            Self::NoPacks => f.write_str("there is no pack to join to"),
            Self::NoResistance { difference } => {
                write!(f, "{} V apart with no resistance between them", difference.get())
            }
        }
    }
}

impl core::error::Error for JoiningError {}

fn possible(pack: Behind) -> bool {
    pack.emf.get().is_finite() && pack.resistance.get().is_finite() && pack.resistance.get() >= 0.0
}

/// First rush of current from `from` into `into` when they are joined through `link`, both ways of the cable counted.
///
/// I = (E₁ − E₂) / (R₁ + R₂ + R)
///
/// At the moment of joining, before either has moved; negative where it flows the other way. Put in the least
/// resistances: new, warm, full. Rest volts are wanted, not volts under load or just off the charger. Capacitors of a
/// device on the bus are another matter and rush harder.
///
/// # Errors
///
/// [`JoiningError::NoResistance`] where volts differ and nothing lies between them; [`JoiningError::NotPossible`].
///
/// # Source
///
/// Ohm's law.
///
/// # Example
///
/// 53.2 V meets 51.2 V through 5 + 5 mΩ of packs and 10 mΩ of cable: 2 V over 20 mΩ.
///
/// ```
/// use engine::check::Steps;
/// use engine::joining::join;
/// use engine::network::Behind;
/// use engine::quantity::{Ohms, Volts};
///
/// let full = Behind { emf: Volts::new(53.2), resistance: Ohms::new(0.005) };
/// let low = Behind { emf: Volts::new(51.2), ..full };
/// let rush = join(full, low, Ohms::new(0.010), &mut Steps::silent())?;
/// assert!((rush.get() - 100.0).abs() < 1e-9);
/// # Ok::<(), engine::joining::JoiningError>(())
/// ```
pub fn join(from: Behind, into: Behind, link: Ohms, steps: &mut Steps) -> Result<Amps, JoiningError> {
    let way = from.resistance + into.resistance + link;
    if !possible(from) || !possible(into) || !possible(Behind { emf: from.emf - into.emf, resistance: way }) {
        return Err(JoiningError::NotPossible);
    }
    if link.get() < 0.0 {
        return Err(JoiningError::NotPossible);
    }
    let difference = steps.step("Volts apart", from.emf - into.emf, || {
        ("E₁ − E₂", format!("{} − {}", show::step(from.emf.amount()), show::step(into.emf.amount())), Origin::Before)
    });
    let way = steps.step("Resistance between them", way, || {
        let ohms = [from.resistance, into.resistance, link].map(|one| show::step(one.amount()));
        ("R₁ + R₂ + R", ohms.join(" + "), Origin::Before)
    });
    if difference.get() == 0.0 {
        return Ok(Amps::default());
    }
    let rush = difference / way;
    if !rush.get().is_finite() {
        return Err(JoiningError::NoResistance { difference: difference.abs() });
    }
    Ok(steps.step("Joining current", rush, || {
        ("ΔV / R", format!("{} / {}", show::step(difference.amount()), show::step(way.amount())), Origin::Before)
    }))
}

/// The greatest difference of volts at which joining drives no more than `limit` through `way` of resistance in all.
///
/// ΔV = I · R
///
/// # Example
///
/// ```
/// use engine::joining::greatest_difference;
/// use engine::quantity::{Amps, Ohms};
///
/// assert_eq!(greatest_difference(Amps::new(50.0), Ohms::new(0.02)).get(), 1.0);
/// ```
#[must_use]
pub fn greatest_difference(limit: Amps, way: Ohms) -> Volts {
    limit * way
}

/// Packs that already stand in parallel, as one: what a further one is joined to.
///
/// E = Σ(Eₖ/Rₖ) / Σ(1/Rₖ), R = 1 / Σ(1/Rₖ)
///
/// With ties between the packs left out, which makes the resistance a little too low and the rush a little too high:
/// the cautious side.
///
/// # Errors
///
/// [`JoiningError::NoPacks`]; [`JoiningError::NotPossible`], also where a pack has no resistance.
pub fn in_parallel(packs: &[Behind]) -> Result<Behind, JoiningError> {
    if packs.is_empty() {
        return Err(JoiningError::NoPacks);
    }
    if packs.iter().any(|pack| !possible(*pack) || pack.resistance.get() == 0.0) {
        return Err(JoiningError::NotPossible);
    }
    let siemens: f64 = packs.iter().map(|pack| 1.0 / pack.resistance.get()).sum();
    let short: Amps = packs.iter().map(|pack| pack.emf / pack.resistance).sum();
    let resistance = Ohms::new(1.0 / siemens);
    let joined = Behind { emf: short * resistance, resistance };
    if possible(joined) { Ok(joined) } else { Err(JoiningError::NotPossible) }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::check::Steps;

    fn pack(volts: f64, ohms: f64) -> Behind {
        Behind { emf: Volts::new(volts), resistance: Ohms::new(ohms) }
    }

    #[test]
    fn it_flows_from_the_higher_to_the_lower() {
        let link = Ohms::new(0.008);
        let rush = |from, into| join(from, into, link, &mut Steps::silent()).unwrap().get();
        let (high, low) = (pack(13.2, 0.001), pack(12.8, 0.001));
        assert!((rush(high, low) - 40.0).abs() < 1e-9);
        assert!((rush(low, high) + 40.0).abs() < 1e-9);
        assert_eq!(rush(low, low), 0.0);
    }

    #[test]
    fn a_further_pack_meets_those_that_stand_as_one() {
        // 13.0 V and 12.7 V, 3 mΩ and 6 mΩ: two parts of the one, one of the other.
        let standing = in_parallel(&[pack(13.0, 0.003), pack(12.7, 0.006)]).unwrap();
        assert!((standing.emf.get() - 12.9).abs() < 1e-12);
        assert!((standing.resistance.get() - 0.002).abs() < 1e-15);
    }

    #[test]
    fn nothing_between_unequal_volts_is_an_error_and_not_infinity() {
        let join = |from, into, link| join(from, into, Ohms::new(link), &mut Steps::silent());
        assert!(matches!(join(pack(13.0, 0.0), pack(12.0, 0.0), 0.0), Err(JoiningError::NoResistance { .. })));
        assert_eq!(join(pack(13.0, 0.0), pack(13.0, 0.0), 0.0), Ok(Amps::default()));
        assert_eq!(join(pack(13.0, 0.0), pack(f64::NAN, 0.0), 0.0), Err(JoiningError::NotPossible));
        assert_eq!(join(pack(13.0, 0.01), pack(12.0, 0.01), -0.001), Err(JoiningError::NotPossible));
        assert_eq!(in_parallel(&[]), Err(JoiningError::NoPacks));
        assert_eq!(in_parallel(&[pack(12.0, 0.0)]), Err(JoiningError::NotPossible));
    }
}
