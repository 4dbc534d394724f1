//! Cell temperatures against the published formula, worked out elsewhere.

use engine::cell_temperature::{NOCT_AIR, NOCT_IRRADIANCE, by_noct};
use engine::quantity::{Celsius, WattsPerSquareMetre};
use published::table;
use serde::Deserialize;

const PV: &str = include_str!("../data/pv.toml");

#[derive(Deserialize)]
struct NoctCase {
    noct_degc: f64,
    ambient_degc: f64,
    g_w_per_m2: f64,
    cell_degc: f64,
}

#[derive(Deserialize)]
struct Condition {
    name: String,
    g_w_per_m2: f64,
    ambient_degc: Option<f64>,
}

#[test]
fn cells_by_noct() {
    for row in table::<NoctCase>(PV, "noct_case") {
        let case = row.says;
        let air = Celsius::new(case.ambient_degc);
        let cell = by_noct(air, Celsius::new(case.noct_degc), WattsPerSquareMetre::new(case.g_w_per_m2));
        // The cases are exact in four decimals.
        assert!((cell.get() - case.cell_degc).abs() < 1e-9, "{cell:?}, {} has {}", row.source, case.cell_degc);
    }
}

#[test]
fn noct_is_measured_where_the_standard_says() {
    let conditions = table::<Condition>(PV, "condition");
    let noct = &conditions.iter().find(|row| row.says.name == "NOCT").unwrap().says;
    assert_eq!(NOCT_IRRADIANCE.get(), noct.g_w_per_m2);
    assert_eq!(Some(NOCT_AIR.get()), noct.ambient_degc);
}
