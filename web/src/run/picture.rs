//! The small picture of a run: its two ends by name, its breaker or fuse, and the wire as wide as it is thick.

use crate::derived::{Memo, dynamic};
use crate::piece::{Piece, view};
use engine::field::Field;
use engine::quantity::Quantity;
use engine::run::{Ask, BreakerType, Kind, Sizing, size};
use engine::show;

use super::{TOOL, truck};
use crate::draft::use_draft;
use crate::form::as_entered;

/// The picture. Nothing is drawn before the kind of run is known.
pub fn picture(ask: Memo<Ask>) -> Piece {
    let draft = use_draft();
    let length = move || draft.with(|pads| as_entered(&pads.of(TOOL), Field::RunLength));
    dynamic(move || {
        let ask = ask.with(truck::settled);
        let Some(kind) = ask.kind.typed() else { return Piece::Nothing };
        drawn(kind, size(&ask).ok().as_ref(), length())
    })
}

/// Wire width on screen: 2 + 1.1 · √mm², as on the line.
fn width(found: Option<&Sizing>) -> f64 {
    let area =
        found.and_then(|found| found.conductor).map_or(4.0, |one| one.size.area().get() * f64::from(one.parallel));
    (2.0 + 1.1 * area.sqrt()).min(16.0)
}

/// Whether breaker or fuse stands at the far end: where a fault is fed from. Strings feed one another at the combiner,
/// and the bank feeds what hangs on its bus.
const fn at_far_end(kind: Kind) -> bool {
    matches!(kind, Kind::PvString | Kind::PvArray | Kind::ControllerOutput)
}

fn drawn(kind: Kind, found: Option<&Sizing>, length: Option<String>) -> Piece {
    let (from, to) = kind.ends();
    let far = at_far_end(kind);
    let at = if far { 252.0 } else { 68.0 };
    let protection = found.map(|found| found.protection);
    let device = protection.map_or("breaker", |protection| protection.protects.word());
    let label = format!("{from} to {to}, {device} at the {}", if far { to } else { from });
    let rating = protection.map(|protection| show::given(protection.rating.amount()));
    let wire = found.and_then(|found| found.conductor).map(|one| one.to_string());
    let along = [wire, length].into_iter().flatten().collect::<Vec<_>>().join(", ");
    let fuse = protection.is_some_and(|protection| protection.protects == BreakerType::Fuse);
    let symbol = if fuse {
        view! { <rect class="fuse" x=format!("{:.0}", at - 15.0) y="26" width="30" height="12"/> }
    } else {
        view! {
            <path class="gap" d=format!("M{:.0} 32h24", at - 12.0)/>
            <path class="blade" d=format!("M{:.0} 32l20 -11", at - 12.0)/>
            <circle class="pin" cx=format!("{:.0}", at - 12.0) cy="32" r="2.6"/>
            <circle class="pin" cx=format!("{:.0}", at + 12.0) cy="32" r="2.6"/>
        }
    };
    view! {
        <svg class="run-pic" viewBox="0 0 320 74" role="img" aria-label=label>
            <path class="wire" d="M32 32H288" stroke-width=format!("{:.1}", width(found))/>
            <rect class="end" x="1" y="15" width="34" height="34"/>
            <rect class="end" x="285" y="15" width="34" height="34"/>
            {symbol}
            <text class="rating" x=format!("{at:.0}") y="12" text-anchor="middle">{rating}</text>
            <text x="160" y="56" text-anchor="middle">{along}</text>
            <text x="1" y="66">{from}</text>
            <text x="319" y="66" text-anchor="end">{to}</text>
        </svg>
    }
}
