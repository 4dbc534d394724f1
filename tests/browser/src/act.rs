//! What a person does.

use std::path::Path;

use anyhow::{Context, Result, bail, ensure};
use fantoccini::{
    elements::Element,
    wd::{WebDriverCompatibleCommand, WindowHandle},
};
use serde_json::{Value, json};

use crate::{Kind, Site};

impl Site {
    /// Opens the page at its address and waits until it stands.
    pub async fn load(&self) -> Result<()> {
        self.browser.goto(&self.address()).await?;
        self.stands().await
    }

    /// Loads it again, as the reload button does.
    pub async fn reload(&self) -> Result<()> {
        self.browser.refresh().await.context("the page does not load again")?;
        self.stands().await
    }

    /// Opens a file of this machine as a page.
    pub async fn open_file(&self, file: &Path) -> Result<()> {
        self.browser.goto(&format!("file://{}", file.display())).await?;
        self.stands().await
    }

    /// The page has put itself into the document.
    async fn stands(&self) -> Result<()> {
        self.element("main").await.map(drop).context("the page does not start")
    }

    /// Puts the text in place of what the field holds, key by key.
    pub async fn type_into(&self, name: &str, text: &str) -> Result<()> {
        let field = self.field(name).await?;
        self.empty(&field).await?;
        field.send_keys(text).await?;
        let holds = field.prop("value").await?.unwrap_or_default();
        ensure!(holds == text, "typed `{text}` into {name}, but it holds `{holds}`");
        Ok(())
    }

    /// Adds the text to what the field holds.
    pub async fn type_on(&self, name: &str, text: &str) -> Result<()> {
        Ok(self.field(name).await?.send_keys(text).await?)
    }

    /// Empties the field.
    pub async fn clear(&self, name: &str) -> Result<()> {
        let field = self.field(name).await?;
        self.empty(&field).await
    }

    /// By keys, so that the page hears of it as it would from a hand.
    async fn empty(&self, field: &Element) -> Result<()> {
        const BACKSPACE: &str = "\u{e003}";
        const END: &str = "\u{e010}";
        let holds = field.prop("value").await?.unwrap_or_default();
        if !holds.is_empty() {
            field.send_keys(&format!("{END}{}", BACKSPACE.repeat(holds.chars().count()))).await?;
        }
        Ok(())
    }

    /// Opens the page in another tab of the same browser and goes there. Gives back the tab that was left.
    pub async fn another_tab(&self, path: &str) -> Result<WindowHandle> {
        let before = self.browser.window().await?;
        let opened = self.browser.new_window(true).await?;
        self.browser.switch_to_window(opened.handle).await?;
        self.browser.goto(&format!("{}{path}", self.address())).await?;
        Ok(before)
    }

    /// Goes to a tab that is open.
    pub async fn go_to_tab(&self, tab: WindowHandle) -> Result<()> {
        Ok(self.browser.switch_to_window(tab).await?)
    }

    /// Leaves the field that has the caret, as the tab key does.
    pub async fn leave(&self) -> Result<()> {
        Ok(self.browser.active_element().await?.send_keys("\u{e004}").await?)
    }

    /// Presses what has that name.
    pub async fn press(&self, name: &str) -> Result<()> {
        // A page that is only just put up goes to its head once it is painted: what was brought up may be moved again.
        self.wait_for(&format!("\"{name}\" to be pressed"), async || {
            let button = self.button(name).await?;
            self.bring_up(&button).await?;
            button.click().await.map(Some).with_context(|| format!("cannot press \"{name}\""))
        })
        .await
    }

    /// Chooses from a list by the words shown; where the choices are buttons, presses the one of that name.
    pub async fn choose(&self, name: &str, option: &str) -> Result<()> {
        let field = self.field(name).await?;
        if field.tag_name().await? == "select" {
            return Ok(field.select_by_label(option).await?);
        }
        self.press(option).await
    }

    /// Opens what is folded under that name, if it is not open already.
    pub async fn unfold(&self, name: &str) -> Result<()> {
        let fold = self.button(name).await?;
        let open = self.browser.execute(
            "const it = arguments[0]; return it.getAttribute('aria-expanded') === 'true' || !!it.parentElement?.open",
            vec![serde_json::to_value(&fold)?],
        );
        if open.await? == Value::Bool(true) {
            return Ok(());
        }
        self.press(name).await
    }

    /// Scrolls until the element lies in the middle, clear of what stands fixed at the edges, as a person does.
    async fn bring_up(&self, element: &Element) -> Result<()> {
        let script = "arguments[0].scrollIntoView({ block: 'center', behavior: 'instant' })";
        self.browser.execute(script, vec![serde_json::to_value(element)?]).await?;
        Ok(())
    }

    /// Runs a script in the page and gives what it returns. For what no hand can do.
    pub async fn run(&self, script: &str, arguments: &[Value]) -> Result<Value> {
        Ok(self.browser.execute(script, arguments.to_vec()).await?)
    }

