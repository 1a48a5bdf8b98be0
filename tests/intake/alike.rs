//! One flight in every format is one flight.

use super::{mended, only, points};
use std::fmt::Write;

/// Seconds since 1970, degrees north and east, metres: across the antimeridian, 70 points every 30 s.
fn flight() -> Vec<(i64, f64, f64, f64)> {
    let point = |i: i64| {
        let x = i as f64;
        let lon = 178.5 + 0.05 * x;
        let lon = if lon >= 180.0 { lon - 360.0 } else { lon };
        (1_797_570_600 + 30 * i, 60.0 + 0.01 * x, (lon * 1e6).round() / 1e6, 10_000.0 + x)
    };
    (0..70).map(point).collect()
}

fn iso(unix: i64) -> String {
    chrono::DateTime::from_timestamp(unix, 0).unwrap().format("%Y-%m-%dT%H:%M:%SZ").to_string()
}

fn table(head: &str, row: impl Fn(i64, f64, f64, f64) -> String) -> String {
    flight().iter().fold(head.to_string(), |mut text, &(t, lat, lon, h)| {
        text.push_str(&row(t, lat, lon, h));
        text
    })
}

fn gpx() -> String {
    let row = |t, lat, lon, h| {
        format!("<trkpt lat='{lat}' lon='{lon}'><ele>{h}</ele><time>{}</time></trkpt>\n", iso(t))
    };
    table("<gpx><trk><trkseg>", row) + "</trkseg></trk></gpx>"
}

fn kml() -> String {
    let row = |t, lat, lon, h| format!("<when>{}</when><gx:coord>{lon} {lat} {h}</gx:coord>\n", iso(t));
    table("<kml><Placemark><gx:Track><altitudeMode>absolute</altitudeMode>", row)
        + "</gx:Track></Placemark></kml>"
}

fn geojson(time: impl Fn(i64) -> String) -> String {
    let (mut times, mut places) = (String::new(), String::new());
    for (t, lat, lon, h) in flight() {
        let comma = if times.is_empty() { "" } else { "," };
        write!(times, "{comma}{}", time(t)).unwrap();
        write!(places, "{comma}[{lon},{lat},{h}]").unwrap();
    }
    format!(
        r#"{{"type":"Feature","properties":{{"times":[{times}]}},"geometry":{{"type":"LineString","coordinates":[{places}]}}}}"#
    )
}

#[test]
fn every_format_gives_the_same_points() {
    let wanted =
        only(&table("timestamp,lat,lon,height_m\n", |t, lat, lon, h| format!("{t},{lat},{lon},{h}\n")), "a");
    assert_eq!((wanted.points.len(), mended(&wanted)), (70, vec![]));
    let comma = |x: f64| x.to_string().replace('.', ",");
    let others = [
        table("time;lat;lon;alt (m)\r\n", |t, lat, lon, h| {
            format!("{};{};{};{}\r\n", iso(t), comma(lat), comma(lon), comma(h))
        }),
        table("utc\tlongitude\tlatitude\tbaroaltitude_m\n", |t, lat, lon, h| {
            format!("{}\t{lon}\t{lat}\t{h}\n", t * 1000)
        }),
        table("\u{feff}\"Time\",\"Position\",\"Height [m]\"\n", |t, lat, lon, h| {
            format!("\"{t}\",\"{lat},{lon}\",{h}\r")
        }),
        gpx(),
        kml(),
        geojson(|t| t.to_string()),
        geojson(|t| format!("\"{}\"", iso(t))),
    ];
    for text in &others {
        let track = only(text, "a");
        assert_eq!(track.points, wanted.points, "{text}");
        assert_eq!(mended(&track), [""; 0], "{text}");
    }
}

#[test]
fn feet_and_flight_levels_are_metres_within() {
    let feet =
        only(&table("time,lat,lon,altitude_ft\n", |t, lat, lon, _| format!("{t},{lat},{lon},35000\n")), "a");
    let level = only(&table("time,lat,lon,fl\n", |t, lat, lon, _| format!("{t},{lat},{lon},350\n")), "a");
    assert!(points(&feet)[0].ends_with(" 10668.0"));
    assert!(points(&level)[0].ends_with(" -"), "a lone 'fl' names no height");
    let level = only(&table("time,lat,lon,level\n", |t, lat, lon, _| format!("{t},{lat},{lon},350\n")), "a");
    assert!(points(&level)[0].ends_with(" 10668.0"));
}
