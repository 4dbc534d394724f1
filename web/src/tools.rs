//! The tools there are. A later tool adds itself here and appears on the first page, in the routes and in what is kept.

use crate::piece::Piece;

/// A tool: one question, answered by itself, with no site needed.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Tool {
    /// How many modules in series.
    String,
    /// How cells make a bank.
    Cells,
    /// Which conductor and which breaker.
    Run,
    /// Whether it starts what must start.
    Start,
    /// What to key into controllers and inverter.
    Settings,
    /// What the bank's room needs.
    AirAndWater,
    /// A second kind of controller, for the layouts of the String tool. A pad of its own, but no page.
    SecondController,
    /// A third kind.
    ThirdController,
    /// Further loads of the Start tool.
    SecondLoad,
    /// The third.
    ThirdLoad,
    /// The fourth.
    FourthLoad,
    /// The fifth.
    FifthLoad,
    /// The sixth.
    SixthLoad,
    /// The seventh.
    SeventhLoad,
    /// The eighth.
    EighthLoad,
    /// The ninth.
    NinthLoad,
    /// The tenth.
    TenthLoad,
    /// The eleventh.
    EleventhLoad,
    /// The twelfth.
    TwelfthLoad,
    /// The thirteenth.
    ThirteenthLoad,
    /// The fourteenth.
    FourteenthLoad,
}

impl Tool {
    /// Every tool, in the order of the first page.
    pub const ALL: &'static [Self] =
        &[Self::String, Self::Cells, Self::Run, Self::Start, Self::Settings, Self::AirAndWater];

    /// Everything that keeps entries under a key of its own: the tools, and the pads that belong to one.
    const PADS: &'static [Self] = &[
        Self::String,
        Self::Cells,
        Self::Run,
        Self::Start,
        Self::SecondController,
        Self::ThirdController,
        Self::SecondLoad,
        Self::ThirdLoad,
        Self::FourthLoad,
        Self::FifthLoad,
        Self::SixthLoad,
        Self::SeventhLoad,
        Self::EighthLoad,
        Self::NinthLoad,
        Self::TenthLoad,
        Self::EleventhLoad,
        Self::TwelfthLoad,
        Self::ThirteenthLoad,
        Self::FourteenthLoad,
    ];

    /// The kind of part that it asks about; none for a run, which may be any of a site's.
    pub const fn asks_about(self) -> Option<engine::site::PartKind> {
        use engine::site::PartKind;
        match self {
            Self::String => Some(PartKind::Array),
            Self::Cells | Self::Settings | Self::AirAndWater => Some(PartKind::Bank),
            Self::Start => Some(PartKind::Load),
            _ => None,
        }
    }

    /// Whether its entries are those of a part while one is looked at.
    pub const fn looks_at_sites(self) -> bool {
        matches!(self, Self::String | Self::Cells | Self::Run | Self::Start | Self::Settings | Self::AirAndWater)
    }

    /// The word it is kept and linked under. Never changed once released.
    pub const fn key(self) -> &'static str {
        match self {
            Self::String => "string",
            Self::Cells => "cells",
            Self::Run => "run",
            Self::Start => "start",
            Self::Settings => "settings",
            Self::AirAndWater => "air-and-water",
            Self::SecondController => "string-second-controller",
            Self::ThirdController => "string-third-controller",
            Self::SecondLoad => "start-second-load",
            Self::ThirdLoad => "start-third-load",
            Self::FourthLoad => "start-fourth-load",
            Self::FifthLoad => "start-fifth-load",
            Self::SixthLoad => "start-sixth-load",
            Self::SeventhLoad => "start-seventh-load",
            Self::EighthLoad => "start-eighth-load",
            Self::NinthLoad => "start-ninth-load",
            Self::TenthLoad => "start-tenth-load",
            Self::EleventhLoad => "start-eleventh-load",
            Self::TwelfthLoad => "start-twelfth-load",
            Self::ThirteenthLoad => "start-thirteenth-load",
            Self::FourteenthLoad => "start-fourteenth-load",
        }
    }

    /// What keeps its entries under that key.
    pub fn of_key(key: &str) -> Option<Self> {
        Self::PADS.iter().copied().find(|tool| tool.key() == key)
    }

    /// The tool whose page has that key.
    pub fn with_page(key: &str) -> Option<Self> {
        Self::ALL.iter().copied().find(|tool| tool.key() == key)
    }

    /// Whose entries its page shows: Settings and Air and water ask about the bank of Cells.
    pub const fn pad(self) -> Self {
        match self {
            Self::Settings | Self::AirAndWater => Self::Cells,
            other => other,
        }
    }

    /// Its name on screen.
    pub const fn name(self) -> &'static str {
        match self {
            Self::String => "String",
            Self::Cells => "Cells",
            Self::Run => "Run",
            Self::Start => "Start",
            Self::Settings => "Settings",
            Self::AirAndWater => "Air and water",
            Self::SecondController => "Second controller",
            Self::ThirdController => "Third controller",
            Self::SecondLoad => "Second load",
            Self::ThirdLoad => "Third load",
            Self::FourthLoad => "Fourth load",
            Self::FifthLoad => "Fifth load",
            Self::SixthLoad => "Sixth load",
            Self::SeventhLoad => "Seventh load",
            Self::EighthLoad => "Eighth load",
            Self::NinthLoad => "Ninth load",
            Self::TenthLoad => "Tenth load",
            Self::EleventhLoad => "Eleventh load",
            Self::TwelfthLoad => "Twelfth load",
            Self::ThirteenthLoad => "Thirteenth load",
            Self::FourteenthLoad => "Fourteenth load",
        }
    }

    /// The question it answers.
    pub const fn question(self) -> &'static str {
        match self {
            Self::String | Self::SecondController | Self::ThirdController => "How many in series?",
            Self::Cells => "How do cells make a bank?",
            Self::Run => "Which cable and breaker?",
            Self::Settings => "What to key in?",
            Self::AirAndWater => "What does its room need?",
            // Start, and every load of it.
            _ => "Will it start?",
        }
    }

    /// The symbol that stands for it.
    pub const fn symbol(self) -> &'static str {
        match self {
            Self::String => "s-string",
            Self::Cells => "s-cell",
            Self::Run => "s-run",
            Self::Settings => "s-inv",
            Self::AirAndWater => "s-bank",
            Self::SecondController | Self::ThirdController => "s-conv",
            // Start, and every load of it.
            _ => "s-motor",
        }
    }

    /// Its page.
    pub fn page(self) -> Piece {
        match self {
            Self::String | Self::SecondController | Self::ThirdController => crate::string::string_tool(),
            Self::Cells => crate::cells::cells_tool(),
            Self::Run => crate::run::run_tool(),
            Self::Settings => crate::settings::settings_tool(),
            Self::AirAndWater => crate::air::air_tool(),
            // Start, and every load of it.
            _ => crate::start::start_tool(),
        }
    }
}
