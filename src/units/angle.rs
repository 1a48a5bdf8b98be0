//! An angle, so that degrees and radians cannot be confused across a face.

/// A plane angle.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd, Default)]
pub struct Angle {
    rad: f64,
}

impl Angle {
    /// The zero angle.
    pub const ZERO: Self = Self { rad: 0.0 };

    /// An angle from degrees.
    pub const fn from_deg(deg: f64) -> Self {
        Self { rad: deg * (std::f64::consts::PI / 180.0) }
    }

    /// An angle from radians.
    pub const fn from_rad(rad: f64) -> Self {
        Self { rad }
    }

    /// An angle from minutes of arc.
    pub const fn from_arcmin(arcmin: f64) -> Self {
        Self::from_deg(arcmin / 60.0)
    }

    /// An angle from seconds of arc.
    pub const fn from_arcsec(arcsec: f64) -> Self {
        Self::from_deg(arcsec / 3600.0)
    }

    /// The angle in degrees.
    pub const fn deg(self) -> f64 {
        self.rad * (180.0 / std::f64::consts::PI)
    }

    /// The angle in radians.
    pub const fn rad(self) -> f64 {
        self.rad
    }

    /// The angle in seconds of arc.
    pub const fn arcsec(self) -> f64 {
        self.deg() * 3600.0
    }

    /// The same direction in [0°, 360°).
    #[must_use]
    pub fn turned_positive(self) -> Self {
        let turn = std::f64::consts::TAU;
        let rad = self.rad.rem_euclid(turn);
        // a tiny negative angle rounds up to a full turn, which is direction 0
        Self { rad: if rad >= turn { 0.0 } else { rad } }
    }

    /// The same direction in (−180°, 180°].
    #[must_use]
    pub fn turned_about_zero(self) -> Self {
        let rad = self.turned_positive().rad;
        Self { rad: if rad > std::f64::consts::PI { rad - std::f64::consts::TAU } else { rad } }
    }
}

impl std::ops::Neg for Angle {
    type Output = Self;
    fn neg(self) -> Self {
        Self { rad: -self.rad }
    }
}

impl std::ops::Add for Angle {
    type Output = Self;
    fn add(self, other: Self) -> Self {
        Self { rad: self.rad + other.rad }
    }
}

impl std::ops::Sub for Angle {
    type Output = Self;
    fn sub(self, other: Self) -> Self {
        Self { rad: self.rad - other.rad }
    }
}

#[cfg(test)]
mod tests {
    use super::Angle;

    #[test]
    fn a_turn_brings_a_direction_back_into_its_range() {
        assert!((Angle::from_deg(-10.0).turned_positive().deg() - 350.0).abs() < 1e-12);
        assert!((Angle::from_deg(190.0).turned_about_zero().deg() + 170.0).abs() < 1e-12);
        assert_eq!(Angle::from_rad(-1e-18).turned_positive().rad(), 0.0);
        assert!((Angle::from_deg(180.0).turned_about_zero().deg() - 180.0).abs() < 1e-12);
    }
}
