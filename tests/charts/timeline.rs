//! The picture of a flight: whole, inert, the same each time, with every crossing named and no label on another.

#![allow(clippy::unwrap_used, reason = "also what a test calls may panic")]

use crate::light::{flight, reference_flights};
use gloamline::charts::canvas::{Canvas, Point, Rect, SvgOptions};
use gloamline::charts::labels::{Ground, Mast, Wanted, apart, beside, flags, overlap};
use gloamline::charts::timeline;
use gloamline::intake::{Inline, inline_flight};
use gloamline::sky::Sky;
use gloamline::units::{Dut1, Instant, Place};
use gloamline::{Brief, brief};
use proptest::prelude::*;
use std::sync::LazyLock;

static SKY: LazyLock<Sky> = LazyLock::new(|| Sky::new(Dut1::from_s(0.0).unwrap()));

/// Hong Kong to New York at the equinox: ten crossings, two sunsets, both polar circles' neighbours.
fn homebound(name: &str) -> Brief {
    let given = Inline {
        name: Some(name),
        from: "VHHH",
        to: "KJFK",
        takeoff: "2026-03-20T09:50:00Z",
        airborne: Some("15h30m"),
        ..Inline::default()
    };
    brief(inline_flight(&given).unwrap(), &SKY).unwrap()
}

fn reference(id: &str) -> Brief {
    let (_, flight) = reference_flights().into_iter().find(|(its, _)| its == id).unwrap();
    brief(flight, &SKY).unwrap()
}

/// What can be read in the picture, line by line, and its description.
fn read(picture: &Canvas) -> (Vec<String>, String) {
    let svg = picture.to_svg_with(SvgOptions { real_text: true, id_prefix: "" });
    let document = roxmltree::Document::parse(&svg).unwrap();
    let text = |name: &str| -> Vec<String> {
        let nodes = document.descendants().filter(|n| n.tag_name().name() == name);
        nodes.map(|n| n.text().unwrap_or_default().to_string()).collect()
    };
    (text("text"), text("desc").concat())
}

/// Every crossing's time to the second.
fn times(brief: &Brief) -> Vec<String> {
    let at = |s: f64| brief.path.takeoff.after_s(s + 0.5).utc().format("%H:%M:%S").to_string();
    brief.light.crossings.iter().map(|c| at(c.at_s)).collect()
}

#[test]
fn every_crossing_is_named_in_the_picture_and_in_its_description() {
    for brief in [homebound("Homebound"), reference("legs-parallel-63"), reference("west-60-march")] {
        let (lines, description) = read(&timeline(&brief).unwrap());
        assert!(!brief.light.crossings.is_empty());
        for time in times(&brief) {
            assert!(lines.iter().any(|line| line.starts_with(&time)), "{time} in {lines:?}");
            assert!(description.contains(&format!(" at {time} UTC. ")), "{time}: {description}");
        }
    }
}

#[test]
fn the_usual_flight_names_its_events_beside_the_curve() {
    let brief = homebound("Homebound");
    let (lines, _) = read(&timeline(&brief).unwrap());
    let count = |name: &str| lines.iter().filter(|line| *line == name).count();
    assert_eq!((count("sunset"), count("sunrise"), count("astronomical dusk")), (2, 1, 2));
    assert!(lines.iter().any(|line| line.starts_with("highest +")), "{lines:?}");
    assert!(lines.iter().any(|line| line.starts_with("lowest −")), "{lines:?}");
    for limit in ["−50′", "−6°", "−12°", "−18°"] {
        assert!(lines.iter().any(|line| line == limit), "{limit}");
    }
}

#[test]
fn so_many_crossings_that_their_names_have_no_room_are_numbered() {
    let brief = reference("legs-parallel-63");
    assert!(brief.light.crossings.len() > 20);
    let (lines, _) = read(&timeline(&brief).unwrap());
    for number in 1..=brief.light.crossings.len() {
        let shown = lines.iter().filter(|line| **line == number.to_string()).count();
        assert_eq!(shown, 2, "{number} on the curve and in the key");
    }
}

#[test]
fn clocks_are_those_of_the_ends_that_have_zones() {
    let (lines, _) = read(&timeline(&homebound("Homebound")).unwrap());
    for note in ["VHHH", "UTC+8 · 20 Mar", "KJFK", "UTC−4 · 20 Mar", "20 Mar 2026"] {
        assert!(lines.iter().any(|line| line == note), "{note} in {lines:?}");
    }
    let (lines, _) = read(&timeline(&reference("west-60-march")).unwrap());
    assert!(lines.iter().all(|line| !line.starts_with("UTC+") && !line.starts_with("UTC−")), "{lines:?}");
}

#[test]
fn a_hostile_name_is_cut_and_inert() {
    let hostile = format!("</title><script>alert(1)</script>\u{0}\u{202e}\u{1b}[31m{}", "y".repeat(10_000));
    let mut brief = homebound(&hostile);
    brief.flight.name.clone_from(&hostile);
    brief.flight.from.label.clone_from(&hostile);
    brief.flight.to.name = Some(hostile);
    let picture = timeline(&brief).unwrap();
    for svg in [picture.to_svg(), picture.to_svg_with(SvgOptions { real_text: true, id_prefix: "x" })] {
        let document = roxmltree::Document::parse(&svg).unwrap();
        assert!(document.descendants().all(|n| !n.has_tag_name("script") && n.tag_name().name() != "script"));
        assert!(!svg.contains('\u{202e}') && !svg.contains('\u{1b}'));
    }
    let (lines, description) = read(&picture);
    assert!(lines.iter().all(|line| line.chars().count() < 200));
    assert!(lines[0].starts_with("20 Mar") || lines[0].ends_with('…'), "{}", lines[0]);
    assert!(description.len() < 4000);
}

