//! Text set in glyphs: cleaned, placed pen step by pen step, and measured.
//!
//! Knows nothing of pictures. It sets one line from left to right: no line breaks, no joining of Arabic letters, no
//! reordering; what a face cannot show becomes a box.

use super::font::{CAP_HEIGHT, DESCENT, Face, Glyph, UNITS_PER_EM};
use super::geometry::{Point, Rect};
use super::ink::{Ink, Stroke};

/// Which point of a text's length lies on its anchor.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Across {
    /// Where the text begins.
    #[default]
    Start,
    /// Its middle.
    Middle,
    /// Where it ends.
    End,
}

/// Which height of a text lies on its anchor.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Level {
    /// The line that letters stand on.
    #[default]
    Baseline,
    /// The top of capitals and figures.
    Top,
    /// Half the height of capitals and figures.
    Middle,
    /// The lowest tails.
    Bottom,
}

/// How far a text is turned clockwise about its anchor.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Turn {
    /// Not at all.
    #[default]
    None,
    /// It reads downwards.
    Quarter,
    /// It stands on its head.
    Half,
    /// It reads upwards.
    ThreeQuarters,
}

impl Turn {
    /// Clockwise degrees.
    pub(super) const fn degrees(self) -> u16 {
        self as u16 * 90
    }

    /// Where the horizontal and vertical unit steps of the text go.
    pub(super) const fn axes(self) -> [(f64, f64); 2] {
        match self {
            Self::None => [(1.0, 0.0), (0.0, 1.0)],
            Self::Quarter => [(0.0, 1.0), (-1.0, 0.0)],
            Self::Half => [(-1.0, 0.0), (0.0, -1.0)],
            Self::ThreeQuarters => [(0.0, -1.0), (1.0, 0.0)],
        }
    }

    /// A point given from the anchor along and below the text, turned about that anchor.
    pub(super) fn carry(self, anchor: Point, x: f64, y: f64) -> Point {
        let [(ax, ay), (bx, by)] = self.axes();
        anchor.moved(x * ax + y * bx, x * ay + y * by)
    }
}

/// How a text is set.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct TextStyle {
    /// The em, in canvas pixels; figures are three quarters of it high.
    pub size: f64,
    /// The colour.
    pub ink: Ink,
    /// Whether the bold face is used.
    pub bold: bool,
    /// Where along the text its anchor is.
    pub across: Across,
    /// At which height of the text its anchor is.
    pub level: Level,
    /// How far it is turned.
    pub turn: Turn,
    /// A line around the letters, beneath them, that keeps them legible on a busy ground.
    pub halo: Option<Stroke>,
}

impl TextStyle {
    /// Plain text whose anchor is the beginning of its baseline.
    pub const fn new(size: f64, ink: Ink) -> Self {
        Self {
            size,
            ink,
            bold: false,
            across: Across::Start,
            level: Level::Baseline,
            turn: Turn::None,
            halo: None,
        }
    }

    /// The same in the bold face.
    #[must_use]
    pub const fn bold(self) -> Self {
        Self { bold: true, ..self }
    }

    /// The same with its anchor elsewhere.
    #[must_use]
    pub const fn anchored(self, across: Across, level: Level) -> Self {
        Self { across, level, ..self }
    }

    /// The same, turned.
    #[must_use]
    pub const fn turned(self, turn: Turn) -> Self {
        Self { turn, ..self }
    }

    /// The same with a halo this far around the letters.
    #[must_use]
    pub const fn haloed(self, ink: Ink, reach: f64) -> Self {
        Self { halo: Some(Stroke::new(ink, 2.0 * reach)), ..self }
    }

    /// Canvas pixels for one font unit; a size without meaning gives 0.
    fn unit(self) -> f64 {
        let sensible = self.size > 0.0 && self.size <= 4000.0;
        if sensible { self.size / UNITS_PER_EM } else { 0.0 }
    }
}

/// What a text takes up before it is turned, in canvas pixels.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Extent {
    /// From pen to pen, with the white space before the first and behind the last letter.
    pub width: f64,
    /// From the top of capitals to the lowest tails, whichever letters occur.
    pub height: f64,
    /// The box around what is inked, from the beginning of the baseline; without extent for a blank text.
    pub ink: Rect,
}

/// A text as it will be drawn.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Label {
    pub(super) text: String,
    /// The beginning of the baseline.
    pub(super) origin: Point,
    pub(super) turn: Turn,
    /// Canvas pixels for one font unit.
    pub(super) unit: f64,
    pub(super) ink: Ink,
    pub(super) halo: Option<Stroke>,
    /// Glyphs with their pen positions in font units.
    pub(super) glyphs: Vec<(Glyph, f64)>,
    /// From pen to pen, in canvas pixels.
    pub(super) width: f64,
}

impl Label {
    /// Sets a text at an anchor.
    pub(super) fn set(text: &str, anchor: Point, style: &TextStyle) -> Self {
        let text = one_line(text);
        let (glyphs, advance) = place(&text, style.bold);
        let unit = style.unit();
        let width = advance * unit;
        let back = match style.across {
            Across::Start => 0.0,
            Across::Middle => width / 2.0,
            Across::End => width,
        };
        let down = unit
            * match style.level {
                Level::Baseline => 0.0,
                Level::Top => CAP_HEIGHT,
                Level::Middle => CAP_HEIGHT / 2.0,
                Level::Bottom => -DESCENT,
            };
        let origin = style.turn.carry(anchor, -back, down);
        Self { text, origin, turn: style.turn, unit, ink: style.ink, halo: style.halo, glyphs, width }
    }

