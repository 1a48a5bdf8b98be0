//! Time scales: from UTC to TT.

use crate::units::{Instant, YEARS};
use chrono::Datelike;

/// TT − TAI in seconds, by definition (IAU 1991 resolution A4, recommendation IV).
const TT_MINUS_TAI_S: f64 = 32.184;

/// TT − UTC in seconds: the leap-second table of the IAU routines, its last value kept for the future.
pub(super) fn tt_minus_utc_s(instant: Instant) -> f64 {
    let date = instant.utc();
    // the routine warns of years long after its release with an error code and keeps the last value otherwise
    let year = date.year().min(*YEARS.end()).max(*YEARS.start());
    let tai_minus_utc =
        sofars::ts::dat(year, date.month().cast_signed(), date.day().cast_signed(), 0.0).unwrap_or(37.0);
    tai_minus_utc + TT_MINUS_TAI_S
}

/// Days of TT since J2000.0 (2000-01-01 12:00:00 TT).
pub(super) fn tt_days(instant: Instant) -> f64 {
    (instant.seconds() + tt_minus_utc_s(instant)) / 86_400.0
}

#[cfg(test)]
mod tests {
    use super::tt_minus_utc_s;
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
}
