//! Flight files: TOML, read value by value so that each error names its line and column.

use super::ahead::{Alternate, air, alternates, low_sun};
use super::block::GivenBlock;
use super::brightness::{Brightness, lux_levels, share};
use super::draft::{Draft, Given, MOST_WAYPOINTS, Origin};
use super::fixes::Fixes;
use super::flight::{Flight, PolarLimits, RoutePoint};
use super::gazetteer::Gazetteer;
use super::pace::{GivenPace, ProfilePoint, profile, wind};
use super::place::{Named, degrees};
use super::problem::{IntakeError, Problem};
use super::route::route;
use super::time::{duration_s, instant};
use crate::units::{Dut1, Instant};
use std::ops::Range;
use toml::Spanned;
use toml::de::{DeTable, DeValue};

/// What a flight file may hold.
pub(super) const FIELDS: [&str; 30] = [
    "name",
    "from",
    "to",
    "takeoff",
    "landing",
    "airborne",
    "off_block",
    "on_block",
    "taxi_out",
    "taxi_in",
    "ground_speed_kt",
    "true_airspeed_kt",
    "wind_kt",
    "profile",
    "cruise_ft",
    "level_ft",
    "horizon_ft",
    "climb_ft_min",
    "descent_ft_min",
    "dut1_s",
    "route",
    "waypoint",
    "polar_areas",
    "lux_levels",
    "transmittance",
    "view_factor",
    "low_sun",
    "from_air",
    "to_air",
    "alternate",
];
/// What a waypoint may hold.
pub(super) const WAYPOINT_FIELDS: [&str; 3] = ["at", "time", "wind_kt"];
/// What a place in degrees must hold.
pub(super) const PLACE_FIELDS: [&str; 2] = ["lat", "lon"];
/// What the limits of the polar areas may hold.
pub(super) const POLAR_FIELDS: [&str; 2] = ["north_deg", "south_deg"];

/// A value of the file or what is wrong with it, with the bytes it stands on.
pub(super) type Found<T> = Result<T, (Range<usize>, Problem)>;
pub(super) type Value<'a> = Spanned<DeValue<'a>>;

/// Reads a flight file's text.
///
/// # Errors
/// Anything that keeps the flight from being flown, with the line and column it stands on.
pub fn flight_file(text: &str, source_name: &str) -> Result<Flight, IntakeError> {
    read(text, source_name, None)
}

/// Reads a flight file's text; a place that is neither code nor coordinates is looked for among a user's own fixes.
///
/// # Errors
/// As for [`flight_file`].
pub fn flight_file_with_fixes(text: &str, source_name: &str, fixes: &Fixes) -> Result<Flight, IntakeError> {
    read(text, source_name, Some(fixes))
}

fn read(text: &str, source_name: &str, fixes: Option<&Fixes>) -> Result<Flight, IntakeError> {
    let fail = |origin, problem| IntakeError { source_name: source_name.to_string(), origin, problem };
    if text.trim().is_empty() {
        return Err(fail(Origin::Whole, Problem::Empty));
    }
    // UTF-16 of plain letters is valid UTF-8, but with zeros between them
    if let Some(byte) = text.find('\0') {
        return Err(fail(Origin::Whole, Problem::NotText(byte)));
    }
    let parsed = DeTable::parse(text).map_err(|error| {
        let origin = error.span().map_or(Origin::Whole, |span| line_and_column(text, span.start));
        fail(origin, Problem::Toml(error.message().replace('\n', ", ")))
    })?;
    let reader = Reader { text, names: Gazetteer::new(fixes) };
    let draft = reader.draft(parsed.get_ref(), source_name).map_err(|(span, problem)| {
        // a field that is missing stands nowhere
        let missing = matches!(problem, Problem::MissingField(_)) && span.is_empty();
        fail(if missing { Origin::Whole } else { line_and_column(text, span.start) }, problem)
    })?;
    draft.checked()
}

pub(super) fn line_and_column(text: &str, byte: usize) -> Origin {
    let before = text.get(..byte).unwrap_or(text);
    let line = before.matches('\n').count() + 1;
    let column = before.rsplit('\n').next().map_or(0, |tail| tail.chars().count()) + 1;
    Origin::At(line, column)
}

