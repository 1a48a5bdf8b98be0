//! Points of five characters, as navigation databases name crossings of whole and half degrees.
//!
//! They are read, and said to be ambiguous: a reader who takes one for degrees and minutes is far off.

use crate::units::Place;

/// Reads `5275N` (52°N 075°W), `75N70` (75°N 170°W) or `N5050` (50°30′N 050°W).
///
/// The letter names both hemispheres: N north and west, E north and east, S south and east, W south and west. Where it
/// stands tells more: in the middle the longitude is 100° or more, in front the latitude is half a degree more.
///
/// # Source
/// ARINC 424, as quoted in public notices (UK AIC P060/2020, which warns against the half-degree form).
pub(super) fn five_characters(text: &str) -> Option<Place> {
    let upper = text.to_ascii_uppercase();
    let at = upper.find(['N', 'E', 'S', 'W'])?;
    let (lat, lon, letter) = (upper.get(..at)?, upper.get(at + 1..)?, upper.get(at..=at)?);
    let pair = |text: &str| -> Option<f64> {
        (text.len() == 2 && text.bytes().all(|b| b.is_ascii_digit())).then(|| text.parse().ok())?
    };
    let (lat, lon) = match (lat.len(), lon.len()) {
        (4, 0) => (pair(lat.get(..2)?)?, pair(lat.get(2..)?)?),
        (2, 2) => (pair(lat)?, pair(lon)? + 100.0),
        (0, 4) => (pair(lon.get(..2)?)? + 0.5, pair(lon.get(2..)?)?),
        _ => return None,
    };
    if lat > 90.0 || lon > 180.0 {
        return None;
    }
    let (south, west) = (matches!(letter, "S" | "W"), matches!(letter, "N" | "W"));
    Place::from_deg(if south { -lat } else { lat }, if west { -lon } else { lon }).ok()
}
