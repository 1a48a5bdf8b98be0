//! The Sun, the Moon and the horizon.

mod places;
mod seasons;
mod handbooks;
mod horizon;
mod moon;
