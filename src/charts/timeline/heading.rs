//! The words above and below the plot, and what a screen reader says of it.
//!
//! Knows nothing of the plot itself.

use super::layout::{CAUTION_Y, MARGIN, RIGHT};
use super::style::{MUTED, SMALL, fitted, letters};
use crate::Brief;
use crate::charts::canvas::{Across, Canvas, Level, Point, TextStyle, measure};
use crate::intake::Stop;
use crate::label::clock::{date, duration, second};
use crate::label::one_line;
use crate::label::words::{circle_name, event_key, heading_key, spoken, state_key};
use crate::units::Metres;
use std::fmt::Write as _;

const CAUTION: &str = "Computed light for a clear sea-level horizon beneath the aircraft; it judges neither fitness nor \
                       legality: the operator's manual, the authority and its published tables decide.";
/// More crossings than this are not read out.
const MOST_READ: usize = 200;

/// The picture's title: the flight, its ends and its date.
pub(super) fn title(brief: &Brief) -> String {
    let flight = &brief.flight;
    let ends = format!("{} → {}", one_line(&flight.from.label), one_line(&flight.to.label));
    format!("{}, {ends}, {}", one_line(&flight.name), date(flight.takeoff))
}

/// What the picture shows, in sentences.
pub(super) fn description(brief: &Brief) -> String {
    let at = |at_s: f64| second(brief.path.takeoff.after_s(at_s));
    let mut said = format!(
        "The Sun's elevation beneath the aircraft from take-off at {} UTC to landing at {} UTC. ",
        at(0.0),
        at(brief.path.airborne_s)
    );
    let _ = write!(said, "It begins in {}. ", spoken(state_key(brief.light.at_takeoff)));
    for crossing in brief.light.crossings.iter().take(MOST_READ) {
        let event = spoken(event_key(crossing.limit.event(crossing.direction)));
        let _ = write!(said, "{event} at {} UTC. ", at(crossing.at_s));
    }
    for crossing in brief.circles.iter().take(MOST_READ) {
        let (circle, heading) = (circle_name(crossing.circle.name), heading_key(crossing.heading));
        let _ = write!(said, "{circle} {heading} at {} UTC. ", at(crossing.at_s));
    }
    said + CAUTION
}

fn end_name(stop: &Stop) -> String {
    stop.name.as_ref().map_or_else(|| stop.label.clone(), |name| format!("{} {name}", stop.label))
}

/// 12345 as `12,345`.
fn thousands(value: f64) -> String {
    let digits = format!("{value:.0}");
    let mut out = String::new();
    for (i, c) in digits.chars().enumerate() {
        if i > 0 && (digits.len() - i) % 3 == 0 {
            out.push(',');
        }
        out.push(c);
    }
    out
}

/// The flight's name and date, its ends, its length.
pub(super) fn draw(canvas: &mut Canvas, brief: &Brief) {
    let flight = &brief.flight;
    let day = letters(22.0).anchored(Across::End, Level::Baseline);
    let date = date(flight.takeoff);
    canvas.text(&date, Point::new(RIGHT, 48.0), &day);
    let room = RIGHT - MARGIN - measure(&date, &day).width - 40.0;
    let name = letters(28.0).bold();
    canvas.text(&fitted(&flight.name, &name, room), Point::new(MARGIN, 48.0), &name);

    let ends = letters(18.0);
    let half = (RIGHT - MARGIN - 40.0) / 2.0;
    let [from, to] = [&flight.from, &flight.to].map(|stop| fitted(&end_name(stop), &ends, half));
    canvas.text(&format!("{from} → {to}"), Point::new(MARGIN, 76.0), &ends);

    let length = Metres(brief.path.distance_m());
    let word = if flight.profile.is_empty() { "cruise" } else { "up to" };
    let level =
        flight.level.map_or(String::new(), |level| format!(", {word} {} ft", thousands(level.feet())));
    let facts = format!(
        "{} km ({} NM) in {}{level}   ·   take-off {} UTC, landing {} UTC",
        thousands(length.0 / 1000.0),
        thousands(length.nautical_miles()),
        duration(brief.path.airborne_s),
        second(flight.takeoff),
        second(brief.path.landing()),
    );
    canvas.text(&facts, Point::new(MARGIN, 99.0), &TextStyle { ink: MUTED, ..letters(16.0) });
}

/// The line at the foot.
pub(super) fn draw_caution(canvas: &mut Canvas) {
    let style = TextStyle { ink: MUTED, ..letters(SMALL) };
    canvas.text(CAUTION, Point::new(MARGIN, CAUTION_Y), &style);
}

#[cfg(test)]
mod tests {
    use super::{CAUTION, thousands};
    use crate::charts::canvas::measure;
    use crate::charts::timeline::layout::{MARGIN, RIGHT};
    use crate::charts::timeline::style::{SMALL, letters};

    #[test]
    fn thousands_are_parted() {
        assert_eq!(
            [999.4, 1000.0, 12_563.0, 1_234_567.0].map(thousands),
            ["999", "1,000", "12,563", "1,234,567"]
        );
    }

    #[test]
    fn the_caution_fits_on_its_line() {
        assert!(measure(CAUTION, &letters(SMALL)).width < RIGHT - MARGIN);
    }
}
