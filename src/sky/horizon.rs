//! The horizon that an observer at a height sees, and where the Sun stands when its upper limb is on it.
//!
//! Knows the standard atmosphere and a round Earth, neither weather nor what really stands at the horizon.
//!
//! # How it is made
//! The ray that grazes the horizon is level there, and its slant at the observer is the dip (Bouguer's law, in closed
//! form). It has turned twice: on its way down from space to the horizon, and up from there to the observer. Dip and both
//! turns together are how far below level the Sun's upper limb stands, airless. That sum is traced once for a horizon's
//! height, at Chebyshev nodes of s = √(height above the horizon), in which it is smooth down to the horizon itself; an
//! evaluation is then a short series. An observer at or below the horizon's height (in a valley, under the cloud tops)
//! sees it level, and only the way down is left.
//!
//! # How smooth it is
//! From above, the limit is a polynomial in s and falls steadily with it. Dip and refraction each have a kink of 1.6 % in
//! their slope at the tropopause of the standard atmosphere, equal and opposite: the limit has none. By height it falls as
//! steeply as a root does: see [`Horizon::steepness_deg_per_m`]. At the horizon's own height the limit is continuous, its
//! slope is not: a few hundred-thousandths of a degree a metre *upwards* below it, unbounded downwards above it.
//!
//! For a search along a climb at a steady rate: the root's branch point lies where the climb, drawn back, meets the
//! horizon's height. A piece over which the height above the horizon no more than quadruples keeps clear of it (within
//! the Bernstein ellipse ρ = (√4 + 1)/(√4 − 1) = 3), and 16 Chebyshev nodes in time hold the limit to 5e−11 rad; from 10 m to
//! the ceiling that is six pieces. Or count in s instead of time.
//!
//! # What it is not
//! At height 0 the limit is −(32.95′ + semidiameter), because the standard atmosphere bends the level ray by that much;
//! the almanacs' convention for an observer on the ground is 34′. The two are different answers to different questions
//! (this air, that average) and are not blended: a timeline beneath keeps −50′, one aloft keeps this, each without a step.

use super::GeometricElevation;
use super::air::{Ray, TROPOPAUSE_M};
use crate::curve::{coefficients, lobatto};
use crate::units::{Angle, Metres};

/// Coefficients of the series in the root of the height above the horizon.
const TERMS_ABOVE: usize = 16;
/// Coefficients of the series below it.
const TERMS_BELOW: usize = 10;

/// The horizon of a clear sea, or of cloud tops or terrain at a height.
///
/// # Accuracy
/// Within 0.0001° of the ray trace it is made from, and that within 0.0002° of an independent one from 0 to 60,000 ft
/// (`tests/tables/horizon-trace`). The air is another matter: 15 K more or less move the limit at FL350 by 0.08°, the
/// ellipsoid's radii by 0.006°, and real refraction at the horizon scatters by 0.16° on the ground.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Horizon {
    height_m: f64,
    grazing: Ray,
    /// Dip and refraction together in radians, in the root of the height above the horizon.
    above: [f64; TERMS_ABOVE],
    /// Refraction of the level ray in radians, in the root of the depth below the tropopause.
    below: [f64; TERMS_BELOW],
}

/// A horizon that cannot be.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
#[error("a horizon at {0} m is outside 0 m to {highest} m", highest = Horizon::HIGHEST.0)]
pub struct HorizonError(pub f64);

impl Horizon {
    /// The observer's heights that are answered for; beyond them the nearer end's answer is given.
    pub const HEIGHTS: std::ops::RangeInclusive<Metres> = Metres(-500.0)..=Metres(20_000.0);
    /// The highest horizon: just under the tropopause, above which hardly a cloud makes one.
    pub const HIGHEST: Metres = Metres(11_000.0);

    /// The horizon of a clear sea.
    pub fn clear_sea() -> Self {
        Self::traced(0.0)
    }

    /// A horizon raised to a height by cloud tops or terrain.
    ///
    /// # Errors
    /// Below the sea, above [`Self::HIGHEST`], or not a number.
    pub fn raised(height: Metres) -> Result<Self, HorizonError> {
        if (0.0..=Self::HIGHEST.0).contains(&height.0) {
            Ok(Self::traced(height.0))
        } else {
            Err(HorizonError(height.0))
        }
    }

