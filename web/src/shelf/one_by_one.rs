//! One link at a time, big, for gloved hands: what to do, what the meter must read now, and what it did read.

use std::sync::Arc;
use std::time::Duration;

use engine::field::Field;
use engine::quantity::Volts;
use engine::shelf::{Says, judged};
use engine::typed::read;
use engine::unit::Unit;
use leptos::prelude::*;

use super::Laid;
use super::lists::{band, reads};
use crate::cells::TOOL;
use crate::derived::{derived, dynamic, memo, when};
use crate::draft::{Draft, use_draft};
use crate::pads::{Edit, PAUSE, Place};
use crate::settled::rested;

/// All readings, a line for each link.
const READINGS: Place = (TOOL, Field::LinkReadings);

/// What takes the caret when a step comes up.
const HEAD: &str = "shelf-step";

/// The step-through; `at` is the step that is open.
pub fn one_by_one(laid: Arc<Laid>, at: RwSignal<Option<usize>>) -> AnyView {
    let draft = use_draft();
    let count = laid.steps.len();
    if count == 0 {
        return ().into_any();
    }
    let typed = draft.typed(READINGS);
    let begin = move |_| {
        let first = typed.with_untracked(|typed| (0..count).find(|place| line(&typed.text, *place).trim().is_empty()));
        open(at, Some(first.unwrap_or(0)));
    };
    let clear = move |_| draft.edit(Edit::Type(READINGS, String::new()));
    let shown = dynamic(move || match at.get() {
        Some(place) if place < count => one(place, laid.clone(), at, draft),
        _ => ().into_any(),
    });
    view! {
        {when(move || at.get().is_none_or(|place| place >= count), move || view! {
            <div class="btns">
                <button class="btn solid" type="button" on:click=begin>"Fit them one by one"</button>
                {when(move || typed.with(|typed| !typed.text.is_empty()), move || view! {
                    <button class="btn" type="button" on:click=clear>"Clear the readings"</button>
                }.into_any())}
            </div>
        }.into_any())}
        {shown}
    }
    .into_any()
}

/// Goes to a step, and brings it under the eyes.
fn open(at: RwSignal<Option<usize>>, place: Option<usize>) {
    at.set(place);
    request_animation_frame(|| crate::field::focus(HEAD));
}

