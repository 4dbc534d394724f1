//! Builds the page into `dist/`.

use anyhow::{Context, Result};
use xshell::{Shell, cmd};

use crate::{install, root::root};

/// Builds the page as it is published: release, pressed by wasm-opt, stamped.
///
/// # Errors
///
/// When a tool is missing and cannot be installed, or the build fails.
pub fn build(shell: &Shell) -> Result<()> {
    install::for_page(shell)?;
    let _here = shell.push_dir(root());
    eprintln!("Building the page: some minutes the first time");
    // Trunk takes NO_COLOR for an option with a value and stops at one it does not know.
    cmd!(shell, "trunk build --release").env_remove("NO_COLOR").run().context("the page does not build")
}
