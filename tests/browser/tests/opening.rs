//! What is dropped on the page or opened from a file: taken whole or refused whole, with no signal as with one.

use bridge::demo;
use browser::{Result, Screen, Site, ensure, visit};

/// What stands in the whole page after nothing of it may have changed: the open site to the letter.
async fn link(site: &Site) -> Result<String> {
    site.value_of("Link that holds the site").await
}

/// The Sheet view of a site that is open and kept.
async fn sheet_of(site: &Site, name: &str) -> Result<()> {
    site.press("Line").await?;
    site.press(name).await?;
    site.element(".line .bus").await?;
    site.is_written().await?;
    site.press("Sheet").await
}

fn file_of(name: &str) -> String {
    bridge::site::write(&demo::demo(name).expect("a demonstration of that name"))
}

#[test]
fn a_dropped_file_or_link_is_opened_with_the_server_stopped() {
    visit(Screen::PHONE, async |site| {
        sheet_of(site, "Tarn cabin").await?;
        let cabin = link(site).await?;
        if site.keeps_a_copy().await? {
            site.lose_signal().await?;
        }
        let said = site.drop_file("clinic.json", file_of("Two Rivers clinic").as_bytes()).await?;
        ensure!(said.starts_with("Opened Two Rivers clinic: "), "{said}");
        site.heading("Two Rivers clinic the open site").await?;
        let said = site.drop_text(&cabin).await?;
        ensure!(said.starts_with("Opened Tarn cabin: "), "{said}");
        site.heading("Tarn cabin the open site").await?;
        ensure!(link(site).await? == cabin);
        let said = site.drop_file("notes.txt", b"buy fuses").await?;
        ensure!(said.starts_with("Not opened, nothing changed. notes.txt: "), "{said}");
        ensure!(link(site).await? == cabin);
        site.fits().await?;
        site.no_complaints().await
    });
}

/// Numbers with no rhyme, the same at each run: a linear congruential generator, as in Knuth's TAOCP vol. 2, 3.3.4
/// (multiplier 6364136223846793005; from memory).
struct Dice(u64);

impl Dice {
    fn below(&mut self, most: usize) -> usize {
        self.0 = self.0.wrapping_mul(6_364_136_223_846_793_005).wrapping_add(1_442_695_040_888_963_407);
        usize::try_from(self.0 >> 33).unwrap_or(0) % most
    }

    fn one_of<'a>(&mut self, all: &[&'a str]) -> &'a str {
        all[self.below(all.len())]
    }
}

/// A file that somebody or something has been at.
fn mutated(dice: &mut Dice) -> Vec<u8> {
    let names = demo::names();
    let text = file_of(names[dice.below(names.len())]);
    let lines: Vec<&str> = text.lines().collect();
    let at = 1 + dice.below(lines.len() - 2);
    let put = |line: String| {
        let mut all: Vec<String> = lines.iter().map(|line| (*line).to_owned()).collect();
        all[at] = line;
        all.join("\n").into_bytes()
    };
    // The text of an entry or of a name, for something else.
    let value = |to: &str| match lines[at].split_once(": ") {
        Some((key, before)) => put(format!("{key}: {to}{}", if before.ends_with(',') { "," } else { "" })),
        None => put(to.to_owned()),
    };
    match dice.below(9) {
        0 => text.as_bytes()[..dice.below(text.len())].to_vec(),
        1 => value(dice.one_of(&[
            "null",
            "true",
            "-1",
            "1e999",
            "NaN",
            "[]",
            "{}",
            "4294967296",
            "\"\"",
            "0.5",
            "1e-400",
        ])),
        2 => {
            let mut bytes = text.into_bytes();
            for _ in 0..=dice.below(4) {
                let place = dice.below(bytes.len());
                bytes[place] = u8::try_from(dice.below(256)).unwrap_or(0);
            }
            bytes
        }
        3 => value(dice.one_of(&[
            "\"<img src=x onerror=hurt()>\"",
            "\"<script>hurt()</script>\"",
            "\"javascript:hurt()\"",
            "\"\\u0000\\u202e\\ud83d\\ude00\"",
            "\"{{7*7}} ${7*7} %s\"",
        ])),
        4 => value(dice.one_of(&[
            "\"1e308\"",
            "\"-1e308\"",
            "\"Infinity\"",
            "\"1/0\"",
            "\"1,2,3\"",
            "\"12,,4\"",
            "\"4/0\"",
            "\"١٢\"",
        ])),
        5 => value(&format!("\"{}\"", "9".repeat(10 + dice.below(5000)))),
        6 => value(&format!("{}1{}", "[".repeat(1000), "]".repeat(1000))),
        7 => [lines[..at].join("\n"), lines[at + dice.below(lines.len() - at)..].join("\n")].join("\n").into_bytes(),
        _ => text
            .replace(
                dice.one_of(&["\"to\": ", "\"id\": ", "\"kind\": "]),
                dice.one_of(&["\"to\": 1", "\"id\": 9", "\"kind\": "]),
            )
            .into_bytes(),
    }
}

#[test]
fn two_hundred_mutated_files_open_whole_or_change_nothing() {
    visit(Screen::PHONE, async |site| {
        sheet_of(site, "Kestrel Ridge hut").await?;
        site.run("window.hurt = () => { window.isHurt = true; }", &[]).await?;
        let (mut dice, mut opened, mut refused) = (Dice(7), 0, 0);
        for turn in 0..200 {
            let bytes = mutated(&mut dice);
            let before = link(site).await?;
            let name = format!("m{turn}.json");
            let said = site.drop_file(&name, &bytes).await?;
            let after = link(site).await?;
            if said.starts_with("Not opened, nothing changed. ") {
                ensure!(after == before, "{name}: refused, and yet changed: {said}");
                ensure!(said.contains(&name), "{said}");
                refused += 1;
            } else {
                let letters = after.rsplit('/').next().unwrap_or_default();
                let open = bridge::link::site_of(letters)?;
                ensure!(Ok(&open) == bridge::site::open(&String::from_utf8_lossy(&bytes)).as_ref(), "{name}: {said}");
                // Looked at whole: every part, run and check of it is on the page.
                site.press("Line").await?;
                site.element(".site-line").await?;
                site.press("Sheet").await?;
                opened += 1;
            }
        }
        ensure!(
            opened > 20 && refused > 60,
            "{opened} opened, {refused} refused: the mutations are too wild or too tame"
        );
        ensure!(site.run("return window.isHurt ?? null", &[]).await?.is_null(), "a name was run");
        ensure!(site.count("main img, main script, main iframe").await? == 0, "a name became an element");
        site.no_complaints().await
    });
}

#[test]
fn a_file_of_ten_megabytes_is_refused_before_it_is_read() {
    visit(Screen::PHONE, async |site| {
        sheet_of(site, "Tarn cabin").await?;
        let before = link(site).await?;
        let said = site.drop_file("huge.json", &vec![b'['; 10_000_000]).await?;
        ensure!(said.starts_with("Not opened, nothing changed. huge.json: "), "{said}");
        ensure!(link(site).await? == before);
        site.no_complaints().await
    });
}
