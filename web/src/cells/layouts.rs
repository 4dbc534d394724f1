//! Every layout of the cells at hand, ranked; those that are refused, with the reason.

use engine::bank::{Ask, Layout, layouts};
use engine::field::Field;
use engine::quantity::Count;
use leptos::prelude::*;

use super::TOOL;
use super::answer::{energy, missing, window_bar};
use crate::draft::use_draft;
use crate::pads::{Edit, Typed};
use crate::span_bar::slim_bar;
use crate::tool_page::section;
use crate::verdict::VerdictMark;

/// How many are shown of each.
const SHOWN: usize = 5;

/// The layouts, once cells and bus are known.
pub fn layout_list(ask: ReadSignal<Ask>) -> AnyView {
    section(
        "Layouts",
        "best first",
        move || ask.with(|ask| ask.count.typed().is_some() && missing(ask).is_empty()),
        move || {
            ask.with(|ask| {
                let found = layouts(ask);
                let ranked = found.ranked.iter().take(SHOWN).map(|layout| row(layout, ask, false));
                let refused = found.rejected.iter().take(SHOWN).map(|layout| row(layout, ask, true));
                let rows: Vec<AnyView> = ranked.chain(refused).collect();
                let none = found
                    .ranked
                    .is_empty()
                    .then(|| view! { <p class="ranked-say">"None holds. See why below."</p> }.into_any());
                view! { {none}<ol class="ranked plain">{rows}</ol> }.into_any()
            })
        },
    )
}

fn row(layout: &Layout, ask: &Ask, refused: bool) -> AnyView {
    let draft = use_draft();
    let (series, strings) = (layout.series, layout.strings);
    let is =
        |entry: engine::entry::Entry<Count>, count: u32| entry.typed().is_some_and(|one| one.get() == f64::from(count));
    let now = is(ask.series, series) && (is(ask.strings, strings) || ask.strings.typed().is_none());
    let verdict = layout.verdict();
    let take = move |_| {
        let typed = |count: u32| Typed { text: count.to_string(), unit: None };
        draft.edit(Edit::Fill(vec![
            ((TOOL, Field::CellsInSeries), typed(series)),
            ((TOOL, Field::StringsOfCells), typed(strings)),
        ]));
    };
    let button = (!now && !refused).then(|| {
        view! {
            <button
                class="btn small take"
                type="button"
                aria-label=format!("Take {series} in series, {strings} strings")
                on:click=take
            >
                "Take this"
            </button>
        }
        .into_any()
    });
    view! {
        <li class:is-now=now class:refused=refused data-v=verdict.word()>
            <span class="name">{shape(layout)}</span>
            <VerdictMark verdict=verdict/>
            <p class="why">{why(layout, now)}</p>
            {slim_bar(window_bar(layout))}
            {button}
        </li>
    }
    .into_any()
}

fn shape(layout: &Layout) -> String {
    match layout.strings {
        1 => format!("{} in series", layout.series),
        strings => format!("{} in series × {strings}", layout.series),
    }
}

fn why(layout: &Layout, now: bool) -> String {
    let mut parts = Vec::new();
    if now {
        parts.push("As entered now.".to_owned());
    }
    match layout.left_over {
        0 => parts.push("Every cell used.".to_owned()),
        1 => parts.push("One left over.".to_owned()),
        left => parts.push(format!("{left} left over.")),
    }
    parts.extend(energy(layout).map(|energy| format!("{energy}.")));
    parts.push(format!("{}.", layout.reason().trim_end_matches('.')));
    parts.join(" ")
}
