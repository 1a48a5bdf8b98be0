//! The `GeoJSON` of flights: by the rules, on the geodesic, without a gap, and enough to fly the flight again.

use super::geo_rules::{Line, assert_cut, checked};
use crate::light::{any_flight, flight};
use gloamline::intake::{Flight, flight_file};
use gloamline::sky::Sky;
use gloamline::units::{Instant, Metres, Place};
use gloamline::{Brief, brief, reports};
use proptest::prelude::*;
use std::sync::LazyLock;

pub(super) static SKY: LazyLock<Sky> = LazyLock::new(Sky::default);

/// What is promised, and what rounding adds: 1e-6° either way in both directions, and half a millisecond at 772 m/s.
const OFF_M: f64 = 100.0 + 0.08 + 0.4;
/// The largest radius of curvature, at the poles.
const R_MAX_M: f64 = 6_399_594.0;

fn instant(text: &str) -> Instant {
    Instant::from_utc(text.parse().unwrap())
}

/// A flight at 250 m/s through places, with a wait of an hour where two are the same.
fn through(places: &[(f64, f64)]) -> Flight {
    let places: Vec<Place> = places.iter().map(|&(lat, lon)| Place::from_deg(lat, lon).unwrap()).collect();
    let mut points = vec![(places[0], 0.0)];
    for pair in places.windows(2) {
        let length_m = gloamline::path::Line::between(pair[0], pair[1]).length_m();
        let seconds = if length_m == 0.0 { 3600.0 } else { length_m / 250.0 };
        points.push((pair[1], points[points.len() - 1].1 + seconds));
    }
    flight("through", instant("2026-03-19T06:00:00Z"), &points)
}

pub(super) fn briefed(flight: Flight) -> Brief {
    brief(flight, &SKY).unwrap()
}

/// The lines of a flight in order, whatever the light.
fn lines_of(flight: Flight) -> Vec<Line> {
    let brief = briefed(flight);
    let tracks = checked(&reports::geojson(&brief).unwrap());
    assert_whole(&brief, &tracks);
    assert_near(&brief, &tracks);
    tracks.concat()
}

/// The segments follow each other from take-off to landing: each begins where and when the last one ended.
fn assert_whole(brief: &Brief, tracks: &[Vec<Line>]) {
    assert_eq!(tracks.len(), brief.light.segments.len());
    let all: Vec<&Line> = tracks.iter().flatten().collect();
    let seconds = |time: &str| instant(time).since_s(brief.path.takeoff);
    assert!(seconds(&all[0][0].1).abs() < 6e-4);
    assert!((seconds(&all[all.len() - 1].last().unwrap().1) - brief.path.airborne_s).abs() < 6e-4);
    for pair in tracks.windows(2) {
        let (before, after) = (pair[0].last().unwrap(), &pair[1][0]);
        if before.last() != after.first() {
            assert_cut(before, after);
        }
    }
}

/// The straight line between two positions, at a share of the time between, against where the aircraft is then.
fn assert_near(brief: &Brief, tracks: &[Vec<Line>]) {
    let at_s = |time: &str| instant(time).since_s(brief.path.takeoff);
    for pair in tracks.iter().flatten().flat_map(|line| line.windows(2)) {
        let ((a, from), (b, to)) = (&pair[0], &pair[1]);
        let ends = [a, b].map(|at| Place::from_deg(at[1], at[0]).unwrap().normal());
        let middle: f64 = (0..3).map(|i| f64::midpoint(ends[0][i], ends[1][i]).powi(2)).sum();
        let sinks = (1.0 - middle.sqrt()) * R_MAX_M;
        assert!(sinks < OFF_M * R_MAX_M / 6_335_439.0, "{sinks} m through space between {a:?} and {b:?}");
        for share in [0.0, 0.1, 0.3, 0.4, 0.5, 0.6, 0.7, 0.9, 1.0] {
            let between = |from: f64, to: f64| from + share * (to - from);
            let drawn = Place::from_deg(between(a[1], b[1]), between(a[0], b[0])).unwrap().normal();
            let seconds = between(at_s(from), at_s(to)).clamp(0.0, brief.path.airborne_s);
            let flown = brief.path.at(seconds).normal;
            let off = drawn.iter().zip(flown).map(|(d, f)| (d - f).powi(2)).sum::<f64>().sqrt() * R_MAX_M;
            assert!(off < OFF_M, "{off} m at {share} between {a:?} and {b:?}");
        }
    }
}

