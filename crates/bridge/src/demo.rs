//! Invented sites to look at, each whole.

use engine::site::Site;

use crate::site::open;

/// Their names and files. Figures are typical of a class, and none is of a real place.
const ALL: [(&str, &str); 3] = [
    ("Kestrel Ridge hut", include_str!("../sites/kestrel-ridge.json")),
    ("Tarn cabin", include_str!("../sites/tarn-cabin.json")),
    ("Two Rivers clinic", include_str!("../sites/two-rivers-clinic.json")),
];

/// The names, in order.
#[must_use]
pub const fn names() -> [&'static str; 3] {
    [ALL[0].0, ALL[1].0, ALL[2].0]
}

/// The site of that name.
#[must_use]
pub fn demo(name: &str) -> Option<Site> {
    ALL.iter().find(|(one, _)| *one == name).and_then(|(_, text)| open(text).ok())
}
