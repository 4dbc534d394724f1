//! The browser's database, its promise to last, and word to other tabs.

use std::cell::{Cell, RefCell};
use std::pin::Pin;
use std::rc::Rc;

use bridge::{Kept, Refused};
use rexie::{ObjectStore, Rexie, Store, Transaction, TransactionMode};
use wasm_bindgen::prelude::*;
use wasm_bindgen_futures::JsFuture;
use web_sys::{BroadcastChannel, MessageEvent};

use super::{KeptSite, Put, ToKeep, Why};

const DATABASE: &str = "linehut";
const STORE: &str = "kept";
/// The record that holds everything.
const NOW: &str = "now";
/// Where a record that cannot be read is laid aside.
const DAMAGED: &str = "damaged";

/// The database. A handle: a clone is the same database.
#[derive(Clone)]
pub struct Storage(Rc<RefCell<Rc<Rexie>>>, Rc<Cell<LastState>>);

/// When an earlier state was last kept, of which site: the record of them is large, and not read at each keystroke.
#[derive(Clone, Copy, Default)]
struct LastState {
    key: u32,
    when: f64,
}

impl LastState {
    /// Whether another may be due.
    fn is_due(self, key: u32, now: f64) -> bool {
        self.key != key || now - self.when > super::STATE_APART
    }
}

/// What stands before a site's text in its record: how often it was written.
fn revised(record: &str) -> (u32, &str) {
    record.split_once('\n').map_or((0, record), |(revision, text)| (revision.parse().unwrap_or(0), text))
}

/// Between two earlier states of a site.
const APART: char = '\u{1e}';

/// What was found.
pub struct Found {
    /// What was kept.
    pub kept: Kept,
    /// Whether something could not be read.
    pub damaged: bool,
}

impl Storage {
    /// Opens the database, and makes it where there is none.
    pub async fn open() -> Result<Self, Why> {
        Ok(Self(Rc::new(RefCell::new(connect().await?)), Rc::default()))
    }

    fn begin(&self, mode: TransactionMode) -> Result<(Transaction, Store), Why> {
        begun(&self.0.borrow(), mode)
    }

    /// Reads the record. One that is damaged is laid aside, and an empty one stands in.
    pub async fn read(&self) -> Result<Found, Why> {
        let (transaction, store) = self.begin(TransactionMode::ReadWrite)?;
        let found = match stored(&store).await? {
            Ok(kept) => Found { kept, damaged: false },
            Err((Refused::Newer { .. }, _)) => return Err(Why::Newer),
            Err((_, raw)) => {
                put_value(&store, DAMAGED, raw).await?;
                remove(&store, NOW).await?;
                Found { kept: Kept::default(), damaged: true }
            }
        };
        done(transaction).await?;
        Ok(found)
    }

    /// Puts what changed from `base` to `next` into the record.
    ///
    /// Browsers drop a connection at times, as when a phone sleeps: it is opened again, once.
    pub async fn write(&self, base: &Kept, next: &Kept) -> Result<(), Why> {
        let database = self.0.borrow().clone();
        match put(&database, base, next).await {
            Err(Why::Refused) => {
                let database = connect().await?;
                self.0.replace(Rc::clone(&database));
                put(&database, base, next).await
            }
            done => done,
        }
    }
}

impl Storage {
    /// The sites that are kept: what each is kept under, and its name.
    pub async fn sites(&self) -> Result<Vec<KeptSite>, Why> {
        let (_, store) = self.begin(TransactionMode::ReadOnly)?;
        listed(&store).await
    }

    /// The text of a site, and how often it was written. Of a record that is no text, whatever text can be made of it.
    pub async fn site(&self, key: u32) -> Result<Option<(u32, String)>, Why> {
        let (_, store) = self.begin(TransactionMode::ReadOnly)?;
        let Some(value) = store.get(site_key(key).into()).await.map_err(why)? else { return Ok(None) };
        let made = || js_sys::JSON::stringify(&value).ok().and_then(|text| text.as_string());
        let record = value.as_string().or_else(made).unwrap_or_default();
        let (revision, text) = revised(&record);
        Ok(Some((revision, text.to_owned())))
    }

    /// The earlier states of a site, the latest first: when, in milliseconds, and its text.
    pub async fn earlier(&self, key: u32) -> Result<Vec<(f64, String)>, Why> {
        let (_, store) = self.begin(TransactionMode::ReadOnly)?;
        let record = text(&store, &earlier_key(key)).await?.unwrap_or_default();
        Ok(states(&record).map(|(when, text)| (when, text.to_owned())).collect())
    }

