//! Cells, Settings and Air and water as a person uses them: one bank, typed once, with no signal.

use browser::{Result, Screen, Site, ensure, visit};
use xtask::{one_file, root};

/// The homesteader's twelve cells.
const TWELVE: [(&str, &str); 4] =
    [("Cell voltage", "1.2"), ("Cell capacity", "700"), ("Number of cells", "12"), ("Bus voltage", "12")];

/// Forty cells for 48 V.
const FORTY: [(&str, &str); 4] =
    [("Cell voltage", "3.2"), ("Cell capacity", "280"), ("Number of cells", "40"), ("Bus voltage", "48")];

const MORE: &str = "More each lets more checks speak";

async fn bank(site: &Site, chemistry: &str, entries: &[(&str, &str)]) -> Result<()> {
    site.choose("Chemistry", chemistry).await?;
    site.enter(entries).await
}

#[test]
fn two_taps_and_four_numbers_rank_the_layouts_and_catch_the_trap() {
    for screen in [Screen::PHONE, Screen::NARROW] {
        visit(screen, async |site| {
            site.open_tool("Cells").await?;
            site.says("Waits for Chemistry, Cell voltage, Number of cells and Bus voltage.").await?;
            bank(site, "nickel-iron", &TWELVE).await?;
            site.says("9 in series").await?;
            site.says("12 cells are not 12 V").await?;
            site.says("14.40 V nominal").await?;
            site.says("9.00 V empty to 15.75 V equalising. 3 cells left over.").await?;
            site.says("Or 10 in series, with devices that run from 10.00 V and tolerate 17.50 V.").await?;
            site.shows("Highest bank voltage against the inverter: 21.0 V, at most 16 V").await?;
            site.fits().await?;
            ensure!(site.count("[role=status]").await? == 1, "there is one status");
            site.no_complaints().await?;
            Ok(())
        });
    }
}

/// End 1.00, absorb 1.65, equalise 1.75 V a cell; inverter 10.5 to 16.0 V.
#[test]
fn worked_case_c_in_full() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("Cells").await?;
        bank(site, "nickel-iron", &TWELVE).await?;
        site.unfold(MORE).await?;
        site.enter(&[("Inverter low", "10.5"), ("Inverter high", "16")]).await?;
        for (series, window, margins) in [
            ("12", "12.00 V empty to 21.0 V", ["−31.3 %", "−23.8 %"]),
            ("10", "10.00 V empty to 17.50 V", ["−9.4 %", "−3.1 %"]),
            ("9", "9.00 V empty to 15.75 V", ["1.6 %", "−14.3 %"]),
        ] {
            site.type_into("Cells in series", series).await?;
            site.says(window).await?;
            for margin in margins {
                site.shows(margin).await?;
            }
        }
        // Nine hold the window's top, and lose charge at its bottom.
        site.says("loss").await?;
        site.says("Lowest bank voltage against the cut-off: 9.00 V, needs 10.5 V").await?;
        site.unfold("Working how this number is made").await?;
        site.shows("The cut-off, a cell 1.1667 V").await?;
        Ok(())
    });
}

#[test]
fn a_tap_takes_a_layout_and_undo_takes_it_back() {
    visit(Screen::NARROW, async |site| {
        site.open_tool("Cells").await?;
        bank(site, "LiFePO4", &FORTY).await?;
        site.unfold(MORE).await?;
        site.enter(&[("Inverter low", "44"), ("Inverter high", "58")]).await?;
        site.says("16 in series × 2").await?;
        site.says("8 cells left over").await?;
        site.press("Take 15 in series, 2 strings").await?;
        site.says("15 in series × 2").await?;
        ensure!(site.value_of("Cells in series").await? == "15" && site.value_of("Strings of cells").await? == "2");
        site.press("Undo: several fields").await?;
        site.says("16 in series × 2").await?;
        site.unfold("Sharing string by string, by take-off").await?;
        site.shows("Take-off: opposite ends").await?;
        site.unfold("The others 33 more").await?;
        site.shows("40 in series").await?;
        site.fits().await?;
        Ok(())
    });
}

