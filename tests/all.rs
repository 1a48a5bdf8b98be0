//! The table of contents of everything that is checked against the outside.

#![allow(clippy::unwrap_used, reason = "also what a test calls may panic")]

mod house;
mod tables;
mod curve;
mod places;
mod intake;
mod sky;
mod path;
mod light;
mod day;
mod brief;
mod charts;
mod reports;
mod cli;
