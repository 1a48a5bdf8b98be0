//! Times as recordings write them: ISO 8601, a time of day, or a count since 1970.
//!
//! Knows neither a day for a time of day nor which years are answered for. Reads bytes without building a calendar
//! value, since a recording has tens of thousands.

/// A time as written.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum Stamp {
    /// Seconds since 1970-01-01 00:00 UTC, and whether the text said its offset from UTC.
    Unix { s: f64, zoned: bool },
    /// Seconds since midnight, with no date, and whether the text said that it is UTC.
    OfDay { s: f64, zoned: bool },
}

/// One day.
pub(super) const DAY_S: f64 = 86_400.0;
/// Counts up to here are seconds: the year 2286. Every unit a thousand times finer begins a factor of ten above its
/// limit, for 1973 to 2099, so that a count tells its own unit.
const MOST_SECONDS: f64 = 1e10;

/// Reads a time; blanks around it do not matter.
pub(super) fn stamp(text: &str) -> Option<Stamp> {
    let text = text.trim();
    let bytes = text.as_bytes();
    let digits = bytes.iter().take_while(|b| b.is_ascii_digit()).count();
    match bytes.get(digits) {
        Some(b':') if digits <= 2 => of_day(bytes),
        Some(b'-' | b'/') if digits == 4 => calendar(bytes, true),
        Some(b'T') if digits == 8 => calendar(bytes, false),
        None | Some(b'.' | b',' | b'e' | b'E') => count(text),
        _ => None,
    }
}

/// Seconds, milliseconds, microseconds or nanoseconds since 1970.
fn count(text: &str) -> Option<Stamp> {
    let number = super::sheet::number(text)?;
    let mut s = number;
    while s.abs() >= MOST_SECONDS {
        s /= 1e3;
    }
    Some(Stamp::Unix { s, zoned: true })
}

/// Seconds since 1970 of midnight of a date alone: `2026-12-18`, `2026/12/18` or `20261218`.
pub(super) fn midnight(text: &str) -> Option<f64> {
    let bytes = text.trim().as_bytes();
    let mut reader = Reader { bytes };
    let day = reader.date(bytes.len() != 8)?;
    reader.bytes.is_empty().then_some(day)
}

/// A date and a time, with or without an offset: extended or basic form.
fn calendar(bytes: &[u8], extended: bool) -> Option<Stamp> {
    let mut reader = Reader { bytes };
    let midnight = reader.date(extended)?;
    reader.any(b"Tt ")?;
    let of_day = reader.clock(extended)?;
    let offset = reader.offset()?;
    let s = midnight + of_day - offset.east_s();
    reader.bytes.is_empty().then_some(Stamp::Unix { s, zoned: offset != Offset::Unsaid })
}

/// A time of day, which may say that it is UTC.
fn of_day(bytes: &[u8]) -> Option<Stamp> {
    let mut reader = Reader { bytes };
    let s = reader.clock(true)?;
    let offset = reader.offset()?;
    let utc = offset.east_s() == 0.0 && reader.bytes.is_empty();
    utc.then_some(Stamp::OfDay { s, zoned: offset != Offset::Unsaid })
}

/// Days from 1970-01-01 to a date of the Gregorian calendar.
///
/// # Source
/// Counting years from March, so that the leap day is the last of a year; 719,468 days lie between 0000-03-01 and 1970.
fn days(year: i64, month: i64, day: i64) -> i64 {
    let (y, m) = if month > 2 { (year, month - 3) } else { (year - 1, month + 9) };
    365 * y + y.div_euclid(4) - y.div_euclid(100) + y.div_euclid(400) + (153 * m + 2) / 5 + day - 1 - 719_468
}

fn days_of_month(year: i64, month: i64) -> i64 {
    let (next_year, next_month) = if month == 12 { (year + 1, 1) } else { (year, month + 1) };
    days(next_year, next_month, 1) - days(year, month, 1)
}

/// What a time says of its zone.
#[derive(Debug, Clone, Copy, PartialEq)]
enum Offset {
    Unsaid,
    /// Seconds east of UTC.
    EastS(f64),
}

impl Offset {
    /// Seconds east; a time that says nothing is UTC.
    fn east_s(self) -> f64 {
        match self {
            Self::Unsaid => 0.0,
            Self::EastS(s) => s,
        }
    }
}

struct Reader<'b> {
    bytes: &'b [u8],
}

