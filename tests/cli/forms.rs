//! What goes to standard output: its forms, and that they say the same.

use super::{FLIGHT, folder, run, run_in};
use chrono::{DateTime, Utc};

fn shown(text: &str, form: &str) -> String {
    let folder = folder(&[("flight.toml", text)]);
    run_in(folder.path(), &["brief", "flight.toml", "--as", form]).done()
}

/// The usual flight near an equinox, when the Sun rises and sets along it.
fn in_march() -> String {
    FLIGHT.replace("2026-12-18", "2026-03-18")
}

fn utc(value: &serde_json::Value) -> DateTime<Utc> {
    value.as_str().unwrap().parse().unwrap()
}

#[test]
fn the_csv_has_a_row_for_each_minute_and_one_for_the_landing() {
    for (airborne, rows) in [("14h55m", 896), ("15h0m30s", 902), ("15h0m1s", 902)] {
        let text = shown(&FLIGHT.replace("14h55m", airborne), "csv");
        let mut reader = csv::Reader::from_reader(text.as_bytes());
        let header: Vec<String> = reader.headers().unwrap().iter().map(str::to_string).collect();
        assert_eq!(header[..4], ["flight", "time_utc", "lat_deg", "lon_deg"]);
        assert_eq!(header[11], "state");
        let later = ["moon_elevation_deg", "moon_azimuth_deg", "moon_illuminated", "illuminance_lux"];
        assert_eq!(header[12..], later);
        let records: Vec<csv::StringRecord> = reader.records().map(Result::unwrap).collect();
        assert_eq!(records.len(), rows, "{airborne}");
        let times: Vec<DateTime<Utc>> = records.iter().map(|r| r[1].parse().unwrap()).collect();
        assert!(times.windows(2).all(|pair| pair[0] < pair[1]));
        assert!(times[..rows - 1].windows(2).all(|pair| (pair[1] - pair[0]).num_milliseconds() == 60_000));
    }
}

#[test]
fn the_json_tiles_the_flight_and_adds_up() {
    let record: serde_json::Value = serde_json::from_str(&shown(&in_march(), "json")).unwrap();
    let (flight, beneath) = (&record["flight"], &record["beneath"]);
    let segments = beneath["segments"].as_array().unwrap();
    assert!(segments.len() >= 2);
    assert_eq!(segments[0]["begins_utc"], flight["takeoff_utc"]);
    assert_eq!(segments[segments.len() - 1]["ends_utc"], flight["landing_utc"]);
    for pair in segments.windows(2) {
        assert_eq!(pair[0]["ends_utc"], pair[1]["begins_utc"]);
    }
    let seconds = beneath["seconds"].as_object().unwrap();
    let sum: f64 = seconds.values().map(|value| value.as_f64().unwrap()).sum();
    assert!((sum - flight["airborne_s"].as_f64().unwrap()).abs() < 0.005, "{sum}");
    let crossings = beneath["crossings"].as_array().unwrap();
    assert_eq!(crossings.len(), segments.len() - 1);
    for crossing in crossings {
        assert!(utc(&flight["takeoff_utc"]) < utc(&crossing["utc"]));
        assert!(utc(&crossing["utc"]) < utc(&flight["landing_utc"]));
    }
}

#[test]
fn the_text_has_every_crossing_of_the_json() {
    let record: serde_json::Value = serde_json::from_str(&shown(&in_march(), "json")).unwrap();
    let text = shown(&in_march(), "text");
    let crossings = record["beneath"]["crossings"].as_array().unwrap();
    assert!(!crossings.is_empty());
    for crossing in crossings {
        let event = crossing["event"].as_str().unwrap().replace('_', " ");
        let at = chrono::SubsecRound::round_subsecs(utc(&crossing["utc"]), 0).format("%H:%M:%S").to_string();
        assert!(text.lines().any(|line| line.contains(&event) && line.contains(&at)), "{event} {at}\n{text}");
    }
}

#[test]
fn the_options_say_the_same_as_the_file() {
    let inline = run(&[
        "brief",
        "--from=CYYZ",
        "--to=VHHH",
        "--takeoff=2026-12-18 00:10-05:00",
        "--landing=2026-12-19T04:05+08:00",
        "--name=Varde 71",
        "--as=json",
    ]);
    assert_eq!(inline.done(), shown(FLIGHT, "json"));
}

#[test]
fn the_same_flight_gives_the_same_bytes() {
    for form in ["text", "json", "csv"] {
        assert_eq!(shown(FLIGHT, form), shown(FLIGHT, form));
    }
}

#[test]
fn polar_limits_and_ut1_of_the_file_come_before_those_of_the_options() {
    let own = format!("{FLIGHT}dut1_s = 0.25\npolar_areas = {{ north_deg = 70 }}");
    let folder = folder(&[("own.toml", &own), ("plain.toml", FLIGHT)]);
    let options = ["--as=json", "--dut1-s=-0.5", "--north-polar-area=65"];
    let record = |file: &str| -> serde_json::Value {
        let ran = run_in(folder.path(), &[&["brief", file], &options[..]].concat());
        serde_json::from_str(&ran.done()).unwrap()
    };
    let polar_lat = |record: &serde_json::Value| {
        let circles = record["circles"].as_array().unwrap();
        let own = circles.iter().find(|c| c["circle"] == "north_polar_area").unwrap();
        own["lat_deg"].as_f64().unwrap()
    };
    let (own, plain) = (record("own.toml"), record("plain.toml"));
    assert_eq!(
        (own["ut1_minus_utc_s"].as_f64(), plain["ut1_minus_utc_s"].as_f64()),
        (Some(0.25), Some(-0.5))
    );
    assert!((polar_lat(&own) - 70.0).abs() < 1e-4 && (polar_lat(&plain) - 65.0).abs() < 1e-4);
}
