//! The Sun's elevation as a curve.
//!
//! Draws what was sampled: it computes no elevation.

use super::frame::{Frame, Seen};
use super::style::CURVE;
use crate::Brief;
use crate::charts::canvas::{Canvas, Ink, Point, Stroke};
use crate::light::Sample;

/// The curve's points in order of time: each minute, and all instants that must lie on it exactly.
pub(super) fn points(brief: &Brief) -> Vec<Seen> {
    let seen = |sample: &Sample| Seen { at_s: sample.at_s, deg: sample.elevation.0.deg() };
    // the curve has corners at waypoints
    let exact = brief.at_crossings.iter().chain(&brief.at_touches).chain(&brief.at_waypoints);
    let peaks = [&brief.at_highest, &brief.at_lowest];
    let mut points: Vec<Seen> = brief.minutes.iter().chain(exact).chain(peaks).map(seen).collect();
    points.sort_by(|a, b| a.at_s.total_cmp(&b.at_s));
    points.dedup_by(|a, b| a.at_s == b.at_s);
    points
}

/// The curve on the sheet.
pub(super) fn on_sheet(curve: &[Seen], frame: &Frame) -> Vec<Point> {
    curve.iter().map(|&seen| frame.point(seen)).collect()
}

pub(super) fn draw(canvas: &mut Canvas, curve: &[Seen], frame: &Frame) {
    let points = on_sheet(curve, frame);
    canvas.line(&points, Stroke::new(Ink::WHITE.with_alpha(0.75), 5.6));
    canvas.line(&points, Stroke::new(CURVE, 2.6));
}
