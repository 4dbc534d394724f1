//! A site in the part of a link behind `#`: nothing of it is ever sent to a server.

use engine::site::Site;

use crate::refused::Refused;
use crate::site::{open, write_short};

/// The letters of base64 that need no escape in a link, RFC 4648, section 5.
const LETTERS: &[u8; 64] = b"ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789-_";

/// A site as letters that can stand in a link.
#[must_use]
pub fn letters(site: &Site) -> String {
    let bytes = write_short(site).into_bytes();
    let mut text = String::with_capacity(bytes.len() * 4 / 3 + 4);
    for three in bytes.chunks(3) {
        let all = three.iter().fold(0_u32, |all, byte| (all << 8) | u32::from(*byte)) << (8 * (3 - three.len()));
        for place in 0..=three.len() {
            let letter = LETTERS[(all >> (18 - 6 * place)) as usize & 63];
            text.push(char::from(letter));
        }
    }
    text
}

/// The site that `letters` hold.
///
/// # Errors
///
/// [`Refused`], as for a file.
pub fn site_of(letters: &str) -> Result<Site, Refused> {
    crate::file::fits(letters.len())?;
    let damaged = || Refused::Damaged { at: "the link was cut or changed on the way".to_owned() };
    let mut bytes = Vec::with_capacity(letters.len() * 3 / 4);
    for four in letters.as_bytes().chunks(4) {
        if four.len() < 2 {
            return Err(damaged());
        }
        let mut all = 0_u32;
        for letter in four {
            let at = LETTERS.iter().position(|one| one == letter).ok_or_else(damaged)?;
            #[expect(clippy::cast_possible_truncation, reason = "below 64")]
            let at = at as u32;
            all = (all << 6) | at;
        }
        all <<= 6 * (4 - four.len());
        for place in 0..four.len() - 1 {
            // The low eight bits of what is left.
            bytes.push((all >> (16 - 8 * place)).to_le_bytes()[0]);
        }
    }
    open(&String::from_utf8(bytes).map_err(|_| damaged())?)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::demo::{demo, names};

    #[test]
    fn every_demo_comes_back_out_of_its_link() {
        for name in names() {
            let site = demo(name).unwrap();
            let text = letters(&site);
            assert!(text.bytes().all(|byte| LETTERS.contains(&byte)));
            assert_eq!(site_of(&text), Ok(site));
        }
    }

    /// RFC 4648, section 10, without its padding.
    #[test]
    fn letters_are_those_of_the_standard() {
        let start = letters(&demo("Tarn cabin").unwrap());
        // `{"li` of every site.
        assert!(start.starts_with("eyJsaW"), "{}", &start[..8]);
    }

    #[test]
    fn a_link_cut_or_changed_is_refused() {
        let text = letters(&demo("Tarn cabin").unwrap());
        for end in (0..text.len()).step_by(97) {
            assert!(site_of(&text[..end]).is_err(), "{end}");
        }
        assert!(site_of("###").is_err() && site_of("").is_err());
    }
}
