//! The canvas as pixels, smoothed at the edges.
//!
//! Knows nothing of file formats.

use super::CanvasError;
use super::font::{Glyph, Step};
use super::geometry::Point;
use super::ink::{Ink, Stroke};
use super::scene::{Canvas, Shape, What};
use super::snap;
use super::text::Label;
use std::collections::BTreeMap;
use tiny_skia::{
    Color, FillRule, LineCap, LineJoin, Mask, Paint, Path, PathBuilder, Pixmap, StrokeDash, Transform,
};

/// A picture may have this many pixels: 256 MB while it is drawn.
const MOST_PX: u64 = 64_000_000;

impl Canvas {
    /// The picture in premultiplied pixels, `scale` of them for one canvas pixel.
    pub(super) fn to_pixels(&self, scale: f64) -> Result<Pixmap, CanvasError> {
        let refused = || CanvasError::Scale { scale, most_px: MOST_PX };
        // what is not a number becomes 0 and is refused
        let side = |px: u32| (f64::from(px) * scale).round() as u32;
        let (width, height) = (side(self.size.width_px()), side(self.size.height_px()));
        if !(1..=MOST_PX).contains(&(u64::from(width) * u64::from(height))) {
            return Err(refused());
        }
        let mut pixels = Pixmap::new(width, height).ok_or_else(refused)?;
        if let Some(ink) = self.background {
            pixels.fill(colour(ink));
        }
        let mut brush = Brush { pixels, scale, glyphs: BTreeMap::new(), clip: None };
        for mark in &self.marks {
            brush.clip_to(mark.clip.map(|index| (index, &self.clips[index])));
            match &mark.what {
                What::Shape { shape, fill, stroke } => brush.shape(shape, *fill, *stroke),
                What::Label(label) => brush.label(label),
            }
        }
        Ok(brush.pixels)
    }
}

struct Brush {
    pixels: Pixmap,
    scale: f64,
    glyphs: BTreeMap<Glyph, Option<Path>>,
    clip: Option<(usize, Mask)>,
}

impl Brush {
    /// Makes the mask for a clip, or keeps the one at hand.
    fn clip_to(&mut self, clip: Option<(usize, &Shape)>) {
        let Some((index, shape)) = clip else {
            self.clip = None;
            return;
        };
        if self.clip.as_ref().is_some_and(|(at_hand, _)| *at_hand == index) {
            return;
        }
        let mask = Mask::new(self.pixels.width(), self.pixels.height());
        self.clip = mask.map(|mut mask| {
            // a clip without a path lets nothing through
            let edges = snap::edges(shape, self.scale);
            if let Some(path) = path(&edges) {
                mask.fill_path(&path, FillRule::EvenOdd, !edges.is_upright(), Transform::identity());
            }
            (index, mask)
        });
    }

    fn shape(&mut self, shape: &Shape, fill: Option<Ink>, stroke: Option<Stroke>) {
        if let Some(ink) = fill {
            let edges = snap::edges(shape, self.scale);
            // between whole pixels there is nothing to smooth
            let paint = Paint { anti_alias: !edges.is_upright(), ..paint(ink) };
            self.fill(path(&edges), &paint, FillRule::EvenOdd);
        }
        let Some(stroke) = stroke else { return };
        if let Some(path) = path(&snap::centres(shape, stroke.width, self.scale)) {
            self.stroke(&path, stroke, matches!(shape, Shape::Lines { square: true, .. }));
        }
    }

