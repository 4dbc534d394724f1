//! Keeping on this phone: written at each change, read before the page is put up.
//!
//! Writes of one tab follow one another; while one is under way only the latest change waits. A write puts in only
//! what this tab changed, so two tabs never undo each other's work.

#[cfg(target_arch = "wasm32")]
mod browser;
#[cfg(target_arch = "wasm32")]
use browser as storage;
#[cfg(not(target_arch = "wasm32"))]
mod nowhere;
#[cfg(not(target_arch = "wasm32"))]
use nowhere as storage;

use std::time::Duration;

use bridge::Kept;
use leptos::prelude::*;
use wasm_bindgen_futures::spawn_local;

use storage::{Storage, Tabs};

/// How long the browser's storage may take to answer before the page is put up without it.
pub const PATIENCE: Duration = Duration::from_secs(2);

/// How many earlier states of a site are kept.
pub const STATES: usize = 20;

/// How long after one earlier state the next is kept, in milliseconds: a keystroke is no state.
pub const STATE_APART: f64 = 60_000.0;

/// A site on this phone.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct KeptSite {
    /// What it is kept under.
    pub key: u32,
    /// Its name.
    pub name: String,
}

/// A site to be written.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct ToKeep {
    /// What it is kept under.
    pub key: u32,
    /// Its name.
    pub name: String,
    /// Its text.
    pub text: String,
}

/// A site that was written.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Put {
    /// What it is kept under now.
    pub key: u32,
    /// How often it has been written.
    pub revision: u32,
    /// The sites on this phone, where their list changed.
    pub list: Option<Vec<KeptSite>>,
}

/// Whether what was typed is kept.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Keeping {
    /// The storage has not answered yet.
    Waiting,
    /// A write takes longer than a second.
    Busy,
    /// Everything is kept.
    Kept,
    /// It is not kept, and why.
    Not(Why),
}

/// Why something is not kept.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Why {
    /// The storage does not answer.
    NoAnswer,
    /// The browser has no storage for this page, or refuses it.
    Refused,
    /// The phone is full.
    Full,
    /// A newer release wrote there, in another tab.
    Newer,
}

impl Why {
    /// In words, to follow "not kept on this phone".
    pub const fn words(self) -> &'static str {
        match self {
            Self::NoAnswer => "the browser’s storage does not answer",
            Self::Refused => "the browser keeps nothing for this page",
            Self::Full => "the phone is full",
            Self::Newer => "a newer Linehut is open in another tab: reload this one",
        }
    }
}

/// Keeps what was typed. A handle: copying it copies nothing.
#[derive(Clone, Copy)]
pub struct Keeper {
    state: RwSignal<Keeping>,
    lasting: RwSignal<Option<bool>>,
    elsewhere: RwSignal<bool>,
    damaged: RwSignal<bool>,
    /// The sites on this phone.
    sites: RwSignal<Vec<KeptSite>>,
    /// A site that another tab had changed too was put beside it: from which key to which.
    moved: RwSignal<Option<(u32, u32)>>,
    work: StoredValue<Work, LocalStorage>,
}

#[derive(Default)]
struct Work {
    storage: Option<Storage>,
    tabs: Option<Tabs>,
    /// What this tab last read or wrote: the next write puts in only what differs from it.
    base: Kept,
    next: Option<Kept>,
    next_site: Option<ToKeep>,
    /// How often each site had been written when this tab last read or wrote it.
    revisions: Vec<(u32, u32)>,
    busy: bool,
    asked_to_last: bool,
}

impl Keeper {
    /// A keeper that has opened no storage yet.
    pub fn new() -> Self {
        Self {
            state: RwSignal::new(Keeping::Waiting),
            lasting: RwSignal::new(None),
            elsewhere: RwSignal::new(false),
            damaged: RwSignal::new(false),
            sites: RwSignal::new(Vec::new()),
            moved: RwSignal::new(None),
            work: StoredValue::new_local(Work::default()),
        }
    }

    /// Whether what was typed is kept.
    pub fn state(self) -> Keeping {
        self.state.get()
    }

