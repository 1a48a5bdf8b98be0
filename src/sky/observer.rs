//! The Sun or the Moon against an observer's horizontal plane, topocentric on the WGS84 ellipsoid at height zero.

use super::sun::AU_M;
use crate::units::{Angle, Lane, Place, Vector, dot, wgs84};

/// The geometric (airless) elevation of a body's centre above the horizontal plane.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd)]
pub struct GeometricElevation(pub Angle);

/// What is looked at: an apparent geocentric direction and a distance, at an instant or at four.
pub trait Body<L: Lane = f64> {
    /// Unit vector from the Earth's centre, Earth-fixed.
    fn direction(&self) -> [L; 3];
    /// Distance in astronomical units.
    fn distance_au(&self) -> L;
}

/// The Earth's rate of rotation over the speed of light, per astronomical unit: 7.292115e−5 rad/s (IERS Conventions
/// 2010, table 1.2) × 499.004784 s.
const SPIN_PER_AU: f64 = 7.292_115e-5 * 499.004_784;

/// The sine of a body's geometric elevation at the foot of an ellipsoid normal.
///
/// # Shapes and units
/// `normal` is the outward unit normal, Earth-fixed. The observer stands on the ellipsoid and turns with the Earth: the
/// parallax (up to 8.9″ for the Sun, 61′ for the Moon) is exact and not a series, the diurnal aberration (up to 0.32″) is
/// of first order. Ten kilometres up the Moon stands up to 6″ lower, which is left out.
///
/// # Source
/// The place under a normal is N `(n_x, n_y, (1 − e²) n_z)` with `N = a / √(1 − e² n_z²)` (any text on geodesy, e.g.
/// EPSG Guidance Note 7-2, section 4.1.1).
#[inline]
pub fn sine_of_elevation<L: Lane>(normal: [L; 3], body: &impl Body<L>) -> L {
    let [one, two] = [1.0, 2.0].map(L::splat);
    let [x, y, z] = normal;
    let w = (one - L::splat(wgs84::E2) * z * z).root();
    let radius_au = L::splat(wgs84::A_M / AU_M) / w;
    let place = [radius_au * x, radius_au * y, radius_au * L::splat(1.0 - wgs84::E2) * z];
    let (direction, d) = (body.direction(), body.distance_au());
    let towards = dot(place, direction);
    let range = (d * (d - two * towards) + dot(place, place)).root();
    // the observer moves eastward, level, so that aberration draws the direction along without lifting it: the sine
    // shrinks as the vector is brought back to unit length
    let eastward = L::splat(SPIN_PER_AU) * (place[0] * direction[1] - place[1] * direction[0]);
    // n·P is N (1 − e² n_z²), the distance of the tangent plane from the centre
    (d * dot(normal, direction) - radius_au * w * w) / range * (one - eastward)
}

/// How far a body's direction lies along a level unit vector at the foot of an ellipsoid normal: the cosine of its
/// elevation times that of its bearing from the vector.
///
/// # Shapes and units
/// As [`sine_of_elevation`], parallax and diurnal aberration included.
#[inline]
pub fn level_part<L: Lane>(normal: [L; 3], level: [L; 3], body: &impl Body<L>) -> L {
    let [one, two] = [1.0, 2.0].map(L::splat);
    let [x, y, z] = normal;
    let radius_au = L::splat(wgs84::A_M / AU_M) / (one - L::splat(wgs84::E2) * z * z).root();
    let place = [radius_au * x, radius_au * y, radius_au * L::splat(1.0 - wgs84::E2) * z];
    let (direction, d) = (body.direction(), body.distance_au());
    let range = (d * (d - two * dot(place, direction)) + dot(place, place)).root();
    let spun = L::splat(SPIN_PER_AU) * (place[0] * level[1] - place[1] * level[0]);
    (d * dot(direction, level) - dot(place, level)) / range + spun
}

/// A body's geometric elevation at a place.
pub fn elevation(place: Place, body: &impl Body) -> GeometricElevation {
    let [east, north, up] = horizontal(place, body);
    // not by the sine alone, which is flat near the zenith
    GeometricElevation(Angle::from_rad(up.atan2(east.hypot(north))))
}

/// A body's azimuth at a place, from true north through east, 0° to 360°.
///
/// At a pole north is the meridian of the longitude that the place was given with.
pub fn azimuth(place: Place, body: &impl Body) -> Angle {
    let [east, north, _] = horizontal(place, body);
    Angle::from_rad(east.atan2(north)).turned_positive()
}

/// The distance of a body from a place, in astronomical units.
pub(super) fn range_au(place: Place, body: &impl Body) -> f64 {
    let under = under_au(place);
    let line: Vector = std::array::from_fn(|i| body.distance_au() * body.direction()[i] - under[i]);
    dot(line, line).sqrt()
}

/// The place itself, from the Earth's centre, in astronomical units.
fn under_au(place: Place) -> Vector {
    let [x, y, z] = place.normal();
    let radius_au = wgs84::A_M / AU_M / (1.0 - wgs84::E2 * z * z).sqrt();
    [radius_au * x, radius_au * y, radius_au * (1.0 - wgs84::E2) * z]
}

/// The topocentric direction's east, north and upward parts; its length is 1 but for the aberration.
fn horizontal(place: Place, body: &impl Body) -> Vector {
    let (sin_lat, cos_lat) = place.lat.angle().rad().sin_cos();
    let (sin_lon, cos_lon) = place.lon.angle().rad().sin_cos();
    let under = under_au(place);
    let line: Vector = std::array::from_fn(|i| body.distance_au() * body.direction()[i] - under[i]);
    let range = dot(line, line).sqrt();
    let spin = [-SPIN_PER_AU * under[1], SPIN_PER_AU * under[0], 0.0];
    let seen: Vector = std::array::from_fn(|i| line[i] / range + spin[i]);
    let axes = [
        [-sin_lon, cos_lon, 0.0],
        [-sin_lat * cos_lon, -sin_lat * sin_lon, cos_lat],
        [cos_lat * cos_lon, cos_lat * sin_lon, sin_lat],
    ];
    axes.map(|axis| dot(axis, seen))
}
