//! JSON schema 1 has the keys that it promises, for every demo flight.

use serde_json::Value;
use std::process::Command;

/// The contract, as paths; `[]` stands for each element.
const PROMISED: &[&str] = &[
    "schema",
    "flight.name",
    "flight.from",
    "flight.to",
    "flight.takeoff_utc",
    "flight.landing_utc",
    "flight.airborne_s",
    "flight.distance_m",
    "beneath.state_at_takeoff",
    "beneath.state_at_landing",
    "beneath.crossings.[].utc",
    "beneath.crossings.[].limit",
    "beneath.crossings.[].direction",
    "beneath.crossings.[].event",
    "beneath.crossings.[].lat_deg",
    "beneath.crossings.[].lon_deg",
    "beneath.crossings.[].elevation_deg",
    "beneath.segments.[].state",
    "beneath.segments.[].begins_utc",
    "beneath.segments.[].ends_utc",
    "beneath.segments.[].seconds",
    "beneath.seconds.daylight",
    "beneath.seconds.civil_twilight",
    "beneath.seconds.nautical_twilight",
    "beneath.seconds.astronomical_twilight",
    "beneath.seconds.darkness",
    "beneath.highest.utc",
    "beneath.highest.elevation_deg",
    "beneath.highest.lat_deg",
    "beneath.highest.lon_deg",
    "beneath.lowest.utc",
    "moon.at_takeoff.elevation_deg",
    "moon.at_takeoff.azimuth_deg",
    "moon.at_landing.elevation_deg",
    "moon.at_landing.azimuth_deg",
    "moon.highest.utc",
    "moon.highest.elevation_deg",
    "moon.up_at_takeoff",
    "moon.up_at_landing",
    "moon.illuminated_fraction",
    "moon.phase_angle_deg",
    "moon.waxing",
    "moon.crossings.[].utc",
    "moon.crossings.[].event",
    "moon.crossings.[].lat_deg",
    "moon.crossings.[].lon_deg",
    "moon.segments.[].up",
    "moon.segments.[].seconds",
    "moon.seconds.up",
    "moon.seconds.down",
    "moon.seconds.moonlit_darkness",
    "moon.seconds.dark_darkness",
    "moon.seconds.moonlit_night_twilight",
    "moon.seconds.dark_night_twilight",
    "illuminance.meaning",
    "illuminance.at_takeoff_lux",
    "illuminance.at_landing_lux",
    "illuminance.lux_hours",
    "illuminance.seconds_above.[].lux",
    "illuminance.seconds_above.[].seconds",
    "illuminance.seconds_above.[].crossings",
    "illuminance.brightest.lux",
    "illuminance.darkest.lux",
    "low_sun.[].begins_utc",
    "low_sun.[].ends_utc",
    "low_sun.[].seconds",
    "low_sun.[].strong",
    "low_sun.[].strong_spans.[].begins_utc",
    "low_sun.[].strong_spans.[].ends_utc",
    "low_sun.[].strong_spans.[].seconds",
    "low_sun.[].at_begin.elevation_deg",
    "low_sun.[].at_begin.apparent_elevation_deg",
    "low_sun.[].at_begin.relative_bearing_deg",
    "low_sun.[].at_end.elevation_deg",
    "low_sun.[].at_end.apparent_elevation_deg",
    "low_sun.[].at_end.relative_bearing_deg",
    "low_sun.[].least_bearing_deg",
    "low_sun_limits.sector_deg",
    "low_sun_limits.strong_deg",
    "low_sun_limits.up_to_deg",
    "low_sun_limits.convention",
    "runways.[].at",
    "runways.[].place",
    "runways.[].utc",
    "runways.[].sun_apparent_elevation_deg",
    "runways.[].sun_azimuth_deg",
    "runways.[].sun_is_low",
    "runways.[].runways_known",
    "runways.[].ends.[].designator",
    "runways.[].ends.[].true_bearing_deg",
    "runways.[].ends.[].relative_bearing_deg",
    "runways.[].ends.[].low_sun",
    "alternates.[].place",
    "alternates.[].lat_deg",
    "alternates.[].lon_deg",
    "alternates.[].abeam_utc",
    "alternates.[].distance_m",
    "alternates.[].used_utc",
    "alternates.[].state",
    "alternates.[].elevation_deg",
    "alternates.[].azimuth_deg",
    "alternates.[].polar",
    "circles.[].circle",
    "circles.[].utc",
    "circles.[].direction",
    "circles.[].lat_deg",
    "circles.[].lon_deg",
];

fn holds(value: &Value, path: &[&str]) -> bool {
    match path {
        [] => !value.is_null(),
        ["[]", rest @ ..] => value.as_array().is_some_and(|all| all.iter().all(|one| holds(one, rest))),
        [key, rest @ ..] => value.get(key).is_some_and(|inner| holds(inner, rest)),
    }
}

#[test]
fn schema_one_keeps_its_promise() {
    let folder = std::path::Path::new(env!("CARGO_MANIFEST_DIR")).join("demo-flights");
    let files = std::fs::read_dir(folder)
        .unwrap()
        .map(|e| e.unwrap().path())
        .filter(|p| p.extension().is_some_and(|e| e == "toml"));
    let run = Command::new(env!("CARGO_BIN_EXE_gloamline"))
        .args(["brief", "--as", "json"])
        .args(files)
        .output()
        .unwrap();
    let all: Value = serde_json::from_slice(&run.stdout).unwrap();
    let flights = all.as_array().unwrap();
    assert!(flights.len() >= 8);
    for flight in flights {
        assert_eq!(flight["schema"], 1);
        for path in PROMISED {
            let keys: Vec<&str> = path.split('.').collect();
            assert!(holds(flight, &keys), "{path} is missing in {}", flight["flight"]["name"]);
        }
        let sum: f64 =
            flight["beneath"]["seconds"].as_object().unwrap().values().map(|v| v.as_f64().unwrap()).sum();
        assert!((sum - flight["flight"]["airborne_s"].as_f64().unwrap()).abs() < 0.01);
    }
}