    fn traced(height_m: f64) -> Self {
        let grazing = Ray::level_at(height_m);
        let down_rad = grazing.bending_to_space_rad(height_m);
        let depression = |s: f64| {
            let at_m = height_m + s * s;
            down_rad + grazing.bending_rad(height_m, at_m) + grazing.slant_rad(at_m)
        };
        let (low, high) = Self::roots_above(height_m);
        let (shallow, deep) = Self::roots_below(height_m);
        Self {
            height_m,
            grazing,
            above: series(low, high, depression),
            below: series(shallow, deep, |u| level_bending_rad(TROPOPAUSE_M - u * u)),
        }
    }

    /// The height of what is seen at the horizon.
    pub fn height(&self) -> Metres {
        Metres(self.height_m)
    }

    /// How far below level the horizon appears.
    pub fn dip(&self, height: Metres) -> Angle {
        Angle::from_rad(self.grazing.slant_rad(answered_for(height).max(self.height_m)))
    }

    /// How far the ray that grazes the horizon turns from space to the observer.
    pub fn refraction(&self, height: Metres) -> Angle {
        self.depression(height) - self.dip(height)
    }

    /// How far below level, airless, a point of light stands that shows on the horizon: dip and refraction together.
    pub fn depression(&self, height: Metres) -> Angle {
        let height_m = answered_for(height);
        Angle::from_rad(if height_m > self.height_m {
            sum(&self.above, scaled((height_m - self.height_m).sqrt(), Self::roots_above(self.height_m)))
        } else {
            sum(&self.below, scaled((TROPOPAUSE_M - height_m).sqrt(), Self::roots_below(self.height_m)))
        })
    }

    /// The geometric elevation of the Sun's (or Moon's) centre when its upper limb shows on the horizon.
    pub fn sun_centre_limit(&self, height: Metres, semidiameter: Angle) -> GeometricElevation {
        GeometricElevation(-(self.depression(height) + semidiameter))
    }

    /// A bound on how fast the limit falls as the observer climbs, in degrees per metre, at every height from this one up.
    ///
    /// The limit falls like a root of the height above the horizon, so the bound is without limit at the horizon itself.
    pub fn steepness_deg_per_m(&self, height: Metres) -> f64 {
        if height.0 < self.height_m {
            return f64::INFINITY;
        }
        ROOT_SLOPE_DEG / (height.0 - self.height_m).sqrt()
    }

    /// The root of the height above the horizon, from the horizon to the ceiling.
    fn roots_above(height_m: f64) -> (f64, f64) {
        (0.0, (Self::HEIGHTS.end().0 - height_m).sqrt())
    }

    /// The root of the depth below the tropopause, from the horizon down to the floor: a level ray notices the kink above
    /// it as a root.
    fn roots_below(height_m: f64) -> (f64, f64) {
        ((TROPOPAUSE_M - height_m).sqrt(), (TROPOPAUSE_M - Self::HEIGHTS.start().0).sqrt())
    }
}

/// Half the limit's slope by the root of the height, at its greatest: where a grazing ray leaves the sea.
const ROOT_SLOPE_DEG: f64 = 0.01765;

/// The height in metres, or the nearest that is answered for.
fn answered_for(height: Metres) -> f64 {
    height.0.clamp(Horizon::HEIGHTS.start().0, Horizon::HEIGHTS.end().0)
}

/// A value's place on an interval, from −1 to 1.
fn scaled(value: f64, (low, high): (f64, f64)) -> f64 {
    (2.0 * value - low - high) / (high - low)
}

fn level_bending_rad(height_m: f64) -> f64 {
    Ray::level_at(height_m).bending_to_space_rad(height_m)
}

/// The Chebyshev series of a function on an interval.
fn series<const N: usize>(low: f64, high: f64, f: impl Fn(f64) -> f64) -> [f64; N] {
    let mut values = [0.0; N];
    for (value, x) in values.iter_mut().zip(lobatto(N)) {
        *value = f(f64::midpoint(low, high) + (high - low) / 2.0 * x);
    }
    let mut terms = [0.0; N];
    coefficients(&values, &mut terms);
    terms
}

/// Clenshaw's sum.
fn sum(terms: &[f64], x: f64) -> f64 {
    let (mut b1, mut b2) = (0.0, 0.0);
    for c in terms[1..].iter().rev() {
        (b1, b2) = (2.0 * x * b1 + (c - b2), b1);
    }
    x * b1 + (terms[0] - b2)
}

