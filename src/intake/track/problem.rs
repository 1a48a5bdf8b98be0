//! What can be wrong with a recorded track, and the cure.

use super::super::draft::LONGEST_H;
use super::super::problem::{escaped, quoted};
use super::gzip::{LARGEST_MIB, STEEPEST_RATIO};
use super::raw::{MOST_FLIGHTS, MOST_POINTS};
use super::xml::DEEPEST;
use crate::units::YEARS;

/// A message of the XML reader, which may quote the file, is given up to this length.
const LONGEST_MESSAGE: usize = 160;

/// What is wrong with a recording or with one flight of it.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
pub enum TrackProblem {
    /// One of several flights.
    #[error("flight {}: {problem}", quoted(name))]
    Flight {
        /// What the recording calls it.
        name: String,
        /// What is wrong with it.
        problem: Box<TrackProblem>,
    },
    /// UTF-16.
    #[error("the file is UTF-16 text")]
    Utf16,
    /// Not UTF-8.
    #[error("the file is not UTF-8 text (byte {0})")]
    NotText(usize),
    /// A zip archive.
    #[error("the file is a zip archive")]
    Archive,
    /// Gzip that ends early.
    #[error("the gzip data end early, after {0} bytes of content")]
    GzipTruncated(usize),
    /// Gzip that is damaged.
    #[error("the gzip data are damaged after {0} bytes of content")]
    GzipDamaged(usize),
    /// Gzip of gzip.
    #[error("the file is gzip within gzip")]
    GzipTwice,
    /// Gzip that swells beyond any track.
    #[error("the gzip data swell to more than {STEEPEST_RATIO} times their size, as no track does")]
    GzipBomb,
    /// Too large.
    #[error("the file holds more than the {LARGEST_MIB} MiB that are read")]
    TooLarge,
    /// Nothing in it.
    #[error("the file is empty")]
    Empty,
    /// Neither content nor ending tell what it is.
    #[error("the file is no track in CSV, GPX, GeoJSON or KML")]
    UnknownKind,
    /// A flight file.
    #[error("the file is a flight file, not a recorded track")]
    IsFlight,
    /// A mapping that cannot be read.
    #[error("{} is no mapping of columns", quoted(.0))]
    Mapping(String),
    /// A mapped column that is not there.
    #[error("there is no column {} among {}", quoted(column), quoted(header))]
    NoSuchColumn {
        /// As mapped.
        column: String,
        /// The header.
        header: String,
    },
    /// A column that must be there.
    #[error("no column of {what} is recognised among {}", quoted(header))]
    NoColumn {
        /// What is missing.
        what: &'static str,
        /// The header.
        header: String,
    },
    /// A row that is longer than any.
    #[error("a row has more than 65536 bytes or 1024 cells; a quote may be left open")]
    LongRow,
    /// Not XML.
    #[error("cannot be read as XML: {}", escaped(.0, LONGEST_MESSAGE))]
    Xml(String),
    /// A document type, which could define entities.
    #[error("a document type definition is refused, since entities could be defined in it")]
    Doctype,
    /// An entity that XML itself does not define.
    #[error("the entity {} is not one of XML's own five", quoted(.0))]
    Entity(String),
    /// Nested too deep.
    #[error("nested more than {DEEPEST} deep")]
    TooDeep,
    /// Not JSON.
    #[error("cannot be read as JSON: {0}")]
    Json(&'static str),
    /// Times and positions that do not pair.
    #[error("{times} times stand for {positions} positions")]
    TimesCount {
        /// How many times.
        times: usize,
        /// How many positions.
        positions: usize,
    },
    /// No track in it.
    #[error("there is no track in it")]
    Nothing,
    /// Positions without times.
    #[error("its positions have no times")]
    NoTimes,
    /// No time that can be read.
    #[error("no point has a date and time that can be read; the first is {}", quoted(.0))]
    NoInstant(String),
    /// Times of day without a day.
    #[error("{} is a time of day, and no date is given", quoted(.0))]
    NoDate(String),
    /// Every time is outside the years served.
    #[error("{} is outside the years {first} to {last}", quoted(.0), first = YEARS.start(), last = YEARS.end())]
    Years(String),
    /// No position that can be read.
    #[error("no point has a latitude within ±90° and a longitude within −180° to 360°")]
    NoPlaces,
    /// Latitude and longitude exchanged.
    #[error(
        "latitude {0}° is outside −90° to 90°, while all longitudes beside such are within: they seem swapped"
    )]
    Swapped(String),
    /// Too many points.
    #[error("more than the {MOST_POINTS} points that one file may have")]
    TooManyPoints,
    /// Too many flights.
    #[error("more than the {MOST_FLIGHTS} flights that one file may have")]
    TooManyFlights,
    /// A single point.
    #[error("the track has one usable point only")]
    OnePoint,
    /// No point can be reached from another.
    #[error("no two points are within {0} kt of each other")]
    AllJumps(String),
    /// No time passes.
    #[error("all {0} points are at one instant")]
    OneInstant(usize),
    /// Longer than any flight.
    #[error("{hours} h from the first point to the last is outside 0 h to {LONGEST_H} h")]
    TooLong {
        /// The hours to one decimal.
        hours: String,
    },
}

impl TrackProblem {
    /// The problem of a flight that has a name.
    pub(super) fn of_flight(self, name: Option<String>) -> Self {
        match name {
            Some(name) => Self::Flight { name, problem: Box::new(self) },
            None => self,
        }
    }

    /// How to mend it, where that is known.
    pub(in super::super) fn hint(&self) -> Option<String> {
        let text = match self {
            Self::Flight { problem, .. } => return problem.hint(),
            Self::Utf16 | Self::NotText(_) => "save it as UTF-8",
            Self::Archive => "unpack it and give the file within",
            Self::GzipTruncated(_) | Self::GzipDamaged(_) => "fetch or copy it again",
            Self::GzipTwice => "decompress it once",
            Self::TooLarge | Self::TooManyPoints | Self::TooManyFlights => "cut it into several files",
            Self::UnknownKind | Self::Empty => {
                "a track is CSV with columns of time, latitude and longitude, GPX, GeoJSON or KML"
            }
            Self::NoColumn { .. } | Self::NoSuchColumn { .. } | Self::Mapping(_) => {
                "name the columns: time=NAME,lat=NAME,lon=NAME and, if there, height=NAME:ft or :m, flight=NAME"
            }
            Self::Doctype => "remove the <!DOCTYPE …>; tracks need none",
            Self::NoTimes => {
                "times stand in <time> of a GPX point, <when> of a KML gx:Track, 'times' or 'coordTimes' of a GeoJSON feature"
            }
            Self::NoInstant(_) => "write 2026-12-18T05:10:00Z, or seconds or milliseconds since 1970",
            Self::NoDate(_) => "give the date (UTC) of the first point",
            Self::Swapped(_) => "ask for latitude and longitude to be swapped, or correct the columns",
            Self::AllJumps(_) => "allow a higher speed, if it is right",
            Self::TooLong { .. } => "split the flights by a column, flight=NAME, or cut the file",
            _ => return None,
        };
        Some(text.to_string())
    }
}
