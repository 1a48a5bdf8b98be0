//! Geodesics against published cases and against GeographicLib's own line.

use crate::tables::{Row, number, rows};
use geographiclib_rs::{Geodesic, GeodesicLine, geodesic_capability as mask};
use gloamline::path::Line;
use gloamline::units::{Place, wgs84};
use proptest::prelude::*;

/// What the library's line and ours may differ by: latitudes and longitudes in degrees hold 1.6e−9 m, the line's own
/// arithmetic a few times that, and the vectors here as much again.
const LIBRARY_M: f64 = 5e-8;

/// The distance between the feet of two normals, near enough for small gaps.
fn gap_m(a: [f64; 3], b: [f64; 3]) -> f64 {
    (0..3).map(|i| (a[i] - b[i]).powi(2)).sum::<f64>().sqrt() * wgs84::A_M
}

fn place(lat: f64, lon: f64) -> Place {
    Place::from_deg(lat, lon.rem_euclid(360.0)).unwrap()
}

#[test]
fn published_geodesics_have_their_published_lengths_and_azimuths() {
    let all = rows("geodesic-test-set/sample.csv");
    assert!(all.len() >= 30);
    for row in &all {
        let (from, to) = ends(row);
        let line = Line::between(from, to);
        let half_unit = number(row, "s12_half_unit_m");
        assert!(
            (line.length_m() - number(row, "s12_m")).abs() < half_unit + 1e-6,
            "{row:?}: {}",
            line.length_m()
        );
        let Ok(azimuth) = row["azi1_deg"].parse::<f64>() else { continue };
        // as far as the length's own rounding turns the line
        let swing = (2.0 * half_unit / line.length_m().max(1.0)).to_degrees() + 1e-9;
        if row["origin"] == "testcases" {
            let off = (line.at(0.0).track.deg() - azimuth + 540.0).rem_euclid(360.0) - 180.0;
            assert!(off.abs() < swing, "{row:?}: {off}°");
        }
    }
}

fn ends(row: &Row) -> (Place, Place) {
    (
        place(number(row, "lat1_deg"), number(row, "lon1_deg")),
        place(number(row, "lat2_deg"), number(row, "lon2_deg")),
    )
}

/// A latitude with the special ones as likely as any.
fn latitude() -> impl Strategy<Value = f64> {
    prop_oneof![4 => -90.0..=90.0_f64, 1 => Just(90.0), 1 => Just(-90.0), 1 => Just(0.0)]
}

fn longitude() -> impl Strategy<Value = f64> {
    prop_oneof![4 => -180.0..180.0_f64, 1 => Just(0.0), 1 => Just(-180.0), 1 => Just(90.0)]
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(4000))]

    #[test]
    fn a_line_is_geographiclibs_line(a in latitude(), b in longitude(), c in latitude(), d in longitude(), part in 0.0..=1.0_f64) {
        let (from, to) = (place(a, b), place(c, d));
        let line = Line::between(from, to);
        // the same bits: near the antipode an azimuth turns three hundred times as far as a longitude is off
        let [a, b, c, d] = [from.lat.deg(), from.lon.deg(), to.lat.deg(), to.lon.deg()];
        let geodesic = Geodesic::wgs84();
        // the library's own line from its own sines: an azimuth in degrees is too coarse where the line is near-antipodal
        let (_, length, sin, cos, ..) = geodesic._gen_inverse(a, b, c, d, mask::DISTANCE | mask::AZIMUTH);
        let caps = mask::LATITUDE | mask::LONGITUDE | mask::AZIMUTH | mask::DISTANCE_IN;
        let whole = GeodesicLine::new(&geodesic, a, b, f64::NAN, Some(caps), Some(sin), Some(cos));
        let (_, lat, lon, track, ..) = whole._gen_position(false, length * part, mask::LATITUDE | mask::LONGITUDE | mask::AZIMUTH);
        let point = line.at(length * part);
        prop_assert!(gap_m(point.normal, place(lat, lon).normal()) < LIBRARY_M, "{} m", gap_m(point.normal, place(lat, lon).normal()));
        let off = (point.track.deg() - track + 540.0).rem_euclid(360.0) - 180.0;
        // a track means little within a metre of a pole
        if lat.abs() < 89.99 && length > 1.0 {
            prop_assert!(off.abs() < 1e-6, "{off}°");
        }
    }

    #[test]
    fn a_turned_earth_changes_nothing(a in latitude(), b in -170.0..0.0_f64, c in latitude(), d in -170.0..0.0_f64) {
        let (one, two) = (Line::between(place(a, b), place(c, d)), Line::between(place(a, b + 360.0), place(c, d + 360.0)));
        prop_assert!((one.length_m() - two.length_m()).abs() < 1e-6);
        prop_assert!(gap_m(one.normal(one.length_m() / 3.0), two.normal(two.length_m() / 3.0)) < 1e-6);
    }

    #[test]
    fn the_normal_turns_no_faster_than_the_search_assumes(a in latitude(), b in longitude(), c in latitude(), d in longitude(), part in 0.1..0.9_f64) {
        let line = Line::between(place(a, b), place(c, d));
        prop_assume!(line.length_m() > 1e6);
        // derivatives by distance in units of the smallest radius, by central differences
        let h = 6.0e4;
        let at = |k: f64| line.normal(part * line.length_m() + k * h);
        let x = h / wgs84::R_MIN_M;
        let first = combine(&[(-0.5, at(-1.0)), (0.5, at(1.0))]) / x;
        let second = combine(&[(1.0, at(-1.0)), (-2.0, at(0.0)), (1.0, at(1.0))]) / (x * x);
        let third = combine(&[(-0.5, at(-2.0)), (1.0, at(-1.0)), (-1.0, at(1.0)), (0.5, at(2.0))]) / (x * x * x);
        prop_assert!(first <= 1.0 && second <= 1.001 && third <= 1.07, "{first} {second} {third}");
    }
}

fn combine(terms: &[(f64, [f64; 3])]) -> f64 {
    let sum: [f64; 3] = std::array::from_fn(|i| terms.iter().map(|(w, v)| w * v[i]).sum());
    sum.iter().map(|c| c * c).sum::<f64>().sqrt()
}
