//! The answer of a tool: for what, the number, its verdict, what it means, and the picture of it.
//!
//! A tool's own `answer.rs` makes one, pure; here it is put on the page, the same for all.

use std::borrow::Cow;

use crate::derived::{Memo, dynamic, memo, when};
use crate::piece::{Piece, view};
use engine::check::{Check, Cost, FieldSet, Verdict};
use engine::show;
use leptos::prelude::*;

use crate::draft::use_draft;
use crate::form::names;
use crate::pads::{Edit, Place, Typed};
use crate::span_bar::{Bar, slim_bar, span_bar};
use crate::verdict::{cost_mark, tells_cost, verdict_mark};

/// Everything that stands on top of a tool.
#[derive(Clone, Debug, PartialEq)]
pub struct Answer {
    /// For what the number is.
    pub of: String,
    /// The number without its unit, or a few words; a dash where it cannot be told.
    pub number: String,
    /// Its unit, set smaller beside it; empty where it has none.
    pub unit: Cow<'static, str>,
    /// The judgement.
    pub verdict: Verdict,
    /// What it costs where it breaks.
    pub cost: Cost,
    /// What it means, in a sentence.
    pub says: String,
    /// A second figure that belongs to it, such as the longest safe string.
    pub most: Option<String>,
    /// What it rests on, where something was assumed.
    pub rests: Option<String>,
    /// What other checks break, where some do.
    pub besides: Option<String>,
    /// The picture of it: an empty ruler before a limit or a value is known.
    pub bar: Option<Bar>,
    /// A second picture, where the answer rests on two limits.
    pub second: Option<Bar>,
    /// What one tap would enter.
    pub offer: Option<Offer>,
}

/// What one tap enters, such as a value that was assumed.
#[derive(Clone, Debug, PartialEq)]
pub struct Offer {
    /// The words on the button.
    pub words: String,
    /// The fields that it fills.
    pub fill: Vec<(Place, Typed)>,
}

impl Answer {
    /// What a screen reader is told: verdict, value and distance.
    pub fn told(&self) -> String {
        let cost = if tells_cost(self.verdict) { format!(", {}", self.cost.word()) } else { String::new() };
        let number =
            if self.number == show::NONE { String::new() } else { format!(" {} {}.", self.number, spoken(&self.unit)) };
        let most = self.most.as_ref().map_or_else(String::new, |most| format!(" {most}."));
        format!("{}{cost}.{number} {}{most}", self.verdict.word(), self.says)
    }
}

/// What else breaks, but for the check that stands on top.
pub fn besides<Id: Copy + PartialEq>(
    checks: &[Check<Id>],
    top: Option<Id>,
    name: fn(Id) -> &'static str,
) -> Option<String> {
    let broken = checks.iter().filter(|check| check.verdict == Verdict::Breaks && Some(check.id) != top);
    let broken: Vec<&str> = broken.map(|check| name(check.id)).collect();
    (!broken.is_empty()).then(|| format!("Breaks as well: {}.", broken.join("; ")))
}

/// What a value rests on, where something was assumed.
pub fn rests_on(assumed: FieldSet) -> Option<String> {
    (!assumed.is_empty()).then(|| format!("Rests on what is assumed: {}.", names(assumed)))
}

/// A unit as it is said.
fn spoken(unit: &str) -> &str {
    match unit {
        "V" => "volts",
        "A" => "amperes",
        "W" => "watts",
        "kW" => "kilowatts",
        "kWh" => "kilowatt-hours",
        "%" => "percent",
        "mm²" => "square millimetres",
        other => other,
    }
}

/// The figure alone of what [`show`] wrote: its unit is set smaller beside it.
pub fn without_unit(shown: &str) -> &str {
    shown.rsplit_once(show::NARROW).map_or(shown, |(number, _)| number)
}

