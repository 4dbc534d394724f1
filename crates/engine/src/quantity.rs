//! Quantities: one newtype for each, in the unit the trade uses, and the table of products that physics allows.
//!
//! A quantity is made with `new` and left with `get`, so that both stay visible in the code.
//! There is no `From<f64>` and no `Deref`; a wrong product does not compile.
//! Every line of the relation table has a witness in `tests/relations.rs`.

use crate::unit::Unit;

/// What every quantity can do: be made from, and give back, a number in its own unit.
pub trait Quantity: Copy {
    /// The unit that the number is in.
    const UNIT: Unit;

    /// The quantity of `number` units.
    fn of(number: f64) -> Self;

    /// The number of units.
    fn number(self) -> f64;

    /// The quantity with its unit as a value, for showing.
    fn amount(self) -> Amount {
        Amount { number: self.number(), unit: Self::UNIT }
    }
}

/// A number with its unit as a value: what a check shows, not what a method computes with.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Amount {
    /// How many units.
    pub number: f64,
    /// Of which unit.
    pub unit: Unit,
}

macro_rules! quantity {
    ($($(#[$doc:meta])* $name:ident, $unit:ident;)*) => {$(
        $(#[$doc])*
        #[derive(Clone, Copy, Debug, Default, PartialEq, PartialOrd)]
        pub struct $name(f64);

        impl $name {
            /// The quantity of `number` units.
            #[must_use]
            pub const fn new(number: f64) -> Self {
                Self(number)
            }

            /// The number of units.
            #[must_use]
            pub const fn get(self) -> f64 {
                self.0
            }

            /// The lesser of two; not a number where either is not.
            #[must_use]
            pub const fn min(self, other: Self) -> Self {
                if self.0 <= other.0 || self.0.is_nan() { self } else { other }
            }

            /// The greater of two; not a number where either is not.
            #[must_use]
            pub const fn max(self, other: Self) -> Self {
                if self.0 >= other.0 || self.0.is_nan() { self } else { other }
            }

            /// The size, whatever the sign.
            #[must_use]
            pub const fn abs(self) -> Self {
                Self(self.0.abs())
            }
        }

        impl Quantity for $name {
            const UNIT: Unit = Unit::$unit;

            fn of(number: f64) -> Self {
                Self(number)
            }

            fn number(self) -> f64 {
                self.0
            }
        }
    )*};
}

/// Sums, differences and multiples: for every quantity but a point on a scale.
macro_rules! extent {
    ($($name:ident)*) => {$(
        impl core::ops::Add for $name {
            type Output = Self;
            fn add(self, other: Self) -> Self {
                Self(self.0 + other.0)
            }
        }

        impl core::ops::Sub for $name {
            type Output = Self;
            fn sub(self, other: Self) -> Self {
                Self(self.0 - other.0)
            }
        }

        impl core::ops::Neg for $name {
            type Output = Self;
            fn neg(self) -> Self {
                Self(-self.0)
            }
        }

        impl core::ops::Mul<f64> for $name {
            type Output = Self;
            fn mul(self, times: f64) -> Self {
                Self(self.0 * times)
            }
        }

        impl core::ops::Mul<$name> for f64 {
            type Output = $name;
            fn mul(self, one: $name) -> $name {
                $name(self * one.0)
            }
        }

        impl core::ops::Div<f64> for $name {
            type Output = Self;
            fn div(self, parts: f64) -> Self {
                Self(self.0 / parts)
            }
        }

        /// How many times the one holds the other.
        impl core::ops::Div for $name {
            type Output = f64;
            fn div(self, other: Self) -> f64 {
                self.0 / other.0
            }
        }

        impl core::iter::Sum for $name {
            fn sum<I: Iterator<Item = Self>>(all: I) -> Self {
                Self(all.map(|one| one.0).sum())
            }
        }
    )*};
}

/// `A * B = C` writes the product both ways round and both quotients, and puts the line into [`RELATIONS`].
macro_rules! relation {
    ($($a:ident * $b:ident = $c:ident;)*) => {
        /// Every line of the relation table by name: two factors and their product.
        pub const RELATIONS: &[[&str; 3]] = &[$([stringify!($a), stringify!($b), stringify!($c)]),*];

        $(relation!(@line $a $b $c);)*
    };
    (@line $a:ident $b:ident $c:ident) => {
        impl core::ops::Mul<$b> for $a {
            type Output = $c;
            fn mul(self, other: $b) -> $c {
                $c(self.0 * other.0)
            }
        }

        impl core::ops::Mul<$a> for $b {
            type Output = $c;
            fn mul(self, other: $a) -> $c {
                $c(self.0 * other.0)
            }
        }

        impl core::ops::Div<$a> for $c {
            type Output = $b;
            fn div(self, other: $a) -> $b {
                $b(self.0 / other.0)
            }
        }

        impl core::ops::Div<$b> for $c {
            type Output = $a;
            fn div(self, other: $b) -> $a {
                $a(self.0 / other.0)
            }
        }
    };
}

quantity! {
    /// Electric potential difference.
    Volts, Volt;
    /// Electric current.
    Amps, Amp;
    /// Active power.
    Watts, Watt;
    /// Apparent power: what an inverter's surge is rated in. Never the same as [`Watts`].
    VoltAmps, VoltAmp;
    /// Electric charge as banks are rated.
    AmpHours, AmpHour;
    /// Energy as banks and loads are counted.
    WattHours, WattHour;
    /// Time as charge and energy are counted.
    Hours, Hour;
    /// Time as motors start and fuses melt. Never mixed with [`Hours`]; a field's entry converts.
    Seconds, Second;
    /// Electric resistance.
    Ohms, Ohm;
    /// Resistance of a conductor by its length.
    OhmsPerMetre, OhmPerMetre;
    /// Length.
    Metres, Metre;
    /// Cross-section of a conductor.
    SquareMillimetres, SquareMillimetre;
    /// A point on the Celsius scale; a difference of two is [`Kelvins`].
    Celsius, DegreeCelsius;
    /// Difference of two temperatures.
    Kelvins, Kelvin;
    /// Change of a voltage with temperature.
    VoltsPerKelvin, VoltPerKelvin;
    /// Change of a current with temperature.
    AmpsPerKelvin, AmpPerKelvin;
    /// Relative change with temperature, in percent for each kelvin.
    PercentPerKelvin, PercentPerKelvin;
    /// A part of a whole, in percent.
    Percent, Percent;
    /// Solar radiation on a plane.
    WattsPerSquareMetre, WattPerSquareMetre;
    /// A number of equal things.
    Count, One;
    /// Volume of a liquid.
    Litres, Litre;
    /// Flow of air.
    CubicMetresPerHour, CubicMetrePerHour;
    /// Area of an opening in a wall.
    SquareCentimetres, SquareCentimetre;
    /// Current that makes gas, for each unit of capacity.
    MilliampsPerAmpHour, MilliampPerAmpHour;
}

extent! {
    Volts Amps Watts VoltAmps AmpHours WattHours Hours Seconds Ohms OhmsPerMetre Metres SquareMillimetres
    Kelvins VoltsPerKelvin AmpsPerKelvin PercentPerKelvin Percent WattsPerSquareMetre Count
    Litres CubicMetresPerHour SquareCentimetres MilliampsPerAmpHour
}

relation! {
    Volts * Amps = Watts;
    Amps * Ohms = Volts;
    OhmsPerMetre * Metres = Ohms;
    VoltsPerKelvin * Kelvins = Volts;
    AmpsPerKelvin * Kelvins = Amps;
    PercentPerKelvin * Kelvins = Percent;
    Amps * Hours = AmpHours;
    Watts * Hours = WattHours;
    Volts * AmpHours = WattHours;
}

impl core::ops::Sub for Celsius {
    type Output = Kelvins;
    fn sub(self, other: Self) -> Kelvins {
        Kelvins(self.0 - other.0)
    }
}

impl core::ops::Add<Kelvins> for Celsius {
    type Output = Self;
    fn add(self, rise: Kelvins) -> Self {
        Self(self.0 + rise.0)
    }
}

impl Celsius {
    /// The same point on the absolute scale, as a distance from absolute zero.
    #[must_use]
    pub const fn above_absolute_zero(self) -> Kelvins {
        Kelvins(self.0 + 273.15)
    }
}

impl Percent {
    /// The same part as a share of one: 3 % is 0.03.
    #[must_use]
    pub const fn share(self) -> f64 {
        self.0 / 100.0
    }

    /// From a share of one: 0.03 is 3 %.
    #[must_use]
    pub const fn from_share(share: f64) -> Self {
        Self(share * 100.0)
    }

    /// What a whole becomes when this part is added: 3 % makes it 1.03 times as much.
    #[must_use]
    pub const fn more(self) -> f64 {
        1.0 + self.0 / 100.0
    }
}

impl Volts {
    /// Apparent power of an alternating current: effective volts times effective amps.
    #[must_use]
    pub const fn times_alternating(self, current: Amps) -> VoltAmps {
        VoltAmps(self.0 * current.0)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_difference_of_two_temperatures_is_in_kelvins() {
        assert_eq!(Celsius::new(25.0) - Celsius::new(-31.0), Kelvins::new(56.0));
    }

    #[test]
    fn a_share_and_its_percent_are_one_thing() {
        assert_eq!(Percent::from_share(0.03), Percent::new(3.0));
        assert_eq!(Percent::new(3.0).more(), 1.03);
    }

    #[test]
    fn a_lost_number_is_not_hidden_by_the_lesser_or_the_greater() {
        let (lost, one) = (Volts::new(f64::NAN), Volts::new(1.0));
        for found in [lost.min(one), one.min(lost), lost.max(one), one.max(lost)] {
            assert!(found.get().is_nan());
        }
        assert_eq!(one.min(Volts::new(2.0)), one);
        assert_eq!(one.max(Volts::new(2.0)), Volts::new(2.0));
    }
}
