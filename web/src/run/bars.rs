//! The two pictures of a run: amperes against what the conductor carries, and the drop against what is allowed. Pure.

use engine::check::{Check, Sense, Verdict};
use engine::quantity::{Amount, Amps, Quantity};
use engine::run::{Requirement, Sizing};
use engine::show;

use crate::check_row::bar;
use crate::span_bar::Bar;
use crate::span_bar::geometry::{From, Mark, Post, Ruler};

fn find(checks: &[Check<Requirement>], id: Requirement) -> Option<&Check<Requirement>> {
    checks.iter().find(|check| check.id == id)
}

/// Amperes: what is asked of the conductor against what it carries, or the breaker against its own limit where only
/// that breaks.
pub fn amps(found: Option<&Sizing>, checks: &[Check<Requirement>]) -> Bar {
    drawn(found, checks).unwrap_or_else(|| Bar::unknown("What flows is not known yet."))
}

fn drawn(found: Option<&Sizing>, checks: &[Check<Requirement>]) -> Option<Bar> {
    let found = found?;
    let carries = find(checks, Requirement::Ampacity)?;
    let fits = find(checks, Requirement::Protection)?;
    if fits.verdict == Verdict::Breaks && carries.verdict != Verdict::Breaks {
        return breaker(found, fits);
    }
    conductor(found, carries)
}

fn mark(amps: Amps, name: &str, beside: Amount) -> Mark {
    Mark { at: amps.get(), name: name.to_owned(), shown: show::apart(amps.amount(), beside).0 }
}

fn conductor(found: &Sizing, check: &Check<Requirement>) -> Option<Bar> {
    // The limit is from below: what must be carried. On the ruler it is what is covered, and the value is the post.
    let (carries, asked) = (check.value?, check.limit?.amount);
    let (flows, rating) = (found.load.working, found.protection.rating);
    let asked_amps = Amps::new(asked.number);
    let mut marks = vec![mark(flows, "flows", carries)];
    let by_rule = asked_amps.get() > flows.get() * (1.0 + 1e-9);
    if by_rule {
        marks.push(mark(asked_amps, "by rule", carries));
    }
    let breaker = format!("the {} is {}", found.protection.protects.word(), show::given(rating.amount()));
    let carries_shown = show::apart(carries, asked).0;
    let room = show::room(check.distance()?);
    let rule = if by_rule { format!("the rule asks for {}, ", show::computed(asked)) } else { String::new() };
    let says =
        format!("Amperes. The conductor carries {carries_shown}; {rule}{} flows, {breaker}.", marks[0].shown.clone());
    Some(Bar {
        ruler: Ruler {
            low: None,
            high: Some(Post {
                at: carries.number,
                reserve: 0.0,
                name: "conductor carries".to_owned(),
                shown: carries_shown,
            }),
            covered: Some((From::Start, asked.number)),
            marks,
        },
        verdict: check.verdict,
        room: Some(room),
        says,
    })
}

fn breaker(found: &Sizing, check: &Check<Requirement>) -> Option<Bar> {
    let mut drawn = bar(check.id.name(), check)?;
    let limit = check.limit?;
    let name = match limit.sense {
        Sense::AtMost => "protected up to",
        Sense::AtLeast => "load asks for",
    };
    for post in drawn.ruler.high.iter_mut().chain(drawn.ruler.low.iter_mut()) {
        name.clone_into(&mut post.name);
    }
    drawn.ruler.marks = vec![mark(Amps::new(check.value?.number), found.protection.protects.word(), limit.amount)];
    Some(drawn)
}

/// The drop against what is allowed. `None` while length or voltage is missing.
pub fn drop(found: Option<&Sizing>, checks: &[Check<Requirement>]) -> Option<Bar> {
    let check = find(checks, Requirement::Drop)?;
    let mut drawn = bar(check.id.name(), check)?;
    let (value, limit) = (check.value?, check.limit?);
    if let Some(post) = &mut drawn.ruler.high {
        "drop allowed".clone_into(&mut post.name);
    }
    let name = found?.drop.map_or_else(String::new, |drop| show::computed(drop.volts.amount()));
    drawn.ruler.marks = vec![Mark { at: value.number, name, shown: show::apart(value, limit.amount).0 }];
    Some(drawn)
}
