//! The Settings tool: the card to key into controllers and inverter.

use std::sync::Arc;

use crate::derived::memo;
use crate::piece::{Piece, view};
use engine::bank::{
    Ask, Layout, Requirement, Setting, Settings, counts_lack, settings, settings_working, settled as with_counts,
};
use engine::check::{Cost, FieldSet, Verdict};
use engine::field::Field;
use engine::show;

use crate::answer::{Answer, besides};
use crate::cells::{assumed, bank, empty_bar, in_series, short, stands_in, window_bar};
use crate::form::{Form, Hints, names, waits};
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
        Field::BusVoltage,
        Field::ColdestInTheRoom,
        Field::CellsInSeries,
        Field::StringsOfCells,
    ],
    groups: &[(
        "By its maker",
        &[
            Field::CellsInABlock,
            Field::CellEnd,
            Field::CellAbsorb,
            Field::CellFloat,
            Field::CellEqualise,
            Field::CellCompensation,
            Field::ChargeCap,
            Field::DepthUsed,
            Field::WarmestInTheRoom,
            Field::PackChargeLimit,
            Field::InverterLow,
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
pub fn settings_tool() -> Piece {
    let ask = bank();
    let answer = memo(move || ask.with(|ask| Some(answer(ask))));
    let rested = settled(ask);
    let hints = Hints {
        stands_in: stands_in(ask),
        waits: Arc::new(move |field| waits(field, ask.with(counts_lack), std::iter::empty::<FieldSet>())),
        note: Arc::new(|_| None),
    };
    let card = section(
        "The card",
        "key in, then read back",
        move || rested.with(|ask| settings(ask).is_some()),
        move || rested.with(|ask| settings(ask).map(|card| lines(&card))).unwrap_or_else(|| Piece::Nothing),
    );
    tool_page(ToolPage {
        form: &FORM,
        answer,
        working: Box::new(move || ask.with(settings_working)),
        hints,
        before: Vec::new(),
        // Below the inputs: it comes while the last of them is typed, and must not push that away.
        after: vec![card],
        cautions: CAUTIONS,
    })
}

fn answer(ask: &Ask) -> Answer {
    let card = settings(ask);
    let layout = Layout::of(&with_counts(ask)).filter(|_| card.is_some());
    let absorb = card.as_ref().and_then(|card| card.line("Absorb")).and_then(|line| line.amount);
    let shown = absorb.map(show::computed);
    let verdict = match &card {
        None => Verdict::Asks,
        Some(card) if card.assumed.is_empty() => Verdict::Clears,
        Some(_) => Verdict::Close,
    };
    Answer {
        of: layout.as_ref().map_or_else(
            || "Absorb voltage at 25 °C".to_owned(),
            |layout| format!("Absorb voltage at 25 °C: {}", in_series(layout)),
        ),
        number: shown.map_or_else(|| show::NONE.to_owned(), |shown| crate::answer::without_unit(&shown).to_owned()),
        unit: "V".into(),
        verdict,
        cost: Cost::Loss,
        says: card.as_ref().map_or_else(|| format!("Waits for {}.", names(counts_lack(ask))), says),
        most: None,
        rests: card
            .filter(|card| !card.assumed.is_empty())
            .map(|card| format!("Assumed until its data sheet says otherwise: {}.", assumed(card.assumed))),
        besides: layout.as_ref().and_then(|layout| besides(&layout.checks, None, Requirement::name)),
        bar: Some(layout.as_ref().map_or_else(empty_bar, window_bar)),
        second: None,
        offer: None,
    }
}

/// The lines that are keyed in first: "Float 57.0 V. Equalise off. Cut-off 53.9 V."
fn says(card: &Settings) -> String {
    let one = |name: &str| {
        let line = card.line(name)?;
        let figure = line.amount.map_or_else(|| "off".to_owned(), show::computed);
        Some(format!("{name} {figure}."))
    };
    let lines: Vec<String> = ["Float", "Equalise", "Cut-off"].into_iter().filter_map(one).collect();
    lines.join(" ")
}

fn lines(card: &Settings) -> Piece {
    let rows: Vec<Piece> = card.lines.iter().map(line).collect();
    view! { <ol class="card">{rows}</ol> }
}

fn line(line: &Setting) -> Piece {
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
            <p class="why">{line.note}</p>
            <p class="why src">{cited(line.source)}</p>
        </li>
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::plain;
    use engine::entry::Entry;

    /// Sixteen cells of LiFePO4 for 48 V.
    fn sixteen() -> Ask {
        Ask {
            chemistry: Entry::Typed(engine::chemistry::Chemistry::Lfp),
            cell_voltage: Entry::of(3.2),
            series: Entry::of(16.0),
            ..Ask::default()
        }
    }

    /// Common practice: 3.5 V a cell; lithium is never equalised, nor compensated.
    #[test]
    fn sixteen_lithium_cells_absorb_at_56_volts_and_are_never_equalised() {
        let answer = answer(&sixteen());
        assert_eq!((answer.number.as_str(), answer.verdict), ("56.0", Verdict::Close));
        assert_eq!(plain(&answer.of), "Absorb voltage at 25 °C: 16 in series");
        assert!(plain(&answer.says).starts_with("Float 53.6 V. Equalise off. Cut-off "), "{}", answer.says);
        let card = settings(&sixteen()).expect("a card");
        assert_eq!(card.line("Compensation").expect("a line").amount, None);
    }

    #[test]
    fn no_card_is_made_for_a_count_that_nobody_chose() {
        let waits = |ask: &Ask| answer(ask).says;
        assert_eq!(waits(&Ask::default()), "Waits for Chemistry, Cell voltage, Number of cells and Bus voltage.");
        let no_bus = Ask { series: Entry::Blank, count: Entry::of(16.0), ..sixteen() };
        assert_eq!(waits(&no_bus), "Waits for Bus voltage.");
        assert_eq!(answer(&no_bus).verdict, Verdict::Asks);
    }
}
