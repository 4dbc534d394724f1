//! What stands around every view: the top line, the notices and the bottom bar.

use crate::derived::{Memo, memo, when};
use crate::piece::{Piece, view};
use leptos::ev::{self, KeyboardEvent};
use leptos::prelude::*;
use wasm_bindgen_futures::spawn_local;

use crate::code::{Arriving, arriving};
use crate::draft::{Draft, use_draft};
use crate::first_visit::first_visit;
use crate::fold::Folds;
use crate::icon::icon;
use crate::keep::Keeping;
use crate::notice::{notice, telling};
use crate::offline::{self, Copy};
use crate::pads::{Edit, What};
use crate::route::{self, Route};
use crate::sheet::sheet;

/// The page.
pub fn shell(draft: Draft) -> Piece {
    draft.provide();
    provide_context(Folds::new());
    let offline = offline::provide();
    let landing = crate::dropped::watch(draft);
    let route = route::follow();
    let keys = window_event_listener(ev::keydown, move |event| undo_keys(draft, &event));
    on_cleanup(move || keys.remove());
    let refused = RwSignal::new(false);
    let coming = Arriving::new(draft);
    Effect::new(move |_| {
        if route.get() == Route::Piece {
            let hash = window().location().hash().unwrap_or_default();
            let piece = hash.split_once("piece/").map_or("", |(_, piece)| piece).to_owned();
            spawn_local(coming.take(piece));
        }
    });
    Effect::new(move |_| {
        if route.get() == Route::Link {
            let hash = window().location().hash().unwrap_or_default();
            let letters = hash.rsplit('/').next().unwrap_or_default().to_owned();
            refused.set(!crate::sheet::open_link(draft, &letters));
            route::go(Route::Line);
        }
    });
    Effect::new(move |_| {
        if let Some((_, key)) = draft.keeper().moved().get() {
            draft.moved(key);
        }
    });
    // What is looked at is known before anything of the view is made.
    let followed = route;
    let route = memo(move || {
        let now = followed.get();
        draft.look_at(now.subject());
        now
    });
    arrive(route);
    let view = move || match route.get() {
        Route::Line | Route::Link => crate::line::line_view(None),
        Route::Part(subject) => crate::line::line_view(Some(subject)),
        Route::Checks => crate::checks_view::checks_view(),
        Route::Tools => first_visit(),
        Route::Tool(tool) => tool.page(),
        Route::Piece => arriving(coming),
        Route::Sheet => sheet(),
    };
    view! {
        {top(route)}
        {landing}
        <main>{view}</main>
        {notices(offline.update_ready, refused)}
        {bottom_bar(route)}
    }
}

/// Going to a view sets its title, and puts the reader at its head; the first one is left as the browser opened it.
fn arrive(route: Memo<Route>) {
    Effect::new(move |before: Option<Route>| {
        let now = route.get();
        document().set_title(&now.title());
        if before.is_some_and(|before| before != now) {
            request_animation_frame(|| {
                window().scroll_to_with_x_and_y(0.0, 0.0);
                use wasm_bindgen::JsCast;
                let head = document().query_selector("main h1").ok().flatten();
                if let Some(head) = head.and_then(|head| head.dyn_into::<web_sys::HtmlElement>().ok()) {
                    // Where it cannot be focused the reader is at the top all the same.
                    let _ = head.focus();
                }
            });
        }
        now
    });
}

fn undo_keys(draft: Draft, event: &KeyboardEvent) {
    if !(event.ctrl_key() || event.meta_key()) || event.alt_key() {
        return;
    }
    let edit = match (event.key().as_str(), event.shift_key()) {
        ("z", false) => Edit::Undo,
        ("Z" | "z", true) | ("y", false) => Edit::Redo,
        _ => return,
    };
    event.prevent_default();
    draft.edit(edit);
}

fn top(route: Memo<Route>) -> Piece {
    let home = move || route.get() == Route::Tools;
    view! {
        <header class="top">
            {icon("mark", "top-mark")}
            <div class="top-name">
                <p class="h1">
                    {move || {
                        if home() {
                            view! { "Linehut" }
                        } else {
                            view! { <a href=Route::Tools.href()>"Linehut"</a> }
                        }
                    }}
                </p>
                {kept_badge()}
            </div>
            {undo_buttons()}
            {light_button()}
        </header>
    }
}

/// Whether what was typed is kept, and whether the page works with no signal.
fn kept_badge() -> Piece {
    let keeper = use_draft().keeper();
    let badge = memo(move || badge(keeper.state(), keeper.lasting(), offline::copy()));
    view! {
        <div class="kept" data-state=move || badge.get().state data-copy=move || offline::copy().name() aria-live="polite">
            {icon("i-kept", "")}
            {move || {
                let Badge { words, leads, .. } = badge.get();
                if leads {
                    view! { <a href=Route::Sheet.href()>{words}</a> }
                } else {
                    view! { <span>{words}</span> }
                }
            }}
        </div>
    }
}

#[derive(Clone, Debug, PartialEq, Eq)]
struct Badge {
    state: &'static str,
    words: String,
    /// Whether it leads to where the file is saved.
    leads: bool,
}

