//! A field that takes one of a short list.

use crate::derived::{derived, dynamic, memo, when};
use engine::field::{Field, Takes};
use engine::typed::Refusal;
use leptos::prelude::*;

use super::{Parts, Said, StandIn, Stands, State};
use crate::pads::Edit;
use crate::tools::Tool;

/// How the choices are laid out.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Shape {
    /// A list that opens.
    #[default]
    List,
    /// Side by side: for two or three short ones.
    Pick,
}

/// A field that takes one of a short list.
#[component]
pub fn ChoiceField(
    /// The tool it stands in.
    tool: Tool,
    /// The input.
    field: Field,
    /// The word above it, where it is shorter than the field's name. Contained in that name.
    #[prop(optional)]
    label: Option<&'static str>,
    /// How the choices are laid out.
    #[prop(optional)]
    shape: Shape,
    /// What it is a choice of, where a page has the same one twice. Goes before its name.
    #[prop(optional)]
    of: Option<&'static str>,
    /// What stands in while nothing is chosen: the key of a choice.
    #[prop(into, optional)]
    assumed: Signal<Option<StandIn>>,
    /// What waits for it, while nothing is chosen.
    #[prop(into, optional)]
    asks: Signal<Option<String>>,
    /// What else is said under it.
    #[prop(into, optional)]
    note: Signal<Option<String>>,
) -> impl IntoView {
    let choices = match field.takes() {
        Takes::Choice(choices) => choices,
        Takes::Number { .. } | Takes::Whole { .. } | Takes::List { .. } => &[],
    };
    let known = move |text: &str| choices.iter().any(|(key, _)| *key == text);
    let parts = Parts::new((tool, field), Said { assumed, asks, note }, move |typed| {
        if typed.text.is_empty() || known(&typed.text) {
            Ok(None)
        } else {
            Err(Refusal::NotANumber { text: typed.text.clone() })
        }
    });
    let stand_in = memo(move || {
        assumed.with(|stand_in| match stand_in.as_ref()?.stands {
            Stands::Choice(key) => Some(key),
            Stands::Amount(_) | Stands::Depends => None,
        })
    });
    let choose = move |key: String| parts.draft.edit(Edit::Type(parts.place, key));
    match shape {
        Shape::List => {
            list(parts, super::full_name(of, field), label.unwrap_or(field.name()), choices, stand_in, choose)
                .into_any()
        }
        Shape::Pick => {
            pick(parts, super::full_name(of, field), label.unwrap_or(field.name()), choices, stand_in, choose)
                .into_any()
        }
    }
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
) -> impl IntoView {
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
        <div class=derived(move || format!("{}{}", parts.class(), if wide { " wide" } else { "" }))>
            {parts.head(label)}
            <div class="field-box">
                <select
                    id=parts.id()
                    aria-label=name
                    aria-describedby=derived(move || parts.described_by())
                    aria-invalid=derived(move || parts.invalid())
                    prop:value=derived(text)
                    on:change=move |event| choose(event_target_value(&event))
                >
                    <option value="" selected=derived(move || text().is_empty())>{none}</option>
                    {choices
                        .iter()
                        .map(|(key, words)| {
                            view! { <option value=*key selected=derived(move || text() == *key)>{*words}</option> }.into_any()
                        })
                        .collect_view()}
                    {dynamic(move || strange().map(|text| view! { <option value=text.clone() selected=derived(|| true)>{text.clone()}</option> }.into_any()).into_any())}
                </select>
            </div>
            {parts.foot()}
        </div>
    }
}

fn pick(
    parts: Parts,
    name: String,
    label: &'static str,
    choices: Choices,
    stand_in: Memo<Option<&'static str>>,
    choose: impl Fn(String) + Copy + 'static,
) -> impl IntoView {
    let text = move || parts.typed.with(|typed| typed.text.clone());
    view! {
        <div class=move || format!("{} wide", parts.class())>
            <div class="label">
                <span>{label}</span>
                {when(move || parts.state.get() == State::Assumed, move || view! { <span class="tag">"assumed"</span> }.into_any())}
            </div>
            <div
                class="pick"
                id=parts.id()
                role="radiogroup"
                aria-label=name
                aria-describedby=derived(move || parts.described_by())
            >
                {choices
                    .iter()
                    .map(|(key, words)| {
                        let stands_in = move || {
                            (text().is_empty() && stand_in.get() == Some(*key)).then_some("")
                        };
                        view! {
                            <label data-assumed=stands_in>
                                <input
                                    type="radio"
                                    name=format!("{}-pick", parts.id())
                                    prop:checked=derived(move || text() == *key)
                                    on:change=move |_| choose((*key).to_owned())
                                />
                                {*words}
                            </label>
                        }.into_any()
                    })
                    .collect_view()}
            </div>
            {parts.foot()}
        </div>
    }
}
