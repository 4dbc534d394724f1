//! How long the single-diode model takes: a fit to a nameplate, and points of the curve.

use core::hint::black_box;

#[cfg(not(target_family = "wasm"))]
use criterion::{Criterion, criterion_group, criterion_main};
use engine::diode::{Nameplate, fit, fit_nearest};
use engine::quantity::{Amps, AmpsPerKelvin, Celsius, Volts, VoltsPerKelvin, WattsPerSquareMetre};
#[cfg(target_family = "wasm")]
use wasm_bindgen_test::{Criterion, wasm_bindgen_bench};

/// An invented module of 72 cells.
const PLATE: Nameplate = Nameplate {
    isc: Amps::new(9.44),
    voc: Volts::new(46.9),
    imp: Amps::new(8.87),
    vmp: Volts::new(38.3),
    voc_coefficient: VoltsPerKelvin::new(-0.15),
    isc_coefficient: AmpsPerKelvin::new(0.0048),
};

#[cfg_attr(target_family = "wasm", wasm_bindgen_bench)]
fn diode(criterion: &mut Criterion) {
    criterion.bench_function("diode/fit", |bench| bench.iter(|| fit(black_box(&PLATE))));

    let square = Nameplate { vmp: Volts::new(40.6), imp: Amps::new(9.1), ..PLATE };
    criterion.bench_function("diode/fit_nearest where the coefficient gives way", |bench| {
        bench.iter(|| fit_nearest(black_box(&square)));
    });

    let module = fit(&PLATE).expect("the plate above is one that fits");
    let weather = [(1000.0, 25.0), (1100.0, -40.0), (800.0, 45.0), (200.0, 5.0), (50.0, 75.0)]
        .map(|(sun, cell)| (WattsPerSquareMetre::new(sun), Celsius::new(cell)));
    criterion.bench_function("diode/greatest power in five weathers", |bench| {
        bench.iter(|| {
            weather.map(|(sun, cell)| module.at(black_box(sun), cell).and_then(|curve| curve.greatest_power()))
        });
    });
    criterion.bench_function("diode/open circuit in five weathers", |bench| {
        bench.iter(|| {
            weather.map(|(sun, cell)| module.at(black_box(sun), cell).and_then(|curve| curve.open_circuit_voltage()))
        });
    });
}

#[cfg(not(target_family = "wasm"))]
criterion_group!(benches, diode);
#[cfg(not(target_family = "wasm"))]
criterion_main!(benches);

/// The runner calls the benches by itself.
#[cfg(target_family = "wasm")]
fn main() {}
