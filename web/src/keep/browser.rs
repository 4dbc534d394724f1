//! The browser's database, its promise to last, and word to other tabs.

use std::cell::RefCell;
use std::rc::Rc;

use bridge::{Kept, Refused};
use rexie::{ObjectStore, Rexie, Store, TransactionMode};
use wasm_bindgen::prelude::*;
use wasm_bindgen_futures::JsFuture;
use web_sys::{BroadcastChannel, MessageEvent};

use super::Why;

const DATABASE: &str = "linehut";
const STORE: &str = "kept";
/// The record that holds everything.
const NOW: &str = "now";
/// Where a record that cannot be read is laid aside.
const DAMAGED: &str = "damaged";

/// The database. A handle: a clone is the same database.
#[derive(Clone)]
pub struct Storage(Rc<RefCell<Rc<Rexie>>>);

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
        Ok(Self(Rc::new(RefCell::new(connect().await?))))
    }

    /// Reads the record. One that is damaged is laid aside, and an empty one stands in.
    pub async fn read(&self) -> Result<Found, Why> {
        let database = self.0.borrow().clone();
        let transaction = database.transaction(&[STORE], TransactionMode::ReadWrite).map_err(why)?;
        let store = transaction.store(STORE).map_err(why)?;
        let found = match stored(&store).await? {
            Ok(kept) => Found { kept, damaged: false },
            Err((Refused::Newer { .. }, _)) => return Err(Why::Newer),
            Err((_, raw)) => {
                store.put(&raw, Some(&DAMAGED.into())).await.map_err(why)?;
                store.delete(NOW.into()).await.map_err(why)?;
                Found { kept: Kept::default(), damaged: true }
            }
        };
        transaction.done().await.map_err(why)?;
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

async fn connect() -> Result<Rc<Rexie>, Why> {
    let built = Rexie::builder(DATABASE).version(1).add_object_store(ObjectStore::new(STORE)).build().await;
    built.map(Rc::new).map_err(why)
}

async fn put(database: &Rexie, base: &Kept, next: &Kept) -> Result<(), Why> {
    let transaction = database.transaction(&[STORE], TransactionMode::ReadWrite).map_err(why)?;
    let store = transaction.store(STORE).map_err(why)?;
    let kept = match stored(&store).await? {
        Ok(there) => there.with_changes(base, next),
        Err((Refused::Newer { .. }, _)) => return Err(Why::Newer),
        Err((_, raw)) => {
            store.put(&raw, Some(&DAMAGED.into())).await.map_err(why)?;
            next.clone()
        }
    };
    let value = bridge::browser::to_value(&kept).map_err(|_| Why::Refused)?;
    store.put(&value, Some(&NOW.into())).await.map_err(why)?;
    transaction.done().await.map_err(why)?;
    Ok(())
}

/// The record as it is: read, or refused with what is there.
async fn stored(store: &Store) -> Result<Result<Kept, (Refused, JsValue)>, Why> {
    let Some(value) = store.get(NOW.into()).await.map_err(why)? else { return Ok(Ok(Kept::default())) };
    Ok(bridge::browser::of_value(value.clone()).map_err(|refused| (refused, value)))
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
