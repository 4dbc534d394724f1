//! One test: a server, a browser, and what is left behind when it fails.

use std::{
    cell::RefCell,
    env, fs,
    future::Future,
    panic::{AssertUnwindSafe, resume_unwind},
    path::{Path, PathBuf},
    thread,
    time::{Duration, Instant},
};

use anyhow::{Context, Result, bail};
use fantoccini::Client;
use futures_util::FutureExt;
use xtask::{folder::Folder, root, stamp};

use crate::driver::{Driver, Kind, Screen};

/// How long anything may take to come. Far beyond what it takes: a busy machine must not fail a test.
const PATIENCE: Duration = Duration::from_secs(30);
/// How often to look.
const GLANCE: Duration = Duration::from_millis(20);

/// The built page on a server of its own, open in a browser nobody has used before.
pub struct Site {
    pub(crate) browser: Client,
    /// Which browser it is.
    pub kind: Kind,
    /// The size asked for. Only Chromium keeps to it below about 500 px.
    pub screen: Screen,
    port: u16,
    server: RefCell<Option<Folder>>,
    scratch: PathBuf,
}

/// Opens the page at this size and does the test; panics with what went wrong, beside a picture of it.
pub fn visit(screen: Screen, test: impl AsyncFnOnce(&Site) -> Result<()>) {
    let runtime = tokio::runtime::Builder::new_current_thread().enable_all().build().expect("a runtime can be made");
    let name = thread::current().name().unwrap_or("test").replace("::", "-");
    let scratch = env::temp_dir().join(format!("linehut-{}-{name}", std::process::id()));
    let outcome = runtime.block_on(async {
        let (site, driver) = Site::open(screen, &scratch).await?;
        let done = AssertUnwindSafe(async {
            site.load().await?;
            test(&site).await
        });
        let done = done.catch_unwind().await;
        if !matches!(done, Ok(Ok(()))) {
            site.leave_picture(&name).await;
        }
        // The driver ends with it, but an orderly end takes the browser's other processes along.
        let _ = site.browser.clone().close().await;
        drop(driver);
        done.unwrap_or_else(|panic| resume_unwind(panic))
    });
    // A profile that cannot be removed is litter, not a failure.
    let _ = fs::remove_dir_all(&scratch);
    if let Err(error) = outcome {
        panic!("{error:#}");
    }
}

/// Opens the page again and again in a browser of one profile, does the test, and kills the browser each time.
///
/// The test is told which time it is. Chromium on Linux only; elsewhere nothing is done.
pub fn visit_and_kill(screen: Screen, times: usize, test: impl AsyncFn(&Site, usize) -> Result<()>) {
    if !cfg!(target_os = "linux") || !matches!(Kind::asked(), Ok(Kind::Chromium)) {
        return;
    }
    let runtime = tokio::runtime::Builder::new_current_thread().enable_all().build().expect("a runtime can be made");
    let name = thread::current().name().unwrap_or("test").replace("::", "-");
    let scratch = env::temp_dir().join(format!("linehut-{}-{name}", std::process::id()));
    let mut server = None;
    for time in 0..times {
        let outcome: Result<()> = runtime.block_on(async {
            // The same address each time: what is kept belongs to it.
            let kept = server.take();
            let (site, driver) = Site::open_with(screen, &scratch, kept).await?;
            let done = async {
                site.load().await?;
                test(&site, time).await
            };
            let done = done.await;
            if done.is_err() {
                site.leave_picture(&name).await;
            }
            driver.kill_browser()?;
            server = site.server.take();
            done
        });
        if let Err(error) = outcome {
            let _ = fs::remove_dir_all(&scratch);
            panic!("time {time}: {error:#}");
        }
    }
    let _ = fs::remove_dir_all(&scratch);
}

impl Site {
    async fn open(screen: Screen, scratch: &Path) -> Result<(Self, Driver)> {
        Self::open_with(screen, scratch, None).await
    }

