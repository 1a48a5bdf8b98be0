//! What light a flight meets: daylight, twilight and darkness along a long-haul or polar route.

pub mod units;
pub mod charts;
