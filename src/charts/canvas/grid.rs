//! The canvas as a backend of `plotters`, for its layout of axes and meshes.
//!
//! `plotters` counts in whole numbers, so it is given a grid eight times finer than the canvas: every size that it is
//! told (fonts, strokes, margins, ticks) is multiplied by [`Grid::FINE`]. It moves points outside its range onto the
//! edge, so lines are cut before, or drawn on the canvas itself within [`Canvas::clipped`]. Knows nothing of axes.

use super::geometry::{Point, Rect};
use super::ink::{Ink, Look, Stroke};
use super::scene::Canvas;
use super::text::{self, Across, Level, TextStyle, Turn};
use plotters_backend::text_anchor::{HPos, VPos};
use plotters_backend::{
    BackendColor, BackendCoord, BackendStyle, BackendTextStyle, DrawingBackend, DrawingErrorKind, FontStyle,
    FontTransform,
};
use std::convert::Infallible;
use std::ops::Range;

/// A canvas lent to `plotters`.
#[derive(Debug)]
pub struct Grid<'a> {
    canvas: &'a mut Canvas,
}

type Drawn = Result<(), DrawingErrorKind<Infallible>>;

impl Canvas {
    /// Lends the canvas to `plotters`.
    pub const fn grid(&mut self) -> Grid<'_> {
        Grid { canvas: self }
    }
}

impl Grid<'_> {
    /// Grid steps to one canvas pixel.
    pub const FINE: u32 = 8;

    /// A length in canvas pixels as grid steps, at least one.
    pub fn steps(px: f64) -> u32 {
        (px * f64::from(Self::FINE)).round().max(1.0) as u32
    }

    /// A length in grid steps as canvas pixels.
    fn px(steps: f64) -> f64 {
        steps / f64::from(Self::FINE)
    }

    /// A position of the grid on the canvas.
    pub fn point((x, y): BackendCoord) -> Point {
        Point::new(Self::px(f64::from(x)), Self::px(f64::from(y)))
    }

    /// A chart's plotting area, as `get_pixel_range` gives it, on the canvas.
    pub fn rect((xs, ys): (Range<i32>, Range<i32>)) -> Rect {
        Rect::spanned(Self::point((xs.start, ys.start)), Self::point((xs.end, ys.end)))
    }
}

fn ink(colour: BackendColor) -> Ink {
    let (red, green, blue) = colour.rgb;
    Ink::rgb(red, green, blue).with_alpha(colour.alpha)
}

fn stroke(style: &impl BackendStyle) -> Stroke {
    Stroke::new(ink(style.color()), Grid::px(f64::from(style.stroke_width())))
}

fn look(style: &impl BackendStyle, fill: bool) -> Look {
    if fill { Look::filled(ink(style.color())) } else { Look::outlined(stroke(style)) }
}

fn text_style(style: &impl BackendTextStyle) -> TextStyle {
    let anchor = style.anchor();
    TextStyle {
        size: Grid::px(style.size()),
        ink: ink(style.color()),
        bold: matches!(style.style(), FontStyle::Bold),
        across: match anchor.h_pos {
            HPos::Left => Across::Start,
            HPos::Center => Across::Middle,
            HPos::Right => Across::End,
        },
        level: match anchor.v_pos {
            VPos::Top => Level::Top,
            VPos::Center => Level::Middle,
            VPos::Bottom => Level::Bottom,
        },
        turn: match style.transform() {
            FontTransform::None => Turn::None,
            FontTransform::Rotate90 => Turn::Quarter,
            FontTransform::Rotate180 => Turn::Half,
            FontTransform::Rotate270 => Turn::ThreeQuarters,
        },
        halo: None,
    }
}

impl DrawingBackend for Grid<'_> {
    type ErrorType = Infallible;

    fn get_size(&self) -> (u32, u32) {
        let size = self.canvas.size();
        (size.width_px() * Self::FINE, size.height_px() * Self::FINE)
    }

    fn ensure_prepared(&mut self) -> Drawn {
        Ok(())
    }

    fn present(&mut self) -> Drawn {
        Ok(())
    }

    fn draw_pixel(&mut self, point: BackendCoord, color: BackendColor) -> Drawn {
        let end = (point.0.saturating_add(1), point.1.saturating_add(1));
        self.canvas.rect(Rect::spanned(Self::point(point), Self::point(end)), Look::filled(ink(color)));
        Ok(())
    }

    fn draw_line<S: BackendStyle>(&mut self, from: BackendCoord, to: BackendCoord, style: &S) -> Drawn {
        self.draw_path([from, to], style)
    }

    fn draw_rect<S: BackendStyle>(
        &mut self,
        upper_left: BackendCoord,
        bottom_right: BackendCoord,
        style: &S,
        fill: bool,
    ) -> Drawn {
        let rect = Rect::spanned(Self::point(upper_left), Self::point(bottom_right));
        self.canvas.rect(rect, look(style, fill));
        Ok(())
    }

    fn draw_path<S: BackendStyle, I: IntoIterator<Item = BackendCoord>>(
        &mut self,
        path: I,
        style: &S,
    ) -> Drawn {
        let points: Vec<Point> = path.into_iter().map(Self::point).collect();
        let upright = matches!(points[..], [a, b] if a.x == b.x || a.y == b.y);
        if upright && points.iter().all(|p| p.is_drawable()) {
            // axes and ticks meet in corners
            self.canvas.lines(vec![points], stroke(style), true);
        } else {
            self.canvas.line(&points, stroke(style));
        }
        Ok(())
    }

    fn draw_circle<S: BackendStyle>(
        &mut self,
        center: BackendCoord,
        radius: u32,
        style: &S,
        fill: bool,
    ) -> Drawn {
        self.canvas.circle(Self::point(center), Self::px(f64::from(radius)), look(style, fill));
        Ok(())
    }

    fn fill_polygon<S: BackendStyle, I: IntoIterator<Item = BackendCoord>>(
        &mut self,
        vert: I,
        style: &S,
    ) -> Drawn {
        let ring: Vec<Point> = vert.into_iter().map(Self::point).collect();
        self.canvas.area(&ring, look(style, true));
        Ok(())
    }

    fn draw_text<T: BackendTextStyle>(&mut self, text: &str, style: &T, pos: BackendCoord) -> Drawn {
        self.canvas.text(text, Self::point(pos), &text_style(style));
        Ok(())
    }

    fn estimate_text_size<T: BackendTextStyle>(
        &self,
        text: &str,
        style: &T,
    ) -> Result<(u32, u32), DrawingErrorKind<Infallible>> {
        let extent = text::measure(text, &text_style(style));
        Ok((Self::steps(extent.width), Self::steps(extent.height)))
    }
}
