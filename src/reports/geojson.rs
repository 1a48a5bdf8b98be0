//! A brief as `GeoJSON` (RFC 7946): the track in a line for each state of the light, and a point for each thing that happens.
//!
//! Knows nothing of styles. Heights are above mean sea level, as flights have them, and not above the ellipsoid, as the
//! RFC would have them: the document says so.

use super::marks::{TOLERANCE, marks};
use super::position::{Bounds, Position, position, position_at};
use super::record::{rounded, when};
use crate::Brief;
use crate::label::clock::machine;
use crate::label::one_line;
use crate::label::words::state_key;
use crate::light::Segment;
use crate::path::TrackPoint;
use serde::Serialize;

/// A collection up to its features: what RFC 7946 (7.1) does not name is ours.
#[derive(Serialize)]
struct Head {
    bbox: Vec<f64>,
    schema: u32,
    flight: FlightTold,
    #[serde(skip_serializing_if = "Option::is_none")]
    heights: Option<&'static str>,
    cautions: Vec<String>,
}

#[derive(Serialize)]
struct FlightTold {
    name: String,
    from: String,
    to: String,
    takeoff_utc: String,
    landing_utc: String,
}

#[derive(Serialize)]
struct Feature<P> {
    r#type: &'static str,
    properties: P,
    geometry: Geometry,
}

#[derive(Serialize)]
#[serde(tag = "type", content = "coordinates")]
enum Geometry {
    Point(Position),
    LineString(Vec<Position>),
    MultiLineString(Vec<Vec<Position>>),
}

#[derive(Serialize)]
struct Stretch {
    kind: &'static str,
    state: &'static str,
    begins_utc: String,
    ends_utc: String,
    seconds: f64,
    times: Times,
}

/// When each position is passed: in the shape of the coordinates.
#[derive(Serialize)]
#[serde(untagged)]
enum Times {
    Line(Vec<String>),
    Lines(Vec<Vec<String>>),
}

#[derive(Serialize)]
struct Happens {
    title: String,
    utc: String,
    #[serde(flatten)]
    tells: super::marks::Tells,
}

/// One brief as a `FeatureCollection`, a feature a line, ending in a line feed.
///
/// # Shapes and units
/// A segment of the light is a `LineString`, or a `MultiLineString` where the 180° meridian or a pole parts it; its member
/// `times` holds when each position is passed, in the shape of its coordinates. A pole is given twice, with the longitude
/// of either meridian. Drawn straight in longitude and latitude a line is within 100 m of the geodesic.
///
/// # Errors
/// None that a brief can cause.
pub fn geojson(brief: &Brief) -> Result<String, serde_json::Error> {
    let tracks: Vec<(&Segment, Vec<Vec<TrackPoint>>)> =
        brief.light.segments.iter().map(|s| (s, brief.path.track(s.begin_s, s.end_s, TOLERANCE))).collect();
    let mut all: Vec<Vec<Position>> =
        tracks.iter().flat_map(|(_, lines)| lines).map(|line| positions(line)).collect();
    let mut features = Vec::new();
    for (segment, lines) in &tracks {
        features.push(serde_json::to_string(&stretch(brief, segment, lines))?);
    }
    for mark in marks(brief) {
        let position = position_at(brief, mark.at_s, &all);
        all.push(vec![position.clone()]);
        let properties = Happens { title: mark.title, utc: when(brief, mark.at_s), tells: mark.tells };
        let geometry = Geometry::Point(position);
        features.push(serde_json::to_string(&Feature { r#type: "Feature", properties, geometry })?);
    }
    let bounds = Bounds::of(&all);
    let head = serde_json::to_string(&head(brief, &bounds))?;
    // one collection, but with a line for each feature, so that a change shows where it is
    let head = head.strip_suffix('}').unwrap_or(&head).trim_start_matches('{');
    Ok(format!("{{\"type\":\"FeatureCollection\",{head},\"features\":[\n{}\n]}}\n", features.join(",\n")))
}

fn head(brief: &Brief, bounds: &Bounds) -> Head {
    let flight = &brief.flight;
    Head {
        bbox: bounds.numbers(),
        schema: 1,
        flight: FlightTold {
            name: one_line(&flight.name),
            from: one_line(&flight.from.label),
            to: one_line(&flight.to.label),
            takeoff_utc: machine(flight.takeoff),
            landing_utc: machine(brief.path.landing()),
        },
        heights: brief.path.heights.as_ref().map(|_| "metres above mean sea level, not above the ellipsoid"),
        cautions: super::caution::cautions(brief),
    }
}

fn stretch(brief: &Brief, segment: &Segment, lines: &[Vec<TrackPoint>]) -> Feature<Stretch> {
    let times = |line: &Vec<TrackPoint>| line.iter().map(|point| when(brief, point.at_s)).collect();
    let (geometry, times) = match lines {
        [line] => (Geometry::LineString(positions(line)), Times::Line(times(line))),
        _ => (
            Geometry::MultiLineString(lines.iter().map(|line| positions(line)).collect()),
            Times::Lines(lines.iter().map(times).collect()),
        ),
    };
    let properties = Stretch {
        kind: "light",
        state: state_key(segment.state),
        begins_utc: when(brief, segment.begin_s),
        ends_utc: when(brief, segment.end_s),
        seconds: rounded(segment.seconds(), 3),
        times,
    };
    Feature { r#type: "Feature", properties, geometry }
}

fn positions(line: &[TrackPoint]) -> Vec<Position> {
    line.iter().map(position).collect()
}
