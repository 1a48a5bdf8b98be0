//! From dates and hours to the sheet.
//!
//! Knows nothing of what is drawn.

use crate::charts::canvas::{Point, Rect};

pub(super) const WIDTH_PX: u32 = 1600;
pub(super) const HEIGHT_PX: u32 = 900;
/// The outer margin, within which nothing is drawn.
pub(super) const MARGIN: f64 = 28.0;
/// The right edge of everything.
pub(super) const RIGHT: f64 = WIDTH_PX as f64 - MARGIN;
/// The line that the caution stands on.
pub(super) const CAUTION_Y: f64 = 882.0;

/// The plot with its scales.
#[derive(Debug, Clone, Copy)]
pub(super) struct Frame {
    /// How many dates it spans.
    pub(super) days: usize,
}

impl Frame {
    pub(super) const PLOT: Rect = Rect { left: 104.0, top: 124.0, right: 1352.0, bottom: 796.0 };

    pub(super) fn x(self, days: f64) -> f64 {
        Self::PLOT.left + days / self.days as f64 * Self::PLOT.width()
    }

    /// Midnight lies at the bottom and the next at the top.
    pub(super) fn y(hours: f64) -> f64 {
        Self::PLOT.bottom - hours / 24.0 * Self::PLOT.height()
    }

    pub(super) fn point(self, days: f64, hours: f64) -> Point {
        Point::new(self.x(days), Self::y(hours))
    }
}
