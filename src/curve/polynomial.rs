//! A smooth function of time on one interval, held as the polynomial through its values at Chebyshev–Lobatto nodes.

use super::nodes::{MAX_NODES, SIZES, table};
use super::{Bandwidth, Near, nodes_for};
use crate::units::Four;

/// One smooth piece of a function of time.
#[derive(Debug, Clone)]
pub struct Curve {
    mid_s: f64,
    half_s: f64,
    /// Which of the table's sizes.
    pub(super) size: usize,
    pub(super) values: [f64; MAX_NODES],
    pub(super) slopes: [f64; MAX_NODES],
    pub(super) coefficients: [f64; MAX_NODES],
    /// Bandwidth times half the duration: how many radians the fastest term turns.
    pub(super) turn_rad: f64,
}

impl Curve {
    /// The curve through `f` on [`begin_s`, `end_s`], or nothing if the interval is too long for one piece; `f` is asked
    /// for four times at once.
    ///
    /// # Accuracy
    /// Within 2e−9 of an `f` that the derivation in [`super::error_bound`] holds for.
    pub fn through(begin_s: f64, end_s: f64, band: Bandwidth, f: impl Fn(Four) -> Four) -> Option<Self> {
        let size = nodes_for(band, end_s - begin_s)?;
        Some(Self::sampled((begin_s, end_s), size, band.total_rad_s(), f))
    }

    /// The same for a body whose parallax counts.
    ///
    /// # Accuracy
    /// Within 2e−9 of an `f` that the derivation in `curve/near.rs` holds for.
    pub fn through_near(span: (f64, f64), near: Near, f: impl Fn(Four) -> Four) -> Option<Self> {
        let size = near.size_for(span.1 - span.0)?;
        Some(Self::sampled(span, size, near.turn_rad_s(), f))
    }

    /// The same for an `f` that has more in it than the derivation knows: on so many nodes at least, and its turning points
    /// are bounded by its own coefficients alone. How well so many nodes hold it is for the caller to know.
    pub fn through_at_least(
        least: usize,
        (begin_s, end_s): (f64, f64),
        band: Bandwidth,
        f: impl Fn(Four) -> Four,
    ) -> Option<Self> {
        let enough = SIZES.iter().position(|&size| size >= least).unwrap_or(SIZES.len() - 1);
        let size = nodes_for(band, end_s - begin_s)?.max(enough);
        Some(Self::sampled((begin_s, end_s), size, f64::INFINITY, f))
    }

    fn sampled((begin_s, end_s): (f64, f64), size: usize, rate_rad_s: f64, f: impl Fn(Four) -> Four) -> Self {
        let (mid_s, half_s) = (f64::midpoint(begin_s, end_s), (end_s - begin_s) / 2.0);
        let mut values = [0.0; MAX_NODES];
        // every size is a multiple of four
        for (values, nodes) in
            values.as_chunks_mut::<4>().0.iter_mut().zip(table(size).nodes.as_chunks::<4>().0)
        {
            *values = f(Four::splat(mid_s) + Four::splat(half_s) * Four::from(*nodes)).to_array();
        }
        Self::from_values((mid_s, half_s), size, rate_rad_s, values)
    }

    fn from_values(
        (mid_s, half_s): (f64, f64),
        size: usize,
        rate_rad_s: f64,
        values: [f64; MAX_NODES],
    ) -> Self {
        let n = SIZES[size];
        let table = table(size);
        let mut coefficients = [0.0; MAX_NODES];
        let mut slopes = [0.0; MAX_NODES];
        multiply(&table.to_coefficients, &values[..n], &mut coefficients);
        multiply(&table.to_slopes, &values[..n], &mut slopes);
        Self { mid_s, half_s, size, values, slopes, coefficients, turn_rad: rate_rad_s * half_s }
    }

    /// The number of nodes.
    pub fn len(&self) -> usize {
        SIZES[self.size]
    }

    /// Whether the curve has no nodes: never.
    pub fn is_empty(&self) -> bool {
        false
    }

    /// The function's value at a time in seconds.
    pub fn value(&self, t_s: f64) -> f64 {
        self.value_x((t_s - self.mid_s) / self.half_s)
    }

    /// Where the curve begins, in seconds.
    pub fn begin_s(&self) -> f64 {
        self.time_s(-1.0)
    }

