//! Branched circuits on direct current: a trunk with loads along it, as lights down a corridor.

use super::{Ask, Candidate};
use crate::ampacity::{Laid, warms};
use crate::check::{Basis, FieldSet};
use crate::conductor::{own_temperature, resistance};
use crate::entry::Entry;
use crate::field::Field;
use crate::network::{Behind, Network, NetworkError};
use crate::order::sort_short;
use crate::quantity::{Amps, Metres, Ohms, Percent, Volts, Watts};

/// What a load draws.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub enum Draw {
    /// Nothing: a joint.
    #[default]
    Nothing,
    /// The same current at any voltage.
    Current(Amps),
    /// The same power at any voltage, as lamps with electronics do: the lower the volts, the more current.
    Power(Watts),
}

/// A stretch of the tree: from an earlier place to a new one, with a load at its end.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Stretch<Way> {
    /// Where it begins: 0 is the head, n the end of the n-th stretch.
    pub from: usize,
    /// What lies between.
    pub way: Way,
    /// What draws at its end.
    pub draw: Draw,
}

/// A length of cable.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Cable {
    /// Length one way.
    pub length: Metres,
    /// The conductor.
    pub conductor: Candidate,
}

/// What is found at the end of a stretch.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Place {
    /// Volts between the two conductors there.
    pub volts: Volts,
    /// Current through the stretch, away from the head; negative where it feeds back.
    pub current: Amps,
    /// Volts lost from the head to here, as a part of the head's.
    pub lost: Percent,
}

/// A branched circuit, solved.
#[derive(Clone, Debug, PartialEq)]
pub struct Branched {
    /// Volts at the head.
    pub head: Volts,
    /// Current out of the supply.
    pub supplied: Amps,
    /// The end of each stretch, in order.
    pub places: Vec<Place>,
    /// Watts lost in the stretches.
    pub lost: Watts,
}

impl Branched {
    /// The place that loses most, by its stretch, and how much. `None` where there is no stretch.
    #[must_use]
    pub fn worst(&self) -> Option<(usize, Percent)> {
        let most = self.places.iter().enumerate().max_by(|a, b| a.1.lost.get().total_cmp(&b.1.lost.get()));
        most.map(|(at, place)| (at, place.lost))
    }
}

/// Why a branched circuit has no answer.
#[derive(Clone, Debug, PartialEq)]
#[non_exhaustive]
pub enum BranchedError {
    /// A stretch begins at a place that no earlier one makes.
    NoSuchPlace {
        /// Which stretch, counted from 0.
        stretch: usize,
        /// Where it is said to begin.
        from: usize,
    },
    /// The circuit has no operating point, or a value in it is not possible.
    Network(NetworkError),
    /// The conductors' temperatures did not settle: they carry more than they bear.
    NotSettled,
}

impl core::fmt::Display for BranchedError {
    fn fmt(&self, f: &mut core::fmt::Formatter<'_>) -> core::fmt::Result {
        match self {
            Self::NoSuchPlace { stretch, from } => {
                write!(f, "stretch {} begins at place {from}, which does not stand before it", stretch + 1)
            }
            Self::Network(error) => error.fmt(f),
            Self::NotSettled => f.write_str("the conductors carry more than they bear"),
        }
    }
}

impl core::error::Error for BranchedError {}

impl From<NetworkError> for BranchedError {
    fn from(error: NetworkError) -> Self {
        Self::Network(error)
    }
}

