//! The tools there are. A later tool adds itself here and appears on the first page, in the routes and in what is kept.

use leptos::prelude::*;

use crate::string::StringTool;

/// A tool: one question, answered by itself, with no site needed.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Tool {
    /// How many modules in series.
    String,
}

impl Tool {
    /// Every tool, in the order of the first page.
    pub const ALL: &'static [Self] = &[Self::String];

    /// The word it is kept and linked under. Never changed once released.
    pub const fn key(self) -> &'static str {
        match self {
            Self::String => "string",
        }
    }

    /// The tool of that key.
    pub fn of_key(key: &str) -> Option<Self> {
        Self::ALL.iter().copied().find(|tool| tool.key() == key)
    }

    /// Its name on screen.
    pub const fn name(self) -> &'static str {
        match self {
            Self::String => "String",
        }
    }

    /// The question it answers.
    pub const fn question(self) -> &'static str {
        match self {
            Self::String => "How many in series?",
        }
    }

    /// The symbol that stands for it.
    pub const fn symbol(self) -> &'static str {
        match self {
            Self::String => "s-string",
        }
    }

    /// Its page.
    pub fn page(self) -> AnyView {
        match self {
            Self::String => view! { <StringTool/> }.into_any(),
        }
    }
}
