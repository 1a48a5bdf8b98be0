//! A Sun that only just reaches a limit: flights whose take-off is tuned until it does.

use super::{flight, reference_flights};
use gloamline::intake::Flight;
use gloamline::light::{Direction, Light, Limit, State, Trace, along};
use gloamline::path::{Path, fly};
use gloamline::sky::Sky;
use gloamline::units::{Angle, Instant, Latitude, Place};
use std::sync::LazyLock;

/// The Sun's extreme elevation above its limit, as a curve may err: 2e−9 of the sine and the bisection's last bits.
const CURVE: Angle = Angle::from_arcsec(0.000_5);

/// A turning point of the Sun between two others of its path.
#[derive(Debug, Clone, Copy)]
struct Extreme {
    at_s: f64,
    elevation: Angle,
    is_high: bool,
    between_s: (f64, f64),
}

fn extremes(path: &Path, sky: &Sky) -> Vec<Extreme> {
    let trace = Trace::beneath(path, sky);
    let turns = trace.peaks().windows(3).filter_map(|trio| {
        let (rises, falls) = (trio[1].sine > trio[0].sine, trio[2].sine < trio[1].sine);
        (rises == falls).then(|| Extreme {
            at_s: trio[1].at_s,
            elevation: Angle::from_rad(trio[1].sine.asin()),
            is_high: rises,
            between_s: (trio[0].at_s, trio[2].at_s),
        })
    });
    turns.collect()
}

/// The flight, taking off so many seconds later.
fn later(flight: &Flight, seconds: f64) -> Path {
    let mut moved = flight.clone();
    moved.takeoff = flight.takeoff.after_s(seconds);
    moved.landing = flight.landing.map(|landing| landing.after_s(seconds));
    for point in &mut moved.waypoints {
        point.time = point.time.map(|time| time.after_s(seconds));
    }
    fly(&moved).unwrap()
}

/// A flight, the delays between which its only high or low Sun passes a limit, and which limit.
struct Graze {
    flight: Flight,
    is_high: bool,
    limit: Limit,
    delays_s: (f64, f64),
}

impl Graze {
    fn extreme(&self, delay_s: f64, sky: &Sky) -> Extreme {
        only(&later(&self.flight, delay_s), self.is_high, sky).unwrap()
    }

    /// The path whose extreme stands so far above the limit, with that extreme.
    fn tuned(&self, above: Angle, sky: &Sky) -> (Path, Extreme) {
        let target = self.limit.elevation() + above;
        let (mut low, mut high) = self.delays_s;
        let rising = self.extreme(high, sky).elevation > self.extreme(low, sky).elevation;
        // a quarter of an hour, halved until a nanosecond is left
        for _ in 0..40 {
            let middle = f64::midpoint(low, high);
            if (self.extreme(middle, sky).elevation < target) == rising {
                low = middle;
            } else {
                high = middle;
            }
        }
        let extreme = self.extreme(low, sky);
        let off = (extreme.elevation - target).arcsec();
        assert!(off.abs() < 1e-4, "not tuned: {off}″");
        (later(&self.flight, low), extreme)
    }
}

/// The extreme of a kind, where there is only one and it stands clear of its neighbours.
fn only(path: &Path, is_high: bool, sky: &Sky) -> Option<Extreme> {
    let own: Vec<Extreme> = extremes(path, sky).into_iter().filter(|e| e.is_high == is_high).collect();
    let [extreme] = own[..] else { return None };
    let clear = extreme.between_s.1 - extreme.at_s > 900.0 && extreme.at_s - extreme.between_s.0 > 900.0;
    clear.then_some(extreme)
}

/// Every graze that the reference flights come to when they take off up to twelve hours later.
fn grazes(sky: &Sky) -> Vec<Graze> {
    let mut found = Vec::new();
    for (_, flight) in reference_flights() {
        for is_high in [true, false] {
            for step in 0..48 {
                let delays_s = [step, step + 1].map(|i| f64::from(i) * 900.0);
                let paths = delays_s.map(|delay| later(&flight, delay));
                let [Some(a), Some(b)] = [&paths[0], &paths[1]].map(|path| only(path, is_high, sky)) else {
                    continue;
                };
                let margin = Angle::from_arcmin(1.0);
                let passes = |limit: &&Limit| {
                    let level = limit.elevation();
                    let (low, high) = if a.elevation < b.elevation { (a, b) } else { (b, a) };
                    low.elevation + margin < level && high.elevation > level + margin
                };
                if let Some(&limit) = Limit::ALL.iter().find(passes) {
                    found.push(Graze {
                        flight: flight.clone(),
                        is_high,
                        limit,
                        delays_s: (delays_s[0], delays_s[1]),
                    });
                }
            }
        }
    }
    found
}

/// Found once for both tests that tune them.
static GRAZES: LazyLock<Vec<Graze>> = LazyLock::new(|| grazes(&Sky::default()));

