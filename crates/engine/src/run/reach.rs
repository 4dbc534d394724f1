//! The other way round: given the cable that is on the truck, how many amperes, and how far.

use super::voltage_drop::{Way, by_length};
use super::{Ask, Candidate, Kind, carry, load, protect};
use crate::ampacity::Laid;
use crate::check::{Basis, FieldSet, Steps};
use crate::entry::Entry;
use crate::family::CodeFamily;
use crate::field::Field;
use crate::quantity::{Amps, Metres, Percent, Volts, Watts};
use crate::ratings::Series;

/// What a cable does.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Reach {
    /// The cable.
    pub cable: Candidate,
    /// The greatest current by ampacity and protection together, without any factor. None where no standard breaker
    /// fits the cable.
    pub most: Option<Amps>,
    /// The breaker for it.
    pub rating: Option<Amps>,
    /// The current at which the drop over the entered length is all that is allowed.
    pub most_for_drop: Option<Amps>,
    /// The lesser of both.
    pub amps: Option<Amps>,
    /// The same in watts at the run's voltage.
    pub watts: Option<Watts>,
    /// How far it goes with the entered current; with the greatest where none was entered.
    pub length: Option<Metres>,
}

/// How many amperes the entered cable carries, and how far.
///
/// # Errors
///
/// The inputs that are missing: kind and size at least.
pub fn reach(ask: &Ask) -> Result<Reach, FieldSet> {
    let mut basis = Basis::default();
    let kind = ask.kind(&mut basis);
    let family = ask.family(&mut basis);
    let cable = match ask.entered(&mut basis) {
        Some(None) => {
            basis.ask(Field::ConductorSize);
            None
        }
        entered => entered.flatten(),
    };
    let (Some(kind), Some(family), Some(cable)) = (kind, family, cable) else { return Err(basis.missing()) };
    let laid = ask.laid(&mut basis, kind, family);
    let protects = ask.breaker_type(&mut basis, kind);
    let terminals_read = ask.terminals(&mut basis, family, Amps::new(0.0));
    let current = match (ask.current, ask.power) {
        (Entry::Blank, Entry::Blank) => Some(None),
        _ => load::working(ask, kind, &mut basis, &mut Steps::silent()).map(Some),
    };
    let breaker = match ask.breaker {
        Entry::Blank => Some(None),
        entry => basis.need(Field::Breaker, entry).map(Some),
    };
    let unread = |field, is: bool, basis: &mut Basis| {
        if is {
            basis.ask(field);
        }
    };
    unread(Field::RunLength, ask.length == Entry::Unread, &mut basis);
    unread(Field::RunVoltage, ask.voltage == Entry::Unread, &mut basis);
    let allowed = ask.allowed_drop(&mut basis, kind);
    let (Some(laid), Some(protects), Some(_), Some(current), Some(breaker), Some(allowed)) =
        (laid, protects, terminals_read, current, breaker, allowed)
    else {
        return Err(basis.missing());
    };
    if !basis.missing().is_empty() {
        return Err(basis.missing());
    }
    let series = Ask::series(kind, family, protects);
    let best = most(ask, kind, family, cable, &laid, series, breaker);
    let voltage = ask.voltage.typed();
    let most_for_drop = voltage
        .zip(ask.length.typed())
        .map(|(voltage, length)| for_drop(cable, &laid, kind, Way { length, voltage, allowed }));
    let most = best.map(|(most, _)| most);
    let amps = match (most, most_for_drop) {
        (Some(most), Some(drop)) => Some(most.min(drop)),
        (most, None) => most,
        (None, Some(_)) => None,
    };
    let for_length = current.or(most);
    Ok(Reach {
        cable,
        most,
        rating: best.map(|(_, rating)| rating),
        most_for_drop,
        amps,
        watts: amps.zip(voltage).map(|(amps, voltage)| voltage * amps),
        length: for_length
            .zip(voltage)
            .map(|(current, voltage)| farthest(current, cable, &laid, kind, voltage, allowed)),
    })
}

/// The greatest current and the breaker for it, over every standard rating, or with the one there is.
fn most(
    ask: &Ask,
    kind: Kind,
    family: CodeFamily,
    cable: Candidate,
    laid: &Laid,
    series: Series,
    breaker: Option<Amps>,
) -> Option<(Amps, Amps)> {
    let rule = kind.rule(family);
    let at = |rating: Amps| {
        // Marked terminals, or those that are usual at this rating; unread ones were turned away before.
        let terminals = ask.terminals(&mut Basis::default(), family, rating)?;
        let ampacity = carry::ampacity(cable, laid, terminals, &mut Steps::silent())?;
        if rating > protect::greatest(cable, laid, ampacity, series) {
            return None;
        }
        let by_device = rating * protect::heat_share(family, laid.ambient) / rule.device_least;
        let by_conductor = match family {
            CodeFamily::Iec => ampacity.permitted() / rule.carried,
            CodeFamily::NorthAmerica => {
                (ampacity.at_terminals / rule.continuous).min(ampacity.corrected / rule.carried)
            }
        };
        let current = by_device.min(by_conductor);
        let under = rule.device_below.is_none_or(|factor| rating < current * factor);
        (current.get() > 0.0 && under).then_some((current, rating))
    };
    let better = |best: Option<(Amps, Amps)>, one: (Amps, Amps)| match best {
        // Of two that carry as much, the smaller breaker.
        Some(best) if best.0 >= one.0 => Some(best),
        _ => Some(one),
    };
    match breaker {
        Some(rating) => at(rating),
        None => series.ratings().filter_map(at).fold(None, better),
    }
}

/// How far `current` goes before the drop is all that is allowed: L = V · allowed / (2 · I · Z).
fn farthest(current: Amps, cable: Candidate, laid: &Laid, kind: Kind, voltage: Volts, allowed: Percent) -> Metres {
    let (impedance, ..) = by_length(current, cable, laid, kind, &mut Steps::silent());
    Metres::new(voltage.get() * allowed.share() / (2.0 * current.get() * impedance.get()))
}

/// The current at which the drop over the way is all that is allowed. The drop rises with the current, so halving the
/// span sixty times finds it to the last bit that counts.
fn for_drop(cable: Candidate, laid: &Laid, kind: Kind, way: Way) -> Amps {
    let cold = by_length(Amps::new(0.0), cable, laid, kind, &mut Steps::silent()).0;
    let (mut low, mut high) = (0.0, way.voltage.get() * way.allowed.share() / (2.0 * way.length.get() * cold.get()));
    for _ in 0..60 {
        let middle = 0.5 * (low + high);
        if farthest(Amps::new(middle), cable, laid, kind, way.voltage, way.allowed) >= way.length {
            low = middle;
        } else {
            high = middle;
        }
    }
    Amps::new(low)
}
