//! Notices: above the bottom bar, with what can be done about them. Never over a field in use.

use crate::derived::when;
use crate::piece::{IntoPiece, Piece, view};
use leptos::prelude::*;

/// A notice: what is the matter, in a sentence, and whether it is up; then, where something can be done about it, the word on
/// the button and what it does.
pub fn notice(says: &'static str, up: RwSignal<bool>, act: Option<(&'static str, fn())>) -> Piece {
    when(move || up.get(), move || shown(says, act, move || up.set(false)))
}

/// What is told while there is something to tell.
pub fn telling(told: RwSignal<String>) -> Piece {
    when(move || told.with(|told| !told.is_empty()), move || shown(told, None, move || told.set(String::new())))
}

fn shown(says: impl IntoPiece, act: Option<(&'static str, fn())>, away: impl Fn() + 'static) -> Piece {
    let close = if act.is_some() { "Later" } else { "Close" };
    view! {
        <div class="notice">
            <p>{says}</p>
            <div class="notice-acts">
                <button type="button" class="quiet" on:click=move |_| away()>{close}</button>
                {act.map(|(word, act)| view! { <button type="button" on:click=move |_| act()>{word}</button> })}
            </div>
        </div>
    }
}
