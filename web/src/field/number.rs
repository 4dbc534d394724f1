//! A field that takes a number with a unit.

use crate::derived::when;
use crate::piece::{Piece, view};
use engine::field::{Field, Takes};
use engine::show;
use engine::unit::Dimension;
use leptos::prelude::*;

use super::units::{unit, unit_chip, unit_list};
use super::{FieldOf, Parts};
use crate::pads::Edit;

/// A field that takes a number with a unit.
pub fn number_field(of: FieldOf) -> Piece {
    let FieldOf { tool, field, said, .. } = of;
    let parts = Parts::new((tool, field), said, move |typed| field.read(&typed.text, typed.unit));
    let open = RwSignal::new(false);
    let usual = match field.takes() {
        Takes::Number { unit, .. } => unit,
        Takes::Whole { .. } | Takes::Choice(_) | Takes::List { .. } => engine::unit::Unit::One,
    };
    let stand_in = move || parts.stand_in(said, unit(parts, usual)).map(|number| show::number(number, 6));
    view! {
        <div class=move || parts.class()>
            {parts.head(of.label())}
            <div class="field-box">
                <input
                    id=parts.id()
                    type="text"
                    aria-label=of.name()
                    inputmode=keypad(field)
                    autocomplete="off"
                    autocapitalize="off"
                    spellcheck="false"
                    placeholder=stand_in
                    aria-describedby=move || parts.described_by()
                    aria-invalid=move || parts.invalid()
                    prop:value=move || parts.typed.with(|typed| typed.text.clone())
                    on:input=move |event| {
                        parts.patience.begin();
                        parts.draft.edit(Edit::Type(parts.place, event_target_value(&event)));
                    }
                    on:blur=move |_| {
                        parts.patience.end();
                        parts.draft.leave();
                    }
                />
                {unit_chip(parts, usual, open)}
            </div>
            {parts.foot()}
            {when(move || open.get(), move || unit_list(parts, usual, open))}
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
