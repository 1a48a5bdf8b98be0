//! The Moon beneath the aircraft: when it rises and sets, and how much of the dark it lights.
//!
//! Knows no cloud, and no Moon but one whose upper limb stands on a level horizon when it rises.

use super::along::Light;
use super::limit::{Direction, State};
use super::meet::{Meeting, search};
use super::trace::{Peak, Trace};
use crate::path::{Path, Position};
use crate::sky::{GeometricElevation, MoonWindow, Phase, Sky, SunWindow, azimuth, elevation};
use crate::units::Angle;

/// How near to its limit a turning Moon is said to touch it: what its elevation may err by, as a sum of causes.
pub const MOON_TOUCH: Angle = Angle::from_arcsec(MOON_PLACE_ARCSEC + ABERRATION_ARCSEC + POLAR_MOTION_ARCSEC);
/// The Moon's place against JPL DE421, as [`crate::sky::MoonPlace`] states it.
const MOON_PLACE_ARCSEC: f64 = 12.0;
/// Aberration is taken at the Earth's centre: 20.5″ times the parallax.
const ABERRATION_ARCSEC: f64 = 0.36;
/// Polar motion, which is left out.
const POLAR_MOTION_ARCSEC: f64 = 0.3;

/// The Moon's upper limb meets the horizon.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct MoonCrossing {
    /// Seconds from take-off.
    pub at_s: f64,
    /// Upwards (moonrise) or downwards (moonset).
    pub direction: Direction,
}

/// The Moon turns so near to its limit that the model cannot tell whether it crosses.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct MoonTouch {
    /// Seconds from take-off.
    pub at_s: f64,
    /// Elevation less the limit, where the Moon turns.
    pub margin: Angle,
}

/// A stretch of time, [begin, end), in which the Moon is up or not.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct MoonSegment {
    /// Whether its upper limb is above the horizon.
    pub is_up: bool,
    /// Seconds from take-off to its beginning.
    pub begin_s: f64,
    /// Seconds from take-off to its end.
    pub end_s: f64,
}

/// Seconds of a part of the night with the Moon up and without it.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Moonlit {
    /// With the Moon above its limit, however little of it is lit.
    pub moonlit_s: f64,
    /// Without.
    pub moonless_s: f64,
}

/// What the Moon does along a path.
#[derive(Debug, Clone)]
pub struct MoonLight {
    /// Moonrises and moonsets, in order of time.
    pub crossings: Vec<MoonCrossing>,
    /// Turns of the Moon too near to its limit to be decided.
    pub touches: Vec<MoonTouch>,
    /// Up or not, one after another from take-off to landing.
    pub segments: Vec<MoonSegment>,
    /// The night proper, with the Sun below −18°.
    pub darkness: Moonlit,
    /// Nautical and astronomical twilight together.
    pub night_twilight: Moonlit,
    /// Where the Moon stands highest above its limit, which is where it stands highest to within the limit's own drift.
    pub highest: Peak,
    /// Where the Moon's elevation turns, its curve is joined, begins and ends.
    pub turns_s: Vec<f64>,
}

/// Finds what the Moon does along a path whose light is known.
///
/// # Accuracy
/// Crossing times to what 12″ are worth there ([`crate::sky::MoonPlace`]), a second where the Moon rises steeply, and no
/// crossing missed whose excursion is higher than that: the search is the Sun's.
pub fn moon_beneath(path: &Path, sky: &Sky, light: &Light) -> MoonLight {
    let trace = Trace::moon_beneath(path, sky);
    let (mut crossings, mut touches) = (Vec::new(), Vec::new());
    // the limit lies within a degree of level, where a sine is an angle to 2 parts in 10,000
    search(&trace, 0.0, MOON_TOUCH.rad(), |meeting| match meeting {
        Meeting::Crossing(at_s, direction) => crossings.push(MoonCrossing { at_s, direction }),
        Meeting::Touch(peak) => {
            touches.push(MoonTouch { at_s: peak.at_s, margin: Angle::from_rad(peak.sine) });
        }
    });
    let segments = segments(trace.peaks()[0].sine >= 0.0, &crossings, path.airborne_s);
    MoonLight {
        darkness: moonlit(light, &segments, &[State::Darkness]),
        night_twilight: moonlit(light, &segments, &[State::NauticalTwilight, State::AstronomicalTwilight]),
        highest: trace.highest(),
        turns_s: trace.peaks().iter().map(|peak| peak.at_s).collect(),
        crossings,
        touches,
        segments,
    }
}

