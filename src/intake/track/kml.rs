//! Tracks in KML: each placemark's `gx:Track` or `gx:MultiTrack` is a flight.
//!
//! # Source
//! KML 2.2 with the extension namespace `gx`, and OGC 12-007r2 (KML 2.3), 15: `when` and `coord` pair in order, and an
//! empty `coord` is a missing position. A height counts from sea level only where `altitudeMode` is `absolute`. Where no
//! mode is said the heights are taken as well, unlike in section 9.20: who records heights means them.

use super::raw::{Gathering, MOST_POINTS, RawTrack, Reading};
use super::xml::{Element, Name, Visitor, walk};
use super::{Found, TrackOptions, TrackProblem};

const NAMES: [&str; 6] = ["Placemark", "Track", "when", "coord", "name", "altitudeMode"];
const PLACEMARK: Name = Some(0);
const TRACK: Name = Some(1);
const WHEN: Name = Some(2);
const COORD: Name = Some(3);
const NAME: Name = Some(4);
const MODE: Name = Some(5);

pub(super) fn read(text: &str, options: &TrackOptions) -> Found<Vec<RawTrack>> {
    let mut kml = Kml {
        gathering: Gathering::new(options),
        flight: None,
        track: Pairs::default(),
        saw_placemark: false,
        name: None,
    };
    walk(text, &mut kml)?;
    let saw_placemark = kml.saw_placemark;
    let tracks = kml.gathering.done();
    if tracks.is_empty() {
        let problem = if saw_placemark { TrackProblem::NoTimes } else { TrackProblem::Nothing };
        return Err((None, problem));
    }
    Ok(tracks)
}

/// The times and positions of one `gx:Track`, which may come in turn or one kind after the other.
#[derive(Default)]
struct Pairs {
    at: usize,
    times: String,
    /// Where each time ends in `times`.
    ends: Vec<usize>,
    positions: Vec<[f64; 3]>,
    above_sea: bool,
}

struct Kml<'o> {
    gathering: Gathering<'o>,
    /// The flight of the placemark that is open.
    flight: Option<usize>,
    track: Pairs,
    saw_placemark: bool,
    name: Option<String>,
}

impl Visitor for Kml<'_> {
    fn names(&self) -> &'static [&'static str] {
        &NAMES
    }

    fn open(&mut self, _parents: &[Name], element: &Element<'_>) -> Found<()> {
        match element.name {
            PLACEMARK => {
                self.saw_placemark = true;
                (self.flight, self.name) = (None, None);
            }
            TRACK => self.track = Pairs { at: element.at, above_sea: true, ..Pairs::default() },
            _ => {}
        }
        Ok(())
    }

    fn close(&mut self, parents: &[Name], name: Name, text: &str) -> Found<()> {
        if self.track.positions.len().max(self.track.ends.len()) > MOST_POINTS {
            return Err((Some(self.track.at), TrackProblem::TooManyPoints));
        }
        match (parents.last().copied().flatten(), name) {
            (TRACK, WHEN) => {
                self.track.times.push_str(text);
                self.track.ends.push(self.track.times.len());
            }
            (TRACK, COORD) => self.track.positions.push(coordinates(text)),
            (TRACK, MODE) => self.track.above_sea = text == "absolute",
            (PLACEMARK, NAME) => self.name = Some(text.to_string()),
            (_, TRACK) => self.pair()?,
            (_, PLACEMARK) => self.finish(),
            _ => {}
        }
        Ok(())
    }
}

/// Longitude, latitude and height, parted by blanks.
fn coordinates(text: &str) -> [f64; 3] {
    let mut numbers =
        text.split_ascii_whitespace().map(|word| super::sheet::number(word).unwrap_or(f64::NAN));
    std::array::from_fn(|_| numbers.next().unwrap_or(f64::NAN))
}

impl Kml<'_> {
    fn pair(&mut self) -> Found<()> {
        let track = std::mem::take(&mut self.track);
        let (times, positions) = (track.ends.len(), track.positions.len());
        if times != positions {
            return Err((Some(track.at), TrackProblem::TimesCount { times, positions }));
        }
        let flight = match self.flight {
            Some(flight) => flight,
            None => *self.flight.insert(self.gathering.begin(None, track.at)?),
        };
        let mut begin = 0;
        for (&end, &[lon, lat, height]) in track.ends.iter().zip(&track.positions) {
            let time = &track.times[begin..end];
            let height_m = if track.above_sea { height } else { f64::NAN };
            self.gathering.push(flight, &Reading { at: track.at, time, date: None, lat, lon, height_m })?;
            begin = end;
        }
        Ok(())
    }

    fn finish(&mut self) {
        let name = self.name.take().filter(|name| !name.is_empty());
        if let Some(track) = self.flight.take().and_then(|flight| self.gathering.track(flight)) {
            track.name = name;
        }
    }
}
