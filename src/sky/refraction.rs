//! Where a body seems to stand, for an observer on the ground and for one aloft: refraction that never steps.
//!
//! Knows no horizon but the sea's, and no air but the standard one or that of a formula.

use super::air::Ray;
use super::{GeometricElevation, Horizon};
use crate::units::{Angle, Metres};

/// Refraction at the horizon by the almanacs' convention (Nautical Almanac, explanation).
pub const HORIZONTAL_REFRACTION: Angle = Angle::from_arcmin(34.0);

/// The elevation above level at which a body is seen, refraction included.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd)]
pub struct ApparentElevation(pub Angle);

/// The air at an observer's place on the ground.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct GroundAir {
    /// Pressure at the place itself (QFE) in hectopascals.
    pub pressure_hpa: f64,
    /// Temperature in degrees Celsius.
    pub temperature_c: f64,
}

impl Default for GroundAir {
    /// 1010 hPa and 10 °C, for which the formula is written.
    fn default() -> Self {
        Self { pressure_hpa: 1010.0, temperature_c: 10.0 }
    }
}

/// Where refraction begins to fade and where it has ceased, in degrees of geometric elevation: below what can be seen.
const FADES_FROM_DEG: f64 = -0.9;
const FADED_AT_DEG: f64 = -6.0;
/// Where the formula for geometric elevations reaches its greatest value: √10.3 − 5.11.
const GREATEST_AT_DEG: f64 = -1.9;

/// The apparent elevation of a body for an observer on the ground.
///
/// Refraction of a body that is out of sight has no meaning; from −0.9° down to −6° it is let fade to nothing, smoothly
/// and slowly enough that apparent elevation always rises with the geometric one, so that nothing steps at the horizon
/// or anywhere. Twilight limits are geometric and have no use for it.
///
/// # Accuracy
/// 0.1′ against Bennett's formula above the horizon, and that 0.07′ against tables; 34.5′ on the horizon in the default
/// air, 34.0′ in 1013.25 hPa and 15 °C. Near the horizon real air scatters by 10′.
///
/// # Source
/// Sæmundsson 1986, Sky and Telescope 72:70, with the scaling by pressure and temperature and the constant 0.0019′ that
/// brings the zenith to 0 as given in Meeus, *Astronomical Algorithms*, 2nd ed., chapter 16.
pub fn apparent_from_ground(geometric: GeometricElevation, air: GroundAir) -> ApparentElevation {
    let deg = geometric.0.deg();
    let scale = air.pressure_hpa / 1010.0 * 283.0 / (273.0 + air.temperature_c);
    let bent = formula_arcmin(deg.max(GREATEST_AT_DEG)) * faded(deg) * scale;
    ApparentElevation(geometric.0 + Angle::from_arcmin(bent))
}

/// Sæmundsson's refraction in minutes of arc for a geometric elevation in degrees.
fn formula_arcmin(deg: f64) -> f64 {
    1.02 / (deg + 10.3 / (deg + 5.11)).to_radians().tan() + 0.0019279
}

/// From 1 above the fading's beginning to 0 below its end, with two smooth derivatives.
fn faded(deg: f64) -> f64 {
    let t = ((deg - FADED_AT_DEG) / (FADES_FROM_DEG - FADED_AT_DEG)).clamp(0.0, 1.0);
    t * t * t * (10.0 + t * (6.0 * t - 15.0))
}

/// Above this the refraction is in proportion to the cotangent, to 0.001″.
const STEEP_RAD: f64 = 80.0 * std::f64::consts::PI / 180.0;

