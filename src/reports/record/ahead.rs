//! Low Sun ahead, in flight and along runways, as records.

use super::{deg, rounded, when};
use crate::label::clock::machine;
use crate::light::{AheadSpan, SunAhead};
use crate::{Brief, Glare, RunwaySun, RunwayView};
use serde::Serialize;

/// What was taken for a low Sun ahead.
#[derive(Debug, Serialize)]
pub(super) struct LowSunLimitsRecord {
    sector_deg: f64,
    strong_deg: f64,
    up_to_deg: f64,
    convention: &'static str,
}

impl LowSunLimitsRecord {
    pub(super) fn of(brief: &Brief) -> Self {
        let limits = brief.low_sun_limits;
        Self {
            sector_deg: deg(limits.sector.deg()),
            strong_deg: deg(limits.strong.deg()),
            up_to_deg: deg(limits.up_to.deg()),
            convention: "gloamline's own, no published limit",
        }
    }
}

#[derive(Debug, Serialize)]
pub(super) struct LowSunRecord {
    begins_utc: String,
    ends_utc: String,
    seconds: f64,
    strong: bool,
    strong_spans: Vec<StrongRecord>,
    at_begin: SunRecord,
    at_end: SunRecord,
    least_bearing_deg: f64,
}

#[derive(Debug, Serialize)]
struct StrongRecord {
    begins_utc: String,
    ends_utc: String,
    seconds: f64,
}

#[derive(Debug, Serialize)]
#[allow(clippy::struct_field_names, reason = "keys of the schema carry their unit")]
struct SunRecord {
    elevation_deg: f64,
    apparent_elevation_deg: f64,
    relative_bearing_deg: f64,
}

impl SunRecord {
    fn of(sun: &SunAhead) -> Self {
        Self {
            elevation_deg: deg(sun.elevation.0.deg()),
            apparent_elevation_deg: rounded(sun.apparent.0.deg(), 3),
            relative_bearing_deg: rounded(sun.relative_bearing.deg(), 3),
        }
    }
}

pub(super) fn low_sun(brief: &Brief) -> Vec<LowSunRecord> {
    let strong = |&(begin, end): &(f64, f64)| StrongRecord {
        begins_utc: when(brief, begin),
        ends_utc: when(brief, end),
        seconds: rounded(end - begin, 3),
    };
    let record = |span: &AheadSpan| LowSunRecord {
        begins_utc: when(brief, span.begin.at_s),
        ends_utc: when(brief, span.end.at_s),
        seconds: rounded(span.end.at_s - span.begin.at_s, 3),
        strong: !span.strong.is_empty(),
        strong_spans: span.strong.iter().map(strong).collect(),
        at_begin: SunRecord::of(&span.begin),
        at_end: SunRecord::of(&span.end),
        least_bearing_deg: rounded(span.least_bearing.deg(), 2),
    };
    brief.low_sun.iter().map(record).collect()
}

/// The Sun against the runways of one aerodrome; `ends` is empty where they are not known.
#[derive(Debug, Serialize)]
pub(super) struct RunwaysRecord {
    at: &'static str,
    place: String,
    utc: String,
    sun_apparent_elevation_deg: f64,
    sun_azimuth_deg: f64,
    sun_is_low: bool,
    runways_known: bool,
    ends: Vec<EndRecord>,
}

#[derive(Debug, Serialize)]
struct EndRecord {
    designator: &'static str,
    true_bearing_deg: f64,
    relative_bearing_deg: f64,
    low_sun: &'static str,
}

pub(super) fn runways(brief: &Brief) -> [RunwaysRecord; 2] {
    let flight = &brief.flight;
    let record = |at, place: &str, instant, view: &RunwayView| RunwaysRecord {
        at,
        place: place.to_string(),
        utc: machine(instant),
        sun_apparent_elevation_deg: rounded(view.apparent.0.deg(), 3),
        sun_azimuth_deg: rounded(view.azimuth.deg(), 3),
        sun_is_low: view.is_low,
        runways_known: view.ends.is_some(),
        ends: view.ends.iter().flatten().map(end).collect(),
    };
    [
        record("takeoff", &flight.from.label, flight.takeoff, &brief.runways[0]),
        record("landing", &flight.to.label, brief.path.landing(), &brief.runways[1]),
    ]
}

fn end(sun: &RunwaySun) -> EndRecord {
    EndRecord {
        designator: sun.designator,
        true_bearing_deg: rounded(sun.bearing.deg(), 2),
        relative_bearing_deg: rounded(sun.relative_bearing.deg(), 2),
        low_sun: match sun.glare {
            Glare::None => "none",
            Glare::Low => "ahead",
            Glare::Strong => "strong",
        },
    }
}
