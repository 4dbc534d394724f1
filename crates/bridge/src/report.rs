//! A site's checks as text and as JSON, for scripts and for whoever tests the engine from outside.

use core::fmt::Write;

use engine::check::{Check, FieldSet, Origin, Sense, Step};
use engine::field::Field;
use engine::show;
use engine::site::{Assessment, Place, Site, SiteCheck, place_name, working};
use serde_json::{Value, json};

fn pretty(value: &Value) -> String {
    let mut text = serde_json::to_string_pretty(value).unwrap_or_default();
    text.push('\n');
    text
}

fn names(fields: FieldSet) -> Vec<&'static str> {
    fields.iter().map(Field::name).collect()
}

/// Every check as JSON.
#[must_use]
pub fn to_json(site: &Site, found: &Assessment) -> String {
    let rows: Vec<Value> = found.checks.iter().map(|one| row(site, one)).collect();
    pretty(&json!({ "site": site.name, "checks": rows }))
}

fn row(site: &Site, SiteCheck { place, check }: &SiteCheck) -> Value {
    let Check { id, cost, verdict, value, limit, margin, reserve, asks, assumed } = check;
    let amount = |amount: engine::quantity::Amount| json!({ "number": amount.number, "unit": amount.unit.symbol() });
    json!({
        "id": id.id(),
        "place": place_name(site, *place),
        "part": match place { Place::Site => None, Place::Part(part) | Place::Run(part) => Some(part.0) },
        "kind": cost.word(),
        "verdict": verdict.word(),
        "value": value.map(amount),
        "limit": limit.map(|limit| amount(limit.amount)),
        "sense": limit.map(|limit| if limit.sense == Sense::AtMost { "at most" } else { "at least" }),
        "margin_percent": margin.map(engine::quantity::Percent::get),
        "reserve_percent": reserve.get(),
        "asks": names(*asks),
        "assumed": names(*assumed),
    })
}

/// Every check in a line: verdict, kind, id, place, value, limit, margin, and what was assumed or is missing.
#[must_use]
pub fn lines(site: &Site, found: &Assessment) -> String {
    let mut text = String::new();
    let title = if site.name.is_empty() { "a site without a name" } else { &site.name };
    // Writing into a text cannot fail, here and below.
    let _ = writeln!(text, "{title}");
    for one in &found.checks {
        let check = &one.check;
        let figures = match (check.value, check.limit, check.margin) {
            (Some(value), Some(limit), Some(margin)) => {
                let (value, bound) = show::apart(value, limit.amount);
                let side = if limit.sense == Sense::AtMost { "at most" } else { "at least" };
                format!("{value}, {side} {bound}, margin {:.1} %", margin.get())
            }
            _ => format!("asks for {}", names(check.asks).join(", ")),
        };
        let assumed = names(check.assumed);
        let assumed = if assumed.is_empty() { String::new() } else { format!("; assumed: {}", assumed.join(", ")) };
        let (verdict, cost, id) = (check.verdict.word(), check.cost.word(), check.id.id());
        let place = place_name(site, one.place);
        let _ = writeln!(text, "{verdict:<7} {cost:<7} {id:<28} {place:<26} {figures}{assumed}");
    }
    text
}

/// The steps of every check `id` of the site.
///
/// # Errors
///
/// In words, where no such check arises.
pub fn steps_of(site: &Site, found: &Assessment, id: &str, as_json: bool) -> Result<String, String> {
    let all: Vec<(Place, Vec<Step>)> = found
        .checks
        .iter()
        .filter(|one| one.check.id.id() == id)
        .map(|one| (one.place, working(site, one.place, one.check.id)))
        .collect();
    if all.is_empty() {
        return Err(format!("no check “{id}” arises on this site"));
    }
    if as_json {
        let step = |step: &Step| {
            json!({
                "what": step.what, "formula": step.formula, "put_in": step.put_in,
                "number": step.result.number, "unit": step.result.unit.symbol(), "from": origin(step.origin),
            })
        };
        let all: Vec<Value> = all
            .iter()
            .map(|(place, steps)| {
                json!({ "place": place_name(site, *place), "steps": steps.iter().map(step).collect::<Vec<_>>() })
            })
            .collect();
        return Ok(pretty(&json!({ "id": id, "workings": all })));
    }
    let mut text = String::new();
    for (place, steps) in all {
        let _ = writeln!(text, "{id}, {}", place_name(site, place));
        for step in steps {
            let result = show::step(step.result);
            let Step { what, formula, put_in, .. } = &step;
            let _ = writeln!(text, "  {what}: {formula} {put_in} = {result}   [{}]", origin(step.origin));
        }
    }
    Ok(text)
}

fn origin(origin: Origin) -> String {
    match origin {
        Origin::Before => "from the steps before".to_owned(),
        Origin::Entered(field) => format!("entered: {}", field.name()),
        Origin::Assumed(field) => format!("assumed: {}", field.name()),
        Origin::Published(clause) => format!("{} {}", clause.work.name, clause.at).trim().to_owned(),
    }
}
