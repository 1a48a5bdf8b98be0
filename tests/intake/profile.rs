//! Speeds, winds and profiles.

use super::said;
use gloamline::intake::{Flight, flight_file};
use gloamline::light::{Direction, Limit};
use gloamline::path::{FlightError, Path, fly};
use gloamline::sky::{Sky, elevation};
use gloamline::units::Metres;
use proptest::prelude::*;
use std::fmt::Write;

const KNOT_M_S: f64 = 1852.0 / 3600.0;
/// Sums of a few dozen legs in seconds.
const SUM_S: f64 = 1e-6;

const ENDS: &str = "from = \"BIKF\"\nto = \"PANC\"\ntakeoff = 2026-11-06T16:50:00Z\n";

fn flight(more: &str) -> Flight {
    flight_file(&format!("{ENDS}{more}"), "f.toml").unwrap_or_else(|error| panic!("{error}"))
}

fn flown(more: &str) -> Path {
    fly(&flight(more)).unwrap()
}

fn unflown(more: &str) -> FlightError {
    fly(&flight(more)).unwrap_err()
}

#[test]
fn a_ground_speed_tells_the_landing() {
    let path = flown("ground_speed_kt = 450");
    assert!((path.airborne_s - path.distance_m() / (450.0 * KNOT_M_S)).abs() < SUM_S);
    assert_eq!(path.legs().len(), 1);
    let routed = flown("ground_speed_kt = 450\nroute = \"70N030W 78N090W\"");
    assert!((routed.airborne_s - routed.distance_m() / (450.0 * KNOT_M_S)).abs() < SUM_S);
    assert!((routed.waypoints_s()[0] - routed.legs()[0].length_m() / (450.0 * KNOT_M_S)).abs() < SUM_S);
}

#[test]
fn a_speed_and_a_landing_agree_to_a_percent_or_are_in_conflict() {
    let by_speed_s = flown("ground_speed_kt = 450").airborne_s;
    let with = |share: f64| {
        let minutes = (by_speed_s * share / 60.0).round();
        (minutes * 60.0, format!("ground_speed_kt = 450\nairborne = \"{minutes:.0}m\""))
    };
    for share in [0.995, 1.005] {
        let (seconds, text) = with(share);
        let path = flown(&text);
        assert_eq!((path.airborne_s, path.legs()[0].end_s), (seconds, seconds));
    }
    for share in [0.98, 1.02] {
        let error = unflown(&with(share).1);
        assert!(matches!(error, FlightError::SpeedConflict { .. }));
        assert!(error.to_string().contains("more than 1 % apart, so leave one of them out"), "{error}");
    }
}

#[test]
fn a_wind_belongs_to_the_leg_that_ends_at_its_waypoint() {
    let path = flown(
        "true_airspeed_kt = 480\nwind_kt = 10\n[[waypoint]]\nat = \"70N030W\"\nwind_kt = -40\n[[waypoint]]\nat = \"78N090W\"\n",
    );
    let speeds: Vec<f64> =
        path.legs().iter().map(|leg| (leg.speed_m_s() / KNOT_M_S * 1e6).round() / 1e6).collect();
    assert_eq!(speeds, [440.0, 490.0, 490.0]);
}

#[test]
fn a_leg_is_cut_where_the_speed_changes() {
    let path = flown(
        "[[profile]]\nnm = 0\nlevel_ft = 171\nground_speed_kt = 300\n\
         [[profile]]\nat = \"30m\"\nlevel_ft = 34000\nground_speed_kt = 480\n\
         [[profile]]\nnm = 1000\nlevel_ft = 34000\nground_speed_kt = 420\n\
         [[profile]]\nnm = 1200.5\nlevel_ft = 38000\n",
    );
    let speeds: Vec<f64> = path.legs().iter().map(|leg| (leg.speed_m_s() / KNOT_M_S).round()).collect();
    assert_eq!(speeds, [300.0, 480.0, 420.0]);
    assert!((path.legs()[0].end_s - 1800.0).abs() < SUM_S);
    // 150 NM at 300 kt, then 850 NM at 480 kt
    let second_s = 1800.0 + 850.0 / 480.0 * 3600.0;
    assert!((path.legs()[1].end_s - second_s).abs() < 1e-3, "{}", path.legs()[1].end_s);
    let whole = flown("airborne = \"6h35m\"").distance_m();
    assert!((path.distance_m() - whole).abs() < 1e-3, "a cut line is as long as the whole");
    let there = path.at(second_s).place;
    let straight = flown("ground_speed_kt = 100").at(10.0 * 3600.0).place;
    assert!(
        (there.lat.deg() - straight.lat.deg()).abs() < 1e-8
            && (there.lon.deg() - straight.lon.deg()).abs() < 1e-8
    );
}

