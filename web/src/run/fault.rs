//! What a short circuit of the run would draw out of the bank, in a line. Pure.

use engine::check::{Check, Sense};
use engine::quantity::{Amps, Quantity};
use engine::run::{Ask, Requirement, Sizing};
use engine::show;
use engine::unit::Unit;

/// The judged fault, its line, and what that rests on. `None` where the bank drives none, or not enough is known to say one.
pub fn fault(ask: &Ask, found: &Sizing) -> Option<(Check<Requirement>, String, String)> {
    let check = Requirement::BankFault.check(ask)?;
    let (words, rests) = line(ask, found, &check)?;
    Some((check, words, rests))
}

/// A fault current to three figures: its inputs are known no better.
pub fn about(amps: Amps) -> String {
    let step = 10f64.powf((amps.get().abs().log10().floor() - 2.0).max(0.0));
    show::given(Amps::new((amps.get() / step).round() * step).amount())
}

fn line(ask: &Ask, found: &Sizing, check: &Check<Requirement>) -> Option<(String, String)> {
    let fault = found.fault?;
    let (drives, device) = (fault.at_breaker.greatest, found.protection.protects.word());
    let opens = match ask.interrupting.typed() {
        None => format!("ask for a {device} that opens that"),
        Some(rating) if rating < drives => {
            format!("this {device} opens {} at these volts: breaks", show::given(rating.amount()))
        }
        Some(rating) => format!("this {device} opens {} at these volts: enough", show::given(rating.amount())),
    };
    let rests = match ask.bank_resistance.typed() {
        Some(ohms) => {
            let milli = engine::quantity::Amount { number: ohms.get() * 1000.0, unit: Unit::Milliohm };
            format!("By its resistance of {}, full.", show::given(milli))
        }
        None => "Assumed: a bank of some 400 Ah, new, warm and full; a larger one drives more.".to_owned(),
    };
    let far = format!(
        "At the far end {} to {}, the least from an old, cold, low bank.",
        about(fault.at_far_end.least),
        about(fault.at_far_end.greatest)
    );
    let also = also_breaks(check, device).unwrap_or_default();
    Some((format!("The bank can drive {} here; {opens}.{also}", about(drives)), format!("{rests} {far}")))
}

/// What breaks besides the interrupting rating, if that is the worst.
fn also_breaks(check: &Check<Requirement>, device: &str) -> Option<String> {
    let (value, limit) = check.value.zip(check.limit)?;
    let broken = check.room()?.number < 0.0;
    match (broken, limit.sense, value.unit) {
        (true, Sense::AtLeast, _) => {
            let (least, opening) = show::apart(value, limit.amount);
            Some(format!(" The least is {least}, and the {device} opens from {opening}: breaks."))
        }
        (true, Sense::AtMost, Unit::Second) => {
            let (takes, bears) = show::apart(value, limit.amount);
            Some(format!(" The {device} takes {takes}, and the conductor lives {bears}: breaks."))
        }
        _ => None,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::{Rows, plain};
    use engine::check::Verdict;
    use engine::field::Field;
    use engine::run::size;

    const MAIN: &[(Field, &str)] = &[
        (Field::RunKind, "bank"),
        (Field::CodeFamily, "iec"),
        (Field::RunCurrent, "100"),
        (Field::RunVoltage, "48"),
        (Field::RunLength, "1.5"),
        (Field::BankResistance, "5"),
    ];

    #[track_caller]
    fn of_rows(more: &[(Field, &str)]) -> (Verdict, String, String) {
        let rows = [MAIN, more].concat();
        let ask = Ask::read(&Rows(&rows));
        let (check, line, rests) = fault(&ask, &size(&ask).expect("it is sized")).expect("the bank drives a fault");
        (check.verdict, plain(&line), plain(&rests))
    }

    /// By hand: 1.15 · 48 V over 5 mΩ = 11 040 A.
    #[test]
    fn the_line_says_what_the_bank_drives_and_what_opens() {
        let (verdict, line, rests) = of_rows(&[(Field::InterruptingRating, "6 kA")]);
        assert_eq!(verdict, Verdict::Breaks);
        assert_eq!(line, "The bank can drive 11 000 A here; this breaker opens 6000 A at these volts: breaks.");
        assert!(rests.starts_with("By its resistance of 5 mΩ, full. At the far end "), "{rests}");
        let (verdict, line, _) = of_rows(&[(Field::InterruptingRating, "20 kA")]);
        assert_eq!(verdict, Verdict::Close);
        assert!(line.ends_with("opens 20 000 A at these volts: enough."), "{line}");
        let (verdict, line, rests) = of_rows(&[(Field::BreakerType, "fuse"), (Field::BankResistance, "")]);
        assert_eq!(verdict, Verdict::Asks);
        assert!(line.ends_with("ask for a fuse that opens that."), "{line}");
        assert!(rests.starts_with("Assumed: a bank of some 400 Ah"), "{rests}");
    }

    #[test]
    fn a_fault_too_weak_to_open_the_breaker_is_said() {
        let more = [(Field::InterruptingRating, "20 kA"), (Field::RunLength, "400"), (Field::ConductorSize, "50")];
        let (verdict, line, _) = of_rows(&more);
        assert_eq!(verdict, Verdict::Breaks);
        assert!(line.ends_with("and the breaker opens from 145 A: breaks."), "{line}");
    }

    #[test]
    fn fault_currents_have_three_figures() {
        let shown = |amps| plain(&about(Amps::new(amps)));
        assert_eq!((shown(7666.7), shown(11_040.0)), ("7670 A".to_owned(), "11 000 A".to_owned()));
        assert_eq!((shown(85.34), shown(0.0)), ("85 A".to_owned(), "0 A".to_owned()));
    }
}
