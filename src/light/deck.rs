//! The second vantage: whether the Sun's upper limb shows above the horizon that the flight deck sees.

use super::limit::{Direction, Limit};
use super::meet::{Crossing, Level, Touch, meetings};
use super::trace::Trace;
use crate::path::Path;
use crate::sky::{GeometricElevation, Horizon, Sky};
use crate::units::{Angle, Metres};

/// What the flight deck sees of the Sun.
#[derive(Debug, Clone)]
pub struct Deck {
    /// Height above mean sea level.
    pub height: Metres,
    /// Height of what stands at the horizon: 0 for the sea.
    pub horizon: Metres,
    /// Geometric elevation of the Sun's centre when its upper limb is on that horizon.
    pub limit: GeometricElevation,
    /// How far below level the horizon appears.
    pub dip: Angle,
    /// How far the grazing ray is bent, down through the dense air and out again.
    pub refraction: Angle,
    /// Deck sunrises and deck sunsets, in order of time.
    pub crossings: Vec<Crossing>,
    /// Turns of the Sun too near to the limit to be decided.
    pub touches: Vec<Touch>,
    /// The Sun visible or not, one after another from take-off to landing.
    pub segments: Vec<DeckSegment>,
}

/// A stretch of time, [begin, end), in which the Sun shows or does not.
#[derive(Debug, Clone, Copy)]
pub struct DeckSegment {
    /// Whether its upper limb is above the horizon.
    pub sun_visible: bool,
    /// Seconds from take-off to its beginning.
    pub begin_s: f64,
    /// Seconds from take-off to its end.
    pub end_s: f64,
}

/// Finds when the flight deck sees the Sun, from the height flown over a horizon.
///
/// # Accuracy
/// That of the crossings beneath, with the limit of the standard atmosphere at that height ([`Horizon`]). The
/// semidiameter is that of the flight's middle: in a flight it changes by less than 0.02″.
pub fn deck(trace: &Trace, path: &Path, sky: &Sky, (horizon, height): (&Horizon, Metres)) -> Deck {
    let semidiameter = sky.sun_at(path.middle()).semidiameter();
    let limit = horizon.sun_centre_limit(height, semidiameter);
    let level = Level { limit: Limit::Horizon, elevation: limit.0 };
    let (mut crossings, mut touches) = (Vec::new(), Vec::new());
    meetings(trace, level, &mut crossings, &mut touches);
    let begins_visible = trace.peaks()[0].sine >= level.sine();
    Deck {
        height,
        horizon: horizon.height(),
        limit,
        dip: horizon.dip(height),
        refraction: horizon.refraction(height),
        segments: segments(begins_visible, &crossings, path.airborne_s),
        crossings,
        touches,
    }
}

fn segments(begins_visible: bool, crossings: &[Crossing], airborne_s: f64) -> Vec<DeckSegment> {
    let mut segments = Vec::with_capacity(crossings.len() + 1);
    let (mut sun_visible, mut begin_s) = (begins_visible, 0.0);
    let end = Crossing { at_s: airborne_s, limit: Limit::Horizon, direction: Direction::Setting };
    for crossing in crossings.iter().chain(std::iter::once(&end)) {
        if crossing.at_s > begin_s {
            segments.push(DeckSegment { sun_visible, begin_s, end_s: crossing.at_s });
        }
        sun_visible = crossing.direction == Direction::Rising;
        begin_s = crossing.at_s;
    }
    segments
}

impl Deck {
    /// Seconds in which the Sun shows, or in which it does not.
    pub fn seconds(&self, sun_visible: bool) -> f64 {
        self.segments.iter().filter(|s| s.sun_visible == sun_visible).map(|s| s.end_s - s.begin_s).sum()
    }

    /// Whether the Sun shows from an instant on; at landing and after, whether it last did.
    pub fn sun_visible_at(&self, at_s: f64) -> bool {
        let next = self.segments.partition_point(|segment| segment.end_s <= at_s);
        self.segments.get(next).or(self.segments.last()).is_some_and(|segment| segment.sun_visible)
    }
}
