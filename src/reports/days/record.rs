//! A place's days as JSON: schema 1, one object whatever the number of days. Later versions add to it and rename nothing.

use super::super::record::rounded;
use super::cautions;
use super::words::{clock_name, machine_local, moon_key, phase_key, polar_key};
use crate::day::{Clock, DayHere, PlaceDays};
use crate::label::clock::machine;
use crate::label::words::{event_key, limit_key, state_key};
use crate::light::{Sample, State};
use crate::units::Instant;
use serde::{Serialize, Serializer, ser::SerializeMap};

/// The schema's number.
const SCHEMA: u32 = 1;

/// A place's days as a JSON object, ending in a line feed.
///
/// # Shapes and units
/// `days` holds one object a civil date: its `events` are the Sun's risings, settings, dawns and dusks in order of time,
/// each in `utc` and on the place's clock (`local`); `transits` the upper meridian passages; `seconds_in` how long each
/// state holds; `polar` the run of polar days or nights that the date is part of, with its `first` and `last` date (null
/// where that lies more than a year away or outside the years served). `skipped` lists dates that the clocks left out.
///
/// # Errors
/// None that days can cause.
pub fn days_json(here: &PlaceDays) -> Result<String, serde_json::Error> {
    let record = DaysRecord {
        schema: SCHEMA,
        place: one(&here.stop.label),
        name: here.stop.name.as_deref().map(one),
        lat_deg: rounded(here.stop.place.lat.deg(), 5),
        lon_deg: rounded(here.stop.place.lon.deg(), 5),
        clock: clock_name(here.clock),
        first: here.range.first().to_string(),
        last: here.range.last().to_string(),
        skipped: here.skipped.iter().map(ToString::to_string).collect(),
        days: here.days.iter().map(|day| DayRecord::of(day, here.clock)).collect(),
        ut1_minus_utc_s: here.dut1_s,
        cautions: cautions(here),
    };
    Ok(serde_json::to_string_pretty(&record)? + "\n")
}

fn one(text: &str) -> String {
    crate::label::one_line(text)
}

#[derive(Debug, Serialize)]
struct DaysRecord {
    schema: u32,
    place: String,
    name: Option<String>,
    lat_deg: f64,
    lon_deg: f64,
    clock: String,
    first: String,
    last: String,
    skipped: Vec<String>,
    days: Vec<DayRecord>,
    ut1_minus_utc_s: f64,
    cautions: Vec<String>,
}

#[derive(Debug, Serialize)]
struct DayRecord {
    date: String,
    begins_utc: String,
    begins_local: String,
    seconds: f64,
    events: Vec<EventRecord>,
    touches: Vec<TouchRecord>,
    transits: Vec<SunRecord>,
    highest: SunRecord,
    lowest: SunRecord,
    seconds_in: SecondsIn,
    polar: Option<PolarRecord>,
    moon: MoonRecord,
}

#[derive(Debug, Serialize)]
struct EventRecord {
    event: &'static str,
    utc: String,
    local: String,
}

#[derive(Debug, Serialize)]
struct TouchRecord {
    limit: &'static str,
    utc: String,
    local: String,
    margin_deg: f64,
}

#[derive(Debug, Serialize)]
struct SunRecord {
    utc: String,
    local: String,
    elevation_deg: f64,
    azimuth_deg: f64,
}

#[derive(Debug, Serialize)]
struct PolarRecord {
    kind: &'static str,
    first: Option<String>,
    last: Option<String>,
}

#[derive(Debug, Serialize)]
struct MoonRecord {
    events: Vec<EventRecord>,
    up_at_begin: bool,
    phase_utc: String,
    phase: &'static str,
    waxing: bool,
    illuminated: f64,
    elongation_deg: f64,
}

/// The seconds in each state under the states' keys.
#[derive(Debug)]
struct SecondsIn(Vec<(&'static str, f64)>);

impl Serialize for SecondsIn {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut map = serializer.serialize_map(Some(self.0.len()))?;
        for (key, seconds) in &self.0 {
            map.serialize_entry(key, seconds)?;
        }
        map.end()
    }
}

/// An instant in UTC and on the place's clock.
fn both(clock: Clock, at: Instant) -> (String, String) {
    (machine(at), machine_local(clock, at))
}

impl DayRecord {
    fn of(day: &DayHere, clock: Clock) -> Self {
        let times = |at_s: f64| both(clock, day.civil.begin.after_s(at_s));
        let event = |event: &'static str, at_s: f64| {
            let (utc, local) = times(at_s);
            EventRecord { event, utc, local }
        };
        let sun = |sample: &Sample| {
            let (utc, local) = times(sample.at_s);
            let (elevation_deg, azimuth_deg) = (sample.elevation.0.deg(), sample.azimuth.deg());
            SunRecord {
                utc,
                local,
                elevation_deg: rounded(elevation_deg, 5),
                azimuth_deg: rounded(azimuth_deg, 3),
            }
        };
        let touch = |touch: &crate::light::Touch| {
            let (utc, local) = times(touch.at_s);
            TouchRecord {
                limit: limit_key(touch.limit),
                utc,
                local,
                margin_deg: rounded(touch.margin.deg(), 7),
            }
        };
        let (light, moon) = (&day.light, &day.moon);
        let seconds = |state: State| (state_key(state), rounded(light.seconds.in_state(state), 3));
        let (begins_utc, begins_local) = times(0.0);
        let moon_events = moon.events.iter().map(|met| event(moon_key(met.direction), met.at_s));
        Self {
            date: day.civil.date.to_string(),
            begins_utc,
            begins_local,
            seconds: rounded(day.civil.seconds, 3),
            events: light
                .crossings
                .iter()
                .map(|c| event(event_key(c.limit.event(c.direction)), c.at_s))
                .collect(),
            touches: light.touches.iter().map(touch).collect(),
            transits: day.transits.iter().map(sun).collect(),
            highest: sun(&day.highest),
            lowest: sun(&day.lowest),
            seconds_in: SecondsIn(State::ALL.map(seconds).to_vec()),
            polar: day.polar.map(|run| PolarRecord {
                kind: polar_key(run.kind),
                first: run.first.map(|date| date.to_string()),
                last: run.last.map(|date| date.to_string()),
            }),
            moon: MoonRecord {
                events: moon_events.collect(),
                up_at_begin: moon.is_up_at_begin,
                phase_utc: machine(moon.noon),
                phase: phase_key(moon),
                waxing: moon.phase.is_waxing,
                illuminated: rounded(moon.phase.illuminated, 4),
                elongation_deg: rounded(moon.phase.elongation.deg(), 3),
            },
        }
    }
}
