//! What holds for the light along any flight, held against plain sampling every ten seconds.

use super::flight;
use gloamline::intake::Flight;
use gloamline::light::{Crossing, Direction, Light, Limit, State, TOUCH, along};
use gloamline::path::{Line, Path, fly};
use gloamline::sky::{Sky, sine_of_elevation};
use gloamline::units::{Instant, Place};
use proptest::prelude::*;
use std::sync::LazyLock;

static SKY: LazyLock<Sky> = LazyLock::new(Sky::default);

/// The curve in place of the sine of elevation, and the last bits of the sampling itself.
const CURVE: f64 = 2e-9 + 1e-12;

fn instant(text: &str) -> Instant {
    Instant::from_utc(text.parse().unwrap())
}

/// Any take-off whose landing lies in the years served.
fn takeoff() -> impl Strategy<Value = Instant> {
    let (first, last) = (instant("1973-01-01T00:00:00Z"), instant("2099-12-30T00:00:00Z"));
    (first.seconds()..last.seconds()).prop_map(Instant::from_seconds)
}

/// Any place, the odd ones more often than by chance.
fn place() -> impl Strategy<Value = Place> {
    let odd = vec![
        (90.0, 0.0),
        (-90.0, 0.0),
        (90.0, -135.0),
        (0.0, 180.0),
        (0.0, 0.0),
        (65.0, -180.0),
        (-45.0, 179.999_999),
        (89.999_999, 10.0),
        (66.56, 25.0),
        (-78.0, -179.999_999),
    ];
    prop_oneof![
        3 => (-90.0..=90.0, -180.0..180.0),
        1 => prop::sample::select(odd),
    ]
    .prop_map(|(lat, lon)| Place::from_deg(lat, lon).unwrap())
}

/// The next point: held, or somewhere else, and the speed at which it is reached.
type Step = (bool, Place, f64);

fn step() -> impl Strategy<Value = Step> {
    (prop::bool::weighted(0.1), place(), 160.0..760.0)
}

/// Points with their seconds, as many as fit into a day and a half.
fn timed(first: Place, steps: &[Step]) -> Vec<(Place, f64)> {
    let mut points = vec![(first, 0.0)];
    for &(held, to, speed) in steps {
        let (last, at_s) = points[points.len() - 1];
        let (to, seconds) =
            if held { (last, 4.0 * speed) } else { (to, Line::between(last, to).length_m() / speed) };
        if seconds > 1.0 && at_s + seconds < 36.0 * 3600.0 {
            points.push((to, at_s + seconds));
        }
    }
    points
}

/// Two points or more, one step in ten a holding.
pub(crate) fn any_flight() -> impl Strategy<Value = Flight> {
    let steps = prop_oneof![prop::collection::vec(step(), 1), prop::collection::vec(step(), 2..8)];
    (takeoff(), place(), steps)
        .prop_map(|(takeoff, first, steps)| (takeoff, timed(first, &steps)))
        .prop_filter("goes somewhere", |(_, points)| points.windows(2).any(|pair| pair[0].0 != pair[1].0))
        .prop_map(|(takeoff, points)| flight("any", takeoff, &points))
}

fn level(limit: Limit) -> f64 {
    limit.elevation().rad().sin()
}

fn sine_at(path: &Path, at_s: f64) -> f64 {
    let window = SKY.window(path.takeoff, path.landing());
    sine_of_elevation(path.at(at_s).normal, &window.at(at_s))
}

fn samples(path: &Path, step_s: f64) -> Vec<(f64, f64)> {
    let window = SKY.window(path.takeoff, path.landing());
    let steps = (path.airborne_s / step_s) as u32;
    let times = (0..=steps).map(|i| f64::from(i) * step_s).chain([path.airborne_s]);
    times.map(|t| (t, sine_of_elevation(path.at(t).normal, &window.at(t)))).collect()
}

fn assert_tiles(path: &Path, light: &Light) {
    let segments = &light.segments;
    assert_eq!((segments[0].begin_s, segments[segments.len() - 1].end_s), (0.0, path.airborne_s));
    assert!(segments.iter().all(|segment| segment.begin_s < segment.end_s));
    for pair in segments.windows(2) {
        assert_eq!(pair[0].end_s, pair[1].begin_s);
        assert_ne!(pair[0].state, pair[1].state);
    }
    let sum: f64 = State::ALL.iter().map(|&state| light.seconds.in_state(state)).sum();
    assert!((sum - path.airborne_s).abs() < 1e-6, "{sum} of {}", path.airborne_s);
    assert_eq!((light.at_takeoff, light.at_landing), (segments[0].state, segments[segments.len() - 1].state));
}

