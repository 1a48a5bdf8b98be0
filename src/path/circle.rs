//! The circles of latitude and the meridian that planners ask about, and when a path crosses them.

use super::fly::Path;
use super::leg::Leg;
use crate::intake::PolarLimits;
use crate::units::{Angle, Place};

/// A line on the Earth that is watched for.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum CircleName {
    /// 90° less the true obliquity, north.
    ArcticCircle,
    /// 90° less the true obliquity, south.
    AntarcticCircle,
    /// The limit of the North Polar Area.
    NorthPolarArea,
    /// The limit of the South Polar Area.
    SouthPolarArea,
    /// The true obliquity, north.
    TropicOfCancer,
    /// The true obliquity, south.
    TropicOfCapricorn,
    /// 0°.
    Equator,
    /// The meridian of 180°.
    Meridian180,
}

/// A circle with its latitude; the meridian has none.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Circle {
    /// Which.
    pub name: CircleName,
    /// Its latitude.
    pub latitude: Option<Angle>,
}

/// The way in which a circle is crossed.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Heading {
    /// Towards the north.
    Northbound,
    /// Towards the south.
    Southbound,
    /// Towards the east.
    Eastbound,
    /// Towards the west.
    Westbound,
}

/// A crossing of a circle.
#[derive(Debug, Clone, Copy)]
pub struct CircleCrossing {
    /// Which circle.
    pub circle: Circle,
    /// Seconds from take-off.
    pub at_s: f64,
    /// The way.
    pub heading: Heading,
    /// Where.
    pub place: Place,
}

/// All watched circles for an obliquity and a choice of polar limits.
fn watched(true_obliquity: Angle, limits: PolarLimits) -> [Circle; 7] {
    use CircleName::{
        AntarcticCircle, ArcticCircle, Equator, NorthPolarArea, SouthPolarArea, TropicOfCancer,
        TropicOfCapricorn,
    };
    let polar = Angle::from_deg(90.0) - true_obliquity;
    let at = |name, latitude| Circle { name, latitude: Some(latitude) };
    [
        at(NorthPolarArea, limits.north.angle()),
        at(ArcticCircle, polar),
        at(TropicOfCancer, true_obliquity),
        at(Equator, Angle::ZERO),
        at(TropicOfCapricorn, -true_obliquity),
        at(AntarcticCircle, -polar),
        at(SouthPolarArea, limits.south.angle()),
    ]
}

/// Every crossing of a watched circle or of the 180° meridian, in order of time.
///
/// # Accuracy
/// Exact on the geodesic (no search). A path that only touches a circle does not cross it. The obliquity is one value
/// for the flight: in a day it changes by less than 0.3″, 10 m on the ground.
pub fn circles(path: &Path, true_obliquity: Angle, limits: PolarLimits) -> Vec<CircleCrossing> {
    let mut found = Vec::new();
    for circle in watched(true_obliquity, limits) {
        let Some(latitude) = circle.latitude else { continue };
        let mut one = Vec::new();
        for leg in path.legs() {
            latitude_crossings(leg, circle, latitude, &mut one);
        }
        found.extend(without_touches(one));
    }
    let meridian = path.legs().iter().filter_map(meridian_crossing).collect();
    found.extend(without_touches(meridian));
    found.sort_by(|a, b| a.at_s.total_cmp(&b.at_s));
    found
}

/// Drops pairs that cross and come back at one instant: a waypoint that lies on the circle itself.
fn without_touches(crossings: Vec<CircleCrossing>) -> Vec<CircleCrossing> {
    let mut kept: Vec<CircleCrossing> = Vec::with_capacity(crossings.len());
    for crossing in crossings {
        match kept.last() {
            Some(last) if last.heading != crossing.heading && crossing.at_s - last.at_s < 1e-3 => {
                kept.pop();
            }
            _ => kept.push(crossing),
        }
    }
    kept
}

/// Appends a leg's crossings of one latitude: between its ends and its vertices the latitude is monotone.
fn latitude_crossings(leg: &Leg, circle: Circle, latitude: Angle, found: &mut Vec<CircleCrossing>) {
    // on the circle counts as outside it for the northern ones and the equator, as inside for none
    let beyond = |at: f64| if latitude.rad() >= 0.0 { at > latitude.rad() } else { at >= latitude.rad() };
    let lat = |place: Place| place.lat.angle().rad();
    let vertices = leg.line().vertices().map(|d| (d, lat(Place::from_normal(leg.line().normal(d)))));
    let mut last = (0.0, lat(leg.from));
    for next in vertices.chain(std::iter::once((leg.length_m(), lat(leg.to)))).collect::<Vec<_>>() {
        if beyond(last.1) != beyond(next.1) {
            let d = leg.line().distance_to_latitude(latitude, last.0, next.0);
            found.push(CircleCrossing {
                circle,
                at_s: leg.time_s(d),
                heading: if next.1 > last.1 { Heading::Northbound } else { Heading::Southbound },
                place: Place::from_normal(leg.line().normal(d)),
            });
        }
        last = next;
    }
}

/// A leg's crossing of the 180° meridian: on a geodesic that is no meridian the longitude is monotone, by half a turn
/// at most.
pub(super) fn meridian_crossing(leg: &Leg) -> Option<CircleCrossing> {
    let line = leg.line();
    if line.is_meridional() || leg.length_m() == 0.0 {
        return None;
    }
    let (from, to) = (leg.from.lon.deg(), leg.to.lon.deg());
    // longitudes are held in [−180°, 180°): the meridian itself counts as west
    let crosses = if line.is_eastbound() { to < from } else { to > from };
    if !crosses {
        return None;
    }
    let d = where_longitude_flips(leg);
    Some(CircleCrossing {
        circle: Circle { name: CircleName::Meridian180, latitude: None },
        at_s: leg.time_s(d),
        heading: if line.is_eastbound() { Heading::Eastbound } else { Heading::Westbound },
        place: Place::from_normal(line.normal(d)),
    })
}

/// Bisects for the distance at which a leg that crosses 180° passes from one hemisphere to the other.
fn where_longitude_flips(leg: &Leg) -> f64 {
    let line = leg.line();
    let side = |d: f64| {
        let lon = Place::from_normal(line.normal(d)).lon.deg();
        if line.is_eastbound() { lon >= leg.from.lon.deg() } else { lon <= leg.from.lon.deg() }
    };
    let (mut low, mut high) = (0.0, leg.length_m());
    for _ in 0..60 {
        let mid = f64::midpoint(low, high);
        // still east of (or west of) where it began: not yet across
        if side(mid) { low = mid } else { high = mid }
    }
    low
}
