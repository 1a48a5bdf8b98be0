//! The Sun's almanac quantities and a place's day, as text and JSON.

use super::record::rounded;
use super::table::{columns, wrapped};
use crate::label::clock::{day_and_second, local_minute, machine, offsets, second};
use crate::label::one_line;
use crate::label::words::{event_key, limit_key, spoken, state_key};
use crate::light::State;
use crate::sky::{YearEvent, YearMoment};
use crate::units::Angle;
use crate::{PlaceDay, SunBrief};
use serde::Serialize;

const WIDTH: usize = 96;

/// The Sun's quantities as text.
pub fn sun_text(brief: &SunBrief) -> String {
    let almanac = &brief.almanac;
    let sun = &almanac.sun;
    let subsolar = sun.subsolar();
    let rows = [
        [
            "declination",
            &sexagesimal(sun.declination(), ['N', 'S']),
            &format!("{:+.5}°", sun.declination().deg()),
        ],
        ["Greenwich hour angle", &dms(sun.gha()), &format!("{:.5}°", sun.gha().deg())],
        ["right ascension", &hms(almanac.right_ascension), &format!("{:.5}°", almanac.right_ascension.deg())],
        ["equation of time", &minutes_seconds(almanac.equation_of_time_s), "apparent less mean"],
        ["distance", &format!("{:.7} au", sun.distance_au), ""],
        ["semidiameter", &dms(sun.semidiameter()), ""],
        [
            "overhead at",
            &sexagesimal(subsolar.lat.angle(), ['N', 'S']),
            &sexagesimal(subsolar.lon.angle(), ['E', 'W']),
        ],
        ["true obliquity", &dms(almanac.true_obliquity), &format!("{:.5}°", almanac.true_obliquity.deg())],
        ["apparent longitude", &dms(almanac.ecliptic_longitude), ""],
    ]
    .map(|row| row.map(str::to_string));
    let here = brief.here.as_ref().map_or(String::new(), |day| format!("\n{}", day_text(day)));
    let cautions: String = cautions(brief).iter().map(|caution| wrapped("  - ", caution, WIDTH)).collect();
    format!(
        "Sun   {} UTC {}\n{}{here}\nCautions\n{cautions}",
        day_and_second(brief.instant),
        brief.instant.utc().format("%Y"),
        columns(&rows)
    )
}

fn cautions(brief: &SunBrief) -> Vec<String> {
    let ut1 = super::caution::ut1(brief.dut1_s);
    if brief.here.is_none() {
        vec![ut1]
    } else {
        super::caution::general().into_iter().chain([ut1]).collect()
    }
}

fn day_text(day: &PlaceDay) -> String {
    let name = day.stop.name.as_deref().map_or(String::new(), |name| format!(" ({})", one_line(name)));
    let clock = day.stop.zone.map_or("local mean time".to_string(), |zone| {
        // the day's end belongs to the next one
        offsets(day.begin, day.begin.after_s(day.seconds - 1.0), zone)
    });
    let mut out = format!("{}{name}   {}, {clock}\n", day.stop.label, day.date.format("%-d %b %Y"));
    let now = [[
        "Sun now".to_string(),
        format!("{:+.4}° geometric", day.now.elevation.0.deg()),
        format!("bearing {:.3}° true", day.now.azimuth.deg()),
        spoken(state_key(day.now.state)),
    ]];
    out.push_str(&columns(&now));
    out.push_str(&columns(&event_rows(day)));
    if let Some(said) = polar(day) {
        out.push_str(&wrapped("  ", said, WIDTH));
    }
    out
}

/// Crossings, touches and the extremes, in order of time.
fn event_rows(day: &PlaceDay) -> Vec<[String; 4]> {
    let mut rows: Vec<(f64, String, String)> = Vec::new();
    let light = &day.light;
    rows.extend(
        light
            .crossings
            .iter()
            .map(|c| (c.at_s, spoken(event_key(c.limit.event(c.direction))), String::new())),
    );
    rows.extend(light.touches.iter().map(|t| {
        (t.at_s, format!("touches the {} limit", limit_key(t.limit)), format!("by {:.2}″", t.margin.arcsec()))
    }));
    for (what, sample) in [("highest Sun", &day.highest), ("lowest Sun", &day.lowest)] {
        rows.push((
            sample.at_s,
            what.to_string(),
            format!("{:+.2}° at {:.0}°", sample.elevation.0.deg(), sample.azimuth.deg()),
        ));
    }
    rows.sort_by(|a, b| a.0.total_cmp(&b.0));
    let line = |(at_s, what, more): (f64, String, String)| {
        let at = day.begin.after_s(at_s);
        let local = day.stop.zone.map_or(String::new(), |zone| local_minute(at, zone));
        [what, format!("{} UTC", second(at)), local, more]
    };
    rows.into_iter().map(line).collect()
}

