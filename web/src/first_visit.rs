//! The first page: what can be asked.

use crate::piece::{Piece, view};

use crate::icon::icon;
use crate::offline::{self, Copy};
use crate::route::Route;
use crate::tools::Tool;

/// The first page: one line of what this is, and the tools there are.
pub fn first_visit() -> Piece {
    view! {
        <div class="first">
            <section class="hello">
                <h1 tabindex="-1">"Settle it before you close a breaker."</h1>
                <p>"For stand-alone solar power rooms. " {move || signal_words(offline::copy())}</p>
            </section>
            <section>
                <h2 class="sub">"Ask one thing" <span>"no site needed"</span></h2>
                <ul class="quick">
                    {Tool::ALL
                        .iter()
                        .map(|tool| {
                            view! {
                                <li>
                                    <a href=Route::Tool(*tool).href()>
                                        {icon(tool.symbol(), "sym")}
                                        <span>
                                            <span class="ask">{tool.question()}</span>
                                            <span class="name">{tool.name()}</span>
                                        </span>
                                    </a>
                                </li>
                            }
                        })
                        .collect::<Vec<Piece>>()}
                </ul>
            </section>
        </div>
    }
}

const fn signal_words(copy: Copy) -> &'static str {
    match copy {
        Copy::Kept => "The whole tool is now on this phone and works with no signal.",
        Copy::OneFile => "The whole tool is in this one file and works with no signal.",
        Copy::Keeping { .. } => "A copy for no signal is being kept: stay in signal a minute.",
        Copy::NotYet => "Not yet on this phone: stay in signal a minute.",
        Copy::NotPossible => "This browser keeps no copy of it here: with no signal, use the one file.",
    }
}
