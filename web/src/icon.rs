//! A symbol from the sheet of symbols in the page.

use leptos::prelude::*;

/// A symbol. It says nothing to a screen reader: the word beside it does.
#[component]
pub fn Icon(
    /// Its name in `symbols.svg`.
    name: &'static str,
    /// The class that sizes it, where its surroundings do not.
    #[prop(optional)]
    class: &'static str,
) -> impl IntoView {
    view! { <svg class=class aria-hidden="true"><use href=format!("#{name}")></use></svg> }
}
