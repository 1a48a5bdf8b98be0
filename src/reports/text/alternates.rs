//! What light each alternate would be used in.

use super::at;
use super::format::{bearing, signed};
use crate::label::clock::{day_and_second, second};
use crate::label::words::{event_key, spoken, state_key};
use crate::reports::table::columns;
use crate::{AlternateView, Brief, Polar};

/// A row for each alternate; nothing where none is given.
pub(super) fn alternates(brief: &Brief) -> String {
    if brief.alternates.is_empty() {
        return String::new();
    }
    let head = ["place", "abeam UTC", "aside", "used UTC", "light then", "Sun then", "next change"];
    let mut rows = vec![head.map(str::to_string)];
    let pairs = brief.flight.alternates.iter().zip(&brief.alternates);
    rows.extend(pairs.map(|(given, view)| row(brief, &given.stop.label, view)));
    format!("Alternates, as seen on the ground there\n{}", columns(&rows))
}

fn row(brief: &Brief, label: &str, view: &AlternateView) -> [String; 7] {
    [
        label.to_string(),
        second(at(brief, view.abeam.at_s)),
        format!("{:.0} NM", view.abeam.distance.nautical_miles()),
        second(view.used),
        spoken(state_key(view.state)),
        format!("{} at {}", signed(view.elevation.0.deg(), 1), bearing(view.azimuth.deg())),
        next(view),
    ]
}

/// The next change, and whether the Sun does without rising and setting.
fn next(view: &AlternateView) -> String {
    let change = view.next.map_or("none within 48 h".to_string(), |(event, at)| {
        format!("{} {}", spoken(event_key(event)), day_and_second(at))
    });
    match view.polar {
        Some(Polar::Day) => format!("{change} (polar day)"),
        Some(Polar::Night) => format!("{change} (polar night)"),
        None => change,
    }
}
