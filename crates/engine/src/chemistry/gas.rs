//! What a charging cell gives off, and the air that takes it away.

use crate::quantity::{AmpHours, Amps, CubicMetresPerHour, Litres, Metres, MilliampsPerAmpHour, SquareCentimetres};
use crate::source::Clause;

/// How a charging cell gasses.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Gas {
    /// By the standard's table, safety factor included.
    Standard {
        /// Gassing current while floating.
        float: MilliampsPerAmpHour,
        /// Gassing current while boosted, which every absorb of a solar charger is.
        boost: MilliampsPerAmpHour,
        /// The row of the table.
        source: Clause,
    },
    /// All of the charge current.
    WholeCurrent {
        /// Why.
        source: Clause,
    },
    /// No hydrogen in use. A damaged cell still gives off smoke that burns and poisons.
    Nothing,
}

/// Grams of water that one ampere-hour of overcharge splits in one cell.
///
/// M(H₂O) · 3600 s / (2 · F) = 18.01528 · 3600 / (2 · 96 485.332 12)
///
/// Source: Faraday's law, constants of [`crate::source::CODATA`].
pub const WATER_GRAMS_PER_AMP_HOUR: f64 = 18.01528 * 3600.0 / (2.0 * 96_485.332_12);

/// Litres of hydrogen at 0 °C and 101.325 kPa that one ampere-hour of overcharge makes in one cell.
///
/// Vₘ · 3600 s / (2 · F) = 22.413 970 · 3600 / (2 · 96 485.332 12)
///
/// Source: Faraday's law, constants of [`crate::source::CODATA`].
pub const HYDROGEN_PER_AMP_HOUR: Litres = Litres::new(22.413_970 * 3600.0 / (2.0 * 96_485.332_12));

/// Water that `overcharge` splits in `cells` cells in series. A gram is counted as a millilitre.
///
/// # Source
///
/// Faraday's law, [`crate::source::CODATA`].
#[must_use]
pub fn water_split(overcharge: AmpHours, cells: u32) -> Litres {
    Litres::new(WATER_GRAMS_PER_AMP_HOUR * overcharge.get() * f64::from(cells) / 1000.0)
}

/// Current that makes gas in a cell of `capacity`.
///
/// I = I_gas · C / 1000
#[must_use]
pub fn gas_current(gassing: MilliampsPerAmpHour, capacity: AmpHours) -> Amps {
    Amps::new(gassing.get() * capacity.get() / 1000.0)
}

/// Fresh air that thins the hydrogen of `cells` cells in series to a fifth of what burns.
///
/// Q = 0.05 · n · I, with I the gassing current in amperes
///
/// 0.05 m³/Ah holds the dilution to 4 %, 0.42 L of hydrogen for each ampere-hour, and a safety factor of 5.
///
/// # Source
///
/// [`crate::source::IEC_62485_2`], 7.2.
///
/// # Example
///
/// ```
/// use engine::chemistry::{air_flow, gas_current};
/// use engine::quantity::{AmpHours, MilliampsPerAmpHour};
///
/// let gassing = gas_current(MilliampsPerAmpHour::new(20.0), AmpHours::new(500.0));   // 10 A
/// assert!((air_flow(24, gassing).get() - 12.0).abs() < 1e-9);
/// ```
#[must_use]
pub fn air_flow(cells: u32, gassing: Amps) -> CubicMetresPerHour {
    CubicMetresPerHour::new(0.05 * f64::from(cells) * gassing.get())
}

/// Free area of the inlet, and the same again of the outlet, that carries `flow` without a fan.
///
/// A = 28 · Q, for air that moves at 0.1 m/s. Inlet low, outlet high, on opposite walls or well apart.
///
/// # Source
///
/// [`crate::source::IEC_62485_2`], 7.3.
#[must_use]
pub fn natural_opening(flow: CubicMetresPerHour) -> SquareCentimetres {
    SquareCentimetres::new(28.0 * flow.get())
}

/// Distance from a vent inside which nothing may spark or glow.
///
/// d = 28.8 mm · ∛N · ∛(I / 1 mA), N cells that vent in one block
///
/// # Source
///
/// [`crate::source::IEC_62485_2`], annex B; from memory.
#[must_use]
pub fn keep_clear(cells_in_block: u32, gassing: Amps) -> Metres {
    Metres::new(0.0288 * f64::from(cells_in_block).cbrt() * (gassing.get() * 1000.0).cbrt())
}
