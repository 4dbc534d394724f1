//! Notices: above the bottom bar, with what can be done about them. Never over a field in use.

use crate::derived::when;
use leptos::prelude::*;

/// A notice.
#[component]
pub fn Notice(
    /// What is the matter, in a sentence.
    #[prop(into)]
    says: Signal<String>,
    /// Whether it is up.
    up: RwSignal<bool>,
    /// The word on the button that acts; none where there is nothing to do but know.
    #[prop(optional)]
    act: &'static str,
    /// What that button does.
    #[prop(optional)]
    on_act: Option<Callback<()>>,
    /// The word on the button that only closes it.
    #[prop(default = "Later")]
    close: &'static str,
) -> impl IntoView {
    view! {
        {when(move || up.get(), move || view! { <div class="notice">
                <p>{move || says.get()}</p>
                <div class="notice-acts">
                    <button type="button" class="quiet" on:click=move |_| up.set(false)>{close}</button>
                    {on_act.map(|on_act| view! { <button type="button" on:click=move |_| on_act.run(())>{act}</button> }.into_any())}
                </div>
            </div> }.into_any())}
    }
}
