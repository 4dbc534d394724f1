//! What must hold of every network, whatever its numbers.

use arbtest::arbitrary::{Result, Unstructured};
use arbtest::arbtest;
use engine::check::Steps;
use engine::network::{Behind, Element, Network, NetworkError, Node, Operating};
use engine::quantity::{Amps, Ohms, Volts, Watts};
use engine::sharing::{Arrangement, Paralleled, TakeOff, share};

/// Tries a law for as long as a person waits without notice. The default tenth of a second tries few in a plain build.
fn laws(law: impl FnMut(&mut Unstructured<'_>) -> Result<()>) {
    arbtest(law).budget_ms(1000);
}

/// A whole number of thousandths from `least` to `most`: short to read in a failure, and never no number.
fn within(u: &mut Unstructured<'_>, least: f64, most: f64) -> Result<f64> {
    Ok(least + (most - least) * f64::from(u.int_in_range(0..=1000u16)?) / 1000.0)
}

/// A resistance anywhere in a room's seven decades, from 10 µΩ to 100 Ω.
fn resistance(u: &mut Unstructured<'_>) -> Result<Ohms> {
    Ok(Ohms::new(10f64.powf(within(u, -5.0, 2.0)?)))
}

/// One thing between two nodes.
#[derive(Clone, Copy, Debug)]
enum Thing {
    Source(usize, usize, Behind),
    Resistor(usize, usize, Ohms),
    Current(usize, usize, Amps),
    Power(usize, usize, Watts),
}

impl Thing {
    fn ends(self) -> (usize, usize) {
        match self {
            Self::Source(plus, minus, _) => (minus, plus),
            Self::Resistor(a, b, _) | Self::Current(a, b, _) | Self::Power(a, b, _) => (a, b),
        }
    }
}

/// A connected circuit: a tree of sources and resistances, and more things across it. Node 0 is the reference.
fn circuit(u: &mut Unstructured<'_>, with_power: bool) -> Result<(usize, Vec<Thing>)> {
    let nodes = u.int_in_range(2..=8usize)?;
    let mut things = Vec::new();
    for node in 1..nodes {
        let back = u.int_in_range(0..=node - 1)?;
        things.push(if node == 1 || u.ratio(1, 3)? {
            let source = Behind { emf: Volts::new(within(u, 10.0, 60.0)?), resistance: resistance(u)? };
            Thing::Source(node, back, source)
        } else {
            Thing::Resistor(node, back, resistance(u)?)
        });
    }
    for _ in 0..u.int_in_range(0..=8u8)? {
        let (a, b) = (u.choose_index(nodes)?, u.choose_index(nodes)?);
        things.push(match u.int_in_range(0..=3u8)? {
            0 => Thing::Source(a, b, Behind { emf: Volts::new(within(u, 0.0, 60.0)?), resistance: resistance(u)? }),
            1 => Thing::Current(a, b, Amps::new(within(u, -50.0, 50.0)?)),
            2 if with_power => Thing::Power(a, b, Watts::new(within(u, -200.0, 2000.0)?)),
            _ => Thing::Resistor(a, b, resistance(u)?),
        });
    }
    Ok((nodes, things))
}

fn put(nodes: usize, things: &[Thing]) -> (Network, Vec<Node>, Vec<Element>) {
    let mut network = Network::new();
    let at: Vec<Node> = (0..nodes).map(|node| network.node(format!("node {node}"))).collect();
    network.refer_to(at[0]);
    let elements = things.iter().map(|thing| match *thing {
        Thing::Source(plus, minus, source) => network.source(at[plus], at[minus], source),
        Thing::Resistor(a, b, ohms) => network.resistor(at[a], at[b], ohms),
        Thing::Current(a, b, amps) => network.draw_current(at[a], at[b], amps),
        Thing::Power(a, b, watts) => network.draw_power(at[a], at[b], watts),
    });
    let elements = elements.collect();
    (network, at, elements)
}

fn amps(found: &Operating, elements: &[Element]) -> Vec<f64> {
    elements.iter().map(|element| found.current(*element).unwrap().get()).collect()
}

fn volts(found: &Operating, nodes: &[Node]) -> Vec<f64> {
    nodes.iter().map(|node| found.volts(*node).unwrap().get()).collect()
}

/// What rounding may leave of a current: volts lose their 16th digit, and the least resistance turns that into
/// amperes. The elimination may lose some digits more, a thousandfold here.
fn hair(found: &Operating, nodes: &[Node], elements: &[Element]) -> f64 {
    let highest = volts(found, nodes).into_iter().fold(60.0, |high: f64, volts| high.max(volts.abs()));
    let most = amps(found, elements).into_iter().fold(0.0, |most: f64, amps| most.max(amps.abs()));
    1e-13 * (highest / 1e-5 + most)
}

#[test]
fn what_flows_into_a_node_flows_out_of_it_and_no_energy_is_lost() {
    let mut solved = 0u32;
    laws(|u| {
        let with_power = u.ratio(2, 3)?;
        let (nodes, things) = circuit(u, with_power)?;
        let (network, at, elements) = put(nodes, &things);
        let Ok(found) = network.solve() else { return Ok(()) };
        solved += 1;
        let hair = hair(&found, &at, &elements);
        let mut into = vec![0.0; nodes];
        for (thing, amps) in things.iter().zip(amps(&found, &elements)) {
            let (from, to) = thing.ends();
            into[from] -= amps;
            into[to] += amps;
        }
        for (node, into) in into.iter().enumerate() {
            assert!(into.abs() <= hair, "node {node}: {into} A left over in {things:?}");
        }
        let highest = volts(&found, &at).into_iter().fold(60.0, |high: f64, volts| high.max(volts.abs()));
        let most = amps(&found, &elements).into_iter().fold(1.0, |most: f64, amps| most.max(amps.abs()));
        let scale = (hair + 1e-12 * most) * highest.max(most * 1e-5) * things.len() as f64;
        assert!(found.imbalance().get().abs() <= scale, "{} W out of balance", found.imbalance().get());
        // Every element's power at its ends adds up to nothing as well.
        let sum: f64 = elements.iter().map(|element| found.power(*element).unwrap().get()).sum();
        assert!(sum.abs() <= scale, "{sum} W over all ends");
        // Draws get what they ask for.
        for (thing, element) in things.iter().zip(&elements) {
            if let Thing::Power(_, _, watts) = thing {
                let got = found.power(*element).unwrap().get();
                assert!((got - watts.get()).abs() <= 1e-9 * watts.get().abs() + scale, "{got} W of {watts:?}");
            }
        }
        Ok(())
    });
    assert!(solved > 10, "only {solved} circuits had an answer");
}

#[test]
fn no_input_makes_it_answer_with_no_number_or_panic() {
    fn any(u: &mut Unstructured<'_>) -> Result<f64> {
        let odd = [0.0, -1.0, 1e-12, 1e-300, 1e300, 1e12, f64::NAN, f64::INFINITY, f64::MIN_POSITIVE, 24.0, 1e-6];
        if u.ratio(1, 2)? { Ok(*u.choose(&odd)?) } else { within(u, 0.0, 60.0) }
    }
    laws(|u| {
        let nodes = u.int_in_range(1..=5usize)?;
        let mut things = Vec::new();
        for _ in 0..u.int_in_range(0..=10u8)? {
            let (a, b) = (u.choose_index(nodes)?, u.choose_index(nodes)?);
            things.push(match u.int_in_range(0..=3u8)? {
                0 => Thing::Source(a, b, Behind { emf: Volts::new(any(u)?), resistance: Ohms::new(any(u)?) }),
                1 => Thing::Current(a, b, Amps::new(any(u)?)),
                2 => Thing::Power(a, b, Watts::new(any(u)?)),
                _ => Thing::Resistor(a, b, Ohms::new(any(u)?)),
            });
        }
        let (network, at, elements) = put(nodes, &things);
        for found in [network.solve(), network.solve_tied()].into_iter().flatten() {
            assert!(at.iter().filter_map(|node| found.volts(*node)).all(|volts| volts.get().is_finite()));
            assert!(elements.iter().filter_map(|one| found.current(*one)).all(|amps| amps.get().is_finite()));
            assert!(elements.iter().filter_map(|one| found.power(*one)).all(|watts| !watts.get().is_nan()));
            assert!(!found.imbalance().get().is_nan());
        }
        if let Ok(seen) = network.seen_from(at[nodes - 1], at[0]) {
            assert!(seen.emf.get().is_finite() && seen.resistance.get() >= 0.0, "{seen:?}");
        }
        Ok(())
    });
}

#[test]
fn the_order_of_the_elements_does_not_matter() {
    laws(|u| {
        let (nodes, things) = circuit(u, true)?;
        let (network, at, elements) = put(nodes, &things);
        let turned: Vec<Thing> = things.iter().rev().copied().collect();
        let (other, other_at, _) = put(nodes, &turned);
        match (network.solve(), other.solve()) {
            (Ok(one), Ok(two)) => {
                // Seven decades of resistance cost as many of sixteen digits, and the elimination some more; near
                // collapse a hair of rounding moves the volts by its root.
                let hair = if things.iter().any(|thing| matches!(thing, Thing::Power(..))) { 1e-6 } else { 1e-7 };
                let scale = 60.0 + volts(&one, &at).iter().fold(0.0, |high: f64, volts| high.max(volts.abs()));
                for (one, two) in volts(&one, &at).iter().zip(volts(&two, &other_at)) {
                    assert!((one - two).abs() <= hair * scale, "{one} V and {two} V, {} elements", elements.len());
                }
            }
            (Err(one), Err(two)) => {
                let kind = core::mem::discriminant::<NetworkError>;
                assert_eq!(kind(&one), kind(&two), "one order: {one:?}, the other: {two:?} of {things:?}");
            }
            (one, two) => panic!("one order: {:?}, the other: {:?} of {things:?}", one.err(), two.err()),
        }
        Ok(())
    });
}

#[test]
fn without_draws_of_power_the_causes_add_up() {
    laws(|u| {
        let (nodes, things) = circuit(u, false)?;
        // Each cause alone, all others put to nothing in place.
        let alone = |cause: usize| -> Vec<Thing> {
            let quiet = |(index, thing): (usize, &Thing)| match *thing {
                Thing::Source(a, b, source) if index != cause => {
                    Thing::Source(a, b, Behind { emf: Volts::default(), ..source })
                }
                Thing::Current(a, b, _) if index != cause => Thing::Current(a, b, Amps::default()),
                same => same,
            };
            things.iter().enumerate().map(quiet).collect()
        };
        let (network, at, _) = put(nodes, &things);
        let together = volts(&network.solve().unwrap(), &at);
        let mut sum = vec![0.0; nodes];
        let mut size = 60.0;
        for (cause, thing) in things.iter().enumerate() {
            if matches!(thing, Thing::Source(..) | Thing::Current(..)) {
                let (network, at, _) = put(nodes, &alone(cause));
                for (sum, one) in sum.iter_mut().zip(volts(&network.solve().unwrap(), &at)) {
                    *sum += one;
                    size = one.abs().max(size);
                }
            }
        }
        for (sum, together) in sum.iter().zip(&together) {
            assert!((sum - together).abs() <= 1e-7 * size, "{sum} V against {together} V in {things:?}");
        }
        Ok(())
    });
}

/// A trunk and its draws: volts at each draw, or why not.
fn trunk(source: Behind, pieces: &[(Ohms, Watts)]) -> std::result::Result<Vec<f64>, NetworkError> {
    let mut network = Network::new();
    let (back, mut here) = (network.node("back"), network.node("post"));
    network.refer_to(back);
    network.source(here, back, source);
    let mut taps = Vec::new();
    for (cable, draw) in pieces {
        let tap = network.node("tap");
        network.resistor(here, tap, *cable);
        network.draw_power(tap, back, *draw);
        taps.push(tap);
        here = tap;
    }
    network.solve().map(|found| volts(&found, &taps))
}

#[test]
fn more_resistance_never_raises_the_volts_at_a_draw_nor_undoes_a_collapse() {
    let (mut stood, mut fell) = (0u32, 0u32);
    laws(|u| {
        let source = Behind { emf: Volts::new(within(u, 11.0, 55.0)?), resistance: Ohms::new(within(u, 0.002, 0.2)?) };
        let mut pieces = Vec::new();
        for _ in 0..u.int_in_range(1..=5u8)? {
            pieces.push((Ohms::new(within(u, 0.001, 0.1)?), Watts::new(within(u, 0.0, 900.0)?)));
        }
        let before = trunk(source, &pieces);
        let longer = u.choose_index(pieces.len())?;
        pieces[longer].0 = pieces[longer].0 + Ohms::new(within(u, 0.0001, 0.05)?);
        match (before, trunk(source, &pieces)) {
            (Ok(before), Ok(after)) => {
                stood += 1;
                for (before, after) in before.iter().zip(&after) {
                    assert!(*after <= before + 1e-6, "{after} V with more cable, {before} V with less");
                }
            }
            (Err(error), after) => {
                fell += 1;
                assert!(matches!(error, NetworkError::NoOperatingPoint { .. }), "{error}");
                assert!(
                    matches!(after, Err(NetworkError::NoOperatingPoint { .. })),
                    "stands with more cable: {after:?}"
                );
            }
            (Ok(_), Err(error)) => assert!(matches!(error, NetworkError::NoOperatingPoint { .. }), "{error}"),
        }
        Ok(())
    });
    assert!(stood > 5 && fell > 5, "{stood} stood, {fell} collapsed: both are wanted");
}

#[test]
fn one_draw_in_a_network_is_the_closed_form_and_collapses_where_it_does() {
    laws(|u| {
        let source = Behind { emf: Volts::new(within(u, 10.0, 60.0)?), resistance: Ohms::new(within(u, 0.001, 0.1)?) };
        let cable = Ohms::new(within(u, 0.0001, 0.1)?);
        // From next to nothing to just past the most there is; also fed.
        let draw = source.and(cable).greatest_draw() * within(u, -1.0, 1.2)?;
        let network = trunk(source, &[(cable, draw)]);
        match (network, source.and(cable).under(draw, &mut Steps::silent())) {
            (Ok(network), Ok(closed)) => {
                // At the edge a hair of rounding moves the volts by its root.
                let edge = draw / source.and(cable).greatest_draw() > 0.999;
                let hair = if edge { 1e-6 } else { 1e-11 };
                assert!((network[0] / closed.volts.get() - 1.0).abs() < hair, "{} {closed:?}", network[0]);
            }
            (Err(NetworkError::NoOperatingPoint { .. }), Err(_)) => {}
            // On the very edge the two may round to different sides.
            (one, other) => assert!(
                (draw / source.and(cable).greatest_draw() - 1.0).abs() < 1e-9,
                "network {one:?}, closed form {other:?}"
            ),
        }
        Ok(())
    });
}

#[test]
fn a_bank_that_is_the_same_from_both_sides_shares_the_same_from_both_sides() {
    laws(|u| {
        let count = u.int_in_range(1..=8usize)?;
        let mirror =
            |half: Vec<f64>, whole: usize| -> Vec<f64> { (0..whole).map(|at| half[at.min(whole - 1 - at)]).collect() };
        let mut half = |whole: usize, least, most| -> Result<Vec<f64>> {
            (0..whole.div_ceil(2)).map(|_| within(u, least, most)).collect()
        };
        let volts = mirror(half(count, 51.0, 53.0)?, count);
        let inner = mirror(half(count, 0.002, 0.02)?, count);
        let ties: Vec<Ohms> = mirror(half(count - 1, 0.0001, 0.002)?, count - 1).into_iter().map(Ohms::new).collect();
        let strings: Vec<Behind> = volts
            .iter()
            .zip(&inner)
            .map(|(emf, ohms)| Behind { emf: Volts::new(*emf), resistance: Ohms::new(*ohms) })
            .collect();
        let current = Amps::new(within(u, -200.0, 200.0)?);
        for arrangement in [Arrangement::OppositeEnds, Arrangement::Middle] {
            let (positive, negative) = arrangement.take_offs(count);
            let bank = Paralleled { strings: &strings, positive_ties: &ties, negative_ties: &ties, positive, negative };
            let found = share(bank, current, &mut Steps::silent()).unwrap();
            let sum: f64 = found.currents.iter().map(|one| one.get()).sum();
            assert!((sum - current.get()).abs() < 1e-6, "{sum} A of {current:?}");
            // The middle is a mirror; opposite ends are one when the bars are changed for each other as well.
            for (one, other) in found.currents.iter().zip(found.currents.iter().rev()) {
                assert!((*one - *other).get().abs() < 1e-6, "{arrangement:?}: {one:?} and {other:?}");
            }
        }
        Ok(())
    });
}

#[test]
fn ends_of_a_bank_may_be_changed_for_each_other() {
    laws(|u| {
        let count = u.int_in_range(2..=6usize)?;
        let mut strings = Vec::new();
        let (mut over, mut under) = (Vec::new(), Vec::new());
        for _ in 0..count {
            strings.push(Behind {
                emf: Volts::new(within(u, 12.0, 13.0)?),
                resistance: Ohms::new(within(u, 0.002, 0.02)?),
            });
        }
        for _ in 1..count {
            over.push(Ohms::new(within(u, 0.0001, 0.002)?));
            under.push(Ohms::new(within(u, 0.0001, 0.002)?));
        }
        let positive = TakeOff::After(u.choose_index(count - 1)?);
        let negative = TakeOff::At(u.choose_index(count)?);
        let turn = |take_off| match take_off {
            TakeOff::At(string) => TakeOff::At(count - 1 - string),
            TakeOff::After(tie) => TakeOff::After(count - 2 - tie),
        };
        let there = Paralleled { strings: &strings, positive_ties: &over, negative_ties: &under, positive, negative };
        let found = share(there, Amps::new(90.0), &mut Steps::silent()).unwrap();
        let reversed = |ohms: &[Ohms]| ohms.iter().rev().copied().collect::<Vec<_>>();
        let (turned, over, under) =
            (strings.iter().rev().copied().collect::<Vec<_>>(), reversed(&over), reversed(&under));
        let back = Paralleled {
            strings: &turned,
            positive_ties: &over,
            negative_ties: &under,
            positive: turn(positive),
            negative: turn(negative),
        };
        let other = share(back, Amps::new(90.0), &mut Steps::silent()).unwrap();
        for (one, other) in found.currents.iter().zip(other.currents.iter().rev()) {
            assert!((*one - *other).get().abs() < 1e-6);
        }
        assert!((found.volts - other.volts).get().abs() < 1e-9);
        Ok(())
    });
}