fn longitudes(line: &Line) -> Vec<f64> {
    line.iter().map(|(position, _)| position[0]).collect()
}

#[test]
fn a_flight_over_the_pole_is_parted_there_and_nowhere_else() {
    for places in [
        &[(60.0, 11.0), (61.0, -169.0)][..],
        &[(60.0, 11.0), (90.0, 77.0), (61.0, -169.0)],
        &[(60.0, 11.0), (90.0, 0.0), (90.0, 0.0), (61.0, -169.0)],
    ] {
        let lines = lines_of(through(places));
        let on_one =
            |lon: f64| lines.iter().filter(|line| longitudes(line).iter().all(|&l| l == lon)).count();
        assert_eq!(on_one(11.0) + on_one(-169.0), lines.len(), "{places:?}");
        let poles: Vec<bool> = lines.iter().map(|line| line[0].0[1] == 90.0).collect();
        assert!(poles.contains(&true), "{places:?}");
    }
    // out on another meridian than the one across
    let turned = lines_of(through(&[(-60.0, 20.0), (-90.0, 0.0), (-65.0, 100.0)]));
    assert!(
        turned.iter().all(|line| longitudes(line).iter().all(|&l| l == 20.0 || (l - 100.0).abs() < 1e-6))
    );
}

#[test]
fn a_flight_beside_the_pole_sweeps_round_it() {
    for off in [1e-9, 1e-7, 1e-4, 0.01] {
        let lines = lines_of(through(&[(70.0, -30.0), (70.0, 150.0 - off)]));
        let swept: f64 = lines.iter().flat_map(|line| line.windows(2)).map(|p| p[1].0[0] - p[0].0[0]).sum();
        assert!((swept.abs() - 180.0).abs() < 0.02, "{off}: {swept}");
    }
}

#[test]
fn a_flight_across_180_is_parted_on_it_and_its_box_wraps() {
    for places in [[(-37.0, 174.8), (21.3, -157.9)], [(21.3, -157.9), (-37.0, 174.8)]] {
        let brief = briefed(through(&places));
        let text = reports::geojson(&brief).unwrap();
        let tracks = checked(&text);
        let map: serde_json::Value = serde_json::from_str(&text).unwrap();
        assert_eq!((map["bbox"][0].as_f64(), map["bbox"][2].as_f64()), (Some(174.8), Some(-157.9)));
        let crossing = brief.circles.iter().find(|c| c.circle.latitude.is_none()).unwrap();
        let ends = tracks.iter().flatten().filter(|line| line.last().unwrap().0[0].abs() == 180.0);
        let ends: Vec<&Line> = ends.collect();
        assert_eq!(ends.len(), 1);
        let (end, time) = ends[0].last().unwrap();
        assert!((end[1] - crossing.place.lat.deg()).abs() <= 5.1e-7);
        assert!((instant(time).since_s(brief.path.takeoff) - crossing.at_s).abs() < 6e-4);
        assert!(longitudes(ends[0]).iter().all(|lon| lon * end[0] > 0.0));
    }
}

#[test]
fn a_flight_that_begins_or_ends_on_180_or_follows_it_stays_on_its_side() {
    let sided = |places: &[(f64, f64)], side: f64| {
        let lines = lines_of(through(places));
        assert!(lines.iter().flat_map(longitudes).all(|lon| lon * side > 0.0), "{places:?}");
    };
    sided(&[(10.0, 180.0), (20.0, 160.0)], 1.0);
    sided(&[(10.0, -180.0), (20.0, -160.0)], -1.0);
    sided(&[(20.0, 160.0), (10.0, -180.0)], 1.0);
    sided(&[(20.0, -160.0), (10.0, 180.0)], -1.0);
    sided(&[(20.0, 160.0), (10.0, 180.0), (-10.0, 180.0), (-20.0, 150.0)], 1.0);
    sided(&[(20.0, 160.0), (10.0, 180.0), (10.0, 180.0), (5.0, 150.0)], 1.0);
    sided(&[(20.0, -160.0), (10.0, 180.0), (10.0, 180.0), (5.0, -150.0)], -1.0);
    let along = lines_of(through(&[(-40.0, 180.0), (40.0, 180.0)]));
    assert!(along.iter().flat_map(longitudes).all(|lon| lon.abs() == 180.0));
}

