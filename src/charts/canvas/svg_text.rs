//! Text in an SVG: each glyph's outline once, and its uses.
//!
//! Knows nothing of layout: a label says where its glyphs stand.

use super::font::{Glyph, Step, UNITS_PER_EM};
use super::text::Label;
use super::xml;
use std::collections::BTreeSet;

/// Writes the outline of every glyph that the labels use, in font units with y downwards.
pub(super) fn define_glyphs<'a>(out: &mut String, prefix: &str, labels: impl Iterator<Item = &'a Label>) {
    let glyphs: BTreeSet<Glyph> =
        labels.flat_map(|label| label.glyphs.iter().map(|(glyph, _)| *glyph)).collect();
    for glyph in glyphs {
        let steps = glyph.outline();
        if !steps.is_empty() {
            out.push_str("<path id=\"");
            identifier(out, prefix, glyph);
            out.push_str("\" d=\"");
            for step in steps {
                write_step(out, step);
            }
            out.push_str("\"/>\n");
        }
    }
}

/// An identifier that depends on the glyph alone: two pictures in one page may define the same one alike.
fn identifier(out: &mut String, prefix: &str, glyph: Glyph) {
    xml::put(out, format_args!("{prefix}g{}-{}", glyph.face as u8, glyph.id));
}

fn write_step(out: &mut String, step: Step) {
    match step {
        Step::Move(x, y) => coordinates(out, 'M', &[x, -y]),
        Step::Line(x, y) => coordinates(out, 'L', &[x, -y]),
        Step::Quad(x1, y1, x, y) => coordinates(out, 'Q', &[x1, -y1, x, -y]),
        Step::Cubic(x1, y1, x2, y2, x, y) => coordinates(out, 'C', &[x1, -y1, x2, -y2, x, -y]),
        Step::Close => out.push('Z'),
    }
}

fn coordinates(out: &mut String, command: char, values: &[f32]) {
    out.push(command);
    for (i, value) in values.iter().enumerate() {
        if i > 0 {
            out.push(' ');
        }
        // half a font unit is a hundredth of a pixel in letters 40 px high
        xml::number(out, f64::from(*value), 0);
    }
}

/// Writes a label as uses of its glyphs.
pub(super) fn draw(out: &mut String, prefix: &str, label: &Label) {
    if let Some(halo) = label.halo {
        out.push_str("<g fill=\"none\"");
        xml::ink_attribute(out, "stroke", halo.ink);
        xml::length_attribute(out, "stroke-width", halo.width / label.unit);
        uses(out, prefix, label);
    }
    out.push_str("<g");
    xml::ink_attribute(out, "fill", label.ink);
    uses(out, prefix, label);
}

/// Writes the group's place and the glyphs in it, and ends the group.
fn uses(out: &mut String, prefix: &str, label: &Label) {
    out.push_str(" transform=\"");
    place(out, label);
    out.push_str("scale(");
    xml::number(out, label.unit, 6);
    out.push_str(")\">");
    for (glyph, x) in label.glyphs.iter().filter(|(glyph, _)| glyph.ink_box().is_some()) {
        out.push_str("<use xlink:href=\"#");
        identifier(out, prefix, *glyph);
        out.push('"');
        xml::length_attribute(out, "x", *x);
        out.push_str("/>");
    }
    out.push_str("</g>\n");
}

fn place(out: &mut String, label: &Label) {
    out.push_str("translate(");
    xml::length(out, label.origin.x);
    out.push(' ');
    xml::length(out, label.origin.y);
    out.push(')');
    if label.turn.degrees() > 0 {
        xml::put(out, format_args!("rotate({})", label.turn.degrees()));
    }
}

/// Writes the label as invisible text of the same extent.
pub(super) fn overlay(out: &mut String, label: &Label) {
    out.push_str("<text fill-opacity=\"0\" font-family=\"B612, sans-serif\" transform=\"");
    place(out, label);
    out.push('"');
    xml::length_attribute(out, "font-size", label.unit * UNITS_PER_EM);
    xml::length_attribute(out, "textLength", label.width);
    out.push_str(" lengthAdjust=\"spacingAndGlyphs\">");
    xml::words(out, &label.text);
    out.push_str("</text>\n");
}

#[cfg(test)]
mod tests {
    use crate::charts::canvas::{Canvas, Ink, Point, Size, SvgOptions, TextStyle};

    fn canvas() -> Canvas {
        let mut canvas = Canvas::new(Size::new(200, 50).unwrap(), "t", "d");
        canvas.text("noon <b>", Point::new(5.0, 30.0), &TextStyle::new(16.0, Ink::BLACK));
        canvas
    }

    #[test]
    fn a_repeated_letter_is_outlined_once() {
        let svg = canvas().to_svg();
        // n, o, <, b, > are outlined; two n and two o are used
        assert_eq!(svg.matches("<path id=\"g").count(), 5);
        assert_eq!(svg.matches("<use ").count(), 7);
        assert!(!svg.contains("<text"));
    }

    #[test]
    fn real_text_lies_over_its_outlines_on_demand() {
        let svg = canvas().to_svg_with(SvgOptions { real_text: true, id_prefix: "" });
        assert!(svg.contains(">noon &lt;b&gt;</text>"));
        assert!(!svg.contains("role=\"img\""));
    }
}
