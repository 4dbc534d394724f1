//! Puts the page into the document, and no more.
fn main() {
    web::begin();
}
