//! Sizes that conductors are sold in.

use super::{Reading, Refusal};
use crate::unit::Unit;

/// Gauges that building wire is sold in, 18 to 4/0: the sizes of the ampacity tables.
///
/// Source: [`crate::source::NEC`], table 310.16 and chapter 9, table 8. From memory, read back against practice.
const GAUGES: &[f64] = &[-3.0, -2.0, -1.0, 0.0, 1.0, 2.0, 3.0, 4.0, 6.0, 8.0, 10.0, 12.0, 14.0, 16.0, 18.0];

/// Sizes above 4/0 in thousand circular mils.
///
/// Source: [`crate::source::NEC`], table 310.16. From memory.
const KCMIL: &[f64] =
    &[250.0, 300.0, 350.0, 400.0, 500.0, 600.0, 700.0, 750.0, 800.0, 900.0, 1000.0, 1250.0, 1500.0, 1750.0, 2000.0];

/// Nominal cross-sections in mm².
///
/// Source: IEC 60228, edition 3 (2004), tables 1 to 3. From memory.
const SQUARE_MILLIMETRES: &[f64] = &[
    0.5, 0.75, 1.0, 1.5, 2.5, 4.0, 6.0, 10.0, 16.0, 25.0, 35.0, 50.0, 70.0, 95.0, 120.0, 150.0, 185.0, 240.0, 300.0,
    400.0, 500.0, 630.0, 800.0, 1000.0,
];

/// The same reading, where it is a size that conductors are sold in. Other units than those of conductors pass.
///
/// # Errors
///
/// [`Refusal::NotSold`] with the nearest size; with the next on either side where both are equally near.
///
/// # Example
///
/// ```
/// use engine::{typed, unit::Unit};
/// let odd = typed::read("15 mm2", Unit::SquareMillimetre).unwrap();
/// assert_eq!(typed::trade_size(odd).unwrap_err().to_string().replace('\u{202F}', " "), "15 mm²: did you mean 16 mm²?");
/// ```
pub fn trade_size(reading: Reading) -> Result<Reading, Refusal> {
    let (number, unit) = (reading.number(), reading.unit());
    let sizes = match unit {
        Unit::Awg => GAUGES,
        Unit::Kcmil => KCMIL,
        Unit::SquareMillimetre => SQUARE_MILLIMETRES,
        _ => return Ok(reading),
    };
    if sizes.contains(&number) {
        return Ok(reading);
    }
    let above = sizes.iter().position(|size| *size > number);
    let (below, above) = match above {
        Some(0) => (None, sizes.first()),
        Some(at) => (sizes.get(at - 1), sizes.get(at)),
        None => (sizes.last(), None),
    };
    let (below, above) = (below.copied(), above.copied());
    // Areas are set apart by a ratio, gauges by a difference.
    let nearest = match (below, above) {
        (Some(below), Some(above)) if unit != Unit::Awg && number > 0.0 => {
            let (down, up) = (number / below, above / number);
            if down < up { (Some(below), None) } else { (Some(above), None) }
        }
        both => both,
    };
    let size = |number: Option<f64>| number.map(|number| Reading { number, unit });
    Err(Refusal::NotSold { typed: reading, one: size(nearest.0), other: size(nearest.1) })
}
