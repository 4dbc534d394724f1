//! Every layout of the cells at hand, ranked; those that are refused, nearest first, with the reason.

use crate::derived::{Memo, dynamic, memo};
use crate::piece::{Piece, view};
use engine::bank::{Ask, Layout, layouts};
use engine::check::Verdict;
use engine::field::Field;
use engine::quantity::{Count, Hours, Quantity};
use engine::show;

use super::TOOL;
use super::answer::{energy, in_series, window_bar};
use crate::check_row::against;
use crate::draft::use_draft;
use crate::fold::fold;
use crate::pads::{Edit, Typed};
use crate::span_bar::slim_bar;
use crate::tool_page::section;
use crate::verdict::{cost_mark, tells_cost, verdict_mark};

/// How many are shown of each; the rest lie in a fold.
const SHOWN: usize = 4;

/// The layouts, once cells and bus are known.
pub fn layout_list(ask: Memo<Ask>) -> Piece {
    section(
        "Layouts",
        "best first",
        move || ask.with(|ask| layouts(ask).with_series(1).is_some()),
        move || {
            let (first, others, none) = ask.with(|ask| {
                let found = layouts(ask);
                let ranked = found.ranked.iter().take(SHOWN).map(|layout| row(layout, ask, false));
                let refused = found.nearest(SHOWN).into_iter().map(|layout| row(layout, ask, true));
                let first: Vec<Piece> = ranked.chain(refused).collect();
                let others = (found.ranked.len() + found.rejected.len()).saturating_sub(first.len());
                (first, others, found.ranked.is_empty())
            });
            let none = none.then(|| view! { <p class="ranked-say">"None holds. See why below."</p> });
            let more = (others > 0).then(|| {
                view! {
                    {fold("cells/others", "The others", memo(move || format!("{others} more")), move || view! {                         {dynamic(move || ask.with(the_others))}
                     })}
                }
            });
            view! { {none}<ol class="ranked plain">{first}</ol>{more} }
        },
    )
}

fn the_others(ask: &Ask) -> Piece {
    let found = layouts(ask);
    let shown: Vec<u32> = found.nearest(SHOWN).iter().map(|layout| layout.series).collect();
    let ranked = found.ranked.iter().skip(SHOWN).map(|layout| row(layout, ask, false));
    let refused = found.rejected.iter().filter(|layout| !shown.contains(&layout.series));
    let rows: Vec<Piece> = ranked.chain(refused.map(|layout| row(layout, ask, true))).collect();
    view! { <ol class="ranked plain">{rows}</ol> }
}

fn row(layout: &Layout, ask: &Ask, refused: bool) -> Piece {
    let draft = use_draft();
    let (series, strings) = (layout.series, layout.strings);
    let is =
        |entry: engine::entry::Entry<Count>, count: u32| entry.typed().is_some_and(|one| one.get() == f64::from(count));
    let now = is(ask.series, series) && (is(ask.strings, strings) || ask.strings.typed().is_none());
    let verdict = layout.verdict();
    let cost = layout.worst().map(|check| check.cost).filter(|_| tells_cost(verdict));
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
    });
    view! {
        <li class:is-now=now class:refused=refused data-v=verdict.word()>
            <span class="name">{in_series(layout)}</span>
            <span class="tags">{verdict_mark(verdict, false)}{cost.map(|cost| view! { {cost_mark(cost)} })}</span>
            <p class="why">{why(layout, now)}</p>
            {slim_bar(window_bar(layout))}
            {button}
        </li>
    }
}

/// What it covers, what is left over, what it gives, how fast it is charged and drawn, and what stands against it.
fn why(layout: &Layout, now: bool) -> String {
    let mut parts = Vec::new();
    if now {
        parts.push("As entered now.".to_owned());
    }
    let window = &layout.window;
    parts.push(format!("{} to {}.", show::computed(window.lowest.amount()), show::computed(window.highest.amount())));
    match layout.left_over {
        0 => parts.push("Every cell used.".to_owned()),
        1 => parts.push("One left over.".to_owned()),
        left => parts.push(format!("{left} left over.")),
    }
    parts.extend(energy(layout).map(|energy| format!("{energy}.")));
    let rate = |over: Hours, what: &str| format!("{what} at C/{}.", show::number(over.get(), 1));
    parts.extend(layout.charged_over.map(|over| rate(over, "Charged")));
    parts.extend(layout.drawn_over.map(|over| rate(over, "Drawn")));
    // What refuses it first, then whatever else breaks.
    let refused = layout.refused_by().map(|check| check.id);
    let broken = layout.checks.iter().filter(|check| check.verdict == Verdict::Breaks && Some(check.id) != refused);
    let stands = layout.refused_by().into_iter().chain(broken);
    parts.extend(stands.map(|check| format!("{}: {}.", check.id.name(), against(check))));
    parts.join(" ")
}
