//! What flight it is, and its two ends on every clock.

use super::format::{place, sun};
use crate::Brief;
use crate::intake::{Flight, Stop};
use crate::label::clock::{date, day_and_second, duration, local_day_and_minute, offsets, second};
use crate::label::one_line;
use crate::label::words::{limit_key, spoken, state_key};
use crate::reports::table::columns;
use crate::units::{Instant, Metres};
use chrono_tz::Tz;

pub(super) fn headline(brief: &Brief) -> String {
    let flight = &brief.flight;
    let length = Metres(brief.path.distance_m());
    let word = if flight.profile.is_empty() { "cruise" } else { "up to" };
    let level = flight.level.map_or(String::new(), |level| format!(", {word} {:.0} ft", level.feet()));
    format!(
        "{}   {} → {}   {}\n{}{:.0} km ({:.0} NM) in {}{level}\n{}",
        one_line(&flight.name),
        stop_name(&flight.from),
        stop_name(&flight.to),
        date(flight.takeoff),
        long_names(flight),
        length.0 / 1000.0,
        length.nautical_miles(),
        duration(brief.path.airborne_s),
        blocks(brief),
    )
}

/// Off blocks and on blocks, apart from the time in the air, where they are known.
fn blocks(brief: &Brief) -> String {
    let taxi = |from: Instant, to: Instant| duration(to.since_s(from));
    let (off, on) = (brief.flight.off_block, brief.on_block());
    let said = [
        off.map(|off| format!("off {} UTC (taxi {})", second(off), taxi(off, brief.flight.takeoff))),
        on.map(|on| format!("on {} UTC (taxi {})", second(on), taxi(brief.path.landing(), on))),
        off.zip(on).map(|(off, on)| format!("{} in all", taxi(off, on))),
    ];
    let said: Vec<String> = said.into_iter().flatten().collect();
    if said.is_empty() { String::new() } else { format!("blocks {}\n", said.join(", ")) }
}

/// A stop's code, or its position where it was given by coordinates.
fn stop_name(stop: &Stop) -> String {
    if stop.name.is_some() { stop.label.clone() } else { place(stop.place) }
}

/// The aerodromes' names on a line of their own, where they have any.
fn long_names(flight: &Flight) -> String {
    match (&flight.from.name, &flight.to.name) {
        (Some(from), Some(to)) => format!("{from} to {to}\n"),
        (Some(from), None) => format!("from {from}\n"),
        (None, Some(to)) => format!("to {to}\n"),
        (None, None) => String::new(),
    }
}

/// The local clocks that times are given on besides UTC: each end's, once.
pub(super) struct Clocks(Vec<(String, Tz)>);

impl Clocks {
    pub(super) fn of(flight: &Flight) -> Self {
        let mut clocks: Vec<(String, Tz)> = Vec::new();
        for stop in [&flight.from, &flight.to] {
            match (stop.zone, clocks.last_mut()) {
                (Some(zone), Some((label, other))) if zone == *other => {
                    if *label != stop.label {
                        *label = format!("{label}, {}", stop.label);
                    }
                }
                (Some(zone), _) => clocks.push((stop.label.clone(), zone)),
                (None, _) => {}
            }
        }
        Self(clocks)
    }

    /// A row of cells with the clocks' own after the first.
    pub(super) fn row(
        &self,
        first: String,
        clock: impl Fn(&str, Tz) -> String,
        rest: &[String],
    ) -> Vec<String> {
        let own = self.0.iter().map(|(label, zone)| clock(label, *zone));
        std::iter::once(first).chain(own).chain(rest.iter().cloned()).collect()
    }
}

/// Take-off and landing on every clock, with the Sun there.
pub(super) fn ends(brief: &Brief) -> String {
    let flight = &brief.flight;
    let clocks = Clocks::of(flight);
    let head =
        |label: &str, zone| format!("{label} ({})", offsets(flight.takeoff, brief.path.landing(), zone));
    let mut rows = vec![clocks.row(
        "          UTC".into(),
        head,
        &["Sun's elevation, bearing".into(), "light beneath".into()],
    )];
    for (what, at, sample, state) in [
        ("Take-off", flight.takeoff, brief.at_takeoff(), brief.light.at_takeoff),
        ("Landing ", brief.path.landing(), brief.at_landing(), brief.light.at_landing),
    ] {
        let first = format!("{what}  {}", day_and_second(at));
        let tail = [sun(sample), spoken(state_key(state))];
        rows.push(clocks.row(first, |_, zone| local_day_and_minute(at, zone), &tail));
    }
    columns(&rows) + &boundaries(brief)
}

/// A line for each end that falls within two minutes of a limit.
fn boundaries(brief: &Brief) -> String {
    let ends = [("take-off", &brief.on_boundary.0), ("landing", &brief.on_boundary.1)];
    let lines = ends.iter().filter(|(_, limits)| !limits.is_empty()).map(|(what, limits)| {
        let names: Vec<&str> = limits.iter().map(|&limit| limit_key(limit)).collect();
        format!(
            "  on the boundary: the {what} is within two minutes of the {} limit there\n",
            names.join(" and ")
        )
    });
    lines.collect()
}
