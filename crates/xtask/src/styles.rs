//! Puts the page's stylesheets into one file: each component has its own, and a weak signal pays for every request.

use std::{fs, path::Path};

use anyhow::{Context, Result};
use sha2::{Digest, Sha256};

use crate::{html, stamp::INDEX};

/// Gathers the stylesheets that `index.html` links, in its order, and removes the single ones.
///
/// # Errors
///
/// When one of them cannot be read.
pub fn bundle(folder: &Path) -> Result<()> {
    let path = folder.join(INDEX);
    let index = fs::read_to_string(&path).with_context(|| format!("cannot read {}", path.display()))?;
    let links = html::elements(&index, "link");
    let sheets: Vec<_> = links.iter().filter(|link| link.attribute("rel") == Some("stylesheet")).collect();
    if sheets.len() < 2 {
        return Ok(());
    }
    let mut all = String::new();
    let mut changes = Vec::new();
    for sheet in &sheets {
        let file = folder.join(sheet.attribute("href").context("a stylesheet without href")?);
        all.push_str(&fs::read_to_string(&file).with_context(|| format!("cannot read {}", file.display()))?);
        fs::remove_file(file)?;
        changes.push((sheet.range(), String::new()));
    }
    let digest: String = Sha256::digest(&all).iter().take(8).map(|byte| format!("{byte:02x}")).collect();
    let name = format!("style-{digest}.css");
    fs::write(folder.join(&name), all)?;
    if let Some(first) = changes.first_mut() {
        first.1 = format!("<link href=\"./{name}\" rel=\"stylesheet\">");
    }
    Ok(fs::write(path, html::replace(&index, changes))?)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn sheets_keep_their_order_and_only_the_gathered_one_is_left() {
        let folder = std::env::temp_dir().join(format!("linehut-styles-{}", std::process::id()));
        fs::create_dir_all(&folder).unwrap();
        fs::write(folder.join("b.css"), "b{}").unwrap();
        fs::write(folder.join("a.css"), "a{}").unwrap();
        fs::write(
            folder.join(INDEX),
            "<link href=b.css rel=stylesheet><link rel=icon href=i><link href=a.css rel=stylesheet>",
        )
        .unwrap();
        bundle(&folder).unwrap();
        bundle(&folder).unwrap();
        let index = fs::read_to_string(folder.join(INDEX)).unwrap();
        let links = html::elements(&index, "link");
        let name = links[0].attribute("href").unwrap().to_owned();
        let files = fs::read_dir(&folder).unwrap().count();
        let sheet = fs::read_to_string(folder.join(name)).unwrap();
        fs::remove_dir_all(&folder).unwrap();
        assert_eq!(sheet, "b{}a{}");
        assert_eq!(links.len(), 2);
        assert_eq!(files, 2);
    }
}
