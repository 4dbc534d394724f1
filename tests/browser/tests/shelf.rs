//! The shelf as a person uses it: the picture, then one link at a time with the meter in hand, with no signal.

use browser::{Result, Screen, Site, ensure, visit};
use serde_json::Value;

const FOLD: &str = "The shelf where each cell stands, which link goes where";

/// A bank of so many cells of LiFePO4 for a bus, on the shelf of `fields`.
async fn on_shelf(site: &Site, cells: &str, bus: &str, fields: &[(&str, &str)]) -> Result<()> {
    site.open_tool("Cells").await?;
    site.choose("Chemistry", "LiFePO4").await?;
    site.enter(&[("Cell voltage", "3.2"), ("Cell capacity", "280"), ("Number of cells", cells), ("Bus voltage", bus)])
        .await?;
    site.unfold(FOLD).await?;
    site.enter(&[("Cell length", "174"), ("Cell width", "72")]).await?;
    site.enter(fields).await?;
    site.element(".shelf svg").await?;
    Ok(())
}

async fn shelf(site: &Site) -> Result<()> {
    on_shelf(site, "16", "48", &[("Rows", "2"), ("Columns", "8")]).await
}

/// Begins to fit the links.
async fn begin(site: &Site) -> Result<()> {
    // The layout is made again a moment after the last figure: a press just before that is lost with the old one.
    site.wait_for("the first link", async || {
        if site.has_button("Fit them one by one").await? {
            site.press("Fit them one by one").await?;
        }
        Ok(site.text().await?.contains("Link 1 of 15").then_some(()))
    })
    .await
}

#[test]
fn every_cell_and_link_is_drawn_on_both_screens() {
    for screen in [Screen::PHONE, Screen::NARROW] {
        visit(screen, async |site| {
            shelf(site).await?;
            ensure!(site.count(".shelf .cell").await? == 16, "sixteen cells");
            ensure!(site.count(".shelf .link").await? == 15, "fifteen links");
            ensure!(site.count(".shelf .plate").await? == 2, "two take-off posts");
            site.fits().await?;
            Ok(())
        });
    }
}

#[test]
fn one_link_at_a_time_and_a_wrong_reading_is_told_at_once() {
    visit(Screen::PHONE, async |site| {
        shelf(site).await?;
        begin(site).await?;
        // Two cells of LiFePO4 at rest.
        site.wait_for("the reading to be told", async || {
            site.type_into("Reading after link 1", "6.58").await?;
            Ok(site.text().await?.contains("As it must be").then_some(()))
        })
        .await?;
        site.press("Next").await?;
        site.shows("Link 2 of 15").await?;
        // One of three cells turned round: two cells' volts are missing.
        site.type_into("Reading after link 2", "3.3").await?;
        site.shows("turned round").await?;
        site.press("Back").await?;
        ensure!(site.value_of("Reading after link 1").await? == "6.58", "what was read is kept");
        Ok(())
    });
}

#[test]
fn it_is_there_with_the_server_stopped() {
    visit(Screen::NARROW, async |site| {
        shelf(site).await?;
        if !site.keeps_a_copy().await? {
            return Ok(());
        }
        site.lose_signal().await?;
        site.reload().await?;
        site.unfold(FOLD).await?;
        site.element(".shelf svg").await?;
        Ok(())
    });
}

/// Volts of the cells in the picture: one cell's, two cells' and so on, each once.
#[test]
fn the_volts_in_the_picture_rise_cell_by_cell_and_can_be_read() {
    visit(Screen::NARROW, async |site| {
        shelf(site).await?;
        let script = "return [...document.querySelectorAll('.shelf .volts')].map(one => parseFloat(one.textContent));";
        let mut volts: Vec<f64> = serde_json::from_value(site.run(script, &[]).await?)?;
        volts.sort_by(f64::total_cmp);
        ensure!(volts.len() == 16, "{volts:?}");
        for (cells, volts) in (1..).zip(&volts) {
            // A cell of LiFePO4 at rest, half full.
            ensure!((volts - 3.29 * f64::from(cells)).abs() < 0.06 * f64::from(cells), "{cells}: {volts}");
        }
        let script = "const svg = document.querySelector('.shelf svg'), text = svg.querySelector('.volts');\
                      return parseFloat(getComputedStyle(text).fontSize) * svg.clientWidth / svg.viewBox.baseVal.width;";
        let size = site.run(script, &[]).await?.as_f64().unwrap_or(0.0);
        ensure!(size >= 9.0, "figures of {size} px");
        Ok(())
    });
}

