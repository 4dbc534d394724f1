//! Verdict and cost: a mark with its word.

use engine::check::{Cost, Verdict};
use leptos::prelude::*;

use crate::icon::Icon;

/// A verdict: always mark and word together.
#[component]
pub fn VerdictMark(
    /// The verdict.
    verdict: Verdict,
    /// Whether it stands beside the answer.
    #[prop(optional)]
    big: bool,
) -> impl IntoView {
    let mark = match verdict {
        Verdict::Breaks => "v-breaks",
        Verdict::Asks => "v-asks",
        Verdict::Close => "v-close",
        Verdict::Clears => "v-clears",
    };
    view! { <span class=if big { "verdict big" } else { "verdict" } data-v=verdict.word()><Icon name=mark/>{verdict.word()}</span> }
        .into_any()
}

/// What a broken or close check costs. Shown after the verdict, and only then.
#[component]
pub fn CostMark(
    /// The cost.
    cost: Cost,
) -> impl IntoView {
    let triangle = (cost == Cost::Hazard).then(|| {
        view! {
            <svg viewBox="0 0 18 17" aria-hidden="true">
                <path fill-rule="evenodd" d="M9 0l9 17H0zM8 6v5.500h2V6zM8 13v2h2v-2z"/>
            </svg>
        }
        .into_any()
    });
    view! { <span class="cost" data-cost=cost.word()>{triangle}{cost.word()}</span> }.into_any()
}

/// Whether the cost is told beside this verdict.
pub const fn tells_cost(verdict: Verdict) -> bool {
    matches!(verdict, Verdict::Breaks | Verdict::Close)
}
