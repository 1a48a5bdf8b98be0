//! From a flight to its path: each leg gets its geodesic, and each point its time.

use super::geodesic::Line;
use super::height::{Climb, Heights};
use super::leg::Leg;
use crate::intake::Flight;
use crate::units::{Angle, Instant, Metres, Place, Vector};

/// The highest ground speed that is taken for a flight.
const FASTEST_KT: f64 = 1500.0;
/// One knot in metres a second (ICAO Annex 5, table 3-3).
const KNOT_M_S: f64 = 1852.0 / 3600.0;

/// Why a flight cannot be flown as it stands.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum FlightError {
    /// It goes nowhere.
    #[error(
        "the flight from {from} to {to} has no length: both are the same place and no waypoint lies between"
    )]
    NoLength {
        /// Where it begins.
        from: String,
        /// Where it ends.
        to: String,
    },
    /// It would need an impossible speed.
    #[error(
        "from {from} to {to} is {distance_nm:.0} NM in {minutes:.1} min, a ground speed of {speed_kt:.0} kt: outside 0 kt to {FASTEST_KT:.0} kt"
    )]
    TooFast {
        /// Where the stretch begins.
        from: String,
        /// Where it ends.
        to: String,
        /// Its length in nautical miles.
        distance_nm: f64,
        /// Its duration in minutes.
        minutes: f64,
        /// The speed in knots.
        speed_kt: f64,
    },
}

/// A flown flight: its legs in order, without a gap.
#[derive(Debug, Clone)]
pub struct Path {
    /// Take-off.
    pub takeoff: Instant,
    /// Seconds from take-off to landing.
    pub airborne_s: f64,
    /// Height above mean sea level over time, where the flight gives a level.
    pub heights: Option<Heights>,
    legs: Vec<Leg>,
    waypoints_s: Vec<f64>,
}

/// Where the aircraft is.
#[derive(Debug, Clone, Copy)]
pub struct Position {
    /// The place beneath it.
    pub place: Place,
    /// The outward unit normal there.
    pub normal: Vector,
    /// Direction of travel from true north through east.
    pub track: Angle,
    /// Height above mean sea level, where known.
    pub height: Option<Metres>,
}

/// A point of the route with the time it must be passed at, if it has one.
struct Fix<'a> {
    label: &'a str,
    place: Place,
    at_s: Option<f64>,
}

/// Flies a flight: constant ground speed between points that have times.
///
/// # Errors
/// A flight of no length, or a stretch that needs an impossible speed. These need the geodesics, so they are found here
/// and not at intake.
pub fn fly(flight: &Flight) -> Result<Path, FlightError> {
    let airborne_s = flight.landing.since_s(flight.takeoff);
    let fixes = fixes(flight, airborne_s);
    let mut legs = Vec::with_capacity(fixes.len() - 1);
    let mut passed_s = Vec::with_capacity(fixes.len() - 1);
    let mut begin = 0;
    for end in 1..fixes.len() {
        if fixes[end].at_s.is_some() {
            stretch(&fixes[begin..=end], &mut legs, &mut passed_s)?;
            begin = end;
        }
    }
    // the last fix is the landing, and a recording's points are no waypoints
    passed_s.pop();
    if flight.recorded.is_some() {
        passed_s.clear();
    }
    if legs.iter().all(|leg| leg.length_m() == 0.0) {
        return Err(FlightError::NoLength { from: flight.from.label.clone(), to: flight.to.label.clone() });
    }
    Ok(Path {
        takeoff: flight.takeoff,
        airborne_s,
        heights: heights(flight, airborne_s),
        legs,
        waypoints_s: passed_s,
    })
}

/// The level from take-off to landing, or up to it and down from it where rates of climb and descent are given.
fn heights(flight: &Flight, airborne_s: f64) -> Option<Heights> {
    if let Some(recorded) = &flight.recorded {
        return recorded.heights.as_deref().map(Heights::through);
    }
    let level = flight.level?;
    let Some(rates) = flight.climb else { return Some(Heights::level(level, airborne_s)) };
    let field = |stop: &crate::intake::Stop| stop.height().map_or(0.0, |height| height.0.min(level.0));
    let climb = Climb {
        from_m: field(&flight.from),
        level_m: level.0,
        to_m: field(&flight.to),
        rates_m_s: (rates.climb.0 / 60.0, rates.descent.0 / 60.0),
    };
    Some(Heights::climbing(climb, airborne_s))
}

