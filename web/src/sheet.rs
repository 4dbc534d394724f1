//! The Sheet view: what is kept on this phone, saved to a file, opened from one, or forgotten.

use crate::derived::{Memo, dynamic, memo, when};
use crate::piece::{IntoPiece, Piece, view};
use leptos::prelude::*;
use wasm_bindgen_futures::spawn_local;
use web_sys::HtmlInputElement;

use crate::draft::{Draft, use_draft};
use crate::file::{self, Opened};
use crate::keep::Keeping;
use crate::offline::{self, Copy};
use crate::pads::{Edit, OpenSite, Pads, SiteEdit};
use crate::tools::Tool;

/// What is kept on this phone.
pub fn sheet() -> Piece {
    let draft = use_draft();
    let said = RwSignal::new(String::new());
    let save = move |_| {
        said.set(match file::save(&draft.kept()) {
            Ok(name) => format!("Saved as {name}."),
            Err(_) => "Not saved: the browser makes no files here.".to_owned(),
        });
    };
    let count = memo(move || draft.with(Pads::len));
    view! {
        <div class="one-column">
            <div class="page-head"><h1 tabindex="-1">"Sheet"</h1><span class="aside">"on this phone"</span></div>
            <h2 class="sub">"Kept" <span>{move || entries(count.get())}</span></h2>
            <p class="say">{move || keeping(draft.keeper().state(), draft.keeper().lasting())}</p>
            <div class="btns">
                <button class="btn solid" type="button" on:click=save>"Save to a file"</button>
                {open_file(said)}
            </div>
            <p class="said" aria-live="polite">{said}</p>
            {this_site(said)}
            {crate::line::kept_sites()}
            {paste(said)}
            <h2 class="sub">"With no signal"</h2>
            <ul class="signal">
                {Tool::ALL
                    .iter()
                    .map(|tool| view! { <li><span>{tool.name()}</span><b>{move || works(offline::copy())}</b></li> })
                    .collect::<Vec<Piece>>()}
            </ul>
            <h2 class="sub">"Forget"</h2>
            {forget(said, count)}
        </div>
    }
}

/// Opens a file in place of what is here; undo brings back what was.
fn open_file(said: RwSignal<String>) -> Piece {
    let draft = use_draft();
    let chosen = move |event: leptos::ev::Event| {
        let input: HtmlInputElement = event_target(&event);
        let Some(file) = input.files().and_then(|files| files.get(0)) else { return };
        // So that choosing the same file again is a change again.
        input.set_value("");
        spawn_local(async move {
            let found = file::open(&file).await;
            said.set(took(draft, &file.name(), found));
        });
    };
    view! {
        <label class="btn">
            <input class="vh" type="file" accept=".json,application/json" on:change=chosen/>
            "Open a file"
        </label>
    }
}

/// Takes over what was opened, and says so; what was refused changes nothing.
pub fn took(draft: Draft, name: &str, found: Result<Opened, String>) -> String {
    match found {
        Ok(Opened::Tools(kept)) => {
            let words = format!("Opened {name}: {}. Undo brings back what was here.", entries(kept.len()));
            draft.edit(Edit::Open(kept));
            words
        }
        Ok(Opened::Site(site)) => {
            let words = format!("Opened {}: {} parts. It is on the Line.", named(&site.name), site.parts.len());
            draft.open_new(site);
            words
        }
        Err(why) => format!("Not opened, nothing changed. {name}: {why}."),
    }
}

fn named(name: &str) -> &str {
    if name.is_empty() { "a site without a name" } else { name }
}

/// The open site: saved, shared, and its earlier states.
fn this_site(said: RwSignal<String>) -> Piece {
    let draft = use_draft();
    let has = memo(move || draft.with(|pads| pads.site().is_some()));
    let now = move || draft.with_now(|pads| pads.site().cloned());
    let save = move |_| {
        if let Some(open) = now() {
            let name = format!("{}.json", file_name(&open.site.name));
            said.set(match file::save_text(&name, &bridge::site::write(&open.site)) {
                Ok(()) => format!("Saved as {name}."),
                Err(_) => "Not saved: the browser makes no files here.".to_owned(),
            });
        }
    };
    let share = move |_| {
        if let Some(open) = now() {
            let link = link_of(&open.site);
            said.set(if file::share(named(&open.site.name), &link) {
                "Handed to the phone. The whole site is in the link; nothing of it goes to a server.".to_owned()
            } else if file::copy(&link) {
                "The link is copied. The whole site is in it; nothing of it goes to a server.".to_owned()
            } else {
                "This browser neither shares nor copies: take the link below, or save the file.".to_owned()
            });
        }
    };
    when(
        move || has.get(),
        move || {
            let title = memo(move || {
                draft.with(|pads| pads.site().map(|open| named(&open.site.name).to_owned())).unwrap_or_default()
            });
            let link = memo(move || draft.with(|pads| pads.site().map(|open| link_of(&open.site))).unwrap_or_default());
            view! {
                <h2 class="sub">{title} <span>"the open site"</span></h2>
                <div class="btns">
                    <button class="btn solid" type="button" on:click=save>"Save the site"</button>
                    <button class="btn" type="button" on:click=share>"Share a link"</button>
                </div>
                <label class="link-box">
                    "Its link"
                    <input type="text" readonly aria-label="Link that holds the site" prop:value=link/>
                </label>
                {crate::code::codes()}
                {earlier()}
            }
        },
    )
}

