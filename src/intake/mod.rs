//! Flight files and coordinate notations, turned into a [`Flight`].
//!
//! Is given text and the name of its source; never opens a file. What needs a geodesic (speeds, a flight of no length)
//! is checked where the geodesics are, in `path`.

mod flight;
mod ahead;
mod problem;
mod near;
mod place;
mod fixes;
mod gazetteer;
mod route;
mod time;
mod pace;
mod block;
mod draft;
mod file;
mod inline;

pub use ahead::{Alternate, LowSunLimits, StationAir};
pub use block::OnBlock;
pub use draft::Origin;
pub use file::{flight_file, flight_file_with_fixes};
pub use fixes::Fixes;
pub use flight::{ClimbRates, Flight, PolarLimits, RoutePoint, Stop};
pub use inline::{Inline, date_argument, inline_flight, instant_argument, place_argument};
pub use pace::{Mark, Pace, ProfilePoint};
pub use problem::{IntakeError, Problem};
