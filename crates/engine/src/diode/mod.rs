//! The single-diode model of a module, with five parameters: its whole curve at any irradiance and cell temperature.
//!
//! A [`Diode`] holds the parameters at [reference conditions](REFERENCE_IRRADIANCE); [`Diode::at`] carries them to other
//! conditions as a [`Curve`], which answers for currents, voltages and the point of greatest power;
//! [`fit`] finds the parameters from a [`Nameplate`].
//!
//! Holds for one evenly lit module of crystalline silicon under sunlight near air mass 1.5 (the modifier M of the paper is
//! taken as 1). It knows nothing of shade, bypass diodes, breakdown, or the first hours of thin films.
//!
//! # Source
//!
//! [`source::DE_SOTO`](crate::source::DE_SOTO).
//!
//! ```
//! use engine::diode::{Nameplate, fit};
//! use engine::quantity::{Amps, AmpsPerKelvin, Celsius, Volts, VoltsPerKelvin, WattsPerSquareMetre};
//!
//! let module = fit(&Nameplate {
//!     isc: Amps::new(9.44),
//!     voc: Volts::new(46.9),
//!     imp: Amps::new(8.87),
//!     vmp: Volts::new(38.3),
//!     voc_coefficient: VoltsPerKelvin::new(-0.15),
//!     isc_coefficient: AmpsPerKelvin::new(0.0048),
//! })?;
//! let dull = module.at(WattsPerSquareMetre::new(200.0), Celsius::new(5.0))?;
//! assert!((dull.open_circuit_voltage()?.get() - 47.3).abs() < 0.2);
//! # Ok::<(), Box<dyn core::error::Error>>(())
//! ```

mod curve;
mod fit;
mod nameplate;
mod root;

use core::fmt;

use crate::quantity::{
    Amps, AmpsPerKelvin, Celsius, Ohms, PercentPerKelvin, Volts, VoltsPerKelvin, WattsPerSquareMetre,
};
use curve::Kernel;

pub use curve::{Curve, PowerPoint};
pub use fit::{GaveWay, Nearest, fit, fit_nearest};
pub use nameplate::{Figure, FitError, Nameplate, Resistance};
pub use root::NotConverged;

/// Irradiance of the reference conditions. Source: [`IEC_61215`](crate::source::IEC_61215), standard test conditions.
pub const REFERENCE_IRRADIANCE: WattsPerSquareMetre = WattsPerSquareMetre::new(1000.0);

/// Cell temperature of the reference conditions. Source: as [`REFERENCE_IRRADIANCE`].
pub const REFERENCE_CELL: Celsius = Celsius::new(25.0);

/// Greatest irradiance that [`Diode::at`] takes. *Chosen*: sun with cloud edge or snow reaches 1300 to 1500 W/m².
pub const GREATEST_IRRADIANCE: WattsPerSquareMetre = WattsPerSquareMetre::new(2000.0);

/// Coldest cell that [`Diode::at`] takes. *Chosen*: past any record low on the ground.
pub const COLDEST_CELL: Celsius = Celsius::new(-100.0);

/// Hottest cell that [`Diode::at`] takes. *Chosen*: past what a module's materials bear.
pub const HOTTEST_CELL: Celsius = Celsius::new(150.0);

/// Boltzmann's constant in electronvolts, that is volts of one electron's charge, for each kelvin.
///
/// Source: [`CODATA`](crate::source::CODATA); exact since the constants it is made of are, here to ten digits.
const BOLTZMANN_VOLT_PER_KELVIN: f64 = 8.617_333_262e-5;

/// The band gap of the cells' material, and how it closes with temperature.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct BandGap {
    /// Eg at reference conditions: the electronvolts of the gap are the volts one electron crosses.
    pub at_reference: Volts,
    /// Relative change with temperature.
    pub coefficient: PercentPerKelvin,
}

impl BandGap {
    /// Crystalline silicon: 1.121 eV, −0.02677 %/K. Source: [`DE_SOTO`](crate::source::DE_SOTO).
    pub const SILICON: Self = Self { at_reference: Volts::new(1.121), coefficient: PercentPerKelvin::new(-0.026_77) };

    /// Eg / (k·T).
    fn over_thermal(self, kelvin: f64) -> f64 {
        let rise = kelvin - REFERENCE_CELL.above_absolute_zero().get();
        let gap = self.at_reference.get() * (1.0 + self.coefficient.get() / 100.0 * rise);
        gap / (BOLTZMANN_VOLT_PER_KELVIN * kelvin)
    }

    /// d(ln I0)/dT at reference conditions: 3/T + Eg/(k·T²) − Eg'/(k·T).
    fn saturation_growth_per_kelvin(self) -> f64 {
        let kelvin = REFERENCE_CELL.above_absolute_zero().get();
        let over_thermal = self.over_thermal(kelvin);
        3.0 / kelvin + over_thermal / kelvin - over_thermal * self.coefficient.get() / 100.0
    }
}

