//! run-protection: whether the breaker or fuse lets the load run and protects the conductor.

use super::carry::asked;
use super::{Ampacity, BreakerType, Candidate, Load, worse};
use crate::ampacity::{Laid, north_america::small_conductor};
use crate::check::{Limit, Origin, Outcome, Steps};
use crate::family::CodeFamily;
use crate::quantity::{Amps, Celsius, Quantity};
use crate::ratings::{NEXT_SIZE_UP_TO, Series};
use crate::show;
use crate::source;

/// How much a breaker or fuse of the IEC trade loses for each kelvin above 30 °C.
///
/// *Chosen*: 0.6 %, the steep side of makers' curves. North American breakers are tested at 40 °C, and their
/// continuous rule leaves a fifth of the rating free.
const HEAT_LOSS: f64 = 0.006;

/// What is left of a rating in air at `ambient`.
#[must_use]
pub(super) fn heat_share(family: CodeFamily, ambient: Celsius) -> f64 {
    match family {
        CodeFamily::NorthAmerica => 1.0,
        CodeFamily::Iec => 1.0 - HEAT_LOSS * (ambient.get() - 30.0).clamp(0.0, 50.0),
    }
}

/// The smallest standard rating that lets the load run.
pub(super) fn smallest(load: &Load, laid: &Laid, series: Series) -> Option<Amps> {
    series.at_least(load.device_least / heat_share(laid.family, laid.ambient))
}

/// The greatest rating that protects the conductor, without the rule's own upper end.
pub(super) fn greatest(candidate: Candidate, laid: &Laid, ampacity: Ampacity, series: Series) -> Amps {
    let permitted = ampacity.permitted();
    match laid.family {
        CodeFamily::Iec => permitted,
        CodeFamily::NorthAmerica => {
            let next = if permitted.get() > 0.0 && permitted <= NEXT_SIZE_UP_TO {
                series.at_least(permitted).unwrap_or(permitted)
            } else {
                permitted
            };
            let small = small_conductor(laid.conductor.metal(), candidate.size);
            small.map_or(next, |most| next.min(Amps::new(most * f64::from(candidate.parallel))))
        }
    }
}

/// Sets the rating against the least that lets the load run and the greatest that protects the conductor.
///
/// IEC: Ib ≤ In ≤ Iz; I₂ ≤ 1.45 · Iz then holds for every device that opens at 1.45 · In. North America: the factor of
/// the kind; at most the ampacity, or the next standard rating above it to 800 A; small conductors by 240.4(D). A branch
/// with several socket-outlets may not use the next rating; that is not judged here.
pub(super) fn protect(
    rating: Amps,
    load: &Load,
    candidate: Candidate,
    laid: &Laid,
    ampacity: Option<Ampacity>,
    series: Series,
    steps: &mut Steps,
) -> Outcome {
    let least = asked("Least rating by the load", load, load.device_least, load.rule.device_least, steps);
    let share = heat_share(laid.family, laid.ambient);
    let kept = if share == 1.0 {
        rating
    } else {
        steps.step("Rating that is left in this heat", rating * share, || {
            let put_in = format!("{} × {}", show::given(rating.amount()), show::number(share, 3));
            ("In · heat", put_in, Origin::Published(source::CHOSEN.at("0.6 % for each kelvin above 30 °C")))
        })
    };
    let lets_run = Outcome::Held { value: kept.amount(), limit: Limit::at_least(least) };
    let Some(ampacity) = ampacity else {
        return Outcome::Impossible { value: rating.amount(), limit: Limit::at_most(Amps::new(0.0)) };
    };
    let greatest = steps.step("Greatest rating that protects it", greatest(candidate, laid, ampacity, series), || {
        let put_in = show::step(ampacity.permitted().amount());
        match laid.family {
            CodeFamily::Iec => ("In ≤ Iz", put_in, Origin::Published(source::IEC_60364_4_43.at("433.1"))),
            CodeFamily::NorthAmerica => {
                ("next standard rating at or above", put_in, Origin::Published(source::NEC.at("240.4(B), 240.4(D)")))
            }
        }
    });
    let protects = Outcome::Held { value: rating.amount(), limit: Limit::at_most(greatest) };
    let both = worse(lets_run, protects);
    match load.device_below {
        // The rule's upper end is itself not allowed.
        Some(below) if rating >= below => Outcome::Impossible { value: rating.amount(), limit: Limit::at_most(below) },
        _ => both,
    }
}

/// Class of device to ask for.
pub(super) fn class(protects: BreakerType, pv: bool, alternates: bool, family: CodeFamily) -> &'static str {
    match (protects, pv, alternates, family) {
        (BreakerType::Fuse, true, _, _) => "gPV fuse-link",
        (BreakerType::Fuse, false, false, CodeFamily::Iec) => "gG fuse-link with a d.c. rating",
        (BreakerType::Fuse, false, false, CodeFamily::NorthAmerica) => "class T or J fuse with a d.c. listing",
        (BreakerType::Fuse, false, true, CodeFamily::Iec) => "gG fuse-link",
        (BreakerType::Fuse, false, true, CodeFamily::NorthAmerica) => "class J or RK fuse",
        (_, _, false, CodeFamily::Iec) => "d.c. breaker, IEC 60898-3 or IEC 60947-2",
        (_, _, false, CodeFamily::NorthAmerica) => "d.c. breaker, UL 489",
        (_, _, true, CodeFamily::Iec) => "breaker, IEC 60898-1, curve C",
        (_, _, true, CodeFamily::NorthAmerica) => "breaker, UL 489",
    }
}
