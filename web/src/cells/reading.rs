//! Cells at rest: what a meter reads, what charge that is, and which cells stand apart.

use engine::bank::Ask;
use engine::chemistry::{charge_at_rest, odd_cells};
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Celsius, Quantity, Volts};
use engine::show;
use leptos::prelude::*;

use crate::derived::{derived, dynamic};
use crate::draft::use_draft;
use crate::field::list_field;
use crate::fold::Fold;
use crate::tool_page::figures;
use crate::tools::Tool;

/// Voltages read on cells that have rested, and what they tell.
pub fn reading(ask: ReadSignal<Ask>) -> AnyView {
    view! {
        <Fold id="cells/rest" title="Cells at rest" says=derived(|| "what the meter reads, and the odd ones".to_owned())>
            <div class="fields">{list_field(Tool::Cells, Field::RestVoltages, "Rest voltages")}</div>
            {dynamic(move || told(ask))}
        </Fold>
    }
    .into_any()
}

fn told(ask: ReadSignal<Ask>) -> AnyView {
    let say = |words: String| view! { <p class="ranked-say">{words}</p> }.into_any();
    let Some(chemistry) = ask.with(|ask| ask.chemistry.typed()) else { return say("Waits for Chemistry.".to_owned()) };
    let draft = use_draft();
    let list = draft.with(|pads| Field::RestVoltages.list(pads.of(Tool::Cells).typed(Field::RestVoltages).0));
    let volts: Vec<Volts> = list.unwrap_or_default();
    if volts.is_empty() {
        return say("Rest them an hour or more, then type each cell’s volts, in order.".to_owned());
    }
    let (sum, count) = volts.iter().fold((0.0, 0.0), |(sum, count), one| (sum + one.get(), count + 1.0));
    let mean = Volts::new(sum / count);
    let mut rows = vec![("Mean of a cell".to_owned(), show::computed(mean.amount()))];
    rows.push(("Charge".to_owned(), ask.with(|ask| charge(ask, chemistry, mean))));
    let odd = odd_cells(&volts).map(|found| found.odd).unwrap_or_default();
    for one in &odd {
        let off = show::computed(one.off.abs().amount());
        let side = if one.off.get() < 0.0 { "under" } else { "over" };
        let figure = format!("{}, {off} {side} the middle", show::computed(one.reading.amount()));
        rows.push((format!("Cell {}", one.number), figure));
    }
    if odd.is_empty() {
        let words = if volts.len() < 4 { "four or more tell" } else { "none" };
        rows.push(("Odd ones".to_owned(), words.to_owned()));
    }
    figures(rows)
}

/// A good hand meter on a cell. *Chosen*: 2 mV either way.
const METER: Volts = Volts::new(0.002);

fn charge(ask: &Ask, chemistry: engine::chemistry::Chemistry, mean: Volts) -> String {
    let room = ask.coldest.typed().unwrap_or(Celsius::new(25.0));
    let band = charge_at_rest(chemistry, mean, room, METER);
    let (least, most) = (show::computed(band.least.amount()), show::computed(band.most.amount()));
    if band.open().get() > 50.0 {
        return format!("{least} to {most}: at rest this chemistry tells next to nothing");
    }
    format!("{least} to {most}, likeliest {}", show::computed(band.likely.amount()))
}
