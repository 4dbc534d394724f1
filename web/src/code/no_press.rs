//! Where there is no browser, nothing is compressed.

#[allow(clippy::unused_async, reason = "the same face as the browser's")]
pub async fn pressed(_bytes: &[u8]) -> Option<Vec<u8>> {
    None
}

#[allow(clippy::unused_async, reason = "the same face as the browser's")]
pub async fn unpressed(_bytes: &[u8]) -> Option<Vec<u8>> {
    None
}
