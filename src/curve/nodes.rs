//! Chebyshev–Lobatto nodes and the two matrices that turn values at them into coefficients and slopes.

use std::sync::OnceLock;

/// The most nodes that one curve has.
pub const MAX_NODES: usize = 24;

/// The numbers of nodes on offer.
pub(super) const SIZES: [usize; 6] = [4, 8, 12, 16, 20, MAX_NODES];

/// The nodes cos(πj/(n−1)) in rising order, from −1 to 1.
///
/// # Source
/// L. N. Trefethen, *Approximation Theory and Approximation Practice*, SIAM 2013, ch. 2 (there in falling order).
pub fn lobatto(n: usize) -> impl Iterator<Item = f64> {
    let last = (n - 1) as f64;
    // the sine of an angle that is odd about the middle makes the nodes exactly symmetric
    (0..n).map(move |j| (std::f64::consts::FRAC_PI_2 * (2.0 * j as f64 - last) / last).sin())
}

/// The Chebyshev coefficients of the polynomial through `values` at [`lobatto`]'s nodes, written to `out`.
///
/// # Source
/// Trefethen (2013), ch. 3: the discrete cosine sum over the nodes with halved ends.
pub fn coefficients(values: &[f64], out: &mut [f64]) {
    let n = values.len();
    for (k, c) in out.iter_mut().enumerate().take(n) {
        *c = values.iter().enumerate().map(|(j, v)| coefficient_weight(n, k, j) * v).sum();
    }
}

/// What the value at node j contributes to coefficient k of n.
fn coefficient_weight(n: usize, k: usize, j: usize) -> f64 {
    let last = n - 1;
    let halves = |i: usize| if i == 0 || i == last { 0.5 } else { 1.0 };
    // node j in rising order is node last − j of the falling order that the cosine sum is written for
    let turns = (k * (last - j)) % (2 * last);
    2.0 / last as f64 * halves(j) * halves(k) * (std::f64::consts::PI * turns as f64 / last as f64).cos()
}

/// What is computed once for each number of nodes.
#[derive(Debug)]
pub(super) struct Table {
    pub(super) nodes: Vec<f64>,
    /// Row k gives coefficient k.
    pub(super) to_coefficients: Vec<f64>,
    /// Row i gives the slope at node i.
    pub(super) to_slopes: Vec<f64>,
}

static TABLES: [OnceLock<Table>; SIZES.len()] = [const { OnceLock::new() }; SIZES.len()];

/// The table of one of [`SIZES`], by its place in that list.
pub(super) fn table(size: usize) -> &'static Table {
    TABLES[size].get_or_init(|| Table::new(SIZES[size]))
}

impl Table {
    fn new(n: usize) -> Self {
        let nodes: Vec<f64> = lobatto(n).collect();
        let to_coefficients = (0..n * n).map(|i| coefficient_weight(n, i / n, i % n)).collect();
        Self { to_slopes: differentiation(&nodes), nodes, to_coefficients }
    }
}

/// The differentiation matrix on Chebyshev–Lobatto nodes.
///
/// # Source
/// L. N. Trefethen, *Spectral Methods in MATLAB*, SIAM 2000, theorem 7, with the diagonal by negative row sums.
fn differentiation(nodes: &[f64]) -> Vec<f64> {
    let n = nodes.len();
    let end = |i: usize| if i == 0 || i == n - 1 { 2.0 } else { 1.0 };
    let mut d = vec![0.0; n * n];
    for i in 0..n {
        for j in (0..n).filter(|&j| j != i) {
            let sign = if (i + j) % 2 == 0 { 1.0 } else { -1.0 };
            d[i * n + j] = end(i) / end(j) * sign / (nodes[i] - nodes[j]);
        }
        d[i * n + i] = -d[i * n..(i + 1) * n].iter().sum::<f64>();
    }
    d
}

#[cfg(test)]
mod tests {
    use super::{coefficients, lobatto};

    #[test]
    fn a_chebyshev_polynomial_has_one_coefficient() {
        let values: Vec<f64> = lobatto(9).map(|x| 4.0 * x * x * x - 3.0 * x).collect();
        let mut c = [0.0; 9];
        coefficients(&values, &mut c);
        for (k, c) in c.iter().enumerate() {
            assert!((c - if k == 3 { 1.0 } else { 0.0 }).abs() < 1e-15, "{k}: {c}");
        }
    }
}