/// A climb in steps with an hour of descent, by time alone.
const STEPS: &str = "airborne = \"6h35m\"\n\
    [[profile]]\nat = \"25m\"\nlevel_ft = 30000\n\
    [[profile]]\nat = \"50m\"\nlevel_ft = 30000\n\
    [[profile]]\nnm = 600\nlevel_ft = 36000\n\
    [[profile]]\nat = \"3h20m\"\nlevel_ft = 36000\n\
    [[profile]]\nat = \"3h30m\"\nlevel_ft = 40000\n\
    [[profile]]\nat = \"6h\"\nlevel_ft = 40000\n";

#[test]
fn heights_go_without_a_step_from_field_to_field() {
    let flight = flight(STEPS);
    assert_eq!(flight.level, Some(Metres::from_feet(40_000.0)));
    let path = fly(&flight).unwrap();
    let height = |at_s: f64| path.at(at_s).height.unwrap().0;
    let fields = [flight.from.height().unwrap().0, flight.to.height().unwrap().0];
    assert!((height(0.0) - fields[0]).abs() < 1e-9 && (height(path.airborne_s) - fields[1]).abs() < 1e-9);
    // the steepest is 30,000 ft in 25 min, 6.1 m/s, and the descent's 40,000 ft in 35 min
    let seconds = (0..path.airborne_s as i32).map(f64::from);
    for at_s in seconds {
        assert!((height(at_s + 1.0) - height(at_s)).abs() < 6.2, "{at_s}");
    }
    for (minutes, feet) in [(25.0, 30_000.0), (40.0, 30_000.0), (205.0, 38_000.0), (300.0, 40_000.0)] {
        assert!((height(minutes * 60.0) - Metres::from_feet(feet).0).abs() < 1e-6, "{minutes}");
    }
    let there_s = 600.0 / Metres(path.distance_m()).nautical_miles() * path.airborne_s;
    assert!((height(there_s) - Metres::from_feet(36_000.0).0).abs() < 1e-3);
}

#[test]
fn deck_crossings_of_a_climb_in_steps_are_those_that_stepping_finds() {
    // a step of 0.25 s, and the 0.05 s that a crossing against a moving limit may err by
    const STEP_S: f64 = 0.25;
    const SAME_S: f64 = STEP_S + 0.05;
    let sky = Sky::default();
    for takeoff in ["2026-11-06T16:50:00Z", "2026-11-06T17:20:00Z", "2026-03-01T20:40:00Z"] {
        let text = format!("{ENDS}{STEPS}").replace("2026-11-06T16:50:00Z", takeoff);
        let brief = gloamline::brief(flight_file(&text, "f.toml").unwrap(), &sky).unwrap();
        let view = brief.deck.as_ref().unwrap();
        let (path, window) = (&brief.path, sky.window(brief.path.takeoff, brief.path.landing()));
        let above = |at_s: f64| {
            let sun = elevation(path.at(at_s).place, &window.at(at_s));
            sun.0.rad() - view.horizon.limit_at(at_s).0.rad() >= 0.0
        };
        let mut found = Vec::new();
        let mut last = above(0.0);
        for step in 1..=(path.airborne_s / STEP_S) as u32 {
            let now = above(f64::from(step) * STEP_S);
            if now != last {
                let direction = if now { Direction::Rising } else { Direction::Setting };
                found.push((f64::from(step) * STEP_S, direction));
            }
            last = now;
        }
        assert!(!found.is_empty(), "{takeoff}");
        let crossings = &view.deck.crossings;
        assert_eq!(crossings.len(), found.len(), "{takeoff}: {crossings:?} {found:?}");
        for (crossing, (at_s, direction)) in crossings.iter().zip(found) {
            assert_eq!((crossing.limit, crossing.direction), (Limit::Horizon, direction));
            assert!((crossing.at_s - at_s).abs() < SAME_S, "{takeoff}: {} {at_s}", crossing.at_s);
        }
    }
}

