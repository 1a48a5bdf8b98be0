//! Several days as a table: a row each, local times to the minute.

use super::super::table::{columns, wrapped};
use super::super::text::format::place;
use super::words::{NONE, ahead, clock_name, date, nearest_minute, polar_key};
use super::{WIDTH, cautions, title};
use crate::day::{DayHere, PlaceDays, Polar};
use crate::label::words::spoken;
use crate::light::{Direction, Limit, State};

const HEADS: [&str; 15] = [
    "date", "astr.", "naut.", "civil", "sunrise", "transit", "sunset", "civil", "naut.", "astr.", "daylight",
    "moonrise", "moonset", "lit", "",
];

pub(super) fn several(here: &PlaceDays) -> String {
    let mut out = format!(
        "{}   {} to {}\n{}   {}, to the nearest minute\n\n",
        title(here),
        date(here.range.first()),
        date(here.range.last()),
        place(here.stop.place),
        clock_name(here.clock),
    );
    let mut rows = vec![HEADS.map(str::to_string)];
    rows.extend(here.days.iter().map(|day| row(here, day)));
    out.push_str(&columns(&rows));
    out.push_str("\n  dawns stand before sunrise, dusks after sunset; Moon's lit part in % at local noon\n");
    for skipped in &here.skipped {
        out.push_str(&wrapped(
            "  ",
            &format!("the clocks skipped {}: there was no such date", date(*skipped)),
            WIDTH,
        ));
    }
    for run in runs(here) {
        out.push_str(&wrapped("  ", &told(run), WIDTH));
    }
    out.push_str("\nCautions\n");
    out.extend(cautions(here).iter().map(|caution| wrapped("  - ", caution, WIDTH)));
    out
}

fn row(here: &PlaceDays, day: &DayHere) -> [String; 15] {
    let at = |at_s: f64| nearest_minute(here.clock, day.civil.begin.after_s(at_s));
    let list = |times: Vec<String>| if times.is_empty() { NONE.to_string() } else { times.join(" ") };
    let sun = |limit: Limit, direction: Direction| list(day.times(limit, direction).map(at).collect());
    let moon = |direction: Direction| {
        let events = day.moon.events.iter().filter(|event| event.direction == direction);
        list(events.map(|event| at(event.at_s)).collect())
    };
    let (rising, setting) = (Direction::Rising, Direction::Setting);
    [
        day.civil.date.to_string(),
        sun(Limit::Astronomical, rising),
        sun(Limit::Nautical, rising),
        sun(Limit::Civil, rising),
        sun(Limit::Horizon, rising),
        list(day.transits.iter().map(|transit| at(transit.at_s)).collect()),
        sun(Limit::Horizon, setting),
        sun(Limit::Civil, setting),
        sun(Limit::Nautical, setting),
        sun(Limit::Astronomical, setting),
        hours(day.light.seconds.in_state(State::Daylight)),
        moon(rising),
        moon(setting),
        format!("{:.0}", day.moon.phase.illuminated * 100.0),
        note(here, day),
    ]
}

/// A polar date's kind, and a clock that changes.
fn note(here: &PlaceDays, day: &DayHere) -> String {
    let polar = day.polar.map(|run| spoken(polar_key(run.kind)));
    let offsets = [day.civil.begin, day.civil.end().after_s(-1.0)].map(|at| ahead(here.clock, at));
    let changes = (offsets[0] != offsets[1]).then(|| format!("{} to {}", offsets[0], offsets[1]));
    [polar, changes].into_iter().flatten().collect::<Vec<_>>().join(", ")
}

/// `7:49`: hours and minutes.
fn hours(seconds: f64) -> String {
    let minutes = (seconds / 60.0).round() as i64;
    format!("{}:{:02}", minutes / 60, minutes % 60)
}

/// The polar runs that the range touches.
fn runs(here: &PlaceDays) -> Vec<Polar> {
    let mut runs: Vec<Polar> = here.days.iter().filter_map(|day| day.polar).collect();
    runs.dedup();
    runs
}

fn told(run: Polar) -> String {
    let edge =
        |edge: Option<chrono::NaiveDate>| edge.map_or("beyond a year or the years served".to_string(), date);
    format!("{} from {} to {}", spoken(polar_key(run.kind)), edge(run.first), edge(run.last))
}
