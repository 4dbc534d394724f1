//! Scratch pads: what was typed into each tool, and the way back. Pure: no browser, no clock.

use std::collections::BTreeMap;

use bridge::{Kept, KeptEntry};
use engine::field::Field;
use engine::pad::Pad;
use engine::site::{Part, PartId, PartKind, Site, Slot, Subject, View};
use engine::unit::Unit;

use crate::tools::Tool;

/// How long a pause in typing ends one step of undo, in milliseconds.
pub const PAUSE: f64 = 1000.0;

/// What stands in one field.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Typed {
    /// The text, to the letter.
    pub text: String,
    /// The unit that was chosen for the field, where one was.
    pub unit: Option<Unit>,
}

/// A field of a tool.
pub type Place = (Tool, Field);

/// A change that a person makes.
#[derive(Clone, Debug, PartialEq)]
pub enum Edit {
    /// The text of a field is now this. Keystrokes in one field join into one step of undo.
    Type(Place, String),
    /// The unit of a field is now this.
    Unit(Place, Unit),
    /// Several fields at once, as when a layout is taken over.
    Fill(Vec<(Place, Typed)>),
    /// The open site, or which one is open.
    Site(SiteEdit),
    /// Everything is replaced by what was in a file.
    Open(Kept),
    /// Everything is forgotten.
    Forget,
    /// The last change is taken back.
    Undo,
    /// The last change taken back is made again.
    Redo,
}

/// A change of the open site as a whole.
#[derive(Clone, Debug, PartialEq)]
pub enum SiteEdit {
    /// This one is open now.
    Open(OpenSite),
    /// None is.
    Close,
    /// Another part of this kind.
    Add(PartKind),
    /// A part less.
    Remove(PartId),
    /// One more like this.
    Duplicate(PartId),
    /// What a part, or the site, is called.
    Name(Option<PartId>, String),
    /// What a part is joined to.
    Join(PartId, Option<PartId>),
    /// What was typed into a tool by itself is put on the line: into the first part that it asks about, or a new one.
    Put(Tool),
}

/// A site, and what it is kept under.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct OpenSite {
    /// What it is kept under on this phone.
    pub key: u32,
    /// The site.
    pub site: Site,
}

/// What a step of undo would take back.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum What {
    /// What was typed into one field.
    Field(Field),
    /// Several fields at once.
    Several,
    /// A file that was opened.
    Opened,
    /// Everything having been forgotten.
    Forgotten,
    /// A change of a site's parts, or of which site is open.
    Site,
    /// What a part or the site is called.
    Name,
}

/// Entries that this release does not know: kept, and never looked into.
type Unknown = BTreeMap<String, BTreeMap<String, KeptEntry>>;

/// What stands where. A list, as there are some dozens at most.
#[derive(Clone, Debug, Default)]
struct Slots(Vec<(Place, Typed)>);

impl Slots {
    fn get(&self, place: Place) -> Option<&Typed> {
        self.0.iter().find(|(one, _)| *one == place).map(|(_, typed)| typed)
    }

    fn remove(&mut self, place: Place) {
        self.0.retain(|(one, _)| *one != place);
    }

    fn insert(&mut self, place: Place, typed: Typed) {
        self.remove(place);
        self.0.push((place, typed));
    }
}

#[derive(Clone, Debug)]
struct Change {
    what: What,
    fields: Vec<(Place, Typed, Typed)>,
    unknown: Option<(Unknown, Unknown)>,
    /// The open site before and after, where that is what changed. Boxed: most changes have none.
    site: Option<Box<(Option<OpenSite>, Option<OpenSite>)>>,
}

/// All scratch pads, and the way back through the session.
#[derive(Clone, Debug, Default)]
pub struct Pads {
    typed: Slots,
    unknown: Unknown,
    past: Vec<Change>,
    future: Vec<Change>,
    /// The field that is being typed into, and when last.
    typing: Option<(Place, f64)>,
    open: Option<OpenSite>,
    /// What of the open site the tools look at; none while they stand by themselves.
    subject: Option<Subject>,
}

