//! The Moon: how it is lit, when it is up, and how much of the dark it lights.

use super::at;
use super::format::{bearing, from_track, place, signed};
use crate::Brief;
use crate::label::clock::{duration, second};
use crate::label::words::moon_event_key;
use crate::light::{MoonCrossing, MoonSample, Moonlit};
use crate::reports::table::{columns, wrapped};

pub(super) fn moon(brief: &Brief) -> String {
    let (view, moon) = (&brief.moon, &brief.moon.moon);
    let mut known = vec![("take-off", view.at_takeoff()), ("landing", view.at_landing())];
    let highest = &view.at_highest;
    if known.iter().all(|(_, end)| end.at_s != highest.at_s) {
        known.push(("highest", highest));
    }
    let rows: Vec<Vec<String>> = known.iter().map(|(what, sample)| row(brief, what, sample)).collect();
    let events = moon.crossings.iter().zip(&view.at_crossings);
    let event = |(crossing, sample): (&MoonCrossing, &MoonSample)| {
        row(brief, moon_event_key(crossing.direction), sample)
    };
    let mut rows: Vec<Vec<String>> = rows.into_iter().chain(events.map(event)).collect();
    // in order of time; the word on each row says what it is
    rows.sort_by(|a, b| a[0].cmp(&b[0]));
    for row in &mut rows {
        row.remove(0);
    }
    format!("Moon   {}\n{}{}{}", phase(brief), columns(&rows), sums(brief), touches(brief))
}

/// `63 % lit, waxing`, as at take-off.
fn phase(brief: &Brief) -> String {
    let phase = brief.moon.at_takeoff().phase;
    let way = if phase.is_waxing { "waxing" } else { "waning" };
    format!("{:.0} % lit, {way}", phase.illuminated * 100.0)
}

/// A row with its time in front to sort by.
fn row(brief: &Brief, what: &str, sample: &MoonSample) -> Vec<String> {
    let elevation = signed(sample.elevation.0.deg(), 1);
    vec![
        format!("{:012.3}", sample.at_s),
        second(at(brief, sample.at_s)),
        what.to_string(),
        place(sample.position.place),
        format!("{elevation} at {}", bearing(sample.azimuth.deg())),
        from_track(sample.relative_bearing.deg()),
    ]
}

fn sums(brief: &Brief) -> String {
    let moon = &brief.moon.moon;
    let mut parts = match (moon.seconds(true), moon.seconds(false)) {
        (_, 0.0) => vec!["up all the way".to_string()],
        (0.0, _) => vec!["down all the way".to_string()],
        (up, down) => vec![format!("up {}, down {}", duration(up), duration(down))],
    };
    parts.extend(share("darkness", moon.darkness));
    parts.extend(share("nautical and astronomical twilight", moon.night_twilight));
    wrapped("  in all: ", &parts.join("; "), super::WIDTH)
}

/// How much of a part of the night the Moon lights, if there is any.
fn share(what: &str, moonlit: Moonlit) -> Option<String> {
    match (moonlit.moonlit_s, moonlit.moonless_s) {
        (0.0, 0.0) => None,
        (0.0, _) => Some(format!("all {what} without the Moon")),
        (_, 0.0) => Some(format!("all {what} with the Moon up")),
        (lit, dark) => Some(format!("{what} {} with the Moon up, {} without", duration(lit), duration(dark))),
    }
}

fn touches(brief: &Brief) -> String {
    let line = |touch: &crate::light::MoonTouch| {
        let sentence = format!(
            "at {} the Moon turns within {:.0}″ of rising or setting, less than its computed place may err",
            second(at(brief, touch.at_s)),
            touch.margin.arcsec().abs().max(1.0),
        );
        wrapped("  ", &sentence, super::WIDTH)
    };
    brief.moon.moon.touches.iter().map(line).collect()
}
