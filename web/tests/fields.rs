//! Fields, as a person meets them in a browser.
#![cfg(target_arch = "wasm32")]
#![allow(clippy::future_not_send, reason = "a browser has one thread")]

use engine::field::Field;
use leptos::prelude::*;
use wasm_bindgen::prelude::*;
use wasm_bindgen_futures::JsFuture;
use wasm_bindgen_test::{wasm_bindgen_test, wasm_bindgen_test_configure};
use web::derived::memo;
use web::draft::Draft;
use web::field::{FieldOf, Said, StandIn};
use web::fold::{Folds, fold};
use web::keep::Keeper;
use web::pads::Edit;
use web::piece::{self, Mounted, Piece, mount, view};
use web::tools::Tool;
use web_sys::{Element, Event, HtmlElement, HtmlInputElement};

wasm_bindgen_test_configure!(run_in_browser);

/// A part of the page, with a store that no storage stands behind.
struct Stage {
    root: Element,
    draft: Draft,
    _up: Mounted,
}

fn stage(show: impl FnOnce() -> Piece + 'static) -> Stage {
    let root = document().create_element("div").unwrap();
    document().body().unwrap().append_child(&root).unwrap();
    let owner = Owner::new();
    let draft = owner.with(|| Draft::new(Keeper::new()));
    std::mem::forget(owner);
    let up = mount(&root, move || {
        draft.provide();
        provide_context(Folds::new());
        show()
    });
    Stage { root, draft, _up: up }
}

impl Stage {
    fn find(&self, selector: &str) -> Option<Element> {
        self.root.query_selector(selector).unwrap()
    }

    /// The input of that accessible name.
    fn input(&self, name: &str) -> HtmlInputElement {
        self.find(&format!("input[aria-label='{name}']")).expect("an input of that name").unchecked_into()
    }

    /// The button of that accessible name.
    fn button(&self, name: &str) -> HtmlElement {
        button_in(&self.root, name).unwrap_or_else(|| panic!("a button named {name}"))
    }

    async fn press(&self, name: &str) {
        self.button(name).click();
        settle().await;
    }

    async fn type_into(&self, name: &str, text: &str) {
        let input = self.input(name);
        input.set_value(text);
        input.dispatch_event(&event("input")).unwrap();
        settle().await;
    }

    async fn leave(&self, name: &str) {
        self.input(name).dispatch_event(&event("blur")).unwrap();
        settle().await;
    }

    fn state(&self) -> String {
        self.find(".field").unwrap().class_name()
    }

    fn note(&self) -> Option<String> {
        self.find(".field-note")?.text_content()
    }
}

fn button_in(element: &Element, name: &str) -> Option<HtmlElement> {
    let said = element.get_attribute("aria-label").or_else(|| element.text_content());
    if element.tag_name() == "BUTTON" && said.as_deref() == Some(name) {
        return element.clone().dyn_into().ok();
    }
    let children = std::iter::successors(element.first_element_child(), Element::next_element_sibling);
    children.into_iter().find_map(|child| button_in(&child, name))
}

fn event(name: &str) -> Event {
    Event::new(name).unwrap()
}

/// Lets everything that follows from a change happen: effects run as tasks of their own, one after another.
async fn settle() {
    pause(0).await;
}

async fn pause(milliseconds: i32) {
    let promise = js_sys::Promise::new(&mut |done, _| {
        window().set_timeout_with_callback_and_timeout_and_arguments_0(&done, milliseconds).unwrap();
    });
    JsFuture::from(promise).await.unwrap();
}

#[wasm_bindgen_test]
async fn what_is_typed_stays_to_the_letter() {
    let stage = stage(|| FieldOf::new(Tool::String, Field::Voc).shown());
    for text in ["49,30", " 49.3 ", "49.3 V", "12,,4", "-", "forty"] {
        stage.type_into("Voc", text).await;
        stage.leave("Voc").await;
        assert_eq!(stage.input("Voc").value(), text);
    }
}

#[wasm_bindgen_test]
async fn half_typed_is_not_scolded_until_a_pause() {
    let stage = stage(|| FieldOf::new(Tool::String, Field::RecordLow).shown());
    stage.type_into("Record low", "-").await;
    assert_eq!((stage.state().as_str(), stage.note()), ("field", None));
    pause(400).await;
    stage.type_into("Record low", "-x").await;
    pause(800).await;
    assert_eq!(stage.state(), "field", "the pause begins again with each key");
    pause(400).await;
    assert_eq!(stage.state(), "field unread");
    let input = stage.input("Record low");
    assert_eq!(input.get_attribute("aria-invalid").as_deref(), Some("true"));
    let note = input.get_attribute("aria-describedby").expect("its note");
    assert_eq!(stage.find(&format!("#{note}")).unwrap().text_content(), stage.note());
    stage.type_into("Record low", "-3").await;
    assert_eq!((stage.state().as_str(), stage.note()), ("field", None));
    assert_eq!(stage.input("Record low").get_attribute("aria-invalid"), None);
}

#[wasm_bindgen_test]
async fn leaving_a_field_says_at_once_what_is_not_understood() {
    let stage = stage(|| FieldOf::new(Tool::String, Field::Isc).shown());
    stage.type_into("Isc", "12,,4").await;
    assert_eq!(stage.state(), "field");
    stage.leave("Isc").await;
    assert_eq!(stage.state(), "field unread");
}

