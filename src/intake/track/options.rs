//! How a recording is to be read, where it does not say so itself.

use super::super::draft::Origin;
use super::super::problem::IntakeError;
use super::TrackProblem;
use crate::units::Metres;
use chrono::NaiveDate;

/// The fastest that a point may be reached from the one before it: beyond any aircraft and any jet stream in this use,
/// and below the 2,000 kt at which a path is refused.
const FASTEST_KT: f64 = 1_500.0;
/// The longest silence that is not marked as bridged.
const LONGEST_SILENCE_S: f64 = 600.0;

/// How a recording is to be read.
#[derive(Debug, Clone, PartialEq)]
pub struct TrackOptions {
    /// Which columns of a CSV mean what.
    pub columns: Columns,
    /// The day (UTC) of the first point, where points have a time of day only.
    pub date: Option<NaiveDate>,
    /// A point that needs more than this from its predecessor is dropped.
    pub max_speed_kt: f64,
    /// A silence longer than this is marked as bridged.
    pub gap_s: f64,
    /// Whether latitude and longitude are exchanged in the recording.
    pub swap_lat_lon: bool,
}

impl Default for TrackOptions {
    fn default() -> Self {
        Self {
            columns: Columns::default(),
            date: None,
            max_speed_kt: FASTEST_KT,
            gap_s: LONGEST_SILENCE_S,
            swap_lat_lon: false,
        }
    }
}

/// The unit a column of heights counts in.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum HeightUnit {
    Metre,
    Foot,
    /// Hundreds of feet.
    FlightLevel,
}

impl HeightUnit {
    /// The unit that a word of a header names.
    pub(super) fn of_word(word: &str) -> Option<Self> {
        match word {
            "m" | "metre" | "metres" | "meter" | "meters" => Some(Self::Metre),
            "ft" | "feet" | "foot" => Some(Self::Foot),
            "fl" => Some(Self::FlightLevel),
            _ => None,
        }
    }

    /// One of the unit.
    pub(super) fn metres(self) -> f64 {
        match self {
            Self::Metre => 1.0,
            Self::Foot => Metres::from_feet(1.0).0,
            Self::FlightLevel => Metres::from_feet(100.0).0,
        }
    }
}

/// Which columns of a CSV mean what; those not named are recognised by their headers.
#[derive(Debug, Clone, Default, PartialEq)]
pub struct Columns {
    pub(super) time: Option<String>,
    pub(super) date: Option<String>,
    pub(super) lat: Option<String>,
    pub(super) lon: Option<String>,
    pub(super) height: Option<(String, Option<HeightUnit>)>,
    pub(super) flight: Option<String>,
}

impl Columns {
    /// Reads `time=NAME,date=NAME,lat=NAME,lon=NAME,height=NAME:ft,flight=NAME`, any of them in any order; `#2` is the
    /// second column.
    ///
    /// # Errors
    /// Anything else; `option` says where it was given.
    pub fn parse(text: &str, option: &'static str) -> Result<Self, IntakeError> {
        Self::read(text).ok_or_else(|| IntakeError {
            source_name: String::new(),
            origin: Origin::Option(option),
            problem: TrackProblem::Mapping(text.to_string()).into(),
        })
    }

    fn read(text: &str) -> Option<Self> {
        let mut columns = Self::default();
        for pair in text.split(',') {
            let (meaning, name) = pair.split_once('=')?;
            let name = name.trim();
            if name.is_empty() {
                return None;
            }
            if meaning.trim() == "height" {
                columns.height = Some(height(name));
                continue;
            }
            *columns.slot(meaning.trim())? = Some(name.to_string());
        }
        Some(columns)
    }

    fn slot(&mut self, meaning: &str) -> Option<&mut Option<String>> {
        Some(match meaning {
            "time" => &mut self.time,
            "date" => &mut self.date,
            "lat" => &mut self.lat,
            "lon" => &mut self.lon,
            "flight" => &mut self.flight,
            _ => return None,
        })
    }
}

/// `altitude:ft` as a name and a unit.
fn height(name: &str) -> (String, Option<HeightUnit>) {
    let split = name.rsplit_once(':');
    let known = split.and_then(|(name, unit)| Some((name, HeightUnit::of_word(unit)?)));
    known.map_or((name.to_string(), None), |(name, unit)| (name.to_string(), Some(unit)))
}

#[cfg(test)]
mod tests {
    use super::{Columns, HeightUnit};

    #[test]
    fn a_mapping_names_columns_and_their_unit() {
        let columns = Columns::parse("time=When, lat=#2,lon=x,height=Alt:ft", "--columns").unwrap();
        assert_eq!(columns.time.as_deref(), Some("When"));
        assert_eq!(columns.lat.as_deref(), Some("#2"));
        assert_eq!(columns.height, Some(("Alt".into(), Some(HeightUnit::Foot))));
        assert_eq!(columns.flight, None);
    }

    #[test]
    fn what_is_no_mapping_is_refused_with_its_cure() {
        for text in ["", "time", "time=", "speed=x", "time=a,,lat=b"] {
            let error = Columns::parse(text, "--columns").unwrap_err();
            assert_eq!(error.to_string(), format!("--columns: '{text}' is no mapping of columns"));
            assert!(error.hint().unwrap().contains("lat=NAME"));
        }
    }
}
