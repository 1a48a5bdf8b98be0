//! One leg: a geodesic flown at a constant ground speed.

use super::geodesic::{Frame, Line, LinePoint};
use crate::units::{Lane, Place};

/// A geodesic and the seconds, counted from take-off, between which it is flown.
#[derive(Debug, Clone)]
pub struct Leg {
    /// Where it begins.
    pub from: Place,
    /// Where it ends.
    pub to: Place,
    /// Seconds from take-off to its beginning.
    pub begin_s: f64,
    /// Seconds from take-off to its end.
    pub end_s: f64,
    line: Line,
    speed_m_s: f64,
}

impl Leg {
    pub(super) fn new(from: Place, to: Place, line: Line, times: (f64, f64)) -> Self {
        let (begin_s, end_s) = times;
        Self { from, to, begin_s, end_s, speed_m_s: line.length_m() / (end_s - begin_s), line }
    }

    /// Length in metres.
    pub fn length_m(&self) -> f64 {
        self.line.length_m()
    }

    /// Ground speed in metres a second.
    pub fn speed_m_s(&self) -> f64 {
        self.speed_m_s
    }

    /// The geodesic.
    pub fn line(&self) -> &Line {
        &self.line
    }

    /// The outward unit normal beneath the aircraft.
    #[inline]
    pub fn normal<L: Lane>(&self, seconds: L) -> [L; 3] {
        self.line.normal((seconds - L::splat(self.begin_s)) * L::splat(self.speed_m_s))
    }

    /// The traveller's directions; on a leg that leads nowhere those ahead and to the right mean nothing.
    #[inline]
    pub fn frame<L: Lane>(&self, seconds: L) -> Frame<L> {
        self.line.frame((seconds - L::splat(self.begin_s)) * L::splat(self.speed_m_s))
    }

    /// Normal and track.
    pub fn at(&self, seconds: f64) -> LinePoint {
        self.line.at((seconds - self.begin_s) * self.speed_m_s)
    }

    /// Seconds from take-off to a distance along the leg; its beginning for a leg that leads nowhere.
    pub(super) fn time_s(&self, distance_m: f64) -> f64 {
        if self.speed_m_s > 0.0 { self.begin_s + distance_m / self.speed_m_s } else { self.begin_s }
    }
}
