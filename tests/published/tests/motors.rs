//! Motors: full-load and locked-rotor currents, code letters, and constant-power draws on a bus.

use engine::check::Steps;
use engine::network::Behind;
use engine::quantity::{Ohms, Volts, Watts};
use engine::start::{code_letter, full_load, locked_rotor};
use published::table;
use serde::Deserialize;

const MOTORS: &str = include_str!("../data/motors.toml");

#[derive(Deserialize)]
struct FullLoad {
    hp_value: f64,
    v115_amp: f64,
    v200_amp: f64,
    v208_amp: f64,
    v230_amp: f64,
}

#[derive(Deserialize)]
struct LockedRotor {
    hp: String,
    v115_amp: f64,
    v208_amp: f64,
    v230_amp: f64,
}

#[derive(Deserialize)]
struct Letter {
    letter: String,
    kva_per_hp_min: f64,
    kva_per_hp_max: Option<f64>,
}

#[derive(Deserialize)]
struct Case {
    letter: String,
    hp: f64,
    volt: f64,
    locked_rotor_amp_min: f64,
    locked_rotor_amp_max: f64,
}

#[derive(Deserialize)]
struct Draw {
    emf_v: f64,
    ohm: f64,
    watt: f64,
    volt: f64,
    amp: f64,
}

/// "1 1/2" as a number.
fn horsepower(text: &str) -> f64 {
    let part = |text: &str| match text.split_once('/') {
        Some((above, below)) => above.parse::<f64>().unwrap() / below.parse::<f64>().unwrap(),
        None => text.parse().unwrap(),
    };
    text.split(' ').map(part).sum()
}

#[test]
fn every_full_load_current() {
    let rows = table::<FullLoad>(MOTORS, "nec_430_248");
    assert_eq!(rows.len(), 12);
    for row in rows {
        let says = &row.says;
        let cells = [(115.0, says.v115_amp), (200.0, says.v200_amp), (208.0, says.v208_amp), (230.0, says.v230_amp)];
        for (volts, amps) in cells {
            assert_eq!(full_load(says.hp_value, volts), Some(amps), "{} hp {volts} V, {}", says.hp_value, row.source);
        }
    }
}

#[test]
fn every_locked_rotor_current() {
    let rows = table::<LockedRotor>(MOTORS, "nec_430_251a");
    assert_eq!(rows.len(), 9);
    for row in rows {
        let says = &row.says;
        for (volts, amps) in [(115.0, says.v115_amp), (208.0, says.v208_amp), (230.0, says.v230_amp)] {
            let ours = locked_rotor(horsepower(&says.hp), volts);
            assert_eq!(ours, Some(amps), "{} hp {volts} V, {}", says.hp, row.source);
        }
    }
}

#[test]
fn every_code_letter() {
    let rows = table::<Letter>(MOTORS, "code_letter");
    assert_eq!(rows.len(), 19);
    for row in rows {
        let says = &row.says;
        let (least, most) = code_letter(says.letter.chars().next().unwrap()).expect("a letter of the table");
        assert_eq!(least, says.kva_per_hp_min, "{}, {}", says.letter, row.source);
        assert_eq!(most, says.kva_per_hp_max.unwrap_or(f64::INFINITY), "{}, {}", says.letter, row.source);
    }
}

/// kVA/hp · hp / V: printed to four decimals.
#[test]
fn locked_rotor_currents_by_letter() {
    let rows = table::<Case>(MOTORS, "code_letter_case");
    assert_eq!(rows.len(), 5);
    for row in rows {
        let says = &row.says;
        let (least, most) = code_letter(says.letter.chars().next().unwrap()).expect("a letter");
        for (kva, amps) in [(least, says.locked_rotor_amp_min), (most, says.locked_rotor_amp_max)] {
            let ours = kva * says.hp * 1000.0 / says.volt;
            assert!((ours - amps).abs() < 1e-4, "{} {ours} {amps}, {}", says.letter, row.source);
        }
    }
}

/// The closed form against roots found by a library for it.
#[test]
fn constant_power_on_a_bus() {
    let rows = table::<Draw>(MOTORS, "constant_power");
    assert_eq!(rows.len(), 8);
    for row in rows {
        let says = &row.says;
        let bus = Behind { emf: Volts::new(says.emf_v), resistance: Ohms::new(says.ohm) };
        let found = bus.under(Watts::new(says.watt), &mut Steps::silent()).expect("an operating point");
        assert!((found.volts.get() - says.volt).abs() < 1e-6, "{found:?} {}", row.source);
        assert!((found.current.get() - says.amp).abs() < 1e-6, "{found:?} {}", row.source);
    }
}
