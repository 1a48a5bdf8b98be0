//! Where a flight is: positions, tracks and heights at any instant, and the latitudes and meridians it crosses.
//!
//! Knows nothing of the Sun.

mod geodesic;
mod leg;
mod height;
mod error;
mod pace;
mod profile;
mod fly;
mod circle;
mod extent;
mod track;

pub use circle::{Circle, CircleCrossing, CircleName, Heading, circles};
pub use error::FlightError;
pub use extent::Passed;
pub use fly::{Path, Position, fly};
pub use geodesic::{Frame, Line, LinePoint};
pub use height::Heights;
pub use leg::Leg;
pub use track::TrackPoint;
