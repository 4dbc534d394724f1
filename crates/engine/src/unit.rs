//! Units that people type and that results are shown in.
//!
//! Every unit belongs to one [`Dimension`]; within it, a number in one unit turns into a number in another by
//! [`Unit::to_base`] and [`Unit::from_base`]. The base is the unit of the quantity's newtype.

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

            /// Other ways people type it. Compared without regard to case, except where case tells units apart.
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
    Volt: Potential, "V", ["volt", "volts", "vdc", "v dc", "vac"], 1.0;
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
    VoltAmp: ApparentPower, "VA", ["volt-amp", "volt-amps"], 1.0;
    /// Thousand volt-amperes.
    KilovoltAmp: ApparentPower, "kVA", [], 1e3;
    /// Ampere-hour.
    AmpHour: Charge, "Ah", ["amp-hour", "amp-hours", "amp hours"], 1.0;
    /// Watt-hour.
    WattHour: Energy, "Wh", ["watt-hour", "watt-hours", "watt hours"], 1.0;
    /// Thousand watt-hours.
    KilowattHour: Energy, "kWh", ["kilowatt-hour", "kilowatt-hours"], 1e3;
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
    SquareMillimetre: ConductorSize, "mm²", ["mm2", "sqmm", "mm^2", "sq mm"], 1.0;
    /// American wire gauge, ASTM B258; not a multiple, see [`awg_area`].
    Awg: ConductorSize, "AWG", ["awg", "ga", "gauge"], 1.0;
    /// Thousand circular mils, exactly 0.506 707 479 mm² (a circle of one mil across is π/4 mil²).
    Kcmil: ConductorSize, "kcmil", ["mcm"], 0.506_707_479_097_497_8;
    /// Degree Celsius.
    DegreeCelsius: Temperature, "°C", ["c", "ºc", "deg c", "degc", "celsius", "°"], 1.0;
    /// Degree Fahrenheit.
    DegreeFahrenheit: Temperature, "°F", ["f", "ºf", "deg f", "degf", "fahrenheit"], 1.0;
    /// Kelvin, as a point above absolute zero.
    KelvinAbsolute: Temperature, "K", [], 1.0;
    /// Kelvin, as a difference.
    Kelvin: TemperatureDifference, "K", ["°c", "c"], 1.0;
    /// Degree Fahrenheit, as a difference: five ninths of a kelvin.
    FahrenheitDifference: TemperatureDifference, "°F", ["f"], 5.0 / 9.0;
    /// Percent for each kelvin, of a voltage.
    PercentPerKelvin: VoltageCoefficient, "%/K", ["%/°c", "%/c", "%/ºc"], 1.0;
    /// Thousandth of a volt for each kelvin, of a whole module.
    MillivoltPerKelvin: VoltageCoefficient, "mV/K", ["mv/°c", "mv/c", "mv/ºc"], 1e-3;
    /// Volt for each kelvin, of a whole module.
    VoltPerKelvin: VoltageCoefficient, "V/K", ["v/°c", "v/c", "v/ºc"], 1.0;
    /// Percent for each kelvin, of a current.
    CurrentPercentPerKelvin: CurrentCoefficient, "%/K", ["%/°c", "%/c", "%/ºc"], 1.0;
    /// Thousandth of an ampere for each kelvin.
    MilliampPerKelvin: CurrentCoefficient, "mA/K", ["ma/°c", "ma/c", "ma/ºc"], 1e-3;
    /// Ampere for each kelvin.
    AmpPerKelvin: CurrentCoefficient, "A/K", ["a/°c", "a/c", "a/ºc"], 1.0;
    /// Percent for each kelvin, of a power.
    RelativePercentPerKelvin: RelativeCoefficient, "%/K", ["%/°c", "%/c", "%/ºc"], 1.0;
    /// Hundredth part.
    Percent: Part, "%", ["percent", "pct"], 1.0;
    /// Watt for each square metre.
    WattPerSquareMetre: Irradiance, "W/m²", ["w/m2"], 1.0;
    /// A plain number.
    One: Number, "", ["×", "x", "pcs"], 1.0;
}

impl Unit {
    /// A number of these as a number of the dimension's base units.
    ///
    /// Coefficients have no single base: percent and volts for each kelvin turn into one another only with the
    /// module's own volts, so each keeps its own scale (mV/K into V/K).
    #[must_use]
    pub fn to_base(self, number: f64) -> f64 {
        match self {
            Self::DegreeFahrenheit => (number - 32.0) * 5.0 / 9.0,
            Self::KelvinAbsolute => number - 273.15,
            Self::Awg => awg_area(number),
            // A division where the factor is a decimal fraction keeps 118 mV at 0.118 V to the last bit.
            Self::Millivolt
            | Self::Milliamp
            | Self::Milliohm
            | Self::MillivoltPerKelvin
            | Self::MilliampPerKelvin
            | Self::Millimetre
            | Self::OhmPerKilometre => number / 1000.0,
            Self::Centimetre => number / 100.0,
            _ => number * self.factor(),
        }
    }

    /// A number of base units as a number of these: the other way round from [`Unit::to_base`].
    #[must_use]
    pub fn from_base(self, number: f64) -> f64 {
        match self {
            Self::DegreeFahrenheit => number * 9.0 / 5.0 + 32.0,
            Self::KelvinAbsolute => number + 273.15,
            Self::Awg => 36.0 - 39.0 * (diameter_of(number) / 0.127).ln() / 92f64.ln(),
            Self::Millivolt
            | Self::Milliamp
            | Self::Milliohm
            | Self::MillivoltPerKelvin
            | Self::MilliampPerKelvin
            | Self::Millimetre
            | Self::OhmPerKilometre => number * 1000.0,
            Self::Centimetre => number * 100.0,
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
