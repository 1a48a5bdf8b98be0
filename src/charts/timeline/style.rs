//! The inks, looks and letters of the timeline.
//!
//! The states grow darker from daylight to darkness by steps that remain in grey, and each has its own texture. Knows
//! nothing of places on the sheet.

use crate::charts::canvas::{Canvas, Hatch, Ink, Look, Point, Rect, TextStyle, Texture, measure};
use crate::label::one_line;
use crate::light::State;

pub(in crate::charts) const INK: Ink = Ink::hex(0x18202c);
pub(in crate::charts) const MUTED: Ink = Ink::hex(0x4b5462);
pub(in crate::charts) const RULE: Ink = Ink::hex(0x7d8694);
pub(in crate::charts) const CURVE: Ink = Ink::hex(0x10161f);
pub(in crate::charts) const CIRCLE: Ink = Ink::hex(0x7a1f3d);
pub(super) const DECK: Ink = Ink::hex(0x0b5a52);
pub(super) const SUN: Ink = Ink::hex(0xa84300);
pub(in crate::charts) const PLATE: Ink = Ink::WHITE.with_alpha(0.88);

/// The smallest letters of the picture.
pub(in crate::charts) const SMALL: f64 = 14.0;
pub(in crate::charts) const TEXT: f64 = 15.0;

/// The ink that stands for a state, in pictures and on maps.
pub(crate) fn state_ink(state: State) -> Ink {
    Ink::hex(match state {
        State::Daylight => 0xfff8e1,
        State::CivilTwilight => 0xf5dcb8,
        State::NauticalTwilight => 0xd5c6cf,
        State::AstronomicalTwilight => 0xadb0cb,
        State::Darkness => 0x7a84a6,
    })
}

/// How a state's band and its part of the strip are filled.
pub(in crate::charts) fn look(state: State) -> Look {
    let texture = match state {
        State::Daylight => None,
        State::CivilTwilight => Some((Texture::Dots, 0xd3ae7c, 14.0)),
        State::NauticalTwilight => Some((Texture::Rising, 0xb9a5b5, 16.0)),
        State::AstronomicalTwilight => Some((Texture::Falling, 0x9296b8, 16.0)),
        State::Darkness => Some((Texture::Crossed, 0x6c7699, 18.0)),
    };
    let look = Look::filled(state_ink(state));
    texture.map_or(look, |(texture, ink, spacing)| {
        look.hatched(Hatch { spacing, ..Hatch::new(texture, Ink::hex(ink)) })
    })
}

/// A text of a size in the main ink.
pub(in crate::charts) const fn letters(size: f64) -> TextStyle {
    TextStyle::new(size, INK)
}

/// The text as one clean line that is no wider than `width`: cut with an ellipsis where it is.
pub(in crate::charts) fn fitted(text: &str, style: &TextStyle, width: f64) -> String {
    let line = one_line(text);
    if measure(&line, style).width <= width {
        return line;
    }
    let letters: Vec<char> = line.chars().collect();
    let cut = |count: usize| format!("{}…", letters[..count].iter().collect::<String>().trim_end());
    let mut count = letters.len();
    while count > 0 && measure(&cut(count), style).width > width {
        count -= 1;
    }
    cut(count)
}

/// A light ground for letters.
pub(in crate::charts) fn plate(canvas: &mut Canvas, rect: Rect) {
    canvas.rect(rect, Look::filled(PLATE));
}

/// Sets the text and says where it ends.
pub(in crate::charts) fn set(canvas: &mut Canvas, text: &str, at: Point, style: &TextStyle) -> f64 {
    canvas.text(text, at, style);
    at.x + measure(text, style).width
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Relative luminance of an opaque ink, by the weights of sRGB.
    fn luminance(ink: Ink) -> f64 {
        let linear = ink.rgb.map(|v| {
            let v = f64::from(v) / 255.0;
            if v <= 0.04045 { v / 12.92 } else { ((v + 0.055) / 1.055).powf(2.4) }
        });
        0.2126 * linear[0] + 0.7152 * linear[1] + 0.0722 * linear[2]
    }

    #[test]
    fn the_states_darken_step_by_step_and_letters_stay_legible_on_all() {
        let grounds = State::ALL.map(|state| luminance(look(state).fill.unwrap()));
        for pair in grounds.windows(2) {
            assert!((pair[0] + 0.05) / (pair[1] + 0.05) > 1.2, "{grounds:?}");
        }
        let darkest = grounds[4];
        assert!((darkest + 0.05) / (luminance(INK) + 0.05) > 4.0, "{darkest}");
    }

    #[test]
    fn no_two_states_share_a_texture() {
        let textures = State::ALL.map(|state| look(state).hatch.map(|h| format!("{:?}", h.texture)));
        for (i, texture) in textures.iter().enumerate() {
            assert!(!textures[..i].contains(texture));
        }
    }

    #[test]
    fn a_name_is_cut_to_its_room() {
        let style = letters(TEXT);
        for text in ["x".repeat(10_000), "  a\u{202e}b ".to_string(), String::new()] {
            assert!(measure(&fitted(&text, &style, 200.0), &style).width <= 200.0);
        }
        assert_eq!(fitted("Varde 71", &style, 200.0), "Varde 71");
        assert!(fitted(&"Varde ".repeat(50), &style, 200.0).ends_with("Varde…"));
    }
}
