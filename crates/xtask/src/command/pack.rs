//! `cargo xtask pack`: the static folder and the one file, with their sizes.

use std::{fs, path::Path};

use anyhow::{Context, Result, bail};
use brotli::enc::BrotliEncoderParams;
use xshell::Shell;

use crate::{one_file, page, root, stamp};

/// What the page may weigh on the way to the phone, all files pressed by brotli. Aimed at are 330 kB.
const LIMIT: usize = 402_000;

/// Writes `dist/` and `dist/linehut.html`.
///
/// # Errors
///
/// When the page does not build, something in it cannot be put into one file, or it has grown past its limit.
pub fn run(arguments: &[String]) -> Result<()> {
    if !arguments.is_empty() {
        bail!("pack takes nothing after it");
    }
    write()?;
    weigh()
}

/// Builds the page and writes the one file beside it.
///
/// # Errors
///
/// When the page does not build, or something in it cannot be put into one file.
pub fn write() -> Result<()> {
    page::build(&Shell::new()?)?;
    let dist = root::dist();
    let one_file = dist.join(one_file::NAME);
    fs::write(&one_file, one_file::gather(&dist)?).with_context(|| format!("cannot write {}", one_file.display()))
}

/// Prints what each file and the whole weigh, raw and pressed.
///
/// # Errors
///
/// When the page has grown past its limit.
pub fn weigh() -> Result<()> {
    let dist = &root::dist();
    println!("{:>10} {:>10}  file", "raw", "brotli");
    let mut total = [0; 2];
    for path in stamp::files(dist)?.iter().map(String::as_str).chain([stamp::WORKER]) {
        let weights = weights(&dist.join(path))?;
        print(weights, path);
        total = [total[0] + weights[0], total[1] + weights[1]];
    }
    print(total, "the whole transfer");
    print(weights(&dist.join(one_file::NAME))?, one_file::NAME);
    if total[1] > LIMIT {
        bail!("the page weighs {} bytes pressed; it may weigh {LIMIT}", total[1]);
    }
    println!("{} bytes of {LIMIT} allowed", total[1]);
    Ok(())
}

fn print([raw, pressed]: [usize; 2], name: &str) {
    println!("{raw:>10} {pressed:>10}  {name}");
}

/// Raw and pressed.
fn weights(path: &Path) -> Result<[usize; 2]> {
    let raw = fs::read(path).with_context(|| format!("cannot read {}", path.display()))?;
    let mut pressed = Vec::new();
    brotli::BrotliCompress(&mut raw.as_slice(), &mut pressed, &BrotliEncoderParams::default())?;
    Ok([raw.len(), pressed.len()])
}
