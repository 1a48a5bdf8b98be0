//! Low Sun ahead along any flight, held against looking every second by azimuth, track and apparent elevation.

use super::properties::any_flight;
use gloamline::intake::{ClimbRates, Flight};
use gloamline::light::{Abeam, AheadSpan, Deck, Light, State, abeam};
use gloamline::path::Path;
use gloamline::sky::{ApparentElevation, Sky, apparent_aloft, azimuth, elevation, geometric_aloft};
use gloamline::units::{Angle, Metres, Place};
use gloamline::{Brief, brief};
use proptest::prelude::*;
use std::sync::LazyLock;

static SKY: LazyLock<Sky> = LazyLock::new(Sky::default);

/// The curve's error in the sine of what is left of the sector, √2 × 2e−9, doubled for the root and the sampling's own bits.
const CURVE_RAD: f64 = 6e-9;
/// What the track's angle and the azimuth lose in their own last bits near a pole is more than that.
const ANGLES_RAD: f64 = 1e-9;
/// The roots of the horizon's crossings and of the spans.
const ROOT_S: f64 = 0.05;

/// What plain looking finds at one instant.
struct Look {
    elevation: Angle,
    bearing: Angle,
    visible: bool,
}

fn look(brief: &Brief, at_s: f64) -> Look {
    let (path, sun) = (&brief.path, SKY.window(brief.path.takeoff, brief.path.landing()).at(at_s));
    let position = path.at(at_s);
    let visible = match &brief.deck {
        Some(view) => view.deck.sun_visible_at(at_s),
        None => brief.light.state_at(at_s) == State::Daylight,
    };
    let bearing = (azimuth(position.place, &sun) - position.track).turned_about_zero();
    Look { elevation: elevation(position.place, &sun).0, bearing, visible }
}

fn height(brief: &Brief, at_s: f64) -> Metres {
    brief.path.at(at_s).height.unwrap_or_default()
}

/// What the series by height may err by where the flight climbs.
fn series_rad(brief: &Brief) -> f64 {
    if brief.path.heights.as_ref().is_some_and(|heights| !heights.is_level()) { 1e-7 } else { 0.0 }
}

/// How far the Sun is above the elevation at which it is seen at the limit, from the height flown then.
fn above_highest(brief: &Brief, elevation: Angle, at_s: f64) -> Angle {
    let limit = brief.low_sun_limits.up_to;
    // a ray takes its time, and bends by less than two degrees
    if (elevation - limit).deg().abs() > 2.5 {
        return elevation - limit;
    }
    elevation - geometric_aloft(ApparentElevation(limit), height(brief, at_s)).0
}

fn spans_hold(spans: impl IntoIterator<Item = (f64, f64)>, at_s: f64) -> bool {
    spans.into_iter().any(|(begin, end)| begin <= at_s && at_s < end)
}

fn ends(span: &AheadSpan) -> (f64, f64) {
    (span.begin.at_s, span.end.at_s)
}

fn is_holding(path: &Path, at_s: f64) -> bool {
    path.leg_at(at_s).length_m() == 0.0
}

fn horizon_crossings(light: &Light, deck: Option<&Deck>) -> Vec<f64> {
    let all = deck.map_or(&light.crossings, |deck| &deck.crossings);
    all.iter().map(|crossing| crossing.at_s).collect()
}

