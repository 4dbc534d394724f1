//! The requirements of a start, each by its id, judged and worked.

use super::ask::{Curve, positive};
use super::{Ask, SURGE_EFFICIENCY, SURGE_SECONDS, bus, phases};
use crate::check::{Basis, Check, Cost, Limit, Origin, Outcome, Step, Steps, judge, worst_first};
use crate::entry::Entry;
use crate::field::Field;
use crate::network::Loaded;
use crate::quantity::{Amps, Celsius, Count, Metres, Percent, Quantity, Seconds, VoltAmps, Volts, Watts};
use crate::show;
use crate::source;

/// A requirement of a start.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Requirement {
    /// The start, on top of what runs, against the inverter's surge.
    Surge,
    /// The volts at the inverter meanwhile, against its cut-off.
    Sag,
    /// Everything running, against what the inverter gives for long.
    Steady,
    /// The breaker between bank and inverter does not trip.
    BreakerHold,
    /// Packs that guard themselves let it pass.
    Hold,
    /// The same with one pack out.
    HoldOneOut,
    /// The generator carries what runs and the charger.
    Generator,
}

impl Requirement {
    /// Every requirement, in the order of the page where nothing is worse than another.
    pub const ALL: [Self; 7] =
        [Self::Surge, Self::Sag, Self::Steady, Self::Hold, Self::HoldOneOut, Self::BreakerHold, Self::Generator];

    /// The id, as in the documents of the engine.
    #[must_use]
    pub const fn id(self) -> &'static str {
        match self {
            Self::Surge => "inverter-surge",
            Self::Sag => "bus-sag",
            Self::Steady => "inverter-steady",
            Self::BreakerHold => "breaker-hold",
            Self::Hold => "bms-hold-this-start",
            Self::HoldOneOut => "bms-hold-this-start-one-out",
            Self::Generator => "generator",
        }
    }

    /// The name on screen.
    #[must_use]
    pub const fn name(self) -> &'static str {
        match self {
            Self::Surge => "Start against the inverter’s surge",
            Self::Sag => "Volts at the inverter while it starts",
            Self::Steady => "Everything running, against the inverter",
            Self::BreakerHold => "Breaker holds through the start",
            Self::Hold => "Packs hold the start",
            Self::HoldOneOut => "Packs hold the start with one out",
            Self::Generator => "Generator carries it and the charger",
        }
    }

    /// What it costs where it breaks: the start, and with it the lights.
    #[must_use]
    pub const fn cost(self) -> Cost {
        Cost::Loss
    }

    /// The margin that a careful hand keeps: 15 % on a surge, 5 % on a sag; ratings may be used whole. *Chosen*.
    const fn reserve(self) -> Percent {
        Percent::new(match self {
            Self::Surge => 15.0,
            Self::Sag => 5.0,
            _ => 0.0,
        })
    }

    fn outcome(self, ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
        match self {
            Self::Surge => surge(ask, basis, steps),
            Self::Sag => sag(ask, basis, steps),
            Self::Steady => steady(ask, basis, steps),
            Self::BreakerHold => breaker(ask, basis, steps),
            Self::Hold => packs(ask, 0.0, basis, steps),
            Self::HoldOneOut => packs(ask, 1.0, basis, steps),
            Self::Generator => generator(ask, basis, steps),
        }
    }

    fn judged(self, ask: &Ask, steps: &mut Steps) -> Option<Check<Self>> {
        let mut basis = Basis::default();
        let outcome = self.outcome(&ask.sound(), &mut basis, steps);
        judge(self, self.cost(), self.reserve(), outcome, &basis)
    }

    /// Judges this requirement. `None` where it does not arise.
    #[must_use]
    pub fn check(self, ask: &Ask) -> Option<Check<Self>> {
        self.judged(ask, &mut Steps::silent())
    }
}

/// Every requirement that arises, worst first.
#[must_use]
pub fn assess(ask: &Ask) -> Vec<Check<Requirement>> {
    let mut checks: Vec<_> = Requirement::ALL.iter().filter_map(|requirement| requirement.check(ask)).collect();
    worst_first(&mut checks);
    checks
}

/// The steps of one requirement, made by the same code as its value. The last is the margin to its limit.
#[must_use]
pub fn working(ask: &Ask, requirement: Requirement) -> Vec<Step> {
    let mut steps = Steps::written();
    let Some(check) = requirement.judged(ask, &mut steps) else { return steps.into_steps() };
    steps.margin(&check, show::given);
    steps.into_steps()
}

