//! The Sun at regular steps along a path: what tables and charts are drawn from.

use super::along::Light;
use super::limit::State;
use crate::path::{Path, Position};
use crate::sky::{GeometricElevation, Sky, azimuth, elevation};
use crate::units::Angle;

/// The Sun as seen beneath the aircraft at one instant.
#[derive(Debug, Clone, Copy)]
pub struct Sample {
    /// Seconds from take-off.
    pub at_s: f64,
    /// Where the aircraft is.
    pub position: Position,
    /// Geometric elevation of the Sun's centre.
    pub elevation: GeometricElevation,
    /// Azimuth of the Sun.
    pub azimuth: Angle,
    /// The Sun's bearing from the track: clockwise positive, −180° to 180°.
    pub relative_bearing: Angle,
    /// The Sun's declination.
    pub declination: Angle,
    /// The Sun's Greenwich hour angle.
    pub gha: Angle,
    /// What holds from this instant on.
    pub state: State,
}

/// Looks at the Sun from given instants, in seconds from take-off.
#[derive(Debug)]
pub struct Lookout<'a> {
    path: &'a Path,
    light: &'a Light,
    window: crate::sky::SunWindow<'a>,
}

impl<'a> Lookout<'a> {
    /// A lookout along a path whose light is known.
    pub fn new(path: &'a Path, light: &'a Light, sky: &'a Sky) -> Self {
        Self { path, light, window: sky.window(path.takeoff, path.landing()) }
    }

    /// The Sun at one instant.
    pub fn at(&self, at_s: f64) -> Sample {
        let sun = self.window.at(at_s);
        let position = self.path.at(at_s);
        let azimuth = azimuth(position.place, &sun);
        Sample {
            at_s,
            position,
            elevation: elevation(position.place, &sun),
            azimuth,
            relative_bearing: (azimuth - position.track).turned_about_zero(),
            declination: sun.declination(),
            gha: sun.gha(),
            state: self.light.state_at(at_s),
        }
    }

    /// Samples from take-off on at a step, and one at landing.
    pub fn every_s(&self, step_s: f64) -> Vec<Sample> {
        let steps = (self.path.airborne_s / step_s).ceil() as usize;
        let mut samples: Vec<Sample> = (0..steps).map(|i| self.at(i as f64 * step_s)).collect();
        samples.push(self.at(self.path.airborne_s));
        samples
    }
}