#[test]
fn the_same_brief_gives_the_same_bytes() {
    let pictures = [(); 2].map(|()| timeline(&homebound("Homebound")).unwrap());
    assert_eq!(pictures[0].to_svg(), pictures[1].to_svg());
    assert_eq!(pictures[0].to_png(1.0).unwrap(), pictures[1].to_png(1.0).unwrap());
}

#[test]
fn every_reference_flight_has_its_picture() {
    for (id, flight) in reference_flights() {
        let brief = brief(flight, &SKY).unwrap();
        let svg = timeline(&brief).unwrap().to_svg();
        assert!(roxmltree::Document::parse(&svg).is_ok(), "{id}");
        assert!(svg.len() < 600_000, "{id}: {} bytes", svg.len());
    }
}

#[test]
fn a_route_of_many_thousand_points_is_still_a_small_picture() {
    let takeoff = Instant::from_seconds(8.5e8);
    let place = |i: u32| Place::from_deg(50.0 + f64::from(i % 7) * 1e-3, -f64::from(i) * 0.004).unwrap();
    let points: Vec<(Place, f64)> = (0..15_000).map(|i| (place(i), f64::from(i) * 1.4)).collect();
    let mut flight = flight("Long route", takeoff, &points);
    for (i, waypoint) in flight.waypoints.iter_mut().enumerate() {
        waypoint.label = format!("P{i}");
    }
    let brief = brief(flight, &SKY).unwrap();
    assert!(timeline(&brief).unwrap().to_svg().len() < 2_000_000);
}

fn sizes() -> impl Strategy<Value = Wanted> {
    let anchor = (0.0..1000.0, 0.0..400.0);
    (anchor, 20.0..160.0, 16.0..40.0).prop_map(|((x, y), width, height)| Wanted {
        anchor: Point::new(x, y),
        width,
        height,
    })
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(96))]

    #[test]
    fn labels_beside_a_curve_never_overlap_nor_leave_the_plot(mut wanted in proptest::collection::vec(sizes(), 0..30)) {
        wanted.sort_by(|a, b| a.anchor.x.total_cmp(&b.anchor.x));
        let curve: Vec<Point> = wanted.iter().map(|w| w.anchor).collect();
        let bounds = Rect { left: 0.0, top: 0.0, right: 1000.0, bottom: 400.0 };
        let set = beside(&wanted, &Ground { bounds, curve: &curve });
        prop_assert_eq!(set.len(), wanted.len());
        let boxes: Vec<Rect> = set.iter().flatten().copied().collect();
        for (i, a) in boxes.iter().enumerate() {
            prop_assert!(a.left >= 0.0 && a.top >= 0.0 && a.right <= 1000.0 && a.bottom <= 400.0, "{a:?}");
            prop_assert!(boxes[i + 1..].iter().all(|b| !overlap(*a, *b)), "{boxes:?}");
        }
        for (rect, wish) in set.iter().zip(&wanted) {
            let is_as_wished = |r: &Rect| (r.width() - wish.width).abs() < 1e-9 && (r.height() - wish.height).abs() < 1e-9;
            prop_assert!(rect.as_ref().is_none_or(is_as_wished));
        }
        prop_assert!(wanted.len() > 6 || set.iter().all(Option::is_some), "a few labels always have room");
    }

    #[test]
    fn flags_never_overlap_and_no_line_passes_through_one(
        masts in proptest::collection::vec((0.0..1000.0, 5.0..160.0), 0..60)
    ) {
        let masts: Vec<Mast> = masts.into_iter().map(|(x, width)| Mast { x, width }).collect();
        let hung: Vec<_> = flags(&masts, 4, (0.0, 1000.0)).into_iter().flatten().collect();
        for (i, a) in hung.iter().enumerate() {
            prop_assert!(a.left >= 0.0 && a.right <= 1000.0 && a.row < 4);
            for b in hung.iter().enumerate().filter(|(j, _)| *j != i).map(|(_, b)| b) {
                prop_assert!(a.row != b.row || a.right <= b.left || b.right <= a.left, "{a:?} {b:?}");
                let passes = b.row >= a.row && b.x > a.left && b.x < a.right;
                prop_assert!(!passes, "the line of {b:?} through {a:?}");
            }
        }
    }

    #[test]
    fn labels_along_an_edge_keep_their_order_their_room_and_the_edge(
        mut wished in proptest::collection::vec(0.0..500.0, 0..40), room in 1.0..30.0
    ) {
        wished.sort_by(f64::total_cmp);
        let set = apart(&wished, room, (0.0, 500.0));
        let gaps = wished.len().saturating_sub(1).max(1) as f64;
        let room = f64::min(room, 500.0 / gaps);
        prop_assert!(set.windows(2).all(|w| w[1] - w[0] >= room - 1e-6), "{set:?}");
        prop_assert!(set.iter().all(|x| (-1e-6..=500.0 + 1e-6).contains(x)), "{set:?}");
    }
}
