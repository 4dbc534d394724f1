//! Cautions: what can hurt, said before the act it concerns. Never closable.

use leptos::prelude::*;

/// A caution.
#[component]
pub fn Caution(
    /// What it is about.
    #[prop(default = "Caution")]
    title: &'static str,
    /// What to know and what to do.
    children: Children,
) -> impl IntoView {
    view! { <div class="caution" role="note"><b>{title}</b>{children()}</div> }
}
