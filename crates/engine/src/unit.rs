//! Units that people type and that results are shown in.
//!
//! Every unit belongs to one [`Dimension`]; within it, a number in one unit turns into a number in another by
//! [`Unit::convert`], by way of the [`Unit::base`]. The base is the unit of the quantity's newtype, but for time, which
//! has two newtypes: hours are the base, and seconds convert.

/// What a unit measures. Two units of one dimension can stand in the same field.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Dimension {
    /// Electric potential difference.
    Potential,
    /// Electric current.
    Current,
    /// Active power.
    Power,
    /// Apparent power.
    ApparentPower,
    /// Electric charge.
    Charge,
    /// Energy.
    Energy,
    /// Time.
    Time,
    /// Electric resistance.
    Resistance,
    /// Resistance by length.
    ResistancePerLength,
    /// Length.
    Length,
    /// Cross-section of a conductor.
    ConductorSize,
    /// A point on a temperature scale.
    Temperature,
    /// Difference of two temperatures.
    TemperatureDifference,
    /// Relative or absolute change of a module's voltage with temperature.
    VoltageCoefficient,
    /// Relative or absolute change of a module's current with temperature.
    CurrentCoefficient,
    /// Relative change with temperature only.
    RelativeCoefficient,
    /// A part of a whole.
    Part,
    /// Solar radiation on a plane.
    Irradiance,
    /// A number of equal things.
    Number,
    /// Volume of a liquid.
    Volume,
    /// Flow of air.
    AirFlow,
    /// Area of an opening in a wall.
    Opening,
    /// Current that makes gas, for each unit of capacity.
    GasCurrent,
}