    fn label(&mut self, label: &Label) {
        let mut whole = PathBuilder::new();
        let origin = snap::baseline(label, self.scale);
        let [along, below] =
            label.turn.axes().map(|(x, y)| ((x * label.unit * self.scale), (y * label.unit * self.scale)));
        for (glyph, x) in &label.glyphs {
            let outline = self.glyphs.entry(*glyph).or_insert_with(|| glyph_path(*glyph));
            let (tx, ty) = (origin.x + x * along.0, origin.y + x * along.1);
            // font units rise, pixels fall
            let [a, b, c, d, e, f] = [along.0, along.1, -below.0, -below.1, tx, ty].map(|v| v as f32);
            let placed =
                outline.clone().and_then(|path| path.transform(Transform::from_row(a, b, c, d, e, f)));
            if let Some(path) = placed {
                whole.push_path(&path);
            }
        }
        let Some(path) = whole.finish() else { return };
        if let Some(halo) = label.halo {
            self.stroke(&path, halo, false);
        }
        self.fill(Some(path), &paint(label.ink), FillRule::Winding);
    }

    fn fill(&mut self, path: Option<Path>, paint: &Paint, rule: FillRule) {
        let Some(path) = path else { return };
        let mask = self.clip.as_ref().map(|(_, mask)| mask);
        self.pixels.fill_path(&path, paint, rule, Transform::identity(), mask);
    }

    /// Fills the outline of the stroke. The library's own thin lines are not used: on a slant they are thinner than
    /// asked for, and where they are translucent their joints show.
    fn stroke(&mut self, path: &Path, stroke: Stroke, square: bool) {
        let pen = pen(stroke, self.scale, square);
        let dashed = pen.dash.as_ref().and_then(|dash| path.dash(dash, 1.0));
        let outline = dashed.as_ref().unwrap_or(path).stroke(&pen, 1.0);
        self.fill(outline, &paint(stroke.ink), FillRule::Winding);
    }
}

fn pen(stroke: Stroke, scale: f64, square: bool) -> tiny_skia::Stroke {
    let lengths = stroke.dash.lengths().iter().map(|l| (l * scale) as f32).collect();
    let line_cap = match (stroke.dash.is_round(), square) {
        (true, _) => LineCap::Round,
        (_, true) => LineCap::Square,
        _ => LineCap::Butt,
    };
    tiny_skia::Stroke {
        width: (stroke.width * scale) as f32,
        line_cap,
        line_join: LineJoin::Round,
        dash: StrokeDash::new(lengths, 0.0),
        ..tiny_skia::Stroke::default()
    }
}

fn colour(ink: Ink) -> Color {
    let [red, green, blue] = ink.rgb;
    Color::from_rgba8(red, green, blue, (ink.with_alpha(ink.alpha).alpha * 255.0).round() as u8)
}

fn paint(ink: Ink) -> Paint<'static> {
    let mut paint = Paint { anti_alias: true, ..Paint::default() };
    paint.set_color(colour(ink));
    paint
}

/// A shape in picture pixels as a path; nothing if it has no extent.
fn path(shape: &Shape) -> Option<Path> {
    let mut path = PathBuilder::new();
    match shape {
        Shape::Lines { lines, .. } => lines.iter().for_each(|line| run(&mut path, line)),
        Shape::Rings(rings) => rings.iter().filter(|ring| !ring.is_empty()).for_each(|ring| {
            run(&mut path, ring);
            path.close();
        }),
        Shape::Circle { centre, radius } => {
            path.push_circle(centre.x as f32, centre.y as f32, *radius as f32);
        }
    }
    path.finish()
}

fn run(path: &mut PathBuilder, points: &[Point]) {
    for (i, point) in points.iter().enumerate() {
        let (x, y) = (point.x as f32, point.y as f32);
        if i == 0 { path.move_to(x, y) } else { path.line_to(x, y) }
    }
}

fn glyph_path(glyph: Glyph) -> Option<Path> {
    let mut path = PathBuilder::new();
    for step in glyph.outline() {
        match step {
            Step::Move(x, y) => path.move_to(x, y),
            Step::Line(x, y) => path.line_to(x, y),
            Step::Quad(x1, y1, x, y) => path.quad_to(x1, y1, x, y),
            Step::Cubic(x1, y1, x2, y2, x, y) => path.cubic_to(x1, y1, x2, y2, x, y),
            Step::Close => path.close(),
        }
    }
    path.finish()
}
