//! What light a flight meets: daylight, twilight and darkness along a long-haul or polar route.

pub mod units;
pub mod curve;
pub mod places;
pub mod intake;
pub mod path;
pub mod sky;
pub mod light;
