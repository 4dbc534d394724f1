//! Pieces in a browser: where values land, and what is touched when they change.
#![cfg(target_arch = "wasm32")]
#![allow(clippy::future_not_send, reason = "a browser has one thread")]

use leptos::prelude::{Get, GetUntracked, GetValue, RwSignal, Set, StoredValue, Update, UpdateValue, document, window};
use wasm_bindgen::prelude::*;
use wasm_bindgen_futures::JsFuture;
use wasm_bindgen_test::{wasm_bindgen_test, wasm_bindgen_test_configure};
use web::derived::{dynamic, when};
use web::piece::{self, IntoPiece, Mounted, Piece, mount, view};
use web_sys::{Element, HtmlElement, HtmlInputElement};

wasm_bindgen_test_configure!(run_in_browser);

/// A box in the page with a piece in it.
struct Stage {
    root: Element,
    up: Option<Mounted>,
}

fn stage(make: impl FnOnce() -> Piece) -> Stage {
    let root = document().create_element("div").unwrap();
    document().body().unwrap().append_child(&root).unwrap();
    let up = mount(&root, make);
    Stage { root, up: Some(up) }
}

impl Stage {
    /// What stands there, without the marks that show nothing.
    fn html(&self) -> String {
        self.root.inner_html().replace("<!---->", "")
    }

    fn find(&self, selector: &str) -> HtmlElement {
        self.root.query_selector(selector).unwrap().expect(selector).unchecked_into()
    }
}

impl Drop for Stage {
    fn drop(&mut self) {
        self.up = None;
        self.root.remove();
    }
}

/// Lets everything that waits run.
async fn settle() {
    let wait = js_sys::Promise::new(&mut |done, _| {
        window().set_timeout_with_callback_and_timeout_and_arguments_0(&done, 20).unwrap();
    });
    JsFuture::from(wait).await.unwrap();
}

#[wasm_bindgen_test]
fn values_land_among_what_never_changes() {
    let (one, two) = ("1 < 2 & \"3\"", String::from("two"));
    let stage = stage(|| {
        view! {
            <p class="a" id=two.clone()>"Before " {one} " between " {two} {"!"}</p>
            <ul>
                <li>"first"</li>
                {["x", "y"].map(|name| view! { <li data-name=name>{name}</li> }).into_iter().collect::<Vec<Piece>>()}
                <li>"last" <br/> <b>"bold " {3.to_string()}</b></li>
            </ul>
            "loose " {"text"} " at the root"
        }
    });
    assert_eq!(
        stage.html(),
        "<p class=\"a\" id=\"two\">Before 1 &lt; 2 &amp; \"3\" between two!</p>\
         <ul><li>first</li><li data-name=\"x\">x</li><li data-name=\"y\">y</li><li>last<br><b>bold 3</b></li></ul>\
         loose text at the root"
    );
}

#[wasm_bindgen_test]
fn what_is_drawn_is_of_the_namespace_of_drawings() {
    let stage = stage(|| {
        let bar = |x: f64| view! { <rect class="bar" x=x.to_string() width="4" height="2"/> };
        view! { <svg viewBox="0 0 9 9">{vec![bar(1.0), bar(5.0)]}<title>"Bars"</title></svg> }
    });
    let bar: Element = stage.find("rect.bar + rect.bar").into();
    assert_eq!(bar.namespace_uri().as_deref(), Some("http://www.w3.org/2000/svg"));
    assert_eq!(bar.get_attribute("x").as_deref(), Some("5"));
    assert_eq!(stage.find("title").text_content().as_deref(), Some("Bars"));
}

#[wasm_bindgen_test]
async fn attributes_properties_classes_and_styles_follow() {
    let on = RwSignal::new(false);
    let stage = stage(|| {
        view! {
            <input
                type="checkbox"
                class="box"
                class:lit=move || on.get()
                disabled=move || on.get()
                aria-label=move || on.get().then_some("on")
                style=("--w", move || if on.get() { "2px" } else { "1px" })
                prop:checked=move || on.get()
            />
        }
    });
    let input: HtmlInputElement = stage.find("input").unchecked_into();
    let seen = || {
        (
            input.class_name(),
            input.has_attribute("disabled"),
            input.get_attribute("aria-label"),
            input.style().get_property_value("--w").unwrap(),
            input.checked(),
        )
    };
    assert_eq!(seen(), ("box".to_owned(), false, None, "1px".to_owned(), false));
    on.set(true);
    settle().await;
    assert_eq!(seen(), ("box lit".to_owned(), true, Some("on".to_owned()), "2px".to_owned(), true));
    on.set(false);
    settle().await;
    assert_eq!(seen(), ("box".to_owned(), false, None, "1px".to_owned(), false));
}

