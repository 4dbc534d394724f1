//! The demo sites, assessed and written out: what changes shows in review.
//!
//! To accept a change after reading it: `ACCEPT=1 cargo test -p bridge --test golden`.

use std::path::Path;

use bridge::demo::{demo, names};
use bridge::report;
use engine::check::{Cost, Verdict};
use engine::site::assess;

#[test]
fn demo_sites_are_assessed_as_reviewed() {
    for name in names() {
        let site = demo(name).expect("every demo site opens");
        assert_eq!(site.name, name);
        let told = report::lines(&site, &assess(&site));
        let file = name.to_lowercase().replace(' ', "-");
        let path = Path::new(env!("CARGO_MANIFEST_DIR")).join(format!("tests/golden/{file}.txt"));
        if std::env::var_os("ACCEPT").is_some() {
            std::fs::write(&path, &told).unwrap();
        }
        let kept = std::fs::read_to_string(&path).unwrap_or_default();
        for (line, (is, was)) in told.lines().zip(kept.lines()).enumerate() {
            assert_eq!(is, was, "{}, line {}", path.display(), line + 1);
        }
        assert_eq!(told.lines().count(), kept.lines().count(), "{}", path.display());
    }
}

/// By hand: 3 × 49.3 V · (1 + 0.0027 · 56) = 170.26 V against 150 V; nothing else of this site can hurt anybody.
#[test]
fn the_hut_breaks_at_its_cold_string_alone() {
    let site = demo("Kestrel Ridge hut").unwrap();
    let found = assess(&site);
    let broken: Vec<&str> = found
        .checks
        .iter()
        .filter(|one| one.check.verdict == Verdict::Breaks && one.check.cost == Cost::Hazard)
        .map(|one| one.check.id.id())
        .collect();
    assert_eq!(broken, ["string-cold-controller"]);
    let volts = found.worst().unwrap().check.value.unwrap().number;
    assert!((volts - 3.0 * 49.3 * (1.0 + 0.0027 * 56.0)).abs() < 1e-9, "{volts}");
}

/// Ten nickel-iron cells are no 12 V class: on charge they pass what loads of that class bear.
#[test]
fn the_cabin_breaks_at_its_loads() {
    let found = assess(&demo("Tarn cabin").unwrap());
    assert_eq!(found.worst().unwrap().check.id.id(), "bank-window-high-loads");
}

#[test]
fn the_clinic_holds() {
    let found = assess(&demo("Two Rivers clinic").unwrap());
    assert_eq!(found.count(Verdict::Breaks), 0, "{:?}", found.worst());
}
