//! The Sun's almanac quantities for an instant, straight from the model.

use super::table::Sky;
use super::{model, sun::SunPlace, time};
use crate::units::{Angle, Instant};

/// The Sun's almanac quantities at an instant.
#[derive(Debug, Clone, Copy)]
pub struct Almanac {
    /// Apparent place: declination, Greenwich hour angle, distance, semidiameter, subsolar point.
    pub sun: SunPlace,
    /// Apparent right ascension from the true equinox of date, 0° to 360°.
    pub right_ascension: Angle,
    /// Apparent less mean solar time, in seconds: positive when the sundial is ahead of the clock.
    pub equation_of_time_s: f64,
    /// True obliquity of the ecliptic.
    pub true_obliquity: Angle,
    /// Apparent geocentric ecliptic longitude of date, 0° to 360°.
    pub ecliptic_longitude: Angle,
}

impl Sky {
    /// The almanac quantities at an instant.
    ///
    /// # Accuracy
    /// That of the sky's tables for the place of the Sun; the other angles come from the model itself.
    pub fn almanac(&self, instant: Instant) -> Almanac {
        let tt = time::tt_days(instant);
        let sun = self.sun_at(instant);
        let [x, y, _] = model::apparent(tt).direction;
        let right_ascension =
            Angle::from_rad(y.atan2(x) - model::equation_of_origins_rad(tt)).turned_positive();
        Almanac {
            sun,
            right_ascension,
            equation_of_time_s: self.equation_of_time_s(instant, &sun),
            true_obliquity: Angle::from_rad(model::true_obliquity_rad(tt)),
            ecliptic_longitude: Angle::from_rad(model::apparent_longitude_rad(tt)).turned_positive(),
        }
    }

    /// True obliquity of the ecliptic at an instant: what the polar circles and tropics are drawn by.
    pub fn true_obliquity(&self, instant: Instant) -> Angle {
        Angle::from_rad(model::true_obliquity_rad(time::tt_days(instant)))
    }

    /// Hour angle of the true Sun less that of a Sun that keeps UT1 exactly.
    fn equation_of_time_s(&self, instant: Instant, sun: &SunPlace) -> f64 {
        let mean = Angle::from_rad((instant.seconds() + self.dut1_s()) * super::MEAN_SUN_RAD_S);
        // 86,400 s of time to the turn
        (sun.gha() - mean).turned_about_zero().deg() * 240.0
    }
}
