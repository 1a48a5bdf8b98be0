//! Low Sun ahead, in flight and along the runways.

use super::format::{bearing, from_track, signed};
use super::{WIDTH, at};
use crate::label::clock::{duration, second};
use crate::light::AheadSpan;
use crate::reports::table::{columns, wrapped};
use crate::{Brief, Glare, RunwaySun, RunwayView};

/// When a low Sun stands ahead of the flight deck.
pub(super) fn low_sun(brief: &Brief) -> String {
    if brief.low_sun.is_empty() {
        return wrapped(
            "",
            &format!("Low Sun ahead in flight: none ({})", convention(brief, "track")),
            WIDTH,
        );
    }
    let head = ["from UTC", "until UTC", "lasts", "strong for", "Sun seen at", "from track", "nearest"];
    let mut rows = vec![head.map(str::to_string)];
    rows.extend(brief.low_sun.iter().map(|span| row(brief, span)));
    let title = format!("Low Sun ahead in flight ({})", convention(brief, "track"));
    format!("{}{}", wrapped("", &title, WIDTH), columns(&rows))
}

/// What is taken for a low Sun ahead, and by whom.
fn convention(brief: &Brief, of: &str) -> String {
    let limits = brief.low_sun_limits;
    format!(
        "within {}° of the {of}, strong within {}°, the Sun up and no higher than {}°: gloamline's own convention",
        degrees(limits.sector.deg()),
        degrees(limits.strong.deg()),
        degrees(limits.up_to.deg()),
    )
}

/// A limit as it was given, without the last bits of a machine's arithmetic.
fn degrees(deg: f64) -> f64 {
    (deg * 1e6).round() / 1e6
}

fn row(brief: &Brief, span: &AheadSpan) -> [String; 7] {
    let strong_s: f64 = span.strong.iter().map(|(begin, end)| end - begin).sum();
    let (begin, end) = (&span.begin, &span.end);
    let side = |deg: f64| from_track(deg).replace(" of track", "");
    [
        second(at(brief, begin.at_s)),
        second(at(brief, end.at_s)),
        duration(end.at_s - begin.at_s),
        if span.strong.is_empty() { "–".to_string() } else { duration(strong_s) },
        format!("{} to {}", signed(begin.apparent.0.deg(), 1), signed(end.apparent.0.deg(), 1)),
        format!("{} to {}", side(begin.relative_bearing.deg()), side(end.relative_bearing.deg())),
        format!("{:.1}°", span.least_bearing.deg()),
    ]
}

/// The runways along which a low Sun stands ahead, and a line for the others.
pub(super) fn runways(brief: &Brief) -> String {
    let flight = &brief.flight;
    let take_off = stop(&format!("Take-off {}", flight.from.label), &brief.runways[0]);
    let landing = stop(&format!("Landing {}", flight.to.label), &brief.runways[1]);
    let title = format!("Runways ({}; true bearings)", convention(brief, "runway"));
    format!("{}{take_off}{landing}", wrapped("", &title, WIDTH))
}

fn stop(what: &str, view: &RunwayView) -> String {
    if !view.is_low && view.apparent.0.deg() < 0.0 {
        return format!("  {what}: the Sun is below the horizon\n");
    }
    let sun =
        format!("Sun seen at {}, {} true", signed(view.apparent.0.deg(), 1), bearing(view.azimuth.deg()));
    let ends = view.ends.as_deref().unwrap_or_default();
    let ahead: Vec<[String; 4]> = ends.iter().filter(|end| end.glare != Glare::None).map(end).collect();
    let verdict = match (view.is_low, &view.ends, ahead.len()) {
        (false, ..) => "not low: ahead of no runway".to_string(),
        (true, None, _) => "runways unknown, a low Sun ahead is not ruled out".to_string(),
        (true, _, 0) => format!("low, ahead of none of the {} runway ends", ends.len()),
        (true, _, count) => format!("low, ahead of {count} of the {} runway ends", ends.len()),
    };
    format!("{}{}", wrapped("  ", &format!("{what}: {sun}; {verdict}"), WIDTH), columns(&ahead))
}

fn end(end: &RunwaySun) -> [String; 4] {
    [
        format!("  runway {}", end.designator),
        format!("{:05.1}°", end.bearing.deg()),
        if end.glare == Glare::Strong { "strong low Sun ahead" } else { "low Sun ahead" }.to_string(),
        from_track(end.relative_bearing.deg()).replace("track", "runway"),
    ]
}
