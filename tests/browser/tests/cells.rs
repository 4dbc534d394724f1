//! Cells, Settings and Air and water as a person uses them: one bank, typed once, with no signal.

use browser::{Result, Screen, Site, bail, ensure, visit};
use xtask::{one_file, root};

/// Opens the tool from the first page, as a thumb does.
async fn open(site: &Site) -> Result<()> {
    site.load().await?;
    site.press("How do cells make a bank? Cells").await?;
    site.heading("Cells").await?;
    Ok(())
}

/// Goes from one tool to another by the first page.
async fn go_on_to(site: &Site, link: &str, head: &str) -> Result<()> {
    site.press("All tools").await?;
    site.press(link).await?;
    site.heading(head).await?;
    Ok(())
}

/// The homesteader's twelve cells.
const TWELVE: [(&str, &str); 4] =
    [("Cell voltage", "1.2"), ("Cell capacity", "700"), ("Number of cells", "12"), ("Bus voltage", "12")];

/// Forty cells for 48 V.
const FORTY: [(&str, &str); 4] =
    [("Cell voltage", "3.2"), ("Cell capacity", "280"), ("Number of cells", "40"), ("Bus voltage", "48")];

const MORE: &str = "More each lets more checks speak";

async fn bank(site: &Site, chemistry: &str, entries: &[(&str, &str)]) -> Result<()> {
    site.choose("Chemistry", chemistry).await?;
    enter(site, entries).await
}

async fn enter(site: &Site, entries: &[(&str, &str)]) -> Result<()> {
    for (name, text) in entries {
        site.type_into(name, text).await?;
    }
    Ok(())
}

/// The status with every kind of space made plain.
async fn says(site: &Site, words: &str) -> Result<()> {
    site.wait_for(&format!("the status to say \"{words}\""), async || {
        let status = plain(&site.status().await?);
        if status.contains(words) { Ok(Some(())) } else { bail!("it says \"{status}\"") }
    })
    .await
}

/// The whole page, in the same way.
async fn shows(site: &Site, words: &str) -> Result<()> {
    site.wait_for(&format!("the page to show \"{words}\""), async || {
        Ok(plain(&site.text().await?).contains(words).then_some(()))
    })
    .await
}

fn plain(text: &str) -> String {
    text.replace(['\u{202f}', '\u{a0}', '\u{2009}'], " ").replace('\n', " ")
}

/// Every write has been answered: the badge says kept.
async fn is_written(site: &Site) -> Result<()> {
    site.element(".kept[data-state=kept]").await.map(drop)
}

#[test]
fn two_taps_and_four_numbers_rank_the_layouts_and_catch_the_trap() {
    for screen in [Screen::PHONE, Screen::NARROW] {
        visit(screen, async |site| {
            open(site).await?;
            says(site, "Waits for Chemistry, Cell voltage, Number of cells and Bus voltage.").await?;
            bank(site, "nickel-iron", &TWELVE).await?;
            says(site, "9 in series").await?;
            says(site, "12 cells are not 12 V").await?;
            says(site, "14.40 V nominal").await?;
            says(site, "9.00 V empty to 15.75 V equalising. 3 cells left over.").await?;
            says(site, "Or 10 in series, with devices that run from 10.00 V and tolerate 17.50 V.").await?;
            shows(site, "Highest bank voltage against the inverter: 21.0 V, at most 16 V").await?;
            ensure!(site.overflow().await? == 0, "{} px beyond the edge", site.overflow().await?);
            ensure!(site.count("[role=status]").await? == 1, "there is one status");
            let complaints = site.console_errors().await?;
            ensure!(complaints.is_empty(), "{complaints:#?}");
            Ok(())
        });
    }
}

/// End 1.00, absorb 1.65, equalise 1.75 V a cell; inverter 10.5 to 16.0 V.
#[test]
fn worked_case_c_in_full() {
    visit(Screen::PHONE, async |site| {
        open(site).await?;
        bank(site, "nickel-iron", &TWELVE).await?;
        site.unfold(MORE).await?;
        enter(site, &[("Inverter low", "10.5"), ("Inverter high", "16")]).await?;
        for (series, window, margins) in [
            ("12", "12.00 V empty to 21.0 V", ["−31.3 %", "−23.8 %"]),
            ("10", "10.00 V empty to 17.50 V", ["−9.4 %", "−3.1 %"]),
            ("9", "9.00 V empty to 15.75 V", ["1.6 %", "−14.3 %"]),
        ] {
            site.type_into("Cells in series", series).await?;
            says(site, window).await?;
            for margin in margins {
                shows(site, margin).await?;
            }
        }
        // Nine hold the window's top, and lose charge at its bottom.
        says(site, "loss").await?;
        says(site, "Lowest bank voltage against the cut-off: 9.00 V, needs 10.5 V").await?;
        site.unfold("Working how this number is made").await?;
        shows(site, "The cut-off, a cell 1.1667 V").await?;
        Ok(())
    });
}

#[test]
fn a_tap_takes_a_layout_and_undo_takes_it_back() {
    visit(Screen::NARROW, async |site| {
        open(site).await?;
        bank(site, "LiFePO4", &FORTY).await?;
        site.unfold(MORE).await?;
        enter(site, &[("Inverter low", "44"), ("Inverter high", "58")]).await?;
        says(site, "16 in series × 2").await?;
        says(site, "8 cells left over").await?;
        site.press("Take 15 in series, 2 strings").await?;
        says(site, "15 in series × 2").await?;
        ensure!(site.value_of("Cells in series").await? == "15" && site.value_of("Strings of cells").await? == "2");
        site.press("Undo: several fields").await?;
        says(site, "16 in series × 2").await?;
        site.unfold("Sharing string by string, by take-off").await?;
        shows(site, "Take-off: opposite ends").await?;
        site.unfold("The others 33 more").await?;
        shows(site, "40 in series").await?;
        ensure!(site.overflow().await? == 0, "{} px beyond the edge", site.overflow().await?);
        Ok(())
    });
}

