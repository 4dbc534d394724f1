//! Ampacities and their corrections, cell by cell.

use engine::ampacity::correction::{self, Arrangement};
use engine::ampacity::{Insulation, Laid, Method, north_america, pv_cable, tabled};
use engine::conductor::{AMERICAN, Conductor, Metal, Size};
use engine::family::CodeFamily;
use engine::quantity::{Amps, Celsius, SquareMillimetres};
use published::table;
use serde::Deserialize;

const DATA: &str = include_str!("../data/ampacity.toml");

fn american(words: &str) -> Size {
    let size = AMERICAN.iter().find(|size| {
        let word = size.to_string();
        word == format!("{words} AWG") || word == format!("{words} kcmil")
    });
    *size.unwrap_or_else(|| panic!("{words} is not on the ladder"))
}

fn carries(
    family: CodeFamily,
    method: Method,
    conductor: Conductor,
    insulation: Insulation,
    size: Size,
) -> Option<f64> {
    let laid = Laid { family, conductor, insulation, method, ambient: Celsius::new(30.0), together: 2.0 };
    tabled(&laid, insulation, size).map(Amps::get)
}

#[derive(Deserialize)]
struct NorthAmerican {
    size: String,
    cu_60c_amp: f64,
    cu_75c_amp: f64,
    cu_90c_amp: f64,
    al_60c_amp: Option<f64>,
    al_75c_amp: Option<f64>,
    al_90c_amp: Option<f64>,
}

fn north_american(name: &str, method: Method) {
    let rows = table::<NorthAmerican>(DATA, name);
    assert_eq!(rows.len(), 18);
    for row in &rows {
        let (cells, size) = (&row.says, american(&row.says.size));
        let at = |conductor, insulation| carries(CodeFamily::NorthAmerica, method, conductor, insulation, size);
        let (copper, aluminium) = (Conductor::CopperStranded, Conductor::AluminiumStranded);
        let what = format!("{size}, {}", row.source);
        assert_eq!(at(copper, Insulation::Bears60), Some(cells.cu_60c_amp), "{what}");
        assert_eq!(at(copper, Insulation::Bears75), Some(cells.cu_75c_amp), "{what}");
        assert_eq!(at(copper, Insulation::Bears90), Some(cells.cu_90c_amp), "{what}");
        assert_eq!(at(aluminium, Insulation::Bears60), cells.al_60c_amp, "{what}");
        assert_eq!(at(aluminium, Insulation::Bears75), cells.al_75c_amp, "{what}");
        assert_eq!(at(aluminium, Insulation::Bears90), cells.al_90c_amp, "{what}");
    }
}

#[test]
fn every_cell_of_table_310_16() {
    north_american("nec_310_16", Method::Conduit);
}

#[test]
fn every_cell_of_table_310_17() {
    north_american("nec_310_17", Method::SinglesInAir);
}

#[derive(Deserialize)]
struct Before2011 {
    size: String,
    metal: String,
    column: String,
    amp: f64,
}

/// The cells that changed in 2011 are the new ones.
#[test]
fn no_cell_of_the_old_table_310_16_is_left() {
    let rows = table::<Before2011>(DATA, "nec_310_16_before_2011");
    assert_eq!(rows.len(), 9);
    for row in &rows {
        let old = &row.says;
        let conductor = if old.metal == "al" { Conductor::AluminiumStranded } else { Conductor::CopperStranded };
        let insulation = if old.column == "60c" { Insulation::Bears60 } else { Insulation::Bears90 };
        let now = carries(CodeFamily::NorthAmerica, Method::Conduit, conductor, insulation, american(&old.size));
        assert!(now.is_some_and(|now| now != old.amp), "{}: {}", old.size, row.source);
    }
}

#[derive(Deserialize)]
struct Ambient {
    from_degc: Option<f64>,
    to_degc: f64,
    factor_60c: Option<f64>,
    factor_75c: Option<f64>,
    factor_90c: Option<f64>,
}

#[test]
fn every_cell_of_the_north_american_ambient_table() {
    let rows = table::<Ambient>(DATA, "nec_ambient");
    assert_eq!(rows.len(), correction::NORTH_AMERICAN_AMBIENT.len());
    for row in &rows {
        // Both ends of the band; the first is open below.
        for air in [row.says.from_degc.unwrap_or(-40.0), row.says.to_degc] {
            let at = |insulation| correction::north_american_ambient(insulation, Celsius::new(air));
            assert_eq!(at(Insulation::Bears60), row.says.factor_60c, "{air} °C, {}", row.source);
            assert_eq!(at(Insulation::Bears75), row.says.factor_75c, "{air} °C, {}", row.source);
            assert_eq!(at(Insulation::Bears90), row.says.factor_90c, "{air} °C, {}", row.source);
        }
    }
}

#[derive(Deserialize)]
struct Bundle {
    from_conductors: f64,
    to_conductors: Option<f64>,
    factor: f64,
}

#[test]
fn every_cell_of_the_north_american_table_of_conductors_together() {
    let rows = table::<Bundle>(DATA, "nec_bundle");
    assert_eq!(rows.len(), correction::NORTH_AMERICAN_TOGETHER.len());
    for row in &rows {
        for conductors in [row.says.from_conductors, row.says.to_conductors.unwrap_or(80.0)] {
            assert_eq!(
                correction::north_american_together(conductors),
                row.says.factor,
                "{conductors}, {}",
                row.source
            );
        }
    }
    assert_eq!(correction::north_american_together(3.0), 1.0);
}

