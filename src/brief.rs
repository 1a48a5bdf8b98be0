//! Everything that is said of one flight: the value that every report renders.

use crate::intake::{Flight, PolarLimits};
use crate::light::{Light, Lookout, Sample, along};
use crate::path::{CircleCrossing, FlightError, Passed, Path, circles, fly};
use crate::sky::Sky;

/// Seconds between the rows of a brief's table.
const STEP_S: f64 = 60.0;

/// One flight with its path, its light and what it crosses.
#[derive(Debug, Clone)]
pub struct Brief {
    /// The flight as it was given.
    pub flight: Flight,
    /// Where it is at any instant.
    pub path: Path,
    /// The light beneath it.
    pub light: Light,
    /// The Sun at each crossing, in the crossings' order.
    pub at_crossings: Vec<Sample>,
    /// The Sun at each touch, in the touches' order.
    pub at_touches: Vec<Sample>,
    /// The Sun at each waypoint, in the flight's order.
    pub at_waypoints: Vec<Sample>,
    /// The Sun where it stands highest.
    pub at_highest: Sample,
    /// The Sun where it stands lowest.
    pub at_lowest: Sample,
    /// The Sun each minute from take-off, and at landing.
    pub minutes: Vec<Sample>,
    /// The circles crossed.
    pub circles: Vec<CircleCrossing>,
    /// Where the polar areas were taken to begin.
    pub polar_limits: PolarLimits,
    /// The northernmost point.
    pub northernmost: Passed,
    /// The southernmost point.
    pub southernmost: Passed,
    /// UT1 − UTC as it was taken, in seconds.
    pub dut1_s: f64,
}

/// Briefs a flight: flies it, finds the light along it, and looks at the Sun where it matters.
///
/// # Errors
/// A flight that cannot be flown.
pub fn brief(flight: Flight, sky: &Sky) -> Result<Brief, FlightError> {
    let path = fly(&flight)?;
    let light = along(&path, sky);
    let lookout = Lookout::new(&path, &light, sky);
    let at_crossings = light.crossings.iter().map(|c| lookout.at(c.at_s)).collect();
    let at_touches = light.touches.iter().map(|t| lookout.at(t.at_s)).collect();
    let at_waypoints = path.waypoints_s().iter().map(|&at_s| lookout.at(at_s)).collect();
    let (at_highest, at_lowest) = (lookout.at(light.highest.at_s), lookout.at(light.lowest.at_s));
    let minutes = lookout.every_s(STEP_S);
    let polar_limits = flight.polar_limits.unwrap_or_default();
    Ok(Brief {
        circles: circles(&path, sky.true_obliquity(path.middle()), polar_limits),
        northernmost: path.northernmost(),
        southernmost: path.southernmost(),
        dut1_s: sky.dut1_s(),
        polar_limits,
        at_crossings,
        at_touches,
        at_waypoints,
        at_highest,
        at_lowest,
        minutes,
        light,
        path,
        flight,
    })
}

impl Brief {
    /// The Sun at take-off.
    pub fn at_takeoff(&self) -> &Sample {
        &self.minutes[0]
    }

    /// The Sun at landing.
    pub fn at_landing(&self) -> &Sample {
        &self.minutes[self.minutes.len() - 1]
    }
}
