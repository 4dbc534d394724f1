//! Loads along one cable, as lights down a corridor: the volts at each.

use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Count, Quantity};
use engine::run::Ask;
use engine::run::branched::evenly;
use engine::show;
use leptos::prelude::*;

use crate::derived::{derived, dynamic};
use crate::draft::{Draft, use_draft};
use crate::field::CountField;
use crate::fold::Fold;
use crate::tool_page::figures;
use crate::tools::Tool;

/// Equal loads at equal distances along the run, folded away until somebody asks.
pub fn branch(ask: ReadSignal<Ask>) -> AnyView {
    let draft = use_draft();
    view! {
        <Fold id="run/branch" title="Lights along it" says=derived(|| "equal loads at equal distances".to_owned())>
            <div class="fields">
                <CountField tool=Tool::Run field=Field::LoadsAlong label="Loads"/>
            </div>
            {dynamic(move || told(draft, ask))}
        </Fold>
    }
    .into_any()
}

fn told(draft: Draft, ask: ReadSignal<Ask>) -> AnyView {
    let count = draft.with(|pads| pads.of(Tool::Run).entry::<Count>(Field::LoadsAlong).typed());
    let say = |words: &str| view! { <p class="ranked-say">{words.to_owned()}</p> }.into_any();
    let Some(count) = count else { return say("How many loads, the last at the run’s far end?") };
    // Within the field's range by its reading, so it fits.
    #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "the field takes 1 to 50")]
    let count = count.get() as u32;
    match ask.with(|ask| rows(ask, count)) {
        Some(rows) => figures(rows),
        None => say("Waits for the run’s current, voltage and length, or the cable cannot carry the loads."),
    }
}

/// Volts at each load.
fn rows(ask: &Ask, count: u32) -> Option<Vec<(String, String)>> {
    let (step, found) = evenly(ask, count)?;
    let row = |(place, one): (u32, &engine::run::branched::Place)| {
        let away = show::computed((step * f64::from(place)).amount());
        let figure = format!("{}, {} lost", show::computed(one.volts.amount()), show::computed(one.lost.amount()));
        (format!("Load {place}, {away} along"), figure)
    };
    Some((1..).zip(&found.places).map(row).collect())
}
