//! Codes drawn: links in QR codes by ISO/IEC 18004, as paths.

use std::fmt::Write as _;

use bridge::pieces::{MOST_PIECES, split};
use qrcodegen::{QrCode, QrCodeEcc, QrSegment, Version};

/// The largest code that is drawn: 89 modules and their quiet zone then stand on a narrow phone at three pixels and a half each.
/// Chosen: what cameras at hand's length still read.
const LARGEST: u8 = 18;
/// The quiet zone round a code, in modules: ISO/IEC 18004, 6.3.8.
const QUIET: i32 = 4;

/// A code.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Frame {
    /// The link in it.
    pub link: String,
    /// Modules from edge to edge, with the quiet zone.
    pub size: i32,
    /// Its dark modules.
    pub path: String,
}

/// As few codes as hold these bytes of a site, for the page at `here`. None where they are too many.
pub fn frames(here: &str, bytes: &[u8], compressed: bool) -> Vec<Frame> {
    let all = |of: usize| split(bytes, compressed, of).iter().map(|piece| frame(here, &piece.text())).collect();
    (1..=MOST_PIECES).find_map(all).unwrap_or_default()
}

/// The part of the link that only this page reads is packed tighter than its address.
fn frame(here: &str, piece: &str) -> Option<Frame> {
    let address = format!("{here}#/piece/");
    let parts = [QrSegment::make_bytes(address.as_bytes()), QrSegment::make_alphanumeric(piece)];
    let code =
        QrCode::encode_segments_advanced(&parts, QrCodeEcc::Low, Version::MIN, Version::new(LARGEST), None, true)
            .ok()?;
    let mut path = String::new();
    for y in 0..code.size() {
        let mut x = 0;
        while x < code.size() {
            let dark = (x..code.size()).take_while(|x| code.get_module(*x, y)).count();
            #[expect(
                clippy::cast_possible_truncation,
                clippy::cast_possible_wrap,
                reason = "at most the size of a code"
            )]
            let dark = dark as i32;
            if dark > 0 {
                // Text takes any text.
                let _ = write!(path, "M{} {}h{dark}v1h-{dark}z", x + QUIET, y + QUIET);
            }
            x += dark + 1;
        }
    }
    Some(Frame { link: address + piece, size: code.size() + 2 * QUIET, path })
}

#[cfg(test)]
mod tests {
    use super::*;
    use bridge::pieces::{Piece, join, site_of};

    /// What a reader of another make reads from the drawing, at three pixels a module.
    fn read(frame: &Frame) -> String {
        const SCALE: usize = 3;
        let size = usize::try_from(frame.size).unwrap();
        let mut dark = vec![false; size * size];
        for run in frame.path.split('M').filter(|run| !run.is_empty()) {
            let (at, rest) = run.split_once('h').unwrap();
            let (x, y) = at.split_once(' ').unwrap();
            let (x, y): (usize, usize) = (x.parse().unwrap(), y.parse().unwrap());
            let count: usize = rest.split_once('v').unwrap().0.parse().unwrap();
            dark[y * size + x..y * size + x + count].fill(true);
        }
        let mut picture = rqrr::PreparedImage::prepare_from_greyscale(size * SCALE, size * SCALE, |x, y| {
            if dark[y / SCALE * size + x / SCALE] { 0 } else { 255 }
        });
        let found = picture.detect_grids();
        assert_eq!(found.len(), 1, "one code");
        found[0].decode().unwrap().1
    }

    /// Read back by another library (rqrr), of no common descent with what draws.
    #[test]
    fn every_demo_is_read_back_from_its_codes() {
        for name in bridge::demo::names() {
            let site = bridge::demo::demo(name).unwrap();
            let text = bridge::site::write_short(&site);
            for here in ["https://example.org/", "http://127.0.0.1:40000/a/long/way/down/index.html?from=home"] {
                let frames = frames(here, text.as_bytes(), false);
                let pieces: Vec<Piece> = frames
                    .iter()
                    .map(|frame| {
                        let link = read(frame);
                        assert_eq!(link, frame.link);
                        Piece::read(link.split_once("#/piece/").unwrap().1).unwrap()
                    })
                    .collect();
                assert!((2..=10).contains(&pieces.len()), "{name}: {} codes", pieces.len());
                assert_eq!(site_of(join(&pieces).unwrap().0), Ok(site.clone()));
            }
        }
    }

    #[test]
    fn what_is_short_stands_in_one_small_code() {
        let frames = frames("https://example.org/", b"short", true);
        assert_eq!(frames.len(), 1);
        assert!(frames[0].size < 50, "{}", frames[0].size);
        assert_eq!(read(&frames[0]), frames[0].link);
    }

    #[test]
    fn what_no_number_of_codes_holds_is_not_drawn() {
        assert_eq!(frames("https://example.org/", &[7; 200_000], true), []);
    }
}