/// Solves a tree of stretches whose resistance, there and back together, is known.
///
/// By nodal analysis; exact for a tree, in which what flows out in one conductor comes back in the other.
///
/// # Errors
///
/// [`BranchedError::NoSuchPlace`]; [`BranchedError::Network`], among others where the draws are more than the supply and
/// the cables can carry.
///
/// # Source
///
/// [`crate::source::MODIFIED_NODAL`].
///
/// # Example
///
/// 12 V, two stretches of 50 mΩ, 2 A at the end of each: 4 A and 2 A, so 11.8 and 11.7 V.
///
/// ```
/// use engine::network::Behind;
/// use engine::quantity::{Amps, Ohms, Volts};
/// use engine::run::branched::{Draw, Stretch, solve};
///
/// let lamp = |from| Stretch { from, way: Ohms::new(0.05), draw: Draw::Current(Amps::new(2.0)) };
/// let head = Behind { emf: Volts::new(12.0), resistance: Ohms::new(0.0) };
/// let found = solve(head, &[lamp(0), lamp(1)])?;
/// assert!((found.places[0].volts.get() - 11.8).abs() < 1e-9);
/// assert!((found.places[1].volts.get() - 11.7).abs() < 1e-9);
/// # Ok::<(), engine::run::branched::BranchedError>(())
/// ```
pub fn solve(supply: Behind, stretches: &[Stretch<Ohms>]) -> Result<Branched, BranchedError> {
    let mut network = Network::new();
    let minus = network.node("return");
    network.refer_to(minus);
    let mut places = vec![network.node("head")];
    let source = network.source(places[0], minus, supply);
    let mut ways = Vec::with_capacity(stretches.len());
    for (stretch, one) in stretches.iter().enumerate() {
        let Some(&from) = places.get(one.from) else {
            return Err(BranchedError::NoSuchPlace { stretch, from: one.from });
        };
        let to = network.node(format!("place {}", stretch + 1));
        ways.push(network.resistor(from, to, one.way));
        match one.draw {
            Draw::Nothing => {}
            Draw::Current(current) => {
                network.draw_current(to, minus, current);
            }
            Draw::Power(power) => {
                network.draw_power(to, minus, power);
            }
        }
        places.push(to);
    }
    let found = network.solve()?;
    // Every node and element is of this network and closed, so that each has its value.
    let volts = |node| found.volts(node).unwrap_or_default();
    let head = volts(places[0]);
    let ends: Vec<Place> = places[1..]
        .iter()
        .zip(&ways)
        .map(|(node, way)| {
            let volts = volts(*node);
            let lost = Percent::from_share(if head.get() == 0.0 { 0.0 } else { (head - volts) / head });
            Place { volts, current: found.current(*way).unwrap_or_default(), lost }
        })
        .collect();
    let lost = ends.iter().zip(stretches).map(|(end, one)| end.current * one.way * end.current).sum();
    Ok(Branched { head, supplied: found.current(source).unwrap_or_default(), places: ends, lost })
}

/// How often the circuit is solved until the conductors' temperatures settle. *Chosen*: within what they bear, each
/// turn leaves less than a tenth of the last change.
const TURNS: u32 = 40;

/// Solves a tree of cables, each at the temperature that its own current gives it.
///
/// All of them lie as `laid` says.
///
/// # Errors
///
/// As [`solve`]; [`BranchedError::NotSettled`].
///
/// # Source
///
/// [`own_temperature`]; [`crate::source::MODIFIED_NODAL`].
pub fn solve_cables(supply: Behind, laid: &Laid, stretches: &[Stretch<Cable>]) -> Result<Branched, BranchedError> {
    let resist = |cable: &Cable, current: Amps| {
        let several = f64::from(cable.conductor.parallel);
        let ampacity = warms(laid, cable.conductor.size) * several;
        let temperature = own_temperature(laid.ambient, laid.insulation.bears(laid.family), current, ampacity);
        resistance(laid.conductor, cable.conductor.size, temperature) / several * (cable.length * 2.0)
    };
    let mut wired: Vec<Stretch<Ohms>> = stretches
        .iter()
        .map(|one| Stretch { from: one.from, way: resist(&one.way, Amps::new(0.0)), draw: one.draw })
        .collect();
    for _ in 0..TURNS {
        let found = solve(supply, &wired)?;
        let mut change: f64 = 0.0;
        for ((wire, one), end) in wired.iter_mut().zip(stretches).zip(&found.places) {
            let way = resist(&one.way, end.current);
            change = change.max((way - wire.way).get().abs() / way.get());
            wire.way = way;
        }
        // A last bit or two of the resistance is far below what any meter shows.
        if change < 1e-12 {
            return Ok(found);
        }
    }
    Err(BranchedError::NotSettled)
}

/// A load along a run.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct LoadAlong {
    /// How far it is from the run's head, one way.
    pub distance: Metres,
    /// What it draws.
    pub draw: Draw,
}

/// Loads along one cable, solved.
#[derive(Clone, Debug, PartialEq)]
pub struct Along {
    /// The loads, from the head on.
    pub loads: Vec<LoadAlong>,
    /// What is found at each of them, in the same order.
    pub found: Branched,
    /// The cable: the one entered, else the smallest that would hold with all of them at the far end.
    pub cable: Candidate,
}