#[test]
fn a_wrong_entry_stays_as_typed_with_its_reason_and_the_answer_asks() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("Cells").await?;
        bank(site, "nickel-iron", &TWELVE).await?;
        for (name, text, reason) in [
            ("Cell voltage", "1.2 A", "current"),
            ("Number of cells", "2.5", "whole"),
            ("Bus voltage", "12,,4", "12.4"),
            ("Coldest in the room", "-400", "below absolute zero"),
        ] {
            let before = site.value_of(name).await?;
            site.refuses(name, text, reason).await?;
            site.says(name).await?;
            site.type_into(name, &before).await?;
            site.says("9 in series").await?;
        }
        Ok(())
    });
}

#[test]
fn rested_blocks_tell_their_charge_and_the_odd_one() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("Cells").await?;
        bank(site, "vented lead", &[("Cell voltage", "12")]).await?;
        site.unfold("Cells at rest charge, and the odd ones").await?;
        site.type_into("Rest voltages", "12.24; 12,25; 11.60; 12.24; 12.23").await?;
        site.type_into("Bank temperature", "26.7").await?;
        site.shows("likeliest 50 %").await?;
        site.shows("Stands apart: number 3").await?;
        site.type_into("Rest voltages", "12.24 12.2.4").await?;
        site.shows("Waits for the 2. of the voltages.").await?;
        Ok(())
    });
}

#[test]
fn settings_and_air_read_the_same_bank_and_write_it() {
    for screen in [Screen::PHONE, Screen::NARROW] {
        visit(screen, async |site| {
            site.open_tool("Cells").await?;
            let entries =
                [("Cell voltage", "2"), ("Cell capacity", "500"), ("Number of cells", "24"), ("Bus voltage", "48")];
            bank(site, "vented lead", &entries).await?;
            site.says("24 in series").await?;

            site.go_on_to("Settings").await?;
            // 24 · 2.45 V, 24 · 2.25 V, 24 · 4 mV/K.
            site.says("58.8").await?;
            site.says("Float 54.0 V.").await?;
            site.shows("Compensation").await?;
            ensure!(site.value_of("Number of cells").await? == "24", "nothing is typed twice");
            site.type_into("Cells in series", "12").await?;
            site.says("29.4").await?;
            site.clear("Cells in series").await?;
            site.says("58.8").await?;
            site.fits().await?;

            site.go_on_to("Air and water").await?;
            // IEC 62485-2: 0.05 · 24 · 10 A = 12 m³/h; 28 cm² for each; 24 cells, 20 mA/Ah.
            site.says("336").await?;
            site.says("12.0 m³/h of fresh air").await?;
            site.type_into("Air opening", "300").await?;
            site.type_into("Coldest in the room", "5").await?;
            site.says("breaks").await?;
            site.says("Air for the room: 300 cm², needs 336 cm²").await?;
            site.type_into("Air opening", "400").await?;
            site.says("close").await?;
            site.fits().await?;

            site.go_on_to("Cells").await?;
            ensure!(site.value_of("Coldest in the room").await? == "5", "it is the same bank");
            site.no_complaints().await?;
            Ok(())
        });
    }
}

#[test]
fn with_the_server_stopped_all_three_load_again_and_still_answer() {
    visit(Screen::PHONE, async |site| {
        site.open_tool("Cells").await?;
        if !site.keeps_a_copy().await? {
            return Ok(());
        }
        bank(site, "nickel-iron", &TWELVE).await?;
        site.says("9 in series").await?;
        site.lose_signal().await?;
        site.reload().await?;
        site.says("9 in series").await?;
        site.go_on_to("Settings").await?;
        site.says("14.85").await?;
        site.go_on_to("Air and water").await?;
        site.reload().await?;
        site.says("of fresh air").await?;
        Ok(())
    });
}

#[test]
fn the_one_file_answers_with_no_server() {
    visit(Screen::PHONE, async |site| {
        site.open_file(&root::dist().join(one_file::NAME)).await?;
        site.press_tool("Cells").await?;
        bank(site, "nickel-iron", &TWELVE).await?;
        site.says("9 in series").await?;
        Ok(())
    });
}
