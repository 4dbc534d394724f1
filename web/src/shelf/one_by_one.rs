//! One link at a time, big, for gloved hands: what to do, what the meter must read now, and what it did read.

use std::sync::Arc;

use crate::derived::{Memo, dynamic, when};
use crate::piece::{IntoPiece, Piece, view};
use engine::field::Field;
use engine::quantity::Volts;
use engine::shelf::judged;
use engine::typed::read;
use engine::unit::Unit;
use leptos::prelude::*;

use super::Laid;
use super::lists::{band, leads};
use crate::cells::TOOL;
use crate::draft::use_draft;
use crate::field::Patience;
use crate::pads::{Edit, Place, Typed};

/// All readings, a line for each link.
const READINGS: Place = (TOOL, Field::LinkReadings);

/// What takes the caret when a step comes up.
const HEAD: &str = "shelf-step";

/// The step-through; `at` is the step that is open.
pub fn one_by_one(laid: Arc<Laid>, at: RwSignal<Option<usize>>) -> Piece {
    let draft = use_draft();
    let count = laid.steps.len();
    let all = draft.typed(READINGS);
    dynamic(move || match at.get() {
        Some(place) if place < count => one(place, laid.clone(), at, all),
        _ if count == 0 => Piece::Nothing,
        _ => {
            let begin = move || {
                let blank = |place: &usize| all.with_untracked(|all| line(&all.text, *place).trim().is_empty());
                open(at, Some((0..count).find(blank).unwrap_or(0)));
            };
            let clear = move || draft.edit(Edit::Type(READINGS, String::new()));
            let any = move || all.with(|all| !all.text.is_empty());
            view! {
                <div class="btns">
                    {button("btn solid", "Fit them one by one".piece(), Box::new(begin))}
                    {when(any, move || button("btn", "Clear the readings".piece(), Box::new(clear)))}
                </div>
            }
        }
    })
}

/// Goes to a step, and brings it under the eyes.
fn open(at: RwSignal<Option<usize>>, place: Option<usize>) {
    at.set(place);
    request_animation_frame(|| crate::field::focus(HEAD));
}

/// A button. Boxed, as what listens is large.
fn button(class: &'static str, words: Piece, press: Box<dyn Fn()>) -> Piece {
    view! { <button class=class type="button" on:click=move |_| press()>{words}</button> }
}

fn one(place: usize, laid: Arc<Laid>, at: RwSignal<Option<usize>>, all: Memo<Typed>) -> Piece {
    let draft = use_draft();
    let step = &laid.steps[place];
    let count = laid.steps.len();
    let head = format!("Link {} of {count}", step.link);
    let name = head.clone();
    let mut lines: Vec<Piece> = Vec::new();
    if !step.cautions.is_empty() {
        let cautions: Vec<Piece> = step.cautions.iter().map(|one| view! { <p>{one.text()}</p> }).collect();
        lines.push(view! { <div class="caution" role="note"><b>"Caution"</b>{cautions}</div> });
    }
    let meters = step.before.iter().map(|meter| ("Before", meter)).chain([("Now", &step.now)]);
    lines.extend(meters.map(|(when, meter)| {
        let leads = format!("{when}: {} must read", leads(meter));
        view! { <p class="meter">{leads} " " <b>{band(meter)}</b></p> }
    }));
    let what = step.what.clone();
    let named = format!("Reading after link {}", step.link);

    // Half a reading is not scolded: on a pause, or on going on.
    let patience = Patience::new();
    let told = move || all.with(|all| tell(&laid, &all.text, place));
    let stops = {
        let told = told.clone();
        move || told().is_some_and(|told| told.off)
    };
    let said = dynamic(move || match told() {
        Some(told) if !told.off => view! { <p class="told">{told.words}</p> },
        Some(told) if patience.is_over() => view! { <p class="told off">{told.words}</p> },
        _ => Piece::Nothing,
    });
    let write = move |text: &str| {
        patience.begin();
        let before = all.with_untracked(|all| with_line(&all.text, place, text));
        draft.edit(Edit::Type(READINGS, before));
    };
    let turn = move || {
        let before = all.with_untracked(|all| line(&all.text, place).to_owned());
        let text = before.trim_start_matches(['-', '−']);
        write(&if text.len() == before.len() { format!("-{text}") } else { text.to_owned() });
    };
    // What stands on it changes, it does not: a press would be lost with it.
    let wrong = {
        let stops = stops.clone();
        move || patience.is_over() && stops()
    };
    let words = dynamic(move || {
        let words = match (wrong(), place + 1 == count) {
            (true, _) => "On all the same",
            (_, true) => "Done",
            _ => "Next",
        };
        words.piece()
    });
    let next = move || {
        if untrack(|| !patience.is_over() && stops()) {
            patience.end();
        } else {
            open(at, (place + 1 < count).then_some(place + 1));
        }
    };
    let back = move || open(at, place.checked_sub(1));
    let back = button("btn", if place == 0 { "Leave" } else { "Back" }.piece(), Box::new(back));
    let on = button("btn solid next", words, Box::new(next));
    view! {
        <section class="one" aria-label=name>
            <p class="one-n" id=HEAD tabindex="-1">{head}</p>
            <p class="one-what">{what}</p>
            {lines}
            <div class="one-read">
                "It reads"
                <input
                    type="text"
                    inputmode="decimal"
                    autocomplete="off"
                    aria-label=named
                    prop:value=move || all.with(|all| line(&all.text, place).to_owned())
                    on:input=move |event| write(&event_target_value(&event))
                    on:blur=move |_| draft.leave()
                />
                "V"
                {button("btn", "±".piece(), Box::new(turn))}
            </div>
            <div role="status">{said}</div>
            <div class="btns">{back}{on}</div>
        </section>
    }
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
    Some(Told { words: says.words().to_owned(), off: says.stops() })
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
