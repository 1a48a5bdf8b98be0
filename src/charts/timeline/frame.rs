//! From seconds and degrees to the sheet.
//!
//! Knows nothing of what is drawn.

use crate::charts::canvas::{Point, Rect};
use crate::light::Limit;

/// A point of the curve before it lies on a sheet.
#[derive(Debug, Clone, Copy)]
pub(super) struct Seen {
    pub(super) at_s: f64,
    pub(super) deg: f64,
}

/// The elevations that the plot spans.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Span {
    pub(super) low_deg: f64,
    pub(super) high_deg: f64,
}

/// The share of the height that is left free above and below the curve: room for labels.
const ROOM: f64 = 0.13;
/// No plot spans less, or it would show rounding.
const LEAST_DEG: f64 = 0.12;

impl Span {
    /// A span for a curve: all of it, the limit that is nearest to it, and room.
    pub(super) fn of(curve: &[Seen]) -> Self {
        let low = curve.iter().map(|s| s.deg).fold(f64::MAX, f64::min);
        let high = curve.iter().map(|s| s.deg).fold(f64::MIN, f64::max);
        let away = |deg: f64| (low - deg).max(deg - high).max(0.0);
        let limits = Limit::ALL.map(|limit| limit.elevation().deg());
        let nearest = limits.into_iter().fold(limits[0], |a, b| if away(b) < away(a) { b } else { a });
        let (low, high) = (low.min(nearest), high.max(nearest));
        let room = ((high - low) * ROOM).max((LEAST_DEG - (high - low)) / 2.0);
        Self { low_deg: (low - room).max(-90.0), high_deg: (high + room).min(90.0) }
    }

    pub(super) fn holds(self, deg: f64) -> bool {
        self.low_deg < deg && deg < self.high_deg
    }
}

/// The plot with its scales.
#[derive(Debug, Clone, Copy)]
pub(super) struct Frame {
    pub(super) plot: Rect,
    pub(super) span: Span,
    pub(super) airborne_s: f64,
}

/// Degrees from tick to tick, of which the finest with room is taken.
const STEPS_DEG: [f64; 12] = [0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1.0, 2.0, 5.0, 10.0, 15.0, 30.0];
/// From tick to tick at least.
const TICK_ROOM: f64 = 38.0;

impl Frame {
    pub(super) fn x(&self, at_s: f64) -> f64 {
        self.plot.left + at_s / self.airborne_s * self.plot.width()
    }

    pub(super) fn y(&self, deg: f64) -> f64 {
        let Span { low_deg, high_deg } = self.span;
        self.plot.bottom - (deg - low_deg) / (high_deg - low_deg) * self.plot.height()
    }

    pub(super) fn point(&self, seen: Seen) -> Point {
        Point::new(self.x(seen.at_s), self.y(seen.deg))
    }

    /// The ticks of the elevation axis, each with its label.
    pub(super) fn elevation_ticks(&self) -> Vec<(f64, String)> {
        let Span { low_deg, high_deg } = self.span;
        let px_per_deg = self.plot.height() / (high_deg - low_deg);
        let step = STEPS_DEG.into_iter().find(|s| s * px_per_deg >= TICK_ROOM).unwrap_or(30.0);
        let decimals = if step < 0.1 { 2 } else { usize::from(step < 1.0) };
        let (first, last) = ((low_deg / step).ceil() as i64, (high_deg / step).floor() as i64);
        (first..=last).map(|i| (i as f64 * step, degrees(i as f64 * step, decimals))).collect()
    }
}

/// Degrees with a real minus, and a plus where positive.
pub(super) fn degrees(deg: f64, decimals: usize) -> String {
    let text = format!("{:.decimals$}°", deg.abs());
    let is_zero = text.bytes().all(|b| !b.is_ascii_digit() || b == b'0');
    match deg {
        _ if is_zero => text,
        d if d < 0.0 => format!("−{text}"),
        _ => format!("+{text}"),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn span(degs: &[f64]) -> Span {
        Span::of(&degs.iter().map(|&deg| Seen { at_s: 0.0, deg }).collect::<Vec<_>>())
    }

    #[test]
    fn a_span_holds_a_limit_and_stays_within_the_sky() {
        for degs in [&[-40.0, -35.0][..], &[20.0, 25.0], &[-3.0, -3.0], &[-0.8333, -0.8334], &[-89.0, 89.9]] {
            let span = span(degs);
            assert!(Limit::ALL.iter().any(|l| span.holds(l.elevation().deg())), "{degs:?}: {span:?}");
            assert!(degs.iter().all(|&d| span.holds(d)), "{degs:?}: {span:?}");
            assert!(span.low_deg >= -90.0 && span.high_deg <= 90.0);
        }
    }

    #[test]
    fn ticks_have_room_and_say_where_they_are() {
        let plot = Rect { left: 0.0, top: 0.0, right: 1000.0, bottom: 500.0 };
        for degs in [[-0.9, -0.7], [-12.0, 3.0], [-80.0, 80.0]] {
            let frame = Frame { plot, span: span(&degs), airborne_s: 3600.0 };
            let ticks = frame.elevation_ticks();
            assert!(ticks.len() >= 4, "{ticks:?}");
            assert!(ticks.windows(2).all(|w| frame.y(w[0].0) - frame.y(w[1].0) > TICK_ROOM - 1e-9));
        }
        assert_eq!(degrees(-0.04, 1), "0.0°");
        assert_eq!(degrees(-6.0, 0), "−6°");
    }
}
