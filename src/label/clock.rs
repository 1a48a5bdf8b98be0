//! Instants as people and machines read them.

use crate::units::Instant;
use chrono::{DateTime, Offset, SubsecRound, Timelike, Utc};
use chrono_tz::Tz;

/// RFC 3339 in UTC to the millisecond, for machines.
pub(crate) fn machine(instant: Instant) -> String {
    let utc = instant.utc().round_subsecs(3);
    utc.to_rfc3339_opts(chrono::SecondsFormat::Millis, true)
}

/// The instant to the nearest second.
fn to_second(instant: Instant) -> DateTime<Utc> {
    instant.utc().round_subsecs(0)
}

/// `18 Dec 05:10:00`.
pub(crate) fn day_and_second(instant: Instant) -> String {
    to_second(instant).format("%d %b %H:%M:%S").to_string()
}

/// `18 Dec 2026`.
pub(crate) fn date(instant: Instant) -> String {
    to_second(instant).format("%-d %b %Y").to_string()
}

/// `05:10:00`.
pub(crate) fn second(instant: Instant) -> String {
    to_second(instant).format("%H:%M:%S").to_string()
}

/// `18 Dec 00:10` on a zone's clock; minutes are cut as clocks cut them.
pub(crate) fn local_day_and_minute(instant: Instant, zone: Tz) -> String {
    to_second(instant).with_timezone(&zone).format("%d %b %H:%M").to_string()
}

/// `00:10` on a zone's clock, with `+1` or `−1` where its date is not that of UTC.
pub(crate) fn local_minute(instant: Instant, zone: Tz) -> String {
    let utc = to_second(instant);
    let local = utc.with_timezone(&zone);
    let days = local.date_naive().signed_duration_since(utc.date_naive()).num_days();
    let mark = match days {
        0 => String::new(),
        1.. => format!("+{days}"),
        _ => format!("−{}", -days),
    };
    format!("{}{mark}", local.format("%H:%M"))
}

/// `00:10` on a zone's clock.
pub(crate) fn minute_in(instant: Instant, zone: Tz) -> String {
    to_second(instant).with_timezone(&zone).format("%H:%M").to_string()
}

/// `18 Dec` on a zone's calendar.
pub(crate) fn day_in(instant: Instant, zone: Tz) -> String {
    to_second(instant).with_timezone(&zone).format("%-d %b").to_string()
}

/// Minutes since a zone's last midnight by its clock.
pub(crate) fn minute_of_day(instant: Instant, zone: Tz) -> u32 {
    to_second(instant).with_timezone(&zone).num_seconds_from_midnight() / 60
}

/// `UTC−5`, `UTC+5:30`: a zone's offset at an instant.
pub(crate) fn offset(instant: Instant, zone: Tz) -> String {
    let seconds = instant.utc().with_timezone(&zone).offset().fix().local_minus_utc();
    let (sign, s) = if seconds < 0 { ('−', -seconds) } else { ('+', seconds) };
    let (hours, minutes) = (s / 3600, s % 3600 / 60);
    if minutes == 0 { format!("UTC{sign}{hours}") } else { format!("UTC{sign}{hours}:{minutes:02}") }
}

/// A zone's offset over a time, or both of its offsets where its clocks change: `UTC−5, then UTC−4`.
pub(crate) fn offsets(begin: Instant, end: Instant, zone: Tz) -> String {
    let (first, last) = (offset(begin, zone), offset(end, zone));
    if first == last { first } else { format!("{first}, then {last}") }
}

/// `14 h 55 min`, to the nearest minute; seconds are given below an hour.
pub(crate) fn duration(seconds: f64) -> String {
    let s = seconds.round() as i64;
    if s < 3600 {
        return format!("{} min {:02} s", s / 60, s % 60);
    }
    let minutes = (seconds / 60.0).round() as i64;
    format!("{} h {:02} min", minutes / 60, minutes % 60)
}

#[cfg(test)]
mod tests {
    use super::{duration, local_minute, machine, offset};
    use crate::units::Instant;

    #[test]
    fn clocks_show_what_clocks_show() {
        let at = Instant::from_utc("2026-12-18T20:05:00.0004Z".parse().unwrap());
        assert_eq!(machine(at), "2026-12-18T20:05:00.000Z");
        assert_eq!(local_minute(at, chrono_tz::Asia::Hong_Kong), "04:05+1");
        assert_eq!(offset(at, chrono_tz::Asia::Kolkata), "UTC+5:30");
        assert_eq!(offset(at, chrono_tz::America::Toronto), "UTC−5");
        assert_eq!(duration(53_700.0), "14 h 55 min");
        assert_eq!(duration(59.6), "1 min 00 s");
    }
}