#[test]
fn a_profile_that_does_not_fit_the_path_is_refused_there() {
    let point = |at: &str| format!("[[profile]]\n{at}\nlevel_ft = 30000\n");
    for (more, wanted) in [
        (point("nm = 4000"), "profile point 1 lies beyond the landing"),
        (point("at = \"6h36m\""), "profile point 1 lies beyond the landing"),
        (
            point("nm = 1000") + &point("at = \"1h\""),
            "profile point 2 is not reached after the one before it",
        ),
        (point("nm = 0") + &point("at = \"0m\""), "profile point 2 is not reached after the one before it"),
    ] {
        assert_eq!(unflown(&format!("airborne = \"6h35m\"\n{more}")).to_string(), wanted);
    }
    assert_eq!(
        unflown("ground_speed_kt = 50").to_string(),
        "the speeds make 58.8 h in the air, outside 0 h to 36 h"
    );
    let late = format!("{ENDS}ground_speed_kt = 450").replace("2026-11-06T16", "2099-12-31T20");
    let late = fly(&flight_file(&late, "f.toml").unwrap()).unwrap_err();
    assert_eq!(late.to_string(), "the flight leads out of the years 1973 to 2099");
    let nowhere = format!("{ENDS}ground_speed_kt = 450").replace("PANC", "BIKF");
    let nowhere = fly(&flight_file(&nowhere, "f.toml").unwrap()).unwrap_err();
    assert!(nowhere.to_string().contains("has no length"), "{nowhere}");
}

#[test]
fn speeds_and_profiles_that_cannot_be_are_refused_with_line_and_cure() {
    const WIND: &str =
        "a wind stands without 'true_airspeed_kt'\ngive true_airspeed_kt; a ground speed has its wind in it";
    const LEAVE: &str = "are both given\nleave one of them out";
    for (more, wanted) in [
        ("ground_speed_kt = 5", "f.toml:4:19: 'ground_speed_kt' of 5 is outside 10 to 1500".to_string()),
        ("ground_speed_kt = nan", "f.toml:4:19: 'ground_speed_kt' of NaN is outside 10 to 1500".into()),
        ("true_airspeed_kt = 2000", "f.toml:4:20: 'true_airspeed_kt' of 2000 is outside 10 to 1500".into()),
        (
            "true_airspeed_kt = 480\nground_speed_kt = 450",
            format!("f.toml:4:20: 'true_airspeed_kt' and 'ground_speed_kt' {LEAVE}"),
        ),
        ("ground_speed_kt = 450\nwind_kt = 5", format!("f.toml:5:11: {WIND}")),
        ("airborne = \"6h\"\nwind_kt = 5", format!("f.toml:5:11: {WIND}")),
        ("airborne = \"6h\"\n[[waypoint]]\nat = \"70N030W\"\nwind_kt = 5", format!("f.toml:6:1: {WIND}")),
        (
            "true_airspeed_kt = 480\nwind_kt = -500",
            "f.toml:5:11: 'wind_kt' of -500 is outside -400 to 400".into(),
        ),
        (
            "true_airspeed_kt = 100\nwind_kt = -95",
            "f.toml: airspeed and wind leave a ground speed of 5 kt, below 10 kt".into(),
        ),
        (
            "ground_speed_kt = 450\n[[waypoint]]\nat = \"70N030W\"\ntime = 2026-11-06T18:00Z",
            "f.toml:6:1: waypoint 1 (70N030W) has a time, though speeds tell when it is passed\nleave the time out, or \
             the speeds"
                .into(),
        ),
        ("level_ft = 1\ncruise_ft = 2\nairborne = \"6h\"", format!("f.toml:5:13: 'level_ft' and 'cruise_ft' {LEAVE}")),
        (
            "airborne = \"6h\"\nclimb_ft_min = 1500\n[[profile]]\nnm = 5\nlevel_ft = 1",
            format!("f.toml:5:16: 'climb_ft_min' and 'profile' {LEAVE}"),
        ),
        (
            "airborne = \"6h\"\n[[profile]]\nnm = 5\nat = \"5m\"\nlevel_ft = 1",
            format!("f.toml:5:1: 'at' and 'nm' {LEAVE}"),
        ),
        ("airborne = \"6h\"\n[[profile]]\nlevel_ft = 1", "f.toml:5:1: the field 'at' is missing".into()),
        ("airborne = \"6h\"\n[[profile]]\nnm = 1", "f.toml:5:1: the field 'level_ft' is missing".into()),
        (
            "airborne = \"6h\"\n[[profile]]\nnm = 1\nlevel_ft = 61000",
            "f.toml:7:12: 'level_ft' of 61000 is outside 0 to 60000".into(),
        ),
        (
            "airborne = \"6h\"\n[[profile]]\nnm = 9\nlevel_ft = 1\n[[profile]]\nnm = 9\nlevel_ft = 1",
            "f.toml:8:1: profile point 2 does not lie after the one before it".into(),
        ),
        (
            "[[profile]]\nnm = 9\nlevel_ft = 1\nground_speed_kt = 400",
            "f.toml:4:1: the profile gives a speed from here on, but none from take-off\ngive ground_speed_kt for the \
             whole flight too, or a point with at = \"0m\""
                .into(),
        ),
        ("airborne = \"6h\"\n[[profile]]\nmn = 9", "f.toml:6:1: unknown field 'mn'\ndid you mean 'nm'?".into()),
    ] {
        // a field that stands alone comes before the tables
        assert_eq!(said(&format!("{ENDS}{more}\n")), wanted, "{more}");
    }
}