/// What was typed into one tool.
#[derive(Clone, Copy, Debug)]
pub struct ToolPad<'a> {
    pads: &'a Pads,
    tool: Tool,
    view: Option<View<'a>>,
}

impl Pad for ToolPad<'_> {
    fn typed(&self, field: Field) -> (&str, Option<Unit>) {
        match self.view {
            Some(view) => view.at(field),
            None => self.pads.typed.get((self.tool, field)).map_or(("", None), |typed| (&typed.text, typed.unit)),
        }
    }
}

impl What {
    /// In words, as in "Undo: Voc".
    pub const fn words(self) -> &'static str {
        match self {
            Self::Field(field) => field.name(),
            Self::Several => "several fields",
            Self::Opened => "the opened file",
            Self::Forgotten => "forgetting all",
            Self::Site => "the site",
            Self::Name => "a name",
        }
    }
}

impl Pads {
    /// What stands in a field: of the part that is looked at, or of the tool by itself.
    pub fn typed(&self, place: Place) -> Typed {
        match self.view(place.0) {
            Some(view) => {
                let (text, unit) = view.typed(place.1);
                Typed { text: text.to_owned(), unit }
            }
            None => self.typed.get(place).cloned().unwrap_or_default(),
        }
    }

    /// What was typed into one tool, or into the part that is looked at, as the engine reads it.
    pub fn of(&self, tool: Tool) -> ToolPad<'_> {
        ToolPad { pads: self, tool, view: self.view(tool) }
    }

    /// The open site.
    pub fn site(&self) -> Option<&OpenSite> {
        self.open.as_ref()
    }

    /// The part that is looked at.
    fn part(&self) -> Option<(&Site, &Part)> {
        let site = &self.open.as_ref()?.site;
        match self.subject? {
            Subject::Part(id) | Subject::Run(id) => Some((site, site.part(id)?)),
            Subject::Place => None,
        }
    }

    /// What the String tool is asked, with what follows from the rest of the site where a part of it is looked at.
    pub fn string_ask(&self) -> engine::string::Ask {
        match self.part().filter(|(_, part)| part.kind == PartKind::Array) {
            Some((site, part)) => engine::site::string_ask(site, part),
            None => engine::string::Ask::read(&self.of(Tool::String)),
        }
    }

    /// What the Cells tool is asked.
    pub fn bank_ask(&self) -> engine::bank::Ask {
        match self.part().filter(|(_, part)| part.kind == PartKind::Bank) {
            Some((site, part)) => engine::site::bank_ask(site, part),
            None => engine::bank::Ask::read(&self.of(Tool::Cells)),
        }
    }

    /// What the Run tool is asked.
    pub fn run_ask(&self) -> engine::run::Ask {
        let of_run = self.part().filter(|_| matches!(self.subject, Some(Subject::Run(_))));
        let of_site = of_run.and_then(|(site, part)| engine::site::run_ask(site, part));
        of_site.unwrap_or_else(|| engine::run::Ask::read(&self.of(Tool::Run)))
    }

    /// What the Start tool is asked.
    pub fn start_ask(&self) -> engine::start::Ask {
        match self.part().filter(|(_, part)| part.kind == PartKind::Load) {
            Some((site, part)) => engine::site::start_ask(site, part),
            None => engine::start::Ask::read(&self.of(Tool::Start)),
        }
    }

    /// What of it is looked at.
    pub fn subject(&self) -> Option<Subject> {
        self.subject.filter(|_| self.open.is_some())
    }

    /// Looks at a part of the open site, or at none. Nothing that could be undone.
    pub fn look_at(&mut self, subject: Option<Subject>) {
        self.subject = subject;
        self.typing = None;
    }

    /// Takes over the site that was open, with no way back: it is what was there before.
    pub fn load_site(&mut self, open: Option<OpenSite>) {
        self.open = open;
    }

    /// The open site as the part that is looked at sees it. Pads that belong to one tool only are never part of a site.
    fn view(&self, tool: Tool) -> Option<View<'_>> {
        let subject = self.subject.filter(|_| tool.looks_at_sites())?;
        Some(View::new(&self.open.as_ref()?.site, subject))
    }

    /// How many fields hold something.
    pub fn len(&self) -> usize {
        self.typed.0.iter().filter(|(_, typed)| !typed.text.is_empty()).count()
            + self.unknown.values().map(BTreeMap::len).sum::<usize>()
    }

    /// Whether nothing was typed.
    pub fn is_empty(&self) -> bool {
        self.len() == 0
    }

    /// What an undo would take back.
    pub fn undoes(&self) -> Option<What> {
        self.past.last().map(|change| change.what)
    }

    /// What a redo would make again.
    pub fn redoes(&self) -> Option<What> {
        self.future.last().map(|change| change.what)
    }

    /// Makes a change at the time `now`, in milliseconds. Says whether anything is different.
    pub fn edit(&mut self, edit: Edit, now: f64) -> bool {
        match edit {
            Edit::Type(place, text) => {
                let unit = self.typed(place).unit;
                let going_on = self.typing.is_some_and(|(at, last)| at == place && now - last <= PAUSE);
                let changed = self.make(vec![(place, Typed { text, unit })], None, What::Field(place.1), going_on);
                if changed {
                    self.typing = Some((place, now));
                }
                changed
            }
            Edit::Unit(place, unit) => {
                self.typing = None;
                let text = in_unit(&self.typed(place).text, unit);
                self.make(vec![(place, Typed { text, unit: Some(unit) })], None, What::Field(place.1), false)
            }
            Edit::Fill(fields) => {
                self.typing = None;
                self.make(fields, None, What::Several, false)
            }
            Edit::Site(edit) => self.edit_site(edit),
            Edit::Open(kept) => self.replace(&kept, What::Opened),
            Edit::Forget => self.replace(&Kept::default(), What::Forgotten),
            Edit::Undo => self.step(true),
            Edit::Redo => self.step(false),
        }
    }

    /// The field that was typed into was left: the next keystroke begins a new step of undo.
    pub fn leave(&mut self) {
        self.typing = None;
    }

    /// Takes over what is kept, with no way back: it is what was there before.
    pub fn load(&mut self, kept: &Kept) {
        let (typed, unknown) = split(kept);
        self.typed = typed;
        self.unknown = unknown;
    }

    /// All of it, to be kept.
    pub fn kept(&self) -> Kept {
        let mut kept = Kept::default();
        for ((tool, field), typed) in &self.typed.0 {
            let entry = KeptEntry::new(&typed.text, typed.unit);
            kept.tools.entry(tool.key().to_owned()).or_default().insert(field.key().to_owned(), entry);
        }
        for (tool, entries) in &self.unknown {
            for (field, entry) in entries {
                kept.tools.entry(tool.clone()).or_default().insert(field.clone(), entry.clone());
            }
        }
        kept
    }

    fn replace(&mut self, kept: &Kept, what: What) -> bool {
        self.typing = None;
        let (typed, unknown) = split(kept);
        let mut fields = typed.0.clone();
        fields.extend(
            self.typed
                .0
                .iter()
                .filter(|(place, _)| typed.get(*place).is_none())
                .map(|(place, _)| (*place, Typed::default())),
        );
        self.make(fields, Some(unknown), what, false)
    }

    /// Puts `fields` in and remembers the way back. `join` adds to the step before, where that was in the same field.
    fn make(&mut self, fields: Vec<(Place, Typed)>, unknown: Option<Unknown>, what: What, join: bool) -> bool {
        if unknown.is_none() && fields.iter().any(|(place, _)| self.view(place.0).is_some()) {
            return self.make_on_site(fields, what, join);
        }
        let fields: Vec<_> = fields
            .into_iter()
            .map(|(place, after)| (place, self.typed.get(place).cloned().unwrap_or_default(), after))
            .filter(|(_, before, after)| before != after)
            .collect();
        let unknown = unknown.filter(|after| *after != self.unknown).map(|after| (self.unknown.clone(), after));
        if fields.is_empty() && unknown.is_none() {
            return false;
        }
        let mut change = Change { what, fields, unknown, site: None };
        let joins = |earlier: &mut Change| earlier.what == what && earlier.fields.len() == 1 && earlier.site.is_none();
        if join && let Some(earlier) = self.past.pop_if(joins) {
            change.fields[0].1 = earlier.fields[0].1.clone();
        }
        self.put(&change, false);
        self.future.clear();
        if change.unknown.is_some() || change.fields.iter().any(|(_, before, after)| before != after) {
            self.past.push(change);
        }
        true
    }

    /// The same where a part of the open site is looked at: each field goes to where its figure stands on the site.
    fn make_on_site(&mut self, fields: Vec<(Place, Typed)>, what: What, join: bool) -> bool {
        let Some(open) = &self.open else { return false };
        let mut after = open.clone();
        for (place, typed) in fields {
            let slot = self.view(place.0).and_then(|view| view.slot(place.1));
            let typed = engine::site::Typed { text: typed.text, unit: typed.unit };
            match slot {
                Some(Slot::Place) => after.site.place.set(place.1, typed),
                Some(Slot::Part(id)) => {
                    if let Some(part) = after.site.part_mut(id) {
                        part.entries.set(place.1, typed);
                        part.typical = false;
                    }
                }
                Some(Slot::Run(id)) => {
                    if let Some(run) = after.site.part_mut(id).and_then(|part| part.run.as_mut()) {
                        run.set(place.1, typed);
                    }
                }
                None => {}
            }
        }
        self.put_site(Some(after), what, join)
    }

    fn edit_site(&mut self, edit: SiteEdit) -> bool {
        self.typing = None;
        let mut after = self.open.clone();
        let what = if matches!(edit, SiteEdit::Name(..)) { What::Name } else { What::Site };
        match (edit, &mut after) {
            (SiteEdit::Open(site), _) => after = Some(site),
            (SiteEdit::Close, _) => after = None,
            (_, None) => return false,
            (SiteEdit::Put(tool), Some(open)) => self.put_on(tool, &mut open.site),
            (SiteEdit::Add(kind), Some(open)) => drop(open.site.add(kind)),
            (SiteEdit::Remove(id), Some(open)) => open.site.remove(id),
            (SiteEdit::Duplicate(id), Some(open)) => drop(open.site.duplicate(id)),
            (SiteEdit::Name(None, name), Some(open)) => open.site.name = name,
            (SiteEdit::Name(Some(id), name), Some(open)) => {
                if let Some(part) = open.site.part_mut(id) {
                    part.name = name;
                }
            }
            (SiteEdit::Join(id, to), Some(open)) => {
                if let Some(part) = open.site.part_mut(id) {
                    part.to = to;
                }
            }
        }
        self.put_site(after, what, what == What::Name)
    }

    /// Puts what was typed into `tool` by itself onto `site`, each figure to where it stands.
    fn put_on(&self, tool: Tool, site: &mut Site) {
        let Some(kind) = tool.asks_about() else { return };
        let there = site.first(kind).map(|part| part.id);
        let Some(id) = there.or_else(|| site.add(kind)) else { return };
        for ((_, field), typed) in self.typed.0.iter().filter(|((one, _), _)| *one == tool.pad()) {
            let slot = View::new(site, Subject::Part(id)).slot(*field);
            let typed = engine::site::Typed { text: typed.text.clone(), unit: typed.unit };
            match slot {
                Some(Slot::Place) => site.place.set(*field, typed),
                Some(Slot::Part(id)) => {
                    if let Some(part) = site.part_mut(id) {
                        part.entries.set(*field, typed);
                        part.typical = false;
                    }
                }
                Some(Slot::Run(id)) => {
                    if let Some(run) = site.part_mut(id).and_then(|part| part.run.as_mut()) {
                        run.set(*field, typed);
                    }
                }
                None => {}
            }
        }
    }

    fn put_site(&mut self, after: Option<OpenSite>, what: What, join: bool) -> bool {
        let mut before = self.open.clone();
        if before == after {
            return false;
        }
        // Keystrokes in one field, or in one name, are one step.
        let same = |earlier: &mut Change| {
            let ends_here = earlier.site.as_ref().is_some_and(|site| site.1 == before);
            earlier.what == what && ends_here && matches!(what, What::Field(_) | What::Name)
        };
        let mut joined = None;
        if join {
            joined = self.past.pop_if(same);
        }
        if let Some(earlier) = joined.and_then(|change| change.site) {
            before = earlier.0;
        }
        self.open = after.clone();
        self.future.clear();
        if before != after {
            let site = Some(Box::new((before, after)));
            self.past.push(Change { what, fields: Vec::new(), unknown: None, site });
        }
        true
    }

    fn step(&mut self, back: bool) -> bool {
        self.typing = None;
        let Some(change) = (if back { self.past.pop() } else { self.future.pop() }) else { return false };
        self.put(&change, back);
        if back {
            self.future.push(change)
        } else {
            self.past.push(change)
        }
        true
    }

    fn put(&mut self, change: &Change, back: bool) {
        for (place, before, after) in &change.fields {
            let typed = if back { before } else { after };
            if *typed == Typed::default() {
                self.typed.remove(*place);
            } else {
                self.typed.insert(*place, typed.clone());
            }
        }
        if let Some(site) = &change.site {
            self.open = if back { site.0.clone() } else { site.1.clone() };
        }
        if let Some((before, after)) = &change.unknown {
            self.unknown = if back { before.clone() } else { after.clone() };
        }
    }
}

