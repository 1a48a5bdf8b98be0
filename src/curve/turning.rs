//! All turning points of a curve, by a certificate instead of by sampling.
//!
//! # Derivation
//! In scaled time x, with z the bandwidth times half the duration, every derivative of the curve is bounded:
//! |p″| ≤ B₂ and |p‴| ≤ B₃. Two bounds are at hand and the smaller is used:
//! * from the physics. On a geodesic, with the normal's derivatives taken in the moving frame of the curve,
//!   |n′| ≤ v/R, |n″| ≤ 1.001 (v/R)² and |n‴| ≤ 1.07 (v/R)³, R the smallest radius of curvature: the first is the
//!   largest principal curvature, the others add the derivatives of the curvature, which the flattening makes small
//!   (|d(1/M)/ds| ≤ 0.0101/M²). With a body turning at ω the product rule gives |s⁽ᵏ⁾| ≤ c (ω + v/R)ᵏ;
//!   B₂ = 1.01 z², B₃ = 1.10 z³ cover the parallax and the body's own drift as well, and small constants cover the
//!   interpolation error's derivatives (at most ε n⁴/3 and ε n⁶/15);
//! * from the coefficients, `|p″| ≤ Σ |c_k| k²(k²−1)/3` and `|p‴| ≤ Σ |c_k| k²(k²−1)(k²−4)/15` (the derivatives of `T_k` are
//!   largest at the ends), which is far smaller for an observer who hardly moves against the Sun, at a pole say.
//!
//! On a cell of width w with end slopes a, b of one sign, |a| + |b| > B₂ w excludes a zero of the slope: to reach zero
//! and come back the slope would have to change by |a| + |b|. At a midpoint m, |p′(m)| > |p″(m)| w/2 + B₃ w²/8 excludes
//! one too, and |p″(m)| > B₃ w/2 makes the slope monotone, so that signs decide. A cell that none of these settles is
//! halved. Halving ends where the curve cannot move by more than [`FLAT`] within the cell: nothing higher than that
//! is lost there.

use super::polynomial::Curve;

/// The most turning points kept: a series of 24 terms has no more than 22.
const MOST: usize = 32;
/// A rise or fall below this (0.0001″ of elevation) is flat.
const FLAT: f64 = 5e-10;

/// The turning points of a curve, in order of time.
#[derive(Debug, Clone, Copy)]
pub struct TurningPoints {
    x: [f64; MOST],
    len: usize,
}

impl TurningPoints {
    /// Their places in scaled time.
    pub(super) fn xs(&self) -> &[f64] {
        &self.x[..self.len]
    }

    fn push(&mut self, x: f64) {
        if self.len < MOST {
            self.x[self.len] = x;
            self.len += 1;
        }
    }
}

/// Bounds on the second and third derivative by x.
#[derive(Clone, Copy)]
struct Bounds {
    second: f64,
    third: f64,
}

impl Bounds {
    fn of(curve: &Curve) -> Self {
        let z = curve.turn_rad;
        let (mut second, mut third) = (0.0, 0.0);
        for (k, c) in curve.coefficients[..curve.len()].iter().enumerate().skip(2) {
            let k2 = (k * k) as f64;
            second += c.abs() * k2 * (k2 - 1.0) / 3.0;
            third += c.abs() * k2 * (k2 - 1.0) * (k2 - 4.0) / 15.0;
        }
        Self { second: second.min(1.01 * z * z + 1e-3), third: third.min(1.10 * z * z * z + 5e-2) }
    }
}

/// A cell with the slopes at its ends.
#[derive(Clone, Copy)]
struct Cell {
    from: f64,
    to: f64,
    slope_from: f64,
    slope_to: f64,
}

impl Curve {
    /// Every interior turning point, proven complete as the module says.
    ///
    /// # Accuracy
    /// Value at a turning point within 1e−11; a rise or fall of less than 5e−10 may be left out.
    pub fn turning_points(&self) -> TurningPoints {
        let mut found = TurningPoints { x: [0.0; MOST], len: 0 };
        let swing = self.swing();
        // a function that gives no number would be halved without end
        if swing < FLAT || !swing.is_finite() {
            return found;
        }
        let bounds = Bounds::of(self);
        let nodes = self.nodes();
        for i in 1..nodes.len() {
            let cell = Cell {
                from: nodes[i - 1],
                to: nodes[i],
                slope_from: self.slopes[i - 1],
                slope_to: self.slopes[i],
            };
            self.settle(cell, bounds, &mut found);
        }
        found
    }

