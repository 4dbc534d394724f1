//! The Line view: the whole power room on one column from sun to socket, what breaks first, and each part beside it.

mod new_site;
mod part;
mod rows;
mod what_if;

use crate::derived::{Memo, dynamic, memo, when};
use crate::piece::{IntoPiece, Piece, view};
use engine::check::Verdict;
use engine::show;
use engine::site::{Assessment, PartId, PartKind, Place, Site, SiteCheck, Subject, assess, place_name};
use leptos::prelude::*;

use crate::draft::use_draft;
use crate::pads::{Edit, SiteEdit};
use crate::route::Route;
use crate::settled::settled;
use crate::verdict::{cost_mark, tells_cost, verdict_mark};

pub use new_site::kept as kept_sites;
pub use part::title;

/// The open site, told wherever it changes.
pub fn open_site() -> Memo<Option<Site>> {
    let draft = use_draft();
    memo(move || draft.with(|pads| pads.site().map(|open| open.site.clone())))
}

/// Its checks.
pub fn assessed(site: Memo<Option<Site>>) -> Memo<Assessment> {
    memo(move || site.with(|site| site.as_ref().map(assess).unwrap_or_default()))
}

/// The Line view. `subject` is the part that is opened beside it.
pub fn line_view(subject: Option<Subject>) -> Piece {
    let site = open_site();
    let has = memo(move || site.with(Option::is_some));
    let column = dynamic(move || if has.get() { column(site, subject) } else { new_site::new_site() });
    let opened = subject.map(|subject| {
        when(move || has.get(), move || view! { <div class="site-part">{part::part_page(subject, site)}</div> })
    });
    view! { <div class="site-view" data-open=subject.map(|_| "")>{column}{opened}</div> }
}

fn column(site: Memo<Option<Site>>, subject: Option<Subject>) -> Piece {
    let draft = use_draft();
    let name = memo(move || site.with(|site| site.as_ref().map(|site| site.name.clone()).unwrap_or_default()));
    // Beside a part that is typed into, the part's own answer goes first.
    let site = if subject.is_some() { settled(site) } else { site };
    let found = assessed(site);
    let rows = dynamic(move || {
        site.with(|site| {
            found.with(|found| match site {
                Some(site) => rows::rows(site, found, subject).piece(),
                None => Piece::Nothing,
            })
        })
    });
    view! {
        <div class="site-line">
            <div class="page-head">
                <h1 tabindex="-1" class="vh">"Line"</h1>
                <input
                    class="site-name"
                    type="text"
                    aria-label="Name of the site"
                    placeholder="Name this site"
                    autocomplete="off"
                    prop:value=name
                    on:input=move |event| draft.edit(Edit::Site(SiteEdit::Name(None, event_target_value(&event))))
                    on:blur=move |_| draft.leave()
                />
            </div>
            {dynamic(move || site.with(|site| found.with(|found| site.as_ref().map_or_else(|| Piece::Nothing, |site| worst(site, found)))))}
            {what_if::what_if(site)}
            <ol class="line" aria-label="The line, from sun to socket">{rows}</ol>
            {adding()}
            <div class="btns">
                <a class="btn plain" href=Route::Part(Subject::Place).href()>"Place, code and earthing"</a>
                <button class="btn plain" type="button" on:click=move |_| draft.edit(Edit::Site(SiteEdit::Close))>
                    "Close this site"
                </button>
            </div>
        </div>
    }
}

/// The worst check of the site in one sentence, and how many there are of each verdict.
fn worst(site: &Site, found: &Assessment) -> Piece {
    let Some(one) = found.worst() else { return Piece::Nothing };
    let check = &one.check;
    let tally: Vec<Piece> = [Verdict::Breaks, Verdict::Asks, Verdict::Close, Verdict::Clears]
        .into_iter()
        .filter_map(|verdict| {
            let count = found.count(verdict);
            (count > 0).then(|| {
                view! { <span data-v=verdict.word()>{format!("{count} {}", verdict.word())}</span> }
            })
        })
        .collect();
    view! {
        <section class="worst" aria-label="The worst check">
            <p class="worst-tag">
                {verdict_mark(check.verdict, true)}
                {tells_cost(check.verdict).then(|| view! { {cost_mark(check.cost)} })}
            </p>
            <p class="worst-say">{sentence(site, one)}</p>
            <p class="tally">{tally} <a href=Route::Checks.href()>"All checks"</a></p>
        </section>
    }
}