/// What a day without sunrise or sunset is called, if it is one.
fn polar(day: &PlaceDay) -> Option<&'static str> {
    let states: Vec<State> = day.light.segments.iter().map(|s| s.state).collect();
    if states == [State::Daylight] {
        return Some("polar day: the Sun does not set on this date");
    }
    (!states.contains(&State::Daylight)).then_some("polar night: the Sun does not rise on this date")
}

/// A place's day or an instant's Sun for machines.
#[derive(Debug, Serialize)]
pub struct SunReport {
    utc: String,
    declination_deg: f64,
    gha_deg: f64,
    right_ascension_deg: f64,
    equation_of_time_s: f64,
    distance_au: f64,
    semidiameter_deg: f64,
    subsolar_lat_deg: f64,
    subsolar_lon_deg: f64,
    true_obliquity_deg: f64,
    apparent_longitude_deg: f64,
    ut1_minus_utc_s: f64,
    #[serde(skip_serializing_if = "Option::is_none")]
    here: Option<HereRecord>,
    cautions: Vec<String>,
}

#[derive(Debug, Serialize)]
struct HereRecord {
    place: String,
    lat_deg: f64,
    lon_deg: f64,
    elevation_deg: f64,
    azimuth_deg: f64,
    state: &'static str,
    date: String,
    begins_utc: String,
    seconds: f64,
    events: Vec<EventRecord>,
    touches: Vec<TouchedRecord>,
    highest: HeightRecord,
    lowest: HeightRecord,
    polar_day: bool,
    polar_night: bool,
}

#[derive(Debug, Serialize)]
struct EventRecord {
    utc: String,
    event: &'static str,
}

#[derive(Debug, Serialize)]
struct TouchedRecord {
    utc: String,
    limit: &'static str,
    margin_deg: f64,
}

#[derive(Debug, Serialize)]
struct HeightRecord {
    utc: String,
    elevation_deg: f64,
    azimuth_deg: f64,
}

/// The Sun's quantities as a JSON object.
///
/// # Errors
/// None that a brief can cause.
pub fn sun_json(brief: &SunBrief) -> Result<String, serde_json::Error> {
    Ok(serde_json::to_string_pretty(&SunReport::of(brief))? + "\n")
}

impl SunReport {
    fn of(brief: &SunBrief) -> Self {
        let (almanac, sun) = (&brief.almanac, &brief.almanac.sun);
        let subsolar = sun.subsolar();
        Self {
            utc: machine(brief.instant),
            declination_deg: rounded(sun.declination().deg(), 7),
            gha_deg: rounded(sun.gha().deg(), 7),
            right_ascension_deg: rounded(almanac.right_ascension.deg(), 7),
            equation_of_time_s: rounded(almanac.equation_of_time_s, 3),
            distance_au: rounded(sun.distance_au, 9),
            semidiameter_deg: rounded(sun.semidiameter().deg(), 7),
            subsolar_lat_deg: rounded(subsolar.lat.deg(), 5),
            subsolar_lon_deg: rounded(subsolar.lon.deg(), 5),
            true_obliquity_deg: rounded(almanac.true_obliquity.deg(), 7),
            apparent_longitude_deg: rounded(almanac.ecliptic_longitude.deg(), 7),
            ut1_minus_utc_s: brief.dut1_s,
            here: brief.here.as_ref().map(HereRecord::of),
            cautions: cautions(brief),
        }
    }
}

