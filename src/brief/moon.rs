//! The Moon's share of a brief.

use crate::light::{Light, MoonLight, MoonLookout, MoonSample, Sample, moon_beneath};
use crate::path::Path;
use crate::sky::Sky;

/// What the Moon does beneath the aircraft, with the Moon wherever it is asked for.
#[derive(Debug, Clone)]
pub struct MoonView {
    /// Moonrises, moonsets, and how much of the dark is moonlit.
    pub moon: MoonLight,
    /// The Moon at each crossing, in the crossings' order.
    pub at_crossings: Vec<MoonSample>,
    /// The Moon where it stands highest.
    pub at_highest: MoonSample,
    /// The Moon at each of the brief's minutes, in their order.
    pub minutes: Vec<MoonSample>,
}

impl MoonView {
    /// The Moon at take-off.
    pub fn at_takeoff(&self) -> &MoonSample {
        &self.minutes[0]
    }

    /// The Moon at landing.
    pub fn at_landing(&self) -> &MoonSample {
        &self.minutes[self.minutes.len() - 1]
    }
}

/// Looks at the Moon along a path whose light and minutes are known.
pub(super) fn view((path, sky): (&Path, &Sky), light: &Light, minutes: &[Sample]) -> MoonView {
    let moon = moon_beneath(path, sky, light);
    let lookout = MoonLookout::new(path, sky);
    MoonView {
        at_crossings: moon.crossings.iter().map(|crossing| lookout.at(crossing.at_s)).collect(),
        at_highest: lookout.at(moon.highest.at_s),
        minutes: minutes.iter().map(|sample| lookout.at(sample.at_s)).collect(),
        moon,
    }
}