fn assert_each_crossing_changes_the_state(path: &Path, light: &Light) {
    assert_eq!(light.crossings.len(), light.segments.len() - 1);
    for (crossing, pair) in light.crossings.iter().zip(light.segments.windows(2)) {
        assert_eq!(crossing.at_s, pair[0].end_s);
        let (above, below) = (crossing.limit.above(), crossing.limit.below());
        let change = if crossing.direction == Direction::Rising { (below, above) } else { (above, below) };
        assert_eq!((pair[0].state, pair[1].state), change, "{crossing:?}");
        let off = (sine_at(path, crossing.at_s) - level(crossing.limit)).abs();
        // a root is good to 1e−10 of half its curve, some microseconds in which the Sun moves by less than 1e−9
        assert!(off < CURVE + 1e-9, "{crossing:?} is off by {off}");
    }
}

/// A touch lies within one state, on one side of its limit.
fn assert_touches_change_nothing(light: &Light) {
    for touch in &light.touches {
        assert!(touch.margin.rad().abs() <= TOUCH.rad(), "{touch:?}");
        let state = light.state_at(touch.at_s);
        assert!(state == touch.limit.above() || state == touch.limit.below(), "{touch:?} in {state:?}");
        let own = light.segments.iter().find(|s| s.begin_s <= touch.at_s && touch.at_s < s.end_s).unwrap();
        assert!(own.begin_s < touch.at_s, "{touch:?}");
    }
}

/// Whether a sample that looks otherwise than the answer is so near to a limit that it may.
fn is_excused(light: &Light, sine: f64) -> bool {
    Limit::ALL.iter().any(|&limit| {
        let off = (sine - level(limit)).abs();
        off < CURVE || (off < TOUCH.rad() && light.touches.iter().any(|touch| touch.limit == limit))
    })
}

fn assert_sampling_agrees(path: &Path, light: &Light) {
    for (at_s, sine) in samples(path, 10.0) {
        let (sampled, told) = (State::of_sine(sine), light.state_at(at_s));
        assert!(sampled == told || is_excused(light, sine), "{at_s} s: {sampled:?}, told {told:?}");
        assert!(sine <= light.highest.sine + CURVE && sine >= light.lowest.sine - CURVE, "{at_s} s: {sine}");
    }
    for peak in [light.highest, light.lowest] {
        assert!((sine_at(path, peak.at_s) - peak.sine).abs() < CURVE, "{peak:?}");
    }
}

fn assert_sound(path: &Path) -> Light {
    let light = along(path, &SKY);
    assert_tiles(path, &light);
    assert_each_crossing_changes_the_state(path, &light);
    assert_touches_change_nothing(&light);
    assert_sampling_agrees(path, &light);
    light
}

/// How far a crossing's time may move when the sine is computed anew along other curves.
fn slack_s(path: &Path, crossing: &Crossing) -> f64 {
    let about = [crossing.at_s - 0.5, crossing.at_s + 0.5].map(|t| t.clamp(0.0, path.airborne_s));
    let rate = (sine_at(path, about[1]) - sine_at(path, about[0])).abs() / (about[1] - about[0]);
    0.05 + 2.0 * CURVE / rate
}

fn assert_same_crossings(path: &Path, one: &Light, other: &Light) {
    assert_eq!(one.crossings.len(), other.crossings.len(), "{:?}\n{:?}", one.crossings, other.crossings);
    for (a, b) in one.crossings.iter().zip(&other.crossings) {
        assert_eq!((a.limit, a.direction), (b.limit, b.direction));
        assert!((a.at_s - b.at_s).abs() < slack_s(path, a), "{a:?} {b:?}");
    }
}

