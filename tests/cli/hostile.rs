//! Names made to do harm: files stay in their folder and every form gives the name back as mere words.

use super::{FLIGHT, folder, names, run_in};
use std::path::Path;

const KML: &str = "http://www.opengis.net/kml/2.2";

const HOSTILE: [&str; 14] = [
    "../../../etc/passwd",
    "..\\..\\windows\\system32",
    "/etc/passwd",
    "C:\\autoexec.bat",
    "<script>alert('x')</script>",
    "\u{1b}[31mred\u{1b}[0m\u{7}\u{8}",
    "line one\r\nline two\tthree",
    "nul\0byte",
    "\u{202e}gnirts\u{202c}\u{200f}\u{2066}x\u{2069}",
    "=HYPERLINK(\"http://example.invalid\")",
    "\"quoted\",comma;semicolon",
    "CON",
    "...",
    "\u{1b}\u{7}\u{200b}",
];

/// A name as a TOML string with everything escaped.
fn toml_string(name: &str) -> String {
    let escaped: String =
        name.chars().flat_map(|c| format!("\\U{:08X}", u32::from(c)).into_bytes()).map(char::from).collect();
    format!("\"{escaped}\"")
}

fn named(name: &str) -> String {
    FLIGHT.replace("\"Varde 71\"", &toml_string(name))
}

/// Briefs a flight of that name into the folder `out` of a folder; gives back the folder.
fn briefed(name: &str) -> tempfile::TempDir {
    let folder = folder(&[("flight.toml", &named(name))]);
    run_in(folder.path(), &["brief", "flight.toml", "--out", "out"]).done();
    assert_eq!(names(folder.path()), ["flight.toml", "out"], "{name:?}");
    folder
}

fn is_hidden(c: char) -> bool {
    (c.is_control() && c != '\n')
        || matches!(c, '\u{200b}'..='\u{200f}' | '\u{202a}'..='\u{202e}' | '\u{2066}'..='\u{2069}')
}

fn read(folder: &Path, ending: &str) -> String {
    let own = names(folder).into_iter().find(|name| name.ends_with(ending)).unwrap();
    std::fs::read_to_string(folder.join(own)).unwrap()
}

#[test]
fn a_hostile_name_stays_in_its_folder_and_is_mere_words() {
    let long = "long name ".repeat(1000);
    for name in HOSTILE.into_iter().chain([long.as_str()]) {
        let folder = briefed(name);
        let out = folder.path().join("out");
        for file in names(&out) {
            let harmless = |c: char| c.is_alphanumeric() || c == '-' || c == '.';
            assert!(file.chars().all(harmless) && !file.starts_with('.') && file.len() < 130, "{file:?}");
        }
        let text = read(&out, ".txt");
        assert!(!text.contains(is_hidden), "{name:?}");
        assert!(text.lines().next().unwrap().chars().count() < 300, "{name:?}");
        let json: serde_json::Value = serde_json::from_str(&read(&out, ".json")).unwrap();
        assert_eq!(json["flight"]["name"], name);
        assert_csv_is_inert(&read(&out, ".csv"), name);
        assert_svg_is_inert(&read(&out, ".svg"), name);
        assert_maps_are_inert(&out, name);
    }
}

fn assert_svg_is_inert(text: &str, name: &str) {
    assert!(!text.contains(is_hidden), "{name:?}");
    let document = roxmltree::Document::parse(text).unwrap_or_else(|error| panic!("{name:?}: {error}"));
    for node in document.descendants().filter(roxmltree::Node::is_element) {
        assert!(!["script", "foreignObject", "a", "image"].contains(&node.tag_name().name()), "{name:?}");
        let links = node.attributes().filter(|own| own.name() == "href");
        assert!(links.into_iter().all(|own| own.value().starts_with('#')), "{name:?}");
        assert!(node.attributes().all(|own| !own.name().starts_with("on")), "{name:?}");
    }
}

fn assert_maps_are_inert(out: &Path, name: &str) {
    let (geojson, kml) = (read(out, ".geojson"), read(out, ".kml"));
    assert!(!geojson.contains(is_hidden) && !kml.contains(is_hidden), "{name:?}");
    let map: serde_json::Value = serde_json::from_str(&geojson).unwrap();
    assert_eq!(map["features"].as_array().unwrap().len() + 1, geojson.lines().count() - 1, "{name:?}");
    let document = roxmltree::Document::parse(&kml).unwrap_or_else(|error| panic!("{name:?}: {error}"));
    let said = document.descendants().find(|node| node.has_tag_name((KML, "name"))).unwrap();
    assert_eq!(said.text(), map["flight"]["name"].as_str(), "{name:?}");
}

fn assert_csv_is_inert(text: &str, name: &str) {
    let mut reader = csv::Reader::from_reader(text.as_bytes());
    let fields = reader.headers().unwrap().len();
    let rows: Vec<csv::StringRecord> = reader.records().map(Result::unwrap).collect();
    assert_eq!(rows.len(), 14 * 60 + 55 + 1, "{name:?}");
    for row in &rows {
        assert_eq!(row.len(), fields);
        assert!(!row[0].contains(is_hidden) && !row[0].contains('\n'), "{name:?}");
        assert!(!row[0].starts_with(['=', '+', '-', '@']), "{name:?}");
    }
}

#[test]
fn a_name_without_a_visible_letter_is_taken_for_none() {
    let folder = folder(&[("flight.toml", &named("\u{1b}\u{7} \t\u{9b}"))]);
    let text = run_in(folder.path(), &["brief", "flight.toml"]).done();
    assert!(text.starts_with("CYYZ-VHHH 2026-12-18 0510Z   CYYZ → "), "{text}");
}

#[test]
fn what_was_given_is_quoted_without_its_control_characters() {
    let evil = toml_string(&format!("9\u{1b}[31m\u{202e}{}", "9".repeat(10_000)));
    for field in ["from", "takeoff", "airborne"] {
        let lines = FLIGHT
            .lines()
            .map(|line| if line.starts_with(field) { format!("{field} = {evil}") } else { line.to_string() });
        let folder = folder(&[("flight.toml", &lines.collect::<Vec<_>>().join("\n"))]);
        let ran = run_in(folder.path(), &["brief", "flight.toml"]);
        let said = ran.refused();
        assert!(!said.contains(is_hidden) && said.len() < 300, "{field}: {said:?}");
    }
    let folder = folder(&[("flight.toml", &format!("{} = 1\n{FLIGHT}", toml_string("\u{1b}[31mfield")))]);
    let ran = run_in(folder.path(), &["brief", "flight.toml"]);
    assert!(ran.refused().contains("unknown field '\\u{1b}[31mfield'"), "{}", ran.err);
}

#[test]
fn a_file_with_a_hostile_name_is_named_without_its_control_characters() {
    let folder = folder(&[]);
    let ran = run_in(folder.path(), &["brief", "a\u{1b}[31m\n.toml"]);
    assert!(ran.refused().starts_with("gloamline: a\\u{1b}[31m\\n.toml: cannot be read: "), "{}", ran.err);
    assert_eq!(ran.err.lines().count(), 1);
}
