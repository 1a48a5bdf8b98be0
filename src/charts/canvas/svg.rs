//! The canvas as SVG, with decimals and without any font.
//!
//! Knows nothing of pixels; glyphs are written by `svg_text`.

use super::geometry::Point;
use super::ink::{Ink, Stroke};
use super::scene::{Canvas, Mark, Shape, What};
use super::svg_text;
use super::xml;
use std::collections::BTreeSet;

/// What an SVG is made with.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub struct SvgOptions<'a> {
    /// Lay every text once more, invisible, over its outlines, so that it can be searched, selected and read aloud.
    pub real_text: bool,
    /// Begins every identifier, so that several pictures can stand in one page; other characters than ASCII letters,
    /// digits and `-` are left out.
    pub id_prefix: &'a str,
}

impl Canvas {
    /// The picture as an SVG document: every text as outlines, identifiers without prefix.
    pub fn to_svg(&self) -> String {
        self.to_svg_with(SvgOptions::default())
    }

    /// The picture as an SVG document.
    ///
    /// # Shapes and units
    /// One unit is one canvas pixel; coordinates are rounded to a hundredth of it.
    pub fn to_svg_with(&self, options: SvgOptions<'_>) -> String {
        let prefix: String =
            options.id_prefix.chars().filter(|c| c.is_ascii_alphanumeric() || *c == '-').collect();
        let mut out = String::with_capacity(16_384);
        self.open(&mut out, &prefix, options.real_text);
        self.definitions(&mut out, &prefix);
        if let Some(ink) = self.background {
            path(&mut out, &Shape::Rings(vec![self.size.sheet().corners().to_vec()]), Some(ink), None);
        }
        self.body(&mut out, &prefix, options.real_text);
        out.push_str("</svg>\n");
        out
    }

    fn open(&self, out: &mut String, prefix: &str, real_text: bool) {
        let (width, height) = (self.size.width_px(), self.size.height_px());
        // the children of an `img` are not read aloud, those of a document are
        let role = if real_text { "graphics-document document" } else { "img" };
        xml::put(
            out,
            format_args!(
                "<svg xmlns=\"http://www.w3.org/2000/svg\" xmlns:xlink=\"http://www.w3.org/1999/xlink\" \
             width=\"{width}\" height=\"{height}\" viewBox=\"0 0 {width} {height}\" role=\"{role}\" \
             aria-labelledby=\"{prefix}title {prefix}desc\" stroke-linejoin=\"round\">\n"
            ),
        );
        for (element, text) in [("title", &self.title), ("desc", &self.description)] {
            xml::put(out, format_args!("<{element} id=\"{prefix}{element}\">"));
            xml::words(out, text);
            xml::put(out, format_args!("</{element}>\n"));
        }
    }

    fn definitions(&self, out: &mut String, prefix: &str) {
        let clips: BTreeSet<usize> = self.marks.iter().filter_map(|mark| mark.clip).collect();
        out.push_str("<defs>\n");
        for index in clips {
            xml::put(out, format_args!("<clipPath id=\"{prefix}c{index}\"><path clip-rule=\"evenodd\""));
            outline(out, &self.clips[index]);
            out.push_str("/></clipPath>\n");
        }
        let labels = self.marks.iter().filter_map(|mark| match &mark.what {
            What::Label(label) => Some(label),
            What::Shape { .. } => None,
        });
        svg_text::define_glyphs(out, prefix, labels);
        out.push_str("</defs>\n");
    }

    fn body(&self, out: &mut String, prefix: &str, real_text: bool) {
        for run in self.marks.chunk_by(|a, b| a.clip == b.clip) {
            let clip = run[0].clip;
            if let Some(index) = clip {
                xml::put(out, format_args!("<g clip-path=\"url(#{prefix}c{index})\">\n"));
            }
            for mark in run {
                self::mark(out, prefix, real_text, mark);
            }
            if clip.is_some() {
                out.push_str("</g>\n");
            }
        }
    }
}

