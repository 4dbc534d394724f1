//! Twenty networks of invented parts, solved by ngspice and again by a dense nodal solve; and a worked case of sharing.

use engine::check::Steps;
use engine::network::{Behind, Network, Node};
use engine::quantity::{Amps, Ohms, Volts, Watts};
use engine::sharing::{Arrangement, Paralleled, TakeOff, share};
use published::table;
use serde::Deserialize;

const NETWORKS: &str = include_str!("../data/network.toml");

/// Amperes and volts: what the figures have to agree to. They are printed to seven decimals.
const AGREES: f64 = 1e-6;

#[derive(Deserialize)]
struct Bank {
    id: String,
    strings: usize,
    load_amp: f64,
    takeoff_positive: f64,
    takeoff_negative: f64,
    cell_emf_volt: Vec<Vec<f64>>,
    cell_internal_ohm: Vec<Vec<f64>>,
    cell_link_ohm: f64,
    bar_link_positive_ohm: Vec<f64>,
    bar_link_negative_ohm: Vec<f64>,
    string_amp: Vec<f64>,
    terminal_volt: f64,
    share_max_over_mean: Option<f64>,
}

#[derive(Deserialize)]
struct Tree {
    id: String,
    source_at: Vec<SourceAt>,
    source_result: Vec<SourceResult>,
    segment: Vec<Segment>,
    load: Vec<Load>,
    node: Vec<NodeVolt>,
}

#[derive(Deserialize)]
struct SourceAt {
    node: String,
    emf_volt: f64,
    internal_ohm: f64,
}

#[derive(Deserialize)]
struct SourceResult {
    node: String,
    amp: f64,
}

#[derive(Deserialize)]
struct Segment {
    from: String,
    to: String,
    out_ohm: f64,
    back_ohm: f64,
    amp: f64,
}

#[derive(Deserialize)]
struct Load {
    node: String,
    kind: String,
    value: f64,
    amp: f64,
    volt: f64,
}

#[derive(Deserialize)]
struct NodeVolt {
    name: String,
    volt: f64,
}

/// A position of the file: strings from 1, a half for the middle of the link that follows.
fn take_off(position: f64) -> TakeOff {
    let string = position.floor() as usize - 1;
    if position.fract() == 0.0 { TakeOff::At(string) } else { TakeOff::After(string) }
}

fn ohms(numbers: &[f64]) -> Vec<Ohms> {
    numbers.iter().map(|number| Ohms::new(*number)).collect()
}

fn agree(what: &str, ours: f64, theirs: f64) {
    assert!((ours - theirs).abs() <= AGREES, "{what}: {ours}, published {theirs}");
}

#[test]
fn there_are_seventeen_banks_and_three_trees() {
    assert_eq!((table::<Bank>(NETWORKS, "bank").len(), table::<Tree>(NETWORKS, "tree").len()), (17, 3));
}

