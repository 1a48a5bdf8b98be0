//! The canvas: it records what is drawn, in order, for both pictures to be made of.
//!
//! Knows nothing of SVG, pixels or files.

use super::geometry::{Point, Rect, Size};
use super::hatch;
use super::ink::{Dash, Hatch, Ink, Look, Stroke, Texture};
use super::text::{Label, TextStyle};

/// A sheet to draw on.
///
/// Later marks cover earlier ones. Coordinates are pixels with fractions; what is not a number, or lies absurdly far
/// off the sheet, is left out: a line breaks there, as it does at missing data, and a shape is not drawn.
///
/// Edges parallel to the sheet's sides are moved by up to half a pixel of the picture so that they are sharp and
/// neighbouring bands meet without a seam.
#[derive(Debug, Clone)]
pub struct Canvas {
    pub(super) size: Size,
    pub(super) title: String,
    pub(super) description: String,
    pub(super) background: Option<Ink>,
    pub(super) marks: Vec<Mark>,
    pub(super) clips: Vec<Shape>,
    clip: Option<usize>,
}

/// A thing drawn, and the clip that bounds it.
#[derive(Debug, Clone)]
pub(super) struct Mark {
    pub(super) clip: Option<usize>,
    pub(super) what: What,
}

#[derive(Debug, Clone)]
pub(super) enum What {
    Shape { shape: Shape, fill: Option<Ink>, stroke: Option<Stroke> },
    Label(Label),
}

/// A geometry.
#[derive(Debug, Clone, PartialEq)]
pub(super) enum Shape {
    /// Open lines; `square` lets their ends reach out by half the width, so that frames have corners.
    Lines { lines: Vec<Vec<Point>>, square: bool },
    /// Closed rings, inside by the even-odd rule.
    Rings(Vec<Vec<Point>>),
    /// A circle.
    Circle { centre: Point, radius: f64 },
}

/// A sign that marks a point of a chart; its size is that of a circle of the same area.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Marker {
    /// A circle.
    Circle,
    /// A square on its side.
    Square,
    /// A square on its corner.
    Diamond,
    /// A triangle that points up.
    TriangleUp,
    /// A triangle that points down.
    TriangleDown,
}

impl Canvas {
    /// A white sheet. Title and description are what a screen reader says of the picture.
    pub fn new(size: Size, title: &str, description: &str) -> Self {
        Self {
            size,
            title: title.to_owned(),
            description: description.to_owned(),
            background: Some(Ink::WHITE),
            marks: Vec::new(),
            clips: Vec::new(),
            clip: None,
        }
    }

    /// The same sheet in another colour, or clear.
    #[must_use]
    pub fn on(mut self, background: Option<Ink>) -> Self {
        self.background = background;
        self
    }

    /// The size of the sheet.
    pub const fn size(&self) -> Size {
        self.size
    }

    /// Draws a line through points.
    pub fn line(&mut self, points: &[Point], stroke: Stroke) {
        let lines = points.split(|p| !p.is_drawable()).filter(|run| run.len() > 1).map(<[Point]>::to_vec);
        self.lines(lines.collect(), stroke, false);
    }

    /// Draws an area within one ring of points, which closes itself.
    pub fn area(&mut self, ring: &[Point], look: Look) {
        self.rings(&[ring.to_vec()], look);
    }

    /// Draws the area within several rings; a ring within a ring is a hole.
    pub fn rings(&mut self, rings: &[Vec<Point>], look: Look) {
        if rings.iter().flatten().all(|p| p.is_drawable()) && rings.iter().any(|r| r.len() > 1) {
            self.closed(Shape::Rings(rings.to_vec()), look);
        }
    }

    /// Draws a rectangle.
    pub fn rect(&mut self, rect: Rect, look: Look) {
        self.area(&rect.corners(), look);
    }

    /// Draws a circle.
    pub fn circle(&mut self, centre: Point, radius: f64, look: Look) {
        if centre.is_drawable() && radius > 0.0 && centre.moved(radius, radius).is_drawable() {
            self.closed(Shape::Circle { centre, radius }, look);
        }
    }

