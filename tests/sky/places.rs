//! The Sun's place against JPL DE421 by way of skyfield.

use crate::tables::{instant, number, rows};
use gloamline::sky::{Sky, azimuth, elevation};
use gloamline::units::{Angle, Place};

/// The IAU series, the tables and the reference's own scatter against DE421: what the README states.
const TOLERANCE_ARCSEC: f64 = 0.022;
/// The reference bends light by the Earth's mass, within 1.2e−7° (its certificate).
const BENDING_ARCSEC: f64 = 1.2e-7 * 3600.0;

fn gap_arcsec(found: Angle, wanted_deg: f64) -> f64 {
    (found - Angle::from_deg(wanted_deg)).turned_about_zero().arcsec()
}

#[test]
fn the_sun_stands_where_de421_puts_it() {
    let sky = Sky::default();
    let all = rows("skyfield-de421/sun_places.csv");
    assert!(all.len() >= 400);
    for row in &all {
        let at = instant(row, "utc");
        let almanac = sky.almanac(at);
        let checks = [
            (almanac.sun.declination(), "declination_deg"),
            (almanac.sun.gha(), "gha_deg"),
            (almanac.right_ascension, "right_ascension_deg"),
        ];
        for (found, column) in checks {
            let gap = gap_arcsec(found, number(row, column));
            assert!(gap.abs() < TOLERANCE_ARCSEC, "{column} is {gap}″ off in {row:?}");
        }
        assert!((almanac.sun.distance_au - number(row, "distance_au")).abs() < 1e-7, "{row:?}");
    }
}

#[test]
fn the_sun_is_seen_where_de421_puts_it_from_every_kind_of_place() {
    let sky = Sky::default();
    for row in rows("skyfield-de421/sun_places.csv") {
        let sun = sky.sun_at(instant(&row, "utc"));
        let place = Place::from_deg(number(&row, "lat_deg"), number(&row, "lon_deg")).unwrap();
        let up = elevation(place, &sun).0;
        let gap = gap_arcsec(up, number(&row, "elevation_deg"));
        assert!(gap.abs() < TOLERANCE_ARCSEC + BENDING_ARCSEC, "elevation is {gap}″ off in {row:?}");
        // an azimuth's error is worth less the nearer to the zenith it is measured
        let gap = gap_arcsec(azimuth(place, &sun), number(&row, "azimuth_deg")) * up.rad().cos();
        assert!(gap.abs() < TOLERANCE_ARCSEC + BENDING_ARCSEC, "azimuth is {gap}″ off in {row:?}");
    }
}
