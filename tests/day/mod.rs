//! Civil days at places against an independent script, against the zones, and against themselves.

mod clocks;
mod moon;
mod polar;
mod properties;
mod sun;

use crate::tables::{Row, number};
use gloamline::day::{DayRange, PlaceDays, place_days};
use gloamline::intake::Stop;
use gloamline::sky::Sky;
use gloamline::units::Place;
use std::sync::LazyLock;

static SKY: LazyLock<Sky> = LazyLock::new(Sky::default);

/// A place that keeps a zone's clock, or local mean time.
fn stop(lat: f64, lon: f64, zone: Option<&str>) -> Stop {
    let zone = zone.map(|name| name.parse().unwrap());
    let place = Place::from_deg(lat, lon).unwrap();
    Stop { label: "here".into(), name: None, place, zone, aerodrome: None }
}

/// The days of a place from one date to another.
fn days(stop: Stop, first: &str, last: &str) -> PlaceDays {
    let range = DayRange::new(first.parse().unwrap(), last.parse().unwrap()).unwrap();
    place_days(stop, range, &SKY).unwrap()
}

/// The place of a table's row.
fn stop_of(row: &Row) -> Stop {
    stop(number(row, "lat_deg"), number(row, "lon_deg"), Some(&row["zone"]))
}
