//! One link at a time, big, for gloved hands: what to do, what the meter must read now, and what it did read.

use engine::field::Field;
use engine::quantity::{Quantity, Volts};
use engine::shelf::{CellVolts, Layout, Meter, Says, Step, says, steps};
use engine::show;
use engine::unit::Unit;
use leptos::prelude::*;

use crate::cells::TOOL;
use crate::derived::{derived, dynamic, when};
use crate::draft::{Draft, use_draft};
use crate::pads::Edit;

/// The step-through.
///
/// `at` is the step that is open; it outlives the layout, which is made anew with each figure of the shelf.
pub fn one_by_one(layout: &Layout, at: RwSignal<Option<usize>>) -> AnyView {
    let all = StoredValue::new(steps(layout));
    let count = layout.links.len();
    let cell = layout.cell;
    let draft = use_draft();
    let begin = move |_| at.set(Some(0));
    let shown = dynamic(move || {
        let step = at.get().and_then(|place| Some((place, all.with_value(|all| all.get(place).cloned())?)));
        step.map_or_else(|| ().into_any(), |(place, step)| one(place, count, step, cell, at, draft))
    });
    view! {
        {when(move || at.get().is_none(), move || view! {
            <div class="btns">
                <button class="btn solid" type="button" on:click=begin>"Fit them one by one"</button>
            </div>
        }.into_any())}
        {shown}
    }
    .into_any()
}

fn one(place: usize, count: usize, step: Step, cell: CellVolts, at: RwSignal<Option<usize>>, draft: Draft) -> AnyView {
    let cautions: Vec<AnyView> = step.cautions.iter().map(|one| view! { <p>{one.text()}</p> }.into_any()).collect();
    let cautions = (!cautions.is_empty())
        .then(|| view! { <div class="caution" role="note"><b>"Caution"</b>{cautions}</div> }.into_any());
    let before: Vec<AnyView> = step
        .before
        .iter()
        .map(|meter| view! { <p class="meter">"Before: " {leads(meter)} <b>{band(meter)}</b></p> }.into_any())
        .collect();
    let now = step.now;
    let told = dynamic(move || {
        let Some(read) = reading(draft, place) else { return ().into_any() };
        let found = says(&now, cell, read);
        let class = if found == Says::AsItMust { "told" } else { "told off" };
        view! { <p class=class role="status">{found.words()}</p> }.into_any()
    });
    let value = derived(move || line(draft, place));
    let last = place + 1 == count;
    view! {
        <section class="one" aria-label=format!("Link {} of {count}", place + 1)>
            <p class="one-n">{format!("Link {} of {count}", step.link)}</p>
            <p class="one-what">{step.what.clone()}</p>
            {cautions}
            {before}
            <p class="meter">"Now: " {leads(&now)} <b>{band(&now)}</b></p>
            <label class="one-read">
                "It reads"
                <input
                    type="text"
                    inputmode="decimal"
                    autocomplete="off"
                    aria-label=format!("Reading after link {}", step.link)
                    prop:value=value
                    on:input=move |event| write(draft, place, &event_target_value(&event))
                    on:blur=move |_| draft.leave()
                />
                "V"
            </label>
            {told}
            <div class="btns">
                <button
                    class="btn"
                    type="button"
                    on:click=move |_| at.set(place.checked_sub(1))
                >
                    {if place == 0 { "Leave" } else { "Back" }}
                </button>
                <button
                    class="btn solid next"
                    type="button"
                    on:click=move |_| at.set((!last).then_some(place + 1))
                >
                    {if last { "Done" } else { "Next" }}
                </button>
            </div>
        </section>
    }
    .into_any()
}

fn leads(meter: &Meter) -> String {
    format!(
        "black on {} of cell {}, red on {} of cell {}, must read ",
        meter.black.pole.word(),
        meter.black.cell,
        meter.red.pole.word(),
        meter.red.cell
    )
}

fn band(meter: &Meter) -> String {
    format!("{} to {}", show::computed(meter.lowest.amount()), show::computed(meter.highest.amount()))
}

/// What stands on the line of a link: each link has a line of its own in the kept text.
fn line(draft: Draft, place: usize) -> String {
    draft.typed((TOOL, Field::LinkReadings)).get().text.split('\n').nth(place).unwrap_or("").to_owned()
}

fn write(draft: Draft, place: usize, text: &str) {
    let before = draft.with_now(|pads| pads.typed((TOOL, Field::LinkReadings)).text);
    draft.edit(Edit::Type((TOOL, Field::LinkReadings), with_line(&before, place, text)));
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

fn reading(draft: Draft, place: usize) -> Option<Volts> {
    let text = line(draft, place);
    engine::typed::read(&text, Unit::Volt).ok()?.quantity()
}

#[cfg(test)]
mod tests {
    use super::with_line;

    #[test]
    fn each_link_keeps_a_line_of_its_own() {
        let two = with_line("", 1, "6.6");
        assert_eq!(two, "\n6.6");
        assert_eq!(with_line(&two, 0, "3.3"), "3.3\n6.6");
        assert_eq!(with_line("3.3\n6.6", 1, ""), "3.3");
    }
}