    fn ink_box(&self) -> Rect {
        let boxes = self.glyphs.iter().filter_map(|(glyph, x)| {
            let [left, bottom, right, top] = glyph.ink_box()?;
            Some([x + left, -top, x + right, -bottom])
        });
        let whole = boxes.reduce(|a, b| [a[0].min(b[0]), a[1].min(b[1]), a[2].max(b[2]), a[3].max(b[3])]);
        let [left, top, right, bottom] = whole.unwrap_or_default().map(|v| v * self.unit);
        Rect { left, top, right, bottom }
    }
}

/// What a text takes up when set in a style.
pub fn measure(text: &str, style: &TextStyle) -> Extent {
    let label = Label::set(text, Point::default(), &TextStyle { turn: Turn::None, ..*style });
    Extent { width: label.width, height: (CAP_HEIGHT + DESCENT) * label.unit, ink: label.ink_box() }
}

/// Pen positions of a text's glyphs, and where the pen ends.
fn place(text: &str, bold: bool) -> (Vec<(Glyph, f64)>, f64) {
    let face = Face::for_text(text, bold);
    let mut glyphs: Vec<(Glyph, f64)> = Vec::new();
    let mut pen = 0.0;
    for glyph in text.chars().map(|c| face.glyph(c)) {
        if let Some((before, _)) = glyphs.last() {
            pen += before.kerning_before(glyph);
        }
        glyphs.push((glyph, pen));
        pen += glyph.advance();
    }
    (glyphs, pen)
}

/// A line longer than this is cut and ends in an ellipsis: no chart has room for more.
const LONGEST_LINE: usize = 400;

/// The text as one line of visible characters.
pub(super) fn one_line(text: &str) -> String {
    let mut visible = visible(text).map(|c| if c.is_whitespace() { ' ' } else { c });
    let mut line: String = visible.by_ref().take(LONGEST_LINE).collect();
    if visible.next().is_some() {
        line.push('…');
    }
    line
}

/// The characters that are meant to be seen: without controls, direction marks, joiners and the like, which could
/// reorder or hide what is read and some of which no XML may hold.
pub(super) fn visible(text: &str) -> impl Iterator<Item = char> + '_ {
    text.chars().map(|c| if matches!(c, '\t' | '\n' | '\r') { ' ' } else { c }).filter(|c| !is_hidden(*c))
}

fn is_hidden(c: char) -> bool {
    c.is_control()
        || matches!(c,
            '\u{ad}' | '\u{34f}' | '\u{61c}' | '\u{115f}'..='\u{1160}' | '\u{17b4}'..='\u{17b5}'
            | '\u{180b}'..='\u{180f}' | '\u{200b}'..='\u{200f}' | '\u{2028}'..='\u{202e}'
            | '\u{2060}'..='\u{206f}' | '\u{3164}' | '\u{fe00}'..='\u{fe0f}' | '\u{feff}' | '\u{ffa0}'
            | '\u{fff0}'..='\u{fffb}' | '\u{fffe}'..='\u{ffff}' | '\u{1d173}'..='\u{1d17a}'
            | '\u{e0000}'..='\u{e0fff}')
        // the last two of every plane are no characters
        || u32::from(c) & 0xfffe == 0xfffe
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn direction_marks_and_controls_are_not_set() {
        assert_eq!(one_line("a\u{202e}b\u{0}c\u{7}\td\u{2066}\u{feff}\ne"), "abc d e");
    }

    #[test]
    fn an_endless_line_is_cut_where_it_can_be_seen() {
        let line = one_line(&"x".repeat(100_000));
        assert_eq!(line.chars().count(), LONGEST_LINE + 1);
        assert!(line.ends_with('…'));
    }

    #[test]
    fn a_text_anchored_at_its_end_ends_there() {
        let style = TextStyle::new(20.0, Ink::BLACK).anchored(Across::End, Level::Middle);
        let label = Label::set("14:35Z", Point::new(100.0, 50.0), &style);
        assert!((label.origin.x + label.width - 100.0).abs() < 1e-9);
        assert!((label.origin.y - 57.5).abs() < 1e-9, "half of 0.75 em below");
    }

    #[test]
    fn a_turned_text_runs_upwards_from_its_anchor() {
        let style = TextStyle::new(20.0, Ink::BLACK)
            .anchored(Across::Middle, Level::Baseline)
            .turned(Turn::ThreeQuarters);
        let label = Label::set("elevation", Point::new(10.0, 50.0), &style);
        assert!((label.origin.y - 50.0 - label.width / 2.0).abs() < 1e-9);
        assert!((label.origin.x - 10.0).abs() < 1e-9);
    }

    #[test]
    fn a_size_without_meaning_takes_no_room() {
        for size in [0.0, -5.0, f64::NAN, f64::INFINITY] {
            assert_eq!(measure("abc", &TextStyle::new(size, Ink::BLACK)).width, 0.0);
        }
    }
}
