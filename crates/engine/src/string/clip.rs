//! What a controller cannot pass on: power over its output current, and the part of it that a PWM controller wastes.

use super::Ask;
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::choice::ControllerKind;
use crate::family::CodeFamily;
use crate::field::Field;
use crate::quantity::{Percent, Quantity, Volts, Watts};
use crate::show;
use crate::source::{self, Clause};

/// Share of the year's energy that may be clipped before it counts as a loss.
///
/// *Chosen*: 5 %. A little over-sizing pays in dull weeks, as the peaks it loses are those of full batteries.
pub const ALLOWED_CLIPPED: Percent = Percent::new(5.0);

/// Share of its rated power that an array must still give on a PWM controller.
///
/// *Chosen*: 70 %. A module made for the bank's voltage keeps about 75 to 80 %; one with half as many cells again
/// keeps about 55 %.
pub const PWM_LEAST_KEPT: Percent = Percent::new(70.0);

/// Efficiency of a tracking controller. *Chosen*: 97 %.
const EFFICIENCY: f64 = 0.97;

/// Voltage of the bank through most of a charge, as a part of the highest charge voltage.
///
/// *Chosen*: 0.92; 13.2 of 14.4 V for lead, 52.2 of 56.8 V for lithium iron phosphate.
const BULK: f64 = 0.92;

/// Shares of a year's energy by power level, sunny climate: part of the rated power, part of the energy.
///
/// Source: CEC weighting (from memory).
const SUNNY: &[(f64, f64)] = &[(0.10, 0.04), (0.20, 0.05), (0.30, 0.12), (0.50, 0.21), (0.75, 0.53), (1.00, 0.05)];

/// Shares of a year's energy by power level, dull climate.
///
/// Source: EN 50530, weights of the European efficiency (from memory).
const DULL: &[(f64, f64)] = &[(0.05, 0.03), (0.10, 0.06), (0.20, 0.13), (0.30, 0.10), (0.50, 0.48), (1.00, 0.20)];

/// The levels that stand for a year where the site's own sun is not known.
const fn weights(family: CodeFamily) -> (&'static [(f64, f64)], Clause) {
    match family {
        CodeFamily::NorthAmerica => (SUNNY, source::CEC_WEIGHTS.at("energy by power level, sunny climate")),
        CodeFamily::Iec => (DULL, source::EN_50530.at("energy by power level, dull climate")),
    }
}

/// Share of a year's energy that is lost where no more than `most` of `rated` can be passed on.
///
/// share = Σ wᵢ · max(0, 1 − most / (xᵢ · rated)), over power levels xᵢ that hold the part wᵢ of the year's energy
///
/// Six levels stand for a year: good to a few percent of the year's energy, enough to tell a nuisance from a loss.
#[must_use]
pub fn clipped_share(rated: Watts, most: Watts, family: CodeFamily) -> Percent {
    let (levels, _) = weights(family);
    let lost = levels.iter().map(|(level, energy)| energy * (1.0 - most.get() / (level * rated.get())).max(0.0)).sum();
    Percent::from_share(lost)
}

/// Voltage of the bank through most of a charge.
#[must_use]
pub fn bulk_voltage(highest_charge: Volts) -> Volts {
    highest_charge * BULK
}

