//! Turns the stamps of one flight, in the order in which they are recorded, into instants.
//!
//! Knows the date that was given for times of day; follows them past midnight.

use super::stamp::{DAY_S, Stamp, midnight, stamp};
use crate::units::Instant;
use chrono::{DateTime, NaiveDate, NaiveTime};

/// A time that is of no use.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum NoTime {
    /// It cannot be read, or there is none.
    Unreadable,
    /// A time of day without a day.
    NoDate,
    /// Outside the years that are answered for.
    Years,
}

/// What one flight's stamps have told so far.
#[derive(Debug, Clone)]
pub(super) struct Clock {
    date: Option<f64>,
    /// Since the first day's midnight, of the stamp before.
    last_s: Option<f64>,
    /// How many stamps said no offset.
    pub(super) zoneless: usize,
    /// How many midnights were passed.
    pub(super) midnights: usize,
}

impl Clock {
    /// A clock for times of day that begin on this date.
    pub(super) fn new(date: Option<NaiveDate>) -> Self {
        let date = date.map(|date| date.and_time(NaiveTime::MIN).and_utc().timestamp() as f64);
        Self { date, last_s: None, zoneless: 0, midnights: 0 }
    }

    /// The instant that a text names.
    pub(super) fn read(&mut self, text: &str) -> Result<Instant, NoTime> {
        match stamp(text).ok_or(NoTime::Unreadable)? {
            Stamp::Unix { s, zoned } => {
                self.zoneless += usize::from(!zoned);
                within_years(s)
            }
            Stamp::OfDay { s, zoned } => {
                self.zoneless += usize::from(!zoned);
                let date = self.date.ok_or(NoTime::NoDate)?;
                let since = self.unrolled(s);
                within_years(date + since)
            }
        }
    }

    /// The instant that a date and a time of day name; a time that has its own date is read alone.
    pub(super) fn read_on(&mut self, date: &str, text: &str) -> Result<Instant, NoTime> {
        match stamp(text) {
            Some(Stamp::OfDay { s, zoned }) => {
                self.zoneless += usize::from(!zoned);
                within_years(midnight(date).ok_or(NoTime::Unreadable)? + s)
            }
            _ => self.read(text),
        }
    }

    /// The time of day counted on from the first day's midnight: the day is the one that puts it nearest to the stamp
    /// before, so that stamps may be out of order by less than half a day.
    fn unrolled(&mut self, of_day: f64) -> f64 {
        let Some(last) = self.last_s else {
            self.last_s = Some(of_day);
            return of_day;
        };
        let since = of_day + ((last - of_day) / DAY_S).round() * DAY_S;
        let day_of = |s: f64| (s / DAY_S).floor();
        let most = self.midnights as f64;
        self.midnights = day_of(since).max(most) as usize;
        self.last_s = Some(since);
        since
    }
}

fn within_years(unix_s: f64) -> Result<Instant, NoTime> {
    let instant = Instant::from_utc(DateTime::UNIX_EPOCH).after_s(unix_s);
    if instant.is_answered_for() { Ok(instant) } else { Err(NoTime::Years) }
}

#[cfg(test)]
mod tests {
    use super::{Clock, NoTime};

    #[test]
    fn times_of_day_go_on_past_midnight() {
        let mut clock = Clock::new("2026-12-18".parse().ok());
        let read: Vec<String> =
            ["23:59:58", "00:00:01", "23:59:59", "00:00:02", "11:00:00", "22:59:00", "01:00"]
                .iter()
                .map(|text| clock.read(text).unwrap().utc().format("%d %H:%M:%S").to_string())
                .collect();
        let wanted = [
            "18 23:59:58",
            "19 00:00:01",
            "18 23:59:59",
            "19 00:00:02",
            "19 11:00:00",
            "19 22:59:00",
            "20 01:00:00",
        ];
        assert_eq!(read, wanted);
        assert_eq!(clock.midnights, 2);
    }

    #[test]
    fn a_time_of_no_use_says_why() {
        let mut clock = Clock::new(None);
        assert_eq!(clock.read("05:10:00"), Err(NoTime::NoDate));
        assert_eq!(clock.read("when"), Err(NoTime::Unreadable));
        assert_eq!(clock.read("0"), Err(NoTime::Years));
        assert!(clock.read_on("2026-12-18", "05:10:00").is_ok());
        assert_eq!(clock.read_on("18 Dec", "05:10:00"), Err(NoTime::Unreadable));
    }
}
