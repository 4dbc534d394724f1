//! `cargo xtask bench`: how long the engine takes, natively and as wasm.

use anyhow::{Result, bail};
use xshell::{Shell, cmd};

use crate::{install, root::root};

/// Times the same cases twice: by criterion natively, then as wasm under Node.js.
///
/// # Errors
///
/// When a tool is missing or a case fails.
pub fn run(arguments: &[String]) -> Result<()> {
    if !arguments.is_empty() {
        bail!("bench takes nothing after it");
    }
    let shell = Shell::new()?;
    install::for_page(&shell)?;
    let _here = shell.push_dir(root());
    eprintln!("Timing natively");
    cmd!(shell, "cargo bench -p engine -p bridge -p published --benches").run()?;
    eprintln!("Timing as wasm, under Node.js");
    cmd!(shell, "cargo bench -p engine -p bridge --benches --target wasm32-unknown-unknown")
        .env("CARGO_TARGET_WASM32_UNKNOWN_UNKNOWN_RUNNER", "wasm-bindgen-test-runner")
        .run()?;
    Ok(())
}
