//! Makes a built page fit to be kept and guarded: its worker learns which files to keep and with what digest,
//! its content-security-policy which inline script is ours.
//!
//! Stamping a folder again, after a file in it has changed, gives it a new version.

use std::{fs, path::Path};

use anyhow::{Context, Result, bail};
use base64::{Engine, prelude::BASE64_STANDARD};
use sha2::{Digest, Sha256};

use crate::html;

/// The worker that keeps the page.
pub const WORKER: &str = "sw.js";
/// The page itself. It is kept by the folder's address: some hosts redirect from the file's.
pub const INDEX: &str = "index.html";

/// What a folder was stamped with.
pub struct Stamped {
    /// The digest of everything in it, shortened.
    pub version: String,
    /// How many files the worker keeps.
    pub files: usize,
}

/// Fills in `sw.js` and the policy in `index.html`.
///
/// # Errors
///
/// When one of the two is missing or has no place to fill.
pub fn stamp(folder: &Path) -> Result<Stamped> {
    let index = read(folder, INDEX)?;
    write(folder, INDEX, &with_script_hashes(&index)?)?;

    let worker = read(folder, WORKER)?;
    let mut all = Sha256::new();
    all.update(filled(&worker, "", "")?);
    let mut list = String::from("[\n");
    let files = files(folder)?;
    for path in &files {
        let content = fs::read(folder.join(path)).with_context(|| format!("cannot read {path}"))?;
        let address = if path == INDEX { "./" } else { path };
        let line = format!("  [{address:?}, {:?}],\n", integrity(&content));
        all.update(&line);
        list.push_str(&line);
    }
    list.push(']');
    let version: String = all.finalize().iter().take(6).map(|byte| format!("{byte:02x}")).collect();
    write(folder, WORKER, &filled(&worker, &format!("{version:?}"), &list)?)?;
    Ok(Stamped { version, files: files.len() })
}

/// The files the worker keeps, sorted: all but the worker, the one file, and hidden ones.
///
/// # Errors
///
/// When the folder cannot be read.
pub fn files(folder: &Path) -> Result<Vec<String>> {
    let mut found = Vec::new();
    walk(folder, "", &mut found)?;
    found.retain(|path| path != WORKER && path != crate::one_file::NAME);
    found.sort();
    Ok(found)
}

fn walk(folder: &Path, under: &str, found: &mut Vec<String>) -> Result<()> {
    for entry in fs::read_dir(folder).with_context(|| format!("cannot read {}", folder.display()))? {
        let entry = entry?;
        let Ok(name) = entry.file_name().into_string() else { bail!("a file name is not UTF-8") };
        if name.starts_with('.') {
            continue;
        }
        let path = format!("{under}{name}");
        match entry.file_type()?.is_dir() {
            true => walk(&entry.path(), &format!("{path}/"), found)?,
            false => found.push(path),
        }
    }
    Ok(())
}

/// `sha256-…`, as policies and `integrity` write it.
pub fn integrity(content: &[u8]) -> String {
    format!("sha256-{}", BASE64_STANDARD.encode(Sha256::digest(content)))
}

/// The page with the policy's `script-src` naming exactly the inline scripts it holds.
fn with_script_hashes(index: &str) -> Result<String> {
    let policies = html::elements(index, "meta");
    let policy = policies
        .iter()
        .find(|meta| meta.attribute("http-equiv") == Some("Content-Security-Policy"))
        .context("index.html has no content-security-policy")?;
    let scripts = html::elements(index, "script");
    let inline = scripts.iter().filter(|script| script.attribute("src").is_none());
    let hashes: Vec<String> = inline.map(|script| format!("'{}'", integrity(script.inside.as_bytes()))).collect();
    let old = policy.attribute("content").context("the content-security-policy is empty")?;
    let directives = old.split(';').map(|directive| {
        let words = directive.split_whitespace().filter(|word| !word.starts_with("'sha256-"));
        let mut words: Vec<&str> = words.collect();
        if words.first() == Some(&"script-src") {
            words.extend(hashes.iter().map(String::as_str));
        }
        words.join(" ")
    });
    let new = directives.collect::<Vec<_>>().join("; ");
    let tag = format!("<meta http-equiv=\"Content-Security-Policy\" content=\"{new}\">");
    Ok(html::replace(index, vec![(policy.range(), tag)]))
}

/// The worker with its two lines holding these values.
fn filled(worker: &str, version: &str, files: &str) -> Result<String> {
    let worker = with_constant(worker, "VERSION", version)?;
    with_constant(&worker, "FILES", files)
}

fn with_constant(worker: &str, name: &str, value: &str) -> Result<String> {
    let open = format!("const {name} = ");
    let at = worker.find(&open).with_context(|| format!("{WORKER} has no `{open}`"))? + open.len();
    let end = at + worker[at..].find(';').with_context(|| format!("{WORKER}: `{open}` does not end"))?;
    Ok(html::replace(worker, vec![(at..end, value.to_owned())]))
}

fn read(folder: &Path, name: &str) -> Result<String> {
    fs::read_to_string(folder.join(name)).with_context(|| format!("cannot read {}", folder.join(name).display()))
}

fn write(folder: &Path, name: &str, text: &str) -> Result<()> {
    fs::write(folder.join(name), text).with_context(|| format!("cannot write {}", folder.join(name).display()))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_empty_text_has_its_known_digest() {
        // FIPS 180-4's digest of no bytes, e3b0c442 98fc1c14 … 7852b855, in base64.
        assert_eq!(integrity(b""), "sha256-47DEQpj8HBSa+/TImW+5JCeuQeRkm5NMpJWZG3hSuFU=");
    }

    #[test]
    fn the_policy_names_the_inline_script_it_now_holds_and_no_older_one() {
        let page = r#"<meta http-equiv="Content-Security-Policy" content="script-src 'self' 'sha256-old'; img-src data:"><script></script><script src="a.js"></script>"#;
        let stamped = with_script_hashes(page).unwrap();
        let policy =
            "content=\"script-src 'self' 'sha256-47DEQpj8HBSa+/TImW+5JCeuQeRkm5NMpJWZG3hSuFU='; img-src data:\"";
        assert!(stamped.contains(policy), "{stamped}");
    }

    #[test]
    fn a_changed_file_changes_the_version_and_an_unchanged_folder_keeps_it() {
        let folder = std::env::temp_dir().join(format!("linehut-stamp-{}", std::process::id()));
        fs::create_dir_all(folder.join("icons")).unwrap();
        let page = "<meta http-equiv=\"Content-Security-Policy\" content=\"script-src 'self'\"><script>1</script>";
        fs::write(folder.join(INDEX), page).unwrap();
        fs::write(folder.join("icons/a.svg"), "<svg/>").unwrap();
        fs::write(folder.join(WORKER), "const VERSION = \"\";\nconst FILES = [];\n").unwrap();
        let first = stamp(&folder).unwrap();
        let again = stamp(&folder).unwrap();
        fs::write(folder.join("icons/a.svg"), "<svg />").unwrap();
        let changed = stamp(&folder).unwrap();
        let worker = fs::read_to_string(folder.join(WORKER)).unwrap();
        fs::remove_dir_all(&folder).unwrap();
        assert_eq!(first.files, 2);
        assert_eq!(first.version, again.version);
        assert_ne!(first.version, changed.version);
        assert!(worker.contains(&format!("[\"icons/a.svg\", {:?}]", integrity(b"<svg />"))), "{worker}");
        assert!(worker.contains("[\"./\", "), "{worker}");
    }
}