/// The apparent elevation of a body for an observer at a height in the standard air, looking up or down past level.
///
/// Below [`Horizon::clear_sea`]'s limit the sea hides the body: there the refraction of the grazing ray is held, so that
/// the answer passes through minus the dip at the limit and goes on without a step.
///
/// # Accuracy
/// Within 0.0002° of an independent ray trace (`tests/tables/horizon-trace`). Each call traces rays anew, a tenth of a
/// millisecond: it is for showing, not for searching.
pub fn apparent_aloft(geometric: GeometricElevation, height: Metres) -> ApparentElevation {
    let height_m = height.0.clamp(Horizon::HEIGHTS.start().0, Horizon::HEIGHTS.end().0);
    let sea_m = height_m.min(0.0);
    let sea = Ray::level_at(sea_m);
    let dip_rad = sea.slant_rad(height_m);
    let grazing_rad = sea.bending_to_space_rad(sea_m) + sea.bending_rad(sea_m, height_m);
    let wanted = geometric.0.rad();
    if wanted <= -dip_rad - grazing_rad {
        return ApparentElevation(Angle::from_rad(wanted + grazing_rad));
    }
    // what is seen at a geometric elevation stands between the geometric and that plus the most that any ray bends
    let (low, high) = (wanted.max(-dip_rad), wanted + grazing_rad);
    let off = |seen: f64| seen - bending_aloft_rad(seen, height_m) - wanted;
    ApparentElevation(Angle::from_rad(zero(off, low, high)))
}

/// The geometric elevation of a body that an observer at a height sees at an apparent elevation, which must not lie below
/// the sea's horizon: the inverse of [`apparent_aloft`], by one ray.
pub fn geometric_aloft(apparent: ApparentElevation, height: Metres) -> GeometricElevation {
    let height_m = height.0.clamp(Horizon::HEIGHTS.start().0, Horizon::HEIGHTS.end().0);
    GeometricElevation(apparent.0 - Angle::from_rad(bending_aloft_rad(apparent.0.rad(), height_m)))
}

/// How far the ray turns that an observer at a height sees at an apparent elevation, in radians.
fn bending_aloft_rad(seen_rad: f64, height_m: f64) -> f64 {
    if seen_rad > STEEP_RAD {
        let steep = Ray::seen_from(height_m, STEEP_RAD).bending_to_space_rad(height_m);
        return steep * STEEP_RAD.tan() / seen_rad.tan();
    }
    let ray = Ray::seen_from(height_m, seen_rad);
    let up = ray.bending_to_space_rad(height_m);
    if seen_rad >= 0.0 {
        return up;
    }
    // down to where the ray is level and up again to the observer's height
    up + 2.0 * ray.bending_rad(ray.lowest_m(height_m), height_m)
}

/// 0.0002″.
const ENOUGH_RAD: f64 = 1e-9;

/// The zero of a rising function between two arguments: the Illinois form of false position (Dowell and Jarratt 1971, BIT 11:168).
fn zero(f: impl Fn(f64) -> f64, low: f64, high: f64) -> f64 {
    let (mut a, mut b) = (low, high);
    let (mut f_a, mut f_b) = (f(a), f(b));
    for _ in 0..40 {
        if (b - a).abs() < ENOUGH_RAD || f_b.abs() < ENOUGH_RAD || f_a == f_b {
            break;
        }
        let c = b - f_b * (b - a) / (f_b - f_a);
        let f_c = f(c);
        if f_c * f_b < 0.0 {
            (a, f_a) = (b, f_b);
        } else {
            f_a /= 2.0;
        }
        (b, f_b) = (c, f_c);
    }
    b
}

#[cfg(test)]
mod tests {
    use super::{ApparentElevation, GroundAir, apparent_aloft, apparent_from_ground, geometric_aloft};
    use crate::sky::{GeometricElevation, Horizon};
    use crate::units::{Angle, Metres};

    fn geometric(deg: f64) -> GeometricElevation {
        GeometricElevation(Angle::from_deg(deg))
    }

    fn from_ground_deg(deg: f64) -> f64 {
        apparent_from_ground(geometric(deg), GroundAir::default()).0.deg()
    }

    fn aloft_deg(deg: f64, feet: f64) -> f64 {
        apparent_aloft(geometric(deg), Metres::from_feet(feet)).0.deg()
    }