/// `text` without the unit that was typed behind its number, so that `unit`, now chosen, is the one that counts.
///
/// Text that is no number is left as it is.
fn in_unit(text: &str, unit: Unit) -> String {
    let Ok(whole) = engine::typed::read(text, unit) else { return text.to_owned() };
    if whole.unit() == unit {
        return text.to_owned();
    }
    text.char_indices()
        .rev()
        .map(|(end, _)| text[..end].trim_end())
        .find(|part| {
            engine::typed::read(part, unit)
                .is_ok_and(|part| part.unit() == unit && part.number().total_cmp(&whole.number()).is_eq())
        })
        .unwrap_or(text)
        .to_owned()
}

fn split(kept: &Kept) -> (Slots, Unknown) {
    let mut typed = Slots::default();
    let mut unknown = Unknown::new();
    for (tool_key, entries) in &kept.tools {
        for (field_key, entry) in entries {
            match (Tool::of_key(tool_key), Field::of_key(field_key)) {
                (Some(tool), Some(field)) => {
                    let (text, unit) = entry.typed(field);
                    typed.insert((tool, field), Typed { text, unit });
                }
                _ => {
                    unknown.entry(tool_key.clone()).or_default().insert(field_key.clone(), entry.clone());
                }
            }
        }
    }
    (typed, unknown)
}

