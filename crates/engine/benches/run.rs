//! How long the sizing of one run takes.

#[cfg(not(target_family = "wasm"))]
use criterion::{Criterion, criterion_group, criterion_main};
use engine::entry::Entry;
use engine::family::CodeFamily;
use engine::run::{Ask, Kind, assess, reach, size};
use std::hint::black_box;
#[cfg(target_family = "wasm")]
use wasm_bindgen_test::{Criterion, wasm_bindgen_bench};

fn feeder(family: CodeFamily) -> Ask {
    Ask {
        kind: Entry::Typed(Kind::DcFeeder),
        current: Entry::of(40.0),
        voltage: Entry::of(24.0),
        length: Entry::of(18.0),
        ambient: Entry::of(45.0),
        family: Entry::Typed(family),
        ..Ask::default()
    }
}

#[cfg_attr(target_family = "wasm", wasm_bindgen_bench)]
fn runs(c: &mut Criterion) {
    for family in CodeFamily::ALL {
        let ask = feeder(family);
        c.bench_function(&format!("size one run, {}", family.name()), |b| b.iter(|| size(black_box(&ask))));
    }
    let ask = feeder(CodeFamily::NorthAmerica);
    c.bench_function("assess one run", |b| b.iter(|| assess(black_box(&ask))));
    let inverter = Ask { kind: Entry::Typed(Kind::InverterFeed), current: Entry::of(600.0), ..ask };
    c.bench_function("size one run of several side by side", |b| b.iter(|| size(black_box(&inverter))));
    let truck = Ask { size: Entry::of(10.0), current: Entry::Blank, ..ask };
    c.bench_function("reach of a cable", |b| b.iter(|| reach(black_box(&truck))));
}

#[cfg(not(target_family = "wasm"))]
criterion_group!(benches, runs);
#[cfg(not(target_family = "wasm"))]
criterion_main!(benches);

/// The runner calls the benches by itself.
#[cfg(target_family = "wasm")]
fn main() {}
