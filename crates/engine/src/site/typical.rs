//! A new site: six answers give a whole line of typical parts, each to be replaced by what the nameplates say.

use super::Site;
use super::entries::Entries;
use super::part::{PartId, PartKind};
use crate::chemistry::{Chemistry, Family};
use crate::choice::Choice;
use crate::family::CodeFamily;
use crate::field::Field;
use crate::string::{self, layouts};

/// What there is, as six taps tell it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Got {
    /// By which family of codes it is built.
    pub family: CodeFamily,
    /// Coldest morning on record, in whole degrees Celsius.
    pub coldest: i32,
    /// Modules that there are; none for a room without sun.
    pub modules: u32,
    /// What the cells are made of.
    pub chemistry: Chemistry,
    /// Nominal voltage of the bus, 12, 24 or 48.
    pub bus: u32,
    /// Power of the inverter in watts; 0 for a room of direct current only.
    pub inverter: u32,
}

/// A crystalline module of the class that is sold most. Typical: read your nameplate.
const MODULE: &[(Field, &str)] = &[
    (Field::Voc, "49.5"),
    (Field::Vmp, "41"),
    (Field::Isc, "11.5"),
    (Field::Imp, "10.9"),
    (Field::VocCoefficient, "-0.27"),
    (Field::PmaxCoefficient, "-0.34"),
    (Field::VocTolerance, "3"),
    (Field::SeriesFuseRating, "20"),
    (Field::SystemVoltage, "1000"),
];

/// Classes of tracking controllers: input limit in volts, output in amperes. Typical: read your nameplate.
const CONTROLLERS: [(u32, u32); 5] = [(100, 30), (150, 45), (150, 70), (250, 70), (250, 100)];

/// A whole site of typical parts.
#[must_use]
pub fn start(got: Got) -> Site {
    let mut site = Site::new(String::new(), place(got), Vec::new());
    put(&mut site, PartKind::Bus, &[]);
    if got.modules > 0 {
        sun(&mut site, got);
    }
    bank(&mut site, got);
    if got.inverter > 0 {
        inverter(&mut site, got);
    }
    let panel = put(&mut site, PartKind::DcPanel, &[]);
    let low = (got.bus * 11 / 12).to_string();
    let high = loads_high(got).to_string();
    enter(&mut site, panel, &[(Field::LoadsLow, &low), (Field::LoadsHigh, &high)]);
    run(&mut site, panel, "3", "10000");
    enter_run(&mut site, panel, &[(Field::RunCurrent, "20")]);
    let circuit = put(&mut site, PartKind::DcCircuit, &[]);
    run(&mut site, circuit, "6", "5000");
    enter_run(&mut site, circuit, &[(Field::RunCurrent, "5")]);
    name(&mut site, circuit, "Lights");
    site
}

fn place(got: Got) -> Entries {
    let family = if got.family == CodeFamily::NorthAmerica { "north-america" } else { "iec" };
    let coldest = got.coldest.to_string();
    let rows: [(Field, &str); 8] = [
        (Field::CodeFamily, family),
        (Field::RecordLow, &coldest),
        (Field::RecordHigh, "38"),
        (Field::StandsOn, "building"),
        (Field::ColdestInTheRoom, "5"),
        (Field::WarmestInTheRoom, "30"),
        (Field::WetRoom, "no"),
        (Field::SleepingRoom, "no"),
    ];
    Entries::of(&rows)
}

fn put(site: &mut Site, kind: PartKind, rows: &[(Field, &str)]) -> PartId {
    // A new site has far fewer parts than it may have.
    let id = site.add(kind).unwrap_or(PartId(0));
    enter(site, id, rows);
    if let Some(part) = site.part_mut(id) {
        part.typical = true;
    }
    id
}

fn enter(site: &mut Site, id: PartId, rows: &[(Field, &str)]) {
    if let Some(part) = site.part_mut(id) {
        for (field, text) in rows {
            part.entries.set(*field, super::Typed::plain(text));
        }
    }
}

fn enter_run(site: &mut Site, id: PartId, rows: &[(Field, &str)]) {
    if let Some(entries) = site.part_mut(id).and_then(|part| part.run.as_mut()) {
        for (field, text) in rows {
            entries.set(*field, super::Typed::plain(text));
        }
    }
}

fn name(site: &mut Site, id: PartId, name: &str) {
    if let Some(part) = site.part_mut(id) {
        name.clone_into(&mut part.name);
    }
}

/// A typical length one way, and what its breaker or fuse interrupts.
fn run(site: &mut Site, id: PartId, length: &str, interrupts: &str) {
    enter_run(site, id, &[(Field::RunLength, length), (Field::InterruptingRating, interrupts)]);
}

