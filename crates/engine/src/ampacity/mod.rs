//! Ampacity: the current that a conductor carries without passing the temperature that its insulation bears,
//! with the corrections for where it lies and the limit that its terminals set.

pub mod correction;
pub mod iec;
mod laid;
pub mod north_america;
pub mod pv_cable;

pub use laid::{Laid, ambient_factor, at_terminals, corrected, tabled, together_factor, warms};

use crate::family::CodeFamily;
use crate::quantity::{Amps, Celsius};

macro_rules! keyed {
    ($kind:ident: $($one:ident, $key:literal;)*) => {
        impl $kind {
            /// All of them.
            pub const ALL: &'static [Self] = &[$(Self::$one),*];

            /// What it is kept and chosen under.
            #[must_use]
            pub const fn key(self) -> &'static str {
                match self { $(Self::$one => $key,)* }
            }

            /// The one kept under `key`.
            #[must_use]
            pub fn of_key(key: &str) -> Option<Self> {
                match key { $($key => Some(Self::$one),)* _ => None }
            }
        }
    };
}

/// What a conductor is insulated with, by the temperature that it bears.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Insulation {
    /// Bears 60 °C: types TW and UF of the North American trade.
    Bears60,
    /// PVC, bears 70 °C: the usual one of the IEC trade.
    Pvc70,
    /// Bears 75 °C: types THW, THWN, RHW, and XHHW in the wet.
    Bears75,
    /// Bears 90 °C: types THHN, THWN-2, XHHW-2, RHW-2; XLPE and EPR.
    Bears90,
    /// Cable made for PV, its conductor to 120 °C by EN 50618; PV wire of the North American trade, 90 °C.
    PvCable,
}

keyed!(Insulation:
    Bears60, "60";
    Pvc70, "pvc-70";
    Bears75, "75";
    Bears90, "90";
    PvCable, "pv";
);

/// How a conductor is laid.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Method {
    /// In conduit or trunking. IEC method B1; Table 310.16.
    #[default]
    Conduit,
    /// Sheathed, clipped to a surface. IEC method C; Table 310.16.
    Surface,
    /// Sheathed, with air round it. IEC method E; Table 310.16.
    CableInAir,
    /// Single conductors with air round them. IEC method F, touching; Table 310.17.
    SinglesInAir,
}

keyed!(Method:
    Conduit, "conduit";
    Surface, "surface";
    CableInAir, "cable-air";
    SinglesInAir, "singles-air";
);

/// The temperature that terminals are made for.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Terminals {
    /// 60 °C.
    At60,
    /// 70 °C: the usual of IEC devices.
    At70,
    /// 75 °C.
    At75,
    /// 90 °C.
    At90,
}

keyed!(Terminals:
    At60, "60";
    At70, "70";
    At75, "75";
    At90, "90";
);

impl Insulation {
    /// The temperature of the conductor that it bears in the tables of `family`.
    #[must_use]
    pub const fn bears(self, family: CodeFamily) -> Celsius {
        Celsius::new(match (self, family) {
            (Self::Bears60, _) | (Self::Pvc70, CodeFamily::NorthAmerica) => 60.0,
            (Self::Pvc70 | Self::Bears75, CodeFamily::Iec) => 70.0,
            (Self::Bears75, CodeFamily::NorthAmerica) => 75.0,
            (Self::Bears90, _) | (Self::PvCable, CodeFamily::NorthAmerica) => 90.0,
            (Self::PvCable, CodeFamily::Iec) => 120.0,
        })
    }
}

impl Terminals {
    /// The temperature in degrees.
    #[must_use]
    pub const fn bear(self) -> Celsius {
        Celsius::new(match self {
            Self::At60 => 60.0,
            Self::At70 => 70.0,
            Self::At75 => 75.0,
            Self::At90 => 90.0,
        })
    }

    /// What terminals of a device of `rating` bear where they are not marked.
    ///
    /// # Source
    ///
    /// North America: [`crate::source::NEC`], 110.14(C)(1): 60 °C to 100 A, 75 °C above (from memory).
    /// IEC: devices are tested on PVC conductors at 70 °C, [`crate::source::IEC_60364_5_52`], 523.1 (from memory).
    #[must_use]
    pub fn unmarked(family: CodeFamily, rating: Amps) -> Self {
        match family {
            CodeFamily::Iec => Self::At70,
            CodeFamily::NorthAmerica if rating.get() > 100.0 => Self::At75,
            CodeFamily::NorthAmerica => Self::At60,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn unmarked_terminals() {
        let at = |family, amps| Terminals::unmarked(family, Amps::new(amps));
        assert_eq!(at(CodeFamily::NorthAmerica, 100.0), Terminals::At60);
        assert_eq!(at(CodeFamily::NorthAmerica, 110.0), Terminals::At75);
        assert_eq!(at(CodeFamily::Iec, 20.0), Terminals::At70);
    }

    #[test]
    fn keys_name_one_each() {
        for one in Insulation::ALL {
            assert_eq!(Insulation::of_key(one.key()), Some(*one));
        }
        for one in Method::ALL {
            assert_eq!(Method::of_key(one.key()), Some(*one));
        }
        for one in Terminals::ALL {
            assert_eq!(Terminals::of_key(one.key()), Some(*one));
        }
    }
}
