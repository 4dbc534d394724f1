//! The browser's own compression: RFC 1951, with no wrapping.

use js_sys::{Array, Function, Reflect, Uint8Array};
use wasm_bindgen::{JsCast, JsValue};
use wasm_bindgen_futures::JsFuture;
use web_sys::{Blob, ReadableWritablePair, Response};

/// `bytes` compressed. `None` where the browser is too old to.
pub async fn pressed(bytes: &[u8]) -> Option<Vec<u8>> {
    through(bytes, "CompressionStream").await
}

/// What was compressed. `None` where it is damaged, or the browser is too old.
pub async fn unpressed(bytes: &[u8]) -> Option<Vec<u8>> {
    through(bytes, "DecompressionStream").await
}

/// Through a stream of the browser of that name, WHATWG Compression, sections 5 and 6.
async fn through(bytes: &[u8], kind: &str) -> Option<Vec<u8>> {
    let make: Function = Reflect::get(&js_sys::global(), &kind.into()).ok()?.dyn_into().ok()?;
    let way: ReadableWritablePair =
        Reflect::construct(&make, &Array::of1(&"deflate-raw".into())).ok()?.unchecked_into();
    let parts: JsValue = Array::of1(&Uint8Array::from(bytes)).into();
    let stream = Blob::new_with_u8_array_sequence(&parts).ok()?.stream().pipe_through(&way);
    let response = Response::new_with_opt_readable_stream(Some(&stream)).ok()?;
    let buffer = JsFuture::from(response.array_buffer().ok()?).await.ok()?;
    Some(Uint8Array::new(&buffer).to_vec())
}
