//! The Sun's apparent geocentric place in the Earth-fixed frame, and what follows from it alone.

use super::observer::Body;
use crate::units::{Angle, Lane, Place};

/// One astronomical unit in metres (IAU 2012 resolution B2).
pub(super) const AU_M: f64 = 149_597_870_700.0;
/// The Sun's semidiameter at one astronomical unit, 15′59.63″ (Auwers 1891, the almanacs' value).
const SEMIDIAMETER_AT_AU: Angle = Angle::from_arcsec(959.63);

/// The Sun's apparent geocentric place at an instant, or at four.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct SunPlace<L = f64> {
    /// Unit vector from the Earth's centre, Earth-fixed.
    pub direction: [L; 3],
    /// Distance in astronomical units.
    pub distance_au: L,
}

impl<L: Lane> Body<L> for SunPlace<L> {
    #[inline]
    fn direction(&self) -> [L; 3] {
        self.direction
    }

    #[inline]
    fn distance_au(&self) -> L {
        self.distance_au
    }
}

impl SunPlace {
    /// Declination, north positive.
    pub fn declination(&self) -> Angle {
        let [x, y, z] = self.direction;
        Angle::from_rad(z.atan2(x.hypot(y)))
    }

    /// Greenwich hour angle, westward from the Greenwich meridian, 0° to 360°.
    pub fn gha(&self) -> Angle {
        Angle::from_rad((-self.direction[1]).atan2(self.direction[0])).turned_positive()
    }

    /// The angle that the Sun's radius fills.
    pub fn semidiameter(&self) -> Angle {
        Angle::from_rad((SEMIDIAMETER_AT_AU.rad().sin() / self.distance_au).asin())
    }

    /// Horizontal parallax at the equator: the angle that the Earth's equatorial radius fills, seen from the Sun.
    pub fn horizontal_parallax(&self) -> Angle {
        Angle::from_rad((crate::units::wgs84::A_M / (self.distance_au * AU_M)).asin())
    }

    /// The place where the Sun is overhead.
    ///
    /// # Accuracy
    /// The normal there is parallel to the geocentric direction: 0.05″ (2 m), the parallax on an ellipsoid.
    pub fn subsolar(&self) -> Place {
        Place::from_normal(self.direction)
    }
}
