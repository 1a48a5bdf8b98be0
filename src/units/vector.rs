//! Vectors in the Earth-fixed frame: x towards 0°N 0°E, y towards 0°N 90°E, z towards the north pole.

/// A vector's three Earth-fixed components.
pub type Vector = [f64; 3];

/// The scalar product.
#[inline]
pub fn dot(a: Vector, b: Vector) -> f64 {
    a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
}
