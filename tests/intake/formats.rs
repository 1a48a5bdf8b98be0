//! The formats as their publications show them. The examples are typed from memory of the named pages, shortened.

use super::{mended, only, points, read, refusal};

/// In the manner of the GPX 1.1 schema documentation: its element order, optional children and extensions.
const GPX: &str = r#"<?xml version="1.0" encoding="UTF-8" standalone="no" ?>
<gpx xmlns="http://www.topografix.com/GPX/1/1" version="1.1" creator="Oregon 400t"
     xmlns:gpxx="http://www.garmin.com/xmlschemas/GpxExtensions/v3">
  <metadata><time>2009-10-17T22:58:43Z</time></metadata>
  <wpt lat="1" lon="2"><time>2009-10-17T18:00:00Z</time></wpt>
  <trk>
    <name>Example GPX Document &amp; more</name>
    <trkseg>
      <trkpt lat="47.644548" lon="-122.326897">
        <ele>4.46</ele>
        <time>2009-10-17T18:37:26Z</time>
        <extensions><gpxx:time>2001-01-01T00:00:00Z</gpxx:time></extensions>
      </trkpt>
      <trkpt lat="47.644549" lon="-122.326898"><ele>4.94</ele><time>2009-10-17T18:37:31Z</time></trkpt>
    </trkseg>
    <trkseg>
      <trkpt lat="47.644550" lon="-122.326899"><ele>6.87</ele><time>2009-10-17T18:37:34Z</time></trkpt>
    </trkseg>
  </trk>
</gpx>"#;

/// The first example of `gx:Track` in the KML reference.
const KML: &str = r#"<?xml version="1.0" encoding="UTF-8"?>
<kml xmlns="http://www.opengis.net/kml/2.2" xmlns:gx="http://www.google.com/kml/ext/2.2">
<Folder>
  <Placemark>
    <gx:Track>
      <when>2010-05-28T02:02:09Z</when>
      <when>2010-05-28T02:02:35Z</when>
      <when>2010-05-28T02:02:44Z</when>
      <when>2010-05-28T02:02:53Z</when>
      <when>2010-05-28T02:02:54Z</when>
      <when>2010-05-28T02:02:55Z</when>
      <when>2010-05-28T02:02:56Z</when>
      <gx:coord>-122.207881 37.371915 156.000000</gx:coord>
      <gx:coord>-122.205712 37.373288 152.000000</gx:coord>
      <gx:coord>-122.204678 37.373939 147.000000</gx:coord>
      <gx:coord>-122.203572 37.374630 142.199997</gx:coord>
      <gx:coord>-122.203451 37.374706 141.800003</gx:coord>
      <gx:coord>-122.203329 37.374780 141.199997</gx:coord>
      <gx:coord>-122.203207 37.374857 140.199997</gx:coord>
    </gx:Track>
  </Placemark>
</Folder>
</kml>"#;

/// The collection of RFC 7946, section 1.5, whose line is given times.
const GEOJSON: &str = r#"{
  "type": "FeatureCollection",
  "features": [{
    "type": "Feature",
    "geometry": {"type": "Point", "coordinates": [102.0, 0.5]},
    "properties": {"prop0": "value0"}
  }, {
    "type": "Feature",
    "geometry": {"type": "LineString", "coordinates": [[102.0, 0.0], [103.0, 1.0], [104.0, 0.0], [105.0, 1.0]]},
    "properties": {"prop0": "value0", "prop1": 0.0,
      "times": ["2026-12-18T05:00:00Z", "2026-12-18T05:10:00Z", "2026-12-18T05:20:00Z", "2026-12-18T05:30:00Z"]}
  }, {
    "type": "Feature",
    "geometry": {"type": "Polygon",
      "coordinates": [[[100.0, 0.0], [101.0, 0.0], [101.0, 1.0], [100.0, 1.0], [100.0, 0.0]]]},
    "properties": {"prop0": "value0", "prop1": {"this": "that"}}
  }]
}"#;

/// The multi-line of RFC 7946, section 3.1.9, cut at the antimeridian, with times.
const CUT: &str = r#"{"type": "Feature",
  "properties": {"name": "cut", "coordTimes": [[1797570600, 1797572400], [1797572400, 1797574200.5]]},
  "geometry": {"type": "MultiLineString",
    "coordinates": [[[170.0, 45.0, 9000], [180.0, 45.0, 10000]], [[-180.0, 45.0, 10000], [-170.0, 45.0, 9000]]]}}"#;

#[test]
fn gpx_is_read_as_its_schema_shows_it() {
    let track = only(GPX, "a.gpx");
    assert_eq!(track.name.as_deref(), Some("Example GPX Document & more"));
    assert_eq!(
        points(&track),
        [
            "2009-10-17T18:37:26 47.6445 -122.3269 4.5",
            "2009-10-17T18:37:31 47.6445 -122.3269 4.9",
            "2009-10-17T18:37:34 47.6446 -122.3269 6.9"
        ]
    );
    assert_eq!(mended(&track), [""; 0]);
    assert_eq!(track.origin.to_string(), ":6:1");
}

