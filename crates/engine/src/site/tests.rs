//! Sites by hand.

use super::what_if::{Meaning, Opens, Sun, what_if};
use super::*;
use crate::check::{Cost, Verdict};
use crate::chemistry::Chemistry;
use crate::family::CodeFamily;
use crate::field::Field;
use crate::quantity::{Amps, Quantity, Volts};

fn room() -> Site {
    start(Got { family: CodeFamily::Iec, coldest: -20, modules: 8, chemistry: Chemistry::Lfp, bus: 48, inverter: 3000 })
}

fn id(site: &Site, kind: PartKind) -> PartId {
    site.first(kind).expect("there is one").id
}

fn set(site: &mut Site, part: PartId, field: Field, text: &str) {
    site.part_mut(part).unwrap().entries.set(field, Typed::plain(text));
}

fn of(site: &Site, id: &str) -> Option<Verdict> {
    assess(site).checks.iter().find(|one| one.check.id.id() == id).map(|one| one.check.verdict)
}

/// Such parts come from no file, which would be refused; what is made of them is assessed all the same.
#[test]
fn parts_of_one_number_are_told_apart() {
    for number in [3, u32::MAX] {
        let mut parts: Vec<Part> =
            [PartKind::Bus, PartKind::DcPanel, PartKind::DcCircuit].map(|kind| Part::new(PartId(number), kind)).into();
        parts[2].to = Some(PartId(number));
        let site = Site::new(String::new(), Entries::default(), parts);
        let ids: Vec<u32> = site.parts.iter().map(|part| part.id.0).collect();
        assert_eq!(ids, [number, 1, 2]);
        assert!(!assess(&site).checks.is_empty());
    }
}

#[test]
fn a_figure_stands_in_one_place_and_every_part_reads_it_there() {
    let mut site = room();
    let controller = id(&site, PartKind::Controller);
    set(&mut site, controller, Field::InputLimit, "111");
    let array = site.first(PartKind::Array).unwrap();
    assert_eq!(string_ask(&site, array).controller.input_limit.typed(), Some(Volts::new(111.0)));
    let view = View::new(&site, Subject::Part(array.id));
    assert_eq!(view.slot(Field::InputLimit), Some(Slot::Part(controller)));
    assert_eq!(view.slot(Field::RecordLow), Some(Slot::Place));
    assert_eq!(view.slot(Field::RunLength), Some(Slot::Run(array.id)));
}

#[test]
fn the_array_is_charged_against_the_banks_absorb_voltage() {
    let site = room();
    let ask = string_ask(&site, site.first(PartKind::Array).unwrap());
    // Sixteen cells at 3.55 V, the chosen absorb of the chemistry table.
    let absorb = Chemistry::Lfp.figures().absorb.chosen.get() * 16.0;
    assert!((ask.controller.highest_charge.typed().unwrap().get() - absorb).abs() < 1e-9);
}

#[test]
fn two_controllers_charge_together_and_the_worst_limit_counts() {
    let mut site = room();
    let first = id(&site, PartKind::Controller);
    let second = site.duplicate(first).unwrap();
    set(&mut site, first, Field::OutputCurrent, "70");
    set(&mut site, second, Field::OutputCurrent, "45");
    set(&mut site, second, Field::ControllerOutputLimit, "80");
    let ask = bank_ask(&site, site.first(PartKind::Bank).unwrap());
    assert_eq!(ask.charge_current.typed(), Some(Amps::new(115.0)));
    assert_eq!(ask.controller_output_limit.typed(), Some(Volts::new(80.0)));
    set(&mut site, second, Field::OutputCurrent, "");
    assert_eq!(bank_ask(&site, site.first(PartKind::Bank).unwrap()).charge_current.typed(), None);
}

#[test]
fn the_greatest_load_of_a_bank_is_its_inverter_at_full_power() {
    let site = room();
    let ask = bank_ask(&site, site.first(PartKind::Bank).unwrap());
    // 3000 W over 0.90, by hand.
    assert!((ask.greatest_load.typed().unwrap().get() - 3000.0 / 0.9).abs() < 1e-9);
}

#[test]
fn exactly_one_bond_in_each_mode() {
    let mut site = room();
    let (inverter, panel) = (id(&site, PartKind::Inverter), id(&site, PartKind::AcPanel));
    assert_eq!(of(&site, "neutral-bond"), Some(Verdict::Clears));
    set(&mut site, panel, Field::PanelBond, "yes");
    assert_eq!(of(&site, "neutral-bond"), Some(Verdict::Breaks));
    set(&mut site, inverter, Field::InverterBond, "none");
    assert_eq!(of(&site, "neutral-bond"), Some(Verdict::Clears));
    set(&mut site, panel, Field::PanelBond, "no");
    assert_eq!(of(&site, "neutral-bond"), Some(Verdict::Breaks));

    // A generator with a bond of its own, passed through an inverter whose bond opens then.
    let generator = site.add(PartKind::Generator).unwrap();
    set(&mut site, inverter, Field::InverterBond, "switched");
    assert_eq!(of(&site, "neutral-bond"), Some(Verdict::Asks));
    set(&mut site, generator, Field::GeneratorBond, "yes");
    set(&mut site, generator, Field::NeutralSwitched, "yes");
    for mode in ["neutral-bond", "neutral-bond-passing", "neutral-bond-bypass"] {
        assert_eq!(of(&site, mode), Some(Verdict::Clears), "{mode}");
    }
    // Its neutral stays joined while it stands still: two bonds while the inverter feeds.
    set(&mut site, generator, Field::NeutralSwitched, "no");
    assert_eq!(of(&site, "neutral-bond"), Some(Verdict::Breaks));
    // A floating generator has none in bypass.
    set(&mut site, generator, Field::GeneratorBond, "no");
    assert_eq!(of(&site, "neutral-bond"), Some(Verdict::Clears));
    assert_eq!(of(&site, "neutral-bond-bypass"), Some(Verdict::Breaks));
}

