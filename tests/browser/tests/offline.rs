//! The page with and without a signal, and when a newer one is put out.

use std::fs;

use browser::{Kind, Result, Screen, Site, ensure, visit};
use xtask::{one_file, root, stamp};

/// What stands at the head of the first page.
const HEAD: &str = "Settle it before you close a breaker.";

#[test]
fn starts_with_nothing_to_complain_of() {
    visit(Screen::PHONE, async |site| {
        site.heading(HEAD).await?;
        site.is_kept().await?;
        site.no_complaints().await?;
        Ok(())
    });
}

#[test]
fn fits_the_screens_it_is_made_for() {
    for screen in [Screen::PHONE, Screen::NARROW] {
        visit(screen, async |site| {
            let size = site.size().await?;
            let wanted = (u64::from(screen.width), u64::from(screen.height));
            ensure!(size == wanted || site.kind != Kind::Chromium, "{size:?} instead of {wanted:?}");
            site.fits().await?;
            Ok(())
        });
    }
}

#[test]
fn asks_nothing_of_anybody_else() {
    visit(Screen::PHONE, async |site| {
        site.is_kept().await?;
        site.reload().await?;
        site.heading(HEAD).await?;
        let asked = site.requests().await?;
        ensure!(asked.iter().any(|it| it.ends_with(".wasm")), "the log misses what was surely asked for: {asked:#?}");
        let elsewhere: Vec<_> =
            asked.iter().filter(|it| !it.starts_with(&site.address()) && !it.starts_with("data:")).collect();
        ensure!(elsewhere.is_empty(), "{elsewhere:#?}");
        Ok(())
    });
}

#[test]
fn the_policy_forbids_asking_anybody_else() {
    visit(Screen::PHONE, async |site| {
        site.run(
            "window.refused = null;
             addEventListener('securitypolicyviolation', (it) => { window.refused = it.effectiveDirective; });
             fetch('https://elsewhere.invalid/').catch(() => {});",
            &[],
        )
        .await?;
        let refused = site.wait_for("a refusal", async || {
            Ok(site.run("return window.refused", &[]).await?.as_str().map(str::to_owned))
        });
        let refused = refused.await?;
        ensure!(refused == "connect-src", "{refused}");
        Ok(())
    });
}

#[test]
fn opens_again_with_the_server_stopped() {
    visit(Screen::PHONE, async |site| {
        if keeps_no_copy(site).await? {
            return Ok(());
        }
        site.is_kept().await?;
        site.stop_server();
        ensure!(!site.server_answers(), "the server still answers");
        site.reload().await?;
        site.heading(HEAD).await?;
        site.is_kept().await?;
        // As a home-screen icon or a kept link may name it.
        site.run("location.href = 'index.html?from=home'", &[]).await?;
        site.wait_for("the page at its other name", async || {
            Ok(site.run("return location.search", &[]).await?.as_str().filter(|it| *it == "?from=home").map(drop))
        })
        .await?;
        site.heading(HEAD).await?;
        Ok(())
    });
}

