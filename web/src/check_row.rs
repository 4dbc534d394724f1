//! A check in a list: verdict, value, limit and margin, a slim bar, and the working behind a fold.

use crate::piece::{Piece, view};
use engine::check::{Check, Sense, Step, Verdict};
use engine::field::Field;
use engine::quantity::Quantity;
use engine::show;
use leptos::prelude::*;

use crate::answer::rests_on;
use crate::fold::Folds;
use crate::span_bar::geometry::{From, Post, Ruler};
use crate::span_bar::{Bar, slim_bar};
use crate::verdict::{cost_mark, tells_cost, verdict_mark};

/// A check in a list. Read within whatever renders the list: it is drawn anew at each change, in place.
///
/// `id` is what it is remembered by when unfolded; `working` is made only when it is; `note` is what else there is to
/// say, shown at once where the check waits for something; `on_ask` leads to a field that is missing.
pub fn check_row<Id>(
    id: String,
    name: &'static str,
    check: &Check<Id>,
    note: Option<String>,
    working: impl FnOnce() -> Vec<Step>,
    on_ask: Callback<Field>,
) -> Piece {
    let folds = expect_context::<Folds>();
    let open = folds.is_open(&id);
    let verdict = check.verdict;
    let figures = match asks_for(check) {
        Some(asks) => view! { <span class="asks-for">{asks}</span> },
        None if check.is_count() => Piece::Nothing,
        None => {
            let (value, limit) = apart(check);
            let margin = check.margin.map_or_else(|| show::NONE.to_owned(), |margin| show::room(margin.amount()));
            view! {
                <span class="figs">
                    <span><small>"value"</small>" "<b>{value}</b></span>
                    <span><small>"limit"</small>" "<b>{limit}</b></span>
                    <span><small>"margin"</small>" "<b>{margin}</b></span>
                </span>
            }
        }
    };
    let note = note.filter(|_| open || verdict == Verdict::Asks).map(|note| view! { <p class="note">{note}</p> });
    let body = open.then(|| {
        let assumed = rests_on(check.assumed).map(|assumed| view! { <p class="note">{assumed}</p> });
        view! {
            <div class="check-body">
                {missing(check.asks, on_ask)}
                {assumed}
                {crate::working::list(working())}
            </div>
        }
    });
    let slim = bar(name, check).map(slim_bar);
    view! {
        <li class="check" data-open=open.then_some("") data-v=verdict.word()>
            <button class="check-head" type="button" aria-expanded=open.to_string() on:click=move |_| folds.turn(&id)>
                <span class="name">{name}</span>
                <span class="tags">
                    {verdict_mark(verdict, false)}
                    {tells_cost(verdict).then(|| view! { {cost_mark(check.cost)} })}
                </span>
                {figures}
                {slim}
            </button>
            {note}
            {body}
        </li>
    }
}

/// "asks: Voc, Record low", where it asks.
pub fn asks_for<Id>(check: &Check<Id>) -> Option<String> {
    let names = || check.asks.iter().map(Field::name).collect::<Vec<_>>().join(", ");
    (check.verdict == Verdict::Asks).then(|| format!("asks: {}", names()))
}

/// A button for each field that is missing.
fn missing(fields: engine::check::FieldSet, on_ask: Callback<Field>) -> Option<Piece> {
    (!fields.is_empty()).then(|| {
        let buttons = fields.iter().map(|field| {
            view! {
                <button class="btn small" type="button" on:click=move |_| on_ask.run(field)>
                    {format!("Enter {}", field.name())}
                </button>
            }
        });
        view! { <div class="btns">{buttons.collect::<Vec<Piece>>()}</div> }
    })
}

/// A check's value and limit, with so many digits that they differ where the values do.
pub fn apart<Id>(check: &Check<Id>) -> (String, String) {
    match (check.value, check.limit) {
        (Some(value), Some(limit)) => show::apart(value, limit.amount),
        (value, limit) => {
            let none = || show::NONE.to_owned();
            (value.map_or_else(none, show::computed), limit.map_or_else(none, |limit| show::given(limit.amount)))
        }
    }
}

/// "18.5 V, at most 16 V"; nothing where the check asks.
pub fn against<Id>(check: &Check<Id>) -> String {
    check.value.zip(check.limit).map_or_else(String::new, |(value, limit)| {
        let (value, bound) = show::apart(value, limit.amount);
        let side = if limit.sense == Sense::AtMost { "at most" } else { "needs" };
        format!("{value}, {side} {bound}")
    })
}

/// The slim bar of a check; none where it asks, or only counts.
pub fn bar<Id>(name: &str, check: &Check<Id>) -> Option<Bar> {
    if check.is_count() {
        return None;
    }
    let (value, limit, room) = (check.value?, check.limit?, check.room()?);
    let (shown, limit_shown) = apart(check);
    let at_most = limit.sense == Sense::AtMost;
    let distance = check.distance().map(show::room).unwrap_or_default();
    let (bound, side) = match (at_most, room.number < 0.0) {
        (true, false) => ("at most", "left"),
        (true, true) => ("at most", "over"),
        (false, false) => ("at least", "left"),
        (false, true) => ("at least", "under"),
    };
    let says = format!("{name}: {shown}, {bound} {limit_shown}, {distance} {side}.");
    let post = Post {
        at: limit.amount.number,
        reserve: limit.amount.number.abs() * check.reserve.get() / 100.0,
        name: String::new(),
        shown: limit_shown,
    };
    let (low, high) = if at_most { (None, Some(post)) } else { (Some(post), None) };
    Some(Bar {
        ruler: Ruler { low, high, covered: Some((From::Start, value.number)), marks: Vec::new() },
        verdict: check.verdict,
        room: Some(distance),
        says,
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use engine::check::{Basis, Cost, FieldSet, Limit, Outcome, judge};
    use engine::quantity::{Percent, Volts};

    fn check(value: f64, limit: Limit) -> Check<()> {
        let outcome = Outcome::Held { value: Volts::new(value).amount(), limit };
        judge((), Cost::Hazard, Percent::new(2.0), outcome, &Basis::default()).unwrap()
    }

    fn says(check: &Check<()>) -> String {
        bar("Cold volts", check).unwrap().says.replace(show::NARROW, " ")
    }

    #[test]
    fn the_bar_says_what_it_shows() {
        let high = Limit::at_most(Volts::new(150.0));
        assert_eq!(says(&check(170.26, high)), "Cold volts: 170.3 V, at most 150 V, 20.3 V over.");
        assert_eq!(says(&check(140.0, high)), "Cold volts: 140.0 V, at most 150 V, 10.00 V left.");
        let low = Limit::at_least(Volts::new(61.0));
        assert_eq!(says(&check(35.49, low)), "Cold volts: 35.5 V, at least 61 V, 25.5 V under.");
    }

    #[test]
    fn where_it_asks_there_is_no_bar_but_the_fields_that_are_missing() {
        let mut basis = Basis::default();
        basis.ask(engine::field::Field::RecordLow);
        basis.ask(engine::field::Field::Voc);
        let asks = judge((), Cost::Hazard, Percent::new(2.0), Outcome::Asks, &basis).unwrap();
        assert_eq!(bar("Cold volts", &asks), None);
        assert_eq!(asks_for(&asks).as_deref(), Some("asks: Voc, Record low"));
        assert_eq!(asks.assumed, FieldSet::default());
    }
}
