//! Where things are: by the name a screen reader says, by role, by `data-testid`.

use anyhow::{Context, Result};
use fantoccini::{
    Locator,
    elements::{Element, ElementRef},
};
use serde_json::{Value, json};

use crate::Site;

/// The first shown element out of those selected whose accessible name is the one wanted.
/// The rules of the name, shortened to what we use: labelled-by, aria-label, label, content, title.
const NAMED: &str = r#"
const [selector, wanted] = arguments;
const words = (text) => (text ?? "").replace(/\s+/g, " ").trim();
const spoken = (node) => {
  if (node.nodeType === Node.TEXT_NODE) return node.data;
  if (node.nodeType !== Node.ELEMENT_NODE || node.getAttribute("aria-hidden") === "true") return "";
  const said = node.getAttribute("aria-label") ?? [...node.childNodes].map(spoken).join("");
  return getComputedStyle(node).display.startsWith("inline") ? said : ` ${said} `;
};
const name = (it) => {
  const by = it.getAttribute("aria-labelledby");
  if (by) return words(by.split(/\s+/).map((id) => document.getElementById(id)).filter(Boolean).map(spoken).join(" "));
  if (it.getAttribute("aria-label")) return words(it.getAttribute("aria-label"));
  if (it.labels?.length) return words([...it.labels].map(spoken).join(" "));
  if (it.matches("button, a, summary, h1, h2, h3, [role]")) return words(spoken(it));
  return words(it.getAttribute("title"));
};
return [...document.querySelectorAll(selector)].find((it) => name(it) === wanted && it.getClientRects().length) ?? null;
"#;

const FIELDS: &str = "input, select, textarea, [role=combobox], [role=radiogroup], [role=spinbutton], fieldset";
const PRESSED: &str = "button, a, summary, [role=button], [role=tab], [role=radio], [role=switch], input[type=radio], \
                       input[type=checkbox]";

impl Site {
    /// The field of exactly that accessible name.
    pub async fn field(&self, name: &str) -> Result<Element> {
        self.named("field", FIELDS, name).await
    }

    /// What is pressed and has exactly that accessible name.
    pub async fn button(&self, name: &str) -> Result<Element> {
        self.named("button", PRESSED, name).await
    }

    /// The heading of exactly those words.
    pub async fn heading(&self, words: &str) -> Result<Element> {
        self.named("heading", "h1, h2, h3, [role=heading]", words).await
    }

    /// The element marked for tests by that `data-testid`.
    pub async fn marked(&self, mark: &str) -> Result<Element> {
        self.element(&format!("[data-testid=\"{mark}\"]")).await
    }

    /// The first element of that role in the main part of the page.
    pub async fn role(&self, role: &str) -> Result<Element> {
        self.element(&format!("main [role=\"{role}\"]")).await
    }

    /// The first element that fits the selector. For what has neither name, role nor mark.
    pub async fn element(&self, selector: &str) -> Result<Element> {
        self.wait_for(&format!("something like {selector}"), async || {
            let found = self.browser.find_all(Locator::Css(selector)).await?;
            Ok(found.into_iter().next())
        })
        .await
    }

    /// How many shown elements fit the selector at this moment.
    pub async fn count(&self, selector: &str) -> Result<usize> {
        let script =
            "return [...document.querySelectorAll(arguments[0])].filter((it) => it.getClientRects().length).length";
        let count = self.browser.execute(script, vec![json!(selector)]).await?;
        Ok(count.as_u64().context("no count")? as usize)
    }

    /// Whether something to press with that name is there at this moment.
    pub async fn has_button(&self, name: &str) -> Result<bool> {
        Ok(!self.browser.execute(NAMED, vec![json!(PRESSED), json!(name)]).await?.is_null())
    }

    async fn named(&self, kind: &str, selector: &str, name: &str) -> Result<Element> {
        self.wait_for(&format!("the {kind} \"{name}\""), async || {
            let found = self.browser.execute(NAMED, vec![json!(selector), json!(name)]).await?;
            Ok(self.as_element(&found))
        })
        .await
    }

    /// An element as WebDriver hands it out of a script.
    fn as_element(&self, found: &Value) -> Option<Element> {
        let id = found.as_object()?.values().next()?.as_str()?;
        Some(Element::from_element_id(self.browser.clone(), ElementRef::from(id.to_owned())))
    }
}
