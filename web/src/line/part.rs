//! A part of the open site: the tool that asks about it, or its own figures; its checks; and what can be done with it.

use std::sync::Arc;

use crate::derived::{Memo, dynamic, memo};
use crate::piece::{Piece, view};
use engine::field::Field;
use engine::site::{PartId, PartKind, Place, Site, Subject, place_name, working};
use leptos::prelude::*;

use super::assessed;
use crate::check_row::check_row;
use crate::draft::use_draft;
use crate::field::StandIn;
use crate::form::{Form, Hints, fields_of};
use crate::pads::{Edit, SiteEdit};
use crate::route::Route;
use crate::settled::settled;
use crate::tool_page::{caution, check_list};
use crate::tools::Tool;

const fn form(tool: Tool, first: &'static [Field]) -> Form {
    Form { tool, title: ("", ""), first, groups: &[], short: Field::name }
}

// What takes the whole width stands last, so that no half row is left empty.
static PLACE: Form = form(
    Tool::Run,
    &[
        Field::CodeFamily,
        Field::RecordLow,
        Field::RecordHigh,
        Field::Height,
        Field::ColdestInTheRoom,
        Field::WarmestInTheRoom,
        Field::WetRoom,
        Field::AirOpening,
        Field::UsedADay,
        Field::GroundFault,
        Field::StandsOn,
        Field::SleepingRoom,
        Field::Earthing,
        Field::FramesBonded,
        Field::Arresters,
    ],
);
static CONTROLLER: Form = form(
    Tool::String,
    &[
        Field::ControllerKind,
        Field::InputLimit,
        Field::WindowLow,
        Field::WindowHigh,
        Field::PvCurrentLimit,
        Field::LimitHoldsFactor,
        Field::OutputCurrent,
        Field::ControllerOutputLimit,
        Field::HighestCharge,
        Field::RunningHeadroom,
        Field::StartingHeadroom,
    ],
);
static INVERTER: Form = form(
    Tool::Start,
    &[
        Field::InverterContinuous,
        Field::InverterSurge,
        Field::SurgeSeconds,
        Field::InverterLow,
        Field::InverterHigh,
        Field::InverterEfficiency,
        Field::AcVolts,
        Field::InverterAir,
        Field::InverterBond,
    ],
);
static OTHER_SOURCE: Form = form(
    Tool::String,
    &[Field::SourcePower, Field::OverspeedVolts, Field::DumpLoad, Field::InputLimit, Field::Isolator],
);
static GENERATOR: Form = form(
    Tool::Start,
    &[Field::GeneratorRating, Field::ChargerDraw, Field::GeneratorBond, Field::NeutralSwitched, Field::Isolator],
);
static AC_PANEL: Form =
    form(Tool::Run, &[Field::PanelBond, Field::PanelLegs, Field::Multiwire, Field::GridFeeds, Field::TransferSwitch]);
static DC_PANEL: Form = form(Tool::Cells, &[Field::LoadsLow, Field::LoadsHigh]);
static NOTHING: Form = form(Tool::Run, &[]);
static ISOLATOR: Form = form(Tool::Run, &[Field::Isolator]);

const CAUTIONS: &[&str] = &[
    "Before a part is opened: array covered or its isolator open, bank breaker open and locked, proved dead with a meter. \
     Bank before array when switching on; array before bank when switching off.",
];

/// The page of a part, a run, or the place.
pub fn part_page(subject: Subject, site: Memo<Option<Site>>) -> Piece {
    let kind = site.with_untracked(|site| site.as_ref().and_then(|site| kind(site, subject)));
    let there = matches!(subject, Subject::Place) || kind.is_some();
    if !there {
        return view! {
            <div class="page-head">
                <h1 tabindex="-1">"No such part"</h1>
                <a class="aside" href=Route::Line.href()>"Line"</a>
            </div>
        };
    }
    let tool = match (subject, kind) {
        (Subject::Run(_), _) => Some(Tool::Run),
        (Subject::Part(_), Some(PartKind::Array)) => Some(Tool::String),
        (Subject::Part(_), Some(PartKind::Bank)) => Some(Tool::Cells),
        (Subject::Part(_), Some(PartKind::Load)) => Some(Tool::Start),
        _ => None,
    };
    let own: &'static Form = match (subject, kind) {
        (Subject::Place, _) => &PLACE,
        (Subject::Run(_), _) => &NOTHING,
        (_, Some(PartKind::Controller)) => &CONTROLLER,
        (_, Some(PartKind::Inverter)) => &INVERTER,
        (_, Some(PartKind::OtherSource)) => &OTHER_SOURCE,
        (_, Some(PartKind::Generator)) => &GENERATOR,
        (_, Some(PartKind::AcPanel)) => &AC_PANEL,
        (_, Some(PartKind::DcPanel)) => &DC_PANEL,
        (_, Some(PartKind::Array | PartKind::Bank)) => &ISOLATOR,
        _ => &NOTHING,
    };
    let hints = Hints {
        stands_in: Arc::new(|field| engine::assumed::of(field).map(|one| StandIn::of(&one))),
        waits: Arc::new(|_| None),
        note: Arc::new(|_| None),
    };
    let fields = fields_of(own, own.first, &hints);
    let inside = match tool {
        Some(tool) => view! {
            {tool.page()}
            {(!fields.is_empty()).then(|| view! { <div class="fields">{fields}</div> })}
        },
        None => view! {
            <div class="page-head">
                <h1 tabindex="-1">{move || title(site, subject)}</h1>
                <a class="aside" href=Route::Line.href()>"Line"</a>
            </div>
            <div class="fields">{fields}</div>
        },
    };
    let checks = (tool.is_none() || !own.first.is_empty()).then(|| checks(subject, site, tool.is_some()));
    view! {
        {inside}
        {checks}
        {acts(subject)}
        {tool.is_none().then(|| caution(CAUTIONS))}
    }
}

