//! From a flight to its path: each leg gets its geodesic, and each point its time.

use super::error::{FlightError, LONGEST_H};
use super::geodesic::Line;
use super::height::Heights;
use super::leg::Leg;
use super::pace::paced;
use super::profile::heights;
use crate::intake::{Flight, Pace};
use crate::units::{Angle, Instant, Metres, Place, Vector};

/// The highest ground speed that is taken for a flight.
pub(super) const FASTEST_KT: f64 = 1500.0;
/// One knot in metres a second (ICAO Annex 5, table 3-3).
const KNOT_M_S: f64 = 1852.0 / 3600.0;
/// How far the time by speeds may be from the given one: speeds are given to a few knots.
const SPEED_AGREES: f64 = 0.01;

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
pub(super) struct Fix<'a> {
    label: &'a str,
    pub(super) place: Place,
    at_s: Option<f64>,
}

/// What flying gives: legs without a gap, when each point is passed, and the time in the air.
pub(super) struct Flown {
    pub(super) legs: Vec<Leg>,
    pub(super) passed_s: Vec<f64>,
    pub(super) airborne_s: f64,
}

/// Flies a flight: at its speeds, or at a constant ground speed between points that have times.
///
/// # Errors
/// A flight of no length, a stretch that needs an impossible speed, speeds and a profile that do not fit the path. These
/// need the geodesics, so they are found here and not at intake.
pub fn fly(flight: &Flight) -> Result<Path, FlightError> {
    let flown = if flight.pace == Pace::Times {
        timed(flight)?
    } else {
        paced(flight, &fixes(flight, None), |by_speed_s| fitted(flight, by_speed_s))?
    };
    let Flown { legs, mut passed_s, airborne_s } = flown;
    // the last fix is the landing, and a recording's points are no waypoints
    passed_s.pop();
    if flight.recorded.is_some() {
        passed_s.clear();
    }
    Ok(Path {
        takeoff: flight.takeoff,
        airborne_s,
        heights: heights(flight, &legs, airborne_s)?,
        legs,
        waypoints_s: passed_s,
    })
}

/// Every stretch between two points with times at its own speed.
fn timed(flight: &Flight) -> Result<Flown, FlightError> {
    let landing = flight.landing.ok_or(FlightError::Endless)?;
    let airborne_s = landing.since_s(flight.takeoff);
    let fixes = fixes(flight, Some(airborne_s));
    let mut legs = Vec::with_capacity(fixes.len() - 1);
    let mut passed_s = Vec::with_capacity(fixes.len() - 1);
    let mut begin = 0;
    for end in 1..fixes.len() {
        if fixes[end].at_s.is_some() {
            stretch(&fixes[begin..=end], &mut legs, &mut passed_s)?;
            begin = end;
        }
    }
    if legs.iter().all(|leg| leg.length_m() == 0.0) {
        return Err(no_length(flight));
    }
    Ok(Flown { legs, passed_s, airborne_s })
}

fn no_length(flight: &Flight) -> FlightError {
    FlightError::NoLength { from: flight.from.label.clone(), to: flight.to.label.clone() }
}

/// The time in the air from that by speeds: the given one where both agree.
fn fitted(flight: &Flight, by_speed_s: f64) -> Result<f64, FlightError> {
    if by_speed_s <= 0.0 {
        return Err(no_length(flight));
    }
    if let Some(landing) = flight.landing {
        let given_s = landing.since_s(flight.takeoff);
        let agrees = (by_speed_s / given_s - 1.0).abs() <= SPEED_AGREES;
        let (by_speed_min, by_landing_min) = (by_speed_s / 60.0, given_s / 60.0);
        return agrees.then_some(given_s).ok_or(FlightError::SpeedConflict { by_speed_min, by_landing_min });
    }
    if by_speed_s > LONGEST_H * 3600.0 {
        return Err(FlightError::TooLong { hours: by_speed_s / 3600.0 });
    }
    check_after(flight, flight.takeoff.after_s(by_speed_s))?;
    Ok(by_speed_s)
}

/// What comes after a landing that was not known at intake.
fn check_after(flight: &Flight, landing: Instant) -> Result<(), FlightError> {
    if let Some(on) = flight.on_block.map(|on| on.after(landing)) {
        let minutes = on.since_s(landing) / 60.0;
        if !(0.0..=720.0).contains(&minutes) {
            return Err(FlightError::OnBlock { minutes });
        }
    }
    let on = flight.on_block.map(|on| on.after(landing));
    let used = flight.alternates.iter().map(|alternate| landing.after_s(alternate.after_s));
    let answered = used.chain(on).chain(std::iter::once(landing)).all(Instant::is_answered_for);
    if answered { Ok(()) } else { Err(FlightError::Years) }
}

fn fixes(flight: &Flight, airborne_s: Option<f64>) -> Vec<Fix<'_>> {
    let begin = Fix { label: &flight.from.label, place: flight.from.place, at_s: Some(0.0) };
    let end = Fix { label: &flight.to.label, place: flight.to.place, at_s: airborne_s };
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
