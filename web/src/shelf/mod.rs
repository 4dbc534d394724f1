//! The shelf: where each cell stands, which link goes where, and the meter after each.

mod board;
mod drawing;
mod lists;
mod matching;
mod one_by_one;
mod picture;

use std::sync::Arc;
use std::time::Duration;

use crate::derived::{dynamic, memo, when};
use crate::piece::{IntoPiece, Piece, view};
use engine::bank::{Ask, settled as with_counts};
use engine::field::Field;
use engine::shelf::{Asked, Family, Lacks, Layout, Parallel, Step, advice, asked, assumption, lay_out, steps};
use leptos::prelude::*;

use crate::cells::{TOOL, bank, short};
use crate::draft::use_draft;
use crate::field::StandIn;
use crate::fold::fold;
use crate::form::{Form, Hints, fields_of, names};
use crate::settled::rested;

static FORM: Form = Form {
    tool: TOOL,
    title: ("", ""),
    first: &[Field::CellLength, Field::CellWidth, Field::Rows, Field::Columns, Field::Posts, Field::TakeOffPosts],
    groups: &[],
    short,
};

/// What lengths and bands hang on, with something to stand in for each.
const MORE: &[Field] =
    &[Field::PostInset, Field::CellGap, Field::RowGap, Field::CellsStand, Field::CellNow, Field::LinkSize];

/// How long the inputs rest before the shelf is laid out anew: a search of up to half a second.
const REST: Duration = Duration::from_millis(250);

/// A bank on its shelf, and how it is put together.
#[derive(Debug)]
pub struct Laid {
    asked: Asked,
    layout: Layout,
    steps: Vec<Step>,
}

/// The shelf, folded until it is wanted: a second step after the counts are chosen.
pub fn shelf_section() -> Piece {
    view! {
        {fold("cells/shelf", "The shelf", memo(|| "where each cell stands, which link goes where".to_owned()), move || view! {             {inside()}
         })}
    }
}

fn inside() -> Piece {
    let draft = use_draft();
    let ask = bank();
    let found = memo(move || draft.with(|pads| ask.with(|ask| asked(&pads.of(TOOL), ask))));
    let calm = rested(found, REST);
    let stands_in = move |field| {
        draft.with(|pads| ask.with(|ask| assumption(&pads.of(TOOL), ask, field))).map(|stands| StandIn::of(&stands))
    };
    let waits = move |field| {
        let lacks = |found: &Result<Asked, Lacks>| matches!(found, Err(Lacks::Fields(all)) if all.contains(field));
        found.with(lacks).then(|| "the layout waits for this".to_owned())
    };
    let hints = Hints { stands_in: Arc::new(stands_in), waits: Arc::new(waits), note: Arc::new(|_| None) };
    let (beside, more) = (hints.clone(), hints.clone());
    // Which step is open outlives the layout, which is made anew with each figure of the shelf.
    let at = RwSignal::new(None::<usize>);
    let body = dynamic(move || match calm.with(laid) {
        Err(why) => view! { <p class="ranked-say">{why}</p> },
        Ok(laid) => view! {
            {picture::figure(&laid.asked.shelf, &laid.layout)}
            {lists::caution(&laid.layout)}
            {lists::remarks(&laid.layout)}
            {one_by_one::one_by_one(laid.clone(), at)}
            {lists::lists(laid.clone())}
        },
    });
    view! {
        <div class="fields">{fields_of(&FORM, FORM.first, &hints)}</div>
        {when(
            move || ask.with(|ask| with_counts(ask).strings.typed().is_some_and(|strings| strings.get() > 1.0)),
            move || view! {
                <div class="fields">{fields_of(&FORM, &[Field::ParallelAs], &beside)}</div>
                {dynamic(move || {
                    let way = found.with(|found| found.as_ref().ok().map(|asked| asked.wiring.parallel()));
                    ask.with(|ask| wise(ask, way)).piece()
                })}
            },
        )}
        {fold("cells/shelf-more", "Gaps and posts", memo(|| "links are cut by them".to_owned()), move || view! {             <div class="fields">{fields_of(&FORM, MORE, &more)}</div>
         })}
        {body}
        {matching::matching()}
    }
}

fn laid(found: &Result<Asked, Lacks>) -> Result<Arc<Laid>, String> {
    match found {
        Err(Lacks::Fields(fields)) => Err(format!("Waits for {}.", names(*fields))),
        Err(Lacks::Refused(why)) => Err(format!("No layout: {why}.")),
        Ok(asked) => {
            let layout = lay_out(&asked.shelf, &asked.wiring, asked.volts, asked.wish)
                .map_err(|why| format!("No layout: {why}."))?;
            let steps = steps(&layout);
            Ok(Arc::new(Laid { asked: *asked, layout, steps }))
        }
    }
}

/// What the way taken means, and which is wise for these cells.
fn wise(ask: &Ask, way: Option<Parallel>) -> Option<Piece> {
    let advice = advice(Family::of(ask.chemistry.typed()?, ask.guards_itself() == Some(true)));
    let word = |way| match way {
        Parallel::SeparateStrings => "Whole strings",
        Parallel::Groups => "Groups of cells",
    };
    let way = way.unwrap_or(advice.wise);
    let against = (way != advice.wise).then(|| format!(" {} are wiser here.", word(advice.wise)));
    Some(view! { <p class="ranked-say"><b>{word(way)} ": "</b>{way.meaning()} " " {advice.why} {against}</p> })
}
