//! An instant of UTC as a count of seconds, light enough for a million flights.
//!
//! Does not know leap seconds: like a clock that repeats 23:59:59, it counts 86,400 s to each day.

use chrono::{DateTime, Datelike, Utc};

/// The first and last calendar year (UTC) that is answered for: leap seconds are whole from 1972, and the ephemeris ends
/// a hundred Julian years after J2000.0, at noon of 1 January 2100.
pub const YEARS: std::ops::RangeInclusive<i32> = 1973..=2099;

/// An instant of UTC: seconds since 2000-01-01 12:00:00 UTC in days of 86,400 s.
///
/// # Accuracy
/// Better than 1 µs from 1900 to 2100.
#[derive(Debug, Clone, Copy, PartialEq, PartialOrd)]
pub struct Instant {
    s: f64,
}

/// 2000-01-01 12:00:00 UTC on the Unix count.
const ORIGIN_UNIX_S: i64 = 946_728_000;

impl Instant {
    /// The instant that a calendar date and time names; a time within a leap second counts as the second after it.
    pub fn from_utc(utc: DateTime<Utc>) -> Self {
        let whole = (utc.timestamp() - ORIGIN_UNIX_S) as f64;
        Self { s: whole + f64::from(utc.timestamp_subsec_nanos()) * 1e-9 }
    }

    /// The instant a number of seconds after 2000-01-01 12:00:00 UTC.
    pub const fn from_seconds(s: f64) -> Self {
        Self { s }
    }

    /// Seconds since 2000-01-01 12:00:00 UTC.
    pub const fn seconds(self) -> f64 {
        self.s
    }

    /// The calendar date and time, to the microsecond.
    pub fn utc(self) -> DateTime<Utc> {
        let micros = (self.s * 1e6).round() as i64 + ORIGIN_UNIX_S * 1_000_000;
        DateTime::from_timestamp_micros(micros).unwrap_or_default()
    }

    /// Whether the instant lies within the years that are answered for.
    pub fn is_answered_for(self) -> bool {
        YEARS.contains(&self.utc().year())
    }

    /// The instant `seconds` later.
    #[must_use]
    pub fn after_s(self, seconds: f64) -> Self {
        Self { s: self.s + seconds }
    }

    /// Seconds from `earlier` to this instant.
    pub fn since_s(self, earlier: Self) -> f64 {
        self.s - earlier.s
    }
}

#[cfg(test)]
mod tests {
    use super::Instant;
    use chrono::{DateTime, Utc};

    #[test]
    fn years_outside_the_span_are_not_answered_for() {
        let at = |text: &str| Instant::from_utc(text.parse::<DateTime<Utc>>().unwrap()).is_answered_for();
        assert!(!at("1972-12-31T23:59:59Z") && at("1973-01-01T00:00:00Z"));
        assert!(at("2099-12-31T23:59:59Z") && !at("2100-01-01T00:00:00Z"));
    }

    #[test]
    fn a_calendar_time_survives_the_count() {
        for text in ["1973-01-01T00:00:00Z", "2026-12-18T05:10:00.25Z", "2099-12-31T23:59:59.999999Z"] {
            let utc: DateTime<Utc> = text.parse().unwrap();
            assert_eq!(Instant::from_utc(utc).utc(), utc);
        }
    }
}
