//! The Moon's place and phase against JPL DE421 by way of skyfield, and against a handbook.

use crate::tables::{instant, number, rows};
use gloamline::sky::{Sky, azimuth, elevation, sine_of_elevation};
use gloamline::units::{Angle, Place};

/// The series against DE421: what [`gloamline::sky::MoonPlace`] states.
const TOLERANCE_ARCSEC: f64 = 12.0;
const TOLERANCE_KM: f64 = 60.0;
/// The table's phase angle is that of directions before aberration, ours of Sun and Moon as seen: 20.5″ for each.
const ABERRATION_ARCSEC: f64 = 2.0 * 20.5;
/// TT − UTC in 1992: 27 s and 32.184 s.
const TT_MINUS_UTC_1992_S: f64 = 59.184;

fn gap_arcsec(found: Angle, wanted_deg: f64) -> f64 {
    (found - Angle::from_deg(wanted_deg)).turned_about_zero().arcsec()
}

#[test]
fn the_moon_stands_where_de421_puts_it() {
    let sky = Sky::default();
    let all = rows("skyfield-de421/moon_places.csv");
    assert!(all.len() >= 300);
    for row in &all {
        let at = instant(row, "utc");
        let (moon, sun) = (sky.moon_at(at), sky.sun_at(at));
        let place = Place::from_deg(number(row, "lat_deg"), number(row, "lon_deg")).unwrap();
        let up = elevation(place, &moon).0;
        let by_sine = sine_of_elevation(place.normal(), &moon).asin();
        assert!((up.rad() - by_sine).abs() < 2e-7, "{row:?}: {by_sine}");
        let phase = moon.phase(&sun);
        let gaps = [
            gap_arcsec(moon.declination(), number(row, "declination_deg")),
            gap_arcsec(moon.gha(), number(row, "gha_deg")) * moon.declination().rad().cos(),
            gap_arcsec(up, number(row, "elevation_deg")),
            gap_arcsec(azimuth(place, &moon), number(row, "azimuth_deg")) * up.rad().cos(),
            gap_arcsec(phase.elongation, number(row, "elongation_deg")),
        ];
        for gap in gaps {
            assert!(gap.abs() < TOLERANCE_ARCSEC, "{gaps:?}″ off in {row:?}");
        }
        let distance = moon.distance_km() - number(row, "distance_km");
        assert!(distance.abs() < TOLERANCE_KM, "{distance} km off in {row:?}");
        let angle = gap_arcsec(phase.phase_angle, number(row, "phase_angle_deg"));
        assert!(angle.abs() < TOLERANCE_ARCSEC + ABERRATION_ARCSEC, "{angle}″ off in {row:?}");
        // the lit part changes by half the angle at most
        let lit = phase.illuminated - number(row, "illuminated");
        assert!(lit.abs() < (TOLERANCE_ARCSEC + ABERRATION_ARCSEC) / 206_265.0 / 2.0, "{lit} off in {row:?}");
    }
}

#[test]
fn a_worked_example_of_the_handbook_is_reproduced() {
    let sky = Sky::default();
    for mut row in rows("meeus/moon.csv") {
        row.entry("instant_td".into()).and_modify(|t| t.push('Z'));
        let at = instant(&row, "instant_td").after_s(-TT_MINUS_UTC_1992_S);
        let (moon, sun) = (sky.moon_at(at), sky.sun_at(at));
        let phase = moon.phase(&sun);
        // right ascension is the Sun's plus what the hour angles differ by
        let ascension = sky.almanac(at).right_ascension + sun.gha() - moon.gha();
        let (found, tolerance) = match row["quantity"].as_str() {
            // the same terms with other mean elements, nutation and frame: under 1″
            "apparent_right_ascension" => (ascension.turned_positive().deg(), 1.0 / 3600.0),
            "apparent_declination" => (moon.declination().deg(), 1.0 / 3600.0),
            "distance" => (moon.distance_km(), 0.5),
            // the book's radius of the Earth is 3 m longer
            "horizontal_parallax" => (moon.horizontal_parallax().deg(), 2e-6),
            // printed to their last place
            "phase_angle" => (phase.phase_angle.deg(), 3e-4),
            "illuminated" => (phase.illuminated, 5e-5),
            "bright_limb" => (phase.bright_limb.deg(), 0.05),
            other => panic!("no quantity is called {other}"),
        };
        assert!((found - number(&row, "value")).abs() < tolerance, "{row:?}: {found}");
    }
}

#[test]
fn the_moon_is_larger_overhead_than_on_the_horizon() {
    let sky = Sky::default();
    let mut seen = 0;
    for row in rows("skyfield-de421/moon_places.csv") {
        let moon = sky.moon_at(instant(&row, "utc"));
        let place = Place::from_deg(number(&row, "lat_deg"), number(&row, "lon_deg")).unwrap();
        let grown = moon.semidiameter_from(place).rad() / moon.semidiameter().rad();
        // 1 + sin(elevation) × sin(parallax), to the square of the parallax
        let wanted = 1.0 + elevation(place, &moon).0.rad().sin() * moon.horizontal_parallax().rad();
        assert!((grown - wanted).abs() < 3e-4, "{row:?}: {grown} {wanted}");
        // 14.7′ to 16.8′ from the Earth's centre at the nearest and farthest that the Moon ever comes
        assert!((14.65..16.8).contains(&(moon.semidiameter().deg() * 60.0)));
        seen += 1;
    }
    assert!(seen > 300);
}