/// The answer: number, verdict, what it means, picture. The one region of the page with the role of a status.
pub fn answer_view(answer: Memo<Option<Answer>>) -> Piece {
    let words = dynamic(move || {
        let Some(answer) = answer.get() else { return Piece::Nothing };
        let Answer { of, number, unit, verdict, cost, says, most, rests, besides, .. } = answer;
        view! {
            <p class="answer-for">{of}</p>
            <div class="answer-row">
                <p class="answer-num">{with_unit(number, unit)}</p>
                <p class="answer-tags">
                    {verdict_mark(verdict, true)}
                    {tells_cost(verdict).then(|| view! { {cost_mark(cost)} })}
                </p>
            </div>
            <p class="answer-say">{says}</p>
            {most.map(|most| view! { <p class="answer-most">{most}</p> })}
            {rests.map(|rests| view! { <p class="answer-note">{rests}</p> })}
            {besides.map(|besides| view! { <p class="answer-besides">{besides}</p> })}
        }
    });
    let drawn = move |of: fn(&Answer) -> Option<Bar>| {
        dynamic(move || answer.with(|answer| answer.as_ref().and_then(of)).map_or_else(|| Piece::Nothing, span_bar))
    };
    let (bar, second) = (drawn(|answer| answer.bar.clone()), drawn(|answer| answer.second.clone()));
    view! {
        <section class="answer" aria-label="Answer">
            // A reader is told by the line below, once typing rests: not by every keystroke.
            <div role="status" aria-live="off">{words}</div>
            {bar}
            {second}
            {offer(answer)}
            {told(answer)}
        </section>
    }
}

/// The number with its unit set smaller; a dash has none.
fn with_unit(number: String, unit: Cow<'static, str>) -> Piece {
    let unit = (number != show::NONE && !unit.is_empty()).then(|| view! { <small>{format!(" {unit}")}</small> });
    view! { {number}{unit} }
}

/// What a screen reader says once typing has rested.
fn told(answer: Memo<Option<Answer>>) -> Piece {
    let said = RwSignal::new(String::new());
    let waiting = StoredValue::new(None::<leptos::leptos_dom::helpers::TimeoutHandle>);
    let stop = move || {
        if let Some(timer) = waiting.try_update_value(Option::take).flatten() {
            timer.clear();
        }
    };
    on_cleanup(stop);
    Effect::new(move |before: Option<Option<String>>| {
        let now = answer.with(|answer| answer.as_ref().map(Answer::told));
        if let Some(before) = before
            && before != now
            && let Some(words) = now.clone()
        {
            stop();
            let rest = std::time::Duration::from_millis(600);
            waiting.set_value(set_timeout_with_handle(move || said.set(words.clone()), rest).ok());
        }
        now
    });
    view! { <p class="vh" aria-live="polite">{said}</p> }
}

/// One tap turns what was assumed into what is entered.
fn offer(answer: Memo<Option<Answer>>) -> Piece {
    let draft = use_draft();
    let offered = memo(move || answer.with(|answer| answer.as_ref().and_then(|answer| answer.offer.clone())));
    let take = move |_| {
        if let Some(offer) = offered.get_untracked() {
            draft.edit(Edit::Fill(offer.fill));
        }
    };
    when(
        move || offered.with(Option::is_some),
        move || {
            let words = memo(move || offered.get().map_or_else(String::new, |offer| offer.words));
            view! {
                <div class="btns">
                    <button class="btn small" type="button" on:click=take>{words}</button>
                </div>
            }
        },
    )
}

/// The answer once more, at the top of the screen, once the answer itself has been scrolled out of it.
pub fn ride(answer: Memo<Option<Answer>>) -> Piece {
    let away = RwSignal::new(false);
    let look = move |_: ()| away.set(answer_is_away());
    let scrolled = window_event_listener_untyped("scroll", move |_| look(()));
    let resized = window_event_listener_untyped("resize", move |_| look(()));
    on_cleanup(move || {
        scrolled.remove();
        resized.remove();
    });
    let shown = dynamic(move || {
        let Some(Answer { number, unit, verdict, cost, bar, .. }) = answer.get() else { return Piece::Nothing };
        view! {
            <span class="num">{with_unit(number, unit)}</span>
            {verdict_mark(verdict, false)}
            {tells_cost(verdict).then(|| view! { {cost_mark(cost)} })}
            {bar.map(slim_bar)}
        }
    });
    view! { <div class="ride" aria-hidden="true" hidden=move || !away.get()>{shown}</div> }
}

/// Whether the verdict on top has left the screen.
fn answer_is_away() -> bool {
    let row = document().query_selector(".answer-row").ok().flatten();
    row.is_some_and(|row| row.get_bounding_client_rect().bottom() < 0.0)
}
