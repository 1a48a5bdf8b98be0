//! What can be asked for, as typed arguments.

use clap::{Args, Parser, Subcommand, ValueEnum};
use std::path::PathBuf;

/// The light a flight meets: daylight, twilight and darkness along its route.
#[derive(Debug, Parser)]
#[command(name = "gloamline", version, about, max_term_width = 100)]
pub(super) struct Arguments {
    #[command(subcommand)]
    pub(super) command: Command,
}

#[derive(Debug, Subcommand)]
pub(super) enum Command {
    /// Brief flights: states, sunrises and sunsets, twilights and circles along the route
    Brief(Box<BriefRequest>),
    /// The Sun's almanac quantities at an instant, a place's day, or a year's equinoxes and solstices
    Sun(SunRequest),
    /// A place's civil days: sunrise, sunset, twilights, transit, polar day and night, the Moon
    Aerodrome(AerodromeRequest),
}

/// The form of what goes to standard output.
#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub(super) enum Form {
    /// For people
    Text,
    /// For machines: one object, or an array of several
    Json,
    /// One row a minute
    Csv,
}

#[derive(Debug, Args)]
#[command(after_help = "Times are RFC 3339 with an offset or Z; the seconds may be left out.\n\
    Exit codes: 0 all done, 1 some flights refused, 2 nothing done.")]
pub(super) struct BriefRequest {
    /// Flight files (TOML) or recordings (CSV, GPX, GeoJSON, KML), also in gzip; - reads one from standard input
    #[arg(value_name = "FLIGHT", required_unless_present = "from")]
    pub(super) files: Vec<PathBuf>,

    /// Your own points (CSV: name, lat, lon), for names in flights that are neither codes nor coordinates
    #[arg(long, value_name = "FIXES.csv")]
    pub(super) fixes: Option<PathBuf>,

    /// What goes to standard output
    #[arg(long = "as", value_enum, default_value_t = Form::Text, value_name = "FORM")]
    pub(super) form: Form,

    /// Write NAME.txt, .json, .csv, .png, .svg, .geojson and .kml for each flight into this folder
    #[arg(long, value_name = "DIR")]
    pub(super) out: Option<PathBuf>,

    /// What the columns of recorded CSV mean, such as time=STAMP,lat=Y,lon=X,height=ALT:ft,flight=ID
    #[arg(long, value_name = "MEANING=NAME,…")]
    pub(super) columns: Option<String>,

    /// The day (UTC) of a recording that has times of day only, such as 2026-12-18
    #[arg(long, value_name = "DATE")]
    pub(super) recorded_on: Option<String>,

    /// Take a recording's latitudes for longitudes and its longitudes for latitudes
    #[arg(long)]
    pub(super) swap_lat_lon: bool,

    /// UT1 − UTC in seconds, for flight files that do not give it
    #[arg(long, value_name = "SECONDS", default_value_t = 0.0, allow_hyphen_values = true)]
    pub(super) dut1_s: f64,

    /// Latitude in degrees north at which the North Polar Area begins [default: 78]
    #[arg(long, value_name = "DEGREES")]
    pub(super) north_polar_area: Option<f64>,

    /// Latitude in degrees south at which the South Polar Area begins [default: 60]
    #[arg(long, value_name = "DEGREES")]
    pub(super) south_polar_area: Option<f64>,

    /// Levels of brightness in lux to count the time above, for flight files that give none [default: 1,10,100,1000,10000]
    #[arg(long, value_name = "LUX,...", value_delimiter = ',', allow_hyphen_values = true)]
    pub(super) lux_levels: Option<Vec<f64>>,

    #[command(flatten)]
    pub(super) inline: InlineRequest,
}

#[derive(Debug, Args)]
#[command(next_help_heading = "A flight without a file")]
pub(super) struct InlineRequest {
    /// Aerodrome code or coordinates of the take-off: CYYZ, YYZ, 7830N02000W or 43.68,-79.63
    #[arg(long, value_name = "PLACE", requires_all = ["to", "takeoff"], conflicts_with = "files", allow_hyphen_values = true)]
    pub(super) from: Option<String>,

