//! The Run tool as a person uses it: which conductor, which breaker, what is lost, with no signal.

use browser::{Result, Screen, Site, ensure, visit};

/// Four 30 A controllers meet on one plate, 3 ft from the bank (common practice, no source).
async fn plate(site: &Site) -> Result<()> {
    site.choose("Kind of run", "controller output").await?;
    site.choose("Code family", "North America").await?;
    site.enter(&[("Current", "120"), ("Voltage", "12"), ("Length one way", "3 ft")]).await
}

#[test]
fn four_entries_give_conductor_breaker_and_drop() {
    for screen in [Screen::PHONE, Screen::NARROW] {
        visit(screen, async |site| {
            site.open_tool("Run").await?;
            site.says("Waits for Kind of run and Current or Power").await?;
            plate(site).await?;
            site.says("1/0 AWG").await?;
            site.says("Breaker 150 A").await?;
            site.says("Loses 0.08 V (0.7 %), 13.9 mV a cell of 2 V, 10.0 W as heat").await?;
            site.shows("32 V d.c. or more").await?;
            site.shows("must open both ways: not polarised").await?;
            ensure!(site.count(".answer .span").await? == 2, "amperes and drop have a bar each");
            ensure!(site.count("svg.run-pic").await? == 1, "the run is drawn");
            site.fits().await?;
            ensure!(site.count("[role=status]").await? == 1, "there is one status");
            site.no_complaints().await?;
            Ok(())
        });
    }
}

#[test]
fn several_side_by_side_fit_a_narrow_screen() {
    visit(Screen::NARROW, async |site| {
        site.open_tool("Run").await?;
        site.choose("Kind of run", "inverter feed").await?;
        site.choose("Code family", "North America").await?;
        site.enter(&[("Current", "600"), ("Voltage", "12"), ("Length one way", "6 ft")]).await?;
        site.says("2 × 500 kcmil").await?;
        site.shows("2 equal ones a pole").await?;
        site.fits().await?;
        Ok(())
    });
}

#[test]
fn four_controllers_on_one_2_awg_break_and_the_table_says_why() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("Run").await?;
        plate(site).await?;
        site.type_into("Size", "2 AWG").await?;
        site.says("breaks").await?;
        site.says("Conductor carries the current: 115.0 A, needs 150 A.").await?;
        site.unfold("Amperes flow, rule, table, corrections").await?;
        for row in ["Flows 120.0 A", "Must carry at its terminals 150.0 A", "Table, 75 °C column 115.0 A"] {
            site.shows(row).await?;
        }
        site.unfold("Working how this number is made").await?;
        site.shows("Margin to the limit").await
    });
}

#[test]
fn why_the_two_thinner_do_not_do() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("Run").await?;
        plate(site).await?;
        site.shows("1 AWG").await?;
        site.shows("Conductor carries the current: 130.0 A, needs 150 A.").await?;
        site.shows("Conductor carries the current: 115.0 A, needs 150 A.").await
    });
}

#[test]
fn the_bank_drives_more_than_a_small_breaker_opens() {
    visit(Screen::NARROW, async |site| {
        site.open_tool("Run").await?;
        site.choose("Kind of run", "bank main").await?;
        site.enter(&[("Current", "100"), ("Voltage", "48"), ("Length one way", "1.5")]).await?;
        site.shows("Assumed: a bank of some 400 Ah, new, warm and full").await?;
        site.unfold("More each lets more checks speak").await?;
        site.enter(&[("Interrupting rating", "6000"), ("Bank resistance", "5")]).await?;
        site.shows("The bank can drive 11 000 A here; this breaker opens 6000 A at these volts: breaks.").await?;
        site.says("Breaks as well: Breaker opens a short circuit").await?;
        site.type_into("Interrupting rating", "20 kA").await?;
        site.shows("opens 20 000 A at these volts: enough.").await?;
        site.fits().await?;
        Ok(())
    });
}

#[test]
fn one_tap_puts_a_resistor_before_an_inverter() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("Run").await?;
        site.choose("Kind of run", "inverter feed").await?;
        site.enter(&[("Power", "3 kW"), ("Voltage", "48"), ("Length one way", "2")]).await?;
        site.says("Breaks as well: Closing onto empty capacitors").await?;
        site.press("Charge it through a resistor first").await?;
        site.wait_for(
            "nothing to break",
            async || Ok((!site.status().await?.contains("Breaks as well")).then_some(())),
        )
        .await?;
        site.press("Undo: several fields").await?;
        site.says("Breaks as well").await
    });
}

#[test]
fn the_cable_on_the_truck_says_how_many_amperes_and_how_far() {
    visit(Screen::NARROW, async |site| {
        site.open_tool("Run").await?;
        site.choose("Kind of run", "DC branch").await?;
        site.enter(&[("Size", "2.5 mm2"), ("Voltage", "12")]).await?;
        site.says("2.5 mm² carries at most").await?;
        site.says("20.0 A").await?;
        site.says("With 20.0 A it goes 1.06 m").await?;
        site.type_into("Length one way", "5").await?;
        site.says("over 5 m the drop of 3 % is the limit").await?;
        site.type_into("Current", "2").await?;
        site.says("Loses").await?;
        site.shows("Goes with 2.00 A").await?;
        site.fits().await?;
        Ok(())
    });
}

#[test]
fn lights_down_a_corridor_tell_the_volts_at_each() {
    visit(Screen::NARROW, async |site| {
        site.open_tool("Run").await?;
        site.choose("Kind of run", "DC branch").await?;
        site.enter(&[("Voltage", "12"), ("Size", "2.5")]).await?;
        site.unfold("Lights along it volts at each load").await?;
        site.shows("No loads yet.").await?;
        site.enter(&[("Distances to loads", "4 8 12"), ("Watts of each load", "10 10 5.5.5")]).await?;
        site.shows("Number 3: ").await?;
        site.enter(&[("Watts of each load", "10 10 5")]).await?;
        site.shows("Load 3 loses most, 2.0 %; 3 % is allowed.").await?;
        site.shows("Load 1, 4 m along, 10 W 11.87 V, 1.1 % lost").await?;
        site.fits().await?;
        Ok(())
    });
}

#[test]
fn a_wrong_entry_stays_as_typed_with_its_reason_and_the_answer_asks() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("Run").await?;
        plate(site).await?;
        for (name, text, reason) in [
            ("Current", "120 V", "current"),
            ("Voltage", "1..2", "1.2"),
            ("Size", "0.001", "0.05"),
            ("Length one way", "-3", "0.01"),
        ] {
            let before = site.value_of(name).await?;
            site.refuses(name, text, reason).await?;
            if before.is_empty() {
                site.clear(name).await?;
            } else {
                site.type_into(name, &before).await?;
            }
            site.says("1/0 AWG").await?;
        }
        Ok(())
    });
}

#[test]
fn with_the_server_stopped_it_loads_again_and_still_answers() {
    visit(Screen::NARROW, async |site| {
        site.open_tool("Run").await?;
        if !site.keeps_a_copy().await? {
            return Ok(());
        }
        plate(site).await?;
        site.says("1/0 AWG").await?;
        site.lose_signal().await?;
        site.reload().await?;
        site.says("1/0 AWG").await?;
        site.type_into("Current", "40").await?;
        site.says("Breaker 50 A").await
    });
}