#[cfg(test)]
mod tests {
    use super::{Horizon, level_bending_rad, sum};
    use crate::curve::{coefficients, lobatto};
    use crate::sky::air::Ray;
    use crate::units::{Angle, Metres};

    fn horizons() -> impl Iterator<Item = Horizon> {
        let heights = [0.0, 1.0, 1_524.0, 5_000.0, 9_144.0, 10_900.0, 11_000.0];
        heights.into_iter().map(|m| Horizon::raised(Metres(m)).unwrap())
    }

    /// Heights from just above a horizon to the ceiling, denser near the horizon.
    fn heights_above(horizon: &Horizon) -> impl Iterator<Item = f64> {
        let low = horizon.height().0;
        (1..1000).map(move |i| low + (20_000.0 - low) * (f64::from(i) / 1000.0).powi(2))
    }

    fn limit_deg(horizon: &Horizon, height_m: f64) -> f64 {
        horizon.sun_centre_limit(Metres(height_m), Angle::ZERO).0.deg()
    }

    #[test]
    fn the_series_are_the_ray_trace_to_a_ten_thousandth_of_a_degree() {
        for horizon in horizons() {
            let graze_m = horizon.height().0;
            let ray = Ray::level_at(graze_m);
            let down_rad = ray.bending_to_space_rad(graze_m);
            for height_m in heights_above(&horizon) {
                let bent_rad = down_rad + ray.bending_rad(graze_m, height_m);
                let off = horizon.refraction(Metres(height_m)).deg() - bent_rad.to_degrees();
                assert!(off.abs() < 1e-4, "{graze_m} from {height_m}: {off}");
            }
            for i in 0..100 {
                let height_m = -500.0 + (graze_m + 500.0) * f64::from(i) / 100.0;
                let off = limit_deg(&horizon, height_m) + level_bending_rad(height_m).to_degrees();
                assert!(off.abs() < 1e-6, "{graze_m} from {height_m}: {off}");
                assert_eq!(horizon.dip(Metres(height_m)), Angle::ZERO);
            }
        }
    }

    #[test]
    fn the_limit_falls_steadily_and_no_faster_than_promised() {
        for horizon in horizons() {
            for height_m in heights_above(&horizon) {
                let step_m = 1e-3 * (height_m - horizon.height().0);
                let fall = (limit_deg(&horizon, height_m) - limit_deg(&horizon, height_m + step_m)) / step_m;
                let bound = horizon.steepness_deg_per_m(Metres(height_m));
                assert!(fall > 0.0 && fall <= bound, "{:?} from {height_m}: {fall}", horizon.height());
            }
        }
    }

    #[test]
    fn the_limit_is_of_one_piece_where_the_observer_climbs_through_the_horizon() {
        for horizon in horizons() {
            let at_m = horizon.height().0;
            let (below, above) = (limit_deg(&horizon, at_m - 1e-9), limit_deg(&horizon, at_m + 1e-9));
            assert!((below - above).abs() < 2e-6, "{at_m}: {below} {above}");
        }
    }

    #[test]
    fn a_horizon_that_cannot_be_is_refused() {
        for m in [-1.0, 11_001.0, f64::NAN, f64::INFINITY] {
            assert!(Horizon::raised(Metres(m)).is_err());
        }
        assert_eq!(Horizon::raised(Metres(0.0)), Ok(Horizon::clear_sea()));
    }

    #[test]
    fn a_climb_cut_where_its_height_quadruples_is_short_pieces() {
        for horizon in horizons() {
            for low_m in [10.0, 40.0, 160.0, 640.0, 2_250.0] {
                let height_m = |x: f64| horizon.height().0 + low_m * (2.5 + 1.5 * x);
                let limit_rad = |x: f64| limit_deg(&horizon, height_m(x)).to_radians();
                let values: Vec<f64> = lobatto(16).map(limit_rad).collect();
                let mut terms = [0.0; 16];
                coefficients(&values, &mut terms);
                for i in 0..=100 {
                    let x = f64::from(i) / 50.0 - 1.0;
                    let off = sum(&terms, x) - limit_rad(x);
                    assert!(off.abs() < 5e-11, "{:?} from {low_m} at {x}: {off}", horizon.height());
                }
            }
        }
    }
}
