//! A recorded track as a flight: from its first point to its last, through all between.

use super::super::brightness::Brightness;
use super::super::flight::{Flight, Recorded, RoutePoint, Stop};
use super::super::pace::Pace;
use super::{Track, TrackPoint};
use crate::places::{Aerodrome, nearest};
use crate::units::Metres;

/// A recording that begins or ends this near to an aerodrome is taken to begin or end there.
const AT_THE_FIELD: Metres = Metres(8_000.0);

impl Track {
    /// The recording as a flight; `source_stem` names it if the recording does not.
    ///
    /// Its ends are the recording's own first and last points. Where an aerodrome lies within 8 km they bear its code and
    /// keep its clocks, but not its position.
    pub fn flight(self, source_stem: &str) -> Flight {
        let (first, last) = (self.points[0], self.points[self.points.len() - 1]);
        let at_s = |point: &TrackPoint| point.instant.since_s(first.instant);
        let heights = self.points.iter().map(|p| p.height.map(|height| (at_s(p), height)));
        let recorded = Recorded {
            points: self.points.len(),
            heights: heights.collect::<Option<Vec<_>>>(),
            repairs: self.repairs,
        };
        let inner = &self.points[1..self.points.len() - 1];
        let waypoints = inner.iter().map(|point| RoutePoint {
            label: String::new(),
            place: point.place,
            time: Some(point.instant),
            wind_m_s: None,
        });
        Flight {
            name: self.name.filter(|name| !name.trim().is_empty()).unwrap_or_else(|| source_stem.to_string()),
            from: stop(&first),
            to: stop(&last),
            takeoff: first.instant,
            landing: Some(last.instant),
            pace: Pace::Times,
            off_block: None,
            on_block: None,
            profile: Vec::new(),
            level: None,
            climb: None,
            horizon: None,
            waypoints: waypoints.collect(),
            polar_limits: None,
            dut1: None,
            recorded: Some(recorded),
            low_sun: None,
            from_air: None,
            to_air: None,
            alternates: Vec::new(),
            brightness: Brightness::default(),
            warnings: Vec::new(),
        }
    }
}

fn stop(point: &TrackPoint) -> Stop {
    let field = nearest(point.place, AT_THE_FIELD);
    let (lat, lon) = (point.place.lat.deg(), point.place.lon.deg());
    Stop {
        label: field.map_or_else(|| format!("{lat:.4},{lon:.4}"), |field| field.code().to_string()),
        name: field.map(|field| field.name().to_string()),
        place: point.place,
        zone: field.map(Aerodrome::zone),
        aerodrome: field,
    }
}
