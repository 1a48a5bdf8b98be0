//! Tracks and timed routes in GPX 1.1: each `trk` and each `rte` is a flight, its segments joined.
//!
//! # Source
//! GPX 1.1 schema, 2004: `lat` and `lon` in degrees WGS84, `ele` in metres, `time` in UTC (ISO 8601).

use super::raw::{Gathering, RawTrack, Reading};
use super::xml::{Element, Name, Visitor, walk};
use super::{Found, TrackOptions, TrackProblem};

const NAMES: [&str; 8] = ["trk", "trkseg", "trkpt", "rte", "rtept", "time", "ele", "name"];
const TRK: Name = Some(0);
const TRKPT: Name = Some(2);
const RTE: Name = Some(3);
const RTEPT: Name = Some(4);
const TIME: Name = Some(5);
const ELE: Name = Some(6);
const NAME: Name = Some(7);

pub(super) fn read(text: &str, options: &TrackOptions) -> Found<Vec<RawTrack>> {
    let mut gpx = Gpx { gathering: Gathering::new(options), flight: 0, point: Point::default() };
    walk(text, &mut gpx)?;
    let tracks = gpx.gathering.done();
    if tracks.is_empty() { Err((None, TrackProblem::Nothing)) } else { Ok(tracks) }
}

/// The point that is being read.
#[derive(Default)]
struct Point {
    at: usize,
    lat: f64,
    lon: f64,
    height_m: f64,
    time: String,
}

struct Gpx<'o> {
    gathering: Gathering<'o>,
    flight: usize,
    point: Point,
}

impl Visitor for Gpx<'_> {
    fn names(&self) -> &'static [&'static str] {
        &NAMES
    }

    fn open(&mut self, _parents: &[Name], element: &Element<'_>) -> Found<()> {
        match element.name {
            TRK | RTE => self.flight = self.gathering.begin(None, element.at)?,
            TRKPT | RTEPT => {
                self.point.at = element.at;
                self.point.lat = element.number("lat");
                self.point.lon = element.number("lon");
                self.point.height_m = f64::NAN;
                self.point.time.clear();
            }
            _ => {}
        }
        Ok(())
    }

    fn close(&mut self, parents: &[Name], name: Name, text: &str) -> Found<()> {
        // what stands deeper, such as in extensions, is not the point's own
        let parent = parents.last().copied().flatten();
        match (parent, name) {
            (TRKPT | RTEPT, TIME) => text.clone_into(&mut self.point.time),
            (TRKPT | RTEPT, ELE) => self.point.height_m = super::sheet::number(text).unwrap_or(f64::NAN),
            (TRK | RTE, NAME) => self.name(text),
            (_, TRKPT | RTEPT) => self.push()?,
            _ => {}
        }
        Ok(())
    }
}

impl Gpx<'_> {
    fn name(&mut self, text: &str) {
        if let Some(track) = self.gathering.track(self.flight).filter(|_| !text.is_empty()) {
            track.name = Some(text.to_string());
        }
    }

    fn push(&mut self) -> Found<()> {
        let Point { at, lat, lon, height_m, ref time } = self.point;
        self.gathering.push(self.flight, &Reading { at, time, date: None, lat, lon, height_m })
    }
}
