//! A flight as given, each value with where it stands, and the checks that make it a [`Flight`].

use super::ahead::{Alternate, LowSunLimits, StationAir};
use super::block::GivenBlock;
use super::brightness::Brightness;
use super::flight::{ClimbRates, Flight, PolarLimits, RoutePoint, Stop};
use super::pace::{GivenPace, Pace};
use super::place::Named;
use super::problem::{IntakeError, Problem, Stands};
use crate::units::{Dut1, Instant, Metres};
use std::ops::RangeInclusive;

/// The longest time in the air that is taken for a flight: a day and a half.
pub(super) const LONGEST_H: f64 = 36.0;
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
    pub(super) cruise_ft: Option<Given<f64>>,
    pub(super) horizon_ft: Option<Given<f64>>,
    pub(super) climb_ft_min: Option<Given<f64>>,
    pub(super) descent_ft_min: Option<Given<f64>>,
    pub(super) waypoints: Vec<Given<RoutePoint>>,
    pub(super) polar_limits: Option<PolarLimits>,
    pub(super) dut1: Option<Dut1>,
    pub(super) brightness: Brightness,
    pub(super) low_sun: Option<LowSunLimits>,
    pub(super) from_air: Option<StationAir>,
    pub(super) to_air: Option<StationAir>,
    pub(super) alternates: Vec<Given<Alternate>>,
    pub(super) warnings: Vec<String>,
    pub(super) pace: GivenPace,
    pub(super) block: GivenBlock,
}

/// RFC 3339 in UTC to the second, for messages.
pub(super) fn said(instant: Instant) -> String {
    instant.utc().format("%Y-%m-%dT%H:%M:%SZ").to_string()
}

impl Draft {
    /// Holds the values against each other.
    pub(super) fn checked(self) -> Result<Flight, IntakeError> {
        let source_name = self.source_name.clone();
        self.held().map_err(|(origin, problem)| IntakeError { source_name, origin, problem })
    }

    fn held(self) -> Stands<Flight> {
        let takeoff = self.takeoff.value;
        let pace = self.pace.checked(&self.waypoints)?;
        let landing = self.landing(pace)?;
        let landing_at = landing.as_ref().map(|landing| landing.value);
        if let Some(landing) = &landing {
            check_duration(takeoff, landing.value).map_err(|problem| (landing.origin.clone(), problem))?;
        }
        let off_block = self.block.off(takeoff)?;
        let on_block = self.block.on(landing_at)?;
        let level = self.level()?;
        let horizon = height(self.horizon_ft, HORIZONS_FT);
        let horizon = horizon.map_err(|(origin, ft)| (origin, Problem::Horizon(ft)))?;
        let climb = climb_rates(level.is_some(), self.climb_ft_min, self.descent_ft_min)?;
        check_order(&self.waypoints, takeoff, landing_at)?;
        check_alternates(&self.alternates, landing_at)?;
        let (from, to) = (Stop::from(self.from), Stop::from(self.to));
        let profile: Vec<_> = self.pace.profile.into_iter().map(|point| point.value).collect();
        let highest = profile.iter().map(|point| point.level).reduce(|a, b| if b > a { b } else { a });
        Ok(Flight {
            name: named(self.name, (&from, &to), takeoff),
            from,
            to,
            takeoff,
            landing: landing_at,
            pace,
            off_block,
            on_block,
            level: highest.or(level),
            profile,
            climb,
            horizon,
            waypoints: self.waypoints.into_iter().map(|w| w.value).collect(),
            polar_limits: self.polar_limits,
            recorded: None,
            dut1: self.dut1,
            brightness: self.brightness,
            low_sun: self.low_sun,
            from_air: self.from_air,
            to_air: self.to_air,
            alternates: self.alternates.into_iter().map(|a| a.value).collect(),
            warnings: self.warnings,
        })
    }