    /// Draws a marker about a point; `radius` is that of the circle which has its area.
    pub fn marker(&mut self, marker: Marker, centre: Point, radius: f64, look: Look) {
        let polygon = |corners: &[(f64, f64)], reach: f64| -> Vec<Point> {
            corners.iter().map(|(x, y)| centre.moved(x * reach * radius, y * reach * radius)).collect()
        };
        let half_width = 0.75_f64.sqrt();
        match marker {
            Marker::Circle => self.circle(centre, radius, look),
            Marker::Square => {
                let ring = polygon(&[(-1.0, -1.0), (1.0, -1.0), (1.0, 1.0), (-1.0, 1.0)], 0.886);
                self.area(&ring, look);
            }
            Marker::Diamond => {
                let ring = polygon(&[(0.0, -1.0), (1.0, 0.0), (0.0, 1.0), (-1.0, 0.0)], 1.253);
                self.area(&ring, look);
            }
            Marker::TriangleUp => {
                let ring = polygon(&[(0.0, -1.0), (half_width, 0.5), (-half_width, 0.5)], 1.555);
                self.area(&ring, look);
            }
            Marker::TriangleDown => {
                let ring = polygon(&[(0.0, 1.0), (half_width, -0.5), (-half_width, -0.5)], 1.555);
                self.area(&ring, look);
            }
        }
    }

    /// Sets a line of text.
    pub fn text(&mut self, text: &str, anchor: Point, style: &TextStyle) {
        let label = Label::set(text, anchor, style);
        if label.origin.is_drawable() && label.unit > 0.0 && !label.text.trim().is_empty() {
            self.push(What::Label(label));
        }
    }

    /// Draws with everything bounded to a rectangle.
    pub fn clipped(&mut self, rect: Rect, draw: impl FnOnce(&mut Self)) {
        self.clipped_to(&[rect.corners().to_vec()], draw);
    }

    /// Draws with everything bounded to the inside of rings. Of clips within clips the innermost counts. Rings that
    /// cannot be drawn let nothing through.
    pub fn clipped_to(&mut self, rings: &[Vec<Point>], draw: impl FnOnce(&mut Self)) {
        let drawable = rings.iter().flatten().all(|p| p.is_drawable());
        self.clips.push(Shape::Rings(if drawable { rings.to_vec() } else { Vec::new() }));
        let outer = self.clip.replace(self.clips.len() - 1);
        draw(self);
        self.clip = outer;
    }

    /// Draws beneath everything that has been drawn so far.
    pub fn beneath(&mut self, draw: impl FnOnce(&mut Self)) {
        let above = std::mem::take(&mut self.marks);
        draw(self);
        self.marks.extend(above);
    }

    pub(super) fn lines(&mut self, lines: Vec<Vec<Point>>, stroke: Stroke, square: bool) {
        if stroke.is_visible() && !lines.is_empty() {
            let shape = Shape::Lines { lines, square };
            self.push(What::Shape { shape, fill: None, stroke: Some(stroke) });
        }
    }

    fn closed(&mut self, shape: Shape, look: Look) {
        let fill = look.fill.filter(|ink| ink.alpha > 0.0);
        let stroke = look.stroke.filter(|stroke| stroke.is_visible());
        let Some(hatch) = look.hatch else {
            return self.seen(shape, fill, stroke);
        };
        self.seen(shape.clone(), fill, None);
        self.hatch(&shape.rings(), hatch);
        self.seen(shape, None, stroke);
    }

    fn seen(&mut self, shape: Shape, fill: Option<Ink>, stroke: Option<Stroke>) {
        if fill.is_some() || stroke.is_some() {
            self.push(What::Shape { shape, fill, stroke });
        }
    }

    fn hatch(&mut self, rings: &[Vec<Point>], hatch: Hatch) {
        let mut lines = Vec::new();
        for &direction in hatch::directions_deg(hatch.texture) {
            for piece in hatch::lines_inside(rings, direction, hatch.spacing) {
                let piece = match hatch.texture {
                    Texture::Dots => hatch::dot_row(piece, direction, hatch.spacing),
                    _ => Some(piece),
                };
                lines.extend(piece.map(|p| p.to_vec()));
            }
        }
        let dash = if hatch.texture == Texture::Dots { Dash::Dotted(hatch.spacing) } else { Dash::Solid };
        self.lines(lines, Stroke::new(hatch.ink, hatch.weight).dashed(dash), false);
    }

    fn push(&mut self, what: What) {
        self.marks.push(Mark { clip: self.clip, what });
    }
}

