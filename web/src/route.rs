//! Which view is open, by the part of the address behind `#`: it works from a file and under any path.

use leptos::ev;
use leptos::prelude::*;

use engine::site::Subject;

use crate::line::subject_of;
use crate::tools::Tool;

/// A view.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Route {
    /// The tools there are: the first page.
    Tools,
    /// A tool.
    Tool(Tool),
    /// The open site, from sun to socket.
    Line,
    /// A part of it, beside the line.
    Part(Subject),
    /// A link that holds a site, on its way to the line.
    Link,
    /// A link that holds a piece of a site.
    Piece,
    /// Every check of it.
    Checks,
    /// What is kept on this phone.
    Sheet,
}

impl Route {
    /// The view that an address names; the first page where it names none.
    pub fn of_hash(hash: &str) -> Self {
        match hash.trim_start_matches('#').trim_matches('/') {
            "sheet" => Self::Sheet,
            "line" => Self::Line,
            "checks" => Self::Checks,
            link if link.starts_with("site/") => Self::Link,
            piece if piece.starts_with("piece/") => Self::Piece,
            part if part.starts_with("line/") => Self::part(&part[5..]),
            key => Tool::with_page(key).map_or(Self::Tools, Self::Tool),
        }
    }

    fn part(path: &str) -> Self {
        let (id, run) = path.strip_suffix("/run").map_or((path, false), |id| (id, true));
        subject_of(id, run).map_or(Self::Line, Self::Part)
    }

    /// What of the open site it looks at.
    pub const fn subject(self) -> Option<Subject> {
        match self {
            Self::Part(subject) => Some(subject),
            _ => None,
        }
    }

    /// The link to it.
    pub fn href(self) -> String {
        match self {
            Self::Tools => "#/".to_owned(),
            Self::Tool(tool) => format!("#/{}", tool.key()),
            Self::Line | Self::Link => "#/line".to_owned(),
            Self::Part(Subject::Place) => "#/line/place".to_owned(),
            Self::Part(Subject::Part(id)) => format!("#/line/{}", id.0),
            Self::Part(Subject::Run(id)) => format!("#/line/{}/run", id.0),
            Self::Checks => "#/checks".to_owned(),
            Self::Sheet | Self::Piece => "#/sheet".to_owned(),
        }
    }

    /// The title of the page.
    pub fn title(self) -> String {
        match self {
            Self::Tools => "Linehut".to_owned(),
            Self::Tool(tool) => format!("{}: Linehut", tool.name()),
            Self::Line | Self::Link | Self::Part(_) => "Line: Linehut".to_owned(),
            Self::Checks => "Checks: Linehut".to_owned(),
            Self::Piece => "A site comes in: Linehut".to_owned(),
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

/// Goes to a view, as a link would.
pub fn go(route: Route) {
    // An address that cannot be set leaves the view as it is.
    let _ = window().location().set_hash(&route.href());
}

/// This page's own address, without what stands behind `#`.
pub fn here() -> String {
    let address = window().location().href().unwrap_or_default();
    address.split('#').next().unwrap_or_default().to_owned()
}

fn now() -> Route {
    Route::of_hash(&window().location().hash().unwrap_or_default())
}

#[cfg(test)]
mod tests {
    use super::*;
    use engine::site::PartId;

    #[test]
    fn every_view_is_found_by_its_link() {
        let tools = Tool::ALL.iter().copied().map(Route::Tool);
        let parts = [Subject::Place, Subject::Part(PartId(7)), Subject::Run(PartId(12))].map(Route::Part);
        for route in tools.chain(parts).chain([Route::Tools, Route::Line, Route::Checks, Route::Sheet]) {
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