/// Every cell is a source and every link a resistor of the network.
#[test]
fn banks_cell_by_cell() {
    for row in table::<Bank>(NETWORKS, "bank") {
        let (bank, from) = (row.says, row.source);
        let mut network = Network::new();
        let mut bar = |name: &'static str| (0..bank.strings).map(|_| network.node(name)).collect::<Vec<Node>>();
        let (plus, minus) = (bar("positive bar"), bar("negative bar"));
        let mut first = Vec::new();
        for string in 0..bank.strings {
            let cells = bank.cell_emf_volt[string].iter().zip(&bank.cell_internal_ohm[string]);
            let last = bank.cell_emf_volt[string].len() - 1;
            let mut below = minus[string];
            for (cell, (emf, inner)) in cells.enumerate() {
                let above = if cell == last { plus[string] } else { network.node("cell's plus") };
                let source = Behind { emf: Volts::new(*emf), resistance: Ohms::new(*inner) };
                let element = network.source(above, below, source);
                if cell == 0 {
                    first.push(element);
                }
                if cell < last {
                    below = network.node("next cell's minus");
                    network.resistor(above, below, Ohms::new(bank.cell_link_ohm));
                }
            }
        }
        let mut join = |posts: &[Node], links: &[f64], position: f64| {
            let middle = (position.fract() != 0.0).then(|| network.node("take-off"));
            for (link, resistance) in links.iter().enumerate() {
                match middle.filter(|_| position.floor() as usize == link + 1) {
                    Some(middle) => {
                        network.resistor(posts[link], middle, Ohms::new(resistance / 2.0));
                        network.resistor(middle, posts[link + 1], Ohms::new(resistance / 2.0));
                    }
                    None => drop(network.resistor(posts[link], posts[link + 1], Ohms::new(*resistance))),
                }
            }
            middle.unwrap_or_else(|| posts[position as usize - 1])
        };
        let plus_post = join(&plus, &bank.bar_link_positive_ohm, bank.takeoff_positive);
        let minus_post = join(&minus, &bank.bar_link_negative_ohm, bank.takeoff_negative);
        network.refer_to(minus_post);
        network.draw_current(plus_post, minus_post, Amps::new(bank.load_amp));

        let found = network.solve().unwrap_or_else(|error| panic!("{}: {error}", bank.id));
        for (string, (element, theirs)) in first.iter().zip(&bank.string_amp).enumerate() {
            let ours = found.current(*element).unwrap().get();
            agree(&format!("{} string {}, {from}", bank.id, string + 1), ours, *theirs);
        }
        agree(&format!("{} terminals, {from}", bank.id), found.volts(plus_post).unwrap().get(), bank.terminal_volt);
        // Rounding of some thousand watts.
        assert!(found.imbalance().get().abs() < 1e-6, "{}: {} W", bank.id, found.imbalance().get());
    }
}

/// Every string is one source, as the tool for sharing takes it.
#[test]
fn banks_string_by_string() {
    for row in table::<Bank>(NETWORKS, "bank") {
        let (bank, from) = (row.says, row.source);
        let strings: Vec<Behind> = (0..bank.strings)
            .map(|string| {
                let links = bank.cell_link_ohm * (bank.cell_emf_volt[string].len() - 1) as f64;
                Behind {
                    emf: Volts::new(bank.cell_emf_volt[string].iter().sum()),
                    resistance: Ohms::new(bank.cell_internal_ohm[string].iter().sum::<f64>() + links),
                }
            })
            .collect();
        let (over, under) = (ohms(&bank.bar_link_positive_ohm), ohms(&bank.bar_link_negative_ohm));
        let paralleled = Paralleled {
            strings: &strings,
            positive_ties: &over,
            negative_ties: &under,
            positive: take_off(bank.takeoff_positive),
            negative: take_off(bank.takeoff_negative),
        };
        let found = share(paralleled, Amps::new(bank.load_amp), &mut Steps::silent()).unwrap();
        assert_eq!(found.currents.len(), bank.string_amp.len());
        for (string, (ours, theirs)) in found.currents.iter().zip(&bank.string_amp).enumerate() {
            agree(&format!("{} string {}, {from}", bank.id, string + 1), ours.get(), *theirs);
        }
        agree(&format!("{} terminals", bank.id), found.volts.get(), bank.terminal_volt);
        if let Some(theirs) = bank.share_max_over_mean {
            agree(&format!("{} greatest share", bank.id), found.greatest_over_even.unwrap(), theirs);
        }
        // The file names the three usual take-offs by their places.
        let arrangement = match bank.id.rsplit('_').next() {
            Some("same") => Some(Arrangement::SameEnd),
            Some("diag") => Some(Arrangement::OppositeEnds),
            Some("centre") => Some(Arrangement::Middle),
            _ => None,
        };
        if let Some(arrangement) = arrangement {
            assert_eq!(arrangement.take_offs(bank.strings), (paralleled.positive, paralleled.negative), "{}", bank.id);
        }
    }
}

