//! Fields: what a person types, shown to the letter, and what stands in or is missing.
//!
//! The accessible name of a field is the engine's name for it; the word on screen may be shorter.

mod choice;
mod count;
mod list;
mod number;
mod units;

pub use list::list_field;

use std::time::Duration;

use crate::derived::{Memo, dynamic, memo, when};
use crate::piece::{IntoPiece, Piece, view};
use engine::check::Assumption;
use engine::field::{Field, Takes};
use engine::quantity::Amount;
use engine::typed::{Reading, Refusal};
use engine::unit::Unit;
use leptos::leptos_dom::helpers::TimeoutHandle;
use leptos::prelude::*;

use crate::draft::Draft;
use crate::pads::{PAUSE, Place, Typed};
use crate::tools::Tool;
use crate::working;

/// What stands in for a blank field.
#[derive(Clone, Debug, PartialEq)]
pub struct StandIn {
    /// The value.
    pub stands: Stands,
    /// Why this value.
    pub why: String,
    /// Where it is from.
    pub source: String,
}

/// The value that stands in.
#[derive(Clone, Debug, PartialEq)]
pub enum Stands {
    /// A number with its unit.
    Amount(Amount),
    /// A choice, by its key.
    Choice(&'static str),
    /// None that could be shown: it depends on other inputs.
    Depends,
}

impl StandIn {
    /// What the engine assumed.
    pub fn of(assumption: &Assumption) -> Self {
        Self {
            stands: match (assumption.amount, assumption.choice) {
                (Some(amount), _) => Stands::Amount(amount),
                (None, Some(key)) => Stands::Choice(key),
                (None, None) => Stands::Depends,
            },
            why: assumption.why.to_owned(),
            source: working::cited(assumption.source),
        }
    }

    /// The number as it would be typed, in `unit` where that measures the same.
    fn in_unit(&self, unit: Unit) -> Option<f64> {
        match self.stands {
            Stands::Amount(amount) if amount.unit.dimension() == unit.dimension() => {
                // Sums of decimal fractions end in the last bit: 37.4 °F is 37.400 000 000 000 006.
                let number = unit.from_base(amount.unit.to_base(amount.number));
                Some((number * 1e6).round() / 1e6)
            }
            Stands::Amount(_) | Stands::Choice(_) | Stands::Depends => None,
        }
    }
}

/// How a field looks.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum State {
    Entered,
    Blank,
    Assumed,
    Asks,
    Unread,
}

/// What the fields of every kind share.
#[derive(Clone, Copy)]
struct Parts {
    place: Place,
    draft: Draft,
    typed: Memo<Typed>,
    reading: Memo<Result<Option<Reading>, Refusal>>,
    state: Memo<State>,
    note: Memo<Option<String>>,
    told: RwSignal<bool>,
    patience: Patience,
}

/// What may be said beside a field.
#[derive(Clone, Copy)]
pub struct Said {
    /// What stands in while it is blank.
    pub assumed: Memo<Option<StandIn>>,
    /// What waits for it, while it is blank.
    pub asks: Memo<Option<String>>,
    /// What else is said under it.
    pub note: Memo<Option<String>>,
}

impl Default for Said {
    fn default() -> Self {
        Self { assumed: memo(|| None), asks: memo(|| None), note: memo(|| None) }
    }
}

/// A field, where it stands and what is said of it.
#[derive(Clone, Copy)]
pub struct FieldOf {
    /// The tool it stands in.
    pub tool: Tool,
    /// The input.
    pub field: Field,
    /// The word above it, where it is shorter than the field's name. Contained in that name.
    pub label: Option<&'static str>,
    /// What it is a figure of, where a page has the same input twice. Goes before its name.
    pub of: Option<&'static str>,
    /// What is said beside it.
    pub said: Said,
}

impl FieldOf {
    /// By its own name, with nothing said.
    pub fn new(tool: Tool, field: Field) -> Self {
        Self { tool, field, label: None, of: None, said: Said::default() }
    }

    /// With this word above it.
    #[must_use]
    pub fn called(self, label: &'static str) -> Self {
        Self { label: Some(label), ..self }
    }

    /// The field for what it takes.
    pub fn shown(self) -> Piece {
        match self.field.takes() {
            Takes::Number { .. } => number::number_field(self),
            Takes::Whole { .. } => count::count_field(self),
            Takes::Choice(_) => choice::choice_field(self),
            Takes::List { .. } => list_field(self.tool, self.field, self.label()),
        }
    }

    fn label(self) -> &'static str {
        self.label.unwrap_or(self.field.name())
    }

    /// Its accessible name.
    fn name(self) -> String {
        self.of.map_or_else(|| self.field.name().to_owned(), |of| format!("{of}: {}", self.field.name()))
    }
}

