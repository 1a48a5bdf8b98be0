//! The light as seen from sea level beneath the aircraft, as a record; its parts serve the flight deck's as well.

use super::{deg, lat_lon, rounded, when};
use crate::Brief;
use crate::label::words::{direction_key, event_key, limit_key, state_key};
use crate::light::{Crossing, Doubt, Limit, Sample, Segment, State, Touch, Trust};
use serde::Serialize;

#[derive(Debug, Serialize)]
pub(super) struct BeneathRecord {
    state_at_takeoff: &'static str,
    state_at_landing: &'static str,
    on_boundary_at_takeoff: Vec<&'static str>,
    on_boundary_at_landing: Vec<&'static str>,
    crossings: Vec<CrossingRecord>,
    touches: Vec<TouchRecord>,
    doubts: Vec<DoubtRecord>,
    segments: Vec<SegmentRecord>,
    seconds: SecondsRecord,
    highest: PeakRecord,
    lowest: PeakRecord,
}

#[derive(Debug, Serialize)]
pub(super) struct CrossingRecord {
    utc: String,
    limit: &'static str,
    direction: &'static str,
    event: &'static str,
    lat_deg: f64,
    lon_deg: f64,
    elevation_deg: f64,
    azimuth_deg: f64,
    relative_bearing_deg: f64,
    uncertainty_s: f64,
    doubtful: bool,
}

#[derive(Debug, Serialize)]
pub(super) struct TouchRecord {
    utc: String,
    limit: &'static str,
    margin_deg: f64,
}

#[derive(Debug, Serialize)]
pub(super) struct DoubtRecord {
    utc: String,
    limit: &'static str,
    turn: &'static str,
    margin_deg: f64,
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
pub(super) struct PeakRecord {
    utc: String,
    elevation_deg: f64,
    azimuth_deg: f64,
    lat_deg: f64,
    lon_deg: f64,
}

impl BeneathRecord {
    pub(super) fn of(brief: &Brief) -> Self {
        let light = &brief.light;
        let in_state = |state| rounded(light.seconds.in_state(state), 3);
        let limits = |limits: &[Limit]| limits.iter().map(|&limit| limit_key(limit)).collect();
        Self {
            state_at_takeoff: state_key(light.at_takeoff),
            state_at_landing: state_key(light.at_landing),
            on_boundary_at_takeoff: limits(&brief.on_boundary.0),
            on_boundary_at_landing: limits(&brief.on_boundary.1),
            crossings: crossings(brief, (&light.crossings, &brief.at_crossings, &brief.trusts)),
            touches: touches(brief, &light.touches),
            doubts: doubts(brief, &brief.doubts),
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

/// Crossings with the Sun at each and how far each can be trusted.
pub(super) fn crossings(brief: &Brief, all: (&[Crossing], &[Sample], &[Trust])) -> Vec<CrossingRecord> {
    let rows = all.0.iter().zip(all.1).zip(all.2);
    let record = |((crossing, sample), trust): ((&Crossing, &Sample), &Trust)| {
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
            relative_bearing_deg: rounded(sample.relative_bearing.deg(), 3),
            uncertainty_s: rounded(trust.uncertainty_s, 1),
            doubtful: trust.doubtful,
        }
    };
    rows.map(record).collect()
}

pub(super) fn touches(brief: &Brief, all: &[Touch]) -> Vec<TouchRecord> {
    let record = |touch: &Touch| TouchRecord {
        utc: when(brief, touch.at_s),
        limit: limit_key(touch.limit),
        margin_deg: rounded(touch.margin.deg(), 7),
    };
    all.iter().map(record).collect()
}

pub(super) fn doubts(brief: &Brief, all: &[Doubt]) -> Vec<DoubtRecord> {
    let record = |doubt: &Doubt| DoubtRecord {
        utc: when(brief, doubt.at_s),
        limit: limit_key(doubt.limit),
        turn: if doubt.top { "top" } else { "bottom" },
        margin_deg: deg(doubt.margin.deg()),
    };
    all.iter().map(record).collect()
}

fn segments(brief: &Brief) -> Vec<SegmentRecord> {
    let record = |segment: &Segment| SegmentRecord {
        state: state_key(segment.state),
        begins_utc: when(brief, segment.begin_s),
        ends_utc: when(brief, segment.end_s),
        seconds: rounded(segment.seconds(), 3),
    };
    brief.light.segments.iter().map(record).collect()
}

pub(super) fn peak(brief: &Brief, sample: &Sample) -> PeakRecord {
    let (lat_deg, lon_deg) = lat_lon(sample.position.place);
    PeakRecord {
        utc: when(brief, sample.at_s),
        elevation_deg: deg(sample.elevation.0.deg()),
        azimuth_deg: rounded(sample.azimuth.deg(), 3),
        lat_deg,
        lon_deg,
    }
}
