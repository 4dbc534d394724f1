//! The String tool as a person uses it: how many in series, in ten seconds, with no signal.

use browser::{Kind, Screen, ensure, visit};
use xtask::{one_file, root};

/// The four entries and the coefficient of the ridge's module.
const RIDGE: [(&str, &str); 5] = [
    ("Voc", "49.3"),
    ("Voc coefficient", "-0.27"),
    ("Record low", "-31"),
    ("Input limit", "150"),
    ("Modules in series", "3"),
];

#[test]
fn three_in_series_break_and_two_are_the_longest() {
    for screen in [Screen::PHONE, Screen::NARROW] {
        visit(screen, async |site| {
            site.open_tool("String").await?;
            site.says("asks").await?;
            site.enter(&RIDGE).await?;
            site.says("175.4").await?;
            site.says("breaks").await?;
            site.says("25.4 V (16.9 %) over the input limit of 150 V").await?;
            site.says("170.3 V by the nameplate").await?;
            site.says("Longest safe string: 2").await?;
            site.fits().await?;
            ensure!(site.count("[role=status]").await? == 1, "there is one status");
            site.no_complaints().await?;
            Ok(())
        });
    }
}

#[test]
fn the_four_entries_and_a_unit_of_ones_own_are_enough() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("String").await?;
        site.enter(&[("Voc", "41,2"), ("Record low", "-36.4 F"), ("Input limit", "150"), ("Modules in series", "2")])
            .await?;
        // −38 °C: the code's table, 1.25, and the assumed 3 %: 2 × 41.2 × 1.25 × 1.03.
        site.says("106.1").await?;
        site.says("close").await?;
        site.says("cold table").await?;
        ensure!(site.value_of("Voc").await? == "41,2" && site.value_of("Record low").await? == "-36.4 F");
        Ok(())
    });
}

#[test]
fn worked_case_a_in_millivolts() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("String").await?;
        let entries = [
            ("Voc", "41.2"),
            ("Voc coefficient", "-118 mV/K"),
            ("Record low", "-38"),
            ("Input limit", "150"),
            ("Modules in series", "3"),
        ];
        site.enter(&entries).await?;
        site.says("150.3").await?;
        site.says("breaks").await?;
        site.says("145.9 V by the nameplate").await?;
        site.says("Longest safe string: 2").await?;
        site.unfold("More each lets more checks speak").await?;
        site.type_into("Voc tolerance", "0").await?;
        site.says("145.9").await?;
        site.says("clears").await?;
        site.says("Longest safe string: 3").await?;
        Ok(())
    });
}

#[test]
fn worked_case_b_fuses_every_string() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("String").await?;
        site.unfold("More each lets more checks speak").await?;
        site.enter(&[("Isc", "10.6"), ("Series fuse rating", "20"), ("Strings", "4")]).await?;
        site.wait_for("the fuses that fit", async || {
            Ok(site.text().await?.contains("Fuse every string: 16 or 20 A fits by the rule; 20 A where").then_some(()))
        })
        .await?;
        site.choose("Code family", "North America").await?;
        site.wait_for("the fuse of the other family", async || {
            Ok(site.text().await?.contains("Fuse every string: 20 A fits by the rule").then_some(()))
        })
        .await?;
        Ok(())
    });
}

#[test]
fn one_tap_confirms_what_was_assumed_and_undo_takes_it_back() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("String").await?;
        site.enter(&RIDGE[..4]).await?;
        site.press("Modules in series: one more").await?;
        site.press("Modules in series: one more").await?;
        site.says("116.9").await?;
        site.says("Close until that is confirmed: Voc tolerance").await?;
        site.press("The nameplate says +3 %").await?;
        site.says("clears").await?;
        site.press("Undo: several fields").await?;
        site.says("close").await?;
        Ok(())
    });
}

#[test]
fn a_wrong_entry_stays_as_typed_with_its_reason_and_the_answer_asks() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("String").await?;
        site.enter(&RIDGE).await?;
        for (name, text, reason) in [
            ("Record low", "-400", "below absolute zero"),
            ("Voc", "12,,4", "12.4"),
            ("Input limit", "150 A", "current"),
            ("Modules in series", "2.5", "whole"),
        ] {
            let before = site.value_of(name).await?;
            site.refuses(name, text, reason).await?;
            site.says(name).await?;
            site.type_into(name, &before).await?;
            site.says("breaks").await?;
        }
        Ok(())
    });
}

#[test]
fn the_working_unfolds_step_by_step() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("String").await?;
        site.enter(&RIDGE).await?;
        site.unfold("Working how this number is made").await?;
        site.wait_for("the steps", async || {
            let text = site.text().await?;
            let steps = ["25 − (−31)", "15.12 %", "56.754 V", "IEC 60891", "Margin to the limit"];
            Ok(steps.iter().all(|step| text.contains(step)).then_some(()))
        })
        .await
    });
}

#[test]
fn layouts_of_nine_modules_put_two_by_four_first_and_a_tap_takes_it() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("String").await?;
        site.enter(&RIDGE).await?;
        site.unfold("More each lets more checks speak").await?;
        let more = [
            ("Vmp", "41.1"),
            ("Imp", "10.9"),
            ("Isc", "11.6"),
            ("Record high", "34"),
            ("PV current limit", "60"),
            ("Highest charge voltage", "56"),
            ("Output current", "80"),
            ("Modules at hand", "9"),
        ];
        site.enter(&more).await?;
        site.shows("Every layout of 9 modules").await?;
        site.press("Take 2 in series, 4 strings").await?;
        site.says("116.9").await?;
        ensure!(site.value_of("Strings").await? == "4");
        site.unfold("What would use them all one change").await?;
        site.wait_for("the smallest change", async || {
            Ok(site.text().await?.contains("one with an input limit of at least 175.4 V").then_some(()))
        })
        .await
    });
}

#[test]
fn what_was_typed_is_there_after_loading_again() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("String").await?;
        site.enter(&RIDGE).await?;
        site.type_into("Voc", "49,3 V").await?;
        site.says("175.4").await?;
        site.is_written().await?;
        site.reload().await?;
        site.says("175.4").await?;
        for (name, text) in RIDGE {
            let wanted = if name == "Voc" { "49,3 V" } else { text };
            ensure!(site.value_of(name).await? == wanted, "{name} is as it was typed");
        }
        Ok(())
    });
}

#[test]
fn with_the_server_stopped_it_loads_again_and_still_answers() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("String").await?;
        if !site.keeps_a_copy().await? {
            return Ok(());
        }
        site.enter(&RIDGE).await?;
        site.lose_signal().await?;
        site.reload().await?;
        site.says("175.4").await?;
        site.type_into("Modules in series", "2").await?;
        site.says("116.9").await?;
        Ok(())
    });
}

#[test]
fn the_one_file_answers_with_no_server() {
    visit(Screen::PHONE, async |site| {
        site.open_file(&root::dist().join(one_file::NAME)).await?;
        site.press_tool("String").await?;
        site.enter(&RIDGE).await?;
        site.says("175.4").await?;
        site.says("Longest safe string: 2").await?;
        Ok(())
    });
}

/// Printed, and no pass mark: a slow machine fails nothing.
#[test]
fn one_keystroke_to_the_painted_answer() {
    visit(Screen::PHONE, async |site| {
        if site.kind != Kind::Chromium {
            return Ok(());
        }
        site.open_tool("String").await?;
        site.enter(&RIDGE).await?;
        let times = site.keystrokes_slowed("Voc", "49.3").await?;
        println!("one keystroke to the painted answer, processor six times slower: {:.1} ms (median of 5)", times[2]);
        Ok(())
    });
}
