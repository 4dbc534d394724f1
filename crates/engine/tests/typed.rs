//! What people type, as rows: typed, the field's usual unit, and what it is read as or why it is refused.

use arbtest::arbitrary::{Result as Drawn, Unstructured};
use arbtest::arbtest;
use engine::field::{Field, Takes};
use engine::quantity::Amount;
use engine::show;
use engine::typed::{self, Reading, Refusal};
use engine::unit::Unit::{self, *};

/// A reading as printed, or the refusal's words; true minus and narrow space as plain ones.
fn answer(typed: &str, usual: Unit) -> String {
    plain(&typed::read(typed, usual).map_or_else(|refusal| refusal.to_string(), typed::print))
}

fn plain(words: &str) -> String {
    words.replace(show::MINUS, "-").replace(show::NARROW, " ")
}

fn check(rows: &[(&str, Unit, &str)]) {
    for (typed, usual, expected) in rows {
        assert_eq!(answer(typed, *usual), *expected, "for {typed:?} where {usual:?} is usual");
    }
}

#[test]
fn decimal_marks_and_groups() {
    check(&[
        ("3", Volt, "3 V"),
        ("3.5", Volt, "3.5 V"),
        ("3,5", Volt, "3.5 V"),
        ("49,3", Volt, "49.3 V"),
        (" 49.3 ", Volt, "49.3 V"),
        (",5", Volt, "0.5 V"),
        (".5", Volt, "0.5 V"),
        ("0,123", Volt, "0.123 V"),
        ("1.234", Volt, "1.234 V"),
        ("1,234", Volt, "1.234 or 1234?"),
        ("12,345 W", Watt, "12.345 or 12345?"),
        ("-1,234", Volt, "-1.234 or -1234?"),
        ("1234,567", Volt, "1234.567 V"),
        ("1,2345", Volt, "1.2345 V"),
        ("1,234.5", Watt, "1234.5 W"),
        ("1.234,5", Watt, "1234.5 W"),
        ("1,234,567", Watt, "1234567 W"),
        ("1.234.567", Watt, "1234567 W"),
        ("1,234,567.89", Watt, "1234567.89 W"),
        ("12 000", Watt, "12000 W"),
        ("12\u{202F}000", Watt, "12000 W"),
        ("12\u{2009}000,5", Watt, "12000.5 W"),
        ("12\u{A0}000", Watt, "12000 W"),
        ("12'000", Watt, "12000 W"),
        ("12’000", Watt, "12000 W"),
        ("1 234 567", Watt, "1234567 W"),
        ("1 234,567", Watt, "1234.567 W"),
        ("12,,4", Volt, "not understood: 12.4 or 12,4"),
        ("12.,4", Volt, "not understood: 12.4 or 12,4"),
        ("1.2.3", Volt, "“1.2.3” is not understood: as in 1234.5 or 1234,5"),
        ("1,23.4", Volt, "“1,23.4” is not understood: as in 1234.5 or 1234,5"),
        ("1,2345,678", Volt, "“1,2345,678” is not understood: as in 1234.5 or 1234,5"),
        ("3, V", Volt, "“3, V” is not understood: as in 1234.5 or 1234,5"),
        ("12 34", Volt, "two numbers: which one?"),
        ("1234 567", Volt, "two numbers: which one?"),
        ("1 234 56", Volt, "two numbers: which one?"),
        ("0 123", Volt, "two numbers: which one?"),
        ("12-14", Volt, "two numbers: which one?"),
        ("12 V – 14 V", Volt, "two numbers: which one?"),
        ("12 or 24", Volt, "two numbers: which one?"),
        ("12 V 24 V", Volt, "two numbers: which one?"),
    ]);
}

