//! The picture of a place's days: its words, its gaps and its bytes.

use gloamline::charts::{canvas::Canvas, year};
use gloamline::day::{DayRange, field, place_days};
use gloamline::intake::{Stop, place_argument};
use gloamline::sky::Sky;

fn drawn(stop: Stop, first: &str, last: &str) -> Canvas {
    let sky = Sky::default();
    let range = DayRange::new(first.parse().unwrap(), last.parse().unwrap()).unwrap();
    let here = place_days(stop, range, &sky).unwrap();
    year(&here, &field(&here, &sky)).unwrap()
}

fn place(code: &str) -> Stop {
    place_argument("CODE", code).unwrap()
}

/// The picture's texts, and what a screen reader says of it.
fn read(picture: &Canvas) -> (Vec<String>, String) {
    let svg = picture.to_svg_with(gloamline::charts::canvas::SvgOptions { real_text: true, id_prefix: "x" });
    let document = roxmltree::Document::parse(&svg).unwrap();
    let named = |name: &str| {
        let nodes = document.descendants().filter(|node| node.tag_name().name() == name);
        nodes.filter_map(|node| node.text().map(str::to_string)).collect::<Vec<_>>()
    };
    (named("text"), named("desc").concat())
}

#[test]
fn a_year_names_its_months_its_hours_its_states_and_its_polar_dates() {
    let (lines, description) = read(&drawn(place("ENTC"), "2026-01-01", "2026-12-31"));
    for wanted in
        ["Jan", "Jun", "Dec", "2026", "00:00", "12:00", "24:00", "daylight", "darkness", "sunrise, sunset"]
    {
        assert!(lines.iter().any(|line| line == wanted), "{wanted} in {lines:?}");
    }
    assert!(description.contains("polar day 18 May 2026 to 25 Jul 2026"), "{description}");
    assert!(lines.iter().any(|line| line.contains("Europe/Oslo (UTC+1 and +2)")), "{lines:?}");
}

#[test]
fn only_a_range_in_which_the_clock_skips_explains_the_gap() {
    let has_key = |code: &str, first: &str, last: &str| {
        read(&drawn(place(code), first, last)).0.iter().any(|line| line == "skipped by the clock")
    };
    assert!(has_key("EGLL", "2026-03-20", "2026-04-10"));
    assert!(has_key("NSFA", "2011-12-25", "2012-01-05"));
    assert!(!has_key("EGLL", "2026-10-20", "2026-11-10"));
    assert!(!has_key("WSSS", "2026-01-01", "2026-12-31"));
}

#[test]
fn every_kind_of_place_and_range_has_a_small_picture() {
    for code in ["ENSB", "NZSP", "YLHI", "YPDN", "PHNL", "90,0", "0,180"] {
        for (first, last) in
            [("2026-01-01", "2027-02-04"), ("2026-09-20", "2026-10-10"), ("2026-03-20", "2026-03-20")]
        {
            let picture = drawn(place(code), first, last);
            let svg = picture.to_svg();
            assert!(roxmltree::Document::parse(&svg).is_ok(), "{code} {first}");
            assert!(svg.len() < 700_000, "{code} {first}: {} bytes", svg.len());
        }
    }
    let picture = drawn(place("ENSB"), "2026-01-01", "2026-12-31");
    assert_eq!(
        picture.to_png(1.0).unwrap(),
        drawn(place("ENSB"), "2026-01-01", "2026-12-31").to_png(1.0).unwrap()
    );
}

#[test]
fn a_hostile_name_is_inert() {
    let hostile = format!("</title><script>alert(1)</script>\u{0}\u{202e}\u{1b}[31m{}", "y".repeat(10_000));
    let stop = Stop { label: hostile.clone(), name: Some(hostile), ..place("EGLL") };
    let svg = drawn(stop, "2026-01-01", "2026-01-09").to_svg();
    let document = roxmltree::Document::parse(&svg).unwrap();
    assert!(document.descendants().all(|node| node.tag_name().name() != "script"));
    assert!(!svg.contains('\u{202e}') && !svg.contains('\u{1b}'));
}
