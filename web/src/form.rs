//! The inputs of a tool: what the first verdict needs stands open, the rest lies in a fold, by group.

use std::sync::Arc;

use crate::derived::memo;
use crate::piece::{Piece, view};
use engine::check::FieldSet;
use engine::field::Field;
use leptos::prelude::*;

use crate::draft::use_draft;
use crate::field::{FieldOf, Said, StandIn};
use crate::fold::{Folds, fold};
use crate::tools::Tool;

/// Which inputs a tool has, and where they stand.
#[derive(Debug)]
pub struct Form {
    /// The tool.
    pub tool: Tool,
    /// What they are inputs of, and where they are read.
    pub title: (&'static str, &'static str),
    /// The fields that always stand open, in the order of the ten-second path: at most eight.
    pub first: &'static [Field],
    /// The rest, by group.
    pub groups: &'static [(&'static str, &'static [Field])],
    /// The word above a field: at most twelve letters or so, contained in the field's name.
    pub short: fn(Field) -> &'static str,
}

/// What is said beside fields.
#[derive(Clone)]
pub struct Hints {
    /// What stands in while a field is blank.
    pub stands_in: Told<StandIn>,
    /// What waits for a field, while it is blank.
    pub waits: Told<String>,
    /// What else is said under it.
    pub note: Told<String>,
}

/// Something told of a field, again at each change of what it hangs on.
pub type Told<T> = Arc<dyn Fn(Field) -> Option<T> + Send + Sync>;

impl Form {
    /// The fold that holds everything but the first fields.
    fn more(&self) -> String {
        format!("{}/more", self.tool.key())
    }

    /// Opens what holds `field`, and puts the caret into it.
    pub fn go_to(&self, folds: Folds, field: Field) {
        if !self.first.contains(&field) {
            folds.open(&self.more());
        }
        let id = format!("{}-{}", self.tool.pad().key(), field.key());
        // Once the fold has put its fields up.
        request_animation_frame(move || crate::field::focus(&id));
    }
}

/// The inputs of a tool.
pub fn form(form: &'static Form, hints: &Hints) -> Piece {
    let draft = use_draft();
    let says = memo(move || {
        let blank = |field: &&Field| draft.with(|pads| pads.typed((form.tool.pad(), **field)).text.is_empty());
        let rest = || form.groups.iter().flat_map(|(_, fields)| fields.iter());
        match rest().count() - rest().filter(blank).count() {
            0 => "each lets more checks speak".to_owned(),
            entered => format!("{entered} of {} entered", rest().count()),
        }
    });
    let first = fields_of(form, form.first, hints);
    let hints = hints.clone();
    let groups = move || {
        let group = |(title, fields): &(&'static str, &'static [Field])| {
            let fields: Vec<Piece> = fields.iter().map(|field| one(form, *field, &hints)).collect();
            view! {
                <h3 class="group">{*title}</h3>
                <div class="fields">{fields}</div>
            }
        };
        form.groups.iter().map(group).collect::<Vec<Piece>>()
    };
    view! {
        <h2 class="sub">{form.title.0} " " <span>{form.title.1}</span></h2>
        <div class="fields">{first}</div>
        {(!form.groups.is_empty()).then(|| view! { {fold(form.more(), "More", says, move || view! { {groups()} })} })}
    }
}

/// Some fields of a form by themselves.
pub fn fields_of(form: &'static Form, fields: &[Field], hints: &Hints) -> Vec<Piece> {
    fields.iter().map(|field| one(form, *field, hints)).collect()
}

fn one(form: &'static Form, field: Field, hints: &Hints) -> Piece {
    let (tool, label) = (form.tool.pad(), (form.short)(field));
    let told = |told: &Told<String>| {
        let told = told.clone();
        memo(move || told(field))
    };
    let stands_in = hints.stands_in.clone();
    let stands_in = memo(move || stands_in(field));
    let asks = told(&hints.waits);
    let note = told(&hints.note);
    FieldOf { tool, field, label: Some(label), of: None, said: Said { assumed: stands_in, asks, note } }.shown()
}

/// The same fields once more, of something else of the same kind, such as a second controller: in a pad of its own.
pub fn of_another(other: Tool, fields: &[Field], short: fn(Field) -> &'static str) -> Piece {
    let one =
        |field: &Field| FieldOf { of: Some(other.name()), ..FieldOf::new(other, *field).called(short(*field)) }.shown();
    let fields: Vec<Piece> = fields.iter().map(one).collect();
    view! {
        <h3 class="group">{other.name()}</h3>
        <div class="fields">{fields}</div>
    }
}

/// What waits for `field`: the answer, where `answer` lacks it, else a check that lacks nothing but it.
pub fn waits(field: Field, answer: FieldSet, others: impl Iterator<Item = FieldSet>) -> Option<String> {
    if !answer.is_empty() {
        return answer.contains(field).then(|| "the answer waits for this".to_owned());
    }
    let mut alone = others.filter(|asks| asks.len() == 1 && asks.contains(field));
    alone.next().map(|_| "a check waits for this".to_owned())
}

/// Names of fields, as in "Voc, Record low and Input limit".
pub fn names(fields: FieldSet) -> String {
    let names: Vec<&str> = fields.iter().map(Field::name).collect();
    match names.split_last() {
        None => String::new(),
        Some((one, [])) => (*one).to_owned(),
        Some((last, before)) => format!("{} and {last}", before.join(", ")),
    }
}

/// A field as it was entered, in the unit the person chose.
pub fn as_entered(pad: &impl engine::pad::Pad, field: Field) -> Option<String> {
    let (text, unit) = pad.typed(field);
    let reading = field.read(text, unit).ok()??;
    Some(engine::show::given(engine::quantity::Amount { number: reading.number(), unit: reading.unit() }))
}
