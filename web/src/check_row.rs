//! A check in a list: verdict, value, limit and margin, a slim bar, and the working behind a fold.

use engine::check::{Check, Sense, Step, Verdict};
use engine::field::Field;
use engine::quantity::{Amount, Quantity};
use engine::show;
use leptos::prelude::*;

use crate::fold::Folds;
use crate::span_bar::geometry::{From, Post, Ruler};
use crate::span_bar::{Bar, SlimBar};
use crate::verdict::{CostMark, VerdictMark, tells_cost};
use crate::working::Working;

/// A check in a list.
#[component]
pub fn CheckRow<Id>(
    /// What it is remembered by when unfolded; one of its own on the page.
    #[prop(into)]
    id: String,
    /// What is required, in a few words.
    name: &'static str,
    /// The check as it was judged.
    #[prop(into)]
    check: Signal<Check<Id>>,
    /// Makes the working. Called when it is unfolded, and again at each change while it is.
    #[prop(into)]
    working: Callback<(), Vec<Step>>,
    /// What else there is to say, under the figures.
    #[prop(into, optional)]
    note: MaybeProp<String>,
    /// Leads to a field that is missing.
    on_ask: Callback<Field>,
) -> impl IntoView
where
    Id: Clone + Send + Sync + 'static,
{
    let folds = expect_context::<Folds>();
    let id = StoredValue::new(id);
    let open = Memo::new(move |_| id.with_value(|id| folds.is_open(id)));
    let verdict = Signal::derive(move || check.with(|check| check.verdict));
    let cost = Signal::derive(move || check.with(|check| check.cost));
    let figures = move || {
        check.with(|check| {
            let (value, limit) = check.value.zip(check.limit).map_or_else(
                || (show::NONE.to_owned(), show::NONE.to_owned()),
                |(value, limit)| show::apart(value, limit.amount),
            );
            let margin = check.margin.map_or_else(|| show::NONE.to_owned(), |margin| show::room(margin.amount()));
            (value, limit, margin)
        })
    };
    let bar = Memo::new(move |_| check.with(|check| bar(name, check)));
    let asks = move || check.with(asks_for);
    view! {
        <li class="check" data-open=move || open.get().then_some("") data-v=move || verdict.get().word()>
            <button
                class="check-head"
                type="button"
                aria-expanded=move || open.get().to_string()
                on:click=move |_| id.with_value(|id| folds.turn(id))
            >
                <span class="name">{name}</span>
                <span class="tags">
                    <VerdictMark verdict=verdict/>
                    <Show when=move || tells_cost(verdict.get())><CostMark cost=cost/></Show>
                </span>
                {move || match asks() {
                    Some(asks) => view! { <span class="asks-for">{asks}</span> }.into_any(),
                    None => {
                        let (value, limit, margin) = figures();
                        view! {
                            <span class="figs">
                                <span><small>"value"</small>" "<b>{value}</b></span>
                                <span><small>"limit"</small>" "<b>{limit}</b></span>
                                <span><small>"margin"</small>" "<b>{margin}</b></span>
                            </span>
                        }
                            .into_any()
                    }
                }}
                {move || bar.get().map(|bar| view! { <SlimBar bar=bar/> })}
            </button>
            <Show when=move || open.get()>
                <div class="check-body">
                    {move || note.get().map(|note| view! { <p class="note">{note}</p> })}
                    {move || check.with(|check| missing(check.asks, on_ask))}
                    {move || check.with(assumed).map(|assumed| view! { <p class="note">{assumed}</p> })}
                    // Read with the check, so that the working follows what is typed.
                    {move || check.with(|_| view! { <Working steps=working.run(())/> })}
                </div>
            </Show>
        </li>
    }
}

/// "asks: Voc, Record low", where it asks.
pub fn asks_for<Id>(check: &Check<Id>) -> Option<String> {
    (check.verdict == Verdict::Asks).then(|| format!("asks: {}", names(check.asks)))
}

/// A button for each field that is missing.
fn missing(fields: engine::check::FieldSet, on_ask: Callback<Field>) -> Option<AnyView> {
    (!fields.is_empty()).then(|| {
        let buttons = fields.iter().map(|field| {
            view! {
                <button class="btn small" type="button" on:click=move |_| on_ask.run(field)>
                    {format!("Enter {}", field.name())}
                </button>
            }
        });
        view! { <div class="btns">{buttons.collect_view()}</div> }.into_any()
    })
}

fn assumed<Id>(check: &Check<Id>) -> Option<String> {
    (!check.assumed.is_empty()).then(|| format!("Rests on what is assumed: {}.", names(check.assumed)))
}

fn names(fields: engine::check::FieldSet) -> String {
    fields.iter().map(engine::field::Field::name).collect::<Vec<_>>().join(", ")
}

/// The slim bar of a check; none where it asks.
pub fn bar<Id>(name: &str, check: &Check<Id>) -> Option<Bar> {
    let (value, limit, room) = (check.value?, check.limit?, check.room()?);
    let post = Post {
        at: limit.amount.number,
        reserve: limit.amount.number.abs() * check.reserve.get() / 100.0,
        name: String::new(),
        shown: show::given(limit.amount),
    };
    let (low, high) = match limit.sense {
        Sense::AtMost => (None, Some(post)),
        Sense::AtLeast => (Some(post), None),
    };
    let at_most = limit.sense == Sense::AtMost;
    let distance = show::room(Amount { number: room.number.abs(), ..room });
    let (value_shown, limit_shown) = show::apart(value, limit.amount);
    let says = format!(
        "{name}: {}, {} {}, {distance} {}.",
        value_shown,
        if at_most { "at most" } else { "at least" },
        limit_shown,
        match (room.number < 0.0, at_most) {
            (false, _) => "left",
            (true, true) => "over",
            (true, false) => "under",
        },
    );
    Some(Bar {
        ruler: Ruler { low, high, covered: Some((From::Start, value.number)), marks: Vec::new() },
        verdict: check.verdict,
        room: Some(distance),
        says,
    })
}
