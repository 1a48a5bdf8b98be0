//! One piece of the tabulated sky: a body's direction and distance over some days as Chebyshev series.
//!
//! Does not know which body, nor how the frame turns.

use crate::curve::{coefficients, lobatto};
use crate::units::Lane;

/// Four series of N terms: three components and the distance in au.
#[derive(Debug)]
pub(super) struct Piece<const N: usize> {
    terms: [[f64; 4]; N],
}

impl<const N: usize> Piece<N> {
    /// The series through a function of TT days, within a reach either side of a middle.
    pub(super) fn fitted(mid_tt: f64, reach_days: f64, f: impl Fn(f64) -> [f64; 4]) -> Self {
        let samples: Vec<[f64; 4]> = lobatto(N).map(|x| f(mid_tt + reach_days * x)).collect();
        let mut terms = [[0.0; 4]; N];
        for component in 0..4 {
            let values: [f64; N] = std::array::from_fn(|j| samples[j][component]);
            let mut c = [0.0; N];
            coefficients(&values, &mut c);
            for (term, c) in terms.iter_mut().zip(c) {
                term[component] = c;
            }
        }
        Self { terms }
    }

    /// Clenshaw's sum for the four series at once, at a place from −1 to 1.
    #[inline]
    pub(super) fn at<L: Lane>(&self, x: L) -> [L; 4] {
        let (mut b1, mut b2) = ([L::splat(0.0); 4], [L::splat(0.0); 4]);
        let twice = L::splat(2.0) * x;
        for term in self.terms[1..].iter().rev() {
            let b0 = std::array::from_fn(|i| twice * b1[i] + (L::splat(term[i]) - b2[i]));
            (b1, b2) = (b0, b1);
        }
        std::array::from_fn(|i| x * b1[i] + (L::splat(self.terms[0][i]) - b2[i]))
    }
}

#[cfg(test)]
mod tests {
    use super::Piece;

    #[test]
    fn a_piece_is_the_function_it_was_fitted_to() {
        let f = |t: f64| [t.sin(), t.cos(), 0.1 * t, 1.0];
        let piece = Piece::<14>::fitted(5.0, 1.5, f);
        for i in 0..=30 {
            let x = f64::from(i) / 15.0 - 1.0;
            for (found, wanted) in piece.at(x).into_iter().zip(f(5.0 + 1.5 * x)) {
                assert!((found - wanted).abs() < 1e-12);
            }
        }
    }
}
