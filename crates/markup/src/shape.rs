//! What one view comes to: its text, its walk and its values.

use proc_macro2::{Literal, Span, TokenStream};
use quote::{format_ident, quote};
use rstml::node::{KeyedAttribute, Node, NodeAttribute, NodeBlock, NodeElement, NodeName};
use syn::{Error, Expr, Lit, Result, Stmt};

use crate::tags;

/// An element as it stands in the source.
type Tag = NodeElement<rstml::node::Infallible>;

/// Text, walk and values.
///
/// A step of the walk is a letter: `>` down to the first child, `+` on to the next, `<` up, `r` this is a root,
/// `a` the next value is one of this element, `c` the next value is a child before this, `e` the next value is a child at the end.
#[derive(Default)]
pub struct Shape {
    html: String,
    walk: String,
    values: Vec<TokenStream>,
    drawn: bool,
}

/// What stands among the children of an element once the values are set aside.
enum Item<'a> {
    Element(&'a Tag),
    Text(String),
    Value(TokenStream),
    /// Stands between two texts that a value parts, or they would be one.
    Parting,
}

impl Shape {
    /// The shape of `nodes`.
    pub fn of(nodes: &[Node]) -> Result<Self> {
        let mut shape = Self {
            drawn: nodes.iter().any(|node| name(node).is_some_and(|tag| tags::is_drawn(&tag))),
            ..Self::default()
        };
        shape.children(nodes, None)?;
        Ok(shape)
    }

