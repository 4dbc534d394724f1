//! The browser and the program that drives it.

use std::{
    env, fs,
    net::{Ipv4Addr, TcpListener, TcpStream},
    path::{Path, PathBuf},
    process::{Child, Command, Stdio},
    thread,
    time::{Duration, Instant},
};

use anyhow::{Context, Result, bail};
use fantoccini::{Client, ClientBuilder, wd::Capabilities};
use hyper_util::client::legacy::connect::HttpConnector;
use serde_json::{Value, json};

/// How long a driver may take until it listens.
const STARTING: Duration = Duration::from_secs(30);

/// Which browser runs the tests.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Kind {
    /// What continuous integration runs.
    Chromium,
    /// Needs geckodriver.
    Firefox,
    /// WebKitGTK; needs a display, such as xvfb's.
    WebKit,
}

/// The size of the page on the screen, in CSS pixels.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Screen {
    /// Across.
    pub width: u32,
    /// Down.
    pub height: u32,
}

impl Screen {
    /// A phone as most are.
    pub const PHONE: Self = Self { width: 390, height: 844 };
    /// The narrowest phone that is still about.
    pub const NARROW: Self = Self { width: 320, height: 640 };
}

impl Kind {
    /// The one asked for by `LINEHUT_BROWSER`.
    pub fn asked() -> Result<Self> {
        match env::var("LINEHUT_BROWSER").as_deref() {
            Err(_) | Ok("chromium") => Ok(Self::Chromium),
            Ok("firefox") => Ok(Self::Firefox),
            Ok("webkit") => Ok(Self::WebKit),
            Ok(other) => bail!("LINEHUT_BROWSER is `{other}`: chromium, firefox or webkit"),
        }
    }

    fn driver(self) -> PathBuf {
        let usual = match self {
            Self::Chromium => "chromedriver",
            Self::Firefox => "geckodriver",
            Self::WebKit => "WebKitWebDriver",
        };
        env::var_os("LINEHUT_DRIVER").map_or_else(|| usual.into(), PathBuf::from)
    }

    fn capabilities(self, screen: Screen, profile: &Path) -> Capabilities {
        let program = env::var("LINEHUT_BROWSER_PROGRAM").ok();
        let mut wanted = match self {
            Self::Chromium => json!({
                "goog:loggingPrefs": { "browser": "ALL", "performance": "ALL" },
                "goog:chromeOptions": {
                    "args": [
                        "--headless=new", "--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run",
                        "--disable-background-networking", "--disable-component-update", "--disable-sync",
                        "--disable-dev-shm-usage",
                        format!("--user-data-dir={}", profile.display()),
                    ],
                    // A window cannot be made as narrow as a phone; the page's metrics can.
                    "mobileEmulation": {
                        "deviceMetrics": {
                            "width": screen.width, "height": screen.height, "pixelRatio": 2.0, "touch": true,
                        },
                    },
                },
            }),
            Self::Firefox => json!({
                "moz:firefoxOptions": {
                    "args": ["-headless", "-width", screen.width.to_string(), "-height", screen.height.to_string()],
                },
            }),
            Self::WebKit => json!({ "webkitgtk:browserOptions": { "args": ["--automation"] } }),
        };
        let options = match self {
            Self::Chromium => "goog:chromeOptions",
            Self::Firefox => "moz:firefoxOptions",
            Self::WebKit => "webkitgtk:browserOptions",
        };
        if let Some(program) = program {
            wanted[options]["binary"] = program.into();
        }
        match wanted {
            Value::Object(wanted) => wanted,
            _ => Capabilities::new(),
        }
    }
}

/// A running driver with a profile nobody has used before.
pub struct Driver {
    kind: Kind,
    port: u16,
    process: Child,
    profile: PathBuf,
}

impl Driver {
    /// Starts it and waits until it listens.
    pub fn start(kind: Kind, scratch: &Path) -> Result<Self> {
        let port = TcpListener::bind((Ipv4Addr::LOCALHOST, 0))?.local_addr()?.port();
        let program = kind.driver();
        let process = Command::new(&program)
            .args(match kind {
                Kind::Chromium | Kind::WebKit => vec![format!("--port={port}")],
                Kind::Firefox => vec!["--port".into(), port.to_string(), "--websocket-port".into(), "0".into()],
            })
            .stdin(Stdio::null())
            .stdout(Stdio::null())
            .stderr(Stdio::null())
            .spawn()
            .with_context(|| format!("cannot start {}", program.display()))?;
        let profile = scratch.join("profile");
        fs::create_dir_all(&profile)?;
        let driver = Self { kind, port, process, profile };
        let began = Instant::now();
        while TcpStream::connect((Ipv4Addr::LOCALHOST, port)).is_err() {
            if began.elapsed() > STARTING {
                bail!("{} does not listen on port {port}", program.display());
            }
            thread::sleep(Duration::from_millis(20));
        }
        Ok(driver)
    }

    /// Opens a window of that size.
    pub async fn open(&self, screen: Screen) -> Result<Client> {
        let client = ClientBuilder::new(HttpConnector::new())
            .capabilities(self.kind.capabilities(screen, &self.profile))
            .connect(&format!("http://127.0.0.1:{}", self.port))
            .await
            .context("the browser does not start")?;
        if self.kind != Kind::Chromium {
            // As near as the window manager lets it come.
            let _ = client.set_window_size(screen.width, screen.height).await;
        }
        Ok(client)
    }
}

impl Driver {
    /// Kills the browser, every process of it, with no word of warning. Linux only.
    pub fn kill_browser(&self) -> Result<()> {
        let mark = self.profile.display().to_string();
        let ours = |process: &fs::DirEntry| {
            // One that is gone meanwhile has no line.
            let line = fs::read(process.path().join("cmdline")).unwrap_or_default();
            String::from_utf8_lossy(&line).contains(&mark)
        };
        let processes: Vec<String> = fs::read_dir("/proc")?
            .flatten()
            .filter(|process| process.file_name().to_string_lossy().bytes().all(|letter| letter.is_ascii_digit()))
            .filter(ours)
            .map(|process| process.file_name().to_string_lossy().into_owned())
            .collect();
        if processes.is_empty() {
            bail!("no process of the browser is found");
        }
        // One that ended with another is no failure; what is left is.
        Command::new("kill").arg("-9").args(&processes).stderr(Stdio::null()).status()?;
        let began = Instant::now();
        while processes.iter().any(|process| is_running(process)) {
            if began.elapsed() > STARTING {
                bail!("the browser does not die");
            }
            thread::sleep(Duration::from_millis(5));
        }
        // What a browser that was killed leaves behind, and would not start over.
        for lock in ["SingletonLock", "SingletonCookie", "SingletonSocket"] {
            let _ = fs::remove_file(self.profile.join(lock));
        }
        Ok(())
    }
}

/// Whether it still runs: one that only waits to be counted off does not.
fn is_running(process: &str) -> bool {
    let state = fs::read_to_string(format!("/proc/{process}/stat")).unwrap_or_default();
    state.rsplit_once(')').is_some_and(|(_, rest)| !rest.trim_start().starts_with('Z'))
}

impl Drop for Driver {
    fn drop(&mut self) {
        // Already gone is as good.
        let _ = self.process.kill();
        let _ = self.process.wait();
    }
}
