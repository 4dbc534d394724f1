//! A field that takes one of a short list.

use crate::derived::{Memo, dynamic, memo};
use crate::piece::{IntoPiece, Piece, view};
use engine::field::Takes;
use engine::typed::Refusal;
use leptos::prelude::*;

use super::{FieldOf, Parts, Stands, State};
use crate::pads::Edit;

/// A field that takes one of a short list.
pub fn choice_field(of: FieldOf) -> Piece {
    let FieldOf { tool, field, said, .. } = of;
    let choices = match field.takes() {
        Takes::Choice(choices) => choices,
        Takes::Number { .. } | Takes::Whole { .. } | Takes::List { .. } => &[],
    };
    let known = move |text: &str| choices.iter().any(|(key, _)| *key == text);
    let parts = Parts::new((tool, field), said, move |typed| {
        if typed.text.is_empty() || known(&typed.text) {
            Ok(None)
        } else {
            Err(Refusal::NotANumber { text: typed.text.clone() })
        }
    });
    let stand_in = memo(move || {
        said.assumed.with(|stand_in| match stand_in.as_ref()?.stands {
            Stands::Choice(key) => Some(key),
            Stands::Amount(_) | Stands::Depends => None,
        })
    });
    let choose = move |key: String| parts.draft.edit(Edit::Type(parts.place, key));
    list(parts, of.name(), of.label(), choices, stand_in, choose)
}

/// Words longer than this take the whole width of the form.
const LONG: usize = 13;

type Choices = &'static [(&'static str, &'static str)];

fn list(
    parts: Parts,
    name: String,
    label: &'static str,
    choices: Choices,
    stand_in: Memo<Option<&'static str>>,
    choose: impl Fn(String) + Copy + 'static,
) -> Piece {
    let text = move || parts.typed.with(|typed| typed.text.clone());
    // What no choice is chosen means: what stands in, by its words.
    let none = move || {
        let words = choices.iter().find(|(key, _)| Some(*key) == stand_in.get()).map(|choice| choice.1);
        words.unwrap_or(if parts.state.get() == State::Assumed { "as assumed" } else { "not chosen" })
    };
    // A choice of another release is shown as it is, and nothing is put in its place.
    let strange = move || Some(text()).filter(|text| parts.state.get() == State::Unread && !text.is_empty());
    // Half the width of a phone would cut the words short.
    let wide = choices.iter().any(|(_, words)| words.len() > LONG);
    view! {
        <div class=move || format!("{}{}", parts.class(), if wide { " wide" } else { "" })>
            {parts.head(label)}
            <div class="field-box">
                <select
                    id=parts.id()
                    aria-label=name
                    aria-describedby=move || parts.described_by()
                    aria-invalid=move || parts.invalid()
                    prop:value=text
                    on:change=move |event| choose(event_target_value(&event))
                >
                    <option value="" selected=move || text().is_empty()>{none}</option>
                    {choices
                        .iter()
                        .map(|(key, words)| {
                            view! { <option value=*key selected=move || text() == *key>{*words}</option> }
                        })
                        .collect::<Vec<Piece>>()}
                    {dynamic(move || strange().map(|text| view! { <option value=text.clone() selected=|| true>{text.clone()}</option> }).piece())}
                </select>
            </div>
            {parts.foot()}
        </div>
    }
}
