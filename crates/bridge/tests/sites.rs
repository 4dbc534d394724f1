//! Sites: a file that was cut, bent or made up changes nothing and never panics.

use arbtest::arbtest;
use bridge::pieces::{Piece, join, site_of};
use bridge::{Refused, site};
use engine::chemistry::Chemistry;
use engine::family::CodeFamily;
use engine::field::{Field, Takes};
use engine::site::{Got, PartKind, Site, Typed, assess, start, working};

fn room() -> Site {
    start(Got { family: CodeFamily::Iec, coldest: -31, modules: 9, chemistry: Chemistry::Lfp, bus: 48, inverter: 3000 })
}

#[test]
fn a_file_cut_short_is_refused() {
    let text = site::write(&room());
    for end in (0..text.trim_end().len()).step_by(7).filter(|end| text.is_char_boundary(*end)) {
        assert!(matches!(site::open(&text[..end]), Err(Refused::Damaged { .. })), "cut at {end}");
    }
}

#[test]
fn hostile_files_are_refused_whole() {
    let deep = format!("{}{}", "[".repeat(100_000), "]".repeat(100_000));
    let wide = format!(
        r#"{{"linehut":"site","version":1,"name":"","place":{{}},"parts":[{}]}}"#,
        vec![r#"{"id":1,"kind":"array","entries":{}}"#; 300].join(",")
    );
    let large = " ".repeat(10_000_000);
    let long = format!(r#"{{"linehut":"site","version":1,"name":"{}","place":{{}},"parts":[]}}"#, "x".repeat(5000));
    let not_a_number = r#"{"linehut":"site","version":1,"name":"","place":{},"parts":[{"id":NaN}]}"#;
    let wrong = r#"{"linehut":"site","version":1,"name":7,"place":{},"parts":[]}"#;
    for text in ["", "null", "[]", &deep, &wide, &large, &long, not_a_number, wrong] {
        assert!(site::open(text).is_err(), "{}", &text[..text.len().min(60)]);
    }
}

#[test]
fn a_script_in_a_name_is_text() {
    let mut there = room();
    "<script>alert(1)</script>".clone_into(&mut there.name);
    assert_eq!(site::open(&site::write(&there)).unwrap().name, there.name);
}

/// Bytes changed, taken out or put in anywhere: it opens as a whole site that can be assessed, or is refused.
#[test]
fn a_bent_file_opens_whole_or_not_at_all() {
    let text = site::write(&room()).into_bytes();
    arbtest(|u| {
        let mut bent = text.clone();
        for _ in 0..u.int_in_range(1..=6)? {
            let at = u.choose_index(bent.len())?;
            match u.int_in_range(0..=3)? {
                0 => bent[at] = u.arbitrary()?,
                1 => drop(bent.remove(at)),
                2 => bent.insert(at, *u.choose(b"0123456789{}[]\",:-eE.nul")?),
                _ => bent.truncate(at.max(1)),
            }
        }
        if let Ok(there) = site::open(&String::from_utf8_lossy(&bent)) {
            let found = assess(&there);
            for one in &found.checks {
                let _ = working(&there, one.place, one.check.id);
            }
            assert_eq!(site::open(&site::write(&there)), Ok(there));
        }
        Ok(())
    });
}

/// Any text in any field of any part: assessed without a panic, and never a number that is none.
#[test]
fn any_entries_are_assessed() {
    arbtest(|u| {
        let mut there = room();
        for _ in 0..u.int_in_range(1..=12)? {
            if u.ratio(1, 4)? {
                there.add(*u.choose(&PartKind::ALL)?);
            }
            let at = u.choose_index(there.parts.len())?;
            let field = *u.choose(Field::ALL)?;
            let text = match field.takes() {
                Takes::Choice(list) if u.ratio(3, 4)? => u.choose(list)?.0.to_owned(),
                _ => (*u.choose(&["", "0", "-40", "1e12", "3,5", "12,,4", "NaN", "7 kA", "99999", "abc"])?).to_owned(),
            };
            let part = &mut there.parts[at];
            let entries =
                if u.ratio(1, 3)? { part.run.as_mut().unwrap_or(&mut part.entries) } else { &mut part.entries };
            entries.set(field, Typed { text, unit: None });
        }
        for one in assess(&there).checks {
            for amount in one.check.value.into_iter().chain(one.check.limit.map(|limit| limit.amount)) {
                assert!(!amount.number.is_nan(), "{one:?}");
            }
            let _ = working(&there, one.place, one.check.id);
        }
        for opens in engine::site::what_if::openable(&there) {
            for sun in [engine::site::what_if::Sun::Full, engine::site::what_if::Sun::None] {
                // Missing figures and circuits without a solution are answers too.
                let _ = engine::site::what_if::what_if(&there, opens, sun);
            }
        }
        Ok(())
    });
}

/// Written with version 1 of the layout; link and pieces by Python's `json`, `zlib` and `base64`. They open for ever.
#[test]
fn version_1_opens_from_file_link_and_pieces() {
    let kept = site::open(include_str!("kept/site-v1.json")).unwrap();
    assert_eq!((kept.name.as_str(), kept.parts.len()), ("Two Rivers clinic", 14));
    let of = |kind| kept.of_kind(kind).count();
    assert_eq!((of(PartKind::Array), of(PartKind::Bank), of(PartKind::Generator)), (2, 1, 1));
    let link = include_str!("kept/site-v1.link").trim();
    assert_eq!(bridge::link::site_of(link.rsplit('/').next().unwrap()), Ok(kept.clone()));
    let all = |text: &str| -> Vec<Piece> {
        text.lines().map(|line| Piece::read(line.strip_prefix("/piece/").unwrap()).unwrap()).collect()
    };
    let (bytes, compressed) = join(&all(include_str!("kept/site-v1.pieces"))).unwrap();
    assert_eq!((site_of(bytes), compressed), (Ok(kept), false));
    // What is compressed only the browser unpacks; that it is whole, its sum says.
    let (bytes, compressed) = join(&all(include_str!("kept/site-v1.compressed.pieces"))).unwrap();
    assert!(compressed && bytes.len() < 2000);
}