#[test]
fn signs_and_powers_of_ten() {
    check(&[
        ("-31", DegreeCelsius, "-31 °C"),
        ("−31", DegreeCelsius, "-31 °C"),
        ("–31", DegreeCelsius, "-31 °C"),
        ("- 31", DegreeCelsius, "-31 °C"),
        ("+31", DegreeCelsius, "31 °C"),
        ("-0,27", PercentPerKelvin, "-0.27 %/K"),
        ("1e3", Watt, "1000 W"),
        ("1.2E-3 V", Volt, "0.0012 V"),
        ("1,2e−3V", Volt, "0.0012 V"),
        ("1e400", Watt, "too large a number"),
        ("9e307 kW", Watt, "too large a number"),
        ("--3", Volt, "“--3” is not a number, as 12.4 is"),
        ("±3", Volt, "“±3” is not a number, as 12.4 is"),
        ("abc", Volt, "“abc” is not a number, as 12.4 is"),
        ("V", Volt, "“V” is not a number, as 12.4 is"),
        ("NaN", Volt, "“NaN” is not a number, as 12.4 is"),
        ("inf", Volt, "“inf” is not a number, as 12.4 is"),
        ("0x10", Volt, "unit “x10” is not known here: V or mV"),
        ("11111111112222222222333333333344444444445", Volt, "too long: 40 characters at most, as in 12.4"),
    ]);
}

#[test]
fn half_typed() {
    for (typed, usual) in [
        ("", Volt),
        ("-", Volt),
        ("−", Volt),
        ("+", Volt),
        ("- ", Volt),
        ("3,", Volt),
        ("3.", Volt),
        ("-3,", Volt),
        ("1,234,", Volt),
        ("1e", Volt),
        ("1e-", Volt),
        ("2/", SquareMillimetre),
        ("1/", Inch),
        ("3 1/", Inch),
        ("#", Awg),
        ("AWG", Awg),
        ("AWG ", SquareMillimetre),
    ] {
        assert_eq!(typed::read(typed, usual), Err(Refusal::Unfinished), "for {typed:?}");
    }
}