impl Reader<'_> {
    /// A number of exactly so many digits.
    fn digits(&mut self, count: usize) -> Option<i64> {
        let (head, rest) = self.bytes.split_at_checked(count)?;
        let number = head.iter().try_fold(0, |n, b| b.is_ascii_digit().then(|| n * 10 + i64::from(b - b'0')));
        self.bytes = rest;
        number
    }

    /// One of these bytes.
    fn any(&mut self, wanted: &[u8]) -> Option<u8> {
        let first = *self.bytes.first().filter(|b| wanted.contains(b))?;
        self.bytes = &self.bytes[1..];
        Some(first)
    }

    /// A date as seconds since 1970.
    fn date(&mut self, extended: bool) -> Option<f64> {
        let year = self.digits(4)?;
        let separator = if extended { Some([self.any(b"-/")?]) } else { None };
        let month = self.digits(2).filter(|m| (1..=12).contains(m))?;
        if let Some(same) = separator {
            self.any(&same)?;
        }
        let day = self.digits(2).filter(|d| (1..=days_of_month(year, month)).contains(d))?;
        Some(days(year, month, day) as f64 * DAY_S)
    }

    /// A time of day as seconds; the seconds may be left out, and 60 is the leap second.
    fn clock(&mut self, extended: bool) -> Option<f64> {
        let long = self.bytes.get(1).is_some_and(u8::is_ascii_digit);
        let hour = self.digits(if long || !extended { 2 } else { 1 }).filter(|h| *h <= 23)?;
        if extended {
            self.any(b":")?;
        }
        let minute = self.digits(2).filter(|m| *m <= 59)?;
        let more = if extended {
            self.any(b":").is_some()
        } else {
            self.bytes.first().is_some_and(u8::is_ascii_digit)
        };
        let second = if more { self.digits(2).filter(|s| *s <= 60)? } else { 0 };
        let fraction = if more && self.any(b".,").is_some() { self.fraction()? } else { 0.0 };
        Some((hour * 3600 + minute * 60 + second) as f64 + fraction)
    }

    /// The digits after the point, to the nanosecond.
    fn fraction(&mut self) -> Option<f64> {
        let count = self.bytes.iter().take_while(|b| b.is_ascii_digit()).count();
        if count == 0 {
            return None;
        }
        let kept = count.min(9);
        let number = self.digits(kept)?;
        self.bytes = &self.bytes[count - kept..];
        Some(number as f64 / (0..kept).fold(1.0, |scale, _| scale * 10.0))
    }

    /// `Z`, `UTC`, `+01:00`, `+0100`, `+01` as seconds east, or nothing said.
    fn offset(&mut self) -> Option<Offset> {
        let text = self.bytes.trim_ascii_start();
        if text.is_empty() || matches!(text, b"Z" | b"z" | b"UTC" | b"GMT") {
            self.bytes = &[];
            return Some(if text.is_empty() { Offset::Unsaid } else { Offset::EastS(0.0) });
        }
        self.bytes = text;
        let sign = if self.any(b"+-")? == b'-' { -1.0 } else { 1.0 };
        let hours = self.digits(2).filter(|h| *h <= 23)?;
        self.any(b":");
        let minutes = if self.bytes.is_empty() { 0 } else { self.digits(2).filter(|m| *m <= 59)? };
        Some(Offset::EastS(sign * (hours * 3600 + minutes * 60) as f64))
    }
}

#[cfg(test)]
mod tests {
    use super::{Stamp, midnight, stamp};

    /// 2026-12-18T05:10:00Z.
    const T: f64 = 1_797_570_600.0;

    #[test]
    fn one_instant_has_many_spellings() {
        for text in [
            "2026-12-18T05:10:00Z",
            "2026-12-18 05:10Z",
            " 2026/12/18 05:10:00.000 UTC ",
            "20261218T051000Z",
            "2026-12-18T06:40:00+01:30",
            "2026-12-18T00:10:00-0500",
            "2026-12-18 05:10:00+00",
            "1797570600",
            "1797570600,0",
            "1.7975706e9",
            "1797570600000",
            "1797570600000000",
            "1797570600000000000",
        ] {
            assert_eq!(stamp(text), Some(Stamp::Unix { s: T, zoned: true }), "{text}");
        }
        assert_eq!(stamp("2026-12-18T05:10:00"), Some(Stamp::Unix { s: T, zoned: false }));
        assert_eq!(stamp("5:10:00,5Z"), Some(Stamp::OfDay { s: 18_600.5, zoned: true }));
        assert_eq!(midnight("2026-12-18"), Some(T - 18_600.0));
        assert_eq!(midnight("20261218"), Some(T - 18_600.0));
    }

    #[test]
    fn the_calendar_is_chronos() {
        for text in ["1973-01-01", "2000-02-29", "2024-02-29", "2026-12-31", "2099-03-01", "1900-03-01"] {
            let day: chrono::NaiveDate = text.parse().unwrap();
            let wanted = day.and_hms_opt(0, 0, 0).unwrap().and_utc().timestamp();
            assert_eq!(midnight(text), Some(wanted as f64), "{text}");
        }
    }

    #[test]
    fn what_is_no_time_is_no_time() {
        for text in [
            "",
            "NaN",
            "inf",
            "2026-13-18T05:10Z",
            "2026-02-29T05:10Z",
            "2026-12/18T05:10Z",
            "2026-12-18T24:10Z",
            "2026-12-18T05:10:61Z",
            "2026-12-18T05:10:00.Z",
            "2026-12-18T05:10:00 EST",
            "2026-12-18T05:10:00Z and more",
            "18/12/2026 05:10",
            "05:10+01:00",
            "tomorrow",
            "2026-12-1\u{661}T05:10Z",
        ] {
            assert_eq!(stamp(text), None, "{text}");
        }
    }
}