/// Out and back conductors are resistors of their own; loads and sources hang between the two.
#[test]
fn trees_of_cable() {
    for row in table::<Tree>(NETWORKS, "tree") {
        let (tree, from) = (row.says, row.source);
        let mut network = Network::new();
        let pairs: Vec<(&str, Node, Node)> = tree
            .node
            .iter()
            .map(|node| (node.name.as_str(), network.node(format!("{} out", node.name)), network.node("back")))
            .collect();
        let at = |name: &str| pairs.iter().find(|pair| pair.0 == name).map(|pair| (pair.1, pair.2)).unwrap();
        network.refer_to(at(&tree.source_at[0].node).1);
        let sources: Vec<_> = tree
            .source_at
            .iter()
            .map(|source| {
                let (out, back) = at(&source.node);
                let behind = Behind { emf: Volts::new(source.emf_volt), resistance: Ohms::new(source.internal_ohm) };
                (source.node.as_str(), network.source(out, back, behind))
            })
            .collect();
        let segments: Vec<_> = tree
            .segment
            .iter()
            .map(|segment| {
                let ((out, back), (far_out, far_back)) = (at(&segment.from), at(&segment.to));
                network.resistor(far_back, back, Ohms::new(segment.back_ohm));
                network.resistor(out, far_out, Ohms::new(segment.out_ohm))
            })
            .collect();
        let loads: Vec<_> = tree
            .load
            .iter()
            .map(|load| {
                let (out, back) = at(&load.node);
                match load.kind.as_str() {
                    "amp" => network.draw_current(out, back, Amps::new(load.value)),
                    "ohm" => network.resistor(out, back, Ohms::new(load.value)),
                    other => panic!("a load of kind {other}"),
                }
            })
            .collect();

        let found = network.solve().unwrap_or_else(|error| panic!("{}: {error}", tree.id));
        let say = |what: &str| format!("{} {what}, {from}", tree.id);
        let amps = |element| found.current(element).unwrap().get();
        let volts = |name: &str| found.across(at(name).0, at(name).1).unwrap().get();
        for result in &tree.source_result {
            let source = sources.iter().find(|source| source.0 == result.node).unwrap();
            agree(&say(&format!("source {}", result.node)), amps(source.1), result.amp);
        }
        for (segment, element) in tree.segment.iter().zip(segments) {
            agree(&say(&format!("{} to {}", segment.from, segment.to)), amps(element), segment.amp);
        }
        for (load, element) in tree.load.iter().zip(loads) {
            agree(&say(&format!("load at {}", load.node)), amps(element), load.amp);
            agree(&say(&format!("volts at load {}", load.node)), volts(&load.node), load.volt);
        }
        for node in &tree.node {
            agree(&say(&format!("volts at {}", node.name)), volts(&node.name), node.volt);
        }
        assert!(found.imbalance().get().abs() < 1e-9, "{}: {} W", tree.id, found.imbalance().get());
    }
}

/// A worked case of our own, computed by hand and again independently: three strings of equal volts and 12 mΩ, each tie
/// 0.5 m of 1/0 AWG at 0.329 mΩ/m and two lugs of 0.05 mΩ (0.265 mΩ, rounded), 200 A. Figures to four decimals.
#[test]
fn three_strings_on_two_bars() {
    // A volt here is as good as any: equal volts drop out of the sharing.
    let strings = [Behind { emf: Volts::new(25.6), resistance: Ohms::new(0.012) }; 3];
    let tie = Ohms::new(0.000_265);
    assert!((0.5 * 0.329e-3 + 2.0 * 0.05e-3 - tie.get()).abs() < 0.5e-6 + 1e-12);
    let cases = [
        (Arrangement::SameEnd, [71.3801, 65.6994, 62.9204], 1.0707),
        (Arrangement::OppositeEnds, [67.1503, 65.6994, 67.1503], 1.0073),
    ];
    for (arrangement, amps, greatest) in cases {
        let (positive, negative) = arrangement.take_offs(3);
        let ties = [tie; 2];
        let bank = Paralleled { strings: &strings, positive_ties: &ties, negative_ties: &ties, positive, negative };
        let mut written = Steps::written();
        let found = share(bank, Amps::new(200.0), &mut written).unwrap();
        for (ours, theirs) in found.currents.iter().zip(amps) {
            assert!((ours.get() - theirs).abs() < 0.5e-4 + 1e-9, "{arrangement:?}: {ours:?}, worked {theirs}");
        }
        assert!((found.greatest_over_even.unwrap() - greatest).abs() < 0.5e-4, "{arrangement:?}: {found:?}");
        // The working is made by the same run: the even share, each string, and the greatest share.
        let results: Vec<f64> = written.steps().iter().map(|step| step.result.number).collect();
        assert_eq!(results.len(), 5);
        assert!((results[0] - 200.0 / 3.0).abs() < 1e-12);
        assert_eq!(results[4], found.greatest_over_even.unwrap());
    }
}

