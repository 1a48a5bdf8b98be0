//! The brightness along flights: its sum against fine steps, and what holds for levels.

use super::properties::{SKY, any_flight, points_of};
use super::{flight, reference_flights};
use gloamline::light::{Exposure, LightMeter, Trace, USUAL_LEVELS, along, exposure, moon_beneath};
use gloamline::path::{Path, fly};
use gloamline::sky::Lux;
use proptest::prelude::*;

/// What the sum is promised to.
const SUM: f64 = 1e-3;

fn exposed(path: &Path, levels: &[Lux]) -> Exposure {
    let moon = moon_beneath(path, &SKY, &along(path, &SKY));
    exposure(path, &SKY, (&Trace::beneath(path, &SKY), &moon), levels)
}

/// Lux-hours by the midpoint rule on steps of two seconds, waypoints kept.
fn finely_summed(path: &Path) -> f64 {
    let meter = LightMeter::new(path, &SKY);
    let leg_sum = |leg: &gloamline::path::Leg| {
        let steps = ((leg.end_s - leg.begin_s) / 2.0).ceil();
        let width = (leg.end_s - leg.begin_s) / steps;
        (0..steps as u32).map(|i| meter.at(leg.begin_s + (f64::from(i) + 0.5) * width).0 * width).sum::<f64>()
    };
    path.legs().iter().map(leg_sum).sum::<f64>() / 3600.0
}

#[test]
fn the_sum_is_that_of_fine_steps() {
    let mut worst = 0.0_f64;
    for (id, flight) in reference_flights() {
        let path = fly(&flight).unwrap();
        let (found, wanted) = (exposed(&path, &[]).lux_hours, finely_summed(&path));
        let off = (found / wanted - 1.0).abs();
        worst = worst.max(off);
        assert!(off < SUM, "{id}: {found} of {wanted}");
    }
    // far below the promise: if this grows, the quadrature has lost its order
    assert!(worst < SUM / 20.0, "{worst:e}");
}

fn assert_levels_hold(path: &Path, levels: &[Lux]) {
    let found = exposed(path, levels);
    let meter = LightMeter::new(path, &SKY);
    for pair in found.above.windows(2) {
        assert!(pair[0].level < pair[1].level && pair[0].seconds >= pair[1].seconds, "{pair:?}");
    }
    for above in &found.above {
        assert!(above.seconds >= 0.0 && above.seconds <= path.airborne_s + 1e-6);
        assert_eq!(above.seconds > 0.0, found.brightest.lux > above.level, "{above:?} {:?}", found.brightest);
        for &(at_s, _) in &above.crossings {
            // a millisecond at the fastest, and no more than the kinks of a waypoint
            let off = (meter.at(at_s).0 / above.level.0).ln().abs();
            assert!(off < 5e-5, "{at_s} s: off {above:?} by {off:e}");
        }
        let sampled = (0..(path.airborne_s / 5.0) as u32)
            .filter(|&i| meter.at((f64::from(i) + 0.5) * 5.0) > above.level)
            .count() as f64
            * 5.0;
        let allowed = 5.0 * (above.crossings.len() as f64 + 2.0);
        assert!((sampled - above.seconds).abs() <= allowed, "{sampled} s of {above:?}");
    }
    let floor = meter.at(0.0);
    assert!(found.darkest.lux <= floor && found.brightest.lux >= floor);
    assert!(found.lux_hours <= found.brightest.lux.0 * path.airborne_s / 3600.0 * (1.0 + 1e-9));
    assert!(found.lux_hours >= found.darkest.lux.0 * path.airborne_s / 3600.0 * (1.0 - 1e-9));
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(60))]

    #[test]
    fn a_higher_level_is_exceeded_for_no_longer(flight in any_flight(), low in 0.1..5.0_f64) {
        let path = fly(&flight).unwrap();
        assert_levels_hold(&path, &USUAL_LEVELS);
        let own: Vec<Lux> = (0..6).map(|i| Lux(low * 4.0_f64.powi(i))).collect();
        assert_levels_hold(&path, &own);
    }

    #[test]
    fn the_light_of_a_flight_cut_in_two_adds_up(flight in any_flight(), share in 0.01..0.99) {
        let path = fly(&flight).unwrap();
        let cut_s = share * path.airborne_s;
        let mut points = points_of(&path);
        let next = points.partition_point(|point| point.1 <= cut_s);
        points.insert(next, (path.at(cut_s).place, cut_s));
        let (first, rest) = points.split_at(next + 1);
        let rest: Vec<_> = points[next..].iter().take(rest.len() + 1).map(|&(place, s)| (place, s - cut_s)).collect();
        let fly_part = |takeoff, points: &[_]| {
            fly(&self::flight("part", takeoff, points)).ok().map(|path| exposed(&path, &USUAL_LEVELS))
        };
        let halves = (fly_part(path.takeoff, first), fly_part(path.takeoff.after_s(cut_s), &rest));
        // a part that is all holding goes nowhere and is refused
        if let (Some(a), Some(b)) = halves {
            let whole = exposed(&path, &USUAL_LEVELS);
            prop_assert!(((a.lux_hours + b.lux_hours) / whole.lux_hours - 1.0).abs() < SUM);
            for (i, above) in whole.above.iter().enumerate() {
                let parts = a.above[i].seconds + b.above[i].seconds;
                prop_assert!((parts - above.seconds).abs() < 2.0, "{} of {:?}", parts, above);
            }
        }
    }
}
