//! One number or four at once: formulas along a path are written for either, so that an instant and a batch of
//! instants cannot disagree by more than rounding.

use std::ops::{Add, Div, Mul, Sub};
use wide::f64x4;

/// Four numbers at once.
pub type Four = f64x4;

/// A number, or four side by side.
pub trait Lane:
    Copy + Add<Output = Self> + Sub<Output = Self> + Mul<Output = Self> + Div<Output = Self>
{
    /// The same number in every place.
    fn splat(x: f64) -> Self;
    /// The square root.
    #[must_use]
    fn root(self) -> Self;
    /// Sine and cosine of an angle in radians.
    #[must_use]
    fn sine_cosine(self) -> (Self, Self);
}

impl Lane for f64 {
    #[inline]
    fn splat(x: f64) -> Self {
        x
    }

    #[inline]
    fn root(self) -> Self {
        self.sqrt()
    }

    #[inline]
    fn sine_cosine(self) -> (Self, Self) {
        self.sin_cos()
    }
}

impl Lane for Four {
    #[inline]
    fn splat(x: f64) -> Self {
        Self::splat(x)
    }

    #[inline]
    fn root(self) -> Self {
        self.sqrt()
    }

    #[inline]
    fn sine_cosine(self) -> (Self, Self) {
        self.sin_cos()
    }
}

#[cfg(test)]
mod tests {
    use super::{Four, Lane};

    #[test]
    fn four_sines_at_once_are_the_sines_of_four() {
        for i in -200..200 {
            let x = f64::from(i) * 0.137;
            let (sin, cos) = Four::splat(x).sine_cosine();
            let (s, c) = x.sin_cos();
            assert!((sin.to_array()[2] - s).abs() < 1e-15 && (cos.to_array()[1] - c).abs() < 1e-15, "{x}");
        }
    }
}
