//! Heating of cables in a short circuit: the constants of IEC 60364-4-43, and cases computed from them.

use engine::check::Steps;
use engine::fault::{Core, HeatConstant, least_area, longest, withstands};
use engine::quantity::{Amps, Seconds, SquareMillimetres};
use published::table;
use serde::Deserialize;

const ADIABATIC: &str = include_str!("../data/adiabatic.toml");

#[derive(Deserialize)]
struct Constant {
    metal: String,
    insulation: String,
    k: f64,
}

#[derive(Deserialize)]
struct Case {
    metal_insulation: String,
    area_mm2: f64,
    k: f64,
    fault_amp: f64,
    max_time_s: f64,
}

fn core(metal: &str, insulation: &str) -> Core {
    match (metal, insulation.starts_with('x') || insulation.starts_with('X')) {
        ("cu", false) => Core::CopperPvc,
        ("cu", true) => Core::CopperXlpe,
        ("al", false) => Core::AluminiumPvc,
        ("al", true) => Core::AluminiumXlpe,
        (other, _) => panic!("no metal {other}"),
    }
}

#[test]
fn constants_of_the_table() {
    let rows = table::<Constant>(ADIABATIC, "adiabatic_k");
    assert_eq!(rows.len(), 6);
    for row in rows {
        let core = core(&row.says.metal, &row.says.insulation);
        let areas: &[f64] = match &row.says.insulation {
            thick if thick.contains("above 300") => &[300.1, 400.0],
            thin if thin.contains("to 300") => &[1.5, 300.0],
            _ => &[1.5, 300.0, 400.0],
        };
        for area in areas {
            let ours = HeatConstant::of(core, SquareMillimetres::new(*area)).get();
            assert_eq!(ours, row.says.k, "{core:?} {area} mm², {}", row.source);
        }
    }
}

/// Times are printed to six decimals.
#[test]
fn longest_times_of_the_cases() {
    let rows = table::<Case>(ADIABATIC, "adiabatic_case");
    assert_eq!(rows.len(), 4);
    for row in rows {
        let case = row.says;
        let (metal, insulation) = case.metal_insulation.split_once(' ').unwrap();
        let core = core(metal, insulation);
        let (area, current) = (SquareMillimetres::new(case.area_mm2), Amps::new(case.fault_amp));
        assert_eq!(HeatConstant::of(core, area).get(), case.k, "{}", row.source);
        let time = longest(core, area, current, &mut Steps::silent()).unwrap().get();
        assert!((time - case.max_time_s).abs() <= 0.5e-6, "{core:?}: {time} s, {}", row.source);

        let lives =
            |times: f64| withstands(core, area, current, Seconds::new(time * times), &mut Steps::silent()).unwrap();
        assert!(lives(1.0) && !lives(1.001));
        let least = least_area(core, current, Seconds::new(time), &mut Steps::silent()).unwrap();
        assert!((least.get() - case.area_mm2).abs() < 1e-9);
    }
}
