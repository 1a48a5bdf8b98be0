//! Which column of a table means what: as mapped, or recognised by meaning and unit in its header.
//!
//! Does not look at the rows.

use super::options::{Columns, HeightUnit};
use super::{Found, TrackProblem};

/// The columns that are read, counted from 0.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Roles {
    pub(super) time: usize,
    pub(super) date: Option<usize>,
    pub(super) place: PlaceColumns,
    /// The column of heights, and its unit where the header says one.
    pub(super) height: Option<(usize, Option<HeightUnit>)>,
    pub(super) flight: Option<usize>,
}

/// Where positions stand.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum PlaceColumns {
    /// Latitude and longitude.
    Two(usize, usize),
    /// Both in one cell, latitude first.
    One(usize),
}

// Headers in the order in which they are preferred, written in small letters and figures alone, without the unit.
// A date and time is preferred to what may be a time of day; heights of satellites to those of pressure.
const TIMES: &str = "timestamp datetime timeutc utctime utc dateutc datetimeutc timestamputc epoch unixtime unix \
    unixtimestamp epochtime gpstime time timeofday";
const DATES: &str = "date day utcdate dateutc";
const LATS: &str = "latitude lat latitudewgs84 latwgs84";
const LONS: &str = "longitude lon lng long longitudewgs84 lonwgs84";
const PLACES: &str = "position latlon latlng coordinates";
const HEIGHTS: &str = "geoaltitude altitudegeo geometricaltitude altgeom altgeo gpsaltitude altgps altitudegps height \
    altitude alt elevation ele baroaltitude altitudebaro baroalt altbaro pressurealtitude level flightlevel";
const FLIGHTS: &str =
    "flightid flight flightno flightnumber trackid callsign ident id icao24 hex registration tail";
/// Words that say a unit of time or of angle: a count since 1970 tells its unit, and angles are degrees.
const UNIT_WORDS: &str =
    "s sec secs second seconds ms millis milliseconds us ns deg degree degrees dd iso iso8601";

fn words(list: &str) -> impl Iterator<Item = &str> {
    list.split_ascii_whitespace()
}

/// A header taken apart: its name in small letters and figures, and the unit of height that it says.
struct Header {
    name: String,
    unit: Option<HeightUnit>,
}

impl Header {
    fn of(text: &str) -> Self {
        let lower = text.to_lowercase();
        let mut parts: Vec<&str> =
            lower.split(|c: char| !c.is_alphanumeric()).filter(|w| !w.is_empty()).collect();
        let mut unit = None;
        // the unit stands last, and a lone word is a name
        while let [_, .., last] = parts[..] {
            let of_height = HeightUnit::of_word(last);
            if of_height.is_none() && !words(UNIT_WORDS).any(|word| word == last) {
                break;
            }
            unit = unit.or(of_height);
            parts.pop();
        }
        let name = parts.concat();
        if matches!(name.as_str(), "flightlevel" | "level") {
            unit = unit.or(Some(HeightUnit::FlightLevel));
        }
        Self { name, unit }
    }
}

/// Finds the columns in the header.
pub(super) fn roles(header: &[String], mapped: &Columns) -> Found<Roles> {
    let table = Table { header, parts: header.iter().map(|text| Header::of(text)).collect() };
    table.roles(mapped).map_err(|problem| (None, problem))
}

/// Whether the header is data: all columns are mapped by number.
pub(super) fn is_numbered(mapped: &Columns) -> bool {
    let numbered = |name: &Option<String>| name.as_deref().is_some_and(|name| by_number(name).is_some());
    numbered(&mapped.time) && numbered(&mapped.lat) && numbered(&mapped.lon)
}

/// `#2` as 1.
fn by_number(name: &str) -> Option<usize> {
    name.strip_prefix('#')?.parse::<usize>().ok()?.checked_sub(1)
}

struct Table<'h> {
    header: &'h [String],
    parts: Vec<Header>,
}

