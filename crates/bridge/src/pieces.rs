//! A site in links short enough for codes that a phone's camera reads: each a piece, put together again by whoever scans them.
//!
//! The part of the link behind `#/piece/` is written in letters, digits and `/` alone, which a QR code (ISO/IEC 18004) packs
//! tightest: `Z1A2B3C4D/2/3/LETTERS` is the second of three pieces of the site whose bytes have that checksum; `Z` says that they
//! are compressed (RFC 1951), `J` that they are not.

use engine::site::Site;

use crate::refused::Refused;
use crate::site::open;

/// The letters of base32, RFC 4648, section 6.
const LETTERS: &[u8; 32] = b"ABCDEFGHIJKLMNOPQRSTUVWXYZ234567";

/// The most pieces of one site.
pub const MOST_PIECES: usize = 60;

/// One piece.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Piece {
    /// Which site: whether its bytes are compressed, and their checksum.
    pub set: String,
    /// Which piece, from 1.
    pub place: usize,
    /// Of how many.
    pub of: usize,
    letters: String,
}

impl Piece {
    /// As it stands behind `#/piece/`.
    #[must_use]
    pub fn text(&self) -> String {
        format!("{}/{}/{}/{}", self.set, self.place, self.of, self.letters)
    }

    /// The piece that `text` is.
    ///
    /// # Errors
    ///
    /// [`Refused::Damaged`].
    pub fn read(text: &str) -> Result<Self, Refused> {
        crate::file::fits(text.len())?;
        let mut parts = text.splitn(4, '/');
        let mut next = || parts.next().ok_or_else(|| damaged("the link was cut"));
        let (set, place, of, letters) = (next()?, next()?, next()?, next()?);
        let is_set = set.len() == 9
            && (set.starts_with('Z') || set.starts_with('J'))
            && set.bytes().skip(1).all(|digit| digit.is_ascii_digit() || (b'A'..=b'F').contains(&digit));
        let (place, of) = (place.parse().unwrap_or(0), of.parse().unwrap_or(0));
        if !is_set || place == 0 || place > of || of > MOST_PIECES {
            return Err(damaged("the link names no piece"));
        }
        if !letters.bytes().all(|letter| LETTERS.contains(&letter)) {
            return Err(damaged("the link was changed on the way"));
        }
        Ok(Self { set: set.to_owned(), place, of, letters: letters.to_owned() })
    }
}

/// `bytes` in `of` pieces, none longer than another by more than one letter.
#[must_use]
pub fn split(bytes: &[u8], compressed: bool, of: usize) -> Vec<Piece> {
    let set = format!("{}{:08X}", if compressed { 'Z' } else { 'J' }, checksum(bytes));
    let letters = letters(bytes);
    let of = of.clamp(1, MOST_PIECES);
    let at = |place: usize| letters.len() * place / of;
    (0..of)
        .map(|place| Piece {
            set: set.clone(),
            place: place + 1,
            of,
            letters: letters[at(place)..at(place + 1)].to_owned(),
        })
        .collect()
}

/// The places that are missing among `pieces` of one set.
#[must_use]
pub fn missing(pieces: &[Piece]) -> Vec<usize> {
    let of = pieces.first().map_or(0, |piece| piece.of);
    (1..=of).filter(|place| pieces.iter().all(|piece| piece.place != *place)).collect()
}

/// The bytes that all pieces of one set hold together, and whether they are compressed.
///
/// # Errors
///
/// [`Refused::Damaged`]: one is missing, or the checksum is another.
pub fn join(pieces: &[Piece]) -> Result<(Vec<u8>, bool), Refused> {
    let first = pieces.first().ok_or_else(|| damaged("no piece"))?;
    let mut letters = String::new();
    for place in 1..=first.of {
        let piece = pieces.iter().find(|piece| piece.place == place && piece.set == first.set && piece.of == first.of);
        letters.push_str(&piece.ok_or_else(|| damaged(&format!("piece {place} is missing")))?.letters);
    }
    let bytes = bytes(&letters);
    let compressed = first.set.starts_with('Z');
    if format!("{:08X}", checksum(&bytes)) != first.set[1..] {
        return Err(damaged("the pieces do not belong together"));
    }
    Ok((bytes, compressed))
}

/// The site whose text these bytes are.
///
/// # Errors
///
/// [`Refused`], as for a file.
pub fn site_of(bytes: Vec<u8>) -> Result<Site, Refused> {
    open(&String::from_utf8(bytes).map_err(|_| damaged("no text"))?)
}

fn damaged(at: &str) -> Refused {
    Refused::Damaged { at: at.to_owned() }
}

