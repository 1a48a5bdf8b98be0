//! Where the parts of the sheet lie.
//!
//! Knows nothing of what is drawn there.

use crate::charts::canvas::{Point, Rect};

pub(super) const WIDTH_PX: u32 = 1600;
pub(super) const HEIGHT_PX: u32 = 900;
/// The outer margin, within which nothing is drawn.
pub(super) const MARGIN: f64 = 28.0;
/// The sides of the plot; clocks stand to its left and the names of the states to its right.
pub(super) const PLOT_LEFT: f64 = 188.0;
pub(super) const PLOT_RIGHT: f64 = 1420.0;
/// The right edge of everything.
pub(super) const RIGHT: f64 = WIDTH_PX as f64 - MARGIN;
/// The line that the caution stands on.
pub(super) const CAUTION_Y: f64 = 882.0;
/// The height of a row of flags, of a clock, of a row of the key.
pub(super) const FLAG_ROW: f64 = 21.0;
const CLOCK_ROW: f64 = 43.0;
pub(super) const KEY_ROW: f64 = 20.0;
/// The end of the headings.
const HEADING_BOTTOM: f64 = 108.0;
const STRIP_HEIGHT: f64 = 28.0;

/// What decides how high the plot can be.
#[derive(Debug, Clone, Copy)]
pub(super) struct Layout {
    /// What the flags take above the plot.
    pub(super) flags_px: f64,
    pub(super) clocks: usize,
    pub(super) key_rows: usize,
}

impl Layout {
    pub(super) fn plot(&self) -> Rect {
        let top = (HEADING_BOTTOM + 4.0 + self.flags_px).max(HEADING_BOTTOM + 16.0);
        let corner = Point::new(PLOT_RIGHT, self.strip().top - 8.0);
        Rect::spanned(Point::new(PLOT_LEFT, top), corner)
    }

    pub(super) fn strip(&self) -> Rect {
        let bottom = self.clocks_top() - 4.0;
        Rect { left: PLOT_LEFT, top: bottom - STRIP_HEIGHT, right: PLOT_RIGHT, bottom }
    }

    fn clocks_top(&self) -> f64 {
        self.key_top() - CLOCK_ROW * self.clocks as f64
    }

    /// The upper edge of each clock's row.
    pub(super) fn clock_tops(&self) -> impl Iterator<Item = f64> {
        let first = self.clocks_top();
        (0..self.clocks).map(move |i| first + CLOCK_ROW * i as f64)
    }

    pub(super) fn key_top(&self) -> f64 {
        CAUTION_Y - 20.0 - KEY_ROW * self.key_rows as f64
    }
}
