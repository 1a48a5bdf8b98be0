//! Crossings of one limit, and the places where the Sun only touches it.

use super::limit::{Direction, Limit};
use super::trace::{Peak, Trace};
use crate::units::Angle;

/// How near to a limit a turning Sun is said to touch it: what its elevation may err by, as a sum of causes.
pub const TOUCH: Angle = Angle::from_arcsec(SUN_PLACE_ARCSEC + POLAR_MOTION_ARCSEC + CURVE_ARCSEC);
/// The Sun's apparent place and its table against JPL DE421.
const SUN_PLACE_ARCSEC: f64 = 0.03;
/// Polar motion, which is left out (IERS Conventions 2010, section 5.1: within 0.3″ in the years served).
const POLAR_MOTION_ARCSEC: f64 = 0.3;
/// The curve in place of the elevation, far more than it needs.
const CURVE_ARCSEC: f64 = 0.01;

/// The Sun meets a limit.
#[derive(Debug, Clone, Copy)]
pub struct Crossing {
    /// Seconds from take-off.
    pub at_s: f64,
    /// Which limit.
    pub limit: Limit,
    /// Upwards or downwards.
    pub direction: Direction,
}

/// The Sun turns so near to a limit that the model cannot tell whether it crosses.
#[derive(Debug, Clone, Copy)]
pub struct Touch {
    /// Seconds from take-off.
    pub at_s: f64,
    /// Which limit.
    pub limit: Limit,
    /// Elevation less the limit, where the Sun turns.
    pub margin: Angle,
}

/// A limit with the elevation that it has here: the four limits' own, or that of a horizon seen from a height.
#[derive(Debug, Clone, Copy)]
pub(super) struct Level {
    pub(super) limit: Limit,
    pub(super) elevation: Angle,
}

impl Level {
    pub(super) fn sine(self) -> f64 {
        self.elevation.rad().sin()
    }
}

impl From<Limit> for Level {
    fn from(limit: Limit) -> Self {
        Self { limit, elevation: limit.elevation() }
    }
}

/// On which side of a limit a peak lies, as far as can be told.
#[derive(Clone, Copy, PartialEq, Eq)]
enum Side {
    Above,
    Below,
    Undecided,
}

/// A body meets a level.
pub(super) enum Meeting {
    /// So many seconds from take-off, upwards or downwards.
    Crossing(f64, Direction),
    /// It turns too near to the level to be decided.
    Touch(Peak),
}

/// Finds a limit's crossings and touches; appends both.
pub(super) fn meetings(trace: &Trace, at: Level, crossings: &mut Vec<Crossing>, touches: &mut Vec<Touch>) {
    let (limit, level, cosine) = (at.limit, at.sine(), at.elevation.rad().cos());
    search(trace, level, TOUCH.rad() * cosine, |meeting| match meeting {
        Meeting::Crossing(at_s, direction) => crossings.push(Crossing { at_s, limit, direction }),
        Meeting::Touch(peak) => {
            let margin = Angle::from_rad((peak.sine - level) / cosine);
            touches.push(Touch { at_s: peak.at_s, limit, margin });
        }
    });
}

/// Tells every meeting of a trace with a level, in order of time; a turn within `margin` of it is a touch.
#[inline]
pub(super) fn search(trace: &Trace, level: f64, margin: f64, mut tell: impl FnMut(Meeting)) {
    let peaks = trace.peaks();
    let last = peaks.len() - 1;
    let strict = |i: usize| if peaks[i].sine >= level { Side::Above } else { Side::Below };
    let side = |i: usize| {
        let near = (peaks[i].sine - level).abs() < margin && i > 0 && i < last;
        if near { Side::Undecided } else { strict(i) }
    };
    let mut from = 0;
    for to in 1..=last {
        if side(to) == Side::Undecided {
            continue;
        }
        if side(from) == side(to) {
            // a run of undecided peaks between two on one side: the one nearest to the far side is the touch
            if let Some(peak) = touch(&peaks[from..=to], level) {
                tell(Meeting::Touch(peak));
            }
        } else {
            let before = (from..to).find(|&i| strict(i) != strict(i + 1)).unwrap_or(from);
            let direction = if side(to) == Side::Above { Direction::Rising } else { Direction::Setting };
            tell(Meeting::Crossing(trace.meets(level, before), direction));
        }
        from = to;
    }
}

/// The touch within a run of peaks whose ends lie on one side, if there are peaks between them.
fn touch(run: &[Peak], level: f64) -> Option<Peak> {
    let inner = run.get(1..run.len() - 1)?;
    let from_above = run[0].sine >= level;
    let deepest =
        |a: &&Peak, b: &&Peak| if from_above { a.sine.total_cmp(&b.sine) } else { b.sine.total_cmp(&a.sine) };
    let peak = inner.iter().min_by(deepest)?;
    // a Sun that only passes from one curve to the next here does not turn
    let lies_beyond = |end: &Peak| if from_above { peak.sine < end.sine } else { peak.sine > end.sine };
    (lies_beyond(&run[0]) && lies_beyond(&run[run.len() - 1])).then_some(*peak)
}
