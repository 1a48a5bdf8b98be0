//! The bound for a body so near that its parallax counts: the Moon.
//!
//! # Derivation
//! What is searched is n·(u − p)/r with p = P/d, the observer's place over the body's distance, |p| ≤ π ≤ 1/55, and
//! r = √(1 − 2 p·u + p·p). Unlike the Sun's, this square root has zeros near the real axis (an observer at γ from the
//! body's foot: cos γ = (1 + π²)/2π, so |Im γ| = 4.0), and the ellipse must stay away from them. In the strip of
//! [`super::bound`] |P| is stretched by 1.23 more than n (`1/√(1 − e² n_z²)`). Write `E = e^(h (z_s + 1.158 z_p))`; then
//! |r² − 1| ≤ 2 π · 1.23 · 1.2 E + (1.23 · 1.2 π E)², which is below 0.89 as long as E ≤ 14, so that |1/r| ≤ 3.0 and
//! M ≤ 3.0 (1.2 E + 0.03) ≤ 3.7 E. The body's own motion against the stars, up to 16° a day for the Moon, is counted in its
//! turning rate, and the slow change of d lies within 1/55 (the Moon comes no nearer than 55.8 radii).
//!
//! The same expansion bounds the derivatives for [`Curve::turning_points`](super::Curve::turning_points):
//! `1/r = Σ πᵏ P_k(cos γ)`, a term of degree k + 1 turns k + 1 times as fast, and so the second derivative grows by at most
//! Σ πᵏ (k + 1)² ≤ 1.08 and the third by Σ πᵏ (k + 1)³ ≤ 1.16. Counting the turn 1.06 times covers both.

use super::bound::{Bandwidth, STRIP, STRIP_SPEED, TARGET, on_ellipse};
use super::nodes::SIZES;

/// The logarithm of the largest E.
const LOG_E: f64 = 2.639;
/// The factor of E in M, with that of the interpolation.
const CONSTANT: f64 = 4.0 * 3.7;
/// How much faster the parallax lets a curve turn, as far as derivatives go.
const TURN: f64 = 1.06;

/// How fast the curve of a near body can turn.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Near(Bandwidth);

impl Near {
    /// A body whose distance is at least 55 of the Earth's radii; its rate is that of the Earth's turn and of its own
    /// motion together.
    pub fn new(band: Bandwidth) -> Self {
        Self(band)
    }

    /// A bound on the interpolation error of a curve of `seconds` on `n` nodes.
    pub fn error_bound(self, n: usize, seconds: f64) -> f64 {
        let half = seconds / 2.0;
        let path = (STRIP_SPEED * self.0.path_rad_s * half).max(1e-12);
        let z = (self.0.body_rad_s * half + path).max(1e-9);
        on_ellipse(n, z, (LOG_E / z).min(STRIP / path), CONSTANT)
    }

    /// As [`nodes_for`](super::nodes_for).
    pub(super) fn size_for(self, seconds: f64) -> Option<usize> {
        SIZES.iter().position(|&n| self.error_bound(n, seconds) <= TARGET)
    }

    /// The rate that bounds the derivatives.
    pub(super) fn turn_rad_s(self) -> f64 {
        TURN * self.0.total_rad_s()
    }
}

#[cfg(test)]
mod tests {
    use super::{Bandwidth, Near, TARGET};
    use crate::curve::{Curve, error_bound};
    use crate::units::Four;

    const JET: Bandwidth = Bandwidth { body_rad_s: 7.615e-5, path_rad_s: 250.0 / 6_356_752.0 };

    #[test]
    fn a_near_body_needs_no_fewer_nodes_than_a_far_one() {
        for hours in [0.5, 3.0, 9.0, 20.0] {
            for n in [8, 12, 16, 20, 24] {
                let seconds = hours * 3600.0;
                let (near, far) = (Near::new(JET).error_bound(n, seconds), error_bound(n, JET, seconds));
                assert!(near > TARGET || far <= TARGET, "{hours} h on {n} nodes: {near}, {far}");
            }
        }
        assert_eq!(Near::new(JET).size_for(3600.0 * 20.0), None);
        assert!(Near::new(JET).size_for(3600.0 * 9.0).is_some());
    }

    #[test]
    fn the_bound_holds_for_a_body_at_fifty_five_radii_on_each_number_of_nodes() {
        let parallax: f64 = 1.0 / 55.0;
        // on the equator under a body on the equator: the elevation's sine in closed form
        let sine = |t: f64| {
            let c = (1.0 * t + 0.4).cos();
            (c - parallax) / (1.0 - 2.0 * parallax * c + parallax * parallax).sqrt()
        };
        let near = Near::new(Bandwidth { body_rad_s: 1.0, path_rad_s: 0.0 });
        for seconds in [0.3, 1.0, 2.0, 3.0, 4.0] {
            let each = |t: Four| Four::from(t.to_array().map(sine));
            let curve = Curve::through_near((0.0, seconds), near, each).unwrap();
            let bound = near.error_bound(curve.len(), seconds);
            for i in 0..=200 {
                let t = seconds * f64::from(i) / 200.0;
                let off = (curve.value(t) - sine(t)).abs();
                assert!(off <= bound + 1e-15 && bound <= 2e-9, "{seconds} {t}: {off:e} of {bound:e}");
            }
        }
    }

    #[test]
    fn a_near_body_turns_where_its_elevation_does() {
        let parallax: f64 = 1.0 / 55.0;
        let sine = |t: f64| {
            let c = t.cos();
            (c - parallax) / (1.0 - 2.0 * parallax * c + parallax * parallax).sqrt()
        };
        let near = Near::new(Bandwidth { body_rad_s: 1.0, path_rad_s: 0.0 });
        let each = |t: Four| Four::from(t.to_array().map(sine));
        let curve = Curve::through_near((1.5, 5.0), near, each).unwrap();
        let turns: Vec<(f64, f64)> = curve.turns(&curve.turning_points()).collect();
        assert_eq!(turns.len(), 1);
        assert!((turns[0].0 - std::f64::consts::PI).abs() < 1e-5 && (turns[0].1 + 1.0).abs() < 1e-9);
    }
}
