//! Makes sure of the tools that build and check the page. What is there in the right version is used as found.

use std::{
    env, fs,
    path::{Path, PathBuf},
};

use anyhow::{Context, Result, bail};
use xshell::{Shell, cmd};

use crate::root::root;

const TARGET: &str = "wasm32-unknown-unknown";
/// The newest that builds with the compiler asked for in Cargo.toml.
const TRUNK: &str = "0.21.14";
/// The release of wasm-opt, and of the package that brings it.
const WASM_OPT: &str = "132";

/// What it takes to build the page. Puts the tools on the shell's PATH.
///
/// # Errors
///
/// When something is missing that cannot be installed from here; the text says what to do.
pub fn for_page(shell: &Shell) -> Result<()> {
    extend_path(shell)?;
    wasm_target(shell)?;
    trunk(shell)?;
    wasm_bindgen(shell)?;
    wasm_opt(shell)
}

/// The browser that the tests drive, and its driver.
pub struct Browser {
    /// The browser's program.
    pub chromium: PathBuf,
    /// What drives it.
    pub chromedriver: PathBuf,
}

/// What it takes to check the page in a browser.
///
/// # Errors
///
/// When there is no Chromium and it cannot be installed from here; the text says what to do.
pub fn for_browser(shell: &Shell) -> Result<Browser> {
    if let Some(browser) = browser() {
        return Ok(browser);
    }
    let Some(apt) = apt(shell) else {
        bail!("Install Chromium and the chromedriver of the same version, so that both are on the PATH");
    };
    say("Installing Chromium and its driver: about two minutes, once");
    let update = apt.iter().map(String::as_str).chain(["apt-get", "update"]);
    cmd!(shell, "env {update...}").run().context("apt-get update failed")?;
    let packages = ["apt-get", "install", "-y", "--no-install-recommends", "chromium", "chromium-driver"];
    let install = apt.iter().map(String::as_str).chain(packages);
    cmd!(shell, "env {install...}").run().context("apt-get could not install chromium and chromium-driver")?;
    browser().context("chromium and chromium-driver are installed, but not found on the PATH")
}

fn browser() -> Option<Browser> {
    let chromium = ["chromium", "chromium-browser", "google-chrome"].into_iter().find_map(on_path)?;
    Some(Browser { chromium, chromedriver: on_path("chromedriver")? })
}

/// What goes before `apt-get` so that it may install, or nothing when it may not.
fn apt(shell: &Shell) -> Option<Vec<String>> {
    on_path("apt-get")?;
    let quiet = "DEBIAN_FRONTEND=noninteractive".to_owned();
    if cmd!(shell, "id -u").quiet().read().is_ok_and(|id| id == "0") {
        return Some(vec![quiet]);
    }
    let may = on_path("sudo").is_some() && cmd!(shell, "sudo -n true").quiet().ignore_stderr().run().is_ok();
    may.then(|| vec!["sudo".to_owned(), "-n".to_owned(), "env".to_owned(), quiet])
}

fn wasm_target(shell: &Shell) -> Result<()> {
    let sysroot = cmd!(shell, "rustc --print sysroot").quiet().read()?;
    if Path::new(&sysroot).join("lib/rustlib").join(TARGET).is_dir() {
        return Ok(());
    }
    if on_path("rustup").is_none() {
        bail!("Install the standard library for {TARGET} beside this Rust compiler");
    }
    say("Adding the wasm target: seconds, once");
    cmd!(shell, "rustup target add {TARGET}").run().context("rustup could not add the wasm target")
}

fn trunk(shell: &Shell) -> Result<()> {
    match installed(shell, "trunk") {
        Some(version) if version == TRUNK => Ok(()),
        other => {
            say(&format!("Installing trunk {TRUNK}: about eight minutes, once"));
            cargo_install(shell, &["trunk", "--version", TRUNK, "--locked"], other.is_some())
        }
    }
}

