//! What is kept: the layout of today, the reader of every layout there was, and how two tabs' changes join.

use std::collections::BTreeMap;

use engine::field::Field;
use engine::unit::Unit;
use serde::{Deserialize, Serialize};
use serde_json::Value;

use crate::refused::Refused;

/// The version of today's layout.
pub const VERSION: u32 = 1;

/// Everything that is kept on this phone.
///
/// Tools and fields are kept under their keys as text, so that what a later release added to the same layout
/// survives being opened and kept again by an earlier one.
#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
pub struct Kept {
    version: u32,
    /// The chosen light: `paper`, `night` or `sun`.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub theme: Option<String>,
    /// The site that is open, by what it is kept under on this phone.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub open_site: Option<u32>,
    /// What was typed, by tool and field.
    pub tools: BTreeMap<String, BTreeMap<String, KeptEntry>>,
}

/// One entry as it was typed.
#[derive(Clone, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
pub struct KeptEntry {
    /// The text, to the letter.
    pub text: String,
    /// The symbol of the unit that was chosen for the field, where one was.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub unit: Option<String>,
}

impl Default for Kept {
    fn default() -> Self {
        Self { version: VERSION, theme: None, open_site: None, tools: BTreeMap::new() }
    }
}

impl KeptEntry {
    /// The entry to keep for `text`, and for `unit` where one was chosen.
    #[must_use]
    pub fn new(text: &str, unit: Option<Unit>) -> Self {
        Self { text: text.to_owned(), unit: unit.map(|unit| unit.symbol().to_owned()) }
    }

    /// The text and the unit that were typed into `field`.
    ///
    /// A unit that the field does not take is put behind the text: it then reads as not understood, where dropping
    /// it would turn the number into another one without a word.
    #[must_use]
    pub fn typed(&self, field: Field) -> (String, Option<Unit>) {
        let Some(symbol) = &self.unit else {
            return (self.text.clone(), None);
        };
        match field.units().into_iter().find(|unit| unit.symbol() == symbol) {
            Some(unit) => (self.text.clone(), Some(unit)),
            None => (format!("{} {symbol}", self.text), None),
        }
    }
}

impl Kept {
    /// How many entries there are.
    #[must_use]
    pub fn len(&self) -> usize {
        self.tools.values().map(BTreeMap::len).sum()
    }

    /// Whether no entry is there.
    #[must_use]
    pub fn is_empty(&self) -> bool {
        self.len() == 0
    }

    /// This, with those changes put in that lead from `before` to `after`.
    ///
    /// Two tabs write to one place: each puts in only what was changed in it, so neither undoes the other's work.
    #[must_use]
    pub fn with_changes(mut self, before: &Self, after: &Self) -> Self {
        if before.theme != after.theme {
            self.theme.clone_from(&after.theme);
        }
        if before.open_site != after.open_site {
            self.open_site = after.open_site;
        }
        for (tool, entries) in &after.tools {
            for (field, entry) in entries {
                if before.entry(tool, field) != Some(entry) {
                    self.tools.entry(tool.clone()).or_default().insert(field.clone(), entry.clone());
                }
            }
        }
        for (tool, entries) in &before.tools {
            for field in entries.keys().filter(|field| after.entry(tool, field).is_none()) {
                if let Some(entries) = self.tools.get_mut(tool) {
                    entries.remove(field);
                }
            }
        }
        self.tools.retain(|_, entries| !entries.is_empty());
        self
    }

    fn entry(&self, tool: &str, field: &str) -> Option<&KeptEntry> {
        self.tools.get(tool)?.get(field)
    }

    /// Reads any layout that was ever released. Each older one is turned into the next until it is today's.
    pub(crate) fn of_value(value: Value) -> Result<Self, Refused> {
        let version = value
            .get("version")
            .and_then(Value::as_u64)
            .ok_or_else(|| Refused::Damaged { at: "no version number".to_owned() })?;
        match version {
            1 => serde_json::from_value(value).map_err(|error| Refused::Damaged { at: error.to_string() }),
            0 => Err(Refused::Damaged { at: "version 0 was never released".to_owned() }),
            version => Err(Refused::Newer { version, known: VERSION }),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn kept(entries: &[(&str, &str)]) -> Kept {
        let mut kept = Kept::default();
        for (field, text) in entries {
            kept.tools.entry("string".to_owned()).or_default().insert((*field).to_owned(), KeptEntry::new(text, None));
        }
        kept
    }

    #[test]
    fn two_tabs_do_not_undo_each_other() {
        let start = kept(&[("Voc", "49.3"), ("Isc", "11")]);
        let one = kept(&[("Voc", "50"), ("Isc", "11")]);
        let two = kept(&[("Voc", "49.3"), ("RecordLow", "-31")]);
        let stored = start.clone().with_changes(&start, &one).with_changes(&start, &two);
        assert_eq!(stored, kept(&[("Voc", "50"), ("RecordLow", "-31")]));
    }

    #[test]
    fn forgetting_leaves_no_empty_tool() {
        let start = kept(&[("Voc", "49.3")]);
        let stored = start.clone().with_changes(&start, &Kept::default());
        assert_eq!(stored, Kept::default());
    }

    #[test]
    fn a_symbol_names_one_unit_of_a_field() {
        for field in Field::ALL {
            for unit in field.units() {
                let entry = KeptEntry::new("1", Some(unit));
                assert_eq!(entry.typed(*field), ("1".to_owned(), Some(unit)), "{field:?}");
            }
        }
    }

    #[test]
    fn an_unknown_unit_stays_with_its_number() {
        let entry = KeptEntry { text: "40".to_owned(), unit: Some("fathom".to_owned()) };
        assert_eq!(entry.typed(Field::Voc), ("40 fathom".to_owned(), None));
    }
}
