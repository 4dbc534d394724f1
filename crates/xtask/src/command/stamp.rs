//! `cargo xtask stamp`: called by the build once the page lies in its staging folder.

use std::path::PathBuf;

use anyhow::{Result, bail};

use crate::{root, stamp, styles};

/// Stamps the named folder, else the one Trunk is staging, else `dist/`.
///
/// # Errors
///
/// When the folder holds no page.
pub fn run(arguments: &[String]) -> Result<()> {
    let folder = match arguments {
        [] => std::env::var_os("TRUNK_STAGING_DIR").map_or_else(root::dist, PathBuf::from),
        [folder] => PathBuf::from(folder),
        _ => bail!("stamp takes one folder"),
    };
    styles::bundle(&folder)?;
    let stamped = stamp::stamp(&folder)?;
    println!("Version {}, {} files", stamped.version, stamped.files);
    Ok(())
}
