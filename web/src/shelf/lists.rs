//! The shelf in words: what could not be had, links to cut, lugs, and every link in the order to fit.

use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Amount, Quantity, SquareMillimetres};
use engine::shelf::{Layout, Proof, steps};
use engine::show;
use engine::unit::Unit;
use leptos::prelude::*;

use crate::cells::TOOL;
use crate::derived::{derived, dynamic, memo};
use crate::draft::use_draft;
use crate::fold::Fold;
use crate::tool_page::figures;

/// What could not be had, where barriers belong, and how good the layout is.
pub fn remarks(layout: &Layout) -> AnyView {
    let mut lines: Vec<String> = layout.remarks.iter().map(ToString::to_string).collect();
    lines.extend(layout.last_link_reason.clone());
    if let Some(barrier) = layout.barriers.first() {
        lines.push(format!(
            "Put a barrier between cells {} and {}: {} between posts one tool can bridge{}.",
            barrier.one,
            barrier.other,
            show::computed(barrier.volts.amount()),
            if layout.barriers.len() > 1 { ", and between the others listed below" } else { "" }
        ));
    }
    lines.push(
        match layout.proof {
            Proof::Least => "No layout with links between neighbours needs less.",
            Proof::Found => "The best that was found; a better one may exist.",
        }
        .to_owned(),
    );
    let lines: Vec<AnyView> = lines.into_iter().map(|line| view! { <li>{line}</li> }.into_any()).collect();
    view! { <ul class="notes">{lines}</ul> }.into_any()
}

/// Links to cut, lugs, barriers, and the order of fitting in words.
pub fn lists(layout: &Layout) -> AnyView {
    let draft = use_draft();
    // Told only where the size changes: what else is typed must not make the lists, or the step beside them, anew.
    let size = memo(move || {
        let typed = draft.with(|pads| pads.of(TOOL).entry::<SquareMillimetres>(Field::LinkSize).typed());
        typed.map_or_else(String::new, |size| format!(" of {}", show::given(size.amount())))
    });
    let layout = StoredValue::new(layout.clone());
    let order: Vec<AnyView> = layout
        .with_value(steps)
        .into_iter()
        .map(|step| {
            let now = step.now;
            let reads = format!(
                "{} Then black on minus of cell {}, red on plus of cell {}: {} to {}.",
                step.what,
                now.black.cell,
                now.red.cell,
                show::computed(now.lowest.amount()),
                show::computed(now.highest.amount())
            );
            view! { <li value=step.link.to_string()>{reads}</li> }.into_any()
        })
        .collect();
    view! {
        <Fold id="cells/links" title="Links to cut" says=derived(|| "by length, and lugs to pack".to_owned())>
            {dynamic(move || figures(layout.with_value(|layout| packing(layout, &size.get()))))}
        </Fold>
        <details class="in-words">
            <summary>"Every link in words"</summary>
            <ol class="order">{order}</ol>
        </details>
    }
    .into_any()
}

/// Links by length, lugs and barriers.
fn packing(layout: &Layout, size: &str) -> Vec<(String, String)> {
    let millimetres = |metres: engine::quantity::Metres| {
        show::computed(Amount { number: metres.get() * 1000.0, unit: Unit::Millimetre })
    };
    let cuts = layout.cuts.iter().map(|cut| {
        let name = format!("{} links{size}", cut.links.len());
        (name, format!("cut {}, holes {} apart", millimetres(cut.cut), millimetres(cut.hole_to_hole)))
    });
    let lugs = layout.links.len() * 2 + layout.ends.len() * 2;
    let lugs = (format!("Lugs{size}"), format!("{lugs}: two a link, one a take-off post"));
    let barriers = layout
        .barriers
        .iter()
        .map(|one| (format!("Barrier between {} and {}", one.one, one.other), show::computed(one.volts.amount())));
    cuts.chain([lugs]).chain(barriers).collect()
}
