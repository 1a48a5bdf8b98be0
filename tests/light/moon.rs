//! Moonrises and moonsets against an independent script that samples every second with JPL DE421, and what holds for the
//! Moon along any flight.

use super::properties::{SKY, any_flight};
use super::reference_flights;
use crate::tables::{Row, instant, number, rows};
use gloamline::light::{Direction, MOON_TOUCH, MoonLight, MoonLookout, State, along, moon_beneath};
use gloamline::path::{Path, fly};
use gloamline::sky::{Sky, sine_of_elevation};
use gloamline::units::{Instant, Place};
use proptest::prelude::*;

/// The series against DE421, as [`gloamline::sky::MoonPlace`] states it; and aberration, which is taken at the Earth's
/// centre here and there, so that it cancels but for the script's own check.
const MODEL_DEG: f64 = 12.0 / 3600.0;
/// Half a millisecond of rounding and the root's own 0.05 s.
const TIMING_S: f64 = 0.0005 + 0.05;

fn moon_of(path: &Path) -> MoonLight {
    moon_beneath(path, &SKY, &along(path, &SKY))
}

#[test]
fn every_moonrise_and_moonset_of_an_independent_script_is_found_and_no_other() {
    let all = rows("skyfield-de421/moon_crossings.csv");
    let (mut flights, mut events) = (0, 0);
    for (id, flight) in reference_flights() {
        let own: Vec<&Row> = all.iter().filter(|row| row["id"] == id).collect();
        if own.is_empty() {
            continue;
        }
        flights += 1;
        let path = fly(&flight).unwrap();
        let moon = moon_of(&path);
        let wanted: Vec<&Row> = own.into_iter().filter(|row| row["seq"] != "0").collect();
        assert_eq!(moon.crossings.len(), wanted.len(), "{id}: {:?}", moon.crossings);
        assert!(moon.touches.is_empty(), "{id}: {:?}", moon.touches);
        for (found, row) in moon.crossings.iter().zip(wanted) {
            let event = if found.direction == Direction::Rising { "moonrise" } else { "moonset" };
            assert_eq!(event, row["event"], "{id}");
            let tolerance = TIMING_S + MODEL_DEG / (number(row, "rate_deg_per_h").abs() / 3600.0);
            let gap = path.takeoff.after_s(found.at_s).since_s(instant(row, "utc"));
            assert!(gap.abs() < tolerance, "{id} {row:?}: {gap} s, allowed {tolerance} s");
            let limit = SKY.moon_at(instant(row, "utc")).rise_limit().0;
            // 45 km of distance are 0.11″ of semidiameter
            assert!((limit.deg() - number(row, "limit_deg")).abs() < 0.15 / 3600.0, "{row:?}: {limit:?}");
            events += 1;
        }
    }
    assert!(flights >= 55 && events >= 60, "{flights} flights, {events} events");
}

/// Sine of elevation less that of the limit, straight from the sky.
fn excess(path: &Path, at_s: f64) -> f64 {
    let moon = SKY.moon_window(path.takeoff, path.landing()).at(at_s);
    sine_of_elevation(path.at(at_s).normal, &moon) - moon.rise_limit().0.rad().sin()
}

fn assert_sound(path: &Path) {
    let light = along(path, &SKY);
    let moon = moon_beneath(path, &SKY, &light);
    let sum = moon.seconds(true) + moon.seconds(false);
    assert!((sum - path.airborne_s).abs() < 1e-6, "{sum} of {}", path.airborne_s);
    let night = |states: &[State]| states.iter().map(|&s| light.seconds.in_state(s)).sum::<f64>();
    let parts = [
        (moon.darkness, night(&[State::Darkness])),
        (moon.night_twilight, night(&[State::NauticalTwilight, State::AstronomicalTwilight])),
    ];
    for (part, whole) in parts {
        assert!((part.moonlit_s + part.moonless_s - whole).abs() < 1e-6, "{part:?} of {whole}");
    }
    assert_eq!(moon.segments.len(), moon.crossings.len() + 1);
    for (crossing, pair) in moon.crossings.iter().zip(moon.segments.windows(2)) {
        assert_eq!((pair[0].end_s, pair[1].begin_s), (crossing.at_s, crossing.at_s));
        assert_eq!((pair[0].is_up, pair[1].is_up), (!pair[1].is_up, crossing.direction == Direction::Rising));
        assert!(excess(path, crossing.at_s).abs() < 3e-9, "{crossing:?}");
    }
    for i in 0..=(path.airborne_s / 20.0) as u32 {
        let at_s = f64::from(i) * 20.0;
        let now = excess(path, at_s);
        let agrees = (now >= 0.0) == moon.is_up_at(at_s);
        let excused = now.abs() < 3e-9 || (now.abs() < MOON_TOUCH.rad() && !moon.touches.is_empty());
        assert!(agrees || excused, "{at_s} s: {now}, told {}", moon.is_up_at(at_s));
        assert!(now <= moon.highest.sine + 3e-9, "{at_s} s: {now}");
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(80))]

    #[test]
    fn the_moon_of_any_flight_is_what_sampling_shows(flight in any_flight()) {
        assert_sound(&fly(&flight).unwrap());
    }

    #[test]
    fn the_moon_of_any_day_at_a_place_is_what_sampling_shows(lat in -90.0..=90.0, begin in -8.0e8..3.1e9, hours in 0.5..36.0) {
        let place = Place::from_deg(lat, 20.0).unwrap();
        assert_sound(&Path::standing(place, Instant::from_seconds(begin), hours * 3600.0));
    }
}

#[test]
fn the_moon_is_new_and_full_when_published() {
    let sky = Sky::default();
    // eclipses prove the phase: total solar ones of 21 August 2017 (greatest at 18:26 UTC) and 8 April 2024 (18:17), total
    // lunar ones of 21 January 2019 (05:12) and 14 March 2025 (06:59); NASA eclipse catalogues (F. Espenak), from memory
    for (utc, is_full) in [
        ("2017-08-21T18:26:00Z", false),
        ("2024-04-08T18:17:00Z", false),
        ("2019-01-21T05:12:00Z", true),
        ("2025-03-14T06:59:00Z", true),
    ] {
        let begin = Instant::from_utc(utc.parse().unwrap());
        let path = Path::standing(Place::from_deg(0.0, 0.0).unwrap(), begin, 60.0);
        let phase = MoonLookout::new(&path, &sky).at(0.0).phase;
        // an eclipse needs the bodies within 1.6° of one line
        let off = if is_full { 180.0 - phase.elongation.deg() } else { phase.elongation.deg() };
        assert!(off < 1.6, "{utc}: {off}°");
        assert!((phase.illuminated - f64::from(u8::from(is_full))).abs() < 3e-4, "{utc}: {phase:?}");
    }
}