/// CRC-32 as in ISO/IEC 3309 and RFC 1952, section 8: reflected, polynomial EDB88320.
fn checksum(bytes: &[u8]) -> u32 {
    let mut sum = u32::MAX;
    for byte in bytes {
        sum ^= u32::from(*byte);
        for _ in 0..8 {
            sum = (sum >> 1) ^ (0xEDB8_8320 & (sum & 1).wrapping_neg());
        }
    }
    !sum
}

/// Base32 without its padding.
fn letters(bytes: &[u8]) -> String {
    let (mut text, mut held, mut count) = (String::with_capacity(bytes.len() * 8 / 5 + 1), 0_u32, 0);
    for byte in bytes {
        held = (held << 8) | u32::from(*byte);
        count += 8;
        while count >= 5 {
            count -= 5;
            text.push(char::from(LETTERS[(held >> count) as usize & 31]));
        }
    }
    if count > 0 {
        text.push(char::from(LETTERS[(held << (5 - count)) as usize & 31]));
    }
    text
}

/// The bytes of base32 whose letters were looked at before.
fn bytes(letters: &str) -> Vec<u8> {
    let (mut bytes, mut held, mut count) = (Vec::with_capacity(letters.len() * 5 / 8), 0_u32, 0);
    for letter in letters.bytes() {
        let value = LETTERS.iter().position(|one| *one == letter).unwrap_or(0);
        #[expect(clippy::cast_possible_truncation, reason = "below 32")]
        let value = value as u32;
        held = (held << 5) | value;
        count += 5;
        if count >= 8 {
            count -= 8;
            bytes.push((held >> count).to_le_bytes()[0]);
        }
    }
    bytes
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::demo::{demo, names};
    use crate::site::write_short;

    /// RFC 4648, section 10, without padding.
    #[test]
    fn letters_are_those_of_the_standard() {
        for (text, wanted) in [
            ("", ""),
            ("f", "MY"),
            ("fo", "MZXQ"),
            ("foo", "MZXW6"),
            ("foob", "MZXW6YQ"),
            ("fooba", "MZXW6YTB"),
            ("foobar", "MZXW6YTBOI"),
        ] {
            assert_eq!(letters(text.as_bytes()), wanted);
            assert_eq!(bytes(wanted), text.as_bytes());
        }
    }

    /// The check value that catalogues of cyclic redundancy checks print for this one: of the digits 1 to 9 (from memory).
    #[test]
    fn the_checksum_is_that_of_the_standard() {
        assert_eq!(checksum(b"123456789"), 0xCBF4_3926);
    }

    #[test]
    fn every_demo_comes_back_out_of_its_pieces_in_any_order() {
        for name in names() {
            let site = demo(name).unwrap();
            for of in [1, 2, 7, MOST_PIECES] {
                let mut pieces = split(write_short(&site).as_bytes(), false, of);
                pieces.reverse();
                let read: Vec<Piece> = pieces.iter().map(|piece| Piece::read(&piece.text()).unwrap()).collect();
                assert_eq!(read, pieces);
                assert_eq!(missing(&read), Vec::<usize>::new());
                let (bytes, compressed) = join(&read).unwrap();
                assert!(!compressed);
                assert_eq!(site_of(bytes), Ok(site.clone()));
            }
        }
    }

    #[test]
    fn what_is_missing_is_named_and_what_is_not_of_the_set_refused() {
        let pieces = split(b"one and another thing", true, 4);
        assert_eq!(missing(&pieces[1..3]), [1, 4]);
        assert!(join(&pieces[1..3]).is_err());
        let mut mixed = pieces.clone();
        mixed[2] = split(b"one and another thinG", true, 4)[2].clone();
        assert!(join(&mixed).is_err());
        mixed[2].set.clone_from(&pieces[0].set);
        mixed[3] = split(b"one and another thinG", true, 4)[3].clone();
        mixed[3].set.clone_from(&pieces[0].set);
        assert_eq!(join(&mixed), Err(damaged("the pieces do not belong together")));
    }

    #[test]
    fn a_link_that_names_no_piece_is_refused() {
        for text in [
            "",
            "Z",
            "Z1A2B3C4D/2/3",
            "X1A2B3C4D/1/2/AB",
            "Z1A2B3C4D/0/2/AB",
            "Z1A2B3C4D/3/2/AB",
            "Z1A2B3C4D/1/99/AB",
            "Z1A2B3C4D/1/2/ab",
            "Z1A2B3C4G/1/2/AB",
            "Z1A2B3C4D/1/2/A/B",
            "Z1A2B3C4D/-1/2/AB",
        ] {
            assert!(Piece::read(text).is_err(), "{text}");
        }
    }
}
