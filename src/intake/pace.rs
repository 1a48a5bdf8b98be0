//! How fast and how high a flight is flown, as its planner gives it: speeds, winds, a profile of points.
//!
//! Does not know where a distance is reached: that needs the geodesics, so `path` lays the profile along them.

use super::draft::Given;
use super::file::{Found, Value, number, only, string, table, wrong};
use super::flight::RoutePoint;
use super::problem::{Problem, Stands};
use super::time::duration_s;
use crate::units::Metres;
use std::ops::{Range, RangeInclusive};

/// What a point of the profile may hold.
pub(super) const PROFILE_FIELDS: [&str; 4] = ["at", "nm", "level_ft", "ground_speed_kt"];
/// The most points of a profile.
const MOST_POINTS: usize = 1000;
/// One knot in metres a second (ICAO Annex 5, table 3-3).
const KNOT_M_S: f64 = 1852.0 / 3600.0;
/// The speeds that aircraft fly at.
const SPEEDS_KT: RangeInclusive<f64> = 10.0..=1500.0;
/// The winds that aircraft meet, along their track.
const WINDS_KT: RangeInclusive<f64> = -400.0..=400.0;
/// Distances along a route: up to twice around the Earth.
const DISTANCES_NM: RangeInclusive<f64> = 0.0..=43_200.0;
/// The levels that aircraft fly at.
const LEVELS_FT: RangeInclusive<f64> = 0.0..=60_000.0;

/// What tells how fast a flight is flown. Speeds are metres a second.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Pace {
    /// The times of take-off, waypoints and landing.
    Times,
    /// A ground speed, from take-off until the profile gives another.
    Ground {
        /// The first ground speed.
        speed_m_s: f64,
    },
    /// A true airspeed and the wind along the track.
    Air {
        /// The airspeed.
        speed_m_s: f64,
        /// The tailwind, on legs whose end gives none; a headwind is below zero.
        wind_m_s: f64,
    },
}

/// A point of the profile: a height to be at, and the ground speed from there on.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct ProfilePoint {
    /// When or where.
    pub at: Mark,
    /// Height above mean sea level.
    pub level: Metres,
    /// Ground speed from there on in metres a second, where it changes.
    pub ground_speed_m_s: Option<f64>,
}

/// Where along the flight something stands.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Mark {
    /// Seconds after take-off.
    Time(f64),
    /// Distance flown.
    Distance(Metres),
}

/// What was given, not yet held against each other.
#[derive(Debug, Clone, Default)]
pub(super) struct GivenPace {
    pub(super) ground_speed_kt: Option<Given<f64>>,
    pub(super) true_airspeed_kt: Option<Given<f64>>,
    pub(super) wind_kt: Option<Given<f64>>,
    pub(super) profile: Vec<Given<ProfilePoint>>,
}

/// A number within its range, in the unit of `scale`.
fn scaled(given: f64, field: &'static str, range: &RangeInclusive<f64>, scale: f64) -> Result<f64, Problem> {
    let (low, high) = (*range.start(), *range.end());
    if range.contains(&given) {
        Ok(given * scale)
    } else {
        Err(Problem::OutOfRange { field, given, low, high })
    }
}

/// The wind that a waypoint gives, in metres a second.
pub(super) fn wind(value: &Value<'_>) -> Found<f64> {
    let given = number("wind_kt", value)?;
    scaled(given, "wind_kt", &WINDS_KT, KNOT_M_S).map_err(|problem| (value.span(), problem))
}

/// The profile's points, each with the bytes it stands on.
pub(super) fn profile(value: &Value<'_>) -> Found<Vec<(ProfilePoint, Range<usize>)>> {
    let Some(list) = value.get_ref().as_array() else {
        return Err(wrong("profile", value.get_ref(), "written as [[profile]]", value.span()));
    };
    if list.len() > MOST_POINTS {
        return Err((value.span(), Problem::LongProfile { count: list.len(), most: MOST_POINTS }));
    }
    list.iter().map(|value| Ok((point(value)?, value.span()))).collect()
}

fn point(value: &Value<'_>) -> Found<ProfilePoint> {
    let table = table("profile", value)?;
    only(table, &PROFILE_FIELDS)?;
    let within = |field, range: &RangeInclusive<f64>, scale| {
        let one = |value: &Value<'_>| {
            let given = number(field, value)?;
            scaled(given, field, range, scale).map_err(|problem| (value.span(), problem))
        };
        table.get(field).map(one).transpose()
    };
    let miles = within("nm", &DISTANCES_NM, 1.0)?.map(|nm| Mark::Distance(Metres::from_nautical_miles(nm)));
    let after = |value: &Value<'_>| {
        duration_s(string("at", value)?).map(Mark::Time).map_err(|problem| (value.span(), problem))
    };
    let at = match (table.get("at").map(after).transpose()?, miles) {
        (Some(_), Some(_)) => return Err((value.span(), Problem::Exclusive { one: "at", other: "nm" })),
        (None, None) => return Err((value.span(), Problem::MissingField("at"))),
        (Some(at), None) | (None, Some(at)) => at,
    };
    let level = within("level_ft", &LEVELS_FT, 1.0)?;
    Ok(ProfilePoint {
        at,
        level: level.map(Metres::from_feet).ok_or((value.span(), Problem::MissingField("level_ft")))?,
        ground_speed_m_s: within("ground_speed_kt", &SPEEDS_KT, KNOT_M_S)?,
    })
}

