//! A whole site as a person uses it: six taps, a part beside the line, kept, shared, undone, with no signal.

use std::cell::RefCell;

use browser::{Kind, Result, Screen, Site, ensure, visit, visit_and_kill};

async fn line(site: &Site) -> Result<()> {
    site.load().await?;
    site.press("Line").await?;
    Ok(())
}

async fn six_taps(site: &Site) -> Result<()> {
    for answer in ["IEC, metric", "−20 °C", "8", "LiFePO4", "48 V", "3 kW"] {
        site.press(answer).await?;
    }
    site.element(".line .bus").await?;
    Ok(())
}

#[test]
fn six_taps_make_a_whole_assessed_line() {
    for screen in [Screen::PHONE, Screen::NARROW] {
        visit(screen, async |site| {
            line(site).await?;
            six_taps(site).await?;
            for part in ["Array", "Controller", "Bank", "Inverter", "AC panel", "DC panel"] {
                site.shows(part).await?;
            }
            site.shows("typical: read your nameplate").await?;
            ensure!(site.count(".line > li").await? > 10, "parts and runs stand on it");
            site.fits().await?;
            Ok(())
        });
    }
}

#[test]
fn the_hut_breaks_at_its_cold_string_and_the_part_is_mended_in_place() {
    visit(Screen::PHONE, async |site| {
        line(site).await?;
        site.press("Kestrel Ridge hut").await?;
        site.shows("Cold string against the controller, 170.3 V, at most 150 V").await?;
        site.press("Array").await?;
        site.heading("Array").await?;
        site.type_into("Modules in series", "2").await?;
        site.type_into("Strings", "4").await?;
        site.press("Line").await?;
        site.wait_for("the worst to be another", async || {
            Ok((!site.text().await?.contains("170.3 V, at most")).then_some(()))
        })
        .await?;
        // Undo leads back through it.
        site.press("Undo: Strings").await?;
        site.press("Undo: Modules in series").await?;
        site.shows("170.3 V, at most 150 V").await?;
        Ok(())
    });
}

#[test]
fn a_site_is_there_after_loading_again_with_the_server_stopped() {
    visit(Screen::PHONE, async |site| {
        line(site).await?;
        six_taps(site).await?;
        site.type_into("Name of the site", "Tern Point").await?;
        site.leave().await?;
        site.is_written().await?;
        if site.keeps_a_copy().await? {
            site.stop_server();
        }
        site.reload().await?;
        site.element(".line .bus").await?;
        ensure!(site.value_of("Name of the site").await? == "Tern Point");
        Ok(())
    });
}

#[test]
fn a_link_holds_the_whole_site() {
    visit(Screen::PHONE, async |site| {
        line(site).await?;
        site.press("Tarn cabin").await?;
        site.press("Sheet").await?;
        let link = site.value_of("Link that holds the site").await?;
        ensure!(link.contains("#/site/"), "{link}");
        site.press("Line").await?;
        site.press("Close this site").await?;
        site.element(".six-box").await?;
        site.run("location.hash = arguments[0].split('#')[1];", &[link.clone().into()]).await?;
        site.element(".line .bus").await?;
        ensure!(site.value_of("Name of the site").await? == "Tarn cabin");
        // Cut on the way: refused, and nothing touched.
        let cut = link[..link.len() - 100].to_owned();
        site.run("location.hash = arguments[0].split('#')[1];", &[cut.into()]).await?;
        site.shows("That link was cut or changed on the way").await?;
        ensure!(site.value_of("Name of the site").await? == "Tarn cabin");
        Ok(())
    });
}

#[test]
fn a_link_opens_the_same_site_in_a_browser_that_nobody_has_used() {
    let sent = RefCell::new(String::new());
    visit(Screen::PHONE, async |site| {
        line(site).await?;
        site.press("Two Rivers clinic").await?;
        site.press("Sheet").await?;
        sent.replace(site.value_of("Link that holds the site").await?);
        Ok(())
    });
    let link = sent.into_inner();
    let (_, behind) = link.split_once('#').expect("the site stands behind #");
    visit(Screen::PHONE, async |site| {
        site.another_tab(&format!("#{behind}")).await?;
        site.element(".line .bus").await?;
        ensure!(site.value_of("Name of the site").await? == "Two Rivers clinic");
        site.press("Sheet").await?;
        ensure!(site.value_of("Link that holds the site").await?.ends_with(behind), "the same to the letter");
        Ok(())
    });
}

