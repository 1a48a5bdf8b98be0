//! A brief's minutes as CSV: one row each, RFC 4180 with a header.

use super::record::figures;
use crate::Brief;
use crate::label::clock::machine;
use crate::label::words::state_key;
use crate::light::{MoonSample, Sample};

const COLUMNS: usize = 16;
const HEADER: [&str; COLUMNS] = [
    "flight",
    "time_utc",
    "lat_deg",
    "lon_deg",
    "height_m",
    "track_deg",
    "elevation_deg",
    "azimuth_deg",
    "relative_bearing_deg",
    "declination_deg",
    "gha_deg",
    "state",
    "moon_elevation_deg",
    "moon_azimuth_deg",
    "moon_illuminated",
    "illuminance_lux",
];

/// The minutes of each brief, one after another under one header.
///
/// # Errors
/// None that a brief can cause: the text is built in memory.
pub fn csv(briefs: &[Brief]) -> Result<String, csv::Error> {
    let mut writer = csv::Writer::from_writer(Vec::new());
    writer.write_record(HEADER)?;
    for brief in briefs {
        let name = no_formula(&super::one_line(&brief.flight.name));
        let minutes = brief.minutes.iter().zip(&brief.moon.minutes).zip(&brief.exposure.minutes);
        for ((sample, moon), lux) in minutes {
            writer.write_record(row(&name, brief, sample).iter().chain(&moonlight(moon, lux.0)))?;
        }
    }
    let bytes = writer.into_inner().map_err(csv::IntoInnerError::into_error)?;
    Ok(String::from_utf8_lossy(&bytes).into_owned())
}

fn row(name: &str, brief: &Brief, sample: &Sample) -> [String; COLUMNS - 4] {
    let place = sample.position.place;
    [
        name.to_string(),
        machine(brief.path.takeoff.after_s(sample.at_s)),
        fixed(place.lat.deg(), 5),
        fixed(place.lon.deg(), 5),
        sample.position.height.map_or(String::new(), |height| fixed(height.0, 1)),
        fixed(sample.position.track.deg(), 3),
        fixed(sample.elevation.0.deg(), 5),
        fixed(sample.azimuth.deg(), 3),
        fixed(sample.relative_bearing.deg(), 3),
        fixed(sample.declination.deg(), 5),
        fixed(sample.gha.deg(), 5),
        state_key(sample.state).to_string(),
    ]
}

/// The columns that came later: the Moon and the brightness outside.
fn moonlight(moon: &MoonSample, lux: f64) -> [String; 4] {
    [
        fixed(moon.elevation.0.deg(), 5),
        fixed(moon.azimuth.deg(), 3),
        fixed(moon.phase.illuminated, 4),
        // five figures: daylight and starlight are eight powers of ten apart
        format!("{}", figures(lux)),
    ]
}

/// A number with so many decimals and no negative zero.
pub(super) fn fixed(value: f64, decimals: usize) -> String {
    let text = format!("{value:.decimals$}");
    if text.starts_with('-') && text.bytes().all(|b| matches!(b, b'-' | b'0' | b'.')) {
        text[1..].to_string()
    } else {
        text
    }
}

/// A text that no spreadsheet takes for a formula: an apostrophe goes before the characters that begin one.
pub(super) fn no_formula(text: &str) -> String {
    if text.starts_with(['=', '+', '-', '@']) { format!("'{text}") } else { text.to_string() }
}

#[cfg(test)]
mod tests {
    use super::{fixed, no_formula};

    #[test]
    fn no_value_is_a_formula_or_a_negative_zero() {
        assert_eq!(no_formula("=1+1"), "'=1+1");
        assert_eq!(no_formula("Varde 71"), "Varde 71");
        assert_eq!(fixed(-0.000_001, 3), "0.000");
        assert_eq!(fixed(-1.5, 1), "-1.5");
    }
}
