//! A flight as given, each value with where it stands, and the checks that make it a [`Flight`].

use super::ahead::{Alternate, LowSunLimits, StationAir};
use super::flight::{ClimbRates, Flight, PolarLimits, RoutePoint, Stop};
use super::place::Named;
use super::problem::{IntakeError, Problem};
use crate::units::{Dut1, Instant, Metres};
use std::ops::RangeInclusive;

/// The longest time in the air that is taken for a flight: a day and a half.
const LONGEST_H: f64 = 36.0;
/// The levels that aircraft fly at.
const LEVELS_FT: RangeInclusive<f64> = 0.0..=60_000.0;
/// The heights that cloud tops or terrain can raise a horizon to: up to the tropopause of the standard atmosphere.
const HORIZONS_FT: RangeInclusive<f64> = 0.0..=36_000.0;
/// The rates at which aircraft climb and descend.
const RATES_FT_MIN: RangeInclusive<f64> = 50.0..=20_000.0;
/// The most waypoints of one flight.
pub(super) const MOST_WAYPOINTS: usize = 20_000;

/// Where a value stands.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum Origin {
    /// In a file: line and column, from 1.
    At(usize, usize),
    /// The whole file.
    Whole,
    /// A command-line option.
    Option(&'static str),
}

impl std::fmt::Display for Origin {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        match self {
            Self::At(line, column) => write!(f, ":{line}:{column}"),
            Self::Whole => Ok(()),
            Self::Option(name) => write!(f, "{name}"),
        }
    }
}

/// A value and where it stands.
#[derive(Debug, Clone)]
pub(super) struct Given<T> {
    pub(super) value: T,
    pub(super) origin: Origin,
}

/// Everything that was given, read but not yet held against each other.
#[derive(Debug, Clone)]
pub(super) struct Draft {
    pub(super) source_name: String,
    pub(super) name: Option<String>,
    pub(super) from: Named,
    pub(super) to: Named,
    pub(super) takeoff: Given<Instant>,
    pub(super) airborne_s: Option<Given<f64>>,
    pub(super) landing: Option<Given<Instant>>,
    pub(super) level_ft: Option<Given<f64>>,
    pub(super) horizon_ft: Option<Given<f64>>,
    pub(super) climb_ft_min: Option<Given<f64>>,
    pub(super) descent_ft_min: Option<Given<f64>>,
    pub(super) waypoints: Vec<Given<RoutePoint>>,
    pub(super) polar_limits: Option<PolarLimits>,
    pub(super) dut1: Option<Dut1>,
    pub(super) low_sun: Option<LowSunLimits>,
    pub(super) from_air: Option<StationAir>,
    pub(super) to_air: Option<StationAir>,
    pub(super) alternates: Vec<Given<Alternate>>,
    pub(super) warnings: Vec<String>,
}

/// RFC 3339 in UTC to the second, for messages.
fn said(instant: Instant) -> String {
    instant.utc().format("%Y-%m-%dT%H:%M:%SZ").to_string()
}

impl Draft {
    /// Holds the values against each other.
    pub(super) fn checked(self) -> Result<Flight, IntakeError> {
        let source_name = self.source_name.clone();
        let fail = |origin: &Origin, problem| IntakeError {
            source_name: source_name.clone(),
            origin: origin.clone(),
            problem,
        };
        let takeoff = self.takeoff.value;
        let landing = self.landing().map_err(|(origin, problem)| fail(&origin, problem))?;
        check_duration(takeoff, landing.value).map_err(|problem| fail(&landing.origin, problem))?;
        let (level, horizon) = (height(self.level_ft, LEVELS_FT), height(self.horizon_ft, HORIZONS_FT));
        let level = level.map_err(|(origin, ft)| fail(&origin, Problem::Level(ft)))?;
        let horizon = horizon.map_err(|(origin, ft)| fail(&origin, Problem::Horizon(ft)))?;
        let rates = climb_rates(level.is_some(), self.climb_ft_min, self.descent_ft_min);
        let climb = rates.map_err(|(origin, problem)| fail(&origin, problem))?;
        check_order(&self.waypoints, takeoff, landing.value)
            .map_err(|(origin, problem)| fail(&origin, problem))?;
        check_alternates(&self.alternates, landing.value)
            .map_err(|(origin, problem)| fail(&origin, problem))?;
        let name = self.name.filter(|name| name.chars().any(|c| !c.is_whitespace() && !c.is_control()));
        let (from, to) = (Stop::from(self.from), Stop::from(self.to));
        let name = name.unwrap_or_else(|| {
            format!("{}-{} {}", from.label, to.label, takeoff.utc().format("%Y-%m-%d %H%MZ"))
        });
        Ok(Flight {
            name,
            from,
            to,
            takeoff,
            landing: landing.value,
            level,
            climb,
            horizon,
            waypoints: self.waypoints.into_iter().map(|w| w.value).collect(),
            polar_limits: self.polar_limits,
            dut1: self.dut1,
            low_sun: self.low_sun,
            from_air: self.from_air,
            to_air: self.to_air,
            alternates: self.alternates.into_iter().map(|a| a.value).collect(),
            warnings: self.warnings,
        })
    }

