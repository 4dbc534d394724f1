//! The relation table and the units, each against an independent library of quantities.
//!
//! A line of the table without its witness here fails; a unit without one does not compile, as the list is a `match`.

use engine::quantity::{
    AmpHours, Amps, AmpsPerKelvin, Hours, Kelvins, Metres, Ohms, OhmsPerMetre, Percent, PercentPerKelvin, Quantity,
    RELATIONS, Seconds, VoltAmps, Volts, VoltsPerKelvin, WattHours, Watts,
};
use engine::unit::{Unit, awg_area};
use uom::si::area::{circular_mil, square_centimeter, square_inch, square_meter, square_millimeter};
use uom::si::electric_charge::ampere_hour;
use uom::si::electric_current::{ampere, kiloampere, milliampere};
use uom::si::electric_potential::{millivolt, volt};
use uom::si::electrical_resistance::{milliohm, ohm};
use uom::si::energy::{kilowatt_hour, watt_hour};
use uom::si::f64::{
    Area, ElectricCharge, ElectricCurrent, ElectricPotential, ElectricalResistance, Energy, Length, Power, Ratio,
    TemperatureInterval, ThermodynamicTemperature, Time, Volume, VolumeRate,
};
use uom::si::length::{centimeter, foot, inch, kilometer, meter, millimeter};
use uom::si::power::{horsepower, kilowatt, watt};
use uom::si::ratio::{percent, ratio};
use uom::si::temperature_interval::{degree_fahrenheit as interval_fahrenheit, kelvin};
use uom::si::thermodynamic_temperature as point;
use uom::si::time::{hour, minute, second};
use uom::si::volume::liter;
use uom::si::volume_rate::cubic_meter_per_hour;

/// A few roundings of a double.
fn same(ours: f64, theirs: f64, what: &str) {
    assert!((ours - theirs).abs() <= 1e-14 * theirs.abs(), "{what}: {ours} here, {theirs} there");
}

/// One line for each line of the table: its names, and the same product by the other library, in the product's unit.
macro_rules! witnesses {
    ($($a:ident * $b:ident = $c:ident: |$x:ident, $y:ident| $product:expr;)*) => {
        const WITNESSED: &[[&str; 3]] = &[$([stringify!($a), stringify!($b), stringify!($c)]),*];

        #[test]
        fn products_and_quotients_are_those_of_physics() {
            $({
                let ($x, $y) = (7.3_f64, 0.041_f64);
                let theirs: f64 = $product;
                let line = stringify!($a * $b = $c);
                let (a, b) = ($a::new($x), $b::new($y));
                let c: $c = a * b;
                same(c.get(), theirs, line);
                same((b * a).get(), theirs, line);
                same((c / a).get(), $y, line);
                same((c / b).get(), $x, line);
            })*
        }
    };
}

witnesses! {
    Volts * Amps = Watts: |x, y| {
        let p: Power = ElectricPotential::new::<volt>(x) * ElectricCurrent::new::<ampere>(y);
        p.get::<watt>()
    };
    Amps * Ohms = Volts: |x, y| {
        let v: ElectricPotential = ElectricCurrent::new::<ampere>(x) * ElectricalResistance::new::<ohm>(y);
        v.get::<volt>()
    };
    OhmsPerMetre * Metres = Ohms: |x, y| {
        let by_length = ElectricalResistance::new::<ohm>(x) / Length::new::<meter>(1.0);
        let r: ElectricalResistance = by_length * Length::new::<meter>(y);
        r.get::<ohm>()
    };
    VoltsPerKelvin * Kelvins = Volts: |x, y| {
        let coefficient = ElectricPotential::new::<volt>(x) / TemperatureInterval::new::<kelvin>(1.0);
        let v: ElectricPotential = coefficient * TemperatureInterval::new::<kelvin>(y);
        v.get::<volt>()
    };
    AmpsPerKelvin * Kelvins = Amps: |x, y| {
        let coefficient = ElectricCurrent::new::<ampere>(x) / TemperatureInterval::new::<kelvin>(1.0);
        let i: ElectricCurrent = coefficient * TemperatureInterval::new::<kelvin>(y);
        i.get::<ampere>()
    };
    PercentPerKelvin * Kelvins = Percent: |x, y| {
        let coefficient = Ratio::new::<percent>(x) / TemperatureInterval::new::<kelvin>(1.0);
        let part: Ratio = coefficient * TemperatureInterval::new::<kelvin>(y);
        part.get::<percent>()
    };
    Amps * Hours = AmpHours: |x, y| {
        let q: ElectricCharge = ElectricCurrent::new::<ampere>(x) * Time::new::<hour>(y);
        q.get::<ampere_hour>()
    };
    Watts * Hours = WattHours: |x, y| {
        let e: Energy = Power::new::<watt>(x) * Time::new::<hour>(y);
        e.get::<watt_hour>()
    };
    Volts * AmpHours = WattHours: |x, y| {
        let e: Energy = ElectricPotential::new::<volt>(x) * ElectricCharge::new::<ampere_hour>(y);
        e.get::<watt_hour>()
    };
}

