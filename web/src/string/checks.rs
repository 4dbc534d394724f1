//! The checks of the String tool, worst first.

use crate::derived::Memo;
use crate::piece::Piece;
use engine::check::Check;
use engine::field::Field;
use engine::string::{Requirement, working};
use leptos::prelude::*;

use super::answer::note;
use super::fields::FORM;
use super::question::Question;
use crate::check_row::check_row;
use crate::fold::Folds;
use crate::tool_page::check_list;

/// Every check of the string, the one on top among them.
pub fn checks(question: Memo<Question>, checks: Memo<Vec<Check<Requirement>>>) -> Piece {
    let folds = expect_context::<Folds>();
    let go = Callback::new(move |field: Field| FORM.go_to(folds, field));
    let rows = move || {
        question.with(|question| {
            checks.with(|checks| {
                let row = |check: &Check<Requirement>| {
                    let id = format!("string/{}", check.id.id());
                    let note = note(&question.ask, check.id);
                    check_row(id, check.id.name(), check, note, || working(&question.ask, check.id), go)
                };
                checks.iter().map(row).collect::<Vec<Piece>>()
            })
        })
    };
    check_list(rows)
}