impl HereRecord {
    fn of(day: &PlaceDay) -> Self {
        let at = |at_s: f64| machine(day.begin.after_s(at_s));
        let height = |sample: &crate::light::Sample| HeightRecord {
            utc: at(sample.at_s),
            elevation_deg: rounded(sample.elevation.0.deg(), 5),
            azimuth_deg: rounded(sample.azimuth.deg(), 3),
        };
        let event = |c: &crate::light::Crossing| EventRecord {
            utc: at(c.at_s),
            event: event_key(c.limit.event(c.direction)),
        };
        let touch = |t: &crate::light::Touch| TouchedRecord {
            utc: at(t.at_s),
            limit: limit_key(t.limit),
            margin_deg: rounded(t.margin.deg(), 7),
        };
        let by_day = |wanted: &str| polar(day).is_some_and(|said| said.starts_with(wanted));
        Self {
            place: day.stop.label.clone(),
            lat_deg: rounded(day.stop.place.lat.deg(), 5),
            lon_deg: rounded(day.stop.place.lon.deg(), 5),
            elevation_deg: rounded(day.now.elevation.0.deg(), 7),
            azimuth_deg: rounded(day.now.azimuth.deg(), 7),
            state: state_key(day.now.state),
            date: day.date.to_string(),
            begins_utc: machine(day.begin),
            seconds: rounded(day.seconds, 3),
            events: day.light.crossings.iter().map(event).collect(),
            touches: day.light.touches.iter().map(touch).collect(),
            highest: height(&day.highest),
            lowest: height(&day.lowest),
            polar_day: by_day("polar day"),
            polar_night: by_day("polar night"),
        }
    }
}

fn year_event_key(event: YearEvent) -> &'static str {
    match event {
        YearEvent::Perihelion => "perihelion",
        YearEvent::MarchEquinox => "march_equinox",
        YearEvent::JuneSolstice => "june_solstice",
        YearEvent::Aphelion => "aphelion",
        YearEvent::SeptemberEquinox => "september_equinox",
        YearEvent::DecemberSolstice => "december_solstice",
    }
}

/// A year's moments as text, with where the Sun is overhead at each.
pub fn year_text(year: i32, moments: &[(YearMoment, SunBrief)]) -> String {
    let row = |(moment, brief): &(YearMoment, SunBrief)| {
        let below = brief.almanac.sun.subsolar();
        [
            spoken(year_event_key(moment.event)),
            day_and_second(moment.instant),
            format!(
                "overhead {} {}",
                sexagesimal(below.lat.angle(), ['N', 'S']),
                sexagesimal(below.lon.angle(), ['E', 'W'])
            ),
            format!("{:.7} au", moment.distance_au()),
        ]
    };
    let note = "equinoxes and solstices are apparent longitudes of 0°, 90°, 180° and 270°, good to a second; the distance \
                is so flat at its extremes that the instants of perihelion and aphelion are good to three minutes";
    format!(
        "The Sun's year {year}, UTC\n{}\n{}",
        columns(&moments.iter().map(row).collect::<Vec<_>>()),
        wrapped("  - ", note, WIDTH)
    )
}

#[derive(Debug, Serialize)]
struct MomentRecord {
    event: &'static str,
    utc: String,
    subsolar_lat_deg: f64,
    subsolar_lon_deg: f64,
    distance_au: f64,
}

/// A year's moments as a JSON array.
///
/// # Errors
/// None that a year can cause.
pub fn year_json(moments: &[(YearMoment, SunBrief)]) -> Result<String, serde_json::Error> {
    let record = |(moment, brief): &(YearMoment, SunBrief)| {
        let below = brief.almanac.sun.subsolar();
        MomentRecord {
            event: year_event_key(moment.event),
            utc: machine(moment.instant),
            subsolar_lat_deg: rounded(below.lat.deg(), 5),
            subsolar_lon_deg: rounded(below.lon.deg(), 5),
            distance_au: rounded(moment.distance_au(), 9),
        }
    };
    Ok(serde_json::to_string_pretty(&moments.iter().map(record).collect::<Vec<_>>())? + "\n")
}

/// Degrees, minutes and tenths of seconds.
fn dms(angle: Angle) -> String {
    let tenths = (angle.deg().abs() * 36_000.0).round() as i64;
    format!("{}°{:02}′{:02}.{}″", tenths / 36_000, tenths / 600 % 60, tenths / 10 % 60, tenths % 10)
}

fn sexagesimal(angle: Angle, letters: [char; 2]) -> String {
    format!("{}{}", dms(angle), letters[usize::from(angle.deg() < 0.0)])
}

/// Hours, minutes and hundredths of seconds, a turn being 24 hours.
fn hms(angle: Angle) -> String {
    let hundredths = (angle.deg() * 24_000.0).round() as i64;
    format!(
        "{:02}h{:02}m{:02}.{:02}s",
        hundredths / 360_000,
        hundredths / 6000 % 60,
        hundredths / 100 % 60,
        hundredths % 100
    )
}

fn minutes_seconds(seconds: f64) -> String {
    let tenths = (seconds.abs() * 10.0).round() as i64;
    let sign = if seconds < 0.0 { '−' } else { '+' };
    format!("{sign}{}m{:02}.{}s", tenths / 600, tenths / 10 % 60, tenths % 10)
}
