//! Crossings against an independent script that samples every second with JPL DE421.

use super::reference_flights;
use crate::tables::{Row, instant, number, rows};
use gloamline::light::{Direction, Limit, along};
use gloamline::path::fly;
use gloamline::sky::Sky;

/// The IAU series against DE421, in degrees of elevation (0.022″ measured beforehand).
const MODEL_DEG: f64 = 0.022 / 3600.0;
/// The script's own spline and the bending of light by the Earth, 1.2e−7°, from its certificate.
const SCRIPT_DEG: f64 = 1.2e-7;
/// Half a millisecond of rounding and the root's own 0.05 s.
const TIMING_S: f64 = 0.0005 + 0.05;

fn limit(name: &str) -> Limit {
    match name {
        "horizon" => Limit::Horizon,
        "civil" => Limit::Civil,
        "nautical" => Limit::Nautical,
        "astronomical" => Limit::Astronomical,
        other => panic!("no limit is called {other}"),
    }
}

fn direction(name: &str) -> Direction {
    if name == "rising" { Direction::Rising } else { Direction::Setting }
}

#[test]
fn every_crossing_of_an_independent_script_is_found_and_no_other() {
    let sky = Sky::default();
    let all = rows("skyfield-de421/crossings.csv");
    let flights = reference_flights();
    assert!(flights.len() >= 30 && all.len() >= 200);
    for (id, flight) in flights {
        let path = fly(&flight).unwrap();
        let light = along(&path, &sky);
        let wanted: Vec<&Row> = all.iter().filter(|row| row["id"] == id).collect();
        assert_eq!(light.crossings.len(), wanted.len(), "{id}: {:?}", light.crossings);
        assert!(light.touches.is_empty(), "{id}: {:?}", light.touches);
        for (found, row) in light.crossings.iter().zip(wanted) {
            assert_eq!(
                (found.limit, found.direction),
                (limit(&row["limit"]), direction(&row["direction"])),
                "{id}"
            );
            let rate_deg_s = number(row, "rate_deg_per_h").abs() / 3600.0;
            let tolerance = TIMING_S + (MODEL_DEG + SCRIPT_DEG) / rate_deg_s;
            let gap = path.takeoff.after_s(found.at_s).since_s(instant(row, "utc"));
            assert!(gap.abs() < tolerance, "{id} {row:?}: {gap} s, allowed {tolerance} s");
            let place = path.at(found.at_s).place;
            // the tolerance in time, flown at up to 350 m/s, and the table's own rounding
            let far = (tolerance * 350.0 + 0.02) / 111_000.0;
            assert!((place.lat.deg() - number(row, "lat_deg")).abs() < far, "{id} {row:?}: {place:?}");
        }
    }
}

#[test]
fn the_highest_and_lowest_sun_are_those_of_an_independent_script() {
    let sky = Sky::default();
    let all = rows("skyfield-de421/extremes.csv");
    for (id, flight) in reference_flights() {
        let light = along(&fly(&flight).unwrap(), &sky);
        for (kind, peak) in [("highest", light.highest), ("lowest", light.lowest)] {
            let row = all.iter().find(|row| row["id"] == id && row["kind"] == kind).unwrap();
            let gap = peak.sine.asin().to_degrees() - number(row, "elevation_deg");
            // near the zenith the sine is flat and its arc errs more
            let tolerance = MODEL_DEG + SCRIPT_DEG + 0.5e-6 + 2e-9_f64.to_degrees() / peak.sine.asin().cos();
            assert!(gap.abs() < tolerance, "{id} {kind}: {gap}° of {tolerance}°");
        }
    }
}
