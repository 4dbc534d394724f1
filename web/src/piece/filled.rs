//! Markup with its values, as `view!` puts them together.

use std::marker::PhantomData;

use leptos::ev::EventDescriptor;
use leptos::wasm_bindgen::JsCast;
use web_sys::Event;

use super::hole::{Act, Hole, What};
use super::value::{IntoValue, Value};
use super::{IntoPiece, Piece, Shape};

/// What is done at an event of the kind `T`.
struct On<T, F>(F, PhantomData<fn(T)>);

impl<T: JsCast, F: FnMut(T)> Act for On<T, F> {
    fn act(&mut self, event: Event) {
        (self.0)(event.unchecked_into());
    }
}

/// A shape and what goes into it, in the order of its walk.
pub struct Filled {
    pub(super) shape: &'static Shape,
    pub(super) holes: Vec<Hole>,
}

impl Filled {
    /// With nothing in it yet.
    pub fn new(shape: &'static Shape, count: usize) -> Self {
        Self { shape, holes: Vec::with_capacity(count) }
    }

    /// All is in it.
    pub fn done(self) -> Piece {
        Piece::Filled(self)
    }

    /// Puts a child in.
    pub fn child(&mut self, child: impl IntoPiece) {
        self.put(Hole::Child(child.piece()));
    }

    /// Puts the value of an attribute in.
    pub fn attribute(&mut self, name: &'static str, value: impl IntoValue) {
        self.set(What::Attribute, name, value.value());
    }

    /// Puts the value of a property in.
    pub fn property(&mut self, name: &'static str, value: impl IntoValue) {
        self.set(What::Property, name, value.value());
    }

    /// Puts in whether it is of a class.
    pub fn class(&mut self, name: &'static str, value: impl IntoValue) {
        self.set(What::Class, name, value.value());
    }

    /// Puts a style in.
    pub fn style(&mut self, name: &'static str, value: impl IntoValue) {
        self.set(What::Style, name, value.value());
    }

    /// Puts in what it holds, as text of HTML: never what somebody typed.
    pub fn html(&mut self, value: impl IntoValue) {
        self.set(What::Html, "", value.value());
    }

    /// Puts in what is done at an event.
    pub fn on<E>(&mut self, event: E, act: impl FnMut(E::EventType) + 'static)
    where
        E: EventDescriptor,
        E::EventType: JsCast + 'static,
    {
        self.put(Hole::On(event.name(), Box::new(On(act, PhantomData))));
    }

    #[inline(never)]
    fn set(&mut self, what: What, name: &'static str, value: Value) {
        self.put(Hole::Set { what, name, value });
    }

    #[inline(never)]
    fn put(&mut self, hole: Hole) {
        self.holes.push(hole);
    }
}