#[test]
fn units_of_each_dimension() {
    check(&[
        ("450 mV", Volt, "450 mV"),
        ("450mV", Volt, "450 mV"),
        ("450 MV", Volt, "unit “MV” is not known here: V or mV"),
        ("450 mv", Volt, "450 mV"),
        ("12 v", Volt, "12 V"),
        ("12VDC", Volt, "12 V"),
        ("12 V dc", Volt, "12 V"),
        ("12 volts", Volt, "12 V"),
        ("12 kV", Volt, "unit “kV” is not known here: V or mV"),
        ("12", Millivolt, "12 mV"),
        ("12 V", Millivolt, "12 V"),
        ("10 a", Amp, "10 A"),
        ("10 kA", Amp, "10 kA"),
        ("10 KA", Amp, "10 kA"),
        ("10 MA", Amp, "unit “MA” is not known here: A, mA or kA"),
        ("350 wp", Watt, "350 W"),
        ("3 KW", Watt, "3 kW"),
        ("1/2 hp", Watt, "0.5 hp"),
        ("3 kva", VoltAmp, "3 kVA"),
        ("200 AH", AmpHour, "200 Ah"),
        ("200 A·h", AmpHour, "200 Ah"),
        ("200 amp-hours", AmpHour, "200 Ah"),
        ("1,5 kwh", WattHour, "1.5 kWh"),
        ("90 min", Hour, "90 min"),
        ("30 sec.", Hour, "30 s"),
        ("1/2 h", Hour, "0.5 h"),
        ("0.5 Ω", Ohm, "0.5 Ω"),
        ("0.5 \u{2126}", Ohm, "0.5 Ω"),
        ("5 m\u{2126}", Ohm, "5 mΩ"),
        ("5 mohm", Ohm, "5 mΩ"),
        ("5 MΩ", Ohm, "unit “MΩ” is not known here: Ω or mΩ"),
        ("5 Mohm", Ohm, "unit “Mohm” is not known here: Ω or mΩ"),
        ("5 Milliohm", Ohm, "5 mΩ"),
        ("5 OHM", Ohm, "5 Ω"),
        ("1.83 ohm/km", OhmPerMetre, "1.83 Ω/km"),
        ("0.3 Ω per km", OhmPerMetre, "0.3 Ω/km"),
        ("0.491 ohm/1000 ft", OhmPerMetre, "0.491 Ω/kft"),
        ("12 m", Metre, "12 m"),
        ("12 M", Metre, "12 m"),
        ("40ft", Metre, "40 ft"),
        ("40 feet", Metre, "40 ft"),
        ("40'", Metre, "40 ft"),
        ("6\"", Metre, "6 in"),
        ("6 in.", Metre, "6 in"),
        ("600 mm", Metre, "600 mm"),
        ("35 mm2", Awg, "35 mm²"),
        ("35mm²", SquareMillimetre, "35 mm²"),
        ("35 mm^2", SquareMillimetre, "35 mm²"),
        ("35 sq mm", SquareMillimetre, "35 mm²"),
        ("35 MM2", SquareMillimetre, "35 mm²"),
        ("250 kcmil", SquareMillimetre, "250 kcmil"),
        ("250 MCM", SquareMillimetre, "250 kcmil"),
        ("-31 °C", DegreeCelsius, "-31 °C"),
        ("-31 ºC", DegreeCelsius, "-31 °C"),
        ("-31c", DegreeCelsius, "-31 °C"),
        ("-31 deg C", DegreeCelsius, "-31 °C"),
        ("-31 ℃", DegreeCelsius, "-31 °C"),
        ("-24 F", DegreeCelsius, "-24 °F"),
        ("-24 degrees F", DegreeCelsius, "-24 °F"),
        ("-24 Fahrenheit", DegreeCelsius, "-24 °F"),
        ("-24°", DegreeFahrenheit, "-24 °F"),
        ("-24°", DegreeCelsius, "-24 °C"),
        ("24°", KelvinAbsolute, "unit “°” is not known here: °C, °F or K"),
        ("242 K", DegreeCelsius, "242 K"),
        ("242 \u{212A}", DegreeCelsius, "242 K"),
        ("242 k", DegreeCelsius, "unit “k” is not known here: °C, °F or K"),
        ("30 °C", Kelvin, "30 K"),
        ("30 F", Kelvin, "30 °F"),
        ("-0.27 %/K", PercentPerKelvin, "-0.27 %/K"),
        ("-0.27%/°C", PercentPerKelvin, "-0.27 %/K"),
        ("-0.27 % / C", PercentPerKelvin, "-0.27 %/K"),
        ("-0.27 %/deg C", PercentPerKelvin, "-0.27 %/K"),
        ("-0.27 % per K", PercentPerKelvin, "-0.27 %/K"),
        ("-0.27%", PercentPerKelvin, "-0.27 %/K"),
        ("-118 mV/K", PercentPerKelvin, "-118 mV/K"),
        ("-118 mv/°c", PercentPerKelvin, "-118 mV/K"),
        ("-118 MV/K", PercentPerKelvin, "unit “MV/K” is not known here: %/K, mV/K or V/K"),
        ("-0,118 V/K", PercentPerKelvin, "-0.118 V/K"),
        ("5 mA/K", CurrentPercentPerKelvin, "5 mA/K"),
        ("0.05%/°C", CurrentPercentPerKelvin, "0.05 %/K"),
        ("-0.35 %/°C", RelativePercentPerKelvin, "-0.35 %/K"),
        ("3 percent", Percent, "3 %"),
        ("800 w/m2", WattPerSquareMetre, "800 W/m²"),
        ("4 x", One, "4"),
    ]);
}

#[test]
fn units_of_another_dimension_are_named() {
    check(&[
        ("12 A", Volt, "12 A is a current; this wants volts"),
        ("12 m", Volt, "12 m is a length; this wants volts"),
        ("3000 W", VoltAmp, "3000 W is a power; this wants volt-amps (VA)"),
        ("12 kWh", AmpHour, "12 kWh is an energy; this wants amp-hours"),
        ("2/0", Volt, "2/0 AWG is a wire size; this wants volts"),
        ("-31 °C", Volt, "-31 °C is a temperature; this wants volts"),
        ("3 V", One, "3 V is a voltage; this wants a number alone"),
        ("3 apples", One, "“apples” is too much: a number alone, as in 3"),
        ("-118 mV", PercentPerKelvin, "-118 mV is a voltage; this wants %/K, mV/K or V/K"),
        ("5 mA/K", PercentPerKelvin, "5 mA/K is a change with temperature; this wants %/K, mV/K or V/K"),
    ]);
}

