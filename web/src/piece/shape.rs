//! The part of a view that never changes.

use std::cell::RefCell;
use std::sync::atomic::{AtomicUsize, Ordering};

use leptos::prelude::document;
use leptos::wasm_bindgen::JsCast;
use web_sys::{HtmlTemplateElement, Node};

/// The text and the walk of a view; see the crate `markup`.
pub struct Shape {
    html: &'static str,
    /// One letter a step.
    pub(super) walk: &'static [u8],
    /// Whether it stands inside a drawing: its elements are of another namespace.
    drawn: bool,
    /// One more than where its parsed text is kept; none yet where nought.
    kept: AtomicUsize,
}

thread_local! {
    static PARSED: RefCell<Vec<Node>> = const { RefCell::new(Vec::new()) };
}

impl Shape {
    /// A shape. Written by `view!`.
    #[must_use]
    pub const fn new(html: &'static str, walk: &'static [u8], drawn: bool) -> Self {
        Self { html, walk, drawn, kept: AtomicUsize::new(0) }
    }

    /// A fragment of its own.
    pub(super) fn copy(&self) -> Node {
        let kept = self.kept.load(Ordering::Relaxed);
        let parsed = match kept.checked_sub(1) {
            Some(at) => PARSED.with_borrow(|all| all[at].clone()),
            None => PARSED.with_borrow_mut(|all| {
                let parsed = self.parse();
                all.push(parsed.clone());
                self.kept.store(all.len(), Ordering::Relaxed);
                parsed
            }),
        };
        parsed.clone_node_with_deep(true).expect("a fragment can be copied")
    }

    fn parse(&self) -> Node {
        let template: HtmlTemplateElement =
            document().create_element("template").expect("a template can be made").unchecked_into();
        if !self.drawn {
            template.set_inner_html(self.html);
            return template.content().into();
        }
        template.set_inner_html(&format!("<svg>{}</svg>", self.html));
        let fragment = document().create_document_fragment();
        let drawing = template.content().first_child().expect("the drawing just parsed");
        while let Some(child) = drawing.first_child() {
            fragment.append_child(&child).expect("a fragment takes any node");
        }
        fragment.into()
    }
}
