//! Sizes and resistances of conductors, cell by cell, and drops computed from them.

use engine::conductor::{AMERICAN, Conductor, METRIC, Metal, Size, resistance, temperature_factor};
use engine::quantity::{Celsius, SquareMillimetres};
use engine::unit::{Unit, awg_area};
use published::table;
use serde::Deserialize;

const DATA: &str = include_str!("../data/conductors.toml");
const THOUSAND_FEET: f64 = 304.8;

fn american(words: &str) -> Size {
    let size = AMERICAN.iter().find(|size| {
        let word = size.to_string();
        word == format!("{words} AWG") || word == format!("{words} kcmil")
    });
    *size.unwrap_or_else(|| panic!("{words} is not on the ladder"))
}

fn metric(area: f64) -> Size {
    let size = Size::of_area(SquareMillimetres::new(area));
    assert!(METRIC.contains(&size), "{area} mm² is not on the ladder");
    size
}

fn near(value: f64, figure: f64, within: f64, what: &str) {
    assert!((value - figure).abs() <= within * figure.abs(), "{what}: {value} for {figure}");
}

#[derive(Deserialize)]
struct Gauge {
    size: String,
    n: f64,
    diameter_mm: f64,
    area_mm2: f64,
    area_cmil: f64,
}

#[test]
fn every_gauge_has_its_area() {
    let rows = table::<Gauge>(DATA, "awg");
    assert_eq!(rows.len(), 22);
    let mut on_ladder = 0;
    for row in &rows {
        let gauge = &row.says;
        let area = awg_area(gauge.n);
        near(area, gauge.area_mm2, 1e-6, &gauge.size);
        near((area / core::f64::consts::FRAC_PI_4).sqrt(), gauge.diameter_mm, 1e-6, &gauge.size);
        // Printed to a tenth of a circular mil.
        near(Unit::Kcmil.from_base(area) * 1000.0, gauge.area_cmil, 0.06 / gauge.area_cmil, &gauge.size);
        if let Some(size) = AMERICAN.iter().find(|size| **size == Size::Gauge(gauge.n as i8)) {
            near(size.area().get(), gauge.area_mm2, 1e-6, &gauge.size);
            on_ladder += 1;
        }
    }
    assert_eq!(on_ladder, 15);
}

#[derive(Deserialize)]
struct Kcmil {
    size: String,
    area_mm2: f64,
}

#[test]
fn every_size_in_circular_mils_has_its_area() {
    for row in table::<Kcmil>(DATA, "kcmil") {
        near(american(&row.says.size).area().get(), row.says.area_mm2, 1e-6, &row.says.size);
    }
}

#[derive(Deserialize)]
struct Table8 {
    size: String,
    #[serde(default)]
    area_cmil: f64,
    cu_uncoated_ohm_per_kft: f64,
    cu_coated_ohm_per_kft: f64,
    al_ohm_per_kft: f64,
}

fn at_75_c(conductor: Conductor, size: Size) -> f64 {
    resistance(conductor, size, Celsius::new(75.0)).get() * THOUSAND_FEET
}

#[test]
fn every_cell_of_table_8() {
    let rows = table::<Table8>(DATA, "nec_ch9_table8");
    assert_eq!(rows.len(), AMERICAN.len());
    for row in &rows {
        let (cells, size) = (&row.says, american(&row.says.size));
        let what = format!("{size}, {}", row.source);
        near(at_75_c(Conductor::CopperStranded, size), cells.cu_uncoated_ohm_per_kft, 1e-12, &what);
        near(at_75_c(Conductor::TinnedStranded, size), cells.cu_coated_ohm_per_kft, 1e-12, &what);
        near(at_75_c(Conductor::AluminiumStranded, size), cells.al_ohm_per_kft, 1e-12, &what);
        // The table rounds its areas to ten or a hundred circular mils.
        near(Unit::Kcmil.from_base(size.area().get()) * 1000.0, cells.area_cmil, 0.003, &what);
    }
}

#[test]
fn every_cell_of_table_8_for_solid_conductors() {
    let rows = table::<Table8>(DATA, "nec_ch9_table8_solid");
    assert_eq!(rows.len(), 6);
    for (at, row) in rows.iter().enumerate() {
        let (cells, size) = (&row.says, american(&row.says.size));
        let what = format!("{size}, {}", row.source);
        near(at_75_c(Conductor::CopperSolid, size), cells.cu_uncoated_ohm_per_kft, 1e-12, &what);
        // Tinned and aluminium solid wire is not offered; the cells are held for whoever adds it.
        assert_eq!(engine::conductor::TABLE_8_SOLID[at][1], cells.cu_coated_ohm_per_kft, "{what}");
        assert_eq!(engine::conductor::TABLE_8_SOLID[at][2], cells.al_ohm_per_kft, "{what}");
    }
}

