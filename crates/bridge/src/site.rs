//! A site as it is kept, saved and sent: JSON, described field by field in `docs/site-file.md`.

use std::collections::BTreeMap;

use engine::field::Field;
use engine::site::{Entries, MOST_PARTS, Part, PartId, PartKind, Site, Typed};
use serde::{Deserialize, Serialize};
use serde_json::Value;

use crate::file::fits;
use crate::kept::KeptEntry;
use crate::refused::Refused;

/// The version of today's layout of a site.
pub const SITE_VERSION: u32 = 1;

/// The longest text of one entry, in bytes. Chosen: far past any number, room for a list.
const LONGEST_ENTRY: usize = 4000;
/// The longest name, in bytes.
const LONGEST_NAME: usize = 200;

/// The entries of one part, by the key of the field.
type Stored = BTreeMap<String, KeptEntry>;

#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
struct StoredSite {
    linehut: String,
    version: u32,
    name: String,
    place: Stored,
    parts: Vec<StoredPart>,
}

#[derive(Clone, Debug, PartialEq, Eq, Serialize, Deserialize)]
struct StoredPart {
    id: u32,
    kind: String,
    #[serde(default, skip_serializing_if = "String::is_empty")]
    name: String,
    #[serde(default, skip_serializing_if = "Option::is_none")]
    to: Option<u32>,
    #[serde(default, skip_serializing_if = "std::ops::Not::not")]
    typical: bool,
    entries: Stored,
    #[serde(default, skip_serializing_if = "Option::is_none")]
    run: Option<Stored>,
}

/// The text of a file that holds `site`, laid out for people.
#[must_use]
pub fn write(site: &Site) -> String {
    let mut text = serde_json::to_string_pretty(&stored(site)).expect("maps with text keys, text and numbers: JSON");
    text.push('\n');
    text
}

/// The same with nothing but what is needed, for a link.
#[must_use]
pub fn write_short(site: &Site) -> String {
    serde_json::to_string(&stored(site)).expect("maps with text keys, text and numbers: JSON")
}

/// Whether `text` says that it is a site. It may still be refused.
#[must_use]
pub fn is_site(text: &str) -> bool {
    let value: Option<Value> = fits(text.len()).ok().and_then(|()| serde_json::from_str(text).ok());
    value.is_some_and(|value| value.get("linehut").and_then(Value::as_str) == Some("site"))
}

/// Reads the text of a site. Members that it does not know are passed over; a field, a kind or a part that cannot be is
/// named and refused, as leaving it out would change what the site says.
///
/// # Errors
///
/// [`Refused`]: too large, damaged, or newer than this program. Nothing is half opened.
pub fn open(text: &str) -> Result<Site, Refused> {
    fits(text.len())?;
    let text = text.strip_prefix('\u{feff}').unwrap_or(text);
    let value: Value = serde_json::from_str(text).map_err(|error| Refused::Damaged { at: error.to_string() })?;
    if value.get("linehut").and_then(Value::as_str) != Some("site") {
        return Err(damaged("it does not say that it is a site"));
    }
    match value.get("version").and_then(Value::as_u64) {
        None => return Err(damaged("no version number")),
        Some(0) => return Err(damaged("version 0 was never released")),
        Some(version) if version > u64::from(SITE_VERSION) => {
            return Err(Refused::Newer { version, known: SITE_VERSION });
        }
        Some(_) => {}
    }
    let stored: StoredSite = serde_json::from_value(value).map_err(|error| damaged(&error.to_string()))?;
    site(stored)
}

fn damaged(at: &str) -> Refused {
    Refused::Damaged { at: at.to_owned() }
}

fn stored(site: &Site) -> StoredSite {
    StoredSite {
        linehut: "site".to_owned(),
        version: SITE_VERSION,
        name: site.name.clone(),
        place: keep(&site.place),
        parts: site.parts.iter().map(stored_part).collect(),
    }
}

