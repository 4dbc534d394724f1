//! How long the network solves take.

#[cfg(not(target_family = "wasm"))]
use criterion::{Criterion, criterion_group, criterion_main};
use engine::check::Steps;
use engine::network::{Behind, Network};
use engine::quantity::{Amps, Ohms, Volts, Watts};
use engine::sharing::{Arrangement, Paralleled, share};
use std::hint::black_box;
#[cfg(target_family = "wasm")]
use wasm_bindgen_test::{Criterion, wasm_bindgen_bench};

#[cfg_attr(target_family = "wasm", wasm_bindgen_bench)]
fn sharing(bench: &mut Criterion) {
    let strings = [Behind { emf: Volts::new(52.8), resistance: Ohms::new(0.005) }; 6];
    let ties = [Ohms::new(0.000_12); 5];
    for (name, arrangement) in [("same end", Arrangement::SameEnd), ("middle", Arrangement::Middle)] {
        let (positive, negative) = arrangement.take_offs(6);
        let bank = Paralleled { strings: &strings, positive_ties: &ties, negative_ties: &ties, positive, negative };
        bench.bench_function(&format!("share 6 strings, {name}"), |run| {
            run.iter(|| share(black_box(bank), Amps::new(300.0), &mut Steps::silent()));
        });
    }
}

/// A trunk of `taps` taps, each with a draw of constant power.
fn trunk(taps: usize) -> Network {
    let mut network = Network::new();
    let (back, mut here) = (network.node("back"), network.node("post"));
    network.refer_to(back);
    network.source(here, back, Behind { emf: Volts::new(25.6), resistance: Ohms::new(0.012) });
    for _ in 0..taps {
        let next = network.node("tap");
        network.resistor(here, next, Ohms::new(0.004));
        network.draw_power(next, back, Watts::new(300.0 / taps as f64));
        here = next;
    }
    network
}

#[cfg_attr(target_family = "wasm", wasm_bindgen_bench)]
fn draws(bench: &mut Criterion) {
    for taps in [1, 10, 100] {
        let network = trunk(taps);
        bench
            .bench_function(&format!("trunk of {taps} draws of power"), |run| run.iter(|| black_box(&network).solve()));
    }
    let source = Behind { emf: Volts::new(52.0), resistance: Ohms::new(0.019_96) };
    bench.bench_function("one draw in closed form", |run| {
        run.iter(|| black_box(source).under(black_box(Watts::new(7491.5)), &mut Steps::silent()));
    });
}

#[cfg(not(target_family = "wasm"))]
criterion_group!(benches, sharing, draws);
#[cfg(not(target_family = "wasm"))]
criterion_main!(benches);

/// The runner calls the benches by itself.
#[cfg(target_family = "wasm")]
fn main() {}
