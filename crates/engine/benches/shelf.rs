//! How long a shelf and a matching take.

#[cfg(not(target_family = "wasm"))]
use criterion::{Criterion, criterion_group, criterion_main};
use engine::matching::deal;
use engine::quantity::{AmpHours, Metres, Volts};
use engine::shelf::{Cell, CellVolts, Parallel, Posts, Shelf, Stand, TakeOff, Wiring, Wish, lay_out};
use std::hint::black_box;
#[cfg(target_family = "wasm")]
use wasm_bindgen_test::{Criterion, wasm_bindgen_bench};

fn mm(number: f64) -> Metres {
    Metres::new(number / 1000.0)
}

#[cfg_attr(target_family = "wasm", wasm_bindgen_bench)]
fn shelves(c: &mut Criterion) {
    let cell = Cell::new(mm(174.0), mm(72.0), Posts::Ends, mm(26.0)).expect("a cell");
    let volts = CellVolts::new(Volts::new(3.2), Volts::new(3.3), Volts::new(3.35)).expect("rising");
    for (rows, columns) in [(2, 8), (4, 10), (8, 12)] {
        let shelf = Shelf::new(rows, columns, cell, Stand::SideBySide, mm(2.0), mm(60.0)).expect("a shelf");
        let wiring = Wiring::new(rows * columns, 1, Parallel::SeparateStrings).expect("cells");
        let wish = Wish { take_off: TakeOff::SameSide, ..Wish::default() };
        c.bench_function(&format!("shelf of {rows} by {columns}, same side"), |b| {
            b.iter(|| lay_out(black_box(&shelf), &wiring, volts, wish));
        });
    }
}

#[cfg_attr(target_family = "wasm", wasm_bindgen_bench)]
fn matching(c: &mut Criterion) {
    let cells: Vec<AmpHours> = (0..200u32).map(|i| AmpHours::new(240.0 + f64::from(i * 7919 % 401) / 10.0)).collect();
    for groups in [2, 20, 50] {
        c.bench_function(&format!("match 200 cells to {groups} groups"), |b| {
            b.iter(|| deal(black_box(&cells), groups));
        });
    }
}

#[cfg(not(target_family = "wasm"))]
criterion_group!(benches, shelves, matching);
#[cfg(not(target_family = "wasm"))]
criterion_main!(benches);

/// The runner calls the benches by itself.
#[cfg(target_family = "wasm")]
fn main() {}
