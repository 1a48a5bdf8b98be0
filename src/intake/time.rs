//! Instants and durations as people write them.

use super::problem::Problem;
use crate::units::Instant;
use chrono::{DateTime, FixedOffset, NaiveDate, NaiveDateTime, Utc};

/// Reads an instant: RFC 3339 with an offset or Z; the seconds may be left out and a space may stand for the T.
pub(super) fn instant(text: &str) -> Result<Instant, Problem> {
    let text = text.trim();
    let full = with_seconds(text);
    let parsed: DateTime<FixedOffset> =
        DateTime::parse_from_rfc3339(&full).map_err(|_| not_an_instant(text))?;
    let instant = Instant::from_utc(parsed.with_timezone(&Utc));
    if instant.is_answered_for() { Ok(instant) } else { Err(Problem::Years { given: text.to_string() }) }
}

/// `2026-12-18 05:10Z` as RFC 3339 writes it.
fn with_seconds(text: &str) -> String {
    let (Some(date), Some("T" | "t" | " "), Some(time)) = (text.get(..10), text.get(10..11), text.get(11..))
    else {
        return text.to_string();
    };
    let clock = time.find(['Z', 'z', '+', '-']).unwrap_or(time.len());
    let seconds = if time[..clock].matches(':').count() == 1 { ":00" } else { "" };
    format!("{date}T{}{seconds}{}", &time[..clock], &time[clock..])
}

fn not_an_instant(text: &str) -> Problem {
    let local = text.replacen(' ', "T", 1);
    let no_offset = ["%Y-%m-%dT%H:%M", "%Y-%m-%dT%H:%M:%S%.f"];
    if no_offset.iter().any(|form| NaiveDateTime::parse_from_str(&local, form).is_ok()) {
        Problem::NoOffset(text.to_string())
    } else {
        Problem::Instant(text.to_string())
    }
}

/// Reads a civil date as ISO 8601 writes it.
pub(super) fn date(text: &str) -> Result<NaiveDate, Problem> {
    let text = text.trim();
    // the parser takes signs, spaces and single digits as well
    let is_plain = text.len() == 10 && text.bytes().all(|b| b.is_ascii_digit() || b == b'-');
    let parsed = NaiveDate::parse_from_str(text, "%Y-%m-%d").ok().filter(|_| is_plain);
    parsed.ok_or_else(|| Problem::Date(text.to_string()))
}

/// Reads a duration in seconds: `14h55m`, `14h`, `55m`, `14h55m30s`, or ISO 8601's `PT14H55M`.
pub(super) fn duration_s(text: &str) -> Result<f64, Problem> {
    let bad = || Problem::Duration(text.trim().to_string());
    let lower = text.trim().to_ascii_lowercase();
    let mut rest = lower.strip_prefix("pt").unwrap_or(&lower);
    let mut seconds = 0.0;
    let mut units = [('h', 3600.0), ('m', 60.0), ('s', 1.0)].into_iter();
    if rest.is_empty() {
        return Err(bad());
    }
    while !rest.is_empty() {
        let end = rest.find(|c: char| c.is_ascii_alphabetic()).ok_or_else(bad)?;
        let unit = rest[end..].chars().next();
        let (_, scale) = units.find(|(letter, _)| Some(*letter) == unit).ok_or_else(bad)?;
        let digits = &rest[..end];
        if digits.is_empty() || digits.len() > 8 || !digits.bytes().all(|b| b.is_ascii_digit()) {
            return Err(bad());
        }
        seconds += digits.parse::<f64>().map_err(|_| bad())? * scale;
        rest = &rest[end + 1..];
    }
    Ok(seconds)
}

#[cfg(test)]
mod tests {
    use super::super::problem::Problem;
    use super::{date, duration_s, instant};

    #[test]
    fn one_instant_has_many_spellings() {
        let wanted = instant("2026-12-18T05:10:00Z").unwrap();
        for text in
            ["2026-12-18T05:10Z", "2026-12-18 05:10Z", "2026-12-18T00:10-05:00", "2026-12-18T05:10:00.000z"]
        {
            assert_eq!(instant(text).unwrap(), wanted, "{text}");
        }
    }

    #[test]
    fn what_is_wrong_with_a_time_is_said() {
        assert!(matches!(instant("2026-12-18T05:10"), Err(Problem::NoOffset(_))));
        assert!(matches!(instant("tomorrow"), Err(Problem::Instant(_))));
        assert!(matches!(instant("2026-13-18T05:10Z"), Err(Problem::Instant(_))));
        assert!(matches!(instant("1900-01-01T00:00Z"), Err(Problem::Years { .. })));
        assert!(matches!(instant("2026-12-18-05:10Z"), Err(Problem::Instant(_))));
        assert!(matches!(instant("2026-12-1\u{661}é05:10Z"), Err(Problem::Instant(_))));
        assert!(matches!(instant("2100-01-01T00:00Z"), Err(Problem::Years { .. })));
    }

    #[test]
    fn durations_are_hours_then_minutes_then_seconds() {
        for (text, seconds) in [
            ("14h55m", 53_700.0),
            ("14h", 50_400.0),
            ("55m", 3300.0),
            ("1h0m30s", 3630.0),
            ("PT14H55M", 53_700.0),
        ] {
            assert_eq!(duration_s(text).unwrap(), seconds, "{text}");
        }
        for text in ["", "PT", "14", "14:55", "55m14h", "-2h", "1.5h", "999999999h", "h"] {
            assert!(duration_s(text).is_err(), "{text}");
        }
    }

    #[test]
    fn a_date_is_ten_characters_and_exists() {
        assert_eq!(date(" 2028-02-29 ").unwrap().to_string(), "2028-02-29");
        for text in [
            "",
            "2026-2-1",
            "2026-02-29",
            "+026-02-01",
            "2026-13-01",
            "20260201",
            "2026-02-1\u{661}",
            "today",
        ] {
            assert!(matches!(date(text), Err(Problem::Date(_))), "{text}");
        }
    }
}
