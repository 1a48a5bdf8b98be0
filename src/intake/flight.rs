//! A flight as its planner holds it: two ends, two times, perhaps points between.

use crate::units::{Instant, Metres, Place};
use chrono_tz::Tz;

/// A flight, valid in itself: times in order and within the years answered for.
#[derive(Debug, Clone)]
pub struct Flight {
    /// What its planner calls it.
    pub name: String,
    /// Where it takes off.
    pub from: Stop,
    /// Where it lands.
    pub to: Stop,
    /// Take-off.
    pub takeoff: Instant,
    /// Landing.
    pub landing: Instant,
    /// Cruise height above mean sea level.
    pub level: Option<Metres>,
    /// The points between, in order.
    pub waypoints: Vec<RoutePoint>,
}

/// One end of a flight.
#[derive(Debug, Clone)]
pub struct Stop {
    /// The code or coordinates it was given as.
    pub label: String,
    /// The aerodrome's name, where it was given by code.
    pub name: Option<String>,
    /// Where it is.
    pub place: Place,
    /// The zone its clocks keep, where known.
    pub zone: Option<Tz>,
}

/// A point of the route.
#[derive(Debug, Clone)]
pub struct RoutePoint {
    /// What it was given as.
    pub label: String,
    /// Where it is.
    pub place: Place,
    /// When it is passed, if the planner says so.
    pub time: Option<Instant>,
}