fn stored_part(part: &Part) -> StoredPart {
    StoredPart {
        id: part.id.0,
        kind: part.kind.kind().key.to_owned(),
        name: part.name.clone(),
        to: part.to.map(|to| to.0),
        typical: part.typical,
        entries: keep(&part.entries),
        run: part.run.as_ref().map(keep),
    }
}

fn keep(entries: &Entries) -> Stored {
    entries.iter().map(|(field, typed)| (field.key().to_owned(), KeptEntry::new(&typed.text, typed.unit))).collect()
}

fn site(stored: StoredSite) -> Result<Site, Refused> {
    if stored.parts.len() > MOST_PARTS {
        return Err(damaged(&format!("{} parts, at most {MOST_PARTS}", stored.parts.len())));
    }
    let mut parts: Vec<Part> = Vec::with_capacity(stored.parts.len());
    for one in stored.parts {
        let at = format!("part {}", one.id);
        let kind =
            PartKind::of_key(&one.kind).ok_or_else(|| damaged(&format!("{at}: no kind “{}”", short(&one.kind))))?;
        if parts.iter().any(|other| other.id.0 == one.id) {
            return Err(damaged(&format!("{at} is there twice")));
        }
        if one.id == u32::MAX {
            return Err(damaged(&format!("{at}: the number leaves no room for another")));
        }
        let run = one.run.map(|run| entries(run, &at)).transpose()?;
        parts.push(Part {
            id: PartId(one.id),
            kind,
            name: name(one.name, &at)?,
            to: one.to.map(PartId),
            entries: entries(one.entries, &at)?,
            run: run.filter(|_| kind.kind().has_run),
            typical: one.typical,
        });
    }
    Ok(Site::new(name(stored.name, "the site")?, entries(stored.place, "the place")?, parts))
}

fn name(name: String, at: &str) -> Result<String, Refused> {
    if name.len() > LONGEST_NAME { Err(damaged(&format!("{at}: the name is too long"))) } else { Ok(name) }
}

fn entries(stored: Stored, at: &str) -> Result<Entries, Refused> {
    let mut entries = Entries::default();
    for (key, entry) in stored {
        let field = Field::of_key(&key).ok_or_else(|| damaged(&format!("{at}: no field “{}”", short(&key))))?;
        if entry.text.len() > LONGEST_ENTRY {
            return Err(damaged(&format!("{at}: {} is too long", field.name())));
        }
        let (text, unit) = entry.typed(field);
        entries.set(field, Typed { text, unit });
    }
    Ok(entries)
}

/// The first letters of what somebody else wrote.
fn short(text: &str) -> String {
    text.chars().take(40).collect()
}

#[cfg(test)]
mod tests {
    use super::*;
    use engine::chemistry::Chemistry;
    use engine::family::CodeFamily;
    use engine::site::{Got, start};

    fn room() -> Site {
        let mut site = start(Got {
            family: CodeFamily::NorthAmerica,
            coldest: -31,
            modules: 9,
            chemistry: Chemistry::Lfp,
            bus: 48,
            inverter: 3000,
        });
        "Kestrel Ridge hut".clone_into(&mut site.name);
        site
    }

    #[test]
    fn what_is_written_opens_as_it_was() {
        let site = room();
        assert_eq!(open(&write(&site)), Ok(site.clone()));
        assert_eq!(open(&write_short(&site)), Ok(site));
    }

    #[test]
    fn a_newer_layout_is_refused_by_its_number() {
        let text = write(&room()).replace("\"version\": 1", "\"version\": 9");
        assert_eq!(open(&text), Err(Refused::Newer { version: 9, known: 1 }));
    }

    #[test]
    fn what_cannot_be_is_named() {
        let told = |text: &str| open(text).unwrap_err().to_string();
        let text = write(&room());
        assert!(told(&text.replacen("\"Voc\"", "\"Vok\"", 1)).contains("no field “Vok”"));
        assert!(told(&text.replacen("\"array\"", "\"moon\"", 1)).contains("no kind “moon”"));
        assert!(told(&text.replacen("\"id\": 2,", "\"id\": 1,", 1)).contains("part 1 is there twice"));
        assert!(told("{}").contains("does not say that it is a site"));
    }
}
