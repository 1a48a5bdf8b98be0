//! The Sun at one instant, and the day it makes at one place.

use crate::day::{CivilDay, Clock};
use crate::intake::Stop;
use crate::light::{Light, Lookout, Sample, along};
use crate::path::Path;
use crate::sky::{Almanac, Sky};
use crate::units::Instant;
use chrono::NaiveDate;

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
    let CivilDay { date, begin, seconds } = Clock::of(&stop).day_about(instant);
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
