//! A site goes from one phone to another by codes on the screen, with no network between them.

use std::cell::RefCell;

use browser::{Result, Screen, Site, ensure, visit};

const CODES: &str = "As a code to scan no network";

/// What a reader of another make (rqrr) reads from the code on the screen, by the modules drawn there.
async fn scanned(site: &Site) -> Result<String> {
    const SCALE: usize = 3;
    let size: usize =
        site.attribute(".code", "viewBox").await?.unwrap_or_default().rsplit(' ').next().unwrap_or("").parse()?;
    let path = site.attribute(".code path", "d").await?.unwrap_or_default();
    let mut dark = vec![false; size * size];
    for run in path.split('M').filter(|run| !run.is_empty()) {
        let numbers: Vec<usize> = run
            .split(|letter: char| !letter.is_ascii_digit())
            .filter(|number| !number.is_empty())
            .take(3)
            .map(str::parse)
            .collect::<Result<_, _>>()?;
        let [x, y, count] = numbers[..] else { browser::bail!("no run of modules: {run}") };
        dark[y * size + x..y * size + x + count].fill(true);
    }
    let mut picture = rqrr::PreparedImage::prepare_from_greyscale(size * SCALE, size * SCALE, |x, y| {
        if dark[y / SCALE * size + x / SCALE] { 0 } else { 255 }
    });
    let found = picture.detect_grids();
    ensure!(found.len() == 1, "{} codes", found.len());
    Ok(found[0].decode()?.1)
}

/// The part behind `#` of every code of the demonstration, read from the screen, and the site's own link.
async fn all_codes(site: &Site, name: &str) -> Result<(Vec<String>, String)> {
    site.press("Line").await?;
    site.press(name).await?;
    site.element(".line .bus").await?;
    if site.keeps_a_copy().await? {
        site.lose_signal().await?;
    }
    site.press("Sheet").await?;
    site.unfold(CODES).await?;
    site.element(".code").await?;
    let of: usize =
        site.attribute(".code", "aria-label").await?.unwrap_or_default().rsplit(' ').next().unwrap_or("").parse()?;
    let mut codes = Vec::new();
    for place in 1..=of {
        site.element(&format!(".code[aria-label='Code {place} of {of}']")).await?;
        let link = scanned(site).await?;
        ensure!(link.starts_with(&site.address()), "{link}");
        codes.extend(link.split_once('#').map(|(_, behind)| behind.to_owned()));
        if place < of {
            site.press("Next").await?;
        }
    }
    site.fits().await?;
    site.no_complaints().await?;
    let link = site.value_of("Link that holds the site").await?;
    Ok((codes, link.rsplit('/').next().unwrap_or_default().to_owned()))
}

#[test]
fn every_demonstration_goes_to_another_phone_by_its_codes() {
    for (name, screen) in
        [("Kestrel Ridge hut", Screen::PHONE), ("Tarn cabin", Screen::NARROW), ("Two Rivers clinic", Screen::NARROW)]
    {
        let sent = RefCell::new((Vec::new(), String::new()));
        visit(screen, async |site| {
            sent.replace(all_codes(site, name).await?);
            Ok(())
        });
        let (codes, link) = sent.into_inner();
        assert!((2..=4).contains(&codes.len()), "{name}: {} codes", codes.len());
        // A browser that nobody has used before; each code opens a tab of its own, the last first.
        visit(screen, async |site| {
            for (place, code) in codes.iter().enumerate().rev() {
                site.another_tab(&format!("#{code}")).await?;
                if place > 0 {
                    site.shows(&format!("{} of {} pieces are here", codes.len() - place, codes.len())).await?;
                    site.shows("Still missing: piece").await?;
                    site.fits().await?;
                }
            }
            site.element(".line .bus").await?;
            ensure!(site.value_of("Name of the site").await? == name);
            site.shows("It is on the Line").await?;
            site.press("Sheet").await?;
            ensure!(
                site.value_of("Link that holds the site").await?.ends_with(&format!("/{link}")),
                "the same to the letter"
            );
            site.no_complaints().await
        });
    }
}

#[test]
fn a_code_that_was_cut_or_is_of_another_site_changes_nothing() {
    let sent = RefCell::new(Vec::new());
    visit(Screen::PHONE, async |site| {
        sent.replace(all_codes(site, "Kestrel Ridge hut").await?.0);
        Ok(())
    });
    let codes = sent.into_inner();
    visit(Screen::PHONE, async |site| {
        site.press("Line").await?;
        site.press("Tarn cabin").await?;
        site.element(".line .bus").await?;
        let go = async |code: &str| site.run("location.hash = arguments[0]", &[code.into()]).await;
        go("/piece/nonsense").await?;
        site.shows("Not opened, nothing changed. The code: ").await?;
        go(&codes[0]).await?;
        site.shows("1 of ").await?;
        // Letters of the last pieces gone on the way: the sum tells.
        for code in &codes[1..] {
            go(&code[..code.len() - 8]).await?;
        }
        site.shows("the pieces do not belong together").await?;
        // A set that was begun can be put away.
        go(&codes[1]).await?;
        site.shows(&format!("1 of {} pieces are here", codes.len())).await?;
        site.press("Put these pieces away").await?;
        site.heading("Tarn cabin the open site").await?;
        site.no_complaints().await
    });
}

#[test]
fn the_codes_step_by_themselves_only_when_asked() {
    visit(Screen::NARROW, async |site| {
        site.press("Line").await?;
        site.press("Two Rivers clinic").await?;
        site.press("Sheet").await?;
        site.unfold(CODES).await?;
        site.element(".code[aria-label^='Code 1 of ']").await?;
        site.press("Step by itself").await?;
        site.element(".code[aria-label^='Code 2 of ']").await?;
        site.press("Stop").await?;
        site.press("Back").await?;
        site.element(".code[aria-label^='Code 1 of ']").await?;
        site.no_complaints().await
    });
}

/// The pieces were made by Python's `zlib` and `base64` when the layout was first released.
#[test]
fn pieces_that_another_program_compressed_open() {
    let kept = bridge::site::open(include_str!("../../../crates/bridge/tests/kept/site-v1.json")).expect("a kept site");
    visit(Screen::PHONE, async |site| {
        let pieces = include_str!("../../../crates/bridge/tests/kept/site-v1.compressed.pieces").lines();
        for (place, piece) in pieces.enumerate() {
            site.run("location.hash = arguments[0]", &[piece.into()]).await?;
            if place < 2 {
                site.shows(&format!("{} of 3 pieces are here", place + 1)).await?;
            }
        }
        site.element(".line .bus").await?;
        site.press("Sheet").await?;
        let link = site.value_of("Link that holds the site").await?;
        ensure!(link.ends_with(&bridge::link::letters(&kept)), "the same to the letter");
        site.no_complaints().await
    });
}