/// Above the solid rows a solid wire is found from its metal: it stands within 3 % under the stranded row.
#[test]
fn a_thick_solid_wire_stands_just_under_the_stranded_row() {
    for row in table::<Table8>(DATA, "nec_ch9_table8").iter().filter(|row| row.says.area_cmil > 20_000.0) {
        let ratio = row.says.cu_uncoated_ohm_per_kft / at_75_c(Conductor::CopperSolid, american(&row.says.size));
        assert!((1.0..1.03).contains(&ratio), "{}: {ratio}", row.says.size);
    }
}

#[derive(Deserialize)]
struct Alpha {
    cu_alpha75_per_k: f64,
    al_alpha75_per_k: f64,
}

#[derive(Deserialize)]
struct Material {
    metal: String,
    resistivity_20c_ohm_mm2_per_m: f64,
    alpha20_per_k: f64,
    zero_resistance_degc: f64,
}

#[test]
fn the_two_metals() {
    let alpha = &table::<Alpha>(DATA, "nec_ch9_table8_alpha")[0];
    assert_eq!(Metal::Copper.coefficient_at_75_c(), alpha.says.cu_alpha75_per_k, "{}", alpha.source);
    assert_eq!(Metal::Aluminium.coefficient_at_75_c(), alpha.says.al_alpha75_per_k, "{}", alpha.source);
    for row in table::<Material>(DATA, "material") {
        let metal = if row.says.metal == "copper" { Metal::Copper } else { Metal::Aluminium };
        near(metal.resistivity(), row.says.resistivity_20c_ohm_mm2_per_m, 1e-15, &row.says.metal);
        assert_eq!(metal.coefficient(), row.says.alpha20_per_k, "{}", row.source);
        let zero = 20.0 - 1.0 / metal.coefficient();
        assert!((zero - row.says.zero_resistance_degc).abs() < 0.1, "{zero}");
    }
}

#[derive(Deserialize)]
struct Factor {
    t_degc: f64,
    cu: f64,
    al: f64,
}

#[test]
fn every_temperature_factor() {
    for row in table::<Factor>(DATA, "temperature_factor") {
        let at = Celsius::new(row.says.t_degc);
        near(temperature_factor(Metal::Copper, at), row.says.cu, 1e-9, "copper");
        near(temperature_factor(Metal::Aluminium, at), row.says.al, 1e-9, "aluminium");
    }
}

#[derive(Deserialize)]
struct Iec60228 {
    area_mm2: f64,
    class2_cu_plain_ohm_per_km: f64,
    class5_cu_plain_ohm_per_km: f64,
    class5_cu_coated_ohm_per_km: f64,
    class2_al_ohm_per_km: Option<f64>,
}

#[test]
fn every_cell_of_iec_60228() {
    let rows = table::<Iec60228>(DATA, "iec60228");
    assert_eq!(rows.len(), METRIC.len());
    for row in &rows {
        let (cells, size) = (&row.says, metric(row.says.area_mm2));
        let what = format!("{size}, {}", row.source);
        let at_20_c = |conductor| resistance(conductor, size, Celsius::new(20.0)).get() * 1000.0;
        near(at_20_c(Conductor::CopperStranded), cells.class2_cu_plain_ohm_per_km, 1e-12, &what);
        near(at_20_c(Conductor::CopperFine), cells.class5_cu_plain_ohm_per_km, 1e-12, &what);
        near(at_20_c(Conductor::TinnedFine), cells.class5_cu_coated_ohm_per_km, 1e-12, &what);
        if let Some(aluminium) = cells.class2_al_ohm_per_km {
            near(at_20_c(Conductor::AluminiumStranded), aluminium, 1e-12, &what);
        }
    }
}

#[derive(Deserialize)]
struct DropCase {
    ref_table: String,
    size: Option<String>,
    area_mm2: Option<f64>,
    metal: Option<String>,
    column: Option<String>,
    one_way_m: f64,
    amp: f64,
    drop_volt: f64,
}

/// Two-wire drops at the temperature of the table: 75 °C of table 8, 20 °C of IEC 60228.
#[test]
fn every_drop_case() {
    let rows = table::<DropCase>(DATA, "drop_case");
    assert_eq!(rows.len(), 11);
    for row in &rows {
        let case = &row.says;
        let by_length = if case.ref_table == "iec60228" {
            let conductor = match case.column.as_deref() {
                Some("class5_cu_coated") => Conductor::TinnedFine,
                Some("class5_cu_plain") => Conductor::CopperFine,
                Some("class2_cu_plain") => Conductor::CopperStranded,
                Some("class2_al") => Conductor::AluminiumStranded,
                column => panic!("no column {column:?}"),
            };
            resistance(conductor, metric(case.area_mm2.expect("a metric case")), Celsius::new(20.0))
        } else {
            let aluminium = case.metal.as_deref() == Some("al");
            let conductor = if aluminium { Conductor::AluminiumStranded } else { Conductor::CopperStranded };
            resistance(conductor, american(case.size.as_deref().expect("a gauge")), Celsius::new(75.0))
        };
        // Printed to the microvolt.
        let drop = by_length.get() * 2.0 * case.one_way_m * case.amp;
        assert!((drop - case.drop_volt).abs() < 1e-6, "{drop} for {}", case.drop_volt);
    }
}
