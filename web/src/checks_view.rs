//! The Checks view: every check of the open site, worst first.

use crate::derived::dynamic;
use crate::piece::{Piece, view};
use engine::check::{Cost, Verdict};
use engine::field::Field;
use engine::site::{place_name, working};
use leptos::prelude::*;

use crate::check_row::check_row;
use crate::line::{assessed, link, open_site};
use crate::route::Route;

/// What is shown.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Shows {
    All,
    Hazards,
    ToDo,
}

/// The Checks view.
pub fn checks_view() -> Piece {
    let site = open_site();
    let found = assessed(site);
    let shows = RwSignal::new(Shows::All);
    let filter = |which: Shows, words: &'static str| {
        view! {
            <button
                class="btn small"
                type="button"
                aria-pressed=move || (shows.get() == which).to_string()
                on:click=move |_| shows.set(which)
            >
                {words}
            </button>
        }
    };
    let rows = dynamic(move || {
        let Some(site) = site.get() else {
            return view! {
                <p class="ranked-say">"No site is open. " <a href=Route::Line.href()>"Make or open one."</a></p>
            };
        };
        let which = shows.get();
        let rows: Vec<Piece> = found.with(|found| {
            found
                .checks
                .iter()
                .filter(|one| match which {
                    Shows::All => true,
                    Shows::Hazards => one.check.cost == Cost::Hazard && one.check.verdict != Verdict::Clears,
                    Shows::ToDo => matches!(one.check.verdict, Verdict::Breaks | Verdict::Asks),
                })
                .map(|one| {
                    let place = link(one.place);
                    let go = Callback::new(move |_: Field| crate::route::go(place));
                    let id = format!("checks/{:?}/{}", one.place, one.check.id.id());
                    let note = place_name(&site, one.place);
                    let row = check_row(
                        id,
                        one.check.id.name(),
                        &one.check,
                        None,
                        || working(&site, one.place, one.check.id),
                        go,
                    );
                    view! { <li class="at"><a href=place.href()>{note}</a></li>{row} }
                })
                .collect()
        });
        if rows.is_empty() {
            return view! { <p class="ranked-say">"Nothing of that kind."</p> };
        }
        view! { <ol class="checks">{rows}</ol> }
    });
    view! {
        <div class="one-column">
            <div class="page-head"><h1 tabindex="-1">"Checks"</h1><span class="aside">"worst first, hazard before loss"</span></div>
            <div class="btns">{filter(Shows::All, "All")}{filter(Shows::ToDo, "To do")}{filter(Shows::Hazards, "Hazards")}</div>
            {rows}
        </div>
    }
}
