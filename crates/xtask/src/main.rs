//! Linehut's build commands: `cargo xtask serve | test | pack | bench | assess | stamp`.

use std::process::ExitCode;

use xtask::command::{assess, bench, pack, serve, stamp, test};

const USAGE: &str = "\
cargo xtask <command>

  serve [--port N]  install what is missing, build the page, serve it on this machine
  test              install what is missing, then every check there is
  pack              write dist/ (static folder) and dist/linehut.html (one file)
  bench             time the engine, natively and as wasm
  assess FILE       every check of a stored site: [--json] [--working ID]
  stamp [folder]    list the files of a built page in its sw.js; the build calls this
";

fn main() -> ExitCode {
    let arguments: Vec<String> = std::env::args().skip(1).collect();
    let rest = arguments.get(1..).unwrap_or_default();
    let outcome = match arguments.first().map(String::as_str) {
        Some("serve") => serve::run(rest),
        Some("test") => test::run(rest),
        Some("pack") => pack::run(rest),
        Some("bench") => bench::run(rest),
        Some("assess") => match assess::run(rest) {
            Ok(code) => return code,
            Err(error) => Err(error),
        },
        Some("stamp") => stamp::run(rest),
        _ => Err(anyhow::anyhow!("{USAGE}")),
    };
    match outcome {
        Ok(()) => ExitCode::SUCCESS,
        Err(error) => {
            eprintln!("{error:#}");
            ExitCode::FAILURE
        }
    }
}
