//! Fuses of parallel strings: whether they are needed, and which fit.

use super::Ask;
use crate::check::{Basis, Limit, Origin, Outcome, Steps};
use crate::family::PvCircuitRules;
use crate::field::Field;
use crate::quantity::{Amps, Quantity};
use crate::show;

/// How much of its rating a fuse keeps in the heat of a box in the sun.
///
/// *Chosen*: 0.9, common practice at about 60 °C in the box; the maker's curve decides.
pub const HEAT: f64 = 0.9;

/// What a code family says of the fuses of parallel strings.
#[derive(Clone, Debug, PartialEq)]
pub struct StringFuses {
    /// Current that the other strings drive back into a faulted one, by the family's rule.
    pub backfeed: Amps,
    /// Greatest fuse that the module's maker allows.
    pub module_most: Amps,
    /// Whether every string needs a fuse.
    pub needed: bool,
    /// The least rating by the rule.
    pub least: Amps,
    /// The ratings that fit, smallest first.
    pub fitting: Vec<Amps>,
    /// The smallest that still fits when the heat of its box is taken off, else the largest that fits.
    pub advised: Option<Amps>,
}

/// Current that the other strings drive back into a faulted one.
///
/// (n − 1) · Isc, in North America times 1.25. What the bank can feed back through the controller is taken as nothing:
/// a converter or a blocking part stands between; where a controller has neither, its maker says so.
fn backfeed(ask: &Ask, rules: &PvCircuitRules, basis: &mut Basis, steps: &mut Steps) -> Option<Amps> {
    let strings = ask.strings(basis);
    let isc = basis.need(Field::Isc, ask.module.isc);
    let (strings, isc) = (strings?, isc?);
    let others = (strings.get() - 1.0).max(0.0);
    Some(steps.step("The other strings feed back", isc * (others * rules.backfeed_factor), || {
        let factor = if rules.backfeed_factor == 1.0 {
            String::new()
        } else {
            format!("{} × ", show::number(rules.backfeed_factor, 2))
        };
        let formula = if rules.backfeed_factor == 1.0 { "(n − 1) · Isc" } else { "1.25 · (n − 1) · Isc" };
        (
            formula,
            format!("{factor}({} − 1) × {}", show::number(strings.get(), 0), show::given(isc.amount())),
            Origin::Published(rules.backfeed_clause),
        )
    }))
}

/// string-fuse: the back-feed into one string against the module's series fuse rating; where it is more, a fuse in
/// every string that fits the rule.
///
/// One string has nothing to feed back. A fuse must be of class gPV, its voltage at least the string's cold voltage,
/// and in both poles where neither is earthed.
pub(super) fn fuse(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.strings.typed().is_none_or(|strings| strings.get() <= 1.0) && ask.strings != crate::entry::Entry::Unread {
        return Outcome::DoesNotArise;
    }
    let module_most = basis.need(Field::SeriesFuseRating, ask.module.series_fuse);
    let Some(rules) = ask.family(basis).map(crate::family::CodeFamily::pv_circuit) else { return Outcome::Asks };
    let back = backfeed(ask, rules, basis, steps);
    let (Some(module_most), Some(back), Some(isc)) = (module_most, back, ask.module.isc.typed()) else {
        return Outcome::Asks;
    };
    if back <= module_most {
        return Outcome::Held { value: back.amount(), limit: Limit::at_most(module_most) };
    }
    let least = steps.step("Least fuse in each string", isc * rules.fuse_least, || {
        (
            "factor · Isc",
            format!("{} × {}", show::number(rules.fuse_least, 4), show::given(isc.amount())),
            Origin::Published(rules.fuse_clause),
        )
    });
    if rules.fitting(isc, module_most).next().is_none() {
        // No made rating lies between the least and what the module allows.
        return Outcome::Impossible { value: least.amount(), limit: Limit::at_most(module_most) };
    }
    let Some(fitted) = basis.need(Field::StringFuse, ask.string_fuse) else { return Outcome::Asks };
    if rules.fuse_fits(fitted, isc, module_most) {
        return Outcome::Held { value: fitted.amount(), limit: Limit::at_most(module_most) };
    }
    let too_small = fitted.get() < least.get() * (1.0 - 1e-9);
    let limit = if too_small {
        Limit::at_least(least)
    } else {
        let below = rules.fuse_below.map_or(module_most, |factor| (isc * factor).min(module_most));
        Limit::at_most(below)
    };
    Outcome::Impossible { value: fitted.amount(), limit }
}

/// What the chosen code family says of the fuses of these strings. `None` where an input is missing or there is one string.
#[must_use]
pub fn string_fuses(ask: &Ask) -> Option<StringFuses> {
    let mut basis = Basis::default();
    let strings = ask.strings(&mut basis)?;
    if strings.get() <= 1.0 {
        return None;
    }
    let rules = ask.family(&mut basis)?.pv_circuit();
    let (isc, module_most) = (ask.module.isc.typed()?, ask.module.series_fuse.typed()?);
    let backfeed = backfeed(ask, rules, &mut basis, &mut crate::check::Steps::silent())?;
    let least = isc * rules.fuse_least;
    let fitting: Vec<Amps> = rules.fitting(isc, module_most).collect();
    let advised =
        fitting.iter().copied().find(|rating| rating.get() * HEAT >= least.get()).or_else(|| fitting.last().copied());
    Some(StringFuses { backfeed, module_most, needed: backfeed > module_most, least, fitting, advised })
}