/// The command-line half of wasm-bindgen must be of the very version that the page is linked with.
fn wasm_bindgen(shell: &Shell) -> Result<()> {
    let wanted = locked("wasm-bindgen")?;
    match installed(shell, "wasm-bindgen") {
        Some(version) if version == wanted => Ok(()),
        other => {
            say(&format!("Installing the wasm-bindgen command {wanted}: about three minutes, once"));
            // Not `--locked`: its own lock file asks for a release that is no longer served.
            cargo_install(shell, &["wasm-bindgen-cli", "--version", &wanted], other.is_some())
        }
    }
}

fn wasm_opt(shell: &Shell) -> Result<()> {
    if installed(shell, "wasm-opt").is_some_and(|version| version == WASM_OPT) {
        return Ok(());
    }
    if on_path("npm").is_none() {
        bail!("Install Node.js with npm (18 or newer), or wasm-opt {WASM_OPT} (binaryen), so that it is on the PATH");
    }
    say(&format!("Installing wasm-opt {WASM_OPT}: a minute, once"));
    let tools = tools();
    fs::create_dir_all(&tools)?;
    let package = format!("binaryen@{WASM_OPT}");
    cmd!(shell, "npm install --prefix {tools} --no-audit --no-fund --no-save {package}")
        .run()
        .context("npm could not install wasm-opt")
}

/// Installs where cargo puts its programs; beside the workspace when that would replace another version there.
fn cargo_install(shell: &Shell, what: &[&str], other_there: bool) -> Result<()> {
    let aside: &[PathBuf] = if other_there { &[PathBuf::from("--root"), tools()] } else { &[] };
    // A folder of its own: what is built here says nothing about building that.
    cmd!(shell, "cargo install {what...} {aside...}")
        .env_remove("CARGO_TARGET_DIR")
        .run()
        .with_context(|| format!("cargo could not install {}", what.join(" ")))
}

/// The first word of `program --version` that looks like a version.
fn installed(shell: &Shell, program: &str) -> Option<String> {
    let said = cmd!(shell, "{program} --version").quiet().ignore_stderr().read().ok()?;
    said.split_whitespace().find(|word| word.starts_with(|c: char| c.is_ascii_digit())).map(str::to_owned)
}

/// The version of a package that the workspace is locked to.
fn locked(package: &str) -> Result<String> {
    let lock = fs::read_to_string(root().join("Cargo.lock")).context("cannot read Cargo.lock")?;
    version_in(&lock, package).with_context(|| format!("Cargo.lock does not name {package}"))
}

fn version_in(lock: &str, package: &str) -> Option<String> {
    let name = format!("name = \"{package}\"");
    let mut lines = lock.lines().skip_while(|line| *line != name);
    let version = lines.nth(1)?.strip_prefix("version = \"")?;
    version.strip_suffix('"').map(str::to_owned)
}

/// Puts our own tools first, and cargo's programs where a bare shell may lack them.
fn extend_path(shell: &Shell) -> Result<()> {
    let tools = tools();
    let mut path = vec![tools.join("bin"), tools.join("node_modules/.bin")];
    let old = shell.var("PATH").unwrap_or_default();
    path.extend(env::split_paths(&old).filter(|old| !path.contains(old)).collect::<Vec<_>>());
    if let Ok(home) = env::var("CARGO_HOME").or_else(|_| env::var("HOME").map(|home| format!("{home}/.cargo"))) {
        path.push(Path::new(&home).join("bin"));
    }
    shell.set_var("PATH", env::join_paths(path).context("the PATH cannot be extended")?);
    Ok(())
}

fn tools() -> PathBuf {
    root().join(".tools")
}

fn on_path(program: &str) -> Option<PathBuf> {
    let path = env::var_os("PATH")?;
    env::split_paths(&path).map(|folder| folder.join(program)).find(|file| file.is_file())
}

fn say(what: &str) {
    eprintln!("{what}");
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_locked_version_is_that_of_the_whole_name() {
        let lock =
            "name = \"wasm-bindgen-test\"\nversion = \"0.3.1\"\n\nname = \"wasm-bindgen\"\nversion = \"0.2.9\"\n";
        assert_eq!(version_in(lock, "wasm-bindgen").as_deref(), Some("0.2.9"));
        assert_eq!(version_in(lock, "wasm"), None);
    }
}
