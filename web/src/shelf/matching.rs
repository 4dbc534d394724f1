//! Measured cells dealt to groups that differ least.

use engine::bank::settled;
use engine::field::Field;
use engine::matching::deal;
use engine::pad::Pad;
use engine::quantity::{AmpHours, Quantity};
use engine::show;
use leptos::prelude::*;

use crate::cells::{TOOL, bank};
use crate::derived::{derived, dynamic};
use crate::draft::use_draft;
use crate::field::list_field;
use crate::fold::Fold;
use crate::tool_page::figures;

/// Matching, folded until somebody has measured.
pub fn matching() -> AnyView {
    view! {
        <Fold id="cells/matching" title="Match measured cells" says=derived(|| "salvaged ones, dealt to groups".to_owned())>
            <div class="fields">{list_field(TOOL, Field::Capacities, "Measured capacities")}</div>
            {dynamic(dealt)}
        </Fold>
    }
    .into_any()
}

fn dealt() -> AnyView {
    let draft = use_draft();
    let say = |words: String| view! { <p class="ranked-say">{words}</p> }.into_any();
    let list = draft.with(|pads| Field::Capacities.list::<AmpHours>(pads.of(TOOL).typed(Field::Capacities).0));
    let capacities = list.unwrap_or_default();
    if capacities.is_empty() {
        return say("Type or paste one capacity after the other, in the order of the cells.".to_owned());
    }
    let groups = settled(&bank().get()).series.typed().map_or(0, |series| {
        #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "the field takes 1 to 400")]
        let series = series.get() as usize;
        series
    });
    match deal(&capacities, groups) {
        Err(why) => say(format!("Not dealt: {why}.")),
        Ok(found) => {
            let mut rows = vec![
                ("Groups differ by".to_owned(), show::computed(found.spread.amount())),
                ("Dealt in the order listed".to_owned(), show::computed(found.naive_spread.amount())),
            ];
            rows.extend(found.groups.iter().enumerate().map(|(number, group)| {
                let cells: Vec<String> = group.cells.iter().map(|cell| (cell + 1).to_string()).collect();
                (
                    format!("Group {}", number + 1),
                    format!("cells {}: {}", cells.join(", "), show::computed(group.capacity.amount())),
                )
            }));
            if !found.spare.is_empty() {
                let spare: Vec<String> = found.spare.iter().map(|cell| (cell + 1).to_string()).collect();
                rows.push(("Left over, the least".to_owned(), format!("cells {}", spare.join(", "))));
            }
            figures(rows)
        }
    }
}
