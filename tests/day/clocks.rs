//! A day's beginning and length are those of its zone, whatever its clocks do.

use super::{SKY, days, stop};
use chrono::{DateTime, NaiveDate, Utc};
use chrono_tz::Tz;
use gloamline::day::{Clock, DayRange, RangeError, place_days};
use gloamline::units::Instant;

/// Seconds of a zone's date by counting its minutes.
fn counted_s(zone: Tz, date: NaiveDate) -> i64 {
    let from = date.and_hms_opt(0, 0, 0).unwrap().and_utc() - chrono::Duration::hours(26);
    let shown = |minute: i64| (from + chrono::Duration::minutes(minute)).with_timezone(&zone).date_naive();
    (0..78 * 60).filter(|&minute| shown(minute) == date).map(|_| 60).sum()
}

#[test]
fn a_date_is_as_long_as_its_zone_shows_it() {
    for (zone, date, hours) in [
        ("Europe/London", "2026-03-29", 23.0),
        ("Europe/London", "2026-10-25", 25.0),
        ("Australia/Lord_Howe", "2026-04-05", 24.5),
        ("Australia/Lord_Howe", "2026-10-04", 23.5),
        ("America/Havana", "2026-03-08", 23.0),
        // back from 01:00 to midnight: the same date's first hour comes twice
        ("America/Havana", "2026-11-01", 25.0),
        ("Atlantic/Azores", "2026-10-25", 25.0),
        ("America/Sao_Paulo", "2018-11-04", 23.0),
        ("America/Sao_Paulo", "2018-02-17", 25.0),
        ("Asia/Kolkata", "2026-05-05", 24.0),
        ("Pacific/Kiritimati", "2026-12-31", 24.0),
        ("Antarctica/Troll", "2026-03-29", 22.0),
        ("Antarctica/Troll", "2026-10-25", 26.0),
    ] {
        let here = days(stop(40.0, 0.0, Some(zone)), date, date);
        let day = &here.days[0].civil;
        assert_eq!(day.seconds, hours * 3600.0, "{zone} {date}");
        assert_eq!(counted_s(zone.parse().unwrap(), day.date), day.seconds as i64, "{zone} {date}");
        assert_eq!(here.clock.local(day.begin).date_naive(), day.date);
        assert!(here.clock.local(day.begin.after_s(-1.0)).date_naive() < day.date, "{zone} {date}");
    }
}

#[test]
fn days_tile_time_in_every_zone() {
    for zone in chrono_tz::TZ_VARIANTS {
        let clock = Clock::Zone(zone);
        for first in ["2010-12-20", "2026-03-01", "2026-09-20"] {
            let first: NaiveDate = first.parse().unwrap();
            let mut days = first.iter_days().take(60).filter_map(|date| clock.day(date));
            let mut end = days.next().unwrap().end();
            for day in days {
                assert_eq!(day.begin, end, "{zone} {}", day.date);
                assert!((79_200.0..=93_600.0).contains(&day.seconds), "{zone} {day:?}");
                for at_s in [0.0, day.seconds / 2.0, day.seconds - 1.0] {
                    assert_eq!(clock.day_about(day.begin.after_s(at_s)), day, "{zone} {day:?} at {at_s}");
                }
                end = day.end();
            }
        }
    }
}

#[test]
fn a_date_that_the_clocks_skipped_is_left_out_of_a_range_and_refused_alone() {
    let samoa = || stop(-13.8, -172.0, Some("Pacific/Apia"));
    let here = days(samoa(), "2011-12-29", "2011-12-31");
    let dates: Vec<String> = here.days.iter().map(|day| day.civil.date.to_string()).collect();
    assert_eq!(dates, ["2011-12-29", "2011-12-31"]);
    assert_eq!(here.days[0].civil.end(), here.days[1].civil.begin);
    let skipped: NaiveDate = "2011-12-30".parse().unwrap();
    assert_eq!(here.skipped, [skipped]);
    let refused = place_days(samoa(), DayRange::new(skipped, skipped).unwrap(), &SKY).unwrap_err();
    assert!(matches!(refused, RangeError::NoSuchDate { date, .. } if date == skipped));
}

#[test]
fn where_no_zone_is_known_noon_is_near_the_transit() {
    // the equation of time is less than 16.5 minutes, the rounding of the offset half a minute
    for lon in [-180.0, -120.07, -0.3, 0.0, 77.7, 179.99] {
        let here = days(stop(10.0, lon, None), "2026-01-01", "2026-12-31");
        assert!(here.days.iter().all(|day| (day.transits[0].at_s - 43_200.0).abs() < 17.0 * 60.0), "{lon}");
        assert!(here.clock.ahead_s(here.days[0].civil.begin) % 60 == 0);
    }
}

#[test]
fn two_sunrises_on_one_date_are_both_listed() {
    // when the polar day ends, the Sun sets just after a midnight and just before the next
    let here = days(stop(69.6833, 18.9189, Some("Europe/Oslo")), "2026-05-01", "2026-08-15");
    let count = |day: &gloamline::day::DayHere, direction| {
        day.times(gloamline::light::Limit::Horizon, direction).count()
    };
    let most = here.days.iter().map(|day| count(day, gloamline::light::Direction::Setting)).max();
    assert_eq!(most, Some(2));
}

#[test]
fn a_clock_shows_utc_to_the_second() {
    let at: DateTime<Utc> = "2026-12-18T05:10:00Z".parse().unwrap();
    let local = Clock::of(&stop(-12.4, 130.9, Some("Australia/Darwin"))).local(Instant::from_utc(at));
    assert_eq!(local.to_rfc3339(), "2026-12-18T14:40:00+09:30");
}
