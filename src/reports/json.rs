//! Briefs as JSON: one flight an object, several an array.

use super::record::Record;
use crate::Brief;

/// One brief as a JSON object, ending in a line feed.
///
/// # Errors
/// None that a brief can cause: the record has neither maps nor numbers that JSON lacks.
pub fn json(brief: &Brief) -> Result<String, serde_json::Error> {
    Ok(serde_json::to_string_pretty(&Record::of(brief))? + "\n")
}

/// Several briefs as a JSON array, ending in a line feed.
///
/// # Errors
/// As for one.
pub fn json_list(briefs: &[Brief]) -> Result<String, serde_json::Error> {
    let records: Vec<Record> = briefs.iter().map(Record::of).collect();
    Ok(serde_json::to_string_pretty(&records)? + "\n")
}
