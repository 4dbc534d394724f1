//! Files on this phone: saving what is kept, and opening what was saved.

use bridge::Kept;
use wasm_bindgen::{JsCast, JsValue};
use wasm_bindgen_futures::JsFuture;
use web_sys::{Blob, BlobPropertyBag, File, HtmlAnchorElement, Url};

/// Saves `kept` as a file, where the browser puts its downloads. Gives back the file's name.
///
/// # Errors
///
/// What the browser says, where it makes no file.
pub fn save(kept: &Kept) -> Result<String, JsValue> {
    let text = js_sys::Array::of1(&bridge::file::write(kept).into());
    let kind = BlobPropertyBag::new();
    kind.set_type("application/json");
    let url = Url::create_object_url_with_blob(&Blob::new_with_str_sequence_and_options(&text, &kind)?)?;
    let today = String::from(js_sys::Date::new_0().to_iso_string());
    let name = format!("linehut-{}.json", today.get(..10).unwrap_or("kept"));
    let document = web_sys::window().and_then(|window| window.document()).ok_or("no document")?;
    let link: HtmlAnchorElement = document.create_element("a")?.unchecked_into();
    link.set_href(&url);
    link.set_download(&name);
    link.click();
    Url::revoke_object_url(&url)?;
    Ok(name)
}

/// Reads a file that somebody chose.
///
/// # Errors
///
/// In words for the person.
pub async fn open(file: &File) -> Result<Kept, String> {
    // A size is a whole number of bytes, far below 2^53.
    #[allow(clippy::cast_possible_truncation, clippy::cast_sign_loss)]
    bridge::file::fits(file.size() as usize).map_err(|refused| refused.to_string())?;
    let text = JsFuture::from(file.text()).await.ok().and_then(|text| text.as_string());
    let text = text.ok_or("the browser could not read the file")?;
    bridge::file::open(&text).map_err(|refused| refused.to_string())
}
