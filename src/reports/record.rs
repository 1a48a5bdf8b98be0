//! The brief as a record for machines: schema 1. Later versions add to it and rename nothing.

use crate::Brief;
use crate::label::clock::machine;
use crate::label::words::{circle_key, direction_key, event_key, heading_key, limit_key, state_key};
use crate::light::{Sample, State};
use crate::units::{Instant, Place};
use serde::Serialize;

/// The schema's number.
const SCHEMA: u32 = 1;

#[derive(Debug, Serialize)]
pub(super) struct Record {
    schema: u32,
    flight: FlightRecord,
    beneath: Vantage,
    circles: Vec<CircleRecord>,
    northernmost: PointRecord,
    southernmost: PointRecord,
    ut1_minus_utc_s: f64,
    cautions: Vec<String>,
}

#[derive(Debug, Serialize)]
struct FlightRecord {
    name: String,
    from: String,
    to: String,
    takeoff_utc: String,
    landing_utc: String,
    airborne_s: f64,
    distance_m: f64,
    #[serde(skip_serializing_if = "Option::is_none")]
    level_ft: Option<f64>,
    from_lat_deg: f64,
    from_lon_deg: f64,
    to_lat_deg: f64,
    to_lon_deg: f64,
    #[serde(skip_serializing_if = "Option::is_none")]
    from_zone: Option<&'static str>,
    #[serde(skip_serializing_if = "Option::is_none")]
    to_zone: Option<&'static str>,
}

#[derive(Debug, Serialize)]
struct Vantage {
    state_at_takeoff: &'static str,
    state_at_landing: &'static str,
    crossings: Vec<CrossingRecord>,
    touches: Vec<TouchRecord>,
    segments: Vec<SegmentRecord>,
    seconds: SecondsRecord,
    highest: PeakRecord,
    lowest: PeakRecord,
}

#[derive(Debug, Serialize)]
struct CrossingRecord {
    utc: String,
    limit: &'static str,
    direction: &'static str,
    event: &'static str,
    lat_deg: f64,
    lon_deg: f64,
    elevation_deg: f64,
    azimuth_deg: f64,
}

#[derive(Debug, Serialize)]
struct TouchRecord {
    utc: String,
    limit: &'static str,
    margin_deg: f64,
    lat_deg: f64,
    lon_deg: f64,
    elevation_deg: f64,
}

#[derive(Debug, Serialize)]
struct SegmentRecord {
    state: &'static str,
    begins_utc: String,
    ends_utc: String,
    seconds: f64,
}

#[derive(Debug, Serialize)]
struct SecondsRecord {
    daylight: f64,
    civil_twilight: f64,
    nautical_twilight: f64,
    astronomical_twilight: f64,
    darkness: f64,
}

#[derive(Debug, Serialize)]
struct PeakRecord {
    utc: String,
    elevation_deg: f64,
    azimuth_deg: f64,
    lat_deg: f64,
    lon_deg: f64,
}

#[derive(Debug, Serialize)]
struct CircleRecord {
    circle: &'static str,
    utc: String,
    direction: &'static str,
    lat_deg: f64,
    lon_deg: f64,
}

#[derive(Debug, Serialize)]
struct PointRecord {
    utc: String,
    lat_deg: f64,
    lon_deg: f64,
}

/// A number to so many decimals, so that the last bits of a machine's arithmetic do not show; no negative zero.
pub(super) fn rounded(value: f64, decimals: i32) -> f64 {
    let scale = 10_f64.powi(decimals);
    (value * scale).round() / scale + 0.0
}

/// Degrees to 0.036″, about a metre on the ground.
fn deg(value: f64) -> f64 {
    rounded(value, 5)
}

/// A latitude and longitude for machines.
fn lat_lon(place: Place) -> (f64, f64) {
    let lon = deg(place.lon.deg());
    (deg(place.lat.deg()), if lon >= 180.0 { -180.0 } else { lon })
}

impl Record {
    pub(super) fn of(brief: &Brief) -> Self {
        Self {
            schema: SCHEMA,
            flight: FlightRecord::of(brief),
            beneath: Vantage::of(brief),
            circles: circles(brief),
            northernmost: point(brief, brief.northernmost),
            southernmost: point(brief, brief.southernmost),
            ut1_minus_utc_s: brief.dut1_s,
            cautions: super::caution::cautions(brief),
        }
    }
}

