//! Civil days at a place: when they begin on its own clock, and what the Sun and the Moon do in each.
//!
//! Knows nothing of flights, and nothing of how a day is told or drawn.

mod clock;
mod transit;
mod moon;
mod polar;
mod range;
mod days;
mod field;

pub use clock::{CivilDay, Clock};
pub use days::{DayHere, PlaceDays, place_days};
pub use field::{Column, Field, Gap, Interval, field};
pub use moon::MoonDay;
pub use polar::{Polar, PolarKind};
pub use range::{DayRange, LONGEST_DAYS, RangeError};