/// The flight's points with their seconds.
fn points_of(path: &Path) -> Vec<(Place, f64)> {
    let first = (path.legs()[0].from, 0.0);
    std::iter::once(first).chain(path.legs().iter().map(|leg| (leg.to, leg.end_s))).collect()
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(80))]

    #[test]
    fn the_light_of_any_flight_is_what_sampling_shows(flight in any_flight()) {
        assert_sound(&fly(&flight).unwrap());
    }

    #[test]
    fn the_light_of_any_day_at_a_place_is_what_sampling_shows(place in place(), begin in takeoff(), hours in 0.5..25.0) {
        assert_sound(&Path::standing(place, begin, hours * 3600.0));
    }

    #[test]
    fn a_flight_cut_in_two_has_the_same_crossings(flight in any_flight(), share in 0.001..0.999) {
        let path = fly(&flight).unwrap();
        let cut_s = share * path.airborne_s;
        let mut points = points_of(&path);
        let next = points.partition_point(|point| point.1 <= cut_s);
        points.insert(next, (path.at(cut_s).place, cut_s));
        let cut = fly(&super::flight("cut", path.takeoff, &points)).unwrap();
        assert_same_crossings(&path, &along(&path, &SKY), &along(&cut, &SKY));
    }

    #[test]
    fn a_turn_added_to_the_longitudes_changes_nothing(
        takeoff in takeoff(),
        at in prop::collection::vec((-89.0..89.0, -180.0..0.0), 2..6),
        speed in 200.0..760.0,
    ) {
        let points = |turn: f64| {
            let places = at.iter().map(|&(lat, lon)| Place::from_deg(lat, lon + turn).unwrap());
            let places: Vec<Place> = places.collect();
            let steps: Vec<Step> = places[1..].iter().map(|&place| (false, place, speed)).collect();
            timed(places[0], &steps)
        };
        prop_assume!(points(0.0).len() == at.len() && points(360.0).len() == at.len());
        let path = |turn| fly(&flight("turned", takeoff, &points(turn))).unwrap();
        let (one, other) = (path(0.0), path(360.0));
        assert_same_crossings(&one, &along(&one, &SKY), &along(&other, &SKY));
    }
}

#[test]
fn nothing_breaks_at_the_poles_on_the_date_line_or_while_holding() {
    let at = |lat: f64, lon: f64| Place::from_deg(lat, lon).unwrap();
    let routes: [&[(Place, f64)]; 8] = [
        // over a pole along a meridian, and from one to the other
        &[(at(60.0, 25.0), 0.0), (at(60.0, -155.0), 30_000.0)],
        &[(at(90.0, 0.0), 0.0), (at(-90.0, 0.0), 80_000.0)],
        &[(at(90.0, 120.0), 0.0), (at(60.0, -20.0), 14_000.0)],
        // along the date line and along the equator, to the antipodes
        &[(at(-60.0, 180.0), 0.0), (at(60.0, -180.0), 50_000.0)],
        &[(at(0.0, 170.0), 0.0), (at(0.0, -170.0), 9_000.0)],
        &[(at(10.0, 0.0), 0.0), (at(-10.0, 180.0), 80_000.0)],
        // holding at the pole and beside the date line
        &[(at(89.0, 0.0), 0.0), (at(90.0, 0.0), 600.0), (at(90.0, 0.0), 9_000.0), (at(80.0, 90.0), 15_000.0)],
        &[(at(65.0, 179.9), 0.0), (at(65.0, 179.9), 20_000.0), (at(65.0, -179.9), 20_100.0)],
    ];
    for (points, month) in routes.iter().flat_map(|points| (1..=12).map(move |month| (points, month))) {
        let takeoff = instant(&format!("2031-{month:02}-20T11:00:00Z"));
        assert_sound(&fly(&flight("odd", takeoff, points)).unwrap());
    }
    for (lat, date) in
        [(90.0, "2026-03-18"), (90.0, "2026-09-25"), (-90.0, "2026-03-22"), (-90.0, "2026-09-20")]
    {
        // at a pole the Sun needs days from one limit to the next, and rises or sets once
        let crossings: usize = (0..4)
            .map(|day| {
                let begin = instant(&format!("{date}T00:00:00Z")).after_s(f64::from(day) * 86_400.0);
                assert_sound(&Path::standing(at(lat, 0.0), begin, 86_400.0)).crossings.len()
            })
            .sum();
        assert_eq!(crossings, 1, "{lat} {date}");
    }
}
