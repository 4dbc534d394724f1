//! Where there is no browser, nothing is kept: the page's pure parts are tested natively.

use bridge::Kept;

use super::{KeptSite, Put, ToKeep, Why};

/// No storage.
#[derive(Clone)]
pub enum Storage {}

/// What was found.
pub struct Found {
    /// What was kept.
    pub kept: Kept,
    /// Whether something could not be read.
    pub damaged: bool,
}

#[allow(clippy::unused_async, reason = "the same face as the browser's storage")]
impl Storage {
    pub async fn open() -> Result<Self, Why> {
        Err(Why::Refused)
    }

    pub async fn read(&self) -> Result<Found, Why> {
        match *self {}
    }

    pub async fn write(&self, _base: &Kept, _next: &Kept) -> Result<(), Why> {
        match *self {}
    }
}

#[allow(clippy::unused_async, reason = "the same face as the browser's storage")]
impl Storage {
    pub async fn sites(&self) -> Result<Vec<KeptSite>, Why> {
        match *self {}
    }

    pub async fn site(&self, _key: u32) -> Result<Option<(u32, String)>, Why> {
        match *self {}
    }

    pub async fn earlier(&self, _key: u32) -> Result<Vec<(f64, String)>, Why> {
        match *self {}
    }

    pub async fn put_site(&self, _site: &ToKeep, _after: u32, _now: f64) -> Result<Put, Why> {
        match *self {}
    }

    pub async fn forget_site(&self, _key: u32) -> Result<(), Why> {
        match *self {}
    }
}

#[allow(clippy::unused_async, reason = "the same face as the browser's storage")]
impl Storage {
    pub async fn add_piece(&self, _set: &str, _piece: &str) -> Result<Vec<String>, Why> {
        match *self {}
    }

    pub async fn forget_pieces(&self) -> Result<(), Why> {
        match *self {}
    }
}

pub enum Tabs {}

impl Tabs {
    pub fn listen(_changed: impl Fn() + 'static) -> Option<Self> {
        None
    }

    pub fn tell(&self) {
        match *self {}
    }
}

#[allow(clippy::unused_async, reason = "the same face as the browser's storage")]
pub async fn is_lasting() -> Option<bool> {
    None
}

#[allow(clippy::unused_async, reason = "the same face as the browser's storage")]
pub async fn ask_to_last() -> Option<bool> {
    None
}
