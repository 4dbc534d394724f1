//! The unit chip: the unit that counts, and the plain list of the others.

use crate::piece::{Piece, view};
use engine::unit::Unit;
use leptos::ev::{FocusEvent, KeyboardEvent};
use leptos::prelude::*;
use wasm_bindgen::JsCast;

use super::Parts;
use crate::pads::Edit;

/// The unit that counts in a field: the one typed behind the number, else the one chosen, else the usual one.
pub fn unit(parts: Parts, usual: Unit) -> Unit {
    let typed = parts.reading.with(|reading| reading.as_ref().ok().and_then(|reading| Some(reading.as_ref()?.unit())));
    typed.or_else(|| parts.typed.with(|typed| typed.unit)).unwrap_or(usual)
}

/// The chip at the right of the box. A button only where there is another unit.
pub fn unit_chip(parts: Parts, usual: Unit, open: RwSignal<bool>) -> Piece {
    let symbol = move || unit(parts, usual).symbol();
    if parts.field().units().len() < 2 {
        return view! { <span class="unit fixed">{symbol}</span> };
    }
    view! {
        <button
            class="unit"
            type="button"
            id=format!("{}-unit", parts.id())
            aria-label=move || format!("{}, unit {}. Change unit", parts.field().name(), symbol())
            aria-expanded=move || open.get().to_string()
            on:click=move |_| open.update(|open| *open = !*open)
        >
            {symbol}
        </button>
    }
}

/// The list that the chip opens. Escape, a choice, or going elsewhere closes it.
pub fn unit_list(parts: Parts, usual: Unit, open: RwSignal<bool>) -> Piece {
    let close = move || {
        open.set(false);
        super::focus(&format!("{}-unit", parts.id()));
    };
    let choose = move |chosen: Unit| {
        parts.draft.edit(Edit::Unit(parts.place, chosen));
        close();
    };
    let on_key = move |event: KeyboardEvent| match event.key().as_str() {
        "Escape" => {
            event.stop_propagation();
            close();
        }
        "ArrowDown" | "ArrowRight" => {
            event.prevent_default();
            step(&event, true);
        }
        "ArrowUp" | "ArrowLeft" => {
            event.prevent_default();
            step(&event, false);
        }
        _ => {}
    };
    // Only where the focus goes to something else: on some phones a tap on a button moves it to nothing.
    let on_leave = move |event: FocusEvent| {
        let inside = event.current_target().and_then(|list| list.dyn_into::<web_sys::Node>().ok());
        let to = event.related_target().and_then(|to| to.dyn_into::<web_sys::Node>().ok());
        if let (Some(list), Some(to)) = (inside, to)
            && !list.contains(Some(&to))
            && to.dyn_ref::<web_sys::Element>().is_none_or(|to| to.id() != format!("{}-unit", parts.id()))
        {
            open.set(false);
        }
    };
    let chosen = move |other: Unit| (unit(parts, usual) == other).to_string();
    view! {
        <div
            class="units"
            role="group"
            aria-label=format!("Units of {}", parts.field().name())
            on:keydown=on_key
            on:focusout=on_leave
        >
            {parts
                .field()
                .units()
                .into_iter()
                .map(|other| {
                    view! {
                        <button type="button" aria-pressed=move || chosen(other) on:click=move |_| choose(other)>
                            {other.symbol()}
                        </button>
                    }
                })
                .collect::<Vec<Piece>>()}
        </div>
    }
}

/// Moves the focus to the next or the former unit of the list.
fn step(event: &KeyboardEvent, forward: bool) {
    let at = event.target().and_then(|at| at.dyn_into::<web_sys::Element>().ok());
    let next = at.and_then(|at| if forward { at.next_element_sibling() } else { at.previous_element_sibling() });
    if let Some(next) = next.and_then(|next| next.dyn_into::<web_sys::HtmlElement>().ok()) {
        // At either end there is no next one.
        let _ = next.focus();
    }
}
