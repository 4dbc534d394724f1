//! Serves a folder on this machine, and to nobody else.

use std::{
    fs,
    io::{self, Read, Write},
    net::{Ipv4Addr, SocketAddr, TcpListener, TcpStream},
    path::{Component, Path, PathBuf},
    sync::{
        Arc, Mutex, PoisonError,
        atomic::{AtomicBool, Ordering},
    },
    thread::{self, JoinHandle},
    time::Duration,
};

/// How long a browser may keep a connection open without asking anything.
const PATIENCE: Duration = Duration::from_secs(20);
/// The longest request head read. Ours are under one kilobyte.
const HEAD: usize = 16 * 1024;

/// A folder being served, until dropped or stopped.
pub struct Folder {
    at: SocketAddr,
    shared: Arc<Shared>,
    accepting: Option<JoinHandle<()>>,
}

struct Shared {
    root: Mutex<PathBuf>,
    missed: Mutex<Vec<String>>,
    stopped: AtomicBool,
}

impl Folder {
    /// Serves `root` on the loopback address; port 0 takes any free one.
    ///
    /// # Errors
    ///
    /// When the port cannot be had.
    pub fn serve(root: PathBuf, port: u16) -> io::Result<Self> {
        let listener = TcpListener::bind((Ipv4Addr::LOCALHOST, port))?;
        let at = listener.local_addr()?;
        let shared =
            Arc::new(Shared { root: Mutex::new(root), missed: Mutex::default(), stopped: AtomicBool::new(false) });
        let accepting = thread::spawn({
            let shared = Arc::clone(&shared);
            move || {
                for stream in listener.incoming() {
                    if shared.stopped.load(Ordering::SeqCst) {
                        return;
                    }
                    let Ok(stream) = stream else { continue };
                    let shared = Arc::clone(&shared);
                    // A page that went away in mid-answer is no concern of ours.
                    thread::spawn(move || drop(answer(stream, &shared)));
                }
            }
        });
        Ok(Self { at, shared, accepting: Some(accepting) })
    }

    /// Where it is found.
    pub fn address(&self) -> String {
        format!("http://{}/", self.at)
    }

    /// Its port.
    pub fn port(&self) -> u16 {
        self.at.port()
    }

    /// Serves another folder from now on, at the same address.
    pub fn show(&self, root: PathBuf) {
        *self.shared.root.lock().unwrap_or_else(PoisonError::into_inner) = root;
    }

    /// What it was asked for and does not have.
    pub fn missed(&self) -> Vec<String> {
        self.shared.missed.lock().unwrap_or_else(PoisonError::into_inner).clone()
    }
}

impl Drop for Folder {
    /// Frees the port before it returns. What is still connected gets no further answer.
    fn drop(&mut self) {
        self.shared.stopped.store(true, Ordering::SeqCst);
        // Wakes the thread that accepts, so that it sees the mark.
        drop(TcpStream::connect(self.at));
        if let Some(accepting) = self.accepting.take() {
            drop(accepting.join());
        }
    }
}

fn answer(mut stream: TcpStream, shared: &Shared) -> io::Result<()> {
    stream.set_read_timeout(Some(PATIENCE))?;
    let Some((method, target)) = request(&mut stream)? else { return Ok(()) };
    if shared.stopped.load(Ordering::SeqCst) {
        return Ok(());
    }
    let root = shared.root.lock().unwrap_or_else(PoisonError::into_inner).clone();
    let found = match method.as_str() {
        "GET" | "HEAD" => file(&root, &target),
        _ => None,
    };
    if found.is_none() {
        shared.missed.lock().unwrap_or_else(PoisonError::into_inner).push(target);
    }
    let (status, kind, body) = match found {
        Some((path, content)) => ("200 OK", mime(&path), content),
        None => ("404 Not Found", "text/plain; charset=utf-8", b"not here\n".to_vec()),
    };
    write!(
        stream,
        "HTTP/1.1 {status}\r\nContent-Type: {kind}\r\nContent-Length: {}\r\nCache-Control: no-cache\r\n\
         X-Content-Type-Options: nosniff\r\nConnection: close\r\n\r\n",
        body.len()
    )?;
    if method != "HEAD" {
        stream.write_all(&body)?;
    }
    stream.flush()
}

