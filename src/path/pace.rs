//! A flight flown by speeds: legs are cut where the speed changes, so that each has one.
//!
//! Does not know heights.

use super::fly::{Fix, Flown};
use super::geodesic::Line;
use super::leg::Leg;
use crate::intake::{Flight, Mark, Pace};
use crate::units::Place;

/// A change of speed so near to a point of the route is taken as at it: a shorter leg would have no direction.
const NEAR_M: f64 = 1e-3;

/// A stretch flown at one speed.
struct Piece {
    from: Place,
    to: Place,
    line: Line,
    times: (f64, f64),
}

/// Where the flight is and how fast, while it is laid out.
struct Walk {
    pieces: Vec<Piece>,
    passed_s: Vec<f64>,
    now_s: f64,
    flown_m: f64,
    speed_m_s: f64,
    /// The ground speeds to come, the next one last.
    changes: Vec<(Mark, f64)>,
}

/// Flies through points at given speeds. Where the landing is given as well, `fit` makes the time by speeds into the time
/// in the air, or refuses to, and all times are stretched alike.
pub(super) fn paced<E>(
    flight: &Flight,
    fixes: &[Fix<'_>],
    fit: impl Fn(f64) -> Result<f64, E>,
) -> Result<Flown, E> {
    let changes = flight.profile.iter().rev().filter_map(|p| Some((p.at, p.ground_speed_m_s?)));
    let mut walk = Walk {
        pieces: Vec::with_capacity(fixes.len() + flight.profile.len()),
        passed_s: Vec::with_capacity(fixes.len()),
        now_s: 0.0,
        flown_m: 0.0,
        speed_m_s: 0.0,
        changes: changes.collect(),
    };
    if let Pace::Ground { speed_m_s } = flight.pace {
        walk.speed_m_s = speed_m_s;
    }
    let winds = flight.waypoints.iter().map(|point| point.wind_m_s).chain(std::iter::once(None));
    for (pair, wind) in fixes.windows(2).zip(winds) {
        if let Pace::Air { speed_m_s, wind_m_s } = flight.pace {
            walk.speed_m_s = speed_m_s + wind.unwrap_or(wind_m_s);
        }
        walk.leg(pair[0].place, pair[1].place);
    }
    let airborne_s = fit(walk.now_s)?;
    let stretch = if walk.now_s > 0.0 { airborne_s / walk.now_s } else { 1.0 };
    let leg = |piece: Piece| {
        let (begin_s, end_s) = piece.times;
        // the last ends exactly at the landing, whatever the product rounds to
        let end_s = if end_s < walk.now_s { end_s * stretch } else { airborne_s };
        Leg::new(piece.from, piece.to, piece.line, (begin_s * stretch, end_s))
    };
    Ok(Flown {
        legs: walk.pieces.into_iter().map(leg).collect(),
        passed_s: walk.passed_s.into_iter().map(|at_s| at_s * stretch).collect(),
        airborne_s,
    })
}

impl Walk {
    fn leg(&mut self, from: Place, to: Place) {
        let whole = Line::between(from, to);
        let (mut here, mut done_m) = (from, 0.0);
        let last_m = whole.length_m() - NEAR_M;
        while let Some(ahead_m) = self.next_change_m().filter(|ahead_m| done_m + ahead_m < last_m) {
            if ahead_m > NEAR_M {
                done_m += ahead_m;
                let there = Place::from_normal(whole.normal(done_m));
                self.go(here, there, Line::between(here, there));
                here = there;
            }
            if let Some((_, speed_m_s)) = self.changes.pop() {
                self.speed_m_s = speed_m_s;
            }
        }
        // a part of a shortest line is the shortest line of its ends
        let rest = if done_m > 0.0 { Line::between(here, to) } else { whole };
        self.go(here, to, rest);
        self.passed_s.push(self.now_s);
    }

    /// How far ahead the speed changes next; a change that is behind already is due.
    fn next_change_m(&self) -> Option<f64> {
        let ahead_m = match self.changes.last()?.0 {
            Mark::Time(at_s) => (at_s - self.now_s) * self.speed_m_s,
            Mark::Distance(at) => at.0 - self.flown_m,
        };
        Some(ahead_m.max(0.0))
    }

    fn go(&mut self, from: Place, to: Place, line: Line) {
        let begin_s = self.now_s;
        let length_m = line.length_m();
        self.now_s += length_m / self.speed_m_s;
        self.flown_m += length_m;
        if self.now_s > begin_s {
            self.pieces.push(Piece { from, to, line, times: (begin_s, self.now_s) });
        }
    }
}
