//! What a mark is drawn with: inks, strokes, dashes and hatchings.
//!
//! Knows nothing of where a mark lies.

/// A colour and how much of what lies beneath it hides.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Ink {
    /// Red, green and blue of sRGB.
    pub rgb: [u8; 3],
    /// 0 is invisible, 1 hides everything beneath.
    pub alpha: f64,
}

impl Ink {
    /// Opaque black.
    pub const BLACK: Self = Self::rgb(0, 0, 0);
    /// Opaque white.
    pub const WHITE: Self = Self::rgb(255, 255, 255);

    /// An opaque colour from its parts.
    pub const fn rgb(red: u8, green: u8, blue: u8) -> Self {
        Self { rgb: [red, green, blue], alpha: 1.0 }
    }

    /// An opaque colour as it is written in style sheets: `Ink::hex(0x1f77b4)`.
    pub const fn hex(rgb: u32) -> Self {
        Self::rgb((rgb >> 16) as u8, (rgb >> 8) as u8, rgb as u8)
    }

    /// The same colour, hiding only this part of what lies beneath; what is not a number hides nothing.
    #[must_use]
    pub const fn with_alpha(self, alpha: f64) -> Self {
        let alpha = if alpha.is_nan() { 0.0 } else { alpha.clamp(0.0, 1.0) };
        Self { rgb: self.rgb, alpha }
    }
}

/// How a line is interrupted.
///
/// # Shapes and units
/// Lengths in canvas pixels.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub enum Dash {
    /// Not at all.
    #[default]
    Solid,
    /// Pieces of the first length with gaps of the second.
    Dashed(f64, f64),
    /// Round dots as wide as the line, their centres this far apart.
    Dotted(f64),
    /// A piece of the first length, a gap of the second, a dot, a gap.
    DashDot(f64, f64),
}

impl Dash {
    /// The lengths drawn and skipped in turn, or nothing for a solid line.
    pub(super) fn lengths(self) -> Vec<f64> {
        let lengths = match self {
            Self::Solid => Vec::new(),
            Self::Dashed(on, off) => vec![on, off],
            Self::Dotted(apart) => vec![0.0, apart],
            Self::DashDot(on, off) => vec![on, off, 0.0, off],
        };
        // finer than this nothing can be told apart, and the number of pieces explodes
        let drawable = lengths.iter().all(|l| (0.0..=1e4).contains(l)) && lengths.iter().sum::<f64>() >= 0.25;
        if drawable { lengths } else { Vec::new() }
    }

    /// Whether the pieces need round ends to be seen.
    pub(super) const fn is_round(self) -> bool {
        matches!(self, Self::Dotted(_) | Self::DashDot(..))
    }
}

/// A line's ink, width and dashes; joins are round.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Stroke {
    /// The colour.
    pub ink: Ink,
    /// Across the line, in canvas pixels.
    pub width: f64,
    /// How the line is interrupted.
    pub dash: Dash,
}

impl Stroke {
    /// A solid line.
    pub const fn new(ink: Ink, width: f64) -> Self {
        Self { ink, width, dash: Dash::Solid }
    }

    /// The same line, interrupted.
    #[must_use]
    pub const fn dashed(self, dash: Dash) -> Self {
        Self { dash, ..self }
    }

    /// Whether anything of it would be seen.
    pub(super) fn is_visible(self) -> bool {
        self.width > 0.0 && self.width < 1e4 && self.ink.alpha > 0.0
    }
}

/// A texture that tells areas apart where colours cannot: in grey print and for colour-blind readers.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Texture {
    /// Lines that climb to the right.
    Rising,
    /// Lines that fall to the right.
    Falling,
    /// Level lines.
    Level,
    /// Upright lines.
    Upright,
    /// Rising and falling lines.
    Crossed,
    /// Dots in staggered rows.
    Dots,
}

/// A texture with its ink and measures. Neighbouring areas with the same hatch join without a seam, because the
/// lines are counted from the canvas' corner.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Hatch {
    /// What is repeated.
    pub texture: Texture,
    /// The colour.
    pub ink: Ink,
    /// From line to line, in canvas pixels.
    pub spacing: f64,
    /// The width of a line or of a dot, in canvas pixels.
    pub weight: f64,
}

impl Hatch {
    /// A hatch of lines 1 px wide and 8 px apart, or of dots twice as wide.
    pub const fn new(texture: Texture, ink: Ink) -> Self {
        let weight = if matches!(texture, Texture::Dots) { 2.0 } else { 1.0 };
        Self { texture, ink, spacing: 8.0, weight }
    }
}

/// How an area or a closed shape is drawn: each part is left out when `None`.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Look {
    /// The ink inside.
    pub fill: Option<Ink>,
    /// The texture over that ink.
    pub hatch: Option<Hatch>,
    /// The line around.
    pub stroke: Option<Stroke>,
}

impl Look {
    /// Ink inside, nothing around.
    pub const fn filled(ink: Ink) -> Self {
        Self { fill: Some(ink), hatch: None, stroke: None }
    }

    /// A line around, nothing inside.
    pub const fn outlined(stroke: Stroke) -> Self {
        Self { fill: None, hatch: None, stroke: Some(stroke) }
    }

    /// The same with a texture over the ink inside.
    #[must_use]
    pub const fn hatched(self, hatch: Hatch) -> Self {
        Self { hatch: Some(hatch), ..self }
    }

    /// The same with a line around.
    #[must_use]
    pub const fn edged(self, stroke: Stroke) -> Self {
        Self { stroke: Some(stroke), ..self }
    }
}

#[cfg(test)]
mod tests {
    use super::{Dash, Ink};

    #[test]
    fn a_colour_reads_as_in_a_style_sheet() {
        assert_eq!(Ink::hex(0x1f77b4).rgb, [0x1f, 0x77, 0xb4]);
        assert_eq!(Ink::BLACK.with_alpha(f64::NAN).alpha, 0.0);
        assert_eq!(Ink::BLACK.with_alpha(7.0).alpha, 1.0);
    }

    #[test]
    fn dashes_too_fine_or_without_meaning_leave_the_line_solid() {
        assert!(Dash::Dashed(0.0, 0.0).lengths().is_empty());
        assert!(Dash::Dashed(-4.0, 8.0).lengths().is_empty());
        assert!(Dash::Dashed(f64::NAN, 8.0).lengths().is_empty());
        assert_eq!(Dash::DashDot(6.0, 3.0).lengths(), [6.0, 3.0, 0.0, 3.0]);
    }
}
