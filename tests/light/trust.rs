//! How far times can be trusted, against the rule that a handbook would use: refraction's scatter over the Sun's rate.

use super::reference_flights;
use gloamline::light::{
    Limit, Lookout, REFRACTION_SCATTER, Trace, beneath, doubts, elevation_scatter, trust,
};
use gloamline::path::{Path, fly};
use gloamline::sky::Sky;
use gloamline::units::{Angle, Instant, Place};

/// Sunrise or sunset of a day at a place with its uncertainty in minutes, UT1 being known.
fn minutes(lat: f64, date: &str) -> Vec<(f64, bool)> {
    let sky = Sky::default();
    let begin = Instant::from_utc(format!("{date}T00:00:00Z").parse().unwrap());
    let path = Path::standing(Place::from_deg(lat, 0.0).unwrap(), begin, 86_400.0);
    let trace = Trace::beneath(&path, &sky);
    let light = beneath(&trace, path.airborne_s);
    let lookout = Lookout::new(&path, &light, &sky);
    let rises = light.crossings.iter().filter(|c| c.limit == Limit::Horizon);
    let one = |crossing: &gloamline::light::Crossing| {
        let elevation = elevation_scatter(&lookout.at(crossing.at_s), REFRACTION_SCATTER, true);
        let trust = trust(&trace, crossing, Limit::Horizon.elevation(), elevation);
        (trust.uncertainty_s / 60.0, trust.doubtful)
    };
    rises.map(one).collect()
}

#[test]
fn a_standing_observers_uncertainty_is_the_scatter_over_the_rate() {
    // 0.175° over 15°/h cos(latitude) |sin(azimuth)|, a textbook's formula, as tabulated to the minute or its tenth
    for (lat, date, wanted, tolerance) in [
        (0.0, "2026-03-20", 0.7, 0.05),
        (45.0, "2026-03-20", 1.0, 0.05),
        (53.5, "2026-03-20", 1.2, 0.06),
        (53.5, "2026-12-21", 1.5, 0.08),
        (60.0, "2026-12-21", 2.2, 0.15),
        (65.0, "2026-12-21", 4.0, 0.5),
    ] {
        let found = minutes(lat, date);
        assert_eq!(found.len(), 2, "{lat}");
        for (minutes, doubtful) in found {
            assert!((minutes - wanted).abs() < tolerance && !doubtful, "{lat} on {date}: {minutes} min");
        }
    }
}

#[test]
fn a_sun_that_hardly_shows_at_noon_is_doubtful() {
    // at 67.3°N on the solstice the noon Sun stands 0.1° above the limit: less than refraction scatters
    let found = minutes(67.3, "2026-12-21");
    assert_eq!(found.len(), 2);
    assert!(found.iter().all(|(minutes, doubtful)| *doubtful && *minutes > 10.0), "{found:?}");
}

#[test]
fn a_sun_that_just_fails_to_show_is_a_doubt_and_no_crossing() {
    let sky = Sky::default();
    let begin = Instant::from_utc("2026-12-21T00:00:00Z".parse().unwrap());
    let path = Path::standing(Place::from_deg(67.45, 0.0).unwrap(), begin, 86_400.0);
    let trace = Trace::beneath(&path, &sky);
    let light = beneath(&trace, path.airborne_s);
    assert!(light.crossings.iter().all(|c| c.limit != Limit::Horizon));
    let found = doubts(&trace, (Limit::Horizon, Limit::Horizon.elevation()), REFRACTION_SCATTER);
    assert_eq!(found.len(), 1);
    assert!(found[0].top && found[0].margin.deg() < 0.0 && (found[0].at_s - 43_200.0).abs() < 600.0);
}

#[test]
fn along_a_path_the_shifted_limit_is_met_within_the_uncertainty() {
    let sky = Sky::default();
    let mut checked = 0;
    for (id, flight) in reference_flights() {
        let path = fly(&flight).unwrap();
        let trace = Trace::beneath(&path, &sky);
        let light = beneath(&trace, path.airborne_s);
        let lookout = Lookout::new(&path, &light, &sky);
        for crossing in light.crossings.iter().filter(|c| c.limit == Limit::Horizon) {
            let sigma = Angle::from_deg(0.175);
            let found = trust(&trace, crossing, Limit::Horizon.elevation(), sigma);
            if found.doubtful {
                continue;
            }
            // by stepping away from the crossing until the elevation has moved by one deviation
            let begun = Limit::Horizon.elevation().deg();
            let moved = |step: f64| {
                let times = (1..7200).map(|i| crossing.at_s + step * f64::from(i));
                let mut within = times.take_while(|t| (0.0..=path.airborne_s).contains(t));
                within.find(|&t| (lookout.at(t).elevation.0.deg() - begun).abs() >= sigma.deg())
            };
            let slowest = [moved(1.0), moved(-1.0)].into_iter().flatten().map(|t| (t - crossing.at_s).abs());
            let slowest = slowest.fold(0.0, f64::max);
            assert!(slowest <= found.uncertainty_s + 1.0, "{id}: {slowest} s, said {}", found.uncertainty_s);
            checked += 1;
        }
    }
    assert!(checked > 50);
}
