//! Reads the outside tables, and checks that each has its birth certificate.

mod certificate;

use std::collections::HashMap;
use std::path::{Path, PathBuf};

/// A row by column name.
pub(crate) type Row = HashMap<String, String>;

pub(crate) fn folder() -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("tests/tables")
}

/// The rows of a table; a row that cannot be read fails.
pub(crate) fn rows(table: &str) -> Vec<Row> {
    let path = folder().join(table);
    let mut reader = csv::ReaderBuilder::new().comment(Some(b'#')).from_path(&path).unwrap();
    let headers = reader.headers().unwrap().clone();
    let rows = reader.records().map(|record| {
        let record = record.unwrap_or_else(|error| panic!("{}: {error}", path.display()));
        headers.iter().map(str::to_string).zip(record.iter().map(str::to_string)).collect()
    });
    rows.collect()
}

/// A number of a row.
pub(crate) fn number(row: &Row, column: &str) -> f64 {
    let text = row.get(column).unwrap_or_else(|| panic!("no column {column}"));
    text.parse().unwrap_or_else(|_| panic!("{column} = {text:?} is no number in {row:?}"))
}

/// An instant of a row.
pub(crate) fn instant(row: &Row, column: &str) -> gloamline::units::Instant {
    let utc: chrono::DateTime<chrono::Utc> =
        row[column].parse().unwrap_or_else(|e| panic!("{column}: {e} in {row:?}"));
    gloamline::units::Instant::from_utc(utc)
}
