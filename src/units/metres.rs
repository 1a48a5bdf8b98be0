//! Lengths: heights and distances, with the two units aviation counts in.

/// A length in metres.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd, Default)]
pub struct Metres(pub f64);

/// One international foot, exactly (ICAO Annex 5, table 3-3).
const FOOT_M: f64 = 0.3048;
/// One international nautical mile, exactly (ICAO Annex 5, table 3-3).
const NAUTICAL_MILE_M: f64 = 1852.0;

impl Metres {
    /// A length from feet.
    pub const fn from_feet(feet: f64) -> Self {
        Self(feet * FOOT_M)
    }

    /// A length from nautical miles.
    pub const fn from_nautical_miles(miles: f64) -> Self {
        Self(miles * NAUTICAL_MILE_M)
    }

    /// The length in feet.
    pub const fn feet(self) -> f64 {
        self.0 / FOOT_M
    }

    /// The length in nautical miles.
    pub const fn nautical_miles(self) -> f64 {
        self.0 / NAUTICAL_MILE_M
    }
}
