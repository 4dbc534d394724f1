//! What stands on a nameplate, and why it may give no diode.

use core::fmt;

use super::NoDiode;
use super::root::NotConverged;
use crate::quantity::{Amps, AmpsPerKelvin, PercentPerKelvin, Volts, VoltsPerKelvin};

/// What a module's nameplate or data sheet says at reference conditions.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Nameplate {
    /// Short-circuit current.
    pub isc: Amps,
    /// Open-circuit voltage.
    pub voc: Volts,
    /// Current at the greatest power.
    pub imp: Amps,
    /// Voltage at the greatest power.
    pub vmp: Volts,
    /// µVoc, change of Voc of the whole module with temperature; below zero.
    pub voc_coefficient: VoltsPerKelvin,
    /// µIsc, change of Isc with temperature.
    pub isc_coefficient: AmpsPerKelvin,
}

/// A figure of a nameplate.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Figure {
    /// Short-circuit current.
    Isc,
    /// Open-circuit voltage.
    Voc,
    /// Current at the greatest power.
    Imp,
    /// Voltage at the greatest power.
    Vmp,
    /// Change of Voc with temperature.
    VocCoefficient,
    /// Change of Isc with temperature.
    IscCoefficient,
}

impl Figure {
    /// The figure as the trade writes it.
    #[must_use]
    pub const fn word(self) -> &'static str {
        match self {
            Self::Isc => "Isc",
            Self::Voc => "Voc",
            Self::Imp => "Imp",
            Self::Vmp => "Vmp",
            Self::VocCoefficient => "coefficient of Voc",
            Self::IscCoefficient => "coefficient of Isc",
        }
    }
}

/// One of the two resistances.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Resistance {
    /// In series with the module.
    Series,
    /// Across the diode.
    Shunt,
}

impl Resistance {
    /// The word for it.
    #[must_use]
    pub const fn word(self) -> &'static str {
        match self {
            Self::Series => "series",
            Self::Shunt => "shunt",
        }
    }
}

/// Least and greatest fall of Voc that the fit takes, as a part of Voc.
///
/// *Chosen*, wider than every technology's usual 0.21 to 0.40 %/K, and narrow enough to catch a coefficient for one cell
/// read as that of the module.
pub(super) const VOC_COEFFICIENT: [PercentPerKelvin; 2] = [PercentPerKelvin::new(-0.60), PercentPerKelvin::new(-0.15)];

/// Least and greatest change of Isc that the fit takes, as a part of Isc.
///
/// *Chosen*, wider than the usual 0.0 to 0.12 %/K, and narrow enough to catch a percentage read as amperes.
pub(super) const ISC_COEFFICIENT: [PercentPerKelvin; 2] = [PercentPerKelvin::new(-0.05), PercentPerKelvin::new(0.20)];

/// Why a nameplate gives no diode.
#[derive(Clone, Copy, Debug, PartialEq)]
#[non_exhaustive]
pub enum FitError {
    /// A figure that has to be above zero is not, or is not finite.
    NotPositive {
        /// Which.
        figure: Figure,
        /// What was given, in its own unit.
        given: f64,
    },
    /// Vmp is not between half of Voc and Voc, or Imp not between half of Isc and Isc.
    ///
    /// The curve bends one way only, so it lies under its tangent at the greatest power, which ends at 2·Vmp and 2·Imp.
    PowerPoint {
        /// Vmp or Imp.
        figure: Figure,
        /// What was given, in its own unit.
        given: f64,
        /// Voc or Isc.
        of: f64,
    },
    /// A coefficient that no module has. Of one cell, or in another unit, perhaps.
    Coefficient {
        /// Which.
        figure: Figure,
        /// What was given, as a part of Voc or Isc.
        given: PercentPerKelvin,
        /// The least that is taken.
        least: PercentPerKelvin,
        /// The greatest that is taken.
        greatest: PercentPerKelvin,
    },
    /// With this coefficient of Voc one of the resistances would have to be negative: the power point lies further out, or
    /// the curve is steeper there, than a diode without losses gives. Rounded figures can do this.
    NoRealResistance {
        /// Which one.
        resistance: Resistance,
        /// The coefficient given.
        given: VoltsPerKelvin,
        /// The nearest with which both are real; none where no module has such a coefficient.
        nearest: Option<VoltsPerKelvin>,
    },
    /// The parameters found are out of range.
    NoDiode(NoDiode),
    /// No root was found.
    NotConverged(NotConverged),
}

impl fmt::Display for FitError {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Self::NotPositive { figure, given } => {
                write!(f, "{} is {given}; it has to be above zero", figure.word())
            }
            Self::PowerPoint { figure, given, of } => write!(
                f,
                "{} is {given}; at the greatest power it has to lie between {} and {of}",
                figure.word(),
                of / 2.0
            ),
            Self::Coefficient { figure, given, least, greatest } => write!(
                f,
                "the {} is {:.3} %/K; modules have {} to {} %/K. Is it that of one cell, or in another unit?",
                figure.word(),
                given.get(),
                least.get(),
                greatest.get()
            ),
            Self::NoRealResistance { resistance, given, nearest } => {
                write!(
                    f,
                    "with Voc changing by {} V/K, Vmp and Imp would need a {} resistance below zero; one of the figures \
                     is rounded or not of this module",
                    given.get(),
                    resistance.word()
                )?;
                nearest.map_or(Ok(()), |nearest| write!(f, ". With {:.4} V/K they fit together", nearest.get()))
            }
            Self::NoDiode(why) => why.fmt(f),
            Self::NotConverged(why) => why.fmt(f),
        }
    }
}

impl core::error::Error for FitError {}

impl From<NotConverged> for FitError {
    fn from(why: NotConverged) -> Self {
        Self::NotConverged(why)
    }
}

impl From<NoDiode> for FitError {
    fn from(why: NoDiode) -> Self {
        Self::NoDiode(why)
    }
}