    /// A bound on how far the curve leaves its mean.
    fn swing(&self) -> f64 {
        2.0 * self.coefficients[1..self.len()].iter().map(|c| c.abs()).sum::<f64>()
    }

    /// The time and value of each of `points`.
    pub fn turns(&self, points: &TurningPoints) -> impl Iterator<Item = (f64, f64)> {
        points.xs().iter().map(|&x| (self.time_s(x), self.value_x(x)))
    }

    /// Finds the turning points within a cell: none, one, or those of its halves.
    fn settle(&self, cell: Cell, bounds: Bounds, found: &mut TurningPoints) {
        let width = cell.to - cell.from;
        let same_sign = cell.slope_from * cell.slope_to > 0.0;
        if same_sign && cell.slope_from.abs() + cell.slope_to.abs() > bounds.second * width {
            return;
        }
        let mid = f64::midpoint(cell.from, cell.to);
        let [_, slope, bend] = self.jet_x(mid);
        if slope.abs() > bend.abs() * width / 2.0 + bounds.third * width * width / 8.0 {
            return;
        }
        if bend.abs() > bounds.third * width / 2.0 {
            if !same_sign {
                found.push(self.slope_root(cell));
            }
            return;
        }
        if width * (slope.abs() + bounds.second * width / 2.0) < FLAT {
            if !same_sign {
                found.push(mid);
            }
            return;
        }
        self.settle(Cell { to: mid, slope_to: slope, ..cell }, bounds, found);
        self.settle(Cell { from: mid, slope_from: slope, ..cell }, bounds, found);
    }

    /// The zero of the slope in a cell where the slope is monotone and changes sign: Newton, kept inside by bisection.
    fn slope_root(&self, cell: Cell) -> f64 {
        let (mut low, mut high) = (cell.from, cell.to);
        let mut x = low + (high - low) * cell.slope_from / (cell.slope_from - cell.slope_to);
        if !x.is_finite() {
            return low;
        }
        for _ in 0..60 {
            let [_, slope, bend] = self.jet_x(x);
            if slope * cell.slope_from > 0.0 {
                low = x;
            } else {
                high = x;
            }
            let next = x - slope / bend;
            let next = if next >= low && next <= high { next } else { f64::midpoint(low, high) };
            // the next step would be of the order of this one's square, and the value errs by that squared again
            if (next - x).abs() < 1e-4 {
                return next;
            }
            x = next;
        }
        x
    }
}

#[cfg(test)]
mod tests {
    use crate::curve::{Bandwidth, Curve};
    use crate::units::Four;

    fn turns(f: impl Fn(f64) -> f64, band: f64, end: f64) -> Vec<(f64, f64)> {
        let band = Bandwidth { body_rad_s: band, path_rad_s: 0.0 };
        let each = |t: Four| Four::from(t.to_array().map(&f));
        let curve = Curve::through(0.0, end, band, each).unwrap();
        curve.turns(&curve.turning_points()).collect()
    }

    #[test]
    fn a_sine_turns_at_its_quarter_waves() {
        let found = turns(|t| (0.5 * t + 0.3).sin(), 0.5, 10.0);
        let half_pi = std::f64::consts::FRAC_PI_2;
        assert_eq!(found.len(), 2);
        assert!((found[0].0 - (half_pi - 0.3) / 0.5).abs() < 1e-6);
        assert!((found[1].0 - (3.0 * half_pi - 0.3) / 0.5).abs() < 1e-6);
    }

    #[test]
    fn two_turns_a_hair_apart_are_both_found() {
        // a tilted sine whose slope dips below zero for an instant: extremes 2√(2·1e−6) rad of phase apart
        let found = turns(|t| 0.4 * (t.sin() + t * (1.0 - 1e-6)) / 4.0, 1.0, 6.0);
        assert_eq!(found.len(), 2, "{found:?}");
        assert!(found[1].0 - found[0].0 < 0.003);
    }

    #[test]
    fn a_function_that_gives_no_number_ends_the_search() {
        assert!(turns(|_| f64::NAN, 7.3e-5, 40_000.0).is_empty());
        assert!(turns(|t| if t > 1e4 { f64::INFINITY } else { 0.5 }, 7.3e-5, 40_000.0).is_empty());
    }

    #[test]
    fn a_sun_that_stands_still_never_turns() {
        assert!(turns(|_| 0.25, 7.3e-5, 40_000.0).is_empty());
    }
}