/// Controllers of the smallest class that takes all modules, and the strings on each.
fn sun(site: &mut Site, got: Got) {
    let (class, count, series, strings) = controllers(got);
    let (limit, output) = (class.0.to_string(), class.1.to_string());
    // Typical of the class: it tracks from a little over the bank up to its limit.
    let window_high = (class.0 * 9 / 10).to_string();
    let output_limit = (got.bus / 12 * 16).to_string();
    for number in 0..count {
        let controller = put(
            site,
            PartKind::Controller,
            &[
                (Field::ControllerKind, "mppt"),
                (Field::InputLimit, &limit),
                (Field::WindowHigh, &window_high),
                (Field::OutputCurrent, &output),
                (Field::PvCurrentLimit, &output),
                (Field::LimitHoldsFactor, "no"),
                (Field::ControllerOutputLimit, &output_limit),
            ],
        );
        run(site, controller, "1", "10000");
        let array = put(site, PartKind::Array, MODULE);
        let (series, strings) = (series.to_string(), strings.to_string());
        enter(site, array, &[(Field::Series, &series), (Field::Strings, &strings), (Field::Mounting, "open")]);
        enter_run(site, array, &[(Field::RunLength, "15"), (Field::Insulation, "pv")]);
        if let Some(part) = site.part_mut(array) {
            part.to = Some(controller);
        }
        if count > 1 {
            name(site, controller, &format!("Controller {}", number + 1));
            name(site, array, &format!("Array {}", number + 1));
        }
    }
}

/// Class, how many of it, modules in series, strings on each.
fn controllers(got: Got) -> ((u32, u32), u32, u32, u32) {
    let mut pad = place(got);
    for (field, text) in MODULE {
        pad.set(*field, super::Typed::plain(text));
    }
    for count in 1..=4_u32 {
        for class in CONTROLLERS {
            let each = got.modules.div_ceil(count);
            let mut ask = string::Ask::read(&pad);
            let amps = f64::from(class.1);
            ask.controller.input_limit = crate::entry::Entry::of(f64::from(class.0));
            ask.controller.output_current = crate::entry::Entry::of(amps);
            ask.controller.pv_current_limit = crate::entry::Entry::of(amps);
            ask.controller.highest_charge = crate::entry::Entry::of(f64::from(got.bus) * 1.2);
            let found = layouts(&ask, each, &[ask.controller]);
            let best = found.ranked.iter().find(|layout| layout.left_over == 0 && layout.holds());
            // More than a fifth above the output is clipped away for good.
            let watts = f64::from(each) * 41.0 * 10.9;
            let takes = amps * f64::from(got.bus) * 1.15 * 1.2;
            if let Some(group) = best.and_then(|layout| layout.groups.first()).filter(|_| watts <= takes) {
                return (class, count, group.series, group.strings);
            }
        }
    }
    // None of the classes takes them: the largest, with strings that keep to its limit.
    let last = CONTROLLERS[CONTROLLERS.len() - 1];
    (last, got.modules.div_ceil(8), 2, 4)
}

fn bank(site: &mut Site, got: Got) {
    let figures = got.chemistry.figures();
    let block = match got.chemistry {
        Chemistry::Agm | Chemistry::Gel => 12.0,
        _ => figures.nominal.get(),
    };
    let series = (f64::from(got.bus) / block).round().max(1.0);
    let series = if got.chemistry == Chemistry::Lfp { f64::from(got.bus) / 3.0 } else { series };
    let capacity = match got.chemistry.family() {
        Family::Lithium => "280",
        Family::Lead => {
            if block > 10.0 {
                "200"
            } else {
                "600"
            }
        }
        _ => "400",
    };
    let (volts, count) = (crate::show::number(block, 2), crate::show::number(series, 0));
    let bus = got.bus.to_string();
    let id = put(
        site,
        PartKind::Bank,
        &[
            (Field::Chemistry, chemistry_key(got.chemistry)),
            (Field::CellVoltage, &volts),
            (Field::CellCapacity, capacity),
            (Field::NumberOfCells, &count),
            (Field::CellsInSeries, &count),
            (Field::BusVoltage, &bus),
            (Field::PostsCovered, "yes"),
        ],
    );
    run(site, id, "1.5", "20000");
    enter_run(site, id, &[(Field::BreakerType, "fuse")]);
}

fn chemistry_key(chemistry: Chemistry) -> &'static str {
    let crate::field::Takes::Choice(list) = Field::Chemistry.takes() else { return "" };
    list.iter().map(|(key, _)| *key).find(|key| Chemistry::of_key(key) == Some(chemistry)).unwrap_or("")
}