/// Looks every second; what differs from the spans must lie at an edge.
fn assert_looking_agrees(brief: &Brief) {
    let limits = brief.low_sun_limits;
    let crossings = horizon_crossings(&brief.light, brief.deck.as_ref().map(|view| &view.deck));
    for second in 0..brief.path.airborne_s as u32 {
        let at_s = f64::from(second);
        let seen = look(brief, at_s);
        let slack = (CURVE_RAD + ANGLES_RAD) / seen.elevation.rad().cos();
        let above = above_highest(brief, seen.elevation, at_s).rad();
        let low = seen.visible && above <= 0.0 && !is_holding(&brief.path, at_s);
        let at_edge = |width: Angle| {
            (seen.bearing.rad().abs() - width.rad()).abs() < slack
                || above.abs() < slack + series_rad(brief)
                || crossings.iter().any(|t| (t - at_s).abs() < ROOT_S)
                || brief.path.legs().iter().any(|leg| (leg.end_s - at_s).abs() < 0.01)
        };
        let ahead = low && seen.bearing.rad().abs() <= limits.sector.rad();
        let told = spans_hold(brief.low_sun.iter().map(ends), at_s);
        assert!(
            ahead == told || at_edge(limits.sector),
            "{at_s} s: {ahead}, told {told}: {:?}",
            seen.bearing
        );
        let strong = low && seen.bearing.rad().abs() <= limits.strong.rad();
        let told = spans_hold(brief.low_sun.iter().flat_map(|span| span.strong.iter().copied()), at_s);
        assert!(strong == told || at_edge(limits.strong), "{at_s} s: strong {strong}, told {told}");
    }
}

/// Each edge is where one of the three conditions changes, to 0.1 s, or where the track does.
fn assert_edges_are_edges(brief: &Brief) {
    let path = &brief.path;
    let crossings = horizon_crossings(&brief.light, brief.deck.as_ref().map(|view| &view.deck));
    for sun in brief.low_sun.iter().flat_map(|span| [span.begin, span.end]) {
        let slack = (CURVE_RAD + ANGLES_RAD) / sun.elevation.0.rad().cos();
        let at_join = std::iter::once(0.0).chain(path.legs().iter().map(|leg| leg.end_s));
        let is_edge = (sun.relative_bearing.rad().abs() - brief.low_sun_limits.sector.rad()).abs() < slack
            || above_highest(brief, sun.elevation.0, sun.at_s).rad().abs() < slack + series_rad(brief)
            || crossings.iter().any(|t| (t - sun.at_s).abs() < ROOT_S)
            || at_join.into_iter().any(|t| (t - sun.at_s).abs() < 0.01);
        assert!(is_edge, "{sun:?} is no edge");
        assert!(
            (apparent_aloft(sun.elevation, height(brief, sun.at_s)).0 - sun.apparent.0).deg().abs() < 1e-9
        );
    }
    for pair in brief.low_sun.windows(2) {
        assert!(pair[0].end.at_s < pair[1].begin.at_s);
    }
}

/// The smallest bearing is that of the seconds looked at, but for what lies between them.
fn assert_least_is_least(brief: &Brief) {
    for span in &brief.low_sun {
        let (begin, end) = ends(span);
        let bearing = |at_s: f64| look(brief, at_s.clamp(begin, end - 1e-3)).bearing.deg().abs();
        let times = (0..=(end - begin) as u32).map(|s| begin + f64::from(s));
        let sampled = times.map(bearing).fold(bearing(end), f64::min);
        let least = span.least_bearing.deg();
        assert!(least <= sampled + 0.006, "{least} is not the least: {sampled}");
        // a second's turn: at the fastest a degree, but where the Sun stands near the track's vertical, which is not low
        assert!(sampled <= least + 0.6, "{least} is too small: {sampled}");
    }
}

/// A level and whether it is climbed to.
type Level = Option<(f64, bool)>;

fn with_options(flight: Flight, level: Level, (sector, strong, up_to): (f64, f64, f64)) -> Brief {
    let limits = gloamline::intake::LowSunLimits {
        sector: Angle::from_deg(sector),
        strong: Angle::from_deg(strong.min(sector)),
        up_to: Angle::from_deg(up_to),
    };
    // so slow that most of the flight is climb and descent
    let rates = ClimbRates { climb: Metres::from_feet(150.0), descent: Metres::from_feet(180.0) };
    let climb = level.filter(|level| level.1).map(|_| rates);
    let level = level.map(|level| Metres::from_feet(level.0));
    let flight = Flight { level, climb, low_sun: Some(limits), ..flight };
    brief(flight, &SKY).unwrap()
}

