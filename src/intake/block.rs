//! Off blocks and on blocks: the time on the ground at either end, kept apart from the time in the air.

use super::draft::{Given, said};
use super::problem::{Problem, Stands};
use crate::units::Instant;

/// The longest that a flight taxies.
const LONGEST_TAXI_H: f64 = 12.0;

/// When a flight comes on blocks.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum OnBlock {
    /// At a time.
    At(Instant),
    /// Seconds after landing.
    After(f64),
}

impl OnBlock {
    /// The instant, once the landing is known.
    pub fn after(self, landing: Instant) -> Instant {
        match self {
            Self::At(on) => on,
            Self::After(seconds) => landing.after_s(seconds),
        }
    }
}

/// What was given: at each end a time or a duration.
#[derive(Debug, Clone, Default)]
pub(super) struct GivenBlock {
    pub(super) off_block: Option<Given<Instant>>,
    pub(super) on_block: Option<Given<Instant>>,
    pub(super) taxi_out_s: Option<Given<f64>>,
    pub(super) taxi_in_s: Option<Given<f64>>,
}

impl GivenBlock {
    /// When it goes off blocks: not after take-off.
    pub(super) fn off(&self, takeoff: Instant) -> Stands<Option<Instant>> {
        let (off, origin) = match (&self.off_block, &self.taxi_out_s) {
            (Some(off), Some(_)) => {
                let both = Problem::Exclusive { one: "off_block", other: "taxi_out" };
                return Err((off.origin.clone(), both));
            }
            (Some(off), None) => (off.value, &off.origin),
            (None, Some(taxi)) => (takeoff.after_s(-taxi.value), &taxi.origin),
            (None, None) => return Ok(None),
        };
        let problem = match takeoff.since_s(off) / 3600.0 {
            hours if hours < 0.0 => Problem::OffBlockLate { off: said(off), takeoff: said(takeoff) },
            hours if hours > LONGEST_TAXI_H => Problem::LongTaxi { hours, longest: LONGEST_TAXI_H },
            _ if !off.is_answered_for() => Problem::Years { given: said(off) },
            _ => return Ok(Some(off)),
        };
        Err((origin.clone(), problem))
    }

    /// When it comes on blocks: not before landing, where that is known already.
    pub(super) fn on(&self, landing: Option<Instant>) -> Stands<Option<OnBlock>> {
        let (on, origin) = match (&self.on_block, &self.taxi_in_s) {
            (Some(on), Some(_)) => {
                return Err((on.origin.clone(), Problem::Exclusive { one: "on_block", other: "taxi_in" }));
            }
            (Some(on), None) => (OnBlock::At(on.value), &on.origin),
            (None, Some(taxi)) => (OnBlock::After(taxi.value), &taxi.origin),
            (None, None) => return Ok(None),
        };
        let taxi_s = match (on, landing) {
            (OnBlock::After(seconds), _) => seconds,
            (OnBlock::At(on), Some(landing)) => on.since_s(landing),
            (OnBlock::At(_), None) => 0.0,
        };
        let problem = match (taxi_s / 3600.0, on, landing) {
            (hours, OnBlock::At(on), Some(landing)) if hours < 0.0 => {
                Problem::OnBlockEarly { on: said(on), landing: said(landing) }
            }
            (hours, ..) if hours > LONGEST_TAXI_H => Problem::LongTaxi { hours, longest: LONGEST_TAXI_H },
            (_, OnBlock::After(seconds), Some(landing)) if !landing.after_s(seconds).is_answered_for() => {
                Problem::Years { given: said(landing.after_s(seconds)) }
            }
            _ => return Ok(Some(on)),
        };
        Err((origin.clone(), problem))
    }
}
