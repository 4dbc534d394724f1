//! The small picture of a run: its two ends by name, its breaker, and the wire as wide as it is thick.

use engine::run::{Ask, Kind, size};
use leptos::prelude::*;

use crate::derived::dynamic;

/// The picture. Nothing is drawn before the kind of run is known.
pub fn picture(ask: Memo<Ask>) -> AnyView {
    dynamic(move || ask.with(|ask| ask.kind.typed().map_or_else(|| ().into_any(), |kind| drawn(ask, kind))))
}

/// Wire width on screen: 2 + 1.1 · √mm², as on the line.
fn width(ask: &Ask) -> f64 {
    let area = size(ask).ok().and_then(|found| found.conductor).map_or(4.0, |one| one.size.area().get());
    (2.0 + 1.1 * area.sqrt()).min(16.0)
}

fn drawn(ask: &Ask, kind: Kind) -> AnyView {
    let (from, to) = kind.ends();
    // The breaker stands at the end that can feed a fault: the bank's side of every run on the bus.
    let at_far_end = matches!(kind, Kind::ControllerOutput);
    let breaker = if at_far_end { 236.0 } else { 84.0 };
    let label = format!("{from} to {to}, breaker at the {} end", if at_far_end { to } else { from });
    let wide = format!("{:.1}", width(ask));
    view! {
        <svg class="run-pic" viewBox="0 0 320 64" role="img" aria-label=label>
            <path class="wire" d="M44 24H276" stroke-width=wide/>
            <rect class="end" x="2" y="6" width="42" height="36"/>
            <rect class="end" x="276" y="6" width="42" height="36"/>
            <path class="gap" d=format!("M{:.0} 24h24", breaker - 12.0)/>
            <path class="blade" d=format!("M{:.0} 24l20 -11", breaker - 12.0)/>
            <circle class="pin" cx=format!("{:.0}", breaker - 12.0) cy="24" r="2.6"/>
            <circle class="pin" cx=format!("{:.0}", breaker + 12.0) cy="24" r="2.6"/>
            <text x="2" y="58">{from}</text>
            <text x="318" y="58" text-anchor="end">{to}</text>
        </svg>
    }
    .into_any()
}
