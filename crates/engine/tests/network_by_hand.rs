//! Networks that can be done on paper, and every way in which one has no answer.

use engine::check::Steps;
use engine::network::{Behind, MOST_NODES, Network, NetworkError, Node};
use engine::quantity::{Amps, Ohms, Volts, Watts};
use engine::sharing::{Arrangement, Paralleled, SharingError, TakeOff, share};

fn source(volts: f64, ohms: f64) -> Behind {
    Behind { emf: Volts::new(volts), resistance: Ohms::new(ohms) }
}

/// A network with a reference and one node over it.
fn pair() -> (Network, Node, Node) {
    let mut network = Network::new();
    let (plus, back) = (network.node("plus"), network.node("back"));
    network.refer_to(back);
    (network, plus, back)
}

#[test]
fn an_ideal_source_gives_what_is_asked_of_it() {
    let (mut network, plus, back) = pair();
    let cell = network.source(plus, back, source(12.0, 0.0));
    let lamp = network.resistor(plus, back, Ohms::new(4.0));
    let fan = network.draw_power(plus, back, Watts::new(24.0));
    let found = network.solve().unwrap();
    assert_eq!(found.current(cell).unwrap().get(), 5.0);
    assert_eq!(found.power(cell).unwrap().get(), -60.0);
    assert_eq!(found.power(lamp).unwrap().get(), 36.0);
    assert_eq!(found.current(fan).unwrap().get(), 2.0);
    assert!(found.imbalance().get().abs() < 1e-12);
}

#[test]
fn a_tie_without_resistance_carries_a_current_all_the_same() {
    let (mut network, plus, back) = pair();
    let far = network.node("far");
    network.source(plus, back, source(10.0, 1.0));
    let tie = network.resistor(plus, far, Ohms::default());
    network.resistor(far, back, Ohms::new(4.0));
    let found = network.solve().unwrap();
    assert!((found.current(tie).unwrap().get() - 2.0).abs() < 1e-12);
    assert!((found.across(plus, far).unwrap()).get().abs() < 1e-12);
}

/// The smaller a tie, the less it matters; no step where the one form of equation takes over from the other.
#[test]
fn next_to_no_resistance_is_like_none() {
    let lamp = |tie: f64| {
        let (mut network, plus, back) = pair();
        let far = network.node("far");
        network.source(plus, back, source(10.0, 1.0));
        network.resistor(plus, far, Ohms::new(tie));
        let lamp = network.resistor(far, back, Ohms::new(4.0));
        network.solve().unwrap().current(lamp).unwrap().get()
    };
    for tie in [1e-12, 1e-9, 9.99e-7, 1e-6, 1.01e-6, 1e-4] {
        assert!((lamp(tie) - 10.0 / (5.0 + tie)).abs() < 1e-9, "{tie} Ω: {} A", lamp(tie));
    }
}

#[test]
fn an_open_breaker_carries_nothing_and_what_hangs_behind_it_floats() {
    let (mut network, plus, back) = pair();
    let far = network.node("far side of the breaker");
    let bank = network.source(plus, back, source(24.0, 0.01));
    let breaker = network.resistor(plus, far, Ohms::new(0.001));
    let inverter = network.draw_power(far, back, Watts::new(500.0));
    assert!(network.solve().unwrap().current(breaker).unwrap().get() > 20.0);
    network.open(breaker);
    let error = network.solve().unwrap_err();
    assert!(matches!(&error, NetworkError::Floating { node, .. } if *node == far));
    assert_eq!(error.to_string(), "nothing ties \"far side of the breaker\" to the reference");
    assert_eq!(network.cut_off().unwrap(), [far]);
    // What is left still has its answer.
    let found = network.solve_tied().unwrap();
    assert_eq!(found.volts(far), None);
    assert_eq!(found.current(inverter), None);
    assert_eq!(found.current(breaker), Some(Amps::default()));
    assert_eq!(found.current(bank).unwrap().get(), 0.0);
    assert!((found.volts(plus).unwrap().get() - 24.0).abs() < 1e-12);
    network.close(breaker);
    assert!(network.solve().is_ok());
}

