//! The Sun's place.

mod places;
mod seasons;
mod handbooks;
