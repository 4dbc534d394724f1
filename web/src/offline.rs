//! Whether this device keeps a copy of the page, and whether a newer one waits.
//!
//! The page never depends on any of it: registration is the last thing start-up does and may fail silently.
//! Nothing here reloads the page unless the person asked for it.

use std::time::Duration;

use leptos::prelude::*;
use wasm_bindgen::{JsCast, JsValue, closure::Closure, convert::FromWasmAbi};
use wasm_bindgen_futures::{JsFuture, spawn_local};
use web_sys::{
    EventTarget, MessageEvent, RegistrationOptions, ServiceWorker, ServiceWorkerContainer, ServiceWorkerRegistration,
    ServiceWorkerUpdateViaCache, VisibilityState,
};

/// How long until a copy that could not be finished is tried again. Chosen: a bar of signal comes and goes in seconds.
const AGAIN: Duration = Duration::from_secs(10);

/// How far the copy on this device has come.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Copy {
    /// This browser, or this way of opening the page, keeps none.
    NotPossible,
    /// The page is the one file that holds everything: it is its own copy.
    OneFile,
    /// None yet: without signal the page would not open again.
    #[default]
    NotYet,
    /// Being kept: so many files of so many.
    Keeping {
        /// Files kept.
        done: u32,
        /// Files in all.
        of: u32,
    },
    /// Whole: safe to lose the signal.
    Kept,
}

impl Copy {
    /// In one word, for styles and tests.
    pub const fn name(self) -> &'static str {
        match self {
            Self::NotPossible => "not-possible",
            Self::OneFile => "one-file",
            Self::NotYet => "not-yet",
            Self::Keeping { .. } => "keeping",
            Self::Kept => "kept",
        }
    }
}

/// What the page shows about its copy.
#[derive(Clone, Copy, Debug)]
pub struct Offline {
    /// How far the copy has come.
    pub copy: RwSignal<Copy>,
    /// A newer version is kept and waits for [`take_over`].
    pub update_ready: RwSignal<bool>,
}

/// Where the page is told of its copy: for every view under the one that calls it.
pub fn provide() -> Offline {
    let offline = watch();
    provide_context(offline);
    offline
}

/// How far the copy has come.
pub fn copy() -> Copy {
    use_context::<Offline>().map_or(Copy::NotYet, |offline| offline.copy.get())
}

/// Asks the browser to keep a copy and follows how it goes. Call it once, when the page stands.
pub fn watch() -> Offline {
    let offline = Offline { copy: RwSignal::new(Copy::NotYet), update_ready: RwSignal::new(false) };
    match container() {
        _ if one_file() => offline.copy.set(Copy::OneFile),
        Some(container) => {
            // Opened from the copy itself: no need to say "not yet" until the browser has looked it up.
            if container.controller().is_some() {
                offline.copy.set(Copy::Kept);
            }
            set_timeout(move || keep(container, offline), Duration::ZERO);
        }
        None => offline.copy.set(Copy::NotPossible),
    }
    offline
}

/// Lets the newer version take over and reloads the page once it has. Writes nothing itself.
pub fn take_over() {
    spawn_local(async {
        let waiting = match container() {
            Some(container) => registration(&container).await.and_then(|it| it.waiting()).map(|it| (container, it)),
            None => None,
        };
        // None waits any more when another tab has let it take over already: then a reload is all there is to do.
        let Some((container, waiting)) = waiting else { return reload() };
        listen(&container, "controllerchange", |_: JsValue| reload());
        let message = js_sys::Object::new();
        let set = js_sys::Reflect::set(&message, &"type".into(), &"take-over".into());
        if set.and_then(|_| waiting.post_message(&message)).is_err() {
            reload();
        }
    });
}

/// Whether the page is the one file that holds everything: always at hand, with nothing to keep.
pub fn one_file() -> bool {
    let root = document().document_element().and_then(|root| root.dyn_into::<web_sys::HtmlElement>().ok());
    root.is_some_and(|root| root.dataset().get("form").as_deref() == Some("one-file"))
}

/// Absent without a secure context, from the file system, and in some private windows.
fn container() -> Option<ServiceWorkerContainer> {
    let navigator = window().navigator();
    let container = js_sys::Reflect::get(&navigator, &"serviceWorker".into()).ok()?;
    container.dyn_into().ok()
}