    /// Whether nothing waits to be written.
    pub fn is_done(self) -> bool {
        self.work.try_with_value(|work| !work.busy && work.next.is_none() && work.next_site.is_none()).unwrap_or(true)
    }

    /// Whether the browser promised never to clear it by itself. `None` while that is not known.
    pub fn lasting(self) -> Option<bool> {
        self.lasting.get()
    }

    /// Whether another tab changed what is kept.
    pub fn elsewhere(self) -> RwSignal<bool> {
        self.elsewhere
    }

    /// Whether what was kept could not be read. It was laid aside, not thrown away.
    pub fn damaged(self) -> RwSignal<bool> {
        self.damaged
    }

    /// The sites on this phone.
    pub fn sites(self) -> RwSignal<Vec<KeptSite>> {
        self.sites
    }

    /// The site that was last put beside another tab's: from which key to which.
    pub fn moved(self) -> RwSignal<Option<(u32, u32)>> {
        self.moved
    }

    fn storage(self) -> Option<Storage> {
        self.work.try_with_value(|work| work.storage.clone()).flatten()
    }

    /// A key that no site on this phone has.
    pub fn new_key(self) -> u32 {
        self.sites.with_untracked(|sites| sites.iter().map(|one| one.key).max()).unwrap_or(0) + 1
    }

    /// The text of a kept site.
    pub async fn site(self, key: u32) -> Option<String> {
        let (revision, text) = self.storage()?.site(key).await.ok().flatten()?;
        self.work.update_value(|work| work.set_revision(key, revision));
        Some(text)
    }

    /// Earlier states of a site, the latest first.
    pub async fn earlier(self, key: u32) -> Vec<(f64, String)> {
        match self.storage() {
            Some(storage) => storage.earlier(key).await.unwrap_or_default(),
            None => Vec::new(),
        }
    }

    /// Forgets a site.
    pub async fn forget_site(self, key: u32) {
        let Some(storage) = self.storage() else { return };
        match storage.forget_site(key).await {
            Ok(()) => self.list(&storage).await,
            Err(why) => self.state.set(Keeping::Not(why)),
        }
    }

    /// Adds a piece of the site that comes in as the set of that name, and gives all that came of it. Pieces of other sets go.
    pub async fn add_piece(self, set: String, piece: String) -> Vec<String> {
        match self.storage() {
            Some(storage) => storage.add_piece(&set, &piece).await.unwrap_or_default(),
            None => Vec::new(),
        }
    }

    /// Forgets the pieces of a site that came in.
    pub async fn forget_pieces(self) {
        if let Some(storage) = self.storage() {
            // Pieces that stay are put away by the next set.
            let _ = storage.forget_pieces().await;
        }
    }

    async fn list(self, storage: &Storage) {
        if let Ok(sites) = storage.sites().await {
            self.sites.set(sites);
        }
    }

    /// Keeps a site, as soon as the write before it is done.
    pub fn keep_site(self, site: ToKeep) {
        self.work.update_value(|work| work.next_site = Some(site));
        self.go_on();
    }

    /// The storage did not answer in time.
    pub fn give_up_waiting(self) {
        if self.state.get_untracked() == Keeping::Waiting {
            self.state.set(Keeping::Not(Why::NoAnswer));
        }
    }

    /// Opens the storage and reads what was kept.
    pub async fn open(self) -> Option<Kept> {
        let storage = match Storage::open().await {
            Ok(storage) => storage,
            Err(why) => {
                self.state.set(Keeping::Not(why));
                return None;
            }
        };
        let found = storage.read().await;
        self.list(&storage).await;
        self.lasting.set(storage::is_lasting().await);
        let elsewhere = self.elsewhere;
        self.work.update_value(|work| {
            work.storage = Some(storage);
            work.tabs = Tabs::listen(move || elsewhere.set(true));
        });
        match found {
            Ok(found) => {
                self.state.set(Keeping::Kept);
                self.damaged.set(found.damaged);
                self.work.update_value(|work| work.base = found.kept.clone());
                self.go_on();
                Some(found.kept)
            }
            Err(why) => {
                self.state.set(Keeping::Not(why));
                None
            }
        }
    }