#[test]
fn a_draw_alone_ties_nothing() {
    let (mut network, plus, back) = pair();
    let lost = network.node("lost");
    network.source(plus, back, source(24.0, 0.01));
    network.draw_current(plus, lost, Amps::new(1.0));
    network.draw_current(lost, back, Amps::new(1.0));
    assert!(matches!(network.solve(), Err(NetworkError::Floating { node, .. }) if node == lost));
}

#[test]
fn without_a_reference_nothing_is_answered() {
    let mut network = Network::new();
    assert_eq!(network.solve(), Err(NetworkError::NoReference));
    let (a, b) = (network.node("a"), network.node("b"));
    network.source(a, b, source(12.0, 0.1));
    assert_eq!(network.solve(), Err(NetworkError::NoReference));
}

#[test]
fn a_lone_reference_stands_at_nothing() {
    let mut network = Network::new();
    let only = network.node("only");
    network.refer_to(only);
    assert_eq!(network.solve().unwrap().volts(only).unwrap().get(), 0.0);
}

#[test]
fn two_ideal_sources_side_by_side_are_refused() {
    let (mut network, plus, back) = pair();
    network.source(plus, back, source(12.0, 0.0));
    let second = network.source(plus, back, source(12.5, 0.0));
    assert_eq!(network.solve(), Err(NetworkError::BareLoop { element: second }));
    network.open(second);
    assert!(network.solve().is_ok());
}

#[test]
fn resistances_too_far_apart_are_said_and_not_guessed() {
    let (mut network, plus, back) = pair();
    let far = network.node("far");
    // Two nodes tied by 10 µΩ hang on the reference by a gigohm each: their volts are lost in the rounding.
    network.source(plus, back, source(12.0, 1e9));
    network.resistor(plus, far, Ohms::new(1e-5));
    network.resistor(far, back, Ohms::new(1e9));
    assert_eq!(network.solve(), Err(NetworkError::Singular));
}

#[test]
fn what_cannot_be_meant_is_named() {
    let (mut network, plus, back) = pair();
    network.source(plus, back, source(12.0, 0.1));
    let odd = network.resistor(plus, back, Ohms::new(-1.0));
    assert_eq!(network.solve(), Err(NetworkError::NotPossible { element: odd }));

    let (mut network, plus, back) = pair();
    let mut other = Network::new();
    let stranger = (0..5).map(|_| other.node("x")).last().unwrap();
    network.source(plus, back, source(12.0, 0.1));
    let odd = network.resistor(plus, stranger, Ohms::new(1.0));
    assert_eq!(network.solve(), Err(NetworkError::UnknownNode { element: Some(odd) }));

    let (mut network, _, _) = pair();
    for _ in 0..MOST_NODES {
        network.node("more");
    }
    assert_eq!(network.solve(), Err(NetworkError::TooLarge { nodes: MOST_NODES + 2, elements: 0 }));
}

#[test]
fn a_draw_of_power_across_nothing_or_the_wrong_way_round_is_unfed() {
    let (mut network, plus, back) = pair();
    network.resistor(plus, back, Ohms::new(1.0));
    let dead = network.draw_power(plus, back, Watts::new(10.0));
    assert_eq!(network.solve(), Err(NetworkError::Unfed { element: dead }));

    let (mut network, plus, back) = pair();
    network.source(plus, back, source(12.0, 0.1));
    let reversed = network.draw_power(back, plus, Watts::new(10.0));
    assert_eq!(network.solve(), Err(NetworkError::Unfed { element: reversed }));
}

#[test]
fn a_collapse_is_said_and_names_the_draw_that_fell_furthest() {
    let (mut network, plus, back) = pair();
    let far = network.node("far");
    // 24 V behind 0.1 Ω and 0.1 Ω more: 720 W is the most at the far end.
    network.source(plus, back, source(24.0, 0.1));
    network.resistor(plus, far, Ohms::new(0.1));
    network.draw_power(plus, back, Watts::new(100.0));
    let pump = network.draw_power(far, back, Watts::new(700.0));
    assert_eq!(network.solve(), Err(NetworkError::NoOperatingPoint { element: pump }));
}

