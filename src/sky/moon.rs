//! The Moon's apparent geocentric place in the Earth-fixed frame, and how much of it is lit.
//!
//! Knows a round Moon: neither its mountains (2″ at the limb) nor its brightness.

use super::observer::{Body, GeometricElevation};
use super::sun::{AU_M, SunPlace};
use super::{HORIZONTAL_REFRACTION, observer};
use crate::units::{Angle, Lane, Place, dot, wgs84};

/// The Moon's radius over the Earth's equatorial radius (IAU 1982).
const RADIUS_OVER_EARTHS: f64 = 0.272_507_6;
/// The Moon's radius in astronomical units.
const RADIUS_AU: f64 = RADIUS_OVER_EARTHS * wgs84::A_M / AU_M;

/// The Moon's apparent geocentric place at an instant, or at four.
///
/// # Accuracy
/// Within 0.01″ of the series that it tabulates, and those within 10″ in direction and 45 km in distance of JPL DE421 at
/// 360 instants from 1975 to 2045 (`tests/tables/skyfield-de421`), which moves an event by a second.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct MoonPlace<L = f64> {
    /// Unit vector from the Earth's centre, Earth-fixed.
    pub direction: [L; 3],
    /// Distance in astronomical units.
    pub distance_au: L,
}

/// How the Moon is lit, seen from the Earth's centre.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Phase {
    /// Angle between the Moon and the Sun, 0° at new Moon to 180°.
    pub elongation: Angle,
    /// Angle at the Moon between the Earth and the Sun, 180° at new Moon to 0°.
    pub phase_angle: Angle,
    /// The lit part of the disc, 0 to 1.
    pub illuminated: f64,
    /// Position angle of the middle of the bright limb, from north through east, 0° to 360°.
    pub bright_limb: Angle,
    /// Whether the Moon stands east of the Sun, so that the lit part grows.
    pub is_waxing: bool,
}

impl<L: Lane> Body<L> for MoonPlace<L> {
    #[inline]
    fn direction(&self) -> [L; 3] {
        self.direction
    }

    #[inline]
    fn distance_au(&self) -> L {
        self.distance_au
    }
}

impl<L: Lane> MoonPlace<L> {
    /// The sine of [`MoonPlace::rise_limit`].
    #[inline]
    pub fn sine_of_rise_limit(&self) -> L {
        // −sin(refraction + semidiameter), the semidiameter's sine being the radius over the distance
        let sin = L::splat(RADIUS_AU) / self.distance_au;
        let cos = (L::splat(1.0) - sin * sin).root();
        let [sin_34, cos_34] = [HORIZONTAL_REFRACTION.rad().sin(), HORIZONTAL_REFRACTION.rad().cos()];
        L::splat(-sin_34) * cos - L::splat(cos_34) * sin
    }
}

impl MoonPlace {
    /// Declination, north positive.
    pub fn declination(&self) -> Angle {
        let [x, y, z] = self.direction;
        Angle::from_rad(z.atan2(x.hypot(y)))
    }

    /// Greenwich hour angle, westward from the Greenwich meridian, 0° to 360°.
    pub fn gha(&self) -> Angle {
        Angle::from_rad((-self.direction[1]).atan2(self.direction[0])).turned_positive()
    }

    /// Distance from the Earth's centre in kilometres.
    pub fn distance_km(&self) -> f64 {
        self.distance_au * AU_M / 1000.0
    }

    /// The angle that the Moon's radius fills from the Earth's centre.
    pub fn semidiameter(&self) -> Angle {
        Angle::from_rad((RADIUS_AU / self.distance_au).asin())
    }

    /// The angle that the Moon's radius fills from a place: up to 1.8 % more, nearer by the Earth's radius.
    pub fn semidiameter_from(&self, place: Place) -> Angle {
        Angle::from_rad((RADIUS_AU / observer::range_au(place, self)).asin())
    }

