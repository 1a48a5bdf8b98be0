//! Recorded tracks, from bytes to clean points: CSV, GPX, GeoJSON and KML, each plain or in gzip.
//!
//! Knows no geodesic and opens no file. Speeds are measured along a sphere, which is good enough to tell a jump.

mod problem;
mod options;
mod gzip;
mod text;
mod kind;
mod stamp;
mod clock;
mod raw;
mod columns;
mod sheet;
mod csv;
mod xml;
mod gpx;
mod kml;
mod json;
mod geojson;
mod repair;
mod jump;
mod clean;
mod flight;

pub use gzip::plain;
pub use kind::{InputKind, kind_of};
pub use options::{Columns, TrackOptions};
pub use problem::TrackProblem;
pub use repair::{Bridge, Repair, Repairs, UnitReason};

use super::draft::Origin;
use super::file::line_and_column;
use super::problem::IntakeError;
use crate::units::{Instant, Metres, Place};
use raw::RawTrack;

/// What went wrong in a text, and the byte it stands on; the whole text where no byte is to blame.
type Found<T> = Result<T, (Option<usize>, TrackProblem)>;

/// How many refused flights are shown to the column of their fault, for which the text is read from its beginning; the
/// others are shown to the line at which they begin.
const MOST_LOCATED: usize = 100;

/// A point of a recorded track.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct TrackPoint {
    /// When it was passed.
    pub instant: Instant,
    /// Where it is.
    pub place: Place,
    /// How high; of one track either all points have a height or none.
    pub height: Option<Metres>,
}

/// One recorded flight: two points or more, with instants that rise strictly.
#[derive(Debug, Clone, PartialEq)]
pub struct Track {
    /// What the recording calls it.
    pub name: Option<String>,
    /// Where in the recording it begins.
    pub origin: Origin,
    /// Its points in order of time.
    pub points: Vec<TrackPoint>,
    /// What was mended.
    pub repairs: Repairs,
}

/// The flights of one recording.
#[derive(Debug, Clone, PartialEq)]
pub struct Tracks {
    /// Those that can be used, one at least, in the order in which they begin in the recording.
    pub tracks: Vec<Track>,
    /// Why each of the others cannot.
    pub refused: Vec<IntakeError>,
}

/// Reads the flights of a recording, whose kind is told by its content and then by its name's ending.
///
/// # Errors
/// A recording that cannot be read, or of which no flight can be used: then the error of the first.
pub fn tracks(bytes: &[u8], source_name: &str, options: &TrackOptions) -> Result<Tracks, IntakeError> {
    let kind = kind_of(bytes, source_name);
    let plain = plain(bytes, source_name)?;
    let fail = |origin, problem: TrackProblem| IntakeError {
        source_name: source_name.to_string(),
        origin,
        problem: problem.into(),
    };
    let text = text::text(&plain).map_err(|problem| fail(Origin::Whole, problem))?;
    let placed = |(at, problem): (Option<usize>, TrackProblem)| {
        fail(at.map_or(Origin::Whole, |byte| line_and_column(text, byte)), problem)
    };
    let raw = read(text, kind, options).map_err(placed)?;
    let several = raw.len() > 1;
    let mut lines = Lines { text, byte: 0, line: 1 };
    let mut read = Tracks { tracks: Vec::new(), refused: Vec::new() };
    for one in raw {
        let origin = Origin::At(lines.line_of(one.at), 1);
        let name = one.name.clone().filter(|_| several);
        match clean::clean(one, options) {
            Ok((name, points, repairs)) => read.tracks.push(Track { name, origin, points, repairs }),
            Err((at, problem)) if read.refused.len() < MOST_LOCATED => {
                read.refused.push(placed((at, problem.of_flight(name))));
            }
            Err((_, problem)) => read.refused.push(fail(origin, problem.of_flight(name))),
        }
    }
    if read.tracks.is_empty() {
        let none = || fail(Origin::Whole, TrackProblem::Nothing);
        return Err(if read.refused.is_empty() { none() } else { read.refused.swap_remove(0) });
    }
    Ok(read)
}

fn read(text: &str, kind: Option<InputKind>, options: &TrackOptions) -> Found<Vec<RawTrack>> {
    match kind {
        Some(InputKind::Csv) => csv::read(text, options),
        Some(InputKind::Gpx) => gpx::read(text, options),
        Some(InputKind::GeoJson) => geojson::read(text, options),
        Some(InputKind::Kml) => kml::read(text, options),
        Some(InputKind::Flight) => Err((None, TrackProblem::IsFlight)),
        None => Err((None, TrackProblem::UnknownKind)),
    }
}

/// Counts lines forward only, so that many flights cost one pass.
struct Lines<'t> {
    text: &'t str,
    byte: usize,
    line: usize,
}

impl Lines<'_> {
    fn line_of(&mut self, byte: usize) -> usize {
        if let Some(passed) = self.text.get(self.byte..byte) {
            self.line += passed.matches('\n').count();
            self.byte = byte;
        }
        self.line
    }
}
