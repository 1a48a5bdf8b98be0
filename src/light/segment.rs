//! The states between crossings, and how long each holds.

use super::limit::{Direction, State};
use super::meet::Crossing;

/// A stretch of time, [begin, end), in which one state holds.
#[derive(Debug, Clone, Copy)]
pub struct Segment {
    /// What holds.
    pub state: State,
    /// Seconds from take-off to its beginning.
    pub begin_s: f64,
    /// Seconds from take-off to its end.
    pub end_s: f64,
}

impl Segment {
    /// Its length in seconds.
    pub fn seconds(&self) -> f64 {
        self.end_s - self.begin_s
    }
}

/// The segments from take-off to landing: they tile the flight.
pub(super) fn segments(at_takeoff: State, crossings: &[Crossing], airborne_s: f64) -> Vec<Segment> {
    let mut segments = Vec::with_capacity(crossings.len() + 1);
    let (mut state, mut begin_s) = (at_takeoff, 0.0);
    for crossing in crossings {
        if crossing.at_s > begin_s {
            segments.push(Segment { state, begin_s, end_s: crossing.at_s });
        }
        state = match crossing.direction {
            Direction::Rising => crossing.limit.above(),
            Direction::Setting => crossing.limit.below(),
        };
        begin_s = crossing.at_s;
    }
    if airborne_s > begin_s {
        segments.push(Segment { state, begin_s, end_s: airborne_s });
    }
    segments
}

/// Seconds spent in each state.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct StateSeconds([f64; State::ALL.len()]);

impl StateSeconds {
    pub(super) fn of(segments: &[Segment]) -> Self {
        let mut seconds = [0.0; State::ALL.len()];
        for segment in segments {
            seconds[segment.state as usize] += segment.seconds();
        }
        Self(seconds)
    }

    /// Seconds in one state.
    pub fn in_state(&self, state: State) -> f64 {
        self.0[state as usize]
    }
}
