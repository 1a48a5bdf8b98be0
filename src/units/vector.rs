//! Vectors in the Earth-fixed frame: x towards 0°N 0°E, y towards 0°N 90°E, z towards the north pole.

use super::Lane;

/// A vector's three Earth-fixed components.
pub type Vector = [f64; 3];

/// The scalar product.
#[inline]
pub fn dot<L: Lane>(a: [L; 3], b: [L; 3]) -> L {
    a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
}

/// The vector product.
#[inline]
pub fn cross<L: Lane>(a: [L; 3], b: [L; 3]) -> [L; 3] {
    [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]]
}
