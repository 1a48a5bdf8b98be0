//! A flight given on the command line instead of in a file.

use super::block::GivenBlock;
use super::brightness::Brightness;
use super::draft::{Draft, Given, Origin};
use super::fixes::Fixes;
use super::flight::{Flight, RoutePoint};
use super::gazetteer::Gazetteer;
use super::pace::GivenPace;
use super::place::{Named, place};
use super::problem::{IntakeError, Problem};
use super::route::route;
use super::time::{date, duration_s, instant};

/// The texts of a flight's command-line options.
#[derive(Debug, Clone, Default)]
pub struct Inline<'a> {
    /// `--name`
    pub name: Option<&'a str>,
    /// `--from`
    pub from: &'a str,
    /// `--to`
    pub to: &'a str,
    /// `--takeoff`
    pub takeoff: &'a str,
    /// `--airborne`
    pub airborne: Option<&'a str>,
    /// `--landing`
    pub landing: Option<&'a str>,
    /// `--level-ft`
    pub level_ft: Option<f64>,
    /// `--climb-ft-min`
    pub climb_ft_min: Option<f64>,
    /// `--descent-ft-min`
    pub descent_ft_min: Option<f64>,
    /// `--horizon-ft`
    pub horizon_ft: Option<f64>,
    /// `--ground-speed-kt`
    pub ground_speed_kt: Option<f64>,
    /// `--route`
    pub route: Option<&'a str>,
    /// The user's own fixes.
    pub fixes: Option<&'a Fixes>,
}

/// Reads a flight from its options.
///
/// # Errors
/// Anything that keeps the flight from being flown, with the option it was given in.
pub fn inline_flight(given: &Inline<'_>) -> Result<Flight, IntakeError> {
    if given.airborne.is_none() && given.landing.is_none() && given.ground_speed_kt.is_none() {
        let problem = Problem::Landing("neither says when the flight ends");
        let origin = Origin::Option("--airborne, --landing");
        return Err(IntakeError { source_name: String::new(), origin, problem });
    }
    let names = Gazetteer::new(given.fixes);
    let (from, waypoints, to) = points(given, &names)?;
    let draft = Draft {
        source_name: String::new(),
        name: given.name.map(str::to_string),
        from,
        to,
        takeoff: read("--takeoff", given.takeoff, instant)?,
        airborne_s: given.airborne.map(|text| read("--airborne", text, duration_s)).transpose()?,
        landing: given.landing.map(|text| read("--landing", text, instant)).transpose()?,
        level_ft: number(given.level_ft, "--level-ft"),
        horizon_ft: number(given.horizon_ft, "--horizon-ft"),
        climb_ft_min: number(given.climb_ft_min, "--climb-ft-min"),
        descent_ft_min: number(given.descent_ft_min, "--descent-ft-min"),
        waypoints,
        polar_limits: None,
        dut1: None,
        brightness: Brightness::default(),
        low_sun: None,
        from_air: None,
        to_air: None,
        alternates: Vec::new(),
        warnings: names.warnings(),
        cruise_ft: None,
        pace: GivenPace {
            ground_speed_kt: number(given.ground_speed_kt, "--ground-speed-kt"),
            ..GivenPace::default()
        },
        block: GivenBlock::default(),
    };
    draft.checked()
}

fn number(value: Option<f64>, option: &'static str) -> Option<Given<f64>> {
    value.map(|value| Given { value, origin: Origin::Option(option) })
}

/// The ends and what lies between, looked up in the order of the route.
fn points(
    given: &Inline<'_>,
    names: &Gazetteer<'_>,
) -> Result<(Named, Vec<Given<RoutePoint>>, Named), IntakeError> {
    let from = read("--from", given.from, |text| names.next(text))?.value;
    let between = |text: &str| route(text, names).map_err(|(_, problem)| problem);
    let points = given.route.map(|text| read("--route", text, between)).transpose()?;
    let waypoints = points.map_or(Vec::new(), |points| {
        let one = |(value, _)| Given { value, origin: Origin::Option("--route") };
        points.value.into_iter().map(one).collect()
    });
    let to = read("--to", given.to, |text| names.next(text))?.value;
    Ok((from, waypoints, to))
}

/// A place given on its own: an aerodrome's code or coordinates, with its label and zone.
///
/// # Errors
/// A code or coordinates that are not known, with the name of the argument.
pub fn place_argument(argument: &'static str, text: &str) -> Result<super::Stop, IntakeError> {
    read(argument, text, place).map(|given| given.value.into())
}

/// An instant given on its own.
///
/// # Errors
/// A time that cannot be read or lies outside the years served, with the name of the argument.
pub fn instant_argument(argument: &'static str, text: &str) -> Result<crate::units::Instant, IntakeError> {
    read(argument, text, instant).map(|given| given.value)
}

/// A civil date given on its own.
///
/// # Errors
/// A date that cannot be read or does not exist, with the name of the argument.
pub fn date_argument(argument: &'static str, text: &str) -> Result<chrono::NaiveDate, IntakeError> {
    read(argument, text, date).map(|given| given.value)
}

fn read<T>(
    option: &'static str,
    text: &str,
    reader: impl Fn(&str) -> Result<T, Problem>,
) -> Result<Given<T>, IntakeError> {
    let origin = Origin::Option(option);
    match reader(text) {
        Ok(value) => Ok(Given { value, origin }),
        Err(problem) => Err(IntakeError { source_name: String::new(), origin, problem }),
    }
}