#[test]
fn a_newer_version_waits_until_it_is_let_in() {
    visit(Screen::PHONE, async |site| {
        if keeps_no_copy(site).await? {
            return Ok(());
        }
        site.is_kept().await?;
        site.run("return caches.open('another-page').then(() => null)", &[]).await?;
        let before = ours(site).await?;
        ensure!(before.len() == 1, "{before:?}");

        site.publish_newer()?;
        site.reload().await?;
        site.run("window.untouched = true", &[]).await?;
        site.shows("Update ready").await?;
        ensure!(site.attribute("html", "data-trial").await?.is_none(), "the newer page came by itself");
        ensure!(ours(site).await?.len() == 2, "both versions are kept while one waits: {:?}", site.caches().await?);

        // Again loaded, and without a signal too, it is still the older one.
        site.reload().await?;
        site.shows("Update ready").await?;
        ensure!(site.attribute("html", "data-trial").await?.is_none(), "the newer page came by a reload");
        site.run("window.untouched = true", &[]).await?;
        site.press("Later").await?;
        site.wait_for("the notice to go", async || Ok((!site.has_button("Reload").await?).then_some(()))).await?;
        let untouched = site.run("return window.untouched === true", &[]).await?;
        ensure!(untouched == true, "the page loaded itself again");

        site.reload().await?;
        site.press("Reload").await?;
        site.element("html[data-trial=newer]").await?;
        site.heading(HEAD).await?;
        site.is_kept().await?;
        let after = ours(site).await?;
        ensure!(after.len() == 1 && after != before, "{before:?} became {after:?}");
        ensure!(site.caches().await?.contains(&"another-page".to_owned()), "a cache that is not ours was deleted");

        site.stop_server();
        site.reload().await?;
        site.element("html[data-trial=newer]").await?;
        Ok(())
    });
}

#[test]
fn a_copy_with_a_hole_in_it_is_not_kept() {
    visit(Screen::PHONE, async |site| {
        if keeps_no_copy(site).await? {
            return Ok(());
        }
        // Only a newer version can lack a file here: the first is kept by now, and must stay so.
        site.is_kept().await?;
        let before = ours(site).await?;
        let holed = site.copy_of_page("holed")?;
        let index = holed.join(stamp::INDEX);
        fs::write(&index, fs::read_to_string(&index)?.replacen("<html ", "<html data-trial=\"holed\" ", 1))?;
        stamp::stamp(&holed)?;
        fs::remove_file(holed.join("icons/linehut-512.png"))?;
        site.serve_instead(&holed)?;
        site.reload().await?;
        site.wait_for("the missing file to be asked for", async || {
            Ok(site.missed().iter().any(|it| it == "/icons/linehut-512.png").then_some(()))
        })
        .await?;
        site.wait_for("the broken copy to be thrown away", async || Ok((ours(site).await? == before).then_some(())))
            .await?;
        ensure!(!site.has_button("Reload").await?, "a version with a hole is offered");
        site.stop_server();
        site.reload().await?;
        site.heading(HEAD).await?;
        ensure!(site.attribute("html", "data-trial").await?.is_none(), "the version with a hole took over");
        Ok(())
    });
}

#[test]
fn the_one_file_opens_from_the_file_system() {
    visit(Screen::PHONE, async |site| {
        site.stop_server();
        site.console_errors().await?;
        site.requests().await?;
        // In a folder of its own: nothing beside it can help.
        let folder = site.copy_of_page("alone")?;
        fs::remove_dir_all(&folder)?;
        fs::create_dir_all(&folder)?;
        let file = folder.join(one_file::NAME);
        fs::copy(root::dist().join(one_file::NAME), &file)?;
        site.open_file(&file).await?;
        site.heading(HEAD).await?;
        site.element("[data-copy=one-file]").await?;
        site.no_complaints().await?;
        let asked = site.requests().await?;
        let elsewhere: Vec<_> = asked
            .iter()
            .filter(|it| !it.ends_with(one_file::NAME) && !it.starts_with("data:") && !it.starts_with(&site.address()))
            .collect();
        ensure!(elsewhere.is_empty(), "{elsewhere:#?}");
        Ok(())
    });
}

/// Our own caches by name.
async fn ours(site: &Site) -> Result<Vec<String>> {
    Ok(site.caches().await?.into_iter().filter(|it| it.starts_with("linehut-")).collect())
}

/// Some browsers keep nothing while they are driven. They must then say so; Chromium must keep.
async fn keeps_no_copy(site: &Site) -> Result<bool> {
    if site.kind == Kind::Chromium {
        return Ok(false);
    }
    let able = site.run("return 'serviceWorker' in navigator", &[]).await?;
    if able == false {
        eprintln!("{:?} has no service worker while it is driven: left out", site.kind);
    }
    Ok(able == false)
}
