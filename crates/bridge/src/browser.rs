//! The browser's storage: the same layout as a structured value, by the way of its text.

use js_sys::JSON;
use serde_json::Value;
use wasm_bindgen::JsValue;

use crate::kept::Kept;
use crate::refused::Refused;

/// The value to store for `kept`.
///
/// # Errors
///
/// [`Refused::Damaged`] where the browser cannot make the value.
pub fn to_value(kept: &Kept) -> Result<JsValue, Refused> {
    JSON::parse(&crate::file::write(kept)).map_err(|_| damaged("the browser makes no value of it"))
}

/// What a stored value holds.
///
/// # Errors
///
/// [`Refused`], as for a file.
pub fn of_value(value: &JsValue) -> Result<Kept, Refused> {
    // What has no text, as a function, gives none rather than an error.
    let text = JSON::stringify(value).ok().and_then(|text| text.as_string());
    let text = text.ok_or_else(|| damaged("a value with no text"))?;
    let value: Value = serde_json::from_str(&text).map_err(|error| damaged(&error.to_string()))?;
    Kept::of_value(value)
}

fn damaged(at: &str) -> Refused {
    Refused::Damaged { at: at.to_owned() }
}
