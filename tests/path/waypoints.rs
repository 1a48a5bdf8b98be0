//! When waypoints are passed.

use crate::light::flight;
use gloamline::path::fly;
use gloamline::units::{Instant, Place};

#[test]
fn each_waypoint_is_passed_when_the_path_is_there() {
    let place = |lat: f64, lon: f64| Place::from_deg(lat, lon).unwrap();
    let points = [
        (place(50.0, 8.0), 0.0),
        (place(53.0, -10.0), 0.0),
        (place(54.0, -30.0), 0.0),
        (place(52.0, -50.0), 19_000.0),
    ];
    let mut given = flight("waypoints", Instant::from_seconds(0.0), &points);
    for timed in [false, true] {
        given.waypoints[0].time = None;
        given.waypoints[1].time = timed.then(|| given.takeoff.after_s(10_800.0));
        let path = fly(&given).unwrap();
        assert_eq!(path.waypoints_s().len(), 2);
        for (waypoint, &at_s) in given.waypoints.iter().zip(path.waypoints_s()) {
            let there = path.at(at_s).place;
            assert!((there.lat.deg() - waypoint.place.lat.deg()).abs() < 1e-9, "{there:?}");
            assert!((there.lon.deg() - waypoint.place.lon.deg()).abs() < 1e-9, "{there:?}");
        }
        assert_eq!(path.waypoints_s()[1] == 10_800.0, timed);
    }
}
