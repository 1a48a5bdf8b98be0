//! A recorded flight is briefed as the same flight planned would be.

use crate::light::flight;
use crate::tables::{instant, number, rows};
use gloamline::intake::{TrackOptions, tracks};
use gloamline::light::{Crossing, along};
use gloamline::path::fly;
use gloamline::sky::Sky;
use gloamline::units::{Instant, Metres, Place};
use gloamline::{Brief, brief};
use std::fmt::Write;
use std::process::Command;

/// A path as a recording: a row for each step, to the decimals that recordings keep.
fn recording(path: &gloamline::path::Path, step_s: f64) -> String {
    let mut text = "timestamp,lat,lon,altitude_m\n".to_string();
    let steps = (path.airborne_s / step_s).round() as u32;
    for i in 0..=steps {
        let at_s = (f64::from(i) * step_s).min(path.airborne_s);
        let place = path.at(at_s).place;
        let time = path.takeoff.after_s(at_s).utc().to_rfc3339();
        writeln!(text, "{time},{:.7},{:.7},10000", place.lat.deg(), place.lon.deg()).unwrap();
    }
    text
}

fn recorded(csv: &str) -> Brief {
    let mut read = tracks(csv.as_bytes(), "flight.csv", &TrackOptions::default()).unwrap();
    assert_eq!(read.tracks.len(), 1);
    brief(read.tracks.remove(0).flight("flight"), &Sky::default()).unwrap()
}

fn same(a: &[Crossing], b: &[Crossing], tolerance_s: f64) {
    assert_eq!(a.len(), b.len(), "{a:?}\n{b:?}");
    for (a, b) in a.iter().zip(b) {
        assert_eq!((a.limit, a.direction), (b.limit, b.direction));
        assert!((a.at_s - b.at_s).abs() < tolerance_s, "{a:?} {b:?}");
    }
}

#[test]
fn a_straight_flight_is_the_same_as_two_points_as_waypoints_and_as_a_recording() {
    let sky = Sky::default();
    let place = |lat, lon| Place::from_deg(lat, lon).unwrap();
    for (from, to, takeoff, seconds) in [
        (place(60.3, 25.0), place(-33.4, -70.8), "2026-03-12T16:30:00Z", 52_000.0),
        (place(64.0, -22.6), place(61.2, -150.0), "2026-11-06T16:50:00Z", 23_700.0),
        (place(-37.0, 174.8), place(21.3, -157.9), "2026-08-14T10:45:00Z", 30_900.0),
    ] {
        let takeoff = Instant::from_utc(takeoff.parse().unwrap());
        let two = fly(&flight("two", takeoff, &[(from, 0.0), (to, seconds)])).unwrap();
        let wanted = along(&two, &sky).crossings;
        let points: Vec<_> =
            (0..=40).map(|i| seconds * f64::from(i) / 40.0).map(|t| (two.at(t).place, t)).collect();
        same(&along(&fly(&flight("many", takeoff, &points)).unwrap(), &sky).crossings, &wanted, 0.2);
        // a recording each second, and one each ten
        for step_s in [1.0, 10.0] {
            let found = recorded(&recording(&two, step_s));
            same(&found.light.crossings, &wanted, 0.2);
            let deck = found.deck.unwrap();
            assert!((deck.deck.height.0 - 10_000.0).abs() < 0.1);
        }
    }
}

#[test]
fn a_recordings_ends_keep_their_place_and_take_the_aerodromes_clock() {
    let path = fly(&flight(
        "hop",
        Instant::from_utc("2026-12-01T10:25:00Z".parse().unwrap()),
        &[(Place::from_deg(69.69, 18.91).unwrap(), 0.0), (Place::from_deg(69.98, 23.36).unwrap(), 1800.0)],
    ));
    let brief = recorded(&recording(&path.unwrap(), 5.0));
    assert_eq!((brief.flight.from.label.as_str(), brief.flight.to.label.as_str()), ("ENTC", "ENAT"));
    assert!((brief.flight.from.place.lat.deg() - 69.69).abs() < 1e-6);
    assert_eq!(brief.flight.from.zone, Some(chrono_tz::Europe::Oslo));
    assert!(brief.at_waypoints.is_empty(), "a recording's points are no waypoints");
}