/// The direct-current end of a worked case of our own, to the digits it is given in: a pump start of 7,491.5 W on
/// 52.0 V behind 19.96 mΩ, and behind 11.16 mΩ with a second pack.
#[test]
fn a_start_on_one_pack_and_on_two() {
    let case = |milliohms: f64, volts: f64, amps: f64| {
        let bank = Behind { emf: Volts::new(52.0), resistance: Ohms::new(milliohms / 1000.0) };
        // 6,592.5 W through an inverter of 0.88.
        let draw = Watts::new(6592.5 / 0.88);
        let found = bank.under(draw, &mut Steps::silent()).unwrap();
        assert!((found.volts.get() - volts).abs() < 1e-4, "{found:?}");
        assert!((found.current.get() - amps).abs() < 1e-3, "{found:?}");

        // And the same by the network's iteration.
        let mut network = Network::new();
        let (plus, back) = (network.node("inverter"), network.node("back"));
        network.refer_to(back);
        network.source(plus, back, bank);
        network.draw_power(plus, back, draw);
        let solved = network.solve().unwrap();
        assert!((solved.volts(plus).unwrap() - found.volts).get().abs() < 1e-9);
    };
    case(19.96, 48.9449, 153.059);
    case(11.16, 50.3392, 148.820);
}

/// Trees with one supply, as branched runs: each place's volts and each stretch's current.
#[test]
fn trees_as_branched_runs() {
    use engine::run::branched::{Draw, Stretch, solve};
    let mut trees = 0;
    for row in table::<Tree>(NETWORKS, "tree") {
        let tree = row.says;
        if tree.source_at.len() > 1 {
            continue;
        }
        trees += 1;
        // The supply's node is the head; every segment makes one place.
        let mut names = vec![tree.source_at[0].node.clone()];
        let mut stretches = Vec::new();
        for segment in &tree.segment {
            let from = names.iter().position(|name| *name == segment.from).expect("an earlier place");
            names.push(segment.to.clone());
            let amps: f64 = tree.load.iter().filter(|load| load.node == segment.to).map(|load| load.value).sum();
            assert!(tree.load.iter().all(|load| load.kind == "amp"));
            let way = Ohms::new(segment.out_ohm + segment.back_ohm);
            stretches.push(Stretch { from, way, draw: Draw::Current(Amps::new(amps)) });
        }
        let at = &tree.source_at[0];
        let supply = Behind { emf: Volts::new(at.emf_volt), resistance: Ohms::new(at.internal_ohm) };
        let found = solve(supply, &stretches).unwrap_or_else(|error| panic!("{}: {error}", tree.id));
        for (place, segment) in found.places.iter().zip(&tree.segment) {
            let volt = tree.node.iter().find(|node| node.name == segment.to).expect("a node").volt;
            assert!((place.volts.get() - volt).abs() < 1e-6, "{} {}: {volt}", tree.id, segment.to);
            assert!((place.current.get() - segment.amp).abs() < 1e-6, "{} {}", tree.id, segment.to);
        }
    }
    assert_eq!(trees, 2);
}
