//! How long a start, a set of loads and a whole site take.

#[cfg(not(target_family = "wasm"))]
use criterion::{Criterion, criterion_group, criterion_main};
use engine::chemistry::Chemistry;
use engine::entry::Entry;
use engine::family::CodeFamily;
use engine::network::Behind;
use engine::quantity::{Ohms, Volts, Watts};
use engine::site::{Got, assess as assess_site, start as new_site};
use engine::start::{Ask, Class, Draws, Limits, Switched, assess, together};
#[cfg(target_family = "wasm")]
use wasm_bindgen_test::{Criterion, wasm_bindgen_bench};

#[cfg_attr(target_family = "wasm", wasm_bindgen_bench)]
fn starts(c: &mut Criterion) {
    let ask = Ask {
        load: Entry::Typed(Class::WellPump),
        running: Entry::of(900.0),
        inverter_continuous: Entry::of(3000.0),
        inverter_surge: Entry::of(6000.0),
        cut_off: Entry::of(44.0),
        bank_voltage: Entry::of(52.0),
        ..Ask::default()
    };
    c.bench_function("assess one start", |b| b.iter(|| assess(std::hint::black_box(&ask))));
    let loads: Vec<Switched> = (1..=14)
        .map(|step| {
            let watts = 80.0 * f64::from(step);
            Switched { running: Draws::of(Watts::new(watts), 0.8), starting: Draws::of(Watts::new(watts * 4.0), 0.5) }
        })
        .collect();
    let limits = Limits {
        continuous: 5000.0,
        surge: 12_000.0,
        efficiency: 0.88,
        bus: Behind { emf: Volts::new(52.0), resistance: Ohms::new(0.012) },
        cut_off: Volts::new(44.0),
        base: Draws::default(),
    };
    c.bench_function("every set of 14 loads", |b| b.iter(|| together(std::hint::black_box(&loads), &limits)));
    let got =
        Got { family: CodeFamily::Iec, coldest: -31, modules: 8, chemistry: Chemistry::Lfp, bus: 48, inverter: 3000 };
    let site = new_site(got);
    c.bench_function("assess a whole site", |b| b.iter(|| assess_site(std::hint::black_box(&site))));
}

#[cfg(not(target_family = "wasm"))]
criterion_group!(benches, starts);
#[cfg(not(target_family = "wasm"))]
criterion_main!(benches);

/// The runner calls the benches by itself.
#[cfg(target_family = "wasm")]
fn main() {}