#[test]
fn a_recording_is_briefed_by_the_program_without_being_told_its_kind() {
    let table = concat!(env!("CARGO_MANIFEST_DIR"), "/tests/tables/recorded-track/flight.csv");
    let run = Command::new(env!("CARGO_BIN_EXE_gloamline"))
        .args(["brief", table, "--as", "json"])
        .output()
        .unwrap();
    assert!(run.status.success(), "{}", String::from_utf8_lossy(&run.stderr));
    let json: serde_json::Value = serde_json::from_slice(&run.stdout).unwrap();
    assert_eq!(json["recording"]["points"], 1630);
    assert!(json["beneath"]["crossings"].as_array().unwrap().len() >= 8);
    assert!(json["aloft"]["crossings"].as_array().unwrap().len() >= 2);
    let height = json["aloft"]["height_m"].as_f64().unwrap();
    assert!((5_000.0..20_000.0).contains(&height) && Metres(height).feet() < 60_000.0);
}

#[test]
fn a_real_recordings_crossings_are_those_of_an_independent_script() {
    // as for the flights of `tests/light/crossings.rs`: 0.05 s, and 0.023″ over the rate
    let table = concat!(env!("CARGO_MANIFEST_DIR"), "/tests/tables/recorded-track/flight.csv");
    let found = recorded(&std::fs::read_to_string(table).unwrap());
    let wanted = rows("recorded-track/crossings.csv");
    assert!(wanted.len() >= 8);
    assert_eq!(found.light.crossings.len(), wanted.len());
    for (crossing, row) in found.light.crossings.iter().zip(&wanted) {
        let name = format!("{:?}", crossing.limit).to_lowercase();
        let direction = format!("{:?}", crossing.direction).to_lowercase();
        assert_eq!((&name, &direction), (&row["limit"], &row["direction"]), "{row:?}");
        let gap = found.path.takeoff.after_s(crossing.at_s).since_s(instant(row, "utc"));
        let tolerance = 0.051 + 0.023 / number(row, "rate_deg_per_h").abs();
        assert!(gap.abs() < tolerance, "{row:?}: {gap} s");
    }
}

#[test]
fn our_own_geojson_read_back_is_the_same_flight() {
    for name in ["varde-611", "varde-18", "varde-180", "varde-90"] {
        let root = concat!(env!("CARGO_MANIFEST_DIR"), "/reports/");
        let text = std::fs::read_to_string(format!("{root}{name}.geojson")).unwrap();
        let mut read = tracks(text.as_bytes(), "flight.geojson", &TrackOptions::default()).unwrap();
        assert_eq!((read.tracks.len(), read.refused.len()), (1, 0), "{name}");
        let back = brief(read.tracks.remove(0).flight(name), &Sky::default()).unwrap();
        let json = std::fs::read_to_string(format!("{root}{name}.json")).unwrap();
        let json: serde_json::Value = serde_json::from_str(&json).unwrap();
        let wanted = json["beneath"]["crossings"].as_array().unwrap();
        assert_eq!(back.light.crossings.len(), wanted.len(), "{name}");
        for (found, wanted) in back.light.crossings.iter().zip(wanted) {
            let utc: chrono::DateTime<chrono::Utc> = wanted["utc"].as_str().unwrap().parse().unwrap();
            let gap = back.path.takeoff.after_s(found.at_s).since_s(Instant::from_utc(utc));
            // the document's lines keep within 100 m, which a slow Sun takes seconds for
            assert!(gap.abs() < 3.0, "{name}: {gap} s at {utc}");
        }
    }
}