fn fixes(flight: &Flight, airborne_s: f64) -> Vec<Fix<'_>> {
    let begin = Fix { label: &flight.from.label, place: flight.from.place, at_s: Some(0.0) };
    let end = Fix { label: &flight.to.label, place: flight.to.place, at_s: Some(airborne_s) };
    let between = flight.waypoints.iter().map(|w| Fix {
        label: &w.label,
        place: w.place,
        at_s: w.time.map(|t| t.since_s(flight.takeoff)),
    });
    std::iter::once(begin).chain(between).chain(std::iter::once(end)).collect()
}

/// The legs between two timed points, all at one speed, and when each point behind the first is passed.
fn stretch(fixes: &[Fix<'_>], legs: &mut Vec<Leg>, passed_s: &mut Vec<f64>) -> Result<(), FlightError> {
    let (first, last) = (&fixes[0], &fixes[fixes.len() - 1]);
    let (begin_s, end_s) = (first.at_s.unwrap_or(0.0), last.at_s.unwrap_or(0.0));
    let lines: Vec<Line> = fixes.windows(2).map(|pair| Line::between(pair[0].place, pair[1].place)).collect();
    let length_m: f64 = lines.iter().map(Line::length_m).sum();
    let speed_m_s = length_m / (end_s - begin_s);
    if length_m > 0.0 && speed_m_s > FASTEST_KT * KNOT_M_S {
        return Err(FlightError::TooFast {
            from: first.label.to_string(),
            to: last.label.to_string(),
            distance_nm: Metres(length_m).nautical_miles(),
            minutes: (end_s - begin_s) / 60.0,
            speed_kt: speed_m_s / KNOT_M_S,
        });
    }
    let count = lines.len();
    let mut flown_m = 0.0;
    let mut from_s = begin_s;
    for (i, (line, pair)) in lines.into_iter().zip(fixes.windows(2)).enumerate() {
        flown_m += line.length_m();
        // the stretch ends exactly at its given time, whatever the sums round to
        let to_s =
            if i + 1 == count { end_s } else { begin_s + time_share(flown_m, length_m) * (end_s - begin_s) };
        passed_s.push(to_s);
        if to_s > from_s {
            legs.push(Leg::new(pair[0].place, pair[1].place, line, (from_s, to_s)));
            from_s = to_s;
        }
    }
    Ok(())
}

/// The share of a stretch's time at which a distance is reached; a stretch that leads nowhere is waited out on its last leg.
fn time_share(flown_m: f64, length_m: f64) -> f64 {
    if length_m > 0.0 { flown_m / length_m } else { 0.0 }
}

impl Path {
    /// The legs, in order.
    pub fn legs(&self) -> &[Leg] {
        &self.legs
    }

    /// When each waypoint of the flight is passed, in the flight's order: seconds from take-off.
    pub fn waypoints_s(&self) -> &[f64] {
        &self.waypoints_s
    }

    /// Distance flown, in metres.
    pub fn distance_m(&self) -> f64 {
        self.legs.iter().map(Leg::length_m).sum()
    }

    /// Landing.
    pub fn landing(&self) -> Instant {
        self.takeoff.after_s(self.airborne_s)
    }

    /// The instant halfway.
    pub fn middle(&self) -> Instant {
        self.takeoff.after_s(self.airborne_s / 2.0)
    }

    /// The leg flown at a time; before take-off the first and after landing the last.
    pub fn leg_at(&self, seconds: f64) -> &Leg {
        let next = self.legs.partition_point(|leg| leg.end_s <= seconds);
        &self.legs[next.min(self.legs.len() - 1)]
    }

    /// The position so many seconds after take-off, which must lie between take-off and landing.
    pub fn at(&self, seconds: f64) -> Position {
        let point = self.leg_at(seconds).at(seconds);
        Position {
            place: Place::from_normal(point.normal),
            normal: point.normal,
            track: point.track,
            height: self.heights.as_ref().map(|heights| heights.at(seconds)),
        }
    }
}

impl Path {
    /// An observer who stays at a place: what a day at an aerodrome is computed from.
    pub fn standing(place: Place, begin: Instant, seconds: f64) -> Self {
        let leg = Leg::new(place, place, Line::between(place, place), (0.0, seconds));
        Self { takeoff: begin, airborne_s: seconds, heights: None, legs: vec![leg], waypoints_s: Vec::new() }
    }
}
