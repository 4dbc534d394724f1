//! Where the workspace lies.

use std::path::{Path, PathBuf};

/// The workspace's own folder.
pub fn root() -> PathBuf {
    let here = Path::new(env!("CARGO_MANIFEST_DIR"));
    here.ancestors().nth(2).expect("crates/xtask lies two folders down").to_path_buf()
}

/// Where the built page goes.
pub fn dist() -> PathBuf {
    root().join("dist")
}