/// Method and target, or nothing when the other side closed or spoke no HTTP.
fn request(stream: &mut TcpStream) -> io::Result<Option<(String, String)>> {
    let mut head = Vec::new();
    let mut chunk = [0; 2048];
    while head.len() < HEAD {
        let read = stream.read(&mut chunk)?;
        if read == 0 {
            return Ok(None);
        }
        head.extend_from_slice(&chunk[..read]);
        let mut headers = [httparse::EMPTY_HEADER; 64];
        let mut request = httparse::Request::new(&mut headers);
        match request.parse(&head) {
            Ok(httparse::Status::Complete(_)) => {
                return Ok(request.method.zip(request.path).map(|(m, p)| (m.to_owned(), p.to_owned())));
            }
            Ok(httparse::Status::Partial) => {}
            Err(_) => return Ok(None),
        }
    }
    Ok(None)
}

fn file(root: &Path, target: &str) -> Option<(PathBuf, Vec<u8>)> {
    let path = target.split(['?', '#']).next()?.trim_start_matches('/');
    let path = Path::new(path);
    // Only downwards: no `..`, no drive, no root.
    if !path.components().all(|part| matches!(part, Component::Normal(_))) {
        return None;
    }
    let mut path = root.join(path);
    if path.is_dir() {
        path.push("index.html");
    }
    let content = fs::read(&path).ok()?;
    Some((path, content))
}

/// What a file is, by its ending.
pub fn mime(path: &Path) -> &'static str {
    match path.extension().and_then(|it| it.to_str()).unwrap_or_default() {
        "html" => "text/html; charset=utf-8",
        "js" => "text/javascript; charset=utf-8",
        "css" => "text/css; charset=utf-8",
        "wasm" => "application/wasm",
        "svg" => "image/svg+xml",
        "png" => "image/png",
        "json" => "application/json",
        "webmanifest" => "application/manifest+json",
        "txt" => "text/plain; charset=utf-8",
        _ => "application/octet-stream",
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn get(folder: &Folder, target: &str) -> Option<String> {
        let mut stream = TcpStream::connect(folder.at).ok()?;
        write!(stream, "GET {target} HTTP/1.1\r\nHost: here\r\n\r\n").ok()?;
        let mut answer = String::new();
        stream.read_to_string(&mut answer).ok()?;
        Some(answer)
    }

    #[test]
    fn serves_what_is_in_the_folder_and_nothing_above_it() {
        let root = std::env::temp_dir().join(format!("linehut-folder-{}", std::process::id()));
        fs::create_dir_all(root.join("in")).unwrap();
        fs::write(root.join("in/index.html"), "inside").unwrap();
        fs::write(root.join("above.txt"), "above").unwrap();
        let folder = Folder::serve(root.join("in"), 0).unwrap();
        let page = get(&folder, "/?again").unwrap();
        let above = get(&folder, "/../above.txt").unwrap();
        let port = folder.port();
        drop(folder);
        // The port is free again at once, and the same address can be served anew.
        let again = Folder::serve(root.clone(), port).unwrap();
        let text = get(&again, "/above.txt").unwrap();
        again.show(root.join("in"));
        let gone = get(&again, "/above.txt").unwrap();
        fs::remove_dir_all(&root).unwrap();
        assert!(page.starts_with("HTTP/1.1 200") && page.ends_with("inside"), "{page}");
        assert!(page.contains("text/html"), "{page}");
        assert!(above.starts_with("HTTP/1.1 404"), "{above}");
        assert!(text.contains("text/plain") && text.ends_with("above"), "{text}");
        assert!(gone.starts_with("HTTP/1.1 404"), "{gone}");
    }
}