    /// Runs a script in every page from now on, before the page's own. Chromium only.
    pub async fn before_load(&self, script: &str) -> Result<()> {
        let add = json!({ "cmd": "Page.addScriptToEvaluateOnNewDocument", "params": { "source": script } });
        self.chromium("goog/cdp/execute", add).await.map(drop)
    }

    /// Drops a file of these bytes on the page, and gives what the page says of it once it says so.
    pub async fn drop_file(&self, name: &str, bytes: &[u8]) -> Result<String> {
        // One character for each byte.
        let bytes: String = bytes.iter().copied().map(char::from).collect();
        self.dropped(json!({ "name": name, "bytes": bytes })).await
    }

    /// Drops text on the page, and gives what the page says of it.
    pub async fn drop_text(&self, text: &str) -> Result<String> {
        self.dropped(json!({ "text": text })).await
    }

    async fn dropped(&self, what: Value) -> Result<String> {
        let script = r#"return (async (what) => {
            const wait = async (look) => {
              for (;;) {
                const found = look();
                if (found) return found;
                await new Promise((then) => setTimeout(then, 5));
              }
            };
            const told = () => [...document.querySelectorAll(".notice p")].map((it) => it.textContent)
              .find((it) => /^(Opened|Not opened)/.test(it));
            for (const close of document.querySelectorAll(".notice .quiet")) close.click();
            await wait(() => !told());
            const data = new DataTransfer();
            if (what.text === undefined) {
              data.items.add(new File([Uint8Array.from(what.bytes, (it) => it.charCodeAt(0))], what.name));
            } else {
              data.setData("text/plain", what.text);
            }
            const event = (kind) => new DragEvent(kind, { dataTransfer: data, bubbles: true, cancelable: true });
            const main = document.querySelector("main");
            const over = event("dragover");
            main.dispatchEvent(over);
            if (!over.defaultPrevented) throw new Error("the page takes nothing that is dropped");
            await wait(() => document.querySelector(".landing"));
            main.dispatchEvent(event("drop"));
            await wait(() => !document.querySelector(".landing"));
            return wait(told);
          })(arguments[0])"#;
        let said = self.run(script, &[what]).await?;
        said.as_str().map(str::to_owned).context("the page says nothing of it")
    }

    /// Makes the processor so many times slower. Chromium only.
    async fn slow_down(&self, times: f64) -> Result<()> {
        self.chromium(
            "goog/cdp/execute",
            json!({ "cmd": "Emulation.setCPUThrottlingRate", "params": { "rate": times } }),
        )
        .await
        .map(drop)
    }

    /// Types five keys into the field after `text`, the processor six times slower: milliseconds from a key to the painted answer,
    /// in order.
    pub async fn keystrokes_slowed(&self, name: &str, text: &str) -> Result<Vec<f64>> {
        self.slow_down(6.0).await?;
        let mut times = Vec::new();
        for key in ['1', '2', '3', '4', '5'] {
            self.type_into(name, text).await?;
            times.push(self.keystroke_to_paint(name, key).await?);
        }
        self.slow_down(1.0).await?;
        times.sort_by(f64::total_cmp);
        Ok(times)
    }

    /// Types one more character into the field: milliseconds of work from the key to the painted answer.
    ///
    /// The wait for the screen's next frame is left out: it is the screen's, and up to 17 ms.
    async fn keystroke_to_paint(&self, name: &str, key: char) -> Result<f64> {
        let field = self.field(name).await?;
        // The first message comes when the key's own work is done, the second when the frame after it is painted.
        let listen = r#"
            window.linehutPainted = null;
            const soon = (then) => { const way = new MessageChannel(); way.port1.onmessage = then; way.port2.postMessage(0); };
            arguments[0].addEventListener("beforeinput", () => {
              const key = performance.now();
              let worked;
              soon(() => { worked = performance.now() - key; });
              requestAnimationFrame(() => {
                const frame = performance.now();
                soon(() => { window.linehutPainted = (worked ?? 0) + performance.now() - frame; });
              });
            }, { once: true, capture: true });"#;
        self.browser.execute(listen, vec![serde_json::to_value(&field)?]).await?;
        field.send_keys(&key.to_string()).await?;
        self.wait_for("the painted answer", async || {
            Ok(self.browser.execute("return window.linehutPainted", vec![]).await?.as_f64())
        })
        .await
    }

    /// A command that only Chromium's driver knows.
    pub(crate) async fn chromium(&self, path: &'static str, body: Value) -> Result<Value> {
        if self.kind != Kind::Chromium {
            bail!("only Chromium does {path}");
        }
        Ok(self.browser.issue_cmd(Own { path, body }).await?)
    }
}

#[derive(Debug)]
struct Own {
    path: &'static str,
    body: Value,
}

impl WebDriverCompatibleCommand for Own {
    fn endpoint(&self, base: &url::Url, session: Option<&str>) -> Result<url::Url, url::ParseError> {
        base.join(&format!("session/{}/{}", session.unwrap_or_default(), self.path))
    }

    fn method_and_body(&self, _: &url::Url) -> (http::Method, Option<String>) {
        (http::Method::POST, Some(self.body.to_string()))
    }
}