fn one(place: usize, laid: Arc<Laid>, at: RwSignal<Option<usize>>, draft: Draft) -> AnyView {
    let step = laid.steps[place].clone();
    let count = laid.steps.len();
    let cautions: Vec<AnyView> = step.cautions.iter().map(|one| view! { <p>{one.text()}</p> }.into_any()).collect();
    let cautions = (!cautions.is_empty())
        .then(|| view! { <div class="caution" role="note"><b>"Caution"</b>{cautions}</div> }.into_any());
    let before: Vec<AnyView> =
        step.before.iter().map(|meter| view! { <p class="meter">"Before: " {reads(meter)}</p> }.into_any()).collect();
    let now = step.now;
    let all = draft.typed(READINGS);
    let value = memo(move || all.with(|typed| line(&typed.text, place).to_owned()));
    let told = memo(move || all.with(|typed| tell(&laid, &typed.text, place)));
    // Half a reading is not scolded: on a pause, on leaving the field, or on going on.
    let calm = rested(value, Duration::from_millis(PAUSE as u64));
    let asked = RwSignal::new(false);
    let off = move || told.with(|told| told.as_ref().is_some_and(|told| told.off));
    let wrong = memo(move || off() && (asked.get() || calm.get() == value.get()));
    let told = dynamic(move || match told.get() {
        Some(told) if !told.off => view! { <p class="told">{told.words}</p> }.into_any(),
        Some(told) if wrong.get() => view! { <p class="told off">{told.words}</p> }.into_any(),
        _ => ().into_any(),
    });
    let write = move |text: &str| {
        asked.set(false);
        let before = draft.with_now(|pads| pads.typed(READINGS).text);
        draft.edit(Edit::Type(READINGS, with_line(&before, place, text)));
    };
    let sign = move |_| {
        let before = value.get_untracked();
        let text = before.trim_start_matches(['-', '−']);
        write(&if text.len() == before.len() { format!("-{text}") } else { text.to_owned() });
    };
    let next = move |_| {
        if off() && !wrong.get_untracked() {
            asked.set(true);
        } else {
            open(at, (place + 1 < count).then_some(place + 1));
        }
    };
    let on = derived(move || match (wrong.get(), place + 1 == count) {
        (true, _) => "On all the same",
        (_, true) => "Done",
        _ => "Next",
    });
    view! {
        <section class="one" aria-label=format!("Link {} of {count}", step.link)>
            <p class="one-n" id=HEAD tabindex="-1">{format!("Link {} of {count}", step.link)}</p>
            <p class="one-what">{step.what}</p>
            {cautions}
            {before}
            <p class="meter">"Now: " {reads(&now)}</p>
            <p class="one-band" aria-hidden="true">{band(&now)}</p>
            <label class="one-read">
                "It reads"
                <input
                    type="text"
                    inputmode="decimal"
                    autocomplete="off"
                    aria-label=format!("Reading after link {}", step.link)
                    prop:value=derived(move || value.get())
                    on:input=move |event| write(&event_target_value(&event))
                    on:blur=move |_| {
                        asked.set(true);
                        draft.leave();
                    }
                />
                "V"
                <button class="btn" type="button" aria-label="Below zero, or above" on:click=sign>"±"</button>
            </label>
            <div role="status">{told}</div>
            <div class="btns">
                <button class="btn" type="button" on:click=move |_| open(at, place.checked_sub(1))>
                    {if place == 0 { "Leave" } else { "Back" }}
                </button>
                <button class="btn solid next" type="button" on:click=next>{on}</button>
            </div>
        </section>
    }
    .into_any()
}

/// What is said to a reading.
#[derive(Clone, Debug, PartialEq)]
struct Told {
    words: String,
    off: bool,
}

/// What the line of link `place` says beside all `lines`; nothing where nothing was typed.
fn tell(laid: &Laid, lines: &str, place: usize) -> Option<Told> {
    let text = line(lines, place).trim();
    if text.is_empty() {
        return None;
    }
    let volts = |text: &str| read(text, Unit::Volt).ok().and_then(engine::typed::Reading::quantity::<Volts>);
    if volts(text).is_none() {
        let why = read(text, Unit::Volt).err().map_or_else(|| "Not volts.".to_owned(), |why| why.to_string());
        return Some(Told { words: why, off: true });
    }
    let readings: Vec<Option<Volts>> = (0..laid.steps.len()).map(|place| volts(line(lines, place))).collect();
    let says = judged(&laid.steps, place, &readings, laid.layout.cell)?;
    Some(Told { words: says.words().to_owned(), off: says != Says::AsItMust })
}

/// What stands on the line of a link: each has one of its own in the kept text.
fn line(all: &str, place: usize) -> &str {
    all.split('\n').nth(place).unwrap_or("")
}

/// `all` with its line `place` replaced.
fn with_line(all: &str, place: usize, text: &str) -> String {
    let mut lines: Vec<&str> = all.split('\n').collect();
    while lines.len() <= place {
        lines.push("");
    }
    lines[place] = text;
    lines.join("\n").trim_end_matches('\n').to_owned()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn each_link_keeps_a_line_of_its_own() {
        let two = with_line("", 1, "6.6");
        assert_eq!(two, "\n6.6");
        assert_eq!(with_line(&two, 0, "3.3"), "3.3\n6.6");
        assert_eq!(with_line("3.3\n6.6", 1, ""), "3.3");
        assert_eq!(line("3.3\n6.6", 1), "6.6");
        assert_eq!(line("3.3", 4), "");
    }
}