/// What typical loads of direct current survive. Nickel-iron and nickel-cadmium rise higher than most loads bear.
const fn loads_high(got: Got) -> u32 {
    got.bus / 12 * 15
}

fn inverter(site: &mut Site, got: Got) {
    let (low, high) = (decimal(got.bus, 105), decimal(got.bus, 150));
    let continuous = got.inverter.to_string();
    let ac = if got.family == CodeFamily::NorthAmerica { "120" } else { "230" };
    let id = put(
        site,
        PartKind::Inverter,
        &[
            (Field::InverterLow, &low),
            (Field::InverterHigh, &high),
            (Field::InverterContinuous, &continuous),
            (Field::AcVolts, ac),
            (Field::InverterBond, "fixed"),
        ],
    );
    run(site, id, "1.5", "20000");
    let panel = put(
        site,
        PartKind::AcPanel,
        &[(Field::PanelBond, "no"), (Field::PanelLegs, "single"), (Field::GridFeeds, "no")],
    );
    run(site, panel, "8", "6000");
    let surge = (got.inverter * 2).to_string();
    enter(site, id, &[(Field::InverterSurge, &surge), (Field::SurgeSeconds, "3")]);
    let fridge = put(site, PartKind::Load, &[(Field::StartLoad, "refrigerator"), (Field::RunningPower, "120")]);
    name(site, fridge, "Refrigerator");
}

/// `tenths` of a 12 V class, at the bus's own, as typed: 10.5 V of 12 V is 42 at 48 V.
fn decimal(bus: u32, tenths: u32) -> String {
    let all = bus / 12 * tenths;
    if all.is_multiple_of(10) { (all / 10).to_string() } else { format!("{}.{}", all / 10, all % 10) }
}

#[cfg(test)]
mod tests {
    use super::super::{Part, assess, run_ask};
    use super::*;
    use crate::check::{Cost, Verdict};
    use crate::run;

    fn titled<'a>(site: &'a Site, title: &str) -> &'a Part {
        site.parts.iter().find(|part| part.title() == title).expect("a part of that name")
    }

    fn all() -> Vec<Got> {
        let mut all = Vec::new();
        for family in CodeFamily::ALL {
            for chemistry in Chemistry::ALL {
                for bus in [12, 48] {
                    for modules in [0, 2, 8, 20] {
                        for inverter in [0, 3000] {
                            for coldest in [0, -40] {
                                all.push(Got { family, coldest, modules, chemistry: *chemistry, bus, inverter });
                            }
                        }
                    }
                }
            }
        }
        all
    }

    #[test]
    fn every_answer_gives_a_whole_line_whose_strings_keep_to_the_limit() {
        for got in all() {
            let site = start(got);
            let found = assess(&site);
            assert!(!found.checks.is_empty());
            for one in &found.checks {
                let string = matches!(one.check.id, super::super::CheckId::String(_));
                let broken = one.check.verdict == Verdict::Breaks && one.check.cost == Cost::Hazard;
                assert!(!(string && broken), "{:?} {got:?}", one.check);
            }
        }
    }

    #[test]
    fn all_modules_stand_on_a_controller() {
        for got in all().into_iter().filter(|got| got.modules <= 12) {
            let site = start(got);
            let modules: f64 = site
                .of_kind(PartKind::Array)
                .map(|array| {
                    let ask = super::super::string_ask(&site, array);
                    ask.series.typed().unwrap().get() * ask.strings.typed().unwrap().get()
                })
                .sum();
            assert!(modules >= f64::from(got.modules), "{modules} of {got:?}");
        }
    }

    #[test]
    fn runs_find_their_current_and_volts_in_the_parts_they_join() {
        let got = Got {
            family: CodeFamily::Iec,
            coldest: -20,
            modules: 8,
            chemistry: Chemistry::Lfp,
            bus: 48,
            inverter: 3000,
        };
        let site = start(got);
        let inverter = titled(&site, "Inverter");
        let ask = run_ask(&site, inverter).unwrap();
        // 3 kW over 0.9 and 0.875 · 51.2 V, by hand.
        let amps = run::working_current(&ask).unwrap().get();
        assert!((amps - 3000.0 / (0.9 * 0.875 * 51.2)).abs() < 1e-9, "{amps}");
        let array = titled(&site, "Array");
        let amps = run::working_current(&run_ask(&site, array).unwrap()).unwrap().get();
        let strings = super::super::string_ask(&site, array).strings.typed().unwrap().get();
        assert!((amps - 11.5 * strings).abs() < 1e-9, "{amps}");
    }
}
