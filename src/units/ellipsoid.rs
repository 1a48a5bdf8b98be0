//! The WGS84 reference ellipsoid.

/// The WGS84 ellipsoid: World Geodetic System 1984, NGA.STND.0036, table 3.1.
pub mod wgs84 {
    /// Semi-major axis in metres.
    pub const A_M: f64 = 6_378_137.0;
    /// Flattening.
    pub const F: f64 = 1.0 / 298.257_223_563;
    /// Semi-minor axis in metres.
    pub const B_M: f64 = A_M * (1.0 - F);
    /// First eccentricity squared.
    pub const E2: f64 = F * (2.0 - F);
    /// Second eccentricity squared.
    pub const EP2: f64 = E2 / (1.0 - E2);
    /// The smallest radius of curvature in metres: the meridian's at the equator.
    pub const R_MIN_M: f64 = A_M * (1.0 - E2);
}