#[test]
fn every_line_of_the_relation_table_has_a_witness() {
    for line in RELATIONS {
        assert!(WITNESSED.contains(line), "{line:?} stands in the table and is not witnessed here");
    }
    assert_eq!(RELATIONS.len(), WITNESSED.len());
}

#[test]
fn apparent_power_is_the_product_of_volts_and_amps() {
    let theirs: Power = ElectricPotential::new::<volt>(120.0) * ElectricCurrent::new::<ampere>(25.5);
    assert_eq!(Volts::new(120.0).times_alternating(Amps::new(25.5)), VoltAmps::new(theirs.get::<watt>()));
}

/// So many of `unit`, in its base, by the other library; but for the wire gauge, which it does not have.
fn by_the_other_library(unit: Unit, n: f64) -> f64 {
    let per_kelvin = |number: f64| number / TemperatureInterval::new::<kelvin>(1.0).get::<kelvin>();
    let potential = |v: ElectricPotential| v.get::<volt>();
    let current = |i: ElectricCurrent| i.get::<ampere>();
    let by_length = |r: ElectricalResistance, l: Length| r.get::<ohm>() / l.get::<meter>();
    let celsius = |t: ThermodynamicTemperature| t.get::<point::degree_celsius>();
    match unit {
        Unit::Volt => potential(ElectricPotential::new::<volt>(n)),
        Unit::Millivolt => potential(ElectricPotential::new::<millivolt>(n)),
        Unit::Amp => current(ElectricCurrent::new::<ampere>(n)),
        Unit::Milliamp => current(ElectricCurrent::new::<milliampere>(n)),
        Unit::Kiloamp => current(ElectricCurrent::new::<kiloampere>(n)),
        // The other library has no volt-ampere of its own: to it, it is a watt.
        Unit::Watt | Unit::VoltAmp => Power::new::<watt>(n).get::<watt>(),
        Unit::Kilowatt | Unit::KilovoltAmp => Power::new::<kilowatt>(n).get::<watt>(),
        Unit::Horsepower => Power::new::<horsepower>(n).get::<watt>(),
        Unit::AmpHour => ElectricCharge::new::<ampere_hour>(n).get::<ampere_hour>(),
        Unit::WattHour => Energy::new::<watt_hour>(n).get::<watt_hour>(),
        Unit::KilowattHour => Energy::new::<kilowatt_hour>(n).get::<watt_hour>(),
        Unit::Hour => Time::new::<hour>(n).get::<hour>(),
        Unit::Minute => Time::new::<minute>(n).get::<hour>(),
        Unit::Second => Time::new::<second>(n).get::<hour>(),
        Unit::Ohm => ElectricalResistance::new::<ohm>(n).get::<ohm>(),
        Unit::Milliohm => ElectricalResistance::new::<milliohm>(n).get::<ohm>(),
        Unit::OhmPerMetre => by_length(ElectricalResistance::new::<ohm>(n), Length::new::<meter>(1.0)),
        Unit::OhmPerKilometre => by_length(ElectricalResistance::new::<ohm>(n), Length::new::<kilometer>(1.0)),
        Unit::OhmPerThousandFeet => by_length(ElectricalResistance::new::<ohm>(n), Length::new::<foot>(1000.0)),
        Unit::Metre => Length::new::<meter>(n).get::<meter>(),
        Unit::Centimetre => Length::new::<centimeter>(n).get::<meter>(),
        Unit::Millimetre => Length::new::<millimeter>(n).get::<meter>(),
        Unit::Foot => Length::new::<foot>(n).get::<meter>(),
        Unit::Inch => Length::new::<inch>(n).get::<meter>(),
        Unit::SquareMillimetre => Area::new::<square_millimeter>(n).get::<square_millimeter>(),
        // See `wire_gauges_are_those_of_the_printed_table`.
        Unit::Awg => awg_area(n),
        Unit::Kcmil => Area::new::<circular_mil>(n * 1000.0).get::<square_millimeter>(),
        Unit::DegreeCelsius => celsius(ThermodynamicTemperature::new::<point::degree_celsius>(n)),
        Unit::DegreeFahrenheit => celsius(ThermodynamicTemperature::new::<point::degree_fahrenheit>(n)),
        Unit::KelvinAbsolute => celsius(ThermodynamicTemperature::new::<point::kelvin>(n)),
        Unit::Kelvin => TemperatureInterval::new::<kelvin>(n).get::<kelvin>(),
        Unit::FahrenheitDifference => TemperatureInterval::new::<interval_fahrenheit>(n).get::<kelvin>(),
        Unit::PercentPerKelvin | Unit::CurrentPercentPerKelvin | Unit::RelativePercentPerKelvin => {
            per_kelvin(Ratio::new::<percent>(n).get::<percent>())
        }
        Unit::MillivoltPerKelvin => per_kelvin(potential(ElectricPotential::new::<millivolt>(n))),
        Unit::VoltPerKelvin => per_kelvin(potential(ElectricPotential::new::<volt>(n))),
        Unit::MilliampPerKelvin => per_kelvin(current(ElectricCurrent::new::<milliampere>(n))),
        Unit::AmpPerKelvin => per_kelvin(current(ElectricCurrent::new::<ampere>(n))),
        Unit::Percent => Ratio::new::<percent>(n).get::<percent>(),
        Unit::WattPerSquareMetre => (Power::new::<watt>(n) / Area::new::<square_meter>(1.0)).value,
        Unit::Litre => Volume::new::<liter>(n).get::<liter>(),
        Unit::CubicMetrePerHour => VolumeRate::new::<cubic_meter_per_hour>(n).get::<cubic_meter_per_hour>(),
        Unit::SquareCentimetre => Area::new::<square_centimeter>(n).get::<square_centimeter>(),
        Unit::SquareInch => Area::new::<square_inch>(n).get::<square_centimeter>(),
        Unit::MilliampPerAmpHour => {
            // A current by a charge is one over a time.
            let by_charge = ElectricCurrent::new::<milliampere>(n) / ElectricCharge::new::<ampere_hour>(1.0);
            (by_charge * ElectricCharge::new::<ampere_hour>(1.0)).get::<milliampere>()
        }
        Unit::One => Ratio::new::<ratio>(n).get::<ratio>(),
    }
}