    /// Keeps `kept`, as soon as the write before it is done.
    pub fn keep(self, kept: Kept) {
        self.work.update_value(|work| work.next = Some(kept));
        self.go_on();
    }

    fn go_on(self) {
        let idle = self
            .work
            .try_update_value(|work| {
                let waits = work.next.is_some() || work.next_site.is_some();
                work.storage.is_some() && waits && !std::mem::replace(&mut work.busy, true)
            })
            .unwrap_or(false);
        if !idle {
            return;
        }
        set_timeout(
            move || {
                if self.work.try_with_value(|work| work.busy) == Some(true) {
                    self.state.set(Keeping::Busy);
                }
            },
            Duration::from_secs(1),
        );
        spawn_local(async move {
            loop {
                if let Err(why) = self.write_site().await {
                    self.state.set(Keeping::Not(why));
                    self.work.update_value(|work| work.busy = false);
                    return;
                }
                let Some((storage, base, next)) = self.take() else { return };
                match storage.write(&base, &next).await {
                    Ok(()) => {
                        self.work.update_value(|work| {
                            work.base = next;
                            if let Some(tabs) = &work.tabs {
                                tabs.tell();
                            }
                        });
                        self.is_kept();
                        self.ask_to_last().await;
                    }
                    Err(why) => {
                        self.state.set(Keeping::Not(why));
                        // Not lost: it goes along with the next change.
                        self.work.update_value(|work| {
                            work.next.get_or_insert(next);
                            work.busy = false;
                        });
                        return;
                    }
                }
            }
        });
    }

    /// Writes the site that waits, if one does. Where it cannot be written, it waits on.
    async fn write_site(self) -> Result<(), Why> {
        while let Some((storage, site)) =
            self.work.try_update_value(|work| Some((work.storage.clone()?, work.next_site.take()?))).flatten()
        {
            let after = self.work.try_with_value(|work| work.revision(site.key)).unwrap_or(0);
            match storage.put_site(&site, after, crate::clock::date()).await {
                Ok(Put { key, revision, list }) => {
                    self.work.update_value(|work| {
                        work.set_revision(key, revision);
                        if let Some(tabs) = &work.tabs {
                            tabs.tell();
                        }
                    });
                    if key != site.key {
                        self.moved.set(Some((site.key, key)));
                    }
                    if let Some(list) = list {
                        self.sites.set(list);
                    }
                    self.is_kept();
                    self.ask_to_last().await;
                }
                Err(why) => {
                    self.work.update_value(|work| {
                        work.next_site.get_or_insert(site);
                    });
                    return Err(why);
                }
            }
        }
        Ok(())
    }

    /// What to write next; ends the work where there is nothing.
    fn take(self) -> Option<(Storage, Kept, Kept)> {
        self.work
            .try_update_value(|work| {
                let next = work.next.take().filter(|next| *next != work.base);
                work.busy = next.is_some();
                // A site that came in meanwhile goes first.
                if next.is_none() && work.next_site.is_some() {
                    work.busy = true;
                    return Some((work.storage.clone()?, work.base.clone(), work.base.clone()));
                }
                Some((work.storage.clone()?, work.base.clone(), next?))
            })
            .flatten()
    }

    /// Everything is kept; told only where it was not before.
    fn is_kept(self) {
        if self.state.get_untracked() != Keeping::Kept {
            self.state.set(Keeping::Kept);
        }
    }

    /// Asks the browser, once, not to clear what is kept: after the first entry, when it means something.
    async fn ask_to_last(self) {
        let asked = self.work.try_update_value(|work| std::mem::replace(&mut work.asked_to_last, true));
        if asked == Some(false) && self.lasting.get_untracked() != Some(true) {
            self.lasting.set(storage::ask_to_last().await);
        }
    }
}

impl Work {
    fn revision(&self, key: u32) -> u32 {
        self.revisions.iter().find(|(one, _)| *one == key).map_or(0, |(_, revision)| *revision)
    }

    fn set_revision(&mut self, key: u32, revision: u32) {
        self.revisions.retain(|(one, _)| *one != key);
        self.revisions.push((key, revision));
    }
}

impl Default for Keeper {
    fn default() -> Self {
        Self::new()
    }
}