    #[test]
    fn the_ground_agrees_with_bennett_from_the_horizon_to_the_zenith() {
        for i in 0..=900 {
            let seen = f64::from(i) / 10.0;
            // Bennett 1982, J. Navigation 35:255, for an apparent elevation
            let bent = 1.0 / (seen + 7.31 / (seen + 4.4)).to_radians().tan() / 60.0;
            assert!((from_ground_deg(seen - bent) - seen).abs() * 60.0 < 0.1, "{seen}");
        }
    }

    #[test]
    fn on_the_horizon_the_ground_keeps_the_conventions_thirty_four_minutes() {
        let standard = GroundAir { pressure_hpa: 1013.25, temperature_c: 15.0 };
        let seen = apparent_from_ground(geometric(-34.0 / 60.0), standard).0;
        assert!((seen.deg() * 60.0).abs() < 0.3, "{seen:?}");
    }

    #[test]
    fn nothing_steps_and_what_rises_is_seen_to_rise() {
        for air in [GroundAir::default(), GroundAir { pressure_hpa: 1050.0, temperature_c: -40.0 }] {
            let seen = |deg: f64| apparent_from_ground(geometric(deg), air).0.deg();
            for i in 0..20_000 {
                let deg = -10.0 + f64::from(i) * 0.005;
                let step = seen(deg + 0.005) - seen(deg);
                assert!(step > 0.002 && step < 0.0075, "{deg}: {step}");
            }
        }
        assert!((from_ground_deg(-6.0) + 6.0).abs() < 1e-12);
    }

    #[test]
    fn aloft_nothing_steps_either() {
        for feet in [-100.0, 0.0, 5_000.0, 35_000.0, 45_000.0] {
            let mut last = aloft_deg(-8.0, feet);
            for i in 1..=490 {
                let seen = aloft_deg(-8.0 + f64::from(i) * 0.2, feet);
                assert!(seen > last + 0.05 && seen < last + 0.21, "{feet}: {i}");
                last = seen;
            }
            assert!((last - 90.0).abs() < 1e-6, "{last}");
        }
    }

    #[test]
    fn what_is_seen_at_an_elevation_stands_where_it_is_seen_from() {
        for feet in [0.0, 12_000.0, 41_000.0] {
            for deg in [-0.1_f64, 0.0, 4.0, 15.0, 79.0, 89.0] {
                let height = Metres::from_feet(feet);
                let apparent = ApparentElevation(Angle::from_deg(if feet == 0.0 { deg.abs() } else { deg }));
                let back = apparent_aloft(geometric_aloft(apparent, height), height);
                assert!((back.0 - apparent.0).deg().abs() < 1e-6, "{feet} ft, {deg}°");
            }
        }
    }

    #[test]
    fn on_the_limit_the_body_is_seen_on_the_horizon() {
        for feet in [0.0, 100.0, 20_000.0, 35_000.0, 60_000.0] {
            let height = Metres::from_feet(feet);
            let sea = Horizon::clear_sea();
            let limit = sea.sun_centre_limit(height, Angle::ZERO);
            let seen = apparent_aloft(limit, height).0.deg();
            assert!((seen + sea.dip(height).deg()).abs() < 2e-4, "{feet}: {seen}");
        }
    }

    #[test]
    fn at_the_sea_the_two_views_part_only_near_the_horizon() {
        let air = GroundAir { pressure_hpa: 1013.25, temperature_c: 15.0 };
        let apart = |deg: f64| {
            let ground = apparent_from_ground(geometric(deg), air).0;
            (ground - apparent_aloft(geometric(deg), Metres(0.0)).0).deg() * 60.0
        };
        for i in 0..130 {
            let deg = -0.54 + f64::from(i * i) * 0.005;
            // the formula's own tenth of a minute, its 1.02 which is 3 % too much at mid-height, and the two airs
            let most = if deg > 2.0 { 0.2 } else { 1.05 };
            assert!(apart(deg) > 0.0 && apart(deg) < most, "{deg}: {}", apart(deg));
        }
    }
}
