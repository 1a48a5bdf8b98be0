//! A place as people write it: ICAO coordinates, decimal degrees, or an aerodrome's code.

use super::problem::Problem;
use crate::places::{Aerodrome, aerodrome};
use crate::units::Place;

/// A place with what it was given as.
#[derive(Debug, Clone)]
pub(super) struct Named {
    pub(super) label: String,
    pub(super) place: Place,
    pub(super) aerodrome: Option<Aerodrome>,
}

/// Reads a place: an aerodrome's ICAO or IATA code, ICAO coordinates, or `lat,lon` in decimal degrees.
pub(super) fn place(text: &str) -> Result<Named, Problem> {
    let text = text.trim();
    if let Some((lat, lon)) = text.split_once(',') {
        return decimal(text, lat, lon);
    }
    if text.starts_with(|c: char| c.is_ascii_digit()) {
        let place = icao_coordinates(text)?;
        return Ok(Named { label: text.to_uppercase(), place, aerodrome: None });
    }
    let found = aerodrome(text).map_err(Problem::UnknownAerodrome)?;
    Ok(Named { label: found.code().to_string(), place: found.place(), aerodrome: Some(found) })
}

fn decimal(text: &str, lat: &str, lon: &str) -> Result<Named, Problem> {
    let number = |part: &str| part.trim().parse::<f64>().map_err(|_| Problem::Coordinates(text.to_string()));
    degrees(number(lat)?, number(lon)?)
}

/// A place from decimal degrees, labelled in the ICAO manner to the minute where that is exact, in decimals otherwise.
pub(super) fn degrees(lat: f64, lon: f64) -> Result<Named, Problem> {
    let place = Place::from_deg(lat, lon)?;
    Ok(Named { label: format!("{lat},{lon}"), place, aerodrome: None })
}

/// Seven or eleven characters: degrees, or degrees and minutes, each with its hemisphere's letter behind.
///
/// # Source
/// ICAO Doc 4444 (PANS-ATM), appendix 2, item 15(c), significant point (3).
fn icao_coordinates(text: &str) -> Result<Place, Problem> {
    let bad = || Problem::Coordinates(text.to_string());
    let upper = text.to_ascii_uppercase();
    let letter = upper.find(['N', 'S']).ok_or_else(bad)?;
    let (lat, rest) = upper.split_at(letter);
    let (south, lon) = (rest.starts_with('S'), &rest[1..]);
    let west = lon.ends_with('W');
    let lon = lon.strip_suffix(['E', 'W']).ok_or_else(bad)?;
    let minutes = match (lat.len(), lon.len()) {
        (2, 3) => false,
        (4, 5) => true,
        _ => return Err(bad()),
    };
    let lat = sexagesimal(lat, minutes).ok_or_else(bad)?;
    let lon = sexagesimal(lon, minutes).ok_or_else(bad)?;
    if lon > 180.0 {
        return Err(Problem::Coordinates(text.to_string()));
    }
    Ok(Place::from_deg(if south { -lat } else { lat }, if west { -lon } else { lon })?)
}

/// Degrees from digits, the last two of which are minutes if `minutes` says so.
fn sexagesimal(digits: &str, minutes: bool) -> Option<f64> {
    if !digits.bytes().all(|b| b.is_ascii_digit()) {
        return None;
    }
    if !minutes {
        return digits.parse().ok();
    }
    let (degrees, minutes) = digits.split_at(digits.len() - 2);
    let minutes: f64 = minutes.parse().ok()?;
    (minutes < 60.0).then_some(degrees.parse::<f64>().ok()? + minutes / 60.0)
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
