//! What goes into a shape, and what became of it.

use std::borrow::Cow;
use std::cell::RefCell;
use std::rc::Rc;

use leptos::prelude::RenderEffect;
use leptos::wasm_bindgen::prelude::*;
use web_sys::{Element, Event, HtmlElement, Node};

use super::Piece;
use super::state::State;
use super::value::{Now, Value};

/// What is done at an event.
pub trait Act {
    /// Does it.
    fn act(&mut self, event: Event);
}

/// What is done at an event of any kind.
pub type Handler = Box<dyn Act>;

/// What of an element a value is for.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum What {
    /// An attribute.
    Attribute,
    /// A property.
    Property,
    /// Whether it is of a class.
    Class,
    /// A style.
    Style,
    /// What it holds, as text of HTML.
    Html,
}

/// A value for a shape.
pub enum Hole {
    /// A child.
    Child(Piece),
    /// A value of the element.
    Set {
        /// What it is for.
        what: What,
        /// The name of the attribute.
        name: &'static str,
        /// The value.
        value: Value,
    },
    /// What is done at an event of that name.
    On(Cow<'static, str>, Handler),
}

/// What became of it.
pub enum Stands {
    /// A child.
    Child(State),
    /// A value of the element.
    Set(Setting),
    /// What is done at an event.
    On(Listener),
}

/// A value of an element, kept up.
pub struct Setting {
    element: Element,
    what: What,
    name: &'static str,
    last: Last,
}

enum Last {
    Fixed(Now),
    Live(RenderEffect<Now>),
}

impl Setting {
    /// Puts the value on `element`, and keeps it up.
    pub fn new(element: Element, what: What, name: &'static str, value: Value) -> Self {
        let last = kept_up(&element, what, name, value, None);
        Self { element, what, name, last }
    }

    /// Takes another value in.
    pub fn take(&mut self, value: Value) {
        let before = match &self.last {
            Last::Fixed(now) => Some(now.clone()),
            Last::Live(effect) => effect.take_value(),
        };
        self.last = kept_up(&self.element, self.what, self.name, value, before);
    }
}

fn kept_up(element: &Element, what: What, name: &'static str, value: Value, before: Option<Now>) -> Last {
    match value {
        Value::Live(read) => {
            let element = element.clone();
            let follow = move |before: Option<Now>| {
                let now = read.read().now();
                if before.as_ref() != Some(&now) {
                    set(&element, what, name, &now);
                }
                now
            };
            Last::Live(RenderEffect::new_with_value(follow, before))
        }
        value => {
            let now = value.now();
            // What was never set is away already.
            if before.as_ref().unwrap_or(&Now::No) != &now || (before.is_none() && what == What::Property) {
                set(element, what, name, &now);
            }
            Last::Fixed(now)
        }
    }
}

/// A value that the browser refuses leaves the element as it was.
fn set(element: &Element, what: What, name: &str, now: &Now) {
    let text = match now {
        Now::Text(text) => Some(&**text),
        Now::Yes => Some(""),
        Now::No => None,
    };
    let _ = match (what, text) {
        (What::Attribute, Some(text)) => element.set_attribute(name, text),
        (What::Attribute, None) => element.remove_attribute(name),
        (What::Property, _) => {
            let value = match now {
                Now::Text(text) => JsValue::from_str(text),
                now => JsValue::from_bool(*now == Now::Yes),
            };
            js_sys::Reflect::set(element, &name.into(), &value).map(drop)
        }
        (What::Class, Some(_)) => element.class_list().add_1(name),
        (What::Class, None) => element.class_list().remove_1(name),
        (What::Style, _) => {
            // Drawings have styles as well.
            let style = element.unchecked_ref::<HtmlElement>().style();
            match text {
                Some(text) => style.set_property(name, text),
                None => style.remove_property(name).map(drop),
            }
        }
        (What::Html, _) => {
            element.set_inner_html(text.unwrap_or_default());
            Ok(())
        }
    };
}

/// What listens at an element. What it then does can be exchanged.
pub struct Listener {
    act: Rc<RefCell<Option<Handler>>>,
    /// Freed with this.
    _heard: Closure<dyn FnMut(Event)>,
}

impl Listener {
    /// Listens at `node`.
    pub fn new(node: &Node, event: &str, act: Handler) -> Self {
        let act = Rc::new(RefCell::new(Some(act)));
        let slot = Rc::clone(&act);
        let heard = Closure::<dyn FnMut(Event)>::new(move |event| {
            // Out of its slot while it runs: what it does may exchange it, or raise the same event again.
            let taken = slot.borrow_mut().take();
            if let Some(mut act) = taken {
                act.act(event);
                slot.borrow_mut().get_or_insert(act);
            }
        });
        let listening = node.add_event_listener_with_callback(event, heard.as_ref().unchecked_ref());
        debug_assert!(listening.is_ok(), "every node can be listened at");
        Self { act, _heard: heard }
    }

    /// Does this from now on.
    pub fn take(&self, act: Handler) {
        *self.act.borrow_mut() = Some(act);
    }
}
