//! The second vantage: whether the Sun's upper limb shows above the horizon that the flight deck sees.

use super::limit::{Direction, Limit};
use super::meet::{Crossing, Level, Touch, meetings};
use super::trace::Trace;
use crate::path::{Heights, Path};
use crate::sky::{GeometricElevation, Horizon, Sky};
use crate::units::{Angle, Metres};
use std::borrow::Cow;

/// What the flight deck sees of the Sun.
#[derive(Debug, Clone)]
pub struct Deck {
    /// The greatest height flown, above mean sea level.
    pub height: Metres,
    /// Height of what stands at the horizon: 0 for the sea.
    pub horizon: Metres,
    /// Geometric elevation of the Sun's centre when its upper limb is on that horizon, from the greatest height.
    pub limit: GeometricElevation,
    /// How far below level the horizon appears, from the greatest height.
    pub dip: Angle,
    /// How far the grazing ray is bent, down through the dense air and out again to the greatest height.
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

/// The horizon of a flight deck along its path: the limit that the Sun meets, at the height flown at that moment.
#[derive(Debug, Clone)]
pub struct DeckHorizon {
    horizon: Horizon,
    heights: Heights,
    semidiameter: Angle,
}

impl DeckHorizon {
    /// The horizon seen from a path's heights. The semidiameter is that of the path's middle: in a flight it changes by
    /// less than 0.02″.
    pub fn new(path: &Path, sky: &Sky, horizon: Horizon, heights: Heights) -> Self {
        Self { horizon, heights, semidiameter: sky.sun_at(path.middle()).semidiameter() }
    }

    /// The Sun's limit at a time in seconds from take-off.
    pub fn limit_at(&self, at_s: f64) -> GeometricElevation {
        self.horizon.sun_centre_limit(self.heights.at(at_s), self.semidiameter)
    }

    /// How many nodes hold the limit over a span in which the climb is steady, by the ellipse that the root leaves: with
    /// heights above the horizon in the ratio r its parameter is (√r + 1)/(√r − 1), which is 400 for 1.01 and 41 for 1.1,
    /// so that 4 nodes err by less than 4e−11 rad and 8 by less than 2e−13.
    fn nodes(&self, (begin_s, end_s): (f64, f64)) -> usize {
        let above = |at_s: f64| self.heights.at(at_s).0 - self.horizon.height().0;
        let (a, b) = (above(begin_s), above(end_s));
        let (low, high) = (a.min(b), a.max(b));
        match high {
            h if low > 0.0 && h <= 1.01 * low => 4,
            h if low > 0.0 && h <= 1.1 * low => 8,
            _ => 16,
        }
    }

    /// Times between which the limit is smooth enough for 16 nodes: where the climb changes, and where the height above
    /// the horizon has quadrupled ([`Horizon`] says why). The first half metre, in which the limit falls like a root, is a
    /// stretch of its own: it lasts less than the 0.05 s that a time may err by.
    fn cuts(&self) -> Vec<f64> {
        const FIRST_M: f64 = 0.5;
        let above = |step: i32| Metres(self.horizon.height().0 + FIRST_M * 4_f64.powi(step));
        let passed = (0..9).flat_map(|step| self.heights.passes_s(above(step)));
        let level = self.heights.passes_s(self.horizon.height());
        let mut cuts: Vec<f64> = passed.chain(level).chain(self.heights.bends_s()).collect();
        cuts.sort_by(f64::total_cmp);
        cuts.dedup_by(|a, b| *a - *b < 1e-6);
        cuts
    }

    /// The Sun's sine against this horizon, and the elevation that its zero stands for: the trace beneath where one height
    /// holds, a trace of its own where the limit moves.
    pub fn trace<'t>(&self, beneath: &'t Trace, path: &Path, sky: &Sky) -> (Cow<'t, Trace>, Angle) {
        if self.heights.is_level() {
            return (Cow::Borrowed(beneath), self.limit_at(0.0).0);
        }
        let moving =
            Trace::against((path, sky), &self.cuts(), |span| self.nodes(span), |at_s| self.limit_at(at_s).0);
        (Cow::Owned(moving), Angle::ZERO)
    }
}

/// Finds when the flight deck sees the Sun: `trace` and `elevation` are what [`DeckHorizon::trace`] gives.
///
/// # Accuracy
/// That of the crossings beneath, with the limit of the standard atmosphere at the height flown ([`Horizon`]).
pub fn deck(seen: &DeckHorizon, (trace, elevation): (&Trace, Angle), airborne_s: f64) -> Deck {
    let level = Level { limit: Limit::Horizon, elevation };
    let (mut crossings, mut touches) = (Vec::new(), Vec::new());
    meetings(trace, level, &mut crossings, &mut touches);
    let begins_visible = trace.peaks()[0].sine >= level.sine();
    let height = seen.heights.highest();
    Deck {
        height,
        horizon: seen.horizon.height(),
        limit: seen.horizon.sun_centre_limit(height, seen.semidiameter),
        dip: seen.horizon.dip(height),
        refraction: seen.horizon.refraction(height),
        segments: segments(begins_visible, &crossings, airborne_s),
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
