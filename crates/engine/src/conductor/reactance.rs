//! Reactance of cables that carry alternating current.

use crate::quantity::OhmsPerMetre;

/// Reactance of one conductor of a two-wire circuit at 50 or 60 Hz, whatever its size, where nothing better is known.
///
/// Holds for conductors side by side or in one cable, without a steel conduit; singles kept apart have more.
///
/// # Source
///
/// [`crate::source::IEC_60364_5_52`], annex G: 0.08 mΩ/m (from memory).
pub const REACTANCE: OhmsPerMetre = OhmsPerMetre::new(0.08e-3);