/// The five parameters of the equation, at one irradiance and temperature.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Parameters {
    /// IL, the current that light drives.
    pub light_current: Amps,
    /// I0, the diode's saturation current.
    pub saturation_current: Amps,
    /// a = n·Ns·k·T/q, the modified ideality of all cells in series.
    pub ideality: Volts,
    /// Rs, in series with everything.
    pub series: Ohms,
    /// Rsh, across the diode. Infinite where nothing leaks.
    pub shunt: Ohms,
}

/// Why five parameters make no diode.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub enum NoDiode {
    /// One that has to be above zero is not.
    NotPositive {
        /// Which, in words.
        what: &'static str,
        /// What was given, in its own unit.
        given: f64,
    },
    /// One is not a number where a finite one is needed.
    NotFinite {
        /// Which, in words.
        what: &'static str,
    },
}

impl fmt::Display for NoDiode {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::NotPositive { what, given } => write!(f, "the {what} is {given}; it has to be above zero"),
            Self::NotFinite { what } => write!(f, "the {what} is not a finite number"),
        }
    }
}

impl core::error::Error for NoDiode {}

/// Why a curve, or a point of one, has no answer.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub enum CurveError {
    /// Irradiance outside 0 to [`GREATEST_IRRADIANCE`].
    Irradiance {
        /// What was given.
        given: WattsPerSquareMetre,
    },
    /// Cell temperature outside [`COLDEST_CELL`] to [`HOTTEST_CELL`].
    Cell {
        /// What was given.
        given: Celsius,
    },
    /// The parameters, carried to these conditions, make no diode.
    NoDiode(NoDiode),
    /// A voltage below zero, where bypass diodes and breakdown rule.
    Reversed {
        /// What was given.
        voltage: Volts,
    },
    /// A current above that of short circuit, which only another source can drive.
    BeyondShortCircuit {
        /// What was given.
        current: Amps,
        /// The greatest that has a voltage of zero or more.
        short_circuit: Amps,
    },
    /// No root was found.
    NotConverged(NotConverged),
}

impl fmt::Display for CurveError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::Irradiance { given } => {
                write!(f, "an irradiance of {} W/m² is outside 0 to {} W/m²", given.get(), GREATEST_IRRADIANCE.get())
            }
            Self::Cell { given } => {
                write!(f, "a cell at {} °C is outside {} to {} °C", given.get(), COLDEST_CELL.get(), HOTTEST_CELL.get())
            }
            Self::NoDiode(why) => why.fmt(f),
            Self::Reversed { voltage } => {
                write!(f, "{} V: the model answers for zero volts and more", voltage.get())
            }
            Self::BeyondShortCircuit { current, short_circuit } => write!(
                f,
                "{} A is more than the {} A the module gives at short circuit",
                current.get(),
                short_circuit.get()
            ),
            Self::NotConverged(why) => why.fmt(f),
        }
    }
}

impl core::error::Error for CurveError {}

impl From<NotConverged> for CurveError {
    fn from(why: NotConverged) -> Self {
        Self::NotConverged(why)
    }
}

impl From<NoDiode> for CurveError {
    fn from(why: NoDiode) -> Self {
        Self::NoDiode(why)
    }
}

/// A module as one diode, a light-driven current and two resistances, known at reference conditions.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Diode {
    reference: Parameters,
    isc_coefficient: AmpsPerKelvin,
    band_gap: BandGap,
}

impl Diode {
    /// The module with these parameters at reference conditions.
    ///
    /// # Errors
    ///
    /// [`NoDiode`] where a parameter is not finite or has the wrong sign. The series resistance may be zero, the shunt
    /// infinite.
    pub fn new(reference: Parameters, isc_coefficient: AmpsPerKelvin, band_gap: BandGap) -> Result<Self, NoDiode> {
        check(&reference)?;
        positive("band gap", band_gap.at_reference.get())?;
        finite("coefficient of the band gap", band_gap.coefficient.get())?;
        finite("coefficient of the short-circuit current", isc_coefficient.get())?;
        Ok(Self { reference, isc_coefficient, band_gap })
    }

    /// The five parameters at reference conditions.
    #[must_use]
    pub const fn reference(&self) -> Parameters {
        self.reference
    }

    /// µIsc, change of the light current, and so nearly of the short-circuit current, with temperature.
    #[must_use]
    pub const fn isc_coefficient(&self) -> AmpsPerKelvin {
        self.isc_coefficient
    }

    /// The band gap of the cells.
    #[must_use]
    pub const fn band_gap(&self) -> BandGap {
        self.band_gap
    }

