//! A place's own clock, and the civil days it makes: 23, 24 or 25 hours long, some dates missing.
//!
//! Knows nothing of the Sun.

use crate::intake::Stop;
use crate::units::Instant;
use chrono::{DateTime, FixedOffset, NaiveDate, NaiveDateTime, NaiveTime, TimeDelta, TimeZone, Utc};
use chrono_tz::Tz;

/// A clock skips no more than this: a whole date, and the search for what comes after it needs a second one.
const LONGEST_SKIP_QUARTERS: i64 = 2 * 24 * 4;
const DAY_S: f64 = 86_400.0;

/// What local time means at a place.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Clock {
    /// That of a zone.
    Zone(Tz),
    /// Local mean time, its offset rounded to the whole minute that ISO 8601 can write.
    MeanTime(FixedOffset),
}

/// A civil date with its beginning and its length.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct CivilDay {
    /// The date.
    pub date: NaiveDate,
    /// When it begins.
    pub begin: Instant,
    /// How many seconds it has: 82,800 or 90,000 where clocks change by an hour.
    pub seconds: f64,
}

impl CivilDay {
    /// When the day ends.
    pub fn end(&self) -> Instant {
        self.begin.after_s(self.seconds)
    }
}

impl Clock {
    /// The clock that a place keeps: its zone's where one is known, local mean time where not.
    pub fn of(stop: &Stop) -> Self {
        // four minutes to the degree
        let minutes = (stop.place.lon.deg() * 4.0).round() as i32;
        let mean = || FixedOffset::east_opt(minutes * 60).map_or(Self::Zone(Tz::UTC), Self::MeanTime);
        stop.zone.map_or_else(mean, Self::Zone)
    }

    /// What the clock shows, with its offset from UTC.
    pub fn local(self, instant: Instant) -> DateTime<FixedOffset> {
        match self {
            Self::Zone(zone) => instant.utc().with_timezone(&zone).fixed_offset(),
            Self::MeanTime(offset) => instant.utc().with_timezone(&offset),
        }
    }

    /// Seconds that the clock is ahead of UTC.
    pub fn ahead_s(self, instant: Instant) -> i32 {
        self.local(instant).offset().local_minus_utc()
    }

    /// The first and the last instant at which the clock shows a date and time; nothing if it skips it.
    pub fn shows(self, local: NaiveDateTime) -> Option<(Instant, Instant)> {
        match self {
            Self::Zone(zone) => {
                let found = zone.from_local_datetime(&local);
                let instant = |at: DateTime<Tz>| Instant::from_utc(at.with_timezone(&Utc));
                Some((instant(found.earliest()?), instant(found.latest()?)))
            }
            Self::MeanTime(offset) => {
                let at = Instant::from_utc(local.and_utc()).after_s(-f64::from(offset.local_minus_utc()));
                Some((at, at))
            }
        }
    }

    /// A date's day; nothing if the clock skipped the date.
    pub fn day(self, date: NaiveDate) -> Option<CivilDay> {
        let (begin, end) = (self.begins(date), self.begins(date.succ_opt()?));
        let seconds = end.since_s(begin);
        (seconds > 0.0).then_some(CivilDay { date, begin, seconds })
    }

    /// The day that holds an instant.
    pub fn day_about(self, instant: Instant) -> CivilDay {
        let date = self.local(instant).date_naive();
        // after clocks went back across midnight the date's first minutes belong to the day before
        let held = [Some(date), date.pred_opt()].into_iter().flatten().filter_map(|date| self.day(date));
        let held = held.into_iter().find(|day| day.begin <= instant && instant < day.end());
        held.unwrap_or(CivilDay { date, begin: self.begins(date), seconds: DAY_S })
    }

    /// The instant from which a date holds on. Where clocks skip midnight, or the whole date, what comes first after
    /// it; where they go back across midnight, its second beginning, so that days tile time.
    fn begins(self, date: NaiveDate) -> Instant {
        let midnight = date.and_time(NaiveTime::MIN);
        let shown = (0..LONGEST_SKIP_QUARTERS)
            .find_map(|quarter| self.shows(midnight + TimeDelta::minutes(15 * quarter)));
        let (first, last) = shown.unwrap_or_else(|| [Instant::from_utc(midnight.and_utc()); 2].into());
        // a clock that goes back within the date's first hour shows midnight twice as well
        let before_last = self.local(last.after_s(-1.0)).date_naive();
        if before_last < date { last } else { first }
    }
}
