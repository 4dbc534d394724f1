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
    let today = String::from(js_sys::Date::new_0().to_iso_string());
    let name = format!("linehut-{}.json", today.get(..10).unwrap_or("kept"));
    save_text(&name, &bridge::file::write(kept))?;
    Ok(name)
}

/// Saves a text as a file called `name`.
///
/// # Errors
///
/// What the browser says, where it makes no file.
pub fn save_text(name: &str, text: &str) -> Result<(), JsValue> {
    let parts = js_sys::Array::of1(&text.into());
    let kind = BlobPropertyBag::new();
    kind.set_type("application/json");
    let url = Url::create_object_url_with_blob(&Blob::new_with_str_sequence_and_options(&parts, &kind)?)?;
    let document = web_sys::window().and_then(|window| window.document()).ok_or("no document")?;
    let link: HtmlAnchorElement = document.create_element("a")?.unchecked_into();
    link.set_href(&url);
    link.set_download(name);
    link.click();
    Url::revoke_object_url(&url)
}

/// A method of the browser's `navigator`, or of something in it, where it has one.
fn ability(path: &[&str]) -> Option<(JsValue, js_sys::Function)> {
    let mut this: JsValue = web_sys::window()?.navigator().into();
    let (method, objects) = path.split_last()?;
    for object in objects {
        this = js_sys::Reflect::get(&this, &(*object).into()).ok().filter(|value| !value.is_undefined())?;
    }
    let found = js_sys::Reflect::get(&this, &(*method).into()).ok()?.dyn_into().ok()?;
    Some((this, found))
}

/// Hands a link to the phone's own sheet for sharing. `false` where it has none.
pub fn share(title: &str, url: &str) -> bool {
    let Some((navigator, share)) = ability(&["share"]) else { return false };
    let data = js_sys::Object::new();
    let put = |key: &str, value: &str| js_sys::Reflect::set(&data, &key.into(), &value.into()).is_ok();
    put("title", title) && put("url", url) && share.call1(&navigator, &data).is_ok()
}

/// Puts a text where a person can paste it from. `false` where the browser does not.
pub fn copy(text: &str) -> bool {
    ability(&["clipboard", "writeText"]).is_some_and(|(clipboard, write)| write.call1(&clipboard, &text.into()).is_ok())
}

/// Reads a file that somebody chose.
///
/// # Errors
///
/// In words for the person.
pub async fn open(file: &File) -> Result<Opened, String> {
    // A size is a whole number of bytes, far below 2^53.
    #[allow(clippy::cast_possible_truncation, clippy::cast_sign_loss)]
    bridge::file::fits(file.size() as usize).map_err(|refused| refused.to_string())?;
    let text = JsFuture::from(file.text()).await.ok().and_then(|text| text.as_string());
    let text = text.ok_or("the browser could not read the file")?;
    read(&text)
}

/// What a text holds.
#[derive(Clone, Debug, PartialEq)]
pub enum Opened {
    /// What was typed into the tools.
    Tools(Kept),
    /// A site.
    Site(engine::site::Site),
}

/// Reads a text that somebody opened, dropped or pasted: a file, or a link that holds a site.
///
/// # Errors
///
/// In words for the person.
pub fn read(text: &str) -> Result<Opened, String> {
    let text = text.trim();
    if let Some((_, letters)) = text.rsplit_once("#/site/") {
        return bridge::link::site_of(letters).map(Opened::Site).map_err(|refused| refused.to_string());
    }
    if bridge::site::is_site(text) {
        return bridge::site::open(text).map(Opened::Site).map_err(|refused| refused.to_string());
    }
    bridge::file::open(text).map(Opened::Tools).map_err(|refused| refused.to_string())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_text_is_told_by_what_is_in_it() {
        let site = bridge::demo::demo("Tarn cabin").unwrap();
        let link = format!("https://example.org/hut/#/site/{}", bridge::link::letters(&site));
        assert_eq!(read(&link), Ok(Opened::Site(site.clone())));
        assert_eq!(read(&bridge::site::write(&site)), Ok(Opened::Site(site)));
        assert_eq!(read(&bridge::file::write(&Kept::default())), Ok(Opened::Tools(Kept::default())));
        for bad in ["", "{", "#/site/", "#/site/????", "<script>"] {
            assert!(read(bad).is_err(), "{bad}");
        }
    }
}