#[test]
fn every_unit_has_the_size_that_the_other_library_gives_it() {
    for unit in Unit::ALL {
        for number in [7.0, 250.0, 1234.5] {
            let (ours, theirs) = (unit.to_base(number), by_the_other_library(*unit, number));
            // The other library has horsepower and the circular mil to seven figures only; and it adds and takes away
            // 273.15, which leaves some of the last bits.
            let tolerance = match unit {
                Unit::Horsepower | Unit::Kcmil => 1e-7 * theirs.abs(),
                Unit::DegreeCelsius | Unit::DegreeFahrenheit | Unit::KelvinAbsolute => 1e-12 * (theirs.abs() + 273.15),
                _ => 1e-14 * theirs.abs(),
            };
            assert!((ours - theirs).abs() <= tolerance, "{number} {unit:?}: {ours} here, {theirs} there");
        }
    }
}

#[test]
fn exact_units_are_exact() {
    // One mechanical horsepower is 550 foot-pounds a second: 0.3048 m, 0.45359237 kg, 9.80665 m/s².
    same(Unit::Horsepower.to_base(1.0), 550.0 * 0.3048 * 0.453_592_37 * 9.806_65, "hp");
    same(Unit::Kcmil.to_base(1.0), core::f64::consts::FRAC_PI_4 * 0.0254 * 0.0254 * 1000.0, "kcmil");
    assert_eq!(Unit::DegreeFahrenheit.to_base(-40.0), -40.0);
    assert_eq!(Unit::Second.to_base(5400.0), 1.5);
}

/// Source: ASTM B258, table of diameters, in mils as printed; from memory.
#[test]
fn wire_gauges_are_those_of_the_printed_table() {
    let printed = [(-3.0, 460.0), (-1.0, 364.8), (0.0, 324.9), (4.0, 204.3), (10.0, 101.9), (14.0, 64.1), (18.0, 40.3)];
    for (gauge, mils) in printed {
        let diameter = (awg_area(gauge) / core::f64::consts::FRAC_PI_4).sqrt() / 0.0254;
        // The table prints one place behind the point.
        assert!((diameter - mils).abs() <= 0.051, "gauge {gauge}: {diameter} mil here, {mils} printed");
    }
}

#[test]
fn units_convert_where_their_bases_are_one_and_nowhere_else() {
    for one in Unit::ALL {
        assert_eq!(one.base().base(), one.base());
        assert_eq!(one.base().to_base(7.5), 7.5, "{one:?}");
        for other in Unit::ALL {
            assert_eq!(one.convert(2.0, *other).is_some(), one.base() == other.base(), "{one:?} to {other:?}");
            if one.base() == other.base() {
                let back = one.convert(2.0, *other).and_then(|number| other.convert(number, *one)).unwrap_or(f64::NAN);
                assert!((back - 2.0).abs() < 1e-11, "{one:?} to {other:?} and back: {back}");
            }
        }
    }
}

#[test]
fn seconds_and_hours_are_not_taken_for_one_another() {
    let read = |text| engine::typed::read(text, Unit::Second).unwrap();
    assert_eq!(read("90").quantity(), Some(Seconds::new(90.0)));
    assert_eq!(read("0.7").quantity(), Some(Seconds::new(0.7)));
    assert_eq!(read("2 min").quantity(), Some(Seconds::new(120.0)));
    assert_eq!(read("2 h").quantity(), Some(Hours::new(2.0)));
    assert_eq!(read("90 min").quantity(), Some(Hours::new(1.5)));
    assert_eq!(read("2 h").quantity::<Volts>(), None);
    assert_eq!(Seconds::UNIT, Unit::Second);
}
