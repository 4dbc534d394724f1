//! What if this opens? One breaker, fuse, protection or bond set open, until it is closed again. Never kept, never printed.

use crate::derived::{Memo, dynamic, memo};
use crate::piece::{IntoPiece, Piece, view};
use engine::quantity::Quantity;
use engine::show;
use engine::site::what_if::{Effect, Meaning, NotTold, Opens, Sun, openable, what_if as solve};
use engine::site::{Place, Site, place_name};
use leptos::prelude::*;

use crate::fold::fold;
use crate::form::names;
use crate::verdict::cost_mark;

/// The question, and its answer while one is open.
pub fn what_if(site: Memo<Option<Site>>) -> Piece {
    let open = RwSignal::new(None::<Opens>);
    let choices = move || {
        dynamic(move || site.with(|site| site.as_ref().map_or_else(|| Piece::Nothing, |site| list(site, open).piece())))
    };
    let answer = dynamic(move || {
        let (Some(opens), Some(site)) = (open.get(), site.get()) else { return Piece::Nothing };
        view! {
            <div class="whatif" role="status">
                <p><b>{format!("{} is open.", name(&site, opens))}</b></p>
                {told(&site, opens)}
                <div class="btns">
                    <button class="btn solid" type="button" on:click=move |_| open.set(None)>"Close it again"</button>
                </div>
            </div>
        }
    });
    view! {
        {answer}
        {fold("line/what-if", "What if this opens?", memo(|| "breaker, fuse, protection, bond".to_owned()), move || view! {             <div class="btns">{choices()}</div>
         })}
    }
}

fn name(site: &Site, opens: Opens) -> String {
    match opens {
        Opens::Run(id) => format!("Breaker of {}", place_name(site, Place::Run(id))),
        Opens::Packs(_) => "The packs’ own protection".to_owned(),
        Opens::Bond => "The bond of neutral and earth".to_owned(),
    }
}

fn list(site: &Site, open: RwSignal<Option<Opens>>) -> Vec<Piece> {
    let button = |opens: Opens| {
        view! {
            <button class="btn small" type="button" on:click=move |_| open.set(Some(opens))>{name(site, opens)}</button>
        }
    };
    openable(site).into_iter().map(button).collect()
}

fn told(site: &Site, opens: Opens) -> Piece {
    let scenes = if opens == Opens::Bond { vec![Sun::Full] } else { vec![Sun::Full, Sun::None] };
    let scenes: Vec<Piece> = scenes
        .into_iter()
        .map(|sun| {
            let head = match (opens, sun) {
                (Opens::Bond, _) => "",
                (_, Sun::Full) => "In full sun",
                (_, Sun::None) => "With no sun",
            };
            let body = match solve(site, opens, sun) {
                Ok(found) => effects(site, &found.effects),
                Err(NotTold::Missing(fields)) => {
                    let fields = fields.into_iter().fold(engine::check::FieldSet::default(), |mut all, field| {
                        all.insert(field);
                        all
                    });
                    view! { <p>{format!("Waits for {}.", names(fields))}</p> }
                }
                Err(_) => view! { <p>"No answer: the circuit cannot be solved."</p> },
            };
            view! { <p class="sub">{head}</p>{body} }
        })
        .collect();
    scenes.piece()
}

fn effects(site: &Site, effects: &[Effect]) -> Piece {
    let rows: Vec<Piece> = effects
        .iter()
        .filter(|one| one.meaning != Meaning::AsBefore)
        .map(|one| {
            let title = site.part(one.part).map_or("", engine::site::Part::title).to_owned();
            let cost = one.meaning.cost();
            view! {
                <li>
                    <b>{title}</b>
                    ": "
                    {words(one)}
                    " "
                    {cost.map(|cost| view! { {cost_mark(cost)} })}
                </li>
            }
        })
        .collect();
    if rows.is_empty() {
        return view! { <p>"Everything else goes on as before."</p> };
    }
    view! { <ul class="notes">{rows}</ul> }
}

/// What a part then sees, in words.
fn words(effect: &Effect) -> String {
    let volts = effect.volts.map(|volts| show::computed(volts.amount()));
    let stands = volts.unwrap_or_default();
    match effect.meaning {
        Meaning::AsBefore => "as before".to_owned(),
        Meaning::Dead => "dead".to_owned(),
        Meaning::Over { limit } => format!("{stands}, over the {} it survives", show::given(limit.amount())),
        Meaning::OverUnknown { missing } => format!("{stands}; enter {} to know whether it survives", missing.name()),
        Meaning::Under { limit } => format!("{stands}, under the {} it needs", show::given(limit.amount())),
        Meaning::StandsOpen if stands.is_empty() => "stands open, at its full volts".to_owned(),
        Meaning::StandsOpen => format!("stands open, up to {stands} in the cold"),
        Meaning::CaseLive => "a fault to a case opens no breaker: the case may stay live".to_owned(),
    }
}
