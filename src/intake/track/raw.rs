//! Points as recorded, gathered by flight: what can be read of them, and a count of what cannot.
//!
//! Does not know in what format they came, nor whether they make sense together.

use super::clock::{Clock, NoTime};
use super::repair::UnitReason;
use super::{Found, TrackOptions, TrackProblem};
use crate::units::{Instant, Place};

/// The most points of one file: 32 flights of 16 hours at one a second.
pub(super) const MOST_POINTS: usize = 2_000_000;
/// The most flights of one file.
pub(super) const MOST_FLIGHTS: usize = 20_000;

/// A point that has a time and a place.
#[derive(Debug, Clone, Copy)]
pub(super) struct RawPoint {
    pub(super) instant: Instant,
    pub(super) place: Place,
    /// Not a number where it is not known.
    pub(super) height_m: f64,
}

/// A point as it stands in the file; numbers that could not be read are not numbers.
#[derive(Debug, Clone, Copy)]
pub(super) struct Reading<'t> {
    /// The byte at which it stands.
    pub(super) at: usize,
    pub(super) time: &'t str,
    /// A date beside a time of day.
    pub(super) date: Option<&'t str>,
    pub(super) lat: f64,
    pub(super) lon: f64,
    pub(super) height_m: f64,
}

/// How many points could not be used, and the first of each kind.
#[derive(Debug, Clone, Default)]
pub(super) struct Tally {
    pub(super) untimed: usize,
    pub(super) out_of_years: usize,
    pub(super) unplaced: usize,
    pub(super) at_zero: usize,
    /// Latitudes beyond a pole whose longitudes would be latitudes.
    pub(super) swapped: usize,
    pub(super) first_untimed: Option<(usize, TrackProblem)>,
    pub(super) first_swapped: Option<(usize, f64)>,
}

/// One flight as recorded.
#[derive(Debug, Clone)]
pub(super) struct RawTrack {
    pub(super) name: Option<String>,
    /// The byte at which it begins.
    pub(super) at: usize,
    pub(super) points: Vec<RawPoint>,
    pub(super) tally: Tally,
    pub(super) clock: Clock,
    /// The header of a column of heights without a unit, and how one was found.
    pub(super) unit_guessed: Option<(String, UnitReason)>,
}

/// All flights of a file as they are read.
#[derive(Debug)]
pub(super) struct Gathering<'o> {
    options: &'o TrackOptions,
    tracks: Vec<RawTrack>,
    total: usize,
}

impl<'o> Gathering<'o> {
    pub(super) fn new(options: &'o TrackOptions) -> Self {
        Self { options, tracks: Vec::new(), total: 0 }
    }

    /// Begins a flight and gives back its number.
    pub(super) fn begin(&mut self, name: Option<String>, at: usize) -> Found<usize> {
        if self.tracks.len() >= MOST_FLIGHTS {
            return Err((Some(at), TrackProblem::TooManyFlights));
        }
        let clock = Clock::new(self.options.date);
        let name = name.map(|name| name.trim().to_string()).filter(|name| !name.is_empty());
        self.tracks.push(RawTrack {
            name,
            at,
            points: Vec::new(),
            tally: Tally::default(),
            clock,
            unit_guessed: None,
        });
        Ok(self.tracks.len() - 1)
    }

    /// The flight of that number.
    pub(super) fn track(&mut self, number: usize) -> Option<&mut RawTrack> {
        self.tracks.get_mut(number)
    }

    /// Adds a point to the flight of that number.
    pub(super) fn push(&mut self, number: usize, reading: &Reading<'_>) -> Found<()> {
        let Some(track) = self.tracks.get_mut(number) else { return Ok(()) };
        self.total += 1;
        if self.total > MOST_POINTS {
            return Err((Some(reading.at), TrackProblem::TooManyPoints));
        }
        let mut reading = *reading;
        if self.options.swap_lat_lon {
            std::mem::swap(&mut reading.lat, &mut reading.lon);
        }
        track.push(&reading);
        Ok(())
    }

    /// The flights in which any point stood.
    pub(super) fn done(self) -> Vec<RawTrack> {
        self.tracks.into_iter().filter(|track| track.points.len() + track.tally.lost() > 0).collect()
    }
}

impl Tally {
    /// How many points were lost.
    pub(super) fn lost(&self) -> usize {
        self.untimed + self.out_of_years + self.unplaced + self.at_zero
    }
}

impl RawTrack {
    fn push(&mut self, reading: &Reading<'_>) {
        let read = match reading.date {
            Some(date) => self.clock.read_on(date, reading.time),
            None => self.clock.read(reading.time),
        };
        // the clock has seen the stamp even if the place is of no use, for it follows midnights
        match (read, self.place(reading)) {
            (Ok(instant), Some(place)) => {
                self.points.push(RawPoint { instant, place, height_m: reading.height_m });
            }
            (Err(why), Some(_)) => self.untimed(reading, why),
            (_, None) => {}
        }
    }

    fn place(&mut self, reading: &Reading<'_>) -> Option<Place> {
        if reading.lat == 0.0 && reading.lon == 0.0 {
            self.tally.at_zero += 1;
            return None;
        }
        let place = Place::from_deg(reading.lat, reading.lon).ok();
        if place.is_none() {
            self.tally.unplaced += 1;
            self.suspect_swap(reading);
        }
        place
    }

    fn suspect_swap(&mut self, reading: &Reading<'_>) {
        if reading.lat.abs() > 90.0 && reading.lat.abs() <= 180.0 && reading.lon.abs() <= 90.0 {
            self.tally.swapped += 1;
            self.tally.first_swapped.get_or_insert((reading.at, reading.lat));
        }
    }

    fn untimed(&mut self, reading: &Reading<'_>, why: NoTime) {
        let given = || reading.time.trim().chars().take(64).collect::<String>();
        match why {
            NoTime::Years => self.tally.out_of_years += 1,
            NoTime::Unreadable | NoTime::NoDate => self.tally.untimed += 1,
        }
        self.tally.first_untimed.get_or_insert_with(|| {
            let problem = match why {
                NoTime::Years => TrackProblem::Years(given()),
                NoTime::NoDate => TrackProblem::NoDate(given()),
                NoTime::Unreadable if given().is_empty() => TrackProblem::NoTimes,
                NoTime::Unreadable => TrackProblem::NoInstant(given()),
            };
            (reading.at, problem)
        });
    }
}
