//! When the Sun is above each limit, as a field over the dates and the hours of the clock: what a year's chart is drawn
//! from.
//!
//! A date is a column as wide as 1. Between the middles of two columns the field is that of a place of the same latitude
//! where, at a time between the two dates, the clock and the Sun's hour angle agree as they do here: so its edges are
//! smooth, and pass each date's middle where that date's events are. Where clocks change, it steps; a date on its own is
//! level from side to side.

use super::clock::{CivilDay, Clock};
use super::days::{DayHere, PlaceDays};
use crate::light::{Light, Limit, Segment, along};
use crate::path::Path;
use crate::sky::Sky;
use crate::units::{Instant, Place};

const DAY_S: f64 = 86_400.0;
const HOUR_S: f64 = 3600.0;
/// The finest step, as a part of the whole range: a tenth of a pixel on a sheet of some 1200.
const FINEST: f64 = 1.0 / 12_288.0;
/// No fewer columns than this are looked at, however short the range.
const FEWEST: usize = 192;
/// Edges that move by more hours than this from one column to the next are looked at again between them.
const STEEP_H: f64 = 0.25;

/// A stretch of the clock in hours, from 0 to 24.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Interval {
    /// Its beginning.
    pub from_h: f64,
    /// Its end.
    pub to_h: f64,
}

/// The field along one vertical line.
#[derive(Debug, Clone)]
pub struct Column {
    /// Dates from the beginning of the range's first.
    pub at_days: f64,
    /// For each limit, from the horizon down, when the Sun is above it.
    pub above: [Vec<Interval>; Limit::ALL.len()],
    /// Whether the field passes smoothly to the next column; if not, it steps.
    pub leads_on: bool,
}

/// Hours of a date that the clock skipped: a step of an hour in spring, or the whole of it.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Gap {
    /// Which date of the range, counted from 0.
    pub day: usize,
    /// The hours.
    pub hours: Interval,
}

/// The field of a range of dates.
#[derive(Debug, Clone)]
pub struct Field {
    /// How many dates the range has.
    pub days: usize,
    /// Columns from left to right; two at one place where the field steps.
    pub columns: Vec<Column>,
    /// What no clock showed.
    pub gaps: Vec<Gap>,
}

/// The field of a place's days.
pub fn field(here: &PlaceDays, sky: &Sky) -> Field {
    let place = here.stop.place;
    let mut field = Field { days: here.range.len(), columns: Vec::new(), gaps: Vec::new() };
    let index = |day: &DayHere| {
        let after = day.civil.date.signed_duration_since(here.range.first()).num_days();
        usize::try_from(after).unwrap_or(0)
    };
    let whole = |date: &chrono::NaiveDate| Gap {
        day: usize::try_from(date.signed_duration_since(here.range.first()).num_days()).unwrap_or(0),
        hours: Interval { from_h: 0.0, to_h: 24.0 },
    };
    field.gaps.extend(here.skipped.iter().map(whole));
    let steady = |day: &DayHere| change(&day.civil, here.clock).is_none();
    let joined = |a: &DayHere, b: &DayHere| {
        steady(a) && steady(b) && index(b) == index(a) + 1 && a.civil.end() == b.civil.begin && {
            here.clock.ahead_s(a.civil.begin) == here.clock.ahead_s(b.civil.begin)
        }
    };
    for run in here.days.chunk_by(joined) {
        let first = index(&run[0]);
        if let Some(change) = change(&run[0].civil, here.clock) {
            field.stepped(first, &run[0], &change);
        } else if field.days == 1 {
            field.flat(first, &Limit::ALL.map(|limit| above(&run[0].light.segments, limit, HOUR_S)));
        } else {
            let family = Family { place, begin: run[0].civil.begin, first, sky };
            field.smooth(&family, first + run.len());
        }
    }
    field
}

/// When a clock changes within a day, and what it shows just before and just after.
struct Change {
    at_s: f64,
    before_h: f64,
    after_h: f64,
}

/// The change of a clock in a day, to the second: no date since 1973 has two.
fn change(day: &CivilDay, clock: Clock) -> Option<Change> {
    let ahead = |at_s: f64| f64::from(clock.ahead_s(day.begin.after_s(at_s)));
    let (mut before_s, mut after_s) = (0.0, day.seconds - 1.0);
    let (old, new) = (ahead(before_s), ahead(after_s));
    let begins_h = (HOUR_S * 24.0 - day.seconds + old - new) / HOUR_S;
    if old == new && begins_h == 0.0 {
        return None;
    }
    while old != new && after_s - before_s > 1.0 {
        let middle = f64::midpoint(before_s, after_s).floor();
        *(if ahead(middle) == old { &mut before_s } else { &mut after_s }) = middle;
    }
    // a date that begins after midnight has its change at its beginning
    let at_s = if old == new { 0.0 } else { after_s };
    let before_h = at_s / HOUR_S;
    Some(Change { at_s, before_h, after_h: 24.0 - (day.seconds - at_s) / HOUR_S })
}

