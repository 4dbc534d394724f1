//! A field that takes a number with a unit.

use crate::derived::{derived, when};
use engine::field::{Field, Takes};
use engine::show;
use engine::unit::Dimension;
use leptos::prelude::*;

use super::units::{UnitChip, UnitList, unit};
use super::{Parts, Said, StandIn};
use crate::pads::Edit;
use crate::tools::Tool;

/// A field that takes a number with a unit.
#[component]
pub fn NumberField(
    /// The tool it stands in.
    tool: Tool,
    /// The input.
    field: Field,
    /// The word above it, where it is shorter than the field's name. Contained in that name.
    #[prop(optional)]
    label: Option<&'static str>,
    /// What it is a figure of, where a page has the same input twice. Goes before its name.
    #[prop(optional)]
    of: Option<&'static str>,
    /// What stands in while it is blank.
    #[prop(into, optional)]
    assumed: Signal<Option<StandIn>>,
    /// What waits for it, while it is blank.
    #[prop(into, optional)]
    asks: Signal<Option<String>>,
    /// What else is said under it.
    #[prop(into, optional)]
    note: Signal<Option<String>>,
) -> impl IntoView {
    let said = Said { assumed, asks, note };
    let parts = Parts::new((tool, field), said, move |typed| field.read(&typed.text, typed.unit));
    let open = RwSignal::new(false);
    let usual = match field.takes() {
        Takes::Number { unit, .. } => unit,
        Takes::Whole { .. } | Takes::Choice(_) | Takes::List { .. } => engine::unit::Unit::One,
    };
    let stand_in = move || parts.stand_in(said, unit(parts, usual)).map(|number| show::number(number, 6));
    view! {
        <div class=move || parts.class()>
            {parts.head(label.unwrap_or(field.name()))}
            <div class="field-box">
                <input
                    id=parts.id()
                    type="text"
                    aria-label=super::full_name(of, field)
                    inputmode=keypad(field)
                    autocomplete="off"
                    autocapitalize="off"
                    spellcheck="false"
                    placeholder=derived(stand_in)
                    aria-describedby=derived(move || parts.described_by())
                    aria-invalid=derived(move || parts.invalid())
                    prop:value=derived(move || parts.typed.with(|typed| typed.text.clone()))
                    on:input=move |event| {
                        parts.patience.begin();
                        parts.draft.edit(Edit::Type(parts.place, event_target_value(&event)));
                    }
                    on:blur=move |_| {
                        parts.patience.end();
                        parts.draft.leave();
                    }
                />
                <UnitChip parts=parts usual=usual open=open/>
            </div>
            {parts.foot()}
            {when(move || open.get(), move || view! { <UnitList parts=parts usual=usual open=open/> }.into_any())}
        </div>
    }
}

/// Some phones' decimal keypads have no minus and no slash: where one can be typed, the whole keyboard comes up.
fn keypad(field: Field) -> &'static str {
    match field.takes() {
        Takes::Number { least, .. } if least < 0.0 => "text",
        Takes::Number { unit, .. } if unit.dimension() == Dimension::ConductorSize => "text",
        Takes::Number { .. } => "decimal",
        Takes::Whole { .. } => "numeric",
        Takes::Choice(_) | Takes::List { .. } => "text",
    }
}
