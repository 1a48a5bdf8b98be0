//! When a low Sun stands ahead: visible, no higher than a limit, and within a sector of the track.
//!
//! Knows neither the windscreen nor the visors, nor the wind that turns the nose away from the track.
//!
//! # How it is found
//! With the traveller's level unit vectors t ahead and r to the right, and the Sun's direction u, a = u·t and b = u·r are
//! cos(elevation) times the cosine and the sine of the Sun's bearing β from the track. For k ≤ 90°, |β| ≤ k if and only if
//! a sin k + b cos k ≥ 0 and a sin k − b cos k ≥ 0. Each is u·w for a unit vector w = t sin k ± r cos k that is fixed in the
//! traveller's frame, and is held by a curve as the sine of elevation u·n is:
//! * bandwidth. In the notation of [`crate::curve::error_bound`]'s derivation, t is exactly
//!   R(ψ) ((−sin σ, sin α₀ cos σ, (1 − f) cos α₀ cos σ) + ψ′ (−sin α₀ sin σ, cos σ, 0)) / ((1 − f) √(1 + k² sin² σ)) with
//!   |ψ′| ≤ 0.0036 in the strip, so that the bound M of n holds for it but for 0.4 %, which its 1.2 has room for. r = t × n is
//!   R(ψ) (O(2f), cos α₀, −sin α₀) but for terms below (2f + 0.0036) cosh(2 Im σ), which stay far below e^|Im σ|. w is no longer
//!   than √2 times the longer of them: the error is below 3e−9, 0.0006″ of bearing over the cosine of elevation.
//! * derivatives. (t, n, r) turns as one body, by the geodesic's curvature and torsion, no faster than v/R with R the
//!   smallest radius of curvature: the bounds on n's derivatives are w's.
//!
//! Parallax and diurnal aberration are in; the aberration by the aircraft's own speed (0.2″) is not. The upper edge is where
//! the sine of elevation passes that of the geometric elevation which is seen at the limit from the height flown; the lower
//! one is the horizon's own crossings, which the caller hands in.

use super::span::{Span, common, follows, not_above, not_negative};
use super::trace::{Trace, band};
use crate::path::{Leg, Path};
use crate::sky::{
    ApparentElevation, GeometricElevation, SeenAt, Sky, SunWindow, apparent_aloft, elevation,
    geometric_aloft, level_part,
};
use crate::units::{Angle, Four, Metres, Place};

/// To what the smallest bearing of a span is found.
const BEARING_STEP: Angle = Angle::from_deg(0.005);

/// What counts as a low Sun ahead.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Sector {
    /// The largest bearing from the track to either side, at most 90°.
    pub half_width: Angle,
    /// The largest at which it is strong.
    pub strong: Angle,
    /// The highest that the Sun is seen.
    pub up_to: ApparentElevation,
}

/// The Sun at an end of a span.
#[derive(Debug, Clone, Copy)]
pub struct SunAhead {
    /// Seconds from take-off.
    pub at_s: f64,
    /// Geometric elevation of its centre.
    pub elevation: GeometricElevation,
    /// The elevation at which it is seen.
    pub apparent: ApparentElevation,
    /// Its bearing from the track: clockwise positive. Where the track turns, that of the leg within the span.
    pub relative_bearing: Angle,
}

/// A stretch of time, [begin, end), in which a low Sun stands ahead.
#[derive(Debug, Clone)]
pub struct AheadSpan {
    /// The Sun at its beginning.
    pub begin: SunAhead,
    /// The Sun at its end.
    pub end: SunAhead,
    /// The smallest bearing from the track, to either side, to 0.005°.
    pub least_bearing: Angle,
    /// The parts in which it is strong, in seconds from take-off.
    pub strong: Vec<(f64, f64)>,
}

/// What is looked for, and when the Sun shows.
#[derive(Debug, Clone, Copy)]
pub struct Watch<'a> {
    /// When the Sun is above the horizon, in seconds from take-off, in order.
    pub visible: &'a [(f64, f64)],
    /// What counts.
    pub sector: Sector,
}

/// Finds the spans of a path in which a low Sun stands ahead.
///
/// # Accuracy
/// Edges within 0.05 s of the model's own where the bearing changes by a degree a minute, and none missed that lasts: see
/// the file's head. In a climb through the tropopause the upper edge's elevation is held to 1″. While holding over one point no direction is ahead.
pub fn ahead(trace: &Trace, path: &Path, sky: &Sky, watch: &Watch<'_>) -> Vec<AheadSpan> {
    let low = common(watch.visible, &low_enough(trace, path, sky, watch.sector.up_to));
    let window = sky.window(path.takeoff, path.landing());
    let mut found: Vec<AheadSpan> = Vec::new();
    for leg in path.legs().iter().filter(|leg| leg.length_m() > 0.0) {
        let view = View { path, leg, window: &window, sector: &watch.sector };
        for span in common(&low, &[(leg.begin_s, leg.end_s)]) {
            for part in view.within(span, watch.sector.half_width) {
                append(&mut found, view.part(part));
            }
        }
    }
    found
}

