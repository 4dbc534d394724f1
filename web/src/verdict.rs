//! Verdict and cost: a mark with its word.

use crate::piece::{Piece, view};
use engine::check::{Cost, Verdict};

use crate::icon::icon;

/// A verdict: always mark and word together. Big beside the answer.
pub fn verdict_mark(verdict: Verdict, big: bool) -> Piece {
    let mark = match verdict {
        Verdict::Breaks => "v-breaks",
        Verdict::Asks => "v-asks",
        Verdict::Close => "v-close",
        Verdict::Clears => "v-clears",
    };
    view! { <span class=if big { "verdict big" } else { "verdict" } data-v=verdict.word()>{icon(mark, "")}{verdict.word()}</span> }
}

/// What a broken or close check costs. Shown after the verdict, and only then.
pub fn cost_mark(cost: Cost) -> Piece {
    let triangle = (cost == Cost::Hazard).then(|| {
        view! {
            <svg viewBox="0 0 18 17" aria-hidden="true">
                <path fill-rule="evenodd" d="M9 0l9 17H0zM8 6v5.500h2V6zM8 13v2h2v-2z"/>
            </svg>
        }
    });
    view! { <span class="cost" data-cost=cost.word()>{triangle}{cost.word()}</span> }
}

/// Whether the cost is told beside this verdict.
pub const fn tells_cost(verdict: Verdict) -> bool {
    matches!(verdict, Verdict::Breaks | Verdict::Close)
}
