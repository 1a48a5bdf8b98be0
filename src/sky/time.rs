//! Time scales: UTC, TT and UT1, and the years that are answered for.

use crate::units::Instant;
use chrono::Datelike;

/// The first and last calendar year (UTC) that the sky answers for: leap seconds are whole from 1972, and the IAU
/// series and the ephemeris are stated for 1900 to 2100.
pub const YEARS: std::ops::RangeInclusive<i32> = 1973..=2100;

/// Largest |UT1 − UTC| in seconds that UTC allows (Recommendation ITU-R TF.460-6, annex 1).
pub const DUT1_BOUND_S: f64 = 0.9;

/// TT − TAI in seconds, by definition (IAU 1991 resolution A4, recommendation IV).
const TT_MINUS_TAI_S: f64 = 32.184;

/// Whether the sky answers for this instant.
pub fn answers_for(instant: Instant) -> bool {
    YEARS.contains(&instant.utc().year())
}

/// A value for UT1 − UTC in seconds, if it is one that UTC allows.
pub fn dut1_s(seconds: f64) -> Option<f64> {
    (seconds.abs() <= DUT1_BOUND_S).then_some(seconds)
}

/// TT − UTC in seconds: the leap-second table of the IAU routines, its last value kept for the future.
pub(super) fn tt_minus_utc_s(instant: Instant) -> f64 {
    let date = instant.utc();
    // the routine warns of years long after its release with an error code and keeps the last value otherwise
    let year = date.year().min(*YEARS.end()).max(*YEARS.start());
    let tai_minus_utc = sofars::ts::dat(year, date.month() as i32, date.day() as i32, 0.0).unwrap_or(37.0);
    tai_minus_utc + TT_MINUS_TAI_S
}

/// Days of TT since J2000.0 (2000-01-01 12:00:00 TT).
pub(super) fn tt_days(instant: Instant) -> f64 {
    (instant.seconds() + tt_minus_utc_s(instant)) / 86_400.0
}

#[cfg(test)]
mod tests {
    use super::{answers_for, tt_minus_utc_s};
    use crate::units::Instant;
    use chrono::{DateTime, Utc};

    fn at(text: &str) -> Instant {
        Instant::from_utc(text.parse::<DateTime<Utc>>().unwrap())
    }

    #[test]
    fn leap_seconds_are_those_of_iers_bulletin_c() {
        // IERS Bulletin C 52: TAI − UTC = 37 s from 2017-01-01, 36 s before
        assert!((tt_minus_utc_s(at("2016-12-31T23:59:59Z")) - 68.184).abs() < 1e-9);
        assert!((tt_minus_utc_s(at("2017-01-01T00:00:00Z")) - 69.184).abs() < 1e-9);
        assert!((tt_minus_utc_s(at("2099-06-01T00:00:00Z")) - 69.184).abs() < 1e-9);
    }

    #[test]
    fn years_outside_the_span_are_not_answered_for() {
        assert!(!answers_for(at("1972-12-31T23:59:59Z")));
        assert!(answers_for(at("1973-01-01T00:00:00Z")) && answers_for(at("2100-12-31T23:59:59Z")));
        assert!(!answers_for(at("2101-01-01T00:00:00Z")));
    }
}
