//! A piece that stands in the page.

use leptos::prelude::{Owner, RenderEffect, document};
use leptos::wasm_bindgen::JsCast;
use web_sys::{Element, Node};

use super::hole::{Hole, Listener, Setting, Stands};
use super::{Filled, Make, Piece, Shape};

/// A piece with its nodes.
pub enum State {
    /// Nothing, and where it would stand.
    Nothing(Node),
    /// Text.
    Text(Node, std::borrow::Cow<'static, str>),
    /// Markup.
    Filled(Stand),
    /// Several, and where they end.
    Many(Vec<State>, Node),
    /// What is made again whenever what it reads changes.
    Live(RenderEffect<State>),
}

/// Markup that stands in the page.
pub struct Stand {
    shape: &'static Shape,
    /// Its nodes while they are in no page yet.
    fragment: Option<Node>,
    roots: Vec<Root>,
    holes: Vec<Stands>,
}

/// What stands at the root of markup.
enum Root {
    Node(Node),
    /// The child in the hole of this place.
    Hole(usize),
}

/// Puts `node` into `parent` before `before`, or at its end.
fn put(parent: &Node, node: &Node, before: Option<&Node>) {
    let stands = parent.insert_before(node, before);
    debug_assert!(stands.is_ok(), "a node of the page takes a node");
}

fn remove(node: &Node) {
    // What is named here every node has that stands in a page.
    node.unchecked_ref::<Element>().remove();
}

fn marker() -> Node {
    document().create_comment("").into()
}

impl Piece {
    /// Makes its nodes.
    pub(super) fn build(self) -> State {
        match self {
            Self::Nothing => State::Nothing(marker()),
            Self::Text(text) => State::Text(document().create_text_node(&text).into(), text),
            Self::Filled(filled) => State::Filled(filled.build()),
            Self::Many(all) => State::Many(all.into_iter().map(Self::build).collect(), marker()),
            Self::Live(make) => State::Live(live(make, None)),
        }
    }
}

fn live(make: Box<dyn Make>, before: Option<State>) -> RenderEffect<State> {
    let follow = move |before: Option<State>| match before {
        Some(mut state) => {
            state.take(make.make());
            state
        }
        None => make.make().build(),
    };
    RenderEffect::new_with_value(follow, before)
}

impl State {
    /// Puts its nodes into `parent` before `before`, or at its end. Once only.
    pub fn mount(&mut self, parent: &Node, before: Option<&Node>) {
        match self {
            Self::Nothing(node) | Self::Text(node, _) => put(parent, node, before),
            Self::Filled(stand) => {
                if let Some(fragment) = stand.fragment.take() {
                    put(parent, &fragment, before);
                }
            }
            Self::Many(all, end) => {
                for one in all {
                    one.mount(parent, before);
                }
                put(parent, end, before);
            }
            Self::Live(effect) => {
                effect.with_value_mut(|state| state.mount(parent, before));
            }
        }
    }

    /// Takes its nodes out.
    pub fn unmount(&mut self) {
        match self {
            Self::Nothing(node) | Self::Text(node, _) => remove(node),
            Self::Filled(stand) => stand.unmount(),
            Self::Many(all, end) => {
                all.iter_mut().for_each(Self::unmount);
                remove(end);
            }
            Self::Live(effect) => {
                effect.with_value_mut(Self::unmount);
            }
        }
    }

    /// The first of its nodes. None only while what makes it is at work.
    fn first(&self) -> Option<Node> {
        match self {
            Self::Nothing(node) | Self::Text(node, _) => Some(node.clone()),
            Self::Filled(stand) => stand.roots.first().and_then(|root| match root {
                Root::Node(node) => Some(node.clone()),
                Root::Hole(at) => match &stand.holes[*at] {
                    Stands::Child(state) => state.first(),
                    _ => None,
                },
            }),
            Self::Many(all, end) => all.first().map_or_else(|| Some(end.clone()), Self::first),
            Self::Live(effect) => effect.with_value_mut(|state| state.first()).flatten(),
        }
    }

