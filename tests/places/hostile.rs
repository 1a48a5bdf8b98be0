//! Codes that no aerodrome has, from slips of the finger to attempts to do harm.
//!
//! Does not know where a code was read.

use gloamline::places::{Aerodrome, UnknownAerodrome, aerodrome};
use proptest::prelude::*;

/// A message stays on one line of a terminal, even where every character quoted has to be escaped.
const LONGEST_MESSAGE: usize = 400;

fn near(code: &str) -> Vec<&'static str> {
    aerodrome(code).err().iter().flat_map(UnknownAerodrome::near).map(Aerodrome::code).collect()
}

#[test]
fn a_slip_in_a_code_offers_the_code_that_was_meant() {
    for (slip, meant) in
        [("CYYX", "CYYZ"), ("EGLLL", "EGLL"), ("EHMA", "EHAM"), ("EDD", "EDDF"), ("KJFQ", "KJFK")]
    {
        assert!(near(slip).contains(&meant), "{slip}: {:?}", near(slip));
    }
}

#[test]
fn a_city_or_a_name_in_place_of_a_code_offers_its_aerodromes() {
    assert!(near("Frankfurt").contains(&"EDDF"), "{:?}", near("Frankfurt"));
    assert!(near("SCHIPHOL").contains(&"EHAM"), "{:?}", near("SCHIPHOL"));
    assert!(near("tromsø").contains(&"ENTC") || near("tromso").contains(&"ENTC"));
}

#[test]
fn no_more_than_five_are_offered_and_those_with_an_iata_code_come_first() {
    let offered = aerodrome("ENXX").unwrap_err().near();
    assert!(offered.len() <= 5);
    let without = offered.iter().skip_while(|field| field.iata().is_some());
    assert!(without.into_iter().all(|field| field.iata().is_none()), "{offered:?}");
}

#[test]
fn hostile_codes_are_inert() {
    let long = "A".repeat(10_000);
    let wide = "\u{202e}".repeat(10_000);
    for code in [
        "\0\0\0\0",
        "\0\0\0",
        "\x1b[2J",
        "CY\x07Z",
        "\u{202e}ZYYC",
        "€",
        "🛩🛩🛩🛩",
        "K\nJF",
        "ＫＪＦＫ",
        "K0",
        "....",
        &long,
        &wide,
    ] {
        let unknown = aerodrome(code).unwrap_err();
        let message = format!("{unknown} {}", unknown.hint().unwrap_or_default());
        assert!(!message.contains(|c: char| c.is_control() || c == '\u{202e}'), "{message:?}");
        assert!(unknown.to_string().len() <= LONGEST_MESSAGE, "{} bytes", unknown.to_string().len());
    }
}

#[test]
fn a_long_code_is_seen_to_be_cut() {
    let unknown = aerodrome(&"A".repeat(10_000)).unwrap_err();
    assert!(unknown.to_string().ends_with("AAAA…"));
    assert!(unknown.hint().is_none());
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 64, failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn any_text_is_a_code_or_a_quiet_refusal(text in ".{0,40}") {
        match aerodrome(&text) {
            Ok(field) => prop_assert!([field.icao(), field.iata()].contains(&Some(text.trim().to_ascii_uppercase().as_str()))),
            Err(unknown) => {
                prop_assert!(!unknown.to_string().contains(char::is_control));
                prop_assert!(unknown.near().len() <= 5);
            }
        }
    }
}