impl GivenPace {
    /// Holds speeds, winds, times and the profile against each other.
    pub(super) fn checked(&self, waypoints: &[Given<RoutePoint>]) -> Stands<Pace> {
        self.check_order()?;
        let pace = self.pace()?;
        check_winds(pace, waypoints)?;
        let timed = waypoints.iter().enumerate().find(|(_, point)| point.value.time.is_some());
        match (pace, timed) {
            (Pace::Ground { .. } | Pace::Air { .. }, Some((i, point))) => {
                let (number, label) = (i + 1, point.value.label.clone());
                Err((point.origin.clone(), Problem::TimeAndSpeed { number, label }))
            }
            _ => Ok(pace),
        }
    }

    fn pace(&self) -> Stands<Pace> {
        let speed = |given: &Given<f64>, field, range| {
            scaled(given.value, field, range, KNOT_M_S).map_err(|problem| (given.origin.clone(), problem))
        };
        let changes = self.profile.iter().position(|point| point.value.ground_speed_m_s.is_some());
        match (&self.true_airspeed_kt, &self.ground_speed_kt, changes) {
            (Some(air), None, None) => {
                let wind =
                    self.wind_kt.as_ref().map(|given| speed(given, "wind_kt", &WINDS_KT)).transpose()?;
                let speed_m_s = speed(air, "true_airspeed_kt", &SPEEDS_KT)?;
                Ok(Pace::Air { speed_m_s, wind_m_s: wind.unwrap_or(0.0) })
            }
            (Some(air), ..) => {
                let both = Problem::Exclusive { one: "true_airspeed_kt", other: "ground_speed_kt" };
                Err((air.origin.clone(), both))
            }
            (None, ..) if self.wind_kt.is_some() => {
                let origin = self.wind_kt.as_ref().map(|given| given.origin.clone());
                Err((origin.unwrap_or(super::Origin::Whole), Problem::WindAlone))
            }
            (None, Some(ground), _) => {
                Ok(Pace::Ground { speed_m_s: speed(ground, "ground_speed_kt", &SPEEDS_KT)? })
            }
            (None, None, Some(i)) => self.first_speed(i),
            (None, None, None) => Ok(Pace::Times),
        }
    }

    /// The profile's own first speed, which must hold from take-off.
    fn first_speed(&self, first: usize) -> Stands<Pace> {
        let point = &self.profile[first];
        let at_once = matches!(point.value.at, Mark::Time(0.0) | Mark::Distance(Metres(0.0)));
        match point.value.ground_speed_m_s {
            Some(speed_m_s) if at_once => Ok(Pace::Ground { speed_m_s }),
            _ => Err((point.origin.clone(), Problem::NoFirstSpeed)),
        }
    }

    /// Points that are both timed, or both at a distance, follow each other; the others are held against each other
    /// along the path.
    fn check_order(&self) -> Stands<()> {
        for (i, pair) in self.profile.windows(2).enumerate() {
            let follows = match (pair[0].value.at, pair[1].value.at) {
                (Mark::Time(a), Mark::Time(b)) => a < b,
                (Mark::Distance(a), Mark::Distance(b)) => a < b,
                _ => true,
            };
            if !follows {
                return Err((pair[1].origin.clone(), Problem::ProfileOrder { number: i + 2 }));
            }
        }
        Ok(())
    }
}

/// Winds belong to an airspeed, and leave a speed over the ground.
fn check_winds(pace: Pace, waypoints: &[Given<RoutePoint>]) -> Stands<()> {
    let headway = |wind_m_s: f64, origin: &super::Origin, speed_m_s: f64| {
        let speed_kt = (speed_m_s + wind_m_s) / KNOT_M_S;
        let gets_on = speed_kt >= *SPEEDS_KT.start();
        if gets_on { Ok(()) } else { Err((origin.clone(), Problem::NoHeadway { speed_kt })) }
    };
    if let Pace::Air { speed_m_s, wind_m_s } = pace {
        headway(wind_m_s, &super::Origin::Whole, speed_m_s)?;
    }
    for point in waypoints {
        match (point.value.wind_m_s, pace) {
            (None, _) => {}
            (Some(wind_m_s), Pace::Air { speed_m_s, .. }) => headway(wind_m_s, &point.origin, speed_m_s)?,
            (Some(_), _) => return Err((point.origin.clone(), Problem::WindAlone)),
        }
    }
    Ok(())
}