    /// The cruise height under either of its names; a profile has heights of its own.
    fn level(&self) -> Stands<Option<Metres>> {
        let given = [
            ("level_ft", &self.level_ft),
            ("cruise_ft", &self.cruise_ft),
            ("climb_ft_min", &self.climb_ft_min),
            ("descent_ft_min", &self.descent_ft_min),
        ];
        let other = given.iter().find_map(|(field, given)| Some((*field, given.as_ref()?)));
        match (other, &self.level_ft, &self.cruise_ft) {
            (Some((one, value)), ..) if !self.pace.profile.is_empty() => {
                Err((value.origin.clone(), Problem::Exclusive { one, other: "profile" }))
            }
            (_, Some(_), Some(cruise)) => {
                Err((cruise.origin.clone(), Problem::Exclusive { one: "level_ft", other: "cruise_ft" }))
            }
            (_, level, cruise) => height(level.clone().or(cruise.clone()), LEVELS_FT)
                .map_err(|(origin, ft)| (origin, Problem::Level(ft))),
        }
    }

    /// The landing, from whichever of its two forms was given; speeds may stand for both.
    fn landing(&self, pace: Pace) -> Stands<Option<Given<Instant>>> {
        let by_airborne = self.airborne_s.as_ref().map(|airborne| Given {
            value: self.takeoff.value.after_s(airborne.value),
            origin: airborne.origin.clone(),
        });
        match (by_airborne, self.landing.clone()) {
            (None, None) if pace != Pace::Times => Ok(None),
            (None, None) => Err((
                Origin::Whole,
                Problem::Landing("neither 'airborne' nor 'landing' says when the flight ends"),
            )),
            (Some(one), None) | (None, Some(one)) => Ok(Some(one)),
            // to the second, as both may have been rounded
            (Some(a), Some(b)) if a.value.since_s(b.value).abs() <= 1.0 => Ok(Some(b)),
            (Some(a), Some(b)) => {
                let conflict =
                    Problem::LandingConflict { by_airborne: said(a.value), by_landing: said(b.value) };
                Err((b.origin, conflict))
            }
        }
    }
}

/// The flight's name, or its ends and its take-off where it has none.
fn named(name: Option<String>, (from, to): (&Stop, &Stop), takeoff: Instant) -> String {
    let name = name.filter(|name| name.chars().any(|c| !c.is_whitespace() && !c.is_control()));
    name.unwrap_or_else(|| format!("{}-{} {}", from.label, to.label, takeoff.utc().format("%Y-%m-%d %H%MZ")))
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
) -> Stands<Option<ClimbRates>> {
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
fn check_alternates(alternates: &[Given<Alternate>], landing: Option<Instant>) -> Stands<()> {
    let Some(landing) = landing else { return Ok(()) };
    for alternate in alternates {
        let latest = landing.after_s(alternate.value.after_s);
        if !latest.is_answered_for() {
            return Err((alternate.origin.clone(), Problem::Years { given: said(latest) }));
        }
    }
    Ok(())
}

/// Waypoint times rise strictly from take-off to landing.
fn check_order(waypoints: &[Given<RoutePoint>], takeoff: Instant, landing: Option<Instant>) -> Stands<()> {
    let (mut last, mut before) = (takeoff, format!("the take-off at {}", said(takeoff)));
    for (i, point) in waypoints.iter().enumerate() {
        let Some(time) = point.value.time else { continue };
        let (number, label) = (i + 1, point.value.label.clone());
        if time <= last {
            let problem = Problem::OutOfOrder { number, label, time: said(time), before };
            return Err((point.origin.clone(), problem));
        }
        if let Some(landing) = landing.filter(|&landing| time >= landing) {
            let problem = Problem::AfterLanding { number, label, time: said(time), landing: said(landing) };
            return Err((point.origin.clone(), problem));
        }
        before = format!("waypoint {number} ({label}) at {}", said(time));
        last = time;
    }
    Ok(())
}
