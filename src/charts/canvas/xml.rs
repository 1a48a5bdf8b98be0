//! Numbers and words as XML holds them: short, exact to a hundredth of a pixel, and inert.
//!
//! Knows nothing of what they describe.

use super::ink::Ink;
use super::text::visible;
use std::fmt::{self, Write as _};

/// Writes what is formatted.
pub(super) fn put(out: &mut String, formatted: fmt::Arguments<'_>) {
    // a string takes whatever is written to it
    let _ = out.write_fmt(formatted);
}

/// Writes a number with at most `decimals` decimals and no idle zeros. What is no number is written as 0.
pub(super) fn number(out: &mut String, value: f64, decimals: usize) {
    let value = if value.is_finite() { value } else { 0.0 };
    let begin = out.len();
    put(out, format_args!("{value:.decimals$}"));
    if decimals > 0 {
        let kept = out[begin..].trim_end_matches('0').trim_end_matches('.').len();
        out.truncate(begin + kept);
    }
    if &out[begin..] == "-0" {
        out.replace_range(begin.., "0");
    }
}

/// Writes a coordinate or a length.
pub(super) fn length(out: &mut String, value: f64) {
    number(out, value, 2);
}

/// Writes ` name="length"`.
pub(super) fn length_attribute(out: &mut String, name: &str, value: f64) {
    out.push(' ');
    out.push_str(name);
    out.push_str("=\"");
    length(out, value);
    out.push('"');
}

/// Writes an ink as the attribute `name`, with its opacity beside it.
pub(super) fn ink_attribute(out: &mut String, name: &str, ink: Ink) {
    let [red, green, blue] = ink.rgb;
    put(out, format_args!(" {name}=\"#{red:02x}{green:02x}{blue:02x}\""));
    if ink.alpha < 1.0 {
        put(out, format_args!(" {name}-opacity=\""));
        number(out, ink.alpha, 3);
        out.push('"');
    }
}

/// Writes text that can end neither an element nor an attribute; controls and direction marks are left out.
pub(super) fn words(out: &mut String, text: &str) {
    for c in visible(text) {
        match c {
            '&' => out.push_str("&amp;"),
            '<' => out.push_str("&lt;"),
            '>' => out.push_str("&gt;"),
            '"' => out.push_str("&quot;"),
            '\'' => out.push_str("&#39;"),
            _ => out.push(c),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn written(value: f64) -> String {
        let mut out = String::from("x");
        length(&mut out, value);
        out.split_off(1)
    }

    #[test]
    fn numbers_are_short_and_keep_hundredths() {
        let cases =
            [(12.0, "12"), (100.0, "100"), (0.125, "0.12"), (-0.001, "0"), (-3.5, "-3.5"), (0.0, "0")];
        for (value, text) in cases {
            assert_eq!(written(value), text);
        }
        assert_eq!(written(f64::NAN), "0");
    }

    #[test]
    fn words_cannot_leave_their_place() {
        let mut out = String::new();
        words(&mut out, "</title><script>\"'&\u{0}\u{202e}\u{fffe}");
        assert_eq!(out, "&lt;/title&gt;&lt;script&gt;&quot;&#39;&amp;");
    }
}
