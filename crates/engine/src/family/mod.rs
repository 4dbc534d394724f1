//! The two families of codes that a site may be built to, held as data.
//!
//! Whoever builds picks one; local code and a licensed electrician rule.

pub mod cold_factor;
pub mod pv_circuit;

pub use cold_factor::cold_factor;
pub use pv_circuit::PvCircuitRules;

use crate::quantity::Volts;
use crate::source::{self, Clause};

/// A family of codes.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Hash)]
pub enum CodeFamily {
    /// The standards of the International Electrotechnical Commission and the national codes drawn from them.
    #[default]
    Iec,
    /// The National Electrical Code and the codes near to it.
    NorthAmerica,
}

/// Where an array stands, which decides the voltage that a code allows.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Stands {
    /// On or at a one- or two-family dwelling.
    #[default]
    Dwelling,
    /// On or at another building.
    Building,
    /// On the ground, with no building on its circuit.
    Ground,
}

impl CodeFamily {
    /// Both.
    pub const ALL: [Self; 2] = [Self::Iec, Self::NorthAmerica];

    /// The name on screen.
    #[must_use]
    pub const fn name(self) -> &'static str {
        match self {
            Self::Iec => "IEC",
            Self::NorthAmerica => "North America",
        }
    }

    /// The highest PV voltage that the code allows where the array stands.
    ///
    /// # Source
    ///
    /// North America: NFPA 70, 690.7: 600, 1000 and 1500 V. IEC 62548: 1000 V on buildings, 1500 V elsewhere; it makes
    /// no difference between dwellings and other buildings (from memory).
    #[must_use]
    pub const fn highest_pv_voltage(self, stands: Stands) -> (Volts, Clause) {
        match (self, stands) {
            (Self::NorthAmerica, Stands::Dwelling) => {
                (Volts::new(600.0), source::NEC.at("690.7, one- and two-family dwellings"))
            }
            (Self::NorthAmerica, Stands::Building) => (Volts::new(1000.0), source::NEC.at("690.7, other buildings")),
            (Self::NorthAmerica, Stands::Ground) => {
                (Volts::new(1500.0), source::NEC.at("690.7, not on or in buildings"))
            }
            (Self::Iec, Stands::Dwelling | Stands::Building) => {
                (Volts::new(1000.0), source::IEC_62548.at("scope of voltage, on buildings"))
            }
            (Self::Iec, Stands::Ground) => (Volts::new(1500.0), source::IEC_62548.at("scope of voltage")),
        }
    }

    /// The rules for PV circuits.
    #[must_use]
    pub const fn pv_circuit(self) -> &'static PvCircuitRules {
        match self {
            Self::Iec => &pv_circuit::IEC,
            Self::NorthAmerica => &pv_circuit::NORTH_AMERICA,
        }
    }
}
