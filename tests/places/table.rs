//! What must hold of every aerodrome of the table.
//!
//! Does not know any one of them.

use chrono::{DateTime, Offset, TimeZone, Utc};
use gloamline::places::{Aerodrome, aerodrome, aerodromes};

/// The highest field, in Daocheng, lies at 14,472 ft; the lowest, by the Dead Sea, at −1,266 ft.
const ELEVATIONS_FT: std::ops::RangeInclusive<f64> = -1_300.0..=15_000.0;
/// Marks that turn the direction of writing or join letters unseen.
const INVISIBLE: [char; 9] = [
    '\u{ad}', '\u{200b}', '\u{200e}', '\u{200f}', '\u{202a}', '\u{202b}', '\u{202d}', '\u{202e}', '\u{2066}',
];
/// The zone of all China reaches 2 h 55 min beyond its own meridian; summer time adds an hour elsewhere.
const FARTHEST_FROM_SUN_TIME_H: f64 = 3.5;

#[test]
fn every_code_finds_its_own_aerodrome() {
    for field in aerodromes() {
        assert!(!field.code().is_empty());
        for code in [field.icao(), field.iata()].into_iter().flatten() {
            assert_eq!(aerodrome(code).unwrap(), field, "{code}");
            assert_eq!(aerodrome(&code.to_lowercase()).unwrap(), field, "{code}");
        }
    }
}

#[test]
fn codes_are_four_or_three_capital_letters() {
    let capitals = |code: &str, length| code.len() == length && code.bytes().all(|b| b.is_ascii_uppercase());
    for field in aerodromes() {
        assert!(field.icao().is_none_or(|code| capitals(code, 4)), "{field:?}");
        assert!(field.iata().is_none_or(|code| capitals(code, 3)), "{field:?}");
        assert!(capitals(field.country(), 2), "{field:?}");
    }
}

#[test]
fn every_place_and_height_is_one_on_earth() {
    for field in aerodromes() {
        let (lat, lon) = (field.place().lat.deg(), field.place().lon.deg());
        assert!((-90.0..=90.0).contains(&lat) && (-180.0..180.0).contains(&lon), "{field:?} {lat} {lon}");
        assert!((lat, lon) != (0.0, 0.0), "{field:?} lies where unknown places are put");
        assert!(ELEVATIONS_FT.contains(&field.height().feet()), "{field:?} {:?}", field.height());
    }
}

#[test]
fn no_name_can_act_on_a_terminal() {
    for field in aerodromes() {
        for text in [field.name(), field.city()] {
            assert!(!text.contains(|c: char| c.is_control() || INVISIBLE.contains(&c)), "{text:?}");
            assert_eq!(text, text.trim());
        }
    }
}

fn hours_from_sun_time(field: Aerodrome, utc: DateTime<Utc>) -> f64 {
    let zone = field.zone().offset_from_utc_datetime(&utc.naive_utc()).fix();
    let hours = f64::from(zone.local_minus_utc()) / 3600.0 - field.place().lon.deg() / 15.0;
    (hours + 12.0).rem_euclid(24.0) - 12.0
}

#[test]
fn every_zone_is_an_iana_name_and_keeps_near_the_sun() {
    for text in ["2026-01-15T00:00:00Z", "2026-07-15T00:00:00Z"] {
        let utc: DateTime<Utc> = text.parse().unwrap();
        for field in aerodromes() {
            assert_eq!(field.zone().name().parse(), Ok(field.zone()), "{field:?}");
            let off = hours_from_sun_time(field, utc);
            // a pole has no meridian, and so no time of its own
            let at_a_pole = field.place().lat.deg().abs() > 89.9;
            assert!(
                at_a_pole || off.abs() <= FARTHEST_FROM_SUN_TIME_H,
                "{field:?} {} {off:.2} h",
                field.zone()
            );
        }
    }
}
