//! What can be wrong with a flight as it was given, where it stands, and the cure.

use super::brightness::BrightnessError;
use super::draft::Origin;
use super::near::near_field;
use super::track::TrackProblem;
use crate::places::UnknownAerodrome;
use crate::units::{Dut1Error, PlaceError, YEARS};

/// What was given is quoted up to this length.
const LONGEST_QUOTED: usize = 40;

/// A value, or what is wrong with it and where that stands.
pub(super) type Stands<T> = Result<T, (Origin, Problem)>;

/// Something is wrong with a flight as it was given.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[error("{source_name}{origin}: {problem}")]
pub struct IntakeError {
    /// The file's name, or nothing for a flight given on the command line.
    pub source_name: String,
    /// Where in it.
    pub origin: Origin,
    /// What.
    pub problem: Problem,
}

impl IntakeError {
    /// How to mend it, where that is known.
    pub fn hint(&self) -> Option<String> {
        self.problem.hint()
    }
}

/// What is wrong.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum Problem {
    /// Not TOML.
    #[error("cannot be read as TOML: {0}")]
    Toml(String),
    /// Nothing in it.
    #[error("the file is empty")]
    Empty,
    /// Not text.
    #[error("the file is not UTF-8 text (byte {0})")]
    NotText(usize),
    /// A field that is not known.
    #[error("unknown field {}", quoted(.0))]
    UnknownField(String),
    /// A field that must be there.
    #[error("the field '{0}' is missing")]
    MissingField(&'static str),
    /// A field of the wrong kind.
    #[error("'{field}' is {found}, but must be {wanted}")]
    WrongType {
        /// The field.
        field: &'static str,
        /// What stands there.
        found: String,
        /// What should.
        wanted: &'static str,
    },
    /// A place that does not exist.
    #[error(transparent)]
    Place(#[from] PlaceError),
    /// A UT1 − UTC that cannot be.
    #[error(transparent)]
    Dut1(#[from] Dut1Error),
    /// A level or share of light that cannot be.
    #[error(transparent)]
    Brightness(#[from] BrightnessError),
    /// A name that stands for several fixes, with nothing before it to be near to.
    #[error("{} names {count} fixes, and no point before it tells which", quoted(name))]
    SeveralFixes {
        /// As given.
        name: String,
        /// How many there are.
        count: usize,
    },
    /// A line that is too long, or not UTF-8.
    #[error("the line is not UTF-8 text of ordinary length")]
    NotALine,
    /// A row of fixes that lacks something.
    #[error("{} is no fix: name, latitude and longitude are wanted", quoted(.0))]
    NoFix(String),
    /// A fix's name that is too long or not printable.
    #[error("{} is no name of a fix", quoted(.0))]
    FixName(String),
    /// A fix's latitude or longitude that is no number.
    #[error("{} is no number of degrees", quoted(.0))]
    FixNumber(String),
    /// Latitude and longitude exchanged.
    #[error("latitude {lat}° is outside −90° to 90°; with longitude {lon}° they look exchanged")]
    Swapped {
        /// As given.
        lat: f64,
        /// As given.
        lon: f64,
    },
    /// More fixes than are held.
    #[error("more than {most} fixes")]
    TooManyFixes {
        /// How many there may be.
        most: usize,
    },
    /// A route without points.
    #[error("the route names no point")]
    EmptyRoute,
    /// Two fields of which only one may be given.
    #[error("'{one}' and '{other}' are both given")]
    Exclusive {
        /// One.
        one: &'static str,
        /// The other.
        other: &'static str,
    },
    /// More points than a profile holds.
    #[error("{count} profile points are more than the {most} that a flight file may have")]
    LongProfile {
        /// How many there are.
        count: usize,
        /// How many there may be.
        most: usize,
    },
    /// A profile that goes back.
    #[error("profile point {number} does not lie after the one before it")]
    ProfileOrder {
        /// Counted from 1.
        number: usize,
    },
    /// A profile that gives speeds, but none for its beginning.
    #[error("the profile gives a speed from here on, but none from take-off")]
    NoFirstSpeed,
    /// A wind without an airspeed.
    #[error("a wind stands without 'true_airspeed_kt'")]
    WindAlone,
    /// A headwind that no speed is left of.
    #[error("airspeed and wind leave a ground speed of {speed_kt:.0} kt, below 10 kt")]
    NoHeadway {
        /// Knots.
        speed_kt: f64,
    },
    /// A waypoint's time beside speeds.
    #[error("waypoint {number} ({label}) has a time, though speeds tell when it is passed")]
    TimeAndSpeed {
        /// Counted from 1.
        number: usize,
        /// As given.
        label: String,
    },
    /// Off blocks after take-off.
    #[error("off blocks at {off} is after the take-off at {takeoff}")]
    OffBlockLate {
        /// RFC 3339.
        off: String,
        /// RFC 3339.
        takeoff: String,
    },
    /// On blocks before landing.
    #[error("on blocks at {on} is before the landing at {landing}")]
    OnBlockEarly {
        /// RFC 3339.
        on: String,
        /// RFC 3339.
        landing: String,
    },
    /// A taxi longer than any.
    #[error("{hours:.1} h between blocks and runway is outside 0 h to {longest} h")]
    LongTaxi {
        /// Hours.
        hours: f64,
        /// The longest that is taken.
        longest: f64,
    },
    /// A code that is not known.
    #[error(transparent)]
    UnknownAerodrome(UnknownAerodrome),
    /// A name that is neither a code nor a fix.
    #[error("{0}, and no fix that name")]
    UnknownName(UnknownAerodrome),
    /// Coordinates that cannot be read.
    #[error("{} is no coordinate pair", quoted(.0))]
    Coordinates(String),
    /// A time that cannot be read.
    #[error("{} is no date and time", quoted(.0))]
    Instant(String),
    /// A date that cannot be read, or that no calendar has.
    #[error("{} is no date", quoted(.0))]
    Date(String),
    /// A time without an offset.
    #[error("{} says no offset from UTC", quoted(.0))]
    NoOffset(String),
    /// A time outside the years served.
    #[error("{} is outside the years {first} to {last}", quoted(given), first = YEARS.start(), last = YEARS.end())]
    Years {
        /// As given.
        given: String,
    },
    /// A duration that cannot be read.
    #[error("{} is no duration", quoted(.0))]
    Duration(String),
    /// Neither or both of two fields.
    #[error("{0}")]
    Landing(&'static str),
    /// Both given, and they disagree.
    #[error("'airborne' puts the landing at {by_airborne}, 'landing' at {by_landing}")]
    LandingConflict {
        /// RFC 3339.
        by_airborne: String,
        /// RFC 3339.
        by_landing: String,
    },
    /// The flight ends before it begins.
    #[error("the landing at {landing} is not after the take-off at {takeoff}")]
    LandingFirst {
        /// RFC 3339.
        takeoff: String,
        /// RFC 3339.
        landing: String,
    },
    /// A flight longer than any.
    #[error("{hours:.1} h in the air is outside 0 h to {longest} h")]
    TooLong {
        /// Hours in the air.
        hours: f64,
        /// The longest that is taken.
        longest: f64,
    },
    /// Waypoint times that do not rise.
    #[error("waypoint {number} ({label}) at {time} is not after {before}")]
    OutOfOrder {
        /// Counted from 1.
        number: usize,
        /// As given.
        label: String,
        /// RFC 3339.
        time: String,
        /// What it must follow.
        before: String,
    },
    /// A waypoint after the landing.
    #[error("waypoint {number} ({label}) at {time} is not before the landing at {landing}")]
    AfterLanding {
        /// Counted from 1.
        number: usize,
        /// As given.
        label: String,
        /// RFC 3339.
        time: String,
        /// RFC 3339.
        landing: String,
    },
    /// Too many waypoints.
    #[error("{count} waypoints are more than the {most} that a flight file may have")]
    TooManyWaypoints {
        /// How many there are.
        count: usize,
        /// How many there may be.
        most: usize,
    },
    /// A level no aircraft flies at.
    #[error("a level of {0} ft is outside 0 ft to 60000 ft")]
    Level(f64),
    /// A rate no aircraft climbs at.
    #[error("a rate of {0} ft/min is outside 50 ft/min to 20000 ft/min")]
    ClimbRate(f64),
    /// One rate without the other, or without a level.
    #[error("a rate of climb or descent stands alone")]
    HalfAClimb,
    /// A recorded track that cannot be read.
    #[error(transparent)]
    Track(#[from] TrackProblem),
    /// A horizon no cloud or mountain makes.
    #[error("a horizon at {0} ft is outside 0 ft to 36000 ft")]
    Horizon(f64),
    /// A number outside what it may be.
    #[error("'{field}' of {given} is outside {low} to {high}")]
    OutOfRange {
        /// The field.
        field: &'static str,
        /// As given.
        given: f64,
        /// The least.
        low: f64,
        /// The most.
        high: f64,
    },
    /// Too many alternates.
    #[error("{count} alternates are more than the {most} that a flight file may have")]
    TooManyAlternates {
        /// How many there are.
        count: usize,
        /// How many there may be.
        most: usize,
    },
    /// An alternate reached long after it was abeam.
    #[error("'after' of {hours:.1} h is outside 0 h to {longest} h")]
    AfterTooLong {
        /// As given.
        hours: f64,
        /// The longest that is taken.
        longest: f64,
    },
}

/// A text as given, in quotes, cut short, with everything escaped that could act on a terminal.
pub(super) fn quoted(given: &str) -> String {
    format!("'{}'", escaped(given, LONGEST_QUOTED))
}

/// A text cut to a number of letters, with everything escaped that could act on a terminal.
pub(super) fn escaped(given: &str, longest: usize) -> String {
    let mut text = String::new();
    for c in given.chars().take(longest) {
        if matches!(c, '\'' | '"') {
            text.push(c);
        } else {
            text.extend(c.escape_debug());
        }
    }
    if given.chars().nth(longest).is_some() {
        text.push('…');
    }
    text
}

impl Problem {
    fn hint(&self) -> Option<String> {
        let text = match self {
            Self::UnknownAerodrome(unknown) | Self::UnknownName(unknown) => {
                return unknown_place_hint(unknown);
            }
            Self::Track(problem) => return problem.hint(),
            Self::Coordinates(_) => {
                "write 7830N02000W, 78N020W, 78-30N 020-00W or 78.5,-20: two digits for degrees of latitude, three for longitude"
            }
            Self::Instant(_) | Self::NoOffset(_) => {
                "write 2026-12-18T05:10Z, or 2026-12-18T00:10-05:00 with an offset"
            }
            Self::Date(_) => "write 2026-12-18",
            Self::Duration(_) => "write 14h55m, 14h or 55m",
            Self::NotText(_) => "a flight file is TOML in UTF-8: save it as UTF-8, not as UTF-16",
            Self::Empty => "a flight file needs at least from, to, takeoff, and airborne or landing",
            Self::UnknownField(field) => return near_field(field),
            Self::Landing(_) => "give one of airborne = \"14h55m\" and landing = 2026-12-18T20:05:00Z",
            Self::HalfAClimb => "give level_ft, climb_ft_min and descent_ft_min together",
            Self::NoFirstSpeed => {
                "give ground_speed_kt for the whole flight too, or a point with at = \"0m\""
            }
            Self::WindAlone => "give true_airspeed_kt; a ground speed has its wind in it",
            Self::TimeAndSpeed { .. } => "leave the time out, or the speeds",
            Self::SeveralFixes { .. } => "give its coordinates instead",
            Self::NotALine => "save the file as UTF-8, not as UTF-16",
            Self::FixNumber(_) => "write decimal degrees, such as 78.5 and -20",
            Self::Swapped { .. } => "a row without a header is name, latitude, longitude",
            Self::EmptyRoute => "write points parted by blanks: \"7030N06000W 78N040W CYFB\"",
            Self::Exclusive { .. } | Self::LandingConflict { .. } => "leave one of them out",
            _ => return None,
        };
        Some(text.to_string())
    }
}

/// Near codes, or how coordinates are written for a text that looks like them.
fn unknown_place_hint(unknown: &UnknownAerodrome) -> Option<String> {
    if unknown.code().bytes().any(|b| b.is_ascii_digit()) {
        return Some("coordinates begin with digits: 7830N02000W, 78N020W or 78.5,-20".to_string());
    }
    unknown.hint()
}
