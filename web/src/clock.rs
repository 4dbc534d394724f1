//! The time that steps of undo are told apart by.

/// Milliseconds since the page was opened.
pub fn now() -> f64 {
    web_sys::window().and_then(|window| window.performance()).map_or(0.0, |performance| performance.now())
}

/// Milliseconds since 1970, by the phone's clock.
pub fn date() -> f64 {
    js_sys::Date::now()
}
