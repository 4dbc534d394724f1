//! The one store: what was typed, the chosen light, and whether it is kept.
//!
//! All writing goes through [`Draft::edit`]; keeping and undo hang there and nowhere else.

use bridge::Kept;
use engine::site::{Site, Subject};
use leptos::prelude::*;

use crate::clock;
use crate::derived::{Memo, memo};
use crate::keep::{Keeper, ToKeep};
use crate::pads::{Edit, OpenSite, Pads, Place, SiteEdit, Typed, What};
use crate::theme::Theme;

/// The store. A handle: copying it copies nothing.
#[derive(Clone, Copy)]
pub struct Draft {
    pads: RwSignal<Pads>,
    theme: RwSignal<Theme>,
    told: RwSignal<String>,
    keeper: Keeper,
}

/// The store of this page.
///
/// # Panics
///
/// Where no store was provided: [`Draft::provide`] is called once, before the page is put up.
pub fn use_draft() -> Draft {
    expect_context()
}

impl Draft {
    /// An empty store, kept by `keeper`.
    pub fn new(keeper: Keeper) -> Self {
        Self {
            pads: RwSignal::new(Pads::default()),
            theme: RwSignal::new(Theme::default()),
            told: RwSignal::new(String::new()),
            keeper,
        }
    }

    /// Gives the store to everything below.
    pub fn provide(self) {
        provide_context(self);
    }

    /// Makes a change: the only way to write.
    pub fn edit(self, edit: Edit) {
        let before = self.pads.with_untracked(|pads| pads.site().cloned());
        let changed = self.pads.try_update(|pads| pads.edit(edit, clock::now())).unwrap_or(false);
        if changed {
            self.keep();
            let site =
                self.pads.with_untracked(|pads| pads.site().filter(|site| before.as_ref() != Some(*site)).cloned());
            if let Some(OpenSite { key, site }) = site {
                let text = bridge::site::write_short(&site);
                self.keeper.keep_site(ToKeep { key, name: site.name, text });
            }
        }
    }

    /// Opens a site that is not on this phone yet, in place of the one that is open.
    pub fn open_new(self, site: Site) {
        self.edit(Edit::Site(SiteEdit::Open(OpenSite { key: self.keeper.new_key(), site })));
    }

    /// Looks at a part of the open site, or at none.
    pub fn look_at(self, subject: Option<Subject>) {
        if self.pads.with_untracked(Pads::subject) != subject {
            self.pads.update(|pads| pads.look_at(subject));
        }
    }

    /// Takes over the site that was open when the page was last closed. One that cannot be read is told of, and left as it is.
    pub async fn reopen(self, key: u32) {
        match self.keeper.site(key).await.map(|text| bridge::site::open(&text)) {
            Some(Ok(site)) => self.pads.update(|pads| pads.load_site(Some(OpenSite { key, site }))),
            Some(Err(why)) => {
                self.tell(format!("The site that was open here cannot be read: {why}. It is left as it is."))
            }
            None => {}
        }
    }

    /// Tells the person something that has no place of its own on the page.
    pub fn tell(self, words: String) {
        self.told.set(words);
    }

    /// What was last told; nothing once it is put away.
    pub fn told(self) -> RwSignal<String> {
        self.told
    }

    /// The open site was put beside another tab's: it is now kept under `key`.
    pub fn moved(self, key: u32) {
        self.pads.update(|pads| {
            let moved = pads.site().cloned().map(|open| OpenSite { key, ..open });
            pads.load_site(moved);
        });
        self.keep();
    }

    /// The field that was typed into was left.
    pub fn leave(self) {
        self.pads.update_untracked(Pads::leave);
    }

    /// Chooses the light.
    pub fn set_theme(self, theme: Theme) {
        self.theme.set(theme);
        theme.show();
        self.keep();
    }

    /// The chosen light.
    pub fn theme(self) -> Theme {
        self.theme.get()
    }

    /// What stands in a field; tells only when that field changes.
    pub fn typed(self, place: Place) -> Memo<Typed> {
        memo(move || self.pads.with(|pads| pads.typed(place)))
    }

    /// Computes something from all that was typed, again at each change.
    pub fn with<T>(self, compute: impl FnOnce(&Pads) -> T) -> T {
        compute(&self.pads.read())
    }

    /// The same, once.
    pub fn with_now<T>(self, compute: impl FnOnce(&Pads) -> T) -> T {
        compute(&self.pads.read_untracked())
    }

    /// What an undo would take back.
    pub fn undoes(self) -> Memo<Option<What>> {
        memo(move || self.pads.with(Pads::undoes))
    }

    /// What a redo would make again.
    pub fn redoes(self) -> Memo<Option<What>> {
        memo(move || self.pads.with(Pads::redoes))
    }

    /// Whether, and where, it is kept.
    pub fn keeper(self) -> Keeper {
        self.keeper
    }

    /// All of it, as it is kept and saved.
    pub fn kept(self) -> Kept {
        let mut kept = self.pads.with_untracked(Pads::kept);
        kept.theme = Some(self.theme.get_untracked().key().to_owned());
        kept.open_site = self.pads.with_untracked(|pads| pads.site().map(|open| open.key));
        kept
    }

    /// Takes over what was kept before. What was typed since the page came up stays, and is kept.
    pub fn adopt(self, before: &Kept) {
        let typed = self.pads.with_untracked(Pads::kept);
        let joined = before.clone().with_changes(&Kept::default(), &typed);
        self.pads.update(|pads| pads.load(&joined));
        if let Some(theme) = before.theme.as_deref().and_then(Theme::of_key) {
            self.theme.set(theme);
            theme.show();
        }
        if !typed.is_empty() {
            self.keep();
        }
    }

    fn keep(self) {
        self.keeper.keep(self.kept());
    }
}
