//! A site: one power room as a whole, its parts, what joins them, and every check of it.
//!
//! Each figure stands in one place ([`home`]); a part that needs a figure of another reads it there ([`View`]), so that a
//! site is what each tool asks about, and each tool is a view of a part.

mod assess;
mod derive;
mod entries;
mod home;
mod part;
mod rules;
#[cfg(test)]
mod tests;
mod typical;
mod view;
pub mod what_if;

pub use assess::{Assessment, CheckId, Place, SiteCheck, assess, place_name, working};
pub use derive::{Survey, bank_ask, run_ask, start_ask, string_ask};
pub use entries::{Entries, Typed};
pub use home::{Home, home};
pub use part::{Kind, Part, PartId, PartKind};
pub use rules::Requirement;
pub use typical::{Got, start};
pub use view::{Slot, Subject, View};

/// The most parts that a site may have. *Chosen*: far past any one room; a damaged or hostile file ends there.
pub const MOST_PARTS: usize = 200;

/// One power room.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Site {
    /// What its owner calls it.
    pub name: String,
    /// Where it stands, by which code, how it is earthed.
    pub place: Entries,
    /// Its parts, in the order they were put there.
    pub parts: Vec<Part>,
    /// The greatest number that any part ever had.
    last: u32,
}

impl Site {
    /// A site of these parts. Whatever a part is joined to that is not there is let go; a part whose number one before it has
    /// gets a free one.
    #[must_use]
    pub fn new(name: String, place: Entries, mut parts: Vec<Part>) -> Self {
        for at in 1..parts.len() {
            if parts[..at].iter().any(|before| before.id == parts[at].id) {
                let is_free = |id: &PartId| parts.iter().all(|part| part.id != *id);
                parts[at].id = (1..u32::MAX).map(PartId).find(is_free).unwrap_or(parts[at].id);
            }
        }
        let last = parts.iter().map(|part| part.id.0).max().unwrap_or(0);
        let mut site = Self { name, place, parts, last };
        let ids: Vec<PartId> = site.parts.iter().map(|part| part.id).collect();
        for part in &mut site.parts {
            if part.to.is_some_and(|to| to == part.id || !ids.contains(&to)) {
                part.to = None;
            }
        }
        site
    }

    /// The part that is called `id`.
    #[must_use]
    pub fn part(&self, id: PartId) -> Option<&Part> {
        self.parts.iter().find(|part| part.id == id)
    }

    /// The same, to be changed.
    pub fn part_mut(&mut self, id: PartId) -> Option<&mut Part> {
        self.parts.iter_mut().find(|part| part.id == id)
    }

    /// Every part of `kind`, in their order.
    pub fn of_kind(&self, kind: PartKind) -> impl Iterator<Item = &Part> {
        self.parts.iter().filter(move |part| part.kind == kind)
    }

    /// The first part of `kind`.
    #[must_use]
    pub fn first(&self, kind: PartKind) -> Option<&Part> {
        self.of_kind(kind).next()
    }

    /// Every part that is joined to `id`.
    pub fn joined_to(&self, id: PartId) -> impl Iterator<Item = &Part> {
        self.parts.iter().filter(move |part| part.to == Some(id))
    }

    /// Adds a part of `kind`, joined to the first part that its kind is usually joined to.
    /// `None` where the site is full.
    pub fn add(&mut self, kind: PartKind) -> Option<PartId> {
        if self.parts.len() >= MOST_PARTS {
            return None;
        }
        let to = kind.kind().joins.iter().find_map(|joins| self.first(*joins)).map(|part| part.id);
        self.last = self.last.checked_add(1)?;
        let id = PartId(self.last);
        self.parts.push(Part { to, ..Part::new(id, kind) });
        Some(id)
    }

    /// Takes a part away. What was joined to it is then joined to the next of its kind, or to nothing.
    pub fn remove(&mut self, id: PartId) {
        let Some(at) = self.parts.iter().position(|part| part.id == id) else { return };
        let gone = self.parts.remove(at);
        let instead = self.first(gone.kind).map(|part| part.id);
        for part in self.parts.iter_mut().filter(|part| part.to == Some(id)) {
            part.to = instead;
        }
    }

    /// Puts another part like `id` behind it; what is joined to the first stays there.
    pub fn duplicate(&mut self, id: PartId) -> Option<PartId> {
        if self.parts.len() >= MOST_PARTS {
            return None;
        }
        let at = self.parts.iter().position(|part| part.id == id)?;
        self.last = self.last.checked_add(1)?;
        let copy = Part { id: PartId(self.last), ..self.parts[at].clone() };
        let new = copy.id;
        self.parts.insert(at + 1, copy);
        Some(new)
    }
}
