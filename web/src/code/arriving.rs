//! A site that comes in by several codes: what is here, what is missing, and the site once all is.

use crate::derived::dynamic;
use crate::piece::{IntoPiece, Piece, view};
use bridge::Refused;
use bridge::pieces::{Piece as Part, join, missing, site_of};
use leptos::prelude::*;

use super::press;
use crate::draft::Draft;
use crate::file::Opened;
use crate::route::{self, Route};
use crate::sheet::took;

/// The most that is unpacked, in bytes. Chosen: far past any site, and at the format's best far below what a phone holds.
const MOST_PRESSED: usize = 60_000;

/// What has come in of the site that comes in.
#[derive(Clone, Copy)]
pub struct Arriving {
    draft: Draft,
    pieces: RwSignal<Vec<Part>>,
}

impl Arriving {
    /// Nothing yet.
    pub fn new(draft: Draft) -> Self {
        Self { draft, pieces: RwSignal::new(Vec::new()) }
    }

    /// Takes the piece that a link holds; opens the site where it was the last.
    pub async fn take(self, text: String) {
        let piece = match Part::read(&text) {
            Ok(piece) => piece,
            Err(why) => {
                self.draft.tell(refused(&why));
                return route::go(Route::Sheet);
            }
        };
        let set = piece.set.clone();
        // Those before it may have come in another tab.
        let before = self.draft.keeper().add_piece(set.clone(), text).await;
        let before = before.iter().filter_map(|text| Part::read(text).ok());
        let mut pieces: Vec<Part> = self.pieces.get_untracked();
        pieces.extend(before.chain([piece.clone()]));
        pieces.retain(|one| one.set == set && one.of == piece.of);
        let mut once: Vec<Part> = Vec::new();
        for one in pieces {
            if once.iter().all(|other| other.place != one.place) {
                once.push(one);
            }
        }
        self.pieces.set(once.clone());
        if missing(&once).is_empty() {
            self.open(&once).await;
        }
    }

    async fn open(self, pieces: &[Part]) {
        let site = match join(pieces) {
            Ok((bytes, false)) => site_of(bytes),
            Ok((bytes, true)) if bytes.len() > MOST_PRESSED => {
                Err(Refused::TooLarge { bytes: bytes.len(), most: MOST_PRESSED })
            }
            Ok((bytes, true)) => match press::unpressed(&bytes).await {
                Some(bytes) => site_of(bytes),
                None => Err(Refused::Damaged { at: "this browser cannot unpack it".to_owned() }),
            },
            Err(why) => Err(why),
        };
        let opened = site.is_ok();
        let words = match site {
            Ok(site) => took(self.draft, "", Ok(Opened::Site(site))),
            Err(why) => refused(&why),
        };
        self.put_away().await;
        self.draft.tell(words);
        route::go(if opened { Route::Line } else { Route::Sheet });
    }

    /// Forgets what has come in.
    async fn put_away(self) {
        self.draft.keeper().forget_pieces().await;
        self.pieces.set(Vec::new());
    }
}

fn refused(why: &Refused) -> String {
    format!("Not opened, nothing changed. The code: {why}.")
}

/// What is here of it, and what is still to be scanned.
pub fn arriving(arriving: Arriving) -> Piece {
    let away = move |_| {
        wasm_bindgen_futures::spawn_local(async move {
            arriving.put_away().await;
            route::go(Route::Sheet);
        });
    };
    let said = dynamic(move || {
        let pieces = arriving.pieces.get();
        let Some(last) = pieces.last() else { return "Reading the code.".piece() };
        let missing = missing(&pieces);
        let words = if let [_] = missing.as_slice() { "Still missing: piece " } else { "Still missing: pieces " };
        let numbers: Vec<String> = missing.iter().map(ToString::to_string).collect();
        view! {
            <p class="answer-most">{format!("{} of {} pieces are here.", pieces.len(), last.of)}</p>
            {(!missing.is_empty()).then(|| view! { <p class="say">{words}{numbers.join(", ")}". Scan the next code with the camera; each may open a tab of its own."</p> })}
        }
    });
    view! {
        <div class="one-column">
            <div class="page-head"><h1 tabindex="-1">"A site comes in"</h1></div>
            <div aria-live="polite">{said}</div>
            <div class="btns">
                <button class="btn plain" type="button" on:click=away>"Put these pieces away"</button>
            </div>
        </div>
    }
}
