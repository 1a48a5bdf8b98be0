//! Where the Sun stands against the runways at take-off and at landing.
//!
//! Does not know which runway is in use, nor what stands between it and the Sun.

use crate::intake::{LowSunLimits, StationAir, Stop};
use crate::light::{Limit, Sample};
use crate::sky::{ApparentElevation, GroundAir, apparent_from_ground};
use crate::units::Angle;

/// Whether a low Sun stands ahead along a runway.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Glare {
    /// It does not.
    None,
    /// Within the sector.
    Low,
    /// Near the middle of it.
    Strong,
}

/// The Sun at an end of the flight, and against each runway there.
#[derive(Debug, Clone)]
pub struct RunwayView {
    /// The elevation at which the Sun is seen from the ground.
    pub apparent: ApparentElevation,
    /// Its azimuth.
    pub azimuth: Angle,
    /// Whether its upper limb is above the horizon by the almanacs' convention, and it is no higher than the limit.
    pub is_low: bool,
    /// The ends of the runways; nothing where they are not known.
    pub ends: Option<Vec<RunwaySun>>,
}

/// The Sun as it stands against the direction of take-offs and landings on one end of a runway.
#[derive(Debug, Clone, Copy)]
pub struct RunwaySun {
    /// The designator painted there, by the compass in most states: a label, never a direction.
    pub designator: &'static str,
    /// The runway's true bearing.
    pub bearing: Angle,
    /// The Sun's bearing from it: clockwise positive.
    pub relative_bearing: Angle,
    /// Whether it stands ahead.
    pub glare: Glare,
}

/// The Sun against the runways of a stop. Designators are not read: bearings are those between the published ends.
pub(super) fn view(stop: &Stop, sun: &Sample, air: Option<StationAir>, limits: LowSunLimits) -> RunwayView {
    let apparent = apparent_from_ground(sun.elevation, ground_air(air));
    let is_low =
        sun.elevation.0.rad() >= Limit::Horizon.elevation().rad() && apparent.0.rad() <= limits.up_to.rad();
    let ends = stop.aerodrome.map(|field| {
        let ends = field.runway_ends().map(|end| {
            let relative_bearing = (sun.azimuth - end.bearing()).turned_about_zero();
            let glare = if is_low { glare(relative_bearing, limits) } else { Glare::None };
            RunwaySun { designator: end.designator(), bearing: end.bearing(), relative_bearing, glare }
        });
        ends.collect::<Vec<_>>()
    });
    RunwayView { apparent, azimuth: sun.azimuth, is_low, ends: ends.filter(|ends| !ends.is_empty()) }
}

fn glare(relative_bearing: Angle, limits: LowSunLimits) -> Glare {
    match relative_bearing.rad().abs() {
        off if off <= limits.strong.rad() => Glare::Strong,
        off if off <= limits.sector.rad() => Glare::Low,
        _ => Glare::None,
    }
}

fn ground_air(given: Option<StationAir>) -> GroundAir {
    let (usual, given) = (GroundAir::default(), given.unwrap_or_default());
    GroundAir {
        pressure_hpa: given.pressure_hpa.unwrap_or(usual.pressure_hpa),
        temperature_c: given.temperature_c.unwrap_or(usual.temperature_c),
    }
}
