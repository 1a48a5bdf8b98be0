//! The words about the plot, the key to the states, and what a screen reader says.
//!
//! Knows nothing of the plot itself.

use super::frame::{CAUTION_Y, Frame, MARGIN, RIGHT};
use crate::charts::canvas::{Across, Canvas, Ink, Level, Look, Point, Rect, Stroke, TextStyle, measure};
use crate::charts::timeline::style::{CURVE, INK, MUTED, SMALL, TEXT, fitted, letters, look};
use crate::day::{Clock, PlaceDays, PolarKind};
use crate::label::one_line;
use crate::label::words::{spoken, state_key};
use crate::light::State;
use chrono::NaiveDate;
use std::fmt::Write as _;

const CAUTION: &str = "Computed light for a clear sea-level horizon; it judges neither fitness nor legality: the operator's manual, \
                       the authority and its published tables decide.";
/// From line to line of the key.
const KEY_ROW: f64 = 30.0;

fn date(date: NaiveDate) -> String {
    date.format("%-d %b %Y").to_string()
}

fn dates(here: &PlaceDays) -> String {
    let (first, last) = (here.range.first(), here.range.last());
    if first == last { date(first) } else { format!("{} to {}", date(first), date(last)) }
}

fn name(here: &PlaceDays) -> String {
    let more = here.stop.name.as_deref().map_or(String::new(), |name| format!(" {name}"));
    one_line(&format!("{}{more}", here.stop.label))
}

/// The picture's title: the place and the dates.
pub(super) fn title(here: &PlaceDays) -> String {
    format!("{}, {}", name(here), dates(here))
}

/// What the picture shows, in sentences.
pub(super) fn description(here: &PlaceDays) -> String {
    let mut said =
        "Daylight, twilights and darkness over the hours of the place's clock, date by date. ".to_string();
    for run in polar_runs(here) {
        let _ = write!(said, "{run}. ");
    }
    said + CAUTION
}

/// The polar runs that the range touches, in words.
fn polar_runs(here: &PlaceDays) -> Vec<String> {
    let mut runs: Vec<_> = here.days.iter().filter_map(|day| day.polar).collect();
    runs.dedup();
    let told = |run: &crate::day::Polar| {
        let what = if run.kind == PolarKind::Day { "polar day" } else { "polar night" };
        let edge = |edge: Option<NaiveDate>| edge.map_or("…".to_string(), date);
        format!("{what} {} to {}", edge(run.first), edge(run.last))
    };
    runs.iter().map(told).collect()
}

/// The clock with the offsets that it has in the range.
fn clock(here: &PlaceDays) -> String {
    let zone = match here.clock {
        Clock::Zone(zone) => zone.name().replace('_', " "),
        Clock::MeanTime(_) => "local mean time".to_string(),
    };
    let mut ahead: Vec<i32> = here
        .days
        .iter()
        .flat_map(|day| [day.civil.begin, day.civil.end().after_s(-1.0)])
        .map(|at| here.clock.ahead_s(at))
        .collect();
    ahead.sort_unstable();
    ahead.dedup();
    let offsets: Vec<String> = ahead.into_iter().map(offset).collect();
    format!("{zone} (UTC{})", offsets.join(" and "))
}

fn offset(seconds: i32) -> String {
    let (sign, s) = if seconds < 0 { ('−', -seconds) } else { ('+', seconds) };
    let minutes = if s % 3600 == 0 { String::new() } else { format!(":{:02}", s % 3600 / 60) };
    format!("{sign}{}{minutes}", s / 3600)
}

/// The place, its dates and its clock, and the caution at the foot.
pub(super) fn draw(canvas: &mut Canvas, here: &PlaceDays) {
    let range = letters(22.0).anchored(Across::End, Level::Baseline);
    let said = dates(here);
    canvas.text(&said, Point::new(RIGHT, 48.0), &range);
    let room = RIGHT - MARGIN - measure(&said, &range).width - 40.0;
    let bold = letters(28.0).bold();
    canvas.text(&fitted(&name(here), &bold, room), Point::new(MARGIN, 48.0), &bold);
    let place = here.stop.place;
    let part = |deg: f64, letters: [char; 2]| format!("{:.3}°{}", deg.abs(), letters[usize::from(deg < 0.0)]);
    let facts = format!(
        "{} {}   ·   local time {}",
        part(place.lat.deg(), ['N', 'S']),
        part(place.lon.deg(), ['E', 'W']),
        clock(here)
    );
    let muted = TextStyle { ink: MUTED, ..letters(16.0) };
    canvas.text(&fitted(&facts, &muted, RIGHT - MARGIN), Point::new(MARGIN, 76.0), &muted);
    let runs = polar_runs(here).join("   ·   ");
    canvas.text(&fitted(&runs, &muted, RIGHT - MARGIN), Point::new(MARGIN, 100.0), &muted);
    let small = TextStyle { ink: MUTED, ..letters(SMALL) };
    canvas.text(CAUTION, Point::new(MARGIN, CAUTION_Y), &small);
}

/// The states with their looks, and the line of sunrise and sunset.
pub(super) fn draw_legend(canvas: &mut Canvas, has_gaps: bool) {
    let left = Frame::PLOT.right + 22.0;
    let style = letters(TEXT).anchored(Across::Start, Level::Middle);
    let row = |i: usize| Frame::PLOT.top + 14.0 + KEY_ROW * i as f64;
    for (i, state) in State::ALL.into_iter().enumerate() {
        let middle = row(i);
        let swatch = Rect { left, top: middle - 11.0, right: left + 34.0, bottom: middle + 11.0 };
        canvas.rect(swatch, Look { stroke: Some(Stroke::new(INK, 1.0)), ..look(state) });
        canvas.text(&spoken(state_key(state)), Point::new(left + 43.0, middle), &style);
    }
    let y = row(State::ALL.len()) + 4.0;
    canvas.line(&[Point::new(left, y), Point::new(left + 34.0, y)], Stroke::new(CURVE, 2.4));
    canvas.text("sunrise, sunset", Point::new(left + 43.0, y), &style);
    if has_gaps {
        let middle = y + KEY_ROW;
        let hollow = Rect { left, top: middle - 8.0, right: left + 34.0, bottom: middle + 8.0 };
        canvas.rect(hollow, Look::filled(Ink::WHITE).edged(Stroke::new(MUTED, 0.8)));
        canvas.text("skipped by the clock", Point::new(left + 43.0, middle), &style);
    }
}

#[cfg(test)]
mod tests {
    use super::{CAUTION, offset};
    use crate::charts::canvas::measure;
    use crate::charts::timeline::style::{SMALL, letters};
    use crate::charts::year::frame::{MARGIN, RIGHT};

    #[test]
    fn the_caution_fits_on_its_line() {
        assert!(measure(CAUTION, &letters(SMALL)).width < RIGHT - MARGIN);
    }

    #[test]
    fn offsets_have_minutes_where_they_need_them() {
        assert_eq!([0, 37_800, -12_600].map(offset), ["+0", "+10:30", "−3:30"]);
    }
}