#[test]
fn a_wrong_entry_stays_as_typed_with_its_reason_and_the_answer_asks() {
    visit(Screen::PHONE, async |site| {
        open(site).await?;
        bank(site, "nickel-iron", &TWELVE).await?;
        for (name, text, reason) in [
            ("Cell voltage", "1.2 A", "current"),
            ("Number of cells", "2.5", "whole"),
            ("Bus voltage", "12,,4", "12.4"),
            ("Coldest in the room", "-400", "below absolute zero"),
        ] {
            let before = site.value_of(name).await?;
            site.type_into(name, text).await?;
            site.leave().await?;
            site.shows(reason).await?;
            ensure!(site.value_of(name).await? == text, "{name} keeps what was typed");
            says(site, "asks").await?;
            says(site, name).await?;
            site.type_into(name, &before).await?;
            says(site, "9 in series").await?;
        }
        Ok(())
    });
}

#[test]
fn rested_blocks_tell_their_charge_and_the_odd_one() {
    visit(Screen::PHONE, async |site| {
        open(site).await?;
        bank(site, "vented lead", &[("Cell voltage", "12")]).await?;
        site.unfold("Cells at rest charge, and the odd ones").await?;
        site.type_into("Rest voltages", "12.24; 12,25; 11.60; 12.24; 12.23").await?;
        site.type_into("Bank temperature", "26.7").await?;
        shows(site, "likeliest 50 %").await?;
        shows(site, "Stands apart: number 3").await?;
        site.type_into("Rest voltages", "12.24 12.2.4").await?;
        shows(site, "Waits for the 2. of the voltages.").await?;
        Ok(())
    });
}

#[test]
fn settings_and_air_read_the_same_bank_and_write_it() {
    for screen in [Screen::PHONE, Screen::NARROW] {
        visit(screen, async |site| {
            open(site).await?;
            let entries =
                [("Cell voltage", "2"), ("Cell capacity", "500"), ("Number of cells", "24"), ("Bus voltage", "48")];
            bank(site, "vented lead", &entries).await?;
            says(site, "24 in series").await?;

            go_on_to(site, "What to key in? Settings", "Settings").await?;
            // 24 · 2.45 V, 24 · 2.25 V, 24 · 4 mV/K.
            says(site, "58.8").await?;
            says(site, "Float 54.0 V.").await?;
            shows(site, "Compensation").await?;
            ensure!(site.value_of("Number of cells").await? == "24", "nothing is typed twice");
            site.type_into("Cells in series", "12").await?;
            says(site, "29.4").await?;
            site.clear("Cells in series").await?;
            says(site, "58.8").await?;
            ensure!(site.overflow().await? == 0, "{} px beyond the edge", site.overflow().await?);

            go_on_to(site, "What does its room need? Air and water", "Air and water").await?;
            // IEC 62485-2: 0.05 · 24 · 10 A = 12 m³/h; 28 cm² for each; 24 cells, 20 mA/Ah.
            says(site, "336").await?;
            says(site, "12.0 m³/h of fresh air").await?;
            site.type_into("Air opening", "300").await?;
            site.type_into("Coldest in the room", "5").await?;
            says(site, "breaks").await?;
            says(site, "Air for the room: 300 cm², needs 336 cm²").await?;
            site.type_into("Air opening", "400").await?;
            says(site, "close").await?;
            ensure!(site.overflow().await? == 0, "{} px beyond the edge", site.overflow().await?);

            go_on_to(site, "How do cells make a bank? Cells", "Cells").await?;
            ensure!(site.value_of("Coldest in the room").await? == "5", "it is the same bank");
            let complaints = site.console_errors().await?;
            ensure!(complaints.is_empty(), "{complaints:#?}");
            Ok(())
        });
    }
}

#[test]
fn with_the_server_stopped_all_three_load_again_and_still_answer() {
    visit(Screen::PHONE, async |site| {
        open(site).await?;
        if site.attribute("[data-copy]", "data-copy").await?.as_deref() == Some("not-possible") {
            return Ok(());
        }
        site.is_kept().await?;
        bank(site, "nickel-iron", &TWELVE).await?;
        says(site, "9 in series").await?;
        is_written(site).await?;
        site.stop_server();
        ensure!(!site.server_answers(), "the server still answers");
        site.reload().await?;
        says(site, "9 in series").await?;
        go_on_to(site, "What to key in? Settings", "Settings").await?;
        says(site, "14.85").await?;
        go_on_to(site, "What does its room need? Air and water", "Air and water").await?;
        site.reload().await?;
        says(site, "of fresh air").await?;
        Ok(())
    });
}

#[test]
fn the_one_file_answers_with_no_server() {
    visit(Screen::PHONE, async |site| {
        site.open_file(&root::dist().join(one_file::NAME)).await?;
        site.press("How do cells make a bank? Cells").await?;
        bank(site, "nickel-iron", &TWELVE).await?;
        says(site, "9 in series").await?;
        Ok(())
    });
}
