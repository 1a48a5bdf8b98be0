//! Flight files, coordinate notations and recorded tracks, turned into a [`Flight`] or into [`Tracks`].
//!
//! Is given text and the name of its source; never opens a file. What needs a geodesic (speeds, a flight of no length)
//! is checked where the geodesics are, in `path`.

mod brightness;
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
mod track;

pub use ahead::{Alternate, LowSunLimits, StationAir};
pub use block::OnBlock;
pub use brightness::{Brightness, BrightnessError, lux_levels};
pub use draft::Origin;
pub use file::{flight_file, flight_file_with_fixes};
pub use fixes::Fixes;
pub use flight::{ClimbRates, Flight, PolarLimits, Recorded, RoutePoint, Stop};
pub use inline::{Inline, date_argument, inline_flight, instant_argument, place_argument};
pub use pace::{Mark, Pace, ProfilePoint};
pub use problem::{IntakeError, Problem};
pub use track::{
    Bridge, Columns, InputKind, Repair, Repairs, Track, TrackOptions, TrackPoint, TrackProblem, Tracks,
    UnitReason, kind_of, plain, tracks,
};
