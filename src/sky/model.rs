//! The Sun's and the Moon's apparent place from the IAU routines: slow, exact, and the source of every table.
//!
//! Left out: polar motion (0.3″ at most) and the Sun's own light deflection, which does not move its centre.

use sofars::{
    astro::ab,
    eph::{epv00, moon98},
    pnp,
};

/// J2000.0 as a Julian date.
const J2000: f64 = 2_451_545.0;
/// Light travels this many astronomical units in a day: 86,400 s × c / au (IAU 2012 resolution B2; BIPM SI brochure).
const LIGHT_AU_PER_DAY: f64 = 86_400.0 * 299_792_458.0 / 149_597_870_700.0;

/// A body's apparent geocentric direction and distance.
#[derive(Debug, Clone, Copy)]
pub(super) struct Apparent {
    /// Unit vector in the celestial intermediate system: z the pole of date, x the intermediate origin.
    pub(super) direction: [f64; 3],
    /// Distance in astronomical units.
    pub(super) distance_au: f64,
}

/// The Sun's apparent place at an instant of TT, given in days since J2000.0.
///
/// # Accuracy
/// Within 0.022″ of JPL DE421 in declination and hour angle (`tests/tables/skyfield-de421`).
///
/// # Source
/// IAU SOFA routines epv00, ab, c2i06a (IAU 2006/2000A) as ported by the `sofars` crate; the sequence is Urban and
/// Seidelmann, *Explanatory Supplement*, 3rd ed., section 7.2.
pub(super) fn apparent(tt_days: f64) -> Apparent {
    let (natural, distance_au, velocity) = natural(tt_days);
    let slowness = (1.0 - dot(velocity, velocity)).sqrt();
    let proper = ab(&natural, &velocity, distance_au, slowness);
    let direction = rotate(&pnp::c2i06a(J2000, tt_days), proper);
    Apparent { direction, distance_au }
}

/// The Moon's apparent place at an instant of TT, given in days since J2000.0.
///
/// Light time (1.3 s, 0.7″) is taken against the Earth as it moves: thereby the aberration by the Earth's velocity is in,
/// to 0.001″.
///
/// # Source
/// IAU SOFA routines moon98 (Meeus, *Astronomical Algorithms*, 2nd ed., chapter 47, with Simon's mean elements) and c2i06a
/// as ported by the `sofars` crate.
pub(super) fn apparent_moon(tt_days: f64) -> Apparent {
    let [place, velocity] = moon98(J2000, tt_days);
    let delay = norm(place) / LIGHT_AU_PER_DAY;
    let as_left: [f64; 3] = std::array::from_fn(|i| place[i] - delay * velocity[i]);
    let distance_au = norm(as_left);
    let direction = rotate(&pnp::c2i06a(J2000, tt_days), as_left.map(|c| c / distance_au));
    Apparent { direction, distance_au }
}

/// Geocentric direction of the Sun when its light left, distance in au, and the Earth's velocity in units of light's.
fn natural(tt_days: f64) -> ([f64; 3], f64, [f64; 3]) {
    // the routine refuses dates more than a hundred Julian years from J2000.0, which the door has turned away
    let (heliocentric, barycentric) = epv00(J2000, tt_days).unwrap_or_default();
    let delay = norm(heliocentric[0]) / LIGHT_AU_PER_DAY;
    let sun_as_left = std::array::from_fn(|i| {
        let sun = barycentric[0][i] - heliocentric[0][i];
        let drift = barycentric[1][i] - heliocentric[1][i];
        sun - delay * drift - barycentric[0][i]
    });
    let distance = norm(sun_as_left);
    (sun_as_left.map(|c| c / distance), distance, barycentric[1].map(|v| v / LIGHT_AU_PER_DAY))
}

/// True obliquity of the ecliptic in radians (IAU 2006/2000A).
pub(super) fn true_obliquity_rad(tt_days: f64) -> f64 {
    let (_, in_obliquity) = pnp::nut06a(J2000, tt_days);
    pnp::obl06(J2000, tt_days) + in_obliquity
}

/// Equation of the origins in radians: right ascension from the intermediate origin minus that from the equinox, negated.
pub(super) fn equation_of_origins_rad(tt_days: f64) -> f64 {
    pnp::eo06a(J2000, tt_days)
}

/// Apparent geocentric ecliptic longitude of date in radians.
pub(super) fn apparent_longitude_rad(tt_days: f64) -> f64 {
    let [x, y, z] = apparent(tt_days).direction;
    // right ascension from the equinox of date
    let right_ascension = y.atan2(x) - equation_of_origins_rad(tt_days);
    let equator = x.hypot(y);
    let (sin_e, cos_e) = true_obliquity_rad(tt_days).sin_cos();
    (equator * right_ascension.sin() * cos_e + z * sin_e).atan2(equator * right_ascension.cos())
}

/// The Sun's geocentric geometric distance in au, and its rate in au per day.
pub(super) fn distance_and_rate(tt_days: f64) -> (f64, f64) {
    let (heliocentric, _) = epv00(J2000, tt_days).unwrap_or_default();
    let distance = norm(heliocentric[0]);
    (distance, dot(heliocentric[0], heliocentric[1]) / distance)
}

fn dot(a: [f64; 3], b: [f64; 3]) -> f64 {
    a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
}

fn norm(a: [f64; 3]) -> f64 {
    dot(a, a).sqrt()
}

fn rotate(m: &[[f64; 3]; 3], v: [f64; 3]) -> [f64; 3] {
    [dot(m[0], v), dot(m[1], v), dot(m[2], v)]
}