/// Half-typed entries are not scolded: only a pause or leaving the field turns one to "not understood".
#[derive(Clone, Copy)]
pub struct Patience {
    over: RwSignal<bool>,
    timer: StoredValue<Option<TimeoutHandle>>,
}

impl Patience {
    /// Of a field that stands as it was left.
    pub(crate) fn new() -> Self {
        let patience = Self { over: RwSignal::new(true), timer: StoredValue::new(None) };
        on_cleanup(move || patience.stop());
        patience
    }

    fn stop(self) {
        if let Some(timer) = self.timer.try_update_value(Option::take).flatten() {
            timer.clear();
        }
    }

    /// A key was pressed: wait again.
    pub fn begin(self) {
        self.stop();
        self.over.set(false);
        let pause = Duration::from_millis(PAUSE as u64);
        let timer = set_timeout_with_handle(move || self.over.set(true), pause).ok();
        self.timer.set_value(timer);
    }

    /// Whether what stands there may be judged.
    pub fn is_over(self) -> bool {
        self.over.get()
    }

    /// The field was left.
    pub fn end(self) {
        self.stop();
        self.over.set(true);
    }
}

impl Parts {
    fn new(
        place: Place,
        said: Said,
        read: impl Fn(&Typed) -> Result<Option<Reading>, Refusal> + Send + Sync + 'static,
    ) -> Self {
        let draft = crate::draft::use_draft();
        let typed = draft.typed(place);
        let patience = Patience::new();
        let told = RwSignal::new(false);
        let reading = memo(move || typed.with(&read));
        let state =
            memo(move || match (typed.with(|typed| typed.text.trim().is_empty()), reading.with(Result::is_err)) {
                (true, _) if said.asks.with(Option::is_some) => State::Asks,
                (true, _) if said.assumed.with(Option::is_some) => State::Assumed,
                (true, _) => State::Blank,
                (false, true) if patience.over.get() => State::Unread,
                (false, _) => State::Entered,
            });
        let note = memo(move || match state.get() {
            State::Unread => reading.with(|reading| reading.as_ref().err().map(ToString::to_string)),
            State::Asks => said.asks.get(),
            State::Assumed => said.assumed.get().map(|stand_in| {
                if told.get() && !stand_in.source.is_empty() {
                    format!("{}. Source: {}", stand_in.why, stand_in.source)
                } else {
                    stand_in.why
                }
            }),
            State::Entered | State::Blank => said.note.get(),
        });
        Self { place, draft, typed, reading, state, note, told, patience }
    }

    fn id(self) -> String {
        format!("{}-{}", self.place.0.key(), self.place.1.key())
    }

    fn field(self) -> Field {
        self.place.1
    }

    /// The number that stands in, where one does now.
    fn stand_in(self, said: Said, unit: Unit) -> Option<f64> {
        let shows = self.state.get() == State::Assumed;
        said.assumed.with(|stand_in| stand_in.as_ref().filter(|_| shows).and_then(|stand_in| stand_in.in_unit(unit)))
    }

    fn class(self) -> &'static str {
        match self.state.get() {
            State::Entered | State::Blank => "field",
            State::Assumed => "field is-assumed",
            State::Asks => "field asks",
            State::Unread => "field unread",
        }
    }

    fn described_by(self) -> Option<String> {
        self.note.with(Option::is_some).then(|| format!("{}-note", self.id()))
    }

    fn invalid(self) -> Option<&'static str> {
        (self.state.get() == State::Unread).then_some("true")
    }

    /// The word above the box, and "assumed" beside it where something stands in.
    fn head(self, label: &'static str) -> Piece {
        let focus = move |_| {
            self.told.update(|told| *told = !*told);
            focus(&self.id());
        };
        view! {
            <div class="label">
                <label for=self.id()>{label}</label>
                {when(move || self.state.get() == State::Assumed, move || view! { <button
                        class="tag"
                        type="button"
                        aria-label=format!("{}: assumed. Say why", self.field().name())
                        on:click=focus
                    >
                        "assumed"
                    </button> })}
            </div>
        }
    }

    fn foot(self) -> Piece {
        view! {
            {dynamic(move || self.note.get().map(|note| view! { <p class="field-note" id=format!("{}-note", self.id())>{note}</p> }).piece())}
        }
    }
}

/// Puts the caret into a field.
pub fn focus(id: &str) {
    use wasm_bindgen::JsCast;
    let element = document().get_element_by_id(id).and_then(|element| element.dyn_into::<web_sys::HtmlElement>().ok());
    if let Some(element) = element {
        // An element that cannot take the caret stays without it.
        let _ = element.focus();
    }
}