struct Reader<'t> {
    text: &'t str,
    names: Gazetteer<'t>,
}

impl Reader<'_> {
    fn draft(&self, table: &DeTable<'_>, source_name: &str) -> Found<Draft> {
        only(table, &FIELDS)?;
        let need = |field: &'static str| table.get(field).ok_or((0..0, Problem::MissingField(field)));
        // in the order of the route, so that a fix is looked for near the point before it
        let from = self.on_route("from", need("from")?)?;
        let waypoints = self.between(table)?;
        let to = self.on_route("to", need("to")?)?;
        let alternates = table.get("alternate").map_or(Ok(Vec::new()), |v| self.alternates(v))?;
        Ok(Draft {
            source_name: source_name.to_string(),
            name: table.get("name").map(|v| string("name", v).map(str::to_string)).transpose()?,
            from,
            to,
            takeoff: self.time("takeoff", need("takeoff")?)?,
            airborne_s: self.duration(table, "airborne")?,
            landing: table.get("landing").map(|v| self.time("landing", v)).transpose()?,
            horizon_ft: self.number(table, "horizon_ft")?,
            climb_ft_min: self.number(table, "climb_ft_min")?,
            descent_ft_min: self.number(table, "descent_ft_min")?,
            level_ft: self.number(table, "level_ft")?,
            cruise_ft: self.number(table, "cruise_ft")?,
            waypoints,
            polar_limits: table.get("polar_areas").map(polar_limits).transpose()?,
            dut1: table.get("dut1_s").map(dut1).transpose()?,
            brightness: brightness(table)?,
            low_sun: table.get("low_sun").map(low_sun).transpose()?,
            from_air: table.get("from_air").map(|v| air("from_air", v)).transpose()?,
            to_air: table.get("to_air").map(|v| air("to_air", v)).transpose()?,
            alternates,
            warnings: self.names.warnings(),
            pace: self.pace(table)?,
            block: self.block(table)?,
        })
    }

    fn pace(&self, table: &DeTable<'_>) -> Found<GivenPace> {
        let mut lines = LineCounter { text: self.text, byte: 0, line: 1 };
        let given = |(value, span): (ProfilePoint, Range<usize>)| Given {
            value,
            origin: Origin::At(lines.line_of(span.start), 1),
        };
        let points = table.get("profile").map_or(Ok(Vec::new()), profile)?;
        Ok(GivenPace {
            ground_speed_kt: self.number(table, "ground_speed_kt")?,
            true_airspeed_kt: self.number(table, "true_airspeed_kt")?,
            wind_kt: self.number(table, "wind_kt")?,
            profile: points.into_iter().map(given).collect(),
        })
    }

    fn block(&self, table: &DeTable<'_>) -> Found<GivenBlock> {
        let time = |field| table.get(field).map(|v| self.time(field, v)).transpose();
        Ok(GivenBlock {
            off_block: time("off_block")?,
            on_block: time("on_block")?,
            taxi_out_s: self.duration(table, "taxi_out")?,
            taxi_in_s: self.duration(table, "taxi_in")?,
        })
    }

    fn number(&self, table: &DeTable<'_>, field: &'static str) -> Found<Option<Given<f64>>> {
        table.get(field).map(|value| self.given(value, number(field, value))).transpose()
    }

    /// A value with its place in the file.
    fn given<T>(&self, at: &Value<'_>, value: Found<T>) -> Found<Given<T>> {
        Ok(Given { value: value?, origin: line_and_column(self.text, at.span().start) })
    }

    fn time(&self, field: &'static str, value: &Value<'_>) -> Found<Given<Instant>> {
        self.given(value, time(field, value))
    }

    /// A point of the route, in its order.
    fn on_route(&self, field: &'static str, value: &Value<'_>) -> Found<Named> {
        let found = named(field, value, |text| self.names.next(text))?;
        self.names.passed(found.place);
        Ok(found)
    }

    /// The points between, from a string or from tables.
    fn between(&self, table: &DeTable<'_>) -> Found<Vec<Given<RoutePoint>>> {
        match (table.get("route"), table.get("waypoint")) {
            (Some(value), Some(_)) => {
                Err((value.span(), Problem::Exclusive { one: "route", other: "waypoint" }))
            }
            (Some(value), None) => self.route(value),
            (None, Some(value)) => self.waypoints(value),
            (None, None) => Ok(Vec::new()),
        }
    }

    fn route(&self, value: &Value<'_>) -> Found<Vec<Given<RoutePoint>>> {
        let text = string("route", value)?;
        let at = self.inside(value, text);
        let points = route(text, &self.names).map_err(|(span, problem)| match at {
            Some(at) => (at + span.start..at + span.end, problem),
            None => (value.span(), problem),
        })?;
        let mut lines = LineCounter { text: self.text, byte: 0, line: 1 };
        let given = points.into_iter().map(|(value, span)| {
            let byte = at.map_or(0, |at| at + span.start);
            Given { value, origin: Origin::At(lines.line_of(byte), 1) }
        });
        Ok(given.collect())
    }

    /// Where a string's own text begins in the file, if it stands there letter for letter.
    fn inside(&self, value: &Value<'_>, text: &str) -> Option<usize> {
        let span = value.span();
        self.text.get(span.clone())?.find(text).map(|at| span.start + at)
    }

    fn duration(&self, table: &DeTable<'_>, field: &'static str) -> Found<Option<Given<f64>>> {
        let Some(value) = table.get(field) else { return Ok(None) };
        let seconds = duration_s(string(field, value)?).map_err(|problem| (value.span(), problem));
        self.given(value, seconds).map(Some)
    }

    fn alternates(&self, value: &Value<'_>) -> Found<Vec<Given<Alternate>>> {
        let given = |(value, span): (Alternate, Range<usize>)| Given {
            value,
            origin: line_and_column(self.text, span.start),
        };
        Ok(alternates(value, &self.names)?.into_iter().map(given).collect())
    }

    fn waypoints(&self, value: &Value<'_>) -> Found<Vec<Given<RoutePoint>>> {
        let Some(list) = value.get_ref().as_array() else {
            return Err(wrong("waypoint", value.get_ref(), "written as [[waypoint]]", value.span()));
        };
        if list.len() > MOST_WAYPOINTS {
            let problem = Problem::TooManyWaypoints { count: list.len(), most: MOST_WAYPOINTS };
            return Err((value.span(), problem));
        }
        let mut lines = LineCounter { text: self.text, byte: 0, line: 1 };
        list.iter().map(|point| self.waypoint(point, &mut lines)).collect()
    }

    fn waypoint(&self, value: &Value<'_>, lines: &mut LineCounter<'_>) -> Found<Given<RoutePoint>> {
        let table = table("waypoint", value)?;
        only(table, &WAYPOINT_FIELDS)?;
        let at = table.get("at").ok_or((value.span(), Problem::MissingField("at")))?;
        let named = self.on_route("at", at)?;
        let time = table.get("time").map(|v| time("time", v)).transpose()?;
        let wind_m_s = table.get("wind_kt").map(wind).transpose()?;
        let value = RoutePoint { label: named.label, place: named.place, time, wind_m_s };
        Ok(Given { value, origin: Origin::At(lines.line_of(at.span().start), 1) })
    }
}

