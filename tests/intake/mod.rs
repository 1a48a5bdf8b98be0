//! What is taken in: flight files and recorded tracks.

mod brief;
mod formats;
mod alike;
mod dirty;
mod headers;
mod packed;
mod raw;
mod recorded;
mod notation;
mod route;
mod fixes;
mod profile;
mod block;

use gloamline::intake::{IntakeError, Track, TrackOptions, Tracks, tracks};

/// Reads a recording of that name as it is read without options.
pub(crate) fn read(text: &str, name: &str) -> Result<Tracks, IntakeError> {
    tracks(text.as_bytes(), name, &TrackOptions::default())
}

/// The only flight of a recording.
pub(crate) fn only(text: &str, name: &str) -> Track {
    let mut read = read(text, name).unwrap_or_else(|error| panic!("{error} in {text}"));
    assert_eq!((read.tracks.len(), &read.refused), (1, &vec![]), "{text}");
    read.tracks.remove(0)
}

/// A point as text: time, degrees north and east, metres.
pub(crate) fn points(track: &Track) -> Vec<String> {
    let told = track.points.iter().map(|point| {
        let time = point.instant.utc().format("%Y-%m-%dT%H:%M:%S%.f");
        let height = point.height.map_or("-".to_string(), |height| format!("{:.1}", height.0));
        format!("{time} {:.4} {:.4} {height}", point.place.lat.deg(), point.place.lon.deg())
    });
    told.collect()
}

/// The lines that say what was mended.
pub(crate) fn mended(track: &Track) -> Vec<String> {
    track.repairs.0.iter().map(ToString::to_string).collect()
}

/// What a refusal says, and its cure.
pub(crate) fn refusal(text: &str, name: &str) -> (String, String) {
    let error = read(text, name).unwrap_err();
    (error.to_string(), error.hint().unwrap_or_default())
}

/// A flight that wants nothing more.
const FLIGHT: &str =
    "from = \"CYYZ\"\nto = \"VHHH\"\ntakeoff = 2026-12-18T05:10:00Z\nairborne = \"14h55m\"\n";

/// What is said of a flight file that is refused, with its cure.
fn said(text: &str) -> String {
    let error = gloamline::intake::flight_file(text, "f.toml").unwrap_err();
    let hint = error.hint().map_or(String::new(), |hint| format!("\n{hint}"));
    format!("{error}{hint}")
}
