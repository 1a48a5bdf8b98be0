//! How far a crossing's time can be trusted: the elevation's uncertainty carried over to time along the path.
//!
//! The limit is shifted up and down by one standard deviation of all that is uncertain about the elevation, and the
//! crossing of the shifted limit is found on the same curve. That is the deviation over the rate where the Sun moves
//! steadily, holds the second-order term where it grazes, and shows where a crossing might not happen at all.

use super::limit::Limit;
use super::meet::{Crossing, Level, TOUCH};
use super::sample::Sample;
use super::trace::{Peak, Trace};
use crate::units::Angle;

/// One standard deviation of horizontal refraction at sea level.
///
/// # Source
/// Sampson, Lozowski, Peterson and Hube 2003, PASP 115:1256: 0.175° in 379 sunrises and sunsets at one place; Schaefer
/// and Liller 1990, PASP 102:796, give 0.16° (facts seen in abstracts and quotations).
pub const REFRACTION_SCATTER: Angle = Angle::from_deg(0.175);
/// One standard deviation of UT1 − UTC where it is not given: any value within 0.9 s is as likely.
const UT1_S: f64 = 0.9 / 1.732_050_8;
/// The Earth's turn in radians a second of UT1.
const EARTH_RAD_S: f64 = 7.292_115e-5;
/// What a root may err by in seconds: the search's own promise.
const TIMING_S: f64 = 0.05;

/// How far a crossing can be trusted.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Trust {
    /// One standard deviation of its time in seconds.
    pub uncertainty_s: f64,
    /// Whether refraction's scatter could do away with it and its neighbour.
    pub doubtful: bool,
}

/// A turn of the Sun so near to a limit that refraction's scatter could add a pair of crossings, or take one away.
#[derive(Debug, Clone, Copy)]
pub struct Doubt {
    /// Seconds from take-off.
    pub at_s: f64,
    /// Which limit.
    pub limit: Limit,
    /// Elevation less the limit, where the Sun turns.
    pub margin: Angle,
    /// Whether the Sun turns at a top (from rising to setting) or at a bottom.
    pub top: bool,
}

/// How uncertain an elevation is, as one standard deviation.
///
/// `scatter` is refraction's share: [`REFRACTION_SCATTER`] on the horizon at sea level, nothing at a geometric limit.
pub fn elevation_scatter(sample: &Sample, scatter: Angle, ut1_known: bool) -> Angle {
    let ut1_s = if ut1_known { 0.0 } else { UT1_S };
    let turn =
        EARTH_RAD_S * ut1_s * sample.position.place.lat.angle().rad().cos() * sample.azimuth.rad().sin();
    Angle::from_rad((scatter.rad().powi(2) + turn.powi(2) + TOUCH.rad().powi(2)).sqrt())
}

/// How far a crossing of a level can be trusted, for a given uncertainty of elevation.
pub fn trust(trace: &Trace, crossing: &Crossing, elevation: Angle, uncertainty: Angle) -> Trust {
    let shifted = |by: Angle| {
        let level = Level { limit: crossing.limit, elevation: elevation + by };
        reached(trace, crossing.at_s, level.sine())
    };
    let (up, down) = (shifted(uncertainty), shifted(-uncertainty));
    let late = |reach: &Reach| (reach.at_s - crossing.at_s).abs();
    Trust { uncertainty_s: late(&up).max(late(&down)).hypot(TIMING_S), doubtful: up.turned || down.turned }
}

/// Where a shifted level is met, or how far the Sun comes towards it.
struct Reach {
    at_s: f64,
    /// Whether the Sun turns before it gets there.
    turned: bool,
}

/// Follows the monotone run through a crossing to a neighbouring level.
fn reached(trace: &Trace, from_s: f64, sine: f64) -> Reach {
    let peaks = trace.peaks();
    let last = peaks.len() - 2;
    let mut at = peaks.partition_point(|p| p.at_s <= from_s).saturating_sub(1).min(last);
    let rising = peaks[at + 1].sine >= peaks[at].sine;
    let runs_on = |i: usize| (peaks[i + 1].sine >= peaks[i].sine) == rising;
    let forward = (sine >= peaks[at].sine.max(peaks[at + 1].sine)) == rising;
    loop {
        let (a, b) = (peaks[at], peaks[at + 1]);
        if between(sine, a, b) {
            return Reach { at_s: trace.meets(sine, at), turned: false };
        }
        let end = if forward { b } else { a };
        let next = if forward { (at < last).then(|| at + 1) } else { at.checked_sub(1) };
        match next {
            Some(next) if runs_on(next) => at = next,
            Some(_) => return Reach { at_s: end.at_s, turned: true },
            None => return Reach { at_s: end.at_s, turned: false },
        }
    }
}

fn between(sine: f64, a: Peak, b: Peak) -> bool {
    (sine >= a.sine) != (sine >= b.sine)
}

/// The turns of the Sun within `scatter` of a level.
pub fn doubts(trace: &Trace, (limit, elevation): (Limit, Angle), scatter: Angle) -> Vec<Doubt> {
    let near = trace.peaks().windows(3).filter_map(|three| {
        let top = three[1].sine > three[0].sine && three[1].sine > three[2].sine;
        let bottom = three[1].sine < three[0].sine && three[1].sine < three[2].sine;
        let margin = Angle::from_rad(three[1].sine.clamp(-1.0, 1.0).asin()) - elevation;
        let is_near = (top || bottom) && margin.rad().abs() < scatter.rad();
        is_near.then_some(Doubt { at_s: three[1].at_s, limit, margin, top })
    });
    near.collect()
}