    /// The landing, from whichever of its two forms was given.
    fn landing(&self) -> Result<Given<Instant>, (Origin, Problem)> {
        let by_airborne = self.airborne_s.as_ref().map(|airborne| Given {
            value: self.takeoff.value.after_s(airborne.value),
            origin: airborne.origin.clone(),
        });
        match (by_airborne, self.landing.clone()) {
            (None, None) => Err((
                Origin::Whole,
                Problem::Landing("neither 'airborne' nor 'landing' says when the flight ends"),
            )),
            (Some(one), None) | (None, Some(one)) => Ok(one),
            // to the second, as both may have been rounded
            (Some(a), Some(b)) if a.value.since_s(b.value).abs() <= 1.0 => Ok(b),
            (Some(a), Some(b)) => {
                let conflict =
                    Problem::LandingConflict { by_airborne: said(a.value), by_landing: said(b.value) };
                Err((b.origin, conflict))
            }
        }
    }
}

/// A height in feet within its range, or the value that is not, with where it stands.
fn height(feet: Option<Given<f64>>, range: RangeInclusive<f64>) -> Result<Option<Metres>, (Origin, f64)> {
    match feet {
        Some(feet) if !range.contains(&feet.value) => Err((feet.origin, feet.value)),
        feet => Ok(feet.map(|feet| Metres::from_feet(feet.value))),
    }
}

/// Both rates, or neither: a flight that only climbs would not land.
fn climb_rates(
    has_level: bool,
    climb: Option<Given<f64>>,
    descent: Option<Given<f64>>,
) -> Result<Option<ClimbRates>, (Origin, Problem)> {
    let (climb, descent) = match (climb, descent) {
        (None, None) => return Ok(None),
        (Some(climb), Some(descent)) if has_level => (climb, descent),
        (Some(rate), _) | (_, Some(rate)) => return Err((rate.origin, Problem::HalfAClimb)),
    };
    let metres = |rate: &Given<f64>| {
        let possible = RATES_FT_MIN.contains(&rate.value).then(|| Metres::from_feet(rate.value));
        possible.ok_or_else(|| (rate.origin.clone(), Problem::ClimbRate(rate.value)))
    };
    Ok(Some(ClimbRates { climb: metres(&climb)?, descent: metres(&descent)? }))
}

fn check_duration(takeoff: Instant, landing: Instant) -> Result<(), Problem> {
    let hours = landing.since_s(takeoff) / 3600.0;
    if hours <= 0.0 {
        return Err(Problem::LandingFirst { takeoff: said(takeoff), landing: said(landing) });
    }
    if hours > LONGEST_H {
        return Err(Problem::TooLong { hours, longest: LONGEST_H });
    }
    if landing.is_answered_for() { Ok(()) } else { Err(Problem::Years { given: said(landing) }) }
}

/// No alternate is used after the years served.
fn check_alternates(alternates: &[Given<Alternate>], landing: Instant) -> Result<(), (Origin, Problem)> {
    for alternate in alternates {
        let latest = landing.after_s(alternate.value.after_s);
        if !latest.is_answered_for() {
            return Err((alternate.origin.clone(), Problem::Years { given: said(latest) }));
        }
    }
    Ok(())
}

/// Waypoint times rise strictly from take-off to landing.
fn check_order(
    waypoints: &[Given<RoutePoint>],
    takeoff: Instant,
    landing: Instant,
) -> Result<(), (Origin, Problem)> {
    let (mut last, mut before) = (takeoff, format!("the take-off at {}", said(takeoff)));
    for (i, point) in waypoints.iter().enumerate() {
        let Some(time) = point.value.time else { continue };
        let (number, label) = (i + 1, point.value.label.clone());
        if time <= last {
            let problem = Problem::OutOfOrder { number, label, time: said(time), before };
            return Err((point.origin.clone(), problem));
        }
        if time >= landing {
            let problem = Problem::AfterLanding { number, label, time: said(time), landing: said(landing) };
            return Err((point.origin.clone(), problem));
        }
        before = format!("waypoint {number} ({label}) at {}", said(time));
        last = time;
    }
    Ok(())
}
