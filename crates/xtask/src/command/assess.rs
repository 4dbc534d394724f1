//! `cargo xtask assess FILE`: every check of a stored site. The work is the `assess` program's of the bridge.

use std::process::{Command, ExitCode};

use anyhow::{Context, Result};

use crate::root::root;

/// Builds the program, hands it what was asked, and ends as it ended.
///
/// # Errors
///
/// When cargo cannot be started.
pub fn run(arguments: &[String]) -> Result<ExitCode> {
    let status = Command::new("cargo")
        .args(["run", "--quiet", "--manifest-path"])
        .arg(root().join("Cargo.toml"))
        .args(["-p", "bridge", "--bin", "assess", "--"])
        .args(arguments)
        .status()
        .context("cargo could not be started")?;
    Ok(status.code().and_then(|code| u8::try_from(code).ok()).map_or(ExitCode::FAILURE, ExitCode::from))
}
