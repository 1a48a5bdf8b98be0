//! The table of contents of everything that is checked against the outside.

mod tables;
mod places;
mod sky;
mod path;
mod light;
mod reports;
mod charts;
