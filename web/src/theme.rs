//! The light to read by: Paper, Night or Sun. Chosen by the person and remembered; never switched by itself.

/// A light.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Theme {
    /// Daylight and lamplight.
    #[default]
    Paper,
    /// Dark outside.
    Night,
    /// Full sun on the screen.
    Sun,
}

impl Theme {
    const ALL: [Self; 3] = [Self::Paper, Self::Night, Self::Sun];

    /// The word it is kept under, and that the stylesheet knows it by.
    pub const fn key(self) -> &'static str {
        match self {
            Self::Paper => "paper",
            Self::Night => "night",
            Self::Sun => "sun",
        }
    }

    /// Its name on screen.
    pub const fn name(self) -> &'static str {
        match self {
            Self::Paper => "Paper",
            Self::Night => "Night",
            Self::Sun => "Sun",
        }
    }

    /// The theme of that key.
    pub fn of_key(key: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|theme| theme.key() == key)
    }

    /// The one that the light button turns to.
    #[must_use]
    pub const fn next(self) -> Self {
        match self {
            Self::Paper => Self::Night,
            Self::Night => Self::Sun,
            Self::Sun => Self::Paper,
        }
    }

    /// Puts it on the document, and its ground on the frame that the phone draws around the page.
    pub fn show(self) {
        let Some(document) = web_sys::window().and_then(|window| window.document()) else { return };
        let Some(root) = document.document_element() else { return };
        // An attribute on an element that is there: neither call has a way to fail that would be worth telling.
        let _ = root.set_attribute("data-theme", self.key());
        let ground = web_sys::window()
            .and_then(|window| window.get_computed_style(&root).ok().flatten())
            .and_then(|style| style.get_property_value("--ground").ok());
        if let (Some(ground), Ok(Some(meta))) = (ground, document.query_selector("meta[name=theme-color]")) {
            let _ = meta.set_attribute("content", ground.trim());
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_button_reaches_every_theme_and_comes_back() {
        let mut theme = Theme::Paper;
        for _ in Theme::ALL {
            assert_eq!(Theme::of_key(theme.key()), Some(theme));
            theme = theme.next();
        }
        assert_eq!(theme, Theme::Paper);
    }
}
