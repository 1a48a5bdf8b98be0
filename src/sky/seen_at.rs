//! The geometric elevation that is seen at one apparent elevation, for an observer whose height changes.
//!
//! Knows only the standard air.

use super::air::TROPOPAUSE_M;
use super::{ApparentElevation, GeometricElevation, Horizon, geometric_aloft};
use crate::curve::{coefficients, lobatto};
use crate::units::{Angle, Metres};

/// Rays below the tropopause, where the kink of the standard air above is noticed as a root, and above it.
const BELOW: usize = 28;
const ABOVE: usize = 12;

/// One apparent elevation, not below level, from every height: series through a few rays, by the root of the depth below
/// the tropopause and by the height above it.
///
/// # Accuracy
/// Within 1e−7 rad (0.02″) of [`geometric_aloft`].
#[derive(Debug, Clone)]
pub struct SeenAt {
    below: [f64; BELOW],
    above: [f64; ABOVE],
}

/// The root of the depth from the tropopause down to the lowest height that is answered for.
fn deepest() -> f64 {
    (TROPOPAUSE_M - Horizon::HEIGHTS.start().0).sqrt()
}

impl SeenAt {
    /// The height at which the elevation, by height, has a kink: from below it falls like a root for a level ray.
    pub const KINK: Metres = Metres(TROPOPAUSE_M);

    /// Traces the rays.
    pub fn new(apparent: ApparentElevation) -> Self {
        let from = |m: f64| geometric_aloft(apparent, Metres(m)).0.rad();
        let ceiling_m = Horizon::HEIGHTS.end().0;
        Self {
            below: series(|x| from(TROPOPAUSE_M - (deepest() * (x + 1.0) / 2.0).powi(2))),
            above: series(|x| from(TROPOPAUSE_M + (ceiling_m - TROPOPAUSE_M) * (x + 1.0) / 2.0)),
        }
    }

    /// The geometric elevation from a height; beyond those that are answered for, from the nearest that is.
    pub fn geometric(&self, height: Metres) -> GeometricElevation {
        let height_m = height.0.clamp(Horizon::HEIGHTS.start().0, Horizon::HEIGHTS.end().0);
        let rad = if height_m <= TROPOPAUSE_M {
            sum(&self.below, 2.0 * (TROPOPAUSE_M - height_m).sqrt() / deepest() - 1.0)
        } else {
            let share = (height_m - TROPOPAUSE_M) / (Horizon::HEIGHTS.end().0 - TROPOPAUSE_M);
            sum(&self.above, 2.0 * share - 1.0)
        };
        GeometricElevation(Angle::from_rad(rad))
    }
}

/// The Chebyshev series of a function on [−1, 1].
fn series<const N: usize>(f: impl Fn(f64) -> f64) -> [f64; N] {
    let mut values = [0.0; N];
    for (value, x) in values.iter_mut().zip(lobatto(N)) {
        *value = f(x);
    }
    let mut terms = [0.0; N];
    coefficients(&values, &mut terms);
    terms
}

/// Clenshaw's sum.
fn sum(terms: &[f64], x: f64) -> f64 {
    let (mut b1, mut b2) = (0.0, 0.0);
    for &c in terms[1..].iter().rev() {
        (b1, b2) = (2.0 * x * b1 + (c - b2), b1);
    }
    x * b1 + (terms[0] - b2)
}

#[cfg(test)]
mod tests {
    use super::SeenAt;
    use crate::sky::{ApparentElevation, geometric_aloft};
    use crate::units::{Angle, Metres};

    #[test]
    fn a_few_rays_stand_for_all_heights() {
        for deg in [0.0, 0.3, 1.0, 3.0, 15.0, 60.0] {
            let apparent = ApparentElevation(Angle::from_deg(deg));
            let seen = SeenAt::new(apparent);
            for m in (-5..=190).map(|i| f64::from(i) * 100.0 + 7.0) {
                let off = seen.geometric(Metres(m)).0 - geometric_aloft(apparent, Metres(m)).0;
                assert!(off.rad().abs() < 1e-7, "{deg}° from {m} m: {off:?}");
            }
        }
    }
}