#[test]
fn a_leg_that_leads_nowhere_is_a_line_at_one_place() {
    let lines = lines_of(through(&[(50.0, 8.0), (52.0, 10.0), (52.0, 10.0), (54.0, 8.0)]));
    let still: Vec<_> = lines.iter().flat_map(|line| line.windows(2)).filter(|p| p[0].0 == p[1].0).collect();
    assert!(!still.is_empty());
    assert!(still.iter().all(|pair| pair[0].0[..2] == [10.0, 52.0]), "{still:?}");
}

#[test]
fn heights_stand_on_the_line_from_take_off_to_landing() {
    let text = "from = \"BIKF\"\nto = \"PANC\"\ntakeoff = 2026-11-06T16:50:00Z\nairborne = \"6h35m\"\n\
                level_ft = 34000\nclimb_ft_min = 1800\ndescent_ft_min = 1500\n";
    let brief = briefed(flight_file(text, "heights").unwrap());
    let tracks = checked(&reports::geojson(&brief).unwrap());
    let heights = brief.path.heights.as_ref().unwrap();
    for pair in tracks.iter().flatten().flat_map(|line| line.windows(2)) {
        let at_s = |i: usize| instant(&pair[i].1).since_s(brief.path.takeoff);
        let Metres(flown) = heights.at(f64::midpoint(at_s(0), at_s(1)));
        // a decimetre of rounding and half a millisecond of climb
        assert!((f64::midpoint(pair[0].0[2], pair[1].0[2]) - flown).abs() < 0.06, "{pair:?}");
    }
}

/// The document's positions and times as the waypoints of a flight; of two within a second one.
fn flown_again(brief: &Brief, tracks: &[Vec<Line>]) -> Brief {
    let place = |at: &[f64]| Place::from_deg(at[1], at[0]).unwrap();
    let seconds = |time: &str| instant(time).since_s(brief.path.takeoff);
    let all: Vec<_> =
        tracks.iter().flatten().flatten().map(|(at, time)| (place(at), seconds(time))).collect();
    let end = all[all.len() - 1];
    let mut points = vec![all[0]];
    for &point in &all {
        if point.1 - points[points.len() - 1].1 > 1.0 && end.1 - point.1 > 1.0 {
            points.push(point);
        }
    }
    points.push(end);
    briefed(flight("again", brief.path.takeoff, &points))
}

#[test]
fn a_flight_through_the_documents_points_has_the_same_crossings() {
    let folder = std::path::Path::new(env!("CARGO_MANIFEST_DIR")).join("demo-flights");
    let mut compared = 0;
    for entry in std::fs::read_dir(folder).unwrap() {
        let text = std::fs::read_to_string(entry.unwrap().path()).unwrap();
        let brief = briefed(flight_file(&text, "demo").unwrap());
        let tracks = checked(&reports::geojson(&brief).unwrap());
        assert_whole(&brief, &tracks);
        assert_near(&brief, &tracks);
        let again = flown_again(&brief, &tracks);
        assert_eq!(brief.light.crossings.len(), again.light.crossings.len(), "{}", brief.flight.name);
        for (one, other) in brief.light.crossings.iter().zip(&again.light.crossings) {
            assert_eq!((one.limit, one.direction), (other.limit, other.direction));
            assert!((one.at_s - other.at_s).abs() < 0.5, "{}: {one:?} {other:?}", brief.flight.name);
            compared += 1;
        }
    }
    assert!(compared > 15, "only {compared} crossings");
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 64, failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn the_track_of_any_flight_keeps_the_rules_and_lies_on_its_geodesics(flight in any_flight()) {
        lines_of(flight);
    }
}
