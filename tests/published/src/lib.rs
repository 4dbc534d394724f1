//! Reading the published tables kept in `data/`.
//!
//! A file of `data/` is TOML: `[source.KEY]` entries, and arrays of tables whose rows name one of them by `src`.
//! [`table`] gives the rows of one array, each with its source, so that a failed comparison can say whose figure it was.
//! The rows may hold columns that a test does not ask for.

use core::fmt;

use serde::Deserialize;
use serde::de::DeserializeOwned;
use toml::{Table, Value};

/// Where a row's figures are from, and how they were met.
#[derive(Clone, Debug, Deserialize, PartialEq, Eq)]
pub struct Source {
    /// The publication, or by what the figures were computed.
    pub publication: String,
    /// Its edition.
    #[serde(default)]
    pub edition: String,
    /// Clause, table or chapter.
    #[serde(default)]
    pub clause: String,
    /// `memory`: recalled; `memory+found`: also met in another text; `found`: met there first; `computed`: worked out.
    pub seen: String,
    /// In what kind of text they were met, or by what they were checked.
    #[serde(default)]
    pub found_kind: String,
    /// What else is to be known of them.
    #[serde(default)]
    pub note: String,
}

impl fmt::Display for Source {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.publication)?;
        for part in [&self.edition, &self.clause] {
            if !part.is_empty() {
                write!(f, ", {part}")?;
            }
        }
        write!(f, " ({})", self.seen)
    }
}

/// One row of a table.
#[derive(Clone, Debug)]
pub struct Row<T> {
    /// What the row says.
    pub says: T,
    /// Where it is from.
    pub source: Source,
}

/// The rows of the array of tables `name` in the file's `text`, in the file's order.
///
/// ```
/// #[derive(serde::Deserialize)]
/// struct Boiling {
///     degc: f64,
/// }
/// let text = r#"
///     [source.book]
///     publication = "A handbook"
///     edition = "2nd"
///     seen = "found"
///
///     [[boiling]]
///     src = "book"
///     degc = 100.0
/// "#;
/// let rows = published::table::<Boiling>(text, "boiling");
/// assert_eq!(rows[0].says.degc, 100.0);
/// assert_eq!(rows[0].source.to_string(), "A handbook, 2nd (found)");
/// ```
///
/// # Panics
///
/// Where the file is not as described, the table is missing or empty, or a row names no source: a test must not pass by
/// reading nothing.
#[must_use]
pub fn table<T: DeserializeOwned>(text: &str, name: &str) -> Vec<Row<T>> {
    let file: Table = text.parse().unwrap_or_else(|error| panic!("not TOML: {error}"));
    let rows = file.get(name).and_then(Value::as_array).unwrap_or_else(|| panic!("no table [[{name}]]"));
    assert!(!rows.is_empty(), "[[{name}]] has no rows");
    rows.iter().enumerate().map(|(at, row)| read(&file, name, at + 1, row)).collect()
}

/// One row, with its source looked up. A `seen` of the row's own goes before that of its source.
fn read<T: DeserializeOwned>(file: &Table, name: &str, nth: usize, row: &Value) -> Row<T> {
    let key = row.get("src").and_then(Value::as_str).unwrap_or_else(|| panic!("[[{name}]] {nth} names no source"));
    let source = file.get("source").and_then(|all| all.get(key));
    let source = source.unwrap_or_else(|| panic!("[[{name}]] {nth}: no [source.{key}]"));
    let mut source: Source =
        source.clone().try_into().unwrap_or_else(|error| panic!("[source.{key}] is not a source: {error}"));
    if let Some(seen) = row.get("seen").and_then(Value::as_str) {
        source.seen = seen.to_owned();
    }
    let says = row.clone().try_into().unwrap_or_else(|error| panic!("[[{name}]] {nth}: {error}"));
    Row { says, source }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[derive(Deserialize)]
    struct Figure {
        volt: f64,
    }

    const TEXT: &str = "
        [source.a]
        publication = 'A standard'
        clause = '4.2'
        seen = 'memory'
        [[figure]]
        src = 'a'
        volt = 12
        unasked = true
        [[figure]]
        src = 'a'
        seen = 'found'
        volt = 24.5
    ";

    #[test]
    fn whole_numbers_are_read_as_figures_and_unasked_columns_passed_over() {
        let volts: Vec<f64> = table::<Figure>(TEXT, "figure").iter().map(|row| row.says.volt).collect();
        assert_eq!(volts, [12.0, 24.5]);
    }

    #[test]
    fn a_row_may_be_better_known_than_its_source() {
        let sources: Vec<String> = table::<Figure>(TEXT, "figure").iter().map(|row| row.source.to_string()).collect();
        assert_eq!(sources, ["A standard, 4.2 (memory)", "A standard, 4.2 (found)"]);
    }
}
