//! How long every check of a whole site takes, for each of the demonstrations.

#[cfg(not(target_family = "wasm"))]
use criterion::{Criterion, criterion_group, criterion_main};
use std::hint::black_box;
#[cfg(target_family = "wasm")]
use wasm_bindgen_test::{Criterion, wasm_bindgen_bench};

#[cfg_attr(target_family = "wasm", wasm_bindgen_bench)]
fn sites(c: &mut Criterion) {
    for name in bridge::demo::names() {
        let site = bridge::demo::demo(name).expect("a demonstration opens");
        c.bench_function(&format!("assess {name}"), |b| b.iter(|| engine::site::assess(black_box(&site))));
    }
}

#[cfg(not(target_family = "wasm"))]
criterion_group!(benches, sites);
#[cfg(not(target_family = "wasm"))]
criterion_main!(benches);
#[cfg(target_family = "wasm")]
fn main() {}
