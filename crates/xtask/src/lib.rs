//! How Linehut is built, served and checked.
//!
//! The commands are in [`command`], one file each. The browser tests use [`folder`] and [`stamp`] as well.
//! Think twice before adding a dependency: everybody waits for this crate before anything else is built.

pub mod command;
pub mod folder;
pub mod html;
pub mod install;
pub mod one_file;
pub mod page;
pub mod root;
pub mod stages;
pub mod stamp;
pub mod styles;
