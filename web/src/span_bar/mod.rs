//! The span bar: the one picture used everywhere. Where things stand is computed in [`geometry`]; here it is drawn.

pub mod geometry;

use crate::piece::{Piece, view};
use engine::check::Verdict;

use geometry::{Geometry, Hang, Ruler, Stand, TickKind};

/// A span bar: what it shows, how that was judged, and the same in one sentence.
#[derive(Clone, Debug, PartialEq)]
pub struct Bar {
    /// Limits, span and marks.
    pub ruler: Ruler,
    /// The verdict that it is a picture of.
    pub verdict: Verdict,
    /// What is left or over, with its unit. Flown from the post that the span leans on or breaks.
    pub room: Option<String>,
    /// What a screen reader says: allowed, covered, left or over.
    pub says: String,
}

impl Bar {
    /// The ruler before a limit or a value is known; `says` tells which.
    pub fn unknown(says: &str) -> Self {
        let ruler = Ruler { low: None, high: None, covered: None, marks: Vec::new() };
        Self { ruler, verdict: Verdict::Asks, room: None, says: says.to_owned() }
    }
}

/// The full span bar, with labels above and below.
pub fn span_bar(Bar { ruler, verdict, room, says }: Bar) -> Piece {
    let drawn = ruler.geometry();
    let flag = room.and_then(|room| flag(&drawn, room));
    let mut above = Vec::new();
    if let (Some(at), Some(post)) = (drawn.lo, &ruler.low) {
        above.push(label(at, Hang::Start, view! { {post.name.clone()}<b>{post.shown.clone()}</b> }));
    }
    if let (Some(at), Some(post)) = (drawn.hi, &ruler.high) {
        above.push(label(at, Hang::End, view! { {post.name.clone()}<b>{post.shown.clone()}</b> }));
    }
    let below: Vec<Piece> = ruler
        .marks
        .iter()
        .zip(&drawn.marks)
        .map(|(mark, (at, _, hang))| label(*at, *hang, view! { <b>{mark.shown.clone()}</b>{mark.name.clone()} }))
        .collect();
    view! {
        <figure class="span" data-v=verdict.word() role="img" aria-label=says>
            <div class="span-top" aria-hidden="true">{above}{flag}</div>
            {rule(&drawn)}
            <div class="span-bot" aria-hidden="true">{below}</div>
        </figure>
    }
}

/// The span bar of a row: one line, no labels on the ruler.
pub fn slim_bar(Bar { ruler, verdict, says, .. }: Bar) -> Piece {
    let drawn = Ruler { marks: Vec::new(), ..ruler }.geometry();
    view! { <span class="slim" data-v=verdict.word() role="img" aria-label=says>{rule(&drawn)}</span> }
}

/// The distance of graduations; of a ruler that has no scale yet, `plain`.
fn step(distance: f64, plain: f64) -> f64 {
    if distance > 0.0 { distance.max(0.1) } else { plain }
}

fn percent(value: f64) -> String {
    format!("{value:.3}%")
}

fn label(at: f64, hang: Hang, inside: Piece) -> Piece {
    let class = match hang {
        Hang::Middle => "span-lab",
        Hang::Start => "span-lab start",
        Hang::End => "span-lab end",
        Hang::Drops => "span-lab drops",
    };
    view! { <span class=class style=("--p", percent(at))>{inside}</span> }
}

fn flag(drawn: &Geometry, room: String) -> Option<Piece> {
    let (class, word, at) = match (drawn.low_post, drawn.high_post) {
        (_, Some(Stand::Snapped)) => ("span-gap", "over", drawn.hi?),
        (Some(Stand::Snapped), _) => ("span-gap low", "under", drawn.lo?),
        (_, Some(Stand::Near)) => ("span-gap", "left", drawn.hi?),
        (Some(Stand::Near), _) => ("span-gap low", "left", drawn.lo?),
        _ => return None,
    };
    Some(view! { <span class=class style=("--p", percent(at))>{word}<b>{room}</b></span> })
}

fn stretch(class: &'static str, (a, b): (f64, f64)) -> Piece {
    view! { <i class=class style=("--a", percent(a)) style=("--b", percent(b))></i> }
}

fn post(stand: Stand, low: bool, at: f64) -> Piece {
    let class = match (stand, low) {
        (Stand::Free, _) => "span-post",
        (Stand::Near, false) => "span-post near",
        (Stand::Near, true) => "span-post near low",
        (Stand::Snapped, false) => "span-post snapped",
        (Stand::Snapped, true) => "span-post snapped low",
    };
    view! { <i class=class style=("--p", percent(at))></i> }
}

fn rule(drawn: &Geometry) -> Piece {
    let mut layers = Vec::new();
    if let (Some(at), Some(_)) = (drawn.high_reserve, drawn.hi) {
        layers.push(view! { <i class="span-reserve" style=("--res", percent(at))></i> });
    }
    if let (Some(at), Some(_)) = (drawn.low_reserve, drawn.lo) {
        layers.push(view! { <i class="span-reserve low" style=("--res", percent(at))></i> });
    }
    layers.extend(drawn.solid.map(|span| stretch("span-solid", span)));
    layers.extend(drawn.high_tight.map(|span| stretch("span-tight", span)));
    layers.extend(drawn.low_tight.map(|span| stretch("span-tight", span)));
    layers.extend(drawn.under.map(|span| stretch("span-past low", span)));
    layers.extend(drawn.over.map(|span| stretch("span-past", span)));
    if let Some((a, b)) = drawn.blank {
        layers.push(view! { <i class="span-ask" style=("--a", percent(a)) style=("--b", percent(b))>"?"</i> });
    }
    if let (Some(stand), Some(at)) = (drawn.low_post, drawn.lo) {
        layers.push(post(stand, true, at));
    }
    if let (Some(stand), Some(at)) = (drawn.high_post, drawn.hi) {
        layers.push(post(stand, false, at));
    }
    layers.extend(drawn.marks.iter().map(|(at, kind, _)| {
        let class = match kind {
            TickKind::Inside => "span-tick",
            TickKind::Left => "span-tick end-a",
            TickKind::Right => "span-tick end-b",
            TickKind::Outside => "span-tick out",
        };
        view! { <i class=class style=("--p", percent(*at))></i> }
    }));
    view! {
        <span
            class="span-rule"
            aria-hidden="true"
            style=("--lo", percent(drawn.lo.unwrap_or(0.0)))
            style=("--hi", percent(drawn.hi.unwrap_or(100.0)))
            style=("--major", percent(step(drawn.major, 10.0)))
            style=("--minor", percent(step(drawn.minor, 2.0)))
            style=("--major-from", percent(drawn.major_from))
            style=("--minor-from", percent(drawn.minor_from))
        >
            <i class="span-channel"></i>
            {layers}
        </span>
    }
}
