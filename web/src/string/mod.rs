//! The String tool: how many modules in series, and what else holds.

mod answer;
mod checks;
mod fields;
mod layouts;
mod question;

use crate::derived::memo;
use crate::piece::Piece;

use question::Question;

use crate::draft::use_draft;
use crate::settled::settled;
use crate::tool_page::{ToolPage, tool_page};
use crate::tools::Tool;

const TOOL: Tool = Tool::String;

const CAUTIONS: &[&str] = &[
    "A string is live in any light. Cover or darken the array before you touch its terminals. Above 60 V d.c. (30 V wet) it \
     shocks, and its arc does not go out. Use a meter and leads rated for the string’s cold volts.",
];

/// The String tool.
pub fn string_tool() -> Piece {
    let draft = use_draft();
    // Read once for each change; whatever hangs on it is told only where it differs.
    let question = memo(move || draft.with(Question::read));
    let answer = memo(move || {
        draft.with(|pads| question.with(|question| answer::answer(&pads.of(TOOL), &question.ask, &question.checks())))
    });
    let settled = settled(question);
    let checks = memo(move || settled.with(Question::checks));
    tool_page(ToolPage {
        form: &fields::FORM,
        answer,
        working: Box::new(move || {
            question
                .with(|question| engine::string::working(&question.ask, engine::string::Requirement::ColdController))
        }),
        hints: fields::hints(checks),
        before: Vec::new(),
        after: vec![fields::other_controllers(), checks::checks(settled, checks), layouts::layout_list(settled)],
        cautions: CAUTIONS,
    })
}
