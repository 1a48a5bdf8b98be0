//! How long a recording of 16 hours at one point a second takes to read and clean, in each format.

#![allow(clippy::unwrap_used, reason = "a bench may panic")]

use divan::Bencher;
use flate2::Compression;
use flate2::write::GzEncoder;
use gloamline::intake::{TrackOptions, tracks};
use std::fmt::Write as _;
use std::io::Write as _;

/// Two more than 16 hours of seconds, to a round number.
const POINTS: u32 = 60_000;

fn main() {
    divan::main();
}

/// Seconds since 1970, degrees north and east, metres: with a fault here and there.
fn points() -> impl Iterator<Item = (u32, f64, f64, f64)> {
    (0..POINTS).map(|i| {
        let x = f64::from(i);
        let fault = if i % 1000 == 500 { 20.0 } else { 0.0 };
        (
            1_797_570_600 + i,
            40.0 + 0.0008 * x + fault,
            -120.0 + 0.002 * x,
            10_000.0 + 100.0 * (x * 0.001).sin(),
        )
    })
}

fn iso(unix: u32) -> String {
    chrono::DateTime::from_timestamp(i64::from(unix), 0).unwrap().format("%Y-%m-%dT%H:%M:%SZ").to_string()
}

fn csv() -> String {
    let mut text =
        "time,icao24,lat,lon,velocity,heading,vertrate,callsign,onground,geoaltitude\n".to_string();
    for (t, lat, lon, h) in points() {
        writeln!(text, "{t},a0b1c2,{lat:.6},{lon:.6},240.1,87.5,0.0,TEST1,false,{h:.1}").unwrap();
    }
    text
}

fn gpx() -> String {
    let mut text = "<gpx><trk><trkseg>\n".to_string();
    for (t, lat, lon, h) in points() {
        let time = iso(t);
        writeln!(
            text,
            "<trkpt lat=\"{lat:.6}\" lon=\"{lon:.6}\"><ele>{h:.1}</ele><time>{time}</time></trkpt>"
        )
        .unwrap();
    }
    text + "</trkseg></trk></gpx>"
}

fn geojson() -> String {
    let (mut times, mut places) = (String::new(), String::new());
    for (t, lat, lon, h) in points() {
        let comma = if times.is_empty() { "" } else { "," };
        write!(times, "{comma}\"{}\"", iso(t)).unwrap();
        write!(places, "{comma}[{lon:.6},{lat:.6},{h:.1}]").unwrap();
    }
    format!(
        r#"{{"type":"Feature","properties":{{"times":[{times}]}},"geometry":{{"type":"LineString","coordinates":[{places}]}}}}"#
    )
}

fn bench(bencher: Bencher<'_, '_>, bytes: &[u8]) {
    let options = TrackOptions::default();
    assert_eq!(tracks(bytes, "a", &options).unwrap().tracks[0].points.len(), POINTS as usize - 60);
    bencher.bench(|| tracks(divan::black_box(bytes), "a", &options));
}

#[divan::bench]
fn a_csv(bencher: Bencher<'_, '_>) {
    bench(bencher, csv().as_bytes());
}

#[divan::bench]
fn b_csv_in_gzip(bencher: Bencher<'_, '_>) {
    let mut encoder = GzEncoder::new(Vec::new(), Compression::default());
    encoder.write_all(csv().as_bytes()).unwrap();
    bench(bencher, &encoder.finish().unwrap());
}

#[divan::bench]
fn c_gpx(bencher: Bencher<'_, '_>) {
    bench(bencher, gpx().as_bytes());
}

#[divan::bench]
fn d_geojson(bencher: Bencher<'_, '_>) {
    bench(bencher, geojson().as_bytes());
}
