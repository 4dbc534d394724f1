//! How long a bank takes: one assessment, and the layouts of the cells at hand.

#[cfg(not(target_family = "wasm"))]
use criterion::{Criterion, criterion_group, criterion_main};
use engine::bank::{Ask, assess, layouts};
use engine::chemistry::Chemistry;
use engine::entry::Entry;
use std::hint::black_box;
#[cfg(target_family = "wasm")]
use wasm_bindgen_test::{Criterion, wasm_bindgen_bench};

fn cells(count: f64) -> Ask {
    Ask {
        chemistry: Entry::Typed(Chemistry::Lfp),
        cell_voltage: Entry::of(3.2),
        cell_capacity: Entry::of(280.0),
        count: Entry::of(count),
        bus_voltage: Entry::of(48.0),
        coldest: Entry::of(5.0),
        greatest_load: Entry::of(3000.0),
        charge_current: Entry::of(80.0),
        ..Ask::default()
    }
}

#[cfg_attr(target_family = "wasm", wasm_bindgen_bench)]
fn bank(criterion: &mut Criterion) {
    let ask = cells(16.0).with_counts(16, 1);
    criterion.bench_function("assess a bank", |bencher| bencher.iter(|| assess(black_box(&ask))));
    for count in [16.0, 40.0, 400.0] {
        let ask = cells(count);
        let name = format!("layouts of {count} cells");
        criterion.bench_function(&name, |bencher| bencher.iter(|| layouts(black_box(&ask))));
    }
}

#[cfg(not(target_family = "wasm"))]
criterion_group!(benches, bank);
#[cfg(not(target_family = "wasm"))]
criterion_main!(benches);

/// The runner calls the benches by itself.
#[cfg(target_family = "wasm")]
fn main() {}
