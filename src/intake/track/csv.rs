//! Tracks in CSV: comma, semicolon or tab, decimal points or commas, one flight or several by a column.

use super::columns::{PlaceColumns, Roles, is_numbered, roles};
use super::options::HeightUnit;
use super::raw::{Gathering, MOST_FLIGHTS, RawTrack, Reading};
use super::repair::UnitReason;
use super::sheet::{Sheet, number};
use super::{Found, TrackOptions};
use crate::units::Metres;
use std::collections::{HashMap, HashSet};

/// No aircraft of this use flies above, so that heights beyond it, read as metres, are feet.
const HIGHEST_M: f64 = Metres::from_feet(60_000.0).0;

pub(super) fn read(text: &str, options: &TrackOptions) -> Found<Vec<RawTrack>> {
    let mut sheet = Sheet::new(text);
    if !sheet.advance()? {
        return Ok(Vec::new());
    }
    let header = sheet.row();
    let mut roles = roles(&header, &options.columns).map_err(|(_, problem)| (Some(sheet.at()), problem))?;
    let unit_header =
        roles.height.filter(|(_, unit)| unit.is_none()).map(|(column, _)| header[column].clone());
    // where each row would be a flight of its own the column numbers rows
    if options.columns.flight.is_none() && roles.flight.is_some_and(|flight| numbers_rows(text, flight)) {
        roles.flight = None;
    }
    let mut rows = Rows { roles, split: Split::default(), gathering: Gathering::new(options) };
    let first_is_data = is_numbered(&options.columns) && number(sheet.cell(lat_column(&roles))).is_some();
    if first_is_data {
        rows.take(&sheet)?;
    }
    while sheet.advance()? {
        rows.take(&sheet)?;
    }
    let mut tracks = rows.gathering.done();
    if let Some(name) = unit_header {
        guess_unit(&mut tracks, &name);
    }
    Ok(tracks)
}

fn lat_column(roles: &Roles) -> usize {
    match roles.place {
        PlaceColumns::Two(lat, _) | PlaceColumns::One(lat) => lat,
    }
}

/// Whether all rows differ in that column, as they do in no recording of several points a flight.
fn numbers_rows(text: &str, column: usize) -> bool {
    let mut sheet = Sheet::new(text);
    let mut seen = HashSet::new();
    while seen.len() <= MOST_FLIGHTS && sheet.advance() == Ok(true) {
        if !seen.insert(sheet.cell(column).to_string()) {
            return false;
        }
    }
    // the header is one of them
    seen.len() > 2
}

/// Which flight a row belongs to.
#[derive(Default)]
struct Split {
    by_name: HashMap<String, usize>,
    current: Option<(String, usize)>,
}

impl Split {
    /// The number of the flight of that name; a row without a name belongs to the flight of the row before, and rows
    /// without one at the very beginning to the first that has one.
    fn flight(&mut self, name: &str, at: usize, gathering: &mut Gathering<'_>) -> Found<usize> {
        if let Some((current, number)) = &self.current
            && (name.is_empty() || name == current)
        {
            return Ok(*number);
        }
        let unnamed = self.current.take().filter(|(current, _)| current.is_empty()).map(|(_, number)| number);
        let known = self.by_name.get(name).copied();
        let number = match unnamed.or(known) {
            Some(number) => number,
            None => gathering.begin(Some(name.to_string()), at)?,
        };
        if let (Some(_), Some(track)) = (unnamed, gathering.track(number)) {
            track.name = Some(name.to_string());
        }
        self.by_name.insert(name.to_string(), number);
        self.current = Some((name.to_string(), number));
        Ok(number)
    }
}

struct Rows<'o> {
    roles: Roles,
    split: Split,
    gathering: Gathering<'o>,
}

impl Rows<'_> {
    fn take(&mut self, sheet: &Sheet<'_>) -> Found<()> {
        // a line of blanks
        if sheet.width() <= 1 && sheet.cell(0).is_empty() {
            return Ok(());
        }
        let at = sheet.at();
        let name = self.roles.flight.map_or("", |column| sheet.cell(column));
        let flight = self.split.flight(name, at, &mut self.gathering)?;
        let (lat, lon) = self.place(sheet);
        let reading = Reading {
            at,
            time: sheet.cell(self.roles.time),
            date: self.roles.date.map(|column| sheet.cell(column)),
            lat,
            lon,
            height_m: self.height(sheet),
        };
        self.gathering.push(flight, &reading)
    }

    fn place(&self, sheet: &Sheet<'_>) -> (f64, f64) {
        let value = |text: &str| number(text).unwrap_or(f64::NAN);
        match self.roles.place {
            PlaceColumns::Two(lat, lon) => (value(sheet.cell(lat)), value(sheet.cell(lon))),
            PlaceColumns::One(both) => {
                let pair = sheet.cell(both).split_once([',', ' ', ';']);
                pair.map_or((f64::NAN, f64::NAN), |(lat, lon)| (value(lat.trim()), value(lon.trim())))
            }
        }
    }

    fn height(&self, sheet: &Sheet<'_>) -> f64 {
        let read = self.roles.height.and_then(|(column, unit)| Some((number(sheet.cell(column))?, unit)));
        read.map_or(f64::NAN, |(height, unit)| height * unit.unwrap_or(HeightUnit::Metre).metres())
    }
}

/// Heights without a unit are metres, unless so many would be higher than aircraft fly that they can only be feet, or
/// they come in the steps in which transponders count feet. The column has one unit for all flights.
fn guess_unit(tracks: &mut [RawTrack], header: &str) {
    let heights = || tracks.iter().flat_map(|track| &track.points).map(|point| point.height_m);
    let known = || heights().filter(|height| height.is_finite());
    let beyond = known().filter(|height| *height > HIGHEST_M).count();
    // a few may be faults
    let why = if beyond * 10 > known().count() {
        UnitReason::TooHigh
    } else if is_stepped(known()) {
        UnitReason::Stepped
    } else {
        UnitReason::Default
    };
    let unit = if why == UnitReason::Default { HeightUnit::Metre } else { HeightUnit::Foot };
    for track in tracks {
        let is_known = track.points.iter().any(|point| point.height_m.is_finite());
        track.points.iter_mut().for_each(|point| point.height_m *= unit.metres());
        track.unit_guessed = is_known.then(|| (header.to_string(), why));
    }
}

/// Whether heights come in steps of 25 and in many different ones, as metres never do.
///
/// # Source
/// ICAO Annex 10, volume IV, 3.1.2.6.5.4: pressure altitude is reported in steps of 25 ft or of 100 ft.
fn is_stepped(heights: impl Iterator<Item = f64>) -> bool {
    const STEP_FT: f64 = 25.0;
    const MANY: usize = 20;
    let (mut all, mut on_step, mut different) = (0usize, 0usize, HashSet::new());
    for height in heights.filter(|height| *height != 0.0) {
        all += 1;
        if height % STEP_FT == 0.0 {
            on_step += 1;
            different.insert(height.to_bits());
        }
    }
    // one in twenty may be a fault or filled in by the recorder
    different.len() >= MANY && on_step * 20 >= all * 19
}
