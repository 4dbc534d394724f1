//! Cell chemistries: every figure that a bank is planned by, each with its published range, the value chosen and why.
//!
//! The ranges are wide on purpose and mostly from memory of the handbooks named; a maker's data sheet always wins,
//! and each figure of it can be entered in place of the chosen one.

mod cold;
mod curve;
mod figure;
mod freezing;
mod gas;
mod lead;
mod lithium;
mod nickel;
mod odd;
mod rate;
mod rest;
mod table;

pub use cold::{capacity_share, size_factor};
pub use figure::{Figure, Span};
pub use freezing::{acid_freezing, acid_gravity, freezing_point};
pub use gas::{
    Gas, HYDROGEN_PER_AMP_HOUR, WATER_GRAMS_PER_AMP_HOUR, air_flow, gas_current, keep_clear, natural_opening,
    water_split,
};
pub use odd::{OddCell, OddCells, odd_cells};
pub use rate::{hours_at, share_at};
pub use rest::{ChargeReading, charge_at_rest, rested, rested_at_reference};
pub use table::{Figures, Freezing, Temperatures};

pub(crate) use freezing::freezing_source;

use crate::choice::Choice;

/// Temperature at which charge voltages and capacities are stated.
pub const RATED_AT: crate::quantity::Celsius = crate::quantity::Celsius::new(25.0);

/// What cells are made of.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Chemistry {
    /// Lead plates in liquid acid, with caps to top up.
    VentedLead,
    /// Valve-regulated lead, acid held in glass mat.
    Agm,
    /// Valve-regulated lead, acid held in gel.
    Gel,
    /// Nickel and iron in liquid lye.
    NickelIron,
    /// Nickel and cadmium in liquid lye, vented pocket plates.
    NickelCadmium,
    /// Lithium iron phosphate.
    Lfp,
    /// Lithium nickel manganese cobalt oxide.
    Nmc,
    /// Sodium-ion, layered oxide.
    SodiumIon,
}

/// What kind of care a chemistry asks for.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Family {
    /// Acid: burns, freezes when empty, gives off hydrogen.
    Lead,
    /// Lye: burns, gives off hydrogen.
    Nickel,
    /// Sealed cells that need their own protection; hurt by charging in the cold.
    Lithium,
}

impl Chemistry {
    /// Every chemistry.
    pub const ALL: &'static [Self] = &[
        Self::VentedLead,
        Self::Agm,
        Self::Gel,
        Self::NickelIron,
        Self::NickelCadmium,
        Self::Lfp,
        Self::Nmc,
        Self::SodiumIon,
    ];

    /// The key that [`crate::field::Field::Chemistry`] keeps it under.
    #[must_use]
    pub const fn key(self) -> &'static str {
        match self {
            Self::VentedLead => "vented-lead",
            Self::Agm => "agm",
            Self::Gel => "gel",
            Self::NickelIron => "nickel-iron",
            Self::NickelCadmium => "nickel-cadmium",
            Self::Lfp => "lfp",
            Self::Nmc => "nmc",
            Self::SodiumIon => "sodium-ion",
        }
    }

    /// Its name in the middle of a sentence.
    #[must_use]
    pub const fn word(self) -> &'static str {
        match self {
            Self::VentedLead => "vented lead",
            Self::Agm => "AGM lead",
            Self::Gel => "gel lead",
            Self::NickelIron => "nickel-iron",
            Self::NickelCadmium => "nickel-cadmium",
            Self::Lfp => "LiFePO4",
            Self::Nmc => "NMC lithium-ion",
            Self::SodiumIon => "sodium-ion",
        }
    }

    /// What kind of care it asks for. Sodium-ion is handled as lithium is.
    #[must_use]
    pub const fn family(self) -> Family {
        match self {
            Self::VentedLead | Self::Agm | Self::Gel => Family::Lead,
            Self::NickelIron | Self::NickelCadmium => Family::Nickel,
            Self::Lfp | Self::Nmc | Self::SodiumIon => Family::Lithium,
        }
    }

    /// Its figures.
    #[must_use]
    pub const fn figures(self) -> &'static Figures {
        match self {
            Self::VentedLead => &lead::VENTED,
            Self::Agm => &lead::AGM,
            Self::Gel => &lead::GEL,
            Self::NickelIron => &nickel::IRON,
            Self::NickelCadmium => &nickel::CADMIUM,
            Self::Lfp => &lithium::LFP,
            Self::Nmc => &lithium::NMC,
            Self::SodiumIon => &lithium::SODIUM,
        }
    }
}

impl Choice for Chemistry {
    fn of_key(key: &str) -> Option<Self> {
        Self::ALL.iter().copied().find(|one| one.key() == key)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::field::{Field, Takes};

    #[test]
    fn the_field_offers_every_chemistry_under_its_key() {
        let Takes::Choice(offered) = Field::Chemistry.takes() else { panic!("a choice") };
        assert_eq!(offered.len(), Chemistry::ALL.len());
        for (key, _) in offered {
            assert_eq!(Chemistry::of_key(key).map(Chemistry::key), Some(*key));
        }
    }
}
