//! The light along flights.

mod ahead;
mod crossings;
mod deck;
mod exposure;
mod grazing;
mod moon;
mod properties;
mod trust;

use crate::tables::{Row, instant, number, rows};
use gloamline::intake::{Flight, Pace, RoutePoint, Stop};
use gloamline::units::Place;
pub(crate) use properties::any_flight;

/// A flight through timed points, from take-off to landing.
pub(crate) fn flight(name: &str, takeoff: gloamline::units::Instant, points: &[(Place, f64)]) -> Flight {
    let stop = |place| Stop { label: name.to_string(), name: None, place, zone: None, aerodrome: None };
    let (first, last) = (points[0], points[points.len() - 1]);
    let waypoints = points[1..points.len() - 1].iter().map(|&(place, s)| RoutePoint {
        label: String::new(),
        place,
        time: Some(takeoff.after_s(s)),
        wind_m_s: None,
    });
    Flight {
        name: name.to_string(),
        from: stop(first.0),
        to: stop(last.0),
        takeoff,
        landing: Some(takeoff.after_s(last.1)),
        pace: Pace::Times,
        off_block: None,
        on_block: None,
        profile: Vec::new(),
        level: None,
        climb: None,
        horizon: None,
        waypoints: waypoints.collect(),
        polar_limits: None,
        recorded: None,
        dut1: None,
        brightness: gloamline::intake::Brightness::default(),
        low_sun: None,
        from_air: None,
        to_air: None,
        alternates: Vec::new(),
        warnings: Vec::new(),
    }
}

/// The reference flights with their ids.
pub(crate) fn reference_flights() -> Vec<(String, Flight)> {
    let points = rows("skyfield-de421/flight_points.csv");
    let one = |row: Row| {
        let id = row["id"].clone();
        let own = points.iter().filter(|p| p["id"] == id).map(|p| {
            let place = Place::from_deg(number(p, "lat_deg"), number(p, "lon_deg")).unwrap();
            (place, number(p, "seconds_after_takeoff"))
        });
        let points: Vec<_> = own.collect();
        (id.clone(), flight(&id, instant(&row, "takeoff"), &points))
    };
    rows("skyfield-de421/flights.csv").into_iter().map(one).collect()
}