/// A check in one sentence.
pub fn sentence(site: &Site, one: &SiteCheck) -> String {
    let place = place_name(site, one.place);
    let check = &one.check;
    let name = check.id.name();
    match (check.value, check.limit, check.room()) {
        (Some(_), Some(_), Some(_)) if check.is_count() => {
            let holds = match check.verdict {
                Verdict::Breaks => ": does not hold.".to_owned(),
                _ => crate::answer::rests_on(check.assumed)
                    .map_or_else(|| ": holds.".to_owned(), |rests| format!(". {rests}")),
            };
            format!("{place}: {name}{holds}")
        }
        (Some(value), Some(limit), Some(room)) => {
            let (value, bound) = show::apart(value, limit.amount);
            let side = if limit.sense == engine::check::Sense::AtMost { "at most" } else { "at least" };
            let size = check.distance().map(show::room).unwrap_or_default();
            let end = if room.number < 0.0 { format!("{size} past it") } else { format!("{size} in hand") };
            format!("{place}: {name}, {value}, {side} {bound}, {end}.")
        }
        _ => format!("{place}: {name} waits for {}.", crate::form::names(check.asks)),
    }
}

/// A part more, of any kind.
fn adding() -> Piece {
    let draft = use_draft();
    let open = RwSignal::new(false);
    let kinds = move || {
        let one = |kind: PartKind| {
            let add = move |_| {
                draft.edit(Edit::Site(SiteEdit::Add(kind)));
                open.set(false);
            };
            view! { <button class="btn small" type="button" on:click=add>{kind.kind().name}</button> }
        };
        PartKind::ALL.into_iter().map(one).collect::<Vec<Piece>>()
    };
    view! {
        <div class="btns">
            <button
                class="btn"
                type="button"
                aria-expanded=move || open.get().to_string()
                on:click=move |_| open.update(|open| *open = !*open)
            >
                "Add a part"
            </button>
        </div>
        {when(move || open.get(), move || view! { <div class="btns">{kinds()}</div> })}
    }
}

/// The link to where a check belongs.
pub fn link(place: Place) -> Route {
    match place {
        Place::Site => Route::Part(Subject::Place),
        Place::Part(id) => Route::Part(Subject::Part(id)),
        Place::Run(id) => Route::Part(Subject::Run(id)),
    }
}

/// What is opened by an id in the address.
pub fn subject_of(word: &str, run: bool) -> Option<Subject> {
    if word == "place" {
        return Some(Subject::Place);
    }
    // Digits only: no sign, no point.
    let id = word.bytes().try_fold(0_u32, |all, digit| {
        let digit = digit.checked_sub(b'0').filter(|digit| *digit < 10)?;
        all.checked_mul(10)?.checked_add(u32::from(digit))
    });
    let id = PartId(id.filter(|_| !word.is_empty())?);
    Some(if run { Subject::Run(id) } else { Subject::Part(id) })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::testing::plain;

    fn says(name: &str, id: &str) -> String {
        let site = bridge::demo::demo(name).unwrap();
        let found = engine::site::assess(&site);
        plain(&sentence(&site, found.checks.iter().find(|one| one.check.id.id() == id).unwrap()))
    }

    #[test]
    fn a_check_is_told_with_its_figures_and_one_that_counts_without() {
        let ridge = "Kestrel Ridge hut";
        assert_eq!(
            says(ridge, "string-cold-controller"),
            "Array: Cold string against the controller, 170.3 V, at most 150 V, 20.3 V past it."
        );
        assert_eq!(
            says("Two Rivers clinic", "breaker-poles"),
            "East roof to East controller: Breaker opens both directions. Rests on what is assumed: Breaker type."
        );
        assert_eq!(says(ridge, "neutral-bond"), "Inverter: One bond of the neutral, inverting: holds.");
    }
}
