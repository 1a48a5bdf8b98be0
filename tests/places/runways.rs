//! What must hold of any runway's two ends.
//!
//! Knows no magnetic variation, only how large it can be where runways are numbered by the compass.

use gloamline::places::{Aerodrome, RunwayEnd, aerodromes};
use gloamline::units::Angle;

/// Bearings are kept to 0.01°, and two are compared.
const TWO_ROUNDINGS_DEG: f64 = 0.02;
/// What the ellipsoid and the runway's length add to the convergence reckoned on a sphere at one end.
const ELLIPSOID_DEG: f64 = 0.02;
/// Magnetic variation at any compass-numbered runway, and the half ten degrees that its designator rounds away.
const LARGEST_VARIATION_DEG: f64 = 60.0;

fn number(end: RunwayEnd) -> u32 {
    end.designator()[..2].parse().expect("a designator begins with two digits")
}

/// The designator painted on the other end.
fn opposite(end: RunwayEnd) -> String {
    let side = match &end.designator()[2..] {
        "L" => "R",
        "R" => "L",
        same => same,
    };
    format!("{:02}{side}", (number(end) + 17) % 36 + 1)
}

fn pairs(field: Aerodrome) -> impl Iterator<Item = (RunwayEnd, RunwayEnd)> {
    field.runway_ends().filter_map(move |end| {
        let name = opposite(end);
        field.runway_ends().find(|other| other.designator() == name).map(|other| (end, other))
    })
}

#[test]
fn the_two_ends_of_a_runway_face_each_other_but_for_the_meridians_convergence() {
    for field in aerodromes() {
        assert_eq!(pairs(field).count(), field.runway_ends().len(), "{field:?}: an end without its other");
        for (end, other) in pairs(field) {
            let east = (other.place().lon.angle() - end.place().lon.angle()).turned_about_zero();
            let convergence = east.deg() * end.place().lat.angle().rad().sin();
            let turned = other.bearing() - end.bearing() - Angle::from_deg(180.0 + convergence);
            let off = turned.turned_about_zero().deg().abs();
            assert!(off < TWO_ROUNDINGS_DEG + ELLIPSOID_DEG, "{field:?} {end:?} {other:?}: {off}");
        }
    }
}

#[test]
fn a_designator_is_the_true_bearing_within_the_magnetic_variation() {
    for field in aerodromes() {
        for end in field.runway_ends() {
            let off = end.bearing() - Angle::from_deg(f64::from(number(end)) * 10.0);
            let off = off.turned_about_zero().deg().abs();
            assert!(off <= LARGEST_VARIATION_DEG + ELLIPSOID_DEG, "{field:?} {end:?}: {off}");
        }
    }
}

#[test]
fn designators_are_those_of_runways_and_come_in_order() {
    for field in aerodromes() {
        let names: Vec<_> = field.runway_ends().map(RunwayEnd::designator).collect();
        assert!(names.is_sorted_by(|a, b| a < b), "{field:?} {names:?}");
        for end in field.runway_ends() {
            assert!((1..=36).contains(&number(end)), "{field:?} {end:?}");
            assert!(matches!(&end.designator()[2..], "" | "L" | "C" | "R"), "{field:?} {end:?}");
            assert!(end.displaced().0 < 2_500.0, "{field:?} {end:?}");
        }
    }
}
