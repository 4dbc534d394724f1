//! Loads along one cable, as lights down a corridor: the volts at each.

use crate::derived::{Memo, dynamic, memo, when};
use crate::piece::{Piece, view};
use engine::check::Verdict;
use engine::field::Field;
use engine::pad::Pad;
use engine::quantity::{Count, Metres, Quantity, Watts};
use engine::run::branched::{Along, AlongError, Draw, LoadAlong, along, evenly};
use engine::run::{Ask, Kind};
use engine::show;

use super::TOOL;
use crate::draft::use_draft;
use crate::field::{FieldOf, list_field};
use crate::fold::fold;
use crate::form::names;
use crate::tool_page::figures;
use crate::verdict::verdict_mark;

/// Loads along a run of direct current, folded away until somebody asks.
pub fn branch(ask: Memo<Ask>) -> Piece {
    let direct = move || ask.with(|ask| matches!(ask.kind.typed(), Some(Kind::DcBranch | Kind::DcFeeder)));
    when(direct, move || {
        view! {
            {fold("run/branch", "Lights along it", memo(|| "volts at each load".to_owned()), move || view! {                 <p class="ranked-say">
                    "Distances and watts, one for each load; or how many equal ones share the run’s current."
                </p>
                <div class="fields">
                    {list_field(TOOL, Field::LoadDistances, "Distances")}
                    {list_field(TOOL, Field::LoadWatts, "Watts")}
                    {FieldOf::new(TOOL, Field::LoadsAlong).called("Loads").shown()}
                </div>
                {told(ask)}
             })}
        }
    })
}

fn told(ask: Memo<Ask>) -> Piece {
    let draft = use_draft();
    dynamic(move || {
        let loads = ask.with(|ask| draft.with(|pads| loads(&pads.of(TOOL), ask)));
        let found = loads.and_then(|loads| ask.with(|ask| along(ask, &loads)).map_err(|why| lacks(&why)));
        match found {
            Ok(found) => {
                let (verdict, words) = ask.with(|ask| worst(ask, &found));
                view! {
                    <p class="fault">
                        {verdict_mark(verdict, false)}
                        <span>{words}</span>
                    </p>
                    {figures(rows(&found))}
                }
            }
            Err(words) => view! { <p class="ranked-say">{words}</p> },
        }
    })
}

/// The loads that were typed; else as many equal ones as were said, evenly along the run.
fn loads(pad: &impl Pad, ask: &Ask) -> Result<Vec<LoadAlong>, String> {
    let (distances, watts) = (pad.typed(Field::LoadDistances).0, pad.typed(Field::LoadWatts).0);
    let unread = |field: Field| format!("Waits for {}.", field.name());
    let distances: Vec<Metres> = Field::LoadDistances.list(distances).map_err(|_| unread(Field::LoadDistances))?;
    let watts: Vec<Watts> = Field::LoadWatts.list(watts).map_err(|_| unread(Field::LoadWatts))?;
    if distances.is_empty() && watts.is_empty() {
        let Some(count) = pad.entry::<Count>(Field::LoadsAlong).typed() else { return Err("No loads yet.".to_owned()) };
        // Within the field's range by its reading, so it fits.
        #[expect(clippy::cast_possible_truncation, clippy::cast_sign_loss, reason = "the field takes 1 to 50")]
        return evenly(ask, count.get() as u32).map_err(|missing| format!("Waits for {}.", names(missing)));
    }
    if distances.len() != watts.len() {
        return Err(format!("{} distances and {} watts: one of each for a load.", distances.len(), watts.len()));
    }
    let load = |(distance, power)| LoadAlong { distance, draw: Draw::Power(power) };
    Ok(distances.into_iter().zip(watts).map(load).collect())
}

fn lacks(why: &AlongError) -> String {
    match why {
        AlongError::Missing(missing) if missing.is_empty() => {
            "Together they draw more than any standard breaker carries.".to_owned()
        }
        AlongError::Missing(missing) => format!("Waits for {}.", names(*missing)),
        AlongError::NoCable => "No cable holds with all of them at the far end.".to_owned(),
        AlongError::Circuit(why) => format!("No answer: {why}."),
    }
}