    /// Takes another piece in: what differs is changed in place, what is of another kind is exchanged.
    pub fn take(&mut self, piece: Piece) {
        match (&mut *self, piece) {
            (Self::Nothing(_), Piece::Nothing) => {}
            (Self::Text(node, before), Piece::Text(text)) => {
                if *before != text {
                    node.set_node_value(Some(&text));
                    *before = text;
                }
            }
            (Self::Filled(stand), Piece::Filled(filled)) if std::ptr::eq(stand.shape, filled.shape) => {
                stand.take(filled);
            }
            (Self::Many(states, end), Piece::Many(pieces)) => take_many(states, end, pieces),
            (Self::Live(effect), Piece::Live(make)) => {
                let before = effect.take_value();
                *effect = live(make, before);
            }
            (_, piece) => {
                let mut new = piece.build();
                if let Some(first) = self.first()
                    && let Some(parent) = first.parent_node()
                {
                    new.mount(&parent, Some(&first));
                    self.unmount();
                }
                *self = new;
            }
        }
    }
}

fn take_many(states: &mut Vec<State>, end: &Node, pieces: Vec<Piece>) {
    for spare in states.iter_mut().skip(pieces.len()) {
        spare.unmount();
    }
    states.truncate(pieces.len());
    let stood = states.len();
    for (at, piece) in pieces.into_iter().enumerate() {
        if at < stood {
            states[at].take(piece);
        } else {
            let mut new = piece.build();
            if let Some(parent) = end.parent_node() {
                new.mount(&parent, Some(end));
            }
            states.push(new);
        }
    }
}

impl Filled {
    fn build(self) -> Stand {
        let Self { shape, holes: values } = self;
        let fragment = shape.copy();
        let (mut roots, mut holes) = (Vec::new(), Vec::with_capacity(values.len()));
        let mut values = values.into_iter();
        let mut above: Vec<Node> = Vec::new();
        let mut here = fragment.clone();
        for step in shape.walk {
            match step {
                b'>' => {
                    let below = child(&here);
                    above.push(std::mem::replace(&mut here, below));
                }
                b'+' => here = here.next_sibling().expect("the walk is of this text"),
                b'<' => here = above.pop().expect("the walk is of this text"),
                b'r' => roots.push(Root::Node(here.clone())),
                _ => {
                    let Some(value) = values.next() else { continue };
                    // Before this, or at the end of this.
                    let (parent, before) = match above.last() {
                        Some(parent) if *step == b'c' => (parent, Some(&here)),
                        _ => (&here, None),
                    };
                    if above.len() == usize::from(*step == b'c') && *step != b'a' {
                        roots.push(Root::Hole(holes.len()));
                    }
                    holes.push(value.build(&here, parent, before));
                }
            }
        }
        Stand { shape, fragment: Some(fragment), roots, holes }
    }
}

fn child(node: &Node) -> Node {
    node.first_child().expect("the walk is of this text")
}

impl Hole {
    fn build(self, here: &Node, parent: &Node, before: Option<&Node>) -> Stands {
        match self {
            Self::Child(piece) => {
                let mut state = piece.build();
                state.mount(parent, before);
                Stands::Child(state)
            }
            Self::Set { what, name, value } => {
                Stands::Set(Setting::new(here.clone().unchecked_into(), what, name, value))
            }
            Self::On(event, act) => Stands::On(Listener::new(here, &event, act)),
        }
    }
}

impl Stand {
    fn take(&mut self, filled: Filled) {
        for (stands, hole) in self.holes.iter_mut().zip(filled.holes) {
            match (stands, hole) {
                (Stands::Child(state), Hole::Child(piece)) => state.take(piece),
                (Stands::Set(setting), Hole::Set { value, .. }) => setting.take(value),
                (Stands::On(listener), Hole::On(_, act)) => listener.take(act),
                _ => debug_assert!(false, "values of one shape are of the same kinds"),
            }
        }
    }

    fn unmount(&mut self) {
        for root in &self.roots {
            match root {
                Root::Node(node) => remove(node),
                Root::Hole(at) => {
                    if let Stands::Child(state) = &mut self.holes[*at] {
                        state.unmount();
                    }
                }
            }
        }
    }
}

/// A piece in the page. Taken out of it when this is dropped.
pub struct Mounted {
    owner: Owner,
    state: State,
}

impl Drop for Mounted {
    fn drop(&mut self) {
        self.state.unmount();
        self.owner.cleanup();
    }
}

/// Puts what `make` gives at the end of `parent`.
#[must_use = "it is taken out again when this is dropped"]
pub fn mount(parent: &Node, make: impl FnOnce() -> Piece) -> Mounted {
    // An error here says that it is begun already.
    let _ = any_spawner::Executor::init_wasm_bindgen();
    let owner = Owner::new();
    let mut state = owner.with(|| make().build());
    state.mount(parent, None);
    Mounted { owner, state }
}