#[test]
fn a_timed_route_of_gpx_is_a_flight_and_one_without_times_is_refused_alone() {
    let route = r#"<rte><name>plan</name><rtept lat="60" lon="10"><time>2026-12-18T05:00Z</time></rtept>
        <rtept lat="61" lon="10"><time>2026-12-18T05:10Z</time></rtept></rte>"#;
    let bare = r#"<rte><name>bare</name><rtept lat="60" lon="10"/><rtept lat="61" lon="10"/></rte>"#;
    let both = read(&format!("<gpx>{route}{bare}</gpx>"), "a.gpx").unwrap();
    assert_eq!(both.tracks[0].name.as_deref(), Some("plan"));
    assert_eq!(both.tracks[0].points.len(), 2);
    assert_eq!(both.refused[0].to_string(), "a.gpx:2:100: flight 'bare': its positions have no times");
    assert!(both.refused[0].hint().unwrap().contains("<time> of a GPX point"));
}

#[test]
fn kml_is_read_as_its_reference_shows_it() {
    let track = only(KML, "a.kml");
    assert_eq!(points(&track)[0], "2010-05-28T02:02:09 37.3719 -122.2079 156.0");
    assert_eq!(points(&track)[6], "2010-05-28T02:02:56 37.3749 -122.2032 140.2");
    assert_eq!(points(&track).len(), 7);
}

#[test]
fn tracks_of_one_placemark_are_one_flight_and_heights_above_ground_are_none() {
    let track = |when: &str, lat: &str| {
        format!(
            "<gx:Track><altitudeMode>relativeToGround</altitudeMode><when>{when}</when><gx:coord>10 {lat} 5</gx:coord></gx:Track>"
        )
    };
    let text = format!(
        "<kml><Placemark><name>one</name><gx:MultiTrack>{}{}</gx:MultiTrack></Placemark></kml>",
        track("2026-12-18T05:00Z", "60"),
        track("2026-12-18T05:05Z", "60.5")
    );
    let track = only(&text, "a.kml");
    assert_eq!(track.name.as_deref(), Some("one"));
    assert_eq!(
        points(&track),
        ["2026-12-18T05:00:00 60.0000 10.0000 -", "2026-12-18T05:05:00 60.5000 10.0000 -"]
    );
    assert_eq!(mended(&track), ["no heights are recorded"]);
}

#[test]
fn geojson_is_read_as_its_rfc_shows_it() {
    let track = only(GEOJSON, "a.geojson");
    assert_eq!(points(&track).len(), 4);
    assert_eq!(points(&track)[3], "2026-12-18T05:30:00 1.0000 105.0000 -");
}

#[test]
fn lines_cut_at_the_antimeridian_are_joined_there() {
    let track = only(CUT, "a.json");
    assert_eq!(
        points(&track),
        [
            "2026-12-18T05:10:00 45.0000 170.0000 9000.0",
            "2026-12-18T05:40:00 45.0000 -180.0000 10000.0",
            "2026-12-18T06:10:00.500 45.0000 -170.0000 9000.0"
        ]
    );
    assert_eq!(
        mended(&track),
        [
            "1 point with a time and place already given dropped",
            "no points from 2026-12-18T05:10:00Z to 2026-12-18T05:40:00Z (30 min): bridged",
            "no points from 2026-12-18T05:40:00Z to 2026-12-18T06:10:00Z (30 min): bridged"
        ]
    );
}

#[test]
fn what_holds_no_timed_track_is_refused_with_where_times_stand() {
    let line = GEOJSON.replace("\"times\"", "\"when\"");
    let kml = "<kml><Placemark><LineString><coordinates>1,2 3,4</coordinates></LineString></Placemark></kml>";
    for (text, name) in [(line.as_str(), "a.geojson"), (kml, "a.kml")] {
        let (what, cure) = refusal(text, name);
        assert_eq!(what, format!("{name}: its positions have no times"));
        assert!(cure.contains("gx:Track"));
    }
    for (text, name) in [("<gpx/>", "a.gpx"), ("<kml></kml>", "a.kml"), (r#"{"type":"Point"}"#, "a.json")] {
        assert_eq!(refusal(text, name).0, format!("{name}: there is no track in it"));
    }
}

#[test]
fn times_and_positions_that_do_not_pair_are_refused() {
    let json = GEOJSON.replace(", \"2026-12-18T05:30:00Z\"", "");
    assert_eq!(refusal(&json, "a.json").0, "a.json:7:6: 3 times stand for 4 positions");
    let kml = KML.replacen("<when>2010-05-28T02:02:09Z</when>", "", 1);
    assert_eq!(refusal(&kml, "a.kml").0, "a.kml:5:5: 6 times stand for 7 positions");
}

#[test]
fn entities_and_document_types_are_refused_where_they_stand() {
    let bomb = "<?xml version=\"1.0\"?>\n<!DOCTYPE gpx [<!ENTITY a \"aaaaaaaaaa\"><!ENTITY b \"&a;&a;&a;\">]>\n<gpx>&b;</gpx>";
    let (what, cure) = refusal(bomb, "a.gpx");
    assert!(what.starts_with("a.gpx:2:1: a document type definition is refused"), "{what}");
    assert!(cure.contains("DOCTYPE"));
    let unknown = refusal("<gpx>\n&b;</gpx>", "a.gpx").0;
    assert_eq!(unknown, "a.gpx:2:1: the entity 'b' is not one of XML's own five");
    let deep = format!("<gpx>{}", "<a>".repeat(100_000));
    assert!(refusal(&deep, "a.gpx").0.ends_with("nested more than 64 deep"));
    let torn = refusal("<gpx><trk></gpx>", "a.gpx").0;
    assert!(torn.starts_with("a.gpx:1:11: cannot be read as XML"), "{torn}");
}
