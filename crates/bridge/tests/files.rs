//! Files: every released layout opens for ever, and nothing in a file can do harm.

use bridge::{Kept, KeptEntry, Refused, file};
use engine::field::Field;
use engine::unit::Unit;

const V1: &str = include_str!("kept/v1.json");

#[test]
fn version_1_opens() {
    let kept = file::open(V1).unwrap();
    assert_eq!(kept.theme.as_deref(), Some("night"));
    assert_eq!(kept.len(), 8);
    let string = &kept.tools["string"];
    assert_eq!(string["Voc"], KeptEntry::new("49,3", None));
    assert_eq!(string["RecordLow"].typed(Field::RecordLow), ("-24".to_owned(), Some(Unit::DegreeFahrenheit)));
    assert_eq!(string["Isc"].text, "12,,4", "what was not understood is kept as typed");
}

#[test]
fn what_it_does_not_know_it_keeps_by_tool_and_field() {
    let kept = file::open(V1).unwrap();
    let again = file::open(&file::write(&kept)).unwrap();
    assert_eq!(again.tools["a tool of a later release"]["AFieldOfALaterRelease"].text, "7");
}

#[test]
fn a_newer_layout_is_refused_by_its_number() {
    let refused = file::open(r#"{"version": 7, "rooms": []}"#).unwrap_err();
    assert_eq!(refused, Refused::Newer { version: 7, known: bridge::VERSION });
    assert_eq!(refused.to_string(), "written by a newer Linehut: layout 7, this one knows up to 1");
}

#[test]
fn what_is_not_ours_is_refused() {
    let deep = format!("{}{}", "[".repeat(100_000), "]".repeat(100_000));
    for text in
        ["", "{", "null", "[]", "{}", "12", r#"{"version": -1}"#, r#"{"version": 0}"#, r#"{"version": 1}"#, &deep]
    {
        assert!(matches!(file::open(text), Err(Refused::Damaged { .. })), "{}", &text[..text.len().min(30)]);
    }
}

#[test]
fn a_file_cut_short_is_refused() {
    for end in (0..V1.trim_end().len()).filter(|end| V1.is_char_boundary(*end)) {
        assert!(matches!(file::open(&V1[..end]), Err(Refused::Damaged { .. })), "cut at {end}");
    }
}

#[test]
fn a_huge_file_is_refused_before_it_is_read() {
    let text = " ".repeat(file::MOST_BYTES + 1);
    assert!(matches!(file::open(&text), Err(Refused::TooLarge { .. })));
    assert_eq!(
        file::fits(3_000_001).unwrap_err().to_string(),
        "too large for a Linehut file: 3001 kB, at most 1000 kB"
    );
}

/// Bytes overwritten, put in, taken out: it opens or it is refused, and what opens is written and opens the same.
#[test]
fn a_file_with_wrong_bytes_never_panics() {
    arbtest::arbtest(|u| {
        let mut bytes = V1.as_bytes().to_vec();
        for _ in 0..u.int_in_range(1..=6)? {
            let at = u.choose_index(bytes.len())?;
            match u.int_in_range(0..=2)? {
                0 => bytes[at] = u.arbitrary()?,
                1 => bytes.insert(at, *u.choose(b"{}[]\",:0-9e\\ x")?),
                _ => {
                    bytes.remove(at);
                }
            }
        }
        if let Ok(kept) = file::open(&String::from_utf8_lossy(&bytes)) {
            assert_eq!(file::open(&file::write(&kept)), Ok(kept));
        }
        Ok(())
    })
    .budget_ms(2_000);
}

/// Any text and any unit that a field takes come back to the letter.
#[test]
fn any_entry_comes_back_to_the_letter() {
    arbtest::arbtest(|u| {
        let field = *u.choose(Field::ALL)?;
        let text: String = u.arbitrary()?;
        let units = field.units();
        let unit = if units.is_empty() || u.arbitrary()? { None } else { Some(*u.choose(&units)?) };
        let mut kept = Kept::default();
        kept.tools.entry("string".to_owned()).or_default().insert(field.key().to_owned(), KeptEntry::new(&text, unit));
        let back = file::open(&file::write(&kept)).unwrap();
        assert_eq!(back.tools["string"][field.key()].typed(field), (text, unit));
        Ok(())
    })
    .budget_ms(1_000);
}
