//! The Moon beneath the aircraft, as a record.

use super::{deg, lat_lon, rounded, when};
use crate::Brief;
use crate::label::words::moon_event_key;
use crate::light::{MoonCrossing, MoonSample, MoonSegment, MoonTouch};
use serde::Serialize;

#[derive(Debug, Serialize)]
pub(super) struct MoonRecord {
    at_takeoff: MoonPlaceRecord,
    at_landing: MoonPlaceRecord,
    highest: MoonPlaceRecord,
    up_at_takeoff: bool,
    up_at_landing: bool,
    illuminated_fraction: f64,
    phase_angle_deg: f64,
    waxing: bool,
    crossings: Vec<MoonCrossingRecord>,
    touches: Vec<MoonTouchRecord>,
    segments: Vec<MoonSegmentRecord>,
    seconds: MoonSecondsRecord,
}

#[derive(Debug, Serialize)]
struct MoonPlaceRecord {
    utc: String,
    elevation_deg: f64,
    azimuth_deg: f64,
    lat_deg: f64,
    lon_deg: f64,
}

#[derive(Debug, Serialize)]
struct MoonCrossingRecord {
    utc: String,
    event: &'static str,
    lat_deg: f64,
    lon_deg: f64,
    elevation_deg: f64,
    azimuth_deg: f64,
    relative_bearing_deg: f64,
}

#[derive(Debug, Serialize)]
struct MoonTouchRecord {
    utc: String,
    margin_deg: f64,
}

#[derive(Debug, Serialize)]
struct MoonSegmentRecord {
    up: bool,
    begins_utc: String,
    ends_utc: String,
    seconds: f64,
}

#[derive(Debug, Serialize)]
struct MoonSecondsRecord {
    up: f64,
    down: f64,
    moonlit_darkness: f64,
    dark_darkness: f64,
    moonlit_night_twilight: f64,
    dark_night_twilight: f64,
}

impl MoonRecord {
    /// The phase is that of the flight's take-off.
    pub(super) fn of(brief: &Brief) -> Self {
        let (view, moon) = (&brief.moon, &brief.moon.moon);
        let phase = view.at_takeoff().phase;
        Self {
            at_takeoff: place(brief, view.at_takeoff()),
            at_landing: place(brief, view.at_landing()),
            highest: place(brief, &view.at_highest),
            up_at_takeoff: moon.is_up_at(0.0),
            up_at_landing: moon.is_up_at(brief.path.airborne_s),
            illuminated_fraction: rounded(phase.illuminated, 4),
            phase_angle_deg: rounded(phase.phase_angle.deg(), 3),
            waxing: phase.is_waxing,
            crossings: crossings(brief),
            touches: moon.touches.iter().map(|touch| touch_record(brief, touch)).collect(),
            segments: moon.segments.iter().map(|segment| segment_record(brief, segment)).collect(),
            seconds: MoonSecondsRecord {
                up: rounded(moon.seconds(true), 3),
                down: rounded(moon.seconds(false), 3),
                moonlit_darkness: rounded(moon.darkness.moonlit_s, 3),
                dark_darkness: rounded(moon.darkness.moonless_s, 3),
                moonlit_night_twilight: rounded(moon.night_twilight.moonlit_s, 3),
                dark_night_twilight: rounded(moon.night_twilight.moonless_s, 3),
            },
        }
    }
}

fn crossings(brief: &Brief) -> Vec<MoonCrossingRecord> {
    let pairs = brief.moon.moon.crossings.iter().zip(&brief.moon.at_crossings);
    let record = |(crossing, sample): (&MoonCrossing, &MoonSample)| {
        let (lat_deg, lon_deg) = lat_lon(sample.position.place);
        MoonCrossingRecord {
            utc: when(brief, crossing.at_s),
            event: moon_event_key(crossing.direction),
            lat_deg,
            lon_deg,
            elevation_deg: deg(sample.elevation.0.deg()),
            azimuth_deg: rounded(sample.azimuth.deg(), 3),
            relative_bearing_deg: rounded(sample.relative_bearing.deg(), 3),
        }
    };
    pairs.map(record).collect()
}

fn place(brief: &Brief, sample: &MoonSample) -> MoonPlaceRecord {
    let (lat_deg, lon_deg) = lat_lon(sample.position.place);
    MoonPlaceRecord {
        utc: when(brief, sample.at_s),
        elevation_deg: deg(sample.elevation.0.deg()),
        azimuth_deg: rounded(sample.azimuth.deg(), 3),
        lat_deg,
        lon_deg,
    }
}

fn touch_record(brief: &Brief, touch: &MoonTouch) -> MoonTouchRecord {
    MoonTouchRecord { utc: when(brief, touch.at_s), margin_deg: rounded(touch.margin.deg(), 7) }
}

fn segment_record(brief: &Brief, segment: &MoonSegment) -> MoonSegmentRecord {
    MoonSegmentRecord {
        up: segment.is_up,
        begins_utc: when(brief, segment.begin_s),
        ends_utc: when(brief, segment.end_s),
        seconds: rounded(segment.end_s - segment.begin_s, 3),
    }
}
