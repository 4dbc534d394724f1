//! The browser's storage: the same layout as a structured value.

use serde::Serialize;
use serde_wasm_bindgen::Serializer;
use wasm_bindgen::JsValue;

use crate::kept::Kept;
use crate::refused::Refused;

/// The value to store for `kept`.
///
/// # Errors
///
/// [`Refused::Damaged`] where the browser cannot make the value.
pub fn to_value(kept: &Kept) -> Result<JsValue, Refused> {
    kept.serialize(&Serializer::json_compatible()).map_err(|error| Refused::Damaged { at: error.to_string() })
}

/// What a stored value holds.
///
/// # Errors
///
/// [`Refused`], as for a file.
pub fn of_value(value: JsValue) -> Result<Kept, Refused> {
    let value = serde_wasm_bindgen::from_value(value).map_err(|error| Refused::Damaged { at: error.to_string() })?;
    Kept::of_value(value)
}
