//! Places on the Earth's surface: geodetic latitude and longitude on the WGS84 ellipsoid.

use super::{Angle, Vector};

/// A latitude or longitude that does not exist.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
pub enum PlaceError {
    /// Not a finite latitude between the poles.
    #[error("latitude {0}° is outside −90° to 90°")]
    Latitude(f64),
    /// Not a finite longitude within a turn.
    #[error("longitude {0}° is outside −180° to 360°")]
    Longitude(f64),
}

/// A geodetic latitude, positive north, −90° to 90°.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd)]
pub struct Latitude(Angle);

/// A longitude, positive east, held in [−180°, 180°).
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd)]
pub struct Longitude(Angle);

impl Latitude {
    /// A latitude from degrees north.
    ///
    /// # Errors
    /// Outside −90° to 90°, or not a number.
    pub fn from_deg(deg: f64) -> Result<Self, PlaceError> {
        if (-90.0..=90.0).contains(&deg) {
            Ok(Self(Angle::from_deg(deg)))
        } else {
            Err(PlaceError::Latitude(deg))
        }
    }

    /// Degrees north.
    pub const fn deg(self) -> f64 {
        self.0.deg()
    }

    /// The latitude as an angle.
    pub const fn angle(self) -> Angle {
        self.0
    }
}

impl Longitude {
    /// A longitude from degrees east; 180 to 360 is taken as west.
    ///
    /// # Errors
    /// Outside −180° to 360°, or not a number.
    pub fn from_deg(deg: f64) -> Result<Self, PlaceError> {
        if !(-180.0..=360.0).contains(&deg) {
            return Err(PlaceError::Longitude(deg));
        }
        Ok(Self(Angle::from_deg(if deg >= 180.0 { deg - 360.0 } else { deg })))
    }

    /// Degrees east.
    pub const fn deg(self) -> f64 {
        self.0.deg()
    }

    /// The longitude as an angle.
    pub const fn angle(self) -> Angle {
        self.0
    }
}

/// A place on the surface of the WGS84 ellipsoid.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Place {
    /// Geodetic latitude.
    pub lat: Latitude,
    /// Longitude.
    pub lon: Longitude,
}

impl Place {
    /// A place from degrees north and east.
    ///
    /// # Errors
    /// A latitude or longitude that does not exist.
    pub fn from_deg(lat: f64, lon: f64) -> Result<Self, PlaceError> {
        Ok(Self { lat: Latitude::from_deg(lat)?, lon: Longitude::from_deg(lon)? })
    }

    /// The place whose outward ellipsoid normal is the given unit vector.
    pub fn from_normal(n: Vector) -> Self {
        let lat = n[2].atan2(n[0].hypot(n[1]));
        let lon = n[1].atan2(n[0]);
        let lon = if lon >= std::f64::consts::PI { -std::f64::consts::PI } else { lon };
        Self { lat: Latitude(Angle::from_rad(lat)), lon: Longitude(Angle::from_rad(lon)) }
    }

    /// The outward unit normal of the ellipsoid here, Earth-fixed.
    pub fn normal(self) -> Vector {
        let (sin_lat, cos_lat) = self.lat.0.rad().sin_cos();
        let (sin_lon, cos_lon) = self.lon.0.rad().sin_cos();
        // 90° in radians is not exactly representable: a pole has no longitude
        let cos_lat = if self.lat.deg().abs() == 90.0 { 0.0 } else { cos_lat };
        [cos_lat * cos_lon, cos_lat * sin_lon, sin_lat]
    }
}

#[cfg(test)]
mod tests {
    use super::{Longitude, Place};

    #[test]
    fn a_place_is_where_its_normal_points() {
        for (lat, lon) in [(0.0, 0.0), (78.0, -20.0), (-60.5, 179.9), (90.0, 0.0)] {
            let back = Place::from_normal(Place::from_deg(lat, lon).unwrap().normal());
            assert!((back.lat.deg() - lat).abs() < 1e-12 && (back.lon.deg() - lon).abs() < 1e-12);
        }
    }

    #[test]
    fn a_place_that_does_not_exist_is_refused() {
        assert!(Place::from_deg(95.0, 0.0).is_err());
        assert!(Place::from_deg(f64::NAN, 0.0).is_err());
        assert!(Place::from_deg(0.0, 400.0).is_err());
        assert!((Longitude::from_deg(180.0).unwrap().deg() + 180.0).abs() < 1e-12);
    }
}