/// Why loads along a run have no answer.
#[derive(Clone, Debug, PartialEq)]
pub enum AlongError {
    /// Inputs of the run that are missing.
    Missing(FieldSet),
    /// Not even the thickest conductors side by side would hold with all of them at the far end.
    NoCable,
    /// The circuit has no answer.
    Circuit(BranchedError),
}

/// Loads along the run `ask`, whose cable is the one entered, else the smallest that would hold with all at the far end.
///
/// A run of which neither current nor power was entered carries what the loads draw together, and one without a length
/// reaches to the farthest.
///
/// # Errors
///
/// [`AlongError`].
pub fn along(ask: &Ask, loads: &[LoadAlong]) -> Result<Along, AlongError> {
    let mut loads = loads.to_vec();
    sort_short(&mut loads, |a, b| a.distance.get().total_cmp(&b.distance.get()));
    let mut ask = *ask;
    let mut basis = Basis::default();
    let voltage = basis.need(Field::RunVoltage, ask.voltage);
    let (kind, family) = (ask.kind(&mut basis), ask.family(&mut basis));
    let (Some(voltage), Some(kind), Some(family)) = (voltage, kind, family) else {
        return Err(AlongError::Missing(basis.missing()));
    };
    if ask.current == Entry::Blank && ask.power == Entry::Blank {
        let drawn = loads.iter().map(|load| match load.draw {
            Draw::Nothing => Amps::new(0.0),
            Draw::Current(current) => current,
            Draw::Power(power) => power / voltage,
        });
        ask.current = Entry::Typed(drawn.sum());
    }
    if ask.length == Entry::Blank {
        ask.length = loads.last().map_or(Entry::Blank, |last| Entry::Typed(last.distance));
    }
    let sized = super::size(&ask).map_err(AlongError::Missing)?;
    let cable = sized.conductor.ok_or(AlongError::NoCable)?;
    let laid = ask.laid(&mut basis, kind, family).ok_or(AlongError::Missing(basis.missing()))?;
    let mut before = Metres::new(0.0);
    let stretches: Vec<Stretch<Cable>> = (0..)
        .zip(&loads)
        .map(|(from, load)| {
            // Two at one place are a millimetre apart, so that no stretch is without resistance.
            let length = (load.distance - before).max(Metres::new(0.001));
            before = load.distance;
            Stretch { from, way: Cable { length, conductor: cable }, draw: load.draw }
        })
        .collect();
    let supply = Behind { emf: voltage, resistance: Ohms::new(0.0) };
    let found = solve_cables(supply, &laid, &stretches).map_err(AlongError::Circuit)?;
    Ok(Along { loads, found, cable })
}

