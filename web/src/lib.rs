//! The Linehut page.

use leptos::prelude::*;

/// Puts the page into the document.
pub fn start() {
    mount_to_body(|| view! { <main><h1>"Linehut"</h1></main> });
}
