//! Tracks in GeoJSON: each feature that is a `LineString` or `MultiLineString` with times is a flight, its lines joined.
//!
//! # Source
//! RFC 7946, 2016: longitude, latitude, and height in metres above the ellipsoid, taken here as above sea level. It has
//! no times; they stand in the property `times` or `coordTimes`, as an array (of arrays, as the lines are) of ISO 8601
//! strings or of counts since 1970, one for each position.

use super::json::{Cursor, Next, unescaped};
use super::raw::{Gathering, MOST_POINTS, RawTrack, Reading};
use super::{Found, TrackOptions, TrackProblem};

/// Where times may stand in the properties of a feature.
const TIMES: [&str; 2] = ["times", "coordTimes"];
/// What a feature may be called by, the best first.
const NAMES: [&str; 3] = ["name", "title", "callsign"];

pub(super) fn read(text: &str, options: &TrackOptions) -> Found<Vec<RawTrack>> {
    let mut cursor = Cursor::new(text);
    let mut finder = Finder { gathering: Gathering::new(options), lines: false };
    finder.feature_or_collection(&mut cursor)?;
    cursor.end()?;
    let lines = finder.lines;
    let tracks = joined(finder.gathering.done());
    if tracks.is_empty() {
        return Err((None, if lines { TrackProblem::NoTimes } else { TrackProblem::Nothing }));
    }
    Ok(tracks)
}

/// Lines that each begin where and when the one before ended are one flight: so are the features of our own documents, one
/// for each state of the light.
fn joined(tracks: Vec<RawTrack>) -> Vec<RawTrack> {
    let mut whole: Vec<RawTrack> = Vec::with_capacity(1);
    for track in tracks {
        match whole.last_mut() {
            Some(last) if goes_on(last, &track) => last.points.extend(track.points.into_iter().skip(1)),
            _ => whole.push(track),
        }
    }
    whole
}

fn goes_on(last: &RawTrack, next: &RawTrack) -> bool {
    let (Some(end), Some(begin)) = (last.points.last(), next.points.first()) else { return false };
    let (a, b) = (end.place.normal(), begin.place.normal());
    // a hand's breadth and a millisecond: what documents round to
    let apart = (0..3).map(|i| (a[i] - b[i]).powi(2)).sum::<f64>().sqrt();
    last.name == next.name && begin.instant.since_s(end.instant).abs() < 2e-3 && apart < 5e-8
}

/// What a feature holds, in whichever order it comes.
#[derive(Default)]
struct Feature<'t> {
    is_line: bool,
    positions: Vec<[f64; 3]>,
    times: Vec<&'t str>,
    name: Option<(usize, String)>,
}

struct Finder<'o> {
    gathering: Gathering<'o>,
    /// Whether any line was found, with or without times.
    lines: bool,
}

impl Finder<'_> {
    fn feature_or_collection(&mut self, cursor: &mut Cursor<'_>) -> Found<()> {
        let mut feature = Feature::default();
        cursor.next()?;
        let at = cursor.at();
        cursor.object(|cursor, key| match (key, cursor.next()?) {
            ("features", Next::Array) => cursor.array(|cursor| self.feature_or_collection(cursor)),
            ("geometry", Next::Object) => cursor.object(|cursor, key| feature.geometry(cursor, key)),
            ("properties", Next::Object) => cursor.object(|cursor, key| feature.property(cursor, key)),
            _ => cursor.skip(),
        })?;
        self.take(feature, at)
    }

    fn take(&mut self, feature: Feature<'_>, at: usize) -> Found<()> {
        if !feature.is_line {
            return Ok(());
        }
        self.lines = true;
        let (times, positions) = (feature.times.len(), feature.positions.len());
        // a line without times is scenery
        if times == 0 {
            return Ok(());
        }
        if times != positions {
            return Err((Some(at), TrackProblem::TimesCount { times, positions }));
        }
        let flight = self.gathering.begin(feature.name.map(|(_, name)| name), at)?;
        for (time, [lon, lat, height_m]) in feature.times.into_iter().zip(feature.positions) {
            self.gathering.push(flight, &Reading { at, time, date: None, lat, lon, height_m })?;
        }
        Ok(())
    }
}

impl<'t> Feature<'t> {
    fn geometry(&mut self, cursor: &mut Cursor<'t>, key: &str) -> Found<()> {
        match (key, cursor.next()?) {
            ("type", Next::String) => {
                self.is_line = matches!(cursor.string()?, "LineString" | "MultiLineString");
                Ok(())
            }
            ("coordinates", Next::Array) => self.coordinates(cursor),
            _ => cursor.skip(),
        }
    }

    /// An array of numbers is a position; arrays of arrays are lines.
    fn coordinates(&mut self, cursor: &mut Cursor<'t>) -> Found<()> {
        let at = cursor.at();
        let mut position = [f64::NAN; 3];
        let mut count = 0;
        cursor.array(|cursor| {
            if cursor.next()? == Next::Array {
                return self.coordinates(cursor);
            }
            let number = scalar(cursor)?.parse().ok().filter(|number: &f64| number.is_finite());
            if let Some(slot) = position.get_mut(count) {
                *slot = number.unwrap_or(f64::NAN);
            }
            count += 1;
            Ok(())
        })?;
        if count > 0 {
            self.positions.push(position);
        }
        within(self.positions.len(), at)
    }

    fn property(&mut self, cursor: &mut Cursor<'t>, key: &str) -> Found<()> {
        let next = cursor.next()?;
        if TIMES.contains(&key) && next == Next::Array {
            // of two arrays of times the later counts
            self.times.clear();
            return self.times(cursor);
        }
        let rank = NAMES.iter().position(|name| *name == key);
        if let (Some(rank), Next::String) = (rank, next) {
            let name = unescaped(cursor.string()?);
            if self.name.as_ref().is_none_or(|(known, _)| rank < *known) {
                self.name = Some((rank, name));
            }
            return Ok(());
        }
        cursor.skip()
    }

    fn times(&mut self, cursor: &mut Cursor<'t>) -> Found<()> {
        let at = cursor.at();
        cursor.array(|cursor| {
            if cursor.next()? == Next::Array {
                return self.times(cursor);
            }
            self.times.push(scalar(cursor)?);
            within(self.times.len(), at)
        })
    }
}

fn within(count: usize, at: usize) -> Found<()> {
    if count > MOST_POINTS { Err((Some(at), TrackProblem::TooManyPoints)) } else { Ok(()) }
}

/// The text of a string, number or word.
fn scalar<'t>(cursor: &mut Cursor<'t>) -> Found<&'t str> {
    match cursor.next()? {
        Next::String => cursor.string(),
        Next::Word => cursor.word(),
        Next::Object | Next::Array => {
            Err((Some(cursor.at()), TrackProblem::Json("a number or a string is expected here")))
        }
    }
}