#[test]
fn rows_and_columns_stand_in_and_a_wrong_figure_is_told_and_kept() {
    visit(Screen::PHONE, async |site| {
        on_shelf(site, "16", "48", &[]).await?;
        ensure!(site.count(".shelf .cell").await? == 16, "two rows of eight stand in");
        site.unfold("Gaps and posts links are cut by them").await?;
        site.type_into("Post from edge", "90").await?;
        site.shows("posts 90 mm from the edge would meet").await?;
        ensure!(site.value_of("Post from edge").await? == "90", "what was typed is kept");
        site.clear("Post from edge").await?;
        site.element(".shelf svg").await?;
        Ok(())
    });
}

#[test]
fn a_wrong_reading_stops_next_and_what_was_read_outlives_the_page() {
    visit(Screen::NARROW, async |site| {
        shelf(site).await?;
        begin(site).await?;
        site.type_into("Reading after link 1", "3.29").await?;
        site.press("Next").await?;
        site.shows("One cell’s volts are missing").await?;
        ensure!(site.text().await?.contains("Link 1 of 15"), "it stays at the link");
        site.press("On all the same").await?;
        site.shows("Link 2 of 15").await?;
        site.press("Back").await?;
        site.type_into("Reading after link 1", "6.58").await?;
        site.shows("As it must be").await?;
        site.fits().await?;
        site.is_kept().await?;
        site.reload().await?;
        site.unfold(FOLD).await?;
        site.element(".shelf svg").await?;
        // It goes on where the readings end.
        site.press("Fit them one by one").await?;
        site.shows("Link 2 of 15").await?;
        site.press("Back").await?;
        ensure!(site.value_of("Reading after link 1").await? == "6.58", "what was read is kept");
        Ok(())
    });
}

#[test]
fn links_to_cut_and_the_last_link_are_told_for_groups() {
    visit(Screen::PHONE, async |site| {
        on_shelf(site, "32", "48", &[("Rows", "4"), ("Columns", "8")]).await?;
        site.shows("Groups of cells: Cells joined plus to plus").await?;
        ensure!(site.count(".shelf .link").await? == 47, "32 within groups, 15 from group to group");
        ensure!(site.count(".shelf .rim").await? == 1, "one link is the last");
        site.shows("Fit link 47 last").await?;
        site.unfold("Links to cut by length, and lugs to pack").await?;
        site.shows("96: 94 on links, 2 on take-off leads").await?;
        site.choose("Parallel as", "whole strings").await?;
        site.shows("Groups of cells are wiser here").await?;
        site.shows("64: 60 on links, 4 on take-off leads").await?;
        Ok(())
    });
}

#[test]
fn past_sixty_volts_is_marked_and_cautioned() {
    visit(Screen::NARROW, async |site| {
        on_shelf(site, "24", "72", &[("Rows", "3"), ("Columns", "8")]).await?;
        // From the eighteenth cell on, at the highest that a rested cell may read.
        ensure!(site.count(".shelf .past").await? == 7, "{} cells", site.count(".shelf .past").await?);
        site.shows("past 60 V d.c., which shocks").await
    });
}

#[test]
fn measured_cells_are_dealt_and_what_is_not_understood_is_named() {
    visit(Screen::NARROW, async |site| {
        on_shelf(site, "32", "48", &[]).await?;
        site.unfold("Match measured cells salvaged ones, dealt to groups").await?;
        let cells: Vec<String> = (0..32).map(|cell| (250 + cell * 7 % 32).to_string()).collect();
        site.type_into("Measured capacities", &cells.join(" ")).await?;
        site.shows("Groups differ by").await?;
        site.shows("Group 16").await?;
        site.type_into("Measured capacities", "280 2.7.9 281").await?;
        site.shows("Waits for number 2 of the capacities").await?;
        ensure!(site.value_of("Measured capacities").await? == "280 2.7.9 281", "what was typed is kept");
        let none: Value = site.run("return document.querySelectorAll('.fold-body .figures').length;", &[]).await?;
        ensure!(none == 0, "no figures beside what is not understood");
        Ok(())
    });
}
