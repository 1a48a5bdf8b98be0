//! Circles and the 180° meridian, crossed where geometry says.

use crate::light::flight;
use gloamline::intake::PolarLimits;
use gloamline::path::{CircleName, Heading, Path, circles, fly};
use gloamline::sky::Sky;
use gloamline::units::{Angle, Instant, Place};
use proptest::prelude::*;

fn flown(points: &[(f64, f64)]) -> Path {
    let takeoff = Instant::from_seconds(8.5e8);
    let timed: Vec<_> = points
        .iter()
        .zip(0_u32..)
        .map(|(&(lat, lon), i)| (Place::from_deg(lat, lon).unwrap(), f64::from(i) * 36_000.0))
        .collect();
    fly(&flight("circles", takeoff, &timed)).unwrap()
}

fn names(path: &Path) -> Vec<(CircleName, Heading)> {
    let obliquity = Angle::from_deg(23.4377);
    circles(path, obliquity, PolarLimits::default()).iter().map(|c| (c.circle.name, c.heading)).collect()
}

#[test]
fn a_flight_over_the_pole_crosses_circles_up_and_down() {
    use CircleName::{ArcticCircle, NorthPolarArea};
    use Heading::{Northbound, Southbound};
    let path = flown(&[(60.0, 20.0), (60.0, -160.0)]);
    let wanted = [
        (ArcticCircle, Northbound),
        (NorthPolarArea, Northbound),
        (NorthPolarArea, Southbound),
        (ArcticCircle, Southbound),
    ];
    assert_eq!(names(&path), wanted);
    assert!(path.northernmost().place.lat.deg() > 89.999_999);
}

#[test]
fn the_180_meridian_is_crossed_once_each_way_and_not_by_flying_along_it() {
    use Heading::{Eastbound, Westbound};
    for (points, heading) in [
        (vec![(10.0, 170.0), (12.0, -170.0)], Some(Eastbound)),
        (vec![(10.0, -170.0), (12.0, 170.0)], Some(Westbound)),
        (vec![(10.0, 170.0), (11.0, 180.0), (12.0, -170.0)], Some(Eastbound)),
        (vec![(10.0, 180.0), (50.0, 180.0)], None),
        (vec![(60.0, 0.0), (60.0, 180.0)], None),
        (vec![(10.0, -5.0), (12.0, 5.0)], None),
    ] {
        let found: Vec<_> =
            names(&flown(&points)).into_iter().filter(|c| c.0 == CircleName::Meridian180).collect();
        assert_eq!(
            found,
            heading.map(|h| (CircleName::Meridian180, h)).into_iter().collect::<Vec<_>>(),
            "{points:?}"
        );
    }
}

#[test]
fn a_waypoint_on_the_circle_itself_is_one_crossing_or_none() {
    use CircleName::NorthPolarArea;
    let through = names(&flown(&[(70.0, 0.0), (78.0, 0.0), (85.0, 0.0)]));
    assert_eq!(through, [(NorthPolarArea, Heading::Northbound)]);
    assert!(names(&flown(&[(70.0, 0.0), (78.0, 0.0), (70.0, 1.0)])).is_empty());
    let from_within = names(&flown(&[(85.0, 0.0), (78.0, 0.0), (85.0, 1.0)]));
    assert!(from_within.is_empty(), "{from_within:?}");
}

#[test]
fn the_arctic_circle_lies_where_the_obliquity_of_the_date_puts_it() {
    // computed with ERFA: 66°33′44.4″ on 2026-12-21 (Capitaine et al. 2003, A&A 412:567, for the obliquity's series)
    let date = Instant::from_utc("2026-12-21T00:00:00Z".parse().unwrap());
    let polar = 90.0 - Sky::default().true_obliquity(date).deg();
    assert!((polar - (66.0 + 33.0 / 60.0 + 44.4 / 3600.0)).abs() < 0.1 / 3600.0, "{polar}");
}

proptest! {
    #[test]
    fn every_latitude_crossing_lies_on_its_circle(a in -89.0..89.0_f64, b in -180.0..180.0_f64, c in -89.0..89.0_f64, d in -180.0..180.0_f64) {
        let path = flown(&[(a, b), (c, d)]);
        for crossing in circles(&path, Angle::from_deg(23.4377), PolarLimits::default()) {
            let at = path.at(crossing.at_s).place;
            match crossing.circle.latitude {
                Some(latitude) => prop_assert!((at.lat.deg() - latitude.deg()).abs() < 1e-9),
                None => prop_assert!((at.lon.deg().abs() - 180.0).abs() < 1e-7),
            }
            let (before, after) = (path.at((crossing.at_s - 1.0).max(0.0)).place, path.at((crossing.at_s + 1.0).min(36_000.0)).place);
            match crossing.heading {
                Heading::Northbound => prop_assert!(after.lat.deg() > before.lat.deg()),
                Heading::Southbound => prop_assert!(after.lat.deg() < before.lat.deg()),
                Heading::Eastbound => prop_assert!(before.lon.deg() > 0.0 && after.lon.deg() < 0.0),
                Heading::Westbound => prop_assert!(before.lon.deg() < 0.0 && after.lon.deg() > 0.0),
            }
        }
    }
}
