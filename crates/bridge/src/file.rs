//! Files: what is saved, and what somebody opens.

use serde_json::Value;

use crate::kept::Kept;
use crate::refused::Refused;

/// The greatest file that is opened, in bytes. Chosen: a full site is under 20 kB; the rest is room to grow.
pub const MOST_BYTES: usize = 1_000_000;

/// The text of a file that holds `kept`.
///
/// # Example
///
/// ```
/// let text = bridge::file::write(&bridge::Kept::default());
/// assert_eq!(bridge::file::open(&text), Ok(bridge::Kept::default()));
/// ```
#[must_use]
pub fn write(kept: &Kept) -> String {
    let mut text = serde_json::to_string_pretty(kept).expect("maps with text keys, text and one number: all of JSON");
    text.push('\n');
    text
}

/// Whether a file of `bytes` is small enough to be read at all.
///
/// # Errors
///
/// [`Refused::TooLarge`].
pub const fn fits(bytes: usize) -> Result<(), Refused> {
    if bytes > MOST_BYTES { Err(Refused::TooLarge { bytes, most: MOST_BYTES }) } else { Ok(()) }
}

/// Reads the text of a file. Members it does not know are passed over.
///
/// # Errors
///
/// [`Refused`]: too large, damaged, or newer than this program. Depth is bounded by the JSON reader (128).
pub fn open(text: &str) -> Result<Kept, Refused> {
    fits(text.len())?;
    // A mark that some editors put in front.
    let text = text.strip_prefix('\u{feff}').unwrap_or(text);
    let value: Value = serde_json::from_str(text).map_err(|error| Refused::Damaged { at: error.to_string() })?;
    Kept::of_value(value)
}
