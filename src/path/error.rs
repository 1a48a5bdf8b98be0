//! Why a flight that was read without complaint cannot be flown: what only the geodesics tell.

use super::fly::FASTEST_KT;
use crate::units::YEARS;

/// The longest time in the air that is taken for a flight.
pub(super) const LONGEST_H: f64 = 36.0;

/// Why a flight cannot be flown as it stands.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum FlightError {
    /// It goes nowhere.
    #[error(
        "the flight from {from} to {to} has no length: both are the same place and no waypoint lies between"
    )]
    NoLength {
        /// Where it begins.
        from: String,
        /// Where it ends.
        to: String,
    },
    /// It would need an impossible speed.
    #[error(
        "from {from} to {to} is {distance_nm:.0} NM in {minutes:.1} min, a ground speed of {speed_kt:.0} kt: outside 0 kt to {FASTEST_KT:.0} kt"
    )]
    TooFast {
        /// Where the stretch begins.
        from: String,
        /// Where it ends.
        to: String,
        /// Its length in nautical miles.
        distance_nm: f64,
        /// Its duration in minutes.
        minutes: f64,
        /// The speed in knots.
        speed_kt: f64,
    },
    /// Nothing tells how fast it is.
    #[error("neither a landing nor a speed tells when the flight ends")]
    Endless,
    /// Its speeds and its landing disagree.
    #[error(
        "the speeds make {by_speed_min:.0} min in the air, the landing {by_landing_min:.0} min: more than 1 % apart, so leave \
         one of them out"
    )]
    SpeedConflict {
        /// Minutes by the speeds.
        by_speed_min: f64,
        /// Minutes from take-off to landing.
        by_landing_min: f64,
    },
    /// Its speeds make it longer than any flight.
    #[error("the speeds make {hours:.1} h in the air, outside 0 h to {LONGEST_H} h")]
    TooLong {
        /// Hours in the air.
        hours: f64,
    },
    /// Its speeds, its taxi or an alternate lead out of the years served.
    #[error("the flight leads out of the years {first} to {last}", first = YEARS.start(), last = YEARS.end())]
    Years,
    /// A point of the profile is not reached after the one before.
    #[error("profile point {number} is not reached after the one before it")]
    ProfileOrder {
        /// Counted from 1.
        number: usize,
    },
    /// A point of the profile lies beyond the landing.
    #[error("profile point {number} lies beyond the landing")]
    ProfileTooLong {
        /// Counted from 1.
        number: usize,
    },
    /// On blocks before landing, or long after.
    #[error("on blocks is {minutes:.0} min after the landing that the speeds make, outside 0 min to 720 min")]
    OnBlock {
        /// Minutes from landing.
        minutes: f64,
    },
}
