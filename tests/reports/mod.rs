//! The reports against what they were made from, the committed ones, and the README's commands.

mod clocks;
mod fresh;
mod readme;
mod json;
mod geo;
mod geo_rules;
mod kml;
