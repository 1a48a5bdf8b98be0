//! The flight itself, as a record.

use super::{lat_lon, rounded};
use crate::Brief;
use crate::label::clock::machine;
use serde::Serialize;

#[derive(Debug, Serialize)]
pub(super) struct FlightRecord {
    name: String,
    from: String,
    to: String,
    takeoff_utc: String,
    landing_utc: String,
    airborne_s: f64,
    #[serde(skip_serializing_if = "Option::is_none")]
    off_block_utc: Option<String>,
    #[serde(skip_serializing_if = "Option::is_none")]
    on_block_utc: Option<String>,
    #[serde(skip_serializing_if = "Option::is_none")]
    block_s: Option<f64>,
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

impl FlightRecord {
    pub(super) fn of(brief: &Brief) -> Self {
        let flight = &brief.flight;
        let ((from_lat_deg, from_lon_deg), (to_lat_deg, to_lon_deg)) =
            (lat_lon(flight.from.place), lat_lon(flight.to.place));
        Self {
            name: flight.name.clone(),
            from: flight.from.label.clone(),
            to: flight.to.label.clone(),
            takeoff_utc: machine(flight.takeoff),
            landing_utc: machine(brief.path.landing()),
            airborne_s: rounded(brief.path.airborne_s, 3),
            off_block_utc: flight.off_block.map(machine),
            on_block_utc: brief.on_block().map(machine),
            block_s: flight.off_block.zip(brief.on_block()).map(|(off, on)| rounded(on.since_s(off), 3)),
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
