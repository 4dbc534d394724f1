//! A field that takes a whole number, with minus and plus.

use std::time::Duration;

use crate::piece::{Piece, view};
use engine::field::Takes;
use engine::unit::Unit;
use leptos::prelude::*;

use super::{FieldOf, Parts};
use crate::pads::Edit;

/// How long a step button is held before it repeats, and how fast it does. Chosen by hand.
const HOLD: Duration = Duration::from_millis(400);
const REPEAT: Duration = Duration::from_millis(90);

/// A field that takes a whole number. Holding minus or plus repeats.
pub fn count_field(of: FieldOf) -> Piece {
    let FieldOf { tool, field, said, .. } = of;
    let parts = Parts::new((tool, field), said, move |typed| field.read(&typed.text, typed.unit));
    let (least, most) = match field.takes() {
        Takes::Whole { least, most } => (f64::from(least), f64::from(most)),
        Takes::Number { least, most, .. } => (least, most),
        Takes::Choice(_) | Takes::List { .. } => (0.0, 0.0),
    };
    let stand_in = move || parts.stand_in(said, Unit::One);
    // From the number that stands there, else from the one that stands in, else to the least.
    let stepped = move |by: f64| {
        let now =
            parts.reading.with(|reading| reading.as_ref().ok().copied().flatten()).map(|reading| reading.number());
        let now = now.or_else(stand_in);
        now.map_or(least, |now| (now + by).clamp(least, most))
    };
    let step = move |by: f64| {
        let text = untrack(|| stepped(by)).to_string();
        if parts.typed.with_untracked(|typed| typed.text != text) {
            parts.draft.edit(Edit::Type(parts.place, text));
        }
    };
    view! {
        <div class=move || parts.class()>
            {parts.head(of.label())}
            <div class="field-box count">
                {step_button(format!("{}: one fewer", of.name()), "−", Callback::new(move |()| step(-1.0)))}
                <input
                    id=parts.id()
                    type="text"
                    aria-label=of.name()
                    inputmode="numeric"
                    autocomplete="off"
                    placeholder=move || stand_in().map(|number| number.to_string())
                    aria-describedby=move || parts.described_by()
                    aria-invalid=move || parts.invalid()
                    prop:value=move || parts.typed.with(|typed| typed.text.clone())
                    on:input=move |event| {
                        parts.patience.begin();
                        parts.draft.edit(Edit::Type(parts.place, event_target_value(&event)));
                    }
                    on:keydown=move |event| {
                        let by = match event.key().as_str() {
                            "ArrowUp" => 1.0,
                            "ArrowDown" => -1.0,
                            _ => return,
                        };
                        event.prevent_default();
                        step(by);
                    }
                    on:blur=move |_| {
                        parts.patience.end();
                        parts.draft.leave();
                    }
                />
                {step_button(format!("{}: one more", of.name()), "+", Callback::new(move |()| step(1.0)))}
            </div>
            {parts.foot()}
        </div>
    }
}

/// Minus or plus. A press steps once when it is let go; held, it repeats until it is.
fn step_button(name: String, sign: &'static str, step: Callback<()>) -> Piece {
    let pressed = StoredValue::new(0_u32);
    let repeated = StoredValue::new(false);
    // A press is told from the one before by its number, so that a timer of an earlier one does nothing.
    let let_go = move || pressed.update_value(|press| *press += 1);
    on_cleanup(let_go);
    view! {
        <button
            class="step"
            type="button"
            aria-label=name
            on:pointerdown=move |_| {
                let_go();
                repeated.set_value(false);
                repeat(pressed, pressed.get_value(), repeated, step, HOLD);
            }
            on:pointerup=move |_| let_go()
            on:pointerleave=move |_| let_go()
            on:pointercancel=move |_| let_go()
            on:contextmenu=move |event| event.prevent_default()
            on:click=move |_| {
                let_go();
                let held = repeated.get_value();
                repeated.set_value(false);
                if !held {
                    step.run(());
                }
            }
        >
            {sign}
        </button>
    }
}

fn repeat(pressed: StoredValue<u32>, press: u32, repeated: StoredValue<bool>, step: Callback<()>, after: Duration) {
    set_timeout(
        move || {
            if pressed.try_get_value() == Some(press) {
                repeated.set_value(true);
                step.run(());
                repeat(pressed, press, repeated, step, REPEAT);
            }
        },
        after,
    );
}