#[test]
fn the_very_edge_of_collapse_still_has_its_answer() {
    let at = |watts| {
        let (mut network, plus, back) = pair();
        network.source(plus, back, source(10.0, 1.0));
        network.draw_power(plus, back, Watts::new(watts));
        network.solve().map(|found| found.volts(plus).unwrap().get())
    };
    // 25 W is the most there is, at 5 V; there the volts move by the root of any rounding.
    assert!((at(25.0).unwrap() - 5.0).abs() < 1e-5);
    assert!((at(24.999_999).unwrap() - 5.001).abs() < 1e-6);
    assert!(matches!(at(25.000_001), Err(NetworkError::NoOperatingPoint { .. })));
}

/// With a feed the iteration cannot only fall: the draws are turned up together.
#[test]
fn a_feed_beside_a_draw_is_followed_from_rest() {
    let at = |watts| {
        let (mut network, plus, back) = pair();
        network.source(plus, back, source(10.0, 1.0));
        network.draw_power(plus, back, Watts::new(watts + 9.0));
        network.draw_power(plus, back, Watts::new(-9.0));
        network.solve().map(|found| found.volts(plus).unwrap().get())
    };
    assert!((at(16.0).unwrap() - 8.0).abs() < 1e-9);
    assert!((at(-11.0).unwrap() - 11.0).abs() < 1e-9);
    assert!((at(24.99).unwrap() - (5.0 + 0.01f64.sqrt())).abs() < 1e-9);
    assert!(matches!(at(25.01), Err(NetworkError::NoOperatingPoint { .. })));
}

/// Two draws end to end across one source drag each other up, not down: also followed from rest.
#[test]
fn draws_in_series_share_the_volts() {
    let (mut network, plus, back) = pair();
    let middle = network.node("middle");
    network.source(plus, back, source(48.0, 0.5));
    network.resistor(plus, middle, Ohms::new(2.0));
    network.resistor(middle, back, Ohms::new(2.0));
    let upper = network.draw_power(plus, middle, Watts::new(40.0));
    network.draw_power(middle, back, Watts::new(40.0));
    let found = network.solve().unwrap();
    let half = found.volts(middle).unwrap().get();
    assert!((found.volts(plus).unwrap().get() - 2.0 * half).abs() < 1e-9);
    // One half: V over 2 Ω and 40 W, behind 24 V and 0.25 Ω.
    let amps = half / 2.0 + 40.0 / half;
    assert!((24.0 - 0.25 * amps - half).abs() < 1e-9);
    assert!((found.power(upper).unwrap().get() - 40.0).abs() < 1e-9);
}

#[test]
fn a_network_seen_from_two_nodes_is_one_source() {
    let (mut network, plus, back) = pair();
    let post = network.node("post");
    // 12 V and 14 V behind 10 mΩ each: 13 V behind 5 mΩ; 5 mΩ of cable; 10 A drawn at its end all the while.
    network.source(plus, back, source(12.0, 0.010));
    network.source(plus, back, source(14.0, 0.010));
    network.resistor(plus, post, Ohms::new(0.005));
    network.draw_current(post, back, Amps::new(10.0));
    network.draw_power(post, back, Watts::new(100.0));
    let seen = network.seen_from(post, back).unwrap();
    assert!((seen.emf.get() - 12.9).abs() < 1e-9, "{seen:?}");
    assert!((seen.resistance.get() - 0.010).abs() < 1e-12, "{seen:?}");
    // And the draw of power stands where the closed form puts it.
    let closed = seen.under(Watts::new(100.0), &mut Steps::silent()).unwrap();
    let found = network.solve().unwrap();
    assert!((found.volts(post).unwrap() - closed.volts).get().abs() < 1e-9);
    assert_eq!(network.seen_from(post, post).unwrap().resistance.get(), 0.0);
}