    /// The curve at another irradiance on the module's plane and another cell temperature.
    ///
    /// IL = (S/Sref)·(IL,ref + µIsc·(T − Tref));
    /// I0 = I0,ref·(T/Tref)³·exp(Eg,ref/(k·Tref) − Eg/(k·T)), Eg = Eg,ref·(1 + C·(T − Tref));
    /// a = aref·T/Tref; Rsh = Rsh,ref·Sref/S; Rs as it is.
    ///
    /// # Errors
    ///
    /// [`CurveError::Irradiance`] and [`CurveError::Cell`] outside the ranges taken; [`CurveError::NoDiode`] where the
    /// parameters run out of range on the way, such as a light current that a wild coefficient turns negative.
    pub fn at(&self, irradiance: WattsPerSquareMetre, cell: Celsius) -> Result<Curve, CurveError> {
        if !(0.0..=GREATEST_IRRADIANCE.get()).contains(&irradiance.get()) {
            return Err(CurveError::Irradiance { given: irradiance });
        }
        if !(COLDEST_CELL..=HOTTEST_CELL).contains(&cell) {
            return Err(CurveError::Cell { given: cell });
        }
        let kelvin = cell.above_absolute_zero().get();
        let reference_kelvin = REFERENCE_CELL.above_absolute_zero().get();
        let (sun, warmth) = (irradiance / REFERENCE_IRRADIANCE, kelvin / reference_kelvin);
        let full_sun = self.reference.light_current + self.isc_coefficient * (cell - REFERENCE_CELL);
        positive("light current at this temperature", full_sun.get())?;
        let growth = self.band_gap.over_thermal(reference_kelvin) - self.band_gap.over_thermal(kelvin);
        let saturation = self.reference.saturation_current * (warmth.powi(3) * growth.exp());
        positive("saturation current at this temperature", saturation.get())?;
        Ok(Curve::new(Kernel {
            light_amp: full_sun.get() * sun,
            saturation_amp: saturation.get(),
            ideality_volt: self.reference.ideality.get() * warmth,
            series_ohm: self.reference.series.get(),
            shunt_siemens: sun / self.reference.shunt.get(),
        }))
    }

    /// dVoc/dT at reference conditions, in closed form from the equation at open circuit, not by a step of temperature:
    ///
    /// dVoc/dT = (µIsc − I0'·(exp(Voc/a) − 1) + I0·exp(Voc/a)·Voc/(a·T)) / (I0·exp(Voc/a)/a + 1/Rsh)
    ///
    /// # Errors
    ///
    /// [`CurveError::NotConverged`] where Voc itself was not found.
    pub fn voc_coefficient(&self) -> Result<VoltsPerKelvin, CurveError> {
        let voc = self.at(REFERENCE_IRRADIANCE, REFERENCE_CELL)?.open_circuit_voltage()?;
        let slope = fit::voc_slope(
            &Kernel::new(self.reference),
            voc.get(),
            self.isc_coefficient.get(),
            self.band_gap.saturation_growth_per_kelvin(),
        );
        Ok(VoltsPerKelvin::new(root::finite("coefficient of Voc", slope)?))
    }

    /// What would stand on the nameplate of this module: the six figures that [`fit`] starts from.
    ///
    /// # Errors
    ///
    /// [`CurveError::NotConverged`] where one of them was not found.
    pub fn nameplate(&self) -> Result<Nameplate, CurveError> {
        let curve = self.at(REFERENCE_IRRADIANCE, REFERENCE_CELL)?;
        let top = curve.greatest_power()?;
        Ok(Nameplate {
            isc: curve.short_circuit_current()?,
            voc: curve.open_circuit_voltage()?,
            imp: top.current,
            vmp: top.voltage,
            voc_coefficient: self.voc_coefficient()?,
            isc_coefficient: self.isc_coefficient,
        })
    }
}

/// Refuses parameters that the equation has no use for.
fn check(five: &Parameters) -> Result<(), NoDiode> {
    positive("light current", five.light_current.get())?;
    positive("saturation current", five.saturation_current.get())?;
    positive("modified ideality", five.ideality.get())?;
    finite("series resistance", five.series.get())?;
    if five.series.get() < 0.0 {
        return Err(NoDiode::NotPositive { what: "series resistance", given: five.series.get() });
    }
    let shunt = five.shunt.get();
    if shunt.is_nan() {
        return Err(NoDiode::NotFinite { what: "shunt resistance" });
    }
    if shunt <= 0.0 {
        return Err(NoDiode::NotPositive { what: "shunt resistance", given: shunt });
    }
    Ok(())
}

/// Refuses what is not finite.
fn finite(what: &'static str, given: f64) -> Result<(), NoDiode> {
    if given.is_finite() { Ok(()) } else { Err(NoDiode::NotFinite { what }) }
}

/// Refuses what is not finite and above zero.
fn positive(what: &'static str, given: f64) -> Result<(), NoDiode> {
    finite(what, given)?;
    if given > 0.0 { Ok(()) } else { Err(NoDiode::NotPositive { what, given }) }
}