#[test]
fn fractions_feet_and_inches() {
    const FEET: &str = "not understood: whole feet and less than 12 inches, as in 5' 6\"";
    check(&[
        ("1/2", Inch, "0.5 in"),
        ("1/2\"", Metre, "0.5 in"),
        ("3 1/2 in", Metre, "3.5 in"),
        ("3½ in", Metre, "3.5 in"),
        ("¾ in", Metre, "0.75 in"),
        ("1 ½ hp", Watt, "1.5 hp"),
        ("-1/4 in", Metre, "-0.25 in"),
        ("5' 6\"", Metre, "5.5 ft"),
        ("5'6", Metre, "5.5 ft"),
        ("5’ 6”", Metre, "5.5 ft"),
        ("5′ 6″", Metre, "5.5 ft"),
        ("5' 6''", Metre, "5.5 ft"),
        ("5 ft 6 in", Metre, "5.5 ft"),
        ("5ft 6", Metre, "5.5 ft"),
        ("5ft6in", Metre, "5.5 ft"),
        ("5 ft2", Metre, "unit “ft2” is not known here: m, cm, mm, ft or in"),
        ("-5' 6\"", Metre, "-5.5 ft"),
        ("5' 4 1/2\"", Metre, "5.375 ft"),
        ("5' 6\"", Volt, "5.5 ft is a length; this wants volts"),
        ("5' 12\"", Metre, FEET),
        ("5'600\"", Metre, FEET),
        ("5' 6 m", Metre, FEET),
        ("5.5' 6\"", Metre, FEET),
        ("1/2 V", Volt, "no fractions here: 0.5 V"),
        ("1/2", Awg, "no such gauge: 40 to 1, then 1/0 to 4/0 AWG, then kcmil"),
        ("1/2/3", Inch, "unit “/3” is not known here: m, cm, mm, ft or in"),
    ]);
}

#[test]
fn wire_gauges() {
    const NONE: &str = "no such gauge: 40 to 1, then 1/0 to 4/0 AWG, then kcmil";
    check(&[
        ("14 AWG", SquareMillimetre, "14 AWG"),
        ("14awg", SquareMillimetre, "14 AWG"),
        ("AWG 14", SquareMillimetre, "14 AWG"),
        ("awg14", SquareMillimetre, "14 AWG"),
        ("#14", SquareMillimetre, "14 AWG"),
        ("# 14 AWG", SquareMillimetre, "14 AWG"),
        ("14 ga", SquareMillimetre, "14 AWG"),
        ("14 gauge", SquareMillimetre, "14 AWG"),
        ("14", Awg, "14 AWG"),
        ("14", SquareMillimetre, "14 mm²"),
        ("2/0", SquareMillimetre, "2/0 AWG"),
        ("2/0 AWG", SquareMillimetre, "2/0 AWG"),
        ("AWG 2/0", SquareMillimetre, "2/0 AWG"),
        ("#4/0", SquareMillimetre, "4/0 AWG"),
        ("1/0", Kcmil, "1/0 AWG"),
        ("0 AWG", SquareMillimetre, "1/0 AWG"),
        ("00 AWG", SquareMillimetre, "2/0 AWG"),
        ("0000", Awg, "4/0 AWG"),
        ("0", Awg, "1/0 AWG"),
        ("00", SquareMillimetre, "0 mm²"),
        ("5/0", SquareMillimetre, NONE),
        ("0/0", SquareMillimetre, NONE),
        ("-1 AWG", SquareMillimetre, NONE),
        ("-1", Awg, NONE),
        ("12.5 AWG", SquareMillimetre, NONE),
        ("250", Awg, NONE),
        ("250 AWG", Awg, NONE),
        ("AWG 14 mm2", Awg, NONE),
    ]);
    assert_eq!(typed::read("2/0", Awg).map(Reading::number), Ok(-1.0));
}