fn segments(begins_up: bool, crossings: &[MoonCrossing], airborne_s: f64) -> Vec<MoonSegment> {
    let mut segments = Vec::with_capacity(crossings.len() + 1);
    let (mut is_up, mut begin_s) = (begins_up, 0.0);
    for crossing in crossings {
        if crossing.at_s > begin_s {
            segments.push(MoonSegment { is_up, begin_s, end_s: crossing.at_s });
        }
        is_up = crossing.direction == Direction::Rising;
        begin_s = crossing.at_s;
    }
    if airborne_s > begin_s {
        segments.push(MoonSegment { is_up, begin_s, end_s: airborne_s });
    }
    segments
}

/// How long the Sun's states hold with the Moon up and without it. Both lists are in order of time, and short.
fn moonlit(light: &Light, moon: &[MoonSegment], states: &[State]) -> Moonlit {
    let mut sum = Moonlit::default();
    for dark in light.segments.iter().filter(|segment| states.contains(&segment.state)) {
        for span in moon {
            let overlap_s = dark.end_s.min(span.end_s) - dark.begin_s.max(span.begin_s);
            let share = if span.is_up { &mut sum.moonlit_s } else { &mut sum.moonless_s };
            *share += overlap_s.max(0.0);
        }
    }
    sum
}

impl MoonLight {
    /// Seconds in which the Moon is up, or in which it is not.
    pub fn seconds(&self, is_up: bool) -> f64 {
        self.segments.iter().filter(|s| s.is_up == is_up).map(|s| s.end_s - s.begin_s).sum()
    }

    /// Whether the Moon is up from an instant on; at landing and after, whether it last was.
    pub fn is_up_at(&self, at_s: f64) -> bool {
        let next = self.segments.partition_point(|segment| segment.end_s <= at_s);
        self.segments.get(next).or(self.segments.last()).is_some_and(|segment| segment.is_up)
    }
}

/// The Moon as seen beneath the aircraft at one instant.
#[derive(Debug, Clone, Copy)]
pub struct MoonSample {
    /// Seconds from take-off.
    pub at_s: f64,
    /// Where the aircraft is.
    pub position: Position,
    /// Geometric elevation of the Moon's centre.
    pub elevation: GeometricElevation,
    /// Azimuth of the Moon.
    pub azimuth: Angle,
    /// The Moon's bearing from the track: clockwise positive, −180° to 180°.
    pub relative_bearing: Angle,
    /// How it is lit.
    pub phase: Phase,
}

/// Looks at the Moon from given instants, in seconds from take-off.
#[derive(Debug)]
pub struct MoonLookout<'a> {
    path: &'a Path,
    sun: SunWindow<'a>,
    moon: MoonWindow<'a>,
}

impl<'a> MoonLookout<'a> {
    /// A lookout along a path.
    pub fn new(path: &'a Path, sky: &'a Sky) -> Self {
        let (begin, end) = (path.takeoff, path.landing());
        Self { path, sun: sky.window(begin, end), moon: sky.moon_window(begin, end) }
    }

    /// The Moon at one instant.
    pub fn at(&self, at_s: f64) -> MoonSample {
        let (moon, position) = (self.moon.at(at_s), self.path.at(at_s));
        let azimuth = azimuth(position.place, &moon);
        MoonSample {
            at_s,
            position,
            elevation: elevation(position.place, &moon),
            azimuth,
            relative_bearing: (azimuth - position.track).turned_about_zero(),
            phase: moon.phase(&self.sun.at(at_s)),
        }
    }
}
