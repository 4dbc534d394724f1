//! The Settings tool: the card to key into controllers and inverter.

use std::sync::Arc;

use engine::bank::{Ask, Setting, Settings, settings};
use engine::check::{Cost, Verdict};
use engine::field::Field;
use engine::show;
use leptos::prelude::*;

use crate::answer::Answer;
use crate::cells::{bank, short, stands_in};
use crate::derived::memo;
use crate::form::{Form, Hints, names};
use crate::settled::settled;
use crate::tool_page::{ToolPage, section, tool_page};
use crate::tools::Tool;
use crate::working::cited;

static FORM: Form = Form {
    tool: Tool::Settings,
    title: ("The bank", "the same as in Cells"),
    first: &[
        Field::Chemistry,
        Field::CellVoltage,
        Field::CellCapacity,
        Field::NumberOfCells,
        Field::CellsInSeries,
        Field::StringsOfCells,
        Field::ColdestInTheRoom,
        Field::InverterLow,
    ],
    groups: &[(
        "By its maker",
        &[
            Field::CellsInABlock,
            Field::BusVoltage,
            Field::CellEnd,
            Field::CellAbsorb,
            Field::CellFloat,
            Field::CellEqualise,
            Field::CellCompensation,
            Field::ChargeCap,
            Field::DepthUsed,
            Field::ChargeCurrent,
            Field::InverterHigh,
            Field::LoadsHigh,
            Field::LoadsLow,
        ],
    )],
    short,
};

const CAUTIONS: &[&str] = &[
    "The maker’s data sheet goes before every line of this card. A controller set for another chemistry boils lead cells dry, \
     or overcharges lithium until its protection opens.",
    "Lithium cells below freezing are not charged: set the cold cut-off, and see that the sensor sits on a cell.",
];

/// The Settings tool.
pub fn settings_tool() -> AnyView {
    let ask = bank();
    let answer = memo(move || ask.with(|ask| Some(answer(ask))));
    let rested = settled(ask);
    let hints = Hints { stands_in: stands_in(ask), waits: Arc::new(|_| None), note: Arc::new(|_| None) };
    let card = section(
        "The card",
        "key in, then read back",
        move || rested.with(|ask| settings(ask).is_some()),
        move || rested.with(|ask| settings(ask).map(|card| lines(&card))).unwrap_or_else(|| ().into_any()),
    );
    tool_page(ToolPage {
        form: &FORM,
        answer,
        working: Box::new(move || ask.with(|ask| engine::bank::working(ask, engine::bank::Requirement::WindowHigh))),
        hints,
        before: vec![card],
        after: Vec::new(),
        cautions: CAUTIONS,
    })
}

fn answer(ask: &Ask) -> Answer {
    let card = settings(ask);
    let absorb = card.as_ref().and_then(|card| card.line("Absorb")).and_then(|line| line.amount);
    let shown = absorb.map(show::computed);
    let verdict = match &card {
        None => Verdict::Asks,
        Some(card) if card.assumed.is_empty() => Verdict::Clears,
        Some(_) => Verdict::Close,
    };
    Answer {
        of: "Absorb voltage at 25 °C, and the whole card below".to_owned(),
        number: shown.map_or_else(|| show::NONE.to_owned(), |shown| crate::answer::without_unit(&shown).to_owned()),
        unit: "V",
        verdict,
        cost: Cost::Loss,
        says: match &card {
            None => format!("Waits for {}.", names(crate::cells::missing(ask))),
            Some(card) => format!("{} lines, by the chemistry’s usual figures and what you entered.", card.lines.len()),
        },
        most: None,
        rests: card
            .filter(|card| !card.assumed.is_empty())
            .map(|card| format!("Assumed until its data sheet says otherwise: {}.", names(card.assumed))),
        besides: None,
        bar: None,
        second: None,
        offer: None,
    }
}

fn lines(card: &Settings) -> AnyView {
    let rows: Vec<AnyView> = card.lines.iter().map(line).collect();
    view! { <ol class="card">{rows}</ol> }.into_any()
}

fn line(line: &Setting) -> AnyView {
    let figure = line.amount.map_or_else(|| "off".to_owned(), show::computed);
    let each = line.each.map(|each| format!("{} a cell", show::computed(each)));
    let range = line
        .range
        .map(|range| format!("makers: {} to {}", show::computed(range.least), show::computed(range.greatest)));
    let small: Vec<String> = [each, range].into_iter().flatten().collect();
    view! {
        <li>
            <span class="name">{line.name}</span>
            <b>{figure}</b>
            {(!small.is_empty()).then(|| view! { <span class="small">{small.join("; ")}</span> })}
            <p class="why">{line.note} " " <span class="src">{cited(line.source)}</span></p>
        </li>
    }
    .into_any()
}