/// Counts lines forward only, so that many waypoints cost one pass.
struct LineCounter<'t> {
    text: &'t str,
    byte: usize,
    line: usize,
}

impl LineCounter<'_> {
    fn line_of(&mut self, byte: usize) -> usize {
        if byte > self.byte {
            self.line += self.text.get(self.byte..byte).map_or(0, |passed| passed.matches('\n').count());
            self.byte = byte;
        }
        self.line
    }
}

pub(super) fn wrong(
    field: &'static str,
    found: &DeValue<'_>,
    wanted: &'static str,
    span: Range<usize>,
) -> (Range<usize>, Problem) {
    (span, Problem::WrongType { field, found: found.type_str().to_string(), wanted })
}

/// Refuses fields that are not known, so that a misspelt one is not passed over in silence.
pub(super) fn only(table: &DeTable<'_>, known: &[&str]) -> Found<()> {
    match table.keys().find(|key| !known.contains(&key.get_ref().as_ref())) {
        Some(key) => Err((key.span(), Problem::UnknownField(key.get_ref().to_string()))),
        None => Ok(()),
    }
}

pub(super) fn string<'a>(field: &'static str, value: &'a Value<'_>) -> Found<&'a str> {
    value.get_ref().as_str().ok_or_else(|| wrong(field, value.get_ref(), "a string", value.span()))
}

