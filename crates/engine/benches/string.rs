//! How long strings and layouts take.

#[cfg(not(target_family = "wasm"))]
use criterion::{Criterion, criterion_group, criterion_main};
use engine::controller::Controller;
use engine::entry::Entry;
use engine::field::Field;
use engine::pad::Pad;
use engine::string::{Ask, assess, change, layouts};
use engine::unit::Unit;
#[cfg(target_family = "wasm")]
use wasm_bindgen_test::{Criterion, wasm_bindgen_bench};

struct Ridge;

impl Pad for Ridge {
    fn typed(&self, field: Field) -> (&str, Option<Unit>) {
        let text = match field {
            Field::Voc => "49.3",
            Field::Vmp => "41.1",
            Field::Isc => "11.6",
            Field::Imp => "10.9",
            Field::VocCoefficient => "-0.27",
            Field::SeriesFuseRating => "25",
            Field::SystemVoltage => "1500",
            Field::RecordLow => "-31",
            Field::RecordHigh => "34",
            Field::InputLimit => "150",
            Field::WindowLow => "60",
            Field::WindowHigh => "145",
            Field::PvCurrentLimit => "60",
            Field::OutputCurrent => "80",
            Field::HighestCharge => "56",
            Field::Series => "2",
            Field::Strings => "4",
            _ => "",
        };
        (text, None)
    }
}

#[cfg_attr(target_family = "wasm", wasm_bindgen_bench)]
fn strings(c: &mut Criterion) {
    let ask = Ask::read(&Ridge);
    c.bench_function("read the fields of a string", |b| b.iter(|| Ask::read(&Ridge)));
    c.bench_function("assess one array", |b| b.iter(|| assess(std::hint::black_box(&ask))));
    let equal = [ask.controller; 4];
    let unequal: [Controller; 4] = [150.0, 100.0, 250.0, 145.0].map(|limit| Controller {
        input_limit: Entry::of(limit),
        window_high: Entry::Blank,
        ..ask.controller
    });
    c.bench_function("layouts of 24 modules on 4 equal controllers", |b| b.iter(|| layouts(&ask, 24, &equal)));
    c.bench_function("layouts of 24 modules on 4 unequal controllers", |b| b.iter(|| layouts(&ask, 24, &unequal)));
    c.bench_function("smallest change for 10 modules", |b| {
        b.iter(|| change::changes(&ask, 10, &[ask.controller]));
    });
}

#[cfg(not(target_family = "wasm"))]
criterion_group!(benches, strings);
#[cfg(not(target_family = "wasm"))]
criterion_main!(benches);

/// The runner calls the benches by itself.
#[cfg(target_family = "wasm")]
fn main() {}