impl Table<'_> {
    fn roles(&self, mapped: &Columns) -> Result<Roles, TrackProblem> {
        let need = |what, column: Option<usize>| {
            column.ok_or_else(|| TrackProblem::NoColumn { what, header: self.header.join(" ") })
        };
        let time = need("time", self.pick(mapped.time.as_deref(), TIMES)?)?;
        let date = self.pick(mapped.date.as_deref(), DATES)?.filter(|date| *date != time);
        let one = self.known(PLACES);
        let lat = self.pick(mapped.lat.as_deref(), LATS)?;
        let lon = self.pick(mapped.lon.as_deref(), LONS)?;
        let place = match (lat, lon, one) {
            (None, None, Some(one)) => PlaceColumns::One(one),
            (lat, lon, _) => PlaceColumns::Two(need("latitude", lat)?, need("longitude", lon)?),
        };
        let flight = self.pick(mapped.flight.as_deref(), FLIGHTS)?;
        Ok(Roles { time, date, place, height: self.height(mapped)?, flight })
    }

    fn height(&self, mapped: &Columns) -> Result<Option<(usize, Option<HeightUnit>)>, TrackProblem> {
        let (name, unit) = mapped.height.clone().unzip();
        let column = self.pick(name.as_deref(), HEIGHTS)?;
        let said = |column: usize| self.parts.get(column).and_then(|part| part.unit);
        Ok(column.map(|column| (column, unit.flatten().or_else(|| said(column)))))
    }

    /// The mapped column, or the first that is known.
    fn pick(&self, mapped: Option<&str>, known: &str) -> Result<Option<usize>, TrackProblem> {
        match mapped {
            Some(name) => self.named(name).map(Some),
            None => Ok(self.known(known)),
        }
    }

    fn known(&self, known: &str) -> Option<usize> {
        words(known).find_map(|name| self.parts.iter().position(|part| part.name == name))
    }

    fn named(&self, name: &str) -> Result<usize, TrackProblem> {
        let numbered = by_number(name).filter(|column| *column < self.header.len());
        let exact = self.header.iter().position(|text| text == name);
        let alike = || self.header.iter().position(|text| text.eq_ignore_ascii_case(name));
        numbered.or(exact).or_else(alike).ok_or_else(|| TrackProblem::NoSuchColumn {
            column: name.to_string(),
            header: self.header.join(" "),
        })
    }
}

#[cfg(test)]
mod tests {
    use super::super::options::{Columns, HeightUnit};
    use super::{PlaceColumns, roles};

    fn of(header: &str, mapped: &str) -> super::Roles {
        let header: Vec<String> = header.split(',').map(str::to_string).collect();
        let mapped =
            if mapped.is_empty() { Columns::default() } else { Columns::parse(mapped, "-").unwrap() };
        roles(&header, &mapped).unwrap()
    }

    #[test]
    fn columns_are_recognised_by_meaning_and_unit() {
        let found = of("Time (UTC),Latitude [deg],Longitude [deg],Altitude (ft),Track", "");
        assert_eq!((found.time, found.place), (0, PlaceColumns::Two(1, 2)));
        assert_eq!(found.height, Some((3, Some(HeightUnit::Foot))));
        assert_eq!(found.flight, None);
        let found = of("time,icao24,lat,lon,velocity,heading,baroaltitude,geoaltitude,callsign", "");
        assert_eq!(found.height, Some((7, None)));
        assert_eq!(found.flight, Some(8));
        let found = of("date,time_ms,lng,lat,alt", "");
        assert_eq!((found.time, found.date, found.place), (1, Some(0), PlaceColumns::Two(3, 2)));
        assert_eq!(found.height, Some((4, None)));
        assert_eq!(of("Timestamp,UTC,Callsign,Position,Altitude", "").place, PlaceColumns::One(3));
        assert_eq!(of("utc,lat,lon,flight level", "").height, Some((3, Some(HeightUnit::FlightLevel))));
        assert_eq!(of("utc,lat,lon,h_m,height_m", "").height, Some((4, Some(HeightUnit::Metre))));
    }

    #[test]
    fn a_mapping_goes_before_what_is_recognised() {
        let found = of("time,when,lat,lon,h_ft", "time=When,height=h_ft,lat=#4,lon=#3");
        assert_eq!((found.time, found.place), (1, PlaceColumns::Two(3, 2)));
        assert_eq!(found.height, Some((4, Some(HeightUnit::Foot))));
    }

    #[test]
    fn a_missing_column_is_named() {
        let header = ["time", "lat"].map(str::to_string);
        let (_, problem) = roles(&header, &Columns::default()).unwrap_err();
        assert_eq!(problem.to_string(), "no column of longitude is recognised among 'time lat'");
        let mapped = Columns::parse("time=when", "-").unwrap();
        let (_, problem) = roles(&header, &mapped).unwrap_err();
        assert_eq!(problem.to_string(), "there is no column 'when' among 'time lat'");
    }
}
