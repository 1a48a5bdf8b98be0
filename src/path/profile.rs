//! The heights of a flight: its profile laid along the path, or a level with rates, or a level alone.
//!
//! Does not know what is seen from there.

use super::error::FlightError;
use super::height::{Climb, Heights};
use super::leg::Leg;
use crate::intake::{Flight, Mark, ProfilePoint, Stop};
use crate::units::Metres;

/// What the sums of many legs may err by.
const SUM_M: f64 = 1.0;

/// The heights flown, where the flight gives any.
pub(super) fn heights(
    flight: &Flight,
    legs: &[Leg],
    airborne_s: f64,
) -> Result<Option<Heights>, FlightError> {
    if let Some(recorded) = &flight.recorded {
        let points =
            recorded.heights.iter().flatten().map(|&(at_s, height)| (at_s, height.0)).collect::<Vec<_>>();
        return Ok((!points.is_empty()).then(|| Heights::through(points)));
    }
    if !flight.profile.is_empty() {
        return along(flight, legs, airborne_s).map(Some);
    }
    let Some(level) = flight.level else { return Ok(None) };
    let Some(rates) = flight.climb else { return Ok(Some(Heights::level(level, airborne_s))) };
    let climb = Climb {
        from_m: field_m(&flight.from).min(level.0),
        level_m: level.0,
        to_m: field_m(&flight.to).min(level.0),
        rates_m_s: (rates.climb.0 / 60.0, rates.descent.0 / 60.0),
    };
    Ok(Some(Heights::climbing(climb, airborne_s)))
}

/// A field's height, sea level where it is not known.
fn field_m(stop: &Stop) -> f64 {
    stop.height().map_or(0.0, |height| height.0)
}

/// From the field through the profile's points to the field, straight between one and the next.
fn along(flight: &Flight, legs: &[Leg], airborne_s: f64) -> Result<Heights, FlightError> {
    let mut points: Vec<(f64, f64)> = Vec::with_capacity(flight.profile.len() + 2);
    for (i, point) in flight.profile.iter().enumerate() {
        let number = i + 1;
        let at_s = time_s(point, legs).filter(|&at_s| at_s <= airborne_s);
        let at_s = at_s.ok_or(FlightError::ProfileTooLong { number })?;
        if points.last().is_some_and(|last| at_s <= last.0) {
            return Err(FlightError::ProfileOrder { number });
        }
        if i == 0 && at_s > 0.0 {
            points.push((0.0, field_m(&flight.from)));
        }
        points.push((at_s, point.level.0));
    }
    if points.last().is_none_or(|last| last.0 < airborne_s) {
        points.push((airborne_s, field_m(&flight.to)));
    }
    Ok(Heights::through(points))
}

/// When a point of the profile is reached; nothing beyond the landing.
fn time_s(point: &ProfilePoint, legs: &[Leg]) -> Option<f64> {
    let Metres(mut left_m) = match point.at {
        Mark::Time(at_s) => return Some(at_s),
        Mark::Distance(distance) => distance,
    };
    for leg in legs {
        if left_m <= leg.length_m() {
            return Some(leg.time_s(left_m));
        }
        left_m -= leg.length_m();
    }
    (left_m < SUM_M).then(|| legs.last().map(|leg| leg.end_s))?
}
