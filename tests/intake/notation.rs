//! One point has many spellings, and all mean the same place.

use gloamline::intake::{IntakeError, Stop, place_argument};
use gloamline::units::Place;
use proptest::prelude::*;

/// Decimals of degrees written to twelve places, and sums of sixtieths.
const ROUNDING_DEG: f64 = 1e-9;

fn read(text: &str) -> Result<Stop, IntakeError> {
    place_argument("place", text)
}

fn assert_at(text: &str, lat: f64, lon: f64) {
    let found = read(text).unwrap_or_else(|error| panic!("{error}")).place;
    let wanted = Place::from_deg(lat, lon).unwrap();
    assert!((found.lat.deg() - wanted.lat.deg()).abs() < ROUNDING_DEG, "{text}: {found:?}");
    assert!((found.lon.deg() - wanted.lon.deg()).abs() < ROUNDING_DEG, "{text}: {found:?}");
}

/// A latitude or longitude in whole seconds of arc, and its letter.
struct Arc {
    d: u32,
    m: u32,
    s: u32,
    letter: char,
}

impl Arc {
    fn of(seconds: i32, letters: [char; 2]) -> Self {
        let all = seconds.unsigned_abs();
        let letter = letters[usize::from(seconds < 0)];
        Self { d: all / 3600, m: all / 60 % 60, s: all % 60, letter }
    }

    fn deg(&self) -> f64 {
        f64::from(self.d * 3600 + self.m * 60 + self.s) / 3600.0
    }
}

/// All spellings to the second, then those that only a point on whole minutes or whole degrees has.
fn spellings(lat: &Arc, lon: &Arc) -> Vec<String> {
    let mut all = Vec::new();
    let mut both = |write: &dyn Fn(&Arc, usize) -> String| {
        let (a, b) = (write(lat, 2), write(lon, 3));
        let (n, e) = (lat.letter, lon.letter);
        for gap in ["", " ", ", "] {
            all.push(format!("{a}{n}{gap}{b}{e}"));
            all.push(format!("{n}{a}{gap}{e}{b}"));
        }
        all.push(format!("{a}{n}{b}{e}").to_lowercase());
    };
    both(&|a, w| format!("{:0w$}{:02}{:02}", a.d, a.m, a.s));
    both(&|a, w| format!("{:0w$}-{:02}-{:02}", a.d, a.m, a.s));
    both(&|a, _| format!("{} {} {}", a.d, a.m, a.s));
    both(&|a, _| format!("{}°{}'{}\"", a.d, a.m, a.s));
    both(&|a, w| format!("{:0w$}° {:02}′ {:02}″", a.d, a.m, a.s));
    both(&|a, _| format!("{:.12}", a.deg()));
    if lat.s == 0 && lon.s == 0 {
        both(&|a, w| format!("{:0w$}{:02}", a.d, a.m));
        both(&|a, w| format!("{:0w$}{:02}.0", a.d, a.m));
        both(&|a, w| format!("{:0w$} {:02}.0", a.d, a.m));
        both(&|a, w| format!("{:0w$}-{:02}", a.d, a.m));
        both(&|a, _| format!("{}°{}'", a.d, a.m));
        if lat.m == 0 && lon.m == 0 {
            both(&|a, w| format!("{:0w$}", a.d));
            both(&|a, _| format!("{}°", a.d));
        }
    }
    let sign = |a: &Arc| if matches!(a.letter, 'S' | 'W') { -a.deg() } else { a.deg() };
    all.push(format!("{:.12},{:.12}", sign(lat), sign(lon)));
    all.push(format!(" {:.12} , {:.12} ", sign(lat), sign(lon)));
    all
}

proptest! {
    #[test]
    fn every_notation_of_one_point_is_the_same_place(
        lat in -324_000..=324_000_i32, lon in -648_000..648_000_i32, unit in prop::sample::select(vec![1, 60, 3600]),
    ) {
        let (lat, lon) = (lat / unit * unit, lon / unit * unit);
        let (a, b) = (Arc::of(lat, ['N', 'S']), Arc::of(lon, ['E', 'W']));
        for text in spellings(&a, &b) {
            assert_at(&text, f64::from(lat) / 3600.0, f64::from(lon) / 3600.0);
        }
    }

    #[test]
    fn no_text_makes_the_reader_panic(text in "[0-9NSEW °'\"′″.,:\u{661}éa-z-]{0,24}") {
        let _ = read(&text);
    }
}

#[test]
fn the_trades_own_examples_are_read() {
    for text in [
        "78°30'N 020°00'W",
        "N78 30.0 W020 00.0",
        "78-30N 020-00W",
        "N7830.0W02000.0",
        "783000N0200000W",
        "78°30′00″N, 20°W",
        "78:30N 020:00W",
        "78.5N 20.0W",
        "7830N 02000W",
    ] {
        assert_at(text, 78.5, -20.0);
    }
}

#[test]
fn what_may_be_meant_in_two_ways_is_refused_with_its_cure() {
    for text in [
        "7830N 2000W",
        "7830N020W",
        "78N20W",
        "78N 02W",
        "78,5N 20,5W",
        "78.5.1N 020W",
        "78-N 020-W",
        "-78N 020W",
        "7860N02000W",
        "78'30°N 020°00'W",
        "78N 020W 3",
        "N78 020W",
        "78 20",
        "78N 79S",
        "78N190W",
        "020W78N",
        "N78..5 W020",
    ] {
        let error = read(text).unwrap_err();
        assert_eq!(error.to_string(), format!("place: '{text}' is no coordinate pair"));
        assert!(error.hint().unwrap().contains("three for longitude"), "{text}");
    }
    assert_eq!(read("95N020W").unwrap_err().to_string(), "place: latitude 95° is outside −90° to 90°");
}

/// A flight's warnings, with one waypoint.
fn through(point: &str) -> gloamline::intake::Flight {
    let text = format!("{}[[waypoint]]\nat = \"{point}\"\n", super::FLIGHT);
    gloamline::intake::flight_file(&text, "f.toml").unwrap()
}

#[test]
fn points_of_five_characters_are_taken_and_said_to_be_ambiguous() {
    for (text, lat, lon, said) in [
        ("5275N", 52.0, -75.0, "5200N07500W"),
        ("5275E", 52.0, 75.0, "5200N07500E"),
        ("5275S", -52.0, 75.0, "5200S07500E"),
        ("5275W", -52.0, -75.0, "5200S07500W"),
        ("75N70", 75.0, -170.0, "7500N17000W"),
        ("50E80", 50.0, 180.0, "5000N18000W"),
        ("N5050", 50.5, -50.0, "5030N05000W"),
        ("e5050", 50.5, 50.0, "5030N05000E"),
        ("S5050", -50.5, 50.0, "5030S05000E"),
        ("W5050", -50.5, -50.0, "5030S05000W"),
    ] {
        assert_at(text, lat, lon);
        let wanted = format!(
            "'{text}' was taken for {said}, as navigation databases name points with five characters; flight plans do not"
        );
        assert_eq!(through(text).warnings, [wanted]);
    }
    for text in ["9975N", "75N85", "N9050", "527N5", "52755", "5N275"] {
        assert!(read(text).is_err(), "{text}");
    }
    assert!(through("52N075W").warnings.is_empty());
}
