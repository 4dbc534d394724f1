//! What else a run asks for: the cable on the truck, the two thinner ones, the breaker, lugs and terminals.

use engine::check::Verdict;
use engine::quantity::Quantity;
use engine::run::{Ask, BreakerType, Reach, Sizing, reach, size};
use engine::show;
use leptos::prelude::*;

use super::answer::against;
use crate::form::names;
use crate::tool_page::{figures, section};
use crate::verdict::VerdictMark;

/// Given the cable that is on the truck: how many amperes, and how far. There while a size is entered.
pub fn on_the_truck(ask: ReadSignal<Ask>) -> AnyView {
    section(
        "On the truck",
        "what this cable does",
        move || ask.with(|ask| ask.size != engine::entry::Entry::Blank),
        move || match ask.with(reach) {
            Ok(reach) => figures(reach_rows(&reach)),
            Err(missing) => view! { <p class="ranked-say">{format!("Waits for {}.", names(missing))}</p> }.into_any(),
        },
    )
}

fn reach_rows(reach: &Reach) -> Vec<(String, String)> {
    let none = || "no standard breaker fits it".to_owned();
    let mut rows =
        vec![("Carries at most".to_owned(), reach.most.map_or_else(none, |amps| show::computed(amps.amount())))];
    if let Some(rating) = reach.rating {
        rows.push(("on a breaker of".to_owned(), show::given(rating.amount())));
    }
    if let Some(amps) = reach.most_for_drop {
        rows.push(("Within the drop, over this length".to_owned(), show::computed(amps.amount())));
    }
    if let (Some(amps), Some(watts)) = (reach.amps, reach.watts) {
        let both = format!("{}, {}", show::computed(amps.amount()), show::computed(watts.amount()));
        rows.push(("Both together".to_owned(), both));
    }
    if let Some(length) = reach.length {
        rows.push(("Goes as far as".to_owned(), show::computed(length.amount())));
    }
    rows
}

/// Breaker, lug and terminal, and why thinner conductors do not do.
pub fn fitting(ask: ReadSignal<Ask>) -> AnyView {
    section(
        "Fitting",
        "breaker, lugs, and why not thinner",
        move || ask.with(|ask| size(ask).is_ok()),
        move || {
            let Ok(found) = ask.with(size) else { return ().into_any() };
            view! {
                {figures(fitting_rows(&found))}
                {thinner(&found)}
            }
            .into_any()
        },
    )
}

fn fitting_rows(found: &Sizing) -> Vec<(String, String)> {
    let protection = &found.protection;
    let what = match protection.protects {
        BreakerType::Fuse => "Fuse",
        BreakerType::Breaker | BreakerType::Polarised => "Breaker",
    };
    let mut rows =
        vec![(what.to_owned(), format!("{}, {}", show::given(protection.rating.amount()), protection.class))];
    if let Some(volts) = protection.voltage_rating.or(protection.voltage_asked) {
        let poles = protection.poles.map_or_else(String::new, |poles| {
            format!(", {poles} {} in series", if poles == 1 { "pole" } else { "poles" })
        });
        rows.push(("Rated for".to_owned(), format!("{} {poles}", show::given(volts.amount())).replace(" ,", ",")));
    }
    if let Some(current) = protection.interrupting_rating.or(protection.interrupting_asked) {
        rows.push(("Interrupts at least".to_owned(), show::computed(current.amount())));
    }
    let way = if protection.may_be_polarised { "one that opens one way would do" } else { "must open both ways" };
    rows.push(("Direction".to_owned(), way.to_owned()));
    if let Some(landing) = found.landing {
        let enters = if landing.enters {
            "enters the breaker’s terminal".to_owned()
        } else {
            format!("too thick for the terminal (usually to {}): land it on a stud or bus", landing.largest)
        };
        let ferrule = if landing.ferrule { "; fine strands: ferrule or pin" } else { "" };
        rows.push(("Terminal".to_owned(), format!("{enters}{ferrule}")));
        rows.push(("Lug".to_owned(), format!("{} for a stud of {}, typical", landing.lug, landing.stud)));
    }
    for column in &found.columns {
        let head = format!("Table, {} column", show::given(column.bears.amount()));
        rows.push((head, show::given(column.carries.amount())));
    }
    rows
}

/// The two next thinner, and what each breaks.
fn thinner(found: &Sizing) -> Option<AnyView> {
    (!found.thinner.is_empty()).then(|| {
        let rows: Vec<AnyView> = found
            .thinner
            .iter()
            .map(|one| {
                let why = one.breaks.iter().map(|check| format!("{}: {}.", check.id.name(), against(check)));
                let why = why.collect::<Vec<_>>().join(" ");
                let (verdict, why) = if why.is_empty() {
                    (Verdict::Clears, "It would hold as well.".to_owned())
                } else {
                    (Verdict::Breaks, why)
                };
                view! {
                    <li data-v=verdict.word()>
                        <span class="name">{one.candidate.to_string()}</span>
                        <VerdictMark verdict=verdict/>
                        <p class="why">{why}</p>
                    </li>
                }
                .into_any()
            })
            .collect();
        view! { <ol class="ranked plain">{rows}</ol> }.into_any()
    })
}