    async fn open_with(screen: Screen, scratch: &Path, server: Option<Folder>) -> Result<(Self, Driver)> {
        let dist = root::dist();
        if !dist.join(stamp::INDEX).is_file() {
            bail!("there is no page in {}: `cargo xtask pack` makes one", dist.display());
        }
        let kind = Kind::asked()?;
        let server = match server {
            Some(server) => server,
            None => Folder::serve(dist, 0).context("cannot serve the page")?,
        };
        let driver = Driver::start(kind, scratch)?;
        let browser = driver.open(screen).await?;
        let port = server.port();
        let server = RefCell::new(Some(server));
        Ok((Self { browser, kind, screen, port, server, scratch: scratch.to_path_buf() }, driver))
    }

    /// Where the page is.
    pub fn address(&self) -> String {
        format!("http://127.0.0.1:{}/", self.port)
    }

    /// Ends the server, as if the signal were lost.
    pub fn stop_server(&self) {
        drop(self.server.take());
    }

    /// Starts it again at the same address.
    pub fn start_server(&self) -> Result<()> {
        let server = Folder::serve(root::dist(), self.port).context("cannot serve the page again")?;
        self.server.replace(Some(server));
        Ok(())
    }

    /// Whether the server answers at all.
    pub fn server_answers(&self) -> bool {
        std::net::TcpStream::connect(("127.0.0.1", self.port)).is_ok()
    }

    /// A copy of the built page, for the test to change.
    pub fn copy_of_page(&self, name: &str) -> Result<PathBuf> {
        let copy = self.scratch.join(name);
        for path in stamp::files(&root::dist())?.iter().map(String::as_str).chain([stamp::WORKER]) {
            let to = copy.join(path);
            fs::create_dir_all(to.parent().unwrap_or(&copy))?;
            fs::copy(root::dist().join(path), to)?;
        }
        Ok(copy)
    }

    /// Serves that folder from now on, at the same address.
    pub fn serve_instead(&self, folder: &Path) -> Result<()> {
        let server = self.server.borrow();
        server.as_ref().context("the server is stopped")?.show(folder.to_path_buf());
        Ok(())
    }

    /// Puts out a newer version of the page: the same, but that its root says `data-trial="newer"`.
    pub fn publish_newer(&self) -> Result<()> {
        let folder = self.copy_of_page("newer")?;
        let index = folder.join(stamp::INDEX);
        let page = fs::read_to_string(&index)?.replacen("<html ", "<html data-trial=\"newer\" ", 1);
        fs::write(&index, page)?;
        stamp::stamp(&folder)?;
        self.serve_instead(&folder)
    }

    /// What the server was asked for and does not have.
    pub fn missed(&self) -> Vec<String> {
        self.server.borrow().as_ref().map(Folder::missed).unwrap_or_default()
    }

    /// Looks again and again until there is something, or says what it waited for.
    pub async fn wait_for<T, F>(&self, what: &str, mut look: impl FnMut() -> F) -> Result<T>
    where
        F: Future<Output = Result<Option<T>>>,
    {
        let began = Instant::now();
        loop {
            // An element may go while it is looked at; that is only worth telling when nothing better comes.
            let seen = look().await;
            match seen {
                Ok(Some(found)) => return Ok(found),
                seen if began.elapsed() > PATIENCE => {
                    return seen
                        .and_then(|_| bail!("waited {PATIENCE:?} in vain for {what}"))
                        .with_context(|| format!("waiting for {what}"));
                }
                _ => tokio::time::sleep(GLANCE).await,
            }
        }
    }

    async fn leave_picture(&self, name: &str) {
        let folder = env::temp_dir().join("linehut-browser");
        if let Ok(picture) = self.browser.screenshot().await
            && fs::create_dir_all(&folder).is_ok()
            && fs::write(folder.join(format!("{name}.png")), picture).is_ok()
        {
            eprintln!("How it looked: {}", folder.join(format!("{name}.png")).display());
        }
        if let Ok(complaints) = self.console_errors().await {
            complaints.iter().for_each(|it| eprintln!("console: {it}"));
        }
    }
}
