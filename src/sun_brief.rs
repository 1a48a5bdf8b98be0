//! The Sun at one instant, and the day it makes at one place.

use crate::intake::Stop;
use crate::light::{Light, Lookout, Sample, along};
use crate::path::Path;
use crate::sky::{Almanac, Sky};
use crate::units::Instant;
use chrono::{DateTime, NaiveDate, NaiveTime, TimeDelta, TimeZone, Utc};

/// The Sun's almanac quantities at an instant, and a place's day about it.
#[derive(Debug, Clone)]
pub struct SunBrief {
    /// When.
    pub instant: Instant,
    /// The almanac quantities.
    pub almanac: Almanac,
    /// UT1 − UTC as it was taken, in seconds.
    pub dut1_s: f64,
    /// The place's share, if one was given.
    pub here: Option<PlaceDay>,
}

/// A day at a place.
#[derive(Debug, Clone)]
pub struct PlaceDay {
    /// The place.
    pub stop: Stop,
    /// The Sun there at the instant asked for.
    pub now: Sample,
    /// The day's date on its own clock: the zone's where one is known, local mean time where not.
    pub date: NaiveDate,
    /// The day's beginning.
    pub begin: Instant,
    /// Its length in seconds; 82,800 or 90,000 when clocks change.
    pub seconds: f64,
    /// The light of the day; its seconds count from the day's beginning.
    pub light: Light,
    /// The Sun where it stands highest in the day.
    pub highest: Sample,
    /// The Sun where it stands lowest.
    pub lowest: Sample,
}

/// Looks the Sun up for an instant, and for a place's day.
pub fn sun_brief(instant: Instant, stop: Option<Stop>, sky: &Sky) -> SunBrief {
    SunBrief {
        instant,
        almanac: sky.almanac(instant),
        dut1_s: sky.dut1_s(),
        here: stop.map(|stop| place_day(instant, stop, sky)),
    }
}

fn place_day(instant: Instant, stop: Stop, sky: &Sky) -> PlaceDay {
    let (date, begin, end) = day_about(instant, &stop);
    let seconds = end.since_s(begin);
    let path = Path::standing(stop.place, begin, seconds);
    let light = along(&path, sky);
    let lookout = Lookout::new(&path, &light, sky);
    PlaceDay {
        now: lookout.at(instant.since_s(begin)),
        highest: lookout.at(light.highest.at_s),
        lowest: lookout.at(light.lowest.at_s),
        stop,
        date,
        begin,
        seconds,
        light,
    }
}

/// The civil date at a place that holds an instant, with its beginning and end.
fn day_about(instant: Instant, stop: &Stop) -> (NaiveDate, Instant, Instant) {
    if let Some(zone) = stop.zone {
        let date = instant.utc().with_timezone(&zone).date_naive();
        let (next, repeated) = midnights(date + TimeDelta::days(1), zone);
        // clocks that go back across midnight bring the old date again
        let end = if next > instant { next } else { repeated };
        return (date, midnights(date, zone).0, end);
    }
    // local mean time: four minutes to the degree
    let ahead_s = stop.place.lon.deg() * 240.0;
    let date = instant.after_s(ahead_s).utc().date_naive();
    let begin = Instant::from_utc(date.and_time(NaiveTime::MIN).and_utc()).after_s(-ahead_s);
    (date, begin, begin.after_s(86_400.0))
}

/// The instants at which a date begins on a zone's clock: two where clocks go back across midnight, the same twice
/// everywhere else. Where clocks skip midnight, or the whole date, what comes first after it.
fn midnights(date: NaiveDate, zone: chrono_tz::Tz) -> (Instant, Instant) {
    let instant = |local: DateTime<chrono_tz::Tz>| Instant::from_utc(local.with_timezone(&Utc));
    let first = (0..2 * 24 * 4).find_map(|quarter| {
        let time = date.and_time(NaiveTime::MIN) + TimeDelta::minutes(15 * quarter);
        let local = zone.from_local_datetime(&time);
        Some((instant(local.earliest()?), instant(local.latest()?)))
    });
    let utc = Instant::from_utc(date.and_time(NaiveTime::MIN).and_utc());
    first.unwrap_or((utc, utc))
}
