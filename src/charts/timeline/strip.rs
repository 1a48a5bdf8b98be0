//! The states one after another, along the time axis.
//!
//! Knows nothing of elevations.

use super::frame::Frame;
use super::style::{INK, PLATE, SMALL, letters, look};
use crate::charts::canvas::{Across, Canvas, Level, Look, Point, Rect, Stroke, measure};
use crate::label::words::{spoken, state_key, state_short};
use crate::light::{Segment, State};

/// The part of the strip that is a segment's; parts of neighbours share their edge.
fn cells(segments: &[Segment], strip: Rect, frame: &Frame) -> Vec<(State, Rect)> {
    let cell = |segment: &Segment| {
        let rect = Rect { left: frame.x(segment.begin_s), right: frame.x(segment.end_s), ..strip };
        (segment.state, rect)
    };
    segments.iter().map(cell).collect()
}

/// The state's name as long as it fits.
fn name(state: State, room: f64) -> Option<String> {
    let names = [spoken(state_key(state)), state_short(state).to_string()];
    names.into_iter().find(|name| measure(name, &letters(SMALL)).width + 14.0 <= room)
}

pub(super) fn draw(canvas: &mut Canvas, segments: &[Segment], (strip, frame): (Rect, &Frame)) {
    let style = letters(SMALL).anchored(Across::Middle, Level::Middle);
    for (state, cell) in cells(segments, strip, frame) {
        canvas.rect(cell, look(state));
        let edge = [Point::new(cell.left, cell.top), Point::new(cell.left, cell.bottom)];
        canvas.line(&edge, Stroke::new(INK, 1.0));
        let Some(name) = name(state, cell.width()) else { continue };
        let middle = Point::new(f64::midpoint(cell.left, cell.right), f64::midpoint(cell.top, cell.bottom));
        let half = measure(&name, &style).width / 2.0 + 4.0;
        let plate = Rect::spanned(middle.moved(-half, -9.0), middle.moved(half, 9.0));
        canvas.rect(plate, Look::filled(PLATE));
        canvas.text(&name, middle, &style);
    }
    canvas.rect(strip, Look::outlined(Stroke::new(INK, 1.0)));
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::charts::timeline::frame::Span;
    use proptest::prelude::*;

    proptest! {
        #[test]
        fn cells_tile_the_time_axis_exactly(times in proptest::collection::vec(0.0..70_000.0, 0..30)) {
            let mut ends = times;
            ends.push(0.0);
            ends.push(70_000.0);
            ends.sort_by(f64::total_cmp);
            let segments: Vec<Segment> = ends
                .windows(2)
                .map(|w| Segment { state: State::Daylight, begin_s: w[0], end_s: w[1] })
                .collect();
            let plot = Rect { left: 188.0, top: 100.0, right: 1420.0, bottom: 600.0 };
            let span = Span { low_deg: -10.0, high_deg: 10.0 };
            let frame = Frame { plot, span, airborne_s: 70_000.0 };
            let cells = cells(&segments, plot, &frame);
            prop_assert_eq!(cells[0].1.left, plot.left);
            prop_assert_eq!(cells[cells.len() - 1].1.right, plot.right);
            prop_assert!(cells.windows(2).all(|w| w[0].1.right == w[1].1.left));
        }
    }
}