#[wasm_bindgen_test]
async fn what_is_made_anew_in_the_same_shape_stays_the_same_node() {
    let count = RwSignal::new(1);
    let stage = stage(|| {
        view! {
            <div>
                {move || {
                    let now = count.get();
                    view! {
                        <p class=format!("n{now}")>{now.to_string()}</p>
                        <button on:click=move |_| count.set(now + 10)>"more"</button>
                    }
                }}
            </div>
        }
    });
    let (said, button) = (stage.find("p"), stage.find("button"));
    button.focus().unwrap();
    for wanted in ["11", "21", "31"] {
        button.click();
        settle().await;
        assert_eq!((said.text_content().as_deref(), said.class_name()), (Some(wanted), format!("n{wanted}")));
        assert!(stage.find("p").is_same_node(Some(&said)), "patched, not made again");
        assert!(document().active_element().is_some_and(|at| at.is_same_node(Some(&button))), "focus stays");
    }
}

#[wasm_bindgen_test]
async fn lists_grow_and_shrink_where_they_stand() {
    let names = RwSignal::new(vec!["a", "b"]);
    let row = |name: &&'static str| view! { <li>{*name}</li> };
    let stage = stage(|| {
        view! {
            <ul><li>"head"</li>{move || names.get().iter().map(row).collect::<Vec<Piece>>()}<li>"foot"</li></ul>
        }
    });
    let first = stage.find("li:nth-of-type(2)");
    for wanted in [vec!["a", "b", "c", "d"], vec![], vec!["x"], vec!["y", "z"]] {
        names.set(wanted.clone());
        settle().await;
        let rows: String = wanted.iter().map(|name| format!("<li>{name}</li>")).collect();
        assert_eq!(stage.html(), format!("<ul><li>head</li>{rows}<li>foot</li></ul>"));
    }
    assert!(!first.is_connected(), "what was taken out stays out");
}

#[wasm_bindgen_test]
async fn one_kind_gives_way_to_another_in_its_place() {
    let kind = RwSignal::new(0);
    let stage = stage(|| {
        view! {
            <i>"["</i>
            {dynamic(move || match kind.get() {
                0 => Piece::Nothing,
                1 => "text".piece(),
                2 => view! { <b>"element"</b> },
                3 => view! { <b>"another"</b> },
                4 => vec![view! { <u>"1"</u> }, "2".piece()].piece(),
                5 => when(|| true, || view! { <s>"nested"</s> }),
                _ => view! { {"only"} {" values"} },
            })}
            <i>"]"</i>
        }
    });
    let wanted = ["", "text", "<b>element</b>", "<b>another</b>", "<u>1</u>2", "<s>nested</s>", "only values"];
    for from in 0..wanted.len() {
        for to in 0..wanted.len() {
            for now in [from, to] {
                kind.set(now);
                settle().await;
                assert_eq!(stage.html(), format!("<i>[</i>{}<i>]</i>", wanted[now]), "{from} to {to}");
            }
        }
    }
}

#[wasm_bindgen_test]
async fn a_button_may_take_itself_away() {
    let there = RwSignal::new(true);
    let presses = RwSignal::new(0);
    let press = move |_| {
        presses.update(|presses| *presses += 1);
        there.set(false);
    };
    let stage = stage(|| when(move || there.get(), move || view! { <button on:click=press>"away"</button> }));
    let button = stage.find("button");
    button.click();
    settle().await;
    assert_eq!((stage.html().as_str(), presses.get_untracked()), ("", 1));
    button.click();
    assert_eq!(presses.get_untracked(), 1, "what is away does nothing");
}

#[wasm_bindgen_test]
async fn what_is_taken_out_no_longer_follows() {
    let (value, read) = (RwSignal::new(1), StoredValue::new(0));
    let mut stage = stage(|| {
        view! {
            <p>{move || {
                read.update_value(|read| *read += 1);
                value.get().to_string()
            }}</p>
        }
    });
    value.set(2);
    settle().await;
    assert_eq!((stage.html().as_str(), read.get_value()), ("<p>2</p>", 2));
    stage.up = None;
    value.set(3);
    settle().await;
    assert_eq!((stage.html().as_str(), read.get_value()), ("", 2));
}
