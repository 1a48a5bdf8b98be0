//! The Sun at an instant and as seen from a place. It has never heard of aeroplanes.
//!
//! Everything here is geometric (airless) unless a name says otherwise.

mod air;
mod time;
mod model;
mod table;
mod sun;
mod observer;
mod horizon;
mod refraction;
mod almanac;
mod year;

pub use air::{Air, standard_air};
pub use almanac::Almanac;
pub use horizon::{Horizon, HorizonError};
pub use observer::{GeometricElevation, azimuth, elevation, sine_of_elevation};
pub use refraction::{ApparentElevation, GroundAir, apparent_aloft, apparent_from_ground};
pub use sun::SunPlace;
pub use table::{Sky, SunWindow};
pub use year::{YearEvent, YearMoment, year_moments};

/// The rate at which the mean Sun turns about the Earth's axis, in rad/s.
pub const MEAN_SUN_RAD_S: f64 = std::f64::consts::TAU / 86_400.0;
