//! How far north and south a path reaches.

use super::fly::Path;
use crate::units::Place;

/// A place with the time it is passed, in seconds from take-off.
#[derive(Debug, Clone, Copy)]
pub struct Passed {
    /// Seconds from take-off.
    pub at_s: f64,
    /// Where.
    pub place: Place,
}

impl Path {
    /// The northernmost point: exact, by the geodesics' vertices.
    pub fn northernmost(&self) -> Passed {
        self.farthest(|place| place.lat.deg())
    }

    /// The southernmost point.
    pub fn southernmost(&self) -> Passed {
        self.farthest(|place| -place.lat.deg())
    }

    fn farthest(&self, measure: impl Fn(Place) -> f64) -> Passed {
        let start = Passed { at_s: 0.0, place: self.legs()[0].from };
        let points = self.legs().iter().flat_map(|leg| {
            let vertices = leg
                .line()
                .vertices()
                .map(|d| Passed { at_s: leg.time_s(d), place: Place::from_normal(leg.line().normal(d)) });
            vertices.chain(std::iter::once(Passed { at_s: leg.end_s, place: leg.to })).collect::<Vec<_>>()
        });
        points.fold(start, |best, p| if measure(p.place) > measure(best.place) { p } else { best })
    }
}
