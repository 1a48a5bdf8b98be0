//! What kind of file it is: told by its content first, and by its name's ending where that does not tell.

use super::gzip::beginning;

/// How much of a file is looked at.
const LOOK: usize = 4096;

/// A kind of file that can be read.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum InputKind {
    /// A flight file in TOML.
    Flight,
    /// A recorded track in CSV.
    Csv,
    /// A recorded track in GPX 1.1.
    Gpx,
    /// A recorded track in GeoJSON (RFC 7946).
    GeoJson,
    /// A recorded track in KML, `gx:Track`.
    Kml,
}

/// The kind of a file, plain or in gzip, by its content and else by its name's ending; nothing if neither tells.
pub fn kind_of(bytes: &[u8], file_name: &str) -> Option<InputKind> {
    let head = beginning(bytes, LOOK);
    // zeros are left out so that UTF-16 is known for what it would be, and refused with its own cure
    let letters: Vec<u8> = head.iter().copied().filter(|byte| *byte != 0).collect();
    let text = String::from_utf8_lossy(&letters);
    let text = text.trim_start_matches(|c: char| c == '\u{feff}' || c == '\u{fffd}' || c.is_whitespace());
    by_content(text).or_else(|| by_ending(file_name))
}

fn by_content(text: &str) -> Option<InputKind> {
    if text.starts_with('<') {
        return by_root(text);
    }
    if text.starts_with('{') {
        return Some(InputKind::GeoJson);
    }
    let mut lines = text.lines().map(str::trim);
    let line = lines.find(|line| !line.is_empty() && !line.starts_with('#'))?;
    if is_toml(line) {
        return Some(InputKind::Flight);
    }
    let most = [',', ';', '\t'].iter().map(|c| line.matches(*c).count()).max();
    (most >= Some(2)).then_some(InputKind::Csv)
}

/// A table's head, or a bare key and a sign of equality.
fn is_toml(line: &str) -> bool {
    let key = line.split_once('=').map(|(key, _)| key.trim().trim_matches('"'));
    let bare = |c: char| c.is_ascii_alphanumeric() || matches!(c, '_' | '-' | '.');
    line.starts_with('[') || key.is_some_and(|key| !key.is_empty() && key.chars().all(bare))
}

/// The kind by the first element, which may carry a namespace's prefix.
fn by_root(text: &str) -> Option<InputKind> {
    let tag = first_tag(text)?;
    let name = tag.split(|c: char| c.is_whitespace() || c == '>' || c == '/').next()?;
    match name.rsplit(':').next()? {
        "gpx" => Some(InputKind::Gpx),
        "kml" => Some(InputKind::Kml),
        _ => None,
    }
}

/// What follows the `<` of the first element, past comments, instructions and declarations.
fn first_tag(text: &str) -> Option<&str> {
    let mut rest = text;
    loop {
        rest = &rest[rest.find('<')? + 1..];
        let end = match rest {
            _ if rest.starts_with("!--") => "-->",
            _ if rest.starts_with('?') => "?>",
            _ if rest.starts_with('!') => ">",
            _ => return Some(rest),
        };
        rest = &rest[rest.find(end)?..];
    }
}

fn by_ending(file_name: &str) -> Option<InputKind> {
    let lower = file_name.to_ascii_lowercase();
    let name = lower.strip_suffix(".gz").unwrap_or(&lower);
    match name.rsplit_once('.')?.1 {
        "toml" => Some(InputKind::Flight),
        "csv" | "tsv" | "txt" => Some(InputKind::Csv),
        "gpx" => Some(InputKind::Gpx),
        "json" | "geojson" => Some(InputKind::GeoJson),
        "kml" => Some(InputKind::Kml),
        _ => None,
    }
}

#[cfg(test)]
mod tests {
    use super::{InputKind, kind_of};

    #[test]
    fn content_tells_before_the_ending_does() {
        for (text, kind) in [
            ("time,lat,lon\n", InputKind::Csv),
            ("# note = 1\n\n time;lat;lon", InputKind::Csv),
            ("\u{feff}<?xml version=\"1.0\"?><!-- <a> -->\n<gpx version='1.1'>", InputKind::Gpx),
            ("<k:kml>", InputKind::Kml),
            (" {\"type\":", InputKind::GeoJson),
            ("# a flight\nfrom = \"CYYZ\"", InputKind::Flight),
            ("[[waypoint]]", InputKind::Flight),
        ] {
            assert_eq!(kind_of(text.as_bytes(), "x.bin"), Some(kind), "{text}");
        }
    }

    #[test]
    fn an_ending_tells_where_the_content_does_not() {
        assert_eq!(kind_of(b"", "a.GPX.gz"), Some(InputKind::Gpx));
        assert_eq!(kind_of(b"hello", "track.csv"), Some(InputKind::Csv));
        assert_eq!(kind_of(b"hello", "csv"), None);
        assert_eq!(kind_of(b"\xff\xfet\0,\0l\0,\0m\0", "a"), Some(InputKind::Csv));
    }
}