#[derive(Deserialize)]
struct Small {
    size: String,
    metal: String,
    max_ocpd_amp: f64,
}

#[test]
fn every_small_conductor() {
    let rows = table::<Small>(DATA, "nec_small_conductor");
    assert_eq!(rows.len(), 7);
    for row in &rows {
        let metal = if row.says.metal == "al" { Metal::Aluminium } else { Metal::Copper };
        let most = north_america::small_conductor(metal, american(&row.says.size));
        assert_eq!(most, Some(row.says.max_ocpd_amp), "{} {}, {}", row.says.size, row.says.metal, row.source);
    }
}

#[derive(Deserialize)]
struct TwoLoaded {
    area_mm2: f64,
    b1_amp: f64,
    c_amp: f64,
    e_amp: f64,
    f_amp: Option<f64>,
}

fn two_loaded(name: &str, insulation: Insulation) {
    let rows = table::<TwoLoaded>(DATA, name);
    assert_eq!(rows.len(), 12);
    for row in &rows {
        let (cells, size) = (&row.says, Size::of_area(SquareMillimetres::new(row.says.area_mm2)));
        let at = |method| carries(CodeFamily::Iec, method, Conductor::CopperStranded, insulation, size);
        let what = format!("{size}, {}", row.source);
        assert_eq!(at(Method::Conduit), Some(cells.b1_amp), "B1 {what}");
        assert_eq!(at(Method::Surface), Some(cells.c_amp), "C {what}");
        assert_eq!(at(Method::CableInAir), Some(cells.e_amp), "E {what}");
        // F begins at 25 mm²; below, E stands in.
        assert_eq!(at(Method::SinglesInAir), Some(cells.f_amp.unwrap_or(cells.e_amp)), "F {what}");
    }
}

#[test]
fn every_cell_of_the_iec_table_for_pvc() {
    two_loaded("iec_pvc_two_loaded", Insulation::Pvc70);
}

#[test]
fn every_cell_of_the_iec_table_for_xlpe() {
    two_loaded("iec_xlpe_two_loaded", Insulation::Bears90);
}

#[derive(Deserialize)]
struct IecAmbient {
    t_degc: f64,
    pvc_70c: Option<f64>,
    xlpe_90c: Option<f64>,
}

#[test]
fn every_cell_of_the_iec_ambient_table() {
    let rows = table::<IecAmbient>(DATA, "iec_ambient");
    assert_eq!(rows.len(), correction::IEC_AMBIENT.len());
    for row in &rows {
        let at = |insulation| correction::iec_ambient(insulation, Celsius::new(row.says.t_degc));
        assert_eq!(at(Insulation::Pvc70), row.says.pvc_70c, "{} °C, {}", row.says.t_degc, row.source);
        assert_eq!(at(Insulation::Bears90), row.says.xlpe_90c, "{} °C, {}", row.says.t_degc, row.source);
    }
}

#[derive(Deserialize)]
struct Grouping {
    item: usize,
    circuits: Vec<f64>,
    factor: Vec<f64>,
}

#[test]
fn every_cell_of_the_iec_table_of_grouping() {
    let arrangements = [
        Arrangement::Bunched,
        Arrangement::OnWall,
        Arrangement::UnderCeiling,
        Arrangement::PerforatedTray,
        Arrangement::Ladder,
    ];
    let mut cells = 0;
    for name in ["iec_grouping", "iec_grouping_more"] {
        for row in table::<Grouping>(DATA, name) {
            assert_eq!(row.says.circuits.len(), row.says.factor.len());
            for (circuits, factor) in row.says.circuits.iter().zip(&row.says.factor) {
                let found = correction::iec_grouping(arrangements[row.says.item - 1], *circuits);
                assert_eq!(found, *factor, "item {}, {circuits} circuits, {}", row.says.item, row.source);
                cells += 1;
            }
        }
    }
    assert_eq!(cells, 5 * 9 + 3);
}

#[derive(Deserialize)]
struct PvCable {
    area_mm2: f64,
    single_in_air_amp: f64,
    single_on_surface_amp: f64,
    two_touching_on_surface_amp: f64,
}

#[test]
fn every_cell_of_the_table_of_pv_cable() {
    let rows = table::<PvCable>(DATA, "en50618");
    assert_eq!(rows.len(), pv_cable::EN_50618.len());
    for (row, cells) in rows.iter().zip(pv_cable::EN_50618) {
        let says = &row.says;
        let wanted = [says.single_in_air_amp, says.single_on_surface_amp, says.two_touching_on_surface_amp];
        assert_eq!(cells, wanted, "{} mm², {}", says.area_mm2, row.source);
        let size = Size::of_area(SquareMillimetres::new(says.area_mm2));
        let at = carries(CodeFamily::Iec, Method::Surface, Conductor::TinnedFine, Insulation::PvCable, size);
        assert_eq!(at, Some(says.two_touching_on_surface_amp), "{size}");
    }
}

#[derive(Deserialize)]
struct PvAmbient {
    t_degc: f64,
    factor_remembered: f64,
    factor_physical: f64,
}

/// The lower of the two, which is the physical curve.
#[test]
fn every_ambient_factor_of_pv_cable() {
    for row in table::<PvAmbient>(DATA, "en50618_ambient") {
        let factor = pv_cable::ambient(Celsius::new(row.says.t_degc)).expect("below 120 °C");
        assert!((factor - row.says.factor_physical).abs() < 5e-5, "{factor}");
        assert!(factor <= row.says.factor_remembered);
    }
}