impl Field {
    /// A date whose clock changes: its own hours as they were, the second of those that come twice.
    fn stepped(&mut self, day: usize, here: &DayHere, change: &Change) {
        let hour = |at_s: f64| {
            if at_s < change.at_s { at_s / HOUR_S } else { change.after_h + (at_s - change.at_s) / HOUR_S }
        };
        let kept_s = change.at_s.min(change.after_h * HOUR_S);
        let parts = here.light.segments.iter().flat_map(|segment| {
            let (begin_s, end_s) = (segment.begin_s, segment.end_s);
            let early = Segment { end_s: end_s.min(kept_s) / HOUR_S, begin_s: begin_s / HOUR_S, ..*segment };
            let late_s = begin_s.max(change.at_s);
            let late = Segment { begin_s: hour(late_s), end_s: hour(late_s.max(end_s)), ..*segment };
            [early, late]
        });
        let parts: Vec<Segment> = parts.filter(|part| part.end_s > part.begin_s).collect();
        self.flat(day, &Limit::ALL.map(|limit| above(&parts, limit, 1.0)));
        if change.after_h > change.before_h {
            self.gaps.push(Gap { day, hours: Interval { from_h: change.before_h, to_h: change.after_h } });
        }
    }

    /// A date that is drawn as it is from side to side.
    fn flat(&mut self, day: usize, above: &[Vec<Interval>; Limit::ALL.len()]) {
        let at = |at_days: f64, leads_on| Column { at_days, above: above.clone(), leads_on };
        self.columns.extend([at(day as f64, true), at(day as f64 + 1.0, false)]);
    }

    /// Dates whose clocks keep one offset.
    fn smooth(&mut self, family: &Family<'_>, end: usize) {
        let finest = FINEST * self.days as f64;
        let per_day = FEWEST.div_ceil(self.days);
        let count = (end - family.first) * per_day;
        let at = |i: usize| family.column(family.first as f64 + i as f64 / per_day as f64);
        let mut from = at(0);
        for i in 1..=count {
            let to = at(i);
            self.between(from, &to, (family, finest));
            from = to;
        }
        self.columns.push(Column { leads_on: false, ..from });
    }

    /// The column, and those that are needed before the next.
    fn between(&mut self, from: Column, to: &Column, (family, finest): (&Family<'_>, f64)) {
        let step = to.at_days - from.at_days;
        let alike = (0..4).all(|i| alike(&from.above[i], &to.above[i]));
        let steep = alike && (0..4).any(|i| moved_h(&from.above[i], &to.above[i]) > STEEP_H);
        if (!alike && step > finest) || (steep && step > 8.0 * finest) {
            let middle = family.column(f64::midpoint(from.at_days, to.at_days));
            self.between(from, &middle, (family, finest));
            self.between(middle, to, (family, finest));
        } else {
            self.columns.push(Column { leads_on: alike, ..from });
        }
    }
}

/// Places of one latitude where clock and Sun agree as they do on a run's dates.
struct Family<'a> {
    place: Place,
    /// The beginning of the run's first date.
    begin: Instant,
    first: usize,
    sky: &'a Sky,
}

impl Family<'_> {
    fn column(&self, at_days: f64) -> Column {
        // a date's own day stands in the middle of its column
        let later_days = at_days - self.first as f64 - 0.5;
        let lon = (self.place.lon.deg() - later_days * 360.0).rem_euclid(360.0);
        let place = Place::from_deg(self.place.lat.deg(), lon).unwrap_or(self.place);
        let day = Path::standing(place, self.begin.after_s(later_days * DAY_S), DAY_S);
        let light: Light = along(&day, self.sky);
        let above = Limit::ALL.map(|limit| above(&light.segments, limit, HOUR_S));
        Column { at_days, above, leads_on: true }
    }
}

/// When the Sun is above a limit, from segments in a unit of `per_hour` to the hour.
fn above(segments: &[Segment], limit: Limit, per_hour: f64) -> Vec<Interval> {
    let mut found: Vec<Interval> = Vec::new();
    for segment in segments.iter().filter(|segment| segment.state <= limit.above()) {
        let (from_h, to_h) = (segment.begin_s / per_hour, segment.end_s / per_hour);
        match found.last_mut() {
            Some(last) if last.to_h == from_h => last.to_h = to_h,
            _ => found.push(Interval { from_h, to_h }),
        }
    }
    found
}

/// Whether two columns' stretches can be joined one to one.
fn alike(a: &[Interval], b: &[Interval]) -> bool {
    let touches = |i: &Interval| (i.from_h == 0.0, i.to_h == 24.0);
    a.len() == b.len() && a.iter().zip(b).all(|(a, b)| touches(a) == touches(b))
}

/// How far an edge moves at most.
fn moved_h(a: &[Interval], b: &[Interval]) -> f64 {
    let moved = |(a, b): (&Interval, &Interval)| (a.from_h - b.from_h).abs().max((a.to_h - b.to_h).abs());
    a.iter().zip(b).map(moved).fold(0.0, f64::max)
}
