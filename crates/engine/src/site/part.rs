//! The parts of a power room.

use super::entries::Entries;

/// Names one part of a site, for as long as the site is kept. Never used twice.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct PartId(pub u32);

/// What a part is.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum PartKind {
    /// Strings of modules on one controller.
    Array,
    /// A source that is not the sun: wind or water.
    OtherSource,
    /// A charge controller.
    Controller,
    /// The bus that controllers, bank and loads meet on.
    Bus,
    /// Cells, blocks or packs.
    Bank,
    /// An inverter, or an inverter that charges too.
    Inverter,
    /// A panel of direct current.
    DcPanel,
    /// A circuit of a panel of direct current.
    DcCircuit,
    /// A panel of alternating current.
    AcPanel,
    /// A generator.
    Generator,
    /// Something that is switched on.
    Load,
}

/// Where a kind of part hangs.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Kind {
    /// The word it is kept under. Never changed once released.
    pub key: &'static str,
    /// Its name on screen.
    pub name: &'static str,
    /// The kinds it can be joined to, the usual first; empty for what everything else is joined to.
    pub joins: &'static [PartKind],
    /// Whether a cable with a breaker of its own leads there.
    pub has_run: bool,
}

impl PartKind {
    /// Every kind, in the order of the line from sun to socket.
    pub const ALL: [Self; 11] = [
        Self::Array,
        Self::OtherSource,
        Self::Controller,
        Self::Bus,
        Self::Bank,
        Self::Inverter,
        Self::Generator,
        Self::AcPanel,
        Self::DcPanel,
        Self::DcCircuit,
        Self::Load,
    ];

    /// What is known of the kind.
    #[must_use]
    pub const fn kind(self) -> Kind {
        const fn kind(key: &'static str, name: &'static str, joins: &'static [PartKind], has_run: bool) -> Kind {
            Kind { key, name, joins, has_run }
        }
        match self {
            Self::Array => kind("array", "Array", &[Self::Controller], true),
            Self::OtherSource => kind("other-source", "Wind or water", &[Self::Controller, Self::Bus], true),
            Self::Controller => kind("controller", "Controller", &[Self::Bus, Self::Inverter], true),
            Self::Bus => kind("bus", "Bus", &[], false),
            Self::Bank => kind("bank", "Bank", &[Self::Bus], true),
            Self::Inverter => kind("inverter", "Inverter", &[Self::Bus], true),
            Self::Generator => kind("generator", "Generator", &[Self::Inverter, Self::AcPanel], true),
            Self::AcPanel => kind("ac-panel", "AC panel", &[Self::Inverter], true),
            Self::DcPanel => kind("dc-panel", "DC panel", &[Self::Bus], true),
            Self::DcCircuit => kind("dc-circuit", "DC circuit", &[Self::DcPanel, Self::Bus], true),
            Self::Load => kind("load", "Load", &[Self::AcPanel, Self::DcPanel, Self::Inverter, Self::Bus], false),
        }
    }

    /// The kind that is kept under `key`.
    #[must_use]
    pub fn of_key(key: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|one| one.kind().key == key)
    }
}

/// A part of a site.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Part {
    /// What it is called by everything else in the site.
    pub id: PartId,
    /// What it is.
    pub kind: PartKind,
    /// What its owner calls it; empty for the name of its kind.
    pub name: String,
    /// What it is joined to.
    pub to: Option<PartId>,
    /// What was typed into its fields.
    pub entries: Entries,
    /// What was typed into the fields of the run that leads to what it is joined to.
    /// `None` where it is joined directly, as inside one case.
    pub run: Option<Entries>,
    /// Whether its figures are typical ones that nobody has replaced by a nameplate's.
    pub typical: bool,
}

impl Part {
    /// A part with nothing entered, joined to nothing.
    #[must_use]
    pub fn new(id: PartId, kind: PartKind) -> Self {
        Self {
            id,
            kind,
            name: String::new(),
            to: None,
            entries: Entries::default(),
            run: kind.kind().has_run.then(Entries::default),
            typical: false,
        }
    }

    /// Its name on screen.
    #[must_use]
    pub fn title(&self) -> &str {
        if self.name.is_empty() { self.kind.kind().name } else { &self.name }
    }
}
