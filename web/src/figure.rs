//! Figures as people read them: four digits that count, a true minus, thin spaces between thousands.

use engine::quantity::Amount;
use engine::unit::Unit;

/// A number of four significant digits; whole from a thousand up. A zero that says nothing is left off.
///
/// Thousands stand apart by a thin space, as a comma would be read as a decimal mark where it is one.
pub fn figure(number: f64) -> String {
    if !number.is_finite() {
        return "—".to_owned();
    }
    let size = number.abs();
    // Rounded first: 999.96 has four digits as 1000.
    let decimals = if size == 0.0 { 0 } else { (3 - size.log10().floor() as i32).clamp(0, 6) as usize };
    let mut text = format!("{size:.decimals$}");
    if text.contains('.') {
        text.truncate(text.trim_end_matches('0').trim_end_matches('.').len());
    }
    let whole = text.find('.').unwrap_or(text.len());
    if whole > 3 {
        for at in (1..whole).rev().filter(|at| (whole - at).is_multiple_of(3)) {
            text.insert(at, '\u{202f}');
        }
    }
    if number < 0.0 && text != "0" { format!("−{text}") } else { text }
}

/// A number with its unit.
pub fn amount(Amount { number, unit }: Amount) -> String {
    with_unit(&figure(number), unit)
}

/// A written number with its unit, which no line break parts.
pub fn with_unit(figure: &str, unit: Unit) -> String {
    if unit.symbol().is_empty() { figure.to_owned() } else { format!("{figure}\u{a0}{}", unit.symbol()) }
}

#[cfg(test)]
mod tests {
    use super::figure;

    #[test]
    fn four_digits_that_count() {
        for (number, text) in [
            (170.262, "170.3"),
            (56.754, "56.75"),
            (150.0, "150"),
            (0.0027, "0.0027"),
            (0.5, "0.5"),
            (-31.0, "−31"),
            (-13.508, "−13.51"),
            (999.96, "1000"),
            (5800.0, "5\u{202f}800"),
            (11_300.4, "11\u{202f}300"),
            (1_234_567.0, "1\u{202f}234\u{202f}567"),
            (0.0, "0"),
            (-0.0, "0"),
            (-0.000_000_01, "0"),
            (f64::NAN, "—"),
        ] {
            assert_eq!(figure(number), text, "{number}");
        }
    }
}