    /// Where it ends.
    pub fn end_s(&self) -> f64 {
        self.time_s(1.0)
    }

    /// The value at the first node.
    pub fn first(&self) -> f64 {
        self.values[0]
    }

    /// The value at the last node.
    pub fn last(&self) -> f64 {
        self.values[self.len() - 1]
    }

    /// Clenshaw's sum at x ∈ [−1, 1].
    pub(super) fn value_x(&self, x: f64) -> f64 {
        let (mut b1, mut b2) = (0.0, 0.0);
        let twice = 2.0 * x;
        for &c in self.coefficients[1..self.len()].iter().rev() {
            (b1, b2) = (twice * b1 + (c - b2), b1);
        }
        x * b1 + (self.coefficients[0] - b2)
    }

    /// Value and derivative by x.
    pub(super) fn value_and_slope_x(&self, x: f64) -> [f64; 2] {
        let (mut b1, mut b2, mut d1, mut d2) = (0.0, 0.0, 0.0, 0.0);
        let twice = 2.0 * x;
        for &c in self.coefficients[1..self.len()].iter().rev() {
            (d1, d2) = (twice * d1 + (2.0 * b1 - d2), d1);
            (b1, b2) = (twice * b1 + (c - b2), b1);
        }
        [x * b1 + (self.coefficients[0] - b2), x * d1 + (b1 - d2)]
    }

    /// Value, first and second derivative by x: Clenshaw's sum differentiated twice.
    pub(super) fn jet_x(&self, x: f64) -> [f64; 3] {
        let (mut b1, mut b2, mut d1, mut d2, mut e1, mut e2) = (0.0, 0.0, 0.0, 0.0, 0.0, 0.0);
        let twice = 2.0 * x;
        for &c in self.coefficients[1..self.len()].iter().rev() {
            (e1, e2) = (twice * e1 + (4.0 * d1 - e2), e1);
            (d1, d2) = (twice * d1 + (2.0 * b1 - d2), d1);
            (b1, b2) = (twice * b1 + (c - b2), b1);
        }
        [x * b1 + (self.coefficients[0] - b2), x * d1 + (b1 - d2), x * e1 + (2.0 * d1 - e2)]
    }

    /// The time in seconds at x ∈ [−1, 1].
    pub(super) fn time_s(&self, x: f64) -> f64 {
        self.mid_s + self.half_s * x
    }

    /// A time in seconds as x ∈ [−1, 1].
    pub(super) fn scaled(&self, t_s: f64) -> f64 {
        ((t_s - self.mid_s) / self.half_s).clamp(-1.0, 1.0)
    }

    /// The node positions.
    pub(super) fn nodes(&self) -> &'static [f64] {
        &table(self.size).nodes
    }
}

/// `out` = `matrix` × `v`, rows as long as `v`.
fn multiply(matrix: &[f64], v: &[f64], out: &mut [f64; MAX_NODES]) {
    for (out, row) in out.iter_mut().zip(matrix.chunks_exact(v.len())) {
        let mut sums = [0.0; 4];
        for (a, b) in row.chunks_exact(4).zip(v.chunks_exact(4)) {
            for i in 0..4 {
                sums[i] += a[i] * b[i];
            }
        }
        *out = (sums[0] + sums[1]) + (sums[2] + sums[3]);
    }
}

#[cfg(test)]
mod tests {
    use super::{Bandwidth, Curve};

    #[test]
    fn a_curve_is_its_function_with_its_slopes() {
        let band = Bandwidth { body_rad_s: 1.1, path_rad_s: 0.0 };
        let curve = Curve::through(1.0, 5.0, band, |t| (t * 1.1).sin()).unwrap();
        for i in 0..=40 {
            let x = f64::from(i) / 20.0 - 1.0;
            let t = curve.time_s(x);
            let [value, slope, bend] = curve.jet_x(x);
            assert!((curve.value(t) - (1.1 * t).sin()).abs() < 2e-9);
            assert!((value - (1.1 * t).sin()).abs() < 2e-9);
            assert!((slope - 2.2 * (1.1 * t).cos()).abs() < 2e-7);
            assert!((bend + 4.84 * (1.1 * t).sin()).abs() < 2e-5);
        }
    }
}
