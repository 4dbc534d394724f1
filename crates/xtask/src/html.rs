//! Just enough reading of our own `index.html`: tags, their attributes, and what lies between them.
//!
//! Not for pages written elsewhere: no comments, no `>` inside an attribute.

use std::ops::Range;

/// An element as it stands in the text.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Element<'a> {
    text: &'a str,
    start: usize,
    /// Of the start tag, from `<` past `>`.
    tag: &'a str,
    /// Between start tag and end tag; empty for an element that has no content.
    pub inside: &'a str,
}

impl<'a> Element<'a> {
    /// Where the whole element stands, end tag included.
    pub fn range(&self) -> Range<usize> {
        let open_end = self.start + self.tag.len();
        let end = match is_void(self.name()) {
            true => open_end,
            false => {
                let rest = &self.text[open_end + self.inside.len()..];
                open_end + self.inside.len() + rest.find('>').map_or(0, |at| at + 1)
            }
        };
        self.start..end
    }

    /// Where its start tag stands.
    pub fn tag_range(&self) -> Range<usize> {
        self.start..self.start + self.tag.len()
    }

    /// The attribute's value; `Some("")` for one without a value.
    pub fn attribute(&self, wanted: &str) -> Option<&'a str> {
        let mut rest = self.tag.strip_prefix('<')?.strip_suffix('>')?.trim_end_matches('/');
        rest = &rest[self.name().len()..];
        loop {
            rest = rest.trim_start();
            let name_end = rest.find(|c: char| c == '=' || c.is_whitespace()).unwrap_or(rest.len());
            if name_end == 0 {
                return None;
            }
            let name = &rest[..name_end];
            rest = &rest[name_end..];
            let value = match rest.strip_prefix('=') {
                None => "",
                Some(after) => {
                    let (value, after) = match after.chars().next() {
                        Some(quote @ ('"' | '\'')) => after[1..].split_once(quote)?,
                        _ => after.split_at(after.find(char::is_whitespace).unwrap_or(after.len())),
                    };
                    rest = after;
                    value
                }
            };
            if name == wanted {
                return Some(value);
            }
        }
    }

    fn name(&self) -> &'a str {
        let after = &self.tag[1..];
        &after[..after.find(|c: char| !c.is_ascii_alphanumeric()).unwrap_or(after.len())]
    }
}

fn is_void(name: &str) -> bool {
    matches!(name, "link" | "meta")
}

/// All elements of one name, in order.
pub fn elements<'a>(text: &'a str, name: &str) -> Vec<Element<'a>> {
    let open = format!("<{name}");
    let close = format!("</{name}");
    let mut found = Vec::new();
    let mut from = 0;
    while let Some(at) = text[from..].find(&open) {
        let start = from + at;
        let Some(length) = text[start..].find('>') else { break };
        let tag = &text[start..=start + length];
        from = start + tag.len();
        if !tag[open.len()..].starts_with(|c: char| c.is_whitespace() || c == '>' || c == '/') {
            continue;
        }
        let inside = match is_void(name) {
            true => "",
            false => &text[from..from + text[from..].find(&close).unwrap_or(0)],
        };
        found.push(Element { text, start, tag, inside });
        from += inside.len();
    }
    found
}

/// The text with each range replaced. The ranges may come in any order but do not overlap.
pub fn replace(text: &str, mut changes: Vec<(Range<usize>, String)>) -> String {
    changes.sort_by_key(|(range, _)| range.start);
    let mut out = String::with_capacity(text.len());
    let mut from = 0;
    for (range, with) in changes {
        out.push_str(&text[from..range.start]);
        out.push_str(&with);
        from = range.end;
    }
    out.push_str(&text[from..]);
    out
}

#[cfg(test)]
mod tests {
    use super::*;

    const PAGE: &str = r#"<meta charset=utf-8><link rel="icon" href='a b.svg' crossorigin><script type=module>1 > 0</script><scripture>"#;

    #[test]
    fn attributes_are_read_with_and_without_quotes() {
        let link = &elements(PAGE, "link")[0];
        assert_eq!(link.attribute("rel"), Some("icon"));
        assert_eq!(link.attribute("href"), Some("a b.svg"));
        assert_eq!(link.attribute("crossorigin"), Some(""));
        assert_eq!(link.attribute("integrity"), None);
        assert_eq!(elements(PAGE, "meta")[0].attribute("charset"), Some("utf-8"));
    }

    #[test]
    fn an_element_is_found_whole_and_only_by_its_whole_name() {
        let scripts = elements(PAGE, "script");
        assert_eq!(scripts.len(), 1);
        assert_eq!(scripts[0].inside, "1 > 0");
        assert_eq!(&PAGE[scripts[0].range()], "<script type=module>1 > 0</script>");
    }

    #[test]
    fn ranges_are_replaced_in_the_order_of_the_text() {
        assert_eq!(replace("abcd", vec![(2..3, "-".into()), (0..1, "".into())]), "b-d");
    }
}
