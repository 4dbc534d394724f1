//! The String tool: how many modules in series, and what else holds.

mod answer;
mod checks;
mod fields;
mod layouts;
mod question;

use crate::derived::{derived, memo};
use leptos::prelude::*;

use checks::Checks;
use layouts::LayoutList;
use question::Question;

use crate::answer::{answer_view, ride};
use crate::caution::Caution;
use crate::draft::use_draft;
use crate::fold::Fold;
use crate::route::Route;
use crate::settled::settled;
use crate::tools::Tool;
use crate::working::Working;

const TOOL: Tool = Tool::String;

/// The String tool.
#[component]
pub fn StringTool() -> impl IntoView {
    let draft = use_draft();
    // Read once for each change; whatever hangs on it is told only where it differs.
    let question = memo(move || draft.with(Question::read));
    let answer = memo(move || {
        draft.with(|pads| question.with(|question| answer::answer(&pads.of(TOOL), &question.ask, &question.checks())))
    });
    let settled = settled(question);
    let checks = memo(move || settled.with(Question::checks));
    view! {
        <div class="tool">
            <div class="page-head">
                <h1 tabindex="-1">"String"</h1>
                <a class="aside" href=Route::Tools.href()>"All tools"</a>
            </div>
            <div class="tool-left">
                {answer_view(answer)}
                <Fold
                    id="string/working"
                    title="Working"
                    icon="i-work"
                    says=derived(|| "how this number is made".to_owned())
                >
                    {move || {
                        let steps = question
                            .with(|question| engine::string::working(&question.ask, engine::string::Requirement::ColdController));
                        view! { <Working steps=steps/> }
                    }}
                </Fold>
            </div>
            <div class="tool-right">
                {ride(answer)}
                {fields::fields(checks)}
                <Checks question=settled checks=checks/>
                <LayoutList question=settled/>
                <Caution>
                    <p>
                        "A string is live in any light. Cover or darken the array before you touch its terminals. "
                        "Above 60 V d.c. (30 V wet) it shocks, and its arc does not go out. Use a meter and leads \
                         rated for the string’s cold volts."
                    </p>
                    <p>"Local code and a licensed electrician rule; this page decides nothing for them."</p>
                </Caution>
            </div>
        </div>
    }
}
