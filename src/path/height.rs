//! The height flown: straight lines between points of time, continuous from take-off to landing.
//!
//! Heights are geometric, above mean sea level. A flight level is a pressure height; in standard air both agree, and a
//! difference of 1,000 ft moves the deck's horizon by 0.05°.

use crate::units::Metres;

/// Heights over time.
#[derive(Debug, Clone, PartialEq)]
pub struct Heights {
    /// Seconds from take-off and metres, in order of time, from take-off to landing.
    points: Vec<(f64, f64)>,
}

/// How a flight climbs to its level and comes down from it.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Climb {
    pub(super) from_m: f64,
    pub(super) level_m: f64,
    pub(super) to_m: f64,
    /// Metres a second upwards, and downwards.
    pub(super) rates_m_s: (f64, f64),
}

impl Heights {
    /// One height from take-off to landing.
    pub fn level(height: Metres, airborne_s: f64) -> Self {
        Self { points: vec![(0.0, height.0), (airborne_s, height.0)] }
    }

    /// Straight between points of seconds and metres, the first at take-off, the last at landing, times rising.
    pub(super) fn through(points: Vec<(f64, f64)>) -> Self {
        Self { points }
    }

    /// Up at one rate, along, and down at the other; a flight too short for its level turns where both lines meet.
    pub(super) fn climbing(climb: Climb, airborne_s: f64) -> Self {
        let Climb { from_m, level_m, to_m, rates_m_s: (up, down) } = climb;
        let top_of_climb = (level_m - from_m) / up;
        let top_of_descent = airborne_s - (level_m - to_m) / down;
        let inner = if top_of_climb <= top_of_descent {
            vec![(top_of_climb, level_m), (top_of_descent, level_m)]
        } else {
            // from + up t = to + down (T − t)
            let turn = ((to_m - from_m + down * airborne_s) / (up + down)).clamp(0.0, airborne_s);
            vec![(turn, (from_m + up * turn).max(to_m))]
        };
        let mut points = vec![(0.0, from_m)];
        points.extend(inner);
        points.push((airborne_s, to_m));
        Self { points }
    }

    /// The height at a time in seconds from take-off.
    pub fn at(&self, seconds: f64) -> Metres {
        let next = self.points.partition_point(|p| p.0 <= seconds).clamp(1, self.points.len() - 1);
        let ((t0, h0), (t1, h1)) = (self.points[next - 1], self.points[next]);
        let share = if t1 > t0 { ((seconds - t0) / (t1 - t0)).clamp(0.0, 1.0) } else { 1.0 };
        Metres(h0 + share * (h1 - h0))
    }

    /// The greatest height.
    pub fn highest(&self) -> Metres {
        Metres(self.points.iter().map(|p| p.1).fold(f64::MIN, f64::max))
    }

    /// Whether one height holds from take-off to landing.
    pub fn is_level(&self) -> bool {
        self.points.iter().all(|p| p.1 == self.points[0].1)
    }

    /// Seconds from take-off at which the rate of climb changes, ends included.
    pub fn bends_s(&self) -> impl Iterator<Item = f64> {
        self.points.iter().map(|p| p.0)
    }

    /// The same strictly between two times, found without looking at the rest: a recording has tens of thousands.
    pub(super) fn bends_within_s(&self, begin_s: f64, end_s: f64) -> impl Iterator<Item = f64> {
        let from = self.points.partition_point(|p| p.0 <= begin_s);
        self.points[from..].iter().map(|p| p.0).take_while(move |&at_s| at_s < end_s)
    }

    /// Seconds from take-off at which a height is passed.
    pub fn passes_s(&self, height: Metres) -> impl Iterator<Item = f64> {
        self.points.windows(2).filter_map(move |pair| {
            let ((t0, h0), (t1, h1)) = (pair[0], pair[1]);
            let crosses = (h0 < height.0) != (h1 < height.0);
            crosses.then(|| t0 + (t1 - t0) * (height.0 - h0) / (h1 - h0))
        })
    }
}

#[cfg(test)]
mod tests {
    use super::{Climb, Heights};
    use crate::units::Metres;

    const CLIMB: Climb = Climb { from_m: 100.0, level_m: 10_000.0, to_m: 0.0, rates_m_s: (10.0, 5.0) };

    #[test]
    fn a_flight_climbs_cruises_and_descends() {
        let heights = Heights::climbing(CLIMB, 10_000.0);
        for (at, height) in [
            (0.0, 100.0),
            (495.0, 5050.0),
            (990.0, 10_000.0),
            (5000.0, 10_000.0),
            (9000.0, 5000.0),
            (10_000.0, 0.0),
        ] {
            assert!((heights.at(at).0 - height).abs() < 1e-6, "{at}");
        }
        assert_eq!(heights.passes_s(Metres(5050.0)).count(), 2);
        assert!(!heights.is_level() && heights.highest() == Metres(10_000.0));
    }

    #[test]
    fn a_flight_too_short_for_its_level_turns_below_it() {
        let heights = Heights::climbing(CLIMB, 900.0);
        assert!(heights.highest().0 < 10_000.0);
        assert!((heights.at(899.0).0 - 5.0).abs() < 1e-6 && (heights.at(1.0).0 - 110.0).abs() < 1e-6);
    }
}
