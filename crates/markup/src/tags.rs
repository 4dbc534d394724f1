//! What a parser of HTML does with some elements by itself, from the HTML standard, sections 13.1.2 and 13.2.6.

/// Elements that have no end and nothing in them.
const VOID: [&str; 13] =
    ["area", "base", "br", "col", "embed", "hr", "img", "input", "link", "meta", "source", "track", "wbr"];

/// Elements that end an open paragraph.
const ENDS_PARAGRAPH: [&str; 27] = [
    "address",
    "article",
    "aside",
    "blockquote",
    "details",
    "div",
    "dl",
    "fieldset",
    "figure",
    "figcaption",
    "footer",
    "form",
    "h1",
    "h2",
    "h3",
    "h4",
    "header",
    "hr",
    "main",
    "menu",
    "nav",
    "ol",
    "p",
    "pre",
    "section",
    "table",
    "ul",
];

/// Elements of SVG 2 that the page draws with, as they begin a view that stands inside a drawing.
const DRAWN: [&str; 12] =
    ["g", "path", "line", "rect", "circle", "ellipse", "polyline", "polygon", "text", "tspan", "use", "defs"];

/// Whether it has no end tag.
pub fn is_void(tag: &str) -> bool {
    VOID.contains(&tag)
}

/// Whether it is part of a drawing.
pub fn is_drawn(tag: &str) -> bool {
    DRAWN.contains(&tag)
}

/// Why the parser would not leave `child` inside `parent`, where it would not.
pub fn torn(parent: &str, child: &str) -> Option<&'static str> {
    match (parent, child) {
        ("p", child) if ENDS_PARAGRAPH.contains(&child) => Some("a paragraph ends where this begins"),
        ("table", "tr") => Some("a row stands in thead, tbody or tfoot"),
        ("a", "a") | ("button", "button") => Some("one of these does not stand in another"),
        _ => None,
    }
}
