//! Bytes to text: UTF-8, with or without a byte order mark.

use super::TrackProblem;

/// The text of a file.
pub(super) fn text(bytes: &[u8]) -> Result<&str, TrackProblem> {
    if bytes.starts_with(&[0xff, 0xfe]) || bytes.starts_with(&[0xfe, 0xff]) {
        return Err(TrackProblem::Utf16);
    }
    if bytes.starts_with(b"PK\x03\x04") {
        return Err(TrackProblem::Archive);
    }
    let text = std::str::from_utf8(bytes).map_err(|error| TrackProblem::NotText(error.valid_up_to()))?;
    let text = text.strip_prefix('\u{feff}').unwrap_or(text);
    if text.trim_start().is_empty() {
        return Err(TrackProblem::Empty);
    }
    // UTF-16 of plain letters is valid UTF-8, but every other byte is zero
    if text.chars().take(64).filter(|c| *c == '\0').count() * 3 > text.len().min(64) {
        return Err(TrackProblem::Utf16);
    }
    match text.find('\0') {
        Some(byte) => Err(TrackProblem::NotText(byte)),
        None => Ok(text),
    }
}
