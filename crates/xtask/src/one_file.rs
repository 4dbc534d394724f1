//! The whole page in one file: it opens from the file system, with no server and no other file.

use std::{fs, path::Path};

use anyhow::{Context, Result, bail};
use base64::{Engine, prelude::BASE64_STANDARD};

use crate::{
    html::{self, Element},
    stamp::{INDEX, integrity},
};

/// What it is called, beside the static folder's own files.
pub const NAME: &str = "linehut.html";

/// Gathers the built page in `folder` into one text.
///
/// # Errors
///
/// When the page refers to something that cannot be put inside.
pub fn gather(folder: &Path) -> Result<String> {
    let index = text(folder, INDEX)?;
    let mut changes = Vec::new();
    let mut styles = Vec::new();

    for link in html::elements(&index, "link") {
        let with = match link.attribute("rel") {
            Some("stylesheet") => {
                let style = style(folder, href(&link)?)?;
                styles.push(integrity(style.as_bytes()));
                format!("<style>{style}</style>")
            }
            Some("icon") => icon(folder, &link)?,
            // A hint to fetch early, or something only a server can offer.
            Some("modulepreload" | "preload" | "manifest" | "apple-touch-icon") => String::new(),
            other => bail!("{INDEX} has a link with rel {other:?}: say in one_file.rs what becomes of it"),
        };
        changes.push((link.range(), with));
    }

    let scripts = html::elements(&index, "script");
    let mut hashes = Vec::new();
    for script in &scripts {
        if script.attribute("src").is_some() {
            bail!("{INDEX} has a script with src: say in one_file.rs what becomes of it");
        }
        if !script.inside.contains("init(") {
            hashes.push(integrity(script.inside.as_bytes()));
            continue;
        }
        let start = start(folder, script.inside)?;
        hashes.push(integrity(start.as_bytes()));
        changes.push((script.range(), String::new()));
        // Last in the body: the page stands before three quarters of a megabyte is read.
        let end = index.rfind("</body>").unwrap_or(index.len());
        changes.push((end..end, format!("<script type=\"module\">{start}</script>")));
    }

    let metas = html::elements(&index, "meta");
    let old = metas
        .iter()
        .find(|meta| meta.attribute("http-equiv") == Some("Content-Security-Policy"))
        .context("no content-security-policy to replace")?;
    changes.push((old.range(), policy(&hashes, &styles)));

    let root = html::elements(&index, "html");
    let root = root.first().context("no <html>")?.tag_range();
    changes.push((root.end - 1..root.end - 1, " data-form=\"one-file\"".to_owned()));
    Ok(html::replace(&index, changes))
}

/// Nothing from anywhere: not even from the folder the file lies in.
fn policy(scripts: &[String], styles: &[String]) -> String {
    let quoted = |hashes: &[String]| hashes.iter().map(|hash| format!(" '{hash}'")).collect::<String>();
    let style = if styles.is_empty() { " 'none'".to_owned() } else { quoted(styles) };
    format!(
        "<meta http-equiv=\"Content-Security-Policy\" content=\"default-src 'none'; script-src 'wasm-unsafe-eval'{}; \
         style-src{style}; img-src data:; connect-src 'none'; base-uri 'none'; form-action 'none'\">",
        quoted(scripts)
    )
}

/// Trunk's start script names the module and the wasm; this is the same start with both inside.
fn start(folder: &Path, script: &str) -> Result<String> {
    let quoted: Vec<&str> = script.split(['\'', '"', '`']).skip(1).step_by(2).collect();
    let named = |end: &str| quoted.iter().find(|word| word.ends_with(end)).copied();
    let module = text(folder, named(".js").context("the start script names no module")?)?;
    let wasm = named(".wasm").context("the start script names no wasm")?;
    let wasm = fs::read(folder.join(wasm)).with_context(|| format!("cannot read {wasm}"))?;
    let (module, init) = without_exports(&module)?;
    let wasm = BASE64_STANDARD.encode(wasm);
    let start = format!("{module}\n{init}({{module_or_path:Uint8Array.from(atob(\"{wasm}\"),c=>c.charCodeAt(0))}});\n");
    match start.contains("</script") || start.contains("<!--") {
        true => bail!("the module holds text that would end its script element"),
        false => Ok(start),
    }
}

/// The module as a script of its own, and what its default export is called inside.
fn without_exports(module: &str) -> Result<(String, String)> {
    if module.starts_with("import ") || module.contains("\nimport ") || module.contains(";import ") {
        bail!("the module imports another one, which one file cannot hold yet");
    }
    let at = module.rfind("export").context("the module exports nothing")?;
    let list = module[at + "export".len()..].trim_start();
    let Some((names, after)) = list.strip_prefix('{').and_then(|rest| rest.split_once('}')) else {
        bail!("the module does not end in a list of exports");
    };
    if !matches!(after.trim(), "" | ";") {
        bail!("the module goes on after its list of exports");
    }
    let init =
        names.split(',').find_map(|name| name.trim().strip_suffix(" as default")).context("no default export")?;
    // Those before the list stand alone: `export function …`, `export class …`.
    let body = module[..at].replace("export function ", "function ").replace("export class ", "class ");
    Ok((body, init.trim().to_owned()))
}

fn style(folder: &Path, path: &str) -> Result<String> {
    let style = text(folder, path)?;
    let outside = style.contains("@import")
        || style.split("url(").skip(1).any(|it| !it.trim_start_matches(['"', '\'']).starts_with("data:"));
    match outside || style.contains("</style") {
        true => bail!("{path} refers to another file, which one file cannot hold yet"),
        false => Ok(style),
    }
}

fn icon(folder: &Path, link: &Element) -> Result<String> {
    let path = href(link)?;
    let content = fs::read(folder.join(path)).with_context(|| format!("cannot read {path}"))?;
    let kind = crate::folder::mime(Path::new(path));
    Ok(format!("<link rel=\"icon\" href=\"data:{kind};base64,{}\">", BASE64_STANDARD.encode(content)))
}

fn href<'a>(link: &Element<'a>) -> Result<&'a str> {
    link.attribute("href").context("a link without href")
}

fn text(folder: &Path, path: &str) -> Result<String> {
    fs::read_to_string(folder.join(path)).with_context(|| format!("cannot read {path}"))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_default_export_is_found_spelled_out_or_shortened() {
        let long = "export function go() {}\nfunction start() {}\nexport { initSync, start as default };\n";
        let (body, init) = without_exports(long).unwrap();
        assert_eq!(init, "start");
        assert_eq!(body, "function go() {}\nfunction start() {}\n");
        assert_eq!(without_exports("var a,b;export{a as initSync,b as default};").unwrap().1, "b");
    }

    #[test]
    fn a_module_that_needs_another_is_refused() {
        assert!(without_exports("import { x } from './y.js';\nexport { x as default };").is_err());
    }
}
