//! The embedded faces: which glyph stands for a character, how wide it is, what it looks like.
//!
//! Everything is in font units, y upwards from the baseline. Knows nothing of sizes, inks or lines of text.
//!
//! # Source
//! B612 1.008 (the typeface made for flight decks) under the SIL Open Font License 1.1; where it lacks a letter,
//! a subset of `DejaVu Sans` 2.37. The licences lie beside the font files.

use std::sync::LazyLock;
use ttf_parser::gpos::{PairAdjustment, PositioningSubtable};
use ttf_parser::{GlyphId, OutlineBuilder, Tag};

/// Font units to the em, the same in every embedded face.
pub(super) const UNITS_PER_EM: f64 = 2000.0;
/// Height of B612's capitals and figures above the baseline.
pub(super) const CAP_HEIGHT: f64 = 1500.0;
/// Depth of B612's longest tails below the baseline.
pub(super) const DESCENT: f64 = 520.0;

/// One of the embedded faces.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub(super) enum Face {
    Regular,
    Bold,
    FallbackRegular,
    FallbackBold,
}

/// A glyph of a face.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub(super) struct Glyph {
    pub(super) face: Face,
    pub(super) id: u16,
}

/// A step of a glyph's outline.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum Step {
    Move(f32, f32),
    Line(f32, f32),
    Quad(f32, f32, f32, f32),
    Cubic(f32, f32, f32, f32, f32, f32),
    Close,
}

struct Loaded {
    face: ttf_parser::Face<'static>,
    kerning: Vec<PairAdjustment<'static>>,
}

static FACES: LazyLock<[Loaded; 4]> = LazyLock::new(|| {
    [
        load(include_bytes!("fonts/B612-Regular.otf")),
        load(include_bytes!("fonts/B612-Bold.otf")),
        load(include_bytes!("fonts/Fallback-Regular.ttf")),
        load(include_bytes!("fonts/Fallback-Bold.ttf")),
    ]
});

fn load(bytes: &'static [u8]) -> Loaded {
    let face = ttf_parser::Face::parse(bytes, 0).expect("an embedded font parses: a test reads all of them");
    Loaded { kerning: pair_adjustments(&face), face }
}

/// The pair tables that the face's `kern` feature names.
fn pair_adjustments(face: &ttf_parser::Face<'static>) -> Vec<PairAdjustment<'static>> {
    let Some(positioning) = face.tables().gpos else { return Vec::new() };
    let kern = Tag::from_bytes(b"kern");
    let features = positioning.features.into_iter().filter(|f| f.tag == kern);
    let mut lookups: Vec<u16> = features.flat_map(|f| f.lookup_indices).collect();
    lookups.sort_unstable();
    lookups.dedup();
    lookups
        .into_iter()
        .filter_map(|index| positioning.lookups.get(index))
        .flat_map(|lookup| lookup.subtables.into_iter::<PositioningSubtable>())
        .filter_map(|subtable| match subtable {
            PositioningSubtable::Pair(pairs) => Some(pairs),
            _ => None,
        })
        .collect()
}

impl Face {
    fn loaded(self) -> &'static Loaded {
        &FACES[self as usize]
    }

    fn fallback(self) -> Self {
        match self {
            Self::Regular | Self::FallbackRegular => Self::FallbackRegular,
            Self::Bold | Self::FallbackBold => Self::FallbackBold,
        }
    }

    fn find(self, character: char) -> Option<Glyph> {
        let id = self.loaded().face.glyph_index(character)?;
        Some(Glyph { face: self, id: id.0 })
    }

    /// The face in which to set a text: B612 unless it lacks one of the letters, since a word in two faces reads
    /// like an error. Signs do not count.
    pub(super) fn for_text(text: &str, bold: bool) -> Self {
        let house = if bold { Self::Bold } else { Self::Regular };
        let lacks = |c: char| c.is_alphabetic() && house.find(c).is_none();
        if text.chars().any(lacks) { house.fallback() } else { house }
    }

    /// The glyph for a character: of this face, else of the fallback, else an empty box.
    pub(super) fn glyph(self, character: char) -> Glyph {
        let fallback = self.fallback();
        // B612 has but some of the triangles, and a Moon so small that it reads as a c
        let first = if ('\u{25a0}'..='\u{27bf}').contains(&character) { fallback } else { self };
        first
            .find(character)
            .or_else(|| fallback.find(character))
            .or_else(|| fallback.find('\u{25a1}'))
            .unwrap_or(Glyph { face: fallback, id: 0 })
    }
}

