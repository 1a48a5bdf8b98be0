//! The sine of the Sun's or the Moon's elevation over a whole path: one curve for each stretch, and the points where it turns.

use crate::curve::{Bandwidth, Curve, Near};
use crate::path::{Leg, Path};
use crate::sky::{MEAN_SUN_RAD_S, Sky, sine_of_elevation};
use crate::units::{Angle, Four, wgs84};

/// The Sun's true rate about the axis exceeds the mean one by less than this factor: the equation of time changes by
/// less than 30 s a day and the declination by less than 0.4° a day, which is 0.0012 of a turn together.
const TRUE_SUN: f64 = 1.003;
/// The Moon's rate about the axis in rad/s, as a bound: the Earth's own turn (IERS Conventions 2010, table 1.2) and the
/// Moon's motion against the stars, at most 16° a day, as if they added up; in fact it follows the turn, at 14.49° an hour.
const MOON_RAD_S: f64 = 7.292_115e-5 + 16.0 / 86_400.0 * (std::f64::consts::PI / 180.0);

/// The sine of the Sun's elevation along a path, or by how much the Moon's exceeds its limit's, ready to be searched.
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
    /// Sine of the geometric elevation; for the Moon less the sine of its limit.
    pub sine: f64,
    /// Which curve leads on from here.
    pub(super) curve: usize,
}

impl Trace {
    /// The sine of the Sun's elevation less that of a limit which changes on the way; the limit is smooth between `cuts`,
    /// given in seconds from take-off in rising order, and `nodes` says how many hold it over a span between two.
    pub(super) fn against(
        (path, sky): (&Path, &Sky),
        cuts: &[f64],
        nodes: impl Fn((f64, f64)) -> usize,
        limit: impl Fn(f64) -> Angle,
    ) -> Self {
        let window = sky.window(path.takeoff, path.landing());
        let through = |leg: &Leg, span: (f64, f64)| {
            Curve::through_at_least(nodes(span), span, band(leg), |t| {
                let limits = Four::from(t.to_array().map(|t| limit(t).rad().sin()));
                sine_of_elevation(leg.normal(t), &window.at(t)) - limits
            })
        };
        let mut curves = Vec::with_capacity(path.legs().len() + cuts.len());
        let mut cuts = cuts.iter().copied().peekable();
        for leg in path.legs() {
            let mut begin_s = leg.begin_s;
            while cuts.next_if(|&cut| cut <= leg.begin_s).is_some() {}
            let inner = std::iter::from_fn(|| cuts.next_if(|&cut| cut < leg.end_s));
            for end_s in inner.chain(std::iter::once(leg.end_s)) {
                fit(leg, &through, (begin_s, end_s), &mut curves);
                begin_s = end_s;
            }
        }
        let peaks = peaks(&curves, path);
        Self { curves, peaks }
    }

    /// The Sun's elevation beneath the aircraft.
    pub fn beneath(path: &Path, sky: &Sky) -> Self {
        let window = sky.window(path.takeoff, path.landing());
        Self::fitted(path, |leg, (begin_s, end_s)| {
            let band = band(leg);
            Curve::through(begin_s, end_s, band, |t| sine_of_elevation(leg.normal(t), &window.at(t)))
        })
    }

    /// The Moon beneath the aircraft: the sine of its elevation less that of the limit at which it rises and sets, which
    /// drifts by a few seconds of arc in a flight. The level at which it rises and sets is therefore 0.
    pub fn moon_beneath(path: &Path, sky: &Sky) -> Self {
        let window = sky.moon_window(path.takeoff, path.landing());
        Self::fitted(path, |leg, span| {
            let near = Near::new(band_of(leg, MOON_RAD_S));
            Curve::through_near(span, near, |t| {
                let moon = window.at(t);
                sine_of_elevation(leg.normal(t), &moon) - moon.sine_of_rise_limit()
            })
        })
    }

    /// The curves of all legs, each made by `through`.
    #[inline]
    fn fitted(path: &Path, through: impl Fn(&Leg, (f64, f64)) -> Option<Curve>) -> Self {
        let mut curves = Vec::with_capacity(path.legs().len());
        for leg in path.legs() {
            fit(leg, &through, (leg.begin_s, leg.end_s), &mut curves);
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
    band_of(leg, TRUE_SUN * MEAN_SUN_RAD_S)
}

/// How fast a body and the vertical turn on a leg.
fn band_of(leg: &Leg, body_rad_s: f64) -> Bandwidth {
    Bandwidth { body_rad_s, path_rad_s: leg.speed_m_s() / wgs84::R_MIN_M }
}

/// Appends the curves of a leg: one, or those of its halves where one polynomial would need too many nodes.
fn fit(
    leg: &Leg,
    through: &impl Fn(&Leg, (f64, f64)) -> Option<Curve>,
    span: (f64, f64),
    curves: &mut Vec<Curve>,
) {
    if let Some(curve) = through(leg, span) {
        curves.push(curve);
    } else {
        let middle = f64::midpoint(span.0, span.1);
        fit(leg, through, (span.0, middle), curves);
        fit(leg, through, (middle, span.1), curves);
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
