//! The quantities that cross the rooms' faces: angles, places, lengths and instants.
//!
//! Knows nothing of flights or of the sky.

mod angle;
mod ellipsoid;
mod place;
mod metres;
mod instant;
mod lane;
mod vector;
mod ut1;

pub use angle::Angle;
pub use ellipsoid::wgs84;
pub use instant::{Instant, YEARS};
pub use lane::{Four, Lane};
pub use metres::Metres;
pub use place::{Latitude, Longitude, Place, PlaceError};
pub use ut1::{DUT1_BOUND_S, Dut1, Dut1Error};
pub use vector::{Vector, cross, dot};
