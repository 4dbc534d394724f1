//! Whether the page works with no signal, as far as is known.

use leptos::prelude::*;

/// Whether the page works with no signal.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Offline {
    /// Nothing is known, or the browser keeps no copies.
    #[default]
    Unknown,
    /// A copy is being kept.
    Copying {
        /// Files kept so far.
        done: u32,
        /// Files in all.
        of: u32,
    },
    /// Every file is on this phone.
    Ready,
}

/// Where whoever keeps the copies says how far it is.
pub fn provide() -> RwSignal<Offline> {
    let offline = RwSignal::new(Offline::default());
    provide_context(offline);
    offline
}

/// How far it is.
pub fn state() -> Offline {
    use_context::<RwSignal<Offline>>().map_or_else(Offline::default, |offline| offline.get())
}