/// This page's own address with the site behind `#`.
fn link_of(site: &engine::site::Site) -> String {
    format!("{}#/site/{}", crate::route::here(), bridge::link::letters(site))
}

/// A name that every phone can keep a file under.
fn file_name(name: &str) -> String {
    let plain: String = named(name).chars().map(|letter| if letter.is_alphanumeric() { letter } else { '-' }).collect();
    plain.trim_matches('-').to_owned()
}

/// Earlier states of the open site, read when they are unfolded.
fn earlier() -> Piece {
    let draft = use_draft();
    let states = RwSignal::new(Vec::<(f64, String)>::new());
    let look = move |_| {
        let Some(key) = draft.with_now(|pads| pads.site().map(|open| open.key)) else { return };
        spawn_local(async move { states.set(draft.keeper().earlier(key).await) });
    };
    let rows = dynamic(move || {
        states
            .get()
            .into_iter()
            .map(|(when, text)| {
                let restore = move |_| {
                    let key = draft.with_now(|pads| pads.site().map(|open| open.key));
                    if let (Some(key), Ok(site)) = (key, bridge::site::open(&text)) {
                        draft.edit(Edit::Site(SiteEdit::Open(OpenSite { key, site })));
                    }
                };
                let day = js_sys::Date::new(&when.into()).to_iso_string();
                let words = String::from(day).get(..16).unwrap_or("earlier").replace('T', " ");
                view! {
                    <li><button class="btn small" type="button" on:click=restore>{format!("As of {words} UTC")}</button></li>
                }
            })
            .collect::<Vec<Piece>>()
            .piece()
    });
    view! {
        <div class="btns">
            <button class="btn plain" type="button" on:click=look>"Earlier states of it"</button>
        </div>
        <ul class="kept-sites">{rows}</ul>
    }
}

/// Opens a pasted link or file text.
fn paste(said: RwSignal<String>) -> Piece {
    let draft = use_draft();
    let typed = RwSignal::new(String::new());
    let open = move |_| {
        let text = typed.get_untracked();
        said.set(took(draft, "what was pasted", file::read(&text)));
    };
    view! {
        <label class="link-box">
            "Paste a link or the text of a file"
            <input
                type="text"
                aria-label="Pasted link or file"
                autocomplete="off"
                prop:value=move || typed.get()
                on:input=move |event| typed.set(event_target_value(&event))
            />
        </label>
        <div class="btns"><button class="btn" type="button" on:click=open>"Open what is pasted"</button></div>
    }
}

/// Takes over the site that a link holds.
pub fn open_link(draft: Draft, letters: &str) -> bool {
    match bridge::link::site_of(letters) {
        Ok(site) => {
            draft.open_new(site);
            true
        }
        Err(_) => false,
    }
}

/// Forgets everything, asked twice in the same place.
fn forget(said: RwSignal<String>, count: Memo<usize>) -> Piece {
    let draft = use_draft();
    let asked = RwSignal::new(false);
    let forget = move |_| {
        draft.edit(Edit::Forget);
        asked.set(false);
        said.set("Forgotten. Undo brings it back until the page is closed.".to_owned());
    };
    view! {
        {move || {
            if asked.get() {
                view! { <p class="say">
                {move || format!("Forget {} on this phone? A file that was saved stays.", entries(count.get()))}
            </p>
            <div class="btns">
                <button class="btn solid" type="button" on:click=forget>"Forget all"</button>
                <button class="btn plain" type="button" on:click=move |_| asked.set(false)>"Keep it"</button>
            </div> }
            } else {
                view! {
                    <div class="btns">
                        <button class="btn plain" type="button" on:click=move |_| asked.set(true)>
                            "Forget all that was typed"
                        </button>
                    </div>
                }
            }
        }}
    }
}

fn entries(count: usize) -> String {
    match count {
        0 => "nothing typed yet".to_owned(),
        1 => "1 entry".to_owned(),
        count => format!("{count} entries"),
    }
}

fn keeping(state: Keeping, lasting: Option<bool>) -> String {
    match (state, lasting) {
        (Keeping::Waiting, _) => "Waiting for the browser’s storage.".to_owned(),
        (Keeping::Busy, _) => "Keeping what you typed; this takes longer than it should.".to_owned(),
        (Keeping::Not(why), _) => {
            format!("Not kept on this phone: {}. Save it to a file before you close the page.", why.words())
        }
        (Keeping::Kept, Some(false)) => {
            "Everything you typed is kept in this browser as you type. The browser has not promised to keep it for good: \
             when space runs short it may clear it. Save a file as well."
                .to_owned()
        }
        (Keeping::Kept, _) => "Everything you typed is kept in this browser as you type.".to_owned(),
    }
}

const fn works(copy: Copy) -> &'static str {
    match copy {
        Copy::Kept | Copy::OneFile => "works",
        Copy::Keeping { .. } => "being copied",
        Copy::NotYet => "not yet",
        Copy::NotPossible => "only in the one file",
    }
}