macro_rules! units {
    ($($(#[$doc:meta])* $name:ident: $dimension:ident, $symbol:literal, [$($also:literal),*], $factor:expr;)*) => {
        /// A unit that a person may type or read.
        #[derive(Clone, Copy, Debug, PartialEq, Eq)]
        pub enum Unit {
            $($(#[$doc])* $name,)*
        }

        impl Unit {
            /// Every unit.
            pub const ALL: &'static [Self] = &[$(Self::$name),*];

            /// How the unit is written on screen.
            #[must_use]
            pub const fn symbol(self) -> &'static str {
                match self { $(Self::$name => $symbol,)* }
            }

            /// Other ways people type it. Compared without regard to case, except where case tells units apart;
            /// spaces, hyphens and the ways to write °, Ω and ² are made one before comparing.
            #[must_use]
            pub const fn also_typed(self) -> &'static [&'static str] {
                match self { $(Self::$name => &[$($also),*],)* }
            }

            /// What it measures.
            #[must_use]
            pub const fn dimension(self) -> Dimension {
                match self { $(Self::$name => Dimension::$dimension,)* }
            }

            /// How many of the dimension's base units one of these is, where that is a plain multiple.
            const fn factor(self) -> f64 {
                match self { $(Self::$name => $factor,)* }
            }
        }
    };
}

units! {
    /// Volt.
    Volt: Potential, "V", ["volt", "volts", "vdc", "vac"], 1.0;
    /// Thousandth of a volt.
    Millivolt: Potential, "mV", ["millivolt", "millivolts"], 1e-3;
    /// Ampere.
    Amp: Current, "A", ["amp", "amps", "ampere", "amperes", "adc"], 1.0;
    /// Thousandth of an ampere.
    Milliamp: Current, "mA", ["milliamp", "milliamps"], 1e-3;
    /// Thousand amperes.
    Kiloamp: Current, "kA", ["kiloamp", "kiloamps"], 1e3;
    /// Watt.
    Watt: Power, "W", ["watt", "watts", "wp"], 1.0;
    /// Thousand watts.
    Kilowatt: Power, "kW", ["kilowatt", "kilowatts", "kwp"], 1e3;
    /// Mechanical horsepower of a motor's nameplate, 745.7 W.
    Horsepower: Power, "hp", ["horsepower"], 745.699_871_582_270_2;
    /// Volt-ampere.
    VoltAmp: ApparentPower, "VA", ["voltamp", "voltamps"], 1.0;
    /// Thousand volt-amperes.
    KilovoltAmp: ApparentPower, "kVA", [], 1e3;
    /// Ampere-hour.
    AmpHour: Charge, "Ah", ["amphour", "amphours"], 1.0;
    /// Watt-hour.
    WattHour: Energy, "Wh", ["watthour", "watthours"], 1.0;
    /// Thousand watt-hours.
    KilowattHour: Energy, "kWh", ["kilowatthour", "kilowatthours"], 1e3;
    /// Hour.
    Hour: Time, "h", ["hr", "hrs", "hour", "hours"], 1.0;
    /// Minute.
    Minute: Time, "min", ["minute", "minutes"], 1.0 / 60.0;
    /// Second.
    Second: Time, "s", ["sec", "secs", "second", "seconds"], 1.0 / 3600.0;
    /// Ohm.
    Ohm: Resistance, "Ω", ["ohm", "ohms"], 1.0;
    /// Thousandth of an ohm.
    Milliohm: Resistance, "mΩ", ["mohm", "mohms", "milliohm", "milliohms"], 1e-3;
    /// Ohm per metre.
    OhmPerMetre: ResistancePerLength, "Ω/m", ["ohm/m"], 1.0;
    /// Ohm per kilometre.
    OhmPerKilometre: ResistancePerLength, "Ω/km", ["ohm/km"], 1e-3;
    /// Ohm per thousand feet.
    OhmPerThousandFeet: ResistancePerLength, "Ω/kft", ["ohm/kft", "ohm/1000ft"], 1.0 / 304.8;
    /// Metre.
    Metre: Length, "m", ["metre", "metres", "meter", "meters"], 1.0;
    /// Hundredth of a metre.
    Centimetre: Length, "cm", ["centimetre", "centimetres"], 0.01;
    /// Thousandth of a metre.
    Millimetre: Length, "mm", ["millimetre", "millimetres"], 0.001;
    /// Foot, exactly 0.3048 m.
    Foot: Length, "ft", ["foot", "feet", "'"], 0.3048;
    /// Inch, exactly 0.0254 m.
    Inch: Length, "in", ["inch", "inches", "\""], 0.0254;
    /// Square millimetre.
    SquareMillimetre: ConductorSize, "mm²", ["sqmm"], 1.0;
    /// American wire gauge, ASTM B258; not a multiple, see [`awg_area`].
    Awg: ConductorSize, "AWG", ["ga", "gauge"], 1.0;
    /// Thousand circular mils, exactly 0.506 707 479 mm² (a circle of one mil across is π/4 mil²).
    Kcmil: ConductorSize, "kcmil", ["mcm"], 0.506_707_479_097_497_8;
    /// Degree Celsius.
    DegreeCelsius: Temperature, "°C", ["c", "celsius"], 1.0;
    /// Degree Fahrenheit.
    DegreeFahrenheit: Temperature, "°F", ["f", "fahrenheit"], 1.0;
    /// Kelvin, as a point above absolute zero.
    KelvinAbsolute: Temperature, "K", [], 1.0;
    /// Kelvin, as a difference.
    Kelvin: TemperatureDifference, "K", ["°c", "c"], 1.0;
    /// Degree Fahrenheit, as a difference: five ninths of a kelvin.
    FahrenheitDifference: TemperatureDifference, "°F", ["f"], 5.0 / 9.0;
    /// Percent for each kelvin, of a voltage.
    PercentPerKelvin: VoltageCoefficient, "%/K", ["%/°c", "%/c", "%"], 1.0;
    /// Thousandth of a volt for each kelvin, of a whole module.
    MillivoltPerKelvin: VoltageCoefficient, "mV/K", ["mv/°c", "mv/c"], 1e-3;
    /// Volt for each kelvin, of a whole module.
    VoltPerKelvin: VoltageCoefficient, "V/K", ["v/°c", "v/c"], 1.0;
    /// Percent for each kelvin, of a current.
    CurrentPercentPerKelvin: CurrentCoefficient, "%/K", ["%/°c", "%/c", "%"], 1.0;
    /// Thousandth of an ampere for each kelvin.
    MilliampPerKelvin: CurrentCoefficient, "mA/K", ["ma/°c", "ma/c"], 1e-3;
    /// Ampere for each kelvin.
    AmpPerKelvin: CurrentCoefficient, "A/K", ["a/°c", "a/c"], 1.0;
    /// Percent for each kelvin, of a power.
    RelativePercentPerKelvin: RelativeCoefficient, "%/K", ["%/°c", "%/c", "%"], 1.0;
    /// Hundredth part.
    Percent: Part, "%", ["percent", "pct"], 1.0;
    /// Watt for each square metre.
    WattPerSquareMetre: Irradiance, "W/m²", [], 1.0;
    /// A plain number.
    One: Number, "", ["×", "x", "pcs"], 1.0;
    /// Litre.
    Litre: Volume, "L", ["l", "litre", "litres", "liter", "liters"], 1.0;
    /// Cubic metre for each hour.
    CubicMetrePerHour: AirFlow, "m³/h", ["m3/h"], 1.0;
    /// Square centimetre.
    SquareCentimetre: Opening, "cm²", ["cm2", "sqcm"], 1.0;
    /// Square inch, exactly 6.4516 cm².
    SquareInch: Opening, "in²", ["in2", "sqin"], 6.4516;
    /// Thousandth of an ampere for each ampere-hour.
    MilliampPerAmpHour: GasCurrent, "mA/Ah", ["ma/ah"], 1.0;
}

impl Unit {
    /// The unit that [`Unit::to_base`] turns numbers into. Two units turn into one another where their bases are one.
    ///
    /// That is so within a dimension, except for the coefficients: percent and volts for each kelvin turn into one
    /// another only with the module's own volts, so each keeps its own scale (mV/K into V/K). A percent for each
    /// kelvin is the same scale whatever it is a percent of.
    #[must_use]
    pub const fn base(self) -> Self {
        match self {
            Self::Volt | Self::Millivolt => Self::Volt,
            Self::Amp | Self::Milliamp | Self::Kiloamp => Self::Amp,
            Self::Watt | Self::Kilowatt | Self::Horsepower => Self::Watt,
            Self::VoltAmp | Self::KilovoltAmp => Self::VoltAmp,
            Self::AmpHour => Self::AmpHour,
            Self::WattHour | Self::KilowattHour => Self::WattHour,
            Self::Hour | Self::Minute | Self::Second => Self::Hour,
            Self::Ohm | Self::Milliohm => Self::Ohm,
            Self::OhmPerMetre | Self::OhmPerKilometre | Self::OhmPerThousandFeet => Self::OhmPerMetre,
            Self::Metre | Self::Centimetre | Self::Millimetre | Self::Foot | Self::Inch => Self::Metre,
            Self::SquareMillimetre | Self::Awg | Self::Kcmil => Self::SquareMillimetre,
            Self::DegreeCelsius | Self::DegreeFahrenheit | Self::KelvinAbsolute => Self::DegreeCelsius,
            Self::Kelvin | Self::FahrenheitDifference => Self::Kelvin,
            Self::PercentPerKelvin | Self::CurrentPercentPerKelvin | Self::RelativePercentPerKelvin => {
                Self::PercentPerKelvin
            }
            Self::MillivoltPerKelvin | Self::VoltPerKelvin => Self::VoltPerKelvin,
            Self::MilliampPerKelvin | Self::AmpPerKelvin => Self::AmpPerKelvin,
            Self::Percent => Self::Percent,
            Self::WattPerSquareMetre => Self::WattPerSquareMetre,
            Self::Litre => Self::Litre,
            Self::CubicMetrePerHour => Self::CubicMetrePerHour,
            Self::SquareCentimetre | Self::SquareInch => Self::SquareCentimetre,
            Self::MilliampPerAmpHour => Self::MilliampPerAmpHour,
            Self::One => Self::One,
        }
    }

    /// A number of these as a number of `other`; `None` where they measure different things.
    #[must_use]
    pub fn convert(self, number: f64, other: Self) -> Option<f64> {
        if self == other {
            Some(number)
        } else if self.base() == other.base() {
            Some(other.from_base(self.to_base(number)))
        } else {
            None
        }
    }

    /// How many to divide by, where a division is exact for decimal fractions and a product by the factor is not:
    /// 118 mV is then 0.118 V to the last bit.
    const fn parts(self) -> Option<f64> {
        match self {
            Self::Millivolt
            | Self::Milliamp
            | Self::Milliohm
            | Self::MillivoltPerKelvin
            | Self::MilliampPerKelvin
            | Self::Millimetre
            | Self::OhmPerKilometre => Some(1000.0),
            Self::Centimetre => Some(100.0),
            Self::Minute => Some(60.0),
            Self::Second => Some(3600.0),
            Self::OhmPerThousandFeet => Some(304.8),
            _ => None,
        }
    }

    /// A number of these as a number of [`Unit::base`].
    ///
    /// Not to be used where a quantity counts in another unit than the base: seconds are kept as
    /// [`crate::quantity::Seconds`], whose unit is not the base of its dimension. [`Unit::convert`] serves for all.
    #[must_use]
    pub fn to_base(self, number: f64) -> f64 {
        match (self, self.parts()) {
            (Self::DegreeFahrenheit, _) => (number - 32.0) * 5.0 / 9.0,
            (Self::KelvinAbsolute, _) => number - 273.15,
            (Self::Awg, _) => awg_area(number),
            (_, Some(parts)) => number / parts,
            _ => number * self.factor(),
        }
    }

    /// A number of base units as a number of these: the other way round from [`Unit::to_base`].
    ///
    /// A wire gauge comes out between two whole ones as a rule, and not as a number where there is no area.
    #[must_use]
    pub fn from_base(self, number: f64) -> f64 {
        match (self, self.parts()) {
            (Self::DegreeFahrenheit, _) => number * 9.0 / 5.0 + 32.0,
            (Self::KelvinAbsolute, _) => number + 273.15,
            (Self::Awg, _) => 36.0 - 39.0 * (diameter_of(number) / 0.127).ln() / 92f64.ln(),
            (_, Some(parts)) => number * parts,
            _ => number / self.factor(),
        }
    }
}

/// Cross-section in mm² of a round wire of American wire gauge `gauge`, where 1/0 is 0, 2/0 is −1 and so on.
///
/// d = 0.127 mm · 92^((36 − n)/39)
///
/// # Source
///
/// [`crate::source::ASTM_B258`].
///
/// # Example
///
/// ```
/// let ten = engine::unit::awg_area(10.0);
/// assert!((ten - 5.261).abs() < 0.001);
/// ```
#[must_use]
pub fn awg_area(gauge: f64) -> f64 {
    let diameter = 0.127 * 92f64.powf((36.0 - gauge) / 39.0);
    core::f64::consts::FRAC_PI_4 * diameter * diameter
}

fn diameter_of(area: f64) -> f64 {
    (area / core::f64::consts::FRAC_PI_4).sqrt()
}
