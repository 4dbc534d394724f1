//! The checks of the String tool, worst first.

use engine::check::Check;
use engine::field::Field;
use engine::string::{Requirement, working};
use leptos::prelude::*;

use super::answer::note;
use super::fields::go_to;
use super::question::Question;
use crate::check_row::CheckRow;
use crate::fold::Folds;

/// The checks beside the one on top.
#[component]
pub fn Checks(question: Memo<Question>, checks: Memo<Vec<Check<Requirement>>>) -> impl IntoView {
    let folds = expect_context::<Folds>();
    let order = Memo::new(move |_| checks.with(|checks| checks.iter().map(|check| check.id).collect::<Vec<_>>()));
    let go = Callback::new(move |field: Field| go_to(folds, field));
    view! {
        <h2 class="sub">"Checks" <span>"worst first"</span></h2>
        <ol class="checks">
            <For each=move || order.get() key=|id| *id let:id>
                {row(id, question, checks, go)}
            </For>
        </ol>
    }
}

fn row(
    id: Requirement,
    question: Memo<Question>,
    checks: Memo<Vec<Check<Requirement>>>,
    go: Callback<Field>,
) -> impl IntoView {
    let first = checks.with_untracked(|checks| checks.iter().find(|check| check.id == id).copied());
    // A row outlives its check by a moment when the check no longer arises: it then shows what it last was.
    let check = Memo::new(move |last: Option<&Option<Check<Requirement>>>| {
        checks.with(|checks| checks.iter().find(|check| check.id == id).copied()).or_else(|| last.copied().flatten())
    });
    let steps = Callback::new(move |()| question.with(|question| working(&question.ask, id)));
    let note = Signal::derive(move || question.with(|question| note(&question.ask, id)));
    first.map(|first| {
        let shown = Signal::derive(move || check.get().unwrap_or(first));
        view! {
            <CheckRow id=format!("string/{}", id.id()) name=id.name() check=shown working=steps note=note on_ask=go/>
        }
    })
}