fn badge(keeping: Keeping, lasting: Option<bool>, copy: Copy) -> Badge {
    let (state, words, leads) = match (keeping, copy) {
        (Keeping::Not(_), _) => ("not-yet", "not kept on this phone: save the file".to_owned(), true),
        (Keeping::Waiting, _) => ("keeping", "looking for what was kept here".to_owned(), false),
        (Keeping::Busy, _) => ("keeping", "keeping what you typed".to_owned(), false),
        (Keeping::Kept, Copy::Keeping { done, of }) => {
            ("keeping", format!("keeping a copy for no signal, {done} of {of}"), false)
        }
        (Keeping::Kept, Copy::NotYet) => {
            ("not-yet", "not yet on this phone: stay in signal a minute".to_owned(), false)
        }
        (Keeping::Kept, _) if lasting == Some(false) => {
            ("kept", "kept here, but the browser may clear it".to_owned(), true)
        }
        (Keeping::Kept, Copy::Kept | Copy::OneFile) => {
            ("kept", "kept on this phone, works with no signal".to_owned(), false)
        }
        (Keeping::Kept, Copy::NotPossible) => ("kept", "kept on this phone".to_owned(), false),
    };
    Badge { state, words, leads }
}

fn undo_buttons() -> Piece {
    let draft = use_draft();
    let said = RwSignal::new(String::new());
    let make = move |edit: Edit, word: &str, what: Option<What>| {
        said.set(what.map_or_else(String::new, |what| format!("{word}: {}", what.words())));
        draft.edit(edit);
    };
    let (undoes, redoes) = (draft.undoes(), draft.redoes());
    let name = |word: &str, what: Option<What>| {
        what.map_or_else(|| word.to_owned(), |what| format!("{word}: {}", what.words()))
    };
    view! {
        {when(move || redoes.get().is_some(), move || view! { <button
                class="icon-btn redo"
                type="button"
                aria-label=move || name("Redo", redoes.get())
                on:click=move |_| make(Edit::Redo, "Made again", redoes.get_untracked())
            >
                {icon("i-undo", "")}
            </button> })}
        {when(move || undoes.get().is_some() || redoes.get().is_some(), move || view! { <button
                class="icon-btn"
                type="button"
                aria-label=move || name("Undo", undoes.get())
                aria-disabled=move || undoes.get().is_none().then_some("true")
                on:click=move |_| make(Edit::Undo, "Undone", undoes.get_untracked())
            >
                {icon("i-undo", "")}
            </button> })}
        <p class="vh" aria-live="polite">{said}</p>
    }
}

fn light_button() -> Piece {
    let draft = use_draft();
    view! {
        <button
            class="icon-btn"
            type="button"
            aria-label=move || format!("Light: {}. Change to {}", draft.theme().name(), draft.theme().next().name())
            on:click=move |_| draft.set_theme(untrack(|| draft.theme().next()))
        >
            {icon("i-light", "")}
        </button>
    }
}

/// The notices, one below the other. The region is there before its words are, or screen readers would not tell of them.
fn notices(update: RwSignal<bool>, refused: RwSignal<bool>) -> Piece {
    let draft = use_draft();
    let keeper = draft.keeper();
    let beside = RwSignal::new(false);
    Effect::new(move |_| {
        if keeper.moved().get().is_some() {
            beside.set(true);
        }
    });
    // A page that cannot load itself again stays as it is, with its notice up.
    let reload = || drop(window().location().reload());
    view! {
        <aside class="notices" aria-label="Notices" aria-live="polite">
            {notice("Update ready. Nothing you typed is touched.", update, Some(("Reload", offline::take_over)))}
            {notice(
                "Changed in another tab: reload to see it. Nothing you typed here is lost.",
                keeper.elsewhere(),
                Some(("Reload", reload)),
            )}
            {notice("That link was cut or changed on the way. Nothing here was touched.", refused, None)}
            {notice(
                "This site was changed in another tab too. Yours is kept beside it, under a name of its own.",
                beside,
                None,
            )}
            {notice(
                "What was kept here could not be read. It was laid aside, and this page begins empty.",
                keeper.damaged(),
                None,
            )}
            {telling(draft.told())}
        </aside>
    }
}

fn bottom_bar(route: Memo<Route>) -> Piece {
    let tap = move |to: Route, symbol: &'static str, word: &'static str| {
        let open = move || {
            let here = match route.get() {
                Route::Tools | Route::Tool(_) => Route::Tools,
                Route::Line | Route::Link | Route::Part(_) => Route::Line,
                Route::Piece => Route::Sheet,
                other => other,
            };
            (here == to).then_some("page")
        };
        view! { <li><a href=to.href() aria-current=open>{icon(symbol, "")}{word}</a></li> }
    };
    view! {
        <nav class="bar" aria-label="Views">
            <ul>
                {tap(Route::Line, "i-line", "Line")}
                {tap(Route::Tools, "i-tools", "Tools")}
                {tap(Route::Checks, "i-checks", "Checks")}
                {tap(Route::Sheet, "i-sheet", "Sheet")}
            </ul>
        </nav>
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::keep::Why;

    #[test]
    fn the_badge_never_says_kept_when_it_is_not() {
        for why in [Why::NoAnswer, Why::Refused, Why::Full, Why::Newer] {
            for copy in [Copy::NotPossible, Copy::Kept, Copy::Keeping { done: 1, of: 9 }] {
                let badge = badge(Keeping::Not(why), Some(true), copy);
                assert_eq!((badge.state, badge.leads), ("not-yet", true));
                assert_eq!(badge.words, "not kept on this phone: save the file");
            }
        }
    }

    #[test]
    fn a_browser_that_may_clear_it_is_named() {
        assert!(badge(Keeping::Kept, Some(false), Copy::Kept).leads);
        assert_eq!(badge(Keeping::Kept, Some(true), Copy::Kept).words, "kept on this phone, works with no signal");
    }
}