    /// Writes a site, its place in the list, and an earlier state where the last is old enough, in one transaction.
    ///
    /// `after` is the revision that this tab read or wrote last. Where another tab has written since, the site is put
    /// beside the other's under a key of its own, which is given back: neither is overwritten.
    pub async fn put_site(&self, site: &ToKeep, after: u32, now: f64) -> Result<Put, Why> {
        let (transaction, store) = self.begin(TransactionMode::ReadWrite)?;
        let there = text(&store, &site_key(site.key)).await?;
        let (revision, before) = there.as_deref().map_or((0, ""), revised);
        let mut list = of_record(&text(&store, SITES).await?.unwrap_or_default());
        if revision != after || list.iter().all(|one| one.key != site.key) {
            // Where a site begins, nothing else may be in its place.
            list = listed(&store).await?;
        }
        let (key, revision) = if revision == after {
            (site.key, revision + 1)
        } else {
            (list.iter().map(|one| one.key).max().unwrap_or(0).max(site.key) + 1, 1)
        };
        // Once beside another tab's, always told apart from it in the list.
        let beside = |one: &KeptSite| one.key == key && one.name.ends_with(BESIDE);
        let apart = key != site.key || list.iter().any(beside);
        let name = if apart { format!("{}{BESIDE}", site.name) } else { site.name.clone() };
        let changed = match list.iter_mut().find(|one| one.key == key) {
            Some(one) if one.name == name => false,
            Some(one) => {
                one.name = name;
                true
            }
            None => {
                list.push(KeptSite { key, name });
                true
            }
        };
        if key == site.key && !before.is_empty() && before != site.text && self.1.get().is_due(key, now) {
            let record = text(&store, &earlier_key(key)).await?.unwrap_or_default();
            let last = states(&record).next().map_or(0.0, |(when, _)| when);
            if now - last > super::STATE_APART {
                let kept = std::iter::once(format!("{now}\n{before}"))
                    .chain(states(&record).take(super::STATES - 1).map(|(when, text)| format!("{when}\n{text}")));
                let record = kept.collect::<Vec<_>>().join(&APART.to_string());
                put_text(&store, &earlier_key(key), &record).await?;
                self.1.set(LastState { key, when: now });
            } else {
                self.1.set(LastState { key, when: last });
            }
        }
        put_text(&store, &site_key(key), &format!("{revision}\n{}", site.text)).await?;
        if changed {
            put_list(&store, &list).await?;
        }
        done(transaction).await?;
        Ok(Put { key, revision, list: changed.then_some(list) })
    }

    /// Forgets a site and its earlier states.
    pub async fn forget_site(&self, key: u32) -> Result<(), Why> {
        let (transaction, store) = self.begin(TransactionMode::ReadWrite)?;
        let mut list = listed(&store).await?;
        list.retain(|one| one.key != key);
        remove(&store, &site_key(key)).await?;
        remove(&store, &earlier_key(key)).await?;
        put_list(&store, &list).await?;
        done(transaction).await?;
        Ok(())
    }
}

impl Storage {
    /// Adds a piece of a site that comes in, in one transaction, and gives all that came of its set. Those of other sets go.
    pub async fn add_piece(&self, set: &str, piece: &str) -> Result<Vec<String>, Why> {
        let (transaction, store) = self.begin(TransactionMode::ReadWrite)?;
        let record = text(&store, PIECES).await?.unwrap_or_default();
        let ours = |line: &&str| line.starts_with(set) && *line != piece;
        let all: Vec<String> = record.lines().filter(ours).chain([piece]).map(str::to_owned).collect();
        put_text(&store, PIECES, &all.join("\n")).await?;
        done(transaction).await?;
        Ok(all)
    }

    /// Forgets them.
    pub async fn forget_pieces(&self) -> Result<(), Why> {
        let (transaction, store) = self.begin(TransactionMode::ReadWrite)?;
        remove(&store, PIECES).await?;
        done(transaction).await?;
        Ok(())
    }
}

/// The record of a site that comes in: its pieces, a line each.
const PIECES: &str = "pieces";

/// What stands behind the name of a site that was put beside another tab's.
const BESIDE: &str = " (this tab)";

/// The record that lists the sites: key and name, a line each.
const SITES: &str = "sites";

/// What the key of a site begins with.
const SITE: &str = "site-";

fn site_key(key: u32) -> String {
    format!("{SITE}{key}")
}

fn earlier_key(key: u32) -> String {
    format!("earlier-{key}")
}

/// What the storage will answer. Boxed: an async function inside another would be made anew in each.
type Answer<'a, T> = Pin<Box<dyn Future<Output = Result<T, Why>> + 'a>>;

fn text<'a>(store: &'a Store, key: &'a str) -> Answer<'a, Option<String>> {
    Box::pin(async move { Ok(store.get(key.into()).await.map_err(why)?.and_then(|value| value.as_string())) })
}

fn put_value<'a>(store: &'a Store, key: &'a str, value: JsValue) -> Answer<'a, ()> {
    Box::pin(async move {
        store.put(&value, Some(&key.into())).await.map_err(why)?;
        Ok(())
    })
}

fn put_text<'a>(store: &'a Store, key: &'a str, text: &str) -> Answer<'a, ()> {
    put_value(store, key, text.into())
}

fn remove<'a>(store: &'a Store, key: &'a str) -> Answer<'a, ()> {
    Box::pin(async move { store.delete(key.into()).await.map_err(why) })
}

fn done<'a>(transaction: Transaction) -> Answer<'a, ()> {
    Box::pin(async move {
        transaction.done().await.map_err(why)?;
        Ok(())
    })
}