/// array-clip: share of the year's energy that the controller's output current cannot pass on.
pub(super) fn clip(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.kind(basis) == Some(ControllerKind::Pwm) {
        return Outcome::DoesNotArise;
    }
    let series = ask.series(basis);
    let strings = ask.strings(basis);
    let each = ask.module.rated_power(basis);
    let output = basis.need(Field::OutputCurrent, ask.controller.output_current);
    let charge = basis.need(Field::HighestCharge, ask.controller.highest_charge);
    let family = ask.family(basis);
    let (Some(series), Some(strings), Some(each), Some(output), Some(charge), Some(family)) =
        (series, strings, each, output, charge, family)
    else {
        return Outcome::Asks;
    };
    let rated = steps.step("Array at its rating", each * (series.get() * strings.get()), || {
        (
            "series · strings · Vmp · Imp",
            format!(
                "{} × {} × {}",
                show::number(series.get(), 0),
                show::number(strings.get(), 0),
                show::step(each.amount())
            ),
            Origin::Entered(Field::Imp),
        )
    });
    let bulk = steps.step("Bank through most of a charge", bulk_voltage(charge), || {
        (
            "0.92 · highest charge voltage",
            format!("{} × {}", show::number(BULK, 2), show::given(charge.amount())),
            Origin::Published(source::CHOSEN.at("between rest and absorb")),
        )
    });
    let most = steps.step("Most that the controller passes on", bulk * output / EFFICIENCY, || {
        (
            "V(bank) · I(output) / efficiency",
            format!(
                "{} × {} / {}",
                show::step(bulk.amount()),
                show::given(output.amount()),
                show::number(EFFICIENCY, 2)
            ),
            Origin::Entered(Field::OutputCurrent),
        )
    });
    let (_, clause) = weights(family);
    let lost = steps.step("Share of the year's energy clipped", clipped_share(rated, most, family), || {
        (
            "Σ w · max(0, 1 − most / (x · rated))",
            format!("most / rated = {}", show::number(most / rated, 3)),
            Origin::Published(clause),
        )
    });
    Outcome::Held { value: lost.amount(), limit: Limit::at_most(ALLOWED_CLIPPED) }
}

/// pwm-harvest: share of its rated power that the array gives on a PWM controller: Imp · V(bank) over Vmp · Imp.
pub(super) fn pwm_harvest(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    match ask.kind(basis) {
        Some(ControllerKind::Pwm) => {}
        Some(ControllerKind::Mppt) => return Outcome::DoesNotArise,
        None => return Outcome::Asks,
    }
    let series = ask.series(basis);
    let vmp = basis.need(Field::Vmp, ask.module.vmp);
    let charge = basis.need(Field::HighestCharge, ask.controller.highest_charge);
    let (Some(series), Some(vmp), Some(charge)) = (series, vmp, charge) else { return Outcome::Asks };
    let bulk = steps.step("Bank through most of a charge", bulk_voltage(charge), || {
        (
            "0.92 · highest charge voltage",
            format!("{} × {}", show::number(BULK, 2), show::given(charge.amount())),
            Origin::Published(source::CHOSEN.at("between rest and absorb")),
        )
    });
    let kept = steps.step("Kept of the rated power", pwm_share_kept(bulk, vmp * series.get()), || {
        (
            "V(bank) / (n · Vmp)",
            format!(
                "{} / ({} × {})",
                show::step(bulk.amount()),
                show::number(series.get(), 0),
                show::given(vmp.amount())
            ),
            Origin::Published(source::COMMON_PRACTICE.at("a PWM controller passes Imp at the bank's voltage")),
        )
    });
    Outcome::Held { value: kept.amount(), limit: Limit::at_least(PWM_LEAST_KEPT) }
}

/// Share of its rated power that an array at `string_vmp` gives straight on a bank at `bank`. At most the whole.
#[must_use]
pub fn pwm_share_kept(bank: Volts, string_vmp: Volts) -> Percent {
    Percent::from_share((bank / string_vmp).min(1.0))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_levels_hold_the_whole_year() {
        for levels in [SUNNY, DULL] {
            let whole: f64 = levels.iter().map(|(_, energy)| energy).sum();
            assert!((whole - 1.0).abs() < 1e-12);
        }
    }

    #[test]
    fn nothing_is_clipped_that_fits_and_half_of_full_sun_is_when_half_fits() {
        let rated = Watts::new(1000.0);
        for family in CodeFamily::ALL {
            assert_eq!(clipped_share(rated, rated, family), Percent::new(0.0));
        }
        // At half: dull climate loses half of the 20 % at full power, and nothing else.
        assert!((clipped_share(rated, Watts::new(500.0), CodeFamily::Iec).get() - 10.0).abs() < 1e-9);
        // Sunny: half of 5 % at full power, a third of 53 % at three quarters.
        let sunny = clipped_share(rated, Watts::new(500.0), CodeFamily::NorthAmerica).get();
        assert!((sunny - (2.5 + 53.0 / 3.0)).abs() < 1e-9);
    }
}
