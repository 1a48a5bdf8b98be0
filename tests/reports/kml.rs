//! The KML of flights: well-formed, the same points as the `GeoJSON`, and names that are mere words in both.

use super::geo::briefed;
use gloamline::intake::flight_file;
use gloamline::label::one_line;
use gloamline::{Brief, reports};
use proptest::prelude::*;
use roxmltree::{Document, Node};
use serde_json::Value;

const KML: &str = "http://www.opengis.net/kml/2.2";

fn demo(level: &str) -> Brief {
    let text = format!(
        "name = \"Varde\"\nfrom = \"NZAA\"\nto = \"PHNL\"\ntakeoff = 2026-08-14T10:45:00Z\nairborne = \"8h35m\"\n{level}\n\
         [[waypoint]]\nat = \"10S170W\"\n"
    );
    briefed(flight_file(&text, "kml").unwrap())
}

fn all<'a, 'i>(document: &'a Document<'i>, name: &'static str) -> Vec<Node<'a, 'i>> {
    document.descendants().filter(|node| node.has_tag_name((KML, name))).collect()
}

fn text_of(node: Node<'_, '_>, name: &str) -> String {
    let inner = node.descendants().find(|inner| inner.has_tag_name((KML, name))).unwrap();
    inner.text().unwrap_or_default().to_string()
}

/// The tuples of all coordinates of a document, as numbers.
fn tuples(document: &Document<'_>) -> Vec<Vec<f64>> {
    let texts = all(document, "coordinates").into_iter().map(|node| node.text().unwrap());
    let tuples = texts.flat_map(str::split_whitespace);
    tuples.map(|tuple| tuple.split(',').map(|number| number.parse().unwrap()).collect()).collect()
}

/// The positions below a list of any depth, in order.
fn positions(value: &Value) -> Vec<Vec<f64>> {
    let list = value.as_array().unwrap();
    if list[0].is_number() {
        return vec![list.iter().map(|number| number.as_f64().unwrap()).collect()];
    }
    list.iter().flat_map(positions).collect()
}

#[test]
fn both_maps_give_the_same_points_in_the_same_order() {
    for (level, mode, count) in [("level_ft = 37000", "absolute", 3), ("", "clampToGround", 2)] {
        let brief = demo(level);
        let (map, kml) = (reports::geojson(&brief).unwrap(), reports::kml(&brief));
        let map: Value = serde_json::from_str(&map).unwrap();
        let document = Document::parse(&kml).unwrap();
        let features = map["features"].as_array().unwrap();
        let wanted: Vec<Vec<f64>> =
            features.iter().flat_map(|one| positions(&one["geometry"]["coordinates"])).collect();
        assert_eq!(tuples(&document), wanted);
        assert!(wanted.iter().all(|position| position.len() == count));
        let modes = all(&document, "altitudeMode");
        assert!(modes.len() > 10 && modes.iter().all(|node| node.text() == Some(mode)));
        assert_eq!(all(&document, "Placemark").len(), features.len());
    }
}

#[test]
fn every_placemark_has_a_style_that_exists_a_time_and_a_description() {
    let brief = demo("level_ft = 37000");
    let kml = reports::kml(&brief);
    let document = Document::parse(&kml).unwrap();
    let styles: Vec<&str> =
        all(&document, "Style").iter().map(|style| style.attribute("id").unwrap()).collect();
    for placemark in all(&document, "Placemark") {
        let style = text_of(placemark, "styleUrl");
        assert!(styles.contains(&style.trim_start_matches('#')), "{style}");
        let is_line = placemark.descendants().any(|node| node.has_tag_name((KML, "LineString")));
        let begin = text_of(placemark, if is_line { "begin" } else { "when" });
        assert!(text_of(placemark, "description").contains(&begin));
    }
    let said = text_of(document.root_element(), "description");
    assert!(said.contains("does not say that a crew is fit"), "{said}");
    // aabbggrr: the blue of daylight's pale ground comes first
    let daylight =
        all(&document, "Style").into_iter().find(|s| s.attribute("id") == Some("daylight")).unwrap();
    assert_eq!(text_of(daylight, "color"), "ffe1f8ff");
}

/// What XML has no character for.
fn without_noncharacters(text: &str) -> String {
    text.replace(['\u{fffe}', '\u{ffff}'], "")
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 64, failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn names_are_mere_words_in_both_maps(
        name in "(\\PC|[<>&\"'\\x00-\\x1f\u{202e}\u{fffe}]|\\]\\]>|<!\\[CDATA\\[|</name>){0,40}",
        label in "(\\PC|[<>&\"'\\\\\\x00-\\x1f\u{200b}\u{ffff}]|\\$\\[name\\]){0,40}",
    ) {
        let mut brief = demo("");
        let plain = reports::kml(&brief);
        brief.flight.name.clone_from(&name);
        brief.flight.from.label.clone_from(&label);
        brief.flight.waypoints[0].label.clone_from(&label);
        let map: Value = serde_json::from_str(&reports::geojson(&brief).unwrap()).unwrap();
        prop_assert_eq!(&map["flight"]["name"], &one_line(&name));
        let takeoff = map["features"].as_array().unwrap().iter()
            .find(|one| one["properties"]["kind"] == "takeoff").unwrap();
        prop_assert_eq!(&takeoff["properties"]["place"], &one_line(&label));

        let kml = reports::kml(&brief);
        let (document, plain) = (Document::parse(&kml).unwrap(), Document::parse(&plain).unwrap());
        let elements = |document: &Document<'_>| {
            let names = document.descendants().filter(Node::is_element).map(|node| node.tag_name().name().to_string());
            names.collect::<Vec<_>>()
        };
        prop_assert_eq!(elements(&document), elements(&plain));
        prop_assert!(!kml.contains("<![CDATA["));
        let wanted = without_noncharacters(&one_line(&name));
        prop_assert_eq!(text_of(document.root_element(), "name"), wanted);
        let texts = all(&document, "description").into_iter().map(|node| node.text().unwrap());
        let plain_texts = all(&plain, "description").into_iter().map(|node| node.text().unwrap());
        prop_assert!(texts.eq(plain_texts), "outside words in a description");
    }
}
