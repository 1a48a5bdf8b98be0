//! The whole answer for one path and one vantage.

use super::limit::{Limit, State};
use super::meet::{Crossing, Touch, meetings};
use super::segment::{Segment, StateSeconds, segments};
use super::trace::{Peak, Trace};
use crate::path::Path;
use crate::sky::Sky;

/// The light that a path meets, as seen from sea level beneath the aircraft.
#[derive(Debug, Clone)]
pub struct Light {
    /// Every crossing of a limit, in order of time.
    pub crossings: Vec<Crossing>,
    /// Every turn of the Sun that is too near to a limit to be decided.
    pub touches: Vec<Touch>,
    /// The states, one after another from take-off to landing.
    pub segments: Vec<Segment>,
    /// Seconds in each state.
    pub seconds: StateSeconds,
    /// The state at take-off.
    pub at_takeoff: State,
    /// The state at landing.
    pub at_landing: State,
    /// Where the Sun stands highest.
    pub highest: Peak,
    /// Where the Sun stands lowest.
    pub lowest: Peak,
}

/// Finds the light beneath a path.
///
/// # Accuracy
/// Crossing times within 0.05 s of the model's own, and none missed: see the room's promise.
pub fn along(path: &Path, sky: &Sky) -> Light {
    beneath(&Trace::beneath(path, sky), path.airborne_s)
}

/// The same from a trace that is at hand.
pub fn beneath(trace: &Trace, airborne_s: f64) -> Light {
    let mut crossings = Vec::with_capacity(8);
    let mut touches = Vec::new();
    for limit in Limit::ALL {
        meetings(trace, limit.into(), &mut crossings, &mut touches);
    }
    crossings.sort_by(|a, b| a.at_s.total_cmp(&b.at_s));
    touches.sort_by(|a, b| a.at_s.total_cmp(&b.at_s));
    let at_takeoff = State::of_sine(trace.peaks()[0].sine);
    let segments = segments(at_takeoff, &crossings, airborne_s);
    Light {
        seconds: StateSeconds::of(&segments),
        at_takeoff,
        at_landing: segments.last().map_or(at_takeoff, |segment| segment.state),
        highest: trace.highest(),
        lowest: trace.lowest(),
        crossings,
        touches,
        segments,
    }
}

impl Light {
    /// The state that holds from an instant on, in seconds from take-off; at landing and after, the last.
    pub fn state_at(&self, at_s: f64) -> State {
        let next = self.segments.partition_point(|segment| segment.end_s <= at_s);
        self.segments.get(next).map_or(self.at_landing, |segment| segment.state)
    }
}
