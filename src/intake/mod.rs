//! Flight files and coordinate notations, turned into a [`Flight`].
//!
//! Is given text and the name of its source; never opens a file.

mod flight;

pub use flight::{Flight, RoutePoint, Stop};