/// The sites by their list, and those that a damaged list leaves out: what is there is never written over as if it were not.
fn listed(store: &Store) -> Answer<'_, Vec<KeptSite>> {
    Box::pin(async move {
        let mut list = of_record(&text(store, SITES).await?.unwrap_or_default());
        for key in store.get_all_keys(None, None).await.map_err(why)? {
            let key = key.as_string().and_then(|key| key.strip_prefix(SITE)?.parse().ok());
            let Some(key) = key.filter(|key| list.iter().all(|one| one.key != *key)) else { continue };
            let record = text(store, &site_key(key)).await?.unwrap_or_default();
            let name = bridge::site::open(revised(&record).1).map_or_else(|_| String::new(), |site| site.name);
            list.push(KeptSite { key, name });
        }
        Ok(list)
    })
}

fn of_record(record: &str) -> Vec<KeptSite> {
    let line = |line: &str| {
        let (key, name) = line.split_once('\t')?;
        Some(KeptSite { key: key.parse().ok()?, name: name.to_owned() })
    };
    record.lines().filter_map(line).collect()
}

async fn put_list(store: &Store, list: &[KeptSite]) -> Result<(), Why> {
    let plain = |name: &str| name.replace(['\n', '\t', '\r'], " ");
    let lines: Vec<String> = list.iter().map(|one| format!("{}\t{}", one.key, plain(&one.name))).collect();
    put_text(store, SITES, &lines.join("\n")).await
}

fn states(record: &str) -> impl Iterator<Item = (f64, &str)> {
    record.split(APART).filter_map(|state| {
        let (when, text) = state.split_once('\n')?;
        // Milliseconds since 1970 are far below 2^53.
        #[allow(clippy::cast_precision_loss)]
        Some((when.split('.').next()?.parse::<u64>().ok()? as f64, text))
    })
}

fn begun(database: &Rexie, mode: TransactionMode) -> Result<(Transaction, Store), Why> {
    let transaction = database.transaction(&[STORE], mode).map_err(why)?;
    let store = transaction.store(STORE).map_err(why)?;
    Ok((transaction, store))
}

async fn connect() -> Result<Rc<Rexie>, Why> {
    let built = Rexie::builder(DATABASE).version(1).add_object_store(ObjectStore::new(STORE)).build().await;
    built.map(Rc::new).map_err(why)
}

async fn put(database: &Rexie, base: &Kept, next: &Kept) -> Result<(), Why> {
    let (transaction, store) = begun(database, TransactionMode::ReadWrite)?;
    let kept = match stored(&store).await? {
        Ok(there) => there.with_changes(base, next),
        Err((Refused::Newer { .. }, _)) => return Err(Why::Newer),
        Err((_, raw)) => {
            put_value(&store, DAMAGED, raw).await?;
            next.clone()
        }
    };
    let value = bridge::browser::to_value(&kept).map_err(|_| Why::Refused)?;
    put_value(&store, NOW, value).await?;
    done(transaction).await?;
    Ok(())
}

/// The record as it is: read, or refused with what is there.
async fn stored(store: &Store) -> Result<Result<Kept, (Refused, JsValue)>, Why> {
    let Some(value) = store.get(NOW.into()).await.map_err(why)? else { return Ok(Ok(Kept::default())) };
    Ok(bridge::browser::of_value(&value).map_err(|refused| (refused, value)))
}

#[allow(clippy::needless_pass_by_value, reason = "given to map_err")]
fn why(error: rexie::Error) -> Why {
    // The libraries pass on the browser's exception only inside their own text.
    if format!("{error:?}{error}").contains("QuotaExceeded") { Why::Full } else { Why::Refused }
}

/// Word from and to other tabs of this page.
pub struct Tabs(BroadcastChannel);

impl Tabs {
    /// Calls `changed` whenever another tab has kept something. `None` where the browser has no such channel.
    pub fn listen(changed: impl Fn() + 'static) -> Option<Self> {
        let channel = BroadcastChannel::new(DATABASE).ok()?;
        let heard = Closure::<dyn Fn(MessageEvent)>::new(move |_| changed());
        channel.set_onmessage(Some(heard.as_ref().unchecked_ref()));
        // Listens as long as the page is open.
        heard.forget();
        Some(Self(channel))
    }

    /// Tells the other tabs.
    pub fn tell(&self) {
        // A tab that cannot be told still loses nothing: it only sees the change later.
        let _ = self.0.post_message(&"changed".into());
    }
}

/// Whether the browser promised not to clear what is kept. `None` where it does not say.
pub async fn is_lasting() -> Option<bool> {
    promised(manager()?.persisted().ok()?).await
}

/// Asks the browser not to clear what is kept.
pub async fn ask_to_last() -> Option<bool> {
    promised(manager()?.persist().ok()?).await
}

fn manager() -> Option<web_sys::StorageManager> {
    let manager = web_sys::window()?.navigator().storage();
    // Absent over plain http, though the type says it is always there.
    (!manager.is_undefined()).then_some(manager)
}

async fn promised(answer: js_sys::Promise) -> Option<bool> {
    JsFuture::from(answer).await.ok()?.as_bool()
}