#[test]
fn sizes_that_are_not_sold() {
    let rows = [
        ("13 AWG", "13 AWG: did you mean 12 or 14 AWG?"),
        ("5 AWG", "5 AWG: did you mean 4 or 6 AWG?"),
        ("20 AWG", "20 AWG: did you mean 18 AWG?"),
        ("3 AWG", "3 AWG"),
        ("4/0", "4/0 AWG"),
        ("15 mm²", "15 mm²: did you mean 16 mm²?"),
        ("3 mm²", "3 mm²: did you mean 2.5 mm²?"),
        ("0 mm²", "0 mm²: did you mean 0.5 mm²?"),
        ("2000 mm²", "2000 mm²: did you mean 1000 mm²?"),
        ("35 mm²", "35 mm²"),
        ("260 kcmil", "260 kcmil: did you mean 250 kcmil?"),
        ("500 kcmil", "500 kcmil"),
    ];
    for (typed, expected) in rows {
        let reading = typed::read(typed, SquareMillimetre).unwrap();
        let words = typed::trade_size(reading).map_or_else(|refusal| refusal.to_string(), typed::print);
        assert_eq!(plain(&words), expected);
    }
}

#[test]
fn nothing_lies_below_absolute_zero() {
    check(&[
        ("-400 C", DegreeCelsius, "-400 °C is below absolute zero"),
        ("-273.15", DegreeCelsius, "-273.15 °C"),
        ("-273.16", DegreeCelsius, "-273.16 °C is below absolute zero"),
        ("-459.67 F", DegreeCelsius, "-459.67 °F"),
        ("-460 F", DegreeCelsius, "-460 °F is below absolute zero"),
        ("0 K", DegreeCelsius, "0 K"),
        ("-1 K", DegreeCelsius, "-1 K is below absolute zero"),
        ("-1 K", Kelvin, "-1 K"),
    ]);
}

#[test]
fn ranges_are_worded_in_the_unit_typed() {
    let rows = [
        (Field::Voc, "600", "600 V is out of range: 0.1 to 500 V"),
        (Field::Voc, "600000 mV", "600 000 mV is out of range: 100 to 500 000 mV"),
        (Field::RecordLow, "-95", "-95 °C is out of range: -90 to 40 °C"),
        (Field::RecordLow, "-140 F", "-140 °F is out of range: -130 to 104 °F"),
        (Field::RecordLow, "100 K", "100 K is out of range: 184 to 313 K"),
        (Field::VocCoefficient, "-27", "-27 %/K is out of range: -2 to 2 %/K"),
        (Field::VocCoefficient, "-27 V/K", "-27 V/K is out of range: -10 to 10 V/K"),
        (Field::Series, "0", "0 is out of range: 1 to 100"),
        (Field::Series, "2,5", "2.5 is not a whole number"),
        (Field::Series, "3 V", "3 V is a voltage; this wants a number alone"),
    ];
    for (field, typed, expected) in rows {
        assert_eq!(plain(&field.read(typed, None).unwrap_err().to_string()), expected);
    }
    let thick = typed::read("4/0", Awg).unwrap().within(0.5, 50.0, Awg).unwrap_err();
    assert_eq!(plain(&thick.to_string()), "4/0 AWG is out of range: 0.5 to 50 mm²");
    let long = typed::read("400 ft", Metre).unwrap().within(0.1, 100.0, Metre).unwrap_err();
    assert_eq!(plain(&long.to_string()), "400 ft is out of range: 0.329 to 328 ft");
}

