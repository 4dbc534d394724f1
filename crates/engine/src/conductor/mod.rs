//! Conductors: their metal and make, the sizes they are sold in, and what they resist.

mod reactance;
mod resistance;
mod size;

pub use reactance::REACTANCE;
pub use resistance::{IEC_60228, TABLE_8, TABLE_8_SOLID, own_temperature, resistance, temperature_factor};
pub use size::{AMERICAN, METRIC, Size};

/// What a conductor is drawn from.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Metal {
    /// Annealed copper.
    Copper,
    /// Aluminium for wire.
    Aluminium,
}

impl Metal {
    /// Resistivity at 20 °C in Ω·mm²/m.
    ///
    /// # Source
    ///
    /// [`crate::source::IEC_60028`] for copper (1/58), [`crate::source::IEC_60889`] for aluminium.
    #[must_use]
    pub const fn resistivity(self) -> f64 {
        match self {
            Self::Copper => 1.0 / 58.0,
            Self::Aluminium => 0.028_264,
        }
    }

    /// Change of resistance for each kelvin, as a share of that at 20 °C.
    ///
    /// # Source
    ///
    /// As [`Metal::resistivity`].
    #[must_use]
    pub const fn coefficient(self) -> f64 {
        match self {
            Self::Copper => 0.003_93,
            Self::Aluminium => 0.004_03,
        }
    }

    /// The same share, of the resistance at 75 °C.
    ///
    /// # Source
    ///
    /// [`crate::source::NEC`], chapter 9, table 8, note 2.
    #[must_use]
    pub const fn coefficient_at_75_c(self) -> f64 {
        match self {
            Self::Copper => 0.003_23,
            Self::Aluminium => 0.003_30,
        }
    }
}

/// How the metal is made up.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Make {
    /// One round wire.
    Solid,
    /// A few strands: class B of the North American trade, class 2 of IEC 60228.
    Stranded,
    /// Many fine strands: class K or welding cable, class 5 of IEC 60228.
    FineStrand,
}

/// What a conductor is: metal, make, and whether the strands are tinned.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Conductor {
    /// Plain copper, a few strands.
    #[default]
    CopperStranded,
    /// Plain copper, fine strands.
    CopperFine,
    /// Plain copper, one wire.
    CopperSolid,
    /// Tinned copper, a few strands.
    TinnedStranded,
    /// Tinned copper, fine strands: what cable for PV is made of.
    TinnedFine,
    /// Aluminium, a few strands.
    AluminiumStranded,
}

impl Conductor {
    /// All of them.
    pub const ALL: &'static [Self] = &[
        Self::CopperStranded,
        Self::CopperFine,
        Self::CopperSolid,
        Self::TinnedStranded,
        Self::TinnedFine,
        Self::AluminiumStranded,
    ];

    /// What it is kept and chosen under.
    #[must_use]
    pub const fn key(self) -> &'static str {
        match self {
            Self::CopperStranded => "copper",
            Self::CopperFine => "copper-fine",
            Self::CopperSolid => "copper-solid",
            Self::TinnedStranded => "tinned",
            Self::TinnedFine => "tinned-fine",
            Self::AluminiumStranded => "aluminium",
        }
    }

    /// The one kept under `key`.
    #[must_use]
    pub fn of_key(key: &str) -> Option<Self> {
        Self::ALL.iter().copied().find(|one| one.key() == key)
    }

    /// Its metal.
    #[must_use]
    pub const fn metal(self) -> Metal {
        match self {
            Self::AluminiumStranded => Metal::Aluminium,
            _ => Metal::Copper,
        }
    }

    /// Its make.
    #[must_use]
    pub const fn make(self) -> Make {
        match self {
            Self::CopperSolid => Make::Solid,
            Self::CopperStranded | Self::TinnedStranded | Self::AluminiumStranded => Make::Stranded,
            Self::CopperFine | Self::TinnedFine => Make::FineStrand,
        }
    }

    /// Whether its strands are tinned.
    #[must_use]
    pub const fn tinned(self) -> bool {
        matches!(self, Self::TinnedStranded | Self::TinnedFine)
    }
}
