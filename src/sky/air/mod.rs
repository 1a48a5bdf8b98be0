//! The air that light passes on its way to an observer: the standard atmosphere and rays bent by it.
//!
//! Knows no weather: a real atmosphere differs, most of all in the lowest hundred metres.

mod isa;
mod ray;

pub(super) use isa::TROPOPAUSE_M;
pub use isa::{Air, standard_air};
pub(super) use ray::Ray;
