//! The String tool: how many modules in series, and what else holds.

mod answer;
mod checks;
mod fields;
mod layouts;
mod question;

use crate::derived::{derived, memo, when};
use engine::field::Field;
use leptos::prelude::*;

use answer::Answer;
use checks::Checks;
use fields::Fields;
use layouts::LayoutList;
use question::Question;

use crate::caution::Caution;
use crate::draft::use_draft;
use crate::fold::Fold;
use crate::pads::{Edit, Typed};
use crate::route::Route;
use crate::span_bar::{slim_bar, span_bar};
use crate::tools::Tool;
use crate::verdict::{CostMark, VerdictMark, tells_cost};
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
                <AnswerView answer=answer/>
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
                <Ride answer=answer/>
                <Fields checks=checks/>
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

/// The question a moment after it last changed. The answer is painted at once; what else hangs on it may follow.
fn settled(question: Memo<Question>) -> ReadSignal<Question> {
    let (settled, settle) = signal(question.get_untracked());
    let timer = StoredValue::new(None::<leptos::leptos_dom::helpers::TimeoutHandle>);
    let stop = move || {
        if let Some(earlier) = timer.try_update_value(Option::take).flatten() {
            earlier.clear();
        }
    };
    Effect::new(move |before: Option<()>| {
        let now = question.get();
        stop();
        if before.is_some() {
            let soon = std::time::Duration::from_millis(30);
            timer.set_value(set_timeout_with_handle(move || settle.set(now.clone()), soon).ok());
        }
    });
    on_cleanup(stop);
    settled
}

/// The number, its verdict, and what it means. The one region of the page with the role of a status.
#[component]
fn AnswerView(answer: Memo<Option<Answer>>) -> impl IntoView {
    let words = move || {
        answer.get().map(|answer| {
            let Answer { of, number, check, says, rests, longest, besides, .. } = answer;
            view! {
                <p class="answer-for">{of}</p>
                <div class="answer-row">
                    <p class="answer-num">{volts(number)}</p>
                    <p class="answer-tags">
                        <VerdictMark verdict=check.verdict big=true/>
                        {tells_cost(check.verdict).then(|| view! { <CostMark cost=check.cost/> })}
                    </p>
                </div>
                <p class="answer-say">{says}</p>
                <p class="answer-most">{longest}</p>
                {rests.map(|rests| view! { <p class="answer-note">{rests}</p> })}
                {besides.map(|besides| view! { <p class="answer-besides">{besides}</p> })}
            }
            .into_any()
        })
    };
    let bar = move || answer.with(|answer| answer.as_ref().map(|answer| span_bar(answer.bar.clone())));
    view! {
        <section class="answer" aria-label="Answer">
            // A reader is told by the line below, once typing rests: not by every keystroke.
            <div role="status" aria-live="off">{words}</div>
            {bar}
            <Confirm answer=answer/>
            <Told answer=answer/>
        </section>
    }
}

/// The number with its unit set smaller; a dash has none.
fn volts(number: String) -> AnyView {
    let unit = (number != engine::show::NONE).then(|| view! { <small>" V"</small> });
    view! { {number}{unit} }.into_any()
}

/// What a screen reader says once typing has rested.
#[component]
fn Told(answer: Memo<Option<Answer>>) -> impl IntoView {
    let said = RwSignal::new(String::new());
    let waiting = StoredValue::new(None::<leptos::leptos_dom::helpers::TimeoutHandle>);
    let stop = move || {
        if let Some(timer) = waiting.try_update_value(Option::take).flatten() {
            timer.clear();
        }
    };
    on_cleanup(stop);
    Effect::new(move |before: Option<Option<String>>| {
        let now = answer.with(|answer| answer.as_ref().map(Answer::told));
        if let Some(before) = before
            && before != now
            && let Some(words) = now.clone()
        {
            stop();
            let rest = std::time::Duration::from_millis(600);
            waiting.set_value(set_timeout_with_handle(move || said.set(words.clone()), rest).ok());
        }
        now
    });
    view! { <p class="vh" aria-live="polite">{said}</p> }
}

/// One tap turns what was assumed into what is entered.
#[component]
fn Confirm(answer: Memo<Option<Answer>>) -> impl IntoView {
    let draft = use_draft();
    let rests = memo(move || answer.with(|answer| answer.as_ref().is_some_and(Answer::rests_on_tolerance)));
    let confirm = move |_| {
        let typed = Typed { text: engine::assumed::VOC_TOLERANCE.get().to_string(), unit: None };
        draft.edit(Edit::Fill(vec![((TOOL, Field::VocTolerance), typed)]));
    };
    view! {
        {when(move || rests.get(), move || view! { <div class="btns">
                <button class="btn small" type="button" on:click=confirm>"The nameplate says +3 %"</button>
            </div> }.into_any())}
    }
}

/// The answer once more, at the top of the screen, once the answer itself has been scrolled out of it.
#[component]
fn Ride(answer: Memo<Option<Answer>>) -> impl IntoView {
    let away = RwSignal::new(false);
    let look = move |_: ()| away.set(answer_is_away());
    let scrolled = window_event_listener_untyped("scroll", move |_| look(()));
    let resized = window_event_listener_untyped("resize", move |_| look(()));
    on_cleanup(move || {
        scrolled.remove();
        resized.remove();
    });
    let shown = move || {
        answer.get().map(|answer| {
            let Answer { number, check, bar, .. } = answer;
            view! {
                <span class="num">{volts(number)}</span>
                <VerdictMark verdict=check.verdict/>
                {tells_cost(check.verdict).then(|| view! { <CostMark cost=check.cost/> })}
                {slim_bar(bar)}
            }
            .into_any()
        })
    };
    view! { <div class="ride" aria-hidden="true" hidden=move || !away.get()>{shown}</div> }
}

/// Whether the verdict on top has left the screen.
fn answer_is_away() -> bool {
    let row = document().query_selector(".answer-row").ok().flatten();
    row.is_some_and(|row| row.get_bounding_client_rect().bottom() < 0.0)
}