#[test]
fn a_flight_with_neither_landing_nor_speed_is_refused() {
    assert!(said(ENDS).contains("neither 'airborne' nor 'landing' says when the flight ends"));
    assert!(
        said(&format!("{ENDS}[[profile]]\nnm = 5\nlevel_ft = 1\n")).contains("says when the flight ends")
    );
}

#[test]
fn a_speed_that_changes_at_a_point_of_the_route_makes_no_leg_of_nothing() {
    let route = "route = \"70N030W 70N030W 78N090W\"\n";
    let at_nm =
        Metres(flown(&format!("ground_speed_kt = 450\n{route}")).legs()[0].length_m()).nautical_miles();
    for off_nm in [-1e-3, -1e-8, -1e-12, 0.0, 1e-12, 1e-8, 1e-3] {
        let nm = at_nm + off_nm;
        let path = flown(&format!(
            "ground_speed_kt = 450\n{route}[[profile]]\nnm = {nm}\nlevel_ft = 30000\nground_speed_kt = 480\n"
        ));
        let last = path.legs().last().unwrap().speed_m_s() / KNOT_M_S;
        assert!((last - 480.0).abs() < 1e-6, "{off_nm}: {last}");
        assert_eq!(path.legs().len(), if off_nm.abs() > 1e-4 { 4 } else { 3 }, "{off_nm}");
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(60))]
    #[test]
    fn whatever_the_profile_the_legs_join_and_the_heights_too(
        steps in prop::collection::vec((any::<bool>(), 1.0..400.0, 0.0..45_000.0, prop::option::of(300.0..600.0)), 1..8),
        routed in any::<bool>(),
    ) {
        let mut text = format!("{ENDS}ground_speed_kt = 450\n");
        text += if routed { "route = \"70N030W 90N000E 75N180W\"\n" } else { "" };
        let (mut nm, mut minutes) = (0.0, 0);
        for (timed, by, level, speed) in steps {
            // a minute for each 7.5 NM: mostly one after the other, whichever way each is marked
            let at = if timed { format!("at = \"{minutes}m\"") } else { format!("nm = {nm}") };
            (nm, minutes) = (nm + by, minutes + (by / 7.5) as u32);
            let speed: Option<f64> = speed;
            let speed = speed.map_or(String::new(), |kt| format!("ground_speed_kt = {kt}\n"));
            write!(text, "[[profile]]\n{at}\nlevel_ft = {level}\n{speed}").unwrap();
        }
        let path = flight_file(&text, "f.toml").map_err(|_| ()).and_then(|f| fly(&f).map_err(|_| ()));
        // marks of both kinds may pass each other: those flights are refused
        prop_assume!(path.is_ok());
        let path = path.unwrap();
            let legs = path.legs();
            prop_assert_eq!(legs[0].begin_s, 0.0);
            prop_assert_eq!(legs[legs.len() - 1].end_s, path.airborne_s);
            for pair in legs.windows(2) {
                prop_assert_eq!(pair[0].end_s, pair[1].begin_s);
                let (a, b) = (pair[0].at(pair[0].end_s).normal, pair[1].at(pair[1].begin_s).normal);
                // 1e-12 of the Earth's radius is 6 µm
                prop_assert!((0..3).all(|i| (a[i] - b[i]).abs() < 1e-12), "{a:?} {b:?}");
            }
            for bend in path.heights.as_ref().unwrap().bends_s().filter(|s| (1e-3..path.airborne_s - 1e-3).contains(s)) {
                let height = |at_s: f64| path.at(at_s).height.unwrap().0;
                // the steepest is 45,000 ft in the shortest step that the draw makes, which may be a second
                prop_assert!((height(bend + 1e-6) - height(bend - 1e-6)).abs() < 0.1);
            }
            let brief = gloamline::brief(flight_file(&text, "f.toml").unwrap(), &Sky::default()).unwrap();
            let tiled: f64 = brief.deck.unwrap().deck.segments.iter().map(|s| s.end_s - s.begin_s).sum();
            prop_assert!((tiled - path.airborne_s).abs() < 1e-6);
    }
}
