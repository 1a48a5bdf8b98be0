//! Names from outside made harmless for a terminal, a file or a picture.

/// The longest name that is shown whole.
const LONGEST: usize = 120;

/// A name on one line: no control or direction-changing characters, no runs of white space, cut when very long.
///
/// Letters stay as they are: what a format gives a meaning to (HTML, CSV, JSON) is escaped by its own writer.
pub fn one_line(name: &str) -> String {
    let visible: String = name.chars().map(|c| if is_hidden(c) { ' ' } else { c }).collect();
    let words = visible.split_whitespace().collect::<Vec<_>>().join(" ");
    if words.is_empty() {
        return "(unnamed)".to_string();
    }
    if words.chars().count() <= LONGEST {
        return words;
    }
    words.chars().take(LONGEST - 1).chain(std::iter::once('…')).collect()
}

/// Control characters, and those that reorder or hide text (Unicode Standard Annex 9, table 4; zero-width ones).
fn is_hidden(c: char) -> bool {
    c.is_control()
        || matches!(c, '\u{200b}'..='\u{200f}' | '\u{2028}'..='\u{202e}' | '\u{2060}'..='\u{206f}' | '\u{feff}' | '\u{61c}' | '\u{fff9}'..='\u{fffb}' | '\u{e0000}'..='\u{e007f}')
}

#[cfg(test)]
mod tests {
    use super::one_line;

    #[test]
    fn a_hostile_name_is_one_harmless_line() {
        assert_eq!(one_line("Varde\u{1b}[31m 71\r\n\u{202e}x"), "Varde [31m 71 x");
        assert_eq!(one_line(&"a".repeat(10_000)).chars().count(), 120);
        assert_eq!(one_line("Łódź 71"), "Łódź 71");
    }
}
