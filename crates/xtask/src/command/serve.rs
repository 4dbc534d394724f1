//! `cargo xtask serve`: builds the page and serves it on this machine.

use std::io::ErrorKind;

use anyhow::{Context, Result, bail};
use xshell::Shell;

use crate::{folder::Folder, page, root};

/// Where to begin looking for a free port. Chosen: no service is registered there.
const PORT: u16 = 7373;
/// How many ports to try before giving up.
const TRIES: u16 = 50;

/// Builds, serves, and stays until interrupted.
///
/// # Errors
///
/// When the page does not build, or no port can be had.
pub fn run(arguments: &[String]) -> Result<()> {
    let wanted = port(arguments)?;
    page::build(&Shell::new()?)?;
    let folder = open(wanted)?;
    println!("\nLinehut is at {}\nEnd with Ctrl-C.", folder.address());
    loop {
        std::thread::park();
    }
}

fn port(arguments: &[String]) -> Result<Option<u16>> {
    match arguments {
        [] => Ok(None),
        [flag, port] if flag == "--port" => Ok(Some(port.parse().with_context(|| format!("`{port}` is no port"))?)),
        other => bail!("serve takes --port N and nothing else, not `{}`", other.join(" ")),
    }
}

fn open(wanted: Option<u16>) -> Result<Folder> {
    let ports = wanted.map_or(PORT..=PORT + TRIES, |port| port..=port);
    for port in ports {
        match Folder::serve(root::dist(), port) {
            Err(error) if error.kind() == ErrorKind::AddrInUse => eprintln!("Port {port} is taken"),
            served => return served.with_context(|| format!("cannot listen on port {port}")),
        }
    }
    bail!("no free port: name one with --port N")
}
