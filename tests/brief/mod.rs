//! What a brief says of runways and alternates.

mod alternates;
mod refused;
mod runways;

use gloamline::intake::flight_file;
use gloamline::sky::Sky;
use gloamline::{Brief, brief};

/// The brief of a flight file's text.
fn briefed(text: &str) -> Brief {
    brief(flight_file(text, "flight.toml").unwrap(), &Sky::default()).unwrap()
}