#[test]
fn what_a_range_says_is_allowed() {
    for field in Field::ALL {
        for unit in field.units() {
            for far in ["1e9", "-1e9"] {
                let words = match field.read(far, Some(unit)) {
                    Err(Refusal::BelowAbsoluteZero { .. } | Refusal::NotAGauge) => continue,
                    Err(refusal @ Refusal::OutOfRange { .. }) => refusal.to_string(),
                    other => panic!("{field:?} took {far} {unit:?}: {other:?}"),
                };
                let (_, ends) = words.split_once("range: ").unwrap();
                let (least, most) = ends.split_once(" to ").unwrap();
                for end in [least, most] {
                    assert!(field.read(end, Some(unit)).is_ok(), "{field:?} refuses its own end {end} {unit:?}");
                }
            }
        }
    }
}

#[test]
fn a_choice_takes_no_number() {
    assert!(Field::CodeFamily.read("3", None).is_err());
    assert_eq!(Field::CodeFamily.read("  ", None), Ok(None));
}

/// Pieces that texts of the kind people type are made of.
#[rustfmt::skip]
const PIECES: &[&str] = &[
    "0", "1", "12", "234", "9", ".", ",", ",,", " ", "\u{202F}", "\u{A0}", "'", "’", "\"", "''", "-", "−", "–", "+",
    "e", "E", "/", "/0", "½", "#", "AWG", "awg", "ga", "m", "M", "mm", "²", "2", "^", "V", "A", "h", "Ω", "\u{2126}",
    "ohm", "°", "º", "C", "F", "K", "%", "k", "ft", "in", "per", " per ", "deg", "x", "ß", "İ", "\u{FEFF}", "😀",
    "10000000000000000000",
];

#[test]
fn no_text_brings_any_field_down() {
    arbtest(|u| {
        let text = if u.arbitrary()? {
            u.arbitrary::<String>()?
        } else {
            let count = u.int_in_range(0..=9)?;
            (0..count).map(|_| u.choose(PIECES).copied()).collect::<Drawn<String>>()?
        };
        let unit = *u.choose(Unit::ALL)?;
        for field in Field::ALL {
            for chosen in [None, Some(unit)] {
                match field.read(&text, chosen) {
                    Ok(Some(reading)) => assert!(reading.base().is_finite()),
                    Ok(None) => assert!(text.trim().is_empty()),
                    Err(refusal) => assert!(!refusal.to_string().is_empty()),
                }
            }
        }
        match typed::read(&text, unit) {
            Ok(reading) => {
                assert_eq!(reading.unit().dimension(), unit.dimension());
                assert_eq!(typed::read(&typed::print(reading), unit), Ok(reading), "typed {text:?}");
                assert!(typed::trade_size(reading).map_err(|refusal| refusal.to_string()) != Err(String::new()));
            }
            Err(refusal) => assert!(!refusal.to_string().is_empty()),
        }
        Ok(())
    })
    .budget_ms(1_500);
}

/// A number of any size, or one of the size that fields hold.
fn any_number(u: &mut Unstructured<'_>, unit: Unit) -> Drawn<f64> {
    Ok(match (unit, u.arbitrary::<u8>()? % 3) {
        (Awg, _) => f64::from(u.int_in_range(-3..=40)?),
        (_, 0) => u.arbitrary::<f64>()?,
        (_, 1) => f64::from(u.int_in_range(-1_000_000..=1_000_000)?) / 1000.0,
        _ => f64::from(u.int_in_range(-1_000_000..=1_000_000)?) / 7.0,
    })
}

#[test]
fn what_is_printed_reads_back_the_same() {
    arbtest(|u| {
        let unit = *u.choose(Unit::ALL)?;
        let Ok(reading) = Reading::new(any_number(u, unit)?, unit) else { return Ok(()) };
        for usual in Unit::ALL.iter().filter(|other| other.dimension() == unit.dimension()) {
            let printed = typed::print(reading);
            assert_eq!(typed::read(&printed, *usual), Ok(reading), "printed {printed:?} where {usual:?} is usual");
        }
        Ok(())
    })
    .budget_ms(1_000);
}

#[test]
fn the_ends_of_every_range_are_printed_and_read_back_the_same() {
    for field in Field::ALL {
        let Takes::Number { unit: usual, least, most } = field.takes() else { continue };
        for unit in field.units().into_iter().filter(|unit| *unit != Awg) {
            for number in [least, most].map(|end| unit.from_base(end)) {
                let reading = Reading::new(number, unit).unwrap();
                assert_eq!(typed::read(&typed::print(reading), usual), Ok(reading));
            }
        }
    }
}

