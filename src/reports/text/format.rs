//! Angles, bearings and places as people read them.

use crate::light::Sample;
use crate::units::Place;

pub(super) fn sun(sample: &Sample) -> String {
    format!("{} at {}", elevation(sample), bearing(sample.azimuth.deg()))
}

pub(super) fn elevation(sample: &Sample) -> String {
    signed(sample.elevation.0.deg(), 1)
}

/// A true bearing in whole degrees.
pub(super) fn bearing(deg: f64) -> String {
    format!("{:03}°", (deg.round() as i64).rem_euclid(360))
}

/// Degrees with a real minus sign, and a plus where positive.
pub(in crate::reports) fn signed(deg: f64, decimals: usize) -> String {
    let text = format!("{:.decimals$}", deg.abs());
    let zero = text.bytes().all(|b| b == b'0' || b == b'.');
    match deg {
        _ if zero => format!("{text}°"),
        d if d < 0.0 => format!("−{text}°"),
        _ => format!("+{text}°"),
    }
}

/// Degrees and minutes with hemisphere letters behind.
pub(in crate::reports) fn place(place: Place) -> String {
    let part = |deg: f64, width: usize, letters: [char; 2]| {
        let minutes = (deg.abs() * 60.0).round() as i64;
        let letter = letters[usize::from(deg < 0.0)];
        format!("{:0width$}°{:02}′{letter}", minutes / 60, minutes % 60)
    };
    format!("{} {}", part(place.lat.deg(), 2, ['N', 'S']), part(place.lon.deg(), 3, ['E', 'W']))
}

/// Where the Sun is against the track: `40° right of track`.
pub(super) fn from_track(deg: f64) -> String {
    match deg.round() as i64 {
        0 => "ahead".to_string(),
        d @ 1..=179 => format!("{d}° right of track"),
        d if d.abs() == 180 => "behind".to_string(),
        d => format!("{}° left of track", -d),
    }
}