/// Crossings of a limit between the neighbours of an extreme.
fn about(light: &Light, limit: Limit, extreme: &Extreme) -> Vec<(f64, Direction)> {
    let (from, to) = extreme.between_s;
    let own = light.crossings.iter().filter(|c| c.limit == limit && c.at_s > from && c.at_s < to);
    own.map(|c| (c.at_s, c.direction)).collect()
}

#[test]
fn an_excursion_of_a_thousandth_of_a_degree_is_found_and_a_miss_by_as_much_is_none() {
    let sky = Sky::default();
    assert!(GRAZES.len() > 20, "only {} grazes", GRAZES.len());
    for graze in GRAZES.iter() {
        for above in [Angle::from_deg(0.001), Angle::from_arcsec(0.4)] {
            // inwards: over a limit for a high Sun, under it for a low one
            let inwards = if graze.is_high { above } else { -above };
            let (path, extreme) = graze.tuned(inwards, &sky);
            let light = along(&path, &sky);
            let pair = about(&light, graze.limit, &extreme);
            let order = if graze.is_high {
                [Direction::Rising, Direction::Setting]
            } else {
                [Direction::Setting, Direction::Rising]
            };
            assert_eq!(pair.iter().map(|p| p.1).collect::<Vec<_>>(), order, "{:?} {extreme:?}", graze.limit);
            assert!(pair[0].0 < extreme.at_s && extreme.at_s < pair[1].0, "{pair:?} {extreme:?}");
            assert!(light.touches.is_empty(), "{:?}", light.touches);
            let (path, extreme) = graze.tuned(-inwards, &sky);
            let light = along(&path, &sky);
            assert!(
                about(&light, graze.limit, &extreme).is_empty() && light.touches.is_empty(),
                "{extreme:?}"
            );
        }
    }
}

#[test]
fn what_the_model_cannot_decide_is_a_touch_with_its_margin_and_no_crossing() {
    let sky = Sky::default();
    for graze in GRAZES.iter() {
        for margin in [0.1, 0.0, -0.1, 0.3, -0.3].map(Angle::from_arcsec) {
            let (path, extreme) = graze.tuned(margin, &sky);
            let light = along(&path, &sky);
            assert!(about(&light, graze.limit, &extreme).is_empty(), "{margin:?}");
            assert_eq!(light.touches.len(), 1, "{:?}", light.touches);
            let touch = light.touches[0];
            assert_eq!((touch.limit, touch.at_s), (graze.limit, extreme.at_s));
            assert!((touch.margin - margin).arcsec().abs() < CURVE.arcsec(), "{touch:?} for {margin:?}");
            let side = if graze.is_high { graze.limit.below() } else { graze.limit.above() };
            for at_s in [extreme.at_s - 60.0, extreme.at_s, extreme.at_s + 60.0] {
                assert_eq!(light.state_at(at_s), side, "{at_s} s about {touch:?}");
            }
        }
    }
}

#[test]
fn a_flight_that_begins_on_either_side_of_a_crossing_has_it_or_not() {
    let sky = Sky::default();
    let mut tried = 0;
    for (id, whole) in reference_flights() {
        let path = fly(&whole).unwrap();
        let light = along(&path, &sky);
        let (1, Some(crossing)) = (path.legs().len(), light.crossings.first()) else { continue };
        for (early_s, missed) in [(0.001, 0), (-0.001, 1)] {
            let begin_s = crossing.at_s - early_s;
            let points = [(path.at(begin_s).place, 0.0), (whole.to.place, path.airborne_s - begin_s)];
            let rest = flight("rest", path.takeoff.after_s(begin_s), &points);
            let rest = along(&fly(&rest).unwrap(), &sky);
            assert_eq!(rest.crossings.len() + missed, light.crossings.len(), "{id}");
            assert!(rest.touches.is_empty(), "{id}");
            tried += 1;
        }
    }
    assert!(tried > 40, "only {tried} tried");
}

#[test]
fn a_sun_that_rises_away_from_a_limit_touches_nothing_however_many_waypoints_there_are() {
    let sky = Sky::default();
    let pole = Place::from_deg(90.0, 0.0).unwrap();
    let spring = Instant::from_utc("2026-03-18T00:00:00Z".parse().unwrap());
    let days = along(&Path::standing(pole, spring, 48.0 * 3600.0), &sky);
    let [sunrise] = days.crossings[..] else { panic!("{:?}", days.crossings) };
    // six seconds on the Sun stands a tenth of an arc second higher, which is within what the model may err by
    let takeoff = spring.after_s(sunrise.at_s + 6.0);
    let towards_sun = sky.sun_at(takeoff).subsolar().lon;
    let end = Place { lat: Latitude::from_deg(89.9).unwrap(), lon: towards_sun };
    let held = (0..20).map(|second| (pole, f64::from(second)));
    let points: Vec<(Place, f64)> = held.chain(std::iter::once((end, 90.0))).collect();
    let light = along(&fly(&flight("away", takeoff, &points)).unwrap(), &sky);
    assert_eq!((light.at_takeoff, light.at_landing), (State::Daylight, State::Daylight));
    assert!(light.crossings.is_empty() && light.touches.is_empty(), "{:?}", light.touches);
}
