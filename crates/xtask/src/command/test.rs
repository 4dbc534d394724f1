//! `cargo xtask test`: every check there is, on this machine as anywhere.

use std::process::Command;

use anyhow::{Result, bail};
use xshell::Shell;

use super::pack;
use crate::{
    install::{self, Browser},
    root::root,
    stages::Stages,
};

/// The crates that run inside the page.
const IN_PAGE: [&str; 6] = ["-p", "engine", "-p", "bridge", "-p", "web"];

/// Runs them all, then says what held.
///
/// # Errors
///
/// When anything failed.
pub fn run(arguments: &[String]) -> Result<()> {
    if !arguments.is_empty() {
        bail!("test takes nothing after it");
    }
    let shell = Shell::new()?;
    let mut stages = Stages::default();
    stages.run("tools for the page", |_| install::for_page(&shell));
    let mut browser = None;
    stages.run("a browser and its driver", |_| {
        browser = Some(install::for_browser(&shell)?);
        Ok(())
    });

    let cargo = |words: &[&str]| {
        let mut command = Command::new("cargo");
        command.current_dir(root()).args(words);
        if let Ok(path) = shell.var("PATH") {
            command.env("PATH", path);
        }
        command
    };
    let deny = ["--", "-D", "warnings"];
    let wasm = ["--target", "wasm32-unknown-unknown"];

    stages.run("format", |it| it.command(&mut cargo(&["fmt", "--all", "--check"])));
    stages.run("clippy, native", |it| {
        it.command(&mut cargo(&[&["clippy", "--workspace", "--all-targets"][..], &deny].concat()))
    });
    stages.run("clippy, wasm", |it| {
        it.command(&mut cargo(&[&["clippy"], &IN_PAGE[..], &["--all-targets"], &wasm, &deny].concat()))
    });
    // One package at a time: together, one would switch on another's features.
    for package in ["engine", "bridge", "published", "markup", "xtask"] {
        stages.run(&format!("tests of {package}"), |it| {
            it.command(&mut cargo(&["test", "--no-fail-fast", "-p", package]))
        });
    }
    stages.run("tests of web, native", |it| it.command(&mut cargo(&["test", "--no-fail-fast", "-p", "web", "--lib"])));
    if let Some(browser) = &browser {
        stages.run("tests of web, in the browser", |it| {
            let words = [&["test", "--no-fail-fast", "-p", "web", "--test", "*"], &wasm[..]].concat();
            it.command(in_browser(&mut cargo(&words), browser))
        });
    }
    let packed = stages.run("pack", |_| pack::run(&[]));
    if let (true, Some(browser)) = (packed, &browser) {
        stages.run("tests in the browser", |it| {
            it.command(driven(&mut cargo(&["test", "--no-fail-fast", "-p", "browser"]), browser))
        });
    }
    stages.conclude()
}

/// wasm tests run in a page of their own. The browser's flags are in web/webdriver.json.
fn in_browser<'a>(command: &'a mut Command, browser: &Browser) -> &'a mut Command {
    command
        .env("CARGO_TARGET_WASM32_UNKNOWN_UNKNOWN_RUNNER", "wasm-bindgen-test-runner")
        .env("CHROMEDRIVER", &browser.chromedriver)
}

fn driven<'a>(command: &'a mut Command, browser: &Browser) -> &'a mut Command {
    command.env("LINEHUT_DRIVER", &browser.chromedriver).env("LINEHUT_BROWSER_PROGRAM", &browser.chromium)
}
