//! The flight deck's view against that of the surface beneath.

use super::reference_flights;
use gloamline::brief;
use gloamline::intake::ClimbRates;
use gloamline::light::{Deck, DeckHorizon, Limit, Lookout, State, Trace};
use gloamline::path::{Heights, Path, fly};
use gloamline::sky::{Horizon, Sky};
use gloamline::units::Metres;

/// ISA bends the level ray at sea level by 32.95′ where the almanacs' convention is 34′ (`tests/sky/horizon.rs`).
const CONVENTION_DEG: f64 = (34.0 - 32.95) / 60.0;
/// The convention's semidiameter of 16′ against that of the date, 15.73′ to 16.27′.
const SEMIDIAMETER_DEG: f64 = 0.28 / 60.0;

/// What is seen from one height.
fn deck(trace: &Trace, path: &Path, sky: &Sky, (horizon, height): (&Horizon, Metres)) -> Deck {
    let seen = DeckHorizon::new(path, sky, *horizon, Heights::level(height, path.airborne_s));
    let (trace, elevation) = seen.trace(trace, path, sky);
    gloamline::light::deck(&seen, (&trace, elevation), path.airborne_s)
}

#[test]
fn over_a_sea_horizon_the_deck_sees_the_sun_whenever_the_surface_beneath_does() {
    let sky = Sky::default();
    let sea = Horizon::clear_sea();
    for (id, flight) in reference_flights() {
        let path = fly(&flight).unwrap();
        let trace = Trace::beneath(&path, &sky);
        let light = gloamline::light::beneath(&trace, path.airborne_s);
        for feet in [1000.0, 10_000.0, 35_000.0, 60_000.0] {
            let seen = deck(&trace, &path, &sky, (&sea, Metres::from_feet(feet)));
            for segment in light.segments.iter().filter(|s| s.state == State::Daylight) {
                for part in [0.001, 0.5, 0.999] {
                    let at_s = segment.begin_s + part * segment.seconds();
                    assert!(seen.sun_visible_at(at_s), "{id} at {feet} ft, {at_s} s");
                }
            }
            let tiled: f64 = seen.segments.iter().map(|s| s.end_s - s.begin_s).sum();
            assert!((tiled - path.airborne_s).abs() < 1e-6);
            assert!((seen.seconds(true) + seen.seconds(false) - path.airborne_s).abs() < 1e-6);
            assert!(seen.segments.windows(2).all(|two| two[0].sun_visible != two[1].sun_visible), "{id}");
        }
    }
}

#[test]
fn the_higher_the_deck_the_longer_it_sees_the_sun() {
    let sky = Sky::default();
    let sea = Horizon::clear_sea();
    for (id, flight) in reference_flights() {
        let path = fly(&flight).unwrap();
        let trace = Trace::beneath(&path, &sky);
        let visible = |feet| deck(&trace, &path, &sky, (&sea, Metres::from_feet(feet))).seconds(true);
        let seconds: Vec<f64> = [0.0, 500.0, 5000.0, 20_000.0, 45_000.0].map(visible).to_vec();
        assert!(seconds.windows(2).all(|two| two[0] <= two[1] + 1e-6), "{id}: {seconds:?}");
    }
}

#[test]
fn at_height_zero_both_vantages_differ_by_their_stated_refraction_and_no_more() {
    let sky = Sky::default();
    let sea = Horizon::clear_sea();
    for (id, flight) in reference_flights() {
        let path = fly(&flight).unwrap();
        let trace = Trace::beneath(&path, &sky);
        let seen = deck(&trace, &path, &sky, (&sea, Metres(0.0)));
        let gap = seen.limit.0.deg() - Limit::Horizon.elevation().deg();
        assert!((gap - CONVENTION_DEG).abs() < SEMIDIAMETER_DEG + 1e-3, "{id}: {gap}");
    }
}

#[test]
fn a_raised_horizon_hides_the_sun_earlier() {
    let sky = Sky::default();
    let raised = Horizon::raised(Metres::from_feet(30_000.0)).unwrap();
    for (id, flight) in reference_flights().into_iter().take(20) {
        let path = fly(&flight).unwrap();
        let trace = Trace::beneath(&path, &sky);
        let height = Metres::from_feet(35_000.0);
        let over_sea = deck(&trace, &path, &sky, (&Horizon::clear_sea(), height));
        let over_cloud = deck(&trace, &path, &sky, (&raised, height));
        assert!(over_cloud.limit.0 > over_sea.limit.0);
        assert!(over_cloud.seconds(true) <= over_sea.seconds(true) + 1e-6, "{id}");
    }
}

#[test]
fn a_brief_without_a_level_says_nothing_of_the_deck() {
    let (_, mut flight) = reference_flights().swap_remove(0);
    assert!(brief(flight.clone(), &Sky::default()).unwrap().deck.is_none());
    flight.level = Some(Metres::from_feet(35_000.0));
    assert!(brief(flight, &Sky::default()).unwrap().deck.is_some());
}

#[test]
fn during_climb_and_descent_the_limit_is_that_of_the_height_flown() {
    let sky = Sky::default();
    let mut met_in_climb = 0;
    for (id, mut flight) in reference_flights() {
        flight.level = Some(Metres::from_feet(37_000.0));
        // slow, so that climb and descent fill the flight and crossings fall into them
        flight.climb =
            Some(ClimbRates { climb: Metres::from_feet(150.0), descent: Metres::from_feet(120.0) });
        let brief = brief(flight, &sky).unwrap();
        let view = brief.deck.as_ref().unwrap();
        let heights = brief.path.heights.as_ref().unwrap();
        for (crossing, sample) in view.deck.crossings.iter().zip(&view.at_crossings) {
            let limit = view.horizon.limit_at(crossing.at_s).0;
            // 0.05 s of the steepest Sun, and of the limit in the first metres of a climb
            let steepest =
                Horizon::clear_sea().steepness_deg_per_m(Metres(heights.at(crossing.at_s).0.max(0.01)));
            let tolerance = 0.05 * (15.0 / 3600.0 + 0.8 * steepest);
            let gap = sample.elevation.0.deg() - limit.deg();
            assert!(gap.abs() < tolerance, "{id}: {gap}° of {tolerance}° at {} s", crossing.at_s);
            met_in_climb += usize::from(heights.at(crossing.at_s).0 < heights.highest().0 - 1.0);
        }
        // stepping finds no change that the crossings do not explain
        let lookout = Lookout::new(&brief.path, &brief.light, &sky);
        let visible = |t: f64| lookout.at(t).elevation.0 >= view.horizon.limit_at(t).0;
        let steps = (brief.path.airborne_s / 10.0) as usize;
        for i in 1..=steps {
            let (a, b) = (10.0 * (i - 1) as f64, 10.0 * i as f64);
            let between = view.deck.crossings.iter().filter(|c| c.at_s > a && c.at_s <= b).count();
            assert_eq!(visible(a) != visible(b), between % 2 == 1, "{id} between {a} s and {b} s");
        }
    }
    assert!(met_in_climb > 20, "{met_in_climb}");
}