    /// The code that makes the `Piece`.
    pub fn code(self) -> TokenStream {
        let Self { html, walk, values, drawn } = self;
        let walk = Literal::byte_string(walk.as_bytes());
        let count = values.len();
        quote! {{
            static SHAPE: crate::piece::Shape = crate::piece::Shape::new(#html, #walk, #drawn);
            #[allow(unused_mut)]
            let mut filled = crate::piece::Filled::new(&SHAPE, #count);
            #(filled #values;)*
            filled.done()
        }}
    }

    /// `parent` is the tag they stand in; none at the root.
    fn children(&mut self, nodes: &[Node], parent: Option<&str>) -> Result<()> {
        let items = parted(nodes)?;
        let last = items.iter().rposition(|item| !matches!(item, Item::Value(_)));
        // Where the walk stands among the children: none while it is still on the parent.
        let (mut at, mut index) = (None::<usize>, 0);
        let root = parent.is_none();
        let mut waiting: Vec<TokenStream> = Vec::new();
        for (place, item) in items.into_iter().enumerate() {
            let (inner, visit) = match item {
                Item::Value(value) => {
                    if last.is_some_and(|last| place < last) {
                        waiting.push(value);
                        continue;
                    }
                    // Nothing that stays follows it.
                    if at.take().is_some() {
                        self.walk.push('<');
                    }
                    self.walk.push('e');
                    self.values.push(value);
                    continue;
                }
                Item::Text(text) => {
                    self.html.push_str(&escaped(&text));
                    (None, false)
                }
                Item::Parting => {
                    self.html.push_str("<!>");
                    (None, false)
                }
                Item::Element(element) => (Some(element), self.is_busy(element)),
            };
            if root || visit || !waiting.is_empty() {
                match at {
                    None => {
                        self.walk.push('>');
                        self.walk.extend(std::iter::repeat_n('+', index));
                    }
                    Some(before) => self.walk.extend(std::iter::repeat_n('+', index - before)),
                }
                at = Some(index);
                for value in waiting.drain(..) {
                    self.walk.push('c');
                    self.values.push(value);
                }
                if root {
                    self.walk.push('r');
                }
            }
            if let Some(element) = inner {
                self.element(element, parent)?;
            }
            index += 1;
        }
        if at.is_some() {
            self.walk.push('<');
        }
        Ok(())
    }

    /// Whether the walk has to stop at it or below it.
    fn is_busy(&self, element: &Tag) -> bool {
        let attributes = element.open_tag.attributes.iter();
        let mut attributes = attributes.map(|one| matches!(one, NodeAttribute::Attribute(one) if fixed(one).is_some()));
        attributes.any(|is_fixed| !is_fixed)
            || element.children.iter().any(|child| match child {
                Node::Element(child) => self.is_busy(child),
                Node::Block(_) => true,
                _ => false,
            })
    }

    fn element(&mut self, element: &Tag, parent: Option<&str>) -> Result<()> {
        let tag = element.open_tag.name.to_string();
        if let Some(why) = parent.and_then(|parent| tags::torn(parent, &tag)) {
            return Err(Error::new_spanned(&element.open_tag.name, why));
        }
        if tag.starts_with(char::is_uppercase) {
            return Err(Error::new_spanned(
                &element.open_tag.name,
                "a part of the page is a function: write {part(..)}",
            ));
        }
        self.html.push('<');
        self.html.push_str(&tag);
        let mut values = Vec::new();
        for attribute in &element.open_tag.attributes {
            let NodeAttribute::Attribute(one) = attribute else {
                return Err(Error::new_spanned(attribute, "an attribute has a name"));
            };
            match fixed(one) {
                Some(text) => {
                    self.html.push_str(&format!(" {}=\"{}\"", one.key, escaped(&text)));
                }
                None => values.push(filled(one)?),
            }
        }
        self.html.push('>');
        self.walk.extend(std::iter::repeat_n('a', values.len()));
        self.values.extend(values);
        if tags::is_void(&tag) {
            return Ok(());
        }
        self.children(&element.children, Some(&tag))?;
        self.html.push_str(&format!("</{tag}>"));
        Ok(())
    }
}

fn name(node: &Node) -> Option<String> {
    match node {
        Node::Element(element) => Some(element.open_tag.name.to_string()),
        _ => None,
    }
}

/// The children, texts that touch made one, and those that only a value parts kept apart.
fn parted(nodes: &[Node]) -> Result<Vec<Item<'_>>> {
    let mut items: Vec<Item> = Vec::new();
    for node in nodes {
        match node {
            Node::Element(element) => items.push(Item::Element(element)),
            Node::Text(text) => {
                let text = text.value_string();
                let stays = items.iter().rposition(|item| !matches!(item, Item::Value(_)));
                match stays {
                    Some(at) if at + 1 == items.len() => {
                        if let Item::Text(before) = &mut items[at] {
                            before.push_str(&text);
                            continue;
                        }
                    }
                    Some(at) if matches!(items[at], Item::Text(_)) => items.push(Item::Parting),
                    _ => {}
                }
                items.push(Item::Text(text));
            }
            Node::Block(block) => {
                let value = plain(block);
                items.push(Item::Value(quote! { .child(#value) }));
            }
            Node::Comment(_) => {}
            other => return Err(Error::new_spanned(other, "markup is elements, texts and values")),
        }
    }
    Ok(items)
}

/// What stands between braces, without them where it is one value.
fn plain(block: &NodeBlock) -> TokenStream {
    match block {
        NodeBlock::ValidBlock(block) => match block.stmts.as_slice() {
            [Stmt::Expr(value, None)] => quote! { #value },
            _ => quote! { #block },
        },
        NodeBlock::Invalid(block) => quote! { #block },
    }
}

/// The text of an attribute that never changes.
fn fixed(one: &KeyedAttribute) -> Option<String> {
    if special(&one.key).is_some() {
        return None;
    }
    match &one.possible_value {
        rstml::node::KeyedAttributeValue::None => Some(String::new()),
        // A value that is no text, as `true`, says whether the attribute is there.
        _ => match one.value()? {
            Expr::Lit(literal) if !matches!(literal.lit, Lit::Bool(_)) => one.value_literal_string(),
            _ => None,
        },
    }
}

/// The part before the colon of `on:click`, and the part after it; `style` and `inner_html` stand for themselves.
fn special(key: &NodeName) -> Option<(String, String)> {
    let key = key.to_string();
    match key.split_once(':') {
        Some((kind, name)) if ["on", "prop", "class"].contains(&kind) => Some((kind.to_owned(), name.to_owned())),
        _ if key == "style" || key == "inner_html" => Some((key, String::new())),
        _ => None,
    }
}

/// The call that puts the value of an attribute in.
fn filled(one: &KeyedAttribute) -> Result<TokenStream> {
    let value = one.value().ok_or_else(|| Error::new_spanned(one, "this needs a value"))?;
    let key = one.key.to_string();
    Ok(match special(&one.key) {
        None => quote! { .attribute(#key, #value) },
        Some((kind, name)) => match kind.as_str() {
            "on" => {
                let event = format_ident!("{name}", span = Span::call_site());
                quote! { .on(::leptos::ev::#event, #value) }
            }
            "prop" => quote! { .property(#name, #value) },
            "class" => quote! { .class(#name, #value) },
            "style" => match value {
                Expr::Tuple(pair) if pair.elems.len() == 2 => {
                    let (name, value) = (&pair.elems[0], &pair.elems[1]);
                    quote! { .style(#name, #value) }
                }
                _ => return Err(Error::new_spanned(value, "a style is a pair: its name and its value")),
            },
            _ => quote! { .html(#value) },
        },
    })
}

/// Text as it stands in HTML, HTML standard, section 13.3.
fn escaped(text: &str) -> String {
    text.replace('&', "&amp;").replace('<', "&lt;").replace('>', "&gt;").replace('"', "&quot;")
}

#[cfg(test)]
mod tests {
    use super::*;
    use rstml::{Parser, ParserConfig};

    fn shape(markup: TokenStream) -> Result<Shape> {
        let parser = Parser::<rstml::node::Infallible>::new(ParserConfig::default().recover_block(true));
        Shape::of(&parser.parse_recoverable(markup).into_result()?)
    }

    fn told(markup: TokenStream) -> (String, String, Vec<String>) {
        let Shape { html, walk, values, .. } = shape(markup).unwrap();
        (html, walk, values.iter().map(ToString::to_string).collect())
    }

    #[test]
    fn what_never_changes_is_text_alone() {
        let (html, walk, values) = told(quote! { <p class="say" hidden>"1 < 2" <br/> "& more"</p> });
        assert_eq!(html, "<p class=\"say\" hidden=\"\">1 &lt; 2<br>&amp; more</p>");
        assert_eq!((walk.as_str(), values.len()), (">r<", 0));
    }

    #[test]
    fn the_walk_goes_only_to_where_values_belong() {
        let (html, walk, values) =
            told(quote! { <div><p>"still"</p><p id=id on:click=press>"a " {b} " c"</p><p>{d}</p></div> });
        assert_eq!(html, "<div><p>still</p><p>a <!> c</p><p></p></div>");
        // Down to the root; down, on to the second; two values; down, on to the mark; a child before it; up; on; a child at the end.
        assert_eq!(walk, ">r>+aa>+c<+e<<");
        let called: Vec<&str> = values.iter().map(|value| value.split('(').next().unwrap().trim()).collect();
        assert_eq!(called, [". attribute", ". on", ". child", ". child"]);
    }

    #[test]
    fn values_at_the_root_stand_in_order() {
        let (html, walk, values) = told(quote! { {a} <i>"b"</i> {c} "d" {e} "f" {g} });
        assert_eq!(html, "<i>b</i>d<!>f");
        assert_eq!((walk.as_str(), values.len()), (">cr+cr+cr+r<e", 4));
    }

    #[test]
    fn what_a_parser_would_tear_apart_is_refused() {
        let why = |markup| shape(markup).err().map(|error| error.to_string()).unwrap_or_default();
        assert_eq!(why(quote! { <p>"a"<div>"b"</div></p> }), "a paragraph ends where this begins");
        assert_eq!(why(quote! { <table><tr><td>"b"</td></tr></table> }), "a row stands in thead, tbody or tfoot");
        assert_eq!(why(quote! { <Part/> }), "a part of the page is a function: write {part(..)}");
        assert_eq!(why(quote! { <p style="color: red">"a"</p> }), "a style is a pair: its name and its value");
    }

    #[test]
    fn a_view_within_a_drawing_knows_it() {
        assert!(shape(quote! { <path d="M0 0"/> }).unwrap().drawn);
        assert!(!shape(quote! { <svg><path d="M0 0"/></svg> }).unwrap().drawn);
    }
}