pub(super) fn table<'a, 'i>(field: &'static str, value: &'a Value<'i>) -> Found<&'a DeTable<'i>> {
    value.get_ref().as_table().ok_or_else(|| wrong(field, value.get_ref(), "a table", value.span()))
}

pub(super) fn number(field: &'static str, value: &Value<'_>) -> Found<f64> {
    let text = match value.get_ref() {
        DeValue::Float(float) => float.as_str().to_string(),
        DeValue::Integer(integer) if integer.radix() == 10 => integer.as_str().to_string(),
        other => return Err(wrong(field, other, "a decimal number", value.span())),
    };
    // a NaN is a number to TOML but not to us: every range refuses it later, with its name
    text.parse().map_err(|_| wrong(field, value.get_ref(), "a number", value.span()))
}

fn time(field: &'static str, value: &Value<'_>) -> Found<Instant> {
    let text = match value.get_ref() {
        DeValue::Datetime(datetime) => datetime.to_string(),
        DeValue::String(text) => text.to_string(),
        other => return Err(wrong(field, other, "a date and time with an offset", value.span())),
    };
    instant(&text).map_err(|problem| (value.span(), problem))
}

/// A place as a string, which is looked up, or as `{ lat, lon }`.
pub(super) fn named(
    field: &'static str,
    value: &Value<'_>,
    look_up: impl Fn(&str) -> Result<Named, Problem>,
) -> Found<Named> {
    match value.get_ref() {
        DeValue::String(text) => look_up(text).map_err(|problem| (value.span(), problem)),
        DeValue::Table(table) => {
            only(table, &PLACE_FIELDS)?;
            let part = |key| table.get(key).ok_or((value.span(), Problem::MissingField(key)));
            let (lat, lon) = (number("lat", part("lat")?)?, number("lon", part("lon")?)?);
            degrees(lat, lon).map_err(|problem| (value.span(), problem))
        }
        other => Err(wrong(field, other, "a code, coordinates or { lat, lon }", value.span())),
    }
}

fn polar_limits(value: &Value<'_>) -> Found<PolarLimits> {
    let table = table("polar_areas", value)?;
    only(table, &POLAR_FIELDS)?;
    let limit = |key, usual| table.get(key).map_or(Ok(usual), |v| number(key, v));
    let usual = PolarLimits::default();
    let (north, south) = (limit("north_deg", usual.north.deg())?, limit("south_deg", -usual.south.deg())?);
    PolarLimits::from_deg(north, south).map_err(|error| (value.span(), error.into()))
}

fn dut1(value: &Value<'_>) -> Found<Dut1> {
    Dut1::from_s(number("dut1_s", value)?).map_err(|error| (value.span(), error.into()))
}

fn brightness(table: &DeTable<'_>) -> Found<Brightness> {
    let factor = |field: &'static str| {
        let value = table.get(field);
        let read = |v| share(field, number(field, v)?).map_err(|error| (v.span(), error.into()));
        value.map(read).transpose()
    };
    Ok(Brightness {
        levels_lux: table.get("lux_levels").map(levels).transpose()?,
        transmittance: factor("transmittance")?,
        view_factor: factor("view_factor")?,
    })
}

fn levels(value: &Value<'_>) -> Found<Vec<f64>> {
    let Some(list) = value.get_ref().as_array() else {
        return Err(wrong("lux_levels", value.get_ref(), "an array of numbers", value.span()));
    };
    let given = list.iter().map(|one| number("lux_levels", one)).collect::<Found<_>>()?;
    lux_levels(given).map_err(|error| (value.span(), error.into()))
}
