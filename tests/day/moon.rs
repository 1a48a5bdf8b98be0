//! Moonrise and moonset against an independent script, and the Moon's phase against the sky's.

use super::{SKY, days, stop, stop_of};
use crate::tables::{instant, number, rows};
use chrono::Timelike;
use gloamline::light::Direction;

/// What the Moon's series err by (`sky/moon.rs`), as degrees of elevation.
const MOON_DEG: f64 = 12.0 / 3600.0;
/// Half a millisecond of rounding and the root's own 0.05 s.
const TIMING_S: f64 = 0.0005 + 0.05;

#[test]
fn the_moon_rises_and_sets_when_an_independent_script_says() {
    let all = rows("skyfield-de421/moon_events.csv");
    let mut seen = 0;
    for of_day in all.chunk_by(|a, b| (&a["code"], &a["date"]) == (&b["code"], &b["date"])) {
        let row = &of_day[0];
        let here = days(stop_of(row), &row["date"], &row["date"]);
        let day = &here.days[0];
        seen += 1;
        if row["utc"].is_empty() {
            assert!(day.moon.events.is_empty(), "{row:?}");
            assert_eq!(day.moon.is_up_at_begin, row["event"] == "up", "{row:?}");
            continue;
        }
        assert_eq!(day.moon.events.len(), of_day.len(), "{row:?}");
        assert_eq!(day.moon.is_up_at_begin, row["event"] == "moonset", "{row:?}");
        for (event, row) in day.moon.events.iter().zip(of_day) {
            assert_eq!(event.direction == Direction::Rising, row["event"] == "moonrise", "{row:?}");
            let tolerance = TIMING_S + MOON_DEG / (number(row, "rate_deg_per_h").abs() / 3600.0);
            let off = day.civil.begin.after_s(event.at_s).since_s(instant(row, "utc"));
            assert!(off.abs() < tolerance, "{row:?}: {off} s, allowed {tolerance} s");
        }
    }
    assert!(seen >= 30, "{seen} days");
}

#[test]
fn the_phase_is_that_of_the_clocks_noon() {
    let here = days(stop(51.5, -0.5, Some("Europe/London")), "2026-03-27", "2026-03-31");
    for day in &here.days {
        let noon = here.clock.local(day.moon.noon);
        assert_eq!((noon.date_naive(), noon.hour(), noon.minute()), (day.civil.date, 12, 0));
        assert_eq!(day.moon.phase, SKY.moon_at(day.moon.noon).phase(&SKY.sun_at(day.moon.noon)));
    }
}
