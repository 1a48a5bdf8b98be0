//! The horizon that the flight deck sees, as the elevation at which the Sun's upper limb is on it.
//!
//! Draws what was found: it computes no horizon.

use super::frame::{Frame, Seen};
use super::style::DECK;
use crate::Brief;
use crate::charts::canvas::{Canvas, Dash, Ink, Point, Stroke};

/// The deck's limit from take-off to landing, if the flight's level is known.
pub(super) fn limit(brief: &Brief) -> Option<[Seen; 2]> {
    let deg = brief.deck.as_ref()?.deck.limit.0.deg();
    Some([0.0, brief.path.airborne_s].map(|at_s| Seen { at_s, deg }))
}

/// Draws the line where the plot reaches it.
pub(super) fn draw(canvas: &mut Canvas, brief: &Brief, frame: &Frame) {
    let Some(line) = limit(brief).filter(|line| frame.span.holds(line[0].deg)) else { return };
    let points: Vec<Point> = line.iter().map(|&seen| frame.point(seen)).collect();
    canvas.line(&points, Stroke::new(Ink::WHITE.with_alpha(0.7), 3.6));
    canvas.line(&points, Stroke::new(DECK, 1.8).dashed(Dash::DashDot(12.0, 4.0)));
}