#[cfg(test)]
mod tests {
    use super::*;
    use engine::entry::Entry;
    use engine::family::CodeFamily;
    use engine::quantity::{Celsius, Count, Volts};

    const VOC: Place = (Tool::String, Field::Voc);
    const LOW: Place = (Tool::String, Field::RecordLow);

    fn type_in(pads: &mut Pads, place: Place, text: &str, now: f64) {
        for end in 1..=text.len() {
            pads.edit(Edit::Type(place, text[..end].to_owned()), now);
        }
    }

    fn text(pads: &Pads, place: Place) -> String {
        pads.typed(place).text
    }

    #[test]
    fn keystrokes_without_a_pause_are_one_step() {
        let mut pads = Pads::default();
        type_in(&mut pads, VOC, "49.3", 0.0);
        pads.edit(Edit::Type(VOC, "49.31".into()), 2000.0);
        assert!(pads.edit(Edit::Undo, 2001.0));
        assert_eq!(text(&pads, VOC), "49.3");
        assert!(pads.edit(Edit::Undo, 2002.0));
        assert_eq!(text(&pads, VOC), "");
        assert!(!pads.edit(Edit::Undo, 2003.0));
        assert!(pads.edit(Edit::Redo, 2004.0));
        assert!(pads.edit(Edit::Redo, 2005.0));
        assert_eq!(text(&pads, VOC), "49.31");
    }

