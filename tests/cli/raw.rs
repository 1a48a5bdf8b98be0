//! Any text at all before the doors of intake: a flight or an error with words, never a panic.

use super::FLIGHT;
use gloamline::intake::{Inline, flight_file, inline_flight, instant_argument, place_argument};
use proptest::prelude::*;

/// Something that stands in a flight file, or nearly so.
fn scrap() -> impl Strategy<Value = String> {
    prop_oneof![
        3 => prop::sample::select(vec![
            "name", "from", "to", "takeoff", "landing", "airborne", "level_ft", "dut1_s", "[[waypoint]]", "[waypoint]",
            "at", "time", "polar_areas", "north_deg", "=", "\n", "\n", " ", ".", ",", "{", "}", "[", "]", "\"", "'''",
            "\"CYYZ\"", "\"14h55m\"", "2026-12-18T05:10:00Z", "2026-12-18", "nan", "-inf", "0x7f", "1e999", "-1", "#",
            "\\u001b", "lat", "lon", "true", "\"78N020W\"", "\"7830N02000W\"", "\u{feff}", "é",
        ]).prop_map(str::to_string),
        1 => any::<char>().prop_map(String::from),
        1 => (-400.0..400.0).prop_map(|x: f64| x.to_string()),
    ]
}

/// Characters that times, places and durations are made of, and others.
fn token() -> impl Strategy<Value = String> {
    prop_oneof![
        "[0-9NSEWnsew.,+-]{0,14}",
        "[0-9]{4}-[0-9]{2}-[0-9]{2}.[0-9]{2}:[0-9]{2}(:[0-9]{2}(\\.[0-9]{0,12})?)?(Z|z|[+-][0-9]{2}:[0-9]{2})?",
        "(PT|pt)?[0-9]{0,9}[hHmMsS]?[0-9]{0,9}[mMsS]?[0-9]{0,9}[sS]?",
        "[A-Za-z]{0,5}",
        any::<String>(),
    ]
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    #[test]
    fn any_text_is_a_flight_file_or_an_error(text in any::<String>()) {
        if let Err(error) = flight_file(&text, "any") {
            prop_assert!(error.to_string().starts_with("any"));
            let _ = error.hint();
        }
    }

    #[test]
    fn scraps_of_a_flight_file_are_one_or_an_error(scraps in prop::collection::vec(scrap(), 0..40)) {
        for text in [scraps.concat(), format!("{FLIGHT}{}", scraps.concat())] {
            match flight_file(&text, "any") {
                Ok(flight) => prop_assert!(flight.landing.is_some_and(|landing| landing > flight.takeoff)),
                Err(error) => prop_assert!(!error.to_string().contains(char::is_control), "{error}"),
            }
        }
    }

    #[test]
    fn a_flight_file_with_a_hole_in_it_is_one_or_an_error(from in 0..FLIGHT.len(), length in 0_usize..30, more in any::<String>()) {
        let to = (from + length).min(FLIGHT.len());
        let _ = flight_file(&format!("{}{more}{}", &FLIGHT[..from], &FLIGHT[to..]), "any");
    }

    #[test]
    fn any_argument_is_read_or_refused(a in token(), b in token(), c in token(), d in token(), level in any::<f64>()) {
        for text in [&a, &b, &c, &d] {
            if let Ok(stop) = place_argument("PLACE", text) {
                prop_assert!(stop.place.lat.deg().abs() <= 90.0 && stop.place.lon.deg().abs() <= 180.0);
            }
            if let Ok(instant) = instant_argument("TIME", text) {
                prop_assert!(instant.is_answered_for());
            }
        }
        let inline = Inline {
            name: Some(&a), from: &b, to: &c, takeoff: &d, airborne: Some(&a), landing: Some(&b), level_ft: Some(level),
            horizon_ft: Some(level),
            climb_ft_min: Some(level),
            descent_ft_min: Some(level),
            route: Some(&a),
            ..Inline::default()
        };
        if let Err(error) = inline_flight(&inline) {
            prop_assert!(!error.to_string().contains(char::is_control), "{error}");
        }
    }

    #[test]
    fn a_duration_is_read_or_refused(airborne in token(), level in -1e5..1e5) {
        let inline = Inline {
            from: "CYYZ", to: "VHHH", takeoff: "2026-12-18T05:10Z", airborne: Some(&airborne), level_ft: Some(level),
            ..Inline::default()
        };
        if let Ok(flight) = inline_flight(&inline) {
            let hours = flight.landing.unwrap().since_s(flight.takeoff) / 3600.0;
            prop_assert!(hours > 0.0 && hours <= 36.0 && (0.0..=60_000.0).contains(&level));
        }
    }
}