#[test]
fn strings_ties_and_take_offs_have_to_fit() {
    let strings = [source(26.0, 0.012); 3];
    let ties = [Ohms::new(0.001); 2];
    let bank = Paralleled {
        strings: &strings,
        positive_ties: &ties,
        negative_ties: &ties,
        positive: TakeOff::At(0),
        negative: TakeOff::At(0),
    };
    let share = |bank| share(bank, Amps::new(30.0), &mut Steps::silent()).map(|found| found.hardest);
    assert_eq!(share(bank), Ok(0));
    assert_eq!(share(Paralleled { strings: &[], ..bank }), Err(SharingError::Strings { count: 0 }));
    let error = share(Paralleled { negative_ties: &ties[1..], ..bank });
    assert_eq!(error, Err(SharingError::Ties { needed: 2, positive: 2, negative: 1 }));
    for take_off in [TakeOff::At(3), TakeOff::After(2)] {
        let error = share(Paralleled { positive: take_off, ..bank });
        assert_eq!(error, Err(SharingError::TakeOff(take_off)));
    }
    // One string has no ties and carries all.
    let (positive, negative) = Arrangement::Middle.take_offs(1);
    let one = Paralleled { strings: &strings[..1], positive_ties: &[], negative_ties: &[], positive, negative };
    assert_eq!(share(one), Ok(0));
}

#[test]
fn at_rest_there_is_nothing_to_share_though_currents_flow() {
    let strings = [source(13.0, 0.01), source(12.8, 0.01)];
    let ties = [Ohms::new(0.0)];
    let (positive, negative) = Arrangement::SameEnd.take_offs(2);
    let bank = Paralleled { strings: &strings, positive_ties: &ties, negative_ties: &ties, positive, negative };
    let found = share(bank, Amps::default(), &mut Steps::silent()).unwrap();
    assert_eq!(found.greatest_over_even, None);
    assert!((found.currents[0].get() - 10.0).abs() < 1e-9);
}

/// Charging, the hardest string is the one that takes most, not the one whose current is the highest number.
#[test]
fn when_charging_the_hardest_string_takes_most() {
    let strings = [source(13.0, 0.01), source(12.8, 0.01)];
    let ties = [Ohms::new(0.0)];
    let (positive, negative) = Arrangement::SameEnd.take_offs(2);
    let bank = Paralleled { strings: &strings, positive_ties: &ties, negative_ties: &ties, positive, negative };
    let mut written = Steps::written();
    let found = share(bank, Amps::new(-40.0), &mut written).unwrap();
    assert_eq!(found.hardest, 1);
    assert!((found.greatest_over_even.unwrap() - 1.5).abs() < 1e-9);
    assert_eq!(Some(written.steps().last().unwrap().result.number), found.greatest_over_even);
}

/// What rounding leaves across two posts that ought to be equal is not a voltage to draw from.
#[test]
fn a_draw_across_equal_posts_is_unfed_whichever_way_the_rounding_falls() {
    for turned in [false, true] {
        let (mut network, plus, back) = pair();
        let (left, right) = (network.node("left"), network.node("right"));
        network.source(plus, back, source(13.3, 0.007));
        for post in [left, right] {
            network.resistor(plus, post, Ohms::new(0.3));
            network.resistor(post, back, Ohms::new(0.7));
        }
        let (a, b) = if turned { (right, left) } else { (left, right) };
        let draw = network.draw_power(a, b, Watts::new(10.0));
        assert_eq!(network.solve(), Err(NetworkError::Unfed { element: draw }));
    }
}

/// A feed across next to nothing lifts its volts far above those at rest; that is no collapse.
#[test]
fn a_feed_may_lift_its_volts_far_above_rest() {
    let (mut network, plus, back) = pair();
    let far = network.node("far");
    // 12 µV at rest across 1 µΩ of a circuit of 1 Ω in all.
    network.source(plus, back, source(12.0, 0.999_999));
    network.resistor(plus, far, Ohms::new(1e-6));
    network.resistor(far, back, Ohms::new(1e-9));
    network.draw_power(plus, far, Watts::new(-100.0));
    let found = network.solve().unwrap();
    // u² = Z · 100 W, but for the volts at rest: 10 mV.
    assert!((found.across(plus, far).unwrap().get() - 0.010_006).abs() < 1e-7, "{found:?}");
    assert!(found.imbalance().get().abs() < 1e-6);
}
