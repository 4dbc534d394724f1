//! Cells at rest: what a meter reads, what charge that is, and which cells stand apart.

use std::sync::Arc;

use crate::derived::{Memo, dynamic, memo};
use crate::piece::{Piece, view};
use engine::bank::{Ask, AtRest, RESTED_AT, at_rest};
use engine::chemistry::Family;
use engine::entry::Entry;
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Celsius, Quantity, Volts};
use engine::show;

use super::{FORM, TOOL};
use crate::draft::use_draft;
use crate::field::{StandIn, Stands};
use crate::fold::fold;
use crate::form::{Hints, fields_of};
use crate::tool_page::figures;
use crate::working::cited;

/// What is read off the meter.
const FIELDS: [Field; 2] = [Field::RestVoltages, Field::BankTemperature];

/// Voltages read on cells that have rested, and what they tell.
pub fn reading(ask: Memo<Ask>) -> Piece {
    let stands_in = |field| {
        (field == Field::BankTemperature).then(|| StandIn {
            stands: Stands::Amount(RESTED_AT.amount()),
            why: "a mild room: a cold lead cell reads high for its charge".to_owned(),
            source: String::new(),
        })
    };
    let hints = Hints { stands_in: Arc::new(stands_in), waits: Arc::new(|_| None), note: Arc::new(|_| None) };
    view! {
        {fold("cells/rest", "Cells at rest", memo(|| "charge, and the odd ones".to_owned()), move || view! {             <div class="fields">{fields_of(&FORM, &FIELDS, &hints)}</div>
            {dynamic(move || {
                let told = use_draft().with(|pads| ask.with(|ask| told(&pads.of(TOOL), ask)));
                match told {
                    Ok(rows) => figures(rows),
                    Err(words) => view! { <p class="ranked-say">{words}</p> },
                }
            })}
         })}
    }
}

/// Names and figures, or what there is to do first.
fn told(pad: &impl Pad, ask: &Ask) -> Result<Vec<(String, String)>, String> {
    let volts: Vec<Volts> = Field::RestVoltages
        .list(pad.typed(Field::RestVoltages).0)
        .map_err(|(place, _)| format!("Waits for the {place}. of the voltages."))?;
    if volts.is_empty() {
        return Err("Rest them an hour or more, then type each one’s volts, in order.".to_owned());
    }
    let at: Celsius = match pad.entry(Field::BankTemperature) {
        Entry::Typed(at) => at,
        Entry::Blank => RESTED_AT,
        Entry::Unread => return Err(format!("Waits for {}.", Field::BankTemperature.name())),
    };
    let found = at_rest(ask, &volts, at)
        .ok_or_else(|| format!("Waits for {} and {}.", Field::Chemistry.name(), Field::CellVoltage.name()))?;
    let mut rows = vec![("Middle, a cell".to_owned(), show::computed(found.each.amount()))];
    rows.push(("Charge".to_owned(), charge(&found)));
    for one in &found.odd {
        let side = if one.off.get() < 0.0 { "under" } else { "over" };
        let off = show::computed(one.off.abs().amount());
        let figure = format!("{}, {off} {side} the middle", show::computed(one.reading.amount()));
        rows.push((format!("Stands apart: number {}", one.number), figure));
    }
    if found.odd.is_empty() {
        let words = if volts.len() < 4 { "four or more tell" } else { "none" };
        rows.push(("Stands apart".to_owned(), words.to_owned()));
    }
    if ask.chemistry.typed().is_some_and(|chemistry| chemistry.family() == Family::Lead) {
        rows.push(("Read at".to_owned(), show::given(at.amount())));
    }
    rows.push(("By".to_owned(), cited(found.charge.source)));
    Ok(rows)
}

/// The band, never a bare figure; where it leaves most of the scale open, that is said.
fn charge(found: &AtRest) -> String {
    let band = found.charge;
    let percent = |percent: engine::quantity::Percent| show::number(percent.get(), 0);
    let open = format!("{} to {} %", percent(band.least), percent(band.most));
    if band.open().get() > 50.0 {
        return format!("{open}: at rest this chemistry tells next to nothing");
    }
    format!("{open}, likeliest {} %", percent(band.likely))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::Rows;

    fn of_rows(rows: &[(Field, &str)]) -> Result<Vec<(String, String)>, String> {
        told(&Rows(rows), &Ask::read(&Rows(rows)))
    }

    /// Figures by their names, with plain spaces.
    fn figure(rows: &[(String, String)], name: &str) -> String {
        let found = rows.iter().find(|(one, _)| one == name).map(|(_, figure)| figure.clone());
        found.unwrap_or_else(|| panic!("no {name} in {rows:?}")).replace(show::NARROW, " ")
    }

    const BLOCKS: &[(Field, &str)] = &[
        (Field::Chemistry, "vented-lead"),
        (Field::CellVoltage, "12"),
        (Field::BankTemperature, "26.7"),
        (Field::RestVoltages, "12.24 12.25 12.23 12.24"),
    ];

    #[test]
    fn blocks_tell_their_charge_with_a_band() {
        let rows = of_rows(BLOCKS).expect("figures");
        assert_eq!(figure(&rows, "Middle, a cell"), "2.04 V");
        let charge = figure(&rows, "Charge");
        assert!(charge.ends_with("likeliest 50 %") && charge.contains(" to "), "{charge}");
        assert_eq!(figure(&rows, "Read at"), "26.7 °C");
    }

    #[test]
    fn the_odd_cell_is_named_and_a_flat_curve_admits_it() {
        let rows = [
            (Field::Chemistry, "nickel-iron"),
            (Field::CellVoltage, "1.2"),
            (Field::RestVoltages, "1.29 1.291 1.15 1.29 1.289 1.29"),
        ];
        let rows = of_rows(&rows).expect("figures");
        assert!(figure(&rows, "Stands apart: number 3").ends_with("under the middle"));
        let charge = figure(&rows, "Charge");
        assert!(charge.contains("tells next to nothing"), "{charge}");
    }

    #[test]
    fn what_cannot_be_read_is_waited_for() {
        let with = |field, text| of_rows(&[BLOCKS, &[(field, text)]].concat()).unwrap_err();
        assert_eq!(with(Field::RestVoltages, "12.24 12.2.5"), "Waits for the 2. of the voltages.");
        assert_eq!(with(Field::BankTemperature, "warm"), "Waits for Bank temperature.");
        assert_eq!(with(Field::Chemistry, ""), "Waits for Chemistry and Cell voltage.");
    }
}
