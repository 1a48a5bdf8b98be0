//! When a low Sun stands ahead: a thin bar along the strip's upper edge, full where it is strong.
//!
//! Knows nothing of elevations or bearings.

use super::frame::Frame;
use super::layout::RIGHT;
use super::style::{MUTED, SMALL, SUN, fitted};
use crate::charts::canvas::{Across, Canvas, Level, Look, Point, Rect, Stroke, TextStyle};
use crate::light::AheadSpan;

/// The bar lies in the gap between plot and strip.
const ABOVE: f64 = 7.0;
const THICK: f64 = 6.0;
/// So short a span still shows.
const NARROWEST: f64 = 2.0;

/// The bar of a stretch of time.
fn bar((begin_s, end_s): (f64, f64), strip: Rect, frame: &Frame) -> Rect {
    let left = frame.x(begin_s);
    let top = strip.top - ABOVE;
    Rect { left, right: frame.x(end_s).max(left + NARROWEST), top, bottom: top + THICK }
}

pub(super) fn draw(canvas: &mut Canvas, spans: &[AheadSpan], (strip, frame): (Rect, &Frame)) {
    if spans.is_empty() {
        return;
    }
    for span in spans {
        let whole = bar((span.begin.at_s, span.end.at_s), strip, frame);
        for &strong in &span.strong {
            canvas.rect(bar(strong, strip, frame), Look::filled(SUN));
        }
        canvas.rect(whole, Look::outlined(Stroke::new(SUN, 1.0)));
    }
    let style = |ink| TextStyle::new(SMALL, ink).anchored(Across::Start, Level::Middle);
    let left = strip.right + 13.0;
    let mut line = |text: &str, down: f64, style: &TextStyle| {
        canvas.text(&fitted(text, style, RIGHT - left), Point::new(left, strip.top + down), style);
    };
    line("low Sun ahead", 4.0, &style(SUN));
    if spans.iter().any(|span| !span.strong.is_empty()) {
        line("full: strong", 21.0, &style(MUTED));
    }
}
