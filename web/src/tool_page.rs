//! The page of a tool: the answer first, then its working, its inputs, its checks, and what else there is.

use engine::check::Step;
use std::rc::Rc;

use crate::answer::{Answer, answer_view, ride};
use crate::caution;
use crate::derived::{Memo, dynamic, memo, when};
use crate::fold::marked_fold;
use crate::form::{Form, Hints, form};
use crate::piece::{IntoPiece, Piece, view};
use crate::route::Route;
use crate::working;

/// What stands on the page of a tool.
pub struct ToolPage {
    /// Its inputs.
    pub form: &'static Form,
    /// The answer.
    pub answer: Memo<Option<Answer>>,
    /// The steps to the number on top, made when they are unfolded.
    pub working: Box<dyn Fn() -> Vec<Step> + Send + Sync>,
    /// What is said beside the inputs.
    pub hints: Hints,
    /// What stands right of the answer before the inputs, if anything.
    pub before: Vec<Piece>,
    /// What follows the inputs: checks, layouts, lists.
    pub after: Vec<Piece>,
    /// What can hurt, each a paragraph.
    pub cautions: &'static [&'static str],
}

/// Said under every caution.
const LOCAL_CODE: &str = "Local code and a licensed electrician rule; this page decides nothing for them.";

/// The page of a tool.
pub fn tool_page(page: ToolPage) -> Piece {
    let ToolPage { form: inputs, answer, working, hints, before, after, cautions } = page;
    let steps = Rc::new(working);
    view! {
        <div class="tool">
            <div class="page-head">
                {head(inputs.tool.name())}
            </div>
            <div class="tool-left">
                {answer_view(answer)}
                {marked_fold(
                    Some("i-work"),
                    format!("{}/working", inputs.tool.key()),
                    "Working",
                    memo(|| "how this number is made".to_owned()),
                    Rc::new(move || {
                        let steps = Rc::clone(&steps);
                        dynamic(move || working::list(steps()))
                    }),
                )}
                {before}
                {put_on_the_line(inputs.tool)}
            </div>
            <div class="tool-right">
                {ride(answer)}
                {form(inputs, &hints)}
                {after}
                {caution(cautions)}
            </div>
        </div>
    }
}

/// Carries what was typed into the open site, where one is open and the tool stands by itself.
fn put_on_the_line(tool: crate::tools::Tool) -> Piece {
    let draft = crate::draft::use_draft();
    let can =
        move || tool.asks_about().is_some() && draft.with(|pads| pads.site().is_some() && pads.subject().is_none());
    let put = move |_| {
        draft.edit(crate::pads::Edit::Site(crate::pads::SiteEdit::Put(tool)));
        crate::route::go(Route::Line);
    };
    when(can, move || {
        view! {
            <div class="btns"><button class="btn" type="button" on:click=put>"Put on the line"</button></div>
        }
    })
}

/// The name of the tool and the way back; of the part, where one is looked at.
fn head(name: &'static str) -> Piece {
    let draft = crate::draft::use_draft();
    match draft.with_now(crate::pads::Pads::subject) {
        None => view! {
            <h1 tabindex="-1">{name}</h1>
            <a class="aside" href=Route::Tools.href()>"All tools"</a>
        },
        Some(subject) => {
            let site = crate::line::open_site();
            view! {
                <h1 tabindex="-1">{move || crate::line::title(site, subject)}</h1>
                <a class="aside" href=Route::Line.href()>"Line"</a>
            }
        }
    }
}

/// What can hurt, and who rules.
pub fn caution(cautions: &'static [&'static str]) -> Piece {
    let lines: Vec<Piece> = cautions.iter().map(|line| view! { <p>{*line}</p> }).collect();
    view! {
        {caution::caution(view! {
            {lines}
            <p>{LOCAL_CODE}</p>
        })}
    }
}

/// A list of checks under its head, made again at each change of what `rows` reads.
pub fn check_list(rows: impl Fn() -> Vec<Piece> + Send + Sync + 'static) -> Piece {
    let rows = dynamic(move || rows().piece());
    view! {
        <h2 class="sub">"Checks" <span>"worst first"</span></h2>
        <ol class="checks">{rows}</ol>
    }
}

/// A section that is there while `holds` does.
pub fn section(
    title: &'static str,
    says: &'static str,
    holds: impl Fn() -> bool + Send + Sync + 'static,
    body: impl Fn() -> Piece + Clone + Send + Sync + 'static,
) -> Piece {
    when(holds, move || {
        let body = body.clone();
        view! {
            <section aria-label=title>
                <h2 class="sub">{title} " " <span>{says}</span></h2>
                {dynamic(body)}
            </section>
        }
    })
}

/// A list of names and figures.
pub fn figures(rows: Vec<(String, String)>) -> Piece {
    let rows: Vec<Piece> =
        rows.into_iter().map(|(name, figure)| view! { <div><dt>{name}</dt><dd>{figure}</dd></div> }).collect();
    view! { <dl class="figures">{rows}</dl> }
}
