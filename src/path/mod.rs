//! Where a flight is: positions, tracks and heights at any instant, and the latitudes and meridians it crosses.
//!
//! Knows nothing of the Sun.

mod geodesic;
mod leg;
mod fly;
mod circle;
mod extent;

pub use circle::{Circle, CircleCrossing, CircleName, Heading, PolarAreas, circles};
pub use fly::{FlightError, LONGEST_S, Path, Position, fly};
pub use geodesic::{Line, LinePoint};
pub use leg::Leg;
