//! Which view is open, by the part of the address behind `#`: it works from a file and under any path.

use leptos::ev;
use leptos::prelude::*;

use crate::tools::Tool;

/// A view.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Route {
    /// The tools there are: the first page.
    Tools,
    /// A tool.
    Tool(Tool),
    /// What is kept on this phone.
    Sheet,
}

impl Route {
    /// The view that an address names; the first page where it names none.
    pub fn of_hash(hash: &str) -> Self {
        match hash.trim_start_matches('#').trim_matches('/') {
            "sheet" => Self::Sheet,
            key => Tool::with_page(key).map_or(Self::Tools, Self::Tool),
        }
    }

    /// The link to it.
    pub fn href(self) -> String {
        match self {
            Self::Tools => "#/".to_owned(),
            Self::Tool(tool) => format!("#/{}", tool.key()),
            Self::Sheet => "#/sheet".to_owned(),
        }
    }

    /// The title of the page.
    pub fn title(self) -> String {
        match self {
            Self::Tools => "Linehut".to_owned(),
            Self::Tool(tool) => format!("{}: Linehut", tool.name()),
            Self::Sheet => "Sheet: Linehut".to_owned(),
        }
    }
}

/// The open view, following the address: links and the back button lead through it.
pub fn follow() -> ReadSignal<Route> {
    let (route, set_route) = signal(now());
    let listener = window_event_listener(ev::hashchange, move |_| set_route.set(now()));
    on_cleanup(move || listener.remove());
    route
}

fn now() -> Route {
    Route::of_hash(&window().location().hash().unwrap_or_default())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_view_is_found_by_its_link() {
        let tools = Tool::ALL.iter().copied().map(Route::Tool);
        for route in tools.chain([Route::Tools, Route::Sheet]) {
            assert_eq!(Route::of_hash(&route.href()), route);
        }
    }

    #[test]
    fn an_unknown_address_is_the_first_page() {
        for hash in ["", "#", "#/", "#/nothing", "#//string/x", "#%"] {
            assert_eq!(Route::of_hash(hash), Route::Tools, "{hash}");
        }
    }
}
