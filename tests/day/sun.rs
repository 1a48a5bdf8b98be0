//! Sunrise, sunset, twilights and transits of civil days against an independent script.

use super::{SKY, days, stop, stop_of};
use crate::tables::{Row, instant, number, rows};
use gloamline::day::DayHere;
use gloamline::light::{Direction, Limit};

/// The series and the script in degrees of elevation, as in `light/crossings.rs`.
const MODEL_DEG: f64 = 0.022 / 3600.0 + 1.2e-7;
/// Half a millisecond of rounding and the root's own 0.05 s.
const TIMING_S: f64 = 0.0005 + 0.05;
/// Nothing that moves steadily may be off by more.
const MOST_S: f64 = 1.0;

/// What a day's row stands for.
fn times(day: &DayHere, row: &Row) -> Vec<f64> {
    let limit = match row["event"].as_str() {
        "transit" => return day.transits.iter().map(|sun| sun.at_s).collect(),
        "horizon" => Limit::Horizon,
        "civil" => Limit::Civil,
        "nautical" => Limit::Nautical,
        "astronomical" => Limit::Astronomical,
        other => panic!("no event is called {other}"),
    };
    let direction = if row["direction"] == "rising" { Direction::Rising } else { Direction::Setting };
    day.times(limit, direction).collect()
}

#[test]
fn every_event_of_a_day_is_that_of_an_independent_script_and_there_is_no_other() {
    let all = rows("skyfield-de421/place_events.csv");
    let mut seen = 0;
    for of_day in all.chunk_by(|a, b| (&a["code"], &a["date"]) == (&b["code"], &b["date"])) {
        let row = &of_day[0];
        let here = days(stop_of(row), &row["date"], &row["date"]);
        let day = &here.days[0];
        assert_eq!(day.civil.begin, instant(row, "begin"), "{row:?}");
        assert_eq!(day.civil.seconds, number(row, "seconds"), "{row:?}");
        let found = day.light.crossings.len() + day.transits.len();
        assert_eq!(found, of_day.len(), "{row:?}");
        for row in of_day {
            let wanted = instant(row, "utc").since_s(day.civil.begin);
            let tolerance = TIMING_S + MODEL_DEG / (number(row, "rate_deg_per_h").abs() / 3600.0);
            let off = times(day, row).into_iter().map(|at_s| (at_s - wanted).abs()).fold(f64::MAX, f64::min);
            assert!(off < tolerance, "{row:?}: {off} s, allowed {tolerance} s");
            assert!(tolerance < MOST_S || row["code"] == "NZSP", "{row:?}: {tolerance} s");
        }
        seen += 1;
    }
    assert!(seen >= 55, "{seen} days");
}

#[test]
fn at_a_transit_the_hour_angle_is_zero_and_the_sun_is_not_always_highest() {
    let mut apart = 0;
    for (lat, lon) in
        [(69.7, 18.9), (-54.8, -68.3), (1.4, 104.0), (78.2, 15.5), (0.0, -179.9), (-77.9, 166.5)]
    {
        let here = days(stop(lat, lon, None), "2026-01-01", "2026-12-31");
        for day in &here.days {
            assert_eq!(day.transits.len(), 1, "{lat} {lon} {}", day.civil.date);
            let transit = &day.transits[0];
            let sun = SKY.sun_at(day.civil.begin.after_s(transit.at_s));
            let angle = (sun.gha() + here.stop.place.lon.angle()).turned_about_zero();
            // 0.001 s of the Earth's turn
            assert!(angle.deg().abs() * 240.0 < 1e-3, "{lat} {lon} {}: {angle:?}", day.civil.date);
            assert!(transit.elevation.0.deg() <= day.highest.elevation.0.deg() + 1e-7);
            apart += i32::from((transit.at_s - day.highest.at_s).abs() > 10.0);
        }
    }
    assert!(apart > 500, "{apart} days");
}
