//! Where things lie on a canvas: points, rectangles and the size of the sheet.
//!
//! Knows nothing of inks or of what is drawn.

use super::CanvasError;

/// A position on the canvas.
///
/// # Shapes and units
/// Pixels of the canvas (1/96 inch when printed), x to the right and y downwards from the upper left corner.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Point {
    /// To the right.
    pub x: f64,
    /// Downwards.
    pub y: f64,
}

/// How far from the sheet a coordinate may lie and still be drawn: beyond, the rasteriser's numbers lose their
/// fractions and a dashed line would never end.
const FARTHEST_PX: f64 = 30_000.0;

impl Point {
    /// A point from its coordinates.
    pub const fn new(x: f64, y: f64) -> Self {
        Self { x, y }
    }

    /// Whether both coordinates are numbers within reach of the drawing.
    pub fn is_drawable(self) -> bool {
        // a NaN fails both comparisons
        self.x.abs() <= FARTHEST_PX && self.y.abs() <= FARTHEST_PX
    }

    /// This point carried by the given amounts.
    #[must_use]
    pub const fn moved(self, dx: f64, dy: f64) -> Self {
        Self::new(self.x + dx, self.y + dy)
    }
}

/// A rectangle whose sides are parallel to those of the canvas.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Rect {
    /// The left side.
    pub left: f64,
    /// The upper side.
    pub top: f64,
    /// The right side.
    pub right: f64,
    /// The lower side.
    pub bottom: f64,
}

impl Rect {
    /// The rectangle that two opposite corners span, in whichever order they come.
    pub const fn spanned(a: Point, b: Point) -> Self {
        Self { left: a.x.min(b.x), top: a.y.min(b.y), right: a.x.max(b.x), bottom: a.y.max(b.y) }
    }

    /// The extent from side to side.
    pub const fn width(self) -> f64 {
        self.right - self.left
    }

    /// The extent from top to bottom.
    pub const fn height(self) -> f64 {
        self.bottom - self.top
    }

    /// The corners in order around the rectangle.
    pub const fn corners(self) -> [Point; 4] {
        [
            Point::new(self.left, self.top),
            Point::new(self.right, self.top),
            Point::new(self.right, self.bottom),
            Point::new(self.left, self.bottom),
        ]
    }
}

/// The size of a canvas in whole pixels.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Size {
    width_px: u32,
    height_px: u32,
}

impl Size {
    /// The longest side that a canvas may have.
    pub const LONGEST_PX: u32 = 16_384;

    /// A size from its sides.
    ///
    /// # Errors
    /// When a side is 0 or longer than [`Size::LONGEST_PX`].
    pub const fn new(width_px: u32, height_px: u32) -> Result<Self, CanvasError> {
        let shortest = if width_px < height_px { width_px } else { height_px };
        let longest = if width_px < height_px { height_px } else { width_px };
        if shortest == 0 || longest > Self::LONGEST_PX {
            return Err(CanvasError::Size { width_px, height_px });
        }
        Ok(Self { width_px, height_px })
    }

    /// From side to side.
    pub const fn width_px(self) -> u32 {
        self.width_px
    }

    /// From top to bottom.
    pub const fn height_px(self) -> u32 {
        self.height_px
    }

    /// The whole sheet as a rectangle.
    pub fn sheet(self) -> Rect {
        Rect { left: 0.0, top: 0.0, right: f64::from(self.width_px), bottom: f64::from(self.height_px) }
    }
}

#[cfg(test)]
mod tests {
    use super::{Point, Rect, Size};

    #[test]
    fn a_size_without_extent_or_beyond_reason_is_refused() {
        assert!(Size::new(0, 5).is_err());
        assert!(Size::new(5, Size::LONGEST_PX + 1).is_err());
        assert!(Size::new(1, Size::LONGEST_PX).is_ok());
    }

    #[test]
    fn a_rectangle_does_not_mind_the_order_of_its_corners() {
        let (a, b) = (Point::new(5.0, 1.0), Point::new(2.0, 7.0));
        assert_eq!(Rect::spanned(a, b), Rect::spanned(b, a));
        assert_eq!(Rect::spanned(a, b).width(), 3.0);
    }

    #[test]
    fn what_is_not_a_number_is_not_drawable() {
        assert!(!Point::new(f64::NAN, 0.0).is_drawable());
        assert!(!Point::new(0.0, f64::INFINITY).is_drawable());
        assert!(Point::new(-1.0, 2000.0).is_drawable());
    }
}
