//! A place as people write it: coordinates in the notations of the trade, decimal degrees, or an aerodrome's code.

mod coordinates;
mod five;

use super::problem::{Problem, quoted};
use crate::places::{Aerodrome, aerodrome};
use crate::units::Place;
use coordinates::lettered;
use five::five_characters;

/// A place with what it was given as.
#[derive(Debug, Clone)]
pub(super) struct Named {
    pub(super) label: String,
    pub(super) place: Place,
    pub(super) aerodrome: Option<Aerodrome>,
    /// What its reader should know of how it was taken.
    pub(super) warning: Option<String>,
}

impl Named {
    /// A place that is no aerodrome.
    pub(super) fn at(label: String, place: Place) -> Self {
        Self { label, place, aerodrome: None, warning: None }
    }
}

/// Reads a place: an aerodrome's ICAO or IATA code, coordinates with hemisphere letters, or `lat,lon` in decimal degrees.
pub(super) fn place(text: &str) -> Result<Named, Problem> {
    let text = text.trim();
    if looks_like_coordinates(text) {
        return coordinates(text);
    }
    let found = aerodrome(text).map_err(Problem::UnknownAerodrome)?;
    Ok(Named { label: found.code().to_string(), place: found.place(), aerodrome: Some(found), warning: None })
}

/// Whether several words make one point: a latitude and a longitude with a blank between.
pub(super) fn is_coordinates(text: &str) -> bool {
    // a name that is no coordinates costs one look at its first letter
    if !looks_like_coordinates(text) {
        return false;
    }
    let words: String = text.split_whitespace().collect::<Vec<_>>().join(" ");
    let decimal = || words.split_once(',').is_some_and(|(lat, lon)| decimal(&words, lat, lon).is_ok());
    matches!(lettered(&words), Ok(Some(_)) | Err(_)) || decimal()
}

fn looks_like_coordinates(text: &str) -> bool {
    let lettered = text.starts_with(['N', 'S', 'E', 'W', 'n', 's', 'e', 'w']);
    text.trim_start_matches(['-', '+']).starts_with(|c: char| c.is_ascii_digit())
        || text.contains(',')
        || (lettered && text.bytes().any(|b| b.is_ascii_digit()))
}

/// Reads coordinates in any notation, with a warning where the notation is easily misread.
fn coordinates(text: &str) -> Result<Named, Problem> {
    if let Some(place) = lettered(text)? {
        return Ok(Named::at(text.to_uppercase(), place));
    }
    if let Some(place) = five_characters(text) {
        let warning = format!(
            "{} was taken for {}, as navigation databases name points with five characters; flight plans do not",
            quoted(text),
            icao(place)
        );
        return Ok(Named { warning: Some(warning), ..Named::at(text.to_uppercase(), place) });
    }
    match text.split_once(',') {
        Some((lat, lon)) => decimal(text, lat, lon),
        None => Err(Problem::Coordinates(text.to_string())),
    }
}

fn decimal(text: &str, lat: &str, lon: &str) -> Result<Named, Problem> {
    let number = |part: &str| part.trim().parse::<f64>().map_err(|_| Problem::Coordinates(text.to_string()));
    degrees(number(lat)?, number(lon)?)
}

/// A place from decimal degrees.
pub(super) fn degrees(lat: f64, lon: f64) -> Result<Named, Problem> {
    Ok(Named::at(format!("{lat},{lon}"), Place::from_deg(lat, lon)?))
}

/// A place in ICAO's notation to the minute, for messages.
pub(super) fn icao(place: Place) -> String {
    let minutes = |deg: f64| (deg.abs() * 60.0).round() as u32;
    let (lat, lon) = (minutes(place.lat.deg()), minutes(place.lon.deg()));
    let (south, west) = (place.lat.deg() < 0.0, place.lon.deg() < 0.0);
    format!(
        "{:02}{:02}{}{:03}{:02}{}",
        lat / 60,
        lat % 60,
        if south { 'S' } else { 'N' },
        lon / 60,
        lon % 60,
        if west { 'W' } else { 'E' },
    )
}

#[cfg(test)]
mod tests {
    use super::place;

    #[test]
    fn one_point_has_many_spellings() {
        for text in ["7830N02000W", "7830n02000w", "78.5,-20", " 78.5 , -20.0 "] {
            let at = place(text).unwrap().place;
            assert!((at.lat.deg() - 78.5).abs() < 1e-12 && (at.lon.deg() + 20.0).abs() < 1e-12, "{text}");
        }
        let whole = place("46N078W").unwrap().place;
        assert!((whole.lat.deg() - 46.0).abs() < 1e-12 && (whole.lon.deg() + 78.0).abs() < 1e-12);
        assert_eq!(place("90N000E").unwrap().place.lat.deg(), 90.0);
        assert_eq!(place("00N180W").unwrap().place.lon.deg(), -180.0);
    }

    #[test]
    fn spellings_that_mean_nothing_are_refused() {
        for text in [
            "",
            "78N",
            "7860N02000W",
            "78N02W",
            "95N020W",
            "10N190E",
            "7830N20W",
            "1,2,3",
            "NaN,0",
            "9\u{661}N020W",
        ] {
            assert!(place(text).is_err(), "{text}");
        }
    }
}
