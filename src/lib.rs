//! What light a flight meets: daylight, twilight and darkness along a long-haul or polar route.
//!
//! The rooms stand in walking order: each imports only from those above it.

pub mod units;
pub mod curve;
pub mod places;
pub mod intake;
pub mod path;
pub mod sky;
pub mod light;
pub mod day;
pub mod label;
mod brief;
mod sun_brief;
pub mod charts;
pub mod reports;

pub use brief::{
    AlternateView, Brief, DeckView, ExposureView, Glare, Inside, MoonView, Polar, RunwaySun, RunwayView,
    brief,
};
pub use sun_brief::{PlaceDay, SunBrief, sun_brief};
