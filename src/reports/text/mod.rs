//! A brief that a crew reads in half a minute.

pub(super) mod format;
mod head;
mod beneath;
mod aloft;
mod moon;
mod brightness;
mod ahead;
mod alternates;
mod route;
mod recording;

use super::table::wrapped;
use crate::Brief;
use crate::label::one_line;
use crate::units::Instant;

/// How wide a paragraph is set.
const WIDTH: usize = 100;

/// The brief as plain text.
pub fn text(brief: &Brief) -> String {
    let parts = [
        head::headline(brief),
        head::ends(brief),
        beneath::segments(brief),
        beneath::crossings(brief),
        beneath::touches(brief),
        aloft::deck(brief),
        moon::moon(brief),
        brightness::brightness(brief),
        ahead::low_sun(brief),
        ahead::runways(brief),
        alternates::alternates(brief),
        route::extremes(brief),
        route::circles(brief),
        recording::recording(brief),
        warnings(brief),
        cautions(brief),
    ];
    parts.into_iter().filter(|part| !part.is_empty()).collect::<Vec<_>>().join("\n")
}

fn at(brief: &Brief, at_s: f64) -> Instant {
    brief.path.takeoff.after_s(at_s)
}

/// What was to be said of how the flight was read.
fn warnings(brief: &Brief) -> String {
    let told = &brief.flight.warnings;
    let lines: String = told.iter().map(|warning| wrapped("  - ", &one_line(warning), WIDTH)).collect();
    if lines.is_empty() { lines } else { format!("Warnings\n{lines}") }
}

fn cautions(brief: &Brief) -> String {
    let lines: String =
        super::caution::cautions(brief).iter().map(|caution| wrapped("  - ", caution, WIDTH)).collect();
    format!("Cautions\n{lines}")
}