    fn room() -> Pads {
        use engine::chemistry::Chemistry;
        let got = engine::site::Got {
            family: CodeFamily::Iec,
            coldest: -20,
            modules: 8,
            chemistry: Chemistry::Lfp,
            bus: 48,
            inverter: 3000,
        };
        let mut pads = Pads::default();
        pads.edit(Edit::Site(SiteEdit::Open(OpenSite { key: 1, site: engine::site::start(got) })), 0.0);
        pads
    }

    #[test]
    fn a_tool_that_looks_at_a_part_writes_to_where_the_figure_stands() {
        let mut pads = room();
        let site = &pads.site().unwrap().site;
        let (array, controller) =
            (site.first(PartKind::Array).unwrap().id, site.first(PartKind::Controller).unwrap().id);
        pads.look_at(Some(Subject::Part(array)));
        let limit = (Tool::String, Field::InputLimit);
        type_in(&mut pads, limit, "111", 10.0);
        assert_eq!(text(&pads, limit), "111");
        let at = |pads: &Pads| {
            let part = pads.site().unwrap().site.part(controller).unwrap();
            part.entries.get(Field::InputLimit).map(|typed| typed.text.clone())
        };
        assert_eq!(at(&pads).as_deref(), Some("111"));
        // The scratch pad of the tool is as it was, and three keystrokes are one step.
        pads.look_at(None);
        assert_eq!(text(&pads, limit), "");
        assert!(pads.edit(Edit::Undo, 20.0));
        assert_ne!(at(&pads).as_deref(), Some("111"));
        assert!(pads.edit(Edit::Undo, 21.0), "the site itself");
        assert!(pads.site().is_none());
        assert!(pads.edit(Edit::Redo, 22.0) && pads.edit(Edit::Redo, 23.0));
        assert_eq!(at(&pads).as_deref(), Some("111"));
    }

