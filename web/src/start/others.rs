//! What would help where it does not start, and which other loads may run or start with it.

use crate::derived::{Memo, dynamic, memo, when};
use crate::piece::{Piece, view};
use engine::check::Verdict;
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::Quantity;
use engine::show;
use engine::start::{Ask, Help, Limits, Switched, Together, lowest_charge, switched, together, what_helps};

use super::TOOL;
use crate::draft::{Draft, use_draft};
use crate::fold::fold;
use crate::form::of_another;
use crate::tool_page::section;
use crate::tools::Tool;
use crate::verdict::verdict_mark;

/// Further loads, each in a pad of its own.
const OTHERS: [Tool; 13] = [
    Tool::SecondLoad,
    Tool::ThirdLoad,
    Tool::FourthLoad,
    Tool::FifthLoad,
    Tool::SixthLoad,
    Tool::SeventhLoad,
    Tool::EighthLoad,
    Tool::NinthLoad,
    Tool::TenthLoad,
    Tool::EleventhLoad,
    Tool::TwelfthLoad,
    Tool::ThirteenthLoad,
    Tool::FourteenthLoad,
];

/// What is asked of each.
const OF_A_LOAD: [Field; 6] = [
    Field::StartLoad,
    Field::RunningPower,
    Field::StartingMultiple,
    Field::CodeLetter,
    Field::MotorSize,
    Field::StartingPowerFactor,
];

/// Changes that were tried, where something breaks; and the lowest charge at which it still starts.
pub fn helps(ask: Memo<Ask>) -> Piece {
    let found = move || ask.with(what_helps);
    view! {
        {section(
            "What would help",
            "each by itself, computed",
            move || !found().is_empty(),
            move || {
                let rows: Vec<Piece> = found().iter().map(help).collect();
                view! { <ol class="ranked plain">{rows}</ol> }
            },
        )}
        {dynamic(move || ask.with(charge).map_or_else(|| Piece::Nothing, |words| view! { <p class="ranked-say">{words}</p> }))}
    }
}

fn help(help: &Help) -> Piece {
    let verdict = if help.enough { Verdict::Clears } else { Verdict::Breaks };
    let then: Vec<String> = help
        .then
        .iter()
        .map(|check| {
            let figures = check.value.zip(check.limit).map_or_else(String::new, |(value, limit)| {
                let (value, bound) = show::apart(value, limit.amount);
                format!(" ({value} against {bound})")
            });
            format!("{}: {}{figures}.", check.id.name(), check.verdict.word())
        })
        .collect();
    view! {
        <li data-v=verdict.word()>
            <span class="name wrap">{help.what}</span>
            {verdict_mark(verdict, false)}
            <p class="why">{then.join(" ")}</p>
        </li>
    }
}

fn charge(ask: &Ask) -> Option<String> {
    ask.bank.chemistry.typed()?;
    let drawn = engine::start::drawn(ask)?;
    Some(match lowest_charge(ask, drawn) {
        Some(charge) => format!("Still starts down to a charge of {}.", show::computed(charge.amount())),
        None => "Starts at no charge of this bank.".to_owned(),
    })
}

/// Other loads, and what may go together.
pub fn together_with(ask: Memo<Ask>) -> Piece {
    let draft = use_draft();
    view! {
        {fold("start/others", "Other loads", memo(|| "what may run or start together".to_owned()), move || view! {             {dynamic(move || ask.with(|ask| table(draft, ask)))}
            {forms(draft)}
         })}
    }
}

/// A form for each load that was entered, and one more.
fn forms(draft: Draft) -> Vec<Piece> {
    let wanted = memo(move || {
        let entered =
            |tool: &Tool| draft.with(|pads| OF_A_LOAD.iter().any(|field| !pads.typed((*tool, *field)).text.is_empty()));
        OTHERS.iter().rposition(entered).map_or(1, |last| last + 2)
    });
    OTHERS
        .into_iter()
        .enumerate()
        .map(|(place, other)| when(move || place < wanted.get(), move || of_another(other, &OF_A_LOAD, super::short)))
        .collect()
}

fn table(draft: Draft, ask: &Ask) -> Piece {
    let say = |words: &str| view! { <p class="ranked-say">{words.to_owned()}</p> };
    let mut names = Vec::new();
    let mut loads: Vec<Switched> = Vec::new();
    draft.with(|pads| {
        for tool in [TOOL].into_iter().chain(OTHERS) {
            let pad = pads.of(tool);
            if let Some(load) = switched(&Ask::read(&pad)) {
                let class = engine::choice::words(Field::StartLoad, pad.typed(Field::StartLoad).0);
                names.push(class.unwrap_or("load").to_owned());
                loads.push(load);
            }
        }
    });
    if loads.len() < 2 {
        return say("Enter a second load below to see what may go together.");
    }
    let Some(limits) = Limits::of(ask) else { return say("Waits for what the inverter and the bus are.") };
    let found = together(&loads, &limits);
    rows(&names, &found)
}

fn rows(names: &[String], found: &Together) -> Piece {
    let each: Vec<Piece> = found
        .loads
        .iter()
        .zip(names)
        .map(|(one, name)| {
            let yes = |is: bool| if is { "yes" } else { "no" };
            view! {
                <tr>
                    <th scope="row">{name.clone()}</th>
                    <td>{yes(one.alone)}</td>
                    <td>{yes(one.on_top)}</td>
                    <td>{show::computed(one.margin.amount())}</td>
                </tr>
            }
        })
        .collect();
    let set = |bits: &u32| {
        let members: Vec<&str> = names
            .iter()
            .enumerate()
            .filter(|(place, _)| bits & (1 << place) != 0)
            .map(|(_, name)| name.as_str())
            .collect();
        members.join(" + ")
    };
    let list = |title: &'static str, sets: Vec<String>| {
        let words = if sets.is_empty() { "none".to_owned() } else { sets.join("; ") };
        view! { <p class="ranked-say"><b>{title}</b> " " {words} "."</p> }
    };
    let never = found.never.iter().map(|(one, other)| format!("{} with {}", names[*one], names[*other])).collect();
    view! {
        <table class="together">
            <thead>
                <tr><th scope="col">"Load"</th><th scope="col">"Alone"</th><th scope="col">"On top"</th><th scope="col">"Margin"</th></tr>
            </thead>
            <tbody>{each}</tbody>
        </table>
        {list("May run together:", found.run.iter().map(set).collect())}
        {list("May start at one moment:", found.start.iter().map(set).collect())}
        {list("Never start at one moment:", never)}
    }
}
