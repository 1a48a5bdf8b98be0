//! Words and local times of a place's days.

use crate::day::{Clock, MoonDay, Polar, PolarKind};
use crate::light::Direction;
use crate::units::Instant;
use chrono::{DateTime, FixedOffset, NaiveDate, SubsecRound, Timelike};

/// What stands where nothing happens.
pub(super) const NONE: &str = "—";

/// A polar run's key.
pub(super) fn polar_key(kind: PolarKind) -> &'static str {
    match kind {
        PolarKind::Day => "polar_day",
        PolarKind::Night => "polar_night",
    }
}

/// The Moon's event's key.
pub(super) fn moon_key(direction: Direction) -> &'static str {
    match direction {
        Direction::Rising => "moonrise",
        Direction::Setting => "moonset",
    }
}

/// How the Moon is lit, in words that hold at any time: half or more is gibbous.
pub(super) fn phase_key(moon: &MoonDay) -> &'static str {
    match (moon.phase.is_waxing, moon.phase.illuminated < 0.5) {
        (true, true) => "waxing_crescent",
        (true, false) => "waxing_gibbous",
        (false, false) => "waning_gibbous",
        (false, true) => "waning_crescent",
    }
}

/// What a clock shows, rounded to so many decimals of a second.
fn shown(clock: Clock, at: Instant, decimals: u16) -> DateTime<FixedOffset> {
    clock.local(Instant::from_utc(at.utc().round_subsecs(decimals)))
}

/// ISO 8601 on a place's clock to the millisecond, for machines.
pub(super) fn machine_local(clock: Clock, at: Instant) -> String {
    shown(clock, at, 3).to_rfc3339_opts(chrono::SecondsFormat::Millis, false)
}

/// `06:04:10` on a place's clock.
pub(super) fn local_second(clock: Clock, at: Instant) -> String {
    shown(clock, at, 0).format("%H:%M:%S").to_string()
}

/// `06:04` to the nearest minute, as tables print it; the last half minute of a day is `24:00`.
pub(super) fn nearest_minute(clock: Clock, at: Instant) -> String {
    let minutes = (shown(clock, at, 0).num_seconds_from_midnight() + 30) / 60;
    format!("{:02}:{:02}", minutes / 60, minutes % 60)
}

/// `UTC+1`, `UTC+5:30`: how far a clock is ahead.
pub(super) fn ahead(clock: Clock, at: Instant) -> String {
    let seconds = clock.ahead_s(at);
    let (sign, s) = if seconds < 0 { ('−', -seconds) } else { ('+', seconds) };
    let minutes = if s % 3600 == 0 { String::new() } else { format!(":{:02}", s % 3600 / 60) };
    format!("UTC{sign}{}{minutes}", s / 3600)
}

/// The clock's name: the zone's, or what stands in for one.
pub(super) fn clock_name(clock: Clock) -> String {
    match clock {
        Clock::Zone(zone) => zone.name().to_string(),
        Clock::MeanTime(_) => "local mean time".to_string(),
    }
}

/// `18 Dec 2026`.
pub(super) fn date(date: NaiveDate) -> String {
    date.format("%-d %b %Y").to_string()
}

/// A polar run in a sentence.
pub(super) fn polar(run: Polar) -> String {
    let (what, means) = match run.kind {
        PolarKind::Day => ("polar day", "the Sun does not set"),
        PolarKind::Night => ("polar night", "the Sun does not rise"),
    };
    let edge = |edge: Option<NaiveDate>, unknown: &str| edge.map_or(unknown.to_string(), date);
    let first = edge(run.first, "more than a year before or before the years served");
    let last = edge(run.last, "more than a year after or after the years served");
    format!("{what}: {means} on this date; the first such date is {first}, the last {last}")
}