    #[test]
    fn what_was_typed_by_itself_is_put_on_the_line() {
        let mut pads = room();
        type_in(&mut pads, VOC, "40.5", 10.0);
        type_in(&mut pads, LOW, "-33", 20.0);
        type_in(&mut pads, (Tool::String, Field::InputLimit), "97", 30.0);
        assert!(pads.edit(Edit::Site(SiteEdit::Put(Tool::String)), 40.0));
        let site = &pads.site().unwrap().site;
        let text = |entries: &engine::site::Entries, field| entries.get(field).map(|one| one.text.clone());
        assert_eq!(text(&site.first(PartKind::Array).unwrap().entries, Field::Voc).as_deref(), Some("40.5"));
        assert_eq!(text(&site.first(PartKind::Controller).unwrap().entries, Field::InputLimit).as_deref(), Some("97"));
        assert_eq!(text(&site.place, Field::RecordLow).as_deref(), Some("-33"));
        pads.edit(Edit::Undo, 50.0);
        let site = &pads.site().unwrap().site;
        assert_ne!(text(&site.place, Field::RecordLow).as_deref(), Some("-33"));
    }

    #[test]
    fn parts_come_and_go_and_can_be_undone() {
        let mut pads = room();
        let before = pads.site().unwrap().clone();
        let controller = before.site.first(PartKind::Controller).unwrap().id;
        pads.edit(Edit::Site(SiteEdit::Duplicate(controller)), 1.0);
        pads.edit(Edit::Site(SiteEdit::Remove(controller)), 2.0);
        pads.edit(Edit::Site(SiteEdit::Name(None, "Hut".to_owned())), 3.0);
        for _ in 0..3 {
            assert!(pads.edit(Edit::Undo, 4.0));
        }
        assert_eq!(pads.site(), Some(&before));
    }