fn kind(site: &Site, subject: Subject) -> Option<PartKind> {
    match subject {
        Subject::Place => None,
        Subject::Part(id) | Subject::Run(id) => site.part(id).map(|part| part.kind),
    }
}

/// What a part, a run or the place is called.
pub fn title(site: Memo<Option<Site>>, subject: Subject) -> String {
    site.with(|site| site.as_ref().map(|site| place_name(site, place(subject)))).map_or_else(String::new, |name| {
        if subject == Subject::Place { "Place, code and earthing".to_owned() } else { name }
    })
}

const fn place(subject: Subject) -> Place {
    match subject {
        Subject::Place => Place::Site,
        Subject::Part(id) => Place::Part(id),
        Subject::Run(id) => Place::Run(id),
    }
}

/// The checks at one place: all of them, or those that its tool does not show.
fn checks(subject: Subject, site: Memo<Option<Site>>, of_site_only: bool) -> Piece {
    let site = settled(site);
    let found = assessed(site);
    let nowhere = Callback::new(|_: Field| ());
    let at = place(subject);
    check_list(move || {
        site.with(|site| {
            let Some(site) = site else { return Vec::new() };
            found.with(|found| {
                found
                    .checks
                    .iter()
                    .filter(|one| one.place == at)
                    .filter(|one| !of_site_only || matches!(one.check.id, engine::site::CheckId::Site(_)))
                    .map(|one| {
                        let id = format!("part/{}", one.check.id.id());
                        let steps = || working(site, one.place, one.check.id);
                        check_row(id, one.check.id.name(), &one.check, None, steps, nowhere)
                    })
                    .collect()
            })
        })
    })
}

/// Name, double, remove.
fn acts(subject: Subject) -> Piece {
    let Subject::Part(id) = subject else { return Piece::Nothing };
    let draft = use_draft();
    let name = memo(move || {
        draft.with(|pads| {
            let part = pads.site().and_then(|open| open.site.part(id));
            part.map(|part| part.name.clone()).unwrap_or_default()
        })
    });
    view! {
        <div class="acts">
            <label>
                "Called"
                <input
                    type="text"
                    autocomplete="off"
                    aria-label="Name of the part"
                    prop:value=name
                    on:input=move |event| draft.edit(Edit::Site(SiteEdit::Name(Some(id), event_target_value(&event))))
                    on:blur=move |_| draft.leave()
                />
            </label>
            {dynamic(move || joins(id))}
            <div class="btns">
                <button class="btn small" type="button" on:click=move |_| draft.edit(Edit::Site(SiteEdit::Duplicate(id)))>
                    "One more like it"
                </button>
                <button
                    class="btn small plain"
                    type="button"
                    on:click=move |_| {
                        draft.edit(Edit::Site(SiteEdit::Remove(id)));
                        crate::route::go(Route::Line);
                    }
                >
                    "Remove it"
                </button>
            </div>
        </div>
    }
}

/// What it is joined to, where there is a choice.
fn joins(id: PartId) -> Piece {
    let draft = use_draft();
    let choices = draft.with(|pads| {
        let site = &pads.site()?.site;
        let part = site.part(id)?;
        let kinds = part.kind.kind().joins;
        let all: Vec<(PartId, String, bool)> = site
            .parts
            .iter()
            .filter(|other| kinds.contains(&other.kind) && other.id != id)
            .map(|other| (other.id, other.title().to_owned(), part.to == Some(other.id)))
            .collect();
        (all.len() > 1 || all.iter().any(|one| !one.2)).then_some(all)
    });
    let Some(choices) = choices else { return Piece::Nothing };
    let buttons: Vec<Piece> = choices
        .into_iter()
        .map(|(to, name, now)| {
            view! {
                <button
                    class="btn small"
                    type="button"
                    aria-pressed=now.to_string()
                    on:click=move |_| draft.edit(Edit::Site(SiteEdit::Join(id, Some(to))))
                >
                    {name}
                </button>
            }
        })
        .collect();
    view! { <p class="sub">"Joined to"</p><div class="btns">{buttons}</div> }
}
