//! The horizon that the flight deck sees, as the elevation at which the Sun's upper limb is on it.
//!
//! Draws what was found: it computes no horizon.

use super::frame::{Frame, Seen};
use super::style::DECK;
use crate::Brief;
use crate::charts::canvas::{Canvas, Dash, Ink, Point, Stroke};

/// The deck's limit from take-off to landing, if the flight's level is known.
fn limit(brief: &Brief) -> Vec<Seen> {
    let limits = brief.deck.iter().flat_map(|view| &view.limits);
    limits.map(|&(at_s, limit)| Seen { at_s, deg: limit.0.deg() }).collect()
}

/// The lowest that it comes, which is what is named at the edge.
pub(super) fn lowest_deg(brief: &Brief) -> Option<f64> {
    brief.deck.as_ref().map(|view| view.deck.limit.0.deg())
}

/// Draws the line where the plot reaches it.
pub(super) fn draw(canvas: &mut Canvas, brief: &Brief, frame: &Frame) {
    let points: Vec<Point> = limit(brief).into_iter().map(|seen| frame.point(seen)).collect();
    canvas.clipped(frame.plot, |canvas| {
        canvas.line(&points, Stroke::new(Ink::WHITE.with_alpha(0.7), 3.6));
        canvas.line(&points, Stroke::new(DECK, 1.8).dashed(Dash::DashDot(12.0, 4.0)));
    });
}
