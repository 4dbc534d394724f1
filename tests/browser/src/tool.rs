//! What the tests of all tools do and expect alike.

use anyhow::{Context, Result, bail, ensure};

use crate::Site;

/// Each tool and the question on its row.
const TOOLS: [(&str, &str); 6] = [
    ("String", "How many in series?"),
    ("Cells", "How do cells make a bank?"),
    ("Run", "Which cable and breaker?"),
    ("Start", "Will it start?"),
    ("Settings", "What to key in?"),
    ("Air and water", "What does its room need?"),
];

impl Site {
    /// Opens a tool from the first page, as a thumb does.
    pub async fn open_tool(&self, tool: &str) -> Result<()> {
        self.load().await?;
        self.press_tool(tool).await
    }

    /// Goes from one tool to another by the first page.
    pub async fn go_on_to(&self, tool: &str) -> Result<()> {
        self.press("All tools").await?;
        self.press_tool(tool).await
    }

    /// Presses a tool's row on the first page, which asks its question, and waits until it stands.
    pub async fn press_tool(&self, tool: &str) -> Result<()> {
        let question = TOOLS.iter().find(|(name, _)| *name == tool).with_context(|| format!("no tool {tool}"))?.1;
        self.press(&format!("{question} {tool}")).await?;
        self.heading(tool).await.map(drop)
    }

    /// Types each text into the field of that name.
    pub async fn enter(&self, entries: &[(&str, &str)]) -> Result<()> {
        for (name, text) in entries {
            self.type_into(name, text).await?;
        }
        Ok(())
    }

    /// Waits until the status says these words among others.
    pub async fn says(&self, words: &str) -> Result<()> {
        self.wait_for(&format!("the status to say \"{words}\""), async || {
            let status = self.status().await?;
            if status.contains(words) { Ok(Some(())) } else { bail!("it says \"{status}\"") }
        })
        .await
    }

    /// Waits until the whole page shows these words somewhere.
    pub async fn shows(&self, words: &str) -> Result<()> {
        self.wait_for(&format!("the page to show \"{words}\""), async || {
            Ok(self.text().await?.contains(words).then_some(()))
        })
        .await
    }

    /// A wrong entry: once the field is left it stays as typed, its reason is shown, and the answer asks.
    pub async fn refuses(&self, name: &str, text: &str, reason: &str) -> Result<()> {
        self.type_into(name, text).await?;
        self.leave().await?;
        self.shows(reason).await?;
        ensure!(self.value_of(name).await? == text, "{name} keeps what was typed");
        self.says("asks").await
    }

    /// Nothing lies beyond the right edge.
    pub async fn fits(&self) -> Result<()> {
        let beyond = self.overflow().await?;
        ensure!(beyond == 0, "{beyond} px beyond the edge");
        Ok(())
    }

    /// Nothing was complained of on the console.
    pub async fn no_complaints(&self) -> Result<()> {
        let complaints = self.console_errors().await?;
        ensure!(complaints.is_empty(), "{complaints:#?}");
        Ok(())
    }

    /// Waits until a whole copy of the page is kept. False where this browser can keep none while it is driven.
    pub async fn keeps_a_copy(&self) -> Result<bool> {
        if self.attribute("[data-copy]", "data-copy").await?.as_deref() == Some("not-possible") {
            return Ok(false);
        }
        self.is_kept().await.map(|()| true)
    }

    /// Every write has been answered: the badge says kept.
    pub async fn is_written(&self) -> Result<()> {
        self.element(".kept[data-state=kept]").await.map(drop)
    }

    /// The signal goes, once what was typed is written.
    pub async fn lose_signal(&self) -> Result<()> {
        self.is_written().await?;
        self.stop_server();
        ensure!(!self.server_answers(), "the server still answers");
        Ok(())
    }
}