#[wasm_bindgen_test]
async fn a_unit_is_chosen_from_a_plain_list() {
    let stage = stage(|| FieldOf::new(Tool::String, Field::RecordLow).shown());
    stage.type_into("Record low", "-24").await;
    stage.press("Record low, unit °C. Change unit").await;
    stage.press("°F").await;
    assert_eq!(stage.button("Record low, unit °F. Change unit").text_content().as_deref(), Some("°F"));
    assert_eq!(stage.input("Record low").value(), "-24");
    assert!(stage.find(".units").is_none(), "the list is closed again");
}

#[wasm_bindgen_test]
async fn a_typed_unit_is_the_one_on_the_chip_until_another_is_chosen() {
    let stage = stage(|| FieldOf::new(Tool::String, Field::RecordLow).shown());
    stage.type_into("Record low", "-24 F").await;
    stage.press("Record low, unit °F. Change unit").await;
    stage.press("°C").await;
    stage.button("Record low, unit °C. Change unit");
    assert_eq!(stage.input("Record low").value(), "-24");
}

#[wasm_bindgen_test]
async fn undo_brings_back_what_was_typed() {
    let stage = stage(|| FieldOf::new(Tool::String, Field::Voc).shown());
    for text in ["4", "49", "49.3"] {
        stage.type_into("Voc", text).await;
    }
    stage.leave("Voc").await;
    stage.type_into("Voc", "50").await;
    stage.draft.edit(Edit::Undo);
    settle().await;
    assert_eq!(stage.input("Voc").value(), "49.3");
    stage.draft.edit(Edit::Undo);
    settle().await;
    assert_eq!(stage.input("Voc").value(), "");
    stage.draft.edit(Edit::Redo);
    settle().await;
    assert_eq!(stage.input("Voc").value(), "49.3");
}

#[wasm_bindgen_test]
async fn what_is_assumed_is_shown_with_its_reason_and_source() {
    let stage = stage(|| {
        let stand_in = engine::assumed::of(Field::VocTolerance).map(|assumption| StandIn::of(&assumption));
        let said = Said { assumed: memo(move || stand_in.clone()), ..Said::default() };
        FieldOf { said, ..FieldOf::new(Tool::String, Field::VocTolerance) }.shown()
    });
    settle().await;
    assert_eq!(stage.state(), "field is-assumed");
    assert_eq!(stage.input("Voc tolerance").placeholder(), "3");
    let why = stage.note().expect("why");
    stage.press("Voc tolerance: assumed. Say why").await;
    assert!(stage.note().expect("why").starts_with(&format!("{why}. Source: ")));
    assert!(document().active_element().is_some_and(|at| at.id() == stage.input("Voc tolerance").id()));
    stage.type_into("Voc tolerance", "0").await;
    assert_eq!((stage.state().as_str(), stage.note()), ("field", None));
}

#[wasm_bindgen_test]
async fn a_missing_field_says_what_waits_for_it() {
    let stage = stage(|| {
        let asks = memo(|| Some("asks: the cold volts wait for this".to_owned()));
        FieldOf { said: Said { asks, ..Said::default() }, ..FieldOf::new(Tool::String, Field::InputLimit) }.shown()
    });
    settle().await;
    assert_eq!(stage.state(), "field asks");
    assert_eq!(stage.note().as_deref(), Some("asks: the cold volts wait for this"));
}

#[wasm_bindgen_test]
async fn a_count_steps_within_its_range() {
    let stage = stage(|| FieldOf::new(Tool::String, Field::Series).called("In series").shown());
    stage.press("Modules in series: one more").await;
    assert_eq!(stage.input("Modules in series").value(), "1");
    stage.press("Modules in series: one more").await;
    stage.press("Modules in series: one more").await;
    assert_eq!(stage.input("Modules in series").value(), "3");
    for _ in 0..4 {
        stage.press("Modules in series: one fewer").await;
    }
    assert_eq!(stage.input("Modules in series").value(), "1");
}

#[wasm_bindgen_test]
async fn holding_a_step_repeats_and_letting_go_ends_it() {
    let stage = stage(|| FieldOf::new(Tool::String, Field::Series).shown());
    let more = stage.button("Modules in series: one more");
    more.dispatch_event(&event("pointerdown")).unwrap();
    pause(1000).await;
    more.dispatch_event(&event("pointerup")).unwrap();
    more.click();
    settle().await;
    let held: u32 = stage.input("Modules in series").value().parse().unwrap();
    assert!(held >= 3, "{held}");
    pause(400).await;
    assert_eq!(stage.input("Modules in series").value(), held.to_string());
}

#[wasm_bindgen_test]
async fn a_fold_makes_its_inside_only_when_it_is_opened() {
    let stage = stage(|| fold("test/more", "More", memo(String::new), || view! { <p class="inside">"here"</p> }));
    assert!(stage.find(".inside").is_none());
    let head: HtmlElement = stage.find(".fold-head").unwrap().unchecked_into();
    head.click();
    settle().await;
    assert!(stage.find(".inside").is_some());
    assert_eq!(head.get_attribute("aria-expanded").as_deref(), Some("true"));
}
