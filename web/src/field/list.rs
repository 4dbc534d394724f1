//! A field that takes several numbers, typed or pasted.

use crate::derived::{dynamic, memo};
use crate::piece::{IntoPiece, Piece, view};
use engine::field::Field;
use leptos::prelude::*;

use super::{Parts, Said};
use crate::pads::Edit;
use crate::tools::Tool;

/// A field that takes several numbers, one after the other. What is not understood is named by its place.
pub fn list_field(tool: Tool, field: Field, label: &'static str) -> Piece {
    let none = || memo(|| None);
    let wrong = memo(move || {
        let text = crate::draft::use_draft().typed((tool, field)).get().text;
        field.readings(&text).err().map(|(place, why)| format!("Number {place}: {why}"))
    });
    let said = Said { assumed: memo(|| None), asks: none(), note: wrong };
    let parts = Parts::new((tool, field), said, |_| Ok(None));
    view! {
        <div class="field wide" class:wrong=move || wrong.get().is_some()>
            {parts.head(label)}
            <div class="field-box">
                <textarea
                    id=parts.id()
                    rows="3"
                    aria-label=field.name()
                    autocomplete="off"
                    spellcheck="false"
                    aria-describedby=move || parts.described_by()
                    prop:value=move || parts.typed.with(|typed| typed.text.clone())
                    on:input=move |event| parts.draft.edit(Edit::Type(parts.place, event_target_value(&event)))
                    on:blur=move |_| parts.draft.leave()
                ></textarea>
            </div>
            {dynamic(move || wrong.get().map(|words| view! { <p class="field-note" id=format!("{}-note", parts.id())>{words}</p> }).piece())}
        </div>
    }
}