/// The load that loses most, against the allowed drop.
fn worst(ask: &Ask, found: &Along) -> (Verdict, String) {
    let allowed = ask.allowed();
    let (Some((place, lost)), Some(allowed)) = (found.found.worst(), allowed) else {
        return (Verdict::Asks, format!("Waits for {}.", Field::AllowedDrop.name()));
    };
    let verdict = if lost > allowed { Verdict::Breaks } else { Verdict::Clears };
    let (lost, allowed) = show::apart(lost.amount(), allowed.amount());
    (verdict, format!("Load {} loses most, {lost}; {allowed} is allowed. All on {}.", place + 1, found.cable))
}

/// Volts at each load.
fn rows(found: &Along) -> Vec<(String, String)> {
    let row = |(number, (load, place)): (u32, (&LoadAlong, &engine::run::branched::Place))| {
        let draws = match load.draw {
            Draw::Nothing => String::new(),
            Draw::Current(current) => format!(", {}", show::computed(current.amount())),
            Draw::Power(power) => format!(", {}", show::given(power.amount())),
        };
        let name = format!("Load {number}, {} along{draws}", show::given(load.distance.amount()));
        (name, format!("{}, {} lost", show::computed(place.volts.amount()), show::computed(place.lost.amount())))
    };
    (1..).zip(found.loads.iter().zip(&found.found.places)).map(row).collect()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::{Rows, plain};

    const CORRIDOR: &[(Field, &str)] = &[
        (Field::RunKind, "dc-branch"),
        (Field::RunVoltage, "12"),
        (Field::ConductorSize, "2.5"),
        (Field::LoadDistances, "4 8 12"),
        (Field::LoadWatts, "10 10 5"),
    ];

    fn read(more: &[(Field, &str)]) -> Result<(Ask, Along), String> {
        let rows = [CORRIDOR, more].concat();
        let ask = Ask::read(&Rows(&rows));
        let found = along(&ask, &loads(&Rows(&rows), &ask)?).map_err(|why| lacks(&why))?;
        Ok((ask, found))
    }

    #[test]
    fn lights_down_a_corridor_by_their_watts() {
        let (ask, found) = read(&[]).unwrap();
        let told = rows(&found);
        assert_eq!(told.len(), 3);
        assert_eq!(plain(&told[0].0), "Load 1, 4 m along, 10 W");
        // By hand, near 8.0 mΩ/m: 2.1 A over 8 m of way, 1.27 A over 8 m, 0.42 A over 8 m: 0.24 V of 12 V, 2 %.
        let (verdict, words) = worst(&ask, &found);
        assert_eq!(verdict, Verdict::Clears);
        assert!(plain(&words).starts_with("Load 3 loses most, 2.0 %; 3 % is allowed."), "{words}");
        let (ask, found) = read(&[(Field::LoadWatts, "20 20 10")]).unwrap();
        assert_eq!(worst(&ask, &found).0, Verdict::Breaks);
    }

    #[test]
    fn what_does_not_fit_together_is_said() {
        assert_eq!(
            read(&[(Field::LoadWatts, "10 10")]).unwrap_err(),
            "3 distances and 2 watts: one of each for a load."
        );
        assert_eq!(read(&[(Field::LoadWatts, "10 ten 5")]).unwrap_err(), "Waits for Watts of each load.");
        assert_eq!(read(&[(Field::RunVoltage, "")]).unwrap_err(), "Waits for Voltage.");
        let none = [(Field::LoadDistances, ""), (Field::LoadWatts, "")];
        assert_eq!(read(&none).unwrap_err(), "No loads yet.");
        let equal = [&none[..], &[(Field::LoadsAlong, "4")]].concat();
        assert_eq!(read(&equal).unwrap_err(), "Waits for Current and Length one way.");
        let equal = [&equal[..], &[(Field::RunPower, "24"), (Field::RunLength, "12")]].concat();
        assert_eq!(read(&equal).unwrap().1.loads.len(), 4);
        assert!(
            read(&[(Field::LoadDistances, "50 100 150"), (Field::LoadWatts, "30 30 30")])
                .unwrap_err()
                .starts_with("No answer: ")
        );
        let too_much = read(&[(Field::LoadWatts, "90000 90000 90000")]).unwrap_err();
        assert_eq!(too_much, "Together they draw more than any standard breaker carries.");
    }
}
