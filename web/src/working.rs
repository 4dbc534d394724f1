//! The working: how a value came about, step by step, as the code that computed it wrote it down.

use crate::piece::{Piece, view};
use engine::check::{Origin, Step};
use engine::show;

/// A working. The last step is the margin.
pub fn list(steps: Vec<Step>) -> Piece {
    let last = steps.len().saturating_sub(1);
    let steps = steps.into_iter().enumerate().map(|(place, step)| {
        let how = match (step.formula.is_empty(), step.put_in.is_empty()) {
            (true, _) => step.put_in,
            (false, true) => step.formula.to_owned(),
            (false, false) => format!("{} = {}", step.formula, step.put_in),
        };
        view! {
            <li class:last=place == last>
                <span class="what">{step.what}</span>
                <span class="out">{show::step(step.result)}</span>
                {(!how.is_empty()).then(|| view! { <span class="how">{how}</span> })}
                {source(step.origin).map(|source| view! { <span class="src">{source}</span> })}
            </li>
        }
    });
    view! { <ol class="working">{steps.collect::<Vec<Piece>>()}</ol> }
}

fn source(origin: Origin) -> Option<String> {
    match origin {
        Origin::Before => None,
        Origin::Entered(field) => Some(format!("{}: entered", field.name())),
        Origin::Assumed(field) => Some(format!("{}: assumed", field.name())),
        Origin::Published(clause) => Some(cited(clause)),
    }
}

/// A clause as it is cited under a figure: work, edition, place in it.
pub fn cited(clause: engine::source::Clause) -> String {
    let parts = [clause.work.name, clause.work.edition, clause.at];
    parts.into_iter().filter(|part| !part.is_empty()).collect::<Vec<_>>().join(", ")
}
