//! `cargo xtask assess FILE`: every check of a stored site, for scripts and for whoever tests the engine from outside.

use std::process::ExitCode;

use bridge::{report, site};
use engine::check::Verdict;
use engine::site::assess;

const USAGE: &str = "\
cargo xtask assess FILE [--json] [--working ID]

  FILE          a site as saved by the page
  --json        machine-readable: id, place, kind, value, limit, margin, verdict, asks, assumed
  --working ID  the steps of that check, wherever on the site it stands
Ends with 0 where nothing breaks, 1 where something does, 2 where the file could not be read.";

fn main() -> ExitCode {
    let arguments: Vec<String> = std::env::args().skip(1).collect();
    match told(&arguments) {
        Ok((text, breaks)) => {
            print!("{text}");
            if breaks { ExitCode::from(1) } else { ExitCode::SUCCESS }
        }
        Err(why) => {
            eprintln!("{why}");
            ExitCode::from(2)
        }
    }
}

fn told(arguments: &[String]) -> Result<(String, bool), String> {
    let mut file = None;
    let mut as_json = false;
    let mut wanted = None;
    let mut rest = arguments.iter();
    while let Some(argument) = rest.next() {
        match argument.as_str() {
            "--json" => as_json = true,
            "--working" => wanted = Some(rest.next().ok_or(USAGE)?),
            name if !name.starts_with('-') && file.is_none() => file = Some(name),
            _ => return Err(USAGE.to_owned()),
        }
    }
    let file = file.ok_or(USAGE)?;
    let text = std::fs::read_to_string(file).map_err(|error| format!("{file}: {error}"))?;
    let site = site::open(&text).map_err(|refused| format!("{file}: {refused}"))?;
    let found = assess(&site);
    let breaks = found.count(Verdict::Breaks) > 0;
    let text = match (wanted, as_json) {
        (Some(id), _) => report::steps_of(&site, &found, id, as_json)?,
        (None, true) => report::to_json(&site, &found),
        (None, false) => report::lines(&site, &found),
    };
    Ok((text, breaks))
}
