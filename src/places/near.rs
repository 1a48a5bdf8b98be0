//! Which aerodromes may have been meant by a code that none has.
//!
//! Does not know which of them a flight could reach.

use super::table::{Aerodrome, aerodromes};
use std::cmp::Reverse;

/// More suggestions than this are no help.
const MOST: usize = 5;
/// A text longer than a code may be a name or a city.
const LONGEST_CODE: usize = 4;

/// Up to five aerodromes whose code is one slip away from the text, or whose name or city it is.
///
/// The whole name or city first, then codes, then the beginning and then any part of a name or city; among equals those
/// with an IATA code, then codes of the text's own length, then the fields with the most runways.
pub(super) fn to(text: &str) -> Vec<Aerodrome> {
    let name = (text.chars().count() > LONGEST_CODE).then(|| text.to_lowercase());
    let code = text.to_ascii_uppercase();
    let mut found: Vec<_> = aerodromes()
        .filter_map(|field| likeness(field, &code, name.as_deref()).map(|rank| (rank, field)))
        .collect();
    found.sort_by_key(|&(rank, field)| {
        let other_length = field.code().len() != text.len();
        (rank, field.iata().is_none(), other_length, Reverse(field.runway_end_count()), field.code())
    });
    found.into_iter().take(MOST).map(|(_, field)| field).collect()
}

/// How unlike the text an aerodrome is, or nothing where it is not alike at all.
fn likeness(field: Aerodrome, code: &str, name: Option<&str>) -> Option<u8> {
    let by_code = [field.icao(), field.iata()]
        .into_iter()
        .flatten()
        .any(|own| one_slip_apart(own.as_bytes(), code.as_bytes()))
        .then_some(1);
    let by_name = name.into_iter().flat_map(|name| [named(field.city(), name), named(field.name(), name)]);
    by_name.chain([by_code]).flatten().min()
}

/// How a lower-case text stands in a name: it is the whole, the beginning or a part of it.
fn named(own: &str, text: &str) -> Option<u8> {
    let own = own.to_lowercase();
    if own == text {
        return Some(0);
    }
    own.find(text).map(|at| if at == 0 { 2 } else { 3 })
}

/// Whether one substituted, missing or added byte, or two neighbours exchanged, turn one code into the other.
fn one_slip_apart(a: &[u8], b: &[u8]) -> bool {
    let (short, long) = if a.len() <= b.len() { (a, b) } else { (b, a) };
    let same = short.iter().zip(long).take_while(|(x, y)| x == y).count();
    let (short, long) = (&short[same..], &long[same..]);
    match (short, long) {
        ([x, y, rest_a @ ..], [z, w, rest_b @ ..]) if (x, y) == (w, z) && rest_a == rest_b => true,
        ([_, rest_a @ ..], [_, rest_b @ ..]) if short.len() == long.len() => rest_a == rest_b,
        (_, [_, rest @ ..]) => short == rest,
        _ => false,
    }
}

#[cfg(test)]
mod tests {
    use super::{one_slip_apart, to};

    #[test]
    fn one_slip_is_one_letter_or_two_exchanged() {
        for slip in ["CYYX", "XYYZ", "YCYZ", "CYY", "YYZ", "CYYZZ", "ACYYZ"] {
            assert!(one_slip_apart(b"CYYZ", slip.as_bytes()), "{slip}");
        }
        for far in ["CYYZ", "CXXZ", "CYYZAB", "ZYYC", "", "C"] {
            assert!(!one_slip_apart(b"CYYZ", far.as_bytes()), "{far}");
        }
    }

    #[test]
    fn a_city_or_a_name_finds_its_aerodromes() {
        assert!(to("heathrow").iter().any(|field| field.code() == "EGLL"));
        assert_eq!(to("Longyearbyen")[0].code(), "ENSB");
    }
}
