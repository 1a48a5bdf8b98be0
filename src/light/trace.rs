//! The sine of the Sun's elevation over a whole path: one curve for each stretch, and the points where it turns.

use crate::curve::{Bandwidth, Curve};
use crate::path::{Leg, Path};
use crate::sky::{MEAN_SUN_RAD_S, Sky, SunWindow, sine_of_elevation};
use crate::units::{Angle, Four, wgs84};

/// The Sun's true rate about the axis exceeds the mean one by less than this factor: the equation of time changes by
/// less than 30 s a day and the declination by less than 0.4° a day, which is 0.0012 of a turn together.
const TRUE_SUN: f64 = 1.003;

/// The sine of the Sun's elevation along a path, ready to be searched.
#[derive(Debug, Clone)]
pub struct Trace {
    curves: Vec<Curve>,
    /// Where the sine begins, turns or passes to the next curve, and ends; between two of these it is monotone.
    peaks: Vec<Peak>,
}

/// A point between which and the next the Sun only rises or only sets.
#[derive(Debug, Clone, Copy)]
pub struct Peak {
    /// Seconds from take-off.
    pub at_s: f64,
    /// Sine of the geometric elevation.
    pub sine: f64,
    /// Which curve leads on from here.
    pub(super) curve: usize,
}

impl Trace {
    /// The sine of the Sun's elevation less that of a limit which changes on the way; the limit is smooth between `cuts`,
    /// given in seconds from take-off in rising order, and 16 nodes hold it there.
    pub(super) fn against(path: &Path, sky: &Sky, cuts: &[f64], limit: impl Fn(f64) -> Angle) -> Self {
        let window = sky.window(path.takeoff, path.landing());
        let mut curves = Vec::with_capacity(path.legs().len() + cuts.len());
        for leg in path.legs() {
            let inner = cuts.iter().copied().filter(|&cut| leg.begin_s < cut && cut < leg.end_s);
            let mut begin_s = leg.begin_s;
            for end_s in inner.chain(std::iter::once(leg.end_s)) {
                fit_against(leg, &window, (begin_s, end_s), &limit, &mut curves);
                begin_s = end_s;
            }
        }
        let peaks = peaks(&curves, path);
        Self { curves, peaks }
    }

    /// The Sun's elevation beneath the aircraft.
    pub fn beneath(path: &Path, sky: &Sky) -> Self {
        let window = sky.window(path.takeoff, path.landing());
        let mut curves = Vec::with_capacity(path.legs().len());
        for leg in path.legs() {
            fit(leg, &window, (leg.begin_s, leg.end_s), &mut curves);
        }
        let peaks = peaks(&curves, path);
        Self { curves, peaks }
    }

    /// Where the curve begins, turns, is joined and ends, in order of time.
    pub fn peaks(&self) -> &[Peak] {
        &self.peaks
    }

    /// The crossing of a level between one peak and the next, which lie on both sides of it; seconds from take-off.
    pub(super) fn meets(&self, level: f64, after: usize) -> f64 {
        let (from, to) = (self.peaks[after], self.peaks[after + 1]);
        self.curves[from.curve].meets(level, from.sine < level, from.at_s, to.at_s)
    }

    /// The highest point of the whole path.
    pub fn highest(&self) -> Peak {
        self.peaks.iter().copied().fold(self.peaks[0], |best, p| if p.sine > best.sine { p } else { best })
    }

    /// The lowest point of the whole path.
    pub fn lowest(&self) -> Peak {
        self.peaks.iter().copied().fold(self.peaks[0], |best, p| if p.sine < best.sine { p } else { best })
    }
}

/// How fast the Sun and the vertical turn on a leg.
pub(super) fn band(leg: &Leg) -> Bandwidth {
    Bandwidth { body_rad_s: TRUE_SUN * MEAN_SUN_RAD_S, path_rad_s: leg.speed_m_s() / wgs84::R_MIN_M }
}

/// Appends the curves of a leg: one, or those of its halves where one polynomial would need too many nodes.
fn fit(leg: &Leg, window: &SunWindow<'_>, span: (f64, f64), curves: &mut Vec<Curve>) {
    let sine = |t: Four| sine_of_elevation(leg.normal(t), &window.at(t));
    if let Some(curve) = Curve::through(span.0, span.1, band(leg), sine) {
        curves.push(curve);
    } else {
        let middle = f64::midpoint(span.0, span.1);
        fit(leg, window, (span.0, middle), curves);
        fit(leg, window, (middle, span.1), curves);
    }
}

/// Appends the curves of one stretch of a leg against a changing limit.
fn fit_against(
    leg: &Leg,
    window: &SunWindow<'_>,
    span: (f64, f64),
    limit: &impl Fn(f64) -> Angle,
    curves: &mut Vec<Curve>,
) {
    let gap = |t: Four| {
        let limits = Four::from(t.to_array().map(|t| limit(t).rad().sin()));
        sine_of_elevation(leg.normal(t), &window.at(t)) - limits
    };
    if let Some(curve) = Curve::through_at_least_16(span.0, span.1, band(leg), gap) {
        curves.push(curve);
    } else {
        let middle = f64::midpoint(span.0, span.1);
        fit_against(leg, window, (span.0, middle), limit, curves);
        fit_against(leg, window, (middle, span.1), limit, curves);
    }
}

fn peaks(curves: &[Curve], path: &Path) -> Vec<Peak> {
    let mut peaks = Vec::with_capacity(2 * curves.len() + 4);
    for (index, curve) in curves.iter().enumerate() {
        peaks.push(Peak { at_s: curve.begin_s(), sine: curve.first(), curve: index });
        let turns = curve.turning_points();
        peaks.extend(curve.turns(&turns).map(|(at_s, sine)| Peak { at_s, sine, curve: index }));
    }
    let last = curves.len() - 1;
    peaks.push(Peak { at_s: path.airborne_s, sine: curves[last].last(), curve: last });
    peaks
}
