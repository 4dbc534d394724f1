//! A site as one of its parts sees it: a pad, on which every field stands that the part's checks ask for.

use super::Site;
use super::entries::Entries;
use super::home::{Home, home};
use super::part::{Part, PartId, PartKind};
use crate::entry::Entry;
use crate::field::Field;
use crate::pad::Pad;
use crate::typed::Reading;
use crate::unit::Unit;

/// What asks.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Subject {
    /// The site as a whole.
    Place,
    /// A part.
    Part(PartId),
    /// The run that leads from a part.
    Run(PartId),
}

/// Where something typed is put.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Slot {
    /// Among the figures of the place.
    Place,
    /// Among the figures of a part.
    Part(PartId),
    /// Among the figures of the run that leads from a part.
    Run(PartId),
}

/// A site as `subject` sees it.
#[derive(Clone, Copy, Debug)]
pub struct View<'a> {
    site: &'a Site,
    subject: Subject,
    own: Option<&'a Part>,
    array: Option<&'a Part>,
    controller: Option<&'a Part>,
    bank: Option<&'a Part>,
    inverter: Option<&'a Part>,
    dc_panel: Option<&'a Part>,
    ac_panel: Option<&'a Part>,
    generator: Option<&'a Part>,
    source: Option<&'a Part>,
}

impl<'a> View<'a> {
    /// What `subject` sees. A part's own kind is itself; another kind is the part it is joined to, else the first.
    #[must_use]
    pub fn new(site: &'a Site, subject: Subject) -> Self {
        let own = match subject {
            Subject::Place => None,
            Subject::Part(id) | Subject::Run(id) => site.part(id),
        };
        let joined = own.and_then(|part| part.to).and_then(|to| site.part(to));
        let find = |kind: PartKind| {
            own.filter(|part| part.kind == kind)
                .or_else(|| joined.filter(|part| part.kind == kind))
                .or_else(|| own.and_then(|own| site.joined_to(own.id).find(|part| part.kind == kind)))
                .or_else(|| site.first(kind))
        };
        Self {
            site,
            subject,
            own,
            array: find(PartKind::Array),
            controller: find(PartKind::Controller),
            bank: find(PartKind::Bank),
            inverter: find(PartKind::Inverter),
            dc_panel: find(PartKind::DcPanel),
            ac_panel: find(PartKind::AcPanel),
            generator: find(PartKind::Generator),
            source: find(PartKind::OtherSource),
        }
    }

    fn of(&self, kind: PartKind) -> Option<&'a Part> {
        match kind {
            PartKind::Array => self.array,
            PartKind::Controller => self.controller,
            PartKind::Bank => self.bank,
            PartKind::Inverter => self.inverter,
            PartKind::DcPanel => self.dc_panel,
            PartKind::AcPanel => self.ac_panel,
            PartKind::Generator => self.generator,
            PartKind::OtherSource => self.source,
            PartKind::Bus | PartKind::DcCircuit | PartKind::Load => self.own,
        }
    }

    /// Where what is typed into `field` goes. `None` where there is no part that asks.
    #[must_use]
    pub fn slot(&self, field: Field) -> Option<Slot> {
        match home(field) {
            Some(Home::Place) => Some(Slot::Place),
            // What the site has no part for stands with whoever asks, so that nothing typed is lost.
            Some(Home::Of(kind)) => self.of(kind).or(self.own).map(|part| Slot::Part(part.id)),
            Some(Home::Run) => {
                self.own.map(|part| if part.run.is_some() { Slot::Run(part.id) } else { Slot::Part(part.id) })
            }
            None => match self.subject {
                Subject::Place => Some(Slot::Place),
                Subject::Part(id) => Some(Slot::Part(id)),
                Subject::Run(id) => Some(Slot::Run(id)),
            },
        }
    }

    /// What stands in `field`, for as long as the site does.
    #[must_use]
    pub fn at(&self, field: Field) -> (&'a str, Option<Unit>) {
        self.entries(field).map_or(("", None), |entries| entries.typed(field))
    }

    fn entries(&self, field: Field) -> Option<&'a Entries> {
        match home(field) {
            Some(Home::Place) => Some(&self.site.place),
            Some(Home::Of(kind)) => self.of(kind).or(self.own).map(|part| &part.entries),
            Some(Home::Run) => self.own.map(|part| part.run.as_ref().unwrap_or(&part.entries)),
            None => match self.subject {
                Subject::Place => Some(&self.site.place),
                Subject::Part(_) => self.own.map(|part| &part.entries),
                Subject::Run(_) => self.own.and_then(|part| part.run.as_ref()),
            },
        }
    }
}

impl Pad for View<'_> {
    fn reading(&self, field: Field) -> Entry<Reading> {
        self.entries(field).map_or(Entry::Blank, |entries| entries.reading(field))
    }

    fn typed(&self, field: Field) -> (&str, Option<Unit>) {
        self.entries(field).map_or(("", None), |entries| entries.typed(field))
    }
}