    #[test]
    fn leaving_a_field_ends_the_step() {
        let mut pads = Pads::default();
        type_in(&mut pads, VOC, "49", 0.0);
        pads.leave();
        type_in(&mut pads, VOC, "48", 10.0);
        pads.edit(Edit::Undo, 20.0);
        assert_eq!(text(&pads, VOC), "49");
    }

    #[test]
    fn another_field_ends_the_step_and_a_new_change_ends_redo() {
        let mut pads = Pads::default();
        type_in(&mut pads, VOC, "49", 0.0);
        type_in(&mut pads, LOW, "-31", 0.0);
        pads.edit(Edit::Undo, 1.0);
        assert_eq!((text(&pads, VOC), text(&pads, LOW)), ("49".into(), String::new()));
        assert_eq!(pads.redoes(), Some(What::Field(Field::RecordLow)));
        type_in(&mut pads, VOC, "5", 5000.0);
        assert_eq!(pads.redoes(), None);
    }

    #[test]
    fn typing_and_taking_it_out_again_leaves_no_step() {
        let mut pads = Pads::default();
        type_in(&mut pads, VOC, "4", 0.0);
        pads.edit(Edit::Type(VOC, String::new()), 10.0);
        assert_eq!(pads.undoes(), None);
    }

    #[test]
    fn forgetting_and_opening_can_be_undone() {
        let mut kept = Kept::default();
        for (tool, field, text) in [("string", "Voc", "49.3"), ("later", "X", "7")] {
            kept.tools.entry(tool.into()).or_default().insert(field.into(), KeptEntry::new(text, None));
        }
        let mut pads = Pads::default();
        type_in(&mut pads, LOW, "-31", 0.0);
        let before = pads.kept();
        assert!(pads.edit(Edit::Open(kept.clone()), 1.0));
        assert_eq!(pads.kept(), kept, "what is not known here is kept too");
        assert!(pads.edit(Edit::Forget, 2.0));
        assert!(pads.is_empty());
        pads.edit(Edit::Undo, 3.0);
        assert_eq!(pads.kept(), kept);
        pads.edit(Edit::Undo, 4.0);
        assert_eq!(pads.kept(), before);
    }

    #[test]
    fn a_chosen_unit_is_the_one_that_is_read() {
        let mut pads = Pads::default();
        type_in(&mut pads, LOW, "-24", 0.0);
        assert_eq!(pads.of(Tool::String).entry::<Celsius>(Field::RecordLow), Entry::Typed(Celsius::new(-24.0)));
        pads.edit(Edit::Unit(LOW, Unit::DegreeFahrenheit), 1.0);
        assert_eq!(text(&pads, LOW), "-24");
        let Entry::Typed(low) = pads.of(Tool::String).entry::<Celsius>(Field::RecordLow) else { panic!("reads") };
        assert!((low.get() - -31.111).abs() < 0.001);
    }

    #[test]
    fn what_is_not_understood_is_kept_and_unread() {
        let mut pads = Pads::default();
        type_in(&mut pads, VOC, "12,,4", 0.0);
        assert_eq!(pads.of(Tool::String).entry::<Volts>(Field::Voc), Entry::Unread);
        assert_eq!(text(&pads, VOC), "12,,4");
        pads.edit(Edit::Unit(VOC, Unit::Millivolt), 1.0);
        assert_eq!(text(&pads, VOC), "12,,4");
    }

    #[test]
    fn the_engine_reads_one_tool() {
        let mut pads = Pads::default();
        let (series, family) = ((Tool::String, Field::Series), (Tool::String, Field::CodeFamily));
        pads.edit(Edit::Type(series, "3".into()), 0.0);
        pads.edit(Edit::Type(family, "iec".into()), 0.0);
        let pad = pads.of(Tool::String);
        assert_eq!(pad.entry::<Count>(Field::Series), Entry::of(3.0));
        assert_eq!(pad.choice::<CodeFamily>(Field::CodeFamily), Entry::Typed(CodeFamily::Iec));
        assert_eq!(pad.entry::<Volts>(Field::Voc), Entry::Blank);
    }
}
