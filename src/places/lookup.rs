//! Finding an aerodrome by its ICAO or IATA code, and saying kindly that there is none.
//!
//! Does not know city codes (`LON`, `NYC`), which name no aerodrome.

use super::near;
use super::table::{Aerodrome, by_iata, by_icao};

/// A code is quoted up to this length, so that a hostile file cannot flood a terminal.
const LONGEST_QUOTED: usize = 32;

/// A code that no aerodrome of the table has.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
#[error("{}", said(.code))]
pub struct UnknownAerodrome {
    code: String,
}

/// The aerodrome that has an ICAO or IATA code, in either case of letters.
///
/// # Cost
/// A binary search in the embedded table: some 20 to 50 ns, nothing allocated unless there is no such code.
///
/// # Errors
/// No aerodrome has the code.
pub fn aerodrome(code: &str) -> Result<Aerodrome, UnknownAerodrome> {
    let code = code.trim();
    find(code.as_bytes()).ok_or_else(|| UnknownAerodrome::new(code))
}

fn find(code: &[u8]) -> Option<Aerodrome> {
    // a missing code is zeros in the table, so nothing but letters may be searched for
    if !code.iter().all(u8::is_ascii_alphabetic) {
        return None;
    }
    match *code {
        [a, b, c, d] => by_icao([a, b, c, d].map(|letter| letter.to_ascii_uppercase())),
        [a, b, c] => by_iata([a, b, c].map(|letter| letter.to_ascii_uppercase())),
        _ => None,
    }
}

impl UnknownAerodrome {
    fn new(code: &str) -> Self {
        // one more than is quoted, so that the cut shows
        Self { code: code.chars().take(LONGEST_QUOTED + 1).collect() }
    }

    /// The code as it was given, without the white space about it; cut short if it was very long.
    pub fn code(&self) -> &str {
        &self.code
    }

    /// Up to five aerodromes that may have been meant, the likeliest first.
    ///
    /// Searched for when asked, because a roster may hold a million bad codes and show the cure for none of them.
    pub fn near(&self) -> Vec<Aerodrome> {
        if self.code.chars().count() > LONGEST_QUOTED { Vec::new() } else { near::to(&self.code) }
    }

    /// The near matches as a sentence, such as `did you mean CYYZ (Toronto Pearson International Airport)?`.
    pub fn hint(&self) -> Option<String> {
        let near: Vec<String> = self.near().into_iter().map(described).collect();
        if near.is_empty() { None } else { Some(format!("did you mean {}?", near.join(", "))) }
    }
}

fn described(field: Aerodrome) -> String {
    let (code, name, city) = (field.code(), field.name(), field.city());
    if city.is_empty() || name.contains(city) {
        format!("{code} ({name})")
    } else {
        format!("{code} ({name}, {city})")
    }
}

fn said(code: &str) -> String {
    if code.is_empty() {
        "the aerodrome code is empty".into()
    } else {
        format!("no aerodrome has the code {}", quoted(code))
    }
}

/// The code with everything escaped that could act on a terminal, cut at a length that fits a line.
fn quoted(code: &str) -> String {
    let mut text = String::new();
    for c in code.chars().take(LONGEST_QUOTED) {
        match c {
            '\'' | '"' => text.push(c),
            _ => text.extend(c.escape_debug()),
        }
    }
    if code.chars().nth(LONGEST_QUOTED).is_some() {
        text.push('…');
    }
    text
}

#[cfg(test)]
mod tests {
    use super::aerodrome;

    #[test]
    fn a_code_is_found_in_any_case_and_with_space_about_it() {
        for code in ["CYYZ", "cyyz", " YYZ\n", "yYz"] {
            assert_eq!(aerodrome(code).unwrap().code(), "CYYZ");
        }
    }

    #[test]
    fn an_unknown_code_is_named_with_its_cure() {
        let unknown = aerodrome("CYYX").unwrap_err();
        assert_eq!(unknown.to_string(), "no aerodrome has the code CYYX");
        assert!(
            unknown.hint().unwrap().starts_with("did you mean CYYZ (Toronto Pearson International Airport")
        );
    }

    #[test]
    fn a_missing_code_is_said_to_be_missing() {
        let unknown = aerodrome("  ").unwrap_err();
        assert_eq!((unknown.to_string().as_str(), unknown.hint()), ("the aerodrome code is empty", None));
    }
}
