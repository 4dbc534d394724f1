//! The layouts of the modules at hand, ranked; what was rejected; and what single change would use them all.

use crate::derived::{Memo, dynamic, memo, when};
use crate::piece::{Piece, view};
use engine::check::Verdict;
use engine::controller::Controller;
use engine::field::Field;
use engine::quantity::Quantity;
use engine::show;
use engine::string::change::{Change, What, changes};
use engine::string::layouts::Group;
use engine::string::{Layout, Layouts, Rejected, layouts};

use super::TOOL;
use super::question::Question;
use crate::check_row::{against, bar};
use crate::draft::use_draft;
use crate::fold::fold;
use crate::pads::{Edit, Typed};
use crate::span_bar::slim_bar;
use crate::verdict::verdict_mark;

/// How many ranked layouts are shown.
const SHOWN: usize = 4;

/// The layouts of the modules at hand.
pub fn layout_list(question: Memo<Question>) -> Piece {
    let asked = memo(move || question.with(|question| question.modules.is_some()));
    when(move || asked.get(), move || laid(question))
}

fn laid(question: Memo<Question>) -> Piece {
    let found = memo(move || question.with(find));
    let modules = move || question.with(|question| question.modules.unwrap_or(0));
    let on = move || {
        question.with(|question| match question.controllers.len() {
            1 => "on this controller".to_owned(),
            count => format!("on {count} controllers"),
        })
    };
    view! {
        <section aria-label="Layouts">
            <h2 class="sub">{move || format!("Every layout of {} modules", modules())} <span>{on}</span></h2>
            {dynamic(move || {
                found
                    .with(|found| {
                        question
                            .with(|question| {
                                let rows = found
                                    .ranked
                                    .iter()
                                    .enumerate()
                                    .filter(|(place, layout)| !is_part_of_another(layout, &found.ranked[..*place]))
                                    .map(|(_, layout)| layout)
                                    .take(SHOWN)
                                    .map(|layout| ranked(layout, question))
                                    .chain(found.rejected.iter().take(SHOWN).map(|one| rejected(one, question)))
                                    .collect::<Vec<Piece>>();
                                view! {
                                    {words(found, question).map(|words| view! { <p class="ranked-say">{words}</p> })}
                                    <ol class="ranked">{rows}</ol>
                                }
                            })
                    })
            })}
            {when(move || found.with(wants_change), move || view! { {fold("string/change", "What would use them all", memo(|| "one change".to_owned()), move || view! {                     {dynamic(move || question.with(change_list))}
                 })} })}
        </section>
    }
}

fn find(question: &Question) -> Layouts {
    layouts(&question.ask, question.modules.unwrap_or(0), &question.controllers)
}

/// Whether a better layout is the same with more strings: one need not be told that fewer would hold as well.
fn is_part_of_another(layout: &Layout, better: &[Layout]) -> bool {
    let series =
        |layout: &Layout| layout.groups.iter().map(|group| (group.controller, group.series)).collect::<Vec<_>>();
    better.iter().any(|other| other.holds() && other.used > layout.used && series(other) == series(layout))
}

/// Whether the best that holds leaves modules over.
fn wants_change(found: &Layouts) -> bool {
    !found.ranked.iter().any(|layout| layout.left_over == 0 && layout.holds())
}

fn words(found: &Layouts, question: &Question) -> Option<String> {
    if !found.ranked.is_empty() {
        return None;
    }
    if engine::string::longest(&question.ask).is_none() {
        return Some("Waits for Voc, Record low and Input limit.".to_owned());
    }
    Some("None holds: even one module is refused. See why below.".to_owned())
}

fn ranked(layout: &Layout, question: &Question) -> Piece {
    let draft = use_draft();
    let now = is_now(layout, question);
    let verdict = layout.verdict();
    let slim = layout.worst.and_then(|check| bar(check.id.name(), &check));
    // Only a layout of one group can be typed into the two counts.
    let take = (layout.groups.len() == 1 && !now).then(|| layout.groups[0]).filter(|group| group.controller == 0);
    let put = move |group: Group| {
        let typed = |count: u32| Typed { text: count.to_string(), unit: None };
        draft.edit(Edit::Fill(vec![
            ((TOOL, Field::Series), typed(group.series)),
            ((TOOL, Field::Strings), typed(group.strings)),
        ]));
    };
    view! {
        <li class:is-now=now data-v=verdict.word()>
            {picture(&layout.groups, layout.left_over)}
            <span class="name">{shape(&layout.groups)}</span>
            {verdict_mark(verdict, false)}
            <p class="why">{why(layout, question, now)}</p>
            {slim.map(slim_bar)}
            {take.map(|group| {
                view! {
                    <button
                        class="btn small take"
                        type="button"
                        aria-label=format!("Take {} in series, {} strings", group.series, group.strings)
                        on:click=move |_| put(group)
                    >
                        "Take this"
                    </button>
                }
            })}
        </li>
    }
}

fn rejected(one: &Rejected, question: &Question) -> Piece {
    let several = question.controllers.len() > 1;
    let where_on = if several { format!(" on controller {}", one.group.controller + 1) } else { String::new() };
    let slim = bar(one.check.id.name(), &one.check);
    view! {
        <li class="refused" data-v=one.check.verdict.word()>
            {picture(&[one.group], 0)}
            <span class="name">{shape(&[one.group])}</span>
            {verdict_mark(one.check.verdict, false)}
            <p class="why">{format!("{}{where_on}: {}.", one.check.id.name(), against(&one.check))}</p>
            {slim.map(slim_bar)}
        </li>
    }
}