#[test]
fn a_panel_that_the_grid_can_feed_breaks_without_a_transfer_switch() {
    let mut site = room();
    let panel = id(&site, PartKind::AcPanel);
    assert_eq!(of(&site, "backfeed"), Some(Verdict::Clears));
    set(&mut site, panel, Field::GridFeeds, "");
    assert_eq!(of(&site, "backfeed"), Some(Verdict::Close));
    set(&mut site, panel, Field::GridFeeds, "yes");
    assert_eq!(of(&site, "backfeed"), Some(Verdict::Asks));
    set(&mut site, panel, Field::TransferSwitch, "no");
    assert_eq!(of(&site, "backfeed"), Some(Verdict::Breaks));
    set(&mut site, panel, Field::TransferSwitch, "yes");
    assert_eq!(of(&site, "backfeed"), Some(Verdict::Clears));
}

#[test]
fn a_room_of_direct_current_only_has_no_inverters_checks() {
    let site = start(Got {
        family: CodeFamily::NorthAmerica,
        coldest: -30,
        modules: 2,
        chemistry: Chemistry::NickelIron,
        bus: 12,
        inverter: 0,
    });
    assert_eq!(of(&site, "bank-window-high"), None);
    assert_eq!(of(&site, "neutral-bond"), None);
    // Ten nickel-iron cells on charge stand above what 12 V loads bear: the trap that must be caught.
    assert_eq!(of(&site, "bank-window-high-loads"), Some(Verdict::Breaks));
}

#[test]
fn packs_that_open_in_full_sun_leave_the_bus_to_the_controllers() {
    let mut site = room();
    let (bank, inverter) = (id(&site, PartKind::Bank), id(&site, PartKind::Inverter));
    set(&mut site, bank, Field::OwnProtection, "yes");
    assert!(what_if::openable(&site).contains(&Opens::Packs(bank)));
    let told = what_if(&site, Opens::Packs(bank), Sun::Full).unwrap();
    let effect = told.effects.iter().find(|one| one.part == inverter).unwrap();
    // The controller's output limit, 64 V, with nothing drawn; the inverter bears 60 V.
    assert!((effect.volts.unwrap().get() - 64.0).abs() < 1e-6);
    assert_eq!(effect.meaning, Meaning::Over { limit: Volts::new(60.0) });
    assert_eq!(effect.meaning.cost(), Some(Cost::Hazard));
    let told = what_if(&site, Opens::Packs(bank), Sun::None).unwrap();
    assert_eq!(told.effects.iter().find(|one| one.part == inverter).unwrap().meaning, Meaning::Dead);
}

#[test]
fn an_inverter_cut_off_is_dead_and_so_is_its_panel() {
    let site = room();
    let (inverter, panel) = (id(&site, PartKind::Inverter), id(&site, PartKind::AcPanel));
    let told = what_if(&site, Opens::Run(inverter), Sun::Full).unwrap();
    let of = |part| told.effects.iter().find(|one| one.part == part).unwrap().meaning;
    assert_eq!(of(inverter), Meaning::Dead);
    assert_eq!(of(panel), Meaning::Dead);
    assert_eq!(of(id(&site, PartKind::DcPanel)), Meaning::AsBefore);
}

#[test]
fn a_controller_cut_off_in_the_sun_leaves_its_array_open() {
    let site = room();
    let told = what_if(&site, Opens::Run(id(&site, PartKind::Controller)), Sun::Full).unwrap();
    let array = told.effects.iter().find(|one| one.part == id(&site, PartKind::Array)).unwrap();
    assert_eq!(array.meaning, Meaning::StandsOpen);
    let cold = crate::string::cold_voltage(&string_ask(&site, site.first(PartKind::Array).unwrap()));
    assert_eq!(array.volts, cold);
}

#[test]
fn another_source_running_free_is_held_against_its_controller() {
    let mut site = room();
    let source = site.add(PartKind::OtherSource).unwrap();
    assert_eq!(of(&site, "source-dump"), Some(Verdict::Asks));
    set(&mut site, source, Field::SourcePower, "400");
    set(&mut site, source, Field::DumpLoad, "300");
    set(&mut site, source, Field::OverspeedVolts, "400");
    assert_eq!(of(&site, "source-dump"), Some(Verdict::Breaks));
    assert_eq!(of(&site, "source-overspeed"), Some(Verdict::Breaks));
    set(&mut site, source, Field::DumpLoad, "400");
    assert_eq!(of(&site, "source-dump"), Some(Verdict::Clears));
}

#[test]
fn parts_come_and_go_and_no_name_is_used_twice() {
    let mut site = room();
    let controller = id(&site, PartKind::Controller);
    let array = id(&site, PartKind::Array);
    let second = site.duplicate(controller).unwrap();
    site.remove(controller);
    assert_eq!(site.part(array).unwrap().to, Some(second));
    site.remove(second);
    assert_eq!(site.part(array).unwrap().to, None);
    let third = site.add(PartKind::Controller).unwrap();
    assert!(third.0 > second.0);
    let _ = assess(&site);
}

#[test]
fn every_check_has_a_working_that_ends_at_its_margin() {
    let site = room();
    for one in assess(&site).checks {
        let steps = working(&site, one.place, one.check.id);
        if one.check.value.is_some() {
            assert!(!steps.is_empty(), "{one:?}");
        }
        if let (Some(margin), false) = (one.check.margin, matches!(one.check.id, CheckId::Site(_))) {
            assert!(steps.last().is_some_and(|step| step.result.number == margin.number()), "{one:?}");
        }
    }
}