impl FlightRecord {
    fn of(brief: &Brief) -> Self {
        let flight = &brief.flight;
        let ((from_lat_deg, from_lon_deg), (to_lat_deg, to_lon_deg)) =
            (lat_lon(flight.from.place), lat_lon(flight.to.place));
        Self {
            name: flight.name.clone(),
            from: flight.from.label.clone(),
            to: flight.to.label.clone(),
            takeoff_utc: machine(flight.takeoff),
            landing_utc: machine(flight.landing),
            airborne_s: rounded(brief.path.airborne_s, 3),
            distance_m: rounded(brief.path.distance_m(), 1),
            level_ft: flight.level.map(|level| rounded(level.feet(), 1)),
            from_lat_deg,
            from_lon_deg,
            to_lat_deg,
            to_lon_deg,
            from_zone: flight.from.zone.map(chrono_tz::Tz::name),
            to_zone: flight.to.zone.map(chrono_tz::Tz::name),
        }
    }
}

fn when(brief: &Brief, at_s: f64) -> String {
    machine(instant(brief, at_s))
}

fn instant(brief: &Brief, at_s: f64) -> Instant {
    brief.path.takeoff.after_s(at_s)
}

impl Vantage {
    fn of(brief: &Brief) -> Self {
        let light = &brief.light;
        let in_state = |state| rounded(light.seconds.in_state(state), 3);
        Self {
            state_at_takeoff: state_key(light.at_takeoff),
            state_at_landing: state_key(light.at_landing),
            crossings: crossings(brief),
            touches: touches(brief),
            segments: segments(brief),
            seconds: SecondsRecord {
                daylight: in_state(State::Daylight),
                civil_twilight: in_state(State::CivilTwilight),
                nautical_twilight: in_state(State::NauticalTwilight),
                astronomical_twilight: in_state(State::AstronomicalTwilight),
                darkness: in_state(State::Darkness),
            },
            highest: peak(brief, &brief.at_highest),
            lowest: peak(brief, &brief.at_lowest),
        }
    }
}

fn crossings(brief: &Brief) -> Vec<CrossingRecord> {
    let pairs = brief.light.crossings.iter().zip(&brief.at_crossings);
    let record = |(crossing, sample): (&crate::light::Crossing, &Sample)| {
        let (lat_deg, lon_deg) = lat_lon(sample.position.place);
        CrossingRecord {
            utc: when(brief, crossing.at_s),
            limit: limit_key(crossing.limit),
            direction: direction_key(crossing.direction),
            event: event_key(crossing.limit.event(crossing.direction)),
            lat_deg,
            lon_deg,
            elevation_deg: deg(sample.elevation.0.deg()),
            azimuth_deg: rounded(sample.azimuth.deg(), 3),
        }
    };
    pairs.map(record).collect()
}

fn touches(brief: &Brief) -> Vec<TouchRecord> {
    let pairs = brief.light.touches.iter().zip(&brief.at_touches);
    let record = |(touch, sample): (&crate::light::Touch, &Sample)| {
        let (lat_deg, lon_deg) = lat_lon(sample.position.place);
        TouchRecord {
            utc: when(brief, touch.at_s),
            limit: limit_key(touch.limit),
            margin_deg: rounded(touch.margin.deg(), 7),
            lat_deg,
            lon_deg,
            elevation_deg: rounded(sample.elevation.0.deg(), 7),
        }
    };
    pairs.map(record).collect()
}

fn segments(brief: &Brief) -> Vec<SegmentRecord> {
    let record = |segment: &crate::light::Segment| SegmentRecord {
        state: state_key(segment.state),
        begins_utc: when(brief, segment.begin_s),
        ends_utc: when(brief, segment.end_s),
        seconds: rounded(segment.seconds(), 3),
    };
    brief.light.segments.iter().map(record).collect()
}

fn peak(brief: &Brief, sample: &Sample) -> PeakRecord {
    let (lat_deg, lon_deg) = lat_lon(sample.position.place);
    PeakRecord {
        utc: when(brief, sample.at_s),
        elevation_deg: deg(sample.elevation.0.deg()),
        azimuth_deg: rounded(sample.azimuth.deg(), 3),
        lat_deg,
        lon_deg,
    }
}

fn circles(brief: &Brief) -> Vec<CircleRecord> {
    let record = |crossing: &crate::path::CircleCrossing| {
        let (lat_deg, lon_deg) = lat_lon(crossing.place);
        CircleRecord {
            circle: circle_key(crossing.circle.name),
            utc: when(brief, crossing.at_s),
            direction: heading_key(crossing.heading),
            lat_deg,
            lon_deg,
        }
    };
    brief.circles.iter().map(record).collect()
}

fn point(brief: &Brief, passed: crate::path::Passed) -> PointRecord {
    let (lat_deg, lon_deg) = lat_lon(passed.place);
    PointRecord { utc: when(brief, passed.at_s), lat_deg, lon_deg }
}
