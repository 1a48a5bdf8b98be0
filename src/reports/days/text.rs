//! One day as text: every event in order of time.

use super::super::table::{columns, wrapped};
use super::super::text::format::{place, signed};
use super::words::{ahead, clock_name, date, local_second, moon_key, phase_key, polar};
use super::{WIDTH, cautions, title};
use crate::day::{DayHere, PlaceDays};
use crate::label::clock::{day_and_second, duration};
use crate::label::words::{event_key, limit_key, spoken, state_key};
use crate::light::{Sample, State};

/// A line of the day.
struct Line {
    at_s: f64,
    what: String,
    more: String,
}

pub(super) fn one_day(here: &PlaceDays, day: &DayHere) -> String {
    let civil = &day.civil;
    let mut out = format!(
        "{}   {}\n{}   {}, {}, a day of {}\n\n",
        title(here),
        date(civil.date),
        place(here.stop.place),
        clock_name(here.clock),
        ahead(here.clock, civil.begin),
        duration(civil.seconds),
    );
    out.push_str(&columns(&rows(here, day)));
    out.push('\n');
    if let Some(run) = day.polar {
        out.push_str(&wrapped("  ", &polar(run), WIDTH));
    }
    let lasts = |state: State| {
        format!("{} {}", spoken(state_key(state)), duration(day.light.seconds.in_state(state)))
    };
    let held = State::ALL.into_iter().filter(|state| day.light.seconds.in_state(*state) > 0.0);
    out.push_str(&wrapped("  ", &held.map(lasts).collect::<Vec<_>>().join(", "), WIDTH));
    out.push_str(&moon(day));
    out.push_str("\nCautions\n");
    out.extend(cautions(here).iter().map(|caution| wrapped("  - ", caution, WIDTH)));
    out
}

fn moon(day: &DayHere) -> String {
    let moon = &day.moon;
    let when = match (moon.events.is_empty(), moon.is_up_at_begin) {
        (true, true) => ", up all day",
        (true, false) => ", down all day",
        (false, _) => "",
    };
    let lit = moon.phase.illuminated * 100.0;
    format!("  Moon at local noon: {lit:.0} % lit, {}{when}\n", spoken(phase_key(moon)))
}

/// The day's lines under their heads.
fn rows(here: &PlaceDays, day: &DayHere) -> Vec<[String; 4]> {
    let begin = day.civil.begin;
    let (first, last) = (ahead(here.clock, begin), ahead(here.clock, day.civil.end().after_s(-1.0)));
    let changes = first != last;
    let heads = ["", "UTC", if changes { "local" } else { first.as_str() }, ""].map(str::to_string);
    let line = |line: Line| {
        let at = begin.after_s(line.at_s);
        let offset = if changes { format!(" {}", ahead(here.clock, at)) } else { String::new() };
        [line.what, day_and_second(at), local_second(here.clock, at) + &offset, line.more]
    };
    std::iter::once(heads).chain(lines(day).into_iter().map(line)).collect()
}

fn lines(day: &DayHere) -> Vec<Line> {
    let light = &day.light;
    let plain = |at_s: f64, what: &str| Line { at_s, what: spoken(what), more: String::new() };
    let mut lines: Vec<Line> =
        light.crossings.iter().map(|c| plain(c.at_s, event_key(c.limit.event(c.direction)))).collect();
    lines.extend(day.moon.events.iter().map(|event| plain(event.at_s, moon_key(event.direction))));
    lines.extend(light.touches.iter().map(|touch| Line {
        at_s: touch.at_s,
        what: format!("touches the {} limit", limit_key(touch.limit)),
        more: format!("by {:.2}″", touch.margin.arcsec()),
    }));
    let stands = |what: &str, sun: &Sample| Line {
        at_s: sun.at_s,
        what: what.to_string(),
        more: format!("{} at {:.1}°", signed(sun.elevation.0.deg(), 2), sun.azimuth.deg()),
    };
    lines.extend(day.transits.iter().map(|sun| stands("transit", sun)));
    lines.extend([stands("highest Sun", &day.highest), stands("lowest Sun", &day.lowest)]);
    lines.sort_by(|a, b| a.at_s.total_cmp(&b.at_s));
    lines
}
