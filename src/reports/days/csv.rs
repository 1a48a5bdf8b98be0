//! A place's days as CSV: one row a date, RFC 4180 with a header.
//!
//! Of an event that happens more than once the first time is given, and how often it happens; a cell is empty where it
//! does not happen. Times are UTC and on the place's clock, ISO 8601 with the offset.

use super::super::csv::{fixed, no_formula};
use super::words::{machine_local, moon_key, phase_key, polar_key};
use crate::day::{DayHere, PlaceDays};
use crate::label::clock::machine;
use crate::label::one_line;
use crate::label::words::{event_key, state_key};
use crate::light::{Direction, Limit, Sample, State};

const CAUTION: &str = "computed light for a clear sea-level horizon; the authority's published tables decide";

/// A row's cells under their names, in order.
type Cells = Vec<(String, String)>;

/// The days of a place, a row each.
///
/// # Errors
/// None that days can cause: the text is built in memory.
pub fn days_csv(here: &PlaceDays) -> Result<String, csv::Error> {
    let mut writer = csv::Writer::from_writer(Vec::new());
    for (i, day) in here.days.iter().enumerate() {
        let cells = cells(here, day);
        if i == 0 {
            writer.write_record(cells.iter().map(|(name, _)| name))?;
        }
        writer.write_record(cells.iter().map(|(_, cell)| cell))?;
    }
    let bytes = writer.into_inner().map_err(csv::IntoInnerError::into_error)?;
    Ok(String::from_utf8_lossy(&bytes).into_owned())
}

fn cells(here: &PlaceDays, day: &DayHere) -> Cells {
    let mut cells: Cells = Vec::with_capacity(64);
    let mut plain = |name: &str, cell: String| cells.push((name.to_string(), cell));
    plain("place", no_formula(&one_line(&here.stop.label)));
    plain("date", day.civil.date.to_string());
    plain("begins_utc", machine(day.civil.begin));
    plain("seconds", fixed(day.civil.seconds, 0));
    for limit in Limit::ALL {
        for direction in [Direction::Rising, Direction::Setting] {
            timed(&mut cells, event_key(limit.event(direction)), (here, day), day.times(limit, direction));
        }
    }
    timed(&mut cells, "transit", (here, day), day.transits.iter().map(|sun| sun.at_s));
    for direction in [Direction::Rising, Direction::Setting] {
        let events = day.moon.events.iter().filter(move |event| event.direction == direction);
        timed(&mut cells, moon_key(direction), (here, day), events.map(|event| event.at_s));
    }
    let mut plain = |name: &str, cell: String| cells.push((name.to_string(), cell));
    for state in State::ALL {
        plain(&format!("{}_s", state_key(state)), fixed(day.light.seconds.in_state(state), 1));
    }
    for (name, sun) in [("highest", &day.highest), ("lowest", &day.lowest)] {
        let Sample { at_s, elevation, .. } = sun;
        plain(&format!("{name}_utc"), machine(day.civil.begin.after_s(*at_s)));
        plain(&format!("{name}_elevation_deg"), fixed(elevation.0.deg(), 5));
    }
    let edge = |edge: Option<chrono::NaiveDate>| edge.map_or(String::new(), |date| date.to_string());
    plain("polar", day.polar.map_or(String::new(), |run| polar_key(run.kind).to_string()));
    plain("polar_first", edge(day.polar.and_then(|run| run.first)));
    plain("polar_last", edge(day.polar.and_then(|run| run.last)));
    plain("moon_up_at_begin", day.moon.is_up_at_begin.to_string());
    plain("moon_illuminated", fixed(day.moon.phase.illuminated, 4));
    plain("moon_phase", phase_key(&day.moon).to_string());
    plain("caution", CAUTION.to_string());
    cells
}

/// The first of an event's times in UTC and on the clock, and how many there are.
fn timed(
    cells: &mut Cells,
    event: &str,
    (here, day): (&PlaceDays, &DayHere),
    times: impl Iterator<Item = f64>,
) {
    let times: Vec<_> = times.map(|at_s| day.civil.begin.after_s(at_s)).collect();
    let first = times.first().copied();
    cells.push((format!("{event}_utc"), first.map_or(String::new(), machine)));
    cells.push((format!("{event}_local"), first.map_or(String::new(), |at| machine_local(here.clock, at))));
    cells.push((format!("{event}_count"), times.len().to_string()));
}