fn distance_m(path: &Path, place: Place, at_s: f64) -> f64 {
    gloamline::path::Line::between(path.at(at_s).place, place).length_m()
}

/// No point of the path is nearer by more than the ellipsoid's share of the distance.
fn assert_nearest(path: &Path, place: Place, found: &Abeam) {
    assert!((distance_m(path, place, found.at_s) - found.distance.0).abs() < 1.0);
    let cosine = |at_s: f64| {
        let (n, m) = (path.at(at_s).normal, place.normal());
        n[0] * m[0] + n[1] * m[1] + n[2] * m[2]
    };
    let best = cosine(found.at_s);
    let steps = (path.airborne_s / 5.0) as u32;
    for at_s in (0..=steps).map(|i| f64::from(i) * 5.0).chain([path.airborne_s]) {
        assert!(cosine(at_s) <= best + 2.1e-9, "{at_s} s is nearer than {found:?}");
    }
    // at least the ratio of the two radii of curvature, squared, at most their inverse
    let sampled =
        (0..=steps / 12).map(|i| distance_m(path, place, f64::from(i) * 60.0)).fold(f64::MAX, f64::min);
    assert!(found.distance.0 <= sampled * 1.007 + 500.0, "{found:?}: {sampled} m");
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(12))]

    #[test]
    fn a_low_sun_ahead_is_where_looking_every_second_finds_it(
        flight in any_flight(),
        level in prop::option::of((500.0..45_000.0, prop::bool::ANY)),
        sector in 3.0..90.0,
        strong in 1.0..20.0,
        up_to in 1.0..50.0,
    ) {
        let brief = with_options(flight, level, (sector, strong, up_to));
        assert_looking_agrees(&brief);
        assert_edges_are_edges(&brief);
        assert_least_is_least(&brief);
    }

    #[test]
    fn abeam_is_where_the_path_is_nearest(flight in any_flight(), lat in -90.0..90.0, lon in -180.0..180.0) {
        let path = gloamline::path::fly(&flight).unwrap();
        let place = Place::from_deg(lat, lon).unwrap();
        assert_nearest(&path, place, &abeam(&path, place));
    }
}

#[test]
fn the_reference_flights_have_low_suns_ahead_where_looking_finds_them() {
    let mut found = 0;
    for (_, flight) in super::reference_flights().into_iter().step_by(6) {
        let brief = with_options(flight, Some((36_000.0, true)), (25.0, 10.0, 15.0));
        assert_looking_agrees(&brief);
        assert_edges_are_edges(&brief);
        assert_least_is_least(&brief);
        found += brief.low_sun.len();
    }
    assert!(found > 2, "only {found} spans: the test saw nothing");
}

#[test]
fn a_place_that_is_passed_overhead_is_abeam_then() {
    let at = |lat, lon| Place::from_deg(lat, lon).unwrap();
    let takeoff = gloamline::units::Instant::from_seconds(8e8);
    let points = [
        (at(50.0, 10.0), 0.0),
        (at(60.0, 30.0), 7200.0),
        (at(60.0, 30.0), 9000.0),
        (at(50.0, 40.0), 16_000.0),
    ];
    let path = gloamline::path::fly(&super::flight("x", takeoff, &points)).unwrap();
    let over = abeam(&path, path.at(4321.0).place);
    assert!((over.at_s - 4321.0).abs() < 0.1 && over.distance.0 < 30.0, "{over:?}");
    // at an end, and at a corner that is held over
    assert_eq!(abeam(&path, at(30.0, 0.0)).at_s, 0.0);
    assert!((abeam(&path, at(80.0, 30.0)).at_s - 7200.0).abs() < 1e-6);
}
