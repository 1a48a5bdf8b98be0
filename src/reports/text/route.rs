//! How far north and south, how high and low, and which circles are crossed.

use super::at;
use super::format::{place, sun};
use crate::Brief;
use crate::label::clock::second;
use crate::label::words::{circle_name, heading_key};
use crate::light::Sample;
use crate::reports::table::columns;

pub(super) fn extremes(brief: &Brief) -> String {
    let row = |what: &str, sample: &Sample| {
        [what.to_string(), second(at(brief, sample.at_s)), place(sample.position.place), sun(sample)]
    };
    let point = |what: &str, passed: crate::path::Passed| {
        [what.to_string(), second(at(brief, passed.at_s)), place(passed.place), String::new()]
    };
    let rows = [
        row("highest Sun", &brief.at_highest),
        row("lowest Sun", &brief.at_lowest),
        point("northernmost", brief.northernmost),
        point("southernmost", brief.southernmost),
    ];
    format!("Extremes\n{}", columns(&rows))
}

pub(super) fn circles(brief: &Brief) -> String {
    if brief.circles.is_empty() {
        return String::new();
    }
    let row = |crossing: &crate::path::CircleCrossing| {
        [
            second(at(brief, crossing.at_s)),
            circle_name(crossing.circle.name).to_string(),
            heading_key(crossing.heading).to_string(),
            place(crossing.place),
        ]
    };
    format!("Circles\n{}", columns(&brief.circles.iter().map(row).collect::<Vec<_>>()))
}
