//! Reading decimals, against the standard library.

use arbtest::arbtest;
use engine::typed::nearest;

#[track_caller]
fn same(text: &str) {
    let wanted: f64 = text.parse().expect("a number");
    assert_eq!(nearest(text).map(f64::to_bits), Some(wanted.to_bits()), "{text}");
}

#[test]
fn known_hard_ones() {
    for text in [
        "0",
        "-0",
        "0.0",
        "1",
        "-31",
        "49.3",
        "0.1",
        "0.3",
        "170.26128",
        "1e22",
        "1e23",
        "8.5e22",
        "9007199254740993",
        "9007199254740992",
        "9007199254740991.5",
        "2.2250738585072014e-308",
        "2.2250738585072011e-308",
        "5e-324",
        "2.5e-324",
        "2.4703282292062327e-324",
        "1.7976931348623157e308",
        "1.7976931348623159e308",
        "1e309",
        "1e-400",
        "123456789012345678901234567890",
        "0.000000000000000000000000000000000000001",
        "4.35",
        "0.5",
        "1.5",
        "7205759403792793.5",
        "7205759403792794.5",
        "6.02e23",
        "36.6E1",
    ] {
        same(text);
    }
}

#[test]
fn what_is_no_number_is_none() {
    for text in ["", ".", "-", "1,5", "1e", "e5", "1e5.5", "1.2.3", "abc", "--1", "inf", "nan", "1e401"] {
        assert_eq!(nearest(text), None, "{text}");
    }
}

#[test]
fn every_double_comes_back_from_how_it_is_written() {
    arbtest(|u| {
        let number = f64::from_bits(u.arbitrary()?);
        if number.is_finite() {
            same(&number.to_string().chars().take(380).collect::<String>());
            same(&format!("{number:e}"));
            same(&format!("{number:.25e}"));
        }
        let plain = f64::from(u.arbitrary::<i32>()?) / 1000.0;
        same(&plain.to_string());
        Ok(())
    });
}

#[test]
fn any_digits_agree() {
    arbtest(|u| {
        let digits: String = (0..u.int_in_range(1..=40)?)
            .map(|_| u.int_in_range(b'0'..=b'9').map(char::from))
            .collect::<Result<_, _>>()?;
        let exponent = u.int_in_range(-340..=320)?;
        same(&format!("{digits}e{exponent}"));
        let at = u.int_in_range(0..=digits.len())?;
        same(&format!("{}.{}", &digits[..at], &digits[at..]));
        Ok(())
    });
}
