//! No site is open: six taps make one, or a kept one or a demonstration is opened.

use crate::derived::{dynamic, when};
use crate::piece::{IntoPiece, Piece, view};
use engine::chemistry::Chemistry;
use engine::choice::Choice;
use engine::family::CodeFamily;
use engine::site::{Got, start};
use leptos::prelude::*;
use wasm_bindgen_futures::spawn_local;

use crate::draft::use_draft;
use crate::pads::{Edit, OpenSite, SiteEdit};

/// The six questions, each with its answers on buttons.
const QUESTIONS: [(&str, &[(&str, &str)]); 6] = [
    ("Built by which code?", &[("iec", "IEC, metric"), ("north-america", "North America")]),
    (
        "Coldest morning on record?",
        &[("5", "5 °C"), ("-10", "−10 °C"), ("-20", "−20 °C"), ("-30", "−30 °C"), ("-40", "−40 °C")],
    ),
    ("How many modules?", &[("0", "none"), ("2", "2"), ("4", "4"), ("8", "8"), ("12", "12"), ("20", "20")]),
    (
        "What are the cells?",
        &[
            ("lfp", "LiFePO4"),
            ("vented-lead", "vented lead"),
            ("agm", "AGM lead"),
            ("nickel-iron", "nickel-iron"),
            ("nmc", "NMC"),
            ("sodium-ion", "sodium-ion"),
        ],
    ),
    ("Which bus?", &[("12", "12 V"), ("24", "24 V"), ("48", "48 V")]),
    ("How large an inverter?", &[("0", "none"), ("1000", "1 kW"), ("3000", "3 kW"), ("6000", "6 kW")]),
];

/// The site that six answers make. `None` where one is no answer.
fn made(answers: &[&str]) -> Option<Got> {
    let number = |text: &str| {
        let reading = engine::typed::read(text, engine::unit::Unit::One).ok()?;
        #[expect(clippy::cast_possible_truncation, reason = "one of the buttons' own numbers")]
        Some(reading.number() as i32)
    };
    let [family, coldest, modules, cells, bus, inverter] = answers else { return None };
    Some(Got {
        family: CodeFamily::of_key(family)?,
        coldest: number(coldest)?,
        modules: u32::try_from(number(modules)?).ok()?,
        chemistry: Chemistry::of_key(cells)?,
        bus: u32::try_from(number(bus)?).ok()?,
        inverter: u32::try_from(number(inverter)?).ok()?,
    })
}

/// The page with no site open.
pub fn new_site() -> Piece {
    let draft = use_draft();
    let answers = RwSignal::new(Vec::<&'static str>::new());
    let question = dynamic(move || {
        let at = answers.with(Vec::len);
        let Some((words, choices)) = QUESTIONS.get(at) else { return Piece::Nothing };
        let buttons: Vec<Piece> = choices
            .iter()
            .map(|(key, label)| {
                let take = move |_| {
                    answers.update(|answers| answers.push(key));
                    if let Some(got) = answers.with_untracked(|answers| made(answers)) {
                        answers.set(Vec::new());
                        draft.open_new(start(got));
                    }
                };
                view! { <button class="btn" type="button" on:click=take>{*label}</button> }
            })
            .collect();
        view! {
            <p class="six-n">{format!("{} of {}", at + 1, QUESTIONS.len())}</p>
            <p class="six-q">{*words}</p>
            <div class="btns six">{buttons}</div>
        }
    });
    let demos: Vec<Piece> = bridge::demo::names()
        .into_iter()
        .map(|name| {
            let open = move |_| {
                if let Some(site) = bridge::demo::demo(name) {
                    draft.open_new(site);
                }
            };
            view! { <button class="btn small" type="button" on:click=open>{name}</button> }
        })
        .collect();
    view! {
        <div class="site-line">
            <div class="page-head"><h1 tabindex="-1">"Line"</h1></div>
            <section class="six-box" aria-label="A new site">
                <h2 class="sub">"A new site" <span>"six taps"</span></h2>
                {question}
                {when(move || answers.with(|answers| !answers.is_empty()), move || {
                    view! {
                        <div class="btns">
                            <button
                                class="btn plain"
                                type="button"
                                on:click=move |_| answers.update(|answers| answers.truncate(answers.len() - 1))
                            >
                                "One back"
                            </button>
                        </div>
                    }
                })}
            </section>
            {kept()}
            <h2 class="sub">"Sites to look at" <span>"invented"</span></h2>
            <div class="btns">{demos}</div>
        </div>
    }
}

/// The sites on this phone.
pub fn kept() -> Piece {
    let draft = use_draft();
    let sites = draft.keeper().sites();
    let unread = RwSignal::new(Vec::<(u32, String, String)>::new());
    when(
        move || sites.with(|sites| !sites.is_empty()),
        move || {
            let rows = dynamic(move || {
                sites
                    .get()
                    .into_iter()
                    .map(|one| {
                        let key = one.key;
                        let name = if one.name.is_empty() { format!("Site {key}") } else { one.name };
                        let open = move |_| {
                            spawn_local(async move {
                                let text = draft.keeper().site(key).await.unwrap_or_default();
                                match bridge::site::open(&text) {
                                    Ok(site) => {
                                        draft.edit(Edit::Site(SiteEdit::Open(OpenSite { key, site })));
                                    }
                                    Err(why) => {
                                        unread.update(|all| all.retain(|one| one.0 != key));
                                        unread.update(|all| all.push((key, why.to_string(), text)));
                                    }
                                }
                            });
                        };
                        view! {
                            <li>
                                <button class="btn" type="button" on:click=open>{name}</button>
                                {move || unread.get().into_iter().find(|one| one.0 == key).map(laid_open)}
                            </li>
                        }
                    })
                    .collect::<Vec<Piece>>()
                    .piece()
            });
            view! {
                <h2 class="sub">"On this phone" <span>{move || format!("{} kept", sites.with(Vec::len))}</span></h2>
                <ul class="kept-sites">{rows}</ul>
            }
        },
    )
}

/// What is said of a kept site that cannot be read: why, and a way to save what there is. It is left as it is.
fn laid_open((key, why, text): (u32, String, String)) -> Piece {
    let said = RwSignal::new(String::new());
    let save = move |_| {
        let name = format!("linehut-site-{key}.json");
        said.set(match crate::file::save_text(&name, &text) {
            Ok(()) => format!("Saved as {name}."),
            Err(_) => "Not saved: the browser makes no files here.".to_owned(),
        });
    };
    view! {
        <p class="say">{format!("Cannot be read: {why}. It is left as it is.")}</p>
        <div class="btns"><button class="btn small" type="button" on:click=save>"Save what is there"</button></div>
        <p class="said" aria-live="polite">{said}</p>
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use engine::field::{Field, Takes};

    #[test]
    fn every_answer_is_understood() {
        for (place, (_, choices)) in QUESTIONS.iter().enumerate() {
            for (key, _) in *choices {
                let mut answers: Vec<&str> = QUESTIONS.iter().map(|(_, choices)| choices[0].0).collect();
                answers[place] = key;
                assert!(made(&answers).is_some(), "{key}");
            }
        }
        let Takes::Choice(all) = Field::Chemistry.takes() else { panic!("a choice") };
        assert!(QUESTIONS[3].1.iter().all(|(key, _)| all.iter().any(|(one, _)| one == key)));
    }

    #[test]
    fn six_taps_and_not_five() {
        assert!(made(&["iec", "-20", "8", "lfp", "48"]).is_none());
        assert!(made(&["iec", "-20", "8", "lfp", "48", "3000"]).is_some());
    }
}