/// Equal loads at equal distances along the run, the last at its far end, which share its current alike.
///
/// # Errors
///
/// The inputs of the run that are missing.
pub fn evenly(ask: &Ask, count: u32) -> Result<Vec<LoadAlong>, FieldSet> {
    let mut basis = Basis::default();
    let length = basis.need(Field::RunLength, ask.length);
    let Some(working) = super::working_current(ask) else {
        basis.ask(Field::RunCurrent);
        return Err(basis.missing());
    };
    let Some(length) = length else { return Err(basis.missing()) };
    let several = f64::from(count.max(1));
    let load = |place: u32| LoadAlong {
        distance: length * (f64::from(place) / several),
        draw: Draw::Current(working / several),
    };
    Ok((1..=count.max(1)).map(load).collect())
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::ampacity::{Insulation, Method};
    use crate::conductor::{Conductor, Size};
    use crate::family::CodeFamily;
    use crate::quantity::Celsius;

    const LAID: Laid = Laid {
        family: CodeFamily::Iec,
        conductor: Conductor::CopperStranded,
        insulation: Insulation::Pvc70,
        method: Method::Conduit,
        ambient: Celsius::new(30.0),
        together: 2.0,
    };
    const BUS: Behind = Behind { emf: Volts::new(12.0), resistance: Ohms::new(0.0) };

    fn lamp(from: usize, watts: f64) -> Stretch<Cable> {
        let conductor = Candidate { size: Size::Metric(250), parallel: 1 };
        let way = Cable { length: Metres::new(4.0), conductor };
        Stretch { from, way, draw: Draw::Power(Watts::new(watts)) }
    }

    #[test]
    fn lamps_down_a_corridor_lose_more_the_farther_they_hang() {
        let found = solve_cables(BUS, &LAID, &[lamp(0, 10.0), lamp(1, 10.0), lamp(2, 10.0), lamp(1, 5.0)]).unwrap();
        let lost: Vec<f64> = found.places.iter().map(|place| place.lost.get()).collect();
        assert!(lost[0] < lost[1] && lost[1] < lost[2] && lost[0] < lost[3]);
        assert_eq!(found.worst().unwrap().0, 2);
        // What goes in is what the lamps draw and the cables lose.
        let given = (found.head * found.supplied).get();
        assert!((given - 35.0 - found.lost.get()).abs() < 1e-6, "{given}, {}", found.lost.get());
    }

    #[test]
    fn one_stretch_is_a_run() {
        let cable = lamp(0, 0.0).way;
        let found = solve_cables(BUS, &LAID, &[Stretch { from: 0, way: cable, draw: Draw::Current(Amps::new(12.0)) }]);
        // 24 A at 70 °C: at 12 A 40 °C. 7.41 mΩ/m · 1.0786 · 8 m · 12 A.
        let volts = 12.0 - found.unwrap().places[0].volts.get();
        assert!((volts - 0.007_41 * 1.0786 * 8.0 * 12.0).abs() < 1e-9, "{volts}");
    }

    fn corridor() -> Ask {
        Ask {
            kind: Entry::Typed(super::super::Kind::DcBranch),
            current: Entry::of(6.0),
            voltage: Entry::of(12.0),
            length: Entry::of(12.0),
            size: Entry::of(4.0),
            ..Ask::default()
        }
    }

    #[test]
    fn equal_loads_along_a_run_lose_less_than_all_at_its_end() {
        let end = |count| {
            let loads = evenly(&corridor(), count).unwrap();
            assert_eq!(loads.last().unwrap().distance, Metres::new(12.0));
            let found = along(&corridor(), &loads).unwrap().found;
            assert!((found.supplied.get() - 6.0).abs() < 1e-9);
            found.places.last().unwrap().lost.get()
        };
        // By hand, at one resistance: n loads lose (n + 1) / 2n of what all at the end lose; warmth adds a little.
        let ratio = end(3) / end(1);
        assert!((ratio - 2.0 / 3.0).abs() < 0.02, "{ratio}");
    }

    #[test]
    fn loads_by_their_watts_need_no_current_and_may_be_told_in_any_order() {
        let load =
            |distance, watts| LoadAlong { distance: Metres::new(distance), draw: Draw::Power(Watts::new(watts)) };
        let ask = Ask { current: Entry::Blank, length: Entry::Blank, ..corridor() };
        let found = along(&ask, &[load(8.0, 10.0), load(2.0, 10.0), load(8.0, 5.0)]).unwrap();
        let distances: Vec<f64> = found.loads.iter().map(|load| load.distance.get()).collect();
        assert_eq!(distances, [2.0, 8.0, 8.0]);
        let volts: Vec<f64> = found.found.places.iter().map(|place| place.volts.get()).collect();
        // By hand, at 30 °C, 4.61 mΩ/m · 1.0393 · 2 = 9.582 mΩ a metre of way: 25 W draw near 2.09 A over 2 m, then
        // 15 W near 1.27 A over 6 m.
        assert!((volts[0] - (12.0 - 0.009_582 * 2.0 * 2.09)).abs() < 0.002, "{volts:?}");
        assert!((volts[1] - (volts[0] - 0.009_582 * 6.0 * 1.265)).abs() < 0.003, "{volts:?}");
        assert!((volts[1] - volts[2]).abs() < 1e-4);
        let missing = along(&Ask { voltage: Entry::Blank, ..ask }, &[load(8.0, 10.0)]).unwrap_err();
        let AlongError::Missing(missing) = missing else { panic!("{missing:?}") };
        assert!(missing.contains(Field::RunVoltage));
        assert!(evenly(&ask, 3).is_err());
    }

    #[test]
    fn a_place_that_is_not_there_and_too_great_a_draw_have_no_answer() {
        let missing = solve_cables(BUS, &LAID, &[lamp(3, 5.0)]);
        assert_eq!(missing.unwrap_err(), BranchedError::NoSuchPlace { stretch: 0, from: 3 });
        assert!(matches!(solve_cables(BUS, &LAID, &[lamp(0, 5000.0)]), Err(BranchedError::Network(_))));
    }
}
