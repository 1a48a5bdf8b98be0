//! The alternates as records.

use super::{deg, lat_lon, rounded, when};
use crate::label::clock::machine;
use crate::label::words::{event_key, state_key};
use crate::{AlternateView, Brief, Polar};
use serde::Serialize;

#[derive(Debug, Serialize)]
pub(super) struct AlternateRecord {
    place: String,
    lat_deg: f64,
    lon_deg: f64,
    abeam_utc: String,
    distance_m: f64,
    used_utc: String,
    state: &'static str,
    elevation_deg: f64,
    azimuth_deg: f64,
    /// Nothing where none comes within 48 hours.
    next_event: Option<&'static str>,
    next_utc: Option<String>,
    polar: &'static str,
}

pub(super) fn alternates(brief: &Brief) -> Vec<AlternateRecord> {
    let pairs = brief.flight.alternates.iter().zip(&brief.alternates);
    pairs.map(|(given, view)| record(brief, &given.stop, view)).collect()
}

fn record(brief: &Brief, stop: &crate::intake::Stop, view: &AlternateView) -> AlternateRecord {
    let (lat_deg, lon_deg) = lat_lon(stop.place);
    AlternateRecord {
        place: stop.label.clone(),
        lat_deg,
        lon_deg,
        abeam_utc: when(brief, view.abeam.at_s),
        distance_m: rounded(view.abeam.distance.0, 0),
        used_utc: machine(view.used),
        state: state_key(view.state),
        elevation_deg: deg(view.elevation.0.deg()),
        azimuth_deg: rounded(view.azimuth.deg(), 3),
        next_event: view.next.map(|(event, _)| event_key(event)),
        next_utc: view.next.map(|(_, at)| machine(at)),
        polar: match view.polar {
            Some(Polar::Day) => "day",
            Some(Polar::Night) => "night",
            None => "neither",
        },
    }
}
