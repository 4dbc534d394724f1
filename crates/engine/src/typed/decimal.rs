//! From decimal digits to the nearest number.
//!
//! The standard library's way is faster and brings a table of ten thousand bytes that no press makes smaller: a weak signal
//! pays for it at the first visit. This one is its equal in every result (see the tests): what a person types is short, and one
//! division of doubles rounds it right; the rest divides whole numbers of any length, bit by bit.

/// The double nearest to a plain decimal such as `-12.5` or `6.02e23`, halves to even. `None` where it is none, and
/// where it has more digits or a greater exponent than anybody types.
#[must_use]
pub fn nearest(text: &str) -> Option<f64> {
    let (negative, size) = text.strip_prefix('-').map_or((false, text), |size| (true, size));
    let size = size.strip_prefix('+').unwrap_or(size);
    let (digits, exponent) = match size.find(['e', 'E']) {
        Some(at) => (&size[..at], size[at + 1..].parse::<i32>().ok()?),
        None => (size, 0),
    };
    let (whole, part) = digits.split_once('.').unwrap_or((digits, ""));
    if whole.len() + part.len() == 0 || whole.len() + part.len() > 400 || exponent.unsigned_abs() > 400 {
        return None;
    }
    let digits = || whole.bytes().chain(part.bytes());
    if !digits().all(|digit| digit.is_ascii_digit()) {
        return None;
    }
    let tens = exponent - i32::try_from(part.len()).ok()?;
    let nearest = short(digits(), tens).unwrap_or_else(|| long(digits(), tens));
    Some(if negative { -nearest } else { nearest })
}

/// What a person types has so few digits and so small an exponent that a double holds both exactly: one division or
/// multiplication then rounds once, to the nearest. `None` for anything longer.
///
/// # Source
///
/// W. D. Clinger, How to Read Floating Point Numbers Accurately, 1990, section 3. From memory.
fn short(digits: impl Iterator<Item = u8>, tens: i32) -> Option<f64> {
    // The powers of ten up to this one are doubles.
    if tens.unsigned_abs() > 22 {
        return None;
    }
    let mut number = 0_u64;
    for digit in digits {
        number = number * 10 + u64::from(digit - b'0');
        if number > 1 << 53 {
            return None;
        }
    }
    let power = (0..tens.unsigned_abs()).fold(1.0, |power, _| power * 10.0);
    Some(if tens < 0 { number as f64 / power } else { number as f64 * power })
}

/// The same for any length.
fn long(digits: impl Iterator<Item = u8>, tens: i32) -> f64 {
    let mut number = Whole::default();
    for digit in digits {
        number.times_and(10, u32::from(digit - b'0'));
    }
    let mut over = Whole(vec![1]);
    for _ in 0..tens.unsigned_abs() {
        if tens > 0 {
            number.times_and(10, 0);
        } else {
            over.times_and(10, 0);
        }
    }
    divided(number, over)
}

/// A whole number of any length, lowest digit (of 32 bits) first, with no noughts at its upper end.
#[derive(Clone, Default)]
struct Whole(Vec<u32>);

impl Whole {
    /// This times `factor`, and `more`.
    fn times_and(&mut self, factor: u32, more: u32) {
        let mut carried = u64::from(more);
        for digit in &mut self.0 {
            carried += u64::from(*digit) * u64::from(factor);
            *digit = carried as u32;
            carried >>= 32;
        }
        if carried > 0 {
            self.0.push(carried as u32);
        }
    }

    /// How many bits it takes.
    fn bits(&self) -> i64 {
        self.0.last().map_or(0, |top| 32 * self.0.len() as i64 - i64::from(top.leading_zeros()))
    }

    /// This times two to the `by`.
    fn shifted(&self, by: i64) -> Self {
        let mut shifted = vec![0; (by / 32) as usize];
        shifted.extend_from_slice(&self.0);
        let mut shifted = Self(shifted);
        shifted.times_and(1 << (by % 32), 0);
        shifted
    }

    fn is_less_than(&self, other: &Self) -> bool {
        self.0.len().cmp(&other.0.len()).then_with(|| self.0.iter().rev().cmp(other.0.iter().rev())).is_lt()
    }

    /// This less a smaller one.
    fn take(&mut self, smaller: &Self) {
        let mut borrowed = 0_i64;
        for (at, digit) in self.0.iter_mut().enumerate() {
            borrowed += i64::from(*digit) - i64::from(smaller.0.get(at).copied().unwrap_or(0));
            *digit = borrowed as u32;
            borrowed >>= 32;
        }
        while self.0.last() == Some(&0) {
            self.0.pop();
        }
    }
}

/// The double nearest to `number / over`.
fn divided(number: Whole, over: Whole) -> f64 {
    if number.0.is_empty() {
        return 0.0;
    }
    // Scaled so that the quotient has 54 or 55 bits: the 53 of a double, and those that say which way to round. Below
    // the normal doubles there are fewer: the place of the last bit is then fixed.
    let lowest = (number.bits() - over.bits() - 54).max(-1075);
    let (mut rest, over) = if lowest < 0 { (number.shifted(-lowest), over) } else { (number, over.shifted(lowest)) };
    let mut quotient = 0_u64;
    for bit in (0..56).rev() {
        let part = over.shifted(bit);
        if !rest.is_less_than(&part) {
            rest.take(&part);
            quotient |= 1 << bit;
        }
    }
    // Rounded by hand to 53 bits, or to the last place of a subnormal, halves to even; then every step is exact.
    let spare = (64 - i64::from(quotient.leading_zeros()) - 53).max(i64::from(lowest == -1075));
    let half = 1_u64 << (spare - 1);
    let (kept, cut) = (quotient >> spare, quotient & ((1 << spare) - 1));
    let up = cut > half || cut == half && (!rest.0.is_empty() || kept & 1 == 1);
    times_power_of_two((kept + u64::from(up)) as f64, lowest + spare)
}

fn times_power_of_two(mut number: f64, mut power: i64) -> f64 {
    // In steps that stay within the doubles, the last of which is the only one that may leave them.
    while power > 1000 {
        number *= f64::from_bits((1000 + 1023) << 52);
        power -= 1000;
    }
    while power < -1000 {
        number *= f64::from_bits((1023 - 1000) << 52);
        power += 1000;
    }
    number * f64::from_bits(((power + 1023) as u64) << 52)
}
