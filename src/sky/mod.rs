//! The Sun and the Moon at an instant and as seen from a place, the horizon, and the air between. It has never heard of aeroplanes.
//!
//! Everything here is geometric (airless) unless a name says otherwise.

mod air;
mod time;
mod model;
mod piece;
mod table;
mod sun;
mod moon;
mod observer;
mod horizon;
mod refraction;
mod seen_at;
mod almanac;
mod illuminance;
mod year;

pub use air::{Air, standard_air};
pub use almanac::Almanac;
pub use horizon::{Horizon, HorizonError};
pub use illuminance::{Lux, moonlight, sunlight};
pub use moon::{MoonPlace, Phase};
pub use observer::{Body, GeometricElevation, azimuth, elevation, level_part, sine_of_elevation};
pub use refraction::{
    ApparentElevation, GroundAir, HORIZONTAL_REFRACTION, apparent_aloft, apparent_from_ground,
    geometric_aloft,
};
pub use seen_at::SeenAt;
pub use sun::SunPlace;
pub use table::{MoonWindow, Sky, SunWindow};
pub use year::{YearEvent, YearMoment, year_moments};

/// The rate at which the mean Sun turns about the Earth's axis, in rad/s.
pub const MEAN_SUN_RAD_S: f64 = std::f64::consts::TAU / 86_400.0;