impl Shape {
    /// The corners to hatch within; a circle as a polygon that leaves its rim by less than 0.1 % of the radius.
    fn rings(&self) -> Vec<Vec<Point>> {
        match self {
            Self::Lines { .. } => Vec::new(),
            Self::Rings(rings) => rings.clone(),
            Self::Circle { centre, radius } => {
                let corner = |i: u32| {
                    let (sin, cos) = (std::f64::consts::TAU * f64::from(i) / 90.0).sin_cos();
                    centre.moved(radius * cos, radius * sin)
                };
                vec![(0..90).map(corner).collect()]
            }
        }
    }

    /// Whether every edge is parallel to a side of the sheet and long enough to be moved to whole pixels.
    pub(super) fn is_upright(&self) -> bool {
        let upright = |a: &Point, b: &Point| {
            let (dx, dy) = ((a.x - b.x).abs(), (a.y - b.y).abs());
            (dx == 0.0 && dy >= 1.0) || (dy == 0.0 && dx >= 1.0)
        };
        let open = |run: &[Point]| run.windows(2).all(|w| upright(&w[0], &w[1]));
        match self {
            Self::Lines { lines, .. } => lines.iter().all(|line| open(line)),
            Self::Rings(rings) => rings.iter().all(|ring| {
                open(ring) && ring.first().zip(ring.last()).is_none_or(|(a, b)| a == b || upright(a, b))
            }),
            Self::Circle { .. } => false,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn canvas() -> Canvas {
        Canvas::new(Size::new(100, 100).unwrap(), "t", "d")
    }

    #[test]
    fn a_line_breaks_where_its_data_are_missing() {
        let mut canvas = canvas();
        let ys = [1.0, 2.0, f64::NAN, 4.0, 5.0, f64::INFINITY, 6.0];
        let points: Vec<Point> = ys.iter().map(|&y| Point::new(y * 2.0, y)).collect();
        canvas.line(&points, Stroke::new(Ink::BLACK, 1.0));
        let What::Shape { shape: Shape::Lines { lines, .. }, .. } = &canvas.marks[0].what else {
            panic!("a line was drawn")
        };
        assert_eq!(lines.len(), 2, "and the lone last point has no line");
    }

    #[test]
    fn what_is_drawn_beneath_comes_first() {
        let mut canvas = canvas();
        canvas.circle(Point::new(5.0, 5.0), 2.0, Look::filled(Ink::BLACK));
        canvas.beneath(|c| c.text("x", Point::new(1.0, 1.0), &TextStyle::new(10.0, Ink::BLACK)));
        assert!(matches!(canvas.marks[0].what, What::Label(_)));
        assert_eq!(canvas.marks.len(), 2);
    }

    #[test]
    fn invisible_things_are_not_recorded() {
        let mut canvas = canvas();
        canvas.rect(canvas.size().sheet(), Look::filled(Ink::BLACK.with_alpha(0.0)));
        canvas.circle(Point::new(f64::NAN, 5.0), 2.0, Look::filled(Ink::BLACK));
        canvas.circle(Point::new(5.0, 5.0), f64::NAN, Look::filled(Ink::BLACK));
        canvas.line(&[Point::new(0.0, 0.0), Point::new(5.0, 5.0)], Stroke::new(Ink::BLACK, 0.0));
        canvas.text("\u{202e} \n", Point::new(1.0, 1.0), &TextStyle::new(10.0, Ink::BLACK));
        assert!(canvas.marks.is_empty());
    }

    #[test]
    fn markers_of_one_radius_have_one_area() {
        for marker in [Marker::Square, Marker::Diamond, Marker::TriangleUp, Marker::TriangleDown] {
            let mut canvas = canvas();
            canvas.marker(marker, Point::new(50.0, 50.0), 10.0, Look::filled(Ink::BLACK));
            let What::Shape { shape, .. } = &canvas.marks[0].what else { panic!("a shape was drawn") };
            let ring = &shape.rings()[0];
            let pairs = ring.iter().zip(ring.iter().cycle().skip(1));
            let area = pairs.map(|(a, b)| a.x * b.y - b.x * a.y).sum::<f64>().abs() / 2.0;
            assert!((area / (std::f64::consts::PI * 100.0) - 1.0).abs() < 0.002, "{marker:?}: {area}");
        }
    }
}