    /// Horizontal parallax at the equator.
    pub fn horizontal_parallax(&self) -> Angle {
        Angle::from_rad((wgs84::A_M / (self.distance_au * AU_M)).asin())
    }

    /// The *topocentric* geometric elevation of the Moon's centre at moonrise and moonset: the upper limb on a level
    /// horizon, −(34′ + semidiameter).
    ///
    /// # Source
    /// Astronomical Almanac, section M (glossary: moonrise, moonset). Tables made for geocentric elevations add the
    /// parallax, which is in the elevation here.
    pub fn rise_limit(&self) -> GeometricElevation {
        GeometricElevation(-(HORIZONTAL_REFRACTION + self.semidiameter()))
    }

    /// How the Moon is lit by the Sun of the same instant.
    ///
    /// # Accuracy
    /// From directions as seen, aberration included: within 45″ in the phase angle and 0.0001 in the lit part.
    ///
    /// # Source
    /// Meeus, *Astronomical Algorithms*, 2nd ed., equations 48.1 to 48.5, the angles by arc tangents.
    pub fn phase(&self, sun: &SunPlace) -> Phase {
        let cos_elongation = dot(self.direction, sun.direction);
        let sin_elongation = norm(cross(self.direction, sun.direction));
        let phase_angle =
            (sun.distance_au * sin_elongation).atan2(self.distance_au - sun.distance_au * cos_elongation);
        let [x, y, z] = self.direction;
        // the way to the Sun, split along the Moon's east and north
        let east = x * sun.direction[1] - y * sun.direction[0];
        let north = (x * x + y * y) * sun.direction[2] - z * (x * sun.direction[0] + y * sun.direction[1]);
        Phase {
            elongation: Angle::from_rad(sin_elongation.atan2(cos_elongation)),
            phase_angle: Angle::from_rad(phase_angle),
            illuminated: f64::midpoint(1.0, phase_angle.cos()),
            bright_limb: Angle::from_rad(east.atan2(north)).turned_positive(),
            is_waxing: east < 0.0,
        }
    }
}

fn cross(a: [f64; 3], b: [f64; 3]) -> [f64; 3] {
    [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]]
}

fn norm(a: [f64; 3]) -> f64 {
    dot(a, a).sqrt()
}

#[cfg(test)]
mod tests {
    use crate::sky::Sky;
    use crate::units::Instant;

    #[test]
    fn a_month_has_one_of_each_phase() {
        let sky = Sky::default();
        let (mut quarters, mut changes) = (0, 0);
        let mut last = None;
        for hour in 0..709 {
            let at = Instant::from_seconds(8.5e8 + f64::from(hour) * 3600.0);
            let phase = sky.moon_at(at).phase(&sky.sun_at(at));
            let now = (phase.illuminated > 0.5, phase.is_waxing);
            if let Some((lit, waxing)) = last.replace(now) {
                quarters += i32::from(lit != now.0);
                changes += i32::from(waxing != now.1);
            }
        }
        assert_eq!((quarters, changes), (2, 2));
    }

    #[test]
    fn the_sine_of_the_rise_limit_is_the_limits_sine() {
        let sky = Sky::default();
        for day in 0..28 {
            let moon = sky.moon_at(Instant::from_seconds(8.5e8 + f64::from(day) * 86_400.0));
            assert!((moon.sine_of_rise_limit() - moon.rise_limit().0.rad().sin()).abs() < 1e-15);
        }
    }

    #[test]
    fn a_crescent_that_waxes_has_its_bright_limb_in_the_west() {
        let sky = Sky::default();
        for day in 0..200 {
            let at = Instant::from_seconds(8.5e8 + f64::from(day) * 86_400.0);
            let phase = sky.moon_at(at).phase(&sky.sun_at(at));
            if phase.illuminated < 0.9 && phase.illuminated > 0.1 {
                assert_eq!(phase.bright_limb.deg() > 180.0, phase.is_waxing, "{phase:?}");
            }
        }
    }
}