#[test]
fn what_is_shown_as_given_reads_back_to_twelve_digits() {
    arbtest(|u| {
        let unit = *u.choose(Unit::ALL)?;
        let number = any_number(u, unit)?;
        if !(1e-6..1e12).contains(&number.abs()) || Reading::new(number, unit).is_err() {
            return Ok(());
        }
        let shown = show::given(Amount { number, unit });
        let read = typed::read(&shown, unit).map(Reading::number).unwrap_or(f64::NAN);
        assert!((read - number).abs() <= 1e-11 * number.abs(), "{shown:?} for {number:?}");
        Ok(())
    })
    .budget_ms(500);
}

#[test]
fn a_value_and_its_limit_are_shown_in_their_order() {
    arbtest(|u| {
        let unit = *u.choose(Unit::ALL)?;
        let limit = f64::from(u.int_in_range(1..=1_000_000)?) / 1000.0;
        let away = 10f64.powi(-u.int_in_range(0..=10)?) * if u.arbitrary()? { 1.0 } else { -1.0 };
        let value = limit * (1.0 + away);
        if unit == Awg || (value - limit).abs() <= 1e-11 * limit {
            return Ok(());
        }
        let (shown, beside) = show::apart(Amount { number: value, unit }, Amount { number: limit, unit });
        let [shown_value, shown_limit] = [&shown, &beside].map(|text| typed::read(text, unit).unwrap().number());
        assert_eq!(shown_value > shown_limit, value > limit, "{shown} beside {beside}");
        assert_eq!(shown_value < shown_limit, value < limit, "{shown} beside {beside}");
        Ok(())
    })
    .budget_ms(500);
}

#[test]
fn a_base_turns_back_into_what_was_typed() {
    arbtest(|u| {
        let unit = *u.choose(Unit::ALL)?;
        let Ok(reading) = Reading::new(any_number(u, unit)?, unit) else { return Ok(()) };
        let number = reading.number();
        if number != 0.0 && !(1e-3..1e12).contains(&number.abs()) {
            return Ok(());
        }
        let back = unit.from_base(reading.base());
        // A scale with another zero loses what is small beside that; a gauge goes through a power and a logarithm.
        let tolerance = match unit {
            DegreeFahrenheit | KelvinAbsolute => 1e-15 * (number.abs() + 1000.0),
            Awg => 1e-12,
            _ => 1e-15 * number.abs(),
        };
        assert!((back - number).abs() <= tolerance, "{number:?} {unit:?}: {back:?}");
        Ok(())
    })
    .budget_ms(500);
}

#[test]
fn every_spelling_of_a_unit_is_read_with_and_without_a_space_and_in_small_letters() {
    for unit in Unit::ALL {
        for spelling in [unit.symbol()].iter().chain(unit.also_typed()) {
            let small = spelling.to_lowercase();
            // Case tells a kelvin from a thousand.
            let small = if small == "k" { spelling } else { small.as_str() };
            for text in
                [format!("2 {spelling}"), format!("2{spelling}"), format!("2 {small}"), format!("2\u{A0}{spelling} ")]
            {
                let read = typed::read(&text, *unit).unwrap_or_else(|refusal| panic!("{text:?}: {refusal}"));
                assert_eq!((read.number(), read.unit()), (2.0, *unit), "for {text:?}");
            }
        }
    }
}

#[test]
fn no_two_units_of_a_dimension_are_written_alike() {
    for (at, one) in Unit::ALL.iter().enumerate() {
        for other in Unit::ALL[at + 1..].iter().filter(|other| other.dimension() == one.dimension()) {
            assert_ne!(one.symbol().to_lowercase(), other.symbol().to_lowercase());
            assert!(one.also_typed().iter().all(|spelling| !other.also_typed().contains(spelling)));
        }
    }
}