fn mark(out: &mut String, prefix: &str, real_text: bool, mark: &Mark) {
    match &mark.what {
        What::Shape { shape: Shape::Circle { centre, radius }, fill, stroke } => {
            out.push_str("<circle");
            xml::length_attribute(out, "cx", centre.x);
            xml::length_attribute(out, "cy", centre.y);
            xml::length_attribute(out, "r", *radius);
            paint(out, *fill, *stroke);
        }
        What::Shape { shape, fill, stroke } => path(out, shape, *fill, *stroke),
        What::Label(label) => {
            svg_text::draw(out, prefix, label);
            if real_text {
                svg_text::overlay(out, label);
            }
        }
    }
}

fn path(out: &mut String, shape: &Shape, fill: Option<Ink>, stroke: Option<Stroke>) {
    out.push_str("<path");
    outline(out, shape);
    if shape.is_upright() {
        out.push_str(" shape-rendering=\"crispEdges\"");
    }
    if matches!(shape, Shape::Lines { square: true, .. }) {
        out.push_str(" stroke-linecap=\"square\"");
    }
    if matches!(shape, Shape::Rings(rings) if rings.len() > 1) {
        out.push_str(" fill-rule=\"evenodd\"");
    }
    paint(out, fill, stroke);
}

/// Writes the inks and ends the element.
fn paint(out: &mut String, fill: Option<Ink>, stroke: Option<Stroke>) {
    match fill {
        Some(ink) => xml::ink_attribute(out, "fill", ink),
        None => out.push_str(" fill=\"none\""),
    }
    if let Some(stroke) = stroke {
        xml::ink_attribute(out, "stroke", stroke.ink);
        xml::length_attribute(out, "stroke-width", stroke.width);
        dashes(out, stroke);
    }
    out.push_str("/>\n");
}

fn dashes(out: &mut String, stroke: Stroke) {
    let lengths = stroke.dash.lengths();
    if lengths.is_empty() {
        return;
    }
    out.push_str(" stroke-dasharray=\"");
    for (i, &each) in lengths.iter().enumerate() {
        if i > 0 {
            out.push(' ');
        }
        xml::length(out, each);
    }
    out.push('"');
    if stroke.dash.is_round() {
        out.push_str(" stroke-linecap=\"round\"");
    }
}

/// Writes a shape as path data.
fn outline(out: &mut String, shape: &Shape) {
    out.push_str(" d=\"");
    match shape {
        Shape::Lines { lines, .. } => lines.iter().for_each(|line| run(out, line)),
        Shape::Rings(rings) => rings.iter().for_each(|ring| {
            run(out, ring);
            out.push('Z');
        }),
        // circles are elements of their own and no clips
        Shape::Circle { .. } => {}
    }
    out.push('"');
}

fn run(out: &mut String, points: &[Point]) {
    for (i, point) in points.iter().enumerate() {
        // after a move, further pairs are lines to
        out.push(if i == 0 { 'M' } else { ' ' });
        xml::length(out, point.x);
        out.push(' ');
        xml::length(out, point.y);
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::charts::canvas::{Dash, Look, Rect, Size};

    #[test]
    fn a_dashed_line_is_one_element() {
        let mut canvas = Canvas::new(Size::new(100, 50).unwrap(), "t", "d");
        let stroke = Stroke::new(Ink::hex(0x336699), 1.5).dashed(Dash::Dashed(6.0, 3.5));
        canvas.line(&[Point::new(0.0, 1.25), Point::new(80.0, 40.0)], stroke);
        let svg = canvas.to_svg();
        assert_eq!(svg.matches("<path d=\"M0 1.25 80 40\"").count(), 1);
        assert!(svg.contains("stroke-dasharray=\"6 3.5\""));
    }

    #[test]
    fn a_prefix_reaches_every_identifier_and_cannot_break_out() {
        let mut canvas = Canvas::new(Size::new(100, 50).unwrap(), "t", "d");
        let sheet: Rect = canvas.size().sheet();
        canvas.clipped(sheet, |c| c.circle(Point::new(9.0, 9.0), 3.0, Look::filled(Ink::BLACK)));
        let svg = canvas.to_svg_with(SvgOptions { real_text: false, id_prefix: "a\"<9 " });
        assert!(svg.contains("id=\"a9c0\"") && svg.contains("url(#a9c0)") && svg.contains("a9title a9desc"));
    }
}