impl Glyph {
    /// How far the pen moves.
    pub(super) fn advance(self) -> f64 {
        f64::from(self.face.loaded().face.glyph_hor_advance(GlyphId(self.id)).unwrap_or(0))
    }

    /// What is added to the advance before the next glyph, usually negative.
    pub(super) fn kerning_before(self, next: Self) -> f64 {
        if self.face != next.face {
            return 0.0;
        }
        let (left, right) = (GlyphId(self.id), GlyphId(next.id));
        let pairs = &self.face.loaded().kerning;
        f64::from(pairs.iter().find_map(|table| adjustment(table, left, right)).unwrap_or(0))
    }

    /// The box around the outline as (left, bottom, right, top), nothing for a blank.
    pub(super) fn ink_box(self) -> Option<[f64; 4]> {
        let b = self.face.loaded().face.glyph_bounding_box(GlyphId(self.id))?;
        Some([b.x_min, b.y_min, b.x_max, b.y_max].map(f64::from))
    }

    /// The outline, nothing for a blank.
    pub(super) fn outline(self) -> Vec<Step> {
        let mut steps = Steps(Vec::new());
        // a blank has no outline and says so with `None`
        let _ = self.face.loaded().face.outline_glyph(GlyphId(self.id), &mut steps);
        steps.0
    }
}

/// What one pair table says of two glyphs; `None` hands the question on to the next table.
fn adjustment(table: &PairAdjustment<'_>, left: GlyphId, right: GlyphId) -> Option<i16> {
    let row = table.coverage().get(left)?;
    let (first, _) = match table {
        PairAdjustment::Format1 { sets, .. } => sets.get(row)?.get(right)?,
        PairAdjustment::Format2 { classes, matrix, .. } => {
            matrix.get((classes.0.get(left), classes.1.get(right)))?
        }
    };
    Some(first.x_advance)
}

struct Steps(Vec<Step>);

impl OutlineBuilder for Steps {
    fn move_to(&mut self, x: f32, y: f32) {
        self.0.push(Step::Move(x, y));
    }
    fn line_to(&mut self, x: f32, y: f32) {
        self.0.push(Step::Line(x, y));
    }
    fn quad_to(&mut self, x1: f32, y1: f32, x: f32, y: f32) {
        self.0.push(Step::Quad(x1, y1, x, y));
    }
    fn curve_to(&mut self, x1: f32, y1: f32, x2: f32, y2: f32, x: f32, y: f32) {
        self.0.push(Step::Cubic(x1, y1, x2, y2, x, y));
    }
    fn close(&mut self) {
        self.0.push(Step::Close);
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_embedded_font_parses_and_has_the_same_units() {
        for loaded in FACES.iter() {
            assert_eq!(f64::from(loaded.face.units_per_em()), UNITS_PER_EM);
            assert!(!loaded.kerning.is_empty());
        }
        assert_eq!(Face::Regular.loaded().face.capital_height().map(f64::from), Some(CAP_HEIGHT));
        let tail = Face::Regular.glyph('g').ink_box().expect("g has ink");
        assert!(-tail[1] <= DESCENT, "{tail:?}");
    }

    #[test]
    fn the_signs_of_a_flight_chart_are_all_there() {
        for sign in "0123456789−+±°′″→←↑↓·–—…×≤≥≈µ½☾☀αβΔλφΩ▲▼◆○●ŁódźŠğışČŽāőЖяΣ".chars()
        {
            for bold in [false, true] {
                let face = Face::for_text("", bold);
                assert!(face.find(sign).or_else(|| face.fallback().find(sign)).is_some(), "{sign}");
            }
        }
    }

    #[test]
    fn a_word_is_set_in_one_face() {
        assert_eq!(Face::for_text("Zürich → Oslo ▲", false), Face::Regular);
        assert_eq!(Face::for_text("Łódź", true), Face::FallbackBold);
    }

    #[test]
    fn pairs_that_gape_are_drawn_together() {
        for face in [Face::Regular, Face::Bold, Face::FallbackRegular, Face::FallbackBold] {
            let [l, v, one, eight] = ['L', 'V', '1', '8'].map(|c| face.glyph(c));
            assert!(l.kerning_before(v) < 0.0, "{face:?}");
            assert_eq!(one.kerning_before(eight), 0.0, "{face:?}: figures keep their columns");
            assert_eq!(one.advance(), eight.advance(), "{face:?}");
        }
    }

    #[test]
    fn an_unknown_character_is_shown_as_a_box() {
        let unknown = Face::Regular.glyph('漢');
        assert_eq!(unknown, Face::Regular.glyph('□'));
        assert!(!unknown.outline().is_empty());
    }
}
