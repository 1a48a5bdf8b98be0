//! How many nodes a curve needs: a bound on the interpolation error, derived and not measured.
//!
//! # Derivation
//! Let s(t) = n(t)·u(t): n the ellipsoid's unit normal along a geodesic flown at speed v, u the direction of a body that
//! turns about the axis at rate ω. Write x ∈ [−1, 1] for the time scaled to the leg of duration T. If s is analytic
//! with |s| ≤ M inside the Bernstein ellipse of parameter ρ (semi-axes (ρ ± 1/ρ)/2 in x), then interpolation at n
//! Chebyshev–Lobatto nodes errs by at most 4 M ρ^−(n−1) / (ρ − 1) (Trefethen 2013, theorem 8.2).
//!
//! On the auxiliary sphere of a geodesic with equatorial azimuth α₀ (Karney 2013, J. Geodesy 87:43, eqs. 7–8, with
//! k² = e′² cos² α₀) the normal is, *exactly*,
//! n = R(ψ) (cos σ, sin α₀ sin σ, cos α₀ sin σ / (1 − f)) / √(1 + k² sin² σ),
//! where R(ψ) turns about the axis by ψ = const − f sin α₀ ∫ (2 − f) / (1 + (1 − f) √(1 + k² sin² σ)) dσ and
//! dσ/dt = v / (b √(1 + k² sin² σ)). For complex σ with |Im σ| ≤ Y = 2.5: |k² sin² σ| ≤ q = e′² cosh² Y = 0.254, so
//! * the square root stays away from 0 by √(1 − q), all of it is analytic, and |dσ/dt| ≤ 1.158 v/b;
//! * |Im ψ| ≤ 2 f Y, which stretches n by at most e^0.017;
//! * the vector (cos σ, …) is no longer than √cosh(2 Im σ) / (1 − f) ≤ e^|Im σ| / (1 − f);
//! * u is stretched by at most e^(ω |Im t|); its slow drift (a degree a day) adds less than 1 %.
//!
//! Together `M ≤ 1.2 e^(h z)` with h = (ρ − 1/ρ)/2, `z = z_s + 1.158 z_p`, `z_s = ωT/2`, `z_p = vT/(2b)`, for each ρ with
//! `1.158 z_p h ≤ Y`. The bound below takes the best such ρ.
//!
//! What is searched has the parallax in it, which turns twice as fast: (n·u − n·P/d)/√(1 + x) with
//! x = P·P/d² − 2 u·P/d and |P|/d ≤ 4.4e−5 on the real axis. In the strip |x| ≤ 1.1e−4 e^(h z), below 1/2 as long as
//! h z ≤ 8, and |(1 + x)^(−1/2) − 1| ≤ 1.42 |x|: the difference from n·u is at most 3e−4 e^(2 h z), a second function with
//! an ellipse of its own, whose error is added. A body as near as the Moon has a bound of its own, in
//! [`super::near`].

use super::nodes::{MAX_NODES, SIZES};

/// How fast a curve can turn: the two rates whose sum bounds its spectrum.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Bandwidth {
    /// The body's turning rate about the Earth's axis in rad/s.
    pub body_rad_s: f64,
    /// The rate at which the vertical turns as the observer moves, in rad/s: speed over the smallest radius.
    pub path_rad_s: f64,
}

impl Bandwidth {
    /// The sum of both rates in rad/s.
    pub fn total_rad_s(self) -> f64 {
        self.body_rad_s + self.path_rad_s
    }
}

/// Largest growth of the arc's rate within the strip, 1/√(1 − q).
pub(super) const STRIP_SPEED: f64 = 1.158;
/// Half-width of the strip of complex arc in which the geodesic is used.
pub(super) const STRIP: f64 = 2.5;
/// The factors of M that do not grow with the ellipse.
const CONSTANT: f64 = 4.0 * 1.2;
/// The largest exponent up to which a far body's parallax is expanded.
const LOG_E_FAR: f64 = 8.0;
/// The factor of its square in the parallax's bound, with that of the interpolation.
const CONSTANT_FAR: f64 = 4.0 * 3e-4;
/// What is asked of a curve: an interpolation error in sine of elevation below 0.0004″.
pub(super) const TARGET: f64 = 2e-9;

/// A bound on the interpolation error, in the curve's own unit, of a unit-bounded curve of `seconds` on `n` nodes.
pub fn error_bound(n: usize, band: Bandwidth, seconds: f64) -> f64 {
    let half = seconds / 2.0;
    let path = (STRIP_SPEED * band.path_rad_s * half).max(1e-12);
    let z = (band.body_rad_s * half + path).max(1e-9);
    let strip = STRIP / path;
    on_ellipse(n, z, strip, CONSTANT) + on_ellipse(n, 2.0 * z, strip.min(LOG_E_FAR / z), CONSTANT_FAR)
}

/// `constant` e^(h z) ρ^−(n−1) / (ρ − 1) on the best ellipse whose h is no larger than `h_cap`.
pub(super) fn on_ellipse(n: usize, z: f64, h_cap: f64, constant: f64) -> f64 {
    let degree = (n - 1) as f64;
    // the best ρ solves z (1 + ρ⁻²)/2 = degree/ρ; the strip caps h, and 1e6 keeps the powers finite
    let ratio = degree / z;
    let best = if ratio > 1.0 { ratio + (ratio * ratio - 1.0).sqrt() } else { 1.0 };
    let rho = best.min(h_cap + (h_cap * h_cap + 1.0).sqrt()).min(1e6);
    if rho <= 1.01 {
        return f64::INFINITY;
    }
    let h = (rho - 1.0 / rho) / 2.0;
    constant * (h * z - degree * rho.ln()).exp() / (rho - 1.0)
}

/// The place in the list of sizes of the fewest nodes that keep the error below 2e−9 (0.0004″ of elevation) over
/// `seconds`, or nothing where the interval has to be cut.
pub fn nodes_for(band: Bandwidth, seconds: f64) -> Option<usize> {
    debug_assert!(SIZES[SIZES.len() - 1] == MAX_NODES);
    SIZES.iter().position(|&n| error_bound(n, band, seconds) <= TARGET)
}

#[cfg(test)]
mod tests {
    use super::{Bandwidth, SIZES, error_bound, nodes_for};

    const JET: Bandwidth = Bandwidth { body_rad_s: 7.29e-5, path_rad_s: 250.0 / 6_356_752.0 };

    #[test]
    fn more_nodes_and_shorter_legs_err_less() {
        for hours in [1.0, 6.0, 12.0] {
            assert!(error_bound(20, JET, hours * 3600.0) < error_bound(12, JET, hours * 3600.0));
            assert!(error_bound(16, JET, hours * 3600.0) < error_bound(16, JET, 1.3 * hours * 3600.0));
        }
    }

    #[test]
    fn a_long_haul_flight_is_one_piece_and_a_day_in_the_air_is_not() {
        assert_eq!(nodes_for(JET, 60.0).map(|i| SIZES[i]), Some(4));
        assert_eq!(nodes_for(JET, 1800.0).map(|i| SIZES[i]), Some(8));
        assert_eq!(nodes_for(JET, 4.0 * 3600.0).map(|i| SIZES[i]), Some(12));
        assert_eq!(nodes_for(JET, 12.0 * 3600.0).map(|i| SIZES[i]), Some(20));
        assert_eq!(nodes_for(JET, 17.0 * 3600.0).map(|i| SIZES[i]), Some(24));
        assert_eq!(nodes_for(JET, 30.0 * 3600.0), None);
    }
}
