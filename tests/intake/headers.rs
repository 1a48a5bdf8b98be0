//! Columns that must be named, and files that are not what they seem.

use super::{points, refusal};
use gloamline::intake::{Columns, InputKind, TrackOptions, kind_of, tracks};

fn mapped(text: &str, mapping: &str) -> Vec<String> {
    let columns = Columns::parse(mapping, "--columns").unwrap();
    let options = TrackOptions { columns, ..TrackOptions::default() };
    let read = tracks(text.as_bytes(), "a.csv", &options);
    read.map_or_else(|error| vec![error.to_string()], |read| points(&read.tracks[0]))
}

#[test]
fn columns_that_are_not_recognised_are_named_by_the_user() {
    let text = "moment,north,east,up\n1797570600,60,10,30000\n1797570660,60.1,10,30100\n";
    let (what, cure) = refusal(text, "a.csv");
    assert_eq!(what, "a.csv:1:1: no column of time is recognised among 'moment north east up'");
    assert!(cure.contains("time=NAME,lat=NAME,lon=NAME"));
    let read = mapped(text, "time=moment,lat=north,lon=east,height=up:ft");
    assert_eq!(read[0], "2026-12-18T05:10:00 60.0000 10.0000 9144.0");
    assert_eq!(
        mapped(text, "time=then,lat=north,lon=east"),
        ["a.csv:1:1: there is no column 'then' among 'moment north east up'"]
    );
}

#[test]
fn a_table_without_a_header_is_read_by_column_numbers() {
    let text = "1797570600,60,10\n1797570660,60.1,10\n";
    assert_eq!(mapped(text, "time=#1,lat=#2,lon=#3").len(), 2);
    assert_eq!(mapped(&format!("a,b,c\n{text}"), "time=#1,lat=#2,lon=#3").len(), 2);
    assert!(mapped(text, "time=#1,lat=#2,lon=#9")[0].contains("no column '#9'"));
}

#[test]
fn encodings_that_are_not_utf_8_are_refused_with_the_cure() {
    let text = "time,lat,lon\n1797570600,60,10\n1797570660,60.1,10\n";
    let little: Vec<u8> = text.encode_utf16().flat_map(u16::to_le_bytes).collect();
    let big: Vec<u8> = text.encode_utf16().flat_map(u16::to_be_bytes).collect();
    let marked = |mark: &[u8], body: &[u8]| [mark, body].concat();
    for bytes in [little.clone(), big.clone(), marked(&[0xff, 0xfe], &little), marked(&[0xfe, 0xff], &big)] {
        let error = tracks(&bytes, "a.csv", &TrackOptions::default()).unwrap_err();
        assert_eq!(error.to_string(), "a.csv: the file is UTF-16 text");
        assert_eq!(error.hint().unwrap(), "save it as UTF-8");
    }
    let latin = b"time,lat,lon,caf\xe9\n1797570600,60,10,\n";
    let error = tracks(latin, "a.csv", &TrackOptions::default()).unwrap_err();
    assert_eq!(error.to_string(), "a.csv: the file is not UTF-8 text (byte 16)");
}

#[test]
fn what_is_no_track_is_told_from_one() {
    for (text, wanted) in [
        ("", "a: the file is empty"),
        ("from = \"CYYZ\"\n", "a: the file is a flight file, not a recorded track"),
        ("just words\n", "a: the file is no track in CSV, GPX, GeoJSON or KML"),
        ("PK\u{3}\u{4}....", "a: the file is a zip archive"),
        ("{\"type\": }", "a:1:10: cannot be read as JSON: a value is expected here"),
    ] {
        assert_eq!(refusal(text, "a").0, wanted);
    }
    assert_eq!(refusal(" \n", "a.csv").0, "a.csv: the file is empty");
    assert_eq!(kind_of(b"from = \"CYYZ\"", "x.gpx"), Some(InputKind::Flight));
}

#[test]
fn what_a_file_says_cannot_act_on_a_terminal() {
    let (what, _) = refusal("\u{1b}[31mtime,north,\u{202e}east\n", "a.csv");
    assert!(!what.contains('\u{1b}') && !what.contains('\u{202e}'), "{what:?}");
}
