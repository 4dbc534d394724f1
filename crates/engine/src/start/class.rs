//! Kinds of loads by how they start, with the figures typical of each. Typical: read the nameplate.

use crate::choice::Choice;
use crate::quantity::Seconds;

/// How a load starts.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Kind {
    /// Heaters: as much as it runs on.
    Resistive,
    /// Electronics and drives that ramp up.
    Electronic,
    /// Fans with a run capacitor or a shaded pole.
    Fan,
    /// Hand tools and vacuum cleaners.
    Universal,
    /// Hermetic compressors of refrigerators and freezers.
    Compressor,
    /// Pumps in a borehole.
    Submersible,
    /// Other induction motors.
    Induction,
}

macro_rules! kinds {
    ($($id:ident, $key:literal;)*) => {
        impl Kind {
            /// All of them.
            pub const ALL: &'static [Self] = &[$(Self::$id),*];

            /// What it is kept and chosen under.
            #[must_use]
            pub const fn key(self) -> &'static str {
                match self { $(Self::$id => $key,)* }
            }
        }

        impl Choice for Kind {
            fn of_key(key: &str) -> Option<Self> {
                match key { $($key => Some(Self::$id),)* _ => None }
            }
        }
    };
}

kinds! {
    Resistive, "resistive";
    Electronic, "electronic";
    Fan, "fan";
    Universal, "universal";
    Compressor, "compressor";
    Submersible, "submersible";
    Induction, "induction";
}

/// A class of load, as one says it.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Class {
    /// A pump in a borehole.
    WellPump,
    /// A pump on the ground.
    SurfacePump,
    /// A refrigerator or freezer.
    Refrigerator,
    /// An air compressor.
    AirCompressor,
    /// A hand tool or a saw with brushes.
    HandTool,
    /// A table saw or another shop motor.
    ShopMotor,
    /// A washing machine.
    WashingMachine,
    /// A microwave oven.
    Microwave,
    /// A fan.
    Fan,
    /// A heater or kettle.
    Heater,
    /// Lights and electronics.
    Electronics,
}

impl Class {
    /// All of them.
    pub const ALL: [Self; 11] = [
        Self::WellPump,
        Self::SurfacePump,
        Self::Refrigerator,
        Self::AirCompressor,
        Self::HandTool,
        Self::ShopMotor,
        Self::WashingMachine,
        Self::Microwave,
        Self::Fan,
        Self::Heater,
        Self::Electronics,
    ];

    /// What it is kept and chosen under.
    #[must_use]
    pub const fn key(self) -> &'static str {
        match self {
            Self::WellPump => "well-pump",
            Self::SurfacePump => "surface-pump",
            Self::Refrigerator => "refrigerator",
            Self::AirCompressor => "air-compressor",
            Self::HandTool => "hand-tool",
            Self::ShopMotor => "shop-motor",
            Self::WashingMachine => "washing-machine",
            Self::Microwave => "microwave",
            Self::Fan => "fan",
            Self::Heater => "heater",
            Self::Electronics => "electronics",
        }
    }
}

impl Choice for Class {
    fn of_key(key: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|class| class.key() == key)
    }
}

/// The figures typical of a class.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Usual {
    /// How it starts.
    pub kind: Kind,
    /// Starting over running apparent power, the least and the greatest that sources give.
    pub multiple: (f64, f64),
    /// Power factor of the start.
    pub starting_factor: f64,
    /// Power factor while it runs.
    pub running_factor: f64,
    /// The long end of how long a start lasts.
    pub seconds: Seconds,
}

/// The figures typical of `class`.
///
/// # Source
///
/// [`crate::source::MOTOR_GUIDES`]: ranges of starting multiples and times, from memory; no single standard. Power factors:
/// 0.3 to 0.5 with the rotor standing still (common practice), of which 0.5, as the bus feels the watts.
#[must_use]
pub const fn usual(class: Class) -> Usual {
    const fn row(kind: Kind, least: f64, most: f64, starting: f64, running: f64, seconds: f64) -> Usual {
        Usual {
            kind,
            multiple: (least, most),
            starting_factor: starting,
            running_factor: running,
            seconds: Seconds::new(seconds),
        }
    }
    match class {
        Class::WellPump => row(Kind::Submersible, 4.0, 7.0, 0.5, 0.8, 1.0),
        Class::SurfacePump => row(Kind::Induction, 3.0, 6.0, 0.5, 0.8, 2.0),
        Class::Refrigerator => row(Kind::Compressor, 4.0, 10.0, 0.5, 0.7, 1.0),
        Class::AirCompressor => row(Kind::Induction, 5.0, 8.0, 0.5, 0.8, 3.0),
        Class::HandTool => row(Kind::Universal, 2.0, 5.0, 0.8, 0.95, 0.5),
        Class::ShopMotor => row(Kind::Induction, 5.0, 7.0, 0.5, 0.8, 2.0),
        Class::WashingMachine => row(Kind::Induction, 2.0, 5.0, 0.5, 0.7, 2.0),
        Class::Microwave => row(Kind::Electronic, 1.5, 3.0, 0.8, 0.95, 0.5),
        Class::Fan => row(Kind::Fan, 1.3, 3.0, 0.6, 0.8, 5.0),
        Class::Heater => row(Kind::Resistive, 1.0, 1.1, 1.0, 1.0, 0.5),
        Class::Electronics => row(Kind::Electronic, 1.0, 2.0, 0.9, 0.95, 0.5),
    }
}

/// The figures of a kind where no class was named: those of the class that is most like it.
#[must_use]
pub const fn usual_of(kind: Kind) -> Usual {
    match kind {
        Kind::Resistive => usual(Class::Heater),
        Kind::Electronic => usual(Class::Electronics),
        Kind::Fan => usual(Class::Fan),
        Kind::Universal => usual(Class::HandTool),
        Kind::Compressor => usual(Class::Refrigerator),
        Kind::Submersible => usual(Class::WellPump),
        Kind::Induction => usual(Class::ShopMotor),
    }
}
