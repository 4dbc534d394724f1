//! The shelf as a person uses it: the picture, then one link at a time with the meter in hand, with no signal.

use browser::{Result, Screen, Site, ensure, visit};

async fn shelf(site: &Site) -> Result<()> {
    site.load().await?;
    site.press("How do cells make a bank? Cells").await?;
    site.choose("Chemistry", "LiFePO4").await?;
    for (name, text) in
        [("Cell voltage", "3.2"), ("Cell capacity", "280"), ("Number of cells", "16"), ("Bus voltage", "48")]
    {
        site.type_into(name, text).await?;
    }
    site.unfold("The shelf where each cell stands, which link goes where").await?;
    for (name, text) in [("Rows", "2"), ("Columns", "8"), ("Cell length", "174"), ("Cell width", "72")] {
        site.type_into(name, text).await?;
    }
    site.element(".shelf svg").await?;
    Ok(())
}

fn plain(text: &str) -> String {
    text.replace(['\u{202f}', '\u{a0}', '\u{2009}', '\n'], " ")
}

async fn shows(site: &Site, words: &str) -> Result<()> {
    site.wait_for(&format!("the page to show \"{words}\""), async || {
        Ok(plain(&site.text().await?).contains(words).then_some(()))
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
            ensure!(site.overflow().await? == 0, "{} px beyond the edge", site.overflow().await?);
            Ok(())
        });
    }
}

#[test]
fn one_link_at_a_time_and_a_wrong_reading_is_told_at_once() {
    visit(Screen::PHONE, async |site| {
        shelf(site).await?;
        // The layout is made again a moment after the last figure: a press just before that is lost with the old one.
        site.wait_for("the first link", async || {
            if site.has_button("Fit them one by one").await? {
                // Gone in the moment between finding and pressing it: looked for again.
                let _ = site.press("Fit them one by one").await;
            }
            Ok(plain(&site.text().await?).contains("Link 1 of 15").then_some(()))
        })
        .await?;
        // Two cells of LiFePO4 at rest.
        site.wait_for("the reading to be told", async || {
            site.type_into("Reading after link 1", "6.58").await?;
            Ok(plain(&site.text().await?).contains("As it must be").then_some(()))
        })
        .await?;
        site.press("Next").await?;
        shows(site, "Link 2 of 15").await?;
        // One of three cells turned round: two cells' volts are missing.
        site.type_into("Reading after link 2", "3.3").await?;
        shows(site, "turned round").await?;
        site.press("Back").await?;
        ensure!(site.value_of("Reading after link 1").await? == "6.58", "what was read is kept");
        Ok(())
    });
}

#[test]
fn it_is_there_with_the_server_stopped() {
    visit(Screen::NARROW, async |site| {
        shelf(site).await?;
        if site.attribute("[data-copy]", "data-copy").await?.as_deref() == Some("not-possible") {
            return Ok(());
        }
        site.is_kept().await?;
        site.element(".kept[data-state=kept]").await?;
        site.stop_server();
        site.reload().await?;
        site.unfold("The shelf where each cell stands, which link goes where").await?;
        site.element(".shelf svg").await?;
        Ok(())
    });
}
