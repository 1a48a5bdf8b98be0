//! RFC 7946 as far as our documents go, told from its text: members, positions, cuts and boxes.
//!
//! Knows nothing of flights.

use serde_json::Value;
use std::collections::BTreeSet;

/// A line as its positions, each with its time.
pub(super) type Line = Vec<(Vec<f64>, String)>;

/// Whether an object has these members and no other.
fn has_only(value: &Value, names: &[&str]) {
    let found: BTreeSet<&str> = value.as_object().unwrap().keys().map(String::as_str).collect();
    assert_eq!(found, names.iter().copied().collect(), "{value}");
}

fn list(value: &Value) -> &[Value] {
    value.as_array().unwrap_or_else(|| panic!("not a list: {value}"))
}

/// Section 3.1.1: longitude, latitude and perhaps a height, within their ranges.
fn position(value: &Value) -> Vec<f64> {
    let numbers: Vec<f64> = list(value).iter().map(|number| number.as_f64().unwrap()).collect();
    assert!((2..=3).contains(&numbers.len()), "{value}");
    assert!((-180.0..=180.0).contains(&numbers[0]) && (-90.0..=90.0).contains(&numbers[1]), "{value}");
    for number in &numbers[..2] {
        assert!((number * 1e6 - (number * 1e6).round()).abs() < 1e-3, "{number} has more than six decimals");
    }
    numbers
}

/// Section 3.1.4, with the times that are ours beside it.
fn line(coordinates: &Value, times: &Value) -> Line {
    let positions: Vec<Vec<f64>> = list(coordinates).iter().map(position).collect();
    let times: Vec<String> = list(times).iter().map(|time| time.as_str().unwrap().to_string()).collect();
    assert!(positions.len() >= 2, "a line of {} positions", positions.len());
    assert_eq!(positions.len(), times.len());
    assert!(times.is_sorted(), "{times:?}");
    for pair in positions.windows(2) {
        assert!((pair[1][0] - pair[0][0]).abs() <= 180.0, "{pair:?} goes the long way round");
    }
    positions.into_iter().zip(times).collect()
}

/// Section 3.1.9: a line is parted on ±180° exactly, on either side of it; ours also at a pole.
pub(super) fn assert_cut(before: &Line, after: &Line) {
    let ((end, ended), (begin, began)) = (&before[before.len() - 1], &after[0]);
    let poles = end[1].abs() == 90.0 && begin[1] == end[1];
    let meridian = end[0].abs() == 180.0 && begin[0] == -end[0] && begin[1] == end[1];
    assert!(poles || meridian, "{end:?} and {begin:?}");
    assert_eq!((ended, end.get(2)), (began, begin.get(2)));
}

/// The lines of a feature of the light; nothing for a point.
fn lines(feature: &Value) -> Option<Vec<Line>> {
    let (geometry, times) = (&feature["geometry"], &feature["properties"]["times"]);
    has_only(geometry, &["type", "coordinates"]);
    let coordinates = &geometry["coordinates"];
    let lines = match geometry["type"].as_str().unwrap() {
        "Point" => {
            position(coordinates);
            return None;
        }
        "LineString" => vec![line(coordinates, times)],
        "MultiLineString" => {
            assert_eq!(list(coordinates).len(), list(times).len());
            list(coordinates).iter().zip(list(times)).map(|(line_, times)| line(line_, times)).collect()
        }
        other => panic!("a geometry of type {other}"),
    };
    for pair in lines.windows(2) {
        assert_cut(&pair[0], &pair[1]);
    }
    Some(lines)
}

/// Section 5: the box holds every position; its western edge is the greater one where it crosses 180°.
fn assert_boxed(bbox: &[f64], position: &[f64]) {
    let half = bbox.len() / 2;
    assert_eq!(half, position.len(), "{bbox:?}");
    let (west, east) = (bbox[0], bbox[half]);
    let lon = position[0];
    let inside = if west > east { lon >= west || lon <= east } else { (west..=east).contains(&lon) };
    assert!(inside, "{lon} is outside of {bbox:?}");
    for part in 1..half {
        assert!((bbox[part]..=bbox[half + part]).contains(&position[part]), "{position:?} {bbox:?}");
    }
}

/// Holds a document against the rules; gives back the lines of each feature that has some.
pub(super) fn checked(text: &str) -> Vec<Vec<Line>> {
    let map: Value = serde_json::from_str(text).unwrap();
    assert_eq!(map["type"], "FeatureCollection");
    // section 7.1: members of our own must not be those of other types
    for taken in ["coordinates", "geometry", "geometries", "properties", "crs"] {
        assert!(map.get(taken).is_none(), "{taken}");
    }
    let bbox: Vec<f64> = list(&map["bbox"]).iter().map(|number| number.as_f64().unwrap()).collect();
    let mut found = Vec::new();
    for feature in list(&map["features"]) {
        has_only(feature, &["type", "properties", "geometry"]);
        assert_eq!(feature["type"], "Feature");
        assert!(feature["properties"]["kind"].is_string());
        match lines(feature) {
            Some(lines) => {
                lines.iter().flatten().for_each(|(at, _)| assert_boxed(&bbox, at));
                found.push(lines);
            }
            None => assert_boxed(&bbox, &position(&feature["geometry"]["coordinates"])),
        }
    }
    found
}