/// Appends a part, to the last span where it goes on from that.
fn append(found: &mut Vec<AheadSpan>, part: AheadSpan) {
    match found.last_mut() {
        Some(last) if follows((last.begin.at_s, last.end.at_s), (part.begin.at_s, part.end.at_s)) => {
            last.end = part.end;
            if part.least_bearing.rad() < last.least_bearing.rad() {
                last.least_bearing = part.least_bearing;
            }
            last.strong = super::span::joined(last.strong.iter().copied().chain(part.strong).collect());
        }
        _ => found.push(part),
    }
}

/// When the Sun is seen no higher than a limit, from the height flown, or from sea level where none is known.
fn low_enough(trace: &Trace, path: &Path, sky: &Sky, up_to: ApparentElevation) -> Vec<Span> {
    match &path.heights {
        Some(heights) if !heights.is_level() => {
            // the limit has a kink where the height passes the standard air's
            let mut cuts: Vec<f64> = heights.bends_s().chain(heights.passes_s(SeenAt::KINK)).collect();
            cuts.sort_by(f64::total_cmp);
            let seen = SeenAt::new(up_to);
            // the limit moves by a few hundredths of a degree over the whole atmosphere: in ten seconds by nothing that a
            // cubic would not hold
            let nodes = |(begin_s, end_s): (f64, f64)| if end_s - begin_s <= 10.0 { 4 } else { 16 };
            not_above(
                &Trace::against((path, sky), &cuts, nodes, |at_s| seen.geometric(heights.at(at_s)).0),
                0.0,
            )
        }
        _ => not_above(trace, geometric_aloft(up_to, eye(path, 0.0)).0.rad().sin()),
    }
}

/// The height from which the Sun is looked at.
fn eye(path: &Path, at_s: f64) -> Metres {
    path.heights.as_ref().map_or(Metres(0.0), |heights| heights.at(at_s))
}

/// The view along one leg.
struct View<'a> {
    path: &'a Path,
    leg: &'a Leg,
    window: &'a SunWindow<'a>,
    sector: &'a Sector,
}

impl View<'_> {
    /// The spans within one in which the Sun's bearing is at most `width` to either side.
    fn within(&self, span: Span, width: Angle) -> Vec<Span> {
        let (sin, cos) = width.rad().sin_cos();
        let side = |span: Span, cos: f64| {
            let f = |t: Four| {
                let frame = self.leg.frame(t);
                let along: [Four; 3] = std::array::from_fn(|i| {
                    Four::splat(sin) * frame.ahead[i] + Four::splat(cos) * frame.right[i]
                });
                level_part(frame.normal, along, &self.window.at(t))
            };
            not_negative(span, band(self.leg), &f)
        };
        let right = side(span, -cos);
        right.into_iter().flat_map(|span| side(span, cos)).collect()
    }

    /// A span of this leg with what is said of it.
    fn part(&self, span: Span) -> AheadSpan {
        let (begin, end) = (self.sun(span.0), self.sun(span.1));
        AheadSpan {
            begin,
            end,
            least_bearing: self.least_bearing(span, begin.relative_bearing, end.relative_bearing),
            strong: self.within(span, self.sector.strong),
        }
    }

    fn sun(&self, at_s: f64) -> SunAhead {
        let (frame, sun) = (self.leg.frame(at_s), self.window.at(at_s));
        let part = |along| level_part(frame.normal, along, &sun);
        let elevation = elevation(Place::from_normal(frame.normal), &sun);
        SunAhead {
            at_s,
            elevation,
            apparent: apparent_aloft(elevation, eye(self.path, at_s)),
            relative_bearing: Angle::from_rad(part(frame.right).atan2(part(frame.ahead))),
        }
    }

    /// The smallest bearing to either side: zero if the Sun changes sides, else by halving the width at which it is still
    /// found.
    fn least_bearing(&self, span: Span, begin: Angle, end: Angle) -> Angle {
        if begin.rad() * end.rad() <= 0.0 {
            return Angle::ZERO;
        }
        let mut reached = begin.rad().abs().min(end.rad().abs());
        let mut missed = 0.0;
        // most often it is that at an end
        let mut width = reached - BEARING_STEP.rad();
        while width > missed {
            if self.within(span, Angle::from_rad(width)).is_empty() {
                missed = width;
            } else {
                reached = width;
            }
            width = f64::midpoint(missed, reached);
            if reached - missed <= BEARING_STEP.rad() * 1.001 {
                break;
            }
        }
        Angle::from_rad(reached)
    }
}