async fn registration(container: &ServiceWorkerContainer) -> Option<ServiceWorkerRegistration> {
    JsFuture::from(container.get_registration()).await.ok()?.dyn_into().ok()
}

fn keep(container: ServiceWorkerContainer, offline: Offline) {
    let heard = Closure::<dyn FnMut(MessageEvent)>::new(move |event: MessageEvent| {
        if let Some(keeping) = progress(&event.data())
            && offline.copy.get_untracked() != Copy::Kept
        {
            offline.copy.set(keeping);
        }
    });
    // Unlike a listener, this also lets the messages flow that came before it.
    container.set_onmessage(Some(heard.into_js_value().unchecked_ref()));
    if container.controller().is_some() {
        // Another tab has let the newer version take over: this one is older now, and stays until it is reloaded.
        listen(&container, "controllerchange", move |_: JsValue| offline.update_ready.set(true));
    }
    register(container, offline);
}

/// `{ type: "keeping", done, of }`, as sw.js says it while it fetches.
fn progress(message: &JsValue) -> Option<Copy> {
    let get = |name: &str| js_sys::Reflect::get(message, &name.into()).ok();
    let count = |name: &str| get(name)?.as_f64().map(|count| count as u32);
    (get("type")?.as_string()? == "keeping").then_some(())?;
    Some(Copy::Keeping { done: count("done")?, of: count("of")? })
}

fn register(container: ServiceWorkerContainer, offline: Offline) {
    spawn_local(async move {
        let options = RegistrationOptions::new();
        options.set_update_via_cache(ServiceWorkerUpdateViaCache::None);
        let registered = JsFuture::from(container.register_with_options("./sw.js", &options)).await;
        match registered.and_then(|it| it.dyn_into::<ServiceWorkerRegistration>()) {
            Ok(registration) => follow(container, registration, offline),
            Err(_) => try_again(container, offline),
        }
    });
}

fn try_again(container: ServiceWorkerContainer, offline: Offline) {
    if offline.copy.get_untracked() != Copy::Kept {
        offline.copy.set(Copy::NotYet);
    }
    set_timeout(move || register(container, offline), AGAIN);
}

fn follow(container: ServiceWorkerContainer, registration: ServiceWorkerRegistration, offline: Offline) {
    look(&registration, offline);
    if let Some(worker) = registration.installing() {
        follow_worker(worker, container.clone(), registration.clone(), offline);
    }
    let found = registration.clone();
    listen(&registration, "updatefound", move |_: JsValue| {
        if let Some(worker) = found.installing() {
            follow_worker(worker, container.clone(), found.clone(), offline);
        }
    });
    // A page kept open for weeks is never loaded anew, so it asks when the person comes back to it.
    let asked = registration;
    listen(&document(), "visibilitychange", move |_: JsValue| {
        if document().visibility_state() == VisibilityState::Visible
            && let Ok(update) = asked.update()
        {
            spawn_local(async move { drop(JsFuture::from(update).await) });
        }
    });
}

fn follow_worker(
    worker: ServiceWorker,
    container: ServiceWorkerContainer,
    registration: ServiceWorkerRegistration,
    offline: Offline,
) {
    listen(&worker, "statechange", move |_: JsValue| {
        look(&registration, offline);
        let none =
            registration.installing().is_none() && registration.waiting().is_none() && registration.active().is_none();
        if none {
            try_again(container.clone(), offline);
        }
    });
}

/// An active worker has all its files, or it would not have become active.
fn look(registration: &ServiceWorkerRegistration, offline: Offline) {
    if registration.active().is_none() {
        return;
    }
    if offline.copy.get_untracked() != Copy::Kept {
        offline.copy.set(Copy::Kept);
    }
    if registration.waiting().is_some() {
        offline.update_ready.set(true);
    }
}

/// Listens for as long as the page lives.
fn listen<E: FromWasmAbi + 'static>(target: &EventTarget, name: &str, heard: impl FnMut(E) + 'static) {
    let heard = Closure::<dyn FnMut(E)>::new(heard).into_js_value();
    // Fails only for a listener that is no function.
    let _ = target.add_event_listener_with_callback(name, heard.unchecked_ref());
}

fn reload() {
    // Refused only while the page is being left anyway.
    let _ = window().location().reload();
}
