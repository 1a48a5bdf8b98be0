//! All that is said of a range of days at a place.

use super::clock::{CivilDay, Clock};
use super::moon::{MoonDay, moon_day};
use super::polar::{Polar, PolarKind, Search};
use super::range::{DayRange, RangeError};
use super::transit::transits;
use crate::intake::Stop;
use crate::light::{Direction, Light, Limit, Lookout, Sample, along};
use crate::path::Path;
use crate::sky::Sky;
use chrono::NaiveDate;

/// A place's days, in order.
#[derive(Debug, Clone)]
pub struct PlaceDays {
    /// The place.
    pub stop: Stop,
    /// The clock that makes its days.
    pub clock: Clock,
    /// The dates asked for.
    pub range: DayRange,
    /// The days: at least one.
    pub days: Vec<DayHere>,
    /// Dates of the range that the clock skipped.
    pub skipped: Vec<NaiveDate>,
    /// UT1 − UTC as it was taken, in seconds.
    pub dut1_s: f64,
}

/// One civil day at a place.
///
/// # Shapes and units
/// All seconds count from the day's beginning.
#[derive(Debug, Clone)]
pub struct DayHere {
    /// The date, its beginning and its length.
    pub civil: CivilDay,
    /// Every rising, setting, dawn and dusk, the states between and the seconds in each.
    pub light: Light,
    /// The Sun's upper meridian passages.
    pub transits: Vec<Sample>,
    /// The Sun where it stands highest in the day.
    pub highest: Sample,
    /// The Sun where it stands lowest.
    pub lowest: Sample,
    /// The Moon.
    pub moon: MoonDay,
    /// The polar day or night that the date is part of.
    pub polar: Option<Polar>,
}

impl DayHere {
    /// The times at which a limit is met in one direction: none, one, or several.
    pub fn times(&self, limit: Limit, direction: Direction) -> impl Iterator<Item = f64> {
        let met = self.light.crossings.iter();
        met.filter(move |c| (c.limit, c.direction) == (limit, direction)).map(|c| c.at_s)
    }
}

/// Looks at each day of a range.
///
/// # Errors
/// A range of which the place's clock skipped every date.
pub fn place_days(stop: Stop, range: DayRange, sky: &Sky) -> Result<PlaceDays, RangeError> {
    let clock = Clock::of(&stop);
    let (mut days, mut skipped) = (Vec::with_capacity(range.len()), Vec::new());
    for date in range.dates() {
        match clock.day(date) {
            Some(civil) => days.push(day_here(&stop, civil, (clock, sky))),
            None => skipped.push(date),
        }
    }
    if days.is_empty() {
        return Err(RangeError::NoSuchDate { place: stop.label, date: range.first() });
    }
    let kinds: Vec<_> = days.iter().map(|day| (day.civil.date, PolarKind::of(&day.light))).collect();
    let runs = Search { place: stop.place, clock, sky }.runs(&kinds);
    for (day, run) in days.iter_mut().zip(runs) {
        day.polar = run;
    }
    Ok(PlaceDays { stop, clock, range, days, skipped, dut1_s: sky.dut1_s() })
}

/// A day without its run, which its neighbours decide.
fn day_here(stop: &Stop, civil: CivilDay, (clock, sky): (Clock, &Sky)) -> DayHere {
    let path = Path::standing(stop.place, civil.begin, civil.seconds);
    let light = along(&path, sky);
    let lookout = Lookout::new(&path, &light, sky);
    DayHere {
        transits: transits(stop.place.lon, &civil, sky).into_iter().map(|at_s| lookout.at(at_s)).collect(),
        highest: lookout.at(light.highest.at_s),
        lowest: lookout.at(light.lowest.at_s),
        moon: moon_day((&path, &light), &civil, (clock, sky)),
        polar: None,
        civil,
        light,
    }
}
