//! Bytes of any kind: no panic, no hang, and what comes out keeps its promise.

use gloamline::intake::{TrackOptions, Tracks, kind_of, tracks};
use proptest::prelude::*;

const VALID: [&str; 5] = [
    "time,lat,lon,alt\n1797570600,60,10,100\n1797570660,60.1,10,\n1797570720,60.2,10,300\n",
    "\u{feff}Zeit;utc;lat;lng;alt_ft\r\n;05:10:00;60,5;-10,5;3,5\r;23:11:00;\"60,6\";-10,5;\n",
    "<?xml version='1.0'?><gpx><trk><name>&lt;é&#x41;</name><trkseg><trkpt lat='60' lon='10'><ele>1</ele>\
        <time>2026-12-18T05:10:00Z</time></trkpt><trkpt lat='60.1' lon='10'><time>2026-12-18T05:11:00Z</time></trkpt>\
        </trkseg></trk></gpx>",
    "<kml><Placemark><name><![CDATA[é]]></name><gx:Track><when>2026-12-18T05:10Z</when><when>2026-12-18T05:11Z</when>\
        <gx:coord>10 60 1</gx:coord><gx:coord>10 60.1</gx:coord></gx:Track></Placemark></kml>",
    r#"{"type":"Feature","properties":{"times":[["2026-12-18T05:10Z",1797570660]],"name":"é\u0041"},
        "geometry":{"type":"MultiLineString","coordinates":[[[10,60,1e2],[10,60.1]]]}}"#,
];
const ENDINGS: [&str; 6] = ["a", "a.csv", "a.gpx", "a.kml", "a.geojson", "a.gpx.gz"];

fn options() -> TrackOptions {
    TrackOptions { date: "2026-12-18".parse().ok(), ..TrackOptions::default() }
}

/// Reads, and holds what is read against the promise.
fn read(bytes: &[u8], name: &str) -> Option<Tracks> {
    let read = tracks(bytes, name, &options());
    match &read {
        Err(error) => {
            assert!(error.to_string().starts_with(name));
            let shown = error.to_string() + &error.hint().unwrap_or_default();
            assert!(!shown.contains(|c: char| c.is_control()), "{shown:?}");
        }
        Ok(read) => {
            assert!(!read.tracks.is_empty());
            for track in &read.tracks {
                assert!(track.points.len() > 1);
                assert!(track.points.windows(2).all(|pair| pair[0].instant < pair[1].instant));
                assert!(track.points.iter().all(|point| point.instant.is_answered_for()));
                let known = track.points.iter().filter(|point| point.height.is_some()).count();
                assert!(known == 0 || known == track.points.len());
                assert!(track.points.iter().all(|p| p.height.is_none_or(|height| height.0.is_finite())));
            }
        }
    }
    read.ok()
}

fn any_name() -> impl Strategy<Value = &'static str> {
    proptest::sample::select(&ENDINGS[..])
}

#[test]
fn the_valid_files_are_valid() {
    for text in VALID {
        assert!(read(text.as_bytes(), "a").is_some(), "{text}");
    }
}

#[test]
fn a_valid_file_cut_anywhere_is_read_or_refused() {
    for text in VALID {
        for length in 0..text.len() {
            read(&text.as_bytes()[..length], "a");
        }
    }
}

fn lines(head: &str, line: impl Fn(i64) -> String) -> String {
    (0..50_000).fold(head.to_string(), |text, i| text + &line(i))
}

#[test]
fn long_hostile_files_take_no_longer_than_they_must() {
    let start = "{\"type\":\"Feature\",\"geometry\":{\"type\":\"LineString\",\"coordinates\":";
    let million = 1_000_000;
    for text in [
        start.to_string() + &"[".repeat(million),
        start.to_string() + "[" + &"[1,2],".repeat(million / 4),
        "{".to_string() + &"\"a\":{".repeat(million / 4),
        "\"a\\\"".repeat(million / 4),
        "<gpx>".to_string() + &"<trk>".repeat(million / 4),
        "<gpx>".to_string() + &"<trk/>".repeat(million / 4),
        "<gpx><trk><name>".to_string() + &"é&amp;".repeat(million / 4),
        "<gpx ".to_string() + &"a='b' ".repeat(million / 4),
        "<kml><Placemark><Track>".to_string() + &"<when/>".repeat(million / 4),
        "time,lat,lon\n".to_string() + &"\n".repeat(million),
        "time,lat,lon\n".to_string() + &"1,2\n".repeat(million / 4),
        "time,lat,lon\n\"".to_string() + &"1,2\n".repeat(million / 4),
        lines("time,lat,lon,id\n", |i| format!("{},1,2,{}\n", 1_797_570_600 + i % 2, i / 2)),
        lines("time,lat,lon,id\n", |i| format!("1797570600,1,2,{}\n", i / 3)),
        lines("time,lat,lon\n", |i| format!("{},{},2\n", 1_797_570_600 - i, i * 7919 % 179 - 89)),
    ] {
        read(text.as_bytes(), "a.csv");
    }
}

proptest! {
    #[test]
    fn any_bytes_are_read_or_refused(bytes in prop::collection::vec(any::<u8>(), 0..400), name in any_name()) {
        kind_of(&bytes, name);
        read(&bytes, name);
    }

    #[test]
    fn any_text_after_a_true_beginning_is_read_or_refused(
        which in 0..VALID.len(), part in 0.0..1.0, text in "[\\PC\n\r\t,;\"\\\\<>&\\[\\]{}0-9.:-]{0,80}", name in any_name()
    ) {
        let valid = VALID[which];
        let cut = valid.char_indices().map(|(i, _)| i).nth((part * valid.chars().count() as f64) as usize).unwrap_or(0);
        read((valid[..cut].to_string() + &text).as_bytes(), name);
        read((valid[..cut].to_string() + &text + &valid[cut..]).as_bytes(), name);
    }

    #[test]
    fn a_changed_byte_does_no_harm(which in 0..VALID.len(), at in 0usize..400, byte in any::<u8>()) {
        let mut bytes = VALID[which].as_bytes().to_vec();
        let at = at % bytes.len();
        bytes[at] = byte;
        read(&bytes, "a.csv");
    }

    #[test]
    fn damaged_gzip_is_read_or_refused(tail in prop::collection::vec(any::<u8>(), 0..200), name in any_name()) {
        let bytes = [&[0x1f, 0x8b, 8][..], &tail].concat();
        kind_of(&bytes, name);
        read(&bytes, name);
    }
}
