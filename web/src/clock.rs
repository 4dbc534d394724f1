//! The time that steps of undo are told apart by.

/// Milliseconds since the page was opened.
pub fn now() -> f64 {
    web_sys::window().and_then(|window| window.performance()).map_or(0.0, |performance| performance.now())
}
