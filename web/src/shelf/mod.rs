//! The shelf: where each cell stands, which link goes where, and the meter after each.

mod drawing;
mod lists;
mod matching;
mod one_by_one;

use std::sync::Arc;

use engine::bank::Ask;
use engine::field::Field;
use engine::shelf::{Asked, BURNS, Lacks, Layout, asked, lay_out, usual};
use leptos::prelude::*;

use crate::cells::{TOOL, bank, short};
use crate::derived::{derived, dynamic, memo};
use crate::draft::use_draft;
use crate::fold::Fold;
use crate::form::{Form, Hints, fields_of, names};
use crate::settled::settled;

static FORM: Form = Form {
    tool: TOOL,
    title: ("", ""),
    first: &[
        Field::Rows,
        Field::Columns,
        Field::CellLength,
        Field::CellWidth,
        Field::Posts,
        Field::TakeOff,
        Field::LinkSize,
        Field::ParallelAs,
    ],
    groups: &[],
    short,
};

/// A layout, or what there is to say instead.
type Found = Result<Layout, String>;

/// The shelf, folded until it is wanted: a second step after the counts are chosen.
pub fn shelf_section() -> AnyView {
    view! {
        <Fold id="cells/shelf" title="The shelf" says=derived(|| "where each cell stands, which link goes where".to_owned())>
            {inside()}
        </Fold>
    }
    .into_any()
}

fn inside() -> AnyView {
    let draft = use_draft();
    let ask = bank();
    let found =
        memo(move || draft.with(|pads| ask.with(|ask| asked(&pads.of(TOOL), ask).map_err(|lacks| lacking(&lacks)))));
    let rested = settled(found);
    let layout: Memo<Found> = memo(move || rested.get().and_then(|asked| laid(&asked)));
    let none = Hints { stands_in: Arc::new(|_| None), waits: Arc::new(|_| None), note: Arc::new(move |_| None) };
    let at = RwSignal::new(None::<usize>);
    let body = dynamic(move || {
        layout.with(|found| match found {
            Err(why) => view! { <p class="ranked-say">{why.clone()}</p> }.into_any(),
            Ok(layout) => view! {
                {drawing::figure(layout)}
                {lists::remarks(layout)}
                <div class="caution" role="note"><b>"Caution"</b><p>{BURNS}</p></div>
                {one_by_one::one_by_one(layout, at)}
                {lists::lists(layout)}
            }
            .into_any(),
        })
    });
    view! {
        <div class="fields">{fields_of(&FORM, FORM.first, &none)}</div>
        {dynamic(move || ask.with(wise).into_any())}
        {body}
        {matching::matching()}
    }
    .into_any()
}

fn lacking(lacks: &Lacks) -> String {
    match lacks {
        Lacks::Fields(fields) => format!("Waits for {}.", names(*fields)),
        Lacks::Refused(why) => format!("No layout: {why}."),
    }
}

fn laid(asked: &Asked) -> Found {
    lay_out(&asked.shelf, &asked.wiring, asked.volts, asked.wish).map_err(|why| format!("No layout: {why}."))
}

/// What whole strings and groups mean, and which is wise for these cells. Said where there are several side by side.
fn wise(ask: &Ask) -> Option<AnyView> {
    let ask = engine::bank::settled(ask);
    let (made_of, strings) = (ask.chemistry.typed()?, ask.strings.typed()?);
    if strings.get() < 2.0 {
        return None;
    }
    let packs = ask.guards_itself() == Some(true);
    let way = usual(made_of, packs);
    let family = match (made_of.family(), packs) {
        (_, true) => engine::shelf::Family::ProtectedPack,
        (engine::chemistry::Family::Lead, _) => engine::shelf::Family::Lead,
        (engine::chemistry::Family::Nickel, _) => engine::shelf::Family::Nickel,
        (engine::chemistry::Family::Lithium, _) => engine::shelf::Family::BareLithium,
    };
    let advice = engine::shelf::advice(family);
    Some(view! { <p class="ranked-say">{advice.why} " " {way.meaning()}</p> }.into_any())
}