#[test]
fn a_hostile_text_is_refused_and_changes_nothing() {
    visit(Screen::PHONE, async |site| {
        line(site).await?;
        site.press("Two Rivers clinic").await?;
        site.press("Sheet").await?;
        let wide = format!(
            r#"{{"linehut":"site","version":1,"name":"x","place":{{}},"parts":[{}]}}"#,
            [r#"{"id":1,"kind":"array","entries":{}}"#; 5].join(",")
        );
        for text in ["{", "[]", r#"{"linehut":"site","version":9,"name":"","place":{},"parts":[]}"#, &wide] {
            site.type_into("Pasted link or file", text).await?;
            site.press("Open what is pasted").await?;
            site.shows("Not opened, nothing changed").await?;
        }
        site.press("Line").await?;
        ensure!(site.value_of("Name of the site").await? == "Two Rivers clinic");
        Ok(())
    });
}

#[test]
fn what_opens_is_told_and_closed_again() {
    visit(Screen::PHONE, async |site| {
        line(site).await?;
        site.press("Two Rivers clinic").await?;
        site.unfold("What if this opens? breaker, fuse, protection, bond").await?;
        site.press("The packs’ own protection").await?;
        site.shows("In full sun").await?;
        site.press("Close it again").await?;
        ensure!(site.count(".whatif").await? == 0, "it is closed");
        Ok(())
    });
}

#[test]
fn the_checks_stand_worst_first_with_their_working() {
    visit(Screen::NARROW, async |site| {
        line(site).await?;
        site.press("Kestrel Ridge hut").await?;
        site.press("All checks").await?;
        site.heading("Checks").await?;
        let first = site.element(".checks .check").await?.text().await?;
        ensure!(first.contains("Cold string against the controller"), "{first}");
        site.press("To do").await?;
        site.fits().await?;
        Ok(())
    });
}

/// Two tabs on one site: what each wrote last is there, the later one beside the other under a name of its own.
#[test]
fn two_tabs_never_overwrite_each_other() {
    visit(Screen::PHONE, async |site| {
        line(site).await?;
        site.press("Tarn cabin").await?;
        site.is_written().await?;
        let first = site.another_tab("#/line").await?;
        site.element(".line .bus").await?;
        site.type_into("Name of the site", "There").await?;
        site.leave().await?;
        site.is_written().await?;
        site.go_to_tab(first).await?;
        site.type_into("Name of the site", "Here").await?;
        site.leave().await?;
        site.shows("Yours is kept beside it").await?;
        site.is_written().await?;
        site.press("Sheet").await?;
        for name in ["There", "Here (this tab)"] {
            site.button(name).await?;
        }
        Ok(())
    });
}

/// The page is torn away right behind a keystroke, again and again: at most that keystroke is lost.
#[test]
fn a_page_torn_away_in_mid_typing_loses_one_keystroke_at_most() {
    visit(Screen::PHONE, async |site| {
        line(site).await?;
        six_taps(site).await?;
        site.is_written().await?;
        let mut typed = String::new();
        for letter in "Tern Point hut".chars() {
            typed.push(letter);
            site.type_on("Name of the site", &letter.to_string()).await?;
            site.reload().await?;
            site.element(".line .bus").await?;
            let there = site.value_of("Name of the site").await?;
            let mut before = typed.clone();
            before.pop();
            ensure!(there == typed || there == before, "\"{there}\" of \"{typed}\"");
            typed = there;
        }
        Ok(())
    });
}

/// The browser is killed right behind a keystroke, fifty times: at most that keystroke is lost, and the rest of the site never.
#[test]
fn a_browser_killed_in_mid_typing_loses_one_keystroke_at_most() {
    let typed = RefCell::new(String::new());
    visit_and_kill(Screen::PHONE, 51, async |site, time| {
        site.press("Line").await?;
        if time == 0 {
            six_taps(site).await?;
            return site.is_written().await;
        }
        site.element(".line .bus").await?;
        let there = site.value_of("Name of the site").await?;
        let mut before = typed.borrow().clone();
        before.pop();
        ensure!(there == *typed.borrow() || there == before, "\"{there}\" of \"{}\"", typed.borrow());
        typed.replace(there);
        // Now one key, now several at a time, in the middle of which it ends.
        for place in 0..=time % 4 {
            let letter = char::from(b'a' + u8::try_from((time + place) % 26).unwrap_or(0));
            site.type_on("Name of the site", &letter.to_string()).await?;
            typed.borrow_mut().push(letter);
        }
        Ok(())
    });
}

/// Printed, and no pass mark: a slow machine fails nothing. The whole line stands beside the part that is typed into.
#[test]
fn one_keystroke_to_the_repainted_line() {
    for screen in [Screen::PHONE, Screen { width: 1280, height: 800 }] {
        visit(screen, async |site| {
            if site.kind != Kind::Chromium {
                return Ok(());
            }
            line(site).await?;
            site.press("Two Rivers clinic").await?;
            site.press("East roof").await?;
            site.heading("East roof").await?;
            site.is_written().await?;
            let times = site.keystrokes_slowed("Voc", "49.3").await?;
            println!(
                "one keystroke to the repainted clinic, {} px, six times slower: {:.1} ms (median of 5)",
                screen.width, times[2]
            );
            Ok(())
        });
    }
}

#[test]
fn undo_leads_back_to_where_there_was_no_site() {
    visit(Screen::PHONE, async |site| {
        line(site).await?;
        site.press("Kestrel Ridge hut").await?;
        site.press("Controller").await?;
        site.type_into("Input limit", "250").await?;
        site.press("Line").await?;
        site.press("Undo: Input limit").await?;
        site.press("Undo: the site").await?;
        site.element(".six-box").await?;
        site.press("Redo: the site").await?;
        site.press("Redo: Input limit").await?;
        site.element(".line .bus").await?;
        Ok(())
    });
}