    /// Aerodrome code or coordinates of the landing
    #[arg(long, value_name = "PLACE", requires = "from", allow_hyphen_values = true)]
    pub(super) to: Option<String>,

    /// Points between, parted by blanks: "7030N06000W 78N040W CYFB"
    #[arg(long, value_name = "POINTS", requires = "from", allow_hyphen_values = true)]
    pub(super) route: Option<String>,

    /// Take-off time, such as 2026-12-18T05:10Z
    #[arg(long, value_name = "TIME", requires = "from")]
    pub(super) takeoff: Option<String>,

    /// Time in the air, such as 14h55m
    #[arg(long, value_name = "DURATION", requires = "from")]
    pub(super) airborne: Option<String>,

    /// Landing time, instead of the time in the air
    #[arg(long, value_name = "TIME", requires = "from")]
    pub(super) landing: Option<String>,

    /// Ground speed in knots, instead of the time in the air and the landing
    #[arg(long, value_name = "KNOTS", requires = "from", allow_hyphen_values = true)]
    pub(super) ground_speed_kt: Option<f64>,

    /// Cruise height in feet
    #[arg(long, value_name = "FEET", requires = "from", allow_hyphen_values = true)]
    pub(super) level_ft: Option<f64>,

    /// Rate of climb to the cruise height in feet a minute; without it the height holds from take-off to landing
    #[arg(long, value_name = "FT/MIN", requires = "from", allow_hyphen_values = true)]
    pub(super) climb_ft_min: Option<f64>,

    /// Rate of descent in feet a minute
    #[arg(long, value_name = "FT/MIN", requires = "from", allow_hyphen_values = true)]
    pub(super) descent_ft_min: Option<f64>,

    /// Height in feet of the cloud tops or terrain at the flight deck's horizon, if not the sea
    #[arg(long, value_name = "FEET", requires = "from", allow_hyphen_values = true)]
    pub(super) horizon_ft: Option<f64>,

    /// What the flight is called
    #[arg(long, value_name = "NAME", requires = "from")]
    pub(super) name: Option<String>,
}

#[derive(Debug, Args)]
pub(super) struct SunRequest {
    /// The instant, such as 2026-12-18T05:10Z
    #[arg(required_unless_present = "year")]
    pub(super) time: Option<String>,

    /// A place whose day is wanted: aerodrome code or coordinates
    #[arg(allow_hyphen_values = true, requires = "time")]
    pub(super) place: Option<String>,

    /// List this year's equinoxes, solstices, perihelion and aphelion
    #[arg(long, value_name = "YEAR", conflicts_with = "time", allow_hyphen_values = true)]
    pub(super) year: Option<i32>,

    /// What goes to standard output: text or json
    #[arg(long = "as", value_parser = ["text", "json"], default_value = "text", value_name = "FORM")]
    pub(super) form: String,

    /// UT1 − UTC in seconds
    #[arg(long, value_name = "SECONDS", default_value_t = 0.0, allow_hyphen_values = true)]
    pub(super) dut1_s: f64,
}

#[derive(Debug, Args)]
#[command(
    after_help = "Days are those of the place's own clock: its zone's, or local mean time where no zone is known."
)]
pub(super) struct AerodromeRequest {
    /// Aerodrome code or coordinates: ENTC, TOS, 7830N02000W or 43.68,-79.63
    #[arg(value_name = "CODE", allow_hyphen_values = true)]
    pub(super) place: String,

    /// The date, or the first of several
    #[arg(long, value_name = "DATE")]
    pub(super) on: String,

    /// The last date, up to 400 days in all
    #[arg(long, value_name = "DATE")]
    pub(super) to: Option<String>,

    /// What goes to standard output: text, json (one object) or csv (one row a date)
    #[arg(long = "as", value_parser = ["text", "json", "csv"], default_value = "text", value_name = "FORM")]
    pub(super) form: String,

    /// Write PLACE-DATES.txt, .json, .csv, .png and .svg into this folder
    #[arg(long, value_name = "DIR")]
    pub(super) out: Option<PathBuf>,

    /// UT1 − UTC in seconds
    #[arg(long, value_name = "SECONDS", default_value_t = 0.0, allow_hyphen_values = true)]
    pub(super) dut1_s: f64,
}