/// "2 × 4", and "2 × 4 and 1 × 3" over two controllers: modules in series × strings.
fn shape(groups: &[Group]) -> String {
    groups.iter().map(|group| format!("{} × {}", group.series, group.strings)).collect::<Vec<_>>().join(" and ")
}

fn why(layout: &Layout, question: &Question, now: bool) -> String {
    let mut parts = Vec::new();
    if now {
        parts.push("As entered now.".to_owned());
    }
    let kept = layout.kept.map(|watts| {
        let kilo = engine::quantity::Amount { number: watts.get() / 1000.0, unit: engine::unit::Unit::Kilowatt };
        format!(", {} after clipping", show::computed(kilo))
    });
    let left = match layout.left_over {
        0 => String::new(),
        1 => ", one left over".to_owned(),
        count => format!(", {count} left over"),
    };
    let modules = if layout.used == 1 { "module" } else { "modules" };
    parts.push(format!("{} {modules}{left}{}.", layout.used, kept.unwrap_or_default()));
    if let Some(check) = layout.worst.filter(|check| check.verdict != Verdict::Clears) {
        parts.push(format!("{}: {}.", check.id.name(), against(&check)));
    }
    if let Some(fuse) = layout.fuse {
        parts.push(format!("Fuse every string: {}.", show::given(fuse.amount())));
    }
    if question.controllers.len() > 1 && layout.groups.len() == 1 {
        parts.push(format!("Controller {} alone.", layout.groups[0].controller + 1));
    }
    parts.join(" ")
}

fn is_now(layout: &Layout, question: &Question) -> bool {
    let [group] = layout.groups.as_slice() else { return false };
    let strings = question.ask.strings.typed().map_or(1.0, engine::quantity::Count::get);
    group.controller == 0
        && question.ask.series.typed().is_some_and(|series| series.get() == f64::from(group.series))
        && strings == f64::from(group.strings)
}

fn change_list(question: &Question) -> Piece {
    let found = changes(&question.ask, question.modules.unwrap_or(0), &question.controllers);
    if found.is_empty() {
        return view! { <p class="ranked-say">"No single change that was tried does it."</p> };
    }
    let rows = found.iter().map(|change| change_row(change, &question.controllers)).collect::<Vec<Piece>>();
    view! { <ul class="changes">{rows}</ul> }
}

fn change_row(change: &Change, controllers: &[Controller]) -> Piece {
    let which = |index: usize| {
        if controllers.len() == 1 { "the controller".to_owned() } else { format!("controller {}", index + 1) }
    };
    let words = match change.what {
        What::OneMore { like } => {
            format!("One more controller like {}", which(like).trim_start_matches("the controller"))
        }
        What::InputLimit { controller, least } => {
            format!(
                "In place of {}, one with an input limit of at least {}",
                which(controller),
                show::computed(least.amount())
            )
        }
        What::PvCurrentLimit { controller, least } => format!(
            "In place of {}, one with a PV current limit of at least {}",
            which(controller),
            show::computed(least.amount())
        ),
        What::OutputCurrent { controller, least } => {
            format!("In place of {}, one that delivers at least {}", which(controller), show::given(least.amount()))
        }
    };
    let words = if words.ends_with("like ") { "One more controller like it".to_owned() } else { words };
    view! {
        <li>
            <b>{words}</b>
            <p>{format!("then {}: ", shape(&change.layout.groups))}{verdict_mark(change.layout.verdict(), false)}</p>
        </li>
    }
}

/// The modules as they would be wired: strings side by side, what is left over dashed.
fn picture(groups: &[Group], left_over: u32) -> Piece {
    const WIDE: f64 = 78.0;
    const HIGH: f64 = 50.0;
    let longest = groups.iter().map(|group| group.series).max().unwrap_or(1);
    let spare_columns = left_over.div_ceil(longest);
    let columns: u32 = groups.iter().map(|group| group.strings).sum::<u32>() + spare_columns;
    // More than this many cannot be told apart: the shape in words says it.
    if columns > 26 || longest > 12 {
        return view! { <svg class="pic" viewBox="0 0 78 50" aria-hidden="true"></svg> };
    }
    let step = (WIDE / f64::from(columns.max(1))).min(13.5);
    let row = (HIGH / f64::from(longest)).min(17.4);
    let (width, height) = ((step - 2.5).max(1.5), (row - 2.4).max(1.5));
    let left = (WIDE - step * f64::from(columns)) / 2.0 + 1.2;
    let top = (HIGH - row * f64::from(longest)) / 2.0 + 1.2;
    let mut rects = Vec::new();
    let mut column = 0_u32;
    let mut rect = |column: u32, place: u32, spare: bool| {
        rects.push(view! {
            <rect
                class:spare=spare
                x=format!("{:.1}", left + step * f64::from(column))
                y=format!("{:.1}", top + row * f64::from(place))
                width=format!("{width:.1}")
                height=format!("{height:.1}")
            ></rect>
        });
    };
    for group in groups {
        for _ in 0..group.strings {
            (0..group.series).for_each(|place| rect(column, place, false));
            column += 1;
        }
    }
    for spare in 0..left_over {
        rect(column + spare / longest, spare % longest, true);
    }
    view! { <svg class="pic" width="78" height="50" viewBox="0 0 78 50" aria-hidden="true">{rects}</svg> }
}