/// What the inverter's ratings keep at this height and in this air.
///
/// *Chosen*, as most makers print: 1 % less for each 100 m above 1500 m, and for each kelvin above 40 °C.
fn derated(ask: &Ask, basis: &mut Basis) -> Option<f64> {
    let height = basis.assume(Field::Height, ask.height, Metres::new(0.0))?;
    let air = basis.assume(Field::InverterAir, ask.inverter_air, Celsius::new(25.0))?;
    let by_height = 0.01 * (height.get() - 1500.0).max(0.0) / 100.0;
    let by_heat = 0.01 * (air.get() - 40.0).max(0.0);
    Some(((1.0 - by_height) * (1.0 - by_heat)).max(0.0))
}

/// inverter-surge: apparent power of the start on top of what runs ≤ the surge, where that lasts as long as the start.
fn surge(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let phases = phases(ask, basis, steps);
    if ask.on_the_bus() {
        return Outcome::DoesNotArise;
    }
    let lasts = basis.assume(Field::SurgeSeconds, ask.surge_seconds, SURGE_SECONDS);
    let continuous = positive(ask.inverter_continuous);
    let surge = match (positive(ask.inverter_surge), continuous) {
        (Entry::Blank, Entry::Typed(continuous)) => {
            basis.assume(Field::InverterSurge, Entry::Blank, VoltAmps::new(continuous.get()))
        }
        (entry, _) => basis.need(Field::InverterSurge, entry),
    };
    let derated = derated(ask, basis);
    let (Some(phases), Some(lasts), Some(surge), Some(derated)) = (phases, lasts, surge, derated) else {
        return Outcome::Asks;
    };
    // Of two surges the shorter and greater counts where the start is that short. One that outlasts both has only what
    // the inverter gives for long.
    let short = match (ask.short_surge, ask.short_seconds) {
        (Entry::Typed(short), Entry::Typed(time)) if phases.seconds <= time => Some(short),
        _ => None,
    };
    let rating = if let Some(short) = short {
        if phases.seconds <= lasts { short.max(surge) } else { short }
    } else if phases.seconds <= lasts {
        surge
    } else {
        let Some(continuous) = basis.need(Field::InverterContinuous, continuous) else { return Outcome::Asks };
        VoltAmps::new(continuous.get())
    };
    let rating = steps.step("What the inverter gives for as long", VoltAmps::new(rating.get() * derated), || {
        let put_in = format!("{} × {}", show::given(rating.amount()), show::number(derated, 3));
        ("rating · height and heat", put_in, Origin::Entered(Field::InverterSurge))
    });
    Outcome::Held { value: phases.starting.apparent().amount(), limit: Limit::at_most(rating) }
}

/// inverter-steady: everything running ≤ what the inverter gives for long.
fn steady(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.on_the_bus() {
        return Outcome::DoesNotArise;
    }
    let phases = phases(ask, basis, steps);
    let continuous = basis.need(Field::InverterContinuous, positive(ask.inverter_continuous));
    let derated = derated(ask, basis);
    let (Some(phases), Some(continuous), Some(derated)) = (phases, continuous, derated) else { return Outcome::Asks };
    let rating = VoltAmps::new(continuous.get() * derated);
    let value = steps.step("Apparent power of all that runs", phases.running.apparent(), || {
        let put_in = format!(
            "√(({})² + ({} var)²)",
            show::step(phases.running.active().amount()),
            show::number(phases.running.vars, 1)
        );
        ("√(P² + Q²)", put_in, Origin::Before)
    });
    Outcome::Held { value: value.amount(), limit: Limit::at_most(rating) }
}

