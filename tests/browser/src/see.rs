//! What a person sees, and what the browser notes beside it.

use std::collections::BTreeSet;

use anyhow::{Context, Result};
use serde_json::{Value, json};

use crate::{Kind, Site};

impl Site {
    /// What the first `role="status"` region of the main part says now, every kind of space made plain.
    pub async fn status(&self) -> Result<String> {
        let region = self.role("status").await?;
        Ok(plain(region.prop("textContent").await?.unwrap_or_default().trim()))
    }

    /// All words shown now, every kind of space made plain.
    pub async fn text(&self) -> Result<String> {
        let text = self.browser.execute("return document.body.innerText", vec![]).await?;
        text.as_str().map(plain).context("the page has no text")
    }

    /// What is marked by that `data-testid` says now.
    pub async fn text_of(&self, mark: &str) -> Result<String> {
        Ok(self.marked(mark).await?.text().await?)
    }

    /// What the field holds.
    pub async fn value_of(&self, name: &str) -> Result<String> {
        Ok(self.field(name).await?.prop("value").await?.unwrap_or_default())
    }

    /// An attribute of the first element that fits the selector.
    pub async fn attribute(&self, selector: &str, name: &str) -> Result<Option<String>> {
        Ok(self.element(selector).await?.attr(name).await?)
    }

    /// Waits until a whole copy is kept: safe to lose the signal.
    pub async fn is_kept(&self) -> Result<()> {
        self.element("[data-copy=kept]").await.map(drop).context("no copy is kept")
    }

    /// Inner width and height of the page, as it sees itself.
    pub async fn size(&self) -> Result<(u64, u64)> {
        let size = self.browser.execute("return [innerWidth, innerHeight]", vec![]).await?;
        Ok((size[0].as_u64().context("no width")?, size[1].as_u64().context("no height")?))
    }

    /// How many pixels of the page lie beyond the right edge.
    pub async fn overflow(&self) -> Result<i64> {
        let script = "return document.documentElement.scrollWidth - document.documentElement.clientWidth";
        self.browser.execute(script, vec![]).await?.as_i64().context("no width")
    }

    /// Complaints on the console since this was last asked. Only Chromium's driver tells them.
    pub async fn console_errors(&self) -> Result<Vec<String>> {
        if self.kind != Kind::Chromium {
            return Ok(Vec::new());
        }
        let log = self.chromium("se/log", json!({ "type": "browser" })).await?;
        let entries = log.as_array().context("the console's log is no list")?;
        let errors = entries.iter().filter(|entry| matches!(entry["level"].as_str(), Some("SEVERE" | "WARNING")));
        Ok(errors.map(|entry| format!("{} {}", entry["level"], entry["message"])).collect())
    }

    /// Every address asked for since this was last asked, answered or not.
    ///
    /// In Chromium from its network log; elsewhere only those that the page's own timing lists.
    pub async fn requests(&self) -> Result<BTreeSet<String>> {
        let timing = "return performance.getEntries().map((it) => it.name).filter((it) => it.includes(':'))";
        let timed = self.browser.execute(timing, vec![]).await?;
        let mut asked: BTreeSet<String> = strings(&timed).collect();
        if self.kind == Kind::Chromium {
            let log = self.chromium("se/log", json!({ "type": "performance" })).await?;
            for entry in log.as_array().context("the network's log is no list")? {
                let event: Value = serde_json::from_str(entry["message"].as_str().unwrap_or("{}"))?;
                let event = &event["message"];
                if event["method"] == "Network.requestWillBeSent" {
                    asked.extend(event["params"]["request"]["url"].as_str().map(str::to_owned));
                }
            }
        }
        // The browser's own first page is not ours.
        asked.retain(|it| !["chrome://", "chrome-untrusted://", "about:"].iter().any(|own| it.starts_with(own)));
        Ok(asked)
    }

    /// The names of the caches at this address.
    pub async fn caches(&self) -> Result<Vec<String>> {
        let script = "caches.keys().then(arguments[arguments.length - 1])";
        Ok(strings(&self.browser.execute_async(script, vec![]).await?).collect())
    }
}

fn plain(text: &str) -> String {
    text.replace(['\u{202f}', '\u{a0}', '\u{2009}', '\n'], " ")
}

fn strings(list: &Value) -> impl Iterator<Item = String> + '_ {
    list.as_array().into_iter().flatten().filter_map(Value::as_str).map(str::to_owned)
}
