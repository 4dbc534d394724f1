//! Measured cells dealt to groups that differ least.

use crate::derived::{dynamic, memo};
use crate::piece::{Piece, view};
use engine::bank::settled;
use engine::field::Field;
use engine::matching::deal;
use engine::quantity::{AmpHours, Quantity};
use engine::show;

use crate::cells::{TOOL, bank};
use crate::draft::use_draft;
use crate::field::list_field;
use crate::fold::fold;
use crate::tool_page::figures;

/// Matching, folded until somebody has measured.
pub fn matching() -> Piece {
    let typed = use_draft().typed((TOOL, Field::Capacities));
    let ask = bank();
    // Only a change of the list or of the bank deals anew.
    let found = move || {
        let counts = ask.with(settled);
        let counts =
            [counts.series, counts.strings].map(|count| count.typed().map_or(1.0, engine::quantity::Count::get));
        typed.with(|typed| dealt(&typed.text, counts))
    };
    view! {
        {fold("cells/matching", "Match measured cells", memo(|| "salvaged ones, dealt to groups".to_owned()), move || view! {             <div class="fields">{list_field(TOOL, Field::Capacities, "Measured capacities")}</div>
            {dynamic(move || match found() {
                Ok(rows) => figures(rows),
                Err(words) => view! { <p class="ranked-say">{words}</p> },
            })}
         })}
    }
}

/// The groups of a bank of so many in series and side by side, or what there is to do first.
fn dealt(text: &str, [series, beside]: [f64; 2]) -> Result<Vec<(String, String)>, String> {
    let capacities: Vec<AmpHours> =
        Field::Capacities.list(text).map_err(|(place, _)| format!("Waits for number {place} of the capacities."))?;
    if capacities.is_empty() {
        return Err("Type or paste one capacity after the other, in the order of the cells.".to_owned());
    }
    #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "the field takes 1 to 400")]
    let (groups, needed) = (series as usize, (series * beside) as usize);
    let found = deal(&capacities, groups).map_err(|why| format!("Not dealt: {why}."))?;
    let amp_hours = |amp_hours: AmpHours| show::computed(amp_hours.amount());
    let numbers = |cells: &[usize]| {
        let words: Vec<String> = cells.iter().map(|cell| (cell + 1).to_string()).collect();
        words.join(", ")
    };
    let share = show::number(found.spread_of_mean().get(), 2);
    let mut rows = vec![
        ("Groups differ by".to_owned(), format!("{}, {share} %", amp_hours(found.spread))),
        ("Dealt in the order listed".to_owned(), amp_hours(found.naive_spread)),
        ("The bank holds its least group".to_owned(), amp_hours(found.least())),
    ];
    if capacities.len() != needed {
        rows.push(("Measured".to_owned(), format!("{}; the bank above takes {needed}", capacities.len())));
    }
    for (number, group) in (1..).zip(&found.groups) {
        let cells = if group.cells.len() == 1 { "cell" } else { "cells" };
        rows.push((
            format!("Group {number}"),
            format!("{cells} {}: {}", numbers(&group.cells), amp_hours(group.capacity)),
        ));
    }
    if !found.spare.is_empty() {
        rows.push(("Left over, the least".to_owned(), numbers(&found.spare)));
    }
    Ok(rows)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn plain(rows: &[(String, String)], name: &str) -> String {
        rows.iter()
            .find(|(one, _)| one == name)
            .map_or_else(String::new, |(_, figure)| figure.replace(show::NARROW, " "))
    }

    /// By hand: 100 + 70 and 90 + 80 are alike; in turn 100 + 80 and 90 + 70 differ by 20.
    #[test]
    fn the_spread_stands_beside_that_of_the_order_listed() {
        let rows = dealt("100 90; 80\n70 Ah", [2.0, 2.0]).unwrap();
        assert_eq!(plain(&rows, "Groups differ by"), "0.00 Ah, 0 %");
        assert_eq!(plain(&rows, "Dealt in the order listed"), "20.0 Ah");
        assert_eq!(plain(&rows, "Group 1"), "cells 1, 4: 170 Ah");
        assert_eq!(plain(&rows, "Measured"), "");
    }

    #[test]
    fn left_over_cells_and_a_wrong_count_are_told() {
        let rows = dealt("100 90 80 70 10", [2.0, 3.0]).unwrap();
        assert_eq!(plain(&rows, "Left over, the least"), "5");
        assert_eq!(plain(&rows, "Measured"), "5; the bank above takes 6");
    }

    #[test]
    fn what_cannot_be_read_is_waited_for_by_its_place() {
        assert_eq!(dealt("100 9.9.9 80", [2.0, 1.0]), Err("Waits for number 2 of the capacities.".to_owned()));
        assert!(dealt("100", [2.0, 1.0]).unwrap_err().starts_with("Not dealt"));
        assert!(dealt("  ", [2.0, 1.0]).unwrap_err().starts_with("Type or paste"));
    }
}
