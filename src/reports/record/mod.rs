//! The brief as a record for machines: schema 1. Later versions add to it and rename nothing.

mod ahead;
mod aloft;
mod alternates;
mod beneath;
mod flight;
mod recording;
mod illuminance;
mod moon;

pub(super) use illuminance::figures;

use crate::Brief;
use crate::label::clock::machine;
use crate::label::words::{circle_key, heading_key};
use crate::units::{Instant, Place};
use serde::Serialize;

/// The schema's number.
const SCHEMA: u32 = 1;

#[derive(Debug, Serialize)]
pub(super) struct Record {
    schema: u32,
    flight: flight::FlightRecord,
    beneath: beneath::BeneathRecord,
    #[serde(skip_serializing_if = "Option::is_none")]
    aloft: Option<aloft::AloftRecord>,
    moon: moon::MoonRecord,
    illuminance: illuminance::IlluminanceRecord,
    low_sun: Vec<ahead::LowSunRecord>,
    low_sun_limits: ahead::LowSunLimitsRecord,
    runways: [ahead::RunwaysRecord; 2],
    alternates: Vec<alternates::AlternateRecord>,
    circles: Vec<CircleRecord>,
    northernmost: PointRecord,
    southernmost: PointRecord,
    #[serde(skip_serializing_if = "Option::is_none")]
    recording: Option<recording::RecordingRecord>,
    ut1_minus_utc_s: f64,
    warnings: Vec<String>,
    cautions: Vec<String>,
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

impl Record {
    pub(super) fn of(brief: &Brief) -> Self {
        Self {
            schema: SCHEMA,
            flight: flight::FlightRecord::of(brief),
            beneath: beneath::BeneathRecord::of(brief),
            aloft: brief.deck.as_ref().map(|view| aloft::AloftRecord::of(brief, view)),
            moon: moon::MoonRecord::of(brief),
            illuminance: illuminance::IlluminanceRecord::of(brief),
            low_sun: ahead::low_sun(brief),
            low_sun_limits: ahead::LowSunLimitsRecord::of(brief),
            runways: ahead::runways(brief),
            alternates: alternates::alternates(brief),
            circles: circles(brief),
            northernmost: point(brief, brief.northernmost),
            southernmost: point(brief, brief.southernmost),
            recording: brief.flight.recorded.as_ref().map(recording::RecordingRecord::of),
            ut1_minus_utc_s: brief.dut1_s,
            warnings: brief.flight.warnings.clone(),
            cautions: super::caution::cautions(brief),
        }
    }
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

fn instant(brief: &Brief, at_s: f64) -> Instant {
    brief.path.takeoff.after_s(at_s)
}

/// RFC 3339 of a time in seconds from take-off.
pub(super) fn when(brief: &Brief, at_s: f64) -> String {
    machine(instant(brief, at_s))
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