/// The draw of the start on the bus: P / η.
fn on_the_bus(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<(Watts, Seconds)> {
    let phases = phases(ask, basis, steps);
    if ask.on_the_bus() {
        let phases = phases?;
        return Some((phases.starting.active(), phases.seconds));
    }
    let efficiency = basis.assume(Field::InverterEfficiency, positive(ask.efficiency), SURGE_EFFICIENCY);
    let (phases, efficiency) = (phases?, efficiency?);
    let watts = phases.starting.active();
    let drawn = steps.step("Drawn from the bus", watts / efficiency.share(), || {
        ("P / η", format!("{} / {}", show::step(watts.amount()), show::number(efficiency.share(), 3)), Origin::Before)
    });
    Some((drawn, phases.seconds))
}

/// The bus under the start. `Ok(None)` in collapse.
fn loaded(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Option<(Result<Loaded, Watts>, Seconds)> {
    let drawn = on_the_bus(ask, basis, steps);
    let seen = bus::seen(ask, basis, steps);
    let ((drawn, seconds), seen) = (drawn?, seen?);
    Some((seen.under(drawn, steps).map_err(|_| drawn), seconds))
}

/// bus-sag: volts at the inverter while it starts ≥ its cut-off. In collapse there are none.
fn sag(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    let loaded = loaded(ask, basis, steps);
    let cut_off = match (ask.cut_off, ask.bank.inverter_low) {
        // The window's low end in the site is the same figure.
        (Entry::Blank, Entry::Typed(low)) => Some(low),
        (entry, _) => basis.need(Field::CutOff, positive(entry)),
    };
    let (Some((loaded, _)), Some(cut_off)) = (loaded, cut_off) else { return Outcome::Asks };
    match loaded {
        Ok(found) => Outcome::Held { value: found.volts.amount(), limit: Limit::at_least(cut_off) },
        Err(_) => Outcome::Impossible { value: Volts::new(0.0).amount(), limit: Limit::at_least(cut_off) },
    }
}

/// bms-hold-this-start: current of the start ≤ packs × what one lets pass for as long.
fn packs(ask: &Ask, out: f64, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.pack_limit == Entry::Blank && ask.pack_peak == Entry::Blank {
        return Outcome::DoesNotArise;
    }
    let count = match (positive(ask.packs), ask.bank.strings) {
        (Entry::Blank, Entry::Typed(strings)) => Some(strings),
        (entry, _) => basis.assume(Field::Packs, entry, Count::new(1.0)),
    };
    let Some(count) = count else { return Outcome::Asks };
    if out > 0.0 && count.get() < 2.0 {
        return Outcome::DoesNotArise;
    }
    let in_use = count.get() - out;
    // With one pack out, the others carry it behind more resistance.
    let asked = if out > 0.0 { with_resistance(ask, count.get() / in_use) } else { *ask };
    let loaded = loaded(&asked, basis, steps);
    let limit = match (positive(ask.pack_peak), positive(ask.pack_peak_time)) {
        (Entry::Typed(peak), Entry::Typed(time)) if loaded.is_some_and(|(_, seconds)| seconds <= time) => Some(peak),
        _ => basis.need(Field::PackDischargeLimit, positive(ask.pack_limit)),
    };
    let (Some((loaded, _)), Some(limit)) = (loaded, limit) else { return Outcome::Asks };
    let all = steps.step("What the packs let pass", limit * in_use, || {
        let put_in = format!("{} × {}", show::number(in_use, 0), show::given(limit.amount()));
        ("packs · limit", put_in, Origin::Entered(Field::PackDischargeLimit))
    });
    match loaded {
        Ok(found) => Outcome::Held { value: found.current.amount(), limit: Limit::at_most(all) },
        Err(_) => Outcome::Impossible { value: all.amount(), limit: Limit::at_most(all) },
    }
}

/// The bank with its resistance times `more`, where it was entered; by its cells, that many fewer strings.
fn with_resistance(ask: &Ask, more: f64) -> Ask {
    let mut asked = *ask;
    match ask.bank_resistance {
        Entry::Typed(ohms) => asked.bank_resistance = Entry::Typed(ohms * more),
        _ => {
            if let Some(strings) = ask.bank.strings.typed() {
                asked.bank.strings = Entry::of(strings.get() / more);
            }
        }
    }
    asked
}

/// breaker-hold: current of the start ≤ what the breaker surely lets pass for as long.
///
/// Up to a second the magnetic band's lower end counts: 3, 5 or 10 times its rating for B, C and D; longer than that, 2.55
/// times, from which its heat may trip it within seconds. On direct current it trips no sooner.
///
/// # Source
///
/// [`source::IEC_60898`], table 7, from memory.
fn breaker(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.breaker == Entry::Blank {
        return Outcome::DoesNotArise;
    }
    let rating = basis.need(Field::Breaker, positive(ask.breaker));
    // What the maker says goes before the band of a curve.
    let stated = match ask.trip_multiple {
        Entry::Blank => Some(None),
        entry => basis.need(Field::TripMultiple, entry).map(Some),
    };
    let curve = match stated {
        Some(None) => basis.assume(Field::TripCurve, ask.curve, Curve::C),
        _ => Some(Curve::C),
    };
    let loaded = loaded(ask, basis, steps);
    let (Some(rating), Some(curve), Some(stated), Some((loaded, seconds))) = (rating, curve, stated, loaded) else {
        return Outcome::Asks;
    };
    let times = match (stated, curve) {
        (Some(stated), _) => stated.get(),
        _ if seconds.get() > 1.0 => 2.55,
        (None, Curve::B) => 3.0,
        (None, Curve::C) => 5.0,
        (None, Curve::D) => 10.0,
    };
    let limit = steps.step("What it surely lets pass for as long", rating * times, || {
        let put_in = format!("{} × {}", show::number(times, 2), show::given(rating.amount()));
        ("band · In", put_in, Origin::Published(source::IEC_60898.at("table 7 (from memory)")))
    });
    match loaded {
        Ok(found) => Outcome::Held { value: found.current.amount(), limit: Limit::at_most(limit) },
        Err(_) => Outcome::Impossible { value: limit.amount(), limit: Limit::at_most(limit) },
    }
}

/// Share of a generator's rating that it carries for hours. *Chosen*, common practice for small sets: 80 %.
const GENERATOR_SHARE: f64 = 0.8;

/// generator: what runs and the charger ≤ the set's rating, for hours, at this height and heat.
///
/// *Chosen*, common practice for engines that breathe freely: 1 % less for each 100 m, and for each 5 K above 25 °C.
fn generator(ask: &Ask, basis: &mut Basis, steps: &mut Steps) -> Outcome {
    if ask.generator == Entry::Blank {
        return Outcome::DoesNotArise;
    }
    let rating = basis.need(Field::GeneratorRating, positive(ask.generator));
    let charger = basis.need(Field::ChargerDraw, ask.charger);
    let phases = phases(ask, basis, steps);
    let height = basis.assume(Field::Height, ask.height, Metres::new(0.0));
    let (Some(rating), Some(charger), Some(phases), Some(height)) = (rating, charger, phases, height) else {
        return Outcome::Asks;
    };
    let keeps = (1.0 - 0.01 * height.get().max(0.0) / 100.0).max(0.0) * GENERATOR_SHARE;
    let limit = steps.step("What the set carries for hours", VoltAmps::new(rating.get() * keeps), || {
        let put_in = format!("{} × {}", show::given(rating.amount()), show::number(keeps, 3));
        ("rating · 0.8 · height", put_in, Origin::Published(source::COMMON_PRACTICE.at("small engines")))
    });
    let all = VoltAmps::new(phases.running.apparent().get() + charger.get());
    let value = steps.step("What runs and the charger", all, || {
        let put_in = format!("{} + {}", show::step(phases.running.apparent().amount()), show::given(charger.amount()));
        ("S + S charger", put_in, Origin::Before)
    });
    Outcome::Held { value: value.amount(), limit: Limit::at_most(limit) }
}

/// For the drawing: volts before, while it starts, and once it runs. `None` where an input is missing; a phase in collapse
/// is none.
#[must_use]
pub fn volts(ask: &Ask) -> Option<[Option<Volts>; 3]> {
    let ask = &ask.sound();
    let mut basis = Basis::default();
    let phases = phases(ask, &mut basis, &mut Steps::silent())?;
    let seen = bus::seen(ask, &mut basis, &mut Steps::silent())?;
    let efficiency = if ask.on_the_bus() { 1.0 } else { ask.efficiency.typed().unwrap_or(SURGE_EFFICIENCY).share() };
    let under = |watts: Watts| seen.under(watts / efficiency, &mut Steps::silent()).ok().map(|found| found.volts);
    Some([under(phases.before.active()), under(phases.starting.active()), under(phases.running.active())])
}

/// What the start draws from the bus. `None` where an input is missing.
#[must_use]
pub fn drawn(ask: &Ask) -> Option<Watts> {
    on_the_bus(&ask.sound(), &mut Basis::default(), &mut Steps::silent()).map(|(watts, _)| watts)
}

/// Current of the start, for words.
#[must_use]
pub fn current(ask: &Ask) -> Option<Amps> {
    let (loaded, _) = loaded(&ask.sound(), &mut Basis::default(), &mut Steps::silent())?;
    loaded.ok().map(|found| found.current)
}
